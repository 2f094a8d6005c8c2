import { expect, test, type Page } from '@playwright/test';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { DeskHands } from './desk-hands';
import { signInAs } from './sign-in';

interface Named {
  readonly id: string;
  readonly name: string;
}
interface SessionAnswer {
  readonly id: string;
  readonly date: string;
}

async function athleteId(page: Page, name: string): Promise<string> {
  const { body } = await callApi(page, 'GET', '/api/athletes?limit=200');
  const found = (body as { items: Named[] }).items.find((athlete) => athlete.name === name);
  if (!found) throw new Error(`the demo has no ${name}`);
  return found.id;
}

async function sessionId(page: Page, athlete: string, date: string): Promise<string> {
  const { body } = await callApi(page, 'GET', `/api/athletes/${await athleteId(page, athlete)}/sessions`);
  const found = (body as { items: SessionAnswer[] }).items.find((session) => session.date === date);
  if (!found) throw new Error(`${athlete} has no session on ${date}`);
  return found.id;
}

/** Opens a "How?" with the keyboard and gives its dialog. */
async function how(page: Page, about: string | RegExp) {
  const name = typeof about === 'string' ? `How? ${about}` : about;
  const button = page.getByRole('button', { name, exact: typeof about === 'string' }).first();
  await button.focus();
  await page.keyboard.press('Enter');
  const dialog = page.getByRole('dialog');
  await expect(dialog.getByRole('heading', { name: 'Formula in words' })).toBeVisible();
  return dialog;
}

async function expectPartsLargestFirst(dialog: ReturnType<Page['getByRole']>): Promise<void> {
  const shares = await dialog.locator('tbody .share').allInnerTexts();
  expect(shares.length).toBeGreaterThan(1);
  const numbers = shares.map((share) => Number(/(\d+)\s*%/.exec(share)?.[1]));
  expect(numbers).toEqual([...numbers].sort((a, b) => b - a));
}

