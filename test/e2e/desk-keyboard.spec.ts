import { expect, test } from '@playwright/test';
import { callApi } from './api-of';
import { DeskHands } from './desk-hands';
import { laneFour } from './lane-four';
import { signInAs } from './sign-in';

/** Everything here is done by keys alone, from the address bar on. */
test('the Desk works with the keyboard alone', async ({ page }) => {
  test.slow();
  await signInAs(page, 'coach@northmere.example');
  const { items } = (await callApi(page, 'GET', '/api/athletes')).body as { items: { id: string }[] };
  const { body } = await callApi(page, 'POST', `/api/athletes/${items[0]?.id}/sessions`, {
    date: '2026-11-29',
  });
  await page.goto(`/sessions/${(body as { id: string }).id}`);
  await page.locator('st-upload-panel input[type=file]').setInputFiles(laneFour);
  const open = page.locator('st-clip-card').getByRole('link', { name: 'Open on the Desk' });
  await expect(open).toBeVisible({ timeout: 60_000 });
  await open.focus();
  await page.keyboard.press('Enter');
  const desk = new DeskHands(page);
  await desk.opened();
  const clipId = /clips\/([^?]+)/.exec(page.url())?.[1] ?? '';

  await test.step('lists the keys', async () => {
    await page.keyboard.press('?');
    await expect(page.getByRole('dialog')).toContainText('Next frame to mark');
    await page.keyboard.press('Escape');
    await expect(page.getByRole('dialog')).toBeHidden();
  });

  await test.step('places three joints at the crosshair and nudges one', async () => {
    await desk.choose('right');
    await desk.goTo(40);
    await desk.stage.focus();
    for (const move of ['Alt+Shift+ArrowUp', 'Alt+Shift+ArrowRight', 'Alt+Shift+ArrowDown']) {
      await page.keyboard.press(move);
      await page.keyboard.press('Enter');
    }
    await desk.saved();
    const marks = async () =>
      (
        (await callApi(page, 'GET', `/api/clips/${clipId}/marks`)).body as {
          items: { wrist: { x: number } }[];
        }
      ).items;
    const [placed] = await marks();
    expect(placed).toBeDefined();
    await page.keyboard.press('Alt+ArrowRight');
    await desk.saved();
    expect(((await marks())[0]?.wrist.x ?? 0) - (placed?.wrist.x ?? 0)).toBeCloseTo(1, 3);
    await page.keyboard.press('Control+z');
    await desk.saved();
    expect((await marks())[0]?.wrist.x).toBeCloseTo(placed?.wrist.x ?? 0, 3);
  });

  await test.step('Tab walks the joints and then leaves the stage', async () => {
    await desk.stage.focus();
    for (let presses = 0; presses < 8; presses++) await page.keyboard.press('Tab');
    expect(await desk.stage.evaluate((element) => element === document.activeElement)).toBe(false);
  });

  await test.step('removes the mark and takes that back', async () => {
    await desk.stage.focus();
    await page.keyboard.press('Delete');
    await desk.saved();
    const count = async () =>
      ((await callApi(page, 'GET', `/api/clips/${clipId}/marks`)).body as { items: unknown[] }).items.length;
    await expect.poll(count).toBe(0);
    await page.keyboard.press('Control+z');
    await expect.poll(count).toBe(1);
  });
});

test('a lost connection loses nothing', async ({ page, context }) => {
  test.slow();
  await signInAs(page, 'coach@northmere.example');
  const { items } = (await callApi(page, 'GET', '/api/athletes')).body as { items: { id: string }[] };
  const sessions = (await callApi(page, 'GET', `/api/athletes/${items[0]?.id}/sessions`)).body as {
    items: { clips: { id: string }[] }[];
  };
  const clipId = sessions.items.flatMap(({ clips }) => clips)[0]?.id ?? '';
  await page.goto(`/clips/${clipId}`);
  const desk = new DeskHands(page);
  await desk.opened();
  await desk.choose('left');
  await desk.goTo(20);
  await desk.stage.focus();
  await context.setOffline(true);
  for (const move of ['Alt+Shift+ArrowUp', 'Alt+Shift+ArrowRight', 'Alt+Shift+ArrowDown']) {
    await page.keyboard.press(move);
    await page.keyboard.press('Enter');
  }
  await expect(page.locator('st-desk-bar .save')).not.toContainText(/all.*saved/i);
  await context.setOffline(false);
  await desk.saved();
  const { body } = await callApi(page, 'GET', `/api/clips/${clipId}/marks`);
  expect(
    (body as { items: { arm: string; frame: number }[] }).items.some(
      ({ arm, frame }) => arm === 'left' && frame === 20,
    ),
  ).toBe(true);
});
