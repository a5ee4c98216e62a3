/**
 * A netlist with its losses at one frequency, by the modified nodal analysis of simulators (Ho, Ruehli and Brennan 1975): unknown are
 * the voltages of all nodes and the currents of all inductances and sources, so that nothing is inverted on the way.
 */
import { joinedOf, type Parsed } from './solve.ts';

/** Real and imaginary part. */
export type Phasor = readonly [re: number, im: number];

/** Which of the two drives: the source of the aerial, or an ampere into a node. */
export type Drive = 'source' | { readonly ampereInto: string };

export class AcNet {
  readonly #net: Parsed;
  readonly #root: (node: string) => string;
  readonly #nodes: Map<string, number>;
  readonly #mutual: { readonly i: number; readonly j: number; readonly value: number }[];

  constructor(net: Parsed) {
    this.#net = net;
    this.#root = joinedOf(net).root;
    const all = [net.L, net.C, net.R, net.sources].flatMap((list) => list.flatMap(({ a, b }) => [a, b]));
    const names = [...new Set(all.map(this.#root))].filter((node) => node !== '0');
    this.#nodes = new Map(names.map((name, i) => [name, i]));
    const index = new Map(net.L.map(({ name }, i) => [name, i]));
    this.#mutual = net.K.map(({ a, b, value }) => {
      const [i, j] = [index.get(a)!, index.get(b)!];
      return { i, j, value: value * Math.sqrt(net.L[i]!.value * net.L[j]!.value) };
    });
  }

  /** Voltages of these nodes. */
  at(hertz: number, drive: Drive, of: readonly string[]): Phasor[] {
    const { L, C, R, sources } = this.#net;
    const omega = 2 * Math.PI * hertz;
    const voltages = sources.filter(({ kind }) => kind === 'V');
    const count = this.#nodes.size;
    const size = count + L.length + voltages.length;
    // Rows of real and imaginary parts, the right side last.
    const rows = Array.from({ length: size }, () => [new Float64Array(size + 1), new Float64Array(size + 1)] as const);
    const node = (name: string) => this.#nodes.get(this.#root(name)) ?? -1;
    const add = (row: number, column: number, re: number, im: number) => {
      if (row < 0 || column < 0) return;
      rows[row]![0][column]! += re;
      rows[row]![1][column]! += im;
    };
    const admittance = (a: number, b: number, re: number, im: number) => {
      for (const [i, j, sign] of [
        [a, a, 1],
        [b, b, 1],
        [a, b, -1],
        [b, a, -1],
      ] as const)
        add(i, j, sign * re, sign * im);
    };
    for (const { a, b, value } of R) admittance(node(a), node(b), 1 / value, 0);
    for (const { a, b, value } of C) admittance(node(a), node(b), 0, omega * value);
    const branch = (k: number, a: string, b: string) => {
      for (const [at, sign] of [
        [node(a), 1],
        [node(b), -1],
      ] as const) {
        add(at, count + k, sign, 0);
        add(count + k, at, sign, 0);
      }
    };
    L.forEach(({ a, b, value }, k) => {
      branch(k, a, b);
      add(count + k, count + k, 0, -omega * value);
    });
    for (const { i, j, value } of this.#mutual) {
      add(count + i, count + j, 0, -omega * value);
      add(count + j, count + i, 0, -omega * value);
    }
    voltages.forEach(({ a, b, value }, k) => {
      branch(L.length + k, a, b);
      add(count + L.length + k, size, drive === 'source' ? value : 0, 0);
    });
    if (drive !== 'source') add(node(drive.ampereInto), size, 1, 0);
    eliminate(rows, size);
    return of.map((name) => {
      const i = node(name);
      return i < 0 ? [0, 0] : [rows[i]![0][size]!, rows[i]![1][size]!];
    });
  }
}

/** Gauss and Jordan with the largest of each column; the solution stands in the last column. */
function eliminate(rows: (readonly [Float64Array, Float64Array])[], size: number): void {
  for (let k = 0; k < size; k++) {
    let best = k;
    const square = (i: number) => rows[i]![0][k]! ** 2 + rows[i]![1][k]! ** 2;
    for (let i = k; i < size; i++) if (square(i) > square(best)) best = i;
    [rows[k], rows[best]] = [rows[best]!, rows[k]!];
    const [re, im] = rows[k]!;
    const [pr, pi, pp] = [re[k]!, im[k]!, square(k)];
    for (let j = k; j <= size; j++) {
      const [r, i] = [re[j]!, im[j]!];
      re[j] = (r * pr + i * pi) / pp;
      im[j] = (i * pr - r * pi) / pp;
    }
    for (let i = 0; i < size; i++) {
      const [other, imaginary] = rows[i]!;
      const [fr, fi] = [other[k]!, imaginary[k]!];
      if (i === k || (fr === 0 && fi === 0)) continue;
      for (let j = k; j <= size; j++) {
        other[j]! -= fr * re[j]! - fi * im[j]!;
        imaginary[j]! -= fr * im[j]! + fi * re[j]!;
      }
    }
  }
}
