/**
 * The unknowns of an old coil and what follows from them: places, wire, inductances. The unknowns are a list of numbers, so that
 * a least-squares step can move any of them; turns of the taps stand apart, because they are whole in the end.
 */
import { Coil } from '../coil/coil.ts';
import { dcResistance } from '../physics/copper.ts';
import { helixLength } from '../physics/helix.ts';
import type { Wire } from '../stock/wire.ts';
import { type Measures, placeAt, placesOf } from './layout.ts';

/** What the list of unknowns holds, in order: measures, then what is only known as spread. */
export interface Shape {
  readonly sections: number;
  /** Known capacitors of which one error each is shared by all readings with it, pF. */
  readonly capacitors: readonly number[];
  /** Taps of which nothing is known push the wire aside too: how many lie before each known one. */
  readonly lostBefore?: readonly number[];
}

export const UNKNOWN = { mean: 0, bare: 1, overall: 2, tapGap: 3, pitch: 4 } as const;

/** Places of what lies behind the pitches. */
export function placesIn({ sections, capacitors }: Shape) {
  const gap = UNKNOWN.pitch + sections;
  const meter = gap + sections - 1;
  return { gap, meter, self: meter + 1, length: meter + 2, capacitor: meter + 3, count: meter + 3 + capacitors.length };
}

/** Where sections end: at the turn of a tap, or a counted number of turns on. The last ends with the coil. */
export type SectionEnd = { readonly tap: number } | { readonly turns: number };

/** What an electrical reading needs that is only worked out once in a while: crowding of the current and acting capacitance. */
export interface AtWork {
  /** Working over low-frequency inductance. */
  readonly crowded: number;
  /** What the coil itself puts across the tap, pF. */
  readonly ownPf: number;
}

/** The same about a number of turns: own capacitance falls with this power of the turns, for dead turns act through the square of a ratio. */
export interface AtWorkNear extends AtWork {
  readonly turn: number;
  readonly power: number;
  /** Turns at which the crowding was taken. */
  readonly crowdedTurn: number;
}

/** So many turns more than the coil has, so that what a turn more would do can be asked. */
const SPARE = 2;

/** One set of values of all unknowns. */
export class State {
  readonly shape: Shape;
  readonly x: Float64Array;
  /** Of the taps that are known, the whole coil last. */
  readonly turns: readonly number[];
  readonly ends: readonly number[];
  readonly pushed: readonly number[];
  readonly measures: Measures;
  readonly wire: Wire;
  #coil: Coil | null;

  constructor(
    shape: Shape,
    ends: readonly SectionEnd[],
    wire: Wire,
    x: Float64Array,
    turns: readonly number[],
    coil: Coil | null = null,
  ) {
    this.shape = shape;
    this.x = x;
    this.turns = turns;
    this.wire = wire;
    this.#coil = coil;
    let from = 0;
    const whole = turns[turns.length - 1]!;
    this.ends = ends.map((end, s) => {
      const at = s === ends.length - 1 ? whole : 'tap' in end ? turns[end.tap]! : from + end.turns;
      from = at;
      return at;
    });
    const lost = (shape.lostBefore ?? []).flatMap((count, t) => {
      const before = t === 0 ? 0 : turns[t - 1]!;
      return Array.from({ length: count }, (_, k) => before + ((turns[t]! - before) * (k + 1)) / (count + 1));
    });
    this.pushed = [...turns.slice(0, -1), ...lost].filter(
      (turn) => !this.ends.some((end) => Math.abs(end - turn) < 1e-6),
    );
    const { gap } = placesIn(shape);
    this.measures = {
      meanMm: x[UNKNOWN.mean]!,
      bareMm: x[UNKNOWN.bare]!,
      overallMm: x[UNKNOWN.overall]!,
      tapGapMm: x[UNKNOWN.tapGap]!,
      pitchMm: Array.from(x.subarray(UNKNOWN.pitch, gap)),
      sectionGapMm: Array.from(x.subarray(gap, gap + shape.sections - 1)),
    };
  }

  get whole(): number {
    return this.turns[this.turns.length - 1]!;
  }

  placeMm(turn: number): number {
    return placeAt(this.measures, this.ends, this.pushed, turn);
  }

  wireM(turn: number): number {
    return helixLength(this.measures.meanMm / 1e3, turn, this.placeMm(turn) / 1e3);
  }

  /** At 20 C. */
  resistanceOhm(turn: number): number {
    const { strands } = this.wire;
    const strandMm = (this.measures.bareMm * this.wire.strandMm) / this.wire.bareMm;
    return dcResistance(this.wireM(turn), strandMm / 1e3, strands);
  }

  /** With turns to spare: for inductances from the start alone. */
  get coil(): Coil {
    this.#coil ??= this.coilOf(Math.ceil(Math.max(...this.turns) - 1e-9) + SPARE);
    return this.#coil;
  }

  /** Of so many turns. */
  coilOf(turns: number): Coil {
    const { meanMm, bareMm, overallMm } = this.measures;
    const wire = { ...this.wire, bareMm, overallMm };
    const pitchMm = this.placeMm(turns) / turns;
    const places = placesOf(this.measures, this.ends, this.pushed, turns);
    return new Coil({ wire, meanDiameterMm: meanMm, turns, pitchMm, gaps: [], startMm: 0 }, places);
  }

  inductanceUh(turn: number): number {
    return this.coil.inductanceUh(turn);
  }

  /** By how much a turn more at a tap raises its inductance, uH. */
  perTurnUh(turn: number): number {
    const below = Math.max(turn - 1, turn / 2);
    return (this.inductanceUh(turn + 1) - this.inductanceUh(below)) / (turn + 1 - below);
  }
}
