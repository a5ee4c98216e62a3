/**
 * Where a former taller than the printer is put together: the fewest sections, as nearly alike in height as holes allow, at
 * seams that meet no hole and no turn. A seam outside the winding is taken where it serves, else one that no hole lies
 * behind, else one whose spigot has the holes of the section below bored through it.
 */
import {
  collarEndMm,
  type Joining,
  joiningOf,
  midwayMm,
  type Seam,
  seamMm,
  shareOf,
  spigotEndMm,
  spigotFor,
} from '../coil/seam.ts';
import type { Former, Hole } from '../record/schema.ts';

export type Joint = Former['joints'][number];

export interface Splitting {
  readonly former: Former;
  readonly holes: readonly Hole[];
  readonly hand: 'right' | 'left';
  /** Greatest thickness over the wire's covering. */
  readonly overallMm: number;
  readonly axialMm: (turn: number) => number;
  /** Z between which another winding lies, so that no seam may. */
  readonly keepClear?: { readonly lowMm: number; readonly highMm: number };
  /** Longest former that the job allows; for a longer one no seams are looked for. */
  readonly mostMm: number;
  readonly printer: {
    readonly heightMm: number;
    readonly lineMm: number;
    readonly clearanceMm: number;
    readonly holeCompensationMm: number;
  };
}

export type Split = { readonly joints: Joint[] } | { readonly none: string };

/** More sections than this are no former to wind on. */
const MOST_SECTIONS = 6;
/** Keys are tried at every so many chords: between two columns of the mesh, never on one. */
const KEY_STEP = 2;
/** Flat seams are tried at this distance. */
const FLAT_STEP_MM = 0.5;
/** Least plain bore under a spigot and between a collar and the next spigot. */
const APART_MM = 2;
/** Heights of sections are tried at this distance, but no more than so many. */
const ALIKE_MM = 0.5;
const MOST_HEIGHTS = 100;

/** How good a place is. */
const FLAT = 0;
const CLEAR = 1;
const BORED = 2;
type Grade = typeof FLAT | typeof CLEAR | typeof BORED;

interface Place extends Seam {
  readonly keyDeg: number;
}

/** Joints from below, none for a former that the printer takes whole; or why it cannot be split. */
export function splitOf(it: Splitting): Split {
  const { former, printer } = it;
  const { kind, lengthMm } = former;
  const whole = lengthMm <= printer.heightMm + 1e-9;
  if (kind !== 'printed' || whole || lengthMm > it.mostMm + 1e-9) return { joints: [] };
  if (former.body === 'ribbed') return { none: 'a ribbed former has no wall for a seam' };
  const glueGapMm = printer.clearanceMm / 2;
  const j = joiningOf(former.outsideDiameterMm / 2, former.boreDiameterMm / 2, glueGapMm, printer);
  // Holes in the wall are cut from half the bore on.
  if (j.ringR < j.boreR / 2 + j.marginMm)
    return { none: `a bore of ${former.boreDiameterMm} mm is too narrow for a spigot` };
  const places = placesOf(it, j);
  const flat = places.filter(({ turn }) => turn === null);
  const gradeAt = grading(it, j);
  const fewest = Math.ceil(lengthMm / printer.heightMm - 1e-9);
  for (let sections = fewest; sections <= MOST_SECTIONS; sections++)
    for (const worst of [FLAT, CLEAR, BORED] as const) {
      const usable = (place: Place) => gradeAt(place) <= worst;
      const seams = evenly(lengthMm, printer.heightMm, sections, worst === FLAT ? flat : places, usable, j);
      if (seams !== null) return { joints: seams.map((seam) => ({ ...rounded(seam), glueGapMm: round(glueGapMm) })) };
    }
  if (fewest > MOST_SECTIONS) return { none: `it would take more than ${MOST_SECTIONS} sections` };
  return { none: 'no seams that are clear of the holes leave every section low enough' };
}

const round = (value: number) => Math.round(value * 1e4) / 1e4;

