/**
 * The replacement, two ways. As it worked: every tap has the old inductance where it works, whatever wire and diameter are on hand.
 * As it was: every tap lies where it lay, at the old pitch, with what inductance that gives. Both are found by the search of `plan`;
 * what the first round leaves over (crowding of another wire, gaps of the new taps) goes into the targets of the next.
 */
import type { WorkingCoil } from '../coil/working-coil.ts';
import { Fault } from '../fault.ts';
import type { Job } from '../job/job.ts';
import { lengthText } from '../quantity/format.ts';
import type { Design } from '../solve/design.ts';
import { workingCoilOf } from '../solve/refine.ts';
import { refusal } from '../solve/refusal.ts';
import { type Found, search } from '../solve/search.ts';
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
/** A deviation of the working inductance that another round would not better. */
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

/** Of the diameters there are, the one nearest to the old. */
function nearestTo({ former }: Job, mm: number): Job['former']['diametersMm'] {
  const of = former.diametersMm;
  if ('listMm' in of) return { listMm: [...of.listMm].sort((a, b) => Math.abs(a - mm) - Math.abs(b - mm)).slice(0, 1) };
  return former.kind === 'tube' ? of : { listMm: [Math.min(of.highMm, Math.max(of.lowMm, mm))] };
}

function against(job: Job, design: Design, inferred: InferredCoil, old: OldAtWork): TapAgainst[] {
  const working: WorkingCoil = workingCoilOf(job, design);
  const { coil, taps } = design;
  const first = coil.positionMm(0);
  return taps.map(({ turn, inductanceUh }, i) => {
    const { kHz, inductanceUh: wasUh } = old.positions[i]!.working;
    const at = working.terminal(turn, kHz, old.conditions.rest);
    return {
      turn,
      positionMm: coil.positionMm(turn) - first,
      low: inductanceUh / inferred.taps[i]!.inductanceUh.value - 1,
      working: at.inductanceUh / wasUh - 1,
      workingUh: at.inductanceUh,
      q: at.q,
    };
  });
}

function replacementOf(way: Way, job: Job, found: Found, inferred: InferredCoil, old: OldAtWork): Replacement {
  const taps = against(job, found.chosen, inferred, old);
  const off = taps.map((tap) => Math.abs(tap.working));
  const tap = off.indexOf(Math.max(...off));
  return {
    way,
    job,
    found,
    taps,
    worst: { tap, working: off[tap]! },
    farthestMm: Math.max(...taps.map((one, i) => Math.abs(one.positionMm - inferred.taps[i]!.positionMm.value))),
  };
}

const wishing = (job: Job, inductancesUh: readonly number[]): Job => ({
  ...job,
  want: { kind: 'list', inductancesUh },
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

/** Rounds of a search whose targets follow what the round before was off by. */
function mended(
  way: Way,
  job: Job,
  start: readonly number[],
  next: (tried: Replacement, targets: readonly number[]) => readonly number[],
  better: (a: Replacement, b: Replacement) => boolean,
  inferred: InferredCoil,
  old: OldAtWork,
): Tried {
  let targets = start;
  let best: Replacement | null = null;
  let asked = job;
  for (let round = 0; round < ROUNDS; round++) {
    const wish = wishing(asked, targets);
    const found = search(wish);
    if (!('chosen' in found)) {
      if (best !== null) break;
      return { ok: false, why: refusal(wish, found) };
    }
    const one = replacementOf(way, wish, found, inferred, old);
    if (best === null || better(one, best)) best = one;
    else break;
    if (way === 'as it worked' && one.worst.working < NEAR) break;
    asked = narrowed(job, found.chosen);
    targets = next(one, targets);
    if (!rising(targets)) break;
  }
  return { ok: true, of: best! };
}

/** As it worked: the old inductances at work. */
export function asItWorked(job: Job, inferred: InferredCoil, old: OldAtWork): Tried {
  const start = inferred.taps.map(({ inductanceUh }) => inductanceUh.value);
  // What a tap is off because it must stand at a hole is not to be mended, only what the low-frequency targets miss.
  const next = ({ taps }: Replacement) => start.map((uh, i) => (uh * (1 + taps[i]!.low)) / (1 + taps[i]!.working));
  return mended('as it worked', job, start, next, (a, b) => a.worst.working < b.worst.working - NEAR, inferred, old);
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
  const wires = job.wires === 'stock' ? job.wires : job.wires.filter((wire) => wire.overallMm <= pitchMm);
  if (wires.length === 0)
    return no(
      'wire-above-pitch',
      `wires of ${(job.wires as readonly { overallMm: number }[]).map(({ overallMm }) => lengthText(overallMm, 3)).join(', ')} for the old pitch of ${lengthText(pitchMm, 4)}`,
      `a wire no thicker than ${lengthText(pitchMm, 3)} over its covering`,
      'add such a wire, or take replacement: as it worked',
    );
  const places = inferred.taps.map(({ positionMm }) => positionMm.value);
  const diametersMm = nearestTo(job, inferred.formerDiameterMm.value);
  const asked: Job = {
    ...job,
    wires,
    winding: { ...job.winding, pitch: pitchMm },
    former: { ...job.former, diametersMm },
  };
  const start = inferred.taps.map(({ inductanceUh }) => inductanceUh.value);
  const next = ({ found }: Replacement) => places.map((mm) => inductanceAtMm(found.chosen, mm));
  return mended('as it was', asked, start, next, (a, b) => a.farthestMm < b.farthestMm - 0.01, inferred, old);
}

function no(code: string, got: string, expected: string, todo: string): Tried {
  return { ok: false, why: new Fault(4, { code, place: { key: 'replacement' }, got, expected, todo }) };
}
