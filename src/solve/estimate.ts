/**
 * A candidate's figures in a few microseconds: Wheeler for the starting turns, Nagaoka with Rosa's corrections for the
 * rest, gaps of taps spread evenly. Good to about half a percent, enough to prune by; whatever is reported comes from the
 * ring sum of the design.
 */
import type { Job } from '../job/job.ts';
import { selfCapacitance } from '../physics/medhurst.ts';
import { equivalentDiameterMm } from '../physics/polygon.ts';
import { roundWireInductance } from '../physics/rosa.ts';
import { wheelerTurns } from '../physics/wheeler.ts';
import type { Candidate } from './candidates.ts';
import { type Demand, setCapacitance, tapsBetween } from './demand.ts';
import { cornersOn, ribbedTurnMm, ribEndsMm, ribSection } from './ribs.ts';
import { inductanceSpread } from './spread.ts';
import { type TapMethod, wireHoleMm } from './tap-methods.ts';
import {
  actingSelfPf,
  copperG,
  coverageEstimate,
  lossFactor,
  type Section,
  sectionLossOhm,
  workingKhz,
} from './working.ts';

export interface Size {
  readonly candidate: Candidate;
  readonly wholeUh: number;
  readonly turns: number;
  /** Length of the whole former, about. */
  readonly formerLengthMm: number;
  readonly volumeMm3: number;
  readonly gapsMm: number;
  readonly selfPf: number;
}

export interface Estimate extends Size {
  readonly firstTapTurns: number;
  readonly wireM: number;
  readonly massG: number;
  /** Mean 1/Q over first, middle and last position. */
  readonly lossFactor: number;
  /** Half width of the whole coil's inductance, a fraction. */
  readonly spread: number;
}

/** Twice the radius of the wire centre as the coil comes out: what the bench adds to the plan is in it. */
export function meanDiameterMm({ asMade }: Pick<Job, 'asMade'>, candidate: Candidate): number {
  const { pitch, formerMm, wire } = candidate;
  // A groove half a wire deep puts the wire's centre at the outside diameter.
  return formerMm + (pitch.kind === 'groove' ? 0 : wire.overallMm) + asMade.diameterMm;
}

/** Diameter that stands for the turns in laws of round coils: the mean diameter, or on ribs that of the circle of a turn's area. */
export function roundDiameterMm(
  job: Job,
  candidate: Candidate,
  method: TapMethod | undefined = candidate.methods[0],
): number {
  const mean = meanDiameterMm(job, candidate);
  const { corners, bendMm } = cornersOn(ribSection(job, candidate.wire.overallMm, method), mean);
  return equivalentDiameterMm(mean, corners, bendMm);
}

/** Turns for an inductance at this pitch with `gapsMm` of gaps spread over the winding, from Nagaoka and Rosa. */
export function turnsFor(uh: number, diameterMm: number, pitchMm: number, bareMm: number, gapsMm: number): number {
  const henry = uh * 1e-6;
  let turns = Math.max(wheelerTurns(henry, diameterMm / 1e3, pitchMm / 1e3), 0.05);
  if (turns < 1) return turns;
  for (let round = 0; round < 4; round++) {
    const pitch = (pitchMm + gapsMm / turns) / 1e3;
    const ratio = henry / roundWireInductance(Math.max(turns, 1), diameterMm / 1e3, pitch, bareMm / 1e3);
    // L goes with N to about the power of 1.5 at a fixed pitch.
    turns *= ratio ** 0.66;
    if (Math.abs(ratio - 1) < 1e-4) break;
  }
  return turns;
}

/** Former beyond the winding: foot, anchor and rims of a printed one, bare ends of a tube. */
function endsMm(job: Job, { wire, pitch, formerMm, methods }: Candidate): number {
  const { overallMm } = wire;
  const pitchMm = pitch.mm;
  const hole = wireHoleMm(overallMm, 1);
  const trim = (job.winding.finishTrim ? 3 : 1) * pitchMm;
  if (job.former.kind === 'tube') return 20 + hole / 2 + trim;
  const ribs = ribSection(job, overallMm, methods[0]);
  if (ribs !== null) return ribEndsMm(job, ribs, formerMm, overallMm) + trim;
  return (job.former.flanges ? 10 : 2) + 2.5 * hole + 3.2 + trim;
}

