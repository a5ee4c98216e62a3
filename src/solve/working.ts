/**
 * Estimates of what a switch position does where it works: the frequencies that it tunes with the set's capacitor, and its
 * loss there. They serve to prune; the best few are looked at by the field and the coupled circuit (`refine.ts`), and only
 * those figures are reported.
 */
import { LITZ_TAKE_UP } from '../coil/coil.ts';
import type { Job } from '../job/job.ts';
import { DENSITY, dcResistance } from '../physics/copper.ts';
import { deadEndCapacitance } from '../physics/coupled/two-nodes.ts';
import { lossEstimate } from '../physics/loss.ts';
import { skinRatio } from '../physics/skin.ts';
import { resonance } from '../physics/tuning.ts';
import type { Wire } from '../stock/wire.ts';
import { setCapacitance } from './demand.ts';

/** Frequency for the loss when the job names neither a set nor `at`. */
export const DEFAULT_AT_KHZ = 1000;

export interface Coverage {
  readonly lowKhz: number;
  readonly highKhz: number;
}

/** A section of a coil as the estimate of its tuning needs it; uH and pF. */
export interface Section {
  /** Turns in use over all turns, above 0, up to 1. */
  readonly share: number;
  readonly usedUh: number;
  readonly wholeUh: number;
  /** Of the dead turns by themselves. */
  readonly deadUh: number;
  readonly wholePf: number;
  /** Self-capacitance of the turns in use alone. */
  readonly sectionPf: number;
  /** Turns of all taps over all turns: each has a lead. */
  readonly leads: readonly number[];
}

const WHOLE = 1 - 1e-9;

/**
 * Capacitance that the coil itself puts across the turns in use, dead turns counted, pF: an estimate, two nodes for all
 * turns. It may come out below 0 where shorted turns take inductance away, which acts the same on the resonance.
 */
export function actingSelfPf(job: Job, section: Section, tuningPf: number): number {
  const { share, usedUh, wholeUh, deadUh, wholePf, sectionPf } = section;
  const lead = job.set?.leadPf ?? 0;
  if (share >= WHOLE) return wholePf + lead * sum(section.leads, (at) => at ** 2);
  const rest = job.set?.switch ?? 'open';
  const mutual = Math.max(0, (wholeUh - usedUh - deadUh) / 2);
  const own = lead * sum(section.leads, (at) => (at <= share + 1e-9 ? (at / share) ** 2 : 0));
  if (rest === 'disconnected') return sectionPf + own;
  if (rest !== 'open') {
    const left = 1 - mutual ** 2 / (deadUh * usedUh);
    return left * (tuningPf + sectionPf + own) - tuningPf;
  }
  // With the finish earthed the dead turns hang at the earthed end and act little more than the section does.
  if (job.winding.earthed === 'finish') return sectionPf + own;
  const far = (usedUh + mutual) / usedUh;
  const beyond =
    lead * sum(section.leads, (at) => (at > share + 1e-9 ? (1 + ((far - 1) * (at - share)) / (1 - share)) ** 2 : 0));
  const wire = deadEndCapacitance({
    share,
    usedInductance: usedUh,
    wholeInductance: wholeUh,
    deadInductance: deadUh,
    selfCapacitance: wholePf,
    tuning: tuningPf + own,
  });
  return wire + own + beyond;
}

const sum = (list: readonly number[], of: (value: number) => number) => list.reduce((all, value) => all + of(value), 0);

/** Frequencies of a section with the set's capacitor in and out, by the estimate; null when the job has no set. */
export function coverageEstimate(job: Job, section: Section): Coverage | null {
  if (job.set === null) return null;
  const { outPf, inPf } = setCapacitance(job.set);
  const khz = (pf: number) => resonance(section.usedUh * 1e-6, (pf + actingSelfPf(job, section, pf)) * 1e-12) / 1e3;
  return { lowKhz: khz(inPf), highKhz: khz(outPf) };
}

/** The frequency at which a position is judged: the middle of its coverage in ratio, or the job's `at`. */
export function workingKhz(job: Job, coverage: Coverage | null): number {
  if (coverage === null || job.atKhz !== null) return job.atKhz ?? DEFAULT_AT_KHZ;
  return Math.sqrt(coverage.lowKhz * coverage.highKhz);
}

export interface SectionShape {
  readonly wire: Wire;
  readonly meanDiameterMm: number;
  readonly turns: number;
  readonly pitchMm: number;
  readonly wireM: number;
  /** Turns beyond the tap, which lose power to the field of those in use. */
  readonly deadTurns: number;
}

/**
 * What dead turns lose, over what the turns in use lose to one another. Beyond a section much shorter than its diameter the
 * field falls off with the distance; squared and summed over all turns out there that is 0.6 of the sum within.
 */
const DEAD_LOSS = 0.6;

/**
 * Turns of coils this short, wound this close, lose more than Medhurst's table says. By the field solution of 41 tapped coils
 * (d/p 0.27 to 0.95, l/D 0.1 to 2.8) by about this much; what is left is within 10 % for most and 28 % at worst.
 */
const closeLoss = (wireOverPitch: number) => 1 + 0.75 * wireOverPitch ** 2;

/** Series resistance in ohm of a section at a frequency: an estimate, dead turns counted. */
export function sectionLossOhm(shape: SectionShape, kHz: number): number {
  const { wire, turns, deadTurns } = shape;
  const section = {
    turns,
    meanDiameter: shape.meanDiameterMm / 1e3,
    length: (turns * shape.pitchMm) / 1e3,
    pitch: shape.pitchMm / 1e3,
    wireDiameter: wire.bareMm / 1e3,
    strands: wire.strands,
    strandDiameter: wire.strandMm / 1e3,
    wireLength: shape.wireM,
    frequency: kHz * 1e3,
  };
  const { resistance } = lossEstimate(section);
  const litz = wire.strands > 1;
  const alone =
    dcResistance(section.wireLength, (litz ? wire.strandMm : wire.bareMm) / 1e3, wire.strands) *
    (litz ? 1 : skinRatio(section.wireDiameter, section.frequency));
  const beyond = deadTurns / (turns / 2 + deadTurns);
  const all = resistance + DEAD_LOSS * beyond * Math.max(0, resistance - alone);
  return litz ? all : all * closeLoss(wire.bareMm / shape.pitchMm);
}

/** Section of the copper, all strands. */
export function copperMm2({ strandMm, strands }: Wire): number {
  return (Math.PI / 4) * strandMm ** 2 * strands;
}

/** Mass of the copper in so much wire, g; strands are longer than the bundle that they are twisted to. */
export function copperG(wire: Wire, metres: number): number {
  return metres * (wire.strands > 1 ? LITZ_TAKE_UP : 1) * copperMm2(wire) * (DENSITY / 1e3);
}

/** 1/Q of a section. */
export function lossFactor(inductanceUh: number, resistanceOhm: number, kHz: number): number {
  return resistanceOhm / (2 * Math.PI * kHz * 1e3 * inductanceUh * 1e-6);
}
