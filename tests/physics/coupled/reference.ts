import { symmetricEigen } from '../../../src/physics/coupled/eigen.ts';

/**
 * Resonances (rad/s squared, smallest first) by the nodal matrix K = D' L^-1 D of K v = omega^2 C v, as textbooks have it: every stretch
 * between two nodes, L inverted by elimination, joined nodes merged, every node with a capacitance. Modes at 0 (a body that floats) left out.
 */
export function nodalResonances(
  inductances: readonly (readonly number[])[],
  ends: readonly (readonly [low: number, high: number])[],
  capacitance: readonly number[],
  earth: number,
  joined: readonly (readonly [number, number])[],
): number[] {
  const inverse = invert(inductances);
  const count = capacitance.length;
  const name = Array.from({ length: count }, (_, i) => i);
  for (const [a, b] of joined) {
    const old = name[b]!;
    for (let i = 0; i < count; i++) if (name[i] === old) name[i] = name[a]!;
  }
  const kept = [...new Set(name)].filter((n) => n !== name[earth]);
  const size = kept.length;
  const K = new Float64Array(size * size);
  const C = new Float64Array(size);
  const place = (node: number) => kept.indexOf(name[node]!);
  capacitance.forEach((c, node) => {
    if (place(node) >= 0) C[place(node)]! += c;
  });
  ends.forEach((e, s) => {
    ends.forEach((f, t) => {
      for (const [i, a] of [
        [1, e[1]],
        [-1, e[0]],
      ] as const) {
        for (const [j, b] of [
          [1, f[1]],
          [-1, f[0]],
        ] as const) {
          if (place(a) >= 0 && place(b) >= 0) K[place(a) * size + place(b)]! += i * j * inverse[s]![t]!;
        }
      }
    });
  });
  for (let i = 0; i < size; i++) for (let j = 0; j < size; j++) K[i * size + j]! /= Math.sqrt(C[i]! * C[j]!);
  const values = [...symmetricEigen(K, size).values].reverse();
  return values.filter((value) => value > 1e-9 * values[size - 1]!);
}

function invert(matrix: readonly (readonly number[])[]): number[][] {
  const size = matrix.length;
  const a = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let k = 0; k < size; k++) {
    const pivot = a[k]![k]!;
    for (let j = 0; j < 2 * size; j++) a[k]![j]! /= pivot;
    for (let i = 0; i < size; i++) {
      if (i === k) continue;
      const factor = a[i]![k]!;
      for (let j = 0; j < 2 * size; j++) a[i]![j]! -= factor * a[k]![j]!;
    }
  }
  return a.map((row) => row.slice(size));
}
