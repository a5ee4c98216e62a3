/**
 * The count of a coil being wound, as data. A press of the key is a whole turn past the start mark; at a stop the count is
 * held until the stop is confirmed, which takes the wire on by the part of a turn that the stop lies beyond the last one.
 */
import { axialAt } from '../coil/layout.ts';
import type { CoilRecord } from '../record/schema.ts';

export type StopKind = 'tap' | 'unit' | 'check' | 'finish';

export interface Stop {
  readonly kind: StopKind;
  /** Of a tap or unit tap; null of a check. */
  readonly number: number | null;
  readonly turn: number;
  readonly angleDeg: number;
  /** Z of the wire centre. */
  readonly positionMm: number;
  /** Wire from the start hole, loops of earlier taps included. */
  readonly wireM: number;
  readonly text: string;
}

export interface Count {
  /** Whole turns past the start mark. */
  readonly whole: number;
  /** Stops that are done. */
  readonly done: number;
  /** What led here, for taking back: `t` a turn, `s` a stop. */
  readonly log: string;
}

export const NOTHING: Count = { whole: 0, done: 0, log: '' };

/** Turns are stated to 1e-6. */
const ALIKE = 1e-6;
const wholeOf = (turn: number) => Math.floor(turn + ALIKE);

export function stopsOf(record: CoilRecord): Stop[] {
  const winding = record.windings[0]!;
  const place = (u: number) => axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, u);
  const stops: Stop[] = [];
  for (const { kind, tap, unit, turn, wireM, text } of record.steps) {
    if (turn === null || wireM === null || (kind !== 'tap' && kind !== 'wind' && kind !== 'finish')) continue;
    const of =
      unit === undefined
        ? winding.taps.find((one) => one.tap === tap)
        : winding.unitTaps?.find((one) => one.unit === unit);
    const base = { turn: of?.turn ?? turn, angleDeg: of?.angleDeg ?? 0, positionMm: of?.positionMm ?? place(turn) };
    const number = unit ?? tap;
    const stopKind = kind === 'wind' ? 'check' : kind === 'finish' ? 'finish' : unit === undefined ? 'tap' : 'unit';
    stops.push({ kind: stopKind, number, ...base, wireM, text });
  }
  return stops.sort((a, b) => a.turn - b.turn);
}

/** The stop ahead, or the one that holds the count; null when all are done. */
export const nextStop = (stops: readonly Stop[], count: Count): Stop | null => stops[count.done] ?? null;

/** The stop that holds the count, or null. */
export function heldBy(stops: readonly Stop[], count: Count): Stop | null {
  const next = nextStop(stops, count);
  return next !== null && count.whole >= wholeOf(next.turn) ? next : null;
}

/** Where the wire is, turns from the start. */
export function turnOf(stops: readonly Stop[], count: Count): number {
  const last = stops[count.done - 1];
  return Math.max(count.whole, last?.turn ?? 0);
}

export function countTurn(stops: readonly Stop[], count: Count): Count {
  if (nextStop(stops, count) === null || heldBy(stops, count) !== null) return count;
  return { ...count, whole: count.whole + 1, log: `${count.log}t` };
}

export function confirmStop(stops: readonly Stop[], count: Count): Count {
  return heldBy(stops, count) === null ? count : { ...count, done: count.done + 1, log: `${count.log}s` };
}

export function takeBack(count: Count): Count {
  const last = count.log.slice(-1);
  if (last === '') return count;
  const log = count.log.slice(0, -1);
  return last === 's' ? { ...count, done: count.done - 1, log } : { ...count, whole: count.whole - 1, log };
}

/** A log played from nothing; null when this coil cannot have it. */
export function replay(stops: readonly Stop[], log: string): Count | null {
  let count = NOTHING;
  for (const sign of log) {
    const after = sign === 't' ? countTurn(stops, count) : sign === 's' ? confirmStop(stops, count) : count;
    if (after === count) return null;
    count = after;
  }
  return count;
}
