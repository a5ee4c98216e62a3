/** Inductance of a stretch of a winding from where its turns lie, every pair of turns taken by itself. */
import { arcShare, oneRing, placeAt, twoCircles, type Winding } from '../coil/brute.ts';

interface Part {
  readonly z: number;
  readonly share: number;
}

/** What a stretch holds of each turn: whole rings, and arcs at the place of their own middle; m. */
function partsOf(winding: Winding, from: number, to: number): Part[] {
  const parts: Part[] = [];
  for (let k = Math.floor(from + 1e-9); k < to - 1e-9; k++) {
    const [a, b] = [Math.max(from, k), Math.min(to, k + 1)];
    const whole = b - a > 1 - 1e-9;
    parts.push({ z: (whole ? winding.places[k]! : placeAt(winding, (a + b) / 2)) / 1e3, share: whole ? 1 : b - a });
  }
  return parts;
}

/** Turns from..to, uH. The mutual term of an arc and a ring is exact by symmetry; of two arcs it is taken likewise. */
export function stretchUh(winding: Winding, from: number, to: number): number {
  const [R, a] = [winding.meanDiameterMm / 2e3, winding.bareMm / 2e3];
  const parts = partsOf(winding, from, to);
  let sum = 0;
  parts.forEach((one, i) => {
    sum += oneRing(R, a) * (one.share === 1 ? 1 : arcShare(one.share, R, a));
    for (const other of parts.slice(0, i)) sum += 2 * one.share * other.share * twoCircles(R, one.z - other.z);
  });
  return sum * 1e6;
}
