/**
 * Named dimensions of the former, derived from the record. Lengths in millimetres, turns from the start hole.
 */
import { axialAt } from '../coil/layout.ts';
import type { Former, Hole, PartsRecord } from '../record/schema.ts';

export interface FormerDimensions {
  readonly former: Former;
  readonly segments: number;
  readonly hand: 'right' | 'left';
  readonly outsideR: number;
  readonly boreR: number;
  /** Radius of the foot: that of the base or the lower rim, or the outside when there is neither. */
  readonly footR: number;
  readonly topR: number;
  readonly lengthMm: number;
  readonly chamferMm: number;
  /** Width of one printed line; walls are counted in such lines. */
  readonly lineMm: number;
  /** The plain winding surface lies between these two. */
  readonly surfaceFromMm: number;
  readonly surfaceToMm: number;
  /** Holes through the wall, each along a radius. */
  readonly holes: readonly Hole[];
  /** Upright holes for screws, in ears or base, as they are modelled. */
  readonly screws: readonly Screw[];
  readonly ridges: readonly RidgeSpan[];
  /** The groove runs over these turns, its runs-in included; null when smooth. */
  readonly groove: GrooveSpan | null;
  readonly axialMm: (turn: number) => number;
}

export interface Screw {
  readonly angleDeg: number;
  readonly radiusMm: number;
  readonly diameterMm: number;
  readonly thicknessMm: number;
  /** Material from the hole to the nearest edge. */
  readonly sideMm: number;
}

/** A ridge stands on the winding surface from `footMm` up, measured from the middle of the wire that leans on it. */
export interface RidgeSpan {
  readonly end: 'start' | 'finish';
  readonly fromTurn: number;
  readonly toTurn: number;
  readonly footMm: number;
  readonly heightMm: number;
  readonly widthMm: number;
}

export interface GrooveSpan {
  readonly depthMm: number;
  readonly floorMm: number;
  readonly rampTurns: number;
  readonly fromTurn: number;
  readonly toTurn: number;
}

/** Height of a teardrop's point over its centre: the roof rises at 45 degrees. */
export function roofMm(diameterMm: number): number {
  return diameterMm * Math.SQRT1_2;
}

export function formerDimensions(record: PartsRecord): FormerDimensions {
  const former = asCut(record);
  const winding = record.windings[0]!;
  const outsideR = former.outsideDiameterMm / 2;
  const flangeR = former.flange ? former.flange.diameterMm / 2 : outsideR;
  const footR = former.base ? former.base.diameterMm / 2 : flangeR;
  const holes = wallHoles(record);
  const axialMm = (turn: number) => axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, turn);
  const surfaceToMm = former.flange
    ? former.lengthMm - former.flange.upperMm - (flangeR - outsideR)
    : former.lengthMm - former.topMm;
  return {
    former,
    segments: former.segments,
    hand: record.frame.hand,
    outsideR,
    boreR: former.boreDiameterMm / 2,
    footR,
    topR: flangeR,
    lengthMm: former.lengthMm,
    chamferMm: former.chamferMm,
    lineMm: record.printer.lineMm,
    surfaceFromMm: former.base?.thicknessMm ?? former.flange?.lowerMm ?? former.footMm,
    surfaceToMm,
    holes,
    screws: screwsOf(former),
    ridges: ridgesOf(former),
    groove: former.groove ? grooveSpan(former.groove, winding.turns, holes, axialMm, surfaceToMm) : null,
    axialMm,
  };
}

/** The former with the holes of mounting and posts as they are modelled: wider by the printer's compensation. */
function asCut({ former, printer }: PartsRecord): Former {
  const more = printer.holeCompensationMm;
  const { base, ears, posts } = former;
  return {
    ...former,
    ears: ears.map((ear) => ({ ...ear, holeDiameterMm: ear.holeDiameterMm + more })),
    base: base && { ...base, holeDiameterMm: base.holeDiameterMm + more },
    posts: posts.map((post) => ({ ...post, eyeMm: post.eyeMm + more })),
  };
}

