/** Turns nearer than this are one node. */
const NODE_SLACK = 1e-9;

/** A winding as a chain of inductances between nodes, all coupled. */
export interface CoupledWinding {
  /** Turn of each node, rising from 0 to the whole winding. */
  readonly nodes: Float64Array;
  /** Entry m n of nodes x nodes: inductance (H) between the stretch from the start to node m and that from the start to node n. */
  readonly fromStart: Float64Array;
}

/**
 * Turns at which a winding is given nodes: both ends, the `marks` (taps), and between them every turn or, where that would be more than
 * about `most`, every second, third, ... of them.
 *
 * Domain: turns > 0, marks from 0 to turns (RangeError). A step of two turns moves the first resonance of 100 turns by 4e-5 at most, of four by 2e-4.
 *
 * Example: nodesFor(5, [2.5]).length = 7
 */
export function nodesFor(turns: number, marks: readonly number[], most = 60): number[] {
  if (!(turns > 0 && turns < Number.POSITIVE_INFINITY)) throw new RangeError(`turns must be positive, got ${turns}`);
  for (const mark of marks) {
    if (!(mark >= 0 && mark <= turns)) throw new RangeError(`turn ${mark} is not in [0, ${turns}]`);
  }
  const step = Math.max(1, Math.ceil(turns / most));
  const kept = [...new Set([0, turns, ...marks])].sort((a, b) => a - b);
  const nodes = kept.filter((turn, i) => i === 0 || turn - kept[i - 1]! > NODE_SLACK);
  for (let turn = step; turn < turns; turn += step) {
    // A piece much shorter than the others would add a node and say nothing.
    if (nodes.every((node) => Math.abs(node - turn) > 0.25 * step)) nodes.push(turn);
  }
  return nodes.sort((a, b) => a - b);
}

/**
 * A winding for `coupledResonances`: `nodes` as by `nodesFor`, and the inductance matrix (H, row by row) of the stretches between
 * neighbours, from `sectionInductances` (low frequency) or `solveField` (working frequency).
 *
 * Domain: one stretch less than nodes (RangeError).
 *
 * Example: coupledWinding([0, 1, 2], [3, 1, 1, 3]).fromStart[8] = 8
 */
export function coupledWinding(nodes: ArrayLike<number>, inductances: ArrayLike<number>): CoupledWinding {
  const size = nodes.length;
  const count = size - 1;
  if (!(count >= 1 && inductances.length === count * count)) {
    throw new RangeError(`${size} nodes need ${count} x ${count} inductances, got ${inductances.length}`);
  }
  const fromStart = new Float64Array(size * size);
  for (let m = 1; m < size; m++) {
    let row = 0;
    for (let n = 1; n < size; n++) {
      row += inductances[(m - 1) * count + n - 1]!;
      fromStart[m * size + n] = fromStart[(m - 1) * size + n]! + row;
    }
  }
  return { nodes: Float64Array.from(nodes), fromStart };
}

/** Index of the node at a turn. */
export function nodeAt({ nodes }: CoupledWinding, turn: number): number {
  const index = nodes.findIndex((node) => Math.abs(node - turn) <= NODE_SLACK);
  if (index < 0) throw new RangeError(`no node at turn ${turn}`);
  return index;
}
