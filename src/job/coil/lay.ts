/** Where the turns of a measured winding lie, and at which turn a measured place is. Millimetres, Z = 0 at the start. */
import { axialAt, turnMiddles } from '../../coil/layout.ts';
import type { MeasuredSection } from './file.ts';

export interface Laid {
  /** Turn middles, from the wire centre at the start. */
  readonly places: Float64Array;
  readonly turns: number;
  /** Centre to centre; the mean over sections and gaps when there are several. */
  readonly pitchMm: number;
}

/**
 * Within a section the turns lie a pitch apart; the wire crosses to the next within a turn, so that its first turn lies the gap
 * and a wire behind the last one. Sections but the last have whole turns.
 */
export function laySections(sections: readonly MeasuredSection[], overallMm: number): Laid {
  const turns = sections.reduce((sum, section) => sum + section.turns, 0);
  const middles = turnMiddles(turns);
  const places = new Float64Array(middles.length);
  let index = 0;
  let z = 0;
  let before: MeasuredSection | null = null;
  let end = 0;
  for (const section of sections) {
    end += section.turns;
    z += before === null ? 0 : before.gapAfterMm + overallMm;
    const first = index;
    for (; index < middles.length && middles[index]! < end + 1e-9; index++) {
      places[index] = z + (middles[index]! - middles[first]!) * section.pitchMm;
    }
    z = places[index - 1] ?? z;
    before = section;
  }
  const [first, last] = [sections[0]!, sections[sections.length - 1]!];
  const reach = (section: MeasuredSection, turn: number) => Math.abs(turn) * section.pitchMm;
  const lengthMm = reach(first, middles[0]!) + z + reach(last, turns - middles[middles.length - 1]!);
  const pitchMm = lengthMm / turns;
  const start = pitchMm * middles[0]!;
  return { places: places.map((place) => place + start), turns, pitchMm };
}

/** From the wire centre at the start to that at a turn, along the axis. */
export const placeOf = ({ places, turns, pitchMm }: Laid, turn: number): number =>
  axialAt(places, turns, pitchMm, turn) - axialAt(places, turns, pitchMm, 0);

/** The turn at this distance from the start, to a millionth; distances beyond the finish run on with the pitch. */
export function turnAt(laid: Laid, mm: number): number {
  let [low, high] = [0, Math.max(laid.turns, 1) + Math.max(0, mm) / laid.pitchMm];
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (placeOf(laid, middle) < mm) low = middle;
    else high = middle;
  }
  return Number(((low + high) / 2).toFixed(6));
}
