/**
 * The kinds of a lot: entries whose jobs come to the same are one kind, with one design, one set of sheets and one letter.
 * What a job says of itself (its file, lines, what was written and what was assumed) makes no difference; its name does, as it
 * stands on every sheet.
 */

import type { Job } from '../job/job.ts';
import { slug } from '../job/name.ts';
import { canonicalText } from '../record/hash.ts';
import type { Lot, LotPrinter } from './types.ts';

export interface KindToPlan {
  /** A, B, ... Z, AA, in the order in which the lot first names them. */
  readonly kind: string;
  /** Of its own below `kinds/`. */
  readonly folder: string;
  readonly job: Job;
  readonly serials: readonly string[];
}

/** 0: A, 25: Z, 26: AA. */
export function letterOf(index: number): string {
  const last = String.fromCharCode(65 + (index % 26));
  return index < 26 ? last : letterOf(Math.floor(index / 26) - 1) + last;
}

/** What two jobs of one kind share. */
export function designText({ source: _source, given: _given, assumed: _assumed, ...job }: Job): string {
  return canonicalText(job);
}

export function kindsOf(lot: Lot): KindToPlan[] {
  const found = new Map<string, { job: Job; serials: string[] }>();
  for (const { job, serials } of lot.entries) {
    const inLot = jobInLot(job, lot);
    const text = designText(inLot);
    const kind = found.get(text) ?? { job: inLot, serials: [] };
    found.set(text, kind);
    // One by one: a call with thousands of arguments fails.
    for (const serial of serials) kind.serials.push(serial);
  }
  const taken = new Set<string>();
  return [...found.values()].map(({ job, serials }, index) => {
    const name = slug(job.name);
    let folder = name;
    for (let n = 2; taken.has(folder); n += 1) folder = `${name}-${n}`;
    taken.add(folder);
    return { kind: letterOf(index), folder, job, serials };
  });
}

/** The job as it is made in this lot: on its paper, with its date, on its printers, with or without jigs. */
function jobInLot(job: Job, lot: Lot): Job {
  const largest = largestOf(lot.printers);
  const onLot =
    largest === null
      ? job
      : {
          ...job,
          printer: { ...job.printer, bedXMm: largest.bedXMm, bedYMm: largest.bedYMm, heightMm: largest.heightMm },
          given: {
            ...job.given,
            'printer.bed': `${largest.bedXMm} mm x ${largest.bedYMm} mm`,
            'printer.height': `${largest.heightMm} mm`,
          },
          assumed: without(job.assumed, ['printer.bed', 'printer.height']),
        };
  return {
    ...onLot,
    paper: lot.paper,
    date: lot.date ?? job.date,
    parts: lot.jigs === 'once' ? job.parts : job.former.kind === 'printed' ? ['former'] : [],
  };
}

/** The one that takes the largest former in one piece. */
function largestOf(printers: readonly LotPrinter[]): LotPrinter | null {
  const volume = ({ bedXMm, bedYMm, heightMm }: LotPrinter) => bedXMm * bedYMm * heightMm;
  return printers.reduce<LotPrinter | null>(
    (best, one) => (best === null || volume(one) > volume(best) ? one : best),
    null,
  );
}

function without(record: Readonly<Record<string, unknown>>, keys: readonly string[]): Record<string, unknown> {
  return Object.fromEntries(Object.entries(record).filter(([key]) => !keys.includes(key)));
}
