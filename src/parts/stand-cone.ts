/**
 * A cone that centres something round on a shaft: a disc with a keyway in its lower face, and the cone on it, big end
 * down. The sides stand 20 degrees off the axis: more than the angle of friction of plastic on plastic (17 degrees at 0.3),
 * so that a pressed cone comes out again by hand, and far less than the 45 degrees that print without supports.
 */
import type { PartsRecord } from '../record/schema.ts';
import { PROUD_MM } from './holes.ts';
import { areaOf, circle, prism } from './shapes.ts';
import type { Cutter, Frame, Point2, ProfileRow, Solid } from './solid.ts';
import type { ClampDimensions } from './stand-clamp.ts';
import { chordsAt, turned, turnedMm3, turnedReachMm } from './stand-outline.ts';

export const CONE_DEG = 20;
const TAN = Math.tan((CONE_DEG * Math.PI) / 180);
const SIN = Math.sin((CONE_DEG * Math.PI) / 180);
/** Cone left over at both ends of the bores it takes, on the radius: a bore never sits on an edge. */
export const SEAT_MM = 1;
/** For the first layers, which spread. */
const CHAMFER_MM = 0.4;
/** Plastic between keyway and cone. */
const OVER_KEYWAY_MM = 1;
/** Friction of plastic on plastic, reckoned low; and how many times the torque of the wire the cones hold. */
const FRICTION = 0.2;
const SAFETY = 2;

export interface ConeDimensions {
  /** The bore it is made for, and the range of bores it centres. */
  readonly boreMm: number;
  readonly leastBoreMm: number;
  readonly mostBoreMm: number;
  readonly bigMm: number;
  readonly smallMm: number;
  /** Thickness of the disc and height of the cone on it. */
  readonly discMm: number;
  readonly coneMm: number;
  readonly heightMm: number;
  readonly keyway: {
    /** The keys' width and the clearance. */
    readonly widthMm: number;
    /** Of its upright sides; the roof rises by half the width over them. */
    readonly depthMm: number;
    /** From the axis to both ends; may lie beyond the disc. */
    readonly halfLengthMm: number;
  };
  /** Six holes round the shaft, which save plastic and let leads out; null where the cone is too small for them. */
  readonly windows: { readonly diameterMm: number; readonly circleRMm: number } | null;
}

export interface ConeAsk {
  readonly boreMm: number;
  /** How far bores may be off, on diameter, both ways. */
  readonly offMm: number;
  /** A disc thicker than the keyway asks for. */
  readonly discMm?: number;
}

/** Height of what a keyway takes from the disc. */
export function keywayMm(clamp: ClampDimensions, clearanceMm: number): number {
  return clamp.key.heightMm + 0.4 + (clamp.key.widthMm + clearanceMm) / 2;
}

export function coneDimensions(record: PartsRecord, clamp: ClampDimensions, ask: ConeAsk): ConeDimensions {
  const { clearanceMm } = record.printer;
  const leastBoreMm = ask.boreMm - ask.offMm;
  const mostBoreMm = ask.boreMm + ask.offMm;
  const [smallMm, bigMm] = [leastBoreMm - 2 * SEAT_MM, mostBoreMm + 2 * SEAT_MM];
  const discMm = Math.max(ask.discMm ?? 0, keywayMm(clamp, clearanceMm) + OVER_KEYWAY_MM);
  const coneMm = (bigMm - smallMm) / 2 / TAN;
  const widthMm = clamp.key.widthMm + clearanceMm;
  return {
    boreMm: ask.boreMm,
    leastBoreMm,
    mostBoreMm,
    bigMm,
    smallMm,
    discMm,
    coneMm,
    heightMm: discMm + coneMm,
    keyway: { widthMm, depthMm: clamp.key.heightMm + 0.4, halfLengthMm: clamp.ringRMm + 1 },
    windows: windowsIn(smallMm / 2 - 4, Math.max(clamp.ringRMm, clamp.endXMm) + 2, widthMm),
  };
}

function windowsIn(outerR: number, innerR: number, keywayWidthMm: number): ConeDimensions['windows'] {
  const circleRMm = (innerR + outerR) / 2;
  const apart = circleRMm * Math.sin(Math.PI / 6);
  const radius = Math.min((outerR - innerR) / 2, apart - 2, apart - keywayWidthMm / 2 - 2);
  return radius >= 4 ? { diameterMm: 2 * radius, circleRMm } : null;
}

/** How much of a cone lies outside the thinnest bore it takes: from the lower face to where the bore begins, mm. */
export function outsideMm(d: ConeDimensions): number {
  return d.discMm + (d.bigMm - d.leastBoreMm) / 2 / TAN;
}

/**
 * Force along the shaft with which two cones must be pressed together, so that their friction turns the bore against a pull
 * of `pullN` at radius `atMm`, twice over. Newtons.
 *
 * A cone pressed by F bears with F / sin(angle) on its side; two of them hold 2 x friction x F / sin(angle) x bore radius.
 */
export function pressN(d: ConeDimensions, pullN: number, atMm: number): number {
  return (SAFETY * pullN * atMm * SIN) / (2 * FRICTION * (d.boreMm / 2));
}

