/**
 * The replacement, two ways. As it worked: every tap has the old inductance where it works, whatever wire and diameter are on hand.
 * As it was: every tap lies where it lay, at the old pitch, with what inductance that gives. Both are found by the search of `plan`;
 * what the first round leaves over (crowding of another wire, gaps of the new taps) goes into the targets of the next.
 */
import type { WorkingCoil } from '../coil/working-coil.ts';
import { Fault } from '../fault.ts';
import type { Job } from '../job/job.ts';
import { lengthText } from '../quantity/format.ts';
import { candidatesOf, wiresFor } from '../solve/candidates.ts';
import type { Design } from '../solve/design.ts';
import { workingCoilOf } from '../solve/refine.ts';
import { refusal } from '../solve/refusal.ts';
import { type Found, search } from '../solve/search.ts';
import type { Wire } from '../stock/wire.ts';
import { coilOf, type OldAtWork } from './old-at-work.ts';
import type { InferredCoil } from './types.ts';

export type Way = 'as it worked' | 'as it was';

export interface TapAgainst {
  readonly turn: number;
  /** From the middle of the wire at the start. */
  readonly positionMm: number;
  /** At low frequency, new over old, a fraction above or below 1. */
  readonly low: number;
  /** The same at the frequency at which the old one worked, the rest as the switch leaves it. */
  readonly working: number;
  /** Working over low-frequency inductance. */
  readonly crowded: number;
  readonly workingUh: number;
  readonly q: number;
}

export interface Replacement {
  readonly way: Way;
  readonly job: Job;
  readonly found: Found;
  /** One a tap, the whole coil last. */
  readonly taps: readonly TapAgainst[];
  /** Greatest deviation at work, a fraction without sign, and at which tap (from 0). */
  readonly worst: { readonly tap: number; readonly working: number };
  /** Farthest that a tap lies from where it lay, mm. */
  readonly farthestMm: number;
}

export type Tried = { readonly ok: true; readonly of: Replacement } | { readonly ok: false; readonly why: Fault };

/** Targets are mended so often; the first round is off by what the wires differ in crowding. */
const ROUNDS = 3;
/** Targets that move by less find the same coil. */
const NEAR = 2e-4;

/** Inductance up to where the wire of a design passes this distance from the start; beyond the finish it runs on with its slope. */
function inductanceAtMm({ coil }: Design, mm: number): number {
  const from = coil.positionMm(0);
  const reach = coil.positionMm(coil.turns) - from;
  if (mm >= reach) {
    const whole = coil.inductanceUh(coil.turns);
    const slope = (whole - coil.inductanceUh(coil.turns - 1)) / coil.shape.pitchMm;
    return whole + slope * (mm - reach);
  }
  let [low, high] = [0, coil.turns];
  for (let k = 0; k < 50; k++) {
    const middle = (low + high) / 2;
    if (coil.positionMm(middle) - from < mm) low = middle;
    else high = middle;
  }
  return coil.inductanceUh((low + high) / 2);
}

/** Farthest that a tap lies from where the old one lay, mm. */
function farthest({ coil, taps }: Design, places: readonly number[]): number {
  const from = coil.positionMm(0);
  return Math.max(...taps.map(({ turn }, i) => Math.abs(coil.positionMm(turn) - from - places[i]!)));
}

/** Of the diameters there are, the one nearest to the old. */
function nearestTo({ former }: Job, mm: number): Job['former']['diametersMm'] {
  const of = former.diametersMm;
  if ('listMm' in of) return { listMm: [...of.listMm].sort((a, b) => Math.abs(a - mm) - Math.abs(b - mm)).slice(0, 1) };
  return former.kind === 'tube' ? of : { listMm: [Math.min(of.highMm, Math.max(of.lowMm, mm))] };
}

