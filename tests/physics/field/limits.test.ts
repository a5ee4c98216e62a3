import { expect, test } from 'vitest';
import { dcResistance } from '../../../src/physics/copper.ts';
import {
  type FieldTables,
  fieldTables,
  resistivityAt,
  sectionInductances,
  solveField,
  turnLosses,
} from '../../../src/physics/field/field.ts';
import { cumulativeInductance, ringSelf } from '../../../src/physics/rings.ts';
import { skinRatio } from '../../../src/physics/skin.ts';
import { accuracy, off, spread } from '../../published/accuracy.ts';
import { even, randomCoil, sectionsOf, seeded } from './coils.ts';

const RHO = 1.7241e-8;
const whole = (tables: FieldTables, frequency: number) =>
  solveField(tables, frequency, RHO, [{ from: 0, to: tables.turns }]);

test('direct current and the ring sum, whole turns and parts of turns', () => {
  const places = [...even(20, 6e-4), 19.7 * 6e-4].map((z, i) => z + (i > 7 ? 2e-4 : 0));
  const turns = 20.4;
  const tables = fieldTables(places, 0.038, 2.5e-4, { turns });
  const rings = cumulativeInductance(places, 0.038, 2.5e-4, turns);
  const inductance: number[] = [];
  const resistance: number[] = [];
  for (const to of [0.2, 0.5, 1, 1.7, 5, 8.3, 13.99, 20, 20.1, 20.4]) {
    for (const frequency of [0, 1]) {
      const z = solveField(tables, frequency, RHO, [{ from: 0, to }]);
      inductance.push(off(z.inductance[0]!, rings.at(to)));
      resistance.push(off(z.resistance[0]!, dcResistance(to * 2 * Math.PI * 0.038, 5e-4)));
    }
  }
  // At 1 Hz the wire is 4e-3 skin depths thick, and the eddy currents of 20 turns are worth 5e-11 of the resistance themselves.
  accuracy('field solution at 0 and 1 Hz, ring sum (relative)', inductance, 1e-12);
  accuracy('field solution at 0 and 1 Hz, direct current (relative)', resistance, 1e-10);
});

test('one turn of a huge ring is an isolated wire', () => {
  const errors = spread(1e3, 1e9, 40).map((frequency) => {
    const z = whole(fieldTables([0], 10, 5e-4), frequency);
    return off(z.resistance[0]!, dcResistance(20 * Math.PI, 1e-3) * skinRatio(1e-3, frequency));
  });
  // Its own curvature, (a/R)^2 (ln 8R/a)^2 = 4e-7 at most, is in the one and not in the other.
  accuracy('single turn, isolated wire (relative)', errors, 3e-6);
});

test('resistance rises with frequency, inductance falls', () => {
  const random = seeded(7);
  let cases = 0;
  for (let round = 0; round < 60; round++) {
    const coil = randomCoil(random, 25);
    const tables = fieldTables(coil.positions, coil.radius, coil.wireRadius);
    let before = whole(tables, 0);
    for (const frequency of spread(1e3, 1e9, 15)) {
      const z = whole(tables, frequency);
      // 1e-12 for rounding near direct current.
      expect(z.resistance[0]!).toBeGreaterThan(before.resistance[0]! * (1 - 1e-12));
      expect(z.inductance[0]!).toBeLessThan(before.inductance[0]! * (1 + 1e-12));
      before = z;
      cases++;
    }
    expect(before.inductance[0]).toBeGreaterThan(0);
  }
  console.log(`R rising and L falling: ${cases} steps`);
  expect(cases).toBe(900);
});

test('thousands of random coils: sections add up, no current makes power, power is conserved', () => {
  const random = seeded(20260804);
  const sums: number[] = [];
  const energy: number[] = [];
  for (let round = 0; round < 2000; round++) {
    const coil = randomCoil(random, 14);
    const tables = fieldTables(coil.positions, coil.radius, coil.wireRadius);
    const sections = sectionsOf(coil.cuts);
    const parts = solveField(tables, coil.frequency, RHO, sections);
    const joined = whole(tables, coil.frequency);
    // One solution for all turns against one for each part: linear, but reckoned apart.
    sums.push(off(add(parts.resistance), joined.resistance[0]!), off(add(parts.inductance), joined.inductance[0]!));
    expect(positive(parts.resistance, sections.length)).toBe(true);
    expect(positive(parts.inductance, sections.length)).toBe(true);
    const turns = turnLosses(tables, coil.frequency, RHO, sections[0]!);
    expect(turns.every((loss) => loss > 0)).toBe(true);
    energy.push(off(add(turns), parts.resistance[0]!));
  }
  // Rounding of R against reactances a hundred times as large.
  accuracy('2000 random coils, sections add up to the whole (relative)', sums, 1e-11);
  // The power is of the first order in the residual, whose bound is 1e-7.
  accuracy('2000 random coils, power into the wires against resistance (relative)', energy, 1e-7);
});

