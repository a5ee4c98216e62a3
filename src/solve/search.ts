/**
 * The search: every candidate is estimated, those near the best are designed in full, the best design wins.
 *
 * The estimate errs by a few tenths of a percent in turns and by a few percent in loss (only three positions are looked
 * at), so pruning keeps a margin: designs go on, in the order of the estimate, until the estimate is worse than the best
 * design by more than MARGIN, or DESIGNS are done. On small spaces this finds what designing every candidate finds.
 */
import type { Job } from '../job/job.ts';
import { MOST_TAPS } from '../job/schema.ts';
import { selfCapacitance } from '../physics/medhurst.ts';
import { type Candidate, candidatesOf, diametersFor } from './candidates.ts';
import { type Demand, demandOf, fixedTurnsOf } from './demand.ts';
import { type Breach, type Design, designOf, variantsOf } from './design.ts';
import { type Estimate, estimateOf, roughSection, roughTargets, type Size, sizeOf } from './estimate.ts';
import { ALL_ASPECTS, ASPECTS, type Aspect, aspectOf } from './prefer.ts';
import { FAMILIES, type Ranked, rankedByField, refine } from './refine.ts';
import type { SecondDesign } from './second.ts';
import { coverageEstimate } from './working.ts';

/** How much worse than the best design an estimate may be and still be worked out. */
const MARGIN = 0.08;
const DESIGNS = 48;
/** So many are worked out when none of them fits. */
const IN_VAIN = 4 * DESIGNS;
/** How near the taps fall is a matter of luck that no estimate knows: there as many again are worked out, near or not. */
const DESIGNS_FOR_TAPS = 2 * DESIGNS;
/** Designs looked at for each aspect in which another coil may be better ... */
const OTHERS = 3;
/** ... unless they lose more than so many times what the chosen one loses. */
const TOO_LOSSY = 2.5;
/** With fewer other designs than this, other ways to tap the chosen coil are worked out too. */
const FEW = 12;
/** Designs of a band that are worked out by the coupled circuit before it is given up. */
const REFINED = 6;

export interface Found {
  readonly demand: Demand;
  readonly chosen: Design;
  /** Every other design that was worked out and fits. */
  readonly others: readonly Design[];
  /** Candidates looked at, and those of them that fit as far as the estimate tells. */
  readonly tried: number;
  readonly feasible: number;
  /** The nearest to the least loss, ranked by the field of every turn; empty when something else is preferred. */
  readonly ranked: readonly Ranked[];
  /** The second winding on the chosen coil, where the job has one and it has been placed. */
  readonly second?: SecondDesign;
}

export interface NotFound {
  readonly demand: Demand;
  readonly tried: number;
  /** The limits broken by each that was worked out. */
  readonly breaches: readonly (readonly Breach[])[];
}

/** Self-capacitance in pF of a coil as long as it is wide, on the widest former of the job. */
function largestSelfPf(job: Job): number {
  const widest = Math.max(...diametersFor(job), 10);
  return selfCapacitance(widest / 1e3, widest / 1e3) * 1e12;
}

/** The demand, with the narrowest positions that any coil of the job may have. */
export function demandFor(job: Job): Demand {
  return demandOf(job, largestSelfPf(job));
}

/** Longest former that the job allows, mm; one that cannot be printed in sections no taller than the printer either. */
export function longestMm({ former, printer }: Job): number {
  const whole = former.kind === 'printed' && former.body === 'ribbed';
  return whole ? Math.min(former.longestMm, printer.heightMm) : former.longestMm;
}

/** As far as the estimate tells; a margin of 3 % and 2 mm keeps what the design may still bring in. */
export function mayFit(size: Size, job: Job, demand: Demand): boolean {
  const fixed = fixedTurnsOf(demand);
  if (fixed !== null && Math.abs(size.turns / fixed - 1) > FIXED_OFF) return false;
  return size.formerLengthMm <= longestMm(job) * 1.03 + 2 && size.turns >= demand.taps * 0.5;
}

/** Turns by the estimate may differ by this much from those that two switches fix; the design then looks more closely. */
const FIXED_OFF = 0.03;

