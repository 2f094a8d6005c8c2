import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test, type Page } from '@playwright/test';
import { CAST } from '../swimmer/cast';
import { FOREARM_M, UPPER_ARM_M } from '../swimmer/model/arm-motion';
import { rolled } from '../swimmer/model/camera';
import { POOL } from '../swimmer/render/look';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { DeskHands } from './desk-hands';
import type { Point } from './lane-four';
import { signInAs } from './sign-in';

/** The demo film, what it was drawn from, and its true joints. */
const film = CAST.find(({ name }) => name === 'ines-november');
if (!film) throw new Error('the film is not in the cast');
const { camera } = film;
const truth = JSON.parse(
  readFileSync(
    fileURLToPath(new URL('../../apps/api/demo-media/ines-november.truth.json', import.meta.url)),
    'utf8',
  ),
) as { frames: Record<'left' | 'right', number[][]> };

function jointsOf(arm: 'left' | 'right', frame: number): { shoulder: Point; elbow: Point; wrist: Point } {
  const [sx = 0, sy = 0, ex = 0, ey = 0, wx = 0, wy = 0] = truth.frames[arm][frame] ?? [];
  return { shoulder: { x: sx, y: sy }, elbow: { x: ex, y: ey }, wrist: { x: wx, y: wy } };
}

/** A place on the far wall, metres from where the camera looks: the wall's tiles are 0.2 m. */
function onWall(right: number, down: number): Point {
  const pxPerM = (camera.pixelsPerM * POOL.swimmerAt) / POOL.farWallAt;
  return rolled(camera, { x: right * pxPerM, y: down * pxPerM });
}

interface ClipFound {
  readonly id: string;
  readonly sessionId: string;
  readonly frameCount: number;
  readonly travel: string;
}

async function demoClip(page: Page): Promise<ClipFound> {
  const { body: athletes } = await callApi(page, 'GET', '/api/athletes?search=Ines');
  const all = (athletes as { items: { id: string; name: string }[] }).items;
  const ines = all.find(({ name }) => name === 'Ines Corrow');
  const { body: sessions } = await callApi(page, 'GET', `/api/athletes/${ines?.id ?? ''}/sessions`);
  const clips = (sessions as { items: { clips: ClipFound[] }[] }).items.flatMap((session) => session.clips);
  const found = clips.find(({ frameCount, travel }) => frameCount === film?.frames && travel === 'right');
  if (!found) throw new Error('the demo has no such clip');
  return found;
}

/** `0.29 m ± 0.01 m` */
function readMetres(text: string): { metres: number; u: number } {
  const [, metres, u] = /(-?[\d.]+) m ± ([\d.]+) m/.exec(text.replace('−', '-')) ?? [];
  return { metres: Number(metres), u: Number(u) };
}

