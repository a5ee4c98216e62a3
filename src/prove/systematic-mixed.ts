/**
 * A linear model with what all coils share and what each has of its own:
 *
 *     y = A x + B u + e,   x ~ N(0, prior),   u ~ N(0, scatter) a coil,   e ~ N(0, noise) a reading, by its class
 *
 * Scatter and noise are estimated with x and u by expectation and maximisation (Dempster, Laird and Rubin 1977, J. R. Statist.
 * Soc. B 39, 1-38; Laird and Ware 1982, Biometrics 38, 963-974), each held by a weak prior of `WEIGHT` readings' worth, so
 * that few coils do not make a scatter of nothing. Readings of the same slot have the same row of A, so that coils with the same
 * readings are worked out once.
 */
import { cholesky, dot, solveWith, zeros } from '../match/linear.ts';

export interface Column {
  /** Standard deviation before anything is read. */
  readonly priorSd: number;
}

export interface MixedRow {
  /** Over what all coils share. */
  readonly a: Float64Array;
  /** Over what each has of its own. */
  readonly b: readonly number[];
  /** Class of its noise. */
  readonly noise: number;
}

/** The readings of a coil: rows and their values. */
export interface Group {
  readonly rows: readonly number[];
  readonly y: readonly number[];
}

export interface Mixed {
  readonly rows: readonly MixedRow[];
  readonly groups: readonly Group[];
  readonly priorSd: readonly number[];
  /** First guesses, and what the weak priors hold to: standard deviations. */
  readonly scatter: readonly number[];
  readonly noise: readonly number[];
}

export interface MixedFit {
  readonly x: Float64Array;
  readonly covariance: readonly Float64Array[];
  /** Of the covariance, the part that more readings would take away. */
  readonly sampled: Float64Array;
  readonly scatter: readonly number[];
  readonly noise: readonly number[];
  /** Of each group: what it has of its own, and how far that can stand off nothing, a standard deviation of its estimate. */
  readonly own: readonly { readonly u: readonly number[]; readonly sd: readonly number[] }[];
  /** Of each reading what is left, in the order of the groups. */
  readonly rest: readonly (readonly number[])[];
}

/** So many readings' worth the first guess of a scatter or a noise weighs. */
export const WEIGHT = 3;
const ROUNDS = 120;
/** Rounds end when no standard deviation moves by more than this part. */
const STILL = 3e-3;

interface Pattern {
  readonly rows: readonly number[];
  readonly members: number[];
}

function patternsOf(groups: readonly Group[]): Pattern[] {
  const found = new Map<string, Pattern>();
  groups.forEach(({ rows }, i) => {
    const key = rows.join(' ');
    const known = found.get(key);
    if (known === undefined) found.set(key, { rows, members: [i] });
    else known.members.push(i);
  });
  return [...found.values()];
}

/** Of a pattern, with the scatter and noise of a round: S = (B'R'B + T')', and G = S B'R'A, where ' inverts R, T and the sum. */
interface Reduced {
  readonly s: readonly Float64Array[];
  readonly g: readonly Float64Array[];
}

function inverse(a: readonly Float64Array[]): Float64Array[] {
  const lower = cholesky(a);
  if (lower === null) throw new Error('a precision is positive definite');
  return a.map((_, i) =>
    solveWith(
      lower,
      Float64Array.from(a, (__, j) => (i === j ? 1 : 0)),
    ),
  );
}

function reduced(mixed: Mixed, { rows }: Pattern, scatter: readonly number[], noise: readonly number[]): Reduced {
  const own = scatter.length;
  const columns = mixed.priorSd.length;
  const precision = zeros(own, own);
  const cross = zeros(own, columns);
  for (let k = 0; k < own; k++) precision[k]![k] = 1 / scatter[k]! ** 2;
  for (const index of rows) {
    const { a, b, noise: of } = mixed.rows[index]!;
    const w = 1 / noise[of]! ** 2;
    for (let k = 0; k < own; k++) {
      if (b[k] === 0) continue;
      for (let l = 0; l < own; l++) precision[k]![l]! += w * b[k]! * b[l]!;
      for (let j = 0; j < columns; j++) cross[k]![j]! += w * b[k]! * a[j]!;
    }
  }
  const s = inverse(precision);
  const g = s.map((row) => {
    const out = new Float64Array(columns);
    for (let l = 0; l < own; l++) for (let j = 0; j < columns; j++) out[j]! += row[l]! * cross[l]![j]!;
    return out;
  });
  return { s, g };
}

