/**
 * What sits on a shaft: a bore slit along one side and drawn together by an M4 screw and nut. The collar that holds a cone
 * is one, the foot of the crank is another.
 *
 *      ______________
 *     (   O  ========     bore, slit; the screw runs across the slit, its nut is dropped in from above
 *      --------------
 *
 * A collar's two keys lie in the keyway of the cone, so that on a round shaft, too, the cone turns with it.
 */
import type { PartsRecord } from '../record/schema.ts';
import { PROUD_MM, teardrop } from './holes.ts';
import { areaOf, circle, prism, rectangle } from './shapes.ts';
import type { Cutter, Point2, Solid } from './solid.ts';
import { M4, NUT_PLAY_MM, screwLengthMm } from './stand-hardware.ts';
import { areaLeft, hexagon, hull, moved, onBed } from './stand-outline.ts';

/** Plastic round a clamped bore: stiff enough not to crack at a tight screw, and it still gives by the clearance. */
const RING_MM = 6;
/** Between slit and nut, and between nut and outside. */
const NUT_WALL_MM = 3;
const OUTER_WALL_MM = 2;
/** The keyway's ceiling is a roof at 45 degrees, so a wide key would need a thick cone. */
const KEY_WIDTH_MM = 5;
const KEY_HEIGHT_MM = 3;
/** Twice the screw's hole and a bit: the teardrop's point and the nut's corners stay inside. */
const HEIGHT_MM = 12;

/** Lengths in mm; the bore's axis is the origin, the slit runs along +x, the keys lie along y. */
export interface ClampDimensions {
  readonly form: 'round' | 'hexagon';
  readonly shaftMm: number;
  /** Diameter, or across flats: shaft and clearance, as it should come out. */
  readonly boreMm: number;
  /** The bore as modelled, wider by the printer's compensation. */
  readonly bore: readonly Point2[];
  /** From the axis to the farthest point of the bore. */
  readonly boreReachMm: number;
  readonly ringRMm: number;
  readonly slitMm: number;
  /** From the axis to the screw, and to the end of the lugs. */
  readonly screwXMm: number;
  readonly endXMm: number;
  /** Half the width across the lugs, over which the screw is tightened. */
  readonly halfWidthMm: number;
  readonly heightMm: number;
  readonly screwLengthMm: number;
  readonly screwHoleMm: number;
  /** The nut's pocket: along x, along y, where it begins from the slit's middle, its floor. */
  readonly nutMm: number;
  readonly nutDepthMm: number;
  readonly nutFromMm: number;
  readonly nutFloorMm: number;
  readonly key: {
    readonly widthMm: number;
    readonly heightMm: number;
    /** From the axis to a key's inner and outer end. */
    readonly fromMm: number;
    readonly toMm: number;
  };
}

/** Bore for the shaft of the shop. */
export function shaftBore({
  shop,
  printer,
}: PartsRecord): Pick<ClampDimensions, 'form' | 'shaftMm' | 'boreMm' | 'bore' | 'boreReachMm'> {
  const boreMm = shop.shaftMm + printer.clearanceMm;
  const cut = boreMm + printer.holeCompensationMm;
  const round = shop.shaftForm === 'round';
  return {
    form: shop.shaftForm,
    shaftMm: shop.shaftMm,
    boreMm,
    bore: round ? circle(cut / 2, 'hole') : hexagon(cut),
    boreReachMm: round ? cut / 2 : cut / Math.sqrt(3),
  };
}

export function clampDimensions(record: PartsRecord): ClampDimensions {
  const bore = shaftBore(record);
  const { clearanceMm, holeCompensationMm } = record.printer;
  const ringRMm = bore.boreReachMm + RING_MM;
  // The slit must give what the bore's circumference loses when it closes on the shaft.
  const slitMm = Math.max(2.5, Math.PI * (clearanceMm + Math.max(0, holeCompensationMm)) + 1.5);
  const nutFromMm = slitMm / 2 + NUT_WALL_MM;
  const nutDepthMm = M4.nutHeightMm + NUT_PLAY_MM;
  const nutMm = M4.nutAcrossFlatsMm + NUT_PLAY_MM;
  const halfWidthMm = Math.max(nutFromMm + nutDepthMm + OUTER_WALL_MM, ringRMm);
  const screwHoleMm = M4.holeMm;
  const screwXMm = bore.boreReachMm + 2.5 + screwHoleMm / 2;
  return {
    ...bore,
    ringRMm,
    slitMm,
    screwXMm,
    endXMm: screwXMm + nutMm / 2 + 2.5,
    halfWidthMm,
    heightMm: HEIGHT_MM,
    screwLengthMm: screwLengthMm(halfWidthMm + nutFromMm + M4.nutHeightMm),
    screwHoleMm,
    nutMm,
    nutDepthMm,
    nutFromMm,
    // A nut with a corner down has its middle half its width over corners above the floor.
    nutFloorMm: HEIGHT_MM / 2 - nutMm / Math.sqrt(3),
    key: {
      widthMm: KEY_WIDTH_MM,
      heightMm: KEY_HEIGHT_MM,
      fromMm: bore.boreReachMm + 1,
      toMm: Math.sqrt(ringRMm ** 2 - (KEY_WIDTH_MM / 2) ** 2) - 0.3,
    },
  };
}

