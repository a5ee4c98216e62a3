import { expect, test } from 'vitest';
import {
  type CoupledWinding,
  coupledResonances,
  coupledWinding,
  nodesFor,
  resonanceBracket,
  type TunedCircuit,
} from '../../../src/physics/coupled/coupled.ts';
import { fieldTables, sectionInductances } from '../../../src/physics/field/field.ts';
import { selfCapacitance } from '../../../src/physics/medhurst.ts';
import { cumulativeInductance } from '../../../src/physics/rings.ts';
import { resonance } from '../../../src/physics/tuning.ts';
import { accuracy, off } from '../../published/accuracy.ts';
import { even, sectionsOf, seeded } from '../field/coils.ts';
import { nodalResonances } from './reference.ts';

const RESTS = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;
const places = even(100, 6e-4);
const tables = fieldTables(places, 0.0383, 2.5e-4);
const OWN = selfCapacitance(0.06, 0.0766);
const TAPS = [8, 16, 24, 32, 40, 48, 56, 64, 72, 80, 90];

function windingWith(marks: readonly number[], most?: number): CoupledWinding {
  const nodes = nodesFor(100, marks, most);
  return coupledWinding(nodes, sectionInductances(tables, sectionsOf(nodes)));
}
const winding = windingWith(TAPS);

const circuit = (change: Partial<TunedCircuit>): TunedCircuit => ({
  from: 0,
  to: 40,
  earthed: 'from',
  rest: 'open',
  taps: TAPS,
  selfCapacitance: OWN,
  distribution: 'spread',
  tuning: 100e-12,
  strays: [],
  ...change,
});

test('every connection against the nodal matrix K v = omega^2 C v', () => {
  const random = seeded(5);
  const errors: number[] = [];
  for (let round = 0; round < 60; round++) {
    // Nine stretches of a coil of 14 turns; nodes 0..9, the taps at nodes 3, 5 and 7.
    const nodes = [0, 1, 2, 4, 5, 7, 8, 10, 12, 14];
    const small = fieldTables(even(14, 1e-3 * (1 + random())), 0.02, 3e-4);
    const L = sectionInductances(small, sectionsOf(nodes));
    const stretches = nodes.slice(1).map((_, i) => [i, i + 1] as const);
    const matrix = stretches.map((_, s) => [...L.slice(s * 9, s * 9 + 9)]);
    const from = round % 2 === 0 ? 0 : 3;
    const to = 5 + 2 * (round % 3 > 0 ? 1 : 0);
    const earthed = round % 5 < 3 ? 'from' : 'to';
    const strays = nodes.map((turn) => ({ turn, capacitance: 1e-12 * (0.2 + random()) }));
    for (const rest of RESTS) {
      const tuning = 1e-11 * (1 + random());
      const earth = earthed === 'from' ? from : to;
      let ends: (readonly [number, number])[] = stretches;
      const joined: [number, number][] = [];
      if (rest === 'shorted')
        joined.push(
          ...(
            [
              [0, from],
              [to, 9],
            ] as const
          ).map((pair): [number, number] => [...pair]),
        );
      if (rest === 'shorted in sections') {
        const marks = [0, 3, 5, 7, 9];
        for (let i = 1; i < 5; i++) {
          if (marks[i]! <= from || marks[i - 1]! >= to) joined.push([marks[i - 1]!, marks[i]!]);
        }
      }
      if (rest === 'disconnected') {
        // Copies of the nodes at the cuts.
        ends = stretches.map(([low, high]) => [low === to ? 10 : low, high === from ? 11 : high] as const);
      }
      const c = [
        ...strays.map((stray) => stray.capacitance),
        ...(rest === 'disconnected' ? (from > 0 ? [0, 0] : [0]) : []),
      ];
      c[earthed === 'from' ? to : from]! += tuning;
      // Half of each stretch at either end, and OWN in all for a voltage that rises evenly from the earthed end of the winding.
      const height = (node: number) => (earthed === 'from' ? nodes[node]! : 14 - nodes[node]!) / 14;
      const worth = (n: number) => ((nodes[n + 1]! - nodes[n]!) / 2) * (height(n) ** 2 + height(n + 1) ** 2);
      const perTurn = OWN / stretches.reduce((sum, [n]) => sum + worth(n), 0);
      ends.forEach((pair, n) => {
        for (const node of pair) c[node]! += (perTurn * (nodes[n + 1]! - nodes[n]!)) / 2;
      });
      const exact = nodalResonances(matrix, ends, c, earth, joined);
      const got = coupledResonances(coupledWinding(nodes, L), {
        ...circuit({ from: nodes[from]!, to: nodes[to]!, taps: [nodes[3]!, nodes[5]!, nodes[7]!], earthed, rest }),
        tuning,
        strays,
      });
      errors.push(off(got.first, Math.sqrt(exact[0]!) / (2 * Math.PI)));
      errors.push(off(got.second!, Math.sqrt(exact[1]!) / (2 * Math.PI)));
    }
  }
  // Rounding of an inverse.
  accuracy('coupled resonances, nodal matrix (relative)', errors, 1e-12);
  expect(errors).toHaveLength(480);
});

