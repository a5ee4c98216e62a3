/** The pitches that lengths measured while winding tell of, and where the turns then lie. Millimetres and turns. */
import { type Gap, layTurns, turnMiddles } from '../coil/layout.ts';
import type { Spread } from '../coil/tolerance.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { LengthMeasure, LengthOver, PitchPiece } from './api.ts';

/** The pitch to come is that of so many turns wound last: of fewer a rule tells too little. */
const LOOKED_BACK_TURNS = 10;
/** Wires do not go into one another; a slip of the pen must not turn the coil round. */
const LEAST_PITCH = 0.5;

export interface Pitches {
  readonly pieces: readonly PitchPiece[];
  /** Of the turns to come. */
  readonly pitchMm: number;
  readonly halfMm: number;
}

/** How many gaps' worth the taps push aside up to `turn`, mm, as `layTurns` does. */
const pushedMm = (gaps: readonly Gap[], turn: number) =>
  gaps.reduce((sum, gap) => sum + gap.gapMm * Math.min(1, Math.max(0, turn - gap.turn + 0.5)), 0);

/** Turns between which a length is taken: see `LengthOver`. */
export const spanOf = ({ turn, over }: { turn: number; over: LengthOver }): readonly [from: number, to: number] =>
  over === 'extent' ? [0, turn] : [0.5, turn - 0.5];

/** Length that the plan has for a turn, mm. */
export function plannedLengthMm(
  record: Pick<CoilRecord, 'windings'>,
  gaps: readonly Gap[],
  measure: { turn: number; over: LengthOver },
): number {
  const { pitchMm, wire } = record.windings[0]!;
  const [from, to] = spanOf(measure);
  return pitchMm * (to - from) + pushedMm(gaps, to) - pushedMm(gaps, from) + wire.overallMm;
}

interface Reading {
  readonly from: number;
  readonly to: number;
  /** What the pitches alone make of it. */
  readonly mm: number;
  readonly halfMm: number;
}

/** A reading with the gaps of taps taken off, and with what is not known of these. */
function readingOf(measure: LengthMeasure, gaps: readonly Gap[], overallMm: number, spread: Spread): Reading {
  const [from, to] = spanOf(measure);
  const pushed = gaps.filter(({ turn }) => turn < to).map(({ gapMm }) => spread.gap * gapMm);
  return {
    from,
    to,
    mm: measure.lengthMm - overallMm - (pushedMm(gaps, to) - pushedMm(gaps, from)),
    halfMm: Math.hypot(Math.max(measure.halfMm, 1e-3), ...pushed),
  };
}

/** The line from (turn, 0) that fits best, and its half width; null when a reading lies off it by more than its half. */
function lineThrough(points: readonly { turns: number; mm: number; halfMm: number }[]): [number, number] | null {
  let above = 0;
  let below = 0;
  for (const { turns, mm, halfMm } of points) {
    above += (turns * mm) / halfMm ** 2;
    below += turns ** 2 / halfMm ** 2;
  }
  const pitch = above / below;
  const fits = points.every(({ turns, mm, halfMm }) => Math.abs(mm - pitch * turns) <= halfMm + 1e-9);
  return fits || points.length === 1 ? [pitch, 1 / Math.sqrt(below)] : null;
}

/** As few pitches, one after the other from the start, as every reading goes with. */
function piecesOf(readings: readonly Reading[], leastMm: number): PitchPiece[] {
  const pieces: PitchPiece[] = [];
  let [turn, mm] = [0, 0];
  for (let first = 0; first < readings.length; ) {
    const firstPitch = pieces[0]?.pitchMm;
    // Length from the end of the piece before; what lies before the line of measuring has the first pitch.
    const points = readings
      .slice(first)
      .map((one) =>
        firstPitch === undefined
          ? { turns: one.to - one.from, mm: one.mm, halfMm: one.halfMm }
          : { turns: one.to - turn, mm: one.mm + firstPitch * one.from - mm, halfMm: one.halfMm },
      );
    let count = 1;
    let line = lineThrough(points.slice(0, 1))!;
    for (let more = 2; more <= points.length; more++) {
      const longer = lineThrough(points.slice(0, more));
      if (longer === null) continue;
      line = longer;
      count = more;
    }
    const toTurn = readings[first + count - 1]!.to;
    const pitchMm = Math.max(line[0], leastMm);
    pieces.push({ fromTurn: turn, toTurn, pitchMm, halfMm: line[1] });
    mm += pitchMm * (toTurn - turn);
    turn = toTurn;
    first += count;
  }
  return pieces;
}

/** The last of the lengths taken at a turn is the one meant. */
function latest(measures: readonly LengthMeasure[]): LengthMeasure[] {
  return [...new Map(measures.map((measure) => [measure.turn, measure])).values()].sort((a, b) => a.turn - b.turn);
}

/** Without a length the planned pitch, with the spread that the record counts on. In a groove that is the only one. */
export function pitchesOf(
  record: Pick<CoilRecord, 'windings' | 'spread'>,
  measures: readonly LengthMeasure[],
  gaps: readonly Gap[],
): Pitches {
  const { pitchMm, pitchKind, wire } = record.windings[0]!;
  const { spread } = record;
  const planned = { pieces: [], pitchMm, halfMm: spread.pitch * pitchMm };
  const taken = latest(measures).filter((measure) => {
    const [from, to] = spanOf(measure);
    return to > from;
  });
  if (pitchKind === 'groove' || taken.length === 0) return planned;
  const readings = taken.map((measure) => readingOf(measure, gaps, wire.overallMm, spread));
  const pieces = piecesOf(readings, LEAST_PITCH * wire.overallMm);
  const end = pieces.at(-1)!.toTurn;
  const since = Math.max(0, end - LOOKED_BACK_TURNS);
  let [turns, mm, half] = [0, 0, 0];
  for (const piece of pieces) {
    const within = piece.toTurn - Math.max(piece.fromTurn, since);
    if (within <= 0) continue;
    turns += within;
    mm += within * piece.pitchMm;
    half += within * piece.halfMm;
  }
  return { pieces, pitchMm: mm / turns, halfMm: half / turns };
}

/** Z of the turn middles of so many turns of these pitches, what is to come with the last; see `layTurns`. */
export function laidPlaces(
  record: Pick<CoilRecord, 'windings'>,
  { pieces, pitchMm }: Pitches,
  turns: number,
  gaps: readonly Gap[],
): Float64Array {
  const { startMm } = record.windings[0]!;
  const wound = pieces.at(-1)?.toTurn ?? 0;
  const places = layTurns(turns, 0, gaps, startMm);
  const middles = turnMiddles(turns);
  for (let i = 0; i < places.length; i++) {
    const turn = middles[i]!;
    let mm = pitchMm * Math.max(0, turn - wound);
    for (const piece of pieces)
      mm += piece.pitchMm * Math.min(Math.max(0, turn - piece.fromTurn), piece.toTurn - piece.fromTurn);
    places[i] = places[i]! + mm;
  }
  return places;
}
