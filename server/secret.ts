/** The secret that signs access tokens: made once, kept in the data folder, readable by the owner only. */
import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

const SECRET_BYTES = 48;

export function loadTokenSecret(dataFolder: string): string {
  const path = join(dataFolder, 'token-secret');
  if (existsSync(path)) {
    const secret = readFileSync(path, 'utf8');
    if (secret.length < SECRET_BYTES) throw new Error(`${path} is damaged; remove it to have a new one made`);
    return secret;
  }
  mkdirSync(dataFolder, { recursive: true });
  const secret = randomBytes(SECRET_BYTES).toString('base64url');
  writeFileSync(path, secret, { mode: 0o600, flag: 'wx' });
  return secret;
}
