/** An upright axis of values in even steps: places, and the round values to write on it. */
import { fixed } from '../quantity/decimals.ts';

export interface ValueAxis {
  readonly low: number;
  readonly high: number;
  readonly fromMm: number;
  readonly toMm: number;
}

/** Height of a value; values outside run on. */
export const heightOf = ({ low, high, fromMm, toMm }: ValueAxis, value: number): number =>
  fromMm + ((value - low) / (high - low)) * (toMm - fromMm);

/** Round values at least so far apart, and the decimals that tell them. */
export function roundValues(axis: ValueAxis, apartMm: number): { readonly values: number[]; readonly digits: number } {
  const { low, high, fromMm, toMm } = axis;
  const least = ((high - low) * apartMm) / (toMm - fromMm);
  const power = Math.floor(Math.log10(least));
  const factor = [1, 2, 5, 10].find((one) => one * 10 ** power >= least * (1 - 1e-9)) ?? 10;
  const step = factor * 10 ** power;
  const digits = Math.max(0, factor === 10 ? -power - 1 : -power);
  const values: number[] = [];
  for (let k = Math.ceil(low / step - 1e-9); k * step <= high + 1e-9 * step; k++)
    values.push(Number(fixed(k * step, digits)));
  return { values, digits };
}
