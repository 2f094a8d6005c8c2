import { MatDialogHarness } from '@angular/material/dialog/testing';
import type { Athlete } from '@stillstroke/contract/athletes';
import type { Trend } from '@stillstroke/contract/trend';
import { ids, madeClip, madeSession } from '../core/testing/made';
import { pageFindings } from '../core/testing/page-findings';
import { athlete, coach, PageTest } from '../core/testing/page-test';
import { AthletePage } from './athlete-page';

const ines: Athlete = {
  id: ids.athlete,
  name: 'Ines Corrow',
  squadId: ids.squad,
  squadName: 'Masters squad',
  lastSession: '2026-11-28',
  sessionCount: 2,
  clipsToMark: 0,
  verticalAt: { left: 0.34, right: 0.58 },
  deactivated: false,
};
const point = (arm: 'left' | 'right', date: string, mean: number) => ({
  sessionId: `${arm}-${date}`,
  date,
  arm,
  mean,
  uncertainty: 0.02,
  count: 3,
  frames: [{ clipId: ids.clip, frame: 168 }],
});
const trend = {
  athleteId: ids.athlete,
  measure: 'verticalAt',
  unit: 'share',
  view: 'side-underwater',
  arms: [
    {
      arm: 'right',
      points: [point('right', '2026-07-04', 0.71), point('right', '2026-11-28', 0.58)],
      change: -0.13,
      detectable: 0.06,
      verdict: 'changed',
      slope: null,
    },
  ],
  leftOut: [],
} as unknown as Trend;
const call = `/api/athletes/${ids.athlete}`;
const pageOf = (items: object[], more: object = {}) => ({
  items,
  nextCursor: null,
  total: items.length,
  ...more,
});

describe('AthletePage', () => {
  let test: PageTest;

  async function open(user = coach, who = ines, sessions = pageOf([madeSession({ clips: [madeClip()] })])) {
    test = await PageTest.open('athletes/:athleteId', AthletePage, `/athletes/${ids.athlete}`, user);
    await test.answer('GET', call, who);
    await test.answer('GET', `${call}/sessions`, sessions);
    await test.answer('GET', `${call}/trend`, trend);
    await test.answer('GET', `${call}/targets`, { items: [], nextCursor: null });
    await test.answer('GET', `${call}/reviews`, pageOf([], { unread: 0 }));
  }

  it('says how the arms went before it shows it, and every figure leads to its frame', async () => {
    await open();
    expect(test.text).toContain(
      'Right arm earlier by 13 points since July: more than marking could produce.',
    );
    const figure = [...test.element.querySelectorAll('st-trend-card li a')].map((link) =>
      link.getAttribute('href'),
    );
    expect(figure).toEqual([`/clips/${ids.clip}?frame=168&arm=right`]);
    expect(test.element.querySelectorAll('st-glance-chart circle')).toHaveLength(2);
  });

  it('lists the sessions with what their clips are and gave', async () => {
    await open();
    expect(test.text).toContain('28 Nov, Tarn pool');
    expect(test.text).toContain('not marked yet');
    expect(test.text).toContain('60 frames a second');
  });

  it('grows by older sessions when asked', async () => {
    await open(coach, ines, pageOf([madeSession()], { nextCursor: 'older', total: 2 }));
    test.press('Show older (1 more)');
    const asked = await test.answer(
      'GET',
      `${call}/sessions`,
      pageOf([madeSession({ id: ids.otherSession, date: '2026-10-31' })], { total: 2 }),
    );
    expect(asked.request.urlWithParams).toContain('cursor=older');
    expect(test.text).toContain('31 Oct');
    expect(test.text).not.toContain('Show older');
  });

  it('deactivates after asking by name, and takes back in', async () => {
    await open();
    test.press('Deactivate');
    const dialog = await vi.waitFor(async () => test.overlays.getHarness(MatDialogHarness));
    expect(await dialog.getTitleText()).toBe('Deactivate Ines Corrow?');
    [...document.querySelectorAll<HTMLButtonElement>('mat-dialog-actions button')].at(-1)?.click();
    const sent = await test.answer('PATCH', call, { ...ines, deactivated: true });
    expect(sent.request.body).toEqual({ deactivated: true });
    test.press('Take back in');
    await test.answer('PATCH', call, ines);
    await vi.waitFor(() => expect(test.element.querySelector('header')?.textContent).toContain('Deactivate'));
  });

  it('gives the athlete the same to read, nothing to change, and the way to send clips', async () => {
    await open(athlete);
    expect(test.text).toContain('Right arm earlier');
    for (const words of ['Deactivate', 'Change']) expect(test.text).not.toContain(words);
    expect(test.element.querySelector('st-new-session-card')).not.toBeNull();
  });

  it('says plainly when there is no such athlete', async () => {
    test = await PageTest.open('athletes/:athleteId', AthletePage, `/athletes/${ids.athlete}`, coach);
    await test.refuse('GET', call, 404, 'not-found');
    expect(test.text).toContain('Refused: not-found.');
    expect(test.element.querySelector('st-problem-message button')).toBeNull();
  });

  it('has nothing for axe to find', async () => {
    await open();
    expect(await pageFindings(test.element)).toEqual([]);
  });
});
