/** The exported web client: hashed files for a year, the page itself never from a cache. */
import { existsSync, readFileSync } from 'node:fs';
import { join, relative, sep } from 'node:path';
import express, { Router, type RequestHandler } from 'express';

const IMMUTABLE = 'public, max-age=31536000, immutable';
/** Folders in which the export puts a digest into every file name. */
const HASHED = /^(_expo|assets)\//;

export function readIndexHtml(webFolder: string): string {
  const path = join(webFolder, 'index.html');
  return existsSync(path) ? readFileSync(path, 'utf8') : '';
}

export function serveWeb(webFolder: string, indexHtml: string): Router {
  const router = Router();
  router.use(
    express.static(webFolder, {
      index: false,
      redirect: false,
      setHeaders: (response, path) => {
        const name = relative(webFolder, path).split(sep).join('/');
        response.setHeader('Cache-Control', HASHED.test(name) ? IMMUTABLE : 'no-cache');
      },
    }),
  );
  router.get(/^\/(?!api(\/|$)|_expo\/|assets\/)/, page(indexHtml));
  return router;
}

/** Any address of the client is answered with the one page; its router does the rest. */
function page(indexHtml: string): RequestHandler {
  return (_request, response) => {
    response.setHeader('Cache-Control', 'no-cache');
    if (indexHtml === '')
      response.status(503).type('text').send('The web client is not built yet: npm run build');
    else response.type('html').send(indexHtml);
  };
}
