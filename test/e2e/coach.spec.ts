import { expect, test } from '@playwright/test';
import { callApi } from './api-of';
import { DeskHands } from './desk-hands';
import { laneFour, trueMark, trueStrokes, truth, type Arm } from './lane-four';
import { signInAs } from './sign-in';

interface AngleAnswer {
  readonly forearmDeg: number;
  readonly upperArmDeg: number;
  readonly elbowDeg: number;
  readonly elbowDropDeg: number;
}
interface MarkAnswer {
  readonly arm: Arm;
  readonly frame: number;
  readonly angles: AngleAnswer;
}

/** Angles of the rendered swimmer are known; see test/swimmer. */
function expectTrue(mark: MarkAnswer): void {
  const { forearmDeg, upperArmDeg, elbowDeg, elbowDropDeg } = trueMark(mark.arm, mark.frame);
  for (const [name, known] of Object.entries({ forearmDeg, upperArmDeg, elbowDeg, elbowDropDeg })) {
    const read = mark.angles[name as keyof AngleAnswer];
    expect(
      Math.abs(read - known),
      `${mark.arm} ${name} on frame ${mark.frame}: ${read} for ${known}`,
    ).toBeLessThanOrEqual(0.2);
  }
}

test('a coach measures a clip that came from a camera, and it changes what the pages say', async ({
  page,
}) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const desk = new DeskHands(page);

  await test.step('opens a session for an athlete and uploads the clip', async () => {
    await page.getByRole('link', { name: 'Tomas Vell' }).first().click();
    await expect(page.getByRole('heading', { name: 'Tomas Vell' })).toBeVisible();
    await page.getByRole('button', { name: /New session/ }).click();
    await page.getByLabel(/Place/).fill('Sallow Lido');
    await page.getByRole('button', { name: 'Open the session' }).click();
    await expect(page).toHaveURL(/\/sessions\//);
    await page.locator('st-upload-panel input[type=file]').setInputFiles(laneFour);
    const card = page.locator('st-clip-card').filter({ hasText: 'lane-four.mp4' });
    await expect(card).toContainText('162 frames', { timeout: 60_000 });
    await expect(card).toContainText('30');
    await expect(card.locator('img')).toBeVisible();
  });

  const sessionId = page.url().split('/').at(-1) ?? '';
  const { body: before } = await callApi(page, 'GET', `/api/sessions/${sessionId}`);
  const athleteId = (before as { athleteId: string }).athleteId;
  const countTrend = async () => {
    const { body } = await callApi(page, 'GET', `/api/athletes/${athleteId}/trend?measure=verticalAt`);
    return (body as { arms: { points: unknown[] }[] }).arms.reduce(
      (sum, { points }) => sum + points.length,
      0,
    );
  };
  const trendBefore = await countTrend();

  await test.step('refuses the same file a second time and says where it is', async () => {
    await page.locator('st-upload-panel input[type=file]').setInputFiles(laneFour);
    await expect(page.locator('st-upload-row').filter({ hasText: /already/i })).toBeVisible({
      timeout: 30_000,
    });
  });

  await page.getByRole('link', { name: 'Open on the Desk' }).first().click();
  await desk.opened();
  const clipId = /clips\/([^?]+)/.exec(page.url())?.[1] ?? '';

  await test.step('sets the plumb on something upright', async () => {
    await desk.openPanel('Set-up');
    await page.getByRole('button', { name: 'Draw the plumb' }).click();
    await desk.drag(truth.plumb.top, truth.plumb.bottom);
    await expect(page.getByText('Not set: the vertical of the picture is assumed.')).toBeHidden();
    await desk.saved();
  });

  const [right] = trueStrokes('right');
  const [left] = trueStrokes('left');
  if (!right || !left) throw new Error('the clip has strokes of both arms');

  await test.step('sets the events of a stroke of each arm with one key each', async () => {
    for (const stroke of [right, left]) {
      await desk.choose(stroke.arm);
      for (const [event, key] of [
        ['entry', 'e'],
        ['catch', 'c'],
        ['exit', 'x'],
        ['nextEntry', 'r'],
      ] as const) {
        await desk.goTo(stroke[event]);
        await page.keyboard.press(key);
      }
      if (stroke.breath) {
        await desk.goTo(stroke.catch);
        await page.keyboard.press('b');
      }
    }
    await desk.saved();
    const { body } = await callApi(page, 'GET', `/api/clips/${clipId}/strokes`);
    const stored = (body as { items: Record<string, unknown>[] }).items;
    for (const { arm, ...events } of [right, left]) {
      expect(stored.find((stroke) => stroke['arm'] === arm)).toMatchObject(events);
    }
  });

  await test.step('marks the right arm by pointer on the frames that the stroke needs', async () => {
    await desk.choose('right');
    await desk.goTo(right.entry);
    for (let needed = 0; needed < 6; needed++) {
      const before = await desk.frame();
      if (needed > 0) {
        await page.keyboard.press('n');
        await desk.leaves(before);
      }
      const frame = await desk.frame();
      const known = trueMark('right', frame);
      for (const joint of ['shoulder', 'elbow', 'wrist'] as const) await desk.press(known[joint]);
      await desk.saved();
    }
  });

  await test.step('marks the left arm by numbers, without the pointer', async () => {
    await desk.choose('left');
    await desk.openPanel('Marks');
    for (const frame of [left.catch, Math.round((left.catch + left.exit) / 2), left.exit]) {
      await desk.stage.focus();
      await desk.goTo(frame);
      await page.getByRole('button', { name: `Frame ${frame}, left arm, by numbers` }).focus();
      await page.keyboard.press('Enter');
      await expect(page.locator('st-marks-list legend')).toContainText(`frame ${frame},`);
      const known = trueMark('left', frame);
      for (const joint of ['shoulder', 'elbow', 'wrist'] as const) {
        const fields = (['from the left', 'from above'] as const).map((side) =>
          page.getByLabel(`${joint}, ${side}`),
        );
        await fields[0]?.fill(String(known[joint].x));
        await page.keyboard.press('Tab');
        // The first coordinate puts the joint down; its partner then shows where.
        await expect(fields[1] ?? page.locator('body')).not.toHaveValue('');
        await fields[1]?.fill(String(known[joint].y));
        await page.keyboard.press('Tab');
      }
      await desk.saved();
    }
  });

  await test.step('reads angles within 0.2° of the truth', async () => {
    const { body } = await callApi(page, 'GET', `/api/clips/${clipId}/marks`);
    const marks = (body as { items: MarkAnswer[] }).items;
    expect(marks.filter(({ arm }) => arm === 'right').length).toBe(6);
    expect(marks.filter(({ arm }) => arm === 'left').length).toBe(3);
    for (const mark of marks) expectTrue(mark);
    // What the page shows is that number, rounded as far as its uncertainty carries.
    await desk.openPanel('Readings');
    await desk.stage.focus();
    await desk.choose('right');
    await desk.goTo(right.catch);
    const shown = await page.locator('st-readings .headline strong').innerText();
    const known = trueMark('right', right.catch).forearmDeg;
    expect(Math.abs(Number(shown.replace('−', '-').replace('°', '')) - known)).toBeLessThanOrEqual(0.7);
  });

  await test.step('undoes and redoes a nudge, and nothing is lost by loading again', async () => {
    await page.keyboard.press('Alt+ArrowRight');
    await desk.saved();
    await page.keyboard.press('Control+z');
    await desk.saved();
    await page.reload();
    await desk.opened();
    const { body } = await callApi(page, 'GET', `/api/clips/${clipId}/marks`);
    for (const mark of (body as { items: MarkAnswer[] }).items) expectTrue(mark);
    await desk.openPanel('Marks');
    await expect(page.locator('st-marks-list tbody tr')).toHaveCount(9);
  });

  await test.step('marks the other strokes, and Compare and Trend change', async () => {
    await page.goto(`/sessions/${sessionId}/compare`);
    await expect(page.getByRole('heading', { name: /Too few strokes|Nothing to compare/ })).toBeVisible();
    for (const stroke of [...trueStrokes('right').slice(1), ...trueStrokes('left').slice(1)]) {
      const answer = await callApi(page, 'POST', `/api/clips/${clipId}/strokes`, stroke);
      expect(answer.status, JSON.stringify(answer.body)).toBe(201);
    }
    for (const stroke of [...trueStrokes('right'), ...trueStrokes('left')]) {
      for (let frame = stroke.catch; frame <= stroke.exit; frame += 3) {
        const { shoulder, elbow, wrist } = trueMark(stroke.arm, frame);
        const path = `/api/clips/${clipId}/marks/${stroke.arm}/${frame}`;
        expect((await callApi(page, 'PUT', path, { shoulder, elbow, wrist })).status).toBe(200);
      }
    }
    await page.reload();
    await expect(
      page.getByRole('heading', { level: 1, name: 'The right forearm comes to vertical later' }),
    ).toBeVisible();
    await expect(page.locator('st-pull-still canvas')).toHaveCount(2);
    await page.goto(`/athletes/${athleteId}/trend?measure=verticalAt`);
    await expect(page.getByRole('heading', { name: 'Vertical at' })).toBeVisible();
    expect(await countTrend()).toBe(trendBefore + 2);
    // Every point leads to its frame on the Desk.
    await page.locator('st-trend-chart a').last().click();
    await expect(page).toHaveURL(/\/clips\/.*frame=\d+/);
    await desk.opened();
  });

  await test.step('deletes the clip by name and takes that back', async () => {
    await page.goto(`/sessions/${sessionId}`);
    await page.getByRole('button', { name: 'More about lane-four.mp4' }).click();
    await page.getByRole('menuitem', { name: 'Delete' }).click();
    const asks = page.getByRole('dialog');
    await expect(asks).toContainText('lane-four.mp4');
    await asks.getByRole('button', { name: /^Delete/ }).click();
    await page.getByRole('button', { name: 'Undo' }).first().click();
    await expect(page.locator('st-clip-card')).toContainText('lane-four.mp4');
    const { body } = await callApi(page, 'GET', `/api/clips/${clipId}/marks`);
    expect((body as { items: unknown[] }).items.length).toBeGreaterThan(20);
  });
});
