import { MU0 } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';
import { maxwellFactor } from './elliptic.ts';

/**
 * Own inductance L (H) of one ring of round wire, current spread evenly over its section:
 * mu0 R (ln(8 R/a) - 7/4 + (a/R)^2/8 (ln(8 R/a) + 1/3)).
 *
 * Units: m; R to the wire's centre, a the bare radius. Domain: 0 < a < R; grows without limit as a -> 0.
 * Source: Rayleigh & Niven 1881; Grover 1946, ch. 16. Accuracy: the next term is of the order (a/R)^4.
 *
 * Example: ringSelf(0.05, 0.0005) = 3.10056e-7
 */
export function ringSelf(radius: number, wireRadius: number): number {
  if (!allPositive(radius, wireRadius)) needPositive({ radius, wireRadius });
  const log = Math.log((8 * radius) / wireRadius);
  const thickness = wireRadius / radius;
  return MU0 * radius * (log - 1.75 + ((thickness * thickness) / 8) * (log + 1 / 3));
}

/**
 * Mutual inductance M (H) of two coaxial circles of the same radius, `distance` apart along the axis (either sign).
 *
 * Units: m. Domain: radius > 0, distance not 0, where M grows without limit (returned as Infinity).
 * Source: Maxwell 1873, art. 701. Accuracy: 1e-14 relative against Neumann's integral over 40 distances from 0.02 to 4 radii, 1e-11 against
 * the dipole form beyond 1000 radii.
 *
 * Example: ringMutual(0.05, 0.05) = 2.47039e-8
 */
export function ringMutual(radius: number, distance: number): number {
  const span = 4 * radius * radius + distance * distance;
  return MU0 * radius * maxwellFactor((4 * radius * radius) / span, Math.abs(distance) / Math.sqrt(span));
}

/**
 * Mutual inductance M (H) of two coaxial circles of radius `r1` and `r2`, `distance` apart along the axis (either sign).
 *
 * Units: m. Domain: radii > 0; Infinity where the circles coincide.
 * Source: Maxwell 1873, art. 701. Accuracy: 1e-14 relative against Neumann's integral over 40 distances.
 *
 * Example: coaxialMutual(0.05, 0.03, 0.04) = 1.53721e-8
 */
export function coaxialMutual(r1: number, r2: number, distance: number): number {
  const span = (r1 + r2) * (r1 + r2) + distance * distance;
  const kPrime = Math.hypot(r1 - r2, distance) / Math.sqrt(span);
  return MU0 * Math.sqrt(r1 * r2) * maxwellFactor((4 * r1 * r2) / span, kPrime);
}
