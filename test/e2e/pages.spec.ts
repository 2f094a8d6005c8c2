import { expect, test, type Page } from '@playwright/test';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { signInAs } from './sign-in';

const sizes = { wide: { width: 1320, height: 900 }, narrow: { width: 390, height: 844 } } as const;

interface Found {
  readonly athleteId: string;
  readonly sessionId: string;
  readonly clipId: string;
}

/** The last session of the athlete whose arms differ, and its clip. */
async function findInes(page: Page): Promise<Found> {
  const { items } = (await callApi(page, 'GET', '/api/athletes?search=Ines')).body as {
    items: { id: string }[];
  };
  const athleteId = items[0]?.id ?? '';
  const sessions = (await callApi(page, 'GET', `/api/athletes/${athleteId}/sessions`)).body as {
    items: { id: string; clips: { id: string; strokeCount: number }[] }[];
  };
  const session = sessions.items.find(({ clips }) => clips.some(({ strokeCount }) => strokeCount > 0));
  return { athleteId, sessionId: session?.id ?? '', clipId: session?.clips[0]?.id ?? '' };
}

/** No sideways scrolling of the page, nothing that axe finds, nothing in the console; leaves a picture to look at. */
async function look(page: Page, path: string, name: string): Promise<void> {
  const complaints: string[] = [];
  page.on('console', (message) => {
    // A 401 or 404 that a page asks for on purpose is answered on the page.
    if (message.type() === 'error' && !message.text().includes('Failed to load resource'))
      complaints.push(message.text());
  });
  for (const [size, viewport] of Object.entries(sizes)) {
    await page.setViewportSize(viewport);
    await page.goto(path);
    await page.waitForLoadState('networkidle');
    await expect(page.locator('h1').first()).toBeVisible();
    await page.screenshot({ path: `test-results/pages/${name}-${size}.png` });
    await expectAccessible(page, `${name}, ${size}`);
    const overflow = await page.evaluate(() => document.documentElement.scrollWidth - innerWidth);
    expect(overflow, `${name} is wider than ${viewport.width}`).toBeLessThanOrEqual(0);
  }
  page.removeAllListeners('console');
  expect(complaints, name).toEqual([]);
}

test('pages before signing in', async ({ page }) => {
  await look(page, '/sign-in', 'sign-in');
  await look(page, '/invitation/nonsense-nonsense-nonsense', 'invitation-spent');
  await look(page, '/sign-in/forgot', 'forgot-password');
  await look(page, '/new-password/nonsense-nonsense-nonsense', 'new-password-spent');
});

test('pages of a coach', async ({ page }) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const { athleteId, sessionId, clipId } = await findInes(page);
  await look(page, '/squad', 'squad');
  await look(page, `/athletes/${athleteId}`, 'athlete');
  await look(page, `/athletes/${athleteId}/trend`, 'trend');
  await look(page, `/athletes/${athleteId}/trend?measure=peakDrop`, 'trend-drop');
  await look(page, `/sessions/${sessionId}`, 'session');
  await look(page, `/sessions/${sessionId}/compare`, 'compare');
  await look(page, `/clips/${clipId}`, 'desk');
  await look(page, '/no-such-page', 'not-found');
});

test('pages of an admin', async ({ page }) => {
  await signInAs(page, 'admin@tarnvalley.example');
  await look(page, '/club', 'club-people');
  await look(page, '/club/squads', 'club-squads');
  await look(page, '/club/outbox', 'club-outbox');
});

test('pages of an athlete', async ({ page }) => {
  await signInAs(page, 'athlete@tarnvalley.example');
  const { athleteId, clipId } = await findInes(page);
  await look(page, `/athletes/${athleteId}`, 'own-page');
  await look(page, `/clips/${clipId}`, 'desk-read-only');
  await look(page, '/mail', 'mail');
  await look(page, '/club', 'forbidden');
});
