/** The API described by its own routes, as OpenAPI 3.1. */
import { OpenAPIRegistry, OpenApiGeneratorV31, type RouteConfig } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';
import { paths, problemSchema } from '@/shared/contract';
import { json } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';

const PROBLEM = { $ref: '#/components/schemas/Problem' };

export function openApiRoute(routes: readonly Route[]): Route {
  let document: unknown;
  return defineRoute({
    method: 'get',
    path: paths.openApi(),
    access: 'public',
    summary: 'This description',
    reply: z.record(z.string(), z.unknown()),
    handle: () => json((document ??= openApiDocument(routes))),
  });
}

export function openApiDocument(routes: readonly Route[]) {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'bearer', {
    type: 'http',
    scheme: 'bearer',
    bearerFormat: 'JWT',
  });
  registry.registerComponent('schemas', 'Problem', problemJsonSchema());
  for (const route of routes) registry.registerPath(describe(route));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Landfall', version: '1', description: 'Lens planning for a cataract practice.' },
  });
}

function problemJsonSchema(): object {
  const { $schema: _dialect, ...schema } = z.toJSONSchema(problemSchema);
  return schema as object;
}

function describe(route: Route): RouteConfig {
  const { method, path, access, summary } = route;
  return {
    method,
    path: path.replace(/:(\w+)/g, '{$1}'),
    summary,
    description: access === 'public' ? 'Public.' : `Needs: ${access}.`,
    security: access === 'public' ? [] : [{ bearer: [] }],
    request: {
      params: route.params as z.ZodObject | undefined,
      query: route.query as z.ZodObject | undefined,
      headers: changesStored(method) ? z.object({ 'If-Match': z.string() }) : undefined,
      body: bodyOf(route),
    },
    responses: {
      default: {
        description: 'A problem (RFC 9457)',
        content: { 'application/problem+json': { schema: PROBLEM } },
      },
      '2XX': replyOf(route),
    },
  };
}

const changesStored = (method: Route['method']): boolean => method === 'put' || method === 'delete';

function bodyOf({ body, upload }: Route): NonNullable<RouteConfig['request']>['body'] {
  if (upload) {
    const properties = { [upload.field]: { type: 'string' as const, format: 'binary' } };
    return { content: { 'multipart/form-data': { schema: { type: 'object', properties } } } };
  }
  return body && { content: { 'application/json': { schema: body } } };
}

function replyOf({ reply }: Route): RouteConfig['responses'][string] {
  if (reply === undefined) return { description: 'Done; no content' };
  if (typeof reply === 'string') return { description: 'The file', content: { [reply]: { schema: {} } } };
  return { description: 'Done', content: { 'application/json': { schema: reply } } };
}