/** Figures of every tap; `like` are those of a coil so much alike that its current crowds as this one's does. */
function against(
  design: Design,
  working: WorkingCoil,
  inferred: InferredCoil,
  old: OldAtWork,
  like: readonly TapAgainst[] | null,
): TapAgainst[] {
  const { coil, taps } = design;
  const first = coil.positionMm(0);
  return taps.map(({ turn, inductanceUh }, i) => {
    const was = old.positions[i]!.working;
    const known = like?.[i];
    const at = known === undefined ? working.terminal(turn, was.kHz, old.conditions.rest) : null;
    const crowded = at === null ? known!.crowded : at.inductanceUh / inductanceUh;
    const workingUh = crowded * inductanceUh;
    return {
      turn,
      positionMm: coil.positionMm(turn) - first,
      low: inductanceUh / inferred.taps[i]!.inductanceUh.value - 1,
      working: workingUh / was.inductanceUh - 1,
      crowded,
      workingUh,
      q: at?.q ?? known!.q,
    };
  });
}

function replacementOf(
  way: Way,
  job: Job,
  found: Found,
  inferred: InferredCoil,
  old: OldAtWork,
  like: readonly TapAgainst[] | null = null,
): Replacement {
  const working = found.chosen.working ?? workingCoilOf(job, found.chosen);
  const taps = against(found.chosen, working, inferred, old, like);
  const off = taps.map((tap) => Math.abs(tap.working));
  const tap = off.indexOf(Math.max(...off));
  return {
    way,
    job,
    found: { ...found, chosen: { ...found.chosen, working } },
    taps,
    worst: { tap, working: off[tap]! },
    farthestMm: farthest(
      found.chosen,
      inferred.taps.map(({ positionMm }) => positionMm.value),
    ),
  };
}

/** Targets are told in the record: five digits are more than any of them is known to. */
const wishing = (job: Job, targets: readonly number[]): Job => ({
  ...job,
  want: { kind: 'list', inductancesUh: targets.map((uh) => Number(uh.toPrecision(5))) },
});
const rising = (list: readonly number[]): boolean => list.every((one, i) => i === 0 || one > list[i - 1]!);

/** The job narrowed to what a search has chosen, so that another round is quick. */
function narrowed(job: Job, { candidate, former }: Design): Job {
  const wide = 'lowMm' in job.former.diametersMm && job.former.kind === 'printed';
  return {
    ...job,
    wires: [candidate.wire],
    former: { ...job.former, diametersMm: wide ? job.former.diametersMm : { listMm: [former.outsideDiameterMm] } },
  };
}

/** What is thought of a coil that was found: how far off it is, and what to ask for next. */
interface Judged {
  readonly off: number;
  readonly next: readonly number[];
}

type Rounds = { readonly job: Job; readonly found: Found } | { readonly why: Fault };

/** Rounds of a search whose targets follow what the round before was off by; the best of them. */
function mended(job: Job, start: readonly number[], judge: (found: Found, job: Job) => Judged): Rounds {
  let targets = start;
  let best: { job: Job; found: Found; off: number } | null = null;
  let asked = job;
  for (let round = 0; round < ROUNDS; round++) {
    const wish = wishing(asked, targets);
    const found = search(wish);
    if (!('chosen' in found)) {
      if (best !== null) break;
      return { why: refusal(wish, found) };
    }
    const { off, next } = judge(found, wish);
    if (best !== null && off > best.off - NEAR) break;
    best = { job: wish, found, off };
    asked = narrowed(job, found.chosen);
    const settled = next.every((uh, i) => Math.abs(uh / targets[i]! - 1) < NEAR);
    targets = next;
    if (settled || !rising(targets)) break;
  }
  return best!;
}

/** As it worked: the old inductances at work. */
export function asItWorked(job: Job, inferred: InferredCoil, old: OldAtWork): Tried {
  const start = inferred.taps.map(({ inductanceUh }) => inductanceUh.value);
  let first: Replacement | null = null;
  // What a tap is off because it must stand at a hole is not to be mended, only what the low-frequency targets miss.
  const judge = (found: Found, wish: Job): Judged => {
    const one = replacementOf('as it worked', wish, found, inferred, old, first?.taps);
    first ??= one;
    const next = start.map((uh, i) => (uh * (1 + one.taps[i]!.low)) / (1 + one.taps[i]!.working));
    return { off: one.worst.working, next };
  };
  const found = mended(job, start, judge);
  if ('why' in found) return { ok: false, why: found.why };
  return { ok: true, of: replacementOf('as it worked', found.job, found.found, inferred, old) };
}

