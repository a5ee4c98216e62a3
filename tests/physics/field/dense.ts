import ellipe from '@stdlib/math-base-special-ellipe';
import ellipk from '@stdlib/math-base-special-ellipk';
import { add, type Complex, div, exactWire, mul, power, sub, times } from './bessel.ts';

const MU0 = 4e-7 * Math.PI;

export interface DenseCoil {
  readonly positions: readonly number[];
  readonly radius: number;
  readonly wireRadius: number;
  readonly order: number;
  readonly frequency: number;
  readonly resistivity: number;
  /** Whole turns of each section, first and one past the last. */
  readonly sections: readonly (readonly [from: number, to: number])[];
}

/**
 * The field solution written out in full, as a reference: unknowns P and Q of every order at every wire in the plane of its section
 * (x outward), translation by complex distances i(z_j - z_i) as real 2 x 2 blocks, no symmetry used, no term left out, Gaussian
 * elimination with pivots. Elliptic integrals by a general library, Bessel functions by series and integrals.
 * Returns Z[s][t] with s and t reckoned separately, and the power that goes into the wires per (A peak)^2/2 in each section.
 */
export function denseSolution(coil: DenseCoil): { Z: Complex[][]; dissipated: number[] } {
  const { positions, radius: R, wireRadius: a, order, frequency, resistivity, sections } = coil;
  const count = positions.length;
  const omega = 2 * Math.PI * frequency;
  const wire = exactWire(a, frequency, resistivity);
  const C = Array.from({ length: order + 1 }, (_, m) => (m === 0 ? ([0, 0] as Complex) : wire.answer(m)));
  const size = 2 * order * count;
  const at = (i: number, m: number, q: 0 | 1) => (i * order + m - 1) * 2 + q;
  const T = Array.from({ length: size }, () => new Float64Array(size));
  for (let i = 0; i < count; i++) {
    for (let j = 0; j < count; j++) {
      if (i === j) continue;
      const zeta: Complex = [0, (positions[j]! - positions[i]!) / a];
      for (let m = 1; m <= order; m++) {
        for (let l = 1; l <= order; l++) {
          // g = P - iQ of order l is c w, with w = P + iQ of order m.
          const c = times(binomial(m + l - 1, l), mul(power(times(-1, zeta), -m), power(zeta, -l)));
          T[at(i, l, 0)]![at(j, m, 0)] = c[0];
          T[at(i, l, 0)]![at(j, m, 1)] = -c[1];
          T[at(i, l, 1)]![at(j, m, 0)] = -c[1];
          T[at(i, l, 1)]![at(j, m, 1)] = -c[0];
        }
      }
    }
  }
  const excitations = sections.map(([from, to]) => {
    const e = new Float64Array(size);
    for (let i = 0; i < count; i++) {
      for (let j = from; j < to; j++) {
        if (i === j) {
          e[at(i, 1, 0)]! += a * (MU0 / (4 * Math.PI * R)) * (Math.log((8 * R) / a) - 0.5);
          continue;
        }
        const [bz, br] = ringField(R, positions[i]! - positions[j]!);
        e[at(i, 1, 0)]! += a * bz;
        e[at(i, 1, 1)]! -= a * br;
        for (let m = 2; m <= order; m++) {
          const g = times(MU0 / (2 * Math.PI * m), power([0, (positions[j]! - positions[i]!) / a], -m));
          e[at(i, m, 0)]! += g[0];
          e[at(i, m, 1)]! -= g[1];
        }
      }
    }
    return e;
  });
  const answer = (column: number) => C[(Math.floor(column / 2) % order) + 1]!;
  const rows = T.map((row, r) => {
    const re = new Float64Array(size);
    const im = new Float64Array(size);
    for (let c = 0; c < size; c++) {
      re[c] = (r === c ? 1 : 0) - row[c]! * answer(c)[0];
      im[c] = -row[c]! * answer(c)[1];
    }
    return { re, im };
  });
  const x = eliminate(
    rows,
    excitations.map((e) => Array.from(e, (value): Complex => [value, 0])),
  );
  const perWeber = (2 * Math.PI * R * 2 * Math.PI) / MU0;
  const Z = sections.map((s, si) =>
    sections.map((t, ti) => {
      let reaction: Complex = [0, 0];
      excitations[si]!.forEach((e, c) => {
        const m = (Math.floor(c / 2) % order) + 1;
        reaction = add(reaction, times(m * e, mul(answer(c), x[ti]![c]!)));
      });
      let z = mul([0, omega], add([outer(coil, s, t), 0], times(perWeber, reaction)));
      if (si === ti) z = add(z, times((s[1] - s[0]) * 2 * Math.PI * R, wire.own));
      return z;
    }),
  );
  const dissipated = sections.map(([from, to], si) => {
    let power = (to - from) * 2 * Math.PI * R * wire.own[0];
    x[si]!.forEach((value, c) => {
      const m = (Math.floor(c / 2) % order) + 1;
      power -= omega * perWeber * m * (value[0] ** 2 + value[1] ** 2) * answer(c)[1];
    });
    return power;
  });
  return { Z, dissipated };
}

