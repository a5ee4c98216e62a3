/** Uprights, the latches that keep the shaft down in them, and bushes for a shaft that is no round one. */
import type { PartsRecord } from '../record/schema.ts';
import { PROUD_MM } from './holes.ts';
import { areaOf, circle, prism, rectangle } from './shapes.ts';
import type { Cutter, Point2, Solid } from './solid.ts';
import { type ClampDimensions, shaftBore } from './stand-clamp.ts';
import type { BushDimensions, LatchDimensions, UprightDimensions } from './stand-dimensions.ts';
import { M4, NUT_PLAY_MM } from './stand-hardware.ts';
import {
  edgeCutters,
  hull,
  moved,
  notched,
  onBed,
  placed,
  slotted,
  turned,
  turnedMm3,
  turnedReachMm,
} from './stand-outline.ts';
import { cutMm3, type Words, wordsCut } from './words.ts';

/** Height of the upright part of the feet's sides. */
const TOE_MM = 6;
/** Plastic beside a window. */
const FRAME_MM = 13;
const TENON_CHAMFER_MM = 0.5;
/** Notches for a rubber band: slots upwards and inwards, so that a band that pulls up stays in. */
const NOTCH = { widthMm: 3, depthMm: 6 } as const;

type What = Pick<Solid, 'part' | 'name' | 'use'>;

/**
 * Outline with tenons below y = 0, the slots of the screws in the foot, the bearing with its axis at (0, axisMm), and the
 * notches. The bearing is wider than it should come out by the printer's compensation.
 */
export function uprightOutline(d: UprightDimensions, compensationMm: number): Point2[] {
  const half = d.footMm / 2;
  const head = circle(d.headRMm, 'solid', 0, d.axisMm);
  const around = hull([...rectangle(-half, 0, d.footMm, TOE_MM), ...head]);
  // The hull runs counterclockwise from its leftmost, lowest point: the left toe, then the right one.
  const [left, ...rest] = around;
  return [bearingOutline(d, compensationMm), ...notchOutlines(d)].reduce(notched, [left!, ...footLine(d), ...rest]);
}

/** The foot from left to right: slot of a screw, tenon, tenon, slot. */
function footLine(d: UprightDimensions): Point2[] {
  const slot = (x: number): Point2[] => {
    const [w, n] = [M4.holeMm / 2, (M4.nutAcrossFlatsMm + NUT_PLAY_MM) / 2];
    const [from, to] = [d.nutFromMm, d.nutFromMm + M4.nutHeightMm + NUT_PLAY_MM];
    const up: Point2[] = [
      [w, 0],
      [w, from],
      [n, from],
      [n, to],
      [w, to],
      [w, d.screwSlotMm],
    ];
    return [...up.map(([px, y]): Point2 => [x - px, y]), ...up.toReversed().map(([px, y]): Point2 => [x + px, y])];
  };
  return [...slot(-d.screwXMm), ...tenonOutline(d, -d.tenonXMm), ...tenonOutline(d, d.tenonXMm), ...slot(d.screwXMm)];
}

/** A tenon from root to root. */
function tenonOutline(d: UprightDimensions, x: number): Point2[] {
  const w = d.tenonWidthMm / 2;
  return [
    [x - w, 0],
    [x - w, -d.tenonMm],
    [x + w, -d.tenonMm],
    [x + w, 0],
  ];
}

/** The bearing: round below, open upwards at 45 degrees to the right. */
function bearingOutline(d: UprightDimensions, compensationMm: number): Point2[] {
  return placed(slotted(d.bearingMm + compensationMm, d.headRMm + 2), 45, 0, d.axisMm);
}

/** Middle of the latch's hole. */
export function latchHole(d: UprightDimensions): Point2 {
  return placed([[d.latchAlongMm, d.latchAsideMm]], 45, 0, d.axisMm)[0]!;
}

/** Half the upright's width at a height between toe and head, and what it loses with each millimetre upwards. */
function edgeAt(d: UprightDimensions, y: number): { readonly half: number; readonly slope: number } {
  // The edge runs from the toe tangent to the head.
  const [dx, dy] = [d.footMm / 2, d.axisMm - TOE_MM];
  const angle = Math.atan2(dx, dy) - Math.asin(d.headRMm / Math.hypot(dx, dy));
  const slope = Math.tan(angle);
  return { half: d.footMm / 2 - (y - TOE_MM) * slope, slope };
}

/** The opening between foot and head, a trapezium; null where there is no room for one. */
export function windowOutline(d: UprightDimensions): Point2[] | null {
  if (d.notchesMm.length > 0) return null;
  const [low, high] = [d.screwSlotMm + 5, d.axisMm - d.headRMm - 2];
  const inside = (y: number) => {
    const { half, slope } = edgeAt(d, y);
    return half - FRAME_MM * Math.hypot(1, slope);
  };
  if (high - low < 15 || inside(high) < 5) return null;
  return [
    [-inside(low), low],
    [inside(low), low],
    [inside(high), high],
    [-inside(high), high],
  ];
}

/** Notches of both edges, each open outwards and down. */
function notchOutlines(d: UprightDimensions): Point2[][] {
  return d.notchesMm.flatMap((y) => {
    const { half } = edgeAt(d, y);
    // Along the slot inwards is up at 45 degrees; its round end is the seat.
    const inner = NOTCH.depthMm * Math.SQRT1_2;
    const right = placed(slotted(NOTCH.widthMm, 2 * NOTCH.depthMm), -45, half - inner, y + inner);
    const [outerRight, outerLeft, ...end] = right.map(([px, py]): Point2 => [-px, py]);
    return [right, [outerLeft!, outerRight!, ...end.toReversed()]];
  });
}

