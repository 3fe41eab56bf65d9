/** What a browser does with the session cookie: keeps it, sends it back, adds Origin. */
import type { Express } from 'express';
import request, { type Response } from 'supertest';

export interface Browser {
  /** Value of the refresh token now held, undefined when there is none. */
  cookie: string | undefined;
  signIn(email: string, password: string): Promise<Response>;
  refresh(): Promise<Response>;
  signOut(): Promise<Response>;
}

const COOKIE = /^landfall_refresh=([^;]*)/;
export const ORIGIN = 'http://localhost:3000';

/** `app` may also be the address of a running server. */
export function openBrowser(app: Express | string, cookie?: string): Browser {
  const browser: Browser = {
    cookie,
    signIn: (email, password) => keep(request(app).post('/api/auth/sign-in').send({ email, password })),
    refresh: () => keep(own('/api/auth/refresh')),
    signOut: () => keep(own('/api/auth/sign-out')),
  };
  const own = (path: string) => {
    const test = request(app).post(path).set('Origin', ORIGIN).set('X-Landfall', '1');
    return browser.cookie === undefined ? test : test.set('Cookie', `landfall_refresh=${browser.cookie}`);
  };
  const keep = async (reply: PromiseLike<Response>): Promise<Response> => {
    const response = await reply;
    const given = sessionCookieOf(response);
    if (given !== undefined) browser.cookie = COOKIE.exec(given)?.[1] || undefined;
    return response;
  };
  return browser;
}

/** The Set-Cookie line of the session, if the response has one. */
export function sessionCookieOf(response: Response): string | undefined {
  const lines = response.headers['set-cookie'] as unknown as string[] | undefined;
  return lines?.find((line) => COOKIE.test(line));
}
