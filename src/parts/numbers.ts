/**
 * Tap numbers on the upper rim, cut into its face. They read from outside: the foot of a figure is towards the edge, and
 * figures run counterclockwise, as the angle does. A tick through the edge marks each true angle.
 */
import { Fault } from '../fault.ts';
import type { FormerDimensions } from './dimensions.ts';
import { type Placement, placeLabels } from './labels.ts';
import { glyph } from './lettering.ts';
import { BED, type Engraving, type Point2 } from './solid.ts';

const RAD = Math.PI / 180;
const STROKE_MM = 0.6;
const DEPTH_MM = 0.6;
/** Plain face that stays between a tick and its figure, and inside the figure. */
const CLEAR_MM = 0.5;
const TICK_MM = 1.2;
/** Figures lower than this close up in the print (two strokes and a space between). */
const LEAST_HEIGHT_MM = 2;

interface Face {
  readonly innerR: number;
  readonly outerR: number;
  readonly strokeMm: number;
  readonly heightMm: number;
  /** Radius of the figures' foot line. */
  readonly footR: number;
  readonly middleR: number;
}

/** Nothing when there is no upper rim to cut into. @throws Fault when the figures cannot be made to fit on it. */
export function numberCutters(d: FormerDimensions): Engraving[] {
  const { former } = d;
  if (!former.flange || former.numbers.length === 0 || d.topR <= d.outsideR) return [];
  const { face, placement } = chooseHeight(d);
  const strokes: Point2[][] = [];
  for (const text of placement.texts) {
    for (const deg of text.ticksDeg) strokes.push(radial(deg, face.outerR + 1, face.outerR - TICK_MM));
    strokes.push(...textStrokes(text.text, text.angleDeg, face));
    if (text.ticksDeg.length > 1) strokes.push(bracket(text.ticksDeg, face.outerR - TICK_MM));
  }
  return [
    {
      kind: 'engraving',
      name: 'numbers',
      zMm: d.lengthMm,
      depthMm: Math.min(DEPTH_MM, former.flange.upperMm / 3),
      widthMm: face.strokeMm,
      strokes,
      frame: BED,
    },
  ];
}

/** The greatest height at which no number is left out, else the one that leaves out and joins the fewest. */
function chooseHeight(d: FormerDimensions): { face: Face; placement: Placement } {
  let best: { face: Face; placement: Placement } | null = null;
  const cost = (p: Placement) => p.leftOut * 100 + p.joined;
  const room = d.topR - d.boreR - TICK_MM - 2 * CLEAR_MM - STROKE_MM;
  const most = Math.min(d.former.numberHeightMm, room);
  for (let height = most; height >= LEAST_HEIGHT_MM - 1e-9; height -= 0.2) {
    const face = faceFor(d, height);
    const placement = placeLabels(d.former.numbers, {
      radiusMm: face.middleR,
      tickGapMm: 2 * face.strokeMm,
      moveMm: 2,
      gapMm: face.strokeMm + 1.6,
      widthMm: (text) => textWidth(text, face),
    });
    if (placement && (!best || cost(placement) < cost(best.placement))) best = { face, placement };
  }
  if (best) return best;
  throw new Fault(4, {
    code: 'former-numbers-no-room',
    got: `${d.former.numbers.length} numbers of ${most.toFixed(1)} mm on a rim ${(d.topR - d.boreR).toFixed(1)} mm wide`,
    expected: `figures at least ${LEAST_HEIGHT_MM} mm high`,
    todo: 'make the flange wider, or leave the flange or the numbers out',
  });
}

function faceFor(d: FormerDimensions, heightMm: number): Face {
  const strokeMm = Math.min(STROKE_MM, heightMm / 4);
  const footR = d.topR - TICK_MM - CLEAR_MM - strokeMm;
  return { innerR: d.boreR, outerR: d.topR, strokeMm, heightMm, footR, middleR: footR - heightMm / 2 };
}

const spaceMm = (face: Face) => face.strokeMm + 0.45;

function textWidth(text: string, face: Face): number {
  const glyphs = [...text].map(glyph);
  const figures = glyphs.reduce((sum, g) => sum + g.width * face.heightMm, 0);
  return figures + Math.max(0, glyphs.length - 1) * spaceMm(face);
}

/** Each figure stands upright on its own radius, so that long texts follow the rim. */
function textStrokes(text: string, middleDeg: number, face: Face): Point2[][] {
  const strokes: Point2[][] = [];
  let along = -textWidth(text, face) / 2;
  for (const char of text) {
    const { strokes: lines, width } = glyph(char);
    const widthMm = width * face.heightMm;
    const deg = middleDeg + (along + widthMm / 2) / face.middleR / RAD;
    const c = Math.cos(deg * RAD);
    const s = Math.sin(deg * RAD);
    for (const line of lines)
      strokes.push(
        line.map(([x, y]): Point2 => {
          const across = x * face.heightMm - widthMm / 2;
          const r = face.footR - y * face.heightMm;
          return [r * c - across * s, r * s + across * c];
        }),
      );
    along += widthMm + spaceMm(face);
  }
  return strokes;
}

function radial(deg: number, from: number, to: number): Point2[] {
  const c = Math.cos(deg * RAD);
  const s = Math.sin(deg * RAD);
  return [
    [from * c, from * s],
    [to * c, to * s],
  ];
}

/** Ties the ticks of a joined text together along their inner ends. */
function bracket(ticksDeg: readonly number[], r: number): Point2[] {
  const from = ticksDeg[0]!;
  const to = ticksDeg[ticksDeg.length - 1]!;
  const n = Math.max(1, Math.ceil((to - from) / 5));
  return Array.from({ length: n + 1 }, (_, i) => {
    const a = (from + ((to - from) * i) / n) * RAD;
    return [r * Math.cos(a), r * Math.sin(a)];
  });
}
