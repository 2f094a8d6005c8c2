import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test, type Page } from '@playwright/test';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { DeskHands } from './desk-hands';
import { signInAs } from './sign-in';

/** The rendered pool moves past its swimmers at this speed; see test/swimmer. */
const SWIM_SPEED = 1.42;

interface TrueStroke {
  readonly arm: 'left' | 'right';
  readonly entryUs: number;
  readonly catchUs: number;
  readonly exitUs: number;
  readonly nextEntryUs: number | null;
}
interface Figure {
  readonly value: number | null;
  readonly uncertainty: number | null;
}
interface Measures {
  readonly items: readonly {
    readonly strokeId: string;
    readonly strokeLength: Figure;
    readonly strokeIndex: Figure;
  }[];
  readonly coordination: Figure & { readonly mode: string; readonly passages: readonly unknown[] };
}

function trueStrokes(film: string): readonly TrueStroke[] {
  const path = fileURLToPath(new URL(`../../apps/api/demo-media/${film}.truth.json`, import.meta.url));
  return (JSON.parse(readFileSync(path, 'utf8')) as { strokes: TrueStroke[] }).strokes;
}

/** Index of coordination from the exact event times, share of the mean cycle, passage after passage. */
function trueCoordination(strokes: readonly TrueStroke[]): number {
  const inOrder = [...strokes].sort((a, b) => a.entryUs - b.entryUs);
  const cycles = strokes.flatMap(({ entryUs, nextEntryUs }) =>
    nextEntryUs === null ? [] : [nextEntryUs - entryUs],
  );
  const cycle = cycles.reduce((sum, one) => sum + one, 0) / cycles.length;
  const lags: number[] = [];
  for (let at = 0; at + 2 < inOrder.length; at += 2) {
    const [first, other, second] = inOrder.slice(at, at + 3);
    if (first && other && second) {
      lags.push((first.exitUs - other.catchUs + other.exitUs - second.catchUs) / 2 / cycle);
    }
  }
  return lags.reduce((sum, one) => sum + one, 0) / lags.length;
}

async function newestClip(
  page: Page,
  athlete: string,
  name: string,
): Promise<{ clipId: string; sessionId: string }> {
  const { body } = await callApi(page, 'GET', '/api/athletes');
  const { items } = body as { items: { id: string; name: string }[] };
  const id = items.find((one) => one.name === athlete)?.id ?? '';
  const sessions = (await callApi(page, 'GET', `/api/athletes/${id}/sessions`)).body as {
    items: { id: string; clips: { id: string; name: string }[] }[];
  };
  const session = sessions.items.find(({ clips }) => clips.some((clip) => clip.name === name));
  const clip = session?.clips.find((one) => one.name === name);
  if (!session || !clip) throw new Error(`no clip ${name}`);
  return { clipId: clip.id, sessionId: session.id };
}

const measuresOf = async (page: Page, clipId: string) =>
  (await callApi(page, 'GET', `/api/clips/${clipId}/measures`)).body as Measures;

/** Within twice the stated standard uncertainty; with so few figures a third time is left for chance. */
function expectWithin({ value, uncertainty }: Figure, known: number, what: string): void {
  if (value === null || uncertainty === null) throw new Error(`${what}: no value`);
  expect(Math.abs(value - known), `${what}: ${value} ± ${uncertainty} for ${known}`).toBeLessThan(
    3 * uncertainty,
  );
}