/** Turns and size; null where no tap method of the job is possible. */
export function sizeOf(job: Job, demand: Demand, candidate: Candidate): Size | null {
  const method = candidate.methods[0];
  if (method === undefined) return null;
  const { wire, pitch } = candidate;
  const diameter = roundDiameterMm(job, candidate);
  const gapsMm = method.gapMm * tapsBetween(demand);
  let selfPf = diameter * 0.05;
  let turns = 0;
  let wholeUh = 0;
  for (let round = 0; round < (demand.kind === 'band' ? 2 : 1); round++) {
    wholeUh = demand.wholeUh(selfPf);
    turns = turnsFor(wholeUh, diameter, pitch.mm, wire.bareMm, gapsMm);
    selfPf = selfCapacitance((turns * pitch.mm + gapsMm) / 1e3, diameter / 1e3) * 1e12;
  }
  const formerLengthMm = endsMm(job, candidate) + turns * pitch.mm + gapsMm;
  const volumeMm3 = (Math.PI / 4) * candidate.formerMm ** 2 * formerLengthMm;
  return { candidate, wholeUh, turns, formerLengthMm, volumeMm3, gapsMm, selfPf };
}

/** L of a section goes with about this power of its turns. */
const TURNS_POWER = 1.6;

/** A section of a coil that is known by its whole alone, for the estimate of its tuning. */
export function roughSection(job: Job, size: Size, uh: number, taps: number): Section {
  const share = Math.min(1, (uh / size.wholeUh) ** (1 / TURNS_POWER));
  return {
    share,
    usedUh: uh,
    wholeUh: size.wholeUh,
    deadUh: size.wholeUh * (1 - share) ** TURNS_POWER,
    wholePf: size.selfPf,
    sectionPf: size.selfPf,
    leads: (job.set?.leadPf ?? 0) > 0 ? Array.from({ length: taps }, (_, i) => (i + 1) / taps) : [],
  };
}

/** Targets of a coil that is known by its whole alone. */
export function roughTargets(job: Job, demand: Demand, size: Size): number[] {
  const { turns, wholeUh } = size;
  const tuning = job.set === null ? null : setCapacitance(job.set);
  return demand.targetsUh({
    selfPf: (uh) =>
      tuning === null ? size.selfPf : actingSelfPf(job, roughSection(job, size, uh, demand.taps), tuning.outPf),
    at: (turn) => wholeUh * (turn / turns) ** TURNS_POWER,
    turnFor: (value) => turns * (value / wholeUh) ** (1 / TURNS_POWER),
  });
}

/** The rest of a candidate's figures. */
export function estimateOf(job: Job, demand: Demand, size: Size): Estimate {
  const { candidate, turns, wholeUh, gapsMm } = size;
  const { wire, pitch } = candidate;
  const diameter = roundDiameterMm(job, candidate);
  const targets = roughTargets(job, demand, size);
  const ribs = ribSection(job, wire.overallMm, candidate.methods[0]);
  const turnM = Math.hypot(ribbedTurnMm(meanDiameterMm(job, candidate), ribs), pitch.mm) / 1e3;
  let loss = 0;
  let firstTapTurns = turns;
  const looked = new Set([0, targets.length >> 1, targets.length - 1]);
  for (const index of looked) {
    const value = targets[index]!;
    const last = index === targets.length - 1;
    const share = gapsMm * (value / wholeUh) ** 0.6;
    const n = last ? turns : turnsFor(value, diameter, pitch.mm, wire.bareMm, share);
    if (index === 0) firstTapTurns = n;
    const kHz = workingKhz(job, coverageEstimate(job, roughSection(job, size, value, demand.taps)));
    const deadTurns = Math.max(0, turns - n);
    const shape = { wire, meanDiameterMm: diameter, turns: n, deadTurns, pitchMm: pitch.mm, wireM: n * turnM };
    loss += lossFactor(value, sectionLossOhm(shape, kHz), kHz);
  }
  const wireM = turns * turnM;
  const massG = copperG(wire, wireM);
  const spread = inductanceSpread(job, candidate);
  return { ...size, firstTapTurns, wireM, massG, lossFactor: loss / looked.size, spread };
}
