import type { Page } from 'playwright-core';

/** Fills and sends the form that a page of somebody without a session shows. */
export async function signIn(page: Page, email: string, password: string): Promise<void> {
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.getByRole('button', { name: 'Sign in' }).click();
}
