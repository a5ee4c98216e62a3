/**
 * The base: mortises and countersunk screws for two uprights, holes for the bench, and openings that save plastic. Longer
 * than the bed, it is printed in equal pieces; every joint has a tongue on one rail and a socket on the other, so that both
 * ends are the same part, turned by half.
 */
import type { PartsRecord } from '../record/schema.ts';
import { PROUD_MM } from './holes.ts';
import { textWidthMm } from './lettering.ts';
import { areaOf, chordsFor, circle, prism, rectangle } from './shapes.ts';
import { ringAt } from './slab.ts';
import type { Cutter, Engraving, Loft, Point2, Solid } from './solid.ts';
import { type BaseDimensions, DOVETAIL } from './stand-dimensions.ts';
import { M4 } from './stand-hardware.ts';
import { edgeCutters, moved, onBed } from './stand-outline.ts';
import { cutMm3, wordsCut } from './words.ts';

/** Rails beside the openings: a dovetail and 5 mm on either side of it. */
const RAIL_MM = 26;
/** From a joint to the next opening. */
const JOINT_MM = 19;
const BENCH_HOLE_MM = 5;
const TONGUE_CHAMFER_MM = 0.5;
const LINE_MM = 5.5;
const MOST_TEXT_MM = 3.6;
/** The countersink is this much wider than the head, so that the head lies below the face. */
const SINK_PLAY_MM = 0.4;

/** One piece, where it lies in the whole base; x along the shaft. */
export interface BasePiece {
  readonly part: 'whole' | 'end' | 'middle';
  readonly fromMm: number;
  readonly toMm: number;
  readonly quantity: number;
}

export function basePieces(d: BaseDimensions): BasePiece[] {
  const length = d.lengthMm / d.pieces;
  const from = -d.lengthMm / 2;
  if (d.pieces === 1) return [{ part: 'whole', fromMm: from, toMm: -from, quantity: 1 }];
  const end: BasePiece = { part: 'end', fromMm: from, toMm: from + length, quantity: 2 };
  if (d.pieces === 2) return [end];
  return [end, { part: 'middle', fromMm: from + length, toMm: from + 2 * length, quantity: d.pieces - 2 }];
}

const railY = (d: BaseDimensions): number => d.widthMm / 2 - RAIL_MM / 2;

/** A tongue that stands out of x = 0 towards +x, its middle at y = 0; upwards. */
export function tongueOutline(): Point2[] {
  const { lengthMm, rootMm, endMm } = DOVETAIL;
  return [
    [0, -rootMm],
    [lengthMm, -endMm],
    [lengthMm, endMm],
    [0, rootMm],
  ];
}

/** Its socket, which reaches from x = 0 towards -x: half the clearance away from the tongue on every side. */
export function socketOutline(clearanceMm: number): Point2[] {
  const { lengthMm, rootMm, endMm } = DOVETAIL;
  const gap = clearanceMm / 2;
  const rise = (endMm - rootMm) / lengthMm;
  const half = (x: number) => rootMm + rise * x + gap * Math.hypot(1, rise);
  const depth = lengthMm + gap;
  return [
    [0, -half(0)],
    [-depth, -half(depth)],
    [-depth, half(depth)],
    [0, half(0)],
  ];
}

/** The outline of a piece with its tongues and sockets. */
export function pieceOutline(record: PartsRecord, d: BaseDimensions, piece: BasePiece): Point2[] {
  const [y, half] = [railY(d), d.widthMm / 2];
  const joint = (at: Point2[], dy: number) => at.map(([px, py]): Point2 => [px, py + dy]);
  const right = [...joint(socketOutline(record.printer.clearanceMm), -y), ...joint(tongueOutline(), y)];
  const side = (jointed: boolean, x: number, turn: 1 | -1): Point2[] => [
    [x, -half * turn],
    ...(jointed ? right.map(([px, py]): Point2 => [x + turn * px, turn * py]) : []),
    [x, half * turn],
  ];
  return [...side(piece.part !== 'whole', piece.toMm, 1), ...side(piece.part === 'middle', piece.fromMm, -1)];
}

/** Openings through a piece, by what they are for. */
export interface BaseCuts {
  readonly mortises: Point2[][];
  readonly bench: Point2[][];
  readonly windows: Point2[][];
  /** Middles of the countersunk screws. */
  readonly screws: Point2[];
}

export function baseCuts(record: PartsRecord, d: BaseDimensions, piece: BasePiece): BaseCuts {
  const ends = piece.part === 'middle' ? [] : piece.part === 'end' ? [-1] : [-1, 1];
  const corners = ends.flatMap((sx) => [-1, 1].map((sy): Point2 => [sx, sy]));
  const [mx, my] = d.mortiseMm;
  const more = record.printer.holeCompensationMm;
  const benchX = d.lengthMm / 2 - 6;
  return {
    mortises: corners.map(([sx, sy]) => rectangle(sx * d.uprightXMm - mx / 2, sy * d.tenonYMm - my / 2, mx, my)),
    bench: corners.map(([sx, sy]) => circle((BENCH_HOLE_MM + more) / 2, 'hole', sx * benchX, sy * (d.widthMm / 2 - 8))),
    windows: windowOf(d, piece),
    screws: corners.map(([sx, sy]): Point2 => [sx * d.uprightXMm, sy * d.screwYMm]),
  };
}