/** Outline of the clamp without bore and slit; `more` points are taken in. */
export function clampOutline(d: ClampDimensions, more: readonly Point2[] = []): Point2[] {
  const lugs = rectangle(0, -d.halfWidthMm, d.endXMm, 2 * d.halfWidthMm);
  return hull([...circle(d.ringRMm, 'solid'), ...lugs, ...more]);
}

/** The slit from `reliefMm` behind the axis to beyond the lugs. */
export function slitOutline(d: ClampDimensions, reliefMm: number): Point2[] {
  return rectangle(-reliefMm, -d.slitMm / 2, reliefMm + d.endXMm + PROUD_MM, d.slitMm);
}

/** Bore, slit, screw hole and nut pocket of a clamp that lies on the bed. */
export function clampCutters(record: PartsRecord, d: ClampDimensions, reliefMm: number): Cutter[] {
  const top = d.heightMm + PROUD_MM;
  const hole = teardrop(d.screwHoleMm + record.printer.holeCompensationMm);
  const across = d.halfWidthMm + PROUD_MM;
  return [
    prism('bore', [d.bore], -PROUD_MM, top),
    prism('slit', [slitOutline(d, reliefMm)], -PROUD_MM, top),
    prism('screw hole', [hole], -across, across, {
      origin: [d.screwXMm, 0, d.heightMm / 2],
      x: [-1, 0, 0],
      y: [0, 0, 1],
    }),
    prism('nut', [rectangle(d.screwXMm - d.nutMm / 2, d.nutFromMm, d.nutMm, d.nutDepthMm)], d.nutFloorMm, top),
  ];
}

/** Handles of a clamp: the screw's hole through one lug, and from the slit to the pocket and from there out in the other. */
export const CLAMP_GENUS = {
  genus: 3,
  genusIs: 'the screw hole in one lug, and on both sides of the nut in the other',
} as const;

/** Volume of an outline with the cuts of a clamp. */
export function clampMm3(
  record: PartsRecord,
  d: ClampDimensions,
  outline: readonly Point2[],
  reliefMm: number,
): number {
  const flat = areaLeft([outline], [d.bore, slitOutline(d, reliefMm)]);
  const hole = areaOf(teardrop(d.screwHoleMm + record.printer.holeCompensationMm));
  const holeMm3 = hole * (2 * d.halfWidthMm - d.slitMm - d.nutDepthMm);
  return flat * d.heightMm - holeMm3 - d.nutMm * d.nutDepthMm * (d.heightMm - d.nutFloorMm);
}

/** A collar with two keys on its face. */
export function collarSolid(
  record: PartsRecord,
  what: Pick<Solid, 'part' | 'name' | 'kind' | 'quantity' | 'use'>,
): Solid {
  const d = clampDimensions(record);
  const { key } = d;
  const outline = clampOutline(d);
  const { dx, dy, minMm, maxMm } = onBed(outline, d.heightMm + key.heightMm);
  const keys = [1, -1].map((side) =>
    prism(
      'key',
      [rectangle(-key.widthMm / 2, side > 0 ? key.fromMm : -key.toMm, key.widthMm, key.toMm - key.fromMm)],
      d.heightMm - 1,
      d.heightMm + key.heightMm,
    ),
  );
  return {
    ...what,
    material: record.printer.material,
    densityGCm3: record.printer.densityGCm3,
    shapes: moved([prism('collar', [outline], 0, d.heightMm), ...keys], dx, dy),
    cutters: moved(clampCutters(record, d, 0), dx, dy),
    expected: {
      bodies: 1,
      ...CLAMP_GENUS,
      minMm,
      maxMm,
      volumeMm3: clampMm3(record, d, outline, 0) + 2 * key.widthMm * key.heightMm * (key.toMm - key.fromMm),
    },
    printNote: 'print with the keys up, no supports; four walls; M4 holes come out ready, the nut drops in from above',
  };
}
