/** Small dense systems, symmetric and positive definite; rows of arrays. */

export type Matrix = readonly Float64Array[];

export const zeros = (rows: number, columns: number): Float64Array[] =>
  Array.from({ length: rows }, () => new Float64Array(columns));

/** Lower triangle L of A = L L'; null when A is not positive definite to rounding. */
export function cholesky(a: Matrix): Float64Array[] | null {
  const n = a.length;
  const lower = zeros(n, n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j <= i; j++) {
      let sum = a[i]![j]!;
      for (let k = 0; k < j; k++) sum -= lower[i]![k]! * lower[j]![k]!;
      if (i !== j) lower[i]![j] = sum / lower[j]![j]!;
      else if (sum > 1e-14 * Math.abs(a[i]![i]!)) lower[i]![i] = Math.sqrt(sum);
      else return null;
    }
  return lower;
}

/** x of L L' x = b. */
export function solveWith(lower: Matrix, b: ArrayLike<number>): Float64Array {
  const n = lower.length;
  const x = Float64Array.from(b);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) x[i]! -= lower[i]![k]! * x[k]!;
    x[i]! /= lower[i]![i]!;
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) x[i]! -= lower[k]![i]! * x[k]!;
    x[i]! /= lower[i]![i]!;
  }
  return x;
}

/** J' J of rows J. */
export function gram(rows: Matrix, columns: number): Float64Array[] {
  const a = zeros(columns, columns);
  for (const row of rows)
    for (let i = 0; i < columns; i++) {
      const value = row[i]!;
      if (value === 0) continue;
      for (let j = 0; j <= i; j++) a[i]![j]! += value * row[j]!;
    }
  for (let i = 0; i < columns; i++) for (let j = 0; j < i; j++) a[j]![i] = a[i]![j]!;
  return a;
}

export function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

/** g' A^-1 g by the triangle of A: the variance of what has this gradient. */
export const varianceBy = (lower: Matrix, gradient: ArrayLike<number>): number =>
  Math.max(0, dot(gradient, solveWith(lower, gradient)));