function wordsOf(d: UprightDimensions): Words[] {
  const numbers = d.notchesMm.flatMap((y, i): Words[] => {
    const x = edgeAt(d, y).half - NOTCH.depthMm * Math.SQRT1_2 - 5;
    return [x, -x].map((at) => ({ text: `${i + 1}`, x: at, y: y + 1, heightMm: 3.5, align: 'centre' }));
  });
  return [{ text: d.word, x: 3, y: 6, heightMm: 5, align: 'centre' }, ...numbers];
}

/** Two alike; the face with the arrow looks at the crank, the arrow away from the open side of the bearing. */
export function uprightSolid(record: PartsRecord, d: UprightDimensions, what: What): Solid {
  const { printer } = record;
  const more = printer.holeCompensationMm;
  const outline = uprightOutline(d, more);
  const [hx, hy] = latchHole(d);
  const window = windowOutline(d);
  const cuts: Point2[][] = [circle((M4.holeMm + more) / 2, 'hole', hx, hy), ...(window ? [window] : [])];
  const { dx, dy, minMm, maxMm } = onBed(outline, d.thicknessMm);
  const through = (cut: Point2[]) => prism('opening', [cut], -PROUD_MM, d.thicknessMm + PROUD_MM);
  const lettering = wordsCut('words', wordsOf(d), d.thicknessMm);
  const arrow = { ...lettering, strokes: [...lettering.strokes, ...arrowLeft(d)] };
  return {
    ...what,
    kind: 'stand',
    quantity: 2,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: moved([prism('upright', [outline], 0, d.thicknessMm)], dx, dy),
    cutters: moved<Cutter>([...cuts.map(through), ...tenonEdges(d), arrow], dx, dy),
    expected: {
      bodies: 1,
      genus: window ? 2 : 1,
      genusIs: `the latch's hole${window ? ', the window' : ''}`,
      minMm,
      maxMm,
      volumeMm3: (areaOf(outline) - cuts.reduce((sum, cut) => sum + areaOf(cut), 0)) * d.thicknessMm - cutMm3(arrow),
    },
    printNote: 'print flat, lettering up, no supports; four walls, a third of infill',
  };
}

function arrowLeft(d: UprightDimensions): Point2[][] {
  const y = 8.5;
  const tip = -d.tenonXMm - 6;
  return [
    [
      [tip, y],
      [tip + 10, y],
    ],
    [
      [tip + 3, y + 2.5],
      [tip, y],
      [tip + 3, y - 2.5],
    ],
  ];
}

function tenonEdges(d: UprightDimensions): Cutter[] {
  return [-d.tenonXMm, d.tenonXMm].flatMap((x) => edgeCutters(tenonOutline(d, x), TENON_CHAMFER_MM));
}

/** A bar that turns on a screw across the bearing's open side. */
export function latchSolid({ printer }: PartsRecord, d: LatchDimensions, what: What & { quantity: number }): Solid {
  const outline = hull([...circle(d.radiusMm, 'solid'), ...circle(d.radiusMm, 'solid', d.reachMm, 0)]);
  const hole = circle((M4.holeMm + printer.holeCompensationMm) / 2, 'hole');
  const { dx, dy, minMm, maxMm } = onBed(outline, d.thicknessMm);
  return {
    ...what,
    kind: 'stand',
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: moved([prism('latch', [outline], 0, d.thicknessMm)], dx, dy),
    cutters: moved([prism('hole', [hole], -PROUD_MM, d.thicknessMm + PROUD_MM)], dx, dy),
    expected: {
      bodies: 1,
      genus: 1,
      genusIs: 'the hole',
      minMm,
      maxMm,
      volumeMm3: (areaOf(outline) - areaOf(hole)) * d.thicknessMm,
    },
    printNote: 'print flat, no supports; solid',
  };
}

/** Round outside, six-sided inside: a hexagon would rattle in the bearing. */
export function bushSolid(record: PartsRecord, d: BushDimensions, what: What & { quantity: number }): Solid {
  const { printer } = record;
  const { bore }: Pick<ClampDimensions, 'bore'> = shaftBore(record);
  const [r, f] = [d.outsideMm / 2, d.flangeMm / 2];
  const rows = [
    { rMm: f - 0.4, zMm: 0 },
    { rMm: f, zMm: 0.4 },
    { rMm: f, zMm: d.flangeThicknessMm },
    { rMm: r, zMm: d.flangeThicknessMm },
    { rMm: r, zMm: d.heightMm },
  ];
  const body = turned('bush', rows);
  const reach = turnedReachMm(rows);
  return {
    ...what,
    kind: 'stand',
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [body],
    cutters: [prism('bore', [bore], -PROUD_MM, d.heightMm + PROUD_MM)],
    expected: {
      bodies: 1,
      genus: 1,
      genusIs: 'the bore',
      minMm: [-reach, -reach, 0],
      maxMm: [reach, reach, d.heightMm],
      volumeMm3: turnedMm3(rows) - areaOf(bore) * d.heightMm,
    },
    printNote: 'print on the flange, no supports; solid; file the running surface smooth',
  };
}
