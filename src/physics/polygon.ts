/**
 * A turn that runs straight from rib to rib: a regular polygon whose corners the ribs round off.
 *
 * `radius` is that of the wire's centre over a rib, `bend` the radius at which the wire's centre bends there, 0 for sharp corners.
 * The sides lie where those of a sharp polygon with corners at radius + bend (1/cos(pi/n) - 1) would. A flat rib of width w
 * bends the wire about as an arc of (w/2)/tan(pi/(2 n)) does, which touches it in the middle and has the same sides (area 0.05 %
 * less, for 12 ribs 3 mm wide at 40 mm).
 */
import { MU0 } from './constants.ts';
import { allPositive, needPositive } from './domain.ts';
import { ringMutual, ringSelf } from './maxwell.ts';
import { polygonMutual } from './sides.ts';
import type { TurnShape } from './turn-shape.ts';

interface Outline {
  readonly length: number;
  readonly area: number;
}

/** Sides moved outwards by the bend from a sharp polygon of corner radius - bend, and a whole circle of arcs. */
function outlineOf(radius: number, corners: number, bend: number): Outline {
  if (!allPositive(radius)) needPositive({ radius });
  if (!(Number.isInteger(corners) && corners >= 3))
    throw new RangeError(`a polygon has 3 corners or more, got ${corners}`);
  if (!(bend >= 0 && bend < radius))
    throw new RangeError(`a bend of ${bend} does not fit a corner circle of ${radius}`);
  const side = 2 * (radius - bend) * Math.sin(Math.PI / corners);
  const apothem = (radius - bend) * Math.cos(Math.PI / corners);
  return {
    length: corners * side + 2 * Math.PI * bend,
    area: corners * side * (apothem / 2 + bend) + Math.PI * bend * bend,
  };
}

/**
 * Diameter of the circle of a turn's area: what stands for the polygon in laws that know circles only. Absent corners: the diameter.
 *
 * Units: those of the diameter, which is twice the radius of the wire's centre over a rib; `bend` as above. Domain: 3 corners and
 * more, 0 <= bend < D/2.
 * Accuracy in the inductance of a coil, against the polygons' own sum, lengths of 0.3 to 3 diameters, pitches of D/200 to D/20,
 * sharp corners: 6 corners -0.47 to +0.08 %, 8 corners -0.18 to +0.05 %, 12 corners -0.05 to +0.02 %, 24 corners 0.01 %; too little
 * for short close coils. The circle of equal length is 1.7 to 10 % too much at 6 to 12 corners.
 *
 * Example: equivalentDiameterMm(80, 12) = 78.176
 */
export function equivalentDiameterMm(meanDiameterMm: number, corners: number | undefined, bendMm = 0): number {
  if (corners === undefined) return meanDiameterMm;
  return 2 * Math.sqrt(outlineOf(meanDiameterMm / 2, corners, bendMm).area / Math.PI);
}

/**
 * Length of one flat turn: 2 n (R - bend) sin(pi/n) + 2 pi bend. Absent corners: pi D.
 *
 * Units and domain as `equivalentDiameterMm`. Exact. A bend lengthens the sharp polygon of the same R by 2 bend (pi - n sin(pi/n)):
 * 0.28 bend for 6 corners, 0.07 for 12, 0.018 for 24.
 *
 * Example: turnLengthMm(80, 12) = 248.466
 */
export function turnLengthMm(meanDiameterMm: number, corners: number | undefined, bendMm = 0): number {
  if (corners === undefined) return Math.PI * meanDiameterMm;
  return outlineOf(meanDiameterMm / 2, corners, bendMm).length;
}

/**
 * A turn of `corners` straight sides that bend at `radius` from the axis.
 *
 * Units: m, H. Domain: 3 corners and more, 0 <= bend < radius; corners are the same in every turn, and lie in line along the axis.
 * M is that of circles of equal area, and the difference between sharp polygons (`polygonMutual`) and those, taken times the share
 * of the sharp polygon's excess length that the bends leave: exact of sharp corners at every distance, and of bent ones for turns
 * far apart (area) and in the leading term of turns close together (length).
 * The own inductance is M at the mean distance a exp(-1/4) of the wire's section, which for thin wire is Grover 1946, ch. 8,
 * with the circle's next term.
 * Accuracy of M: 5e-8 relative of sharp corners for distances of 1e-4 to 20 radii (tables), 3e-6 outside; bent by 0.05 to 0.4 radii
 * 0.25 % of 6 corners, 0.12 % of 8, 0.05 % of 12, 0.01 % of 24 (elements of wire), of either sign along a coil. Coils of 10 turns as helices
 * of elements, pitch D/33: sharp corners 0.01 %, bent 0.15 % of 6, 0.04 % of 8, 0.01 % of 12 and more; a pitch of D/10 costs 0.2 % as with
 * round turns, 0.35 % of 6. Where a winding ends half way round, its last part is 3 % of its own term off with 6 corners.
 * Cost: as M of circles; the first turn of a number of corners tabulates for 2 to 25 ms.
 *
 * Example: polygonTurn(0.05, 6).length = 0.3
 */
