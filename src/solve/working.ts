/**
 * What a switch position does where it works: the frequencies that it tunes with the set's capacitor, and its loss there.
 * The loss is the labelled estimate of `physics/loss.ts`; it serves to rank candidates and is printed as an estimate.
 */
import type { Job } from '../job/job.ts';
import { lossEstimate } from '../physics/loss.ts';
import { resonance } from '../physics/tuning.ts';
import type { Wire } from '../stock/wire.ts';
import { setCapacitance } from './demand.ts';

/** Frequency for the loss when the job names neither a set nor `at`. */
export const DEFAULT_AT_KHZ = 1000;

export interface Coverage {
  readonly lowKhz: number;
  readonly highKhz: number;
  /** All capacitance across the position with the capacitor out and in, self-capacitance counted. */
  readonly outPf: number;
  readonly inPf: number;
}

/** Frequencies of a section with the set's capacitor in and out; null when the job has no set. */
export function coverageOf(job: Job, inductanceUh: number, selfPf: number): Coverage | null {
  if (job.set === null) return null;
  const fixed = setCapacitance(job.set);
  const outPf = fixed.outPf + selfPf;
  const inPf = fixed.inPf + selfPf;
  const khz = (pf: number) => resonance(inductanceUh * 1e-6, pf * 1e-12) / 1e3;
  return { lowKhz: khz(inPf), highKhz: khz(outPf), outPf, inPf };
}

/** The frequency at which a position is judged: the middle of its coverage in ratio, or the job's `at`. */
export function workingKhz(job: Job, inductanceUh: number, selfPf: number): number {
  const coverage = coverageOf(job, inductanceUh, selfPf);
  if (coverage === null || job.atKhz !== null) return job.atKhz ?? DEFAULT_AT_KHZ;
  return Math.sqrt(coverage.lowKhz * coverage.highKhz);
}

export interface SectionShape {
  readonly wire: Wire;
  readonly meanDiameterMm: number;
  readonly turns: number;
  readonly pitchMm: number;
  readonly wireM: number;
}

/** Series resistance in ohm of a section at a frequency: an estimate. */
export function sectionLossOhm(shape: SectionShape, kHz: number): number {
  const { wire } = shape;
  return lossEstimate({
    turns: shape.turns,
    meanDiameter: shape.meanDiameterMm / 1e3,
    length: (shape.turns * shape.pitchMm) / 1e3,
    pitch: shape.pitchMm / 1e3,
    wireDiameter: wire.bareMm / 1e3,
    strands: wire.strands,
    strandDiameter: wire.strandMm / 1e3,
    wireLength: shape.wireM,
    frequency: kHz * 1e3,
  }).resistance;
}

/** 1/Q of a section. */
export function lossFactor(inductanceUh: number, resistanceOhm: number, kHz: number): number {
  return resistanceOhm / (2 * Math.PI * kHz * 1e3 * inductanceUh * 1e-6);
}
