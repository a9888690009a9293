import type { Page } from 'playwright-core';
import { barriersOf } from './accessibility';
import { NARROW, WIDE } from './site';

const LOOKS = [
  { colorScheme: 'light', size: WIDE },
  { colorScheme: 'dark', size: WIDE },
  { colorScheme: 'dark', size: NARROW },
  { colorScheme: 'light', size: NARROW },
] as const;

/** How far a page can be pushed sideways, px. */
function overhangOf(page: Page): Promise<number> {
  return page.evaluate<number>('document.documentElement.scrollWidth - document.documentElement.clientWidth');
}

/**
 * What is wrong with an open page in light and dark, on a wide and on a narrow screen.
 *
 * @param part selector of the part that is looked at; left out: everything
 */
export async function inspect(page: Page, part?: string): Promise<string[]> {
  const faults: string[] = [];
  for (const { colorScheme, size } of LOOKS) {
    await page.setViewportSize(size);
    await page.emulateMedia({ colorScheme });
    const overhang = await overhangOf(page);
    const here = [
      ...(await barriersOf(page, part)),
      ...(overhang > 0 ? [`the page is ${overhang} px too wide`] : []),
    ];
    faults.push(...here.map((fault) => `${colorScheme}, ${size.width} px: ${fault}`));
  }
  await page.setViewportSize(WIDE);
  await page.emulateMedia({ colorScheme: 'light' });
  return faults;
}
