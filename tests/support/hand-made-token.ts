import { createHmac } from 'node:crypto';

const part = (value: object): string => Buffer.from(JSON.stringify(value)).toString('base64url');

/** A compact JWS put together without the library under test; `none` is left unsigned, HS512 is signed as such. */
export function handMadeToken(header: { alg: string; typ: string }, claims: object, key: string): string {
  const signed = `${part(header)}.${part(claims)}`;
  if (header.alg === 'none') return `${signed}.`;
  const digest = header.alg === 'HS512' ? 'sha512' : 'sha256';
  return `${signed}.${createHmac(digest, key).update(signed).digest('base64url')}`;
}