/** Estimates of all candidates that may fit the job's length. */
export function hopefulOf(job: Job, demand: Demand, candidates: readonly Candidate[]): Estimate[] {
  const list: Estimate[] = [];
  for (const candidate of candidates) {
    const size = sizeOf(job, demand, candidate);
    if (size === null || !mayFit(size, job, demand)) continue;
    const one = estimateOf(job, demand, size);
    if (one.firstTapTurns > 0.45) list.push(one);
  }
  return list;
}

/**
 * The coil for a job. Self-capacitance narrows the positions of a band a little, and only the coil tells how much: where
 * it decides whether one position fewer is enough, that is tried first.
 */
export function search(job: Job): Found | NotFound {
  const candidates = candidatesOf(job);
  let notFound: NotFound | null = null;
  for (const demand of demandsFor(job, candidates)) {
    const found = searchFor(job, demand, candidates);
    if ('chosen' in found) return found;
    notFound = found;
  }
  if (notFound !== null) return notFound;
  const demand = demandFor(job);
  return { demand, tried: 0, breaches: [[tooManyPositions(demand)]] };
}

/** Whether the search would find a coil; as the search, but it stops at the first. */
export function hasCoil(job: Job): boolean {
  const candidates = candidatesOf(job);
  const aspect = aspectOf(job.prefer);
  return demandsFor(job, candidates).some((demand) =>
    inOrder(hopefulOf(job, demand, candidates), aspect)
      .slice(0, IN_VAIN)
      .some(({ one }) => {
        const outcome = designOf(job, demand, one.candidate);
        return outcome.ok && refine(job, demand, outcome.design).ok;
      }),
  );
}

/**
 * The demands to try, the fewest switch positions first; none when a switch has not as many as the last would need. How
 * many a band needs depends on the coil: dead turns narrow the lower positions. The estimate finds the first number that
 * some coil manages, and that one and the next are worked out.
 */
function demandsFor(job: Job, candidates: readonly Candidate[]): Demand[] {
  const { want } = job;
  if (want.kind !== 'band' || want.taps !== null || job.set === null) return [demandFor(job)];
  const least = demandOf(job, 0).taps;
  if (least > MOST_TAPS) return [];
  const demandWith = (taps: number) => demandOf({ ...job, want: { ...want, taps } }, 0);
  const sizes = sampleOf(candidates, SAMPLE)
    .map((candidate) => sizeOf(job, demandWith(least), candidate))
    .filter((size) => size !== null && mayFit(size, job, demandWith(least))) as Size[];
  for (let taps = least; taps <= Math.min(MOST_TAPS, least + MOST_MORE); taps++) {
    const demand = demandWith(taps);
    if (sizes.some((size) => coversRoughly(job, demand, size)))
      return [demand, ...(taps < MOST_TAPS ? [demandWith(taps + 1)] : [])];
  }
  return [demandWith(least)];
}

/** Candidates looked at to tell how many positions a band needs, and how many more than the fewest are tried. */
const SAMPLE = 400;
const MOST_MORE = 12;
/** The estimate may be this far out in an overlap. */
const ROUGH_OVERLAP = 0.01;

function sampleOf<T>(list: readonly T[], count: number): T[] {
  const step = Math.max(1, list.length / count);
  return Array.from({ length: Math.min(count, list.length) }, (_, i) => list[Math.floor(i * step)]!);
}

/** Whether positions at their targets overlap as asked, as far as the estimate tells. */
function coversRoughly(job: Job, demand: Demand, size: Size): boolean {
  const targets = roughTargets(job, demand, size);
  const spans = targets.map((uh) => coverageEstimate(job, roughSection(job, size, uh, demand.taps))!);
  const rising = targets.every((uh, i) => i === 0 || uh > targets[i - 1]!);
  return (
    rising &&
    spans.every(
      (span, i) => i === 0 || span.highKhz / spans[i - 1]!.lowKhz - 1 >= (demand.overlap ?? 0) - ROUGH_OVERLAP,
    )
  );
}

/** For a band that no switch can cover in positions as narrow as the set's capacitor makes them. */
function tooManyPositions(demand: Demand): Breach {
  const text = Number.isFinite(demand.taps)
    ? `the capacitor of the set spans so little that ${demand.taps} switch positions would be needed, ${MOST_TAPS} are the most`
    : 'the capacitor of the set spans less than the overlap takes up: no number of switch positions fills the band';
  return { limit: 'want.overlap', got: demand.taps, allowed: MOST_TAPS, text };
}

