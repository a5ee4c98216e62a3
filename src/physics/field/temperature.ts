import { RESISTIVITY_20C, TEMPERATURE_COEFFICIENT } from '../copper.ts';

/**
 * Resistivity rho (ohm m) of annealed copper at a temperature in degrees Celsius: rho20 (1 + 0.00393 (t - 20)).
 *
 * Domain: -100 to 200 C, where copper is straight to 1 %; RangeError outside. Source: NBS Circular 31.
 *
 * Example: resistivityAt(40) = 1.85961e-8
 */
export function resistivityAt(celsius: number): number {
  if (!(celsius >= -100 && celsius <= 200)) throw new RangeError(`copper must be at -100 to 200 C, got ${celsius}`);
  return RESISTIVITY_20C * (1 + TEMPERATURE_COEFFICIENT * (celsius - 20));
}