/** As it was: the old places at the old pitch, with a wire that goes in. */
export function asItWas(job: Job, inferred: InferredCoil, old: OldAtWork): Tried {
  if (inferred.pitchMm.length > 1)
    return no(
      'sections',
      `a winding in ${inferred.pitchMm.length} sections`,
      'one even winding, which is all that a new former is made for',
      'take replacement: as it worked',
    );
  const was = coilOf(inferred);
  const pitchMm = Math.round(1e4 * was.shape.pitchMm) / 1e4;
  const known = wiresFor(job);
  const wires = known.filter((wire) => wire.overallMm <= pitchMm);
  if (wires.length === 0)
    return no(
      'wire-above-pitch',
      `wires of ${known.map(({ overallMm }) => lengthText(overallMm, 3)).join(', ')} for the old pitch of ${lengthText(pitchMm, 4)}`,
      `a wire no thicker than ${lengthText(pitchMm, 3)} over its covering`,
      'add such a wire, or take replacement: as it worked',
    );
  const places = inferred.taps.map(({ positionMm }) => positionMm.value);
  const diametersMm = nearestTo(job, inferred.formerDiameterMm.value);
  const former = { ...job.former, diametersMm };
  const start = inferred.taps.map(({ inductanceUh }) => inductanceUh.value);
  const judge = ({ chosen }: Found): Judged => ({
    off: farthest(chosen, places),
    next: places.map((mm) => inductanceAtMm(chosen, mm)),
  });
  const tried: Tried[] = [];
  for (const winding of pitchesLike(job, wires, pitchMm)) {
    // Where taps lie comes first; of coils that look alike the one with the least loss is taken.
    const asked: Job = { ...job, ...winding, former, prefer: 'closest taps' };
    if (candidatesOf(asked).length === 0) continue;
    const one = mended(asked, start, judge);
    if ('why' in one) {
      tried.push({ ok: false, why: one.why });
      continue;
    }
    const of = replacementOf('as it was', one.job, one.found, inferred, old);
    tried.push({ ok: true, of });
    // Taps within half a turn of where they were: no other pitch can look more alike.
    if (of.farthestMm < pitchMm / 2) break;
  }
  const found = tried.flatMap((one) => (one.ok ? [one] : []));
  const best = found.sort((a, b) => a.of.farthestMm - b.of.farthestMm)[0];
  return (
    best ??
    tried[0] ??
    no(
      'pitch',
      `the old pitch of ${lengthText(pitchMm, 4)} with ${wires.map(({ name }) => name).join(', ')}`,
      'a pitch for a groove, for spacers, or for turns that touch',
      'add a wire about as thick as the pitch, or take replacement: as it worked',
    )
  );
}

/** Thinner than this there is nothing to wind along, mm. */
const THINNEST_SPACER_MM = 0.08;
/** Close turns of another wire pass for the old ones when it is as thick within this part. */
const AS_THICK = 0.1;

/** Ways to wind that look like the old pitch: at that pitch itself, or close with wires nearly as thick. */
function pitchesLike(job: Job, wires: readonly Wire[], pitchMm: number): Pick<Job, 'wires' | 'winding'>[] {
  const spaces = wires.map((wire) => Math.round(1e3 * (pitchMm - wire.overallMm)) / 1e3);
  const spacers = [...new Set(spaces.filter((mm) => mm >= THINNEST_SPACER_MM))].sort((a, b) => a - b);
  const at = { wires, winding: { ...job.winding, pitch: pitchMm, spacers: spacers.length > 0 ? spacers : null } };
  const thick = wires.filter((wire) => wire.overallMm > pitchMm * (1 - AS_THICK) && wire.covering !== 'bare');
  const close = { wires: thick, winding: { ...job.winding, pitch: 'close' as const, spacers: null } };
  return thick.length === 0 || job.former.body === 'ribbed' ? [at] : [at, close];
}

function no(code: string, got: string, expected: string, todo: string): Tried {
  return { ok: false, why: new Fault(4, { code, place: { key: 'replacement' }, got, expected, todo }) };
}
