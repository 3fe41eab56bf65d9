/** Turns the declared routes into Express handlers. The order of the checks is the same for every route. */
import type { Express, Request, RequestHandler, Response } from 'express';
import multer from 'multer';
import { hasPermission } from '@/shared/contract';
import { inAct, type Act, type Actor } from '@/server/act';
import { recordAudit } from '@/server/audit/writer';
import type { Deps } from '@/server/deps';
import type { Authenticate } from '@/server/http/auth';
import { checkReply } from '@/server/http/check-reply';
import { versionFromIfMatch } from '@/server/http/etag';
import { performOnce, repeatableRequest } from '@/server/http/idempotency';
import { ProblemError } from '@/server/http/problem';
import type { Reply } from '@/server/http/reply';
import { requestIdOf } from '@/server/http/request-id';
import type { Route, UploadedFile } from '@/server/http/route';
import { parseRequest } from '@/server/http/validate';

interface Frame {
  deps: Deps;
  route: Route;
  authenticate: Authenticate;
}

export interface Mounting {
  deps: Deps;
  authenticate: Authenticate;
  routes: readonly Route[];
}

export function mountRoutes(app: Express, { deps, authenticate, routes }: Mounting): void {
  refuseDuplicates(routes);
  for (const route of [...routes].sort(literalSegmentsFirst)) {
    const frame = { deps, route, authenticate };
    app[route.method](route.path, authorise(frame), ...receiveUpload(route), answer(frame));
  }
}

/** Before anything of the body is read: who asks, and may they? */
function authorise({ deps, route, authenticate }: Frame): RequestHandler {
  return async (request, response, next) => {
    response.locals.route = route.path;
    if (route.access !== 'public') {
      const actor = await authenticate(request, response);
      response.locals.actor = actor;
      if (route.access !== 'signed-in' && !hasPermission(actor.roles, route.access)) {
        await recordRefusal(deps, route, response);
        throw new ProblemError('forbidden');
      }
    }
    next();
  };
}

function recordRefusal(deps: Deps, route: Route, response: Response): Promise<void> {
  const actor = actorOf(response);
  return inAct(deps, { actor, requestId: requestIdOf(response) }, (act) =>
    recordAudit(act, {
      action: 'access.refused',
      noun: 'route',
      detail: { method: route.method, path: route.path, needs: route.access },
    }),
  );
}

function receiveUpload({ upload }: Route): RequestHandler[] {
  if (!upload) return [];
  const limits = { fileSize: upload.maxBytes, files: 1, fields: 20, fieldSize: 100_000 };
  // Browsers send file names as UTF-8; the parser would take them for Latin-1.
  const receive = multer({ limits, defParamCharset: 'utf8' }).single(upload.field);
  return [
    (request, response, next) =>
      receive(request, response, (error?: unknown) => next(error && uploadProblem(error))),
  ];
}

/** Whatever goes wrong while a form is taken apart lies in the form. */
function uploadProblem(error: unknown): ProblemError {
  const isTooLarge = error instanceof multer.MulterError && error.code === 'LIMIT_FILE_SIZE';
  return new ProblemError(isTooLarge ? 'too-large' : 'bad-request');
}

function answer({ deps, route }: Frame): RequestHandler {
  return async (request, response) => {
    const upload = uploadOf(request);
    if (route.upload && !upload) {
      const fields = [{ path: route.upload.field, code: 'missing', message: 'The file is missing' }];
      throw new ProblemError('invalid', undefined, { fields });
    }
    const changesStored = route.method === 'put' || route.method === 'delete';
    const reply = await route.handle({
      ...parseRequest(route, request),
      actor: actorOf(response),
      ifMatch: changesStored ? versionFromIfMatch(request.get('if-match')) : undefined,
      upload,
      requestId: requestIdOf(response),
      clientIp: request.ip ?? '',
      write: writer(deps, request, response),
      request,
      response,
    });
    if (!deps.config.isProduction) checkReply(route, reply);
    send(response, reply);
  };
}

function writer(deps: Deps, request: Request, response: Response) {
  return (perform: (act: Act) => Promise<Reply>): Promise<Reply> => {
    const actor = actorOf(response);
    const repeatable = repeatableRequest(request, uploadOf(request));
    return inAct(deps, { actor, requestId: requestIdOf(response) }, (act) =>
      repeatable && act.actor ? performOnce(act, repeatable, () => perform(act)) : perform(act),
    );
  };
}

function send(response: Response, { status, body, bytes, headers = {} }: Reply): void {
  response.status(status).set(headers);
  if (bytes) response.send(bytes);
  else if (body !== undefined) response.json(body);
  else response.end();
}

function actorOf(response: Response): Actor {
  return response.locals.actor as Actor;
}

function uploadOf({ file }: Request): UploadedFile | undefined {
  return file && { name: file.originalname, bytes: file.buffer };
}

/** `/api/imports/demo.csv` must be tried before `/api/imports/:id`. */
function literalSegmentsFirst(a: Route, b: Route): number {
  const [first = '', second = ''] = [a, b].map(({ path }) => path.replaceAll(':', '\uffff'));
  return Number(first > second) - Number(first < second);
}

function refuseDuplicates(routes: readonly Route[]): void {
  const seen = new Set<string>();
  for (const { method, path } of routes) {
    const name = `${method} ${path.replace(/:\w+/g, ':')}`;
    if (seen.has(name)) throw new Error(`Declared twice: ${name}`);
    seen.add(name);
  }
}
