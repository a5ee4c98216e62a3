/** Named dimensions of a ribbed former, derived from the record. Lengths in millimetres, turns from the start hole. */

import type { Former, PartsRecord } from '../record/schema.ts';
import { type FormerDimensions, formerDimensions } from './dimensions.ts';

export interface RibbedDimensions extends FormerDimensions {
  readonly ribs: NonNullable<Former['ribs']>;
  /** Radius of the ribs' inner faces. */
  readonly ribInnerR: number;
  /** Where ribs end, inside the end rings. */
  readonly ribFromMm: number;
  readonly ribToMm: number;
  /** From the axis to the inner rings' flats. */
  readonly ringOuterA: number;
  readonly ringInnerA: number;
  /** Radius of the inner rings' inner corners. */
  readonly ringCornerR: number;
  /** Radius of the upper end ring where it begins. */
  readonly seatR: number;
  readonly notch: Notch;
  /** Heights of the notches of every rib, ascending; rib 0 stands at angle 0, the others follow as the wire meets them. */
  readonly notchesMm: readonly (readonly number[])[];
}

export interface Notch {
  readonly depthMm: number;
  readonly floorMm: number;
  /** Height at the rib's outer face; the flanks rise at 45 degrees. */
  readonly openMm: number;
}

/** How far ribs reach into the end rings: a third of the lower one's height stays under them. */
const INTO_LOWER = 2 / 3;
const INTO_UPPER_MM = 0.8;

/** The record's former must be ribbed. */
export function ribbedDimensions(record: PartsRecord): RibbedDimensions {
  const former = formerDimensions(record);
  const { ribs, groove } = former.former;
  if (ribs === null || groove === null) throw new Error('a ribbed former has ribs and notches');
  const { depthMm, floorMm } = groove;
  const seatR = ribs.seatDiameterMm / 2;
  return {
    ...former,
    // Notches stand in its place.
    groove: null,
    surfaceToMm: ribs.seatMm,
    ribs,
    ribInnerR: former.outsideR - ribs.depthMm,
    ribFromMm: former.surfaceFromMm * (1 - INTO_LOWER),
    ribToMm: ribs.seatMm + former.outsideR - seatR + INTO_UPPER_MM,
    ringOuterA: ribs.innerRings.acrossMm / 2,
    ringInnerA: ribs.innerRings.insideMm / 2,
    ringCornerR: ribs.innerRings.insideMm / 2 / Math.cos(Math.PI / ribs.count),
    seatR,
    notch: { depthMm, floorMm, openMm: floorMm + 2 * depthMm },
    notchesMm: notchesOf(former, ribs.count, record.windings[0]!.turns),
  };
}

/** Angle of a rib, counted as the wire meets them. */
export function ribAngleDeg(d: Pick<RibbedDimensions, 'hand' | 'ribs'>, rib: number): number {
  return ((d.hand === 'right' ? rib : d.ribs.count - rib) * 360) / d.ribs.count;
}

/** From the start to the last hole of the finish row, so that turns added in trimming lie in notches too. */
function notchesOf(former: FormerDimensions, count: number, turns: number): number[][] {
  const finish = former.holes.filter((hole) => hole.purpose === 'finish').map((hole) => hole.turn ?? 0);
  const last = Math.max(turns, ...finish);
  return Array.from({ length: count }, (_, rib) => {
    const heights: number[] = [];
    for (let k = 0; k + rib / count <= last + 1e-6; k++) heights.push(former.axialMm(k + rib / count));
    return heights;
  });
}

/** From a rib's side to the middle between two ribs, at a distance from the axis: an inner ring's underside rises as much. */
export function gableMm({ ribs }: Pick<RibbedDimensions, 'ribs'>, flatMm: number): number {
  const half = Math.PI / ribs.count;
  return flatMm * Math.tan(half) - ribs.widthMm / 2 / Math.cos(half);
}

/** Z at which the underside of an inner ring meets the ribs. */
export function ringFootMm(d: RibbedDimensions, topMm: number): number {
  return topMm - d.ribs.innerRings.crownMm - gableMm(d, d.ringOuterA);
}
