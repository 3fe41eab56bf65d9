/** Puts the application together. No listening, no environment: tests use it as it is. */
import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { type Express } from 'express';
import type { Deps } from '@/server/deps';
import { createAuthenticate } from '@/server/http/auth';
import { errorHandler, unknownPath } from '@/server/http/error-handler';
import { healthRoutes } from '@/server/http/health';
import { requestLog } from '@/server/http/logging';
import { mountRoutes } from '@/server/http/mount';
import { openApiRoute } from '@/server/http/openapi';
import { publicRateLimit } from '@/server/http/rate-limit';
import { requestId } from '@/server/http/request-id';
import type { Route } from '@/server/http/route';
import { noStore, securityHeaders } from '@/server/http/security-headers';
import { readIndexHtml, serveWeb } from '@/server/http/serve-web';
import { allRoutes } from '@/server/routes';

const JSON_LIMIT = '1mb';
/** Where an unauthenticated request can cost a password hash or a mail. */
const PUBLIC_PREFIXES = ['/api/auth', '/api/setup'];

export function createApp(deps: Deps): Express {
  const { config, logger } = deps;
  const indexHtml = readIndexHtml(config.webFolder);
  const app = express();

  app.disable('x-powered-by');
  // Only the proxies that are known to be there: else anybody could claim any address.
  app.set('trust proxy', config.proxyHops);
  app.set('etag', false);

  app.use(requestId(deps.random));
  app.use(requestLog(logger));
  app.use(securityHeaders(indexHtml));
  app.use(healthRoutes(deps.db));
  app.use(compression());

  app.use('/api', noStore);
  app.use(PUBLIC_PREFIXES, publicRateLimit(config.publicRequestsPerMinute));
  app.use('/api', cookieParser(), express.json({ limit: JSON_LIMIT }));
  mountRoutes(app, {
    deps,
    authenticate: createAuthenticate(deps),
    routes: declaredRoutes(deps),
  });

  app.use(serveWeb(config.webFolder, indexHtml));
  app.use(unknownPath);
  app.use(errorHandler(logger));
  return app;
}

/** The routes of the features, and the one that describes them. */
export function declaredRoutes(deps: Deps): Route[] {
  const routes = allRoutes(deps);
  return [...routes, openApiRoute(routes)];
}
