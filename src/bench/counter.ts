/**
 * The count of a coil being wound, as data. A press is a whole turn past the start mark; at a stop the count is held until
 * the stop is confirmed, which takes the wire on by the part of a turn that the stop lies beyond the last whole one.
 */
import { angleOf, axialAt } from '../coil/layout.ts';
import type { CoilRecord, Step } from '../record/schema.ts';
import type { Count, Parsed, Place, Places, Progress, Stop, StopKind } from './api.ts';

export const NOTHING: Count = { whole: 0, done: 0, log: '' };
export const NEW: Progress = { count: NOTHING, places: {}, measures: [] };

/** Turns are stated to 1e-6. */
const ALIKE = 1e-6;
const wholeOf = (turn: number) => Math.floor(turn + ALIKE);

export type CountedRecord = Pick<CoilRecord, 'windings' | 'steps' | 'frame' | 'tapMethod'>;

function keyOf(kind: StopKind, number: number | null, turn: number): string {
  if (kind === 'finish') return 'F';
  return kind === 'check' ? `c${turn}` : `${kind === 'unit' ? 'u' : 't'}${number}`;
}

function kindOf({ kind, unit }: Step): StopKind | null {
  if (kind === 'finish') return 'finish';
  if (kind === 'tap') return unit === undefined ? 'tap' : 'unit';
  return kind === 'wind' ? 'check' : null;
}

function plannedStop(record: CountedRecord, step: Step): Stop | null {
  const winding = record.windings[0]!;
  const kind = kindOf(step);
  if (kind === null || step.turn === null || step.wireM === null) return null;
  const { unit, text } = step;
  const number = kind === 'check' ? null : (unit ?? step.tap);
  const of =
    kind === 'check'
      ? undefined
      : kind === 'unit'
        ? winding.unitTaps?.find((one) => one.unit === unit)
        : winding.taps.find((one) => one.tap === number);
  const turn = of?.turn ?? step.turn;
  const whole = wholeOf(turn);
  return {
    key: keyOf(kind, number, turn),
    kind,
    number,
    turn,
    whole,
    onDeg: 360 * Math.max(0, turn - whole),
    angleDeg: of?.angleDeg ?? angleOf(turn, record.frame.hand),
    positionMm: of?.positionMm ?? axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, turn),
    wireM: of?.wireFromStartM ?? step.wireM,
    text,
  };
}

/** Wire per turn hardly depends on the pitch: it is taken from the plan. */
function movedStop(record: CountedRecord, stop: Stop, { turn, positionMm }: Place): Stop {
  const winding = record.windings[0]!;
  const whole = wholeOf(turn);
  const perTurn = (winding.wireLengthM - loopsBefore(record, Number.POSITIVE_INFINITY)) / winding.turns;
  return {
    ...stop,
    turn,
    whole,
    onDeg: 360 * Math.max(0, turn - whole),
    angleDeg: angleOf(turn, record.frame.hand),
    positionMm,
    wireM: stop.wireM + perTurn * (turn - stop.turn),
  };
}

/** Wire in the loops of taps before a turn of the plan, m. */
function loopsBefore({ windings, tapMethod }: CountedRecord, turn: number): number {
  const { taps, unitTaps = [] } = windings[0]!;
  return tapMethod.loopM * [...unitTaps, ...taps.slice(0, -1)].filter((tap) => tap.turn < turn).length;
}

/** The stops of a record in order; `places` are those that a correction moved. */
export function stopsOf(record: CountedRecord, places: Places = {}): Stop[] {
  const planned = record.steps
    .map((step) => plannedStop(record, step))
    .filter((stop): stop is Stop => stop !== null)
    .sort((a, b) => a.turn - b.turn);
  const placed = planned.map((stop) => {
    const place = Object.hasOwn(places, stop.key) ? places[stop.key] : undefined;
    return place === undefined ? stop : movedStop(record, stop, place);
  });
  placed.sort((a, b) => a.turn - b.turn);
  // The words of a step name turns from the stop before and where to stop: both as planned.
  const same = (at: number) => placed[at]?.turn === planned[at]?.turn && placed[at]?.key === planned[at]?.key;
  return placed.map((stop, i) => (same(i) && (i === 0 || same(i - 1)) ? stop : { ...stop, text: '' }));
}

/** The stop ahead, or the one that holds the count; null when all are done. */
export const nextStop = (stops: readonly Stop[], { done }: Count): Stop | null => stops[done] ?? null;

/** The stop that holds the count: wind on by its `onDeg`, do it, confirm. Null: go on counting. */
export function heldBy(stops: readonly Stop[], count: Count): Stop | null {
  const next = nextStop(stops, count);
  return next !== null && count.whole >= next.whole ? next : null;
}

/** Where the wire is, turns from the start. */
export function turnOf(stops: readonly Stop[], { whole, done }: Count): number {
  return Math.max(whole, stops[done - 1]?.turn ?? 0);
}

