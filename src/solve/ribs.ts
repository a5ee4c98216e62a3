/**
 * A ribbed former: ribs between two end rings, as many inner rings as keep the ribs from giving way. Here it is chosen how wide and
 * deep ribs are and where inner rings stand, once; parts and sheets read it in the record.
 *
 *     bottom ring - ribs, one notch a turn - [inner rings] - inner ring under the upper end ring, which widens from it at 45 degrees
 *
 * The wire runs straight from rib to rib. Corners lie at the middles of the ribs' outer faces; that the wire lies flat on the width
 * of a rib and bends at its edges is counted as a bend (see `physics/polygon.ts`). That wire too stiff for a few corners stands
 * off the ribs between them is not counted.
 */
import { turnLengthMm } from '../physics/polygon.ts';
import type { Former } from '../record/schema.ts';
import type { Material } from '../stock/materials.ts';
import { type TapMethod, WEB_MM, wireHoleMm } from './tap-methods.ts';

/** What of a job concerns ribs. */
export interface RibJob {
  readonly former: { readonly ribs: number | null; readonly wallMm: number | null; readonly flanges: boolean };
  readonly printer: { readonly lineMm: number; readonly holeCompensationMm: number };
}

export interface RibSection {
  readonly count: number;
  /** Along the circumference. */
  readonly widthMm: number;
  /** Radius at which the centre of a wire on its flat face bends. */
  readonly bendMm: number;
}

export type Ribs = NonNullable<Former['ribs']>;

/** Narrower than this many lines a rib has no core. */
const LEAST_LINES = 3;
/** Lines on both sides of a hole together, and behind the notches. */
const LINES_BESIDE = 4;
/** Between the two holes of a cut pair; as they are bored in a wall. */
const PAIR_MM = 1.2;
/** From the floor of a notch to the inner rings, so that neither wire nor loop touches them. */
export const FREE_MM = 0.6;
/** The ribs' inner faces stand this far behind the bore of the end rings, so that it is round; and inner rings behind those. */
export const BEHIND_MM = 0.25;
/** How far the upper end ring's foot lies inside the inner ring that carries it, and how far it is let into it. */
export const SEAT_MM = 0.3;
export const LET_IN_MM = 0.4;
/** Least height of an inner ring, half way between two ribs. */
const CROWN_MM = 3;
/** Height of the end rings. */
export const END_MM = 3;
/** Clear height that a window keeps beside its ribs. */
const WINDOW_MM = 2;
/** How far end rings stand out over the ribs: as a rim that holds the hand off the winding, or for the numbers of the ribs. */
const RIM = { wide: 4, narrow: 2 };
/** What the winding may take off the diameter midway between rings, a fraction: 0.2 % of it is 0.3 % of L. */
export const GIVE_GOAL = 0.002;
/** Deepest ribs, a share of the radius; more inner rings help then. */
const DEEPEST = 0.4;
const DEPTH_STEP_MM = 0.5;
const POISSON = 0.36;
/** Shear area of a rectangle over its area. */
const SHEAR = 5 / 6;

/** Of the radius, at most, may be the radius of bends. */
const TIGHTEST = 0.95;

const round = (value: number, digits = 3) => Number(value.toFixed(digits));

/**
 * Tension on ribs, N: 12 to 20 N per square millimetre of copper, capped. Chosen here: the wire has only to run straight from notch
 * to notch, and what a wall takes as hoop stress ribs take by bending. Less than half of what a wall is wound with.
 */
export function ribTensionN(copperMm2: number): { low: number; high: number } {
  return { low: Math.min(12 * copperMm2, 5), high: Math.min(20 * copperMm2, 8) };
}

/** The ribs' section for a wire and a tap method; null for a full body. */
export function ribSection(
  job: RibJob,
  overallMm: number,
  method: Pick<TapMethod, 'holes' | 'holeMm'> | undefined,
): RibSection | null {
  const count = job.former.ribs;
  if (count === null) return null;
  const { lineMm, holeCompensationMm } = job.printer;
  const wire = wireHoleMm(overallMm, 1);
  const taps =
    method === undefined || method.holes === 0 ? 0 : method.holeMm * method.holes + PAIR_MM * (method.holes - 1);
  const across = Math.max(wire, taps) + LINES_BESIDE * lineMm + holeCompensationMm;
  const widthMm = Math.ceil(100 * Math.max(LEAST_LINES * lineMm, across) - 1e-6) / 100;
  return { count, widthMm, bendMm: round(widthMm / 2 / Math.tan(Math.PI / (2 * count)) + overallMm / 2, 4) };
}

