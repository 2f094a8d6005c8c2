import { expect, test, type Page } from '@playwright/test';
import { callApi } from './api-of';
import { expectAccessible } from './axe';
import { signInAs } from './sign-in';

interface ReviewAnswer {
  readonly state: string;
  readonly readAt: string | null;
  readonly findings: {
    readonly words: string;
    readonly mainFocus: boolean;
    readonly readings: { readonly stand: { readonly value: number | null } }[];
    readonly stills: { readonly id: string; readonly parts: { frame: number }[]; width: number }[];
  }[];
}

const reviewOf = async (page: Page, id: string) =>
  (await callApi(page, 'GET', `/api/reviews/${id}`)).body as ReviewAnswer;
const words = (page: Page, at: number) => page.getByLabel('What you saw and what to do about it').nth(at);
const saved = (page: Page) => expect(page.getByText('Everything saved')).toBeVisible();

async function addPicture(page: Page, finding: number, caption: string): Promise<void> {
  await page.getByRole('link', { name: `Add a picture to finding ${finding}` }).click();
  await expect(page.getByRole('heading', { name: 'Make a picture' })).toBeVisible();
  await expect(page.getByText('The picture is kept in the full size of the film.')).toBeVisible();
  await page.getByLabel('Words under the picture').fill(caption);
}

async function savePicture(page: Page): Promise<void> {
  await page.getByRole('button', { name: 'Save the picture' }).click();
  await expect(page).toHaveURL(/write/);
  await expect(page.getByRole('heading', { name: /^Review for/ })).toBeVisible();
}

