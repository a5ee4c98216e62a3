/**
 * One switch position at one frequency as a network with losses: stretches of the winding between nodes, all coupled, their
 * resistance by the field of every turn, self-capacitance along the turns, leads, the former's loss, what the switch does with the
 * rest, and a second winding where there is one. What the set connects (tuning capacitor, aerial, detector, instruments) is not in
 * it: see `response.ts`. The same circuit as the netlist with `spread` at 1.
 */
import { formerShuntOhm } from '../coil/positions.ts';
import type { Rest, WorkingCoil } from '../coil/working-coil.ts';
import { EARTH, type Network } from '../physics/circuit/network.ts';
import { selfCapacitances } from '../physics/coupled/capacitance.ts';
import type { CoupledWinding, TunedCircuit } from '../physics/coupled/coupled.ts';
import { bridges, connect } from '../physics/coupled/network.ts';
import { NodeGroups } from './node-groups.ts';

/** The other winding beside the main one, as its two ends see it. */
export interface SecondSide {
  /** H at this frequency. */
  readonly inductance: number;
  readonly resistance: number;
  /** H to the turns from..to of the main winding at this frequency. */
  mutual(from: number, to: number): number;
  /** F across it. */
  readonly selfCapacitance: number;
  /** ohm that its copper adds to the turns in use. */
  readonly added: number;
  /** F between the two where they lie over one another, at a turn of the main winding. */
  readonly between: readonly { readonly turn: number; readonly capacitance: number }[];
}

export interface Position {
  readonly network: Network;
  /** Node where the set is connected. */
  readonly hot: number;
  /** Node of the start; `EARTH` where that is the earthed end. */
  readonly start: number;
  /** Node of every tap, the whole coil last; `EARTH` of one that is earthed. */
  readonly taps: readonly number[];
  /** Node of the free end of the second winding, whose other end is earthed; null without one. */
  readonly second: number | null;
}

export interface PositionOptions {
  readonly rest: Rest;
  /** Of the former's material. */
  readonly lossTangent: number;
  readonly second?: SecondSide | null;
}

/** The turns 0..turn in use at a frequency. RangeError for a turn that is no tap of the coil. */
export function positionNetwork(coil: WorkingCoil, turn: number, kHz: number, options: PositionOptions): Position {
  const { winding, on } = coil.circuit(turn, 0, options.rest);
  const circuit: TunedCircuit = { ...on, distribution: 'spread' };
  const connected = connect(winding, circuit);
  const { index, body, hot } = connected;
  const groups = new NodeGroups(index.length);
  const nodeAt = (k: number, of = 0) => index.findIndex((node, i) => node === k && body[i] === of);
  const place = (at: number) => winding.nodes.findIndex((node) => Math.abs(node - at) < 1e-6);
  groups.earth(nodeAt(place(on.earthed === 'from' ? on.from : on.to)));
  for (const [a, b] of bridges(winding, circuit)) groups.join(nodeAt(a), nodeAt(b));
  const second = options.second ?? null;
  const free = second === null ? null : groups.add();
  const number = (k: number) => groups.numberOf(k);

  const size = winding.nodes.length - 1;
  const coils = Array.from({ length: size }, (_, s) => {
    const of = body[index.findIndex((node, i) => node === s && hasNext(index, body, i))]!;
    return { from: number(nodeAt(s, of)), to: number(nodeAt(s + 1, of)) };
  });
  const capacitors: { from: number; to: number; capacitance: number }[] = [];
  const toEarth = (k: number, capacitance: number) => capacitors.push({ from: number(k), to: EARTH, capacitance });
  selfCapacitances(winding, connected, on.earthed, on.selfCapacitance, 'spread').forEach((f, k) => {
    toEarth(k, f);
  });
  for (const { turn: at, capacitance } of on.strays) toEarth(nodeIn(index, place(at)), capacitance);
  // The voltage along the second winding rises evenly from earth: half of the capacitance to it counts at either end.
  for (const { turn: at, capacitance } of second?.between ?? []) {
    const node = nodeIn(index, nearest(winding, at));
    toEarth(node, capacitance / 2);
    capacitors.push({ from: number(node), to: number(free!), capacitance: capacitance / 2 });
  }
  if (second !== null) toEarth(free!, second.selfCapacitance);

  const alone = coil.turnOhm(turn, kHz, options.rest);
  const copper = { ...alone, used: alone.used + (second?.added ?? 0) / turn };
  const { inductanceUh } = coil.terminal(turn, kHz, 'open');
  const shunt = formerShuntOhm(inductanceUh, coil.coil.selfPf(turn), options.lossTangent, kHz);
  const conductances = Number.isFinite(shunt) ? [{ from: number(hot), to: EARTH, conductance: 1 / shunt }] : [];
  return {
    network: {
      nodes: groups.count,
      coils: second === null ? coils : [...coils, { from: number(free!), to: EARTH }],
      ...matrices(winding, turn, copper, 1 / coil.crowding(turn, kHz), second),
      capacitors,
      conductances,
    },
    hot: number(hot),
    start: number(nodeIn(index, 0)),
    taps: coil.taps.map((tap) => number(nodeIn(index, place(tap)))),
    second: free === null ? null : number(free),
  };
}

/** Whether node i of the network has the next node of the winding on its own body. */
const hasNext = (index: readonly number[], body: readonly number[], i: number): boolean =>
  index.some((node, k) => node === index[i]! + 1 && body[k] === body[i]);

/** A node of the winding where the turns in use have it, else where the dead ones do. */
const nodeIn = (index: readonly number[], node: number): number => index.indexOf(node);

function nearest({ nodes }: CoupledWinding, turn: number): number {
  let best = 0;
  nodes.forEach((node, i) => {
    if (Math.abs(node - turn) < Math.abs(nodes[best]! - turn)) best = i;
  });
  return best;
}

/** Resistance and inductance of all stretches, the second winding last. */
function matrices(
  { nodes, fromStart }: CoupledWinding,
  used: number,
  copper: { used: number; dead: number },
  shrink: number,
  second: SecondSide | null,
): { resistance: Float64Array; inductance: Float64Array } {
  const points = nodes.length;
  const main = points - 1;
  const size = second === null ? main : main + 1;
  const resistance = new Float64Array(size * size);
  const inductance = new Float64Array(size * size);
  const at = (m: number, n: number) => fromStart[m * points + n]!;
  for (let s = 0; s < main; s++) {
    const turns = nodes[s + 1]! - nodes[s]!;
    resistance[s * size + s] = turns * (nodes[s + 1]! <= used + 1e-9 ? copper.used : copper.dead);
    for (let t = 0; t < main; t++)
      inductance[s * size + t] = shrink * (at(s + 1, t + 1) - at(s, t + 1) - at(s + 1, t) + at(s, t));
  }
  if (second !== null) {
    resistance[size * size - 1] = second.resistance;
    inductance[size * size - 1] = second.inductance;
    for (let s = 0; s < main; s++) {
      const mutual = second.mutual(nodes[s]!, nodes[s + 1]!);
      inductance[s * size + main] = mutual;
      inductance[main * size + s] = mutual;
    }
  }
  return { resistance, inductance };
}