test('every figure opens to how it was computed, and leads to its frames and to the method', async ({
  page,
}) => {
  await signInAs(page, 'coach@tarnvalley.example');
  const session = await sessionId(page, 'Ines Corrow', '2026-11-28');
  const desk = new DeskHands(page);

  await test.step('on the Desk, with the keyboard', async () => {
    const { body } = await callApi(page, 'GET', `/api/sessions/${session}`);
    const [clip] = (body as { clips: Named[] }).clips;
    await page.goto(`/clips/${clip?.id}`);
    await desk.opened();
    const dialog = await how(page, 'Left forearm');
    await expect(dialog).toContainText('ahead over below');
    await expect(dialog).toContainText('pixels long');
    await expectPartsLargestFirst(dialog);
    await expectAccessible(page, 'an angle opened up on the Desk');
    await page.keyboard.press('Escape');
    await expect(dialog).toBeHidden();
    const vertical = await how(page, 'Vertical at');
    await expect(vertical).toContainText('Tolerance of vertical');
    await expectPartsLargestFirst(vertical);
    const frame = await vertical.locator('.frames a').nth(1).innerText();
    await vertical.locator('.frames a').nth(1).click();
    await expect(vertical).toBeHidden();
    expect(await desk.frame()).toBe(Number(/\d+/.exec(frame)?.[0]));
  });

  await test.step('on Compare: the difference, and one stroke of it', async () => {
    await page.goto(`/sessions/${session}/compare`);
    const dialog = await how(page, 'Vertical at, left against right');
    await expect(dialog).toContainText('Right later by');
    await expect(dialog).toContainText('Degrees of freedom');
    await expect(dialog).toContainText('(Holm)');
    await expect(dialog).toContainText('Welch 1947');
    await expectPartsLargestFirst(dialog);
    await expectAccessible(page, 'a difference opened up');
    await page.keyboard.press('Escape');
    await page.getByText('The strokes behind it').first().click();
    const stroke = await how(page, /^How\? Vertical at, left stroke on frame/);
    await expect(stroke).toContainText('Left arm, one');
    await expectPartsLargestFirst(stroke);
    await stroke.locator('.frames a').first().click();
    await expect(page).toHaveURL(/\/clips\/.*frame=\d+/);
    await desk.opened();
  });

  await test.step('on Compare: the curves, by angle and by breath, also as tables', async () => {
    await page.goto(`/sessions/${session}/compare`);
    const curves = page.locator('st-pull-curves');
    await expect(curves.locator('path.mean')).toHaveCount(2);
    await expect(curves.locator('path.thin')).not.toHaveCount(0);
    await expect(curves.locator('.legend')).toContainText('6 of 6 strokes');
    await curves.getByRole('radio', { name: 'Breathing', exact: true }).click();
    await expect(curves.locator('.legend')).toContainText('3 of 3 strokes');
    await curves.getByRole('radio', { name: 'Elbow drop' }).click();
    await expect(curves).toContainText('plus: dropped');
    await curves.getByText('The curves as tables').click();
    await curves.locator('td a').first().click();
    await expect(page).toHaveURL(/\/clips\/.*frame=\d+/);
  });

  await test.step('on Trend: what changed, a slope, a point', async () => {
    await page.goto(`/athletes/${await athleteId(page, 'Ines Corrow')}/trend`);
    const dialog = await how(page, 'right arm, last session against first');
    await expect(dialog).toContainText('Changed');
    await expect(dialog).toContainText('Smallest change that marking could not produce');
    await expectPartsLargestFirst(dialog);
    await expectAccessible(page, 'a change opened up');
    await page.keyboard.press('Escape');
    const slope = await how(page, 'right slope');
    await expect(slope).toContainText('Robust slope');
    await slope.getByRole('link', { name: 'Slope on the method page' }).click();
    await expect(page).toHaveURL(/\/method#slope/);
    await expect(page.locator('#slope')).toBeInViewport();
    await expectAccessible(page, 'the method page');
  });
});

test('an athlete opens the own figures in the same words, at 390 px too', async ({ page }) => {
  await page.setViewportSize({ width: 390, height: 844 });
  await signInAs(page, 'athlete@tarnvalley.example');
  const { body } = await callApi(page, 'GET', '/api/auth/me');
  const own = (body as { user: { athleteId: string } }).user.athleteId;
  await page.goto(`/athletes/${own}/trend`);
  const dialog = await how(page, 'right arm, last session against first');
  await expect(dialog).toContainText('Changed');
  await expectAccessible(page, 'a change opened up at 390 px');
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  await page.keyboard.press('Escape');
  await page.getByRole('button', { name: 'Menu' }).click();
  await page.getByRole('link', { name: 'Method' }).click();
  await expect(page.getByRole('heading', { level: 1, name: 'Method' })).toBeVisible();
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
});

test('Compare and Trend claim what the marks carry, and no more', async ({ page }) => {
  await signInAs(page, 'coach@tarnvalley.example');

  await test.step('where the arms do not differ, no measure does', async () => {
    await page.goto(`/sessions/${await sessionId(page, 'Tomas Vell', '2026-11-26')}/compare`);
    await expect(
      page.getByRole('heading', { level: 1, name: 'Left and right cannot be told apart' }),
    ).toBeVisible();
    const verdicts = await page.locator('st-measure-rows').first().locator('.verdict').allInnerTexts();
    expect(verdicts.length).toBeGreaterThanOrEqual(8);
    for (const verdict of verdicts) expect(verdict).toContain('Not distinguishable');
  });

  await test.step('where one arm is later, that arm is named; breathing strokes stand on the same footing', async () => {
    await page.goto(`/sessions/${await sessionId(page, 'Ines Corrow', '2026-11-28')}/compare`);
    await expect(
      page.getByRole('heading', { level: 1, name: 'The right forearm comes to vertical later' }),
    ).toBeVisible();
    await expect(page.locator('.st-lead')).toContainText('95 %:');
    await page.getByRole('tab', { name: 'Breathing against others' }).click();
    const drop = page.locator('st-breath-rows .row').filter({ hasText: 'Largest elbow drop' });
    await expect(drop.locator('dl > div').filter({ hasText: 'Right arm' })).toContainText(
      'Breathing strokes: drops',
    );
    await expect(drop.locator('dl > div').filter({ hasText: 'Left arm' })).toContainText(
      'Not distinguishable',
    );
    await expectAccessible(page, 'breathing strokes against the others');
  });

  await test.step('over the season one arm changed, the other not more than marking could produce', async () => {
    await page.goto(`/athletes/${await athleteId(page, 'Ines Corrow')}/trend?measure=verticalAt`);
    const cards = page.locator('.cards section');
    await expect(cards.filter({ hasText: 'Right, last session' })).toContainText('Changed');
    await expect(cards.filter({ hasText: 'Left, last session' })).toContainText(
      'Not more than marking could produce',
    );
    await expect(page.locator('.st-lead')).toContainText('not more than marking could produce');
  });
});
