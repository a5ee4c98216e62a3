/** Metric screws that the jigs are put together with. Sizes of M4 by ISO 4032, 7046, 273 and 7093, from memory. */

export const M4 = {
  /** Of the hole that it goes through (medium fit). */
  holeMm: 4.5,
  /** Of the hole in plastic that it cuts its own thread into. */
  pilotMm: 3.4,
  nutAcrossFlatsMm: 7,
  nutHeightMm: 3.2,
  /** Of a countersunk head at its rim, sharp; its cone is 90 degrees. */
  sinkMm: 9.4,
  /** Large washer. */
  washerMm: 12,
} as const;

/** Added to a nut's width and height for the pocket that it is pushed into by hand. */
export const NUT_PLAY_MM = 0.3;

/** Lengths that are sold, mm. */
const LENGTHS_MM = [10, 12, 16, 20, 25, 30, 35, 40, 45, 50, 60, 70, 80];

/** The shortest that reaches `mm`; threaded rod, by the centimetre, where none does. */
export function screwLengthMm(mm: number): number {
  return LENGTHS_MM.find((length) => length >= mm) ?? 10 * Math.ceil(mm / 10);
}
