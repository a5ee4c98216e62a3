/** The hash that names a record of any verb: SHA-256 over all of it but `hash`, `files` and `program`, keys sorted. */
import { createHash } from 'node:crypto';

function canonical(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(canonical);
  if (typeof value !== 'object' || value === null) return value;
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(entries.map(([key, inner]) => [key, canonical(inner)]));
}

/** One text for the same data, in whatever order its keys were written. */
export const canonicalText = (value: unknown): string => JSON.stringify(canonical(value));

export const sha256 = (bytes: Uint8Array | string): string => createHash('sha256').update(bytes).digest('hex');

export function hashOf(record: object): string {
  const rest: Record<string, unknown> = { ...record };
  for (const key of ['hash', 'files', 'program']) delete rest[key];
  return sha256(canonicalText(rest));
}