function screwsOf({ ears, base }: Former): Screw[] {
  const inEars = ears.map((ear) => ({
    angleDeg: ear.angleDeg,
    radiusMm: ear.centreRadiusMm,
    diameterMm: ear.holeDiameterMm,
    thicknessMm: ear.thicknessMm,
    sideMm: (ear.widthMm - ear.holeDiameterMm) / 2,
  }));
  if (base === null) return inEars;
  const radiusMm = base.circleDiameterMm / 2;
  const inBase = Array.from({ length: base.holes }, (_, i) => ({
    angleDeg: (base.firstDeg + (360 * i) / base.holes) % 360,
    radiusMm,
    diameterMm: base.holeDiameterMm,
    thicknessMm: base.thicknessMm,
    sideMm: base.diameterMm / 2 - radiusMm - base.holeDiameterMm / 2,
  }));
  return [...inEars, ...inBase];
}

function ridgesOf({ ridges }: Former): RidgeSpan[] {
  if (ridges === null) return [];
  const { heightMm, widthMm } = ridges;
  const ends = (['start', 'finish'] as const).map((end) => ({ end, run: ridges[end] }));
  return ends.flatMap(({ end, run }) => (run === null ? [] : [{ end, ...run, heightMm, widthMm }]));
}

/** Mounting holes that stand in an ear are cut with the ear; all others go through the wall, by the printer's compensation wider. */
function wallHoles(record: PartsRecord): Hole[] {
  const inEar = (hole: Hole) =>
    hole.purpose === 'mount' && record.former.ears.some((ear) => angleBetween(ear.angleDeg, hole.angleDeg) < 0.01);
  const more = record.printer.holeCompensationMm;
  return record.holes.filter((hole) => !inEar(hole)).map((hole) => ({ ...hole, diameterMm: hole.diameterMm + more }));
}

export function angleBetween(aDeg: number, bDeg: number): number {
  const d = Math.abs(aDeg - bDeg) % 360;
  return Math.min(d, 360 - d);
}

/** Material between two teardrops where they are closest, at this radius; negative when they overlap. */
export function webMm(
  a: Pick<Hole, 'angleDeg' | 'axialMm' | 'diameterMm'>,
  b: Pick<Hole, 'angleDeg' | 'axialMm' | 'diameterMm'>,
  radiusMm: number,
): number {
  const across = (radiusMm * Math.PI * angleBetween(a.angleDeg, b.angleDeg)) / 180;
  const [low, high] = a.axialMm <= b.axialMm ? [a, b] : [b, a];
  const rise = high.axialMm - low.axialMm;
  const round = Math.hypot(across, rise) - (low.diameterMm + high.diameterMm) / 2;
  const point = Math.hypot(across, rise - roofMm(low.diameterMm)) - high.diameterMm / 2;
  return Math.min(round, point);
}

/**
 * The groove goes on to the last hole of the finish row when there is room, so that turns added in trimming lie in it too;
 * otherwise it ends at the finish.
 */
function grooveSpan(
  groove: NonNullable<Former['groove']>,
  turns: number,
  holes: readonly Hole[],
  axialMm: (turn: number) => number,
  surfaceToMm: number,
): GrooveSpan {
  const lastRow = Math.max(turns, ...holes.map((hole) => (hole.purpose === 'finish' ? (hole.turn ?? 0) : 0)));
  const halfMm = groove.floorMm / 2 + groove.depthMm;
  const fits = axialMm(lastRow + groove.runInTurns) + halfMm <= surfaceToMm;
  return {
    depthMm: groove.depthMm,
    floorMm: groove.floorMm,
    rampTurns: groove.runInTurns,
    fromTurn: -groove.runInTurns,
    toTurn: (fits ? lastRow : turns) + groove.runInTurns,
  };
}
