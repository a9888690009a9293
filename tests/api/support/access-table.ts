import { liftTableStudy } from './lift-table-study';
import type { Standing } from './access-world';

/** Who may call a route. `roles` are those in the product that the path leads to. */
export type Audience =
  | { readonly kind: 'everybody' }
  | { readonly kind: 'signed-in' }
  | { readonly kind: 'organisation'; readonly standings: readonly Standing[] }
  | { readonly kind: 'product'; readonly standings: readonly Standing[] };

export interface AccessEntry {
  readonly who: Audience;
  /** Sent along, so that an allowed call does what it is for. */
  readonly body?: unknown;
  /**
   * The answer to an allowed call. Left out: any that is no refusal, since what the call would need beyond being
   * allowed is not at hand here.
   */
  readonly answer?: number;
}

const everybody: Audience = { kind: 'everybody' };
const signedIn: Audience = { kind: 'signed-in' };
const administrators: Audience = { kind: 'organisation', standings: ['administrator'] };
const creators: Audience = { kind: 'organisation', standings: ['designer'] };
/** Whoever has a role in the product, and administrators, who see every product. */
const readers: Audience = { kind: 'product', standings: ['viewer', 'reviewer', 'designer', 'administrator'] };
const designers: Audience = { kind: 'product', standings: ['designer'] };
const roleGivers: Audience = { kind: 'product', standings: ['administrator'] };

const study = liftTableStudy();
const rename = { name: 'Another name' };

/** Every route of the API and who may call it, written down apart from the policies that the server asks. */
export const ACCESS_TABLE: Readonly<Record<string, AccessEntry>> = {
  'GET /health': { who: everybody, answer: 200 },
  'GET /health/ready': { who: everybody, answer: 200 },
  'GET /openapi.json': { who: everybody, answer: 200 },

  'GET /session': { who: signedIn, answer: 200 },
  'POST /session': { who: everybody, body: {}, answer: 400 },
  'DELETE /session': { who: everybody, answer: 204 },
  'GET /session/all': { who: signedIn, answer: 200 },
  'DELETE /session/all': { who: signedIn, answer: 204 },
  'DELETE /session/all/:sessionId': { who: signedIn, answer: 404 },
  'POST /session/password': { who: signedIn, body: {}, answer: 400 },
  'GET /invitations/:token': { who: everybody, answer: 404 },
  'POST /invitations/:token/accept': { who: everybody, body: {}, answer: 400 },

  'GET /people': { who: administrators, answer: 200 },
  'GET /people/directory': { who: signedIn, answer: 200 },
  'POST /people/invitations': { who: administrators, body: {}, answer: 400 },
  'PATCH /people/:personId': { who: administrators, body: { mayCreateProducts: true }, answer: 200 },
  'DELETE /people/:personId': { who: administrators, answer: 204 },
  'GET /audit': { who: administrators, answer: 200 },
  'GET /mail': { who: administrators, answer: 200 },

  'GET /products': { who: signedIn, answer: 200 },
  'POST /products': { who: creators, body: {}, answer: 400 },
  'GET /products/:productId': { who: readers, answer: 200 },
  'PATCH /products/:productId': { who: designers, body: { description: 'Changed' }, answer: 200 },
  // The product holds a run.
  'DELETE /products/:productId': { who: designers, answer: 409 },
  'GET /products/:productId/members': { who: readers, answer: 200 },
  'PUT /products/:productId/members/:personId': { who: roleGivers, body: { role: 'reviewer' }, answer: 200 },
  'DELETE /products/:productId/members/:personId': { who: roleGivers, answer: 204 },

  'GET /products/:productId/variants': { who: readers, answer: 200 },
  'POST /products/:productId/variants': { who: designers, body: { ...rename, study }, answer: 201 },
  'GET /variants/:variantId': { who: readers, answer: 200 },
  'PATCH /variants/:variantId': { who: designers, body: rename, answer: 200 },
  'DELETE /variants/:variantId': { who: designers, answer: 409 },
  'POST /variants/:variantId/duplicate': { who: designers, body: rename, answer: 201 },

  'POST /variants/:variantId/scenarios': { who: designers, body: { ...rename, study }, answer: 201 },
  'GET /scenarios/:scenarioId': { who: readers, answer: 200 },
  'PATCH /scenarios/:scenarioId': { who: designers, body: rename, answer: 200 },
  'DELETE /scenarios/:scenarioId': { who: designers, answer: 204 },
  'GET /scenarios/:scenarioId/revisions': { who: readers, answer: 200 },
  'POST /scenarios/:scenarioId/revisions': {
    who: designers,
    body: { baseRevision: 1, study, note: '' },
    answer: 201,
  },
  'GET /scenarios/:scenarioId/revisions/:number': { who: readers, answer: 200 },
  'PUT /scenarios/:scenarioId/draft': {
    who: designers,
    body: { baseRevision: 1, version: 0, study },
    answer: 200,
  },
  'DELETE /scenarios/:scenarioId/draft': { who: designers, answer: 204 },

  'POST /scenarios/:scenarioId/revisions/:number/runs': { who: designers, answer: 202 },
  'GET /scenarios/:scenarioId/runs': { who: readers, answer: 200 },
  'GET /runs/:runId': { who: readers, answer: 200 },
  'POST /runs/:runId/cancel': { who: designers, answer: 200 },
  // The run is not done.
  'GET /runs/:runId/map': { who: readers, answer: 404 },
  'GET /events': { who: signedIn, answer: 200 },
  'POST /preview': { who: signedIn, body: { study: {} }, answer: 422 },
  'POST /preview/map': { who: signedIn, body: {}, answer: 400 },
};
