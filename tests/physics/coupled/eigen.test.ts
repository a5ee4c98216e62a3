import { expect, test } from 'vitest';
import { symmetricEigen } from '../../../src/physics/coupled/eigen.ts';
import { largestModes } from '../../../src/physics/coupled/lanczos.ts';
import { accuracy, off } from '../../published/accuracy.ts';
import { seeded } from '../field/coils.ts';

/** A random symmetric matrix X X' that is never negative, of eigenvalues that fall off like those of a winding. */
function randomMatrix(random: () => number, size: number): Float64Array {
  const X = Float64Array.from({ length: size * size }, (_, k) => (random() - 0.5) / (1 + (k % size)) ** 1.5);
  const G = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      for (let k = 0; k < size; k++) G[i * size + j]! += X[i * size + k]! * X[j * size + k]!;
    }
  }
  return G;
}

test("Jacobi's rotations: A v = lambda v, trace kept", () => {
  const random = seeded(3);
  const errors: number[] = [];
  for (let size = 1; size <= 20; size++) {
    const A = randomMatrix(random, size);
    const { values, vectors } = symmetricEigen(A, size);
    let trace = 0;
    for (let i = 0; i < size; i++) trace += A[i * size + i]!;
    errors.push(
      off(
        values.reduce((sum, value) => sum + value, 0),
        trace,
      ),
    );
    for (let n = 0; n < size; n++) {
      if (n > 0) expect(values[n]).toBeLessThanOrEqual(values[n - 1]!);
      const v = vectors.subarray(n * size, (n + 1) * size);
      for (let i = 0; i < size; i++) {
        let row = 0;
        for (let j = 0; j < size; j++) row += A[i * size + j]! * v[j]!;
        errors.push((row - values[n]! * v[i]!) / values[0]!);
      }
    }
  }
  accuracy("Jacobi's eigenvalues (of the largest)", errors, 1e-12);
});

test('Lanczos against Jacobi, with zeros in C', () => {
  const random = seeded(4);
  const errors: number[] = [];
  for (let round = 0; round < 60; round++) {
    const size = 2 + (round % 30);
    const G = randomMatrix(random, size);
    const c = Float64Array.from({ length: size }, () => (random() < 0.4 ? 0 : 10 ** (4 * random() - 12)));
    c[0] = 1e-12;
    const B = G.map((g, k) => g * Math.sqrt(c[Math.floor(k / size)]! * c[k % size]!));
    const exact = symmetricEigen(B, size).values;
    const modes = largestModes(
      (v, out) => {
        for (let i = 0; i < size; i++) {
          out[i] = 0;
          for (let j = 0; j < size; j++) out[i]! += G[i * size + j]! * v[j]!;
        }
      },
      (v, out) => out.set(v.map((value, i) => value * c[i]!)),
      size,
      2,
    );
    const rank = c.filter((value) => value > 0).length;
    expect(modes.length).toBe(Math.min(2, rank));
    modes.forEach(({ value }, n) => {
      errors.push((value - exact[n]!) / exact[0]!);
    });
  }
  accuracy("Lanczos's eigenvalues against Jacobi's (of the largest)", errors, 1e-12);
  expect(
    largestModes(
      (_, out) => out.fill(0),
      (_, out) => out.fill(0),
      3,
      2,
    ),
  ).toEqual([]);
});