test('the whole winding is 1/(2 pi sqrt(L C))', () => {
  const L = cumulativeInductance(places, 0.0383, 2.5e-4).at(100);
  const errors = [1e-13, 1e-11, 4e-10].flatMap((tuning) => {
    const at = (change: Partial<TunedCircuit>) => coupledResonances(winding, circuit({ to: 100, tuning, ...change }));
    expect(at({ selfCapacitance: 0 }).second).toBeUndefined();
    const bare = off(at({ selfCapacitance: 0 }).first, resonance(L, tuning));
    return [bare, off(at({ distribution: 'open end' }).first, resonance(L, tuning + OWN))];
  });
  accuracy('whole winding, capacitance at its end (relative)', errors, 1e-12);
  // Spread along the turns: the voltage of a coil does not rise quite evenly, and 3 % of 3.5 pF is 1e-4 of the frequency at 400 pF.
  const spread = coupledResonances(winding, circuit({ to: 100, tuning: 4e-10 }));
  expect(Math.abs(off(spread.first, resonance(L, 4e-10 + OWN)))).toBeLessThan(2e-4);
});

test('dead turns: a step-up that no position gets past', () => {
  const own = coupledResonances(winding, circuit({ to: 100, tuning: 0 })).first;
  let cases = 0;
  for (const distribution of ['spread', 'open end'] as const) {
    let before = Number.POSITIVE_INFINITY;
    for (const to of [...TAPS, 100]) {
      for (const tuning of [400e-12, 92e-12, 27e-12, 1e-13]) {
        const open = coupledResonances(winding, circuit({ to, tuning, distribution }));
        const alone = resonance(cumulativeInductance(places, 0.0383, 2.5e-4).at(to), tuning);
        expect(open.first).toBeLessThan(alone);
        if (distribution === 'spread') expect(open.first).toBeLessThanOrEqual(own * (1 + 1e-9));
        if (open.second !== undefined) expect(open.second).toBeGreaterThan(open.first);
        if (tuning === 92e-12) {
          expect(open.first).toBeLessThan(before);
          before = open.first;
        }
        if (to < 100) {
          const end = open.voltages.at(-1)!;
          expect(end).toBeGreaterThan(1);
          for (const rest of ['shorted', 'shorted in sections', 'disconnected'] as const) {
            expect(coupledResonances(winding, circuit({ to, tuning, distribution, rest })).first).toBeGreaterThan(
              open.first,
            );
          }
        }
        cases++;
      }
    }
  }
  console.log(`positions of a tapped coil: ${cases} cases`);
  expect(cases).toBe(96);
  const { voltages } = coupledResonances(winding, circuit({ rest: 'shorted' }));
  expect(voltages[0]).toBe(0);
  expect(voltages[winding.nodes.indexOf(40)]).toBeCloseTo(1, 12);
  // Tap and far end are joined.
  expect(voltages.at(-1)).toBeCloseTo(1, 10);
});

