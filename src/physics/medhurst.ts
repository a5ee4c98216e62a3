import { allPositive, needPositive } from './domain.ts';

/**
 * Self-capacitance C (F) of a single-layer coil with one end earthed: H(l/D) x D, 1 pF per cm of diameter for H = 1.
 *
 * Units: m; the length is the electrical one, turns x pitch. Domain: both positive; measured for l/D from 0.1 to 50, outside the
 * value of H at the nearer end is kept (ask `selfCapacitanceValid`).
 * Source: Medhurst 1947, Wireless Engineer 24, 35 and 80; 33 points, READ as quoted in a public archive of 1997. Between them a
 * monotone cubic (Fritsch & Carlson 1980) of ln H against ln(l/D), without overshoot at the flat minimum near l = D.
 * Accuracy: exact at the points; 5 % measured, on solid polystyrene rod; a thick or denser former adds to it.
 *
 * Example: selfCapacitance(0.06, 0.0766) = 3.5272e-12
 */
export function selfCapacitance(length: number, diameter: number): number {
  if (!allPositive(length, diameter)) needPositive({ length, diameter });
  const x = Math.min(Math.max(Math.log(length / diameter), LOG_RATIO[0]!), LOG_RATIO.at(-1)!);
  let i = 0;
  while (i < LOG_RATIO.length - 2 && x > LOG_RATIO[i + 1]!) i++;
  const width = LOG_RATIO[i + 1]! - LOG_RATIO[i]!;
  const t = (x - LOG_RATIO[i]!) / width;
  const u = 1 - t;
  const ends = u * u * (1 + 2 * t) * LOG_H[i]! + t * t * (1 + 2 * u) * LOG_H[i + 1]!;
  const slopes = width * t * u * (u * SLOPE[i]! - t * SLOPE[i + 1]!);
  return Math.exp(ends + slopes) * 1e-10 * diameter;
}

/**
 * Whether a length over diameter lies within Medhurst's measurements of self-capacitance, 0.1 to 50.
 *
 * Example: selfCapacitanceValid(60) = false
 */
export function selfCapacitanceValid(lengthOverDiameter: number): boolean {
  return lengthOverDiameter >= 0.1 && lengthOverDiameter <= 50;
}

/**
 * High-frequency resistance of a single-layer coil over that of the same wire straight (dimensionless).
 *
 * Domain: length/diameter >= 0 (Infinity allowed), pitch over bare diameter > 0; clamped at touching wires (1). A coil spaced
 * wider than 10 diameters goes on to the straight wire, ratio 1, which is the limit by definition.
 * Source: Medhurst 1947, FROM MEMORY; measured coils of 30 turns and more of wire much thicker than the skin depth.
 * Bilinear in d/p (in which his columns are even) and in l/(l + D) (in which his last row, an endless coil, is at 1).
 * One remembered entry, 1.20 at length 0 and pitch 2.5 d, breaks its row and column; 1.26 is put there.
 * Accuracy: exact at the entries; 5 % of field solutions for l >= D and p >= 1.25 d; short close coils lose more than it says.
 *
 * Example: resistanceRatio(1, 1.25) = 3.17
 */
export function resistanceRatio(lengthOverDiameter: number, pitchOverWire: number): number {
  if (!(lengthOverDiameter >= 0)) throw new RangeError(`length/diameter must be 0 or more, got ${lengthOverDiameter}`);
  if (!(pitchOverWire > 0)) throw new RangeError(`pitch/wire must be positive, got ${pitchOverWire}`);
  const fill = Math.min(1 / pitchOverWire, 1);
  // Column c holds d/p = (10 - c)/10; the straight wire is column 10.
  const column = Math.min(Math.floor(10 * (1 - fill)), 9);
  const across = 10 * (1 - fill) - column;
  const shape = reach(lengthOverDiameter);
  let row = 0;
  while (row < REACH.length - 2 && shape > REACH[row + 1]!) row++;
  const down = (shape - REACH[row]!) / (REACH[row + 1]! - REACH[row]!);
  const along = (r: number) => (1 - across) * entry(r, column) + across * entry(r, column + 1);
  return (1 - down) * along(row) + down * along(row + 1);
}

function entry(row: number, column: number): number {
  return column === 10 ? 1 : RATIOS[row]![1][column]!;
}

