import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import express, { Router } from 'express';
import type { RequestHandler } from 'express';
import { isClientRoute } from '#contracts/client-routes';

const nothingHere: RequestHandler = (_request, response) => {
  response.status(404).type('text/plain').send('There is nothing here.\n');
};

/** The built client: files with a digest in their name for ever, the page itself never from a cache. */
export function pages(clientDir: string): Router {
  const router = Router();
  router.use(
    '/assets',
    express.static(join(clientDir, 'assets'), { immutable: true, maxAge: '365d', index: false, redirect: false }),
    nothingHere,
  );
  router.use(express.static(clientDir, { index: false, redirect: false, maxAge: '1h' }));

  const indexFile = join(clientDir, 'index.html');
  const page = existsSync(indexFile) ? readFileSync(indexFile, 'utf8') : null;
  router.get('/{*splat}', (request, response) => {
    response.set('Cache-Control', 'no-cache');
    if (page === null) {
      response.status(503).type('text/plain').send('The client has not been built: npm run build.\n');
      return;
    }
    response
      .status(isClientRoute(request.path) ? 200 : 404)
      .type('html')
      .send(page);
  });
  router.use(nothingHere);
  return router;
}
