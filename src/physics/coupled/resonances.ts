import { needPositive } from '../domain.ts';
import { type Distribution, selfCapacitances } from './capacitance.ts';
import { largestModes, type Mode } from './lanczos.ts';
import { type Connection, chargeOperator, connect, inductiveOperator, type Network } from './network.ts';
import { type CoupledWinding, nodeAt } from './winding.ts';

export interface TunedCircuit extends Connection {
  /** Of the whole winding with one end earthed, F (`selfCapacitance`); 0 for none. */
  readonly selfCapacitance: number;
  readonly distribution: Distribution;
  /** Across the turns in use, F. */
  readonly tuning: number;
  /** Further capacitances to earth (aerial, leads, switch contacts), each at its own turn; on a cut, at the turns in use. */
  readonly strays: readonly { readonly turn: number; readonly capacitance: number }[];
}

export interface Resonances {
  /** Hz. */
  readonly first: number;
  /** Hz; undefined where there is but one. */
  readonly second: number | undefined;
  /** Voltage of every node of the winding at the first, 1 at the hot end of the turns in use; beyond a cut, of the turns in use. */
  readonly voltages: Float64Array;
}

/**
 * First and second resonance (Hz) of a tapped winding with its dead turns, its self-capacitance and the set's capacitors.
 *
 * Units: F, turns; every turn that is named must be a node. Dead turns step the voltage up, and their capacitance comes back to the tap
 * multiplied: open they lower the resonance below 1/sqrt(L C) of the turns in use, and no position tunes above the whole winding.
 * open: the dead turns hang on. shorted: tap and far end are joined, below and above the turns in use. shorted in sections: each step
 * between taps is. disconnected: the dead turns are cut off; they float, and still couple.
 * Method: v = omega^2 G C v at the nodes, G the inductances between the stretches from earth to each node, which is the inverse of
 * the nodal matrix K of K v = omega^2 C v without inverting anything. The two largest eigenvalues of G C by Lanczos.
 * The two distributions of the self-capacitance bracket the truth (`resonanceBracket`).
 * Domain: capacitances 0 or more, not all 0 (RangeError). Losses are left out: they move a resonance by 1/(8 Q^2).
 * Source: Thomson 1853; Medhurst 1947 for the capacitance. Accuracy: 0.09 % of 12 values computed elsewhere to four digits (100 turns, taps
 * at 20, 40 and 100, 27 to 400 pF); 1e-11 of 1/(2 pi sqrt(L C)) for the whole winding. 60 nodes: 0.15 ms.
 *
 * Example: coupledResonances(coupledWinding([0, 1, 2], [3e-6, 1e-6, 1e-6, 3e-6]), { from: 0, to: 2, earthed: 'from', rest: 'open', taps: [], selfCapacitance: 0, distribution: 'spread', tuning: 1e-10, strays: [] }).first = 5626977
 */
export function coupledResonances(winding: CoupledWinding, circuit: TunedCircuit): Resonances {
  const network = connect(winding, circuit);
  const capacitance = capacitances(winding, network, circuit);
  const charge = chargeOperator(network, capacitance);
  const modes = largestModes(inductiveOperator(network), charge, network.index.length, 2);
  const [first, second] = modes.map(({ value }) => 1 / (2 * Math.PI * Math.sqrt(value)));
  if (first === undefined) throw new RangeError('a circuit without capacitance has no resonance');
  return { first, second, voltages: voltagesOf(winding, network, capacitance, modes[0]!) };
}

function capacitances(winding: CoupledWinding, network: Network, circuit: TunedCircuit): Float64Array {
  const { selfCapacitance, tuning, strays } = circuit;
  const given = {
    selfCapacitance,
    tuning,
    ...Object.fromEntries(strays.map((s) => [`stray at ${s.turn}`, s.capacitance])),
  };
  for (const [name, value] of Object.entries(given)) if (value !== 0) needPositive({ [name]: value });
  const all = selfCapacitances(winding, network, circuit.earthed, selfCapacitance, circuit.distribution);
  all[network.hot]! += tuning;
  for (const { turn, capacitance } of strays) all[network.index.indexOf(nodeAt(winding, turn))]! += capacitance;
  return all;
}

function voltagesOf(winding: CoupledWinding, network: Network, capacitance: Float64Array, mode: Mode): Float64Array {
  const { index, body, hot } = network;
  const shift = new Float64Array(1 + Math.max(...body));
  for (let b = 1; b < shift.length; b++) {
    let charge = 0;
    let whole = 0;
    body.forEach((of, i) => {
      if (of !== b) return;
      charge += capacitance[i]! * mode.vector[i]!;
      whole += capacitance[i]!;
    });
    shift[b] = whole > 0 ? -charge / whole : 0;
  }
  const voltages = new Float64Array(winding.nodes.length);
  // Backwards: at a cut the turns in use, which come first, have the last word.
  for (let i = index.length - 1; i >= 0; i--) {
    voltages[index[i]!] = (mode.vector[i]! + shift[body[i]!]!) / mode.vector[hot]!;
  }
  return voltages;
}

/** A resonance between its two limits, Hz: the mean, and half the spread as its uncertainty. */
export interface Bracket {
  readonly mean: number;
  readonly uncertainty: number;
}

/**
 * First and second resonance (Hz) with the self-capacitance spread and at the open end: the mean of the two, and half the difference as
 * what is not known of it.
 *
 * Units, domain and source as `coupledResonances`. The second is undefined where either distribution has but one.
 *
 * Example: resonanceBracket(coupledWinding([0, 1, 2], [3e-6, 1e-6, 1e-6, 3e-6]), { from: 0, to: 1, earthed: 'from', rest: 'open', taps: [], selfCapacitance: 4e-12, tuning: 1e-10, strays: [] }).first.uncertainty = 57188
 */
export function resonanceBracket(
  winding: CoupledWinding,
  circuit: Omit<TunedCircuit, 'distribution'>,
): { first: Bracket; second: Bracket | undefined } {
  const spread = coupledResonances(winding, { ...circuit, distribution: 'spread' });
  const single = coupledResonances(winding, { ...circuit, distribution: 'open end' });
  const between = (a: number, b: number) => ({ mean: (a + b) / 2, uncertainty: Math.abs(a - b) / 2 });
  const both = spread.second !== undefined && single.second !== undefined;
  return {
    first: between(spread.first, single.first),
    second: both ? between(spread.second, single.second) : undefined,
  };
}
