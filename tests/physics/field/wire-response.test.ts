import { expect, test } from 'vitest';
import { wireResponse } from '../../../src/physics/field/field.ts';
import { accuracy, off, spread } from '../../published/accuracy.ts';
import { exactWire } from './bessel.ts';

const MU0 = 4e-7 * Math.PI;
const RHO = 1.7241e-8;

test('Bessel ratios against series and integrals', () => {
  const errors: number[] = [];
  for (const ratio of spread(0.01, 150, 60)) {
    const radius = ratio * Math.sqrt(RHO / (Math.PI * 1e6 * MU0));
    const wire = wireResponse(radius, 1e6, RHO, 7);
    const exact = exactWire(radius, 1e6, RHO);
    for (let m = 1; m <= 7; m++) {
      const c = exact.answer(m);
      errors.push(Math.hypot(wire.re[m - 1]! - c[0], wire.im[m - 1]! - c[1]) / Math.hypot(...c));
    }
    const own = Math.hypot(wire.resistance - exact.own[0], wire.inductance * 2e6 * Math.PI - exact.own[1]);
    errors.push(own / Math.hypot(...exact.own));
  }
  // Rounding of the references, whose integrals sum some thousand terms.
  accuracy('wire response, series and integrals (relative)', errors, 1e-12);
});

test('direct current, low and high frequency', () => {
  const direct = wireResponse(5e-4, 0, RHO, 3);
  expect(off(direct.resistance, RHO / (Math.PI * 25e-8))).toBeCloseTo(0, 14);
  expect(off(direct.inductance, MU0 / (8 * Math.PI))).toBeCloseTo(0, 14);
  expect([...direct.re, ...direct.im].every((c) => c === 0)).toBe(true);
  const low = wireResponse(5e-4, 1, RHO, 2);
  // The next term is of the order (a/delta)^2, 1e-4 here, and falls into the real part.
  expect(off(low.im[0]!, (-2 * Math.PI * MU0 * 25e-8) / (8 * RHO))).toBeCloseTo(0, 7);
  expect(off(low.inductance, direct.inductance)).toBeCloseTo(0, 7);
  const high = wireResponse(1.5e-3, 1e12, RHO, 9);
  // 1 - m delta/a in each part, delta = 66 nm.
  for (let m = 0; m < 9; m++) expect(Math.hypot(high.re[m]! + 1, high.im[m]!)).toBeLessThan(1e-3);
  // The third quadrant, on which the root of C relies.
  for (const f of spread(1, 1e11, 60)) {
    const { re, im } = wireResponse(2e-4, f, RHO, 4);
    for (let m = 0; m < 4; m++) {
      expect(re[m]).toBeLessThan(0);
      expect(im[m]).toBeLessThan(0);
    }
  }
});

test('refuses what is no wire', () => {
  expect(() => wireResponse(0, 1, RHO, 1)).toThrow(/wireRadius/);
  expect(() => wireResponse(1, -1, RHO, 1)).toThrow(/frequency/);
  expect(() => wireResponse(1, 1, Number.NaN, 1)).toThrow(/resistivity/);
  expect(() => wireResponse(1, 1, RHO, 0)).toThrow(/order/);
});
