import { expect, test } from '@playwright/test';
import { signInAs } from './sign-in';

test('an admin invites a coach, who sets a password and sees the squad', async ({ page, browser }) => {
  await signInAs(page, 'admin@tarnvalley.example');
  await page.getByRole('link', { name: 'Club', exact: true }).click();
  await page.getByRole('button', { name: 'Invite somebody' }).click();
  const dialog = page.getByRole('dialog');
  await dialog.getByLabel('Name').fill('Piotr Lund');
  await dialog.getByLabel('E-mail').fill('piotr@tarnvalley.example');
  await dialog.getByLabel('Role').click();
  await page.getByRole('option', { name: /coach/i }).click();
  await dialog.getByLabel('Squads to coach').click();
  const squad = page.getByRole('option').first();
  const squadName = (await squad.innerText()).trim();
  await squad.click();
  await page.keyboard.press('Escape');
  await dialog.getByRole('button', { name: 'Make the invitation' }).click();
  const link = await page.locator('st-link-dialog input').inputValue();
  expect(link).toContain('/invitation/');

  const visitor = await (await browser.newContext()).newPage();
  await visitor.goto(new URL(link).pathname);
  await expect(visitor.getByRole('heading', { name: 'Welcome, Piotr Lund' })).toBeVisible();
  const password = visitor.getByLabel('New password');
  await password.fill('password1234');
  await visitor.getByRole('button', { name: 'Set the password and go in' }).click();
  await expect(visitor.getByRole('alert')).toBeVisible();
  await password.fill('gravel kettle seven oars');
  await visitor.getByRole('button', { name: 'Set the password and go in' }).click();
  await expect(visitor).toHaveURL(/squad/);
  await expect(visitor.locator('main')).toContainText(squadName);

  // The link works once.
  await visitor.context().clearCookies();
  await visitor.goto(new URL(link).pathname);
  await expect(
    visitor.getByRole('heading', { name: 'This link has been used or has run out' }),
  ).toBeVisible();
  await signInAs(visitor, 'piotr@tarnvalley.example', 'gravel kettle seven oars');
});
