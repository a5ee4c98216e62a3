import type { Section } from './sections.ts';

/** Impedance Z_st = R_st + j omega L_st of sections, row by row: the voltage along s of one ampere in t. Symmetric. */
export interface SectionImpedance {
  /** As asked for, from the start of the winding; the matrices have a row and a column for each. */
  readonly sections: readonly Section[];
  /** Hz. */
  readonly frequency: number;
  /** ohm. */
  readonly resistance: Float64Array;
  /** H. */
  readonly inductance: Float64Array;
}
