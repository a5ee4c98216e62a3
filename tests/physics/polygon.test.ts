import { describe, expect, test } from 'vitest';
import { equivalentDiameterMm, polygonTurn, turnLengthMm } from '../../src/physics/polygon.ts';
import { cumulativeInductance, roundTurn, type TurnShape } from '../../src/physics/rings.ts';
import { polygonMutual } from '../../src/physics/sides.ts';
import { accuracy, off, spread } from '../published/accuracy.ts';
import { type Elements, lengthOf, mutualOf, ownOf, ribbed } from './elements.ts';

const G = Math.exp(-0.25);
const CORNERS = [6, 7, 8, 10, 12, 16, 20, 24];
const evenL = (turn: TurnShape | number, turns: number, pitch: number, a: number) =>
  cumulativeInductance(
    Array.from({ length: turns }, (_, k) => k * pitch),
    turn,
    a,
  ).at(turns);

describe('two sharp polygons', () => {
  test("the sum over sides against Neumann's double sum over elements of wire", () => {
    // Middles of elements err as the square of their length: two cuts, and that term taken out. What is left is from the
    // corners, at the nearest distance.
    const at = (corners: number, x: number, cut: number) => {
      const longest = (2 * Math.sin(Math.PI / corners)) / (cut - 0.5);
      const [side, all] = [1, corners].map((sides) => ribbed(1, corners, 0, sides, 0, longest)) as [Elements, Elements];
      return mutualOf(side, all, x) * corners;
    };
    const errors = [3, 4, 6, 7, 12, 24].flatMap((corners) =>
      [0.2, 0.5, 1, 4].map((x) => {
        const cut = Math.ceil(1200 / corners);
        const fine = (4 * at(corners, x, 2 * cut) - at(corners, x, cut)) / 3;
        return off(polygonMutual(1, corners, x), fine);
      }),
    );
    accuracy('M of sharp polygons, elements of wire (relative)', errors, 2e-10);
  });

  test('turns that nearly touch: the constants of Grover 1946, ch. 8, from memory', () => {
    const constants = [
      [3, -1.40546],
      [4, -0.77401],
      [5, -0.40914],
      [6, -0.15152],
      [8, 0.21198],
    ] as const;
    const z = 1e-7;
    const errors = constants.map(([corners, constant]) => {
      const side = 2 * Math.sin(Math.PI / corners);
      return polygonMutual(1, corners, z) / (2e-7 * corners * side) - Math.log(side / z) - constant;
    });
    console.log(`polygon constants: ${errors.map((error) => error.toExponential(1)).join(' ')}`);
    // As remembered; the one of the pentagon is 8e-5 off, the others agree in every digit.
    accuracy('own inductance of thin polygons, constant (absolute)', errors, 1e-4);
    const square = Math.SQRT2 - 2 + Math.LN2 - Math.log(1 + Math.SQRT2);
    const side = Math.SQRT2;
    expect(polygonMutual(1, 4, z) / (8e-7 * side) - Math.log(side / z)).toBeCloseTo(square, 6);
  });

  test('refuses what is no polygon', () => {
    for (const corners of [2, 6.5, Number.NaN]) expect(() => polygonMutual(1, corners, 1)).toThrow(RangeError);
    expect(() => polygonMutual(0, 6, 1)).toThrow(RangeError);
    expect(() => polygonTurn(1, 6, 1)).toThrow(/bend/);
    expect(() => polygonTurn(1, 6, -0.1)).toThrow(/bend/);
    expect(polygonMutual(1, 6, 0)).toBe(Number.POSITIVE_INFINITY);
    expect(polygonTurn(1, 6).mutual(0)).toBe(Number.POSITIVE_INFINITY);
  });
});

