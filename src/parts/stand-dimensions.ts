/**
 * Sizes of the winding stand and of the holder of the wire spool beside it, from what is wound and what is on the bench.
 * Lengths in mm. Heights of axes count from the upper face of a base.
 */
import type { PartsRecord } from '../record/schema.ts';
import { arborDimensions } from './arbor.ts';
import { EDGE_MARGIN_MM } from './bed-rectangles.ts';
import { type ClampDimensions, clampDimensions } from './stand-clamp.ts';
import { type ConeDimensions, coneDimensions, outsideMm } from './stand-cone.ts';
import { M4, screwLengthMm } from './stand-hardware.ts';

/** Between the largest former and the base: a hand that guides the wire. */
const HAND_MM = 40;
/** Below this the crank would be too short to turn evenly. */
const LEAST_AXIS_MM = 95;
/** Between a hand on the crank's handle and the bench. */
const KNUCKLES_MM = 30;
/** Uprights and bases: stiff under a pull of some ten newtons, and a nut's corners lie inside an upright. */
const UPRIGHT_MM = 8;
const BASE_MM = 10;
/** Room between a collar and an upright, for the latch, its screw's head and a finger. */
const ROOM_MM = 14;
const SPOOL_ROOM_MM = 5;
/** Base beyond an upright: the crank's hub turns over it. */
const END_MM = 12;
/** Tenons end this far above the base's underside. */
const TENON_SHORT_MM = 0.5;
/** What a bush round a hexagon has for a wall, and how thick and wide its collar is. */
const BUSH_WALL_MM = 2.4;
const BUSH_FLANGE_MM = 3;

export interface BushDimensions {
  readonly outsideMm: number;
  readonly flangeMm: number;
  readonly flangeThicknessMm: number;
  readonly heightMm: number;
}

export interface UprightDimensions {
  readonly thicknessMm: number;
  readonly axisMm: number;
  readonly footMm: number;
  readonly headRMm: number;
  /** Width of the bearing, which is open upwards at 45 degrees. */
  readonly bearingMm: number;
  /** Tenons: how many from the middle, their width, their length below the foot. */
  readonly tenonXMm: number;
  readonly tenonWidthMm: number;
  readonly tenonMm: number;
  /** Screws into nuts in the foot: from the middle, depth of their slot, where the nut lies above the foot. */
  readonly screwXMm: number;
  readonly screwSlotMm: number;
  readonly nutFromMm: number;
  /** Hole of the latch from the bearing's axis: along the slot, and to its left. */
  readonly latchAlongMm: number;
  readonly latchAsideMm: number;
  /** Notches for the rubber band of the drag, heights on both edges from above; none on the winding stand. */
  readonly notchesMm: readonly number[];
  readonly word: string;
}

export interface LatchDimensions {
  readonly radiusMm: number;
  /** From the hole to the middle of the other end. */
  readonly reachMm: number;
  readonly thicknessMm: number;
}

export interface BaseDimensions {
  readonly lengthMm: number;
  readonly widthMm: number;
  readonly thicknessMm: number;
  /** Middle of each upright from the middle of the base. */
  readonly uprightXMm: number;
  readonly mortiseMm: readonly [number, number];
  readonly tenonYMm: number;
  readonly screwYMm: number;
  /** Equal pieces that it is printed in, joined by dovetails. */
  readonly pieces: number;
  readonly words: readonly string[];
}

export interface CrankDimensions {
  readonly armMm: number;
  readonly pinMm: number;
  readonly pinLengthMm: number;
  readonly handleMm: number;
  readonly handleLengthMm: number;
  readonly handleBoreMm: number;
}

export interface SpoolDimensions {
  readonly cone: ConeDimensions;
  /** Drum of the drag: radius of the groove's floor, of its rims, and where the profile bends. */
  readonly drumRMm: number;
  readonly rimRMm: number;
  readonly rimMm: number;
  readonly floorMm: number;
  readonly drumMm: number;
  /** Pull of the rubber band for the greatest tension off a full spool, N. */
  readonly bandN: number;
}

export interface StandDimensions {
  readonly clamp: ClampDimensions;
  readonly bush: BushDimensions | null;
  /** Farthest point of the former from its axis. */
  readonly reachMm: number;
  /** Between the uprights. */
  readonly spanMm: number;
  readonly spoolSpanMm: number;
  readonly upright: UprightDimensions;
  readonly spoolUpright: UprightDimensions;
  readonly latch: LatchDimensions;
  readonly base: BaseDimensions;
  readonly spoolBase: BaseDimensions;
  readonly crank: CrankDimensions;
  readonly spool: SpoolDimensions;
  /** Shafts to cut. */
  readonly shaftMm: number;
  readonly spoolShaftMm: number;
  /** How far off the spool stands, so that the wire never runs on at more than 6 degrees from square. */
  readonly awayMm: number;
}