/** One round: x with its covariance, and what each coil has of its own, for a scatter and a noise. */
function solved(mixed: Mixed, patterns: readonly Pattern[], scatter: readonly number[], noise: readonly number[]) {
  const columns = mixed.priorSd.length;
  const data = zeros(columns, columns);
  const right = new Float64Array(columns);
  const small = patterns.map((pattern) => reduced(mixed, pattern, scatter, noise));
  patterns.forEach((pattern, p) => {
    const { g } = small[p]!;
    const count = pattern.members.length;
    pattern.rows.forEach((index, r) => {
      const { a, b, noise: of } = mixed.rows[index]!;
      const w = 1 / noise[of]! ** 2;
      // A'V'A = A'R'(A - B G): rows of A against rows of what is left of them.
      const left = Float64Array.from(a);
      b.forEach((each, k) => {
        for (let j = 0; j < columns; j++) left[j]! -= each * g[k]![j]!;
      });
      let sum = 0;
      for (const member of pattern.members) sum += mixed.groups[member]!.y[r]!;
      for (let i = 0; i < columns; i++) {
        right[i]! += w * left[i]! * sum;
        const value = w * count * a[i]!;
        if (value !== 0) for (let j = 0; j < columns; j++) data[i]![j]! += value * left[j]!;
      }
    });
  });
  const total = data.map((row, i) =>
    row.map((value, j) => (value + data[j]![i]!) / 2 + (i === j ? 1 / mixed.priorSd[i]! ** 2 : 0)),
  );
  const covariance = inverse(total);
  const x = Float64Array.from(covariance, (row) => dot(row, right));
  return { x, covariance, data, small };
}

/** The fit; `mixed` has one group at least. `near`: a fit of nearly the same, to set out from. */
export function fitMixed(mixed: Mixed, near?: Pick<MixedFit, 'scatter' | 'noise'>): MixedFit {
  const patterns = patternsOf(mixed.groups);
  const own = mixed.scatter.length;
  let scatter = [...(near ?? mixed).scatter];
  let noise = [...(near ?? mixed).noise];
  let result = solved(mixed, patterns, scatter, noise);
  const us: number[][] = mixed.groups.map(() => []);
  const rest: number[][] = mixed.groups.map(() => []);
  const sds: number[][] = mixed.groups.map(() => []);
  for (let round = 0; round < ROUNDS; round++) {
    const { x, covariance, small } = result;
    const spread = new Float64Array(own);
    const off = new Float64Array(noise.length);
    const count = new Float64Array(noise.length);
    patterns.forEach((pattern, p) => {
      const { s, g } = small[p]!;
      const own2 = g.map(
        (row, k) =>
          s[k]![k]! +
          dot(
            row,
            covariance.map((line) => dot(line, row)),
          ),
      );
      const fitted = pattern.rows.map((index) => dot(mixed.rows[index]!.a, x));
      const variances = pattern.rows.map((index) => {
        const { a, b } = mixed.rows[index]!;
        const left = Float64Array.from(a);
        let inner = 0;
        b.forEach((each, k) => {
          for (let j = 0; j < left.length; j++) left[j]! -= each * g[k]![j]!;
          for (let l = 0; l < own; l++) inner += each * s[k]![l]! * b[l]!;
        });
        return (
          inner +
          dot(
            left,
            covariance.map((line) => dot(line, left)),
          )
        );
      });
      for (const member of pattern.members) {
        const { y } = mixed.groups[member]!;
        const pulled = new Float64Array(own);
        pattern.rows.forEach((index, r) => {
          const { b, noise: of } = mixed.rows[index]!;
          b.forEach((each, k) => {
            pulled[k]! += (each * (y[r]! - fitted[r]!)) / noise[of]! ** 2;
          });
        });
        const u = s.map((row) => dot(row, pulled));
        us[member] = u;
        sds[member] = u.map((_, k) => Math.sqrt(Math.max(scatter[k]! ** 2 - s[k]![k]!, 1e-6 * scatter[k]! ** 2)));
        u.forEach((value, k) => {
          spread[k]! += value ** 2 + own2[k]!;
        });
        rest[member] = pattern.rows.map((index, r) => {
          const { b, noise: of } = mixed.rows[index]!;
          const left = y[r]! - fitted[r]! - b.reduce((sum, each, k) => sum + each * u[k]!, 0);
          off[of]! += left ** 2 + variances[r]!;
          count[of]! += 1;
          return left;
        });
      }
    });
    const held = (sum: number, n: number, guess: number) => Math.sqrt((sum + WEIGHT * guess ** 2) / (n + WEIGHT));
    const nextScatter = scatter.map((_, k) => held(spread[k]!, mixed.groups.length, mixed.scatter[k]!));
    const nextNoise = noise.map((_, k) => held(off[k]!, count[k]!, mixed.noise[k]!));
    const moved = Math.max(
      ...nextScatter.map((value, k) => Math.abs(value / scatter[k]! - 1)),
      ...nextNoise.map((value, k) => Math.abs(value / noise[k]! - 1)),
    );
    [scatter, noise] = [nextScatter, nextNoise];
    result = solved(mixed, patterns, scatter, noise);
    if (moved < STILL) break;
  }
  const { x, covariance, data } = result;
  const sampled = Float64Array.from(covariance, (row) =>
    dot(
      row,
      data.map((line) => dot(line, row)),
    ),
  );
  return { x, covariance, sampled, scatter, noise, own: us.map((u, i) => ({ u, sd: sds[i]! })), rest };
}
