import type { IncomingHttpHeaders } from 'node:http';
import type { Db } from '../../db';
import type { SessionCookie } from '../../platform/http/session-cookie';
import { hashToken } from '../../platform/opaque-token';
import type { Caller } from '../../platform/routing';
import { SEEN_STEP_MS } from './session-lifetime';
import { findCaller, markSeen } from './session.repository';

export interface IdentifyDependencies {
  readonly db: Db;
  readonly cookie: SessionCookie;
  readonly clock: () => Date;
}

/** Who a request comes from, by the token in its cookie. */
export function createIdentify({ db, cookie, clock }: IdentifyDependencies) {
  return async (headers: IncomingHttpHeaders): Promise<Caller | undefined> => {
    const token = cookie.read(headers);
    if (token === undefined || token === '') return undefined;
    const now = clock();
    const found = await findCaller(db, hashToken(token), now);
    if (found === undefined) return undefined;
    const { caller, lastSeenAt } = found;
    if (now.getTime() - lastSeenAt.getTime() >= SEEN_STEP_MS) await markSeen(db, { ...caller, now });
    return caller;
  };
}
