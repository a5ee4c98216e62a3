import { coupledResonances, coupledWinding, nodesFor } from '../../src/physics/coupled/coupled.ts';
import {
  fieldTables,
  sectionInductances,
  solveField,
  solveLitz,
  terminalImpedance,
  turnLosses,
  wireResponse,
} from '../../src/physics/field/field.ts';
import { selfCapacitance } from '../../src/physics/medhurst.ts';
import { cumulativeInductance } from '../../src/physics/rings.ts';
import { skinRatio } from '../../src/physics/skin.ts';
import { resonance } from '../../src/physics/tuning.ts';
import { exactWire } from '../physics/field/bessel.ts';
import { even, evenCoil, randomCoil, sectionsOf, seeded } from '../physics/field/coils.ts';
import { denseSolution } from '../physics/field/dense.ts';
import { PITCH_OVER_WIRE, RESISTANCE, SELF_CAPACITANCE } from '../published/medhurst.ts';
import { SKIN } from '../published/skin.ts';
import { TRANSVERSE_LOSS } from '../published/transverse.ts';
import { type Measures, off, spread } from './measures.ts';
import { COUPLED, FINITE_ELEMENTS, SHORTED_IN_SECTIONS } from './references.ts';

const RHO = 1.7241e-8;
const MU0 = 4e-7 * Math.PI;
const direct = (radius: number) => RHO / (Math.PI * radius * radius);
const skinDepth = (frequency: number) => Math.sqrt(RHO / (Math.PI * frequency * MU0));

/** Isolated wire: the inner resistance of a turn over that of direct current. */
const isolated = (x: number) => {
  const radius = (x / Math.SQRT2) * skinDepth(1e6);
  return wireResponse(radius, 1e6, RHO, 1).resistance / direct(radius);
};

/** Loss of a wire across a field of H = 1 A/m peak, W/m: omega mu0 pi a^2 |Im C_1|. */
const transverse = (mm: number, frequency: number) => {
  const radius = mm / 2e3;
  return 2 * Math.PI ** 2 * frequency * MU0 * radius * radius * -wireResponse(radius, frequency, RHO, 1).im[0]!;
};

function finiteElements(): { inductance: number[]; resistance: number[] } {
  const inductance: number[] = [];
  const resistance: number[] = [];
  for (const { turns, diameter, pitch, wire, megahertz, used, rest, microhenry, ohm } of FINITE_ELEMENTS) {
    const tables = fieldTables(...evenCoil(turns, diameter, pitch, wire));
    const z = solveField(tables, megahertz * 1e6, RHO, sectionsOf(used < turns ? [0, used, turns] : [0, turns]));
    const got = terminalImpedance(z, { from: 0, to: 1 }, rest);
    inductance.push(off(1e6 * got.inductance, microhenry));
    resistance.push(off(got.resistance, ohm));
  }
  return { inductance, resistance };
}

function shortedInSections(): number[] {
  const { cuts, microhenry } = SHORTED_IN_SECTIONS;
  const z = solveField(fieldTables(...evenCoil(30, 76, 0.45, 0.4)), 1.5e6, RHO, sectionsOf(cuts));
  return [off(1e6 * terminalImpedance(z, { from: 0, to: 1 }, 'shorted in sections').inductance, microhenry)];
}

function coupled(distribution: 'spread' | 'open end'): number[] {
  const nodes = nodesFor(100, [20, 40]);
  const tables = fieldTables(...evenCoil(100, 76.6, 0.6, 0.5));
  const winding = coupledWinding(nodes, sectionInductances(tables, sectionsOf(nodes)));
  return COUPLED.map(([tap, picofarad, spreadMhz, endMhz]) => {
    const { first } = coupledResonances(winding, {
      from: 0,
      to: tap,
      earthed: 'from',
      rest: 'open',
      taps: [],
      selfCapacitance: selfCapacitance(0.06, 0.0766),
      distribution,
      tuning: picofarad * 1e-12,
      strays: [],
    });
    return off(first / 1e6, distribution === 'spread' ? spreadMhz : endMhz);
  });
}

