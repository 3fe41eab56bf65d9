/** The cookie of the refresh token: unreadable for scripts, sent to the sign-in paths of this site only. */
import type { CookieOptions, Request, Response } from 'express';

const NAME = 'landfall_refresh';

export function readSessionCookie(request: Request): string | undefined {
  const value: unknown = request.cookies?.[NAME];
  return typeof value === 'string' && value !== '' ? value : undefined;
}

export function setSessionCookie(request: Request, response: Response, refreshToken: string): void {
  response.cookie(NAME, refreshToken, options(request));
}

export function clearSessionCookie(request: Request, response: Response): void {
  response.clearCookie(NAME, options(request));
}

/** Without a date it ends with the browser. Over plain http (this machine only) a secure cookie would be lost. */
function options(request: Request): CookieOptions {
  return { httpOnly: true, secure: request.secure, sameSite: 'strict', path: '/api/auth' };
}
