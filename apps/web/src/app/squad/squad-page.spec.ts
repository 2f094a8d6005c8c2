import { MatSortHarness } from '@angular/material/sort/testing';
import { MatTableHarness } from '@angular/material/table/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatDialogHarness } from '@angular/material/dialog/testing';
import type { Athlete } from '@stillstroke/contract/athletes';
import { coach, PageTest } from '../core/testing/page-test';
import { pageFindings } from '../core/testing/page-findings';
import { SquadPage } from './squad-page';

const made = (name: string, more: Partial<Athlete> = {}): Athlete => ({
  id: name.toLowerCase().replace(' ', '-'),
  name,
  squadId: 'masters',
  squadName: 'Masters squad',
  lastSession: '2026-11-28',
  sessionCount: 3,
  clipsToMark: 0,
  verticalAt: { left: 0.34, right: 0.58 },
  deactivated: false,
  ...more,
});
const masters = { id: 'masters', name: 'Masters squad', coaches: [], athleteCount: 2, deactivated: false };

describe('SquadPage', () => {
  let test: PageTest;

  async function open(
    address: string,
    athletes: Athlete[],
    more: { nextCursor?: string; total?: number } = {},
  ) {
    test = await PageTest.open('squad', SquadPage, address, coach);
    await test.answer('GET', '/api/squads', { items: [masters], nextCursor: null });
    return answerLists(athletes, more);
  }

  /** The list of the table and the one of what waits; both are the same call. */
  async function answerLists(athletes: Athlete[], more: { nextCursor?: string; total?: number } = {}) {
    const requests = await vi.waitFor(() => {
      const found = test.server.match((request) => request.urlWithParams.startsWith('/api/athletes'));
      expect(found.length).toBeGreaterThan(0);
      return found;
    });
    for (const request of requests) {
      request.flush({ items: athletes, nextCursor: null, total: athletes.length, ...more });
    }
    await test.settle();
    return requests.map((request) => request.request.urlWithParams);
  }

  it('shows the athletes, and what waits for the coach', async () => {
    await open('/squad', [
      made('Ines Corrow', { clipsToMark: 2 }),
      made('Mina Okafor', { lastSession: null }),
    ]);
    const table = await test.loader.getHarness(MatTableHarness);
    const [first, second] = await table.getCellTextByIndex();
    expect(first?.[0]).toBe('Ines Corrow');
    expect(second?.[1]).toBe('none yet');
    expect(test.element.querySelector('st-rail-glance svg')?.getAttribute('aria-label')).toBe(
      'Vertical at: left 34 %, right 58 % of the pull',
    );
    expect(test.element.querySelector('st-waiting-card')?.textContent).toContain('has 2 clips');
    expect(test.element.querySelector('h1')?.textContent).toBe('Masters squad');
  });

  it('lets the server sort, with the order in the address', async () => {
    await open('/squad', [made('Ines Corrow')]);
    const sort = await test.loader.getHarness(MatSortHarness);
    const [header] = await sort.getSortHeaders({ label: 'Clips to mark' });
    expect(await header?.getLabel()).toBe('Clips to mark');
    test.element.querySelector<HTMLElement>('th.mat-column-clipsToMark .mat-sort-header-container')?.click();
    await vi.waitFor(() => expect(test.url).toBe('/squad?sort=clipsToMark&direction=desc'));
    const [asked] = await answerLists([made('Tomas Vell')]);
    expect(asked).toContain('sort=clipsToMark&direction=desc');
  });

  it('reads filter, order and page from the address', async () => {
    const asked = await open(
      '/squad?squad=masters&search=ines&after=c25&from=25&deactivated=shown',
      [made('Ines Corrow')],
      { total: 26 },
    );
    expect(
      asked.some((url) => url.includes('squadId=masters&search=ines') && url.includes('cursor=c25')),
    ).toBe(true);
    expect(asked.some((url) => url.includes('includeDeactivated=true'))).toBe(true);
    expect(test.text).toContain('26–26 of 26');
  });

  it('turns pages with the cursor and finds the way back', async () => {
    await open('/squad', [made('Ines Corrow')], { nextCursor: 'c1', total: 2 });
    test.press('Next');
    await vi.waitFor(() => expect(test.url).toBe('/squad?after=c1&from=1'));
    await answerLists([made('Tomas Vell')], { total: 2 });
    expect(test.text).toContain('2–2 of 2');
    test.press('Previous');
    await vi.waitFor(() => expect(test.url).toBe('/squad'));
  });

  it('says why the list cannot be read, and asks again', async () => {
    test = await PageTest.open('squad', SquadPage, '/squad', coach);
    await test.answer('GET', '/api/squads', { items: [masters], nextCursor: null });
    const lists = await vi.waitFor(() => {
      const found = test.server.match((request) => request.urlWithParams.startsWith('/api/athletes'));
      expect(found).toHaveLength(2);
      return found;
    });
    lists.forEach((list) => list.flush(null, { status: 500, statusText: 'no' }));
    await test.settle();
    const retry = test.element.querySelector<HTMLButtonElement>('st-problem-message button');
    expect(test.element.querySelector('st-problem-message')?.textContent).toContain('Something went wrong');
    retry?.click();
    await answerLists([made('Ines Corrow')]);
    expect(test.text).toContain('Ines Corrow');
    expect(test.element.querySelector('st-problem-message')).toBeNull();
  });

  it('adds an athlete, and shows the server’s words when it refuses', async () => {
    await open('/squad', []);
    expect(test.text).toContain('No athletes yet');
    test.press('Add athlete');
    const dialog = await vi.waitFor(async () => test.overlays.getHarness(MatDialogHarness));
    const name = await dialog.getHarness(MatInputHarness.with({ label: 'Name' }));
    await name.setValue('Rhona Blythe');
    test.press('Add athlete');
    await test.refuse('POST', '/api/athletes', 409, 'name-taken');
    expect(await dialog.getText()).toContain('Refused: name-taken.');
    test.press('Add athlete');
    const sent = await test.answer('POST', '/api/athletes', made('Rhona Blythe'));
    expect(sent.request.body).toEqual({ name: 'Rhona Blythe', squadId: 'masters' });
    await answerLists([made('Rhona Blythe')]);
    await vi.waitFor(() => expect(test.text).toContain('Rhona Blythe'));
  });

  it('has nothing for axe to find', async () => {
    await open('/squad', [
      made('Ines Corrow', { clipsToMark: 1 }),
      made('Jakub Sorrel', { deactivated: true }),
    ]);
    expect(await pageFindings(test.element)).toEqual([]);
  });
});
