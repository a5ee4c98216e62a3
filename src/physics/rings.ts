/** A winding as coaxial rings: Maxwell's circles, the arc that ends a part turn, and their sums. */
export { arcOwnShare } from './arc.ts';
export { coaxialMutual, ringMutual, ringSelf } from './maxwell.ts';
export { type CumulativeInductance, cumulativeInductance, ringSumMatrixFree } from './ring-sum.ts';
export { roundTurn, type TurnShape } from './turn-shape.ts';