/** Most ribs of this width that leave more air than plastic round a former; their bends then still make no circle. */
export function mostRibs(outsideMm: number, widthMm: number, overallMm: number): number {
  return Math.floor((Math.PI * (TIGHTEST * outsideMm - overallMm)) / (2 * widthMm) + 1e-9);
}

export function ribsFit({ count, widthMm }: RibSection, outsideMm: number, overallMm: number): boolean {
  return count <= mostRibs(outsideMm, widthMm, overallMm);
}

/** The corners of a coil's turns, none of a full body. Ribs that nearly touch make nearly a circle: they are refused, but later. */
export function cornersOn(section: RibSection | null, meanDiameterMm: number): { corners?: number; bendMm?: number } {
  if (section === null) return {};
  return { corners: section.count, bendMm: Math.min(section.bendMm, (TIGHTEST * meanDiameterMm) / 2) };
}

/** Wire of one flat turn, mm. */
export function ribbedTurnMm(meanDiameterMm: number, section: RibSection | null): number {
  const { corners, bendMm } = cornersOn(section, meanDiameterMm);
  return turnLengthMm(meanDiameterMm, corners, bendMm);
}

/** Turns from one finish hole to the next: in one rib where the pitch leaves a web between holes, else on the next rib. */
export function ribFinishStep(count: number, overallMm: number, pitchMm: number): number {
  return pitchMm >= wireHoleMm(overallMm, 1) * ROOFED + WEB_MM ? 1 : 1 + 1 / count;
}

/** Height that a printed hole takes with its roof, over its diameter. */
const ROOFED = (1 + Math.SQRT2) / 2;

/** From the anchor hole up to the start hole, which are in one rib. */
export const ribAnchorMm = (overallMm: number): number => wireHoleMm(overallMm, 1) * ROOFED + WEB_MM;

/** Across the flats of the inner rings, outside: as far out as the notches leave room for at the ribs. */
function ringAcrossMm(outsideMm: number, overallMm: number, count: number): number {
  return (outsideMm - overallMm - 2 * FREE_MM) * Math.cos(Math.PI / count);
}

/** From a rib's side to the middle between two ribs, along a flat of the inner rings: their underside rises as much. */
export function gableMm(acrossMm: number, { count, widthMm }: Pick<RibSection, 'count' | 'widthMm'>): number {
  const half = Math.PI / count;
  return (acrossMm / 2) * Math.tan(half) - widthMm / 2 / Math.cos(half);
}

export const ribRimMm = (job: RibJob): number => (job.former.flanges ? RIM.wide : RIM.narrow);

/** Height above `clearMm`, the last hole's upper end, at which the upper end ring begins: room for a window under it is kept. */
export function seatMm(section: RibSection, outsideMm: number, overallMm: number, clearMm: number): number {
  const gable = gableMm(ringAcrossMm(outsideMm, overallMm, section.count), section);
  return round(Math.max(clearMm, END_MM + CROWN_MM + gable + WINDOW_MM), 2);
}

/** From there to the top of the former. */
export function overSeatMm(job: RibJob, section: RibSection, outsideMm: number, overallMm: number): number {
  const across = ringAcrossMm(outsideMm, overallMm, section.count);
  return round(outsideMm / 2 + ribRimMm(job) - (across / 2 - SEAT_MM) + END_MM, 3);
}

/** Z of the wire at the start hole, over the end ring and the anchor hole. */
export function ribStartMm(overallMm: number): number {
  const under = Math.max(wireHoleMm(overallMm, 1) / 2, overallMm) + WEB_MM;
  return Math.ceil((END_MM + under + ribAnchorMm(overallMm)) * 2) / 2;
}

/** Upper end of what a hole takes, with a web over it. */
export const overHoleMm = (axialMm: number, diameterMm: number): number => axialMm + diameterMm * Math.SQRT1_2 + WEB_MM;

/** Former beyond its holes, about: below the start hole and above the last of the finish row. */
export function ribEndsMm(job: RibJob, section: RibSection, outsideMm: number, overallMm: number): number {
  const over = overHoleMm(0, wireHoleMm(overallMm, 1));
  return ribStartMm(overallMm) + over + overSeatMm(job, section, outsideMm, overallMm);
}

