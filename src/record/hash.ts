/** The hash that names a record: SHA-256 over all of it but `hash`, `files` and `program`, keys sorted. */
import { createHash } from 'node:crypto';
import type { CoilRecord } from './schema.ts';

function canonical(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(canonical);
  if (typeof value !== 'object' || value === null) return value;
  const entries = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(entries.map(([key, inner]) => [key, canonical(inner)]));
}

export function hashOf(record: Omit<CoilRecord, 'hash' | 'files' | 'program'>): string {
  const rest: Record<string, unknown> = { ...record };
  for (const key of ['hash', 'files', 'program']) delete rest[key];
  return createHash('sha256')
    .update(JSON.stringify(canonical(rest)))
    .digest('hex');
}
