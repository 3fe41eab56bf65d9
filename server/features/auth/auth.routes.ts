import {
  passwordFromLinkSchema,
  passwordLinkSchema,
  paths,
  resetRequestSchema,
  sessionSchema,
  sessionUserSchema,
  signInSchema,
} from '@/shared/contract';
import { z } from 'zod';
import type { Deps } from '@/server/deps';
import { findById, toSessionUser } from '@/server/features/accounts/account.service';
import { requireOwnPage } from '@/server/http/own-page';
import { ProblemError } from '@/server/http/problem';
import { json, noContent } from '@/server/http/reply';
import { defineRoute, type Route } from '@/server/http/route';
import { clearSessionCookie, readSessionCookie, setSessionCookie } from '@/server/http/session-cookie';
import { describeLink, requestReset, setPasswordByLink } from './password-link.service';
import { refresh, signIn, signOut } from './sign-in.service';

export function authRoutes(deps: Deps): Route[] {
  return [...sessionRoutes(deps), ...passwordRoutes(deps)];
}

function sessionRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'post',
      path: paths.signIn(),
      access: 'public',
      summary: 'Sign in; the refresh token comes as a cookie',
      body: signInSchema,
      reply: sessionSchema,
      handle: async ({ body, clientIp, requestId, request, response }) => {
        const { session, refreshToken } = await signIn(deps, { ...body, clientIp, requestId });
        setSessionCookie(request, response, refreshToken);
        return json(session);
      },
    }),
    defineRoute({
      method: 'post',
      path: paths.refresh(),
      access: 'public',
      summary: 'New access token by the cookie; needs Origin and X-Landfall: 1',
      reply: sessionSchema,
      // A refusal leaves the cookie alone: another tab may have put a newer one there.
      handle: async ({ requestId, request, response }) => {
        requireOwnPage(request, deps.config);
        const presented = readSessionCookie(request);
        if (presented === undefined) throw new ProblemError('unauthenticated');
        const { session, refreshToken } = await refresh(deps, { presented, requestId });
        setSessionCookie(request, response, refreshToken);
        return json(session);
      },
    }),
    defineRoute({
      method: 'post',
      path: paths.signOut(),
      access: 'public',
      summary: 'End the sign-in of the cookie; needs Origin and X-Landfall: 1',
      handle: async ({ requestId, request, response }) => {
        requireOwnPage(request, deps.config);
        const presented = readSessionCookie(request);
        if (presented !== undefined) await signOut(deps, { presented, requestId });
        clearSessionCookie(request, response);
        return noContent();
      },
    }),
    defineRoute({
      method: 'get',
      path: paths.me(),
      access: 'signed-in',
      summary: 'The signed-in person',
      reply: sessionUserSchema,
      handle: async ({ actor }) => {
        const account = await findById(actor.id);
        if (!account) throw new ProblemError('unauthenticated');
        return json(toSessionUser(account));
      },
    }),
  ];
}

const linkParams = z.object({ token: z.string().max(100) });

function passwordRoutes(deps: Deps): Route[] {
  return [
    defineRoute({
      method: 'post',
      path: paths.passwordReset(),
      access: 'public',
      summary: 'Ask for a link to set a new password; the answer is the same for any address',
      body: resetRequestSchema,
      handle: ({ body, clientIp, requestId }) => {
        deps.throttle.attempt(`reset ${body.email} ${clientIp}`);
        requestReset(deps, { email: body.email, requestId });
        return noContent();
      },
    }),
    defineRoute({
      method: 'get',
      path: paths.passwordLink(':token'),
      access: 'public',
      summary: 'Whose link this is',
      params: linkParams,
      reply: passwordLinkSchema,
      handle: async ({ params }) => json(await describeLink(deps, params.token)),
    }),
    defineRoute({
      method: 'post',
      path: paths.passwordLink(':token'),
      access: 'public',
      summary: 'Set the password by a link',
      params: linkParams,
      body: passwordFromLinkSchema,
      handle: async ({ params, body, requestId }) => {
        await setPasswordByLink(deps, { token: params.token, password: body.password, requestId });
        return noContent();
      },
    }),
  ];
}
