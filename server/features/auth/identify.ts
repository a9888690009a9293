import type { IncomingHttpHeaders } from 'node:http';
import type { Db } from '../../db';
import type { SessionCookie } from '../../platform/http/session-cookie';
import { hashToken } from '../../platform/opaque-token';
import type { Caller } from '../../platform/routing';
import { findCaller } from './session.repository';

export interface IdentifyDependencies {
  readonly db: Db;
  readonly cookie: SessionCookie;
}

/** Who a request comes from, by the token in its cookie. */
export function createIdentify({ db, cookie }: IdentifyDependencies) {
  return async (headers: IncomingHttpHeaders): Promise<Caller | undefined> => {
    const token = cookie.read(headers);
    return token === undefined || token === '' ? undefined : findCaller(db, hashToken(token));
  };
}
