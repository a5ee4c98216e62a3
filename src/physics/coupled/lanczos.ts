import { symmetricEigen } from './eigen.ts';

/** A symmetric operator on vectors of `size`, written into `out`. */
export type Operator = (vector: Float64Array, out: Float64Array) => void;

export interface Mode {
  /** Eigenvalue of G C. */
  readonly value: number;
  /** Its vector, of length 1 in the measure of C. */
  readonly vector: Float64Array;
}

/**
 * The `wanted` largest eigenvalues of G C, both symmetric and never negative, C with as many zeros as it likes.
 *
 * Lanczos's method (1950) in the measure of C, every new vector cleared of all earlier ones (twice): no inverse, no root, no
 * ghosts. Fewer modes come back where C has a lower rank. Steps on until what is left of each wanted pair is below 1e-11 of the largest.
 */
export function largestModes(G: Operator, C: Operator, size: number, wanted: number): Mode[] {
  const basis: Float64Array[] = [];
  const images: Float64Array[] = [];
  const alpha: number[] = [];
  const beta: number[] = [];
  let next = startOf(G, C, size);
  for (;;) {
    const image = new Float64Array(size);
    C(next, image);
    const norm = Math.sqrt(Math.max(dot(next, image), 0));
    if (basis.length > 0) beta.push(norm);
    const exhausted = basis.length === size || !(norm > 1e-13 * (alpha[0] ?? 0));
    if (exhausted || (basis.length >= FIRST_LOOK && basis.length % 4 === 0)) {
      const modes = ritz(basis, alpha, beta, wanted, exhausted);
      if (modes !== undefined) return modes;
    }
    const vector = next.map((value) => value / norm);
    for (let i = 0; i < size; i++) image[i]! /= norm;
    basis.push(vector);
    images.push(image);
    next = new Float64Array(size);
    G(image, next);
    alpha.push(dot(next, image));
    for (let pass = 0; pass < 2; pass++) {
      for (let k = 0; k < basis.length; k++) {
        const share = dot(next, images[k]!);
        for (let i = 0; i < size; i++) next[i]! -= share * basis[k]![i]!;
      }
    }
  }
}

const FIRST_LOOK = 8;

/** A vector with something of every mode: G C of uneven numbers that repeat at every run. */
function startOf(G: Operator, C: Operator, size: number): Float64Array {
  const uneven = Float64Array.from({ length: size }, (_, i) => 1 + ((i * 0.618034) % 1));
  const charge = new Float64Array(size);
  const start = new Float64Array(size);
  C(uneven, charge);
  G(charge, start);
  return start;
}

/** Ritz pairs of the tridiagonal matrix; undefined while one that is wanted may still move. */
function ritz(
  basis: readonly Float64Array[],
  alpha: readonly number[],
  beta: readonly number[],
  wanted: number,
  exhausted: boolean,
): Mode[] | undefined {
  const steps = basis.length;
  const T = new Float64Array(steps * steps);
  for (let k = 0; k < steps; k++) {
    T[k * steps + k] = alpha[k]!;
    if (k > 0) {
      T[k * steps + k - 1] = beta[k - 1]!;
      T[(k - 1) * steps + k] = beta[k - 1]!;
    }
  }
  const { values, vectors } = symmetricEigen(T, steps);
  const modes: Mode[] = [];
  for (let n = 0; n < Math.min(wanted, steps); n++) {
    if (!(values[n]! > 1e-12 * values[0]!)) break;
    const left = beta[steps - 1]! * Math.abs(vectors[n * steps + steps - 1]!);
    if (!exhausted && left > 1e-11 * values[0]!) return undefined;
    const vector = new Float64Array(basis[0]!.length);
    for (let k = 0; k < steps; k++) {
      const share = vectors[n * steps + k]!;
      for (let i = 0; i < vector.length; i++) vector[i]! += share * basis[k]![i]!;
    }
    modes.push({ value: values[n]!, vector });
  }
  return modes;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}
