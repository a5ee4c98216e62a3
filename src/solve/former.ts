/**
 * The former around a winding: where the start lies, how long it gets, how thick its wall is, which holes it has.
 * Every dimension that the part, the template and the sheet use is fixed here, once.
 */
import type { Coil } from '../coil/coil.ts';
import { angleOf, type Hand } from '../coil/layout.ts';
import { webMm } from '../parts/dimensions.ts';
import type { Former, Hole } from '../record/schema.ts';
import { type Around, FLANGE_MM, footMm, grooveFor, RIM_MM, widestRibbedMm } from './former/around.ts';
import { finishHoles, lastEnd } from './former/finish-row.ts';
import { mountingFor } from './former/mounting.ts';
import { type Post, postSize } from './former/posts.ts';
import { ribbedKeys, ribbedLengthMm } from './former/ribbed.ts';
import { ridgeFootMm, ridgeSize, ridgesFor } from './former/ridges.ts';
import { stiffnessText, wallFor } from './former/wall.ts';
import { type RibPlan, ribAnchorMm, ribStartMm } from './ribs.ts';
import { type TapMethod, WEB_MM, wireHoleMm } from './tap-methods.ts';

export { type Around, grooveFor } from './former/around.ts';
export { leastCircleMm } from './former/mounting.ts';
export { postsFor } from './former/posts.ts';
export { ribsFor } from './former/ribbed.ts';
export { tensionN } from './former/wall.ts';

const TUBE_MARGIN_MM = 10;
/** Arc between the anchor hole and the start hole. */
const ANCHOR_ARC_MM = 6;
/** Least that may be left between two holes. */
export const LEAST_WEB_MM = 0.8;
/** Between a post and the flange's edge. */
const POST_INSET_MM = 0.3;

/** Z of the wire centre at the start hole: above the foot with its posts, the run-in of the groove and the anchor hole. */
export function startMm(around: Around): number {
  if (around.job.former.kind === 'tube') return TUBE_MARGIN_MM;
  if (around.ribs) return ribStartMm(around.overallMm);
  const hole = wireHoleMm(around.overallMm, 1);
  const anchor = hole + 1.2 + hole / 2 + WEB_MM;
  const runIn = around.grooved ? around.pitchMm * 0.75 + around.overallMm : 0;
  const posts = around.lugs ? postSize(around).heightMm : 0;
  return Math.ceil((footMm(around) + posts + Math.max(anchor, runIn, 3)) * 2) / 2;
}

/** Top of the last hole or of the finish ridge, whichever is higher. */
function endMm(around: Around, coil: Coil): number {
  const row = finishHoles(around, coil);
  const hole = coil.positionMm(row[row.length - 1]!.turn) + wireHoleMm(around.overallMm, 1) / 2;
  const size = ridgeSize(around);
  if (size === null) return hole;
  const foot = coil.positionMm(lastEnd(around, coil)) + ridgeFootMm('finish', around.overallMm, size.widthMm);
  return Math.max(hole, foot + size.widthMm);
}

/** Length of the whole former for a winding, mm, rounded up to half a millimetre. */
export function formerLengthMm(around: Around, coil: Coil): number {
  if (around.ribs) return ribbedLengthMm(around, around.ribs, coil);
  const last = endMm(around, coil);
  if (around.job.former.kind === 'tube') return Math.ceil(last + TUBE_MARGIN_MM);
  const runOut = around.grooved ? around.overallMm + around.pitchMm : WEB_MM;
  const rim = around.job.former.flanges ? rimMm(around) + FLANGE_MM : 2;
  return Math.ceil((last + runOut + rim) * 2) / 2;
}

/** How far the rims stand out: posts stand inside their edge. */
function rimMm(around: Around): number {
  return around.lugs ? Math.max(RIM_MM, postSize(around).reachMm + POST_INSET_MM) : RIM_MM;
}

/** Diameter of the widest part above the foot: what screw heads have to pass. */
export function widestMm(around: Around): number {
  const { outsideMm, lugs, job, ribs } = around;
  if (ribs) return widestRibbedMm(around);
  if (job.former.flanges) return outsideMm + 2 * rimMm(around);
  return lugs ? outsideMm + 2 * postSize(around).reachMm : outsideMm;
}

/** What the former carries besides its wall: all radial holes, and posts for lugs. */
export interface Fittings {
  readonly holes: readonly Hole[];
  readonly posts: readonly Post[];
  /** In place of the wall. */
  readonly ribs?: RibPlan | null;
}

/** On the lower edges, for the first layers. */
const MOST_CHAMFER_MM = 0.5;