export function polygonTurn(corner: number, corners: number, bend = 0): TurnShape {
  const { length, area } = outlineOf(corner, corners, bend);
  const radius = Math.sqrt(area / Math.PI);
  const sharp = sharpOf(corners);
  const share = (length / (2 * Math.PI * radius) - 1) / sharp.longer;
  const scale = MU0 * radius;
  const mutual = (distance: number) => {
    const x = Math.abs(distance) / radius;
    const u = (Math.log(x) - FROM) / STEP;
    if (!(u >= 0 && u < COUNT)) return ringMutual(radius, distance) + scale * share * excessBeyond(sharp, x);
    const i = Math.floor(u);
    const span = 4 + x * x;
    const factor = cubic(CIRCLE.cubics, i, u - i) + share * cubic(sharp.cubics, i, u - i);
    return (scale * factor) / (span * Math.sqrt(span));
  };
  const own = (wireRadius: number) => {
    const mean = wireRadius * Math.exp(-0.25);
    return ringSelf(radius, wireRadius) + mutual(mean) - ringMutual(radius, mean);
  };
  return { radius, length, mutual, own };
}

/** M over mu0 of turns of the area of a circle of radius 1, by the logarithm of their distance. */
interface Table {
  /** Four coefficients a step, of M (4 + x^2)^(3/2), which neither falls off nor turns. */
  readonly cubics: Float64Array;
  /** M at both ends. */
  readonly first: number;
  readonly last: number;
}

/** Sharp polygons less circles. */
interface Sharp extends Table {
  /** Length over that of the circle, less 1. */
  readonly longer: number;
}

const START = 1e-4;
const STEP = 0.06;
const COUNT = 204;
const FROM = Math.log(START);
const END = Math.exp(FROM + COUNT * STEP);
const CIRCLE = tabulate((x) => ringMutual(1, x) / MU0);

const known = new Map<number, Sharp>();

function sharpOf(corners: number): Sharp {
  const found = known.get(corners) ?? tabulateSharp(corners);
  known.set(corners, found);
  return found;
}

function tabulateSharp(corners: number): Sharp {
  const unit = outlineOf(1, corners, 0);
  const corner = Math.sqrt(Math.PI / unit.area);
  const table = tabulate((x) => (polygonMutual(corner, corners, x) - ringMutual(1, x)) / MU0);
  return { ...table, longer: (unit.length * corner) / (2 * Math.PI) - 1 };
}

/** Off the table: the logarithm of turns that touch, and what is left of distant ones when their moments are alike. */
function excessBeyond({ first, last, longer }: Sharp, x: number): number {
  return x < 1 ? first - longer * Math.log(x / START) : last * (END / x) ** 5;
}

function cubic(cubics: Float64Array, step: number, t: number): number {
  const at = 4 * step;
  return cubics[at]! + t * (cubics[at + 1]! + t * (cubics[at + 2]! + t * cubics[at + 3]!));
}

function tabulate(law: (x: number) => number): Table {
  // Two more at either side, for the slopes.
  const values = Float64Array.from({ length: COUNT + 5 }, (_, i) => {
    const x = Math.exp(FROM + (i - 2) * STEP);
    return law(x) * (4 + x * x) ** 1.5;
  });
  const slope = (i: number) => (values[i - 2]! - 8 * values[i - 1]! + 8 * values[i + 1]! - values[i + 2]!) / 12;
  const cubics = new Float64Array(4 * COUNT);
  for (let i = 0; i < COUNT; i++) {
    const [low, high, from, to] = [values[i + 2]!, values[i + 3]!, slope(i + 2), slope(i + 3)];
    cubics.set([low, from, 3 * (high - low) - 2 * from - to, 2 * (low - high) + from + to], 4 * i);
  }
  return { cubics, first: law(START), last: law(END) };
}
