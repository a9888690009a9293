import type { RequestHandler } from 'express';
import { isLoopback } from '../configuration';
import { hostUnknown, originRefused } from '../problem';

const SAFE_METHODS = ['GET', 'HEAD', 'OPTIONS'];

function hostName(host: string): string | undefined {
  const url = `http://${host}`;
  return URL.canParse(url) ? new URL(url).hostname : undefined;
}

/**
 * Refuses requests that a foreign page makes a browser send.
 *
 * A request that may change something must say by Origin or Sec-Fetch-Site that it comes from a page of this
 * server; every browser in use sends at least one of them, and a program can state Origin itself. Without a
 * stated origin the server is on loopback, where a foreign name that was made to point here (DNS rebinding) is
 * refused as well.
 *
 * @param stated the origin people use, undefined on loopback
 */
export function requireSameOrigin(stated: string | undefined): RequestHandler {
  return (request, _response, next) => {
    const host = request.get('host') ?? '';
    if (stated === undefined) {
      const name = hostName(host);
      if (name === undefined || !isLoopback(name)) throw hostUnknown();
    }
    if (!SAFE_METHODS.includes(request.method)) {
      const site = request.get('sec-fetch-site');
      const origin = request.get('origin');
      if (site !== undefined && site !== 'same-origin') throw originRefused();
      if (origin !== undefined && origin !== (stated ?? `http://${host}`)) throw originRefused();
      if (site === undefined && origin === undefined) {
        throw originRefused('State the address of this server in the Origin header.');
      }
    }
    next();
  };
}
