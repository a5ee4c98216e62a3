/** Whether a changed job has a coil, and the least change that gives it one: the tools of the refusal. */
import type { Job } from '../job/job.ts';
import { MOST_TAPS } from '../job/schema.ts';
import { type Candidate, candidatesOf } from './candidates.ts';
import { type Design, designOf } from './design.ts';
import { estimateOf, type Size, sizeOf } from './estimate.ts';
import { demandFor, mayFit } from './search.ts';

export type Order = (candidate: Candidate, lengthMm: number) => number;

export const shortest: Order = (_, lengthMm) => lengthMm;

/** Designs that fit a changed job, those first that come first in `order`; `tries` candidates are worked out at most. */
export function* fitsOf(job: Job, order: Order, tries: number): Generator<Design> {
  const demand = demandFor(job);
  if (demand.taps > MOST_TAPS) return;
  const rank = (size: Size) => order(size.candidate, size.formerLengthMm);
  const sized = candidatesOf(job)
    .map((candidate) => sizeOf(job, demand, candidate))
    .filter((size) => size !== null)
    .filter((size) => mayFit(size, job, demand))
    .sort((a, b) => rank(a) - rank(b));
  let tried = 0;
  for (const size of sized) {
    if (tried >= tries) return;
    if (estimateOf(job, demand, size).firstTapTurns <= 0.45) continue;
    tried++;
    const outcome = designOf(job, demand, size.candidate);
    if (outcome.ok) yield outcome.design;
  }
}

/** Candidates worked out to see whether a changed job may fit. */
const TRIES = 6;

/** Whether a changed job has a coil among its shortest; quick, and now and then too strict. */
export function fits(job: Job, tries = TRIES): boolean {
  return !fitsOf(job, shortest, tries).next().done;
}

/** Halvings between the last value that does not fit and the first that does. */
const HALVINGS = 6;

/**
 * The value nearest to `bad` at which `at` fits, on the way to `end`: steps by the factor `step`, then the gap is halved.
 * Null when none of the steps fits. Too great a change may not fit either, so the way is walked and not jumped.
 */
export function nearestFit(bad: number, end: number, step: number, at: (value: number) => boolean): number | null {
  const past = (value: number) => (step > 1 ? value > end : value < end);
  let far = bad;
  for (let value = bad * step; !past(value); value *= step) {
    if (!at(value)) {
      far = value;
      continue;
    }
    let near = value;
    for (let k = 0; k < HALVINGS; k++) {
      const middle = (near + far) / 2;
      if (at(middle)) near = middle;
      else far = middle;
    }
    return near;
  }
  return null;
}

/** The whole number nearest to `bad` that fits, between it and `good`; null when not even `good` does. */
export function nearestCount(bad: number, good: number, at: (count: number) => boolean): number | null {
  if (good === bad || !at(good)) return null;
  let near = good;
  let far = bad;
  while (Math.abs(far - near) > 1) {
    const middle = Math.trunc((near + far) / 2);
    if (at(middle)) near = middle;
    else far = middle;
  }
  return near;
}

/** Three significant digits, rounded away from what does not fit, written without an exponent. */
export function threeDigits(value: number, towards: 'up' | 'down'): number {
  const unit = 10 ** (Math.floor(Math.log10(value)) - 2);
  const count = towards === 'up' ? Math.ceil(value / unit - 1e-9) : Math.floor(value / unit + 1e-9);
  return Number((count * unit).toPrecision(3));
}
