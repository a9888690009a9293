import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import express, { type Request, type Response, Router } from 'express';
import { notFound } from '../problem';
import { nonceOf } from './security-headers';

/** The builder puts a hash of the content into such names: what they name never changes. */
const HASHED_NAME = /-[A-Z0-9]{8}\.\w+$/;
const NONCE_MARK = 'CSP_NONCE';

const NOT_BUILT = 'The pages of Tareline are not built; the API answers under /api.\n';

/** A page of the application: the address names no file, and the client asks for a document. */
function asksForPage(request: Request): boolean {
  const last = request.path.slice(request.path.lastIndexOf('/') + 1);
  return !last.includes('.') && request.accepts(['html', 'json']) === 'html';
}

/**
 * Serves the built pages: files as they are, and index.html, with the nonce of the response, for every address
 * that names no file, since the pages read the address themselves.
 *
 * @param folder of the built pages; where it has no index.html, a line says so
 */
export function servePages(folder: string): Router {
  const router = Router();
  const indexFile = join(folder, 'index.html');
  const index = existsSync(indexFile) ? readFileSync(indexFile, 'utf8') : undefined;

  if (index !== undefined) {
    // As a file it would keep the mark where its nonce belongs.
    router.get('/index.html', (_request, response) => response.redirect('/'));
    router.use(
      express.static(folder, {
        index: false,
        redirect: false,
        setHeaders: (response, path) => {
          const keep = HASHED_NAME.test(path) ? 'public, max-age=31536000, immutable' : 'no-cache';
          response.setHeader('Cache-Control', keep);
        },
      }),
    );
  }
  router.get('/{*path}', (request: Request, response: Response) => {
    if (!asksForPage(request)) throw notFound();
    response.set('Cache-Control', 'no-store');
    if (index === undefined) response.status(404).type('text/plain').send(NOT_BUILT);
    else response.type('html').send(index.replaceAll(NONCE_MARK, nonceOf(response)));
  });
  router.use(() => {
    throw notFound();
  });
  return router;
}
