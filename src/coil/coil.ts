/**
 * The coil as an immutable value: turns where they really lie, and every figure that follows from that alone.
 * Millimetres, microhenry, picofarad, ohm and metres outside; SI is used only to ask the laws of `physics/`.
 */

import { dcResistance } from '../physics/copper.ts';
import { helixLength } from '../physics/helix.ts';
import { selfCapacitance } from '../physics/medhurst.ts';
import { equivalentDiameterMm, polygonTurn } from '../physics/polygon.ts';
import { cumulativeInductance, roundTurn, type TurnShape } from '../physics/rings.ts';
import type { Wire } from '../stock/wire.ts';
import { axialAt, type Gap, layTurns } from './layout.ts';

export interface CoilShape {
  readonly wire: Wire;
  /** Twice the radius of the wire centre; where there are corners, over a rib. */
  readonly meanDiameterMm: number;
  /** Ribs from which to which the wire runs straight, the same in every turn; absent: the turns are round. */
  readonly corners?: number | undefined;
  /** Radius at which the wire centre bends over a rib; absent: 0, sharp corners. Nothing without corners. See `physics/polygon.ts`. */
  readonly bendMm?: number | undefined;
  /** Centre to centre where no tap pushes. */
  readonly pitchMm: number;
  readonly turns: number;
  readonly gaps: readonly Gap[];
  /** Z of the wire centre at the start hole. */
  readonly startMm: number;
}

/** Copper is longer in a stranded bundle than the bundle: 1.5 % for one bunching (Sullivan 1999 gives the same order). */
export const LITZ_TAKE_UP = 1.015;

/** Up to this turn nothing is interpolated: there a turn is a large part of all. */
const EXACT_TO = 12;

export class Coil {
  readonly shape: CoilShape;
  /** Z of the turn middles; see `layout.ts`. */
  readonly places: Float64Array;
  /** One turn as the sums see it, m. */
  readonly turnShape: TurnShape;
  readonly #curve: { at(turn: number): number };