function binomial(n: number, k: number): number {
  let value = 1;
  for (let i = 1; i <= k; i++) value = (value * (n - k + i)) / i;
  return Math.round(value);
}

/** [B_z, B_r] of a ring's ampere at an equal ring, `height` above it. */
function ringField(R: number, height: number): [number, number] {
  const span2 = 4 * R * R + height * height;
  const m = (4 * R * R) / span2;
  const [K, E] = [ellipk(m), ellipe(m)];
  const scale = MU0 / (2 * Math.PI * Math.sqrt(span2));
  return [scale * (K - E), (scale * height * (((2 * R * R + height * height) / (height * height)) * E - K)) / R];
}

function outer(coil: DenseCoil, s: readonly [number, number], t: readonly [number, number]): number {
  const { positions, radius: R, wireRadius: a } = coil;
  let sum = 0;
  for (let i = s[0]; i < s[1]; i++) {
    for (let j = t[0]; j < t[1]; j++) {
      if (i === j) {
        const log = Math.log((8 * R) / a);
        sum += MU0 * R * (log - 2 + ((a / R) ** 2 / 8) * (log + 1 / 3));
        continue;
      }
      const m = (4 * R * R) / (4 * R * R + (positions[i]! - positions[j]!) ** 2);
      sum += ((MU0 * R * 2) / Math.sqrt(m)) * ((1 - m / 2) * ellipk(m) - ellipe(m));
    }
  }
  return sum;
}

interface Row {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Solves for several right-hand sides at once. */
function eliminate(rows: Row[], columns: Complex[][]): Complex[][] {
  const size = rows.length;
  const entry = (i: number, j: number): Complex => [rows[i]!.re[j]!, rows[i]!.im[j]!];
  for (let k = 0; k < size; k++) {
    let pivot = k;
    for (let i = k + 1; i < size; i++) if (Math.hypot(...entry(i, k)) > Math.hypot(...entry(pivot, k))) pivot = i;
    [rows[k], rows[pivot]] = [rows[pivot]!, rows[k]!];
    for (const column of columns) [column[k], column[pivot]] = [column[pivot]!, column[k]!];
    const { re: pRe, im: pIm } = rows[k]!;
    for (let i = k + 1; i < size; i++) {
      const factor = div(entry(i, k), entry(k, k));
      const [fRe, fIm] = factor;
      if (fRe === 0 && fIm === 0) continue;
      const { re, im } = rows[i]!;
      for (let j = k; j < size; j++) {
        re[j]! -= fRe * pRe[j]! - fIm * pIm[j]!;
        im[j]! -= fRe * pIm[j]! + fIm * pRe[j]!;
      }
      for (const column of columns) column[i] = sub(column[i]!, mul(factor, column[k]!));
    }
  }
  return columns.map((column) => {
    const x = column.slice();
    for (let k = size - 1; k >= 0; k--) {
      let sum = x[k]!;
      for (let j = k + 1; j < size; j++) sum = sub(sum, mul(entry(k, j), x[j]!));
      x[k] = div(sum, entry(k, k));
    }
    return x;
  });
}
