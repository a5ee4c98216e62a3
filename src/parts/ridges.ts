/** Guide ridges of the former: low shelves along the helix, set on the winding surface. */
import type { FormerDimensions, RidgeSpan } from './dimensions.ts';
import { at } from './holes.ts';
import type { Loft, Point3 } from './solid.ts';

/** How far a ridge reaches into the wall. */
const SUNK_MM = 0.4;
/** It rises from almost nothing over this length at both ends, so that the wire does not catch on it. */
const RAMP_MM = 2.5;
const LEAST_MM = 0.03;

/** Height of a ridge so many turns along it; turns are lengths of the outside. */
function heightAt(d: FormerDimensions, ridge: RidgeSpan, turn: number): number {
  const end = Math.min(turn - ridge.fromTurn, ridge.toTurn - turn) * 2 * Math.PI * d.outsideR;
  return Math.max(LEAST_MM, ridge.heightMm * Math.min(1, end / RAMP_MM));
}

/** Places along a ridge: at the middles of the skin's chords, so that no two vertices fall together. */
function stations(d: FormerDimensions, { fromTurn, toTurn }: RidgeSpan): number[] {
  const n = d.segments;
  const turns = [fromTurn];
  for (let k = Math.ceil(fromTurn * n + 0.2); k < toTurn * n - 0.2; k++) turns.push(k / n);
  turns.push(toTurn);
  return turns;
}

export function ridgeAdders(d: FormerDimensions): Loft[] {
  const sense = d.hand === 'right' ? 360 : -360;
  return d.ridges.map((ridge) => {
    const ring = (turn: number): Point3[] => {
      const h = heightAt(d, ridge, turn);
      const low = d.axialMm(turn) + ridge.footMm;
      const point = (out: number, up: number) => at(turn * sense, d.outsideR + out, 0, low + up);
      return [point(-SUNK_MM, -SUNK_MM), point(h, h), point(h, ridge.widthMm), point(-SUNK_MM, ridge.widthMm)];
    };
    return { kind: 'loft', name: `${ridge.end} ridge`, rings: stations(d, ridge).map(ring), hubs: null };
  });
}

/** What the ridges add to the volume: their section times the length of its middle, by trapezoids. */
export function ridgesVolume(d: FormerDimensions): number {
  let sum = 0;
  for (const ridge of d.ridges) {
    const turns = stations(d, ridge);
    const section = (turn: number) => {
      const h = heightAt(d, ridge, turn);
      return h * (ridge.widthMm - h / 2) * 2 * Math.PI * (d.outsideR + h / 2);
    };
    for (let i = 1; i < turns.length; i++)
      sum += ((section(turns[i - 1]!) + section(turns[i]!)) / 2) * (turns[i]! - turns[i - 1]!);
  }
  return sum;
}
