/** A logarithmic axis: places of values, and the round values to write on it. */

export interface LogAxis {
  readonly low: number;
  readonly high: number;
  readonly lengthMm: number;
}

/** Millimetres from the low end; values outside run on. */
export const placeOn = ({ low, high, lengthMm }: LogAxis, value: number): number =>
  (lengthMm * Math.log(value / low)) / Math.log(high / low);

/** Leading digits in the order in which they are written while there is room. */
const LEADING: readonly (readonly number[])[] = [[1], [2, 5], [3, 7], [4, 6, 8, 9], [1.5, 2.5]];

/** Every value from 1 to 9 times a power of ten within the ends. */
export function ticksOf({ low, high }: LogAxis): number[] {
  const ticks: number[] = [];
  for (let power = Math.floor(Math.log10(low)); power <= Math.log10(high) + 1; power++)
    for (let digit = 1; digit <= 9; digit++) {
      const value = Number(`${digit}e${power}`);
      if (value >= low * (1 - 1e-9) && value <= high * (1 + 1e-9)) ticks.push(value);
    }
  return ticks;
}

/**
 * The values to write, roundest first, so that none comes nearer to another than its text allows. `at` places a value, `width` is
 * that of its text; both millimetres.
 */
export function written(
  ends: { readonly low: number; readonly high: number },
  at: (value: number) => number,
  width: (value: number) => number,
  apartMm: number,
): number[] {
  const chosen: number[] = [];
  const powers = [Math.floor(Math.log10(ends.low)), Math.ceil(Math.log10(ends.high))] as const;
  for (const digits of LEADING) {
    for (let power = powers[0]; power <= powers[1]; power++)
      for (const digit of digits) {
        const value = Number((digit * 10 ** power).toPrecision(4));
        if (value < ends.low * (1 - 1e-9) || value > ends.high * (1 + 1e-9) || chosen.includes(value)) continue;
        const free = chosen.every(
          (other) => Math.abs(at(other) - at(value)) >= (width(other) + width(value)) / 2 + apartMm,
        );
        if (free) chosen.push(value);
      }
    // Halves only where hardly anything else stands.
    if (digits.includes(4) && chosen.length >= 3) break;
  }
  return chosen.sort((a, b) => a - b);
}
