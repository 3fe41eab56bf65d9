/**
 * One declaration per route: method, path, who may, schemas and handler. Express, the OpenAPI document and the
 * test of routes against roles all read it.
 */
import type { Request, Response } from 'express';
import type { z } from 'zod';
import type { Permission } from '@/shared/contract';
import type { Act, Actor } from '@/server/act';
import type { Reply } from '@/server/http/reply';

export type Method = 'get' | 'post' | 'put' | 'delete';
export type Access = 'public' | 'signed-in' | Permission;

type ActorOf<A extends Access> = A extends 'public' ? null : Actor;
/** Changes of something stored must say which version they change. */
type IfMatchOf<M extends Method> = M extends 'put' | 'delete' ? number : undefined;

export interface UploadedFile {
  /** As the browser named it: show it, never use it as a path. */
  name: string;
  bytes: Buffer;
}

export interface RouteContext<M extends Method, A extends Access, P, Q, B> {
  params: P;
  query: Q;
  body: B;
  actor: ActorOf<A>;
  /** Version from If-Match; hand it to `requireVersion` inside the transaction. */
  ifMatch: IfMatchOf<M>;
  /** Present when the route declares `upload`. */
  upload: UploadedFile | undefined;
  requestId: string;
  clientIp: string;
  /**
   * Runs one act in one write transaction and answers with its reply. A POST that is repeated with the same
   * Idempotency-Key gets the first reply again, and `perform` does not run.
   */
  write(perform: (act: Act<ActorOf<A>>) => Promise<Reply>): Promise<Reply>;
  /** For cookies and the like. */
  request: Request;
  response: Response;
}

export interface RouteSpec<M extends Method, A extends Access, P, Q, B> {
  method: M;
  /** As in Express: `/api/patients/:id`. */
  path: string;
  access: A;
  /** One line for the API document. */
  summary: string;
  /** A path that does not match is "not found". */
  params?: z.ZodType<P>;
  query?: z.ZodType<Q>;
  body?: z.ZodType<B>;
  /** Takes one file as multipart form data, in memory. */
  upload?: { field: string; maxBytes: number };
  /** Schema of the JSON reply; a content type for bytes; absent when there is no content. */
  reply?: z.ZodType | string;
  handle(context: RouteContext<M, A, P, Q, B>): Promise<Reply> | Reply;
}

/** A route whose types have been checked and are no longer needed. */
export type Route = RouteSpec<Method, Access, unknown, unknown, unknown>;

export function defineRoute<M extends Method, A extends Access, P, Q, B>(
  spec: RouteSpec<M, A, P, Q, B>,
): Route {
  return spec as unknown as Route;
}
