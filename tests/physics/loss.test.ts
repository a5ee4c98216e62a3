import fc from 'fast-check';
import { expect, test } from 'vitest';
import { DENSITY, dcResistance, RESISTIVITY_20C, TEMPERATURE_COEFFICIENT } from '../../src/physics/copper.ts';
import { helixLength, helixLengthOfTurns } from '../../src/physics/helix.ts';
import { type LossInput, lossEstimate, strandLossValid } from '../../src/physics/loss.ts';
import { resistanceRatio, selfCapacitance } from '../../src/physics/medhurst.ts';
import { skinDepth, skinRatio } from '../../src/physics/skin.ts';
import { off, spread } from '../published/accuracy.ts';

const SEED = 20260804;

const SOLID: LossInput = {
  turns: 100,
  meanDiameter: 0.0766,
  length: 0.06,
  pitch: 6e-4,
  wireDiameter: 5e-4,
  strands: 1,
  strandDiameter: 5e-4,
  wireLength: 24.07,
  frequency: 1e6,
};
const LITZ: LossInput = { ...SOLID, wireDiameter: 5.6e-4, strands: 20, strandDiameter: 1e-4 };

test('copper', () => {
  // NBS Circular 31: a metre of 1 mm2 has 1/58 ohm, +0.393 % per kelvin, 8.89 g/cm3.
  expect(RESISTIVITY_20C / 1e-6).toBeCloseTo(1 / 58, 5);
  expect(TEMPERATURE_COEFFICIENT).toBe(0.00393);
  expect(DENSITY).toBe(8890);
  expect(dcResistance(10, 1e-4, 20)).toBeCloseTo(dcResistance(10, 1e-4) / 20, 14);
  expect(off(dcResistance(10, 2e-4), dcResistance(10, 1e-4) / 4)).toBeCloseTo(0, 14);
  expect(() => dcResistance(1, 0)).toThrow(/diameter/);
});

test('wire of a helix: the same in one piece and turn by turn', () => {
  fc.assert(
    fc.property(fc.integer({ min: 1, max: 300 }), fc.double({ min: 0, max: 0.01, noNaN: true }), (turns, pitch) => {
      const advances = Array.from({ length: turns }, () => pitch);
      expect(off(helixLength(0.07, turns, turns * pitch), helixLengthOfTurns(0.07, advances))).toBeCloseTo(0, 12);
    }),
    { seed: SEED },
  );
  expect(helixLengthOfTurns(0.07, [])).toBe(0);
  expect(helixLength(0.07, 0, 0)).toBe(0);
  expect(() => helixLength(0.07, -1, 0)).toThrow(/turns/);
  // Uneven turns are longer than even ones of the same advance.
  expect(helixLengthOfTurns(0.07, [0, 0.02])).toBeGreaterThan(helixLength(0.07, 2, 0.02));
});

test('skin effect: 1 at low frequency, rising, without a seam, no overflow', () => {
  const at = (x: number) => skinRatio(Math.SQRT2 * x * skinDepth(1e6), 1e6);
  expect(at(1e-3)).toBeCloseTo(1, 12);
  // Kelvin's first term x^4/192; the next is of order x^8/46080.
  expect(at(0.3) - 1).toBeCloseTo(0.3 ** 4 / 192, 8);
  let before = 0.999999999;
  for (const x of spread(0.05, 1e4, 500)) {
    expect(at(x)).toBeGreaterThan(before);
    before = at(x);
  }
  // The series beyond 100 leaves out terms of order x^-4.
  expect(at(100 + 1e-9) - at(100 - 1e-9)).toBeCloseTo(0, 8);
  expect(off(at(1000), 1000 / (2 * Math.SQRT2) + 0.25)).toBeCloseTo(0, 5);
});

test('self-capacitance: one fall, one rise, and it scales with the diameter', () => {
  const values = spread(0.1, 50, 600).map((ratio) => selfCapacitance(0.05 * ratio, 0.05));
  const least = Math.min(...values);
  const lowest = values.indexOf(least);
  for (let i = 1; i < values.length; i++) {
    const step = values[i]! - values[i - 1]!;
    // The three equal points 0.8, 0.9, 1.0 are flat; rounding there is 1e-27 F.
    if (i <= lowest) expect(step).toBeLessThan(1e-26);
    else expect(step).toBeGreaterThan(-1e-26);
  }
  expect(least).toBeCloseTo(0.46 * 5e-12, 20);
  expect(off(selfCapacitance(0.1, 0.2), 2 * selfCapacitance(0.05, 0.1))).toBeCloseTo(0, 13);
});

test('resistance ratio: falls with pitch to the straight wire, no jump between entries', () => {
  for (const shape of [0, 0.3, 1, 3, 9, 50, Number.POSITIVE_INFINITY]) {
    let before = Number.POSITIVE_INFINITY;
    for (const pitch of spread(1, 100, 300)) {
      const ratio = resistanceRatio(shape, pitch);
      expect(ratio).toBeLessThanOrEqual(before);
      expect(ratio).toBeGreaterThanOrEqual(1);
      before = ratio;
    }
    expect(resistanceRatio(shape, 0.9)).toBe(resistanceRatio(shape, 1));
    expect(resistanceRatio(shape, 1e9)).toBeCloseTo(1, 8);
  }
  for (let i = 0; i < 2000; i++) {
    const [a, b] = [i / 100, (i + 1) / 100].map((shape) => resistanceRatio(shape, 1.05)) as [number, number];
    expect(Math.abs(a - b)).toBeLessThan(0.03);
  }
  expect(() => resistanceRatio(-1, 2)).toThrow(RangeError);
  expect(() => resistanceRatio(1, 0)).toThrow(RangeError);
});

test.each([
  ['solid', SOLID, dcResistance(SOLID.wireLength, SOLID.wireDiameter)],
  ['litz', LITZ, dcResistance(LITZ.wireLength, LITZ.strandDiameter, LITZ.strands)],
] as const)('loss of %s wire: direct current first, then rising with frequency', (_, coil, direct) => {
  expect(off(lossEstimate({ ...coil, frequency: 1 }).resistance, direct)).toBeCloseTo(0, 8);
  let before = 0;
  for (const frequency of spread(1e3, 1e7, 60)) {
    const { resistance, kind } = lossEstimate({ ...coil, frequency });
    expect(kind).toBe('estimate');
    expect(resistance).toBeGreaterThan(before);
    before = resistance;
  }
});

test('loss of litz: the eddy part goes as the square of frequency and the fourth power of the strand', () => {
  const eddy = (change: Partial<LossInput>) => {
    const coil = { ...LITZ, ...change };
    return lossEstimate(coil).resistance - dcResistance(coil.wireLength, coil.strandDiameter, coil.strands);
  };
  expect(off(eddy({ frequency: 2e6 }), 4 * eddy({}))).toBeCloseTo(0, 10);
  expect(off(eddy({ strandDiameter: 5e-5 }), eddy({}) / 16)).toBeCloseTo(0, 10);
  // Common practice: litz beats solid wire of its size below about 1 MHz and loses its advantage far above.
  const gain = (frequency: number) =>
    lossEstimate({ ...LITZ, strandDiameter: 5e-5, strands: 60, frequency }).resistance /
    lossEstimate({ ...SOLID, frequency }).resistance;
  expect(gain(5e5)).toBeLessThan(0.6);
  expect(gain(2e7)).toBeGreaterThan(1);
  expect(strandLossValid(5e-5, 1e6)).toBe(true);
  expect(strandLossValid(5e-5, 2e7)).toBe(false);
});
