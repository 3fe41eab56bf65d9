/**
 * Every route against every role. Whoever adds a route or loosens a permission has to say so here, by hand:
 * the table below is not computed from the permissions on purpose.
 */
import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { hasPermission, ROLES, type Role } from '@/shared/contract';
import { declaredRoutes } from '@/server/app';
import type { Route } from '@/server/http/route';
import { ORIGIN } from '@/tests/support/browser';
import { startTestApp, type SignedIn, type TestApp } from '@/tests/support/test-app';
import { ROUTES_BY_HAND, type Who } from './route-roles.table';

let test: TestApp;
let routes: Route[];
const people = new Map<Role, SignedIn>();

beforeAll(async () => {
  test = await startTestApp();
  routes = declaredRoutes(test.deps);
  for (const role of ROLES) people.set(role, await test.signInAs(role));
});
afterAll(() => test.close());

const nameOf = ({ method, path }: Pick<Route, 'method' | 'path'>): string =>
  `${method.toUpperCase()} ${path}`;

const rolesOf = (who: Who): readonly Role[] => (who === 'public' || who === 'signed-in' ? ROLES : who);

/** An address of the route for things that do not exist. */
const addressOf = (name: string): string => {
  const [, path = ''] = name.split(' ');
  return path.replace(':side', 'right').replace(/:\w+/g, () => randomUUID());
};

/** Asks with nothing in the body: whoever is let in is told that values are missing or that nothing is there. */
const ask = (name: string, accessToken?: string) => {
  const method = name.split(' ')[0]?.toLowerCase() as Route['method'];
  const asking = request(test.app)[method](addressOf(name)).set('Origin', ORIGIN).set('X-Landfall', '1');
  return accessToken === undefined ? asking : asking.set('Authorization', `Bearer ${accessToken}`);
};

const named = Object.entries(ROUTES_BY_HAND);
const NOT_LET_IN = [401, 403];

describe('the table', () => {
  it('names every declared route', () => {
    expect(routes.map(nameOf).filter((name) => !(name in ROUTES_BY_HAND))).toEqual([]);
  });

  it('names no route that is not declared', () => {
    const declared = new Set(routes.map(nameOf));

    expect(named.map(([name]) => name).filter((name) => !declared.has(name))).toEqual([]);
  });

  it('agrees with what each route declares and with the table of permissions', () => {
    for (const route of routes) {
      const { access } = route;
      const declared =
        access === 'public' || access === 'signed-in'
          ? access
          : ROLES.filter((role) => hasPermission([role], access));
      const byHand = ROUTES_BY_HAND[nameOf(route)];

      expect([nameOf(route), typeof byHand === 'object' ? [...byHand].sort() : byHand]).toEqual([
        nameOf(route),
        typeof declared === 'object' ? [...declared].sort() : declared,
      ]);
    }
  });
});

describe.each(named)('%s', (name, who) => {
  it(`is open to ${typeof who === 'string' ? who : who.join(', ')}, and to nobody else`, async () => {
    const allowed = rolesOf(who);
    for (const role of ROLES) {
      const { status } = await ask(name, people.get(role)?.accessToken);

      const wasLetIn = who === 'public' || !NOT_LET_IN.includes(status);
      if (allowed.includes(role)) expect([role, wasLetIn, status < 500]).toEqual([role, true, true]);
      else expect([role, status]).toEqual([role, 403]);
    }
  });

  it(who === 'public' ? 'answers without a sign-in' : 'asks for a sign-in first', async () => {
    const { status, body } = await ask(name);

    if (who === 'public') expect(status).not.toBe(403);
    else expect([status, body.type]).toEqual([401, 'urn:landfall:problem:unauthenticated']);
  });
});
