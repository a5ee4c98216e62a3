/**
 * What tells nothing of the bench and is left out of the fit: readings that are slips of the pen, coils with turns miscounted, coils
 * and readings far from all others. Rules:
 *
 * - a reading more than `FAR` off what it should be is a slip, of unit, place or range;
 * - a coil whose turns were counted and are half a turn or more off the plan;
 * - a coil whose readings step by `LEAST_TURN` to three turns at one section and stay there, at 5 standard deviations or more of
 *   what else tells coils apart (of fewer than three coils: of what a bench may be off by);
 * - a coil whose own diameter or pitch lies farther from the others than one coil in 10,000 would; a reading at 5 standard
 *   deviations from what fits all the others of its coil. One at a time, the farthest first, and the fit is made anew.
 */
import tQuantile from '@stdlib/stats-base-dists-t-quantile';
import { SYSTEMATIC } from '../../templates/wording/systematic.ts';
import { cholesky, dot, solveWith, zeros } from '../match/linear.ts';
import { type Column, columnsOf, NOISE, noiseOf, Slopes, Z95 } from './systematic-columns.ts';
import { expectedOf, type FittedCoil, type Fitting, fitKind, type KindFit } from './systematic-fit.ts';
import { AS_PLANNED, deviationOf, type KindModel, type Slot } from './systematic-model.ts';
import type { Systematic } from './systematic-schema.ts';
import type { CoilReadings } from './types.ts';

export type LeftOut = Systematic['leftOut'][number];

/** A seventh off is another coil or another unit. */
const FAR = 0.15;
const HALF_TURN = 0.5;
const LEAST_TURN = 0.6;
const MOST_TURNS = 3;
/** A count is whole within this. */
const WHOLE = 0.35;
const STEP_SIGMAS = 5;
const READING_SIGMAS = 5;
const ONE_IN = 1e4;
/**
 * A coil is looked at more closely from here on; of few coils one cannot stand farther off than (n - 1)/sqrt(n), as it widens the scatter
 * by itself.
 */
const lookFrom = (coils: number) => Math.min(3, (0.8 * (coils - 1)) / Math.sqrt(coils));
/** A median tells what coils have in common from so many on. */
const LEAST_FOR_MEDIAN = 3;

const median = (list: readonly number[]): number => {
  const sorted = [...list].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
};
/** Standard deviation by the median distance, for a normal distribution. */
const byMedian = (list: readonly number[]) => 1.4826 * median(list.map((value) => Math.abs(value)));

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
    if (Math.abs(off) > FAR) {
      const text = SYSTEMATIC.leftOut.slip(SYSTEMATIC.slot(slot), reading.written, 100 * off);
      leftOut.push({ serial, line: reading.line, why: 'far', text });
    } else readings.push({ slot, reading });
  }
  return readings.length === 0 ? null : { serial, readings };
}

/** What a turn more before a tap does to a slot. */
function perTurn(model: KindModel, slot: Slot): number {
  if (slot.perLn !== 0) return slot.perLn * model.perTurn(slot);
  return slot.of === 'length' ? model.coil.shape.pitchMm : 0;
}

interface Miscount {
  readonly turns: number;
  readonly tap: number;
  readonly sigmas: number;
}

/** The step that explains a coil's residuals best, where it is one of whole turns. */
function miscountOf(
  model: KindModel,
  rest: readonly { readonly slot: Slot; readonly value: number; readonly sd: number }[],
  columns: readonly { readonly of: Column; readonly sd: number }[],
): Miscount | null {
  const n = rest.length;
  const v = zeros(n, n);
  const gradients = columns.map(({ of }) => rest.map(({ slot }) => of.per(slot)));
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) {
      let sum = i === j ? rest[i]!.sd ** 2 : 0;
      columns.forEach(({ sd }, k) => {
        sum += sd ** 2 * gradients[k]![i]! * gradients[k]![j]!;
      });
      v[i]![j] = sum;
    }
  const lower = cholesky(v);
  if (lower === null) return null;
  const weighed = solveWith(
    lower,
    Float64Array.from(rest, ({ value }) => value),
  );
  let best: Miscount | null = null;
  for (const { tap } of model.taps) {
    const step = Float64Array.from(rest, ({ slot }) =>
      slot.tap !== null && slot.tap >= tap ? perTurn(model, slot) : 0,
    );
    const information = dot(step, solveWith(lower, step));
    if (information <= 0) continue;
    const pull = dot(step, weighed);
    const turns = pull / information;
    const sigmas = Math.abs(pull) / Math.sqrt(information);
    if (best === null || sigmas > best.sigmas) best = { turns, tap, sigmas };
  }
  if (best === null || best.sigmas < STEP_SIGMAS || Math.abs(best.turns) < LEAST_TURN) return null;
  const whole = Math.round(best.turns);
  return Math.abs(best.turns - whole) > WHOLE || Math.abs(whole) > MOST_TURNS ? null : { ...best, turns: whole };
}

/** Without the coils that were wound a turn off. */
export function withoutMiscounts(model: KindModel, coils: readonly FittedCoil[], leftOut: LeftOut[]): FittedCoil[] {
  const slots = [...new Set(coils.flatMap(({ readings }) => readings.map(({ slot }) => slot)))];
  const columns = columnsOf(model, slots, new Slopes(model, AS_PLANNED));
  const { spread } = model.record;
  const all = new Map<Slot, number[]>(slots.map((slot) => [slot, []]));
  for (const { readings } of coils)
    for (const { slot, reading } of readings) all.get(slot)!.push(deviationOf(slot, reading.value));
  const enough = coils.length >= LEAST_FOR_MEDIAN;
  const common = new Map(slots.map((slot) => [slot, enough ? median(all.get(slot)!) : 0]));
  const off = ({ readings }: FittedCoil) =>
    readings.map(({ slot, reading }) => deviationOf(slot, reading.value) - common.get(slot)!);
  // Of two coils, or one, nothing is known but what a bench may be off by.
  const own = enough
    ? columns.slice(0, 2).map((of, k) => ({ of, sd: (k === 0 ? spread.diameterMm : spread.pitch) / Z95 }))
    : columns.map((of) => ({ of, sd: of.priorHalf / Z95 }));
  const noise = new Map(
    slots.map(({ of }) => {
      const inside = coils.flatMap((coil) => {
        const list = off(coil).filter((_, i) => coil.readings[i]!.slot.of === of);
        const middle = list.length === 0 ? 0 : median(list);
        return list.map((value) => value - middle);
      });
      return [of, enough ? Math.max(byMedian(inside), NOISE[of] / 3) : NOISE[of]] as const;
    }),
  );
  return coils.filter((coil) => {
    const values = off(coil);
    const rest = coil.readings.map(({ slot }, i) => ({ slot, value: values[i]!, sd: noise.get(slot.of)! }));
    const found = miscountOf(model, rest, own);
    if (found === null) return true;
    const text = SYSTEMATIC.leftOut.step(found.turns, found.tap === 1 ? null : found.tap - 1, found.tap);
    leftOut.push({ serial: coil.serial, line: null, why: 'turns', text });
    return false;
  });
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
