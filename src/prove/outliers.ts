/**
 * Outliers by the generalized extreme studentized deviate test: Rosner 1983 (Technometrics 25, 165-172), as in ISO 16269-4:2010,
 * from memory. Two-sided, for values that are normal but for the outliers.
 *
 * One value after the other, the farthest from the mean, is taken out, up to as many as are suspected; the last whose distance in
 * standard deviations is above its critical value is an outlier, and so are all taken out before it, hidden by one another
 * as they may have been.
 *
 * False alarms: for one suspected value the critical value is exact at any count (it is Grubbs's then); for more it is near from 15
 * values on and good from 25 on (Rosner). Simulated rates are in tests/prove/outliers.test.ts.
 */
import tQuantile from '@stdlib/stats-base-dists-t-quantile';

export const ALPHA = 0.05;
/** With fewer, one value that is off can hardly be told from the spread of the others. */
export const LEAST_VALUES = 8;
const MOST_SUSPECTED = 10;

/** How many outliers are looked for among so many values: a tenth of them, one at least and ten at most. */
export function suspectedAmong(count: number): number {
  if (count < LEAST_VALUES) return 0;
  return Math.min(MOST_SUSPECTED, Math.max(1, Math.floor(count / 10)));
}

export interface DeviateStep {
  /** Which of the values was farthest. */
  readonly index: number;
  /** Its distance from the mean of those left, in their standard deviations. */
  readonly deviate: number;
  readonly critical: number;
}

export interface Outliers {
  readonly steps: readonly DeviateStep[];
  /** Indices, the farthest first. */
  readonly outliers: readonly number[];
}

/** Of the i-th step, from 1, among n values. */
export function criticalDeviate(n: number, i: number, alpha = ALPHA): number {
  const left = n - i;
  const t = tQuantile(1 - alpha / (2 * (left + 1)), left - 1);
  return (left * t) / Math.sqrt((left - 1 + t * t) * (left + 1));
}

/**
 * Domain: at least {@link LEAST_VALUES} finite values and `suspected` from 1 to half of them, RangeError otherwise.
 *
 * Example: outliersIn([10, 11, 10, 9, 10, 11, 9, 10, 30], 1).outliers[0] = 8
 */
export function outliersIn(values: readonly number[], suspected: number, alpha = ALPHA): Outliers {
  if (values.length < LEAST_VALUES || !values.every(Number.isFinite))
    throw new RangeError(`outliers want ${LEAST_VALUES} finite values, got ${values.length}`);
  if (!(suspected >= 1 && suspected <= values.length / 2))
    throw new RangeError(`${suspected} outliers cannot be looked for among ${values.length} values`);
  let left = values.map((value, index) => ({ value, index }));
  const steps: DeviateStep[] = [];
  for (let i = 1; i <= suspected; i++) {
    const mean = left.reduce((sum, { value }) => sum + value, 0) / left.length;
    const squares = left.reduce((sum, { value }) => sum + (value - mean) ** 2, 0);
    const deviation = Math.sqrt(squares / (left.length - 1));
    // Readings that are all the same have no spread to measure by.
    if (deviation <= 1e-12 * Math.max(...left.map(({ value }) => Math.abs(value)))) break;
    const farthest = left.reduce((a, b) => (Math.abs(b.value - mean) > Math.abs(a.value - mean) ? b : a));
    const deviate = Math.abs(farthest.value - mean) / deviation;
    steps.push({ index: farthest.index, deviate, critical: criticalDeviate(values.length, i, alpha) });
    left = left.filter((one) => one !== farthest);
  }
  const count = steps.findLastIndex(({ deviate, critical }) => deviate > critical) + 1;
  return { steps, outliers: steps.slice(0, count).map(({ index }) => index) };
}
