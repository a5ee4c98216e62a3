/** Laws of wire aerials against charges solved in pieces, by images, and against the open line. */
import { describe, expect, test } from 'vitest';
import {
  horizontalWireCapacitance,
  quarterWave,
  verticalWireCapacitance,
  wireAerialInductance,
} from '../../src/physics/aerial.ts';

const EPSILON0 = 8.8541878188e-12;
const LIGHT = 299_792_458;

/** Integral of 1/r over a piece from -half to half of a line, seen from `along` on it and `beside` it. */
const piece = (along: number, beside: number, half: number): number =>
  Math.asinh((along + half) / beside) - Math.asinh((along - half) / beside);

/** The solution of A x = 1 by elimination with pivots, summed. */
function sumOfSolution(rows: number[][]): number {
  const n = rows.length;
  const A = rows.map((row) => [...row, 1]);
  for (let c = 0; c < n; c++) {
    let best = c;
    for (let r = c; r < n; r++) if (Math.abs(A[r]![c]!) > Math.abs(A[best]![c]!)) best = r;
    [A[c], A[best]] = [A[best]!, A[c]!];
    for (let r = c + 1; r < n; r++) {
      const factor = A[r]![c]! / A[c]![c]!;
      for (let k = c; k <= n; k++) A[r]![k]! -= factor * A[c]![k]!;
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let r = n - 1; r >= 0; r--) {
    let value = A[r]![n]!;
    for (let k = r + 1; k < n; k++) value -= A[r]![k]! * x[k]!;
    x[r] = value / A[r]![r]!;
  }
  return x.reduce((sum, each) => sum + each, 0);
}

/** Wire in pieces that get shorter towards both ends, each with its own even charge, one potential at all their middles; earth as an image. */
function inPieces(upright: boolean, length: number, height: number, diameter: number, pieces = 60): number {
  const edges = Array.from({ length: pieces + 1 }, (_, i) => (length * (1 - Math.cos((Math.PI * i) / pieces))) / 2);
  const middles = edges.slice(1).map((to, i) => (to + edges[i]!) / 2);
  const halves = edges.slice(1).map((to, i) => (to - edges[i]!) / 2);
  const radius = diameter / 2;
  const rows = middles.map((x) =>
    middles.map((y, j) => {
      const own = piece(x - y, radius, halves[j]!);
      const image = upright ? piece(x + y + 2 * height, radius, halves[j]!) : piece(x - y, 2 * height, halves[j]!);
      // Charge of a piece is its density times its length: the density is what is solved for.
      return (own - image) / (4 * Math.PI * EPSILON0 * 2 * halves[j]!);
    }),
  );
  return sumOfSolution(rows);
}

const THICK = [0.0004, 0.002, 0.006];

describe('capacitance of wire aerials', () => {
  test('horizontal: 0 to 1 % below charges in pieces', () => {
    let ran = 0;
    let [low, high] = [Infinity, -Infinity];
    for (const length of [3, 8, 20, 50, 100])
      for (const height of [1, 3, 10, 30])
        for (const diameter of THICK) {
          const off =
            horizontalWireCapacitance(length, height, diameter) / inPieces(false, length, height, diameter) - 1;
          [low, high] = [Math.min(low, off), Math.max(high, off)];
          ran++;
        }
    console.log(`horizontal wires: ${ran}, ${(100 * low).toFixed(2)} to ${(100 * high).toFixed(2)} %`);
    expect(ran).toBe(60);
    // An even charge has the greater energy, so the formula is never above the truth; pieces leave 0.1 %.
    expect(high).toBeLessThan(1e-3);
    expect(low).toBeGreaterThan(-0.01);
  });

  test('vertical: 0 to 1.5 % below charges in pieces', () => {
    let ran = 0;
    let [low, high] = [Infinity, -Infinity];
    for (const length of [2, 5, 10, 25, 50])
      for (const height of [0.2, 0.5, 1, 3, 10])
        for (const diameter of THICK) {
          const off = verticalWireCapacitance(length, height, diameter) / inPieces(true, length, height, diameter) - 1;
          [low, high] = [Math.min(low, off), Math.max(high, off)];
          ran++;
        }
    console.log(`vertical wires: ${ran}, ${(100 * low).toFixed(2)} to ${(100 * high).toFixed(2)} %`);
    expect(ran).toBe(75);
    expect(high).toBeLessThan(1e-3);
    expect(low).toBeGreaterThan(-0.015);
  });

  test('the pieces are enough: twice as many change nothing that counts', () => {
    for (const upright of [false, true]) {
      const change = inPieces(upright, 20, 3, 0.002, 120) / inPieces(upright, 20, 3, 0.002) - 1;
      expect(Math.abs(change)).toBeLessThan(1e-3);
    }
  });

  test('limits: an endless wire over ground, far from ground, and a wire standing on it', () => {
    // Per metre 2 pi epsilon0 / ln(4 h/d), exact for thin wire (Maxwell's images).
    const endless = (2 * Math.PI * EPSILON0) / Math.log((4 * 5) / 0.002);
    expect(Math.abs(horizontalWireCapacitance(1e5, 5, 0.002) / 1e5 / endless - 1)).toBeLessThan(1e-4);
    // Far from ground both ways of hanging are one.
    const [flat, up] = [horizontalWireCapacitance(10, 1e6, 0.002), verticalWireCapacitance(10, 1e6, 0.002)];
    expect(Math.abs(flat / up - 1)).toBeLessThan(1e-5);
    // Standing on it: 2 pi epsilon0 l/(ln(l/a) - 1), the usual short form.
    const standing = (2 * Math.PI * EPSILON0 * 10) / (Math.log(10 / 0.001) - 1);
    expect(Math.abs(verticalWireCapacitance(10, 0, 0.002) / standing - 1)).toBeLessThan(1e-3);
  });

  test('no numbers outside the domain', () => {
    for (const bad of [0, -1, Number.NaN, Infinity]) {
      expect(() => horizontalWireCapacitance(bad, 5, 0.002)).toThrow(RangeError);
      expect(() => horizontalWireCapacitance(10, bad, 0.002)).toThrow(RangeError);
      expect(() => verticalWireCapacitance(bad, 5, 0.002)).toThrow(RangeError);
      expect(() => wireAerialInductance(10, bad)).toThrow(RangeError);
    }
    expect(() => horizontalWireCapacitance(10, 0.01, 0.002)).toThrow('no thin wire');
    expect(() => verticalWireCapacitance(10, -1, 0.002)).toThrow(RangeError);
  });
});

test('series inductance: the reactance of the open line to 1.2 % at 0.4 and 5 % at 0.6 of the quarter wave', () => {
  let ran = 0;
  for (const length of [5, 20, 60]) {
    const capacitance = horizontalWireCapacitance(length, 8, 0.002);
    const inductance = wireAerialInductance(length, capacitance);
    const Z0 = length / (LIGHT * capacitance);
    for (const [share, most] of [
      [0.2, 0.001],
      [0.4, 0.012],
      [0.6, 0.05],
    ] as const) {
      const omega = 2 * Math.PI * share * quarterWave(length);
      const lumped = omega * inductance - 1 / (omega * capacitance);
      const line = -Z0 / Math.tan((omega * length) / LIGHT);
      expect(Math.abs(lumped / line - 1)).toBeLessThan(most);
      ran++;
    }
    const own = 1 / (2 * Math.PI * Math.sqrt(inductance * capacitance));
    expect(own / quarterWave(length)).toBeCloseTo((2 * Math.sqrt(3)) / Math.PI, 9);
  }
  expect(ran).toBe(9);
});