export interface Load {
  readonly outsideMm: number;
  readonly overallMm: number;
  readonly pitchMm: number;
  readonly tensionN: number;
  readonly material: Pick<Material, 'modulusGPa'>;
}

export interface Give {
  /** Midway between two rings, against them, along the radius. */
  readonly ribMm: number;
  /** By which the rings shrink, a fraction. */
  readonly ring: number;
  /** What both take off the diameter midway between rings, a fraction. */
  readonly strain: number;
}

/**
 * What ribs and rings give way under the pull of all turns at full tension, which is more than is left of it: turns slacken as the
 * former gives.
 *
 * A turn pulls a rib in by 2 T sin(pi/n); a rib is a beam fixed at both rings, q l^4/(384 E I) by bending and q l^2/(8 k G A) by shear
 * (textbook). A ring carries the turns of one span as a hoop, an end ring half of them.
 */
export function giveOf(section: Omit<RibSection, 'bendMm'>, depthMm: number, spanMm: number, load: Load): Give {
  const { count, widthMm } = section;
  const { outsideMm, overallMm, pitchMm, tensionN } = load;
  const e = load.material.modulusGPa * 1e3;
  const q = (2 * tensionN * Math.sin(Math.PI / count)) / pitchMm;
  const beam = depthMm - overallMm / 2;
  const bending = (q * spanMm ** 4) / (384 * e * ((widthMm * beam ** 3) / 12));
  const shear = (q * spanMm ** 2) / (8 * SHEAR * (e / (2 * (1 + POISSON))) * widthMm * beam);
  const { outerMm, innerMm } = ringFlats(section, outsideMm, overallMm, depthMm);
  const gable = gableMm((outerMm + innerMm) / 2, section);
  // The ring is as high as its crown midway and higher by the gable at the ribs; what gives is the mean of 1/height.
  const height = gable / Math.log(1 + gable / CROWN_MM);
  const hoop = (tensionN * spanMm) / pitchMm;
  const inner = hoop / (e * height * ((outerMm - innerMm) / 2));
  const end = hoop / 2 / (e * END_MM * depthMm);
  const ring = Math.max(inner, end);
  return { ribMm: bending + shear, ring, strain: (2 * (bending + shear)) / outsideMm + ring };
}

/** An inner ring's corners lie so far behind the ribs' inner faces that nothing of it stands out beside them. */
const cornerBehindMm = ({ count, widthMm }: Pick<RibSection, 'count' | 'widthMm'>): number =>
  BEHIND_MM + (widthMm / 2) * Math.tan(Math.PI / count);

function ringFlats(section: Omit<RibSection, 'bendMm'>, outsideMm: number, overallMm: number, depthMm: number) {
  const { count } = section;
  const outerMm = ringAcrossMm(outsideMm, overallMm, count);
  const innerMm = (outsideMm - 2 * depthMm + 2 * cornerBehindMm(section)) * Math.cos(Math.PI / count);
  return { outerMm, innerMm };
}

/** The least and the greatest depth of ribs, mm. The inner rings keep four lines between their inner corners and their outer flats. */
export function ribDepths(
  section: Omit<RibSection, 'bendMm'>,
  outsideMm: number,
  overallMm: number,
  lineMm: number,
): { least: number; most: number } {
  const { count, widthMm } = section;
  const beside = LINES_BESIDE * lineMm;
  const flat = outsideMm / 2 - ringAcrossMm(outsideMm, overallMm, count) / 2;
  const least = Math.max(overallMm / 2 + beside, flat + cornerBehindMm(section) + beside + SEAT_MM);
  // At the bore the ribs must leave a gable of a millimetre between them.
  const narrowest = (widthMm / 2 + 1) / Math.sin(Math.PI / count);
  const most = Math.min(DEEPEST * (outsideMm / 2), outsideMm / 2 - narrowest);
  return { least: Math.ceil(least / DEPTH_STEP_MM - 1e-9) * DEPTH_STEP_MM, most };
}

export interface RibPlan {
  readonly ribs: Ribs;
  readonly give: Give;
}

/**
 * Depth and inner rings: of what keeps the give below 0.2 % of the diameter the least plastic, else what gives least. `seat` is where
 * the upper end ring begins. A wall that the job states is the depth. Null when so many ribs, or ribs of this depth, do not go round
 * this diameter.
 */
