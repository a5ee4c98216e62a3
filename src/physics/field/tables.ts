import { MU0 } from '../constants.ts';
import { allPositive, needPositive } from '../domain.ts';
import { ellipticKE } from '../elliptic.ts';
import { countTurns, placeAt, TURN_SLACK } from '../turn-places.ts';
import { shapeOf, type TurnShape } from '../turn-shape.ts';
import { fieldOrder } from './order.ts';

/**
 * A quantity for every pair of turns, as rows of a band: that of turn j upon turn i is values[i * (stride - 1) + half + j], for
 * |i - j| <= half. Evenly spaced turns share one row (stride 0), others have one each (stride 2 half + 1).
 */
export interface PairTable {
  readonly values: Float64Array;
  readonly half: number;
  readonly stride: number;
}

/** Everything about a winding that does not depend on the frequency. Make it once with `fieldTables`; nothing changes it. */
export interface FieldTables {
  /** As given: the middle of each turn, and of a last part turn. */
  readonly positions: Float64Array;
  /** What the inductances are reckoned with. */
  readonly shape: TurnShape;
  /** Of the circle that stands for the turn in every field, `shape.radius`. */
  readonly radius: number;
  readonly wireRadius: number;
  readonly turns: number;
  /** Highest multipole of a wire that is reckoned with. */
  readonly order: number;
  /** How much of a circle each ring is: 1, and less for a last part turn. */
  readonly presence: Float64Array;
  /** M of whole rings, H; 0 on the diagonal. A last part turn stands in this and the other tables where it would be if whole. */
  readonly mutual: PairTable;
  /** Axial and radial field of a whole ring's ampere at the other wires, T/A; 0 on the diagonal. */
  readonly axial: PairTable;
  readonly radial: PairTable;
  /** Axial field of a ring's own curvature at its wire, T/A. */
  readonly ownAxial: number;
  /** Entry k: (a/(z_j - z_i))^k for k from 2 to 2 x order, cut off where it no longer counts; entries 0 and 1 are empty. */
  readonly powers: readonly PairTable[];
}

export interface FieldOptions {
  /** Turns of the winding (default: one a position, all whole); with a part turn at the end there is a position for its middle. */
  readonly turns?: number;
  /** Highest multipole; default: `fieldOrder` of the narrowest spacing. */
  readonly order?: number;
}

/**
 * Geometry of a winding for the field solution: distances, elliptic fields and powers of every pair of turns.
 *
 * Units: m. `positions[k]` is the wire centre at the middle of turn k, as in `cumulativeInductance`, strictly rising; `turn` is the
 * radius of the wire centres, or another shape of turn: its inductances and length count, fields are those of the circle of its area
 * (mean square of the field across the wire 3 % too much at most, 10 and 30 turns of 6 to 24 sharp corners).
 * `wireRadius` is the bare one. Domain: 0 < wireRadius < radius, no two turns nearer than a wire (RangeError).
 * Fields of a ring at an equal ring a distance h away: B_z = mu0/(2 pi s) (K - E), B_r = mu0 h/(2 pi R s) [(2 R^2 + h^2)/h^2 E - K] with
 * s^2 = 4 R^2 + h^2 (Smythe 1950, 7.10).
 * Cost: N evaluations at an even pitch, N^2/2 otherwise; 500 uneven turns take about 50 ms and 30 MB.
 *
 * Example: fieldTables([0, 4e-3, 8e-3], 0.03, 7.5e-4).order = 2
 */
export function fieldTables(
  positions: ArrayLike<number>,
  turn: number | TurnShape,
  wireRadius: number,
  options: FieldOptions = {},
): FieldTables {
  const shape = shapeOf(turn);
  const { radius } = shape;
  if (!allPositive(radius, wireRadius)) needPositive({ radius, wireRadius });
  if (!(wireRadius < radius))
    throw new RangeError(`a wire of radius ${wireRadius} does not bend to a ring of ${radius}`);
  const turns = options.turns ?? positions.length;
  if (!allPositive(turns)) needPositive({ turns });
  const { whole, count } = countTurns(turns);
  if (positions.length !== count)
    throw new RangeError(`${turns} turns need ${count} positions, got ${positions.length}`);
  const given = Float64Array.from(positions);
  const places = ringPlaces(given, turns);
  const narrowest = narrowestPitch(places);
  if (narrowest < 2 * wireRadius * (1 - TURN_SLACK)) {
    throw new RangeError(`turns ${narrowest} apart do not clear a wire of radius ${wireRadius}`);
  }
  const order = options.order ?? fieldOrder((2 * wireRadius) / narrowest);
  const even = isEven(places);
  const pairs = (half: number, law: (distance: number) => number, odd = false) =>
    pairTable(places, Math.min(half, count - 1), even, law, odd);
  const powers = Array.from({ length: 2 * order + 1 }, (_, k) =>
    k < 2 ? pairs(0, () => 0) : pairs(reachOf(k, wireRadius / narrowest), (h) => (wireRadius / h) ** k, k % 2 === 1),
  );
  const presence = new Float64Array(count).fill(1);
  if (count > whole) presence[whole] = turns - whole;
  return {
    positions: given,
    shape,
    radius,
    wireRadius,
    turns,
    order,
    presence,
    mutual: pairs(count, (h) => shape.mutual(h)),
    axial: pairs(count, (h) => axialField(radius, h)),
    radial: pairs(count, (h) => radialField(radius, h), true),
    ownAxial: (MU0 / (4 * Math.PI * radius)) * (Math.log((8 * radius) / wireRadius) - 0.5),
    powers,
  };
}

