/** Finds the person behind a request: a valid access token of a sign-in that stands, of an account that is active. */
import type { Request, Response } from 'express';
import passport from 'passport';
import type { Actor } from '@/server/act';
import type { Deps } from '@/server/deps';
import { findActiveActor } from '@/server/features/auth/session.service';
import { accessTokenStrategy } from '@/server/http/access-token';
import { ProblemError } from '@/server/http/problem';

export type Authenticate = (request: Request, response: Response) => Promise<Actor>;

export function createAuthenticate(deps: Deps): Authenticate {
  const authenticator = new passport.Passport();
  const key = { secret: deps.tokenSecret, clock: deps.clock };
  authenticator.use(accessTokenStrategy(key, (subject) => findActiveActor(deps, subject)));

  return (request, response) =>
    new Promise((resolve, reject) => {
      const finish = (error: unknown, actor: Actor | false): void => {
        if (error) reject(error);
        else if (actor) resolve(actor);
        else reject(new ProblemError('unauthenticated'));
      };
      const check = authenticator.authenticate('jwt', { session: false }, finish) as (
        request: Request,
        response: Response,
        next: (error: unknown) => void,
      ) => void;
      check(request, response, reject);
    });
}