const rounded = ({ turn, seamMm: z, climbMm, keyDeg, spigotMm }: Place) => ({
  turn: turn === null ? null : Math.round(turn * 1e6) / 1e6,
  seamMm: round(z),
  climbMm: round(climbMm),
  keyDeg: round(keyDeg),
  spigotMm: round(spigotMm),
});

/** Turns with wire, groove or ridge: the run-in before the start, the row of finish holes and the run-out behind it. */
function windingSpan({ former, holes, axialMm, overallMm }: Splitting) {
  const runIn = former.groove?.runInTurns ?? 0;
  const last = Math.max(...holes.filter(({ purpose }) => purpose === 'finish').map(({ turn }) => turn ?? 0));
  const half = former.groove
    ? former.groove.floorMm / 2 + former.groove.depthMm
    : overallMm / 2 + (former.ridges?.widthMm ?? 0);
  return { last, fromMm: axialMm(-runIn) - half, toMm: axialMm(last + runIn) + half };
}

/** Every place to look at, rising: flat ones outside the winding, at angle 0 or across from it, the others among the turns. */
function placesOf(it: Splitting, j: Joining): Place[] {
  const { former, axialMm, hand } = it;
  const span = windingSpan(it);
  const rim = former.flange ? former.flange.diameterMm / 2 - j.outsideR : 0;
  const lowest = (former.flange?.lowerMm ?? Math.max(former.footMm, former.base?.thicknessMm ?? 0)) + j.marginMm;
  const highest = former.lengthMm - (former.flange ? former.flange.upperMm + rim : former.topMm) - j.marginMm;
  const spigotMm = spigotFor(j.boreR);
  const depth = former.groove?.depthMm ?? 0;
  const places: Place[] = [];
  const { keepClear } = it;
  const clear = (z: number) =>
    keepClear === undefined || z + j.marginMm <= keepClear.lowMm || z - depth - j.marginMm >= keepClear.highMm;
  for (let z = lowest; z <= highest; z += FLAT_STEP_MM)
    if (clear(z) && (z <= span.fromMm - j.marginMm || z - depth >= span.toMm + j.marginMm))
      for (const keyDeg of [0, 90, 180, 270]) places.push({ turn: null, seamMm: z, climbMm: 0, keyDeg, spigotMm });
  const step = KEY_STEP / former.segments;
  // Two turns from the end: a ridge may lie over the last one.
  for (let i = 0; i * step <= span.last - 2; i++) {
    const turn = i * step;
    const z = midwayMm(axialMm, turn);
    const climbMm = midwayMm(axialMm, turn + 1) - z;
    const part = turn - Math.floor(turn);
    const keyDeg = (hand === 'right' ? 360 * part : 360 - 360 * part) % 360;
    if (z >= lowest && z + climbMm <= highest) places.push({ turn, seamMm: z, climbMm, keyDeg, spigotMm });
  }
  const inside = places.filter(
    (place) =>
      spigotEndMm(place, j) >= former.chamferMm + APART_MM && collarEndMm(place, j) <= former.lengthMm - APART_MM,
  );
  return inside.sort((a, b) => a.seamMm - b.seamMm);
}

/** Gives a place its grade, worked out once; infinite where it meets a hole. */
function grading(it: Splitting, j: Joining): (place: Place) => number {
  const known = new Map<Place, number>();
  const obstacles = obstaclesOf(it);
  return (place) => {
    let grade = known.get(place);
    if (grade === undefined) {
      grade = gradeOf(it, j, place, obstacles);
      known.set(place, grade);
    }
    return grade;
  };
}

interface Obstacle {
  readonly angleDeg: number;
  readonly lowMm: number;
  readonly highMm: number;
  readonly halfMm: number;
  /** Whether it can go on through a spigot. */
  readonly hole: boolean;
}

