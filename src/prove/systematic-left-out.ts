/**
 * What tells nothing of the bench and is left out of the fit: readings that are slips of the pen, coils with turns miscounted, coils
 * and readings far from all others. Rules:
 *
 * - a reading more than `FAR` off what it should be, beyond what two turns do to it, is a slip of unit, place or range;
 * - a coil whose turns were counted and are half a turn or more off the plan;
 * - a coil whose readings step by `LEAST_TURN` to three turns at one section and stay there, at 5 standard deviations or more of
 *   what else tells coils apart (of fewer than three coils: of what a bench may be off by);
 * - a coil whose readings, but for any one of them, lie as far from the middle of all coils as one in a million would;
 * - a coil whose own diameter or pitch lies farther from the others than one coil in 10,000 would; a reading at 5 standard
 *   deviations from what fits all the others of its coil. One at a time, the farthest first, and the fit is made anew.
 */
import tQuantile from '@stdlib/stats-base-dists-t-quantile';
import { SYSTEMATIC } from '../../templates/wording/systematic.ts';
import { noiseOf } from './systematic-columns.ts';
import { expectedOf, type FittedCoil, type Fitting, fitKind, type KindFit } from './systematic-fit.ts';
import { deviationOf, type KindModel, type Slot } from './systematic-model.ts';
import type { Systematic } from './systematic-schema.ts';
import { perTurn } from './systematic-strangers.ts';
import type { CoilReadings } from './types.ts';

export type LeftOut = Systematic['leftOut'][number];

/** A seventh off is another coil or another unit. */
const FAR = 0.15;
const SLIP_TURNS = 2;
const HALF_TURN = 0.5;
const READING_SIGMAS = 5;
const ONE_IN = 1e4;
/**
 * A coil is looked at more closely from here on; of few coils one cannot stand farther off than (n - 1)/sqrt(n), as it widens the scatter
 * by itself.
 */
const lookFrom = (coils: number) => Math.min(3, (0.8 * (coils - 1)) / Math.sqrt(coils));
/** A median tells what coils have in common from so many on. */
const LEAST_FOR_MEDIAN = 3;

/** Of a deviation, what it is a part of. */
const scaleOf = ({ perLn, expected }: Slot) => (perLn === 0 ? expected : 1);

/** What can be fitted of a coil; slips and miscounts are told. */
export function fittingOf(model: KindModel, coil: CoilReadings, leftOut: LeftOut[]): FittedCoil | null {
  const { serial } = coil;
  const readings: Fitting[] = [];
  for (const reading of coil.readings) {
    if (reading.quantity === 'turns') {
      const planned = reading.tap === null ? model.whole : model.taps.find(({ tap }) => tap === reading.tap);
      if (planned === undefined || Math.abs(reading.value - planned.turn) < HALF_TURN) continue;
      const text = SYSTEMATIC.leftOut.counted(
        reading.value,
        planned.turn,
        planned === model.whole ? null : planned.tap,
      );
      leftOut.push({ serial, line: null, why: 'turns', text });
      return null;
    }
    const slot = model.slotOf(reading);
    if (slot === null) continue;
    const off = reading.value / slot.expected - 1;
    if (Math.abs(off) > FAR + (SLIP_TURNS * Math.abs(perTurn(model, slot))) / scaleOf(slot)) {
      const text = SYSTEMATIC.leftOut.slip(SYSTEMATIC.slot(slot), reading.written, 100 * off);
      leftOut.push({ serial, line: reading.line, why: 'far', text });
    } else readings.push({ slot, reading });
  }
  return readings.length === 0 ? null : { serial, readings };
}

/** The coil that stands farthest off the others in what it has of its own, in its standard deviations. */
function farthestCoil({ fit }: KindFit): { index: number; sigmas: number } {
  let best = { index: -1, sigmas: 0 };
  fit.own.forEach(({ u, sd }, index) => {
    const sigmas = Math.max(...u.map((value, k) => Math.abs(value) / sd[k]!));
    if (sigmas > best.sigmas) best = { index, sigmas };
  });
  return best;
}

/** Whether a coil fits what all the others tell. */
function standsOff(coils: readonly FittedCoil[], index: number, others: KindFit): boolean {
  const { columns, fit } = others;
  const { readings } = coils[index]!;
  const rest = readings.map(({ slot, reading }) => deviationOf(slot, reading.value) - expectedOf(others, slot));
  const limit = tQuantile(1 - 0.5 / ONE_IN, Math.max(1, coils.length - 2));
  const weights = readings.map(({ slot }) => 1 / fit.noise[noiseOf(slot.of)]! ** 2);
  const per = [0, 1].map((k) => readings.map(({ slot }) => columns[k]!.per(slot)));
  const crossed = (a: readonly number[], b: readonly number[]) =>
    weights.reduce((sum, w, i) => sum + w * a[i]! * b[i]!, 0);
  // This coil's own diameter, and its own pitch, each by itself, with what the other adds to it.
  return per.some((own) => {
    const information = crossed(own, own);
    if (information === 0) return false;
    const sds = per.map((other, k) => (fit.scatter[k]! * crossed(own, other)) / information);
    return Math.abs(crossed(own, rest) / information) > limit * Math.hypot(...sds, 1 / Math.sqrt(information));
  });
}

/** The fit of what is left when everything far from all others is left out. */
export function fitRobust(
  model: KindModel,
  given: readonly FittedCoil[],
  leftOut: LeftOut[],
): { readonly coils: readonly FittedCoil[]; readonly found: KindFit } {
  let coils = [...given];
  let found = fitKind(model, coils);
  // Everything can be left out but once.
  for (let round = 0; round < given.length; round++) {
    const far = farthestReading(coils, found);
    if (far !== null) {
      const { serial, readings } = coils[far.coil]!;
      const { slot, reading } = readings[far.index]!;
      const text = SYSTEMATIC.leftOut.reading(SYSTEMATIC.slot(slot), reading.written, far.sigmas);
      leftOut.push({ serial, line: reading.line, why: 'far', text });
      const left = readings.filter((_, i) => i !== far.index);
      coils =
        left.length === 0 ? coils.filter((_, i) => i !== far.coil) : coils.with(far.coil, { serial, readings: left });
      found = fitKind(model, coils, found);
      continue;
    }
    const { index, sigmas } = farthestCoil(found);
    if (sigmas < lookFrom(coils.length) || coils.length <= LEAST_FOR_MEDIAN) break;
    const others = coils.filter((_, i) => i !== index);
    const without = fitKind(model, others, found);
    if (!standsOff(coils, index, without)) break;
    leftOut.push({ serial: coils[index]!.serial, line: null, why: 'far', text: SYSTEMATIC.leftOut.coil });
    [coils, found] = [others, without];
  }
  return { coils, found };
}

/** The reading that is farthest off, when it is far. */
function farthestReading(coils: readonly FittedCoil[], { fit }: KindFit) {
  let best: { coil: number; index: number; sigmas: number } | null = null;
  for (const [coil, rest] of fit.rest.entries())
    for (const [index, value] of rest.entries()) {
      const { of } = coils[coil]!.readings[index]!.slot;
      const sigmas = Math.abs(value) / fit.noise[noiseOf(of)]!;
      if (sigmas > READING_SIGMAS && (best === null || sigmas > best.sigmas)) best = { coil, index, sigmas };
    }
  return best;
}
