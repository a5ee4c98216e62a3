import { describe, expect, test } from 'vitest';
import { CAPABLE_FROM, capabilityOf } from '../../src/prove/capability.ts';
import { normals, sample } from './normal.ts';

const LIMITS = { low: -3, high: 4 };

describe('capability', () => {
  test('of a plain sample, by hand', () => {
    // Mean 0.5 and 13 values 2 above and below it: s² = 26 · 4/25.
    const values = Array.from({ length: 26 }, (_, i) => (i % 2 === 0 ? 2.5 : -1.5));
    const found = capabilityOf(values, { low: -6, high: 8 }, true);
    const s = Math.sqrt((26 * 4) / 25);
    if (typeof found === 'string') throw new Error(found);
    expect(found.cp).toBeCloseTo(14 / (6 * s), 5);
    expect(found.cpk).toBeCloseTo(6.5 / (3 * s), 5);
    expect(found.coils).toBe(26);
  });

  test('why there is none', () => {
    const next = normals(3);
    const many = sample(CAPABLE_FROM, next);
    expect(capabilityOf(many.slice(1), LIMITS, true)).toBe('few coils');
    expect(capabilityOf(many, LIMITS, false)).toBe('not in control');
    expect(capabilityOf(many, null, true)).toBe('no limits');
    expect(capabilityOf(Array(30).fill(1.1), LIMITS, true)).toBe('no spread');
  });

  test('limits hold the true figures in 95 of 100 samples of the least count', () => {
    const next = normals(5);
    const runs = 4000;
    let [cp, cpk] = [0, 0];
    for (let i = 0; i < runs; i++) {
      const found = capabilityOf(sample(CAPABLE_FROM, next), LIMITS, true);
      if (typeof found === 'string') continue;
      // Mean 0, deviation 1: 7/6 and 3/3.
      if (found.cpLow <= 7 / 6 && found.cpHigh >= 7 / 6) cp++;
      if (found.cpkLow <= 1 && found.cpkHigh >= 1) cpk++;
    }
    console.log(`limits of Cp and Cpk hold in ${(100 * cp) / runs} and ${(100 * cpk) / runs} % of ${runs}`);
    // Both are approximations; one standard deviation of 4,000 samples is 0.3 %.
    expect(Math.abs((100 * cp) / runs - 95)).toBeLessThan(1.5);
    expect(Math.abs((100 * cpk) / runs - 95)).toBeLessThan(1.5);
  });
});
