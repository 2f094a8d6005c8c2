import { expect, test, type Page } from '@playwright/test';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { DeskHands } from './desk-hands';
import { signInAs } from './sign-in';

interface Point {
  readonly x: number;
  readonly y: number;
}
interface Mark {
  readonly arm: 'left' | 'right';
  readonly frame: number;
  readonly shoulder: Point;
  readonly elbow: Point;
  readonly wrist: Point;
  readonly uncertaintyDeg: { readonly forearmDeg: number };
}
interface Clip {
  readonly id: string;
  readonly width: number;
  readonly height: number;
  readonly markedFrames: number;
  readonly jointUncertaintyOwn: boolean;
}

const OFF = 14;

/** A clip of the demo whose marks are all the coach's own. */
async function markedClip(page: Page): Promise<Clip> {
  const athletes = (await callApi(page, 'GET', '/api/athletes')).body as { items: { id: string }[] };
  const sessions = (await callApi(page, 'GET', `/api/athletes/${athletes.items[0]?.id}/sessions`)).body as {
    items: { clips: Clip[] }[];
  };
  const clip = sessions.items.flatMap(({ clips }) => clips).find(({ markedFrames }) => markedFrames > 12);
  if (!clip) throw new Error('no marked clip');
  return clip;
}

async function press(page: Page, clip: Clip, point: Point): Promise<void> {
  const box = await page.locator('st-stage .pointers').boundingBox();
  if (!box) throw new Error('no stage');
  const scale = Math.min(box.width / clip.width, box.height / clip.height);
  await page.mouse.click(
    box.x + (box.width - clip.width * scale) / 2 + point.x * scale,
    box.y + (box.height - clip.height * scale) / 2 + point.y * scale,
  );
}

test('marking again changes how far the readings can be trusted', async ({ page }) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const clip = await markedClip(page);
  const marks = async () =>
    ((await callApi(page, 'GET', `/api/clips/${clip.id}/marks`)).body as { items: Mark[] }).items;
  const before = await marks();
  const [shown] = before;
  if (!shown) throw new Error('no mark');
  const desk = new DeskHands(page);
  const spread = async () => {
    await page.goto(`/clips/${clip.id}?frame=${shown.frame}&arm=${shown.arm}`);
    await desk.opened();
    const text = await page.locator('st-readings .headline .quiet').first().innerText();
    return Number(/±\s*([\d.]+)/.exec(text)?.[1]);
  };
  const spreadBefore = await spread();

  await test.step('begins from the clip’s marks', async () => {
    await desk.openPanel('Marks');
    await page.getByRole('link', { name: 'Mark some again' }).click();
    await expect(page.getByRole('heading', { level: 1, name: 'Mark again' })).toBeVisible();
    await expect(page.getByText('Nobody has marked again')).toBeVisible();
    await expectAccessible(page, 'before a round');
    await page.screenshot({ path: 'test-results/pages/mark-again-start-wide.png' });
    await page.getByRole('button', { name: 'Begin' }).click();
    await desk.opened();
  });

  await test.step('shows ten frames in random order without their marks, and keeps what is marked', async () => {
    const id = /marking-rounds\/([^?]+)/.exec(page.url())?.[1] ?? '';
    const round = (await callApi(page, 'GET', `/api/marking-rounds/${id}`)).body as {
      marks: { arm: string; frame: number }[];
    };
    expect(round.marks).toHaveLength(10);
    for (const [position, { arm, frame }] of round.marks.entries()) {
      await expect(page.locator('header .place')).toHaveText(`Frame ${position + 1} of 10`);
      await expect(page.locator('footer .arm')).toContainText(new RegExp(`${arm} arm`, 'i'));
      await desk.shows(frame);
      const first = before.find((mark) => mark.arm === arm && mark.frame === frame);
      if (!first) throw new Error(`${arm} ${frame} was not marked`);
      const way = position % 2 === 0 ? OFF : -OFF;
      for (const [joint, dx] of [
        [first.shoulder, way],
        [first.elbow, -way],
        [first.wrist, way],
      ] as const) {
        await press(page, clip, { x: joint.x + dx, y: joint.y - dx });
      }
      await expect(page.locator('header .save')).toHaveText('Saved');
      if (position === 4) {
        await page.screenshot({ path: 'test-results/pages/mark-again-round-wide.png' });
        await expectAccessible(page, 'a round');
        await page.reload();
        await desk.opened();
        await expect(page.locator('header .place')).toHaveText('Frame 6 of 10');
      } else if (position < 9) {
        await page.keyboard.press('n');
      }
    }
  });

  await test.step('says how closely the marks repeat', async () => {
    await page.getByRole('button', { name: 'Finish the round' }).click();
    await expect(page.getByRole('heading', { level: 1, name: 'Your marking' })).toBeVisible();
    await expect(page.locator('.st-lead')).toContainText('Your marks repeat within about');
    await expect(page.getByText('From 10 frames in 1 round')).toBeVisible();
    await expectAccessible(page, 'your marking');
    await page.screenshot({ path: 'test-results/pages/marking-wide.png', fullPage: true });
    await page.setViewportSize({ width: 390, height: 844 });
    await page.screenshot({ path: 'test-results/pages/marking-narrow.png', fullPage: true });
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - innerWidth);
    expect(overflow).toBeLessThanOrEqual(0);
    await page.setViewportSize({ width: 1320, height: 900 });
  });

  await test.step('which the Desk and the server carry into their ±', async () => {
    const now = (await marks())[0]?.uncertaintyDeg.forearmDeg ?? 0;
    expect(now).toBeGreaterThan(shown.uncertaintyDeg.forearmDeg * 1.5);
    const spreadNow = await spread();
    expect(spreadNow).toBeGreaterThan(spreadBefore);
    expect(Math.abs(spreadNow - now)).toBeLessThanOrEqual(0.5);
  });

  await test.step('until it is forgotten', async () => {
    await page.goto('/marking');
    await page.getByRole('button', { name: 'Forget all of it' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Forget them' }).click();
    await expect(page.getByText('No round yet')).toBeVisible();
    expect(await spread()).toBe(spreadBefore);
  });
});