/** Turns to wind to the next stop, its part turn included; 0 when all are done. */
export function turnsToGo(stops: readonly Stop[], count: Count): number {
  const next = nextStop(stops, count);
  return next === null ? 0 : Math.max(0, next.turn - turnOf(stops, count));
}

/** A turn more; the same count where a stop holds it or all is wound. */
export function countTurn(stops: readonly Stop[], count: Count): Count {
  if (nextStop(stops, count) === null || heldBy(stops, count) !== null) return count;
  return { ...count, whole: count.whole + 1, log: `${count.log}t` };
}

/** The stop that holds the count is done; the same count where none does. */
export function confirmStop(stops: readonly Stop[], count: Count): Count {
  return heldBy(stops, count) === null ? count : { ...count, done: count.done + 1, log: `${count.log}s` };
}

/** Takes the last turn or stop back; the same count at the very start. */
export function takeBack(count: Count): Count {
  const last = count.log.slice(-1);
  if (last === '') return count;
  const log = count.log.slice(0, -1);
  return last === 's' ? { ...count, done: count.done - 1, log } : { ...count, whole: count.whole - 1, log };
}

/** Turns beyond the last stop that a kept count may have: a correction that is given up again moves the finish back. */
const MOST_BEYOND = 20;

/**
 * The count that a log tells of; null where no coil with these stops can have it. A turn past a stop is taken: the stop may
 * have lain elsewhere when it was counted.
 */
export function replay(stops: readonly Stop[], log: string): Count | null {
  let whole = 0;
  let done = 0;
  const most = (stops.at(-1)?.whole ?? 0) + MOST_BEYOND;
  for (const event of log) {
    if (event === 't') whole++;
    else if (event === 's' && done < stops.length) done++;
    else return null;
    if (whole > most) return null;
  }
  return { whole, done, log };
}

/** Places without those of stops that are still to come: the plan holds for these again. */
export function plannedAgain(stops: readonly Stop[], { done }: Count, places: Places): Places {
  const made = new Set(stops.slice(0, done).map(({ key }) => key));
  return Object.fromEntries(Object.entries(places).filter(([key]) => made.has(key)));
}

const VERSION = 1;

/** Progress as text to keep, under the hash of its record. */
export function serialise(record: Pick<CoilRecord, 'hash'>, { count, places, measures }: Progress): string {
  return JSON.stringify({ bench: VERSION, record: record.hash, log: count.log, places, measures });
}

type Key = 'bench' | 'record' | 'log' | 'places' | 'measures' | 'turn' | 'positionMm' | 'lengthMm' | 'halfMm' | 'over';
type Loose = Readonly<Partial<Record<Key, unknown>>>;
const isLoose = (value: unknown): value is Loose => typeof value === 'object' && value !== null;
const isNumber = (value: unknown): value is number => typeof value === 'number' && Number.isFinite(value);
const isPlace = (value: unknown): value is Place =>
  isLoose(value) && isNumber(value.turn) && value.turn >= 0 && isNumber(value.positionMm);

function placesFrom(value: unknown): Places | null {
  if (!isLoose(value)) return null;
  const entries = Object.entries(value);
  if (!entries.every(([, place]) => isPlace(place))) return null;
  return Object.fromEntries(
    entries.map(([key, place]) => [key, { turn: (place as Place).turn, positionMm: (place as Place).positionMm }]),
  );
}

function measuresFrom(value: unknown): Progress['measures'] | null {
  if (!Array.isArray(value)) return null;
  const good = value.every(
    (one: unknown) =>
      isLoose(one) &&
      [one.turn, one.lengthMm, one.halfMm].every(isNumber) &&
      (one.over === 'extent' || one.over === 'wires'),
  );
  if (!good) return null;
  return (value as Progress['measures']).map(({ turn, lengthMm, halfMm, over }) => ({ turn, lengthMm, halfMm, over }));
}

/** What `serialise` made, where it is of this record; it may have been spoilt in between. */
export function parse(record: CountedRecord & Pick<CoilRecord, 'hash'>, text: string): Parsed {
  let kept: unknown;
  try {
    kept = JSON.parse(text);
  } catch {
    return { ok: false, why: 'damaged' };
  }
  if (!isLoose(kept)) return { ok: false, why: 'damaged' };
  if (kept.bench !== VERSION) return { ok: false, why: 'version' };
  if (kept.record !== record.hash) return { ok: false, why: 'another record' };
  const places = placesFrom(kept.places);
  const measures = measuresFrom(kept.measures);
  const log = kept.log;
  const count = places === null || typeof log !== 'string' ? null : replay(stopsOf(record, places), log);
  if (places === null || measures === null || count === null) return { ok: false, why: 'damaged' };
  return { ok: true, progress: { count, places, measures } };
}