test('a scale measures what is known of the rendered scene, and the view’s cautions are shown', async ({
  page,
}) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const desk = new DeskHands(page);
  const clip = await demoClip(page);
  await callApi(page, 'DELETE', `/api/clips/${clip.id}/scale`);
  const frame = 70;
  const panel = page.locator('st-scale-panel');
  const line = panel.getByText(/ m ± /);

  await test.step('the far arm is named with its size, by keyboard, and the near one is not', async () => {
    const { body } = await callApi(page, 'GET', `/api/clips/${clip.id}/marks`);
    const marks = (body as { items: { arm: string; frame: number }[] }).items;
    const left = marks.find(({ arm }) => arm === 'left');
    const right = marks.find(({ arm }) => arm === 'right');
    await page.goto(`/clips/${clip.id}?frame=${left?.frame ?? 0}&arm=left`);
    await desk.opened();
    const cautions = page.locator('st-readings st-view-cautions summary');
    const far = cautions.filter({ hasText: /Far arm, up to [\d.]+°/ }).first();
    await expect(far).toBeVisible();
    await far.focus();
    await page.keyboard.press('Enter');
    await expect(page.getByText(/The left arm is the far one in this view/).first()).toBeVisible();
    await expectAccessible(page, 'Desk with a caution open');
    await page.goto(`/clips/${clip.id}?frame=${right?.frame ?? 0}&arm=right`);
    await desk.opened();
    await expect(page.locator('st-readings .headline strong')).toBeVisible();
    await expect(cautions.filter({ hasText: 'Far arm' })).toHaveCount(0);
  });

  const drag = async (name: string, to: Point) => {
    const box = await page.locator(`st-scale-overlay button.${name}`).boundingBox();
    if (!box) throw new Error(`no point ${name}`);
    const at = await desk.place(to);
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2);
    await page.mouse.down();
    await page.mouse.move(at.x - 20, at.y + 10, { steps: 3 });
    await page.mouse.move(at.x, at.y, { steps: 3 });
    await page.mouse.up();
  };

  await test.step('a forearm of known length on the picture gives the upper arm within its uncertainty', async () => {
    await page.goto(`/clips/${clip.id}?frame=${frame}&arm=right`);
    await desk.opened();
    await desk.openPanel('Set-up');
    await panel.getByRole('button', { name: 'Use a known length' }).click();
    const { shoulder, elbow, wrist } = jointsOf('right', frame);
    await drag('from', elbow);
    await drag('to', wrist);
    await panel.getByLabel('Length, metres').fill(String(FOREARM_M));
    await page.keyboard.press('Tab');
    await panel.getByRole('button', { name: 'Points are in place' }).click();
    await panel.getByRole('button', { name: 'Measure a distance' }).click();
    await drag('line-from', shoulder);
    await drag('line-to', elbow);
    const { metres, u } = readMetres(await line.innerText());
    expect(u).toBeGreaterThan(0);
    expect(u).toBeLessThan(0.03);
    expect(Math.abs(metres - UPPER_ARM_M), `${metres} ± ${u} m`).toBeLessThanOrEqual(2 * u);
    await desk.saved();
    await expectAccessible(page, 'Desk with a scale');
  });

  await test.step('reach and depth of the hand are there in metres, and true', async () => {
    const { body } = await callApi(page, 'GET', `/api/clips/${clip.id}/measures`);
    const { items, scalePlane } = body as {
      scalePlane: string;
      items: {
        arm: 'left' | 'right';
        inMetres: { handDepth: { value: number | null; uncertainty: number; frame: number } };
      }[];
    };
    expect(scalePlane).toBe('swimmer');
    expect(items.length).toBeGreaterThan(3);
    for (const { arm, inMetres } of items) {
      const { value, uncertainty, frame: at } = inMetres.handDepth;
      const { shoulder, wrist } = jointsOf(arm, at);
      const roll = (camera.rollDeg * Math.PI) / 180;
      const [dx, dy] = [wrist.x - shoulder.x, wrist.y - shoulder.y];
      const known = (dx * Math.sin(roll) + dy * Math.cos(roll)) / camera.pixelsPerM;
      expect(Math.abs((value ?? NaN) - known), `${arm} ${value} for ${known} m`).toBeLessThanOrEqual(
        3 * uncertainty,
      );
    }
    await page.reload();
    await desk.opened();
    await expect(page.locator('st-hand-readings')).toContainText(/Deepest hand\s*0\.\d+ m ±/);
  });

  await test.step('tiles of the wall, by numbers, give another metre of the wall within its uncertainty', async () => {
    await desk.openPanel('Set-up');
    await panel.getByRole('button', { name: 'Take the scale away' }).click();
    await panel.getByRole('button', { name: 'Use a rectangle' }).click();
    await panel.getByText('Points by numbers').click();
    const type = async (label: string, { x, y }: Point) => {
      await panel.getByLabel(`${label}, from the left`).fill(x.toFixed(1));
      await page.keyboard.press('Tab');
      await panel.getByLabel(`${label}, from above`).fill(y.toFixed(1));
      await page.keyboard.press('Tab');
    };
    // Seven tiles by two.
    const corners = [onWall(-0.8, 0.1), onWall(0.6, 0.1), onWall(0.6, 0.5), onWall(-0.8, 0.5)];
    for (const at of [1, 2, 3, 0]) {
      const corner = corners[at];
      if (corner) await type(`Corner ${at + 1} of the rectangle`, corner);
    }
    await panel.getByLabel('Corner 1 to 2, metres').fill('1.4');
    await page.keyboard.press('Tab');
    await panel.getByLabel('Corner 2 to 3, metres').fill('0.4');
    await page.keyboard.press('Tab');
    await panel.getByRole('button', { name: 'Measure a distance' }).click();
    await type('First end of the measuring line', onWall(-0.4, 0.7));
    await type('Second end of the measuring line', onWall(0.6, 0.7));
    const { metres, u } = readMetres(await line.innerText());
    expect(Math.abs(metres - 1), `${metres} ± ${u} m`).toBeLessThanOrEqual(2 * u);
    // Nothing holds it to account until a second length does, whose residual is then shown.
    await expect(panel).toContainText('says nothing about how right it is');
    await panel.getByRole('button', { name: 'Add a second known length' }).click();
    await type('First end of the second length', onWall(-0.6, -0.1));
    await type('Second end of the second length', onWall(0.4, -0.1));
    await expect(panel).toContainText(/reads [\d.]+ cm \([\d.]+ px\) too \w+: within what placing/);
    await desk.saved();
    await expectAccessible(page, 'Desk with a rectangle');
    // The wall is farther away than the swimmer: nothing of the swimmer is read with it.
    const { body } = await callApi(page, 'GET', `/api/clips/${clip.id}/measures`);
    const [first] = (body as { items: { inMetres: { handDepth: { reason: string } } }[] }).items;
    expect(first?.inMetres.handDepth.reason).toBe('scale-of-other-plane');
  });

  await test.step('each step can be undone, down to no scale', async () => {
    await page.getByRole('button', { name: /^Undo/ }).first().click();
    await expect(panel).not.toContainText('within what placing');
    await panel.getByRole('button', { name: 'Take the scale away' }).click();
    await desk.saved();
    const { body } = await callApi(page, 'GET', `/api/clips/${clip.id}/scale`);
    expect(body).toMatchObject({ scale: null });
  });

  await test.step('Compare has one line about it under its sentence', async () => {
    await page.goto(`/sessions/${clip.sessionId}/compare`);
    const said = page.locator('st-caution-line summary');
    await expect(said).toContainText(/About the view: .*up to [\d.]+°/);
    await said.focus();
    await page.keyboard.press('Enter');
    await expect(page.locator('st-caution-line li').first()).toContainText(/Far arm \(left arm\)/);
    await expectAccessible(page, 'Compare with its cautions open');
  });
});