/**
 * Where the rings lie whose multipoles are solved: a last part turn where it would be if it were whole, since its wire keeps the full pitch
 * to the turn before it. (The middle of a short arc is half a pitch away.)
 */
function ringPlaces(positions: Float64Array, turns: number): Float64Array {
  const { whole, count } = countTurns(turns);
  if (count === whole || count === 1) return positions;
  const places = positions.slice();
  places[whole] = placeAt(positions, turns, whole + 0.5);
  return places;
}

/** B_z (T/A) of a ring at an equal one, `distance` along the axis. */
function axialField(radius: number, distance: number): number {
  const span = Math.hypot(2 * radius, distance);
  const { K, E } = ellipticKE(Math.abs(distance) / span);
  return (MU0 * (K - E)) / (2 * Math.PI * span);
}

/** B_r (T/A) of a ring at an equal one, where the source stands `distance` further up: below a ring the field runs inwards. */
function radialField(radius: number, distance: number): number {
  const span = Math.hypot(2 * radius, distance);
  const { K, E } = ellipticKE(Math.abs(distance) / span);
  const bracket = (2 * (radius / distance) ** 2 + 1) * E - K;
  return (-MU0 * distance * bracket) / (2 * Math.PI * radius * span);
}

/**
 * How many turns away a power k still counts: beyond, its largest coefficient times (a/h)^k is below 1e-11, a hundredth of what a
 * comparison with full elimination can show.
 */
function reachOf(k: number, ratio: number): number {
  let largest = 1;
  for (let m = 1; m < k; m++) largest = Math.max(largest, translation(k - m, m));
  return Math.ceil(ratio * (largest / 1e-11) ** (1 / k));
}

/**
 * Coefficient that carries a multipole of order m from one wire to an incident field of order l at another, times (a/h)^(l+m):
 * binomial(m+l-1, l) scaled by sqrt(l/m), which makes it symmetric.
 */
export function translation(l: number, m: number): number {
  let value = 1;
  for (let n = 1; n <= l; n++) value *= (m - 1 + n) / n;
  return value * Math.sqrt(l / m);
}

/** Fills a band; `law` is asked for positive distances only, and is even or odd in them. */
function pairTable(
  places: Float64Array,
  half: number,
  even: boolean,
  law: (distance: number) => number,
  odd: boolean,
): PairTable {
  const count = places.length;
  const width = 2 * half + 1;
  const sign = odd ? -1 : 1;
  const stride = even ? 0 : width;
  const values = new Float64Array(even ? width : width * count);
  if (even) {
    const pitch = count > 1 ? (places[count - 1]! - places[0]!) / (count - 1) : 0;
    for (let n = 1; n <= half; n++) {
      const value = law(n * pitch);
      values[half + n] = value;
      values[half - n] = sign * value;
    }
    return { values, half, stride };
  }
  for (let i = 0; i < count; i++) {
    for (let j = i + 1; j <= Math.min(i + half, count - 1); j++) {
      const value = law(places[j]! - places[i]!);
      values[i * (stride - 1) + half + j] = value;
      values[j * (stride - 1) + half + i] = sign * value;
    }
  }
  return { values, half, stride };
}

function narrowestPitch(places: Float64Array): number {
  let narrowest = Number.POSITIVE_INFINITY;
  for (let i = 1; i < places.length; i++) narrowest = Math.min(narrowest, places[i]! - places[i - 1]!);
  if (Number.isNaN(narrowest) || narrowest <= 0) throw new RangeError('positions must rise from turn to turn');
  return narrowest;
}

/** Whether every turn lies on the same pitch, to a thousandth of a millionth of it. */
function isEven(places: Float64Array): boolean {
  const count = places.length;
  const first = places[0]!;
  const pitch = count > 1 ? (places[count - 1]! - first) / (count - 1) : 0;
  return places.every((place, i) => Math.abs(place - first - i * pitch) <= 1e-9 * pitch);
}
