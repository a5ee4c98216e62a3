/**
 * Seams of a former that is printed in sections. A helical winding crosses every plane, so a seam among its turns climbs
 * with them: it lies midway between the wire and the wire a turn farther on, rises by a pitch in a turn, and falls back by
 * one step at its key angle. Outside the winding a seam is flat.
 *
 *              outside
 *      lower   | upper      the seam falls inwards at 45 degrees, so that the upper section prints without supports;
 *         \    |            below it a spigot of the upper section goes down into the bore of the lower
 *          \___|
 *
 * Millimetres, turns from the start hole.
 */

/** What tells where a seam lies. */
export interface Seam {
  /** The seam at its key lies midway between this turn and the next; null for a flat one. */
  readonly turn: number | null;
  /** Z on the outside at the key, at the foot of the step. */
  readonly seamMm: number;
  /** Height of the step: what the seam rises in its turn. */
  readonly climbMm: number;
  readonly spigotMm: number;
}

/** Places of turns along the axis. */
export type AxialMm = (turn: number) => number;

/** Midway between a turn and the next. */
export function midwayMm(axialMm: AxialMm, turn: number): number {
  return (axialMm(turn) + axialMm(turn + 1)) / 2;
}

/** Z of the seam on the outside, `share` of a turn on from its key the way the winding climbs. */
export function seamMm(seam: Seam, axialMm: AxialMm, share: number): number {
  return seam.turn === null ? seam.seamMm : midwayMm(axialMm, seam.turn + share);
}

/** Share of a turn from the key angle to another, the way the winding climbs, 0 to 1. */
export function shareOf(keyDeg: number, angleDeg: number, hand: 'right' | 'left'): number {
  const turn = (hand === 'right' ? angleDeg - keyDeg : keyDeg - angleDeg) / 360;
  return turn - Math.floor(turn);
}

/** What of a joint depends on the former and the printer alone. */
export interface Joining {
  readonly outsideR: number;
  readonly boreR: number;
  /** Radii of the spigot. */
  readonly spigotR: number;
  readonly ringR: number;
  readonly tongueWidthMm: number;
  /** How far the tongue stands out of the bore below. */
  readonly tongueReachMm: number;
  readonly notchWidthMm: number;
  /** Least that stays between a joint and a hole. */
  readonly marginMm: number;
}

/** Lines of the spigot's wall; of the tongue's width and its reach into the notch. */
const RING_LINES = 3;
const TONGUE_LINES = 5;
const REACH_LINES = 2;
const MARGIN_LINES = 2;

/** Sizes of the joints of a former; `glueGapMm` on the radius, the clearance between printed parts on the tongue's width. */
export function joiningOf(
  outsideR: number,
  boreR: number,
  glueGapMm: number,
  { lineMm, clearanceMm }: { readonly lineMm: number; readonly clearanceMm: number },
): Joining {
  const spigotR = boreR - glueGapMm;
  return {
    outsideR,
    boreR,
    spigotR,
    ringR: spigotR - RING_LINES * lineMm,
    tongueWidthMm: TONGUE_LINES * lineMm,
    tongueReachMm: glueGapMm + REACH_LINES * lineMm,
    notchWidthMm: TONGUE_LINES * lineMm + clearanceMm,
    marginMm: MARGIN_LINES * lineMm,
  };
}

/** The spigot goes down by this share of the bore at least, and by so many millimetres: a joint as stiff as the wall. */
const SPIGOT_OF_BORE = 0.15;
const LEAST_SPIGOT_MM = 8;

export const spigotFor = (boreR: number): number => Math.max(LEAST_SPIGOT_MM, 2 * SPIGOT_OF_BORE * boreR);

/** Z of the seam at the bore at the key, where it is lowest. */
export const innerSeamMm = (seam: Seam, j: Joining): number => seam.seamMm - (j.outsideR - j.boreR);

/** Z of the spigot's lower end, on which the upper section is printed. */
export const spigotEndMm = (seam: Seam, j: Joining): number => innerSeamMm(seam, j) - seam.spigotMm;

/** The spigot goes on above the seam as a collar of this height ... */
export const collarMm = (seam: Seam): number => seam.seamMm + seam.climbMm;
/** ... and runs back to the bore at 45 degrees up to here. */
export const collarEndMm = (seam: Seam, j: Joining): number => collarMm(seam) + j.boreR - j.ringR;
