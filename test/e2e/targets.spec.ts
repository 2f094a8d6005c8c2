import { expect, test } from '@playwright/test';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { signInAs } from './sign-in';

interface Listed {
  readonly items: { readonly id: string; readonly clips: { id: string; strokeCount: number }[] }[];
}

test('a coach sets a band, sees it on Desk, Compare and Trend; the athlete sees it and cannot change it', async ({
  page,
  browser,
}) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const found = (await callApi(page, 'GET', '/api/athletes?search=Ines')).body as Listed;
  const athleteId = found.items[0]?.id ?? '';
  const { items } = (await callApi(page, 'GET', `/api/athletes/${athleteId}/sessions`)).body as Listed;
  const session = items.find(({ clips }) => clips.some(({ strokeCount }) => strokeCount > 0));
  const clip = session?.clips.find(({ strokeCount }) => strokeCount > 0);
  if (!session || !clip) throw new Error('the demo has a marked session of Ines Corrow');

  await page.goto(`/athletes/${athleteId}`);
  const card = page.locator('st-targets-card');
  await card.getByRole('button', { name: 'Set a target' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Arm').click();
  await page.getByRole('option', { name: 'left arm' }).click();
  await dialog.getByRole('button', { name: 'Fill in' }).click();
  await expect(dialog.getByLabel('To, percent')).toHaveValue('33.3');
  await expect(dialog.getByLabel('In your words')).toHaveValue(/common practice, no published source/);
  await expectAccessible(page, 'target dialog');
  await page.screenshot({ path: 'test-results/pages/target-dialog.png' });
  await dialog.getByLabel('From, percent').fill('90');
  await dialog.getByRole('button', { name: 'Save' }).click();
  await expect(dialog.getByRole('alert')).toContainText('above the lower one');
  await dialog.getByLabel('From, percent').fill('10');
  await dialog.getByLabel('In your words').fill('Hand under the elbow by the count of one');
  await dialog.getByRole('button', { name: 'Save' }).click();
  await expect(card).toContainText('10 to 33.3 %');
  await expect(card).toContainText('Hand under the elbow by the count of one');
  await expect(card).toContainText('Set by Owen Hale');
  await expectAccessible(page, 'targets on the athlete page');

  const { items: strokes } = (await callApi(page, 'GET', `/api/clips/${clip.id}/strokes`)).body as {
    items: { arm: string; catch: number }[];
  };
  const frame = strokes.find(({ arm }) => arm === 'left')?.catch ?? 0;
  const says = /inside the band|above the band by|below the band by|cannot be told apart/;
  await page.goto(`/clips/${clip.id}?frame=${frame}&arm=left`);
  await expect(page.locator('st-target-lines')).toContainText('10 to 33.3 %');
  await expect(page.locator('st-target-lines')).toContainText(says);
  await page.screenshot({ path: 'test-results/pages/target-desk.png' });
  await page.goto(`/sessions/${session.id}/compare`);
  const rows = page.locator('st-measure-rows').first();
  await expect(rows).toContainText('Target 10 to 33.3 %: left');
  await expect(rows).toContainText('Hand under the elbow by the count of one');
  await expect(rows.locator('rect.band').first()).toBeVisible();
  await expectAccessible(page, 'targets on Compare');
  await rows.scrollIntoViewIfNeeded();
  await page.screenshot({ path: 'test-results/pages/target-compare.png' });
  await page.goto(`/athletes/${athleteId}/trend`);
  await expect(page.locator('st-trend-chart .legend')).toContainText([/both arms/, /left arm: 10 to 33.3 %/]);
  await expect(page.locator('st-trend-chart rect.band')).toHaveCount(2);
  await expectAccessible(page, 'targets on Trend');
  await page.screenshot({ path: 'test-results/pages/target-trend.png' });

  const athlete = await browser.newPage({ viewport: { width: 390, height: 844 } });
  await signInAs(athlete, 'athlete@tarnvalley.example');
  await athlete.goto(`/athletes/${athleteId}/trend`);
  await expect(athlete.locator('st-trend-chart .legend').last()).toContainText('by the count of one');
  await athlete.goto(`/athletes/${athleteId}`);
  const own = athlete.locator('st-targets-card');
  await expect(own).toContainText('10 to 33.3 %');
  await expect(own.getByRole('button')).toHaveCount(0);
  await own.scrollIntoViewIfNeeded();
  await athlete.screenshot({ path: 'test-results/pages/target-own-narrow.png' });
  const { items: set } = (await callApi(athlete, 'GET', `/api/athletes/${athleteId}/targets`)).body as {
    items: { id: string; version: number }[];
  };
  for (const { id, version } of set) {
    const refused = await callApi(athlete, 'PATCH', `/api/targets/${id}`, { words: 'easier', version });
    expect(refused.status).toBe(403);
    expect((await callApi(athlete, 'DELETE', `/api/targets/${id}`)).status).toBe(403);
  }
  await athlete.close();

  await page.goto(`/athletes/${athleteId}`);
  await card.getByRole('button', { name: 'Delete the target: Vertical at, left arm' }).click();
  await expect(card).not.toContainText('10 to 33.3 %');
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect(card).toContainText('10 to 33.3 %');
  await card.getByRole('button', { name: 'Delete the target: Vertical at, left arm' }).click();
  await expect(card).not.toContainText('10 to 33.3 %');
});