test('a winding seen from its other end is the same', () => {
  const turned = coupledWinding(
    [...winding.nodes].reverse().map((turn) => 100 - turn),
    sectionInductances(tables, sectionsOf([...winding.nodes].reverse().map((turn) => 100 - turn))),
  );
  const errors = RESTS.flatMap((rest) =>
    (['spread', 'open end'] as const).map((distribution) => {
      const strays = [{ turn: 64, capacitance: 8e-12 }];
      const one = coupledResonances(winding, circuit({ rest, distribution, strays }));
      const other = coupledResonances(turned, {
        ...circuit({ rest, distribution, from: 60, to: 100, earthed: 'to' }),
        taps: TAPS.map((tap) => 100 - tap),
        strays: [{ turn: 36, capacitance: 8e-12 }],
      });
      return off(other.first, one.first);
    }),
  );
  accuracy('mirrored winding (relative)', errors, 1e-12);
});

test('grouped turns, taps within a turn, strays and the bracket', () => {
  const fine = coupledResonances(windingWith([40], 500), circuit({ taps: [] }));
  const grouped = [60, 30].map((most) => coupledResonances(windingWith([40], most), circuit({ taps: [] })));
  const errors = grouped.map(({ first }) => off(first, fine.first));
  accuracy('groups of two and four turns against single turns (relative)', errors, 3e-4);
  const near = (tap: number) => coupledResonances(windingWith([tap]), circuit({ to: tap, taps: [tap] })).first;
  expect(near(40.5)).toBeLessThan(near(40.2));
  expect(near(40.2)).toBeLessThan(near(40));
  const stray = coupledResonances(winding, circuit({ strays: [{ turn: 100, capacitance: 5e-12 }] })).first;
  const atTap = coupledResonances(winding, circuit({ strays: [{ turn: 40, capacitance: 5e-12 }] })).first;
  const none = coupledResonances(winding, circuit({})).first;
  // The same stray weighs more where the voltage is higher.
  expect(stray).toBeLessThan(atTap);
  expect(atTap).toBeLessThan(none);
  expect(off(coupledResonances(winding, circuit({ tuning: 105e-12 })).first, atTap)).toBeCloseTo(0, 12);
  const bracket = resonanceBracket(winding, circuit({}));
  const single = coupledResonances(winding, circuit({ distribution: 'open end' })).first;
  expect(bracket.first.mean).toBeCloseTo((none + single) / 2, 3);
  expect(bracket.first.uncertainty).toBeCloseTo(Math.abs(none - single) / 2, 3);
  expect(bracket.second!.mean).toBeGreaterThan(bracket.first.mean);
  expect(resonanceBracket(winding, circuit({ to: 100, taps: [] })).second).toBeUndefined();
  expect(nodesFor(3, [])).toEqual([0, 1, 2, 3]);
  expect(nodesFor(10, [4.2], 5)).toEqual([0, 2, 4.2, 6, 8, 10]);
});

test('refuses what has no node, no capacitance or no turns', () => {
  expect(() => coupledResonances(winding, circuit({ to: 40.5 }))).toThrow(/no node at turn 40.5/);
  expect(() => coupledResonances(winding, circuit({ from: 40, to: 8 }))).toThrow(/none/);
  expect(() => coupledResonances(winding, circuit({ selfCapacitance: 0, tuning: 0 }))).toThrow(/capacitance/);
  expect(() => coupledResonances(winding, circuit({ tuning: -1e-12 }))).toThrow(/tuning/);
  expect(() => coupledResonances(winding, circuit({ strays: [{ turn: 8, capacitance: Number.NaN }] }))).toThrow(
    /stray at 8/,
  );
  expect(() => coupledWinding([0, 1], [1, 2])).toThrow(/1 x 1/);
  expect(() => nodesFor(0, [])).toThrow(/turns/);
  expect(() => nodesFor(5, [6])).toThrow(/turn 6/);
});

test('a tapped coil, both ends of its capacitor, both distributions', () => {
  const run = () => {
    const start = performance.now();
    const fresh = windingWith(TAPS);
    for (const to of [...TAPS, 100]) {
      for (const tuning of [15e-12, 380e-12]) resonanceBracket(fresh, circuit({ to, tuning }));
    }
    return performance.now() - start;
  };
  const runs = [run(), run(), run()];
  console.log(`48 coupled resonances: ${runs.map((ms) => ms.toFixed(1)).join(', ')} ms`);
  expect(Math.min(...runs)).toBeLessThan(100);
});