describe('a turn from rib to rib', () => {
  test('sharp corners: the table against the sum over sides', () => {
    const errors = (from: number, to: number) =>
      CORNERS.flatMap((corners) => {
        const turn = polygonTurn(0.04, corners);
        return spread(from, to, 400).map((x) => off(turn.mutual(0.04 * x), polygonMutual(0.04, corners, 0.04 * x)));
      });
    accuracy('M of polygons by table, sides (relative)', errors(1e-4, 15), 1e-7);
    accuracy('M of polygons beyond the table, sides (relative)', [...errors(1e-6, 1e-4), ...errors(15, 100)], 5e-6);
  });

  test('bent over ribs: against elements of wire', () => {
    for (const [corners, bound] of [
      [6, 2.6e-3],
      [8, 1.4e-3],
      [12, 6e-4],
      [24, 2e-4],
    ] as const) {
      const errors = [0.05, 0.15, 0.4].flatMap((bend) => {
        const wire = ribbed(1, corners, bend, corners, 0, 0.005);
        const part = ribbed(1, corners, bend, 1, 0, 0.005);
        const turn = polygonTurn(1, corners, bend);
        return [0.02, 0.06, 0.2, 0.6, 2].map((x) => off(turn.mutual(x), corners * mutualOf(part, wire, x)));
      });
      accuracy(`M of bent polygons of ${corners} corners, elements of wire (relative)`, errors, bound);
    }
  });

  test('its length and area', () => {
    for (const corners of CORNERS)
      for (const bend of [0, 3, 12]) {
        const wire = ribbed(40, corners, bend, corners, 0, 0.01);
        let area = 0;
        for (let i = 0; i < wire.length; i += 6) area += (wire[i]! * wire[i + 4]! - wire[i + 1]! * wire[i + 3]!) / 2;
        // Chords of a hundredth of a millimetre on bends of 3 mm: 5e-7.
        expect(Math.abs(off(turnLengthMm(80, corners, bend), lengthOf(wire)))).toBeLessThan(1e-6);
        expect(Math.abs(off((Math.PI / 4) * equivalentDiameterMm(80, corners, bend) ** 2, area))).toBeLessThan(1e-6);
      }
    expect(equivalentDiameterMm(80, undefined)).toBe(80);
    expect(turnLengthMm(80, undefined)).toBe(Math.PI * 80);
  });

  test('a helix of straight sides, cut into elements, within what rings lack of a round helix', () => {
    const errorOf = (corners: number, bend: number, pitch: number) => {
      const g = (pitch / 4) * G;
      const wire = ribbed(1, corners, bend, 5 * corners, pitch, 0.9 * g);
      return off(evenL(polygonTurn(1, corners, bend), 5, pitch, pitch / 4), ownOf(wire, pitch, g));
    };
    const cases = [6, 9, 24].flatMap((corners) => [errorOf(corners, 0, 0.05), errorOf(corners, 0.15, 0.05)]);
    console.log(`helices of sides: ${cases.map((error) => `${(100 * error).toFixed(3)} %`).join(', ')}`);
    // Rings at a pitch of D/40 are 0.01 % off a round helix; six bent corners are 0.13 % off by their share.
    accuracy('inductance of helices from rib to rib, elements of wire (relative)', cases, 1.6e-3);
    accuracy(
      'the same, sharp corners',
      cases.filter((_, i) => i % 2 === 0),
      2.5e-4,
    );
  });

  test('more ribs come to the round coil, from below', () => {
    const round = evenL(0.04, 20, 1e-3, 3e-4);
    let before = 0;
    for (let corners = 3; corners <= 40; corners++) {
      const now = evenL(polygonTurn(0.04, corners), 20, 1e-3, 3e-4);
      expect(now).toBeGreaterThan(before);
      expect(now).toBeLessThan(round);
      before = now;
    }
    // What is lacking goes as 1/n^2: ten times the corners, a hundredth of it.
    const lacks = (corners: number) => 1 - evenL(polygonTurn(0.04, corners), 20, 1e-3, 3e-4) / round;
    expect(lacks(300) / lacks(30)).toBeCloseTo(0.01, 4);
    expect(lacks(300)).toBeLessThan(1e-4);
    // All bend and hardly a side: round as well.
    const bent = evenL(polygonTurn(0.04, 6, 0.04 * (1 - 1e-6)), 20, 1e-3, 3e-4);
    expect(Math.abs(off(bent, round))).toBeLessThan(1e-5);
  });

  test('inductance scales with size', () => {
    for (const corners of CORNERS)
      for (const scale of [0.1, 3]) {
        const small = evenL(polygonTurn(0.04, corners, 0.002), 15, 1.3e-3, 3e-4);
        const large = evenL(polygonTurn(0.04 * scale, corners, 0.002 * scale), 15, 1.3e-3 * scale, 3e-4 * scale);
        expect(off(large, small * scale)).toBeCloseTo(0, 12);
      }
  });

  test('the circle of its area, for closed formulas', () => {
    for (const [corners, bound] of [
      [6, 5e-3],
      [8, 2e-3],
      [12, 6e-4],
      [18, 2e-4],
      [24, 1.2e-4],
    ] as const) {
      const turn = polygonTurn(0.04, corners);
      const errors = [0.3, 1, 3].flatMap((long) =>
        [0.005, 0.015, 0.05].map((steep) => {
          const [turns, pitch] = [Math.round(long / steep), 0.08 * steep];
          const circle = evenL(equivalentDiameterMm(80, corners) / 2e3, turns, pitch, 0.4 * pitch);
          return off(circle, evenL(turn, turns, pitch, 0.4 * pitch));
        }),
      );
      accuracy(`coils of the circle of equal area, ${corners} corners (relative)`, errors, bound);
    }
  });

  test('costs about what a circle costs', () => {
    const uneven = Array.from({ length: 200 }, (_, i) => 6e-4 * i + (i > 90 ? 3e-4 : 0));
    const timeOf = (turn: TurnShape) => {
      const start = performance.now();
      for (let i = 0; i < 3; i++) cumulativeInductance(uneven, turn, 2e-4).at(200);
      return performance.now() - start;
    };
    const [sides, round] = [polygonTurn(0.04, 12, 0.002), roundTurn(0.04)];
    const ratios = Array.from({ length: 15 }, () => timeOf(sides) / timeOf(round)).sort((a, b) => a - b);
    const ratio = ratios[7]!;
    const start = performance.now();
    polygonTurn(0.04, 47);
    const first = performance.now() - start;
    console.log(`cost over circles: ${ratio.toFixed(2)}, the first of 47 corners ${first.toFixed(1)} ms`);
    // Measured 0.6 to 1.5, and 2 to 25 ms; wide margins, for a busy machine.
    expect(ratio).toBeLessThan(2.5);
    expect(first).toBeLessThan(150);
  });
});
