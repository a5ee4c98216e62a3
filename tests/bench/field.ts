/** Part of the bench: the field solution, its growth, the iteration against elimination, and surveys at low frequency. */
import { Coil } from '../../src/coil/coil.ts';
import { fieldTables, solveField } from '../../src/physics/field/field.ts';
import { findWire } from '../../src/stock/find.ts';
import { even } from '../physics/field/coils.ts';
import { denseSolution } from '../physics/field/dense.ts';

const RHO = 1.7241e-8;
const RADIUS = 0.0383;
const WIRE = 2.5e-4;

function timed<T>(run: () => T, times = 3): { ms: number; value: T } {
  let ms = Number.POSITIVE_INFINITY;
  let value = run();
  for (let k = 0; k < times; k++) {
    const from = performance.now();
    value = run();
    ms = Math.min(ms, performance.now() - from);
  }
  return { ms, value };
}

const inTwo = (turns: number, at: number) => [
  { from: 0, to: at },
  { from: at, to: turns },
];

const uneven = even(100, 6e-4).map((z, i) => z + 3e-4 * Math.floor(i / 8));
const twelve = timed(() => {
  const tables = fieldTables(uneven, RADIUS, WIRE);
  for (let tap = 8; tap <= 96; tap += 8) solveField(tables, 4e5 + 1e4 * (100 - tap), RHO, inTwo(100, tap));
});
console.log(`field: 100 turns, 12 taps at a frequency each, tables included: ${twelve.ms.toFixed(0)} ms (goal 800)`);

const tables = fieldTables(uneven, RADIUS, WIRE);
let frequency = 5e5;
const further = timed(() => {
  frequency += 1e3;
  return solveField(tables, frequency, RHO, inTwo(100, 40));
}, 8);
console.log(`field: a further frequency of that coil: ${further.ms.toFixed(0)} ms (goal 60)`);

const solve = (turns: number) => {
  const of = fieldTables(even(turns, 6e-4), RADIUS, WIRE);
  return timed(() => solveField(of, 1e6, RHO, inTwo(turns, turns / 2))).ms;
};
const [hundred, fivehundred] = [solve(100), solve(500)];
console.log(
  `field: 500 turns against 100: ratio ${(fivehundred / hundred).toFixed(1)} (turns squared: 25); ${fivehundred.toFixed(0)} ms against ${hundred.toFixed(0)} ms`,
);

const positions = even(200, 6e-4);
const order = 2;
const iterative = timed(() => solveField(fieldTables(positions, RADIUS, WIRE, { order }), 1e6, RHO, inTwo(200, 80)));
const from = performance.now();
const dense = denseSolution({
  positions,
  radius: RADIUS,
  wireRadius: WIRE,
  frequency: 1e6,
  resistivity: RHO,
  order,
  sections: [
    [0, 80],
    [80, 200],
  ],
});
const denseMs = performance.now() - from;
const apart = Math.max(...[0, 1].map((s) => Math.abs(iterative.value.resistance[3 * s]! / dense.Z[s]![s]![0] - 1)));
console.log(
  `field: elimination of the full system of 200 turns against the iteration: ratio ${(denseMs / iterative.ms).toFixed(0)} (goal 20 or more); answers ${apart.toExponential(1)} apart`,
);

const found = findWire('0.5 mm enamel');
if (!found.ok) throw new Error(found.got);
let surveys = 0;
const start = performance.now();
while (performance.now() - start < 1000) {
  const turns = 40 + (surveys % 60);
  const shape = { wire: found.wire, meanDiameterMm: 76.6, pitchMm: 0.6, turns, gaps: [], startMm: 10 };
  const coil = new Coil(shape);
  for (const tap of [10, 20, 30, turns]) coil.inductanceUh(tap);
  surveys++;
}
console.log(`surveys at low frequency, four taps each: ${surveys} a second`);