/** The former with all its dimensions. The stiffness text says what the tension does to the wall. */
export function formerFor(
  around: Around,
  coil: Coil,
  taps: readonly number[],
  hand: Hand,
  { holes, posts, ribs = null }: Fittings,
): Former {
  const { job, outsideMm, grooved, overallMm } = around;
  const printed = job.former.kind === 'printed';
  const wall = wallFor(around);
  const { wallMm, material } = wall;
  const flanges = printed && job.former.flanges;
  const widest = widestMm(around);
  const mounting = mountingFor(around, widest);
  const groove = grooveFor(overallMm);
  const numbers = [
    { text: 'S', angleDeg: 0, tap: null },
    ...taps.map((turn, index) => ({ text: `${index + 1}`, angleDeg: angleOf(turn, hand), tap: index + 1 })),
  ];
  const round = mounting.base?.diameterMm ?? (flanges || ribs ? widest : outsideMm);
  return {
    kind: job.former.kind,
    surface: grooved ? 'grooved' : 'smooth',
    material: material.name,
    densityGCm3: material.densityGPerCm3,
    outsideDiameterMm: outsideMm,
    boreDiameterMm: Math.round((outsideMm - 2 * wallMm) * 100) / 100,
    wallMm,
    lengthMm: formerLengthMm(around, coil),
    footMm: footMm(around),
    topMm: flanges ? FLANGE_MM : 0,
    flange: flanges ? { diameterMm: widest, lowerMm: FLANGE_MM, upperMm: FLANGE_MM } : null,
    groove: grooved ? { depthMm: groove.depthMm, floorMm: groove.floorMm, runInTurns: 0.25 } : null,
    // Inside and out, it leaves at least half of a thin wall to stand on.
    chamferMm: printed ? Math.min(MOST_CHAMFER_MM, Math.round(25 * wallMm) / 100) : 0,
    ...mounting,
    numbers: flanges ? numbers : [],
    numberHeightMm: 3.2,
    datumMark: printed ? { angleDeg: 0, widthMm: 1.2, depthMm: 0.6 } : null,
    body: 'full',
    ribs: null,
    ridges: ridgesFor(around, coil, holes, lastEnd(around, coil)),
    posts: [...posts],
    joints: [],
    tenthMmPercent:
      Math.round(
        1e4 *
          (coil.changed({ meanDiameterMm: coil.shape.meanDiameterMm + 0.1 }).inductanceUh(coil.turns) /
            coil.inductanceUh(coil.turns) -
            1),
      ) / 100,
    // Chords within 0.01 mm of the widest circle, in steps of 12 so that marks fall on them.
    segments: Math.max(48, Math.ceil(Math.PI / Math.acos(1 - 0.01 / (round / 2)) / 12) * 12),
    stiffness: stiffnessText(around, wall),
    ...(ribs === null ? {} : ribbedKeys(around, ribs, hand)),
  };
}

/**
 * All radial holes: anchor, start, taps by their method, the row of finish holes. `taps` ends with the whole coil;
 * `unitTaps` are those of a units switch, labelled u1, u2, ...
 */
export function holesFor(
  around: Around,
  coil: Coil,
  taps: readonly number[],
  method: TapMethod,
  hand: Hand,
  unitTaps: readonly number[] = [],
): Hole[] {
  const wireHole = wireHoleMm(around.overallMm, 1);
  const circumference = Math.PI * coil.shape.meanDiameterMm;
  const at = (turn: number) => ({ angleDeg: angleOf(turn, hand), axialMm: coil.positionMm(turn) });
  const holes: Hole[] = [
    {
      purpose: 'anchor',
      tap: null,
      turn: null,
      label: 'A',
      angleDeg: around.ribs ? 0 : angleOf(-ANCHOR_ARC_MM / circumference, hand),
      axialMm: coil.positionMm(0) - (around.ribs ? ribAnchorMm(around.overallMm) : wireHole + 1.2),
      diameterMm: wireHole,
    },
    { purpose: 'start', tap: null, turn: 0, label: 'S', ...at(0), diameterMm: wireHole },
  ];
  const bored = [
    ...unitTaps.map((turn, index) => ({ turn, tap: null, name: `u${index + 1}` })),
    ...taps.slice(0, -1).map((turn, index) => ({ turn, tap: index + 1, name: `${index + 1}` })),
  ];
  const half = (method.holeMm + 1.2) / 2 / circumference;
  const sides = [
    [],
    [[0, '']],
    [
      [-half, 'a'],
      [half, 'b'],
    ],
  ] as const;
  for (const { turn, tap, name } of bored)
    for (const [side, letter] of sides[method.holes])
      holes.push({
        purpose: 'tap',
        tap,
        turn: turn + side,
        label: `${name}${letter}`,
        ...at(turn + side),
        diameterMm: method.holeMm,
      });
  for (const { turn, offset } of finishHoles(around, coil)) {
    const label = offset === 0 ? 'F' : offset > 0 ? `F+${offset}` : `F${offset}`;
    const tap = offset === 0 ? taps.length : null;
    holes.push({ purpose: 'finish', tap, turn, label, ...at(turn), diameterMm: wireHole });
  }
  return holes;
}

/**
 * The two holes that come nearest to one another for their size, if they leave less than 0.8 mm between them anywhere in
 * the wall; printed holes have a roof that rises to 0.71 of their diameter.
 */
export function tightestPair(holes: readonly Hole[], boreMm: number): { a: Hole; b: Hole; leftMm: number } | null {
  let worst: { a: Hole; b: Hole; leftMm: number } | null = null;
  for (let i = 0; i < holes.length; i++)
    for (let j = i + 1; j < holes.length; j++) {
      const [a, b] = holes[i]!.axialMm <= holes[j]!.axialMm ? [holes[i]!, holes[j]!] : [holes[j]!, holes[i]!];
      const leftMm = webMm(a, b, boreMm / 2);
      if (leftMm < LEAST_WEB_MM - 1e-6 && (worst === null || leftMm < worst.leftMm)) worst = { a, b, leftMm };
    }
  return worst;
}
