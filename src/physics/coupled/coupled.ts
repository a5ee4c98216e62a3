/** A tapped winding as a coupled circuit: nodes, capacitances, connections, resonances. */
export type { Distribution } from './capacitance.ts';
export type { Connection } from './network.ts';
export {
  type Bracket,
  coupledResonances,
  type Resonances,
  resonanceBracket,
  type TunedCircuit,
} from './resonances.ts';
export { type CoupledWinding, coupledWinding, nodesFor } from './winding.ts';
