/**
 * Where the taps of a two-switch coil go. The units switch picks turn 0 (the start), 1, 2, ... as the beginning of the coil,
 * the tens switch every `units`th turn as its end, so that every whole number of turns can be set.
 *
 * Unit taps are one turn apart, nearer than their tap method allows in one line: they stand in turn in a few lines beside
 * the start hole, as many degrees apart as the method needs (common practice). The fraction of a turn by which a tap then
 * lies off its whole turn is counted in everywhere.
 */
import { clears, type NoPlace, type Placing } from './place-taps.ts';

export interface BothSwitches {
  /** Turns of the unit taps; the start itself, unit 0, is not among them. */
  readonly unitTaps: number[];
  /** Turns of the tens taps below the whole coil. */
  readonly taps: number[];
}

/** Farther than this from its whole turn no tap is put. */
const MOST_OFF = 1 / 4;

/** Distances from the whole turn, the least first: 0, one line over, one line back, two lines over, ... */
function linesOf({ method, ribs }: Placing): number[] {
  const lines = [0];
  // On ribs a line is a rib, the next one that is far enough.
  const apart = method.degreesApart / 360;
  const step = ribs === undefined ? apart : Math.ceil(apart * ribs.count - 1e-9) / ribs.count;
  for (let k = 1; k * step <= MOST_OFF + 1e-9; k++) lines.push(k * step, -k * step);
  return lines;
}

export function placeBothSwitches(units: number, tens: number, placing: Placing): BothSwitches | NoPlace {
  const lines = linesOf(placing);
  const taken = [0];
  const place = (whole: number, offsets: readonly number[]): number | null => {
    const offset = offsets.find((off) => clears(whole + off, taken, placing));
    if (offset === undefined) return null;
    taken.push(whole + offset);
    return whole + offset;
  };
  // The tens first: they may stand in one line, which is easier to wire, and the units keep clear of it.
  const taps: number[] = [];
  for (let ten = 1; ten < tens; ten++) {
    const turn = place(ten * units, placing.layout === 'in line' ? [0] : lines);
    if (turn === null) return { noPlaceFor: ten, beyond: false };
    taps.push(turn);
  }
  const unitTaps: number[] = [];
  for (let unit = 1; unit < units; unit++) {
    const turn = place(unit, lines);
    if (turn === null) return { noPlaceFor: unit, unit: true, beyond: false };
    unitTaps.push(turn);
  }
  return { unitTaps, taps };
}
