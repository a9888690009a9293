import { existsSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { count } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { fillEmptyDatabase, type WaysIn } from '../../server/commands/start/fill-empty-database';
import { connectDatabase, type Db } from '../../server/db';
import { invitations, people, products, runs } from '../../server/db/schema';
import { demoSeed } from '../../server/features/demo';
import { readConfiguration } from '../../server/platform/configuration';
import { type Result, type Study } from '../../shared/contracts';
import {
  memberSchema,
  productSchema,
  runMapSchema,
  scenarioSchema,
  signedInSchema,
  variantSchema,
} from '../../shared/contracts/api';
import * as z from '../../shared/contracts/zod';
import { ENGINE_VERSION } from '../../shared/engine';
import { analyseText } from '../commands/support/run-in-process';
import { memoryLog } from './support/memory-log';
import { followRuns, readRun } from './support/run-follower';
import { browserWith } from './support/sign-in';
import { useApi } from './support/test-api';
import { createTestDatabase } from './support/test-database';
import { TestPerson } from './support/test-people';

const api = useApi({ works: true });
const folder = mkdtempSync(join(tmpdir(), 'tareline-demo-'));
const file = join(folder, 'demo-sign-ins.json');
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const demo = demoSeed({ engineVersion: ENGINE_VERSION });

function fill(
  environment: Record<string, string> = {},
  db: Db = api().database.db,
  signInFile = file,
): Promise<WaysIn> {
  const configuration = readConfiguration(environment);
  return fillEmptyDatabase({ db, demo, signInFile, configuration, now: new Date() });
}

/** Two servers that start at the same moment. */
let starts: readonly WaysIn[];
beforeAll(async () => {
  // What an earlier database has left, open to everybody.
  writeFileSync(file, '[]', { mode: 0o644 });
  starts = await Promise.all([fill(), fill()]);
});

async function signIn(name: string): Promise<TestPerson> {
  const found = starts[0].signIns.find(({ email }) => email.startsWith(`${name}@`));
  if (found === undefined) throw new Error(`${name} is not on the list`);
  const { email, password } = found;
  const answer = await api().anybody.post('/api/session', { email, password });
  expect(answer.status).toBe(200);
  const { id } = answer.read(signedInSchema);
  return new TestPerson(api().address, browserWith(answer, api().address).cookie ?? '', id, email);
}

async function items<Schema extends z.ZodType>(reader: TestPerson, path: string, schema: Schema) {
  return (await reader.get(path)).read(z.object({ items: z.array(schema) })).items;
}

async function tally(db: Db = api().database.db) {
  const rows = async (table: typeof people | typeof products | typeof runs | typeof invitations) =>
    (await db.select({ rows: count() }).from(table))[0].rows;
  return {
    people: await rows(people),
    products: await rows(products),
    runs: await rows(runs),
    invitations: await rows(invitations),
  };
}

const SEEDED = { people: 5, products: 3, runs: 13, invitations: 0 };

describe('the demo', () => {
  it('is seeded once by two servers that start at once', async () => {
    expect(await tally()).toEqual(SEEDED);
    expect(starts[0].signIns).toEqual(starts[1].signIns);
  });

  it('is left alone by a later start, whatever the server is then', async () => {
    expect(await fill()).toEqual(starts[0]);
    const nothingToTell = { signIns: [], firstAdministrator: undefined };
    const elsewhere = { HOST: '0.0.0.0', PUBLIC_ORIGIN: 'https://tareline.example' };
    expect(await fill(elsewhere)).toEqual(nothingToTell);
    expect(await fill({ ADMINISTRATOR_EMAIL: 'ada@example.com' })).toEqual(nothingToTell);
    expect(await tally()).toEqual(SEEDED);
  });

  it('keeps its sign-ins for the present user alone, a password of its own for everybody', () => {
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(JSON.parse(readFileSync(file, 'utf8'))).toEqual(starts[0].signIns);
    const passwords = starts[0].signIns.map(({ password }) => password);
    expect(new Set(passwords).size).toBe(SEEDED.people);
    for (const password of passwords) expect(password).toMatch(/^(?:[a-z]{4}-){4}[a-z]{4}$/);
  });

  it('is there as a whole or not at all', async () => {
    const testDatabase = await createTestDatabase();
    const database = connectDatabase({ url: testDatabase.url, log: memoryLog().log });
    const nowhere = join(folder, 'no-such-folder', 'demo-sign-ins.json');
    try {
      await expect(fill({}, database.db, nowhere)).rejects.toThrow(/ENOENT/);
      expect(existsSync(nowhere)).toBe(false);
      expect(await tally(database.db)).toEqual({ people: 0, products: 0, runs: 0, invitations: 0 });
    } finally {
      await database.close();
      await testDatabase.drop();
    }
  });

  it('lets everybody on its list sign in, with the roles that the list says', async () => {
    for (const { email, role } of starts[0].signIns) {
      const seen = await items(await signIn(email.split('@')[0]), '/api/products', productSchema);
      if (role === 'administrator') {
        expect(seen.map((product) => product.role)).toEqual([null, null, null]);
        continue;
      }
      const groups = role.split('; ').map((group) => group.split(' of '));
      const said = groups.flatMap(([is, names]) => names.split(/, | and /).map((name) => [name, is]));
      expect(Object.fromEntries(seen.map((product) => [product.name, product.role]))).toEqual(
        Object.fromEntries(said),
      );
    }
  });

  it('has designers here who are viewers there, and a reviewer in every product', async () => {
    const administrator = await signIn('maren');
    const roles: string[] = [];
    for (const { id, name } of await items(administrator, '/api/products', productSchema)) {
      const members = await items(administrator, `/api/products/${id}/members`, memberSchema);
      roles.push(...members.map(({ email, role }) => `${email.split('@')[0]} ${role} ${name.split(' ')[0]}`));
    }
    expect(roles).toEqual(expect.arrayContaining(['joris designer Lyft', 'joris viewer Skift']));
    expect(roles).toEqual(expect.arrayContaining(['petra designer Skift', 'petra viewer Lyft']));
    expect(roles.filter((role) => role.includes('reviewer'))).toHaveLength(SEEDED.products);
  });
});

interface Answered {
  readonly result: Result;
  readonly low: number;
  readonly high: number;
}

function number(value: unknown): number {
  if (typeof value !== 'number') throw new Error('this test needs a number');
  return value;
}

/** Share of the rated payload that is proved beyond it; the smaller of both ends, where the light one fails at all. */
function reserve({ result: { largestPayload, smallestPayload }, low, high }: Answered): number {
  const heavy = number(largestPayload?.provedTo) / high - 1;
  if (smallestPayload?.failsAt === null) return heavy;
  return Math.min(heavy, 1 - number(smallestPayload?.provedTo) / low);
}

/** What a scenario may be there to show, by the name of the rule that it must keep. */
const RULES = {
  'holds comfortably': (answered: Answered) => {
    expect(answered.result.bands.verdict).toBe('holds');
    expect(reserve(answered)).toBeGreaterThan(0.2);
  },
  holds: (answered: Answered) => {
    expect(answered.result.bands.verdict).toBe('holds');
    expect(reserve(answered)).toBeGreaterThan(0.03);
    expect(reserve(answered)).toBeLessThan(0.2);
  },
  'just holds': (answered: Answered) => {
    expect(answered.result.bands.verdict).toBe('holds');
    expect(reserve(answered)).toBeGreaterThan(0);
    expect(reserve(answered)).toBeLessThan(0.03);
  },
  'fails at the heavy end': ({ result, low, high }: Answered) => {
    expect(result.bands.verdict).toBe('fails');
    expect(result.largestPayload?.failsAt).toBeLessThan(high);
    expect(result.smallestPayload?.provedTo).toBeLessThanOrEqual(low);
  },
  'fails at the light end': ({ result, low, high }: Answered) => {
    expect(result.bands.verdict).toBe('fails');
    expect(result.smallestPayload?.failsAt).toBeGreaterThan(low);
    expect(result.largestPayload?.provedTo).toBeGreaterThanOrEqual(high);
  },
  'holds, its plate below the rated payload because of a test factor': (answered: Answered) => {
    const { rating, bands } = answered.result;
    expect(bands.verdict).toBe('holds');
    expect(rating?.plate).toBeLessThan(answered.high);
    expect(rating?.limitedBy).toBe('dynamic');
    // Without the factor the plate would say what it is rated for.
    expect(1.1 * number(rating?.allowed)).toBeGreaterThan(answered.high);
  },
} as const;

const SHOWN: Readonly<Record<string, keyof typeof RULES>> = {
  'Lyft lift tables, Short column, Rated': 'holds comfortably',
  'Lyft lift tables, Short column, Worn belt and guides': 'holds',
  'Lyft lift tables, Long column, Rated': 'holds comfortably',
  'Lyft lift tables, Telescopic column, Rated':
    'holds, its plate below the rated payload because of a test factor',
  'Skift transfer carts, Belt drive, Rated': 'holds comfortably',
  'Skift transfer carts, Belt drive, Slower drives, second supplier': 'holds',
  'Skift transfer carts, Rack drive, Rated': 'just holds',
  'Skift transfer carts, Chain drive, Rated': 'fails at the heavy end',
  'Skift transfer carts, Chain drive, Rerated to 5 t': 'holds',
  'Stille cabins, Driver’s seat, Rated': 'fails at the light end',
  'Stille cabins, Driver’s seat, Rerated from 55 kg': 'holds',
  'Stille cabins, Operator cabin, Rated': 'holds comfortably',
  'Stille cabins, Two-person cabin, Rated': 'holds',
};

describe('the range of the demo', () => {
  let reviewer: TestPerson;
  /** Every scenario by product, variant and its own name, with its run. */
  const scenarios = new Map<string, { study: Study; variantRevision: number; runId: string }>();

  beforeAll(async () => {
    reviewer = await signIn('samir');
    for (const product of await items(reviewer, '/api/products', productSchema)) {
      const variants = await items(reviewer, `/api/products/${product.id}/variants`, variantSchema);
      expect(variants.length).toBeGreaterThanOrEqual(3);
      for (const { name: variant, scenarios: own } of variants) {
        for (const { id, name, run } of own) {
          const { head } = (await reviewer.get(`/api/scenarios/${id}`)).read(scenarioSchema);
          scenarios.set(`${product.name}, ${variant}, ${name}`, {
            study: head.study as Study,
            variantRevision: head.variantRevision,
            runId: run?.id ?? '',
          });
        }
      }
    }
  });

  it('holds what is claimed here and nothing else, one machine a variant', () => {
    expect([...scenarios.keys()]).toEqual(Object.keys(SHOWN));
    expect([...scenarios.values()].map(({ variantRevision }) => variantRevision)).toEqual(
      Object.keys(SHOWN).map(() => 1),
    );
  });

  it.each(Object.entries(SHOWN))('%s: %s', (name, rule) => {
    const study = scenarios.get(name)?.study;
    if (study === undefined) throw new Error('there is no such scenario');
    const result = analyseText(JSON.stringify(study));
    const payload = study.parameters.find(({ id }) => id === study.payload);
    const answered = { result, low: number(payload?.low), high: number(payload?.high) };
    RULES[rule](answered);
    if (study.rating !== undefined) expect(study.rating.payload).toBe(answered.high);
    for (const answer of [result.largestPayload, result.smallestPayload, result.bandStretch]) {
      expect(answer).toMatchObject({ proof: 'proved' });
      expect(answer).not.toHaveProperty('undecided');
    }
    expect(result.warnings).toBeUndefined();
    // A fraction of a second of work, whatever the machine.
    expect(result.work.boxes).toBeLessThan(5000);
  });

  it('is computed by whoever works on the queue, with the same digits, maps included', async () => {
    const follower = await followRuns(reviewer);
    const waiting = new Set([...scenarios.values()].map(({ runId }) => runId));
    await follower.until(({ runId, kind }) => {
      if (['done', 'failed', 'cancelled'].includes(kind)) waiting.delete(runId);
      return waiting.size === 0;
    });
    follower.reader.leave();
    for (const { study, runId } of scenarios.values()) {
      const { state, result } = await readRun(reviewer, runId);
      expect(state).toBe('done');
      const { nominal, bands, largestPayload, smallestPayload, bandStretch } = analyseText(
        JSON.stringify(study),
      );
      expect(result).toMatchObject({ nominal, bands, largestPayload, smallestPayload, bandStretch });
      const map = (await reviewer.get(`/api/runs/${runId}/map`)).read(runMapSchema);
      expect([map.x.length, map.y.length]).toEqual([study.map?.columns, study.map?.rows]);
    }
  }, 60_000);
});
