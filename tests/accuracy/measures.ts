/** For every case of the ledger, a function that works out the errors of all its values. */
export type Measures = Readonly<Record<string, () => number[]>>;

/** Relative error of a value. */
export const off = (value: number, truth: number): number => value / truth - 1;

/** `count` values from `low` to `high`, evenly spaced by ratio. */
export function spread(low: number, high: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) => low * (high / low) ** (i / (count - 1)));
}
