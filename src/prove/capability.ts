/**
 * Capability: how the spread of the coils lies in the limits of the record, by Cp and Cpk as in ISO 22514-2 (for a process whose
 * mean and spread stay, values normal; from memory): (high - low)/6s and the distance of the mean to the nearer limit over 3s, s the
 * standard deviation of all coils.
 *
 * Limits at 95 %: Cp (1 ± z/sqrt(2(n - 1))), and Cpk ± z sqrt(1/(9n) + Cpk²/(2(n - 1))) (Bissell 1990, Applied Statistics 39, 331-340,
 * from memory). Coverage by simulation at n = 25: tests/prove/capability.test.ts.
 */
import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';
import { significant } from '../record/rounding.ts';
import type { Capability } from './charts-schema.ts';

/** From so many coils on: with fewer even a perfect Cp is not known to a third of itself. */
export const CAPABLE_FROM = 25;

export type NoCapability = 'few coils' | 'not in control' | 'no limits' | 'no spread';

export interface CapabilityLimits {
  readonly low: number;
  readonly high: number;
}

/** The figures, or why there are none. `inControl` is what the chart of the same values says. */
export function capabilityOf(
  values: readonly number[],
  limits: CapabilityLimits | null,
  inControl: boolean,
): Capability | NoCapability {
  const n = values.length;
  if (n < CAPABLE_FROM) return 'few coils';
  if (limits === null) return 'no limits';
  if (!inControl) return 'not in control';
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const s = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1));
  if (s <= 1e-9 * Math.max(...values.map(Math.abs), limits.high - limits.low)) return 'no spread';
  const cp = (limits.high - limits.low) / (6 * s);
  const cpk = Math.min(limits.high - mean, mean - limits.low) / (3 * s);
  const z = normalQuantile(0.975, 0, 1);
  const cpHalf = (z * cp) / Math.sqrt(2 * (n - 1));
  const cpkHalf = z * Math.sqrt(1 / (9 * n) + cpk ** 2 / (2 * (n - 1)));
  return {
    coils: n,
    standardDeviation: significant(s),
    cp: significant(cp),
    cpLow: significant(cp - cpHalf),
    cpHigh: significant(cp + cpHalf),
    cpk: significant(cpk),
    cpkLow: significant(cpk - cpkHalf),
    cpkHigh: significant(cpk + cpkHalf),
  };
}