  /** `places` where they are known better than the shape tells them, as in a record; else as `layTurns` lays them. */
  constructor(shape: CoilShape, places?: ArrayLike<number>) {
    this.shape = shape;
    this.places =
      places === undefined
        ? layTurns(shape.turns, shape.pitchMm, shape.gaps, shape.startMm)
        : Float64Array.from(places);
    const { meanDiameterMm, corners, bendMm = 0 } = shape;
    this.turnShape =
      corners === undefined
        ? roundTurn(meanDiameterMm / 2e3)
        : polygonTurn(meanDiameterMm / 2e3, corners, bendMm / 1e3);
    this.#curve = cumulativeInductance(
      Float64Array.from(this.places, (z) => z / 1e3),
      this.turnShape,
      shape.wire.bareMm / 2e3,
      shape.turns,
    );
  }

  /** This coil with measures of its shape changed, as many turns; every turn keeps what it stands off its laid place. */
  changed(measures: Partial<Omit<CoilShape, 'turns'>>): Coil {
    const shape = { ...this.shape, ...measures };
    const laid = ({ turns, pitchMm, gaps, startMm }: CoilShape) => layTurns(turns, pitchMm, gaps, startMm);
    const [before, after] = [laid(this.shape), laid(shape)];
    return new Coil(
      shape,
      this.places.map((place, i) => place + (after[i]! - before[i]!)),
    );
  }

  get turns(): number {
    return this.shape.turns;
  }

  /** Low-frequency inductance of turns 0..turn by the ring sum, uH. */
  inductanceUh(turn: number): number {
    return this.#curve.at(turn) * 1e6;
  }

  /**
   * `inductanceUh` without its part turn worked out: between whole turns the power of the turns that fits both. Costs
   * nothing, and is within 0.4 % also where taps push turns aside; the first turns are worked out. For estimates.
   */
  nearUh(turn: number): number {
    const whole = Math.floor(turn + 1e-9);
    if (turn - whole < 1e-9) return this.inductanceUh(whole);
    if (whole < EXACT_TO || whole + 1 > this.turns) return this.inductanceUh(turn);
    const low = this.inductanceUh(whole);
    const power = Math.log(this.inductanceUh(whole + 1) / low) / Math.log((whole + 1) / whole);
    return low * (turn / whole) ** power;
  }

  /** The inverse of `nearUh`; exact where that is. */
  nearTurn(inductanceUh: number): number {
    const [low, high] = this.#between(inductanceUh) ?? [0, 0];
    if (low < EXACT_TO || high > Math.floor(this.turns)) return this.turnFor(inductanceUh);
    const from = this.inductanceUh(low);
    const power = Math.log(this.inductanceUh(high) / from) / Math.log(high / low);
    return low * (inductanceUh / from) ** (1 / power);
  }

  /**
   * The turn at which the section from the start has this inductance: the inverse of `inductanceUh`, to 1e-7 turn.
   * Values above the whole coil's run on with its slope, so that a search can see how many turns are missing.
   */
  turnFor(inductanceUh: number): number {
    const between = this.#between(inductanceUh);
    if (between !== null) return this.#within(between[0], between[1], inductanceUh);
    const top = this.inductanceUh(this.turns);
    const slope = top - this.inductanceUh(Math.max(this.turns - 1, 1e-3));
    return this.turns + (inductanceUh - top) / slope;
  }

  /** Whole turns, or the last and the end of the coil, between which a section has this inductance; null beyond the coil. */
  #between(inductanceUh: number): [low: number, high: number] | null {
    const whole = Math.floor(this.turns);
    if (this.inductanceUh(this.turns) < inductanceUh) return null;
    if (whole === 0 || this.inductanceUh(whole) < inductanceUh) return [whole, this.turns];
    let low = 0;
    let high = whole;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (this.inductanceUh(middle) < inductanceUh) low = middle;
      else high = middle;
    }
    return [low, high];
  }

  #within(from: number, to: number, target: number): number {
    let low = from;
    let high = to;
    let lowValue = (low > 0 ? this.inductanceUh(low) : 0) - target;
    let highValue = this.inductanceUh(high) - target;
    // Regula falsi with the Illinois halving: the curve is smooth and rises, a handful of steps do.
    for (let step = 0; step < 60 && high - low > 1e-7; step++) {
      const guess = (low * highValue - high * lowValue) / (highValue - lowValue);
      const value = this.inductanceUh(guess) - target;
      if (Math.abs(value) < 1e-10 * target) return guess;
      if (value > 0) {
        high = guess;
        highValue = value;
        lowValue /= 2;
      } else {
        low = guess;
        lowValue = value;
        highValue /= 2;
      }
    }
    return (low + high) / 2;
  }

  /** Z of the wire centre at a turn. */
  positionMm(turn: number): number {
    return axialAt(this.places, this.turns, this.shape.pitchMm, turn);
  }

  /** Edge to edge over the wires, from the start hole to this turn. */
  woundMm(turn: number): number {
    return this.positionMm(turn) - this.positionMm(0) + this.shape.wire.overallMm;
  }

  /**
   * Wire along the helix from the start hole to this turn, m; loops of taps are not in it. Straight sides climb as they go, so a
   * polygon's is a helix of its own length. Between two ribs the wire is taken in proportion to the angle: 0.02 R off at most.
   */
  wireM(turn: number): number {
    const climb = (this.positionMm(turn) - this.positionMm(0)) / 1e3;
    return helixLength(this.turnShape.length / Math.PI, turn, climb);
  }

  /** DC resistance at 20 C of the turns up to here and of `loopsM` of the same wire, ohm. */
  resistanceOhm(turn: number, bareMm: number = this.shape.wire.bareMm, loopsM = 0): number {
    const { strands, strandMm, bareMm: nominal } = this.shape.wire;
    const litz = strands > 1;
    const diameter = litz ? strandMm * (bareMm / nominal) : bareMm;
    return dcResistance((this.wireM(turn) + loopsM) * (litz ? LITZ_TAKE_UP : 1), diameter / 1e3, strands);
  }

  /** Diameter of the circle of a turn's area, for laws of round coils; the mean diameter of round turns. */
  get equivalentDiameterMm(): number {
    const { meanDiameterMm, corners, bendMm } = this.shape;
    return equivalentDiameterMm(meanDiameterMm, corners, bendMm);
  }

  /** Medhurst's self-capacitance of the section up to this turn, pF; of a polygon that of the circle of its area. */
  selfPf(turn: number): number {
    return selfCapacitance(this.woundMm(turn) / 1e3, this.equivalentDiameterMm / 1e3) * 1e12;
  }

  /** Mean centre-to-centre distance over the turns up to here, gaps of taps included. */
  meanPitchMm(turn: number): number {
    return (this.positionMm(turn) - this.positionMm(0)) / turn;
  }
}
