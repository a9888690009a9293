import axe, { type AxeResults } from 'axe-core';
import type { Page } from 'playwright-core';

/** What assistive technology would stumble over, one line for each element. */
export async function barriersOf(page: Page, part?: string): Promise<string[]> {
  // The source is big: it is put into each document once.
  if (!(await page.evaluate<boolean>('"axe" in window'))) await page.evaluate(axe.source);
  const subject = part === undefined ? 'document' : JSON.stringify(part);
  const { violations } = await page.evaluate<AxeResults>(
    `axe.run(${subject}, { resultTypes: ['violations'] })`,
  );
  return violations.flatMap(({ id, help, nodes }) =>
    nodes.map(({ target, any }) => `${id}: ${help}: ${target.join(' ')} ${any[0]?.message ?? ''}`),
  );
}
