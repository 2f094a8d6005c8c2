import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { pageFindings } from '../core/testing/page-findings';
import { admin, PageTest } from '../core/testing/page-test';
import { SquadsPage } from './squads-page';

const masters = {
  id: 'masters',
  name: 'Masters squad',
  coaches: [{ id: 'owen', name: 'Owen Hale' }],
  athleteCount: 5,
  deactivated: false,
};
const list = (items: object[]) => ({ items, nextCursor: null });

describe('SquadsPage', () => {
  let test: PageTest;

  async function open(squads: object[]) {
    test = await PageTest.open('club/squads', SquadsPage, '/club/squads', admin);
    await test.answer('GET', '/api/squads', list(squads));
  }

  it('shows each squad with its coaches', async () => {
    await open([
      masters,
      { ...masters, id: 'j', name: 'Juniors', coaches: [], athleteCount: 1, deactivated: true },
    ]);
    const said = [...test.element.querySelectorAll('li')].map((row) =>
      [...row.querySelectorAll('h2 > *, p')].map((part) => part.textContent?.trim()),
    );
    expect(said).toEqual([
      ['Masters squad', 'Owen Hale', '5 athletes'],
      ['Juniors', 'deactivated', 'no coach yet', '1 athlete'],
    ]);
    expect(await pageFindings(test.element)).toEqual([]);
  });

  it('makes a squad with its coaches', async () => {
    await open([]);
    test.press('New squad');
    await vi.waitFor(() => expect(document.querySelector('mat-dialog-container')).not.toBeNull());
    await test.answer('GET', '/api/people', {
      items: [{ id: 'owen', name: 'Owen Hale', status: 'active' }],
      nextCursor: null,
      total: 1,
    });
    const dialog = await test.overlays.getHarness(MatDialogHarness);
    await (await dialog.getHarness(MatInputHarness)).setValue('Masters squad');
    const coaches = await dialog.getHarness(MatSelectHarness);
    await coaches.clickOptions({ text: 'Owen Hale' });
    await coaches.close();
    test.press('Make the squad');
    const sent = await test.answer('POST', '/api/squads', masters);
    expect(sent.request.body).toEqual({ name: 'Masters squad', coachIds: ['owen'] });
    await test.answer('GET', '/api/squads', list([masters]));
    expect(test.text).toContain('Masters squad');
  });
});
