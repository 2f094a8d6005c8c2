import { expect, type Page } from '@playwright/test';

export const demoPassword = 'stillwater-demo';

/** Signs in through the page, as a person does. */
export async function signInAs(page: Page, email: string, password = demoPassword): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await expect(page).not.toHaveURL(/sign-in/);
}
