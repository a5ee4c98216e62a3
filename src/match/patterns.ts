/**
 * Taps that are lost, proposed from the pattern of the rest. Three patterns of turns are tried against the taps that are known:
 * equal steps, steps that grow by the same amount, and an equal ratio. Builders rounded to whole turns and to what looked even, so a
 * tap of a pattern is off it by about SLOP (common practice, from memory). Patterns share the evidence by the Bayesian information
 * criterion (Schwarz 1978), which charges every free number.
 */
import { cholesky, dot, gram, solveWith, varianceBy } from './linear.ts';
import type { Proposal } from './types.ts';

export interface Placed {
  /** Number among all taps, from 0. */
  readonly index: number;
  readonly turn: number;
}

export interface LostTap {
  readonly index: number;
  readonly name: string;
  readonly proposals: readonly Proposal[];
  /** Whole turns and their weights over all patterns, the likeliest first. */
  readonly candidates: readonly { readonly turn: number; readonly weight: number }[];
}

/** Rounding to a turn, and a little more, turns. */
const SLOP = 0.5;
/** Of a pattern that explains the known taps by a ratio, its slop is still in turns. */
const FEWEST_WEIGHT = 1e-4;

interface Pattern {
  readonly name: Proposal['pattern'];
  readonly numbers: number;
  /** Turns linear in these of the tap's number, after `to`. */
  readonly basis: (index: number) => number[];
  readonly log: boolean;
}

const PATTERNS: readonly Pattern[] = [
  { name: 'equal steps', numbers: 2, basis: (i) => [1, i], log: false },
  { name: 'growing steps', numbers: 3, basis: (i) => [1, i, i * i], log: false },
  { name: 'equal ratio', numbers: 2, basis: (i) => [1, i], log: true },
];

interface Fitted {
  readonly pattern: Pattern;
  readonly criterion: number;
  readonly at: (index: number) => { turn: number; sigma: number };
}

function fitted(pattern: Pattern, known: readonly Placed[]): Fitted | null {
  const { basis, log, numbers } = pattern;
  if (known.length < numbers) return null;
  const sigmas = known.map(({ turn }) => (log ? SLOP / turn : SLOP));
  const rows = known.map(({ index }, i) => Float64Array.from(basis(index), (value) => value / sigmas[i]!));
  const values = known.map(({ turn }, i) => (log ? Math.log(turn) : turn) / sigmas[i]!);
  const lower = cholesky(gram(rows, numbers));
  if (lower === null) return null;
  const b = new Float64Array(numbers);
  rows.forEach((row, i) => {
    for (let k = 0; k < numbers; k++) b[k]! += row[k]! * values[i]!;
  });
  const solved = solveWith(lower, b);
  const chi = rows.reduce((sum, row, i) => sum + (dot(row, solved) - values[i]!) ** 2, 0);
  const spare = known.length - numbers;
  // Taps that stand off the pattern by more than the slop say how far one may be off.
  const stretch = Math.max(1, spare > 0 ? chi / spare : 1);
  const at = (index: number) => {
    const row = Float64Array.from(basis(index));
    const value = dot(row, solved);
    const turn = log ? Math.exp(value) : value;
    const variance = varianceBy(lower, row) * (log ? turn ** 2 : 1) * stretch + SLOP ** 2 * stretch;
    return { turn, sigma: Math.sqrt(variance) };
  };
  // A pattern that is off by more than the slop is one that its builder kept loosely: twice its negative log likelihood.
  const loose = Math.max(1, chi / known.length);
  const criterion = known.length * Math.log(loose) + chi / loose + numbers * Math.log(Math.max(known.length, 2));
  return { pattern, criterion, at };
}

const normal = (x: number) => Math.exp(-(x * x) / 2);

/** What the lost taps most likely were. Fewer than two known taps propose nothing: `candidates` is empty then. */
export function lostTaps(lost: readonly { index: number; name: string }[], known: readonly Placed[]): LostTap[] {
  const all = PATTERNS.flatMap((pattern) => fitted(pattern, known) ?? []);
  const least = Math.min(...all.map((one) => one.criterion));
  const shares = all.map((one) => Math.exp(-(one.criterion - least) / 2));
  const sum = shares.reduce((a, b) => a + b, 0);
  return lost.map(({ index, name }) => {
    const below = Math.max(0, ...known.filter((one) => one.index < index).map((one) => one.turn));
    const above = Math.min(...known.filter((one) => one.index > index).map((one) => one.turn));
    // Lost neighbours need a turn each.
    const before = lost.filter(
      (one) => one.index < index && known.every((k) => k.index < one.index || k.index > index),
    ).length;
    const behind = lost.filter(
      (one) => one.index > index && known.every((k) => k.index > one.index || k.index < index),
    ).length;
    const first = Math.floor(below) + 1 + before;
    const last = Math.ceil(above) - 1 - behind;
    const weights = new Map<number, number>();
    const proposals: Proposal[] = [];
    all.forEach(({ pattern, at }, p) => {
      const { turn, sigma } = at(index);
      const share = shares[p]! / sum;
      const options = Array.from({ length: Math.max(0, last - first + 1) }, (_, k) => first + k);
      const each = options.map((one) => normal((one - turn) / sigma));
      const total = each.reduce((a, b) => a + b, 0);
      if (total < 1e-12) return;
      options.forEach((one, k) => {
        weights.set(one, (weights.get(one) ?? 0) + (share * each[k]!) / total);
      });
      const likeliest = options[each.indexOf(Math.max(...each))]!;
      const confidence = share * (Math.max(...each) / total);
      proposals.push({
        tap: name,
        pattern: pattern.name,
        turn: likeliest,
        confidence,
        text: `tap ${name}: turn ${likeliest} by ${pattern.name} (${turn.toFixed(1)} ± ${(1.96 * sigma).toFixed(1)})`,
      });
    });
    const scale = [...weights.values()].reduce((a, b) => a + b, 0);
    const candidates = [...weights]
      .map(([turn, weight]) => ({ turn, weight: weight / scale }))
      .filter(({ weight }) => weight > FEWEST_WEIGHT)
      .sort((a, b) => b.weight - a.weight);
    return { index, name, proposals: proposals.sort((a, b) => b.confidence - a.confidence), candidates };
  });
}
