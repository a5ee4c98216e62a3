import { describe, expect, test } from 'vitest';
import { chancePercent, controlOf, RUN_LENGTH } from '../../src/prove/control.ts';
import { RANGE_CONSTANTS, rangeConstants } from '../../src/prove/range-constants.ts';
import { FLOW_RATES } from '../published/charts.ts';
import { normals, percentOf, sample } from './normal.ts';

const STEP = 0.025;
const END = 7;

/** The normal distribution function on a grid from -END to END, by the trapezium rule on its density. */
function distribution(): number[] {
  const density = (x: number) => Math.exp((-x * x) / 2) / Math.sqrt(2 * Math.PI);
  const grid = [0];
  for (let i = 1; i <= (2 * END) / STEP; i++) {
    const x = -END + i * STEP;
    grid.push(grid[i - 1]! + (STEP / 6) * (density(x - STEP) + 4 * density(x - STEP / 2) + density(x)));
  }
  return grid;
}

/** Mean and standard deviation of the range of n normal values: Tippett 1925 (Biometrika 17, 364-387), summed on the grid. */
function rangeMoments(n: number, phi: readonly number[]): { d2: number; d3: number } {
  const at = (low: number, high: number) => 1 - phi[high]! ** n - (1 - phi[low]!) ** n + (phi[high]! - phi[low]!) ** n;
  let [mean, square] = [0, 0];
  for (let low = 0; low < phi.length; low++) {
    mean += (1 - phi[low]! ** n - (1 - phi[low]!) ** n) * STEP;
    // The square of the range is twice the integral over all pairs x < y.
    for (let high = low; high < phi.length; high++)
      square += 2 * at(low, high) * STEP * STEP * (high === low ? 0.5 : 1);
  }
  return { d2: mean, d3: Math.sqrt(square - mean * mean) };
}

describe('constants of the range', () => {
  test('every figure of the table is the integral of the range, to half of its last digit', () => {
    const phi = distribution();
    let checked = 0;
    for (const { n, d2, d3, D3, D4 } of RANGE_CONSTANTS) {
      const found = rangeMoments(n, phi);
      // Half a digit of the table and 0.0001 for the sums on the grid.
      const half = 0.0006;
      expect(Math.abs(found.d2 - d2)).toBeLessThan(half);
      expect(Math.abs(found.d3 - d3)).toBeLessThan(half);
      expect(Math.abs(Math.max(0, 1 - (3 * found.d3) / found.d2) - D3)).toBeLessThan(half);
      expect(Math.abs(1 + (3 * found.d3) / found.d2 - D4)).toBeLessThan(half);
      checked += 4;
    }
    console.log(`constants of the range checked: ${checked}`);
    expect(checked).toBe(36);
    expect(() => rangeConstants(11)).toThrow(RangeError);
  });
});

describe('individuals and moving ranges', () => {
  test('the worked example, to its last digit', () => {
    const { centre, rangeCentre, lower, upper, inControl, beyond } = controlOf(FLOW_RATES.values);
    expect(centre).toBeCloseTo(FLOW_RATES.centre, 9);
    expect(Math.abs(rangeCentre - FLOW_RATES.rangeCentre)).toBeLessThan(5e-5);
    // It works with a mean range of four decimals: 2.66 times half of the last.
    expect(Math.abs(lower - FLOW_RATES.lower)).toBeLessThan(2e-4);
    expect(Math.abs(upper - FLOW_RATES.upper)).toBeLessThan(2e-4);
    expect([inControl, beyond.includes(true)]).toEqual([true, false]);
  });

  test('one value far off is a sign with both its ranges, and the only one', () => {
    const values = Array.from({ length: 30 }, (_, i) => (i === 17 ? 9 : [0, 1, 0.4, -0.7, 0.2][i % 5]!));
    const control = controlOf(values);
    expect(control.beyond.flatMap((one, i) => (one ? [i] : []))).toEqual([17]);
    expect(control.rangeBeyond.flatMap((one, i) => (one ? [i] : []))).toEqual([17, 18]);
    expect(control.inControl).toBe(false);
  });

  test(`${RUN_LENGTH} on one side are a run, one fewer is none, one on the line parts it`, () => {
    const sides = (count: number) => [
      ...Array.from({ length: count }, () => 1),
      ...Array.from({ length: count }, (_, i) => (i % 2 === 0 ? -2 : 0)),
    ];
    for (const [count, marked] of [
      [RUN_LENGTH, RUN_LENGTH],
      [RUN_LENGTH - 1, 0],
    ] as const)
      expect(
        controlOf([...sides(count), ...sides(count).reverse()])
          .run.slice(0, count)
          .filter(Boolean).length,
      ).toBe(marked);
    const parted = [1, 1, 1, 1, 0, 1, 1, 1, 1, -1, -1, -1, -1, -1, -1, -1, -1];
    expect(controlOf(parted).centre).toBe(0);
    expect(controlOf(parted).run.indexOf(true)).toBe(9);
  });

  test('values that are all the same are in control', () => {
    const { lower, upper, inControl } = controlOf(Array.from({ length: 40 }, () => 0.1 + 0.2));
    expect(upper - lower).toBeLessThan(1e-12);
    expect(inControl).toBe(true);
    expect(() => controlOf([1])).toThrow(RangeError);
  });

  test('signs by chance are as often as stated', () => {
    const next = normals(7);
    let runs = 0;
    for (const count of [8, 25, 60, 200]) {
      const found = percentOf(2000, () => !controlOf(sample(count, next)).inControl);
      // The formula's own 2.5, and two standard deviations of 2,000 charts.
      expect(Math.abs(found - chancePercent(count))).toBeLessThan(2.5 + 2.3);
      runs += 2000;
    }
    console.log(`charts of steady values simulated: ${runs}`);
    expect(runs).toBe(8000);
  });
});
