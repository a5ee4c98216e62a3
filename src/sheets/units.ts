/** Lengths, wire and forces as the sheets write them: in the units of the record. */
export * from '../quantity/written.ts';
