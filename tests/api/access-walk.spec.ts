import { describe, expect, it } from 'vitest';
import { type AccessEntry, ACCESS_TABLE } from './support/access-table';
import {
  type AccessWorld,
  makeAccessWorld,
  type PathValues,
  PRODUCT_ROLES,
  type Standing,
  STANDINGS,
} from './support/access-world';
import { openEvents } from './support/event-reader';
import type { HttpClient } from './support/http-client';
import { type TestApi, useApi } from './support/test-api';

interface Walked {
  readonly method: string;
  readonly path: string;
  readonly streams: boolean;
}

type Whose = 'own' | 'other';

/** `reached`: the route did its work, or found a fault of its own with the call. */
type Outcome = 401 | 403 | 404 | 'reached';

const nameOf = ({ method, path }: Pick<Walked, 'method' | 'path'>) => `${method} ${path}`;

/** Routes that the table does not know, and entries of the table for which there is no route. */
function differences(
  routes: readonly Pick<Walked, 'method' | 'path'>[],
  table: Readonly<Record<string, AccessEntry>>,
) {
  const names = routes.map(nameOf);
  return {
    withoutEntry: names.filter((name) => !Object.hasOwn(table, name)),
    withoutRoute: Object.keys(table).filter((name) => !names.includes(name)),
  };
}

/** What the table says of one call. */
function expected({ who }: AccessEntry, standing: Standing, whose: Whose): Outcome {
  if (who.kind === 'everybody') return 'reached';
  if (standing === 'signedOut' || standing === 'disabled') return 401;
  if (who.kind === 'signed-in') return 'reached';
  const allowed = who.standings.includes(standing);
  if (who.kind === 'organisation' || standing === 'administrator') return allowed ? 'reached' : 403;
  // Whoever has no part in a product does not learn that it exists.
  if (standing === 'member' || whose === 'other') return 404;
  return allowed ? 'reached' : 403;
}

function filled(path: string, values: PathValues): string {
  return path.replace(/:(\w+)/g, (_, name: string) => {
    if (!Object.hasOwn(values, name)) throw new Error(`the walk has no value for :${name} of ${path}`);
    return encodeURIComponent(values[name]);
  });
}

/** The status of the answer; a stream, which has no end, is left again. */
async function statusOf(
  client: HttpClient,
  { method, path, streams }: Walked,
  { body, from }: { body: unknown; from: string },
): Promise<number> {
  // Limits count by address: every call comes from one of its own.
  const headers: Record<string, string> = { 'x-forwarded-for': from };
  if (!streams) return (await client.send(method, `/api${path}`, { body, headers })).status;
  if (client.cookie !== undefined) headers.cookie = client.cookie;
  const stream = await openEvents(`${client.address}/api${path}`, headers);
  stream.leave();
  return stream.status;
}

describe('who may call what', () => {
  const api = useApi();
  let shared: AccessWorld | undefined;
  let calls = 0;

  /** Calls that change nothing share a world; one that does its work gets its own. */
  const worldFor = async (route: Walked, entry: AccessEntry, outcome: Outcome): Promise<AccessWorld> => {
    const works = outcome === 'reached' && (entry.answer ?? 200) < 300;
    if (works && route.method !== 'GET') return makeAccessWorld(api());
    shared ??= await makeAccessWorld(api());
    return shared;
  };

  const call = async (route: Walked, entry: AccessEntry, standing: Standing, whose: Whose) => {
    const world = await worldFor(route, entry, expected(entry, standing, whose));
    calls += 1;
    const from = `10.0.${Math.floor(calls / 250)}.${1 + (calls % 250)}`;
    const walked = { ...route, path: filled(route.path, world[whose]) };
    return statusOf(world.clients[standing], walked, { body: entry.body, from });
  };

  const walk = async (route: Walked, entry: AccessEntry): Promise<string[]> => {
    const wrong: string[] = [];
    for (const standing of STANDINGS) {
      const both = entry.who.kind === 'product' && PRODUCT_ROLES.includes(standing);
      const sides: Whose[] = both || standing === 'administrator' ? ['own', 'other'] : ['own'];
      for (const whose of sides) {
        const outcome = expected(entry, standing, whose);
        const status = await call(route, entry, standing, whose);
        if (!fits(status, outcome, entry)) {
          const wanted = outcome === 'reached' ? (entry.answer ?? 'no refusal') : outcome;
          wrong.push(`${nameOf(route)} as ${standing}, ${whose} product: ${status} instead of ${wanted}`);
        }
      }
    }
    return wrong;
  };

  it('knows every route of the application, and no other', () => {
    expect(differences(api().app.routes, ACCESS_TABLE)).toEqual({ withoutEntry: [], withoutRoute: [] });
  });

  it('would notice a route without an entry, and an entry without a route', () => {
    const added = { method: 'POST', path: '/products/:productId/parts' };
    const [first, ...rest] = api().app.routes;
    expect(differences([...rest, added], ACCESS_TABLE)).toEqual({
      withoutEntry: ['POST /products/:productId/parts'],
      withoutRoute: [nameOf(first)],
    });
  });

  it.each(Object.entries(ACCESS_TABLE))('%s', async (name, entry) => {
    const route = findRoute(api(), name);
    expect(await walk(route, entry)).toEqual([]);
  });
});

function fits(status: number, outcome: Outcome, { answer }: AccessEntry): boolean {
  if (outcome !== 'reached') return status === outcome;
  return answer === undefined ? ![401, 403, 404].includes(status) && status < 500 : status === answer;
}

function findRoute({ app }: TestApi, name: string): Walked {
  const route = app.routes.find((candidate) => nameOf(candidate) === name);
  if (route === undefined) throw new Error(`there is no route ${name}`);
  const { method, path, answer } = route;
  return { method, path, streams: answer.kind === 'events' };
}
