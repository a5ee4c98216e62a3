/**
 * The field of every turn at the working frequency: tables of a winding once, then resistance and inductance of its sections at any
 * frequency, and what a switch makes of them.
 */
export type { SectionImpedance } from './impedance.ts';
export { type Bundle, solveLitz } from './litz.ts';
export { turnLosses } from './losses.ts';
export { fieldOrder } from './order.ts';
export { type Section, sectionInductances } from './sections.ts';
export { type FieldSolution, solveField } from './solve.ts';
export { type FieldOptions, type FieldTables, fieldTables } from './tables.ts';
export { resistivityAt } from './temperature.ts';
export { type Rest, type Terminal, terminalImpedance, type Used } from './terminal.ts';
export { type WireResponse, wireResponse } from './wire-response.ts';