function reach(lengthOverDiameter: number): number {
  return lengthOverDiameter === Number.POSITIVE_INFINITY ? 1 : lengthOverDiameter / (1 + lengthOverDiameter);
}

/** Length/diameter, H in pF per cm of diameter. */
const SELF_CAPACITANCE: readonly (readonly [number, number])[] = [
  [0.1, 0.96],
  [0.15, 0.79],
  [0.2, 0.7],
  [0.25, 0.64],
  [0.3, 0.6],
  [0.35, 0.57],
  [0.4, 0.54],
  [0.45, 0.52],
  [0.5, 0.5],
  [0.6, 0.48],
  [0.7, 0.47],
  [0.8, 0.46],
  [0.9, 0.46],
  [1, 0.46],
  [1.5, 0.47],
  [2, 0.5],
  [2.5, 0.56],
  [3, 0.61],
  [3.5, 0.67],
  [4, 0.72],
  [4.5, 0.77],
  [5, 0.81],
  [6, 0.92],
  [7, 1.01],
  [8, 1.12],
  [9, 1.22],
  [10, 1.32],
  [15, 1.86],
  [20, 2.36],
  [25, 2.9],
  [30, 3.4],
  [40, 4.6],
  [50, 5.8],
];

/** Length/diameter, then the ratio for bare diameter/pitch 1.0, 0.9, ... 0.1. */
const RATIOS: readonly (readonly [number, readonly number[]])[] = [
  [0, [5.31, 3.73, 2.74, 2.12, 1.74, 1.44, 1.26, 1.16, 1.07, 1.02]],
  [0.2, [5.45, 3.84, 2.83, 2.2, 1.77, 1.48, 1.29, 1.19, 1.08, 1.02]],
  [0.4, [5.65, 3.99, 2.97, 2.28, 1.83, 1.54, 1.33, 1.21, 1.08, 1.03]],
  [0.6, [5.8, 4.11, 3.1, 2.38, 1.89, 1.6, 1.38, 1.22, 1.1, 1.03]],
  [0.8, [5.8, 4.17, 3.2, 2.44, 1.92, 1.64, 1.42, 1.23, 1.1, 1.03]],
  [1, [5.55, 4.1, 3.17, 2.47, 1.94, 1.67, 1.45, 1.24, 1.1, 1.03]],
  [2, [4.1, 3.36, 2.74, 2.32, 1.98, 1.74, 1.5, 1.28, 1.13, 1.04]],
  [4, [3.54, 3.05, 2.6, 2.27, 2.01, 1.78, 1.54, 1.32, 1.15, 1.04]],
  [6, [3.31, 2.92, 2.6, 2.29, 2.03, 1.8, 1.56, 1.34, 1.16, 1.04]],
  [8, [3.2, 2.9, 2.62, 2.34, 2.08, 1.81, 1.57, 1.34, 1.165, 1.04]],
  [10, [3.23, 2.93, 2.65, 2.37, 2.1, 1.83, 1.58, 1.35, 1.17, 1.04]],
  [Number.POSITIVE_INFINITY, [3.41, 3.11, 2.815, 2.51, 2.22, 1.93, 1.65, 1.395, 1.19, 1.05]],
];

const REACH = RATIOS.map(([ratio]) => reach(ratio));
const LOG_RATIO = SELF_CAPACITANCE.map(([ratio]) => Math.log(ratio));
const LOG_H = SELF_CAPACITANCE.map(([, h]) => Math.log(h));
const SLOPE = monotoneSlopes(LOG_RATIO, LOG_H);

/**
 * Slopes at the points of a cubic that rises and falls only where its points do: harmonic means of the chords on both sides.
 * Beside a flat chord, as there is at the minimum, the mean is 0; these points never turn without one.
 */
function monotoneSlopes(x: readonly number[], y: readonly number[]): number[] {
  const chord = (i: number) => (y[i + 1]! - y[i]!) / (x[i + 1]! - x[i]!);
  const last = x.length - 1;
  return x.map((_, i) => {
    if (i === 0) return chord(0);
    if (i === last) return chord(last - 1);
    const [before, after] = [chord(i - 1), chord(i)];
    const [left, right] = [x[i]! - x[i - 1]!, x[i + 1]! - x[i]!];
    const [p, q] = [left + 2 * right, 2 * left + right];
    return (p + q) / (p / before + q / after);
  });
}
