import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fieldTables, solveField } from '../../../src/physics/field/field.ts';
import { ringField } from '../../../src/physics/field/outside.ts';
import { pairMutual, type Side, solvePair } from '../../../src/physics/field/two-windings.ts';
import { coaxialMutual } from '../../../src/physics/maxwell.ts';
import { neumannMutual } from '../neumann.ts';

const SEED = 20261201;
const COPPER = 1.7241e-8;
const relative = (got: number, wanted: number) => Math.abs(got / wanted - 1);
const places = (count: number, pitch: number, from: number) =>
  Array.from({ length: count }, (_, i) => from + (i + 0.5) * pitch);
const whole = (side: Omit<Side, 'sections'>): Side => ({ ...side, sections: [{ from: 0, to: side.tables.turns }] });
const solid = (tables: Side['tables']) => whole({ tables, bundle: null });

/** Two windings of a few turns that clear one another: radii 5 mm or more apart. */
const pairs = fc.record({
  radius: fc.double({ min: 0.02, max: 0.05, noNaN: true }),
  wider: fc.double({ min: 1.15, max: 1.6, noNaN: true }),
  turns: fc.integer({ min: 2, max: 12 }),
  others: fc.integer({ min: 1, max: 9 }),
  up: fc.double({ min: -0.03, max: 0.03, noNaN: true }),
});
const made = (one: { radius: number; wider: number; turns: number; others: number; up: number }) => ({
  first: fieldTables(places(one.turns, 1e-3, 0), one.radius, 2.5e-4),
  second: fieldTables(places(one.others, 0.8e-3, one.up), one.radius * one.wider, 2e-4),
});