function wholeResonance(): number[] {
  const nodes = nodesFor(100, []);
  const places = even(100, 6e-4);
  const winding = coupledWinding(nodes, sectionInductances(fieldTables(places, 0.0383, 2.5e-4), sectionsOf(nodes)));
  const L = cumulativeInductance(places, 0.0383, 2.5e-4).at(100);
  return [1e-12, 1e-11, 1e-10, 1e-9].map((tuning) => {
    const { first } = coupledResonances(winding, {
      from: 0,
      to: 100,
      earthed: 'from',
      rest: 'open',
      taps: [],
      selfCapacitance: 3.5e-12,
      distribution: 'open end',
      tuning,
      strays: [],
    });
    return off(first, resonance(L, tuning + 3.5e-12));
  });
}

/**
 * Coils as Medhurst describes them, of 30 and of 50 turns, the radius of the wire 25 skin depths; the resistance over that of the same wire
 * straight. (The ratio is no constant: 200 turns at l = D, p = 1.25 d have 22 % more, 30 turns of 10 skin depths 12 % less.)
 */
function medhurst(): number[] {
  const wire = 50 * skinDepth(1e6);
  const errors: number[] = [];
  for (const [shape, ratios] of RESISTANCE) {
    if (shape < 1 || shape === Number.POSITIVE_INFINITY) continue;
    ratios.forEach((ratio, column) => {
      const spacing = PITCH_OVER_WIRE[column]!;
      if (spacing < 1.25) return;
      for (const turns of [30, 50]) {
        const pitch = spacing * wire;
        const radius = (turns * pitch) / shape / 2;
        const z = solveField(fieldTables(even(turns, pitch), radius, wire / 2), 1e6, RHO, [{ from: 0, to: turns }]);
        const straight = turns * 2 * Math.PI * radius * direct(wire / 2) * skinRatio(wire, 1e6);
        errors.push(off(z.resistance[0]! / straight, ratio));
      }
    });
  }
  return errors;
}

function lowFrequency(): { resistance: number[]; inductance: number[] } {
  const random = seeded(99);
  const resistance: number[] = [];
  const inductance: number[] = [];
  for (let round = 0; round < 300; round++) {
    const { positions, radius, wireRadius } = randomCoil(random, 30);
    const turns = positions.length;
    const tables = fieldTables(positions, radius, wireRadius);
    const to = turns * (0.05 + 0.95 * random());
    const z = solveField(tables, 0, RHO, [{ from: 0, to }]);
    resistance.push(off(z.resistance[0]!, to * 2 * Math.PI * radius * direct(wireRadius)));
    inductance.push(off(z.inductance[0]!, cumulativeInductance(positions, radius, wireRadius).at(to)));
  }
  return { resistance, inductance };
}

/** Random coils, each solved as a whole and in parts, and by the power that goes into its wires. */
function identities(): { sums: number[]; power: number[] } {
  const random = seeded(1947);
  const sums: number[] = [];
  const power: number[] = [];
  for (let round = 0; round < 2000; round++) {
    const coil = randomCoil(random, 12);
    const tables = fieldTables(coil.positions, coil.radius, coil.wireRadius);
    const turns = coil.positions.length;
    const parts = solveField(tables, coil.frequency, RHO, sectionsOf(coil.cuts));
    const whole = solveField(tables, coil.frequency, RHO, [{ from: 0, to: turns }]);
    sums.push(off(total(parts.resistance), whole.resistance[0]!), off(total(parts.inductance), whole.inductance[0]!));
    power.push(off(total(turnLosses(tables, coil.frequency, RHO, { from: 0, to: turns })), whole.resistance[0]!));
  }
  return { sums, power };
}

