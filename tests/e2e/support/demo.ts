import { ne } from 'drizzle-orm';
import { vi } from 'vitest';
import { inTransaction } from '../../../server/db';
import { runs } from '../../../server/db/schema';
import { demoSeed } from '../../../server/features/demo';
import { productSchema, signedInSchema, type Variant, variantSchema } from '../../../shared/contracts/api';
import { z } from '../../../shared/contracts/zod';
import { ENGINE_VERSION } from '../../../shared/engine';
import { HttpClient } from '../../api/support/http-client';
import { browserWith } from '../../api/support/sign-in';
import { TestPerson } from '../../api/support/test-people';
import type { Site } from './site';

/** The demo in the database of a site, with every run computed by its server. */
export interface Demo {
  readonly administrator: TestPerson;
  /** Of lift tables and cabins; a viewer of the carts. */
  readonly designer: TestPerson;
  /** Addresses of its pages by name: "Lyft lift tables", "Short column", "Short column, Rated". */
  path(name: string): string;
}

/** How long its runs may take all together, ms. */
const PATIENCE = 40_000;

export async function seedDemo({ db, address }: Site): Promise<Demo> {
  const signIns = await inTransaction(db, demoSeed({ engineVersion: ENGINE_VERSION }));
  const signIn = async (name: string) => {
    const { email, password } = signIns.find((known) => known.email.startsWith(`${name}@`)) ?? {};
    const answer = await new HttpClient(address).post('/api/session', { email, password });
    const { cookie = '' } = browserWith(answer, address);
    return new TestPerson(address, cookie, answer.read(signedInSchema).id, email ?? '');
  };
  const administrator = await signIn('maren');
  const designer = await signIn('joris');

  const paths = new Map<string, string>();
  const listed = async <Item extends z.ZodType>(path: string, item: Item) =>
    (await designer.get(path)).read(z.object({ items: z.array(item) })).items;
  for (const { id, name } of await listed('/api/products', productSchema)) {
    paths.set(name, `/products/${id}`);
    for (const variant of await listed(`/api/products/${id}/variants`, variantSchema))
      addPaths(paths, variant);
  }
  const open = () => db.select({ id: runs.id }).from(runs).where(ne(runs.state, 'done'));
  await vi.waitUntil(async () => (await open()).length === 0, { timeout: PATIENCE });
  return {
    ...{ administrator, designer },
    path: (name) => {
      const path = paths.get(name);
      if (path === undefined) throw new Error(`the demo has no ${name}`);
      return path;
    },
  };
}

function addPaths(paths: Map<string, string>, { id, name, scenarios }: Variant): void {
  paths.set(name, `/variants/${id}`);
  for (const scenario of scenarios) paths.set(`${name}, ${scenario.name}`, `/scenarios/${scenario.id}`);
}
