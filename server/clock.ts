/** Time and chance as dependencies, so that tests can hold them. */
import { randomBytes, randomUUID } from 'node:crypto';

export interface Clock {
  now(): Date;
}

export interface Random {
  uuid(): string;
  /** Unguessable text for links and tokens: 256 bits, safe in addresses. */
  token(): string;
}

export const systemClock: Clock = { now: () => new Date() };

export const systemRandom: Random = {
  uuid: () => randomUUID(),
  token: () => randomBytes(32).toString('base64url'),
};
