/**
 * Named dimensions of the drill saddle: a little more than half a tube that clips over a bought one, with a guide for the
 * drill at every hole. Lengths in millimetres; heights count from the tube's lower end, angles are those of the record.
 */
import type { PartsRecord } from '../record/schema.ts';
import { type SaddlePiece, saddlePieces } from './saddle-pieces.ts';

/** A drill turns freely in a guide this much wider than itself and leans by no more than the wire hole's play. */
const DRILL_PLAY_MM = 0.1;
/** A guide two and a half drills long keeps the drill square (common practice, from memory), between these walls. */
const GUIDE_DRILLS = 2.5;
const WALL_MM = { least: 3, most: 5 } as const;
/** How far each lip has to give way: enough to hold, and no more than a thumb can press. */
const SNAP_MM = 0.4;
const SNAP_N = 40;
/** Bending modulus of printed plastic along its layers, N/mm2: PLA, PETG and ABS lie between 2000 and 3500 (from memory). */
const MODULUS = 3000;
/** The rim under the tube's lower end: its thickness, and how far it reaches in under the wall of the tube. */
const RIM_MM = 3;
const RIM_IN_MM = 2;
export interface SaddleDimensions {
  readonly tubeR: number;
  readonly insideR: number;
  readonly outsideR: number;
  readonly wallMm: number;
  readonly rimMm: number;
  /** Inside of the rim. */
  readonly rimR: number;
  /** Guides are this much wider than the holes they are for: play of the drill, and the printer's compensation. */
  readonly widerMm: number;
  /** Half of the angle that a piece covers, a little more than 90 degrees. */
  readonly halfSweepDeg: number;
  /** By how much each lip gives way when the longest piece is pressed on, and with which force. */
  readonly snapMm: number;
  readonly snapN: number;
  /** Between neighbouring guides, and round the outermost. */
  readonly webMm: number;
  readonly pieces: readonly SaddlePiece[];
}

/** @throws Fault (exit 4): `saddle-no-tube`, `saddle-small-tube`, `saddle-no-holes`, `saddle-low-printer` */
export function saddleDimensions(record: PartsRecord): SaddleDimensions {
  const { former, printer, holes } = record;
  const bored = holes.filter(({ purpose, diameterMm }) => purpose !== 'mount' && diameterMm > 0);
  const tubeR = former.outsideDiameterMm / 2;
  const insideR = tubeR + printer.clearanceMm / 2;
  const widest = Math.max(0, ...bored.map(({ diameterMm }) => diameterMm));
  const wallMm = Math.min(WALL_MM.most, Math.max(WALL_MM.least, Math.round(10 * GUIDE_DRILLS * widest) / 10));
  const outsideR = insideR + wallMm;
  const widerMm = DRILL_PLAY_MM + printer.holeCompensationMm;
  const webMm = 2 * printer.lineMm;
  const pieces = saddlePieces(bored, {
    former,
    outsideR,
    insideR,
    rimMm: RIM_MM,
    heightMm: printer.heightMm,
    widerMm,
    webMm,
  });
  const longest = Math.max(...pieces.map(({ fromMm, toMm }) => toMm - fromMm));

  // A lip bends like a quarter ring held at its middle: give = P R^3 pi / (4 E I).
  const stiffness = (MODULUS * longest * wallMm ** 3) / 12 / ((Math.PI / 4) * (insideR + wallMm / 2) ** 3);
  const wished = Math.acos((tubeR - Math.min(SNAP_MM, SNAP_N / stiffness)) / insideR);
  // A guide at 90 degrees still has its web beside it.
  const needed = ((widest + widerMm) / 2 + webMm) / insideR;
  const lip = Math.max(wished, needed);
  const snapMm = Math.max(0, tubeR - insideR * Math.cos(lip));
  return {
    tubeR,
    insideR,
    outsideR,
    wallMm,
    rimMm: RIM_MM,
    rimR: insideR - RIM_IN_MM,
    widerMm,
    halfSweepDeg: 90 + (lip * 180) / Math.PI,
    snapMm,
    snapN: snapMm * stiffness,
    webMm,
    pieces,
  };
}
