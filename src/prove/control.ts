/**
 * Chart of individuals and moving ranges: centre lines, limits, and the signs that something has changed.
 *
 * Limits as in ISO 7870-2:2013 for individuals: mean ± 3 (mean moving range)/d2 with ranges of two neighbours, and D4 times the mean
 * range above. Signs: a value beyond the limits (ISO 7870-2:2013), and eight values in a row on one side of the centre line
 * (ASTM E2587, as in the Western Electric rules). All from memory. A range above its limit is shown but is no sign of its own:
 * with nothing changed one range in 110 lies there, and each value far off already has two.
 *
 * How often a chart shows a sign though nothing has changed is in `chancePercent`, by simulation (tests/prove/control.test.ts).
 */
import { rangeConstants } from './range-constants.ts';

/** Values on one side of the centre line that are no chance any more. */
export const RUN_LENGTH = 8;
/** From so many values on limits are settled (common practice, from memory). */
export const SETTLED_FROM = 20;
/** Differences by this share of the values are those of arithmetic. */
const SAME = 1e-9;

export interface Control {
  readonly centre: number;
  readonly lower: number;
  readonly upper: number;
  /** Of each value to the one before; null for the first. */
  readonly ranges: readonly (number | null)[];
  readonly rangeCentre: number;
  readonly rangeUpper: number;
  readonly beyond: readonly boolean[];
  readonly rangeBeyond: readonly boolean[];
  /** Part of a run. */
  readonly run: readonly boolean[];
  readonly inControl: boolean;
}

const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

/** Values and ranges that limits are taken from. */
function settled(values: readonly number[], ranges: readonly (number | null)[], leftOut: ReadonlySet<number>) {
  const own = values.filter((_, i) => !leftOut.has(i));
  const between = ranges.filter((range, i) => range !== null && !leftOut.has(i) && !leftOut.has(i - 1));
  return { own, between: between as number[] };
}

/** Values of stretches of at least {@link RUN_LENGTH} on one side; one on the line ends a stretch. */
function runs(values: readonly number[], centre: number, same: number): boolean[] {
  const side = values.map((value) => (Math.abs(value - centre) <= same ? 0 : Math.sign(value - centre)));
  const marked = values.map(() => false);
  let from = 0;
  for (let i = 0; i <= side.length; i++) {
    if (i < side.length && side[i] === side[from]) continue;
    if (side[from] !== 0 && i - from >= RUN_LENGTH) marked.fill(true, from, i);
    from = i;
  }
  return marked;
}

/**
 * Charts out of 100 of so many normal values, drawn one like the other, that show a sign all the same. 2.7 values in a thousand lie
 * beyond three standard deviations, a run begins at one in 256; limits and line from the values themselves take a little off.
 * The offsets are fitted to simulation from 8 to 400 values, to 2.5 charts.
 *
 * Example: chancePercent(25) = 9.12
 */
export function chancePercent(count: number): number {
  const beyond = Math.max(0, 0.00266 * count - 0.006);
  const runs = Math.max(0, count - 2 * RUN_LENGTH) / 256;
  return 100 * (1 - Math.exp(-beyond - runs));
}

/**
 * The chart of values in their order, in their own unit. `leftOut` are those, by their index, that do not belong to the rest: limits are
 * taken without them and their ranges, and they are held against the limits like any other.
 *
 * Domain: all finite, two neighbours at least that are not left out, RangeError otherwise.
 *
 * Example: controlOf([49.6, 47.6, 49.9, 51.3, 47.8, 51.2, 52.6, 52.4, 53.6, 52.1]).upper = 55.804
 */
export function controlOf(values: readonly number[], leftOut: ReadonlySet<number> = new Set()): Control {
  const { d2, D4 } = rangeConstants(2);
  const ranges = values.map((value, i) => (i === 0 ? null : Math.abs(value - values[i - 1]!)));
  const { own, between } = settled(values, ranges, leftOut);
  if (between.length === 0 || !values.every(Number.isFinite))
    throw new RangeError(`a chart needs two finite values at least that are neighbours, got ${own.length}`);
  const centre = mean(own);
  const rangeCentre = mean(between);
  const reach = (3 * rangeCentre) / d2;
  const rangeUpper = D4 * rangeCentre;
  const same = SAME * Math.max(...values.map(Math.abs));
  const beyond = values.map((value) => Math.abs(value - centre) > reach + same);
  const run = runs(values, centre, same);
  return {
    centre,
    lower: centre - reach,
    upper: centre + reach,
    ranges,
    rangeCentre,
    rangeUpper,
    beyond,
    rangeBeyond: ranges.map((range) => range !== null && range > rangeUpper + same),
    run,
    inControl: !beyond.includes(true) && !run.includes(true),
  };
}