function searchFor(job: Job, demand: Demand, candidates: readonly Candidate[]): Found | NotFound {
  const hopeful = hopefulOf(job, demand, candidates);
  const aspect = aspectOf(job.prefer);
  const outcomes = new Map<Candidate, Design | null>();
  const breaches: (readonly Breach[])[] = [];
  const work = (candidate: Candidate): Design | null => {
    const known = outcomes.get(candidate);
    if (known !== undefined) return known;
    const outcome = designOf(job, demand, candidate);
    if (!outcome.ok) breaches.push(outcome.breaches);
    const design = outcome.ok ? outcome.design : null;
    outcomes.set(candidate, design);
    return design;
  };
  const chosen = bestOf(hopeful, aspect, work);
  if (chosen === null) return { demand, tried: candidates.length, breaches };
  const loss = chosen.metrics.lossFactor;
  const narrow = hopeful.length < 4 * DESIGNS;
  const sensible = narrow ? hopeful : hopeful.filter((one) => one.lossFactor <= TOO_LOSSY * loss);
  for (const other of ALL_ASPECTS) {
    const count = other === ASPECTS.loss ? FAMILIES : OTHERS;
    for (const one of bestByWire(sensible, other, count)) work(one.candidate);
  }
  const designs = [...outcomes.values()].filter((design) => design !== null);
  const ranked = aspect === ASPECTS.loss ? rankedByField(job, designs) : [];
  const inTurn = [...ranked.map(({ design }) => design), ...designs.sort((a, b) => (isBetter(a, b, aspect) ? -1 : 1))];
  for (const design of [...new Set(inTurn)].slice(0, REFINED)) {
    const refined = refine(job, demand, design);
    if (!refined.ok) {
      breaches.push(refined.breaches);
      continue;
    }
    const others = designs.filter((one) => one !== design);
    if (others.length < FEW) others.push(...variantsOf(job, demand, design));
    const counts = { tried: candidates.length, feasible: hopeful.length };
    return { demand, chosen: refined.design, others, ranked, ...counts };
  }
  return { demand, tried: candidates.length, breaches };
}

/** Better in the aspect; equal within 1e-9 the one with less loss. */
function isBetter(a: Design, b: Design, aspect: Aspect): boolean {
  const [x, y] = [aspect.of(a.metrics), aspect.of(b.metrics)];
  if (Math.abs(x - y) > 1e-9 * Math.abs(y)) return x < y;
  return a.metrics.lossFactor < b.metrics.lossFactor;
}

/** The `count` best in an aspect, no two of the same wire and kind of pitch. */
function bestByWire(list: readonly Estimate[], aspect: Aspect, count: number): Estimate[] {
  const best = new Map<string, { one: Estimate; value: number }>();
  for (const one of list) {
    const name = one.candidate.family;
    const value = aspect.guess(one);
    const known = best.get(name);
    if (known === undefined || value < known.value) best.set(name, { one, value });
  }
  const sorted = [...best.values()].sort((a, b) => a.value - b.value);
  return sorted.slice(0, count).map(({ one }) => one);
}

const inOrder = (hopeful: readonly Estimate[], aspect: Aspect) =>
  hopeful
    .map((one) => ({ one, guess: aspect.guess(one) }))
    .sort((a, b) => a.guess - b.guess || a.one.lossFactor - b.one.lossFactor);

function bestOf(
  hopeful: readonly Estimate[],
  aspect: Aspect,
  work: (candidate: Candidate) => Design | null,
): Design | null {
  let best: Design | null = null;
  let bestGuess = 0;
  let done = 0;
  const byLuck = aspect === ASPECTS.worstTap;
  const [margin, most] = byLuck ? [Number.POSITIVE_INFINITY, DESIGNS_FOR_TAPS] : [MARGIN, DESIGNS];
  for (const { one, guess } of inOrder(hopeful, aspect)) {
    if (best !== null && (guess > bestGuess * (1 + margin) || done >= most)) break;
    const design = work(one.candidate);
    done++;
    if (design !== null && (best === null || isBetter(design, best, aspect))) {
      best = design;
      bestGuess = guess;
    }
    // A space in which nothing fits is left to the refusal, which looks for the nearest change.
    if (best === null && done >= IN_VAIN) break;
  }
  return best;
}
