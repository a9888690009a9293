import type { Page } from 'playwright-core';
import { beforeAll, describe, expect, it } from 'vitest';
import { type Demo, seedDemo } from './support/demo';
import { inspect } from './support/inspection';
import { heading } from './support/page-parts';
import { useSite } from './support/site';

const site = useSite();

let demo: Demo;
beforeAll(async () => {
  demo = await seedDemo(site());
});

interface ListedPage {
  readonly who: 'designer' | 'administrator';
  readonly path: () => string;
  readonly heading: string;
  /** What is there when the page is complete. */
  readonly ready: (page: Page) => Promise<void>;
}

const shows = (text: string | RegExp) => (page: Page) => page.getByText(text).first().waitFor();
const ofDemo = (name: string) => () => demo.path(name);

const PAGES: Readonly<Record<string, ListedPage>> = {
  'the products': {
    who: 'designer',
    path: () => '/products',
    heading: 'Products',
    ready: shows('Skift transfer carts'),
  },
  'a product': {
    who: 'designer',
    path: ofDemo('Lyft lift tables'),
    heading: 'Lyft lift tables',
    ready: async (page) => {
      await page
        .getByRole('row', { name: /Telescopic column/ })
        .getByText(/\d–\d/)
        .waitFor();
      await page.getByText('Lotte Bransig').waitFor();
    },
  },
  'a product that somebody else designs, sorted': {
    who: 'designer',
    path: () => `${demo.path('Skift transfer carts')}?sort=reserve`,
    heading: 'Skift transfer carts',
    ready: async (page) => {
      await page.getByRole('columnheader', { name: 'Reserve' }).and(page.locator('[aria-sort]')).waitFor();
      await page.getByText('Petra Ostrik').waitFor();
    },
  },
  'a product, for an administrator': {
    who: 'administrator',
    path: ofDemo('Stille cabins'),
    heading: 'Stille cabins',
    ready: async (page) => {
      await page
        .getByRole('row', { name: /Two-person cabin/ })
        .getByText(/\d–\d/)
        .waitFor();
      await page.getByLabel('Role of Lotte Bransig').waitFor();
    },
  },
  'a variant': {
    who: 'designer',
    path: ofDemo('Short column'),
    heading: 'Short column',
    ready: shows('Worn belt and guides'),
  },
  'a scenario that holds': {
    who: 'designer',
    path: ofDemo('Short column, Rated'),
    heading: 'Rated',
    ready: shows('Holds, proved'),
  },
  'a scenario that fails at its heavy end': {
    who: 'designer',
    path: ofDemo('Chain drive, Rated'),
    heading: 'Rated',
    ready: shows('Fails inside the bands'),
  },
  'a scenario that fails at its light end': {
    who: 'designer',
    path: ofDemo('Driver’s seat, Rated'),
    heading: 'Rated',
    ready: shows('Light end fails at'),
  },
  'a scenario with a delay': {
    who: 'designer',
    path: ofDemo('Belt drive, Rated'),
    heading: 'Rated',
    ready: shows(/for the approximated delay/),
  },
  'the account': {
    who: 'designer',
    path: () => '/account',
    heading: 'Your account',
    ready: shows('This browser'),
  },
  'the people': {
    who: 'administrator',
    path: () => '/people',
    heading: 'People',
    ready: shows('samir@quernholm.example'),
  },
  'the audit log': {
    who: 'administrator',
    path: () => '/people/audit',
    heading: 'Audit log',
    ready: shows('Joris Hedvall'),
  },
  'the outgoing mail': {
    who: 'administrator',
    path: () => '/people/mail',
    heading: 'Outgoing mail',
    ready: shows('No mail yet'),
  },
};

describe('reached by its address', () => {
  it.each(Object.entries(PAGES))(
    '%s is complete, in every look, and again when it is reloaded',
    async (_, listed) => {
      const { page } = await site().visitor(demo[listed.who]);
      const isThere = async () => {
        await heading(page, listed.heading).waitFor();
        await listed.ready(page);
      };
      await page.goto(listed.path());
      await isThere();
      const url = page.url();
      expect(await page.title()).toMatch(/Tareline/);
      expect(await inspect(page)).toEqual([]);

      await page.reload();
      await isThere();
      expect(page.url()).toBe(url);
    },
  );
});

describe('the fonts', () => {
  it('come with the pages', async () => {
    const { page } = await site().visitor(demo.designer);
    const files: string[] = [];
    page.on('response', (response) => {
      if (response.url().endsWith('.woff2'))
        files.push(`${response.status()} ${new URL(response.url()).origin}`);
    });
    await page.goto(demo.path('Short column, Rated'));
    await shows('Holds, proved')(page);
    const loaded = await page.evaluate<string[]>(
      `document.fonts.ready.then((fonts) => [...fonts].filter((font) => font.status === 'loaded')
        .map((font) => font.family.replaceAll('"', '')))`,
    );
    expect(new Set(loaded)).toEqual(new Set(['Archivo', 'Tareline Signs']));
    expect(new Set(files)).toEqual(new Set([`200 ${site().address}`]));
  });
});
