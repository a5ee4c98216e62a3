import type { Network } from './network.ts';
import type { CoupledWinding } from './winding.ts';

/** Where the self-capacitance of a winding is taken to lie: along its turns, or all at the end that is not earthed. */
export type Distribution = 'spread' | 'open end';

/**
 * Capacitance to earth (F) of every node of a network by the winding's self-capacitance C alone.
 *
 * spread: c a turn, half of each stretch at either of its nodes, and c such that the whole winding, earthed at one end with a voltage
 * that rises evenly, has C: sum of C_n (u_n/N)^2 = C. open end: C at the free end; turns that are cut off from it have at their own
 * hot end what the spread capacitance is worth there for a voltage that rises evenly along them.
 */
export function selfCapacitances(
  winding: CoupledWinding,
  network: Network,
  earthed: 'from' | 'to',
  whole: number,
  distribution: Distribution,
): Float64Array {
  const { nodes } = winding;
  const last = nodes.length - 1;
  const turns = nodes[last]!;
  const away = (n: number) => (earthed === 'from' ? nodes[n]! : turns - nodes[n]!);
  let squares = 0;
  for (let n = 0; n < last; n++) {
    squares += ((nodes[n + 1]! - nodes[n]!) / 2) * ((away(n) / turns) ** 2 + (away(n + 1) / turns) ** 2);
  }
  const perTurn = whole / squares;
  const { index, body, hot } = network;
  const spread = new Float64Array(index.length);
  for (let i = 1; i < index.length; i++) {
    if (body[i] !== body[i - 1]) continue;
    const half = (perTurn * (nodes[index[i]!]! - nodes[index[i - 1]!]!)) / 2;
    spread[i]! += half;
    spread[i - 1]! += half;
  }
  if (distribution === 'spread') return spread;
  const single = new Float64Array(index.length);
  const free = index.indexOf(earthed === 'from' ? last : 0);
  if (body[free] === 0) {
    single[free] = whole;
    return single;
  }
  // Body 0 comes first: the turns in use, from one end to the other.
  const alone = body.lastIndexOf(0);
  const [low, high] = [nodes[index[0]!]!, nodes[index[alone]!]!];
  for (let i = 0; i <= alone; i++) {
    const height = (earthed === 'from' ? nodes[index[i]!]! - low : high - nodes[index[i]!]!) / (high - low);
    single[hot]! += spread[i]! * height * height;
  }
  return single;
}