/** Farthest point of the former, or of the turns on it, from the axis. */
export function reachMm({ former, windings }: PartsRecord): number {
  const outside = former.outsideDiameterMm / 2;
  return Math.max(
    outside + windings[0]!.wire.overallMm,
    (former.flange?.diameterMm ?? 0) / 2,
    (former.base?.diameterMm ?? 0) / 2,
    ...former.ears.map((ear) => ear.centreRadiusMm + ear.widthMm / 2),
    ...former.posts.map((post) => outside + post.reachMm),
  );
}

export function standDimensions(record: PartsRecord): StandDimensions {
  const { printer, shop, former } = record;
  const clamp = clampDimensions(record);
  const bush = bushDimensions(clamp);
  const bearingMm = (bush?.outsideMm ?? shop.shaftMm) + printer.clearanceMm;
  const reach = reachMm(record);
  const spool = spoolDimensions(record, clamp);
  const latch = latchDimensions(bearingMm);

  const axisMm = Math.max(reach + HAND_MM, LEAST_AXIS_MM);
  const upright = uprightDimensions({
    axisMm,
    footMm: Math.max(90, 2 * Math.ceil(0.375 * axisMm)),
    bearingMm,
    latch,
    notches: false,
    word: 'SPOOL',
  });
  const spoolFootMm = Math.max(90, 2 * Math.ceil(spool.rimRMm + 10));
  const spoolUpright = uprightDimensions({
    // Not so wide for its height that the notches would lie in a roof.
    axisMm: Math.max(shop.spoolDiameterMm / 2 + 25, 65, spoolFootMm - 38),
    footMm: spoolFootMm,
    bearingMm,
    latch,
    notches: true,
    word: 'COIL',
  });

  const { cone } = arborDimensions(record);
  const spanMm = Math.ceil(former.lengthMm + 2 * (outsideMm(cone) + clamp.heightMm + ROOM_MM));
  const flanges = 2 * (bush?.flangeThicknessMm ?? 0);
  const atSpool = outsideMm(spool.cone) + clamp.heightMm + SPOOL_ROOM_MM;
  const spoolSpanMm = Math.ceil(shop.spoolWidthMm + 2 * atSpool + flanges);
  const up = (mm: number) => 5 * Math.ceil(mm / 5);
  return {
    clamp,
    bush,
    reachMm: reach,
    spanMm,
    spoolSpanMm,
    upright,
    spoolUpright,
    latch,
    base: baseDimensions(record, spanMm, upright, STAND_WORDS),
    spoolBase: baseDimensions(record, spoolSpanMm, spoolUpright, []),
    crank: crankDimensions(record, upright.axisMm),
    spool,
    shaftMm: up(spanMm + 2 * UPRIGHT_MM + flanges + 2 * clamp.heightMm + 4),
    spoolShaftMm: up(spoolSpanMm + 2 * UPRIGHT_MM + 6),
    awayMm: 50 * Math.ceil(former.lengthMm / 2 / Math.tan((6 * Math.PI) / 180) / 50),
  };
}

/** On the base, read from the crank; see `stand.ts` for why this holds. */
const STAND_WORDS = ['CRANK HERE, SPOOL LEFT', 'RIGHT-HAND: START FAR', 'LEFT-HAND: START HERE'];

function bushDimensions(clamp: ClampDimensions): BushDimensions | null {
  if (clamp.form === 'round') return null;
  const outside = Math.ceil(20 * (clamp.boreReachMm + BUSH_WALL_MM)) / 10;
  return {
    outsideMm: outside,
    flangeMm: outside + 6,
    flangeThicknessMm: BUSH_FLANGE_MM,
    heightMm: BUSH_FLANGE_MM + UPRIGHT_MM,
  };
}

function latchDimensions(bearingMm: number): LatchDimensions {
  const radiusMm = 5.5;
  return { radiusMm, reachMm: bearingMm + M4.holeMm / 2 + 7.5, thicknessMm: 5 };
}

function uprightDimensions(ask: {
  readonly axisMm: number;
  readonly footMm: number;
  readonly bearingMm: number;
  readonly latch: LatchDimensions;
  readonly notches: boolean;
  readonly word: string;
}): UprightDimensions {
  const { bearingMm, latch } = ask;
  const r = bearingMm / 2;
  const latchAlongMm = r + 1 + latch.radiusMm;
  const latchAsideMm = r + M4.holeMm / 2 + 4;
  const headRMm = Math.hypot(latchAlongMm, latchAsideMm) + M4.holeMm / 2 + 4.5;
  // The head of a thick shaft stays between the toes and over the screws.
  const footMm = Math.max(ask.footMm, 2 * Math.ceil(headRMm + 4));
  const axisMm = Math.max(ask.axisMm, headRMm + 25);
  const tenonWidthMm = 16;
  const screwXMm = footMm / 2 - 14;
  const notches = ask.notches ? Math.floor((axisMm - 10 - 28) / 9) + 1 : 0;
  return {
    thicknessMm: UPRIGHT_MM,
    axisMm,
    footMm,
    headRMm,
    bearingMm,
    tenonXMm: screwXMm - 8 - tenonWidthMm / 2,
    tenonWidthMm,
    tenonMm: BASE_MM - TENON_SHORT_MM,
    screwXMm,
    screwSlotMm: 17,
    nutFromMm: 8,
    latchAlongMm,
    latchAsideMm,
    notchesMm: Array.from({ length: notches }, (_, i) => axisMm - 10 - 9 * i),
    word: ask.word,
  };
}

