/** A second winding on the main former, as far as it is in front, to the scale of the elevation. */
import type { SecondEntry } from '../record/around-schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Shape } from './drawing.ts';
import { polyline } from './shapes.ts';

/** Null for one that is wound on something else. */
export function secondHere(record: CoilRecord): SecondEntry | null {
  const second = record.around?.second ?? null;
  return second?.kind === 'same former' ? second : null;
}

const STEP_DEG = 15;

/** The front half of every turn, as far as it is wound. */
export function secondTurns(record: CoilRecord, s: number): Shape[] {
  const second = secondHere(record);
  if (second === null) return [];
  const { startMm, finishMm, pitchMm, meanDiameterMm, turns, wire, holes } = second;
  const begin = holes.find(({ label }) => label === 'P1')?.angleDeg ?? 0;
  const sense = record.frame.hand === 'right' ? 1 : -1;
  const shapes: Shape[] = [];
  for (let k = -1; k <= turns; k++) {
    const points: [number, number][] = [];
    for (let a = -90; a <= 90; a += STEP_DEG) {
      // Turns from P1 at which the wire passes this angle, the one of the k-th time round.
      const u = k + ((((sense * (a - begin)) % 360) + 360) % 360) / 360;
      const z = startMm + u * pitchMm;
      if (z < startMm - 1e-6 || z > finishMm + 1e-6) continue;
      points.push([(meanDiameterMm / 2) * s * Math.sin((a * Math.PI) / 180), z * s]);
    }
    if (points.length > 1) shapes.push(polyline(points, wire.overallMm * s > 0.6 ? 'thin' : 'hair'));
  }
  return shapes;
}