test('an even pitch and its general form are the same', () => {
  const places = even(40, 5.6e-4);
  const shifted = places.map((z, i) => z + (i === 20 ? 5.6e-4 * 3e-9 : 0));
  const [a, b] = [places, shifted].map((list) => fieldTables(list, 0.03, 2.5e-4)) as [FieldTables, FieldTables];
  expect([a.mutual.stride, b.mutual.stride]).toEqual([0, 79]);
  const sections = [
    { from: 0, to: 12 },
    { from: 12, to: 40 },
  ];
  const x = solveField(a, 1e6, RHO, sections);
  const y = solveField(b, 1e6, RHO, sections);
  const errors = [0, 1, 2, 3].flatMap((at) => [
    off(x.resistance[at]!, y.resistance[at]!),
    off(x.inductance[at]!, y.inductance[at]!),
  ]);
  // The turn that makes it uneven is out of place by 3e-9 of a pitch.
  accuracy('even and general path (relative)', errors, 1e-9);
});

test('a part turn goes over into none and into a whole one', () => {
  const tables = fieldTables(even(12, 1e-3), 0.03, 4e-4);
  const at = (cut: number) => {
    const z = solveField(tables, 1e6, RHO, [
      { from: 0, to: cut },
      { from: cut, to: 12 },
    ]);
    return [...z.resistance, ...z.inductance];
  };
  for (const turn of [1, 5, 11]) {
    const here = at(turn);
    for (const side of [-1e-6, 1e-6]) {
      // A microturn is worth 2e-6 of a one-turn section, and its logarithm.
      at(turn + side).forEach((value, i) => {
        expect(Math.abs(off(value, here[i]!))).toBeLessThan(2e-5);
      });
    }
  }
  // A section within one turn, and a turn cut in three.
  const thirds = [3.2, 3.5, 3.9].map((to, i, list) => ({ from: list[i - 1] ?? 3, to }));
  const arcs = solveField(tables, 1e6, RHO, [...thirds, { from: 3.9, to: 4 }]);
  const ring = solveField(tables, 1e6, RHO, [{ from: 3, to: 4 }]);
  // The arcs stand up to a third of a pitch from the middle of their turn, but see no one else.
  expect(off(add(arcs.inductance), ring.inductance[0]!)).toBeCloseTo(0, 11);
  expect(off(add(arcs.resistance), ring.resistance[0]!)).toBeCloseTo(0, 11);
});

test('a winding that ends in a part of a turn, wound close', () => {
  // The middle of the last 0.2 turn is 0.6 pitch from the turn before it, nearer than a wire; the wire itself is not.
  const close = (part: number) => {
    const places = part === 0 ? even(10, 5.6e-4) : [...even(10, 5.6e-4), (9 + 0.5 + part / 2) * 5.6e-4];
    return fieldTables(places, 0.02, 2.5e-4, { turns: 10 + part });
  };
  expect(close(0.2).powers[2]!.stride).toBe(0);
  expect(close(0.2).order).toBe(close(0).order);
  const longer = fieldTables(even(11, 5.6e-4), 0.02, 2.5e-4);
  const [none, whole11] = [whole(close(0), 1e6), whole(longer, 1e6)];
  let before = none;
  for (const part of [1e-6, 0.2, 0.5, 0.8, 1 - 1e-6]) {
    const z = whole(close(part), 1e6);
    expect(z.resistance[0]!).toBeGreaterThan(before.resistance[0]!);
    expect(z.inductance[0]!).toBeGreaterThan(before.inductance[0]!);
    before = z;
    // Almost none, almost all: a microturn of ten.
    if (part === 1e-6) expect(Math.abs(off(z.resistance[0]!, none.resistance[0]!))).toBeLessThan(1e-6);
  }
  expect(Math.abs(off(before.resistance[0]!, whole11.resistance[0]!))).toBeLessThan(1e-6);
  expect(Math.abs(off(before.inductance[0]!, whole11.inductance[0]!))).toBeLessThan(1e-6);
  const losses = turnLosses(close(0.5), 1e6, RHO, { from: 0, to: 10.5 });
  expect(off(add(losses), whole(close(0.5), 1e6).resistance[0]!)).toBeCloseTo(0, 7);
});