/** The screw that holds an upright, countersunk from below: through the base, the foot up to the nut, and the nut. */
export const uprightScrewMm = (d: UprightDimensions): number =>
  screwLengthMm(BASE_MM + d.nutFromMm + M4.nutHeightMm + 1);

function baseDimensions(
  { printer }: PartsRecord,
  spanMm: number,
  upright: UprightDimensions,
  words: readonly string[],
): BaseDimensions {
  const lengthMm = spanMm + 2 * (UPRIGHT_MM + END_MM);
  const widthMm = upright.footMm + 8;
  const most = bedFor(printer, widthMm) - 2 * EDGE_MARGIN_MM;
  const pieces = piecesFor(lengthMm, most);
  return {
    // A piece that ends with an upright needs room for its words or screws before the joint.
    lengthMm: pieces > 1 ? Math.max(lengthMm, pieces * (words.length > 0 ? 80 : 60)) : lengthMm,
    widthMm,
    thicknessMm: BASE_MM,
    uprightXMm: (spanMm + UPRIGHT_MM) / 2,
    mortiseMm: [upright.thicknessMm + printer.clearanceMm, upright.tenonWidthMm + printer.clearanceMm],
    tenonYMm: upright.tenonXMm,
    screwYMm: upright.screwXMm,
    pieces,
    words,
  };
}

/** Tongue of a dovetail, and its half widths at the root and at the end. */
export const DOVETAIL = { lengthMm: 12, rootMm: 5, endMm: 8 } as const;

/** How long a piece may be that is `widthMm` wide; the shorter side of the bed when it does not lie across. */
function bedFor({ bedXMm, bedYMm }: PartsRecord['printer'], widthMm: number): number {
  const [short, long] = [Math.min(bedXMm, bedYMm), Math.max(bedXMm, bedYMm)];
  return widthMm <= short ? long : short;
}

/** Whole when it fits; else the fewest equal pieces that do with their tongues. */
function piecesFor(lengthMm: number, mostMm: number): number {
  if (lengthMm <= mostMm) return 1;
  for (let pieces = 2; pieces < 12; pieces++) {
    const tongues = (pieces > 2 ? 2 : 1) * DOVETAIL.lengthMm;
    if (lengthMm / pieces + tongues <= mostMm) return pieces;
  }
  return 12;
}

function crankDimensions({ printer }: PartsRecord, axisMm: number): CrankDimensions {
  const handleMm = 20;
  const pinMm = 9;
  const handleLengthMm = 45;
  return {
    armMm: Math.min(70, axisMm + BASE_MM - KNUCKLES_MM - handleMm / 2),
    pinMm,
    // Half a millimetre of play under the washer.
    pinLengthMm: handleLengthMm + 0.5,
    handleMm,
    handleLengthMm,
    handleBoreMm: pinMm + printer.clearanceMm,
  };
}

/**
 * The drag is a cord one and a half times round the drum, a rubber band on the end that the drum pulls at. Round so long an
 * arc the slack end carries next to nothing (Euler and Eytelwein: e^(-3 pi friction), a tenth at 0.25), so that the
 * drum is held by nearly the band's whole pull, whatever the friction:
 *
 *     tension = 0.9 x pull of the band x drum radius / radius at which the wire leaves the spool
 */
export const HELD = 0.9;
/** Holes of spools that are called alike differ by so much, both ways. */
export const SPOOL_OFF_SHARE = 0.05;
export const SPOOL_OFF_MM = 0.8;
const RIM_STEP_MM = 3;
const RIM_MM = 2;
const DRUM_FLOOR_MM = 4;

function spoolDimensions(record: PartsRecord, clamp: ClampDimensions): SpoolDimensions {
  const { spoolBoreMm, spoolDiameterMm } = record.shop;
  const drumMm = 2 * (RIM_MM + RIM_STEP_MM) + DRUM_FLOOR_MM;
  const offMm = Math.max(SPOOL_OFF_SHARE * spoolBoreMm, SPOOL_OFF_MM);
  const cone = coneDimensions(record, clamp, { boreMm: spoolBoreMm, offMm, discMm: drumMm });
  const wanted = Math.min(45, Math.max(20, 0.375 * spoolDiameterMm));
  const drumRMm = Math.max(wanted, cone.bigMm / 2, clamp.ringRMm + 6);
  return {
    cone,
    drumRMm,
    rimRMm: drumRMm + RIM_STEP_MM,
    rimMm: RIM_MM,
    floorMm: DRUM_FLOOR_MM,
    drumMm: cone.discMm,
    bandN: (record.windings[0]!.tensionHighN * (spoolDiameterMm / 2)) / (HELD * drumRMm),
  };
}
