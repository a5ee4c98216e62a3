/** Views of the carriage: the rail with its scale, plug and hub. */
import { scaleStrokes } from '../../parts/carriage.ts';
import {
  type CarriageDimensions,
  carriageDimensions,
  type Disc,
  discOutline,
} from '../../parts/carriage-dimensions.ts';
import type { PartsRecord } from '../../record/schema.ts';
import { polyline } from '../shapes.ts';
import type { View } from '../views.ts';
import { said } from '../words.ts';
import { across, box, callout, outline, size, upright } from './strokes.ts';

/** @throws Fault (exit 4) as `carriageDimensions` */
export function carriageViews(record: PartsRecord): Record<string, View[]> {
  const d = carriageDimensions(record);
  return { 'carriage-rail': railViews(d), 'carriage-plug': discViews(d.plug), 'carriage-hub': discViews(d.hub) };
}

/** From its end in the plug to the right, as it lies on the bed. */
function railViews(d: CarriageDimensions): View[] {
  const { rail, marks, out } = d;
  const half = rail.widthMm / 2;
  const { ticks, figures } = scaleStrokes(d);
  // Along the rail from the frame of the strokes; ticks end at the edge.
  const seen = ([x, y]: readonly [number, number]): [number, number] => [out * y, Math.min(half, -out * x)];
  const edge = (points: [number, number][]) => points.map(([x, y]): [number, number] => [x, Math.max(-half, y)]);
  const numbered = marks.filter(({ text }) => text !== null);
  const ends = [numbered[0], numbered.at(-1)].filter((each, i, all) => each !== undefined && all.indexOf(each) === i);
  return [
    {
      title: 'plan',
      shapes: [
        box(0, -half, rail.lengthMm, rail.widthMm),
        ...[...ticks, ...figures].map((line) => polyline(edge(line.map(seen)), 'thin')),
      ],
      dimensions: [
        ...ends.map((each) => across(0, each!.atMm, half, 'above', said`to ${each!.text!}: ${size(each!.atMm)}`)),
        across(0, rail.lengthMm, -half, 'below'),
        upright(-half, half, 0, 'left'),
      ],
    },
    {
      title: 'elevation',
      shapes: [box(0, 0, rail.lengthMm, rail.heightMm)],
      dimensions: [upright(0, rail.heightMm, rail.lengthMm, 'right')],
    },
  ];
}

function discViews(disc: Disc): View[] {
  const { armR, coreR, depthMm, slotWidthMm, slotDepthMm } = disc;
  return [
    {
      title: 'plan',
      shapes: [outline(discOutline(disc)), box(-slotWidthMm / 2, -slotDepthMm / 2, slotWidthMm, slotDepthMm)],
      dimensions: [
        across(-armR, armR, 0, 'above', said`dia ${size(2 * armR)}`),
        across(-slotWidthMm / 2, slotWidthMm / 2, -slotDepthMm / 2, 'below'),
        upright(-slotDepthMm / 2, slotDepthMm / 2, slotWidthMm / 2, 'right'),
        callout(-coreR * Math.SQRT1_2, -coreR * Math.SQRT1_2, 'left', said`dia ${size(2 * coreR)}`),
      ],
    },
    {
      title: 'elevation',
      shapes: [box(-armR, 0, 2 * armR, depthMm)],
      dimensions: [upright(0, depthMm, armR, 'right')],
    },
  ];
}
