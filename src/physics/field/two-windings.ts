import { MU0 } from '../constants.ts';
import { coaxialMutual } from '../maxwell.ts';
import { type Excitation, excitation } from './excite.ts';
import { type Bundle, eddyPerTurn, solveLitz, strandLoss } from './litz.ts';
import { outerExcitation } from './outside.ts';
import { ringsOf, type Section } from './sections.ts';
import { reaction, solveExcitations, solveField } from './solve.ts';
import type { FieldTables } from './tables.ts';
import { wireResponse } from './wire-response.ts';

/** One of two coaxial windings: its geometry on the common axis, and its strands when it is litz. */
export interface Side {
  readonly tables: FieldTables;
  readonly bundle: Bundle | null;
  /** As for `solveField`. */
  readonly sections: readonly Section[];
}

/** Impedance Z = R + j omega L of the sections of both, those of the first before those of the second, row by row. Symmetric. */
export interface PairImpedance {
  /** Hz. */
  readonly frequency: number;
  /** Rows of the first winding; the second's follow. */
  readonly first: number;
  readonly count: number;
  /** ohm. */
  readonly resistance: Float64Array;
  /** H. */
  readonly inductance: Float64Array;
}

/**
 * Mutual inductance M (H) of sections of two coaxial windings, low frequency: Maxwell's for every pair of rings, arcs by their fraction
 * at the place of their own middle.
 *
 * Units: m on one axis. Domain: no ring of one on a ring of the other (Infinity). Turns with corners count as circles of equal area.
 * Source: Maxwell 1873, art. 701; Grover 1946, ch. 15, for coils as sums of circles. Cost: a product of their turns.
 *
 * Example: pairMutual(fieldTables([0], 0.05, 1e-4), { from: 0, to: 1 }, fieldTables([0.04], 0.03, 1e-4), { from: 0, to: 1 }) = 1.53721e-8
 */
export function pairMutual(first: FieldTables, one: Section, second: FieldTables, other: Section): number {
  const rings = ringsOf(second, other);
  let sum = 0;
  for (const a of ringsOf(first, one))
    for (const b of rings) sum += a.fraction * b.fraction * coaxialMutual(a.radius, b.radius, a.place - b.place);
  return sum;
}

/** What the wires of `side` add to the impedance between the sources of fields that fall on it: reactance over omega, and resistance. */
function answers(
  { tables, bundle }: Side,
  frequency: number,
  resistivity: number,
  fields: readonly Excitation[],
): { inductance(s: number, t: number): number; resistance(s: number, t: number): number } {
  if (bundle !== null) {
    const eddy = eddyPerTurn(tables, frequency, resistivity, bundle);
    return { inductance: () => 0, resistance: (s, t) => strandLoss(tables, eddy, fields[s]!, fields[t]!) };
  }
  const wire = wireResponse(tables.wireRadius, frequency, resistivity, tables.order);
  const { solved } = solveExcitations(tables, wire, fields);
  const perWeber = (tables.shape.length * 2 * Math.PI) / MU0;
  const both = solved.map((s) => solved.map((t) => reaction(s, t)));
  return {
    inductance: (s, t) => perWeber * both[s]![t]![0],
    resistance: (s, t) => -2 * Math.PI * frequency * perWeber * both[s]![t]![1],
  };
}

/**
 * Resistance and inductance of the sections of two coaxial windings at a frequency, each with the field of the other: what the copper of
 * one takes from the inductance and adds to the resistance of the other, and what both do to their mutual inductance.
 *
 * Units: Hz, ohm m, m on one axis. Domain: as `solveField` for each; the windings clear one another.
 * Method: each winding answers the field of its own sections and of the other's (`outerExcitation`) by the solution of its own
 * multipoles. What the multipoles of one raise in the wires of the other, and back, is left out: with 0.5 mm wire wound close, 1 mm of
 * insulation between them and perfect conductors, it would be of the square of the change that is reckoned.
 * Source: as `solveField`. Limits: at 0 Hz the ring sums; with the windings far apart `solveField` of each.
 */
export function solvePair(first: Side, second: Side, frequency: number, resistivity: number): PairImpedance {
  const n = first.sections.length;
  const count = n + second.sections.length;
  const resistance = new Float64Array(count * count);
  const inductance = new Float64Array(count * count);
  const sides = [first, second] as const;
  sides.forEach((side, which) => {
    const from = which === 0 ? 0 : n;
    const own =
      side.bundle === null
        ? solveField(side.tables, frequency, resistivity, side.sections)
        : solveLitz(side.tables, frequency, resistivity, side.bundle, side.sections);
    const size = side.sections.length;
    for (let s = 0; s < size; s++) {
      for (let t = 0; t < size; t++) {
        resistance[(from + s) * count + from + t]! += own.resistance[s * size + t]!;
        inductance[(from + s) * count + from + t]! += own.inductance[s * size + t]!;
      }
    }
    // Its wires in every field; between its own sections that is in `own` already.
    const inside = (s: number) => s >= from && s < from + size;
    const fields = sides.flatMap((source) =>
      source.sections.map((section) =>
        source === side
          ? excitation(side.tables, section)
          : outerExcitation(side.tables, ringsOf(source.tables, section)),
      ),
    );
    const answer = answers(side, frequency, resistivity, fields);
    for (let s = 0; s < count; s++) {
      for (let t = 0; t < count; t++) {
        if (inside(s) && inside(t)) continue;
        resistance[s * count + t]! += answer.resistance(s, t);
        inductance[s * count + t]! += answer.inductance(s, t);
      }
    }
  });
  first.sections.forEach((one, s) => {
    second.sections.forEach((other, t) => {
      const mutual = pairMutual(first.tables, one, second.tables, other);
      inductance[s * count + n + t]! += mutual;
      inductance[(n + t) * count + s]! += mutual;
    });
  });
  return { frequency, first: n, count, resistance, inductance };
}
