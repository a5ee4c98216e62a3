import { type FieldTables, translation } from './tables.ts';

/** A complex vector over orders and turns: entry (m - 1) N + i for order m at turn i. */
export interface Multipoles {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export function noMultipoles(size: number): Multipoles {
  return { re: new Float64Array(size), im: new Float64Array(size) };
}

/**
 * Carries the multipoles of every wire to every other: `out` = T y, for two vectors at once, which share every factor.
 *
 * The turns lie on one line, so with the angle counted from the axis the cosine terms never mix with the sine terms, and both
 * have the same real matrix but for its sign:
 * T(i l, j m) = (-1)^m binomial(m+l-1, l) sqrt(l/m) (a/(z_j - z_i))^(l+m), symmetric.
 * The inner loop of everything: no allocation, four running sums that do not wait for one another.
 */
export function translate(tables: FieldTables, y: Multipoles, z: Multipoles, yOut: Multipoles, zOut: Multipoles): void {
  const { order, powers } = tables;
  const count = tables.positions.length;
  const [yRe, yIm, zRe, zIm] = [y.re, y.im, z.re, z.im];
  yOut.re.fill(0);
  yOut.im.fill(0);
  zOut.re.fill(0);
  zOut.im.fill(0);
  for (let l = 1; l <= order; l++) {
    for (let m = 1; m <= order; m++) {
      const { values, half, stride } = powers[l + m]!;
      const factor = m % 2 === 0 ? translation(l, m) : -translation(l, m);
      const from = (m - 1) * count;
      const to = (l - 1) * count;
      for (let i = 0; i < count; i++) {
        const first = Math.max(i - half, 0);
        const last = Math.min(i + half, count - 1);
        const row = i * (stride - 1) + half;
        let sumYRe = 0;
        let sumYIm = 0;
        let sumZRe = 0;
        let sumZIm = 0;
        for (let j = first; j <= last; j++) {
          const power = values[row + j]!;
          sumYRe += power * yRe[from + j]!;
          sumYIm += power * yIm[from + j]!;
          sumZRe += power * zRe[from + j]!;
          sumZIm += power * zIm[from + j]!;
        }
        yOut.re[to + i]! += factor * sumYRe;
        yOut.im[to + i]! += factor * sumYIm;
        zOut.re[to + i]! += factor * sumZRe;
        zOut.im[to + i]! += factor * sumZIm;
      }
    }
  }
}