describe('two coaxial windings', () => {
  test('the field of a ring is the slope of its mutual inductance', () => {
    let ran = 0;
    fc.assert(
      fc.property(
        fc.double({ min: 0.02, max: 0.06, noNaN: true }),
        fc.double({ min: 0.02, max: 0.06, noNaN: true }),
        fc.double({ min: 0.004, max: 0.08, noNaN: true }),
        (ring, r, above) => {
          const { axial, radial } = ringField(ring, r, above);
          const d = 1e-6;
          const outwards = (coaxialMutual(ring, r + d, above) - coaxialMutual(ring, r - d, above)) / (2 * d);
          const upwards = (coaxialMutual(ring, r, above + d) - coaxialMutual(ring, r, above - d)) / (2 * d);
          const around = 2 * Math.PI * r;
          // Central differences over a micrometre, 4 mm and more from the wire: 1e-7 of the field's size, which the components may pass 0 of.
          const size = Math.hypot(axial, radial);
          expect(Math.abs(axial - outwards / around)).toBeLessThan(1e-6 * size);
          expect(Math.abs(radial + upwards / around)).toBeLessThan(1e-6 * size);
          ran++;
        },
      ),
      { seed: SEED, numRuns: 200 },
    );
    console.log(`fields of rings against slopes of M: ${ran}`);
    expect(ran).toBe(200);
  });

  test('two circles as printed: 25 and 20 cm, 10 cm apart, 248.787 cm (Rosa & Grover 1912, example, from memory)', () => {
    const [a, b] = [fieldTables([0], 0.25, 1e-4), fieldTables([0.1], 0.2, 1e-4)];
    const ring = { from: 0, to: 1 };
    // A centimetre of inductance is a nanohenry; half of the last digit that is printed.
    expect(Math.abs(pairMutual(a, ring, b, ring) * 1e9 - 248.787)).toBeLessThan(5e-4);
  });

  test("mutual inductance of windings: every pair of rings by Neumann's integral", () => {
    let ran = 0;
    fc.assert(
      fc.property(pairs, (one) => {
        const { first, second } = made(one);
        let sum = 0;
        for (const a of first.positions)
          for (const b of second.positions) sum += neumannMutual(first.radius, second.radius, a - b, 2000);
        const got = pairMutual(first, { from: 0, to: one.turns }, second, { from: 0, to: one.others });
        // The integral has converged to rounding here: 2000 points at 0.15 of a radius and more.
        expect(relative(got, sum)).toBeLessThan(1e-12);
        ran++;
      }),
      { seed: SEED, numRuns: 40 },
    );
    console.log(`mutual inductances of windings: ${ran}`);
    expect(ran).toBe(40);
  });

  test('a winding cut in two and coupled again is itself: coupling of a winding with itself', () => {
    // A step at the cut, so that the halves clear one another as two windings do.
    const all = places(40, 0.56e-3, 0).map((z, i) => (i < 28 ? z : z + 1.5e-3));
    const one = fieldTables(all, 0.038, 2.5e-4);
    const cut = [
      { from: 0, to: 28 },
      { from: 28, to: 40 },
    ];
    const halves = [fieldTables(all.slice(0, 28), 0.038, 2.5e-4), fieldTables(all.slice(28), 0.038, 2.5e-4)] as const;
    let ran = 0;
    // Low frequency: the same sum of rings. At work the multipoles of one half in the other's wires are left out: 4e-4 of L and
    // 2 % of R of each at most, 4 % at 10 MHz, a tenth of what couples their losses.
    for (const [kHz, inductance, resistance, mutual] of [
      [1e-6, 1e-12, 1e-9, 1e-6],
      [1e3, 4e-4, 0.02, 0.1],
      [1e4, 1.5e-3, 0.04, 0.15],
    ] as const) {
      const exact = solveField(one, kHz * 1e3, COPPER, cut);
      const got = solvePair(solid(halves[0]), solid(halves[1]), kHz * 1e3, COPPER);
      for (let i = 0; i < 4; i++) {
        expect(relative(got.inductance[i]!, exact.inductance[i]!), `${kHz} kHz L ${i}`).toBeLessThan(inductance);
        const within = i === 0 || i === 3 ? resistance : mutual;
        if (kHz > 1)
          expect(relative(got.resistance[i]!, exact.resistance[i]!), `${kHz} kHz R ${i}`).toBeLessThan(within);
        ran++;
      }
    }
    console.log(`entries of a winding cut in two: ${ran}`);
    expect(ran).toBe(12);
  });

  test('symmetric, passive, coupled by less than one, and as each alone when far apart', () => {
    let ran = 0;
    fc.assert(
      fc.property(pairs, fc.double({ min: 1e4, max: 2e7, noNaN: true }), (one, frequency) => {
        const { first, second } = made(one);
        const { inductance: L, resistance: R } = solvePair(solid(first), solid(second), frequency, COPPER);
        expect(relative(L[1]!, L[2]!)).toBeLessThan(1e-9);
        expect(Math.abs(R[1]! - R[2]!)).toBeLessThan(1e-9 * Math.sqrt(R[0]! * R[3]!));
        expect(L[0]! * L[3]!).toBeGreaterThan(L[1]! ** 2);
        expect(R[0]! * R[3]!).toBeGreaterThan(R[1]! ** 2);
        // The other's copper takes from the inductance and adds to the loss.
        const alone = solveField(first, frequency, COPPER, [{ from: 0, to: one.turns }]);
        expect(L[0]!).toBeLessThanOrEqual(alone.inductance[0]! * (1 + 1e-12));
        expect(R[0]!).toBeGreaterThanOrEqual(alone.resistance[0]! * (1 - 1e-12));
        const far = fieldTables(places(one.others, 0.8e-3, 5), second.radius, 2e-4);
        const apart = solvePair(solid(first), solid(far), frequency, COPPER);
        expect(relative(apart.inductance[0]!, alone.inductance[0]!)).toBeLessThan(1e-9);
        // The field of a ring falls with the cube of the distance: 5 m is 100 radii.
        expect(apart.inductance[1]!).toBeLessThan(1e-4 * L[1]!);
        ran++;
      }),
      { seed: SEED, numRuns: 60 },
    );
    console.log(`pairs of windings at work: ${ran}`);
    expect(ran).toBe(60);
  });

  test('litz shields nothing and loses in the field of the other', () => {
    const first = fieldTables(places(10, 1e-3, 0), 0.03, 4e-4);
    const second = fieldTables(places(5, 1e-3, 0), 0.036, 4e-4);
    const bundle = { strands: 20, strandDiameter: 1e-4, takeUp: 1.015 };
    const sides = [whole({ tables: first, bundle }), whole({ tables: second, bundle })] as const;
    const got = solvePair(sides[0], sides[1], 1e6, COPPER);
    expect(got.inductance[1]!).toBe(pairMutual(first, { from: 0, to: 10 }, second, { from: 0, to: 5 }));
    expect(got.resistance[1]!).toBeGreaterThan(0);
  });
});
