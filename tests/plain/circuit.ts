/**
 * Resonances of a tapped coil without losses, from nodal equations set up anew: reciprocal inductances between nodes, what the switch
 * joins made one node, capacitances at the nodes, and the two lowest frequencies by repeated solution. H, F, Hz.
 */
import type { PlainCoil } from './coil.ts';

export type Rest = 'open' | 'shorted' | 'shorted in sections' | 'disconnected';

export interface Connected {
  readonly from: number;
  readonly to: number;
  /** Which end of the turns in use is at earth. */
  readonly earthed: 'from' | 'to';
  readonly rest: Rest;
  /** Turns of the taps, where dead turns are shorted in sections. */
  readonly taps: readonly number[];
  /** Of the whole winding with one end earthed. */
  readonly selfF: number;
  readonly tuningF: number;
  /** To earth, each at its turn. */
  readonly strays: readonly { readonly turn: number; readonly f: number }[];
}

export interface Resonance {
  readonly hz: number;
  readonly halfHz: number;
  readonly secondHz: number | null;
}

/** Lower triangle of a positive definite matrix; throws where it is not. */
function cholesky(a: readonly (readonly number[])[]): number[][] {
  const n = a.length;
  const l = a.map((row) => row.map(() => 0));
  for (let i = 0; i < n; i++)
    for (let j = 0; j <= i; j++) {
      let sum = a[i]![j]!;
      for (let k = 0; k < j; k++) sum -= l[i]![k]! * l[j]![k]!;
      if (i === j && !(sum > 0)) throw new Error(`not positive definite at ${i}: ${sum}`);
      l[i]![j] = i === j ? Math.sqrt(sum) : sum / l[j]![j]!;
    }
  return l;
}

function solve(l: readonly (readonly number[])[], b: readonly number[]): number[] {
  const n = l.length;
  const x = [...b];
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) x[i]! -= l[i]![k]! * x[k]!;
    x[i]! /= l[i]![i]!;
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) x[i]! -= l[k]![i]! * x[k]!;
    x[i]! /= l[i]![i]!;
  }
  return x;
}

const near = (a: number, b: number) => Math.abs(a - b) < 1e-6;

export class PlainCircuit {
  readonly nodes: readonly number[];
  readonly #reciprocal: number[][];
  readonly #matrix: number[][];

  /** Nodes at both ends, the marks, and between them every so many turns. */
  constructor(coil: PlainCoil, marks: readonly number[], most = 50) {
    const { turns } = coil.winding;
    const step = Math.max(1, Math.ceil(turns / most));
    const nodes = [0, turns];
    for (const mark of marks) if (!nodes.some((node) => near(node, mark))) nodes.push(mark);
    for (let turn = step; turn < turns; turn += step)
      if (nodes.every((node) => Math.abs(node - turn) > 0.25 * step)) nodes.push(turn);
    this.nodes = nodes.sort((a, b) => a - b);
    this.#matrix = coil.matrix(this.nodes);
    const lower = cholesky(this.#matrix);
    this.#reciprocal = lower.map((_, i) =>
      solve(
        lower,
        lower.map((__, j) => (i === j ? 1 : 0)),
      ),
    );
  }