function windowOf(d: BaseDimensions, piece: BasePiece): Point2[][] {
  const end = d.uprightXMm - d.mortiseMm[0] / 2 - wordsMm(d) - 6;
  const from = piece.part === 'middle' ? piece.fromMm + JOINT_MM : -end;
  const to = piece.part === 'whole' ? d.uprightXMm - d.mortiseMm[0] / 2 - 8 : piece.toMm - JOINT_MM;
  const half = d.widthMm / 2 - RAIL_MM;
  return to - from >= 25 && half >= 8 ? [rectangle(from, -half, to - from, 2 * half)] : [];
}

/** Room of the words along the base. */
const wordsMm = (d: BaseDimensions): number => (d.words.length > 0 ? LINE_MM * d.words.length + 3 : 0);

/** The words behind the upright at the left end, read from there; both ends of a base in pieces have them. */
function lettering(d: BaseDimensions, piece: BasePiece): Engraving[] {
  if (d.words.length === 0 || piece.part === 'middle') return [];
  const widest = Math.max(...d.words.map((line) => textWidthMm(line, 1)));
  const heightMm = Math.min(MOST_TEXT_MM, (d.widthMm - 8) / widest);
  const first = d.uprightXMm - d.mortiseMm[0] / 2 - 3 - LINE_MM * d.words.length;
  return [
    wordsCut(
      'words',
      d.words.map((text, i) => ({ text, x: 0, y: -first - LINE_MM * (i + 1), heightMm, align: 'centre' })),
      d.thicknessMm,
      // Up in the text is along the base, away from its end.
      { origin: [0, 0, 0], x: [0, -1, 0], y: [1, 0, 0] },
    ),
  ];
}

/** A screw's hole with a countersink below. */
function sunk(record: PartsRecord, [x, y]: Point2, thicknessMm: number): { cutter: Loft; mm3: number } {
  const r = (M4.holeMm + record.printer.holeCompensationMm) / 2;
  const sink = (M4.sinkMm + SINK_PLAY_MM) / 2;
  const n = chordsFor(sink);
  const ring = (radius: number, z: number) => ringAt(radius / Math.cos(Math.PI / n), z, n, x, y);
  const depth = sink - r;
  const area = n * Math.tan(Math.PI / n);
  return {
    cutter: {
      kind: 'loft',
      name: 'screw',
      rings: [ring(sink + PROUD_MM, -PROUD_MM), ring(r, depth), ring(r, thicknessMm + PROUD_MM)],
      hubs: null,
    },
    mm3: area * (r * r * (thicknessMm - depth) + (depth * (r * r + r * sink + sink * sink)) / 3),
  };
}

/** The pieces of a base as parts: `prefix`, or `prefix-end` and `prefix-middle`. */
export function baseSolids(
  record: PartsRecord,
  d: BaseDimensions,
  what: Pick<Solid, 'part' | 'name' | 'use'>,
): Solid[] {
  return basePieces(d).map((piece) => pieceSolid(record, d, piece, what));
}

function pieceSolid(
  record: PartsRecord,
  d: BaseDimensions,
  piece: BasePiece,
  { part, name, use }: Pick<Solid, 'part' | 'name' | 'use'>,
): Solid {
  const { printer } = record;
  const outline = pieceOutline(record, d, piece);
  const cuts = baseCuts(record, d, piece);
  const flat = [...cuts.mortises, ...cuts.bench, ...cuts.windows];
  const screws = cuts.screws.map((at) => sunk(record, at, d.thicknessMm));
  const words = lettering(d, piece);
  const { dx, dy, minMm, maxMm } = onBed(outline, d.thicknessMm);
  const through = flat.map((cut) => prism('opening', [cut], -PROUD_MM, d.thicknessMm + PROUD_MM));
  const whole = piece.part === 'whole';
  return {
    part: whole ? part : `${part}-${piece.part}`,
    name: whole ? name : `${name}, ${piece.part}`,
    kind: 'stand',
    quantity: piece.quantity,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: moved([prism('base', [outline], 0, d.thicknessMm)], dx, dy),
    cutters: moved<Cutter>(
      [...through, ...screws.map(({ cutter }) => cutter), ...tongueEdges(d, piece), ...words],
      dx,
      dy,
    ),
    expected: {
      bodies: 1,
      genus: flat.length + screws.length,
      genusIs: `${cuts.mortises.length} mortises, ${screws.length} screws, ${cuts.bench.length} holes for the bench, ${cuts.windows.length} openings`,
      minMm,
      maxMm,
      volumeMm3:
        (areaOf(outline) - flat.reduce((sum, cut) => sum + areaOf(cut), 0)) * d.thicknessMm -
        screws.reduce((sum, { mm3 }) => sum + mm3, 0) -
        words.reduce((sum, cut) => sum + cutMm3(cut), 0),
    },
    use: whole ? use : `${use}; ${d.pieces} pieces, pushed together from above`,
    printNote: 'print flat, lettering up, no supports; four walls, a third of infill',
  };
}

/** The lower edges of the tongues: first layers that spread would not enter a socket. */
function tongueEdges(d: BaseDimensions, piece: BasePiece): Cutter[] {
  const y = railY(d);
  const right = tongueOutline().map(([px, py]): Point2 => [piece.toMm + px, y + py]);
  const left = tongueOutline().map(([px, py]): Point2 => [piece.fromMm - px, -y - py]);
  const both = piece.part === 'whole' ? [] : piece.part === 'end' ? [right] : [right, left];
  return both.flatMap((line) => edgeCutters(line, TONGUE_CHAMFER_MM));
}
