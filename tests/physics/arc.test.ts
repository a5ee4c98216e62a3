import { expect, test } from 'vitest';
import { arcOwnShare } from '../../src/physics/rings.ts';
import { accuracy, spread } from '../published/accuracy.ts';

const FRACTIONS = [0.02, 0.1, 0.25, 0.4, 0.5, 0.6, 0.8, 0.97];
const THICKNESS = [1 / 2000, 1 / 500, 1 / 100, 1 / 50, 1 / 20, 1 / 5];

/** The double integral over the arc, straight from its definition, by the midpoint rule in a variable that follows the peak. */
function integral(angle: number, epsilon: number): number {
  const end = Math.asinh(angle / epsilon);
  const points = 20000;
  let sum = 0;
  for (let i = 0; i < points; i++) {
    const s = (end * (i + 0.5)) / points;
    const t = epsilon * Math.sinh(s);
    const weight = (angle - t) * Math.cos(t) * epsilon * Math.cosh(s);
    sum += weight / Math.sqrt(4 * Math.sin(t / 2) ** 2 + epsilon * epsilon);
  }
  return (sum * end) / points;
}

/** The same over the whole ring, where the integrand peaks at both ends: twice half of it, and the weight averages to pi. */
function wholeRing(epsilon: number): number {
  const end = Math.asinh(Math.PI / epsilon);
  const points = 20000;
  let sum = 0;
  for (let i = 0; i < points; i++) {
    const s = (end * (i + 0.5)) / points;
    const t = epsilon * Math.sinh(s);
    sum += (Math.cos(t) * epsilon * Math.cosh(s)) / Math.sqrt(4 * Math.sin(t / 2) ** 2 + epsilon * epsilon);
  }
  return (2 * Math.PI * sum * end) / points;
}

test('share of an arc against its double integral', () => {
  const errors = THICKNESS.flatMap((a) => {
    const epsilon = a * Math.exp(-0.25);
    const whole = wholeRing(epsilon);
    return FRACTIONS.filter((f) => f <= 0.6).map(
      (f) => arcOwnShare(f, 1, a) - integral(2 * Math.PI * f, epsilon) / whole,
    );
  });
  // The midpoint rule is the weaker side, 2e-9 at 20000 points.
  accuracy('own inductance of an arc, its double integral (absolute)', errors, 1e-8);
});

test('nothing at 0, all at 1, and never below the square', () => {
  for (const a of THICKNESS) {
    expect(arcOwnShare(0, 0.04, 0.04 * a)).toBe(0);
    expect(arcOwnShare(1, 0.04, 0.04 * a)).toBe(1);
    // Above the fraction by a few per cent near the middle: the far side of a ring opposes the near one, a half ring has no far side.
    const above = a <= 0.05 ? 1.04 : 1.085;
    for (let i = 1; i < 200; i++) {
      const f = i / 200;
      const share = arcOwnShare(f, 0.04, 0.04 * a);
      expect(share).toBeGreaterThan(f * f);
      expect(share).toBeLessThan(above * f);
      if (f < 0.25 || f > 0.75) expect(share).toBeLessThan(f);
    }
  }
});

test('continuous and rising', () => {
  for (const a of THICKNESS) {
    let before = 0;
    for (let i = 1; i <= 500; i++) {
      const share = arcOwnShare(i / 500, 0.04, 0.04 * a);
      expect(share).toBeGreaterThan(before);
      // Slope below 2.2: it is 2 at the whole turn and about 1 elsewhere.
      expect(share - before).toBeLessThan(2.2 / 500);
      before = share;
    }
    // Across the half turn, where the two ways of computing meet.
    expect(arcOwnShare(0.5 + 1e-9, 0.04, 0.04 * a) - arcOwnShare(0.5, 0.04, 0.04 * a)).toBeCloseTo(0, 8);
  }
});

test('size does not matter, only thickness', () => {
  for (const scale of spread(1e-3, 10, 9)) {
    expect(arcOwnShare(0.3, scale, scale / 150)).toBeCloseTo(arcOwnShare(0.3, 1, 1 / 150), 13);
  }
});

test('asks for a fraction of one turn', () => {
  for (const f of [-0.1, 1.1, Number.NaN]) expect(() => arcOwnShare(f, 0.04, 1e-4)).toThrow(RangeError);
  expect(() => arcOwnShare(0.5, 0.04, 0)).toThrow(RangeError);
});
