/** Cards of what the set connects: aerial, detector, their contacts, a second winding beside the main one. */
import type { AerialElement } from '../around/aerial.ts';
import type { Contact, Load } from '../around/response.ts';
import type { Arrangement } from '../around/table.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { CoupledWinding } from '../physics/coupled/coupled.ts';
import type { NodeNames } from './circuit.ts';
import { exact } from './text.ts';

/** Where something can be connected: its node and what a person calls it. */
export interface Place {
  readonly at: Contact;
  readonly node: string;
  readonly words: string;
}

/** Every contact of a coil in its set; the hot end first. */
export function placesOf(coil: WorkingCoil, names: NodeNames, hasSecond: boolean): Place[] {
  const start: Place[] = coil.around.earthed === 'finish' ? [{ at: 0, node: names.before(0), words: 'the start' }] : [];
  return [
    { at: 'hot', node: names.hot, words: 'whatever is hot' },
    ...start,
    ...names.nodeOfTap.map((node, k) => ({ at: k + 1, node: names.before(node), words: `tap ${k + 1}` })),
    ...(hasSecond ? [{ at: 'second', node: 'second', words: 'the second winding' } as const] : []),
  ];
}

/** One line for each place, of which that of `at` is active. */
export function contactLines(of: 'aerial' | 'detector', from: string, places: readonly Place[], at: Contact): string[] {
  return places.flatMap((place, i) => [
    `* ${of} to ${place.words}`,
    `${place.at === at ? '' : '*'}V${of}${i} ${from} ${place.node} 0`,
  ]);
}

/** From a source of one volt to the contact. */
export function aerialCards(elements: readonly AerialElement[]): string[] {
  return [
    'Vsource source 0 DC 0 AC 1',
    ...elements.map(({ kind, from, to, value }, i) => `${kind}aerial${i + 1} ${from} ${to} ${exact(value)}`),
    // Nothing else gives a node between capacitors a level at direct current, which a simulator asks for.
    ...[...new Set(elements.flatMap(({ from, to }) => [from, to]))]
      .filter((node) => node !== 'source' && node !== 'contact')
      .map((node) => `Rlevel_${node} ${node} 0 1e12`),
  ];
}

export function detectorCards({ conductance, capacitance }: Load): string[] {
  return [
    `Rdetector det 0 ${exact(1 / conductance)}`,
    ...(capacitance > 0 ? [`Cdetector det 0 ${exact(capacitance)}`] : []),
  ];
}

/** Low-frequency inductance of the second winding, H; `kshare` is counted from the couplings with it. */
export const secondHenry = ({ pair }: NonNullable<Arrangement['second']>): number =>
  pair.second.inductanceUh(pair.second.turns) * 1e-6;

/**
 * The second winding, its finish earthed; couplings with every stretch of the main one; capacitance of the two where they lie over
 * one another, half of it to earth and half to the free end, as its voltage rises evenly.
 */
export function secondCards(
  second: NonNullable<Arrangement['second']>,
  winding: CoupledWinding,
  names: NodeNames,
): string[] {
  const { pair, permittivity } = second;
  const { nodes, fromStart } = winding;
  const size = nodes.length;
  const at = (m: number, n: number) => fromStart[m * size + n]!;
  const cards = [
    'Lsecond second xsecond {lsecond}',
    'Rsecond xsecond 0 {rsecond}',
    `Csecond second 0 ${exact(pair.second.selfPf(pair.second.turns) * 1e-12)}`,
  ];
  for (let s = 1; s < size; s++) {
    const own = at(s, s) - at(s - 1, s) - at(s, s - 1) + at(s - 1, s - 1);
    const mutual = pair.mutualUh(nodes[s - 1]!, nodes[s]!) * 1e-6;
    cards.push(`Ksecond_${s} Lsecond L${s} {kshare*${exact(mutual / Math.sqrt(own * secondHenry(second)))}}`);
  }
  const between = new Map<number, number>();
  for (const { turn, pf } of pair.betweenPf(permittivity)) {
    const node = nodes.reduce((best, one, i) => (Math.abs(one - turn) < Math.abs(nodes[best]! - turn) ? i : best), 0);
    between.set(node, (between.get(node) ?? 0) + pf * 1e-12);
  }
  for (const [node, capacitance] of between) {
    const name = names.before(node);
    if (name !== '0') cards.push(`Cover${node} ${name} 0 ${exact(capacitance / 2)}`);
    cards.push(`Cbetween${node} ${name} second ${exact(capacitance / 2)}`);
  }
  return cards;
}
