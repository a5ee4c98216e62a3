/** The inferred old coil in its set: ranges of every position with their limits, inductance, loss and Q where it worked. */
import { Coil } from '../coil/coil.ts';
import { type AtFrequency, atFrequency, type Conditions, type Span, spanOf } from '../coil/positions.ts';
import { WorkingCoil } from '../coil/working-coil.ts';
import type { Job } from '../job/job.ts';
import { setCapacitance } from '../solve/demand.ts';
import { DEFAULT_AT_KHZ } from '../solve/working.ts';
import { findMaterial } from '../stock/materials.ts';
import type { Estimate, InferredCoil, OldCoil } from './types.ts';

/** Turns of the likeliest coil where they lie, Z = 0 at the start. */
export function coilOf({
  wire,
  meanDiameterMm,
  windingLengthMm,
  overallMm,
  taps,
  turnPositionsMm,
}: InferredCoil): Coil {
  const { turn } = taps[taps.length - 1]!;
  const pitchMm = (windingLengthMm.value - overallMm.value) / turn;
  const shape = { wire, meanDiameterMm: meanDiameterMm.value, turns: turn, pitchMm, gaps: [], startMm: 0 };
  return new Coil(shape, turnPositionsMm);
}

/** A position where it worked: its range, and its figures in the middle of that. */
export interface OldPosition {
  readonly span: Span | null;
  readonly working: AtFrequency;
}

function positionAt(working: WorkingCoil, turn: number, { tuning, atKhz, rest, lossTangent }: Conditions): OldPosition {
  const span = tuning === null ? null : spanOf(working, turn, tuning, rest);
  const kHz = atKhz ?? (span === null ? DEFAULT_AT_KHZ : Math.sqrt(span.low.kHz * span.high.kHz));
  return { span, working: atFrequency(working, turn, kHz, rest, lossTangent) };
}

export interface OldAtWork {
  readonly working: WorkingCoil;
  readonly conditions: Conditions;
  /** One a tap, the whole coil last. */
  readonly positions: readonly OldPosition[];
}

export function oldAtWork(inferred: InferredCoil, old: OldCoil, job: Job): OldAtWork {
  const set = job.set;
  const material = old.formerMaterial === null ? null : findMaterial(old.formerMaterial);
  const taps = inferred.taps.map(({ turn }) => turn);
  const working = new WorkingCoil(coilOf(inferred), taps, {
    leadPf: set?.leadPf ?? 0,
    earthed: old.earthed,
    celsius: job.celsius,
  });
  const conditions: Conditions = {
    tuning: set === null ? null : setCapacitance(set),
    atKhz: job.atKhz ?? (set === null ? DEFAULT_AT_KHZ : null),
    rest: set?.switch ?? 'open',
    lossTangent: material?.ok ? material.material.lossTangent : 0,
  };
  return { working, conditions, positions: taps.map((turn) => positionAt(working, turn, conditions)) };
}

/**
 * Limits of a frequency that a position tunes: half of what its inductance may be off, and what is not known of where the
 * self-capacitance lies.
 */
export function frequencyLimits(kHz: number, uncertaintyKhz: number, { value, low, high }: Estimate): Estimate {
  const own = uncertaintyKhz / kHz;
  return {
    value: kHz,
    low: kHz * (1 - Math.hypot(Math.sqrt(high / value) - 1, own)),
    high: kHz * (1 + Math.hypot(Math.sqrt(value / low) - 1, own)),
  };
}
