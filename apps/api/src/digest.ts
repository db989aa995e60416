import { createHash } from 'node:crypto';

/** SHA-256 of a plain value. Equal values give equal digests, whatever order their keys were written in. */
export function digestOf(value: unknown): Buffer {
  return createHash('sha256')
    .update(JSON.stringify(sorted(value)))
    .digest();
}

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted);
  if (value === null || typeof value !== 'object') return value;
  const entries = Object.entries(value).map(([key, each]: [string, unknown]): [string, unknown] => [
    key,
    sorted(each),
  ]);
  return Object.fromEntries(entries.sort(([a], [b]) => (a < b ? -1 : 1)));
}
