/** The short-lived token that proves a sign-in to the API. It carries ids only: roles are read on each request. */
import { createSecretKey } from 'node:crypto';
import { sign } from 'jsonwebtoken';
import { ExtractJwt, Strategy, type VerifiedCallback } from 'passport-jwt';
import { z } from 'zod';
import type { Clock } from '@/server/clock';

export const ACCESS_TOKEN_LIFE_S = 10 * 60;
const ISSUER = 'landfall';
const AUDIENCE = 'landfall-api';
const ALGORITHM = 'HS256';

/** Who the token speaks for, and the sign-in that it came from. */
export interface TokenSubject {
  accountId: string;
  familyId: string;
}

export interface TokenKey {
  secret: string;
  clock: Clock;
}

const payloadSchema = z.object({ sub: z.string(), sid: z.string(), exp: z.number() });

export function signAccessToken({ secret, clock }: TokenKey, { accountId, familyId }: TokenSubject): string {
  const issuedAtS = Math.floor(clock.now().getTime() / 1000);
  const payload = { sub: accountId, sid: familyId, iat: issuedAtS, exp: issuedAtS + ACCESS_TOKEN_LIFE_S };
  return sign(payload, secret, { algorithm: ALGORITHM, issuer: ISSUER, audience: AUDIENCE });
}

/**
 * Made once: given text, the library first tries on every request whether it is a public key, which takes longer than
 * all the rest of the check. The types of the strategy do not know that a key may be one already.
 */
const keyOf = (secret: string): Buffer => createSecretKey(secret, 'utf8') as unknown as Buffer;

export function accessTokenStrategy(
  { secret, clock }: TokenKey,
  findActor: (subject: TokenSubject) => Promise<Express.User | undefined>,
): Strategy {
  const options = {
    jwtFromRequest: ExtractJwt.fromAuthHeaderAsBearerToken(),
    secretOrKey: keyOf(secret),
    algorithms: [ALGORITHM] as ['HS256'],
    issuer: ISSUER,
    audience: AUDIENCE,
    // The library knows only the machine's time; the end is checked below against our clock.
    ignoreExpiration: true,
  };
  return new Strategy(options, (payload: unknown, done: VerifiedCallback) => {
    const parsed = payloadSchema.safeParse(payload);
    if (!parsed.success || parsed.data.exp * 1000 <= clock.now().getTime()) return done(null, false);
    const { sub, sid } = parsed.data;
    findActor({ accountId: sub, familyId: sid }).then(
      (actor) => done(null, actor ?? false),
      (error: unknown) => done(error, false),
    );
  });
}