/** Least small end of a cone that still has a wall of `wallMm` round the bore. */
export const leastSmallMm = (clamp: Pick<ClampDimensions, 'boreReachMm'>, wallMm: number): number =>
  2 * (clamp.boreReachMm + wallMm);

/** Thinnest wall round the shaft: three lines, and not below 1.2 mm. */
export const coneWallMm = ({ printer }: PartsRecord): number => Math.max(3 * printer.lineMm, 1.2);

/** The greatest shaft, to a tenth, that a small end leaves a wall round. */
export function greatestShaftMm(record: PartsRecord, smallMm: number): number {
  const { printer, shop } = record;
  const reach = smallMm / 2 - coneWallMm(record);
  const acrossMm = shop.shaftForm === 'round' ? 2 * reach : reach * Math.sqrt(3);
  return Math.floor((acrossMm - printer.clearanceMm - printer.holeCompensationMm) * 10 + 1e-6) / 10;
}

/** Whether the cone has a wall round its bore. */
export function hasWall(record: PartsRecord, clamp: ClampDimensions, d: ConeDimensions): boolean {
  return d.smallMm >= leastSmallMm(clamp, coneWallMm(record)) - 1e-9;
}

/** The plain disc under the cone of an arbor. */
export function discRows(d: ConeDimensions): ProfileRow[] {
  const r = d.bigMm / 2;
  return [
    { rMm: r - CHAMFER_MM, zMm: 0 },
    { rMm: r, zMm: CHAMFER_MM },
    { rMm: r, zMm: d.discMm },
  ];
}

const LYING: Frame = { origin: [0, 0, 0], x: [-1, 0, 0], y: [0, 0, 1] };

/** A cone on a disc of the given profile, as it is printed. */
export function coneSolid(
  record: PartsRecord,
  clamp: ClampDimensions,
  d: ConeDimensions,
  disc: readonly ProfileRow[],
  what: Pick<Solid, 'part' | 'name' | 'kind' | 'quantity' | 'use'>,
): Solid {
  const rows = [...disc, { rMm: d.smallMm / 2, zMm: d.heightMm }];
  const { keyway, windows } = d;
  const house = houseOutline(keyway.widthMm, keyway.depthMm);
  const top = d.heightMm + PROUD_MM;
  const holes = windowCutters(d, top);
  const cutters: Cutter[] = [
    prism('bore', [clamp.bore], -PROUD_MM, top),
    prism('keyway', [house], -keyway.halfLengthMm, keyway.halfLengthMm, LYING),
    ...holes,
  ];
  const reach = turnedReachMm(rows);
  const windowMm2 = windows ? 6 * areaOf(circle(windows.diameterMm / 2, 'hole')) : 0;
  return {
    ...what,
    material: record.printer.material,
    densityGCm3: record.printer.densityGCm3,
    shapes: [turned('cone', rows)],
    cutters,
    expected: {
      bodies: 1,
      genus: 1 + holes.length,
      genusIs: `the bore, ${holes.length} windows`,
      minMm: [-reach, -reach, 0],
      maxMm: [reach, reach, d.heightMm],
      volumeMm3: turnedMm3(rows) - (areaOf(clamp.bore) + windowMm2) * d.heightMm - keywayMm3(clamp, d, disc[1]!.rMm),
    },
    printNote:
      'print on its big face, no supports; three walls, a third or more of infill; seam anywhere but on the keyway',
  };
}

/** A keyway's section, open downwards: upright sides and a roof at 45 degrees. */
function houseOutline(widthMm: number, depthMm: number): Point2[] {
  const half = widthMm / 2;
  return [
    [-half, -PROUD_MM],
    [half, -PROUD_MM],
    [half, depthMm],
    [0, depthMm + half],
    [-half, depthMm],
  ];
}

function windowCutters({ windows }: ConeDimensions, top: number): Cutter[] {
  if (!windows) return [];
  return [0, 60, 120, 180, 240, 300].map((deg) => {
    const a = (deg * Math.PI) / 180;
    const [x, y] = [windows.circleRMm * Math.cos(a), windows.circleRMm * Math.sin(a)];
    return prism('window', [circle(windows.diameterMm / 2, 'hole', x, y)], -PROUD_MM, top);
  });
}

/** What the keyway takes beside the bore: strips along it, each as high as the roof there. */
function keywayMm3(clamp: ClampDimensions, { keyway }: ConeDimensions, discRMm: number): number {
  const half = keyway.widthMm / 2;
  const turnedBore = clamp.bore.map(([x, y]): Point2 => [y, x]);
  const strips = 200;
  let sum = 0;
  for (let i = 0; i < strips; i++) {
    const x = half * ((2 * (i + 0.5)) / strips - 1);
    const reach = Math.min(keyway.halfLengthMm, Math.sqrt(discRMm ** 2 - x * x));
    const bore = chordsAt(turnedBore, x).reduce((inside, [from, to]) => inside + to - from, 0);
    sum += (2 * reach - bore) * (keyway.depthMm + half - Math.abs(x)) * ((2 * half) / strips);
  }
  return sum;
}
