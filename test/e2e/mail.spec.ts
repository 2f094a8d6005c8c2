import { expect, test, type Page } from '@playwright/test';
import { expectAccessible } from './axe';
import { demoPassword, signInAs } from './sign-in';

const email = 'runa@tarnvalley.example';
const first = 'gravel kettle seven oars';
const second = 'seven herons over weir';

/** The link in the newest mail of a kind to somebody, as the admin reads it in the outbox. */
async function linkInOutbox(admin: Page, kind: string): Promise<string> {
  const row = admin.locator('st-outbox-page li', { hasText: `${kind} to Runa Vale` }).first();
  await expect(async () => {
    await admin.getByRole('button', { name: 'Look again' }).click();
    await expect(row).toContainText('Written to a file', { timeout: 2000 });
  }).toPass();
  await row.getByRole('button', { name: 'Open the mail to Runa Vale' }).click();
  const text = await admin.locator('st-mail-text-dialog pre.text').innerText();
  await expectAccessible(admin, `the text of a mail: ${kind}`);
  await admin.getByRole('button', { name: 'Close' }).click();
  return new URL(/http:\S+\/(?:invitation|new-password)\/\S+/.exec(text)?.[0] ?? '').pathname;
}

test('a forgotten password is set anew through a mail, and ends the sign-ins elsewhere', async ({
  page: admin,
  browser,
}) => {
  await signInAs(admin, 'admin@tarnvalley.example');
  await admin.goto('/club/people');
  await admin.getByRole('button', { name: 'Invite somebody' }).click();
  const dialog = admin.getByRole('dialog');
  await dialog.getByLabel('Name').fill('Runa Vale');
  await dialog.getByLabel('E-mail').fill(email);
  await dialog.getByRole('button', { name: 'Make the invitation' }).click();
  const shown = await admin.locator('st-link-dialog input').inputValue();
  await admin.getByRole('button', { name: 'I have it' }).click();
  await admin.getByRole('tab', { name: 'Outbox' }).click();
  const invitation = await linkInOutbox(admin, 'Invitation');
  expect(new URL(shown).pathname).toBe(invitation);
  await expectAccessible(admin, 'outbox');

  const elsewhere = await (await browser.newContext()).newPage();
  await elsewhere.goto(invitation);
  await elsewhere.getByLabel('New password').fill(first);
  await elsewhere.getByRole('button', { name: 'Set the password and go in' }).click();
  await expect(elsewhere).not.toHaveURL(/invitation/);

  const visitor = await (await browser.newContext()).newPage();
  await visitor.goto('/sign-in');
  await visitor.getByRole('link', { name: 'Forgot your password?' }).click();
  await visitor.getByLabel('E-mail').fill(email);
  await visitor.getByRole('button', { name: 'Send me a link' }).click();
  await expect(visitor.getByRole('heading', { name: 'Look into your mail' })).toBeVisible();
  await expectAccessible(visitor, 'asked for a new password');

  const link = await linkInOutbox(admin, 'New password');
  await visitor.goto(link);
  const password = visitor.getByLabel('New password');
  await password.fill('password1234');
  await visitor.getByRole('button', { name: 'Set the password and go in' }).click();
  await expect(visitor.getByRole('alert')).toBeVisible();
  await expectAccessible(visitor, 'setting a new password');
  await password.fill(second);
  await visitor.getByRole('button', { name: 'Set the password and go in' }).click();
  await expect(visitor).not.toHaveURL(/new-password/);

  // Elsewhere the sign-in is over, the old password is worthless, and the link works once.
  await elsewhere.goto('/mail');
  await expect(elsewhere).toHaveURL(/sign-in/);
  await elsewhere.getByLabel('E-mail').fill(email);
  await elsewhere.getByLabel('Password', { exact: true }).fill(first);
  await elsewhere.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(elsewhere.getByRole('alert')).toBeVisible();
  await elsewhere.goto(link);
  await expect(
    elsewhere.getByRole('heading', { name: 'This link has been used or has run out' }),
  ).toBeVisible();
  await signInAs(elsewhere, email, second);
});

test('everybody chooses which mails they get', async ({ page }) => {
  await page.setViewportSize({ width: 390, height: 844 });
  await signInAs(page, 'athlete@tarnvalley.example', demoPassword);
  await page.getByRole('button', { name: 'Menu' }).click();
  await page.getByRole('link', { name: 'Mail' }).click();
  const answers = page.getByRole('switch', { name: 'When somebody answers you' });
  await expect(answers).toBeChecked();
  await answers.click();
  await expect(answers).not.toBeChecked();
  await page.reload();
  await expect(answers).not.toBeChecked();
  await expectAccessible(page, 'mail');
  await answers.focus();
  await page.keyboard.press('Space');
  await expect(answers).toBeChecked();
});