test('a coach writes a review, the athlete reads it on a phone and asks back, the coach answers', async ({
  page,
  browser,
}) => {
  test.slow();
  await signInAs(page, 'coach@tarnvalley.example');
  const { body: list } = await callApi(page, 'GET', '/api/athletes');
  const athletes = (list as { items: { id: string; name: string }[] }).items;
  const ines = athletes.find(({ name }) => name.startsWith('Ines'));
  const sessions = (await callApi(page, 'GET', `/api/athletes/${ines?.id ?? ''}/sessions`)).body as {
    items: { id: string; clips: { id: string }[] }[];
  };
  const session = sessions.items.find(({ clips }) => clips.length > 0);
  await page.goto(`/sessions/${session?.id ?? ''}`);

  await test.step('begins with what is good', async () => {
    await page.getByRole('button', { name: 'Write a review' }).click();
    await expect(page.getByText('Nothing written yet')).toBeVisible();
    await page.getByRole('button', { name: 'Add something good' }).click();
    await words(page, 0).fill('Your left hand enters clean, in front of the shoulder.');
    await saved(page);
  });
  const reviewId = /reviews\/([^/]+)/.exec(page.url())?.[1] ?? '';

  await test.step('writes two more, one resting on a reading of the session', async () => {
    await page.getByRole('button', { name: 'Add something to work on' }).click();
    await words(page, 1).fill('The right forearm comes to vertical late.');
    await page.getByRole('button', { name: 'Add a reading' }).nth(1).click();
    await page.getByRole('button', { name: 'Use Vertical at, right arm' }).click();
    await expect(page.getByText(/^Vertical at, right arm, mean of \d+ strokes/)).toBeVisible();
    await page.getByRole('button', { name: 'Add something to work on' }).click();
    await words(page, 2).fill('<b>Hips</b> sink a little at the breath.');
    await saved(page);
    await page.getByRole('button', { name: 'Make this the main focus' }).nth(1).click();
    await expect(page.getByRole('button', { name: 'This is the main focus' })).toBeEnabled();
    await expectAccessible(page, 'writing a review');
  });

  await test.step('moves a finding by keyboard, and a reload brings everything back', async () => {
    await page.getByRole('button', { name: /Later.*finding 1/ }).focus();
    await page.keyboard.press('Enter');
    await expect(words(page, 0)).toHaveValue('The right forearm comes to vertical late.');
    await page.reload();
    await expect(words(page, 1)).toHaveValue('Your left hand enters clean, in front of the shoulder.');
  });

  await test.step('makes three pictures: one drawn on, one pair, one plain', async () => {
    await addPicture(page, 1, 'Right arm at the catch');
    await page.getByRole('radio', { name: 'Arrow' }).click();
    await page.getByRole('button', { name: 'Put one in the middle' }).click();
    await page.getByLabel('To, across').fill('400');
    await page.getByLabel('To, across').press('Enter');
    await expect(page.getByRole('button', { name: /^Arrow from .* to 400, / })).toBeVisible();
    await expectAccessible(page, 'making a picture');
    await savePicture(page);
    await addPicture(page, 2, 'Left and right at the catch');
    await page.getByLabel('Shows').click();
    await page.getByRole('option', { name: 'Left and right' }).click();
    await expect(page.getByRole('group', { name: 'Right' })).toBeVisible();
    await savePicture(page);
    await addPicture(page, 3, 'At the breath');
    await savePicture(page);
    const { findings } = await reviewOf(page, reviewId);
    expect(findings.map(({ stills }) => stills.length)).toEqual([1, 1, 1]);
  });

  await test.step('keeps text on the device while the connection is gone', async () => {
    await page.context().setOffline(true);
    await words(page, 2).fill('Hips sink a little at the breath. Look down sooner.');
    await expect(page.getByText(/Your text is kept on this device/)).toBeVisible();
    await page.context().setOffline(false);
    await saved(page);
    const { findings } = await reviewOf(page, reviewId);
    expect(findings[2]?.words).toContain('Look down sooner');
  });

  await test.step('does not overwrite what a second window changed', async () => {
    await page.route('**/api/findings/*', (route) => route.abort());
    await words(page, 2).fill('From the first window.');
    await expect(page.getByText(/Your text is kept on this device/)).toBeVisible();
    const second = await page.context().newPage();
    await second.goto(`/reviews/${reviewId}/write`);
    await expect(words(second, 2)).toHaveValue(/Look down sooner|From the first window/);
    await words(second, 2).fill('From the second window.');
    await saved(second);
    await second.close();
    await page.unroute('**/api/findings/*');
    // It is sent again by itself, after a while that grows with each try.
    await expect(page.getByText(/changed this finding meanwhile/)).toBeVisible({ timeout: 45_000 });
    await expect(page.getByRole('cell', { name: 'From the second window.' })).toBeVisible();
    await page.getByRole('button', { name: 'Keep yours' }).click();
    await saved(page);
    await words(page, 2).fill('<b>Hips</b> sink a little at the breath.');
    await saved(page);
  });

  await test.step('sends it after looking at it', async () => {
    await page.getByRole('button', { name: 'Send', exact: true }).click();
    await page.getByRole('button', { name: 'Send the review' }).click();
    await expect(page).toHaveURL(new RegExp(`/reviews/${reviewId}$`));
    await expect(page.getByText('not opened yet')).toBeVisible();
  });
  const sent = await reviewOf(page, reviewId);

  const phone = await browser.newContext({ viewport: { width: 390, height: 844 } });
  const reader = await phone.newPage();
  await test.step('the athlete finds it unread and reads it on a phone', async () => {
    await signInAs(reader, 'athlete@tarnvalley.example');
    await reader.goto(`/athletes/${ines?.id ?? ''}`);
    await expect(reader.getByText('1 unread')).toBeVisible();
    await reader
      .getByRole('link', { name: /^Review of/ })
      .first()
      .click();
    await expect(reader.getByRole('heading', { name: 'Your main focus' })).toBeVisible();
    const main = reader.locator('section.main');
    await expect(main).toContainText('The right forearm comes to vertical late.');
    const picture = main.getByRole('img', { name: 'Right arm at the catch' });
    await expect(picture).toBeVisible();
    await expect
      .poll(() => picture.evaluate((img: HTMLImageElement) => img.naturalWidth))
      .toBe(sent.findings[0]?.stills[0]?.width);
    // Text is text.
    await expect(reader.getByText('<b>Hips</b> sink a little at the breath.')).toBeVisible();
    const wide = await reader.evaluate(() => document.documentElement.scrollWidth);
    expect(wide).toBeLessThanOrEqual(390);
    await expectAccessible(reader, 'reading a review');
  });

  await test.step('asks back, and the coach answers', async () => {
    await reader.locator('section.main').getByRole('button', { name: 'Ask about this' }).click();
    await reader.getByLabel('Your question').fill('Should I bend the elbow sooner?');
    await reader.getByRole('button', { name: 'Send the question' }).click();
    await expect(reader.locator('section.main')).toContainText('Should I bend the elbow sooner?');
    await page.goto(`/sessions/${session?.id ?? ''}`);
    await expect(page.getByText('1 question')).toBeVisible();
    await page.locator('st-review-list').getByRole('link').first().click();
    await expect(page.getByText(/opened/)).toBeVisible();
    await page.getByRole('button', { name: 'Answer', exact: true }).click();
    await page.getByLabel('Your answer').fill('Yes: fingertips down first, then press.');
    await page.getByRole('button', { name: 'Send the answer' }).click();
    await expect(page.getByText('Yes: fingertips down first, then press.')).toBeVisible();
    await expectAccessible(page, 'a review that was sent, as the coach sees it');
    await reader.reload();
    await expect(reader.getByText('Yes: fingertips down first, then press.')).toBeVisible();
    await expect(reader.getByText('New', { exact: true })).toBeVisible();
  });

  await test.step('what was sent stays as it was when the marks change', async () => {
    const clipId = session?.clips[0]?.id ?? '';
    await callApi(page, 'PATCH', `/api/clips/${clipId}`, { captureRateFactor: 0.5 });
    const after = await reviewOf(page, reviewId);
    expect(after.findings.map(({ readings, stills }) => ({ readings, stills }))).toEqual(
      sent.findings.map(({ readings, stills }) => ({ readings, stills })),
    );
    await callApi(page, 'PATCH', `/api/clips/${clipId}`, { captureRateFactor: 1 });
  });
  await phone.close();
});