  #node(turn: number): number {
    const at = this.nodes.findIndex((node) => near(node, turn));
    if (at < 0) throw new Error(`no node at turn ${turn}`);
    return at;
  }

  /** Low frequency, turns 0..turn as this circuit has them: turns in pieces are a few parts in a thousand off. */
  uh(turn: number): number {
    const end = this.#node(turn);
    let sum = 0;
    for (let s = 0; s < end; s++) for (let t = 0; t < end; t++) sum += this.#matrix[s]![t]!;
    return sum * 1e6;
  }

  /** The mean of all self-capacitance along the turns and all of it at the open end, half of what lies between. */
  resonance(on: Connected): Resonance {
    const [spread, end] = [this.#two(on, true), this.#two(on, false)];
    return {
      hz: (spread.first + end.first) / 2,
      halfHz: Math.abs(spread.first - end.first) / 2,
      secondHz: spread.second === null || end.second === null ? null : (spread.second + end.second) / 2,
    };
  }

  #two(on: Connected, spread: boolean): { first: number; second: number | null } {
    const { nodes } = this;
    const last = nodes.length - 1;
    const [from, to] = [this.#node(on.from), this.#node(on.to)];
    // Terminal 2 n is where what lies below node n ends, 2 n + 1 where what lies beyond it begins: one but at a cut.
    const parent = Array.from({ length: 2 * nodes.length }, (_, i) => i);
    const root = (i: number): number => (parent[i] === i ? i : root(parent[i]!));
    const join = (a: number, b: number) => {
      parent[root(a)] = root(b);
    };
    const cut = (n: number) => on.rest === 'disconnected' && ((n === from && from > 0) || (n === to && to < last));
    for (let n = 0; n <= last; n++) if (!cut(n)) join(2 * n, 2 * n + 1);
    const inner = (n: number) => (n === from ? 2 * n + 1 : 2 * n);
    const dead = (list: readonly number[]) => {
      for (const n of list.slice(1)) join(2 * list[0]!, 2 * n);
    };
    if (on.rest === 'shorted') {
      dead([0, from]);
      dead([to, last]);
    }
    if (on.rest === 'shorted in sections') {
      const ends = [...new Set([0, from, to, last, ...on.taps.map((tap) => this.#node(tap))])];
      dead(ends.filter((n) => n <= from));
      dead(ends.filter((n) => n >= to));
    }
    const earth = root(inner(on.earthed === 'from' ? from : to));
    const names = [...new Set(parent.map((_, i) => root(i)))].filter((name) => name !== earth);
    const index = new Map(names.map((name, i) => [name, i]));
    const at = (terminal: number) => index.get(root(terminal)) ?? -1;
    const size = names.length;
    const K = names.map(() => names.map(() => 0));
    for (let s = 0; s < last; s++)
      for (let t = 0; t < last; t++) {
        const value = this.#reciprocal[s]![t]!;
        for (const [i, p] of [
          [at(2 * s + 1), -1],
          [at(2 * s + 2), 1],
        ] as const)
          for (const [j, q] of [
            [at(2 * t + 1), -1],
            [at(2 * t + 2), 1],
          ] as const)
            if (i >= 0 && j >= 0) K[i]![j]! += p * q * value;
      }
    const C = this.#capacitances(on, spread, from, to, at, size, inner);
    // A part that is cut off floats: its even level, which no resonance has, is given a frequency out of the way.
    const floating =
      on.rest === 'disconnected' ? [[0, from] as const, [to, last] as const].filter(([a, b]) => a < b) : [];
    for (const [a, b] of floating) {
      const level = new Array<number>(size).fill(0);
      for (let n = a; n <= b; n++)
        for (const t of [2 * n + (n === a && a > 0 ? 1 : 0), 2 * n + (n === b && b < last ? 0 : 1)])
          if (at(t) >= 0) level[at(t)] = 1;
      // Weighed by charge; where it carries none, any level will do.
      const charge = level.map((one, i) => one * C[i]!);
      const weight = charge.some((one) => one > 0) ? charge : level;
      const whole = weight.reduce((sum, one) => sum + one, 0);
      // As stiff in all as the turns themselves.
      const strength = K.reduce((sum, row, i) => sum + row[i]!, 0);
      for (let i = 0; i < size; i++)
        for (let j = 0; j < size; j++) K[i]![j]! += strength * (weight[i]! / whole) * (weight[j]! / whole);
    }
    const scale = K.map((row, i) => Math.sqrt(row[i]!));
    const lower = cholesky(K.map((row, i) => row.map((value, j) => value / (scale[i]! * scale[j]!))));
    const step = (v: readonly number[]) =>
      solve(
        lower,
        v.map((x, i) => (C[i]! * x) / scale[i]!),
      ).map((x, i) => x / scale[i]!);
    const inner2 = (a: readonly number[], b: readonly number[]) => a.reduce((sum, x, i) => sum + x * b[i]! * C[i]!, 0);
    const found: { vector: number[]; value: number }[] = [];
    for (let mode = 0; mode < 2; mode++) {
      let v: number[] = names.map((_, i) => (mode === 0 ? 1 : Math.cos(1.7 * i)) + 0.1 * Math.sin(i));
      let value = 0;
      for (let round = 0; round < 400; round++) {
        for (const { vector } of found) {
          const share = inner2(v, vector);
          v = v.map((x, i) => x - share * vector[i]!);
        }
        const norm = Math.sqrt(inner2(v, v));
        if (!(norm > 0)) break;
        v = v.map((x) => x / norm);
        const next = step(v);
        const rayleigh = inner2(v, next);
        const settled = Math.abs(rayleigh - value) < 1e-12 * rayleigh;
        value = rayleigh;
        v = next;
        if (settled) break;
      }
      const norm = Math.sqrt(inner2(v, v));
      found.push({ vector: v.map((x) => x / norm), value });
    }
    const hz = (value: number) => 1 / (2 * Math.PI * Math.sqrt(value));
    const [first, second] = found;
    const capacitors = C.filter((c) => c > 0).length;
    return {
      first: hz(first!.value),
      second: capacitors < 2 || !(second!.value > 1e-9 * first!.value) ? null : hz(second!.value),
    };
  }

  #capacitances(
    on: Connected,
    spread: boolean,
    from: number,
    to: number,
    at: (terminal: number) => number,
    size: number,
    inner: (n: number) => number,
  ): number[] {
    const { nodes } = this;
    const last = nodes.length - 1;
    const whole = nodes[last]!;
    const C = new Array<number>(size).fill(0);
    const add = (terminal: number, value: number) => {
      if (at(terminal) >= 0) C[at(terminal)]! += value;
    };
    // Evenly along the turns: as much as the whole winding with an even rise of voltage has from its earthed end.
    const height = (turn: number) => (on.earthed === 'from' ? turn : whole - turn) / whole;
    let squares = 0;
    for (let s = 0; s < last; s++)
      squares += ((nodes[s + 1]! - nodes[s]!) / 2) * (height(nodes[s]!) ** 2 + height(nodes[s + 1]!) ** 2);
    const perTurn = on.selfF / squares;
    const hot = inner(on.earthed === 'from' ? to : from);
    const free = on.earthed === 'from' ? last : 0;
    const cutOff = on.rest === 'disconnected' && free !== (on.earthed === 'from' ? to : from);
    const [low, high] = [nodes[from]!, nodes[to]!];
    for (let s = 0; s < last; s++) {
      const half = (perTurn * (nodes[s + 1]! - nodes[s]!)) / 2;
      if (spread) {
        add(2 * s + 1, half);
        add(2 * s + 2, half);
      } else if (cutOff && s >= from && s < to)
        for (const turn of [nodes[s]!, nodes[s + 1]!]) {
          const rise = (on.earthed === 'from' ? turn - low : high - turn) / (high - low);
          add(hot, half * rise * rise);
        }
    }
    if (!spread && !cutOff) add(2 * free + (free === 0 ? 1 : 0), on.selfF);
    add(hot, on.tuningF);
    for (const { turn, f } of on.strays) {
      const n = this.#node(turn);
      add(n === from ? inner(n) : 2 * n, f);
    }
    return C;
  }
}
