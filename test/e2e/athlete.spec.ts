import { expect, test } from '@playwright/test';
import { callApi } from './api-of';
import { signInAs } from './sign-in';

interface Items {
  readonly items: { readonly id: string; readonly name: string }[];
}

test('an athlete sees own angles over the sessions and is refused everything else', async ({
  page,
  browser,
}) => {
  const coach = await browser.newPage();
  await signInAs(coach, 'coach@tarnvalley.example');
  const all = ((await callApi(coach, 'GET', '/api/athletes')).body as Items).items;
  const other = all.find(({ name }) => name === 'Tomas Vell');
  if (!other) throw new Error('the demo has Tomas Vell');
  const theirs = (
    (await callApi(coach, 'GET', `/api/athletes/${other.id}/sessions`)).body as {
      items: { id: string; clips: { id: string }[] }[];
    }
  ).items;
  const session = theirs.find(({ clips }) => clips.length > 0);
  const clip = session?.clips[0];
  if (!session || !clip) throw new Error('the other athlete has a clip');
  await coach.close();

  await signInAs(page, 'athlete@tarnvalley.example');
  await expect(page.getByRole('heading', { name: 'Ines Corrow' })).toBeVisible();
  await expect(page.locator('st-trend-card')).toContainText(/vertical/i);
  await expect(page.getByRole('link', { name: 'Squad', exact: true })).toHaveCount(0);
  await expect(page.getByRole('link', { name: 'Club', exact: true })).toHaveCount(0);

  const own = ((await callApi(page, 'GET', '/api/athletes')).body as Items).items;
  expect(own.map(({ name }) => name)).toEqual(['Ines Corrow']);

  for (const [method, path, body] of [
    ['GET', `/api/athletes/${other.id}`],
    ['GET', `/api/athletes/${other.id}/trend`],
    ['GET', `/api/athletes/${other.id}/sessions`],
    ['GET', `/api/sessions/${session.id}`],
    ['GET', `/api/sessions/${session.id}/comparison`],
    ['GET', `/api/clips/${clip.id}`],
    ['GET', `/api/clips/${clip.id}/media`],
    ['GET', `/api/clips/${clip.id}/poster`],
    ['GET', `/api/clips/${clip.id}/marks`],
    ['POST', `/api/athletes/${other.id}/sessions`, { date: '2026-11-30' }],
  ] as const) {
    expect((await callApi(page, method, path, body)).status, `${method} ${path}`).toBe(404);
  }
  for (const path of ['/api/people', '/api/squads']) {
    expect((await callApi(page, 'GET', path)).status, path).toBe(403);
  }

  for (const path of ['/club', '/squad', `/athletes/${other.id}`, `/sessions/${session.id}`]) {
    await page.goto(path);
    await expect(page.locator('main')).not.toContainText(other.name);
  }

  await page.goto('/');
  await page.locator('st-trend-card').getByRole('link').first().click();
  await expect(page.getByRole('heading', { name: 'Vertical at' })).toBeVisible();
  await expect(page.locator('st-trend-chart a').first()).toBeVisible();
});
