import type { Rest } from '../field/terminal.ts';
import type { Operator } from './lanczos.ts';
import { type CoupledWinding, nodeAt } from './winding.ts';

export interface Connection {
  /** Turns in use, from and to; nodes of the winding. */
  readonly from: number;
  readonly to: number;
  /** Which end of the turns in use is at earth; the other is hot. */
  readonly earthed: 'from' | 'to';
  readonly rest: Rest;
  /** Turns of all taps, where the dead turns are bridged if shorted in sections. */
  readonly taps: readonly number[];
}

/**
 * A winding with its connections: nodes, each on a body of wire that hangs together, and the inductive voltage at every node of a unit of
 * current change drawn from every other, G (H). A dead part that is cut off is a body of its own with its own copy of the node.
 */
export interface Network {
  /** Node of the winding for each node of the network. */
  readonly index: readonly number[];
  /** Body of each; 0 is the one that is earthed. */
  readonly body: readonly number[];
  /** Of the network: the hot end of the turns in use. */
  readonly hot: number;
  readonly G: Float64Array;
}

export function connect(winding: CoupledWinding, connection: Connection): Network {
  const [from, to] = [nodeAt(winding, connection.from), nodeAt(winding, connection.to)];
  if (!(from < to)) throw new RangeError(`turns in use from ${connection.from} to ${connection.to} are none`);
  const last = winding.nodes.length - 1;
  const earth = connection.earthed === 'from' ? from : to;
  const bodies: { nodes: number[]; reference: number }[] = [];
  if (connection.rest === 'disconnected') {
    bodies.push({ nodes: range(from, to), reference: earth });
    if (from > 0) bodies.push({ nodes: range(0, from), reference: from });
    if (to < last) bodies.push({ nodes: range(to, last), reference: to });
  } else bodies.push({ nodes: range(0, last), reference: earth });
  const index = bodies.flatMap(({ nodes }) => nodes);
  const body = bodies.flatMap(({ nodes }, b) => nodes.map(() => b));
  const size = winding.nodes.length;
  const S = winding.fromStart;
  const G = new Float64Array(index.length ** 2);
  index.forEach((m, i) => {
    const p = bodies[body[i]!]!.reference;
    index.forEach((n, j) => {
      const q = bodies[body[j]!]!.reference;
      G[i * index.length + j] = S[m * size + n]! - S[m * size + q]! - S[p * size + n]! + S[p * size + q]!;
    });
  });
  for (const [a, b] of bridges(winding, connection)) bridge(G, index.length, a, b);
  return { index, body, hot: index.indexOf(connection.earthed === 'from' ? to : from), G };
}

/** Pairs of nodes of the winding that the switch joins; none of them is beyond a cut. */
export function bridges(winding: CoupledWinding, { rest, taps, ...used }: Connection): [number, number][] {
  const [from, to] = [nodeAt(winding, used.from), nodeAt(winding, used.to)];
  const last = winding.nodes.length - 1;
  if (rest === 'open' || rest === 'disconnected') return [];
  const ends = new Set([0, from, to, last]);
  if (rest === 'shorted in sections') for (const tap of taps) ends.add(nodeAt(winding, tap));
  const sorted = [...ends].sort((a, b) => a - b);
  const pairs = sorted.slice(1).map((end, i): [number, number] => [sorted[i]!, end]);
  return pairs.filter(([a, b]) => b <= from || a >= to);
}

/** Joins nodes a and b: the current that then flows between them takes away their difference, G - G c c'G/(c'G c). */
function bridge(G: Float64Array, size: number, a: number, b: number): void {
  const difference = new Float64Array(size);
  for (let i = 0; i < size; i++) difference[i] = G[i * size + a]! - G[i * size + b]!;
  const own = difference[a]! - difference[b]!;
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) G[i * size + j]! -= (difference[i]! * difference[j]!) / own;
  }
}

export function inductiveOperator({ G, index }: Network): Operator {
  const size = index.length;
  return (vector, out) => {
    for (let i = 0; i < size; i++) {
      const row = i * size;
      let sum = 0;
      for (let j = 0; j < size; j++) sum += G[row + j]! * vector[j]!;
      out[i] = sum;
    }
  };
}

/**
 * Charge of every node at given voltages against the body's reference. A body that floats takes the voltage at which its charges cancel.
 */
export function chargeOperator({ body }: Network, capacitance: Float64Array): Operator {
  const bodies = 1 + Math.max(...body);
  const whole = new Float64Array(bodies);
  body.forEach((b, i) => {
    whole[b]! += capacitance[i]!;
  });
  const charge = new Float64Array(bodies);
  return (vector, out) => {
    charge.fill(0);
    for (let i = 0; i < out.length; i++) {
      out[i] = capacitance[i]! * vector[i]!;
      charge[body[i]!]! += out[i]!;
    }
    for (let i = 0; i < out.length; i++) {
      const b = body[i]!;
      if (b > 0 && whole[b]! > 0) out[i]! -= (capacitance[i]! * charge[b]!) / whole[b]!;
    }
  };
}

function range(first: number, last: number): number[] {
  return Array.from({ length: last - first + 1 }, (_, i) => first + i);
}
