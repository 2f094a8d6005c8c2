import { MatDialogHarness } from '@angular/material/dialog/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatSelectHarness } from '@angular/material/select/testing';
import { MatTableHarness } from '@angular/material/table/testing';
import type { Person } from '@stillstroke/contract/people';
import { pageFindings } from '../core/testing/page-findings';
import { admin, PageTest } from '../core/testing/page-test';
import { PeoplePage } from './people-page';

const owen: Person = {
  id: 'owen',
  name: 'Owen Hale',
  email: 'owen@tarnvalley.example',
  role: 'coach',
  squadIds: ['masters'],
  athleteId: null,
  status: 'active',
  createdAt: '2026-06-01T08:00:00.000Z',
};
const masters = { id: 'masters', name: 'Masters squad', coaches: [], athleteCount: 5, deactivated: false };
const invited = {
  person: { ...owen, id: 'petra', name: 'Petra Lund', status: 'invited' },
  invitation: {
    url: 'https://club.example/invitation/abc',
    expiresAt: '2026-12-08T09:00:00.000Z',
    mailed: false,
  },
};

describe('PeoplePage', () => {
  let test: PageTest;

  async function open(people: Person[] = [owen]) {
    test = await PageTest.open('club/people', PeoplePage, '/club/people', admin);
    await test.answer('GET', '/api/squads', { items: [masters], nextCursor: null });
    await test.answer('GET', '/api/people', { items: people, nextCursor: null, total: people.length });
  }

  async function choose(person: string, action: string) {
    test.press(`More about ${person}`);
    await test.settle();
    test.press(action);
  }

  it('lists who has an account, with role, squads and status', async () => {
    await open([
      owen,
      { ...owen, id: 'm', name: 'Maud Corrow', role: 'guardian', squadIds: [], status: 'invited' },
    ]);
    const table = await test.loader.getHarness(MatTableHarness);
    const rows = await table.getCellTextByIndex();
    expect(rows.map((row) => row.slice(1, 4))).toEqual([
      ['Coach', 'Masters squad', 'active'],
      ['Guardian', '', 'invited, no password yet'],
    ]);
  });

  it('invites a coach and shows the link once, with its end and that it is shown only now', async () => {
    await open();
    test.press('Invite somebody');
    const dialog = await vi.waitFor(async () => test.overlays.getHarness(MatDialogHarness));
    await (await dialog.getHarness(MatInputHarness.with({ label: 'Name' }))).setValue('Petra Lund');
    await (
      await dialog.getHarness(MatInputHarness.with({ label: 'E-mail' }))
    ).setValue('petra@tarnvalley.example');
    const squads = await dialog.getHarness(MatSelectHarness.with({ label: 'Squads to coach' }));
    await squads.clickOptions({ text: 'Masters squad' });
    await squads.close();
    test.press('Make the invitation');
    const sent = await test.answer('POST', '/api/people', invited);
    expect(sent.request.body).toEqual({
      name: 'Petra Lund',
      email: 'petra@tarnvalley.example',
      role: 'coach',
      squadIds: ['masters'],
    });
    await test.answer('GET', '/api/people', { items: [owen], nextCursor: null, total: 1 });
    await vi.waitFor(() => expect(document.body.textContent).toContain('It is shown only now'));
    expect(document.body.textContent).toContain('8 December');
    const link = await test.overlays.getHarness(MatInputHarness.with({ label: 'Link' }));
    expect(await link.getValue()).toBe('https://club.example/invitation/abc');
  });

  it('shows the server’s words when an address is taken', async () => {
    await open();
    test.press('Invite somebody');
    const dialog = await vi.waitFor(async () => test.overlays.getHarness(MatDialogHarness));
    await (await dialog.getHarness(MatInputHarness.with({ label: 'Name' }))).setValue('Owen');
    await (
      await dialog.getHarness(MatInputHarness.with({ label: 'E-mail' }))
    ).setValue('owen@tarnvalley.example');
    test.press('Make the invitation');
    await test.refuse('POST', '/api/people', 409, 'email-taken');
    expect(await dialog.getText()).toContain('Refused: email-taken.');
  });

  it('deactivates only after the name has been typed', async () => {
    await open();
    await choose('Owen Hale', 'Deactivate');
    const dialog = await vi.waitFor(async () => test.overlays.getHarness(MatDialogHarness));
    const go = () => [...document.querySelectorAll<HTMLButtonElement>('mat-dialog-actions button')].at(-1);
    expect(go()?.disabled).toBe(true);
    await (await dialog.getHarness(MatInputHarness)).setValue('Owen Hale');
    expect(go()?.disabled).toBe(false);
    go()?.click();
    const sent = await test.answer('PATCH', '/api/people/owen', { ...owen, status: 'deactivated' });
    expect(sent.request.body).toEqual({ deactivated: true });
  });

  it('does not offer admins to lock themselves out', async () => {
    await open([{ ...owen, id: admin.id, name: 'Petra Lund', role: 'admin' }]);
    test.press('More about Petra Lund');
    await test.settle();
    const offered = [...document.querySelectorAll('[role=menuitem]')].map((item) => item.textContent?.trim());
    expect(offered).toEqual(['Change name or squads']);
  });

  it('has nothing for axe to find', async () => {
    await open();
    expect(await pageFindings(test.element)).toEqual([]);
  });
});