test('five hundred close turns of a thick wire at a perfect conductor settle', () => {
  // The hardest that is let in: d/p = 0.95, 2 of 3 turns dead, skin 0.07 % of the radius.
  const tables = fieldTables(
    even(500, 3e-3 / 0.95).map((z, i) => z + (i > 100 ? 1e-3 : 0)),
    0.05,
    1.5e-3,
  );
  const z = solveField(tables, 4e9, RHO, sectionsOf([0, 170, 500]));
  expect(z.products).toBeLessThan(80);
  expect(positive(z.resistance, 2)).toBe(true);
  const thin = solveField(fieldTables(even(500, 6e-5), 0.02, 2.5e-5), 1e4, RHO, sectionsOf([0, 500]));
  expect(off(thin.resistance[0]!, 500 * 0.04 * Math.PI * (RHO / (Math.PI * 2.5e-5 ** 2)))).toBeCloseTo(0, 3);
});

test('a cut within a turn changes the whole by no more than the places of its arcs', () => {
  const tables = fieldTables(even(30, 6e-4), 0.038, 2.5e-4);
  const joined = sectionInductances(tables, [{ from: 0, to: 30 }])[0]!;
  const errors = [0.5, 7.3, 15.5, 29.1].map((cut) => {
    const cuts = [
      { from: 0, to: cut },
      { from: cut, to: 30 },
    ];
    return off(add(sectionInductances(tables, cuts)), joined);
  });
  // A quarter of a pitch, in one turn of thirty.
  accuracy('winding cut within a turn, ring sum of the whole (relative)', errors, 3e-4);
  const own = ringSelf(0.038, 2.5e-4);
  expect(off(sectionInductances(fieldTables([0], 0.038, 2.5e-4), [{ from: 0, to: 1 }])[0]!, own)).toBe(0);
});

test('warm copper', () => {
  expect(resistivityAt(20)).toBe(RHO);
  // NBS Circular 31: +0.393 % per kelvin of the value at 20 C.
  expect(resistivityAt(70) / RHO).toBeCloseTo(1.1965, 10);
  expect(() => resistivityAt(-200)).toThrow(/-200/);
  const tables = fieldTables(even(10, 1e-3), 0.03, 4e-4);
  const cold = whole(tables, 1e6).resistance[0]!;
  const warm = solveField(tables, 1e6, resistivityAt(70), [{ from: 0, to: 10 }]).resistance[0]!;
  // Where the skin is thin, the root of it.
  expect(warm / cold).toBeGreaterThan(Math.sqrt(1.1965) * 0.98);
  expect(warm / cold).toBeLessThan(Math.sqrt(1.1965) * 1.02);
});

test('refuses windings and sections that cannot be', () => {
  expect(() => fieldTables([0, 4e-4], 0.03, 2.5e-4)).toThrow(/0.0004 apart/);
  expect(() => fieldTables([0, -1e-3], 0.03, 2.5e-4)).toThrow(/rise/);
  expect(() => fieldTables([0, Number.NaN], 0.03, 2.5e-4)).toThrow(/rise/);
  expect(() => fieldTables([0, 1e-3], 0.03, 2.5e-4, { turns: 2.5 })).toThrow(/3 positions|need 3/);
  expect(() => fieldTables([0, 1e-3], 2e-4, 2.5e-4)).toThrow(/bend/);
  expect(() => fieldTables([], 0.03, 2.5e-4)).toThrow(/turns/);
  const tables = fieldTables(even(5, 1e-3), 0.03, 2.5e-4);
  for (const [from, to] of [
    [0, 5.1],
    [-1, 2],
    [2, 2],
    [3, Number.NaN],
  ] as const) {
    expect(() => solveField(tables, 1e6, RHO, [{ from, to }])).toThrow(RangeError);
  }
  expect(() => solveField(tables, 1e6, RHO, [])).toThrow(/section/);
  const crossed = [
    { from: 0, to: 3 },
    { from: 2, to: 5 },
  ];
  expect(() => solveField(tables, 1e6, RHO, crossed)).toThrow(/overlaps/);
  expect(() => solveField(tables, -1, RHO, [{ from: 0, to: 5 }])).toThrow(/frequency/);
});

function add(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0);
}

/** Whether a symmetric matrix is positive definite: Cholesky's elimination finds only positive pivots. */
function positive(matrix: Float64Array, count: number): boolean {
  const a = matrix.slice();
  for (let k = 0; k < count; k++) {
    const pivot = a[k * count + k]!;
    if (!(pivot > 0)) return false;
    for (let i = k + 1; i < count; i++) {
      for (let j = k + 1; j < count; j++) a[i * count + j]! -= (a[i * count + k]! * a[k * count + j]!) / pivot;
    }
  }
  return true;
}
