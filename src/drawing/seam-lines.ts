/** Where the seams of a former in sections run on its outside, for pictures of the coil. */
import { axialAt } from '../coil/layout.ts';
import { seamMm, shareOf } from '../coil/seam.ts';
import type { CoilRecord } from '../record/schema.ts';

/** Steps of a drawn seam, and either side of its own step, degrees. */
const STEP_DEG = 5;
const BESIDE_DEG = 1e-6;

/**
 * Every seam as places (angle, Z) from one angle to another, in order; at the key two places stand over one another, so that
 * the step is drawn upright. None of a former that is printed whole.
 */
export function seamLines(record: CoilRecord, fromDeg: number, toDeg: number): (readonly [number, number])[][] {
  const { turnPositionsMm, turns, pitchMm } = record.windings[0]!;
  const axialMm = (turn: number) => axialAt(turnPositionsMm, turns, pitchMm, turn);
  return record.former.joints.map((joint) => {
    const angles = [fromDeg + BESIDE_DEG, toDeg - BESIDE_DEG];
    for (let a = fromDeg + STEP_DEG; a < toDeg; a += STEP_DEG) angles.push(a);
    for (const key of [-360, 0, 360].map((turn) => joint.keyDeg + turn))
      if (key > fromDeg + BESIDE_DEG && key < toDeg - BESIDE_DEG) angles.push(key - BESIDE_DEG, key + BESIDE_DEG);
    return angles
      .sort((a, b) => a - b)
      .map((a) => [a, seamMm(joint, axialMm, shareOf(joint.keyDeg, a, record.frame.hand))] as const);
  });
}
