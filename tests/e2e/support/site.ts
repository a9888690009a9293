import { type Browser, type BrowserContext, chromium, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { requireChromium } from '../../../server/commands/bootstrap/chromium.mjs';
import { connectDatabase, type Db } from '../../../server/db';
import type { ProductRole } from '../../../server/policies';
import { memoryLog } from '../../api/support/memory-log';
import { createTestDatabase } from '../../api/support/test-database';
import { makePerson, makeProduct, type PersonOptions, type TestPerson } from '../../api/support/test-people';
import { startServerProcess } from '../../recovery/support/server-process';
import { type Complaints, watchForComplaints } from './complaints';

const FLAGS = [
  ...['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run'],
  ...['--disable-background-networking', '--disable-component-update', '--disable-sync'],
];

/** How long something may take to appear, ms; reached only where it never would. */
const PATIENCE = 15_000;

export const WIDE = { width: 1440, height: 900 };
export const NARROW = { width: 390, height: 844 };

/** Somebody at a browser of their own. */
export interface Visitor {
  readonly context: BrowserContext;
  readonly page: Page;
  /** What the browser complains about; nothing must be left at the end of a test. */
  readonly complaints: Complaints;
}

/** The server as people run it, on a database of its own, and a browser. */
export interface Site {
  readonly address: string;
  readonly db: Db;
  /** Somebody who has signed in, and can be let in to a browser. */
  person(options?: PersonOptions): Promise<TestPerson>;
  product(createdBy: TestPerson, roles?: readonly (readonly [TestPerson, ProductRole])[]): Promise<string>;
  /** Opens a browser for somebody, signed in where it is a person; it is closed after the test. */
  visitor(who?: TestPerson): Promise<Visitor>;
}

/** Gives a test file the site: up before its first test, gone after its last. */
export function useSite(): () => Site {
  let site: Site | undefined;
  let visitors: Visitor[] = [];
  const endings: (() => Promise<unknown>)[] = [];

  beforeAll(async () => {
    const testDatabase = await createTestDatabase();
    endings.unshift(() => testDatabase.drop());
    const database = connectDatabase({ url: testDatabase.url, log: memoryLog().log });
    endings.unshift(() => database.close());
    const server = await startServerProcess(testDatabase);
    endings.unshift(() => server.stop());
    const browser = await chromium.launch({ executablePath: requireChromium(), args: FLAGS });
    endings.unshift(() => browser.close());
    const { db } = database;
    const { address } = server;
    site = {
      ...{ address, db },
      person: (options) => makePerson(db, address, options),
      product: (createdBy, roles) => makeProduct(db, createdBy, roles),
      visitor: async (who) => {
        const visitor = await openVisitor(browser, address, who);
        visitors.push(visitor);
        return visitor;
      },
    };
  });

  afterEach(async () => {
    const leaving = visitors;
    visitors = [];
    for (const { context } of leaving) await context.close();
    expect(leaving.flatMap(({ complaints }) => complaints.take())).toEqual([]);
  });

  afterAll(async () => {
    for (const end of endings) await end();
  });

  return () => {
    if (site === undefined) throw new Error('the site is not there before the first test');
    return site;
  };
}

async function openVisitor(browser: Browser, address: string, who?: TestPerson): Promise<Visitor> {
  const context = await browser.newContext({
    baseURL: address,
    viewport: WIDE,
    reducedMotion: 'reduce',
    colorScheme: 'light',
    acceptDownloads: true,
  });
  context.setDefaultTimeout(PATIENCE);
  const complaints = watchForComplaints(context, address);
  if (who?.cookie !== undefined) {
    const [name, value] = who.cookie.split('=');
    await context.addCookies([{ name, value, url: address, httpOnly: true, sameSite: 'Lax' }]);
  }
  return { context, page: await context.newPage(), complaints };
}