export function planRibs(job: RibJob, section: RibSection, load: Load, seat: number): RibPlan | null {
  const { outsideMm, overallMm } = load;
  const { count, widthMm } = section;
  const { least, most } = ribDepths(section, outsideMm, overallMm, job.printer.lineMm);
  const stated = job.former.wallMm === null ? null : job.former.wallMm - BEHIND_MM;
  if (!ribsFit(section, outsideMm, overallMm) || least > most) return null;
  if (stated !== null && (stated < least - 1e-9 || stated > most + 1e-9)) return null;
  const depths: number[] = [];
  if (stated !== null) depths.push(stated);
  else for (let depth = least; depth <= most + 1e-9; depth += DEPTH_STEP_MM) depths.push(depth);
  const gable = gableMm(ringAcrossMm(outsideMm, overallMm, count), section);
  const mostRings = Math.max(0, Math.floor((seat - END_MM) / (CROWN_MM + gable + WINDOW_MM)) - 1);
  let best: { depth: number; rings: number; give: Give; volume: number } | null = null;
  for (const depth of depths)
    for (let rings = 0; rings <= mostRings; rings++) {
      const give = giveOf(section, depth, (seat - END_MM) / (rings + 1), load);
      const { outerMm, innerMm } = ringFlats(section, outsideMm, overallMm, depth);
      const ring = (count * gable * (2 * CROWN_MM + gable) * (outerMm - innerMm)) / 2;
      const volume = count * widthMm * depth * seat + (rings + 1) * ring;
      const one = { depth, rings, give, volume };
      if (best === null || better(one, best)) best = one;
    }
  if (best === null) return null;
  const { depth, rings, give } = best;
  const { outerMm, innerMm } = ringFlats(section, outsideMm, overallMm, depth);
  const tops = Array.from({ length: rings }, (_, i) => END_MM + ((i + 1) * (seat - END_MM)) / (rings + 1));
  return {
    give,
    ribs: {
      count,
      widthMm,
      depthMm: round(depth),
      ringMm: END_MM,
      innerRings: {
        topsMm: [...tops, seat + LET_IN_MM].map((z) => round(z)),
        crownMm: CROWN_MM,
        acrossMm: round(outerMm),
        insideMm: round(innerMm),
      },
      seatMm: seat,
      seatDiameterMm: round(outerMm - 2 * SEAT_MM),
    },
  };
}

/**
 * Share of the winding surface behind which plastic stands: ribs, and between them inner rings. 1 for a full body. An estimate of how
 * much of the former's loss is left: rings lie deeper than a wall would.
 */
export function plasticShare({
  ribs,
  outsideDiameterMm,
  footMm,
}: Pick<Former, 'ribs' | 'outsideDiameterMm' | 'footMm'>): number {
  if (ribs === null) return 1;
  const { count, widthMm, innerRings, seatMm: seat } = ribs;
  const across = Math.min(1, (count * widthMm) / (Math.PI * outsideDiameterMm));
  const height = innerRings.crownMm + gableMm(innerRings.acrossMm, ribs) / 2;
  const along = Math.min(1, (innerRings.topsMm.length * height) / (seat - footMm));
  return round(across + (1 - across) * along, 4);
}

type Tried = { readonly give: Give; readonly volume: number };

function better(a: Tried, b: Tried): boolean {
  const [good, was] = [a.give.strain <= GIVE_GOAL, b.give.strain <= GIVE_GOAL];
  if (good !== was) return good;
  return good ? a.volume < b.volume : a.give.strain < b.give.strain;
}

/** What the tension does to the ribs, in words. */
export function ribStiffnessText({ ribs, give }: RibPlan, load: Load & { material: Material }): string {
  const { material, tensionN } = load;
  const inner = ribs.innerRings.topsMm.length - 1;
  const rings = inner === 0 ? 'the end rings' : `the end rings and ${inner} inner ${inner === 1 ? 'ring' : 'rings'}`;
  const percent = (give.strain * 100).toFixed(2);
  return `${tensionN.toFixed(1)} N at this pitch bends ${ribs.count} ribs of ${ribs.widthMm.toFixed(2)} x ${ribs.depthMm.toFixed(2)} mm of ${material.name} (modulus ${material.modulusGPa} GPa) in by ${give.ribMm.toFixed(3)} mm midway between ${rings} and takes ${(give.ring * 100).toFixed(2)} % off the rings: ${percent} % of the diameter at most, ${(give.strain * 160).toFixed(2)} % off the inductance; wind no tighter`;
}
