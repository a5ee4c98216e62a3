/** A damaged or made-up file of a seed, read as the command line reads it. */
import { mutate, pick } from '../fuzz/mutate.ts';
import { type Read, readOne } from '../fuzz/read.ts';
import { generated, KINDS, type Kind, SOURCES } from '../fuzz/sources.ts';
import { chance } from './jobs.ts';

/** Names as a file may bear, which messages and names are made of. */
const FILES = [
  'file.yaml',
  'file.yaml',
  'file.yaml',
  '-',
  '../../up.yaml',
  'con.yaml',
  '__proto__',
  'a\u0007b\u202ec\n.yaml',
  '.yaml',
  ' .yaml',
  `${'long'.repeat(60)}.yaml`,
  `a${'😀'.repeat(40)}.yaml`,
  '\ud83d.yaml',
  'C:\\x\\job.yaml',
];

export interface FuzzInput {
  readonly kind: Kind;
  readonly file: string;
  readonly bytes: Uint8Array;
  readonly by: readonly string[];
}

/** The same for the same seed. Every fourth file is made up from its schema, and half of these damaged besides. */
export function fuzzInput(seed: number): FuzzInput {
  const random = chance(seed);
  const kind = KINDS[seed % KINDS.length]!;
  const named = pick(random, FILES);
  const file = kind === 'orders' && named !== '-' ? named.replace(/\.yaml$/, '.csv') : named;
  const made = random() < 0.25;
  const source = made ? generated(kind, seed) : pick(random, SOURCES[kind]);
  // Without its notes there is more to hit in the same number of places.
  const bare = random() < 0.6 ? source.replace(/^\s*#.*\n/gm, '') : source;
  if (made && random() < 0.5) return { kind, file, bytes: Buffer.from(bare), by: ['made'] };
  const { bytes, by } = mutate(bare, pick(random, SOURCES[pick(random, KINDS)]), random);
  return { kind, file, bytes, by: made ? ['made', ...by] : by };
}

export interface FuzzOutcome extends Read {
  readonly seed: number;
  readonly kind: Kind;
  readonly by: readonly string[];
  /** Greatest size of the process so far. */
  readonly mb: number;
}

/** Greatest size of a process that reads, in MB. */
export const MOST_MB = 600;
/** Of the files that are read, one in so many goes on to its record. */
export const ONWARDS: Readonly<Record<Kind, number>> = { job: 8, coil: 4, old: 8, lot: 1, orders: 1, readings: 1 };

/** `mostMb` is for a process that does nothing else. */
export async function fuzzOutcome(seed: number, mostMb = MOST_MB): Promise<FuzzOutcome> {
  const { kind, file, bytes, by } = fuzzInput(seed);
  const onwards = Math.floor(seed / KINDS.length) % ONWARDS[kind] === 0;
  const read = await readOne(kind, bytes, file, onwards);
  const mb = Math.round(process.resourceUsage().maxRSS / 1024);
  const whole: FuzzOutcome = { seed, kind, by, mb, ...read };
  return mb > mostMb && read.result !== 'failed' ? { ...whole, result: 'failed', said: [`${mb} MB`] } : whole;
}
