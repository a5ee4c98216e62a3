/** A netlist read back from its text and solved as textbooks have it, without any of the program's own physics. */
import { evaluate } from 'mathjs';
import { symmetricEigen } from '../../src/physics/coupled/eigen.ts';

export interface Parsed {
  readonly params: Record<string, number>;
  readonly L: { name: string; a: string; b: string; value: number }[];
  readonly K: { a: string; b: string; value: number }[];
  readonly C: { a: string; b: string; value: number }[];
  readonly R: { a: string; b: string; value: number }[];
  /** Sources of 0 V: what they join is one node. */
  readonly joined: [string, string][];
  /** Sources of alternating voltage or current that are not 0, from a to b. */
  readonly sources: { kind: 'V' | 'I'; a: string; b: string; value: number }[];
}

export function parse(text: string, override: Record<string, number> = {}): Parsed {
  const cards = text.split('\n').filter((line) => line !== '' && !line.startsWith('*'));
  const params: Record<string, number> = {};
  for (const card of cards) {
    const [, name, value] = /^\.param (\w+)=(\S+)$/.exec(card) ?? [];
    if (name !== undefined) params[name] = override[name] ?? Number(value);
  }
  const number = (word: string) => (word.startsWith('{') ? Number(evaluate(word.slice(1, -1), params)) : Number(word));
  const parsed: Parsed = { params, L: [], K: [], C: [], R: [], joined: [], sources: [] };
  for (const card of cards) {
    const [name = '', a = '', b = '', value = ''] = card.split(' ');
    if (/^L/.test(name)) parsed.L.push({ name, a, b, value: number(value) });
    if (/^K/.test(name)) parsed.K.push({ a, b, value: number(value) });
    if (/^R/.test(name)) parsed.R.push({ a, b, value: number(value) });
    if (/^C/.test(name)) parsed.C.push({ a, b, value: number(value) });
    const [, strength] = / AC (\S+)$/.exec(card) ?? [];
    if (strength !== undefined)
      parsed.sources.push({ kind: name.startsWith('V') ? 'V' : 'I', a, b, value: number(strength) });
    else if (/^V/.test(name)) parsed.joined.push([a, b]);
    if (!/^[LKRCVI.]/.test(name)) throw new Error(`a card that nobody knows: ${card}`);
  }
  return parsed;
}

/** Nodes that sources of 0 V make one: by the name that stands for all, earth where it is among them. */
export function joinedOf(net: Parsed) {
  const parent = new Map<string, string>();
  const root = (node: string): string => (parent.has(node) ? root(parent.get(node)!) : node);
  const join = (a: string, b: string) => {
    const [x, y] = [root(a), root(b)];
    if (x !== y) parent.set(x === '0' ? y : x, x === '0' ? x : y);
  };
  for (const [a, b] of net.joined) join(a, b);
  return { root, join };
}

/** Resonances without losses, Hz, lowest first: eigenvalues of sqrt(C) K^-1 sqrt(C), K = D' L^-1 D, which are 1/omega^2. */
export function resonancesOf(net: Parsed): number[] {
  const { root, join } = joinedOf(net);
  // A small resistance in series carries the same current as its inductance; across the set or to a floating part it is left out.
  for (const { a, b } of net.R) if (a.startsWith('x')) join(a, b);
  const count = net.L.length;
  const index = new Map(net.L.map(({ name }, i) => [name, i]));
  const inductance = net.L.map((_, i) => net.L.map((other, j) => (i === j ? other.value : 0)));
  for (const { a, b, value } of net.K) {
    const [i, j] = [index.get(a)!, index.get(b)!];
    const mutual = value * Math.sqrt(net.L[i]!.value * net.L[j]!.value);
    inductance[i]![j] = mutual;
    inductance[j]![i] = mutual;
  }
  const nodes = [...new Set(net.L.flatMap(({ a, b }) => [root(a), root(b)]))].filter((node) => node !== '0');
  const reciprocal = invert(inductance);
  const size = nodes.length;
  const stiffness = nodes.map(() => nodes.map(() => 0));
  const ends = net.L.map(({ a, b }) => [nodes.indexOf(root(a)), nodes.indexOf(root(b))] as const);
  for (let s = 0; s < count; s++) {
    for (let t = 0; t < count; t++) {
      for (const [i, one] of [[ends[s]![0], 1] as const, [ends[s]![1], -1] as const]) {
        for (const [j, other] of [[ends[t]![0], 1] as const, [ends[t]![1], -1] as const]) {
          if (i >= 0 && j >= 0) stiffness[i]![j]! += one * other * reciprocal[s]![t]!;
        }
      }
    }
  }
  const capacitance = nodes.map(() => 0);
  for (const { a, b, value } of net.C) {
    if (b !== '0') throw new Error(`a capacitor between ${a} and ${b} in a circuit with capacitors to earth alone`);
    const at = nodes.indexOf(root(a));
    if (at >= 0) capacitance[at]! += value;
  }
  const compliance = invert(floated(net, nodes, root, stiffness));
  const scaled = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      scaled[i * size + j] = compliance[i]![j]! * Math.sqrt(capacitance[i]! * capacitance[j]!);
    }
  }
  const values = symmetricEigen(scaled, size).values;
  return [...values].filter((value) => value > 0).map((value) => 1 / (2 * Math.PI * Math.sqrt(value)));
}

/** A part with no inductance to earth has no inverse: one of 100 H holds each that the netlist holds by a resistance. */
function floated(net: Parsed, nodes: readonly string[], root: (node: string) => string, stiffness: number[][]) {
  const held = net.R.filter(({ a, b, value }) => b === '0' && value >= 1e12 && !a.startsWith('x'));
  for (const { a } of held) {
    const at = nodes.indexOf(root(a));
    if (at >= 0) stiffness[at]![at]! += 1e-2;
  }
  return stiffness;
}

function invert(matrix: readonly (readonly number[])[]): number[][] {
  const size = matrix.length;
  const a = matrix.map((row, i) => [...row, ...row.map((_, j) => (i === j ? 1 : 0))]);
  for (let k = 0; k < size; k++) {
    let best = k;
    for (let i = k; i < size; i++) if (Math.abs(a[i]![k]!) > Math.abs(a[best]![k]!)) best = i;
    [a[k], a[best]] = [a[best]!, a[k]!];
    const pivot = a[k]![k]!;
    for (let j = 0; j < 2 * size; j++) a[k]![j]! /= pivot;
    for (let i = 0; i < size; i++) {
      const factor = a[i]![k]!;
      if (i === k || factor === 0) continue;
      for (let j = 0; j < 2 * size; j++) a[i]![j]! -= factor * a[k]![j]!;
    }
  }
  return a.map((row) => row.slice(size));
}
