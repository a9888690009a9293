import type { Locator, Page } from 'playwright-core';

/** The heading of the page. */
export function heading(page: Page, name: string): Locator {
  return page.getByRole('heading', { level: 1, name, exact: true });
}

/** What the page says has been done. */
export function notice(page: Page, text: string): Locator {
  return page.getByRole('status').filter({ hasText: text });
}

/** What the page says has gone wrong. */
export function refusal(page: Page, text: string): Locator {
  return page.getByRole('alert').filter({ hasText: text });
}
