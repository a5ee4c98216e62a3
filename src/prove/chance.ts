/** Chances of what is drawn at random. */

/** Of a standard normal value above z; error below 1.5e-7 (Abramowitz and Stegun 1964, 7.1.26). */
function above(z: number): number {
  const x = Math.abs(z) / Math.SQRT2;
  const t = 1 / (1 + 0.3275911 * x);
  const series = ((((1.061405429 * t - 1.453152027) * t + 1.421413741) * t - 0.284496736) * t + 0.254829592) * t;
  const tail = (series * Math.exp(-x * x)) / 2;
  return z >= 0 ? tail : 1 - tail;
}

/**
 * That chi-square of so many degrees is as great, 0 to 1: by the cube root, which is nearly normal (Wilson and Hilferty 1931, Proc. Nat.
 * Acad. Sci. 17, 684-688). Within 0.01 from two degrees on, from memory.
 */
export function chanceOfChiSquare(chiSquare: number, degrees: number): number {
  if (degrees <= 0) return 1;
  const spread = 2 / (9 * degrees);
  return above((Math.cbrt(Math.max(0, chiSquare) / degrees) - 1 + spread) / Math.sqrt(spread));
}
