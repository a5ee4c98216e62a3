/**
 * Coils that are left out before anything is fitted, by what stands in the middle of all coils: those that were wound whole turns off,
 * and those that are coils of their own. See the rules in `systematic-left-out.ts`.
 */
import { SYSTEMATIC } from '../../templates/wording/systematic.ts';
import { cholesky, dot, type Matrix, solveWith, zeros } from '../match/linear.ts';
import { chanceOfChiSquare } from './chance.ts';
import { type Column, columnsOf, NOISE, Slopes, Z95 } from './systematic-columns.ts';
import type { FittedCoil } from './systematic-fit.ts';
import type { LeftOut } from './systematic-left-out.ts';
import { AS_PLANNED, deviationOf, type KindModel, type Slot } from './systematic-model.ts';

const LEAST_TURN = 0.6;
const MOST_TURNS = 3;
/** A count is whole within this. */
const WHOLE = 0.35;
const STEP_SIGMAS = 5;
/** A coil is one of its own when its readings, but for any one of them, would come about by chance as rarely as this, and lie so many sigmas off. */
const STRANGE = 1e-6;
const STRANGE_SIGMAS = 2;
/** A median tells what coils have in common from so many on. */
const LEAST_FOR_MEDIAN = 3;

const median = (list: readonly number[]): number => {
  const sorted = [...list].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
};
/** Standard deviation by the median distance, for a normal distribution. */
const byMedian = (list: readonly number[]) => 1.4826 * median(list.map((value) => Math.abs(value)));

/** What a turn more before a tap does to a slot. */
export function perTurn(model: KindModel, slot: Slot): number {
  if (slot.perLn !== 0) return slot.perLn * model.perTurn(slot);
  return slot.of === 'length' ? model.coil.shape.pitchMm : 0;
}

/** What a reading of a coil lies off the middle of all. */
interface Rest {
  readonly slot: Slot;
  readonly value: number;
  readonly sd: number;
}

/** Of what tells a coil apart from others, its own and of reading. */
function covarianceOf(rest: readonly Rest[], columns: readonly { readonly of: Column; readonly sd: number }[]): Matrix {
  const v = zeros(rest.length, rest.length);
  const gradients = columns.map(({ of }) => rest.map(({ slot }) => of.per(slot)));
  rest.forEach(({ sd: noise }, i) => {
    rest.forEach((_, j) => {
      v[i]![j] = columns.reduce(
        (sum, { sd }, k) => sum + sd ** 2 * gradients[k]![i]! * gradients[k]![j]!,
        i === j ? noise ** 2 : 0,
      );
    });
  });
  return v;
}

const valuesOf = (rest: readonly Rest[]) => Float64Array.from(rest, ({ value }) => value);

interface Miscount {
  readonly turns: number;
  readonly tap: number;
  readonly sigmas: number;
}

/** The step that explains a coil's residuals best, where it is one of whole turns. */
function miscountOf(model: KindModel, rest: readonly Rest[], lower: Matrix): Miscount | null {
  const weighed = solveWith(lower, valuesOf(rest));
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

/** Whether a coil's readings, leaving out the one that says most for it, are none of these coils'. */
function isStranger(rest: readonly Rest[], lower: Matrix): boolean {
  const values = valuesOf(rest);
  const weighed = solveWith(lower, values);
  const chiSquare = dot(values, weighed);
  const n = rest.length;
  // Without reading j chi-square falls by w_j^2 over the j-th element of the inverse.
  const falls = rest.map((_, j) => {
    const unit = new Float64Array(n);
    unit[j] = 1;
    return weighed[j]! ** 2 / solveWith(lower, unit)[j]!;
  });
  const least = chiSquare - Math.max(...falls);
  return n > 1 && least > STRANGE_SIGMAS ** 2 * n && chanceOfChiSquare(least, n - 1) < STRANGE;
}

/** Without the coils that were wound a turn off, and those that are coils of their own. */
export function withoutStrangers(model: KindModel, coils: readonly FittedCoil[], leftOut: LeftOut[]): FittedCoil[] {
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
    [...new Set(slots.map(({ of }) => of))].map((of) => {
      const inside = coils.flatMap((coil) => {
        const list = off(coil).filter((_, i) => coil.readings[i]!.slot.of === of);
        if (list.length < LEAST_FOR_MEDIAN) return [];
        const middle = median(list);
        return list.map((value) => value - middle);
      });
      const known = enough && inside.length > 0;
      return [of, known ? Math.max(byMedian(inside), NOISE[of] / 3) : NOISE[of]] as const;
    }),
  );
  return coils.filter((coil) => {
    const values = off(coil);
    const rest = coil.readings.map(({ slot }, i) => ({ slot, value: values[i]!, sd: noise.get(slot.of)! }));
    const lower = cholesky(covarianceOf(rest, own));
    if (lower === null) return true;
    const found = miscountOf(model, rest, lower);
    if (found === null && !isStranger(rest, lower)) return true;
    const { serial } = coil;
    if (found === null) leftOut.push({ serial, line: null, why: 'far', text: SYSTEMATIC.leftOut.coil });
    else {
      const text = SYSTEMATIC.leftOut.step(found.turns, found.tap === 1 ? null : found.tap - 1, found.tap);
      leftOut.push({ serial, line: null, why: 'turns', text });
    }
    return false;
  });
}
