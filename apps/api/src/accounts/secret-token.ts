import { createHash, randomBytes } from 'node:crypto';

/** A secret for a link or a cookie: 256 random bits. Only its hash is kept, so a stolen table opens nothing. */
export function newSecret(): { token: string; hash: Buffer } {
  const token = randomBytes(32).toString('base64url');
  return { token, hash: secretHash(token) };
}

/** A fast hash is enough: what is hashed can't be guessed. */
export const secretHash = (token: string): Buffer => createHash('sha256').update(token).digest();
