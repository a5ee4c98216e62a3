/**
 * The kinds of a lot: entries whose jobs come to the same are one kind, with one design, one set of sheets and one letter.
 * What a job says of itself (its file, lines, what was written and what was assumed) makes no difference; its name does, as it
 * stands on every sheet.
 */

import type { Job } from '../job/job.ts';
import { slug } from '../job/name.ts';
import { canonicalText } from '../record/hash.ts';
import { ownPartsOf } from '../record/printed.ts';
import type { Lot } from './types.ts';

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

/** The job as it is made in this lot: on its paper, with or without jigs. */
function jobInLot(job: Job, { paper, jigs }: Lot): Job {
  return { ...job, paper, parts: jigs === 'once' ? job.parts : ownPartsOf(job) };
}
