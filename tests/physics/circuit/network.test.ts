import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type ComplexMatrix, inverseMatrix, zeroMatrix } from '../../../src/physics/circuit/complex.ts';
import { EARTH, type Network, portImpedance } from '../../../src/physics/circuit/network.ts';

const SEED = 20261202;
const network = (parts: Partial<Network>): Network => ({
  nodes: 1,
  coils: [],
  resistance: new Float64Array(0),
  inductance: new Float64Array(0),
  capacitors: [],
  conductances: [],
  ...parts,
});
const at = (matrix: ComplexMatrix, i = 0, j = 0) => ({
  re: matrix.re[i * matrix.size + j]!,
  im: matrix.im[i * matrix.size + j]!,
});

describe('networks', () => {
  test('inverse of random matrices', () => {
    let ran = 0;
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 25 }), fc.integer(), (size, seed) => {
        let state = (seed >>> 0) + 1;
        const next = () => {
          state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
          return state / 2 ** 32 - 0.5;
        };
        const matrix = zeroMatrix(size);
        for (let i = 0; i < size * size; i++) [matrix.re[i], matrix.im[i]] = [next(), next()];
        const inverse = inverseMatrix(matrix);
        let worst = 0;
        for (let i = 0; i < size; i++) {
          for (let j = 0; j < size; j++) {
            let [re, im] = [i === j ? -1 : 0, 0];
            for (let k = 0; k < size; k++) {
              const [a, b] = [at(matrix, i, k), at(inverse, k, j)];
              re += a.re * b.re - a.im * b.im;
              im += a.re * b.im + a.im * b.re;
            }
            worst = Math.max(worst, Math.hypot(re, im));
          }
        }
        // Rounding times the condition of an unlucky matrix.
        expect(worst).toBeLessThan(1e-9);
        ran++;
      }),
      { seed: SEED, numRuns: 100 },
    );
    console.log(`inverses: ${ran}`);
    expect(ran).toBe(100);
    expect(() => inverseMatrix(zeroMatrix(2))).toThrow(RangeError);
  });

  test('a coil with resistance beside a capacitor, in closed form', () => {
    let ran = 0;
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 50, noNaN: true }),
        fc.double({ min: 1e-5, max: 1e-3, noNaN: true }),
        fc.double({ min: 1e-11, max: 1e-9, noNaN: true }),
        fc.double({ min: 1e6, max: 1e7, noNaN: true }),
        (R, L, C, omega) => {
          const one = network({
            coils: [{ from: 0, to: EARTH }],
            resistance: Float64Array.of(R),
            inductance: Float64Array.of(L),
            capacitors: [{ from: 0, to: EARTH, capacitance: C }],
          });
          const got = at(portImpedance(one, omega, [0]));
          const size = R * R + (omega * L) ** 2;
          const Y = { re: R / size, im: omega * C - (omega * L) / size };
          const square = Y.re ** 2 + Y.im ** 2;
          expect(Math.abs(got.re - Y.re / square)).toBeLessThan(1e-9 * Math.hypot(got.re, got.im));
          expect(Math.abs(got.im + Y.im / square)).toBeLessThan(1e-9 * Math.hypot(got.re, got.im));
          ran++;
        },
      ),
      { seed: SEED, numRuns: 100 },
    );
    console.log(`parallel circuits in closed form: ${ran}`);
    expect(ran).toBe(100);
  });

  test('two equal coupled circuits resonate at f0/sqrt(1 +- k) (Chaffee 1916; handbook form)', () => {
    const [L, C, k] = [100e-6, 100e-12, 0.2];
    const two = network({
      nodes: 2,
      coils: [
        { from: 0, to: EARTH },
        { from: 1, to: EARTH },
      ],
      resistance: Float64Array.of(0.01, 0, 0, 0.01),
      inductance: Float64Array.of(L, k * L, k * L, L),
      capacitors: [0, 1].map((node) => ({ from: node, to: EARTH, capacitance: C })),
    });
    const size = (omega: number) => {
      const { re, im } = at(portImpedance(two, omega, [0]));
      return Math.hypot(re, im);
    };
    for (const sign of [1, -1]) {
      const wanted = 1 / Math.sqrt(L * C * (1 + sign * k));
      // With Q of 1e5 the peak is 1e-5 wide: a thousandth beside it the impedance is far lower.
      expect(size(wanted)).toBeGreaterThan(50 * size(wanted * 1.001));
      expect(size(wanted)).toBeGreaterThan(50 * size(wanted * 0.999));
    }
  });

  test('a shorted stretch takes k squared from the inductance, and ports are reciprocal', () => {
    const k = 0.5;
    const L = 100e-6;
    const shorted = network({
      nodes: 2,
      coils: [
        { from: 0, to: EARTH },
        { from: EARTH, to: EARTH },
        { from: 0, to: 1 },
      ],
      resistance: Float64Array.of(1e-9, 0, 0, 0, 1e-9, 0, 0, 0, 1e-9),
      inductance: Float64Array.of(L, k * L, 0.1 * L, k * L, L, 0, 0.1 * L, 0, L),
      conductances: [{ from: 1, to: EARTH, conductance: 1e-12 }],
    });
    const Z = portImpedance(shorted, 1e6, [0, 1]);
    // The nanoohms count 1e-11 of the reactance.
    expect(Math.abs(at(Z).im / (1e6 * L * (1 - k * k)) - 1)).toBeLessThan(1e-6);
    expect(Math.abs(at(Z, 0, 1).im - at(Z, 1, 0).im)).toBeLessThan(1e-9 * Math.abs(at(Z, 0, 1).im));
  });
});
