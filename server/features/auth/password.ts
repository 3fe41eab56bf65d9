/**
 * Password hashing with scrypt, N = 2^17, r = 8, p = 1 (OWASP Password Storage Cheat Sheet). One hash takes 128 MB
 * and a good part of a second, so few run at once, and never inside a write transaction.
 */
import { randomBytes, scrypt, timingSafeEqual } from 'node:crypto';

const COST = { N: 2 ** 17, r: 8, p: 1, maxmem: 256 * 1024 * 1024 };
const KEY_BYTES = 32;
const SALT_BYTES = 16;
const AT_ONCE = 2;

/** Text to store: algorithm, cost, salt and key, so that the cost can rise later. */
export async function hashPassword(password: string): Promise<string> {
  const salt = randomBytes(SALT_BYTES);
  const key = await derive(password, salt);
  return ['scrypt', COST.N, COST.r, COST.p, salt.toString('base64'), key.toString('base64')].join('$');
}

/** Takes as long for an absent hash as for a wrong password, so that time does not tell which accounts exist. */
export async function matchesPassword(password: string, stored: string | null): Promise<boolean> {
  const [algorithm, n, r, p, salt, key] = stored?.split('$') ?? [];
  const isKnown =
    algorithm === 'scrypt' && Number(n) === COST.N && Number(r) === COST.r && Number(p) === COST.p;
  if (!isKnown || salt === undefined || key === undefined) {
    await derive(password, randomBytes(SALT_BYTES));
    return false;
  }
  const expected = Buffer.from(key, 'base64');
  const actual = await derive(password, Buffer.from(salt, 'base64'));
  return expected.length === actual.length && timingSafeEqual(expected, actual);
}

let running = 0;
const waiting: (() => void)[] = [];

async function derive(password: string, salt: Buffer): Promise<Buffer> {
  if (running >= AT_ONCE) await new Promise<void>((resolve) => waiting.push(resolve));
  else running += 1;
  try {
    return await new Promise((resolve, reject) => {
      // Two ways to type the same letter must be one password.
      scrypt(password.normalize('NFKC'), salt, KEY_BYTES, COST, (error, key) =>
        error ? reject(error) : resolve(key),
      );
    });
  } finally {
    const next = waiting.shift();
    if (next) next();
    else running -= 1;
  }
}
