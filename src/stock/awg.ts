/**
 * American Wire Gauge: bare diameter `d = 0.005 in * 92^((36 - n)/39)`.
 *
 * Units: mm out, gauge number in. Domain: any whole n; n = 36 gives 0.005 in and n = -3 (0000) 0.46 in exactly.
 * Source: ASTM B258. Status: COMPUTED; within the four-figure rounding of the table printed there.
 *
 * @example awgDiameterMm(36) // 0.127
 */
export const AWG_STANDARD = 'ASTM B258';

export function awgDiameterMm(gauge: number): number {
  return 0.127 * 92 ** ((36 - gauge) / 39);
}
