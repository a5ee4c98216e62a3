/**
 * Constants of the range chart for samples of n normal values: the mean d2 and the standard deviation d3 of their range over the
 * standard deviation of a value, and the factors D3 and D4 from the mean range to its limits, max(0, 1 - 3 d3/d2) and 1 + 3 d3/d2.
 *
 * Source: tables of ISO 7870-2:2013 and ASTM E2587, from memory. Every figure agrees with the integrals of the range's
 * distribution to half of its last digit (tests/prove/control.test.ts).
 */
export interface RangeConstants {
  readonly n: number;
  readonly d2: number;
  readonly d3: number;
  readonly D3: number;
  readonly D4: number;
}

export const RANGE_CONSTANTS: readonly RangeConstants[] = [
  { n: 2, d2: 1.128, d3: 0.853, D3: 0, D4: 3.267 },
  { n: 3, d2: 1.693, d3: 0.888, D3: 0, D4: 2.575 },
  { n: 4, d2: 2.059, d3: 0.88, D3: 0, D4: 2.282 },
  { n: 5, d2: 2.326, d3: 0.864, D3: 0, D4: 2.114 },
  { n: 6, d2: 2.534, d3: 0.848, D3: 0, D4: 2.004 },
  { n: 7, d2: 2.704, d3: 0.833, D3: 0.076, D4: 1.924 },
  { n: 8, d2: 2.847, d3: 0.82, D3: 0.136, D4: 1.864 },
  { n: 9, d2: 2.97, d3: 0.808, D3: 0.184, D4: 1.816 },
  { n: 10, d2: 3.078, d3: 0.797, D3: 0.223, D4: 1.777 },
];

/** Of samples of so many values. @throws RangeError where the table has none */
export function rangeConstants(n: number): RangeConstants {
  const found = RANGE_CONSTANTS.find((one) => one.n === n);
  if (found === undefined) throw new RangeError(`no constants of the range for samples of ${n}`);
  return found;
}
