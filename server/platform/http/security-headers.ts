import { randomBytes } from 'node:crypto';
import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';

const nonces = new WeakMap<object, string>();

/** The nonce of this response: the one under which index.html may bring styles. */
export function nonceOf(response: Response): string {
  const nonce = nonces.get(response);
  if (nonce === undefined) throw new Error('the response has no nonce');
  return nonce;
}

/**
 * Content security policy and the other protective headers. Every directive is stated: the package's defaults
 * allow inline styles, and would turn loopback's http into https.
 *
 * @param https whether people reach the server by https
 */
export function securityHeaders({ https }: { https: boolean }): RequestHandler {
  const protect = helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'none'"],
        scriptSrc: ["'self'"],
        scriptSrcAttr: ["'none'"],
        styleSrc: ["'self'", (_request, response) => `'nonce-${nonces.get(response) ?? ''}'`],
        styleSrcAttr: ["'none'"],
        fontSrc: ["'self'"],
        connectSrc: ["'self'"],
        workerSrc: ["'self'"],
        imgSrc: ["'self'", 'data:', 'blob:'],
        manifestSrc: ["'self'"],
        baseUri: ["'self'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        objectSrc: ["'none'"],
      },
    },
    strictTransportSecurity: https ? { maxAge: 365 * 24 * 3600 } : false,
    crossOriginOpenerPolicy: { policy: 'same-origin' },
    crossOriginResourcePolicy: { policy: 'same-origin' },
    referrerPolicy: { policy: 'no-referrer' },
    xFrameOptions: { action: 'deny' },
  });
  return (request, response, next) => {
    nonces.set(response, randomBytes(16).toString('base64'));
    protect(request, response, next);
  };
}
