import { MU0 } from '../constants.ts';
import { allPositive, needPositive } from '../domain.ts';
import { type Excitation, excitation } from './excite.ts';
import type { SectionImpedance } from './impedance.ts';
import { type Section, sectionInductances } from './sections.ts';
import type { FieldTables } from './tables.ts';

/** A stranded bundle; its radius is the `wireRadius` of the tables. */
export interface Bundle {
  readonly strands: number;
  /** Bare diameter of one strand, m. */
  readonly strandDiameter: number;
  /** Length of a strand over that of the bundle: 1.015 for one bunching. */
  readonly takeUp: number;
}

/**
 * Impedance of sections of a winding of litz: the ring sum for its inductance, and the loss of every strand in the field it lies in.
 *
 * The bundle shields nothing (C = 0). A strand loses pi omega^2 mu0^2 sigma ds^4 H^2/128 W/m (peak H) in the field of the rings and of
 * the bundle's own curvature at its centre, and in the bundle's own, of mean square I^2/(8 pi^2 rb^2). Dead turns lose too.
 * Units: m, Hz, ohm m; `tables` made with the bundle's radius, serving left out. Domain: all positive (frequency from 0), strands
 * thinner than 1.5 skin depths (`strandLossValid`: 4 % there, 11 % at 2); beyond it says too much.
 * Source: Sullivan 1999, the strand in a known field. Accuracy: exact to rounding in the limits (direct current, one turn of a
 * huge ring); against the exact strand 4 % of the eddy part.
 *
 * Example: solveLitz(fieldTables([0, 1e-3], 0.03, 4e-4), 1e6, 1.7241e-8, { strands: 20, strandDiameter: 1e-4, takeUp: 1.015 }, [{ from: 0, to: 2 }]).resistance[0] = 0.056282
 */
export function solveLitz(
  tables: FieldTables,
  frequency: number,
  resistivity: number,
  { strands, strandDiameter, takeUp }: Bundle,
  sections: readonly Section[],
): SectionImpedance {
  if (!allPositive(strands, strandDiameter, takeUp, resistivity)) {
    needPositive({ strands, strandDiameter, takeUp, resistivity });
  }
  if (!(frequency >= 0 && frequency < Number.POSITIVE_INFINITY)) {
    throw new RangeError(`frequency must be 0 or a positive finite number, got ${frequency}`);
  }
  const inductance = sectionInductances(tables, sections);
  const count = sections.length;
  const turn = tables.shape.length * takeUp;
  const direct = (4 * resistivity * turn) / (Math.PI * strandDiameter ** 2 * strands);
  const eddy = eddyPerTurn(tables, frequency, resistivity, { strands, strandDiameter, takeUp });
  const ownSquared = (MU0 / tables.wireRadius) ** 2 / (8 * Math.PI ** 2);
  const fields = sections.map((section) => excitation(tables, section));
  const resistance = new Float64Array(count * count);
  for (let s = 0; s < count; s++) {
    for (let t = 0; t < count; t++) resistance[s * count + t] = strandLoss(tables, eddy, fields[s]!, fields[t]!);
    const turns = sections[s]!.to - sections[s]!.from;
    resistance[s * count + s]! += turns * (direct + eddy * ownSquared);
  }
  return { sections, frequency, resistance, inductance };
}

/** What the strands of a turn lose per (T peak)^2, twice: one ampere peak loses R/2. */
export function eddyPerTurn(
  tables: FieldTables,
  frequency: number,
  resistivity: number,
  { strands, strandDiameter, takeUp }: Bundle,
): number {
  const omega = 2 * Math.PI * frequency;
  const turn = tables.shape.length * takeUp;
  return (2 * strands * turn * Math.PI * omega ** 2 * strandDiameter ** 4) / (128 * resistivity);
}

/** Resistance (ohm) between the sources of two fields by the loss that they raise together in the strands. */
export function strandLoss(tables: FieldTables, eddy: number, one: Excitation, other: Excitation): number {
  let sum = 0;
  tables.presence.forEach((share, i) => {
    const along = one.along[i]! * other.along[i]!;
    sum += share * (along + one.across[i]! * other.across[i]!);
  });
  return (eddy * sum) / tables.wireRadius ** 2;
}
