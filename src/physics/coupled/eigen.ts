/** Eigenvalues, largest first, and eigenvectors as rows, of a small symmetric matrix (row by row): Jacobi 1846, by cyclic rotations. */
export function symmetricEigen(matrix: Float64Array, size: number): { values: Float64Array; vectors: Float64Array } {
  const a = matrix.slice();
  const v = new Float64Array(size * size);
  for (let i = 0; i < size; i++) v[i * size + i] = 1;
  for (let sweep = 0; sweep < 50; sweep++) {
    let off = 0;
    let all = 0;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        const square = a[i * size + j]! ** 2;
        all += square;
        if (i !== j) off += square;
      }
    }
    if (off <= 1e-30 * all) break;
    for (let p = 0; p < size - 1; p++) {
      for (let q = p + 1; q < size; q++) rotate(a, v, size, p, q);
    }
  }
  const order = Array.from({ length: size }, (_, i) => i).sort((i, j) => a[j * size + j]! - a[i * size + i]!);
  const values = new Float64Array(size);
  const vectors = new Float64Array(size * size);
  order.forEach((from, to) => {
    values[to] = a[from * size + from]!;
    vectors.set(v.subarray(from * size, (from + 1) * size), to * size);
  });
  return { values, vectors };
}

/** Turns the plane p, q so that a_pq becomes 0. */
function rotate(a: Float64Array, v: Float64Array, size: number, p: number, q: number): void {
  const apq = a[p * size + q]!;
  if (apq === 0) return;
  const theta = (a[q * size + q]! - a[p * size + p]!) / (2 * apq);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.hypot(theta, 1));
  const c = 1 / Math.hypot(t, 1);
  const s = t * c;
  for (let k = 0; k < size; k++) {
    const kp = a[k * size + p]!;
    const kq = a[k * size + q]!;
    a[k * size + p] = c * kp - s * kq;
    a[k * size + q] = s * kp + c * kq;
  }
  for (let k = 0; k < size; k++) {
    const pk = a[p * size + k]!;
    const qk = a[q * size + k]!;
    a[p * size + k] = c * pk - s * qk;
    a[q * size + k] = s * pk + c * qk;
    const vp = v[p * size + k]!;
    const vq = v[q * size + k]!;
    v[p * size + k] = c * vp - s * vq;
    v[q * size + k] = s * vp + c * vq;
  }
}
