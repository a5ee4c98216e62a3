import { SPEED_OF_LIGHT } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';

/**
 * Resonant frequency f (Hz) of an inductance (H) and a capacitance (F): 1/(2 pi sqrt(L C)).
 *
 * Domain: both positive. Source: Thomson 1853. Exact.
 *
 * Example: resonance(240e-6, 100e-12) = 1.02734e6
 */
export function resonance(inductance: number, capacitance: number): number {
  if (!allPositive(inductance, capacitance)) needPositive({ inductance, capacitance });
  return 1 / (2 * Math.PI * Math.sqrt(inductance * capacitance));
}

/**
 * Inductance L (H) that tunes to `frequency` (Hz) with `capacitance` (F). Domain: both positive. Source: Thomson 1853. Exact.
 *
 * Example: inductanceFor(1e6, 100e-12) = 2.5330e-4
 */
export function inductanceFor(frequency: number, capacitance: number): number {
  if (!allPositive(frequency, capacitance)) needPositive({ frequency, capacitance });
  return 1 / ((2 * Math.PI * frequency) ** 2 * capacitance);
}

/**
 * Capacitance C (F) that tunes `inductance` (H) to `frequency` (Hz). Domain: both positive. Source: Thomson 1853. Exact.
 *
 * Example: capacitanceFor(1e6, 253.3e-6) = 1.0000e-10
 */
export function capacitanceFor(frequency: number, inductance: number): number {
  if (!allPositive(frequency, inductance)) needPositive({ frequency, inductance });
  return 1 / ((2 * Math.PI * frequency) ** 2 * inductance);
}

/**
 * Wavelength lambda (m) in free space of `frequency` (Hz): c/f. Domain: positive. Exact.
 *
 * Example: wavelength(1e6) = 299.792458
 */
export function wavelength(frequency: number): number {
  if (!allPositive(frequency)) needPositive({ frequency });
  return SPEED_OF_LIGHT / frequency;
}
