/** The crank, clamped to the shaft like a collar, with an arrow for clockwise; and the handle that turns on its pin. */
import type { PartsRecord } from '../record/schema.ts';
import { PROUD_MM } from './holes.ts';
import { areaOf, chordsFor, circle, prism } from './shapes.ts';
import { ringAt } from './slab.ts';
import type { Cutter, Engraving, Loft, Point2, Solid } from './solid.ts';
import { CLAMP_GENUS, type ClampDimensions, clampCutters, clampMm3, clampOutline } from './stand-clamp.ts';
import type { CrankDimensions } from './stand-dimensions.ts';
import { M4 } from './stand-hardware.ts';
import { moved, onBed, turned, turnedMm3, turnedReachMm } from './stand-outline.ts';
import { CUT_MM, cutMm3, STROKE_MM } from './words.ts';

/** The pin's foot is a cone at 45 degrees, where it would break; the handle's mouth goes round it with half a millimetre. */
const FOOT_MM = 1.5;
const MOUTH_MM = 2;
/** Thread of the screw in the pin. */
const PILOT_DEPTH_MM = 18;
/** The slit goes on behind the shaft, so that the thick arm lets the bore close. */
export const CRANK_RELIEF_MM = 8;

export const crankOutline = (clamp: ClampDimensions, d: CrankDimensions): Point2[] =>
  clampOutline(clamp, circle(clamp.halfWidthMm, 'solid', -d.armMm, 0));

export function crankSolid(
  record: PartsRecord,
  clamp: ClampDimensions,
  d: CrankDimensions,
  what: Pick<Solid, 'part' | 'name' | 'use'>,
): Solid {
  const { printer } = record;
  const outline = crankOutline(clamp, d);
  const relief = clamp.boreReachMm + CRANK_RELIEF_MM;
  const top = clamp.heightMm + d.pinLengthMm;
  const r = d.pinMm / 2;
  const pinRows = [
    { rMm: r + FOOT_MM + 1, zMm: clamp.heightMm - 1 },
    { rMm: r, zMm: clamp.heightMm + FOOT_MM },
    { rMm: r, zMm: top - 0.5 },
    { rMm: r - 0.5, zMm: top },
  ];
  // What stands out of the arm: the cone is cut by its face.
  const standing = [{ rMm: r + FOOT_MM, zMm: clamp.heightMm }, ...pinRows.slice(1)];
  const pilot = circle((M4.pilotMm + printer.holeCompensationMm) / 2, 'hole', -d.armMm, 0);
  const arrow = arrowOf(clamp, d);
  const { dx, dy, minMm, maxMm } = onBed(outline, top);
  return {
    ...what,
    kind: 'stand',
    quantity: 1,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: moved(
      [prism('crank', [outline], 0, clamp.heightMm), ...moved([turned('pin', pinRows)], -d.armMm, 0)],
      dx,
      dy,
    ),
    cutters: moved<Cutter>(
      [...clampCutters(record, clamp, relief), prism('thread', [pilot], top - PILOT_DEPTH_MM, top + PROUD_MM), arrow],
      dx,
      dy,
    ),
    expected: {
      bodies: 1,
      ...CLAMP_GENUS,
      minMm,
      maxMm,
      volumeMm3:
        clampMm3(record, clamp, outline, relief) + turnedMm3(standing) - areaOf(pilot) * PILOT_DEPTH_MM - cutMm3(arrow),
    },
    printNote: 'print with the pin up, no supports; five walls, half or more of infill; slow on the pin',
  };
}

/** An arc about the shaft across the arm, its head where the pin goes when the crank is turned clockwise. */
function arrowOf(clamp: ClampDimensions, d: CrankDimensions): Engraving {
  const radius = d.armMm - d.pinMm / 2 - FOOT_MM - 7;
  const sweep = Math.asin((clamp.halfWidthMm - 2.5) / radius);
  const at = (a: number): Point2 => [-radius * Math.cos(a), radius * Math.sin(a)];
  const arc = Array.from({ length: 7 }, (_, i) => at(sweep * (i / 3 - 1)));
  const [x, y] = at(sweep);
  const head: Point2[] = [
    [x - 2.4, y - 2.8],
    [x, y],
    [x + 2.4, y - 2.2],
  ];
  return {
    kind: 'engraving',
    name: 'arrow',
    zMm: clamp.heightMm,
    depthMm: CUT_MM,
    widthMm: STROKE_MM,
    strokes: [arc, head],
    frame: { origin: [0, 0, 0], x: [1, 0, 0], y: [0, 1, 0] },
  };
}

/** A sleeve, mouth down. */
export function handleSolid(
  record: PartsRecord,
  d: CrankDimensions,
  what: Pick<Solid, 'part' | 'name' | 'use'>,
): Solid {
  const { printer } = record;
  const r = d.handleMm / 2;
  const rows = [
    { rMm: r - 0.8, zMm: 0 },
    { rMm: r, zMm: 0.8 },
    { rMm: r, zMm: d.handleLengthMm - 2 },
    { rMm: r - 2, zMm: d.handleLengthMm },
  ];
  const bore = (d.handleBoreMm + printer.holeCompensationMm) / 2;
  const n = chordsFor(bore + MOUTH_MM);
  const ring = (radius: number, z: number) => ringAt(radius / Math.cos(Math.PI / n), z, n);
  const cutter: Loft = {
    kind: 'loft',
    name: 'bore',
    rings: [ring(bore + MOUTH_MM + PROUD_MM, -PROUD_MM), ring(bore, MOUTH_MM), ring(bore, d.handleLengthMm + PROUD_MM)],
    hubs: null,
  };
  const mouth = bore + MOUTH_MM;
  const boreMm3 =
    n *
    Math.tan(Math.PI / n) *
    (bore * bore * (d.handleLengthMm - MOUTH_MM) + (MOUTH_MM * (bore * bore + bore * mouth + mouth * mouth)) / 3);
  const body = turned('handle', rows);
  const reach = turnedReachMm(rows);
  return {
    ...what,
    kind: 'stand',
    quantity: 1,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [body],
    cutters: [cutter],
    expected: {
      bodies: 1,
      genus: 1,
      genusIs: 'the bore',
      minMm: [-reach, -reach, 0],
      maxMm: [reach, reach, d.handleLengthMm],
      volumeMm3: turnedMm3(rows) - boreMm3,
    },
    printNote: 'print standing, wide mouth down, no supports; three walls',
  };
}
