import { allPositive, needPositive } from './domain.ts';

/** Resistivity rho of annealed copper at 20 C, ohm m (International Annealed Copper Standard; NBS Circular 31). */
export const RESISTIVITY_20C = 1.7241e-8;
/** Relative change of the resistance per kelvin about 20 C (NBS Circular 31). */
export const TEMPERATURE_COEFFICIENT = 0.00393;
/** Density of copper, kg/m^3 (NBS Circular 31). */
export const DENSITY = 8890;

/**
 * Direct-current resistance R (ohm) of copper wire at 20 C: `strands` in parallel, each of `diameter` and `length`.
 *
 * Units: m. Domain: length >= 0, diameter > 0, strands >= 1. The take-up of stranding (1.5 % a bunching, 2.5 % a cabling step) is
 * not in it. Source: NBS Circular 31, 100 % IACS.
 *
 * Example: dcResistance(24, 0.0005) = 2.1074
 */
export function dcResistance(length: number, diameter: number, strands = 1): number {
  if (!allPositive(diameter, strands)) needPositive({ diameter, strands });
  return (4 * RESISTIVITY_20C * length) / (Math.PI * diameter * diameter * strands);
}
