/** What can be done to a wound coil, and by which factor each of it changes the inductance of every tap. */
import { CORRECTION } from '../../templates/wording/steps.ts';
import { Coil } from '../coil/coil.ts';
import { coilOf } from '../record/rebuild.ts';
import { ribName } from '../record/rib-name.ts';
import type { CoilRecord } from '../record/schema.ts';

/** End turns that are moved, as the record has it. */
export const END_TURNS = 5;
/** Turns that may be taken off or put on. */
const MOST_TURNS = 2;
/** Turns too many that can still be told from a reading. */
const BEYOND = 6;
/** Taps lie no nearer to one another, turns. */
const APART = 0.5;
/** Places that a protractor can set out, a turn. */
const STEPS = 72;

/** Turns at the finish: off below 0. */
export interface Trim {
  readonly by: number;
  readonly hole: string | null;
}

/** End turns spread by so much of a wire after each, share 1; below 0 pressed. Factors are 1 + share times these. */
export interface EndMove {
  readonly from: number;
  readonly to: number;
  /** A tap each; the whole coil last. */
  readonly perShare: (share: number) => readonly number[];
}

const OFF_BY = Array.from({ length: 2 * MOST_TURNS + 1 }, (_, i) => i - MOST_TURNS);

/** Turns that the record says can be taken off or put on, none among them. */
export function trimsOf({ corrections, holes }: CoilRecord): Trim[] {
  return OFF_BY.flatMap((by): Trim[] => {
    if (by === 0) return [{ by, hole: null }];
    const label = by < 0 ? `F${by}` : `F+${by}`;
    const hole = holes.some((one) => one.label === label) ? label : null;
    return corrections.some(({ doing }) => doing === CORRECTION.turns(by, hole)) ? [{ by, hole }] : [];
  });
}

/** Spreading and pressing of the last turns; `excessMm`: what the winding is longer than planned there, which can be pressed out. */
export function finishMove({ corrections, windings }: CoilRecord, excessMm: number): EndMove | null {
  const spread = corrections.find(({ doing }) => doing === CORRECTION.spreadFinish(END_TURNS));
  if (spread === undefined) return null;
  const press = corrections.find(({ doing }) => doing === CORRECTION.pressFinish(END_TURNS));
  const { spacerMm, wire } = windings[0]!;
  const pressed = press === undefined ? 0 : spacerMm / 2 / wire.overallMm;
  const loose = Math.max(0, excessMm) / (END_TURNS * wire.overallMm);
  // What lies loose goes together as it went apart; the spacer's half has effects of its own.
  const steep = (i: number, share: number) =>
    share < 0 && press !== undefined ? -press.tapsPercent[i]! / pressed : spread.tapsPercent[i]!;
  return {
    from: -Math.max(pressed, loose),
    to: 1,
    perShare: (share) => spread.tapsPercent.map((_, i) => 1 + (steep(i, share) * share) / 100),
  };
}

/** Spreading of the first turns. */
export function startMove({ corrections }: CoilRecord): EndMove | null {
  const spread = corrections.find(({ doing }) => doing === CORRECTION.spreadStart(END_TURNS));
  if (spread === undefined) return null;
  return { from: 0, to: 1, perShare: (share) => spread.tapsPercent.map((percent) => 1 + (percent * share) / 100) };
}

/** Turns from one entry of a curve to the next: L of a piece between is a power of the turns, to 1e-4 from the second turn on. */
const ENTRY = 0.25;

/** Inductance of the record's coil against turns, run on for what has turns too many; worked out once, then looked up. */
class TurnCurve {
  readonly #logs: Float64Array;

  constructor(coil: Coil) {
    const count = Math.floor(coil.turns / ENTRY);
    this.#logs = Float64Array.from({ length: count }, (_, i) => Math.log(coil.inductanceUh(ENTRY * (i + 1))));
  }

  /** Logarithm of the inductance; beyond the ends as the power of the last piece. */
  log(turn: number): number {
    const last = this.#logs.length - 2;
    const i = Math.min(Math.max(Math.floor(turn / ENTRY) - 1, 0), last);
    const share = Math.log(turn / (ENTRY * (i + 1))) / Math.log((i + 2) / (i + 1));
    return this.#logs[i]! + share * (this.#logs[i + 1]! - this.#logs[i]!);
  }

  turnFor(log: number): number {
    let [low, high] = [0, this.#logs.length - 1];
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (this.#logs[middle]! <= log) low = middle;
      else high = middle;
    }
    const share = (log - this.#logs[low]!) / (this.#logs[low + 1]! - this.#logs[low]!);
    return ENTRY * (low + 1) * ((low + 2) / (low + 1)) ** share;
  }
}

/** Where taps read to be, and what moving them does. */
export class Turned {
  readonly #turns: readonly number[];
  readonly #curve: TurnCurve;
  /** Places a turn to which a tap can be moved, null: it cannot. */
  readonly #steps: readonly (number | null)[];

  constructor(record: CoilRecord) {
    const { shape } = coilOf(record);
    this.#curve = new TurnCurve(new Coil({ ...shape, turns: Math.ceil(shape.turns) + BEYOND }));
    const { tapMethod, former, windings } = record;
    const { taps } = windings[0]!;
    this.#turns = taps.map(({ turn }) => turn);
    const held = tapMethod.name === 'cut pair' || tapMethod.name === 'drawn in';
    const inLine = tapMethod.layout === 'in line';
    this.#steps = taps.map(({ tap, angleDeg }, i) => {
      if (held || i === taps.length - 1) return null;
      if (inLine || former.posts.some((post) => post.tap === tap)) return 1;
      return former.ribs !== null && ribName(former, angleDeg) !== null ? former.ribs.count : STEPS;
    });
  }

  get anyMoves(): boolean {
    return this.#steps.some((steps) => steps !== null);
  }

  /** Turns that a tap reads like, against where it should lie: of an inductance so many percent off. */
  offTurns(index: number, percent: number): number {
    const turn = this.#turns[index]!;
    return this.#curve.turnFor(this.#curve.log(turn) + Math.log(1 + percent / 100)) - turn;
  }

  /** Factor of the inductance when a place that reads like this is moved by turns along the wire; 0 when nothing is left. */
  moved(index: number, percent: number, turns: number): number {
    const from = this.#turns[index]! + this.offTurns(index, percent);
    return from + turns <= 0 ? 0 : Math.exp(this.#curve.log(from + turns) - this.#curve.log(from));
  }

  /**
   * The move of a tap, in its steps, that brings it nearest to the middle of the factors wanted, in whole turns where these do
   * nearly as well; null: it cannot be moved, or there is no room between its neighbours.
   */
  moveTo(index: number, percent: number, wanted: { readonly low: number; readonly high: number }): number | null {
    const steps = this.#steps[index];
    if (steps == null) return null;
    const here = this.#turns[index]! + this.offTurns(index, percent);
    const to = this.#curve.turnFor(this.#curve.log(here) + Math.log((wanted.low + wanted.high) / 2)) - here;
    const whole = Math.round(to);
    const factor = this.moved(index, percent, whole);
    const half = (wanted.high - wanted.low) / 2;
    const near = whole !== 0 && Math.abs(factor - (wanted.low + wanted.high) / 2) < half / 2;
    const turns = near ? whole : Math.round(to * steps) / steps;
    const low = index === 0 ? APART : this.#turns[index - 1]! + APART;
    const high = this.#turns[index + 1]! - APART;
    return turns === 0 || here + turns < low || here + turns > high ? null : turns;
  }
}
