import { arcOwnShare } from '../arc.ts';
import { MU0 } from '../constants.ts';
import { placeAt, TURN_SLACK } from '../turn-places.ts';
import type { FieldTables } from './tables.ts';

/** A stretch of a winding with one current, in turns from its start; either end may lie within a turn. */
export interface Section {
  readonly from: number;
  readonly to: number;
}

/** What a section holds of one turn: an arc, or the whole ring. */
interface Piece {
  readonly ring: number;
  /** Where it begins within the turn, and how much of a circle it is. */
  readonly begin: number;
  readonly fraction: number;
  /** Axial place; undefined for a whole ring, which is at its own. */
  readonly place: number | undefined;
}

/** Refuses sections that are empty, leave the winding, overlap, or are not in the order of the winding. */
function checkSections(sections: readonly Section[], turns: number): void {
  if (sections.length === 0) throw new RangeError('a field solution needs at least one section');
  for (const { from, to } of sections) {
    if (!(from >= 0 && to > from + TURN_SLACK && to <= turns + TURN_SLACK)) {
      throw new RangeError(`section from ${from} to ${to} is not a stretch of ${turns} turns`);
    }
  }
  for (let i = 1; i < sections.length; i++) {
    const { from, to } = sections[i - 1]!;
    if (sections[i]!.from < to - TURN_SLACK) {
      throw new RangeError(`section from ${sections[i]!.from} overlaps or precedes that from ${from} to ${to}`);
    }
  }
}

function piecesOf(tables: FieldTables, { from, to }: Section): Piece[] {
  const pieces: Piece[] = [];
  for (let ring = Math.floor(from + TURN_SLACK); ring < tables.positions.length && ring < to - TURN_SLACK; ring++) {
    const begin = Math.max(from - ring, 0);
    const end = Math.min(to - ring, 1);
    const all = begin < TURN_SLACK && end > 1 - TURN_SLACK;
    const place = all ? undefined : placeAt(tables.positions, tables.turns, ring + (begin + end) / 2);
    pieces.push({ ring, begin, fraction: all ? 1 : end - begin, place });
  }
  return pieces;
}

/** The rings and arcs of a section, for another winding: radius, place and share of a circle, m. */
export function ringsOf(tables: FieldTables, section: Section): { radius: number; place: number; fraction: number }[] {
  return piecesOf(tables, section).map(({ ring, fraction, place }) => ({
    radius: tables.radius,
    place: place ?? tables.positions[ring]!,
    fraction,
  }));
}

/** How much of a circle of each ring a section holds. */
export function weightsOf(tables: FieldTables, section: Section): Float64Array {
  const weights = new Float64Array(tables.positions.length);
  for (const { ring, fraction } of piecesOf(tables, section)) weights[ring]! += fraction;
  return weights;
}

/**
 * Low-frequency inductance matrix (H) of sections of one winding, row by row: own terms on the diagonal, mutual terms beside it.
 *
 * Sections in turns from the start; they must not overlap. Whole turns are rings at their positions. A part turn is an arc at the
 * place of its own middle: mutual terms times its fraction, its own term by `arcOwnShare`, and two arcs of one turn have the
 * mutual term (F(d-a) - F(c-a) - F(d-b) + F(c-b))/2 that makes the shares F of the arcs [a, b] and [c, d] and of their union agree.
 * So a section from 0 to any turn is `cumulativeInductance` at that turn, to rounding; two arcs with a cut between them differ from
 * their whole ring only by their places (2e-5 of a 30-turn coil).
 * Source: Maxwell 1873, art. 701; Neumann 1845. Cost: N^2/2 additions, and N evaluations of M for each part turn.
 *
 * Example: sectionInductances(fieldTables([0, 0.002], 0.05, 0.0005), [{ from: 0, to: 2 }])[0] = 1.034779e-6
 */
export function sectionInductances(tables: FieldTables, sections: readonly Section[]): Float64Array {
  checkSections(sections, tables.turns);
  const pieces = sections.map((section) => piecesOf(tables, section));
  const count = sections.length;
  const matrix = new Float64Array(count * count);
  for (let s = 0; s < count; s++) {
    for (let t = s; t < count; t++) {
      const sum = s === t ? ownOf(tables, pieces[s]!) : betweenOf(tables, pieces[s]!, pieces[t]!);
      matrix[s * count + t] = sum;
      matrix[t * count + s] = sum;
    }
  }
  return matrix;
}

/** The same without the field inside the wires: mu0/(8 pi) per metre of wire less. */
export function outerInductances(tables: FieldTables, sections: readonly Section[]): Float64Array {
  const matrix = sectionInductances(tables, sections);
  sections.forEach(({ from, to }, s) => {
    matrix[s * sections.length + s]! -= ((to - from) * MU0 * tables.shape.length) / (8 * Math.PI);
  });
  return matrix;
}

function ownOf(tables: FieldTables, pieces: readonly Piece[]): number {
  const self = tables.shape.own(tables.wireRadius);
  let own = 0;
  let mutual = 0;
  for (let i = 0; i < pieces.length; i++) {
    const piece = pieces[i]!;
    own += piece.fraction === 1 ? self : self * arcOwnShare(piece.fraction, tables.radius, tables.wireRadius);
    mutual += withRings(tables, piece, pieces, i);
  }
  return own + 2 * mutual;
}

function betweenOf(tables: FieldTables, some: readonly Piece[], others: readonly Piece[]): number {
  let sum = 0;
  for (const piece of some) sum += withRings(tables, piece, others, others.length);
  return sum;
}

/** Mutual terms of a piece with the first `count` of `others`. */
function withRings(tables: FieldTables, piece: Piece, others: readonly Piece[], count: number): number {
  const { mutual, shape, positions } = tables;
  const row = piece.ring * (mutual.stride - 1) + mutual.half;
  let sum = 0;
  for (let j = 0; j < count; j++) {
    const other = others[j]!;
    if (other.ring === piece.ring) sum += arcsOfOneTurn(tables, piece, other) / piece.fraction;
    else if (piece.place === undefined && other.place === undefined)
      sum += other.fraction * mutual.values[row + other.ring]!;
    else {
      const distance = (other.place ?? positions[other.ring]!) - (piece.place ?? positions[piece.ring]!);
      sum += other.fraction * shape.mutual(distance);
    }
  }
  return piece.fraction * sum;
}

function arcsOfOneTurn(tables: FieldTables, one: Piece, other: Piece): number {
  const [low, high] = one.begin <= other.begin ? [one, other] : [other, one];
  const { shape, radius, wireRadius } = tables;
  const share = (fraction: number) => arcOwnShare(Math.min(Math.max(fraction, 0), 1), radius, wireRadius);
  const [a, b, c, d] = [low.begin, low.begin + low.fraction, high.begin, high.begin + high.fraction];
  return (shape.own(wireRadius) * (share(d - a) - share(c - a) - share(d - b) + share(c - b))) / 2;
}
