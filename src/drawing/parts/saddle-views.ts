/** Views of the drill saddle, every piece with its developed outside: heights from the tube's lower end. */
import { notchesDeg, saddleOutline } from '../../parts/saddle.ts';
import { type SaddleDimensions, saddleDimensions } from '../../parts/saddle-dimensions.ts';
import { HALF_NOTCH_MM, NOTCH_MM, type SaddlePiece } from '../../parts/saddle-pieces.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { Line, Polyline } from '../drawing.ts';
import type { Mark, View } from '../views.ts';
import { said, worded } from '../words.ts';
import { across, box, callout, hidden, outline, round, size, upright } from './strokes.ts';

const RAD = Math.PI / 180;

/** @throws Fault (exit 4) as `saddleDimensions` */
export function saddleViews(record: PartsRecord): Record<string, View[]> {
  const d = saddleDimensions(record);
  return Object.fromEntries(
    d.pieces.map((piece) => [piece.part, [elevation(d, piece), endView(d, piece), developed(d, piece)]]),
  );
}

/** Seen from the outside, its middle in front. */
function elevation(d: SaddleDimensions, { fromMm, toMm, rim }: SaddlePiece): View {
  const r = d.outsideR;
  return {
    title: 'elevation',
    shapes: [
      box(-r, fromMm, 2 * r, toMm - fromMm),
      ...(rim
        ? [
            hidden([
              [-r, 0],
              [r, 0],
            ]),
          ]
        : []),
    ],
    dimensions: [
      across(-r, r, fromMm, 'below'),
      upright(fromMm, toMm, -r, 'left'),
      ...(rim ? [upright(fromMm, 0, r, 'right'), callout(0, 0, 'right', 'lower end of the tube')] : []),
    ],
  };
}

/** From above, the middle to the right. */
function endView(d: SaddleDimensions, { rim }: SaddlePiece): View {
  const rimArc: Polyline = {
    shape: 'polyline',
    weight: 'thin',
    points: saddleOutline(d, d.rimR).filter(([x, y]) => Math.hypot(x, y) < d.insideR),
  };
  return {
    title: 'end view',
    shapes: [outline(saddleOutline(d, d.insideR)), ...(rim ? [rimArc] : [])],
    dimensions: [
      callout(d.insideR, 0, 'right', said`inside dia ${size(2 * d.insideR)}, wall ${size(d.wallMm)}`),
      callout(0, d.outsideR, 'above', `covers ${(2 * d.halfSweepDeg).toFixed(1)} degrees`),
      ...(rim
        ? [callout(d.rimR * Math.cos(1), -d.rimR * Math.sin(1), 'below', said`rim inside dia ${size(2 * d.rimR)}`)]
        : []),
    ],
  };
}

/** Seen from outside: to the right is counterclockwise seen from above. */
function developed(d: SaddleDimensions, piece: SaddlePiece): View {
  const { fromMm, toMm, guides } = piece;
  const u = (deg: number) => d.outsideR * deg * RAD;
  const half = u(d.halfSweepDeg);
  const heights = guides.map(({ hole }) => hole.axialMm);
  const middle: Line = { shape: 'line', weight: 'thin', dash: 'centre', x1: 0, y1: fromMm, x2: 0, y2: toMm };
  return {
    title: 'developed surface',
    shapes: [
      box(-half, fromMm, 2 * half, toMm - fromMm),
      middle,
      ...guides.map(({ hole, diameterMm, turnDeg }) =>
        round(u(turnDeg), hole.axialMm, diameterMm / 2, `guide ${hole.label}`),
      ),
      ...notchesDeg(d, piece).map(
        (deg): Polyline => ({
          shape: 'polyline',
          weight: 'outline',
          points: [
            [u(deg) - HALF_NOTCH_MM, toMm],
            [u(deg), toMm - NOTCH_MM],
            [u(deg) + HALF_NOTCH_MM, toMm],
          ],
        }),
      ),
    ],
    dimensions: [
      ...(heights.length > 0
        ? [
            upright(Math.max(0, fromMm), Math.min(...heights), -half, 'left'),
            upright(Math.max(0, fromMm), Math.max(...heights), half, 'right'),
          ]
        : []),
      callout(0, toMm, 'above', `${Number((((piece.middleDeg % 360) + 360) % 360).toFixed(2))} degrees`),
      ...guides.map(
        ({ hole, turnDeg }): Mark => ({
          kind: 'mark',
          at: [u(turnDeg), hole.axialMm],
          ...worded(said`${hole.label} dia ${size(hole.diameterMm)}`),
        }),
      ),
    ],
  };
}
