import { expect, test } from 'vitest';
import { fieldTables, solveField } from '../../../src/physics/field/field.ts';
import { accuracy } from '../../published/accuracy.ts';
import { randomCoil, sectionsOf, seeded } from './coils.ts';
import { denseSolution } from './dense.ts';

const RHO = 1.7241e-8;

test('the iteration against full elimination of the unreduced system', () => {
  const random = seeded(30804);
  const resistance: number[] = [];
  const inductance: number[] = [];
  const reciprocity: number[] = [];
  const energy: number[] = [];
  for (let round = 0; round < 40; round++) {
    const coil = randomCoil(random, 9);
    const sections = sectionsOf(coil.cuts);
    const tables = fieldTables(coil.positions, coil.radius, coil.wireRadius);
    const got = solveField(tables, coil.frequency, RHO, sections);
    const { Z, dissipated } = denseSolution({
      ...coil,
      order: tables.order,
      resistivity: RHO,
      sections: sections.map(({ from, to }) => [from, to] as const),
    });
    const omega = 2 * Math.PI * coil.frequency;
    Z.forEach((row, s) => {
      row.forEach((z, t) => {
        const at = s * Z.length + t;
        // Mutual resistances go through zero: they are measured by the own ones.
        const r = Math.sqrt(Z[s]![s]![0] * Z[t]![t]![0]);
        const l = Math.sqrt(Z[s]![s]![1] * Z[t]![t]![1]);
        resistance.push((got.resistance[at]! - z[0]) / r);
        inductance.push((omega * got.inductance[at]! - z[1]) / l);
        reciprocity.push((z[0] - Z[t]![s]![0]) / r, (z[1] - Z[t]![s]![1]) / l);
      });
      energy.push(dissipated[s]! / row[s]![0] - 1);
    });
  }
  // Largest 2e-14: what is cut off lies below 1e-11 of a multipole, and the iteration errs by the square of its residual, 1e-7.
  accuracy('field solution, resistance, full elimination', resistance, 1e-12);
  accuracy('field solution, inductance, full elimination', inductance, 1e-12);
  accuracy('reciprocity of the unreduced system', reciprocity, 1e-12);
  accuracy('power into the wires against resistance', energy, 1e-12);
  expect(resistance.length).toBeGreaterThan(150);
});

test('a longer coil, close turns, against full elimination', () => {
  const positions = Array.from({ length: 24 }, (_, i) => i * 5.6e-4 + (i > 9 ? 3e-4 : 0));
  const tables = fieldTables(positions, 0.025, 2.5e-4, { order: 5 });
  const sections = [
    { from: 0, to: 10 },
    { from: 10, to: 24 },
  ];
  const got = solveField(tables, 1.5e6, RHO, sections);
  const { Z } = denseSolution({
    positions,
    radius: 0.025,
    wireRadius: 2.5e-4,
    order: 5,
    frequency: 1.5e6,
    resistivity: RHO,
    sections: [
      [0, 10],
      [10, 24],
    ],
  });
  const errors = Z.flat().flatMap((z, at) => [
    got.resistance[at]! / z[0] - 1,
    (3e6 * Math.PI * got.inductance[at]!) / z[1] - 1,
  ]);
  accuracy('24 close turns with a gap, full elimination (relative)', errors, 1e-12);
});
