/**
 * What every switch position does at work: range with its uncertainty, second resonance, inductance, resistance, Q,
 * bandwidth and parallel resistance at both ends and the middle; overlaps and gaps of neighbours; the four kinds of switch
 * side by side. From the field of every turn and the coupled circuit of the dead turns.
 */
import { RESTS, type Rest, type Terminal, type Tuned, type WorkingCoil } from './working-coil.ts';

/** The set's capacitance across a position, capacitor out and in, strays and aerial counted, pF. */
export interface Tuning {
  readonly outPf: number;
  readonly inPf: number;
}

export interface Conditions {
  readonly tuning: Tuning | null;
  /** Frequency to judge at; null: the middle of each range. One of the two must be given. */
  readonly atKhz: number | null;
  readonly rest: Rest;
  /** Of the former's material. */
  readonly lossTangent: number;
}

export interface Span {
  readonly low: Tuned;
  readonly high: Tuned;
}

/** A position at one frequency, its former's loss counted. */
export interface AtFrequency extends Terminal {
  readonly bandwidthKhz: number;
  readonly parallelKohm: number;
}

export interface Position {
  readonly turn: number;
  readonly span: Span | null;
  readonly working: AtFrequency;
  /** At the low end, the middle and the high end; empty without a range. */
  readonly ends: readonly AtFrequency[];
}

/** Share of the self-capacitance whose field lies in the former: an estimate, half of it for a thin wall. */
export const FORMER_SHARE = 0.5;

/**
 * Series resistance that the former's loss is worth, ohm: its part of the self-capacitance has the material's loss tangent,
 * R = (omega L)^2 omega C tan(delta). An estimate; the share is taken as FORMER_SHARE and the wall's thickness is not looked at.
 */
export function formerLossOhm(inductanceUh: number, selfPf: number, lossTangent: number, kHz: number): number {
  const omega = 2e3 * Math.PI * kHz;
  const reactance = omega * inductanceUh * 1e-6;
  return reactance ** 2 * omega * FORMER_SHARE * selfPf * 1e-12 * lossTangent;
}

/** The same loss as a resistance in parallel with the turns, ohm; infinite without any. */
export function formerShuntOhm(inductanceUh: number, selfPf: number, lossTangent: number, kHz: number): number {
  const reactance = 2e-3 * Math.PI * kHz * inductanceUh;
  return reactance ** 2 / formerLossOhm(inductanceUh, selfPf, lossTangent, kHz);
}

export function atFrequency(
  coil: WorkingCoil,
  turn: number,
  kHz: number,
  rest: Rest,
  lossTangent: number,
): AtFrequency {
  const copper = coil.terminal(turn, kHz, rest);
  const former = formerLossOhm(copper.inductanceUh, coil.coil.selfPf(turn), lossTangent, kHz);
  const resistanceOhm = copper.resistanceOhm + former;
  const reactance = 2e-3 * Math.PI * kHz * copper.inductanceUh;
  const q = reactance / resistanceOhm;
  return { ...copper, resistanceOhm, q, bandwidthKhz: kHz / q, parallelKohm: (q * reactance) / 1e3 };
}

/** One end of a range, with this much of the set's capacitance across the turns from..turn; crowding is taken once. */
export function endOf(coil: WorkingCoil, turn: number, pf: number, rest: Rest, from = 0): Tuned {
  const first = coil.tuned(turn, pf, rest, 1, from);
  return coil.tuned(turn, pf, rest, coil.crowding(turn, first.kHz, from), from);
}

/** Range of a position. */
export function spanOf(coil: WorkingCoil, turn: number, tuning: Tuning, rest: Rest): Span {
  const end = (pf: number) => endOf(coil, turn, pf, rest);
  return { low: end(tuning.inPf), high: end(tuning.outPf) };
}

export function positionOf(coil: WorkingCoil, turn: number, conditions: Conditions): Position {
  const { tuning, rest, lossTangent, atKhz } = conditions;
  const at = (kHz: number) => atFrequency(coil, turn, kHz, rest, lossTangent);
  const span = tuning === null ? null : spanOf(coil, turn, tuning, rest);
  const middle = span === null ? null : Math.sqrt(span.low.kHz * span.high.kHz);
  const judged = atKhz ?? middle;
  if (judged === null) throw new RangeError('a position needs a frequency or a tuning capacitor');
  const ends = span === null || middle === null ? [] : [at(span.low.kHz), at(middle), at(span.high.kHz)];
  return { turn, span, working: judged === middle ? ends[1]! : at(judged), ends };
}

export interface Neighbours {
  /** Counted from 1. */
  readonly from: number;
  readonly to: number;
  /** Upper edge of the longer section over the lower edge of the shorter one, less one; below 0 a gap. */
  readonly overlap: number;
}

/** Overlap of each position with the next, lowest inductance first. */
export function neighboursOf(spans: readonly Span[]): Neighbours[] {
  return spans.slice(1).map((span, i) => ({ from: i + 1, to: i + 2, overlap: span.high.kHz / spans[i]!.low.kHz - 1 }));
}

/** How many positions between two neighbours close the gap from `lowKhz` to `highKhz`, each as wide as the narrower of the two. */
export function tapsToClose(lowKhz: number, highKhz: number, width: number): number {
  return Math.ceil(Math.log(highKhz / lowKhz) / Math.log(width) - 1e-9);
}

export interface KindPosition {
  readonly turn: number;
  readonly at: AtFrequency;
  readonly span: Span | null;
}

/** Every kind of switch on the same coil: each position at the frequency at which it works with the kind in use. */
export function kindsOf(
  coil: WorkingCoil,
  positions: readonly Position[],
  conditions: Conditions,
): { kind: Rest; positions: KindPosition[] }[] {
  return RESTS.map((kind) => ({
    kind,
    positions: positions.map((position) => ({
      turn: position.turn,
      at: atFrequency(coil, position.turn, position.working.kHz, kind, conditions.lossTangent),
      span:
        kind === conditions.rest || conditions.tuning === null
          ? position.span
          : spanAt(coil, position, conditions.tuning, kind),
    })),
  }));
}

/** Range with another kind of switch; crowding is taken as it is at the frequency the position works at. */
function spanAt(coil: WorkingCoil, { turn, working }: Position, tuning: Tuning, kind: Rest): Span {
  const crowding = coil.crowding(turn, working.kHz);
  const end = (pf: number) => coil.tuned(turn, pf, kind, crowding);
  return { low: end(tuning.inPf), high: end(tuning.outPf) };
}