test('a coach reads the timing of strokes, and the distance that gives them a length', async ({ page }) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const ines = await newestClip(page, 'Ines Corrow', 'IC_1128_side.mp4');
  const strokes = trueStrokes('ines-november');

  await test.step('the figures are those the swimmer was drawn with', async () => {
    const { items, coordination } = await measuresOf(page, ines.clipId);
    expectWithin(coordination, trueCoordination(strokes), 'index of coordination');
    const whole = strokes.filter(({ nextEntryUs }) => nextEntryUs !== null);
    const lengths = items.filter(({ strokeLength }) => strokeLength.value !== null);
    expect(lengths.length).toBe(whole.length);
    const trueLengths = whole.map(
      ({ entryUs, nextEntryUs }) => (SWIM_SPEED * ((nextEntryUs ?? 0) - entryUs)) / 1e6,
    );
    const mean = (values: readonly number[]) => values.reduce((sum, one) => sum + one, 0) / values.length;
    const read = mean(lengths.map(({ strokeLength }) => strokeLength.value ?? NaN));
    const u = mean(lengths.map(({ strokeLength }) => strokeLength.uncertainty ?? NaN));
    expectWithin({ value: read, uncertainty: u }, mean(trueLengths), 'mean stroke length');
  });

  await test.step('the Desk says the mode in words and leads to the passages', async () => {
    await page.goto(`/clips/${ines.clipId}`);
    await new DeskHands(page).opened();
    const both = page.getByRole('region', { name: 'Both arms, this clip' });
    await expect(both).toContainText('Catch-up: a gap between the pulls of the two arms');
    await expect(both).toContainText(/Index of coordination −\d+(\.\d)? % ± \d+(\.\d)? % of the cycle/);
    await expect(page.getByRole('region', { name: 'Timing of this stroke' })).toContainText(
      /Stroke length\s*\d\.\d\d? m/,
    );
    await expectAccessible(page, 'Desk with timing');
  });

  await test.step('Compare says it for the session, apart by breath, and lists length and index', async () => {
    await page.goto(`/sessions/${ines.sessionId}/compare`);
    const card = page.locator('st-both-arms');
    await expect(card).toContainText('Both arms together');
    await expect(card).toContainText('Catch-up');
    await expect(card).toContainText('With a breath');
    await expect(page.getByRole('heading', { name: 'Stroke length' })).toBeVisible();
    await expectAccessible(page, 'Compare with both arms');
  });

  await test.step('Trend follows the index as one line of both arms', async () => {
    const { body } = await callApi(page, 'GET', `/api/sessions/${ines.sessionId}`);
    await page.goto(`/athletes/${(body as { athleteId: string }).athleteId}/trend?measure=coordination`);
    await expect(page.getByRole('heading', { name: 'Index of coordination' })).toBeVisible();
    await expect(page.locator('.st-lead')).toContainText('Both arms');
  });

  const tomas = await newestClip(page, 'Tomas Vell', 'vell-26nov.mp4');
  await test.step('a distance entered on the Desk gives stroke length, and undo takes it back', async () => {
    await page.goto(`/clips/${tomas.clipId}`);
    const desk = new DeskHands(page);
    await desk.opened();
    const timing = page.getByRole('region', { name: 'Timing of this stroke' });
    await expect(timing).toContainText('say the distance swum first');
    // Before a tab has the focus, which keeps Home and the arrows to itself.
    await desk.goTo(40);
    await page.getByRole('tab', { name: 'Set-up' }).click();
    const part = page.locator('st-known-distance');
    // 5 m at 1.42 m/s are 3.52 s: 106 frames at 30 a second.
    await part.getByRole('button', { name: 'First frame of the distance: this frame' }).click();
    await page.getByRole('button', { name: 'One frame forward' }).click();
    for (let tens = 0; tens < 10; tens++) await page.keyboard.press('Shift+ArrowRight');
    for (let ones = 0; ones < 5; ones++) await page.keyboard.press('ArrowRight');
    await desk.shows(146);
    await part.getByRole('button', { name: 'Second frame of the distance: this frame' }).click();
    await part.getByLabel('Metres between them').fill('5');
    await part.getByLabel('Metres between them').blur();
    await expect(part).toContainText(/1\.4\d m\/s ± 0\.0\d m\/s/);
    await page.getByRole('tab', { name: 'Readings' }).click();
    await expect(timing).toContainText(/Stroke length\s*1\.\d\d? m/);
    await expect
      .poll(async () => (await measuresOf(page, tomas.clipId)).items[0]?.strokeLength.value ?? 0)
      .toBeGreaterThan(1.5);
    await page.keyboard.press('Control+z');
    await expect
      .poll(async () => (await measuresOf(page, tomas.clipId)).items[0]?.strokeLength.value ?? null)
      .toBeNull();
  });

  await test.step('W lets the wrist stand in for the hand, with a wider ±', async () => {
    const { body } = await callApi(page, 'GET', `/api/clips/${tomas.clipId}/strokes`);
    const [stroke] = (body as { items: { arm: 'left' | 'right'; exit: number; id: string }[] }).items;
    if (!stroke) throw new Error('no stroke');
    const before = (await measuresOf(page, tomas.clipId)).coordination.uncertainty ?? NaN;
    const desk = new DeskHands(page);
    await page.reload();
    await desk.opened();
    await desk.choose(stroke.arm);
    await desk.goTo(stroke.exit);
    await page.keyboard.press('w');
    await page.getByRole('tab', { name: 'Strokes' }).click();
    await expect(page.getByRole('button', { name: /^Wrist at the exit/ })).toHaveCount(1);
    await expect
      .poll(async () => (await measuresOf(page, tomas.clipId)).coordination.uncertainty ?? 0)
      .toBeGreaterThan(before);
  });
});
