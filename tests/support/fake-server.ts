/** A stand-in for the server's side of `fetch`: answers by method and path, and remembers what it was asked. */

export interface Asked {
  method: string;
  path: string;
  headers: Record<string, string>;
  body: unknown;
}
export interface Answer {
  status?: number;
  json?: unknown;
  text?: string;
  headers?: Record<string, string>;
}
type Answering = Answer | ((asked: Asked, time: number) => Answer | Promise<Answer>);

export interface FakeServer {
  asked: Asked[];
  /** How often this was asked: `GET /api/home`. */
  count: (route: string) => number;
  on: (route: string, answering: Answering) => void;
  /** From now on there is no answer at all. */
  goOffline: () => void;
}

export function startFakeServer(): FakeServer {
  const routes = new Map<string, Answering>();
  const asked: Asked[] = [];
  let isOffline = false;
  const count = (route: string) => asked.filter(({ method, path }) => `${method} ${path}` === route).length;

  globalThis.fetch = (async (input: RequestInfo | URL, init: RequestInit = {}) => {
    const request: Asked = {
      method: init.method ?? 'GET',
      path: String(input),
      headers: init.headers as Record<string, string>,
      body: typeof init.body === 'string' ? JSON.parse(init.body) : init.body,
    };
    asked.push(request);
    if (isOffline) throw new TypeError('Failed to fetch');
    const route = `${request.method} ${request.path}`;
    const answering = routes.get(route);
    if (answering === undefined) throw new Error(`The test does not answer ${route}`);
    return toResponse(typeof answering === 'function' ? await answering(request, count(route)) : answering);
  }) as typeof fetch;

  return {
    asked,
    count,
    on: (route, answering) => routes.set(route, answering),
    goOffline: () => (isOffline = true),
  };
}

/** A problem document as the server writes it. */
export function problem(code: string, status: number, extras: object = {}): Answer {
  return {
    status,
    json: { type: `urn:landfall:problem:${code}`, title: `Title of ${code}`, status, ...extras },
  };
}

function toResponse({ status = 200, json, text, headers = {} }: Answer): Response {
  const body = text ?? (json === undefined ? '' : JSON.stringify(json));
  const named = new Map(Object.entries(headers).map(([name, value]) => [name.toLowerCase(), value]));
  return {
    ok: status >= 200 && status < 300,
    status,
    headers: { get: (name: string) => named.get(name.toLowerCase()) ?? null },
    json: async () => JSON.parse(body) as unknown,
    blob: async () => new Blob([body]),
  } as unknown as Response;
}