/** Holes with the roof under which they are printed, and what stands out of the wall. */
function obstaclesOf({ former, holes, printer }: Splitting): Obstacle[] {
  const bored = holes
    .filter(({ purpose }) => purpose !== 'mount')
    .map(({ angleDeg, axialMm, diameterMm }) => {
      const d = diameterMm + printer.holeCompensationMm;
      return { angleDeg, lowMm: axialMm - d / 2, highMm: axialMm + d * Math.SQRT1_2, halfMm: d / 2, hole: true };
    });
  const posts = former.posts.map(({ angleDeg, widthMm, heightMm }) => ({
    angleDeg,
    lowMm: 0,
    highMm: former.footMm + heightMm,
    halfMm: widthMm / 2,
    hole: false,
  }));
  return [...bored, ...posts];
}

function gradeOf(it: Splitting, j: Joining, place: Place, obstacles: readonly Obstacle[]): Grade | typeof NONE {
  const wall = j.outsideR - j.boreR;
  const end = spigotEndMm(place, j);
  let bored = false;
  for (const { angleDeg, lowMm, highMm, halfMm, hole } of obstacles) {
    const share = shareOf(place.keyDeg, angleDeg, it.hand);
    const fromKeyMm = Math.min(share, 1 - share) * 2 * Math.PI * j.boreR;
    const atStep = fromKeyMm < halfMm + j.marginMm;
    const z = seamMm(place, it.axialMm, share);
    const [low, high] = atStep ? [place.seamMm, place.seamMm + place.climbMm] : [z, z];
    if (lowMm >= high + j.marginMm) continue;
    if (highMm > low - wall - j.marginMm) return NONE;
    if (highMm <= end) continue;
    if (!hole) continue;
    if (lowMm < end + j.marginMm || fromKeyMm < halfMm + j.notchWidthMm / 2 + j.marginMm) return NONE;
    bored = true;
  }
  return bored ? BORED : place.turn === null ? FLAT : CLEAR;
}

const NONE = Number.POSITIVE_INFINITY;

/**
 * Seams that make `sections` sections, the tallest as low as can be; null when one would be taller than `mostMm`. Every
 * height is tried: where a taller section finds no seam above it, a lower one may.
 */
function evenly(
  lengthMm: number,
  mostMm: number,
  sections: number,
  places: readonly Place[],
  usable: (place: Place) => boolean,
  j: Joining,
): Place[] | null {
  const least = lengthMm / sections;
  const steps = Math.max(1, Math.min(MOST_HEIGHTS, Math.ceil((mostMm - least) / ALIKE_MM)));
  for (let k = 1; k <= steps; k++) {
    const seams = packed(lengthMm, least + ((mostMm - least) * k) / steps, sections, places, usable, j);
    if (seams !== null) return seams;
  }
  return null;
}

/** From below every section as tall as `tallestMm` and the places allow; null when that takes more than `sections`. */
function packed(
  lengthMm: number,
  tallestMm: number,
  sections: number,
  places: readonly Place[],
  usable: (place: Place) => boolean,
  j: Joining,
): Place[] | null {
  const seams: Place[] = [];
  let bottom = 0;
  let clearFrom = 0;
  while (lengthMm - bottom > tallestMm) {
    if (seams.length + 1 >= sections) return null;
    let i = highest(places, bottom + tallestMm);
    while (
      i >= 0 &&
      spigotEndMm(places[i]!, j) >= clearFrom &&
      (topOf(places[i]!) > bottom + tallestMm || !usable(places[i]!))
    )
      i--;
    const seam = places[i];
    if (seam === undefined || spigotEndMm(seam, j) < clearFrom) return null;
    seams.push(seam);
    bottom = spigotEndMm(seam, j);
    clearFrom = collarEndMm(seam, j) + APART_MM;
  }
  return seams.length + 1 === sections ? seams : null;
}

const topOf = (place: Place) => place.seamMm + place.climbMm;

/** Index of the last place not above `mm`, -1 for none. */
function highest(places: readonly Place[], mm: number): number {
  let [low, high] = [0, places.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (places[middle]!.seamMm <= mm) low = middle + 1;
    else high = middle;
  }
  return low - 1;
}
