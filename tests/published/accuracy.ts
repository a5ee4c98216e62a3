import { expect } from 'vitest';

/**
 * One line of the accuracy ledger: prints "check, cases, largest error, bound" and holds the largest error to the bound.
 * A check that ran on nothing is red, and so is one whose bound is a hundred times what is needed: it would watch nothing. Bounds
 * below 1e-12 are mere rounding, of which less is no news.
 */
export function accuracy(check: string, errors: readonly number[], bound: number): void {
  const largest = errors.reduce((worst, error) => Math.max(worst, Math.abs(error)), 0);
  console.log(`accuracy: ${check}, ${errors.length} cases, largest error ${largest.toExponential(2)}, bound ${bound}`);
  expect(errors.length, `${check}: no cases`).toBeGreaterThan(0);
  expect(errors.every(Number.isFinite), `${check}: an error is not a number`).toBe(true);
  expect(largest, `${check}: largest error`).toBeLessThanOrEqual(bound);
  if (bound > 1e-12) expect(largest, `${check}: the bound can be tightened`).toBeGreaterThanOrEqual(bound / 100);
}

/** Relative error of a value. */
export const off = (value: number, truth: number): number => value / truth - 1;

/** `count` values from `low` to `high`, evenly spaced by ratio. */
export function spread(low: number, high: number, count: number): number[] {
  return Array.from({ length: count }, (_, i) => low * (high / low) ** (i / (count - 1)));
}
