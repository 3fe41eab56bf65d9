/** Routes made for these tests alone, in the same frame as the real ones. */
import express, { type Express } from 'express';
import request from 'supertest';
import { z } from 'zod';
import { PROBLEM_TYPE_PREFIX } from '@/shared/contract';
import { createAuthenticate } from '@/server/http/auth';
import { errorHandler } from '@/server/http/error-handler';
import { mountRoutes } from '@/server/http/mount';
import { file, json, noContent } from '@/server/http/reply';
import { requestId } from '@/server/http/request-id';
import { defineRoute, type Route } from '@/server/http/route';
import { startTestApp, type TestApp } from '@/tests/support/test-app';

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp();
});
afterAll(() => test.close());

const frameOf = (...routes: Route[]): Express => {
  const { deps } = test;
  const app = express();
  app.use(requestId(deps.random), express.json());
  mountRoutes(app, { deps, authenticate: createAuthenticate(deps), routes });
  app.use(errorHandler(deps.logger));
  return app;
};

const common = { method: 'get', access: 'public', summary: 'Only a test' } as const;

describe('the frame of a route', () => {
  it('hands parsed values to the handler', async () => {
    const app = frameOf(
      defineRoute({
        ...common,
        path: '/things/:id',
        params: z.object({ id: z.string().transform(Number) }),
        query: z.object({ limit: z.string().transform(Number) }),
        reply: z.object({ sum: z.number() }),
        handle: ({ params, query }) => json({ sum: params.id + query.limit }, { version: 4 }),
      }),
    );

    const reply = await request(app).get('/things/7?limit=5');

    expect(reply.body).toEqual({ sum: 12 });
    expect(reply.headers.etag).toBe('"4"');
  });

  it('tries a literal path before a pattern, whatever the order of declaration', async () => {
    const say = (path: string, words: string) =>
      defineRoute({ ...common, path, reply: z.string(), handle: () => json(words) });
    const app = frameOf(say('/things/:id', 'pattern'), say('/things/list.csv', 'literal'));

    expect((await request(app).get('/things/list.csv')).body).toBe('literal');
    expect((await request(app).get('/things/other')).body).toBe('pattern');
  });

  it('refuses two declarations of the same route', () => {
    const route = (path: string) => defineRoute({ ...common, path, handle: noContent });

    expect(() => frameOf(route('/things/:id'), route('/things/:name'))).toThrow(/Declared twice/);
  });

  it.each([
    ['says more than', { id: 1, passwordHash: 'x' }],
    ['lacks something of', {}],
  ])('finds a reply that %s its schema', async (_what, body) => {
    const reply = z.object({ id: z.number() });
    const app = frameOf(defineRoute({ ...common, path: '/leak', reply, handle: () => json(body) }));

    expect((await request(app).get('/leak')).status).toBe(500);
  });

  it('sends a file under its name, whatever letters it has', async () => {
    const bytes = Buffer.from('a;b');
    const app = frameOf(
      defineRoute({
        ...common,
        path: '/file',
        reply: 'text/csv',
        handle: () =>
          file({ bytes, contentType: 'text/csv; charset=utf-8', fileName: `Åse's "biometry".csv` }),
      }),
    );

    const reply = await request(app).get('/file');

    expect(reply.text).toBe('a;b');
    expect(reply.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(reply.headers['content-disposition']).toBe(
      `attachment; filename="_se_s _biometry_.csv"; filename*=UTF-8''%C3%85se%27s%20%22biometry%22.csv`,
    );
  });
});

describe('an upload', () => {
  const app = () =>
    frameOf(
      defineRoute({
        ...common,
        method: 'post',
        path: '/upload',
        upload: { field: 'file', maxBytes: 10 },
        reply: z.object({ name: z.string(), size: z.number() }),
        handle: ({ upload }) => json({ name: upload?.name, size: upload?.bytes.length }),
      }),
    );
  const send = (bytes: string, field = 'file') =>
    request(app()).post('/upload').attach(field, Buffer.from(bytes), 'Zoë.csv');

  it('arrives byte for byte, with its name', async () => {
    expect((await send('0123456789')).body).toEqual({ name: 'Zoë.csv', size: 10 });
  });

  it.each([
    ['too large', () => send('0123456789a'), 413, 'too-large'],
    ['in another field', () => send('0', 'other'), 400, 'bad-request'],
    ['missing', () => request(app()).post('/upload').send({}), 422, 'invalid'],
    [
      'cut off',
      () =>
        request(app())
          .post('/upload')
          .set('Content-Type', 'multipart/form-data; boundary=x')
          .send('--x\r\nContent-Disposition: form-data; name="file"; filename="a.csv"\r\n\r\n12'),
      400,
      'bad-request',
    ],
  ])('%s is refused as such', async (_what, ask, status, code) => {
    const reply = await ask();

    expect(reply.status).toBe(status);
    expect(reply.body.type).toBe(PROBLEM_TYPE_PREFIX + code);
  });
});