/** Z_st against Z_ts and both against full elimination, which works them out one by one. */
function elimination(): { reciprocity: number[]; impedance: number[] } {
  const random = seeded(1922);
  const reciprocity: number[] = [];
  const impedance: number[] = [];
  for (let round = 0; round < 25; round++) {
    const coil = randomCoil(random, 8);
    const tables = fieldTables(coil.positions, coil.radius, coil.wireRadius);
    const sections = sectionsOf(coil.cuts);
    const got = solveField(tables, coil.frequency, RHO, sections);
    const pairs = sections.map(({ from, to }) => [from, to] as const);
    const { Z } = denseSolution({ ...coil, order: tables.order, resistivity: RHO, sections: pairs });
    Z.forEach((row, s) => {
      row.forEach(([re, im], t) => {
        const r = Math.sqrt(Z[s]![s]![0] * Z[t]![t]![0]);
        const x = Math.sqrt(Z[s]![s]![1] * Z[t]![t]![1]);
        const at = s * row.length + t;
        reciprocity.push((re - Z[t]![s]![0]) / r, (im - Z[t]![s]![1]) / x);
        impedance.push((got.resistance[at]! - re) / r);
        impedance.push((2 * Math.PI * coil.frequency * got.inductance[at]! - im) / x);
      });
    });
  }
  return { reciprocity, impedance };
}

function litz(): number[] {
  const rows = TRANSVERSE_LOSS.filter(([mm, frequency]) => mm / 1e3 < 1.5 * skinDepth(frequency));
  return rows.map(([mm, frequency, exact]) => {
    const bundle = { strands: 100, strandDiameter: mm / 1e3, takeUp: 1 };
    const huge = fieldTables([0], 1e6, 1e-3);
    const at = (f: number) => solveLitz(huge, f, RHO, bundle, [{ from: 0, to: 1 }]).resistance[0]!;
    return off((at(frequency) - at(0)) / 200 / (2 * Math.PI * 1e6), exact / (8 * Math.PI ** 2 * 1e-3 ** 2));
  });
}

function total(values: Float64Array): number {
  return values.reduce((sum, value) => sum + value, 0);
}

/** Errors of every case of the laws of the working frequency, all relative but where the ledger says absolute. */
export const WORKING_FREQUENCY: Measures = {
  'isolated-wire-exact': () =>
    spread(0.1, 100, 60).flatMap((x) => {
      const radius = (x / Math.SQRT2) * skinDepth(1e6);
      const exact = exactWire(radius, 1e6, RHO).own[0] / direct(radius);
      return [off(isolated(x), exact), off(skinRatio(2 * radius, 1e6), exact)];
    }),
  'isolated-wire-table': () => SKIN.map(([x, exact]) => isolated(x) - exact),
  'isolated-wire-printed': () =>
    SKIN.flatMap(([x, , printed]) => (printed === undefined ? [] : [off(isolated(x), printed)])),
  'isolated-turn': () =>
    spread(1e3, 1e9, 40).map((frequency) => {
      const z = solveField(fieldTables([0], 10, 5e-4), frequency, RHO, [{ from: 0, to: 1 }]);
      return off(z.resistance[0]!, 20 * Math.PI * direct(5e-4) * skinRatio(1e-3, frequency));
    }),
  'transverse-loss': () => TRANSVERSE_LOSS.map(([mm, frequency, exact]) => off(transverse(mm, frequency), exact)),
  'litz-strand-loss': litz,
  'field-direct-current': () => lowFrequency().resistance,
  'field-ring-sum': () => lowFrequency().inductance,
  'finite-elements-l': () => finiteElements().inductance,
  'finite-elements-r': () => finiteElements().resistance,
  'shorted-in-sections': shortedInSections,
  'medhurst-resistance': medhurst,
  'medhurst-capacitance': () =>
    SELF_CAPACITANCE.map(([ratio, h]) => off(selfCapacitance(0.05 * ratio, 0.05), h * 5e-12)),
  'full-elimination': () => elimination().impedance,
  reciprocity: () => elimination().reciprocity,
  'sections-add-up': () => identities().sums,
  'power-balance': () => identities().power,
  'coupled-spread': () => coupled('spread'),
  'coupled-open-end': () => coupled('open end'),
  'coupled-whole': wholeResonance,
};
