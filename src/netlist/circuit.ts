/** The cards of a tapped winding: inductances and their couplings, resistances, capacitances, and one block for each position. */
import type { Rest, WorkingCoil } from '../coil/working-coil.ts';
import { selfCapacitances } from '../physics/coupled/capacitance.ts';
import type { CoupledWinding } from '../physics/coupled/coupled.ts';
import { connect } from '../physics/coupled/network.ts';
import { exact } from './text.ts';

/**
 * Names of the nodes of a winding: earth is 0, the taps t1, t2, ..., those of a units switch n1, n2, ..., the ends s and f,
 * all else u and its turn.
 */
export class NodeNames {
  readonly #names: readonly string[];
  readonly #broken: boolean;
  /** Where the set is connected. */
  readonly hot: string;
  /** Node of the winding of each tap, in order; the last is the whole coil. */
  readonly nodeOfTap: readonly number[];
  /** The same of the contacts of a units switch, the start first; empty for one switch. */
  readonly nodeOfUnit: readonly number[];

  constructor({ nodes }: CoupledWinding, { taps, unitTaps, around }: WorkingCoil, rest: Rest) {
    const nodeAt = (at: number) => nodes.findIndex((turn) => Math.abs(turn - at) < 1e-9);
    this.nodeOfTap = taps.map(nodeAt);
    this.nodeOfUnit = unitTaps.length > 0 ? [0, ...unitTaps.map(nodeAt)] : [];
    const startEarthed = around.earthed === 'start';
    const fixed = this.nodeOfUnit.length === 0;
    this.#names = Array.from(nodes, (turn, i) => {
      if (i === 0) return startEarthed && fixed ? '0' : 's';
      if (i === nodes.length - 1) return 'f';
      const tap = this.nodeOfTap.indexOf(i);
      const unit = this.nodeOfUnit.indexOf(i);
      if (unit > 0) return `n${unit}`;
      return tap >= 0 ? `t${tap + 1}` : `u${turn}`;
    });
    this.#broken = rest === 'disconnected';
    this.hot = startEarthed || !fixed ? 'hot' : 's';
  }

  /** Where what lies before node `i` ends. */
  before(i: number): string {
    return this.#names[i]!;
  }

  /** Where what lies beyond node `i` begins: the same, or the far side of a tap at which the switch can break the winding. */
  beyond(i: number): string {
    const name = this.#names[i]!;
    return this.#broken && name.startsWith('t') ? `${name}d` : name;
  }
}

/** Inductances (shrunk by the parameter), couplings between all of them, resistance in series: `ohm` tells that of the turns from..to. */
export function windingCards(
  winding: CoupledWinding,
  names: NodeNames,
  ohm: (from: number, to: number) => string,
): string[] {
  const { nodes, fromStart } = winding;
  const size = nodes.length;
  const at = (m: number, n: number) => fromStart[m * size + n]!;
  const mutual = (s: number, t: number) => at(s, t) - at(s - 1, t) - at(s, t - 1) + at(s - 1, t - 1);
  const cards: string[] = [];
  for (let s = 1; s < size; s++) {
    cards.push(`L${s} ${names.beyond(s - 1)} x${s} {shrink*${exact(mutual(s, s))}}`);
    cards.push(`R${s} x${s} ${names.before(s)} ${ohm(nodes[s - 1]!, nodes[s]!)}`);
  }
  for (let s = 1; s < size; s++) {
    for (let t = s + 1; t < size; t++) {
      cards.push(`K${s}_${t} L${s} L${t} ${exact(mutual(s, t) / Math.sqrt(mutual(s, s) * mutual(t, t)))}`);
    }
  }
  return cards;
}

/**
 * Self-capacitance along the turns, in so far as the parameter `spread` says so (1: all of it), and leads of the taps.
 * What lies at the open end instead depends on the position: `positionCards`. A part that the switch may cut off floats: a very large
 * resistance gives it a level at direct current, which a simulator asks for.
 */
export function capacitanceCards(coil: WorkingCoil, names: NodeNames): string[] {
  const { winding, on } = coil.circuit(coil.coil.turns, 0, 'open');
  const along = selfCapacitances(winding, connect(winding, on), on.earthed, on.selfCapacitance, 'spread');
  const { nodes } = winding;
  const cards: string[] = [];
  const add = (name: string, node: string, value: number) => {
    if (node !== '0' && value > 0) cards.push(`${name} ${node} 0 {spread*${exact(value)}}`);
  };
  for (const [i, turn] of nodes.entries()) {
    const [near, far] = [names.before(i), names.beyond(i)];
    // At a break each side has half of its own stretch.
    const share = near === far ? 1 : (turn - nodes[i - 1]!) / (nodes[i + 1]! - nodes[i - 1]!);
    add(`Cw${i}`, near, along[i]! * share);
    add(`Cw${i}d`, far, along[i]! * (1 - share));
  }
  names.nodeOfTap.forEach((node, k) => {
    if (names.before(node) !== names.beyond(node)) cards.push(`Rdc${k + 1} ${names.beyond(node)} 0 1e12`);
  });
  const contacts = [...names.nodeOfUnit, ...names.nodeOfTap].map((node) => names.before(node));
  if (coil.around.leadPf > 0) cards.push(...contacts.map((node, k) => `Clead${k + 1} ${node} 0 {clead}`));
  return cards;
}

/** Capacitance at the open end that the position has in place of that along the turns. */
function openEndCard(coil: WorkingCoil, names: NodeNames, position: number, rest: Rest): string {
  const { winding, on } = coil.circuit(coil.taps[position - 1]!, 0, rest);
  const network = connect(winding, on);
  const single = selfCapacitances(winding, network, on.earthed, on.selfCapacitance, 'open end');
  const at = single.findIndex((value) => value > 0);
  return `Cend${position} ${names.before(network.index[at]!)} 0 {(1-spread)*${exact(single[at]!)}}`;
}

/** What the switch does at one position: where the set is connected, what becomes of the rest, where the open end is. */
export function positionCards(coil: WorkingCoil, names: NodeNames, position: number, rest: Rest): string[] {
  const nameOf = (tap: number) => names.before(names.nodeOfTap[tap]!);
  const tap = position - 1;
  const last = coil.taps.length - 1;
  const cards = [`Vuse${position} ${coil.around.earthed === 'start' ? 'hot' : '0'} ${nameOf(tap)} 0`];
  if (rest === 'shorted' && tap < last) cards.push(`Vrest${position} ${nameOf(tap)} f 0`);
  if (rest === 'shorted in sections') {
    for (let k = tap; k < last; k++) cards.push(`Vrest${position}_${k + 1} ${nameOf(k)} ${nameOf(k + 1)} 0`);
  }
  if (rest === 'disconnected') {
    for (let k = 0; k < last; k++) {
      if (k !== tap) cards.push(`Vjoin${position}_${k + 1} ${nameOf(k)} ${names.beyond(names.nodeOfTap[k]!)} 0`);
    }
  }
  return [...cards, openEndCard(coil, names, position, rest)];
}

/** Where the turns in use begin, by the units switch; its dead turns stay open. */
export function unitCard(coil: WorkingCoil, names: NodeNames, unit: number): string {
  return `Vunit${unit} ${coil.around.earthed === 'start' ? '0' : 'hot'} ${names.before(names.nodeOfUnit[unit]!)} 0`;
}
