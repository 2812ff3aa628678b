import { expect, type Page } from '@playwright/test';

/** Signs in on the sign-in page and waits for the studies. */
export async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.goto('/sign-in');
  await trySignIn(page, email, password);
  await expect(page.getByRole('heading', { level: 1, name: 'Studies' })).toBeVisible();
}

/** Fills in the sign-in form and sends it, whatever comes of it. */
export async function trySignIn(page: Page, email: string, password: string): Promise<void> {
  await page.getByLabel('Mail address').fill(email);
  await page.getByLabel('Password', { exact: true }).fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}
