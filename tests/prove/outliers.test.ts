import { describe, expect, test } from 'vitest';
import { LEAST_VALUES, outliersIn, suspectedAmong } from '../../src/prove/outliers.ts';
import { ROSNER } from '../published/charts.ts';
import { normals, percentOf, sample } from './normal.ts';

describe('outliers', () => {
  test('the published example: deviates, critical values and outliers, to their last digit', () => {
    const { steps, outliers } = outliersIn(ROSNER.values, ROSNER.suspected);
    // The print cuts digits off rather than rounds.
    ROSNER.steps.forEach(({ deviate, critical }, i) => {
      expect(Math.abs(steps[i]!.deviate - deviate)).toBeLessThan(1e-3);
      expect(Math.abs(steps[i]!.critical - critical)).toBeLessThan(1e-3);
    });
    expect(steps.length).toBe(ROSNER.suspected);
    expect(outliers.map((i) => ROSNER.values[i])).toEqual(ROSNER.outliers);
  });

  test('false alarms at 5 %: among values of one normal distribution', () => {
    const next = normals(11);
    const rates = [8, 12, 20, 30, 60, 100].map((count) => [
      count,
      percentOf(2000, () => outliersIn(sample(count, next), suspectedAmong(count)).outliers.length > 0),
    ]);
    console.log(`false alarms, count and percent of 2,000: ${rates.map((each) => each.join(' ')).join(', ')}`);
    // 5 %, up to 1 % more where several are suspected among few, and three standard deviations of 2,000 samples.
    for (const [, rate] of rates) {
      expect(rate).toBeGreaterThan(3.5);
      expect(rate).toBeLessThan(7.6);
    }
    expect(rates.length).toBe(6);
  });

  test('outliers that hide one another are found, where several are suspected', () => {
    const next = normals(13);
    let found = 0;
    for (let i = 0; i < 200; i++) {
      const values = sample(30, next);
      values[4] = 7;
      values[20] = 7.2;
      const { outliers } = outliersIn(values, suspectedAmong(30));
      if (outliers.includes(4) && outliers.includes(20)) found++;
    }
    console.log(`pairs of hidden outliers found: ${found} of 200`);
    expect(found).toBeGreaterThan(190);
  });

  test('values without spread have none; too few are refused', () => {
    expect(outliersIn(Array(20).fill(0.3), 2).outliers).toEqual([]);
    expect(suspectedAmong(LEAST_VALUES - 1)).toBe(0);
    expect([8, 19, 20, 54, 100, 500].map(suspectedAmong)).toEqual([1, 1, 2, 5, 10, 10]);
    expect(() => outliersIn([1, 2, 3], 1)).toThrow(RangeError);
    expect(() => outliersIn(Array(10).fill(1), 6)).toThrow(RangeError);
  });
});
