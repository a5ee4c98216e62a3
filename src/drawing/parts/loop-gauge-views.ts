/** Views of the tap-loop gauge. */
import { loopGaugeDimensions } from '../../parts/loop-gauge.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { mmText, said } from '../words.ts';
import { across, box, callout, outline, round, size, upright } from './strokes.ts';

/** @throws Fault (exit 4) as `loopGaugeDimensions` */
export function loopGaugeViews(record: PartsRecord): Record<string, View[]> {
  const d = loopGaugeDimensions(record);
  const half = d.widthMm / 2;
  const edge = d.lanes.flatMap(({ yMm }): [number, number][] => [
    [0, yMm - d.slotMm / 2],
    [d.slotDepthMm, yMm - d.slotMm / 2],
    [d.slotDepthMm, yMm + d.slotMm / 2],
    [0, yMm + d.slotMm / 2],
  ]);
  const plan: View = {
    title: 'plan',
    shapes: [
      outline([[0, -half], ...edge, [0, half], [d.lengthMm, half], [d.lengthMm, -half]]),
      ...d.lanes.map(({ pegMm, yMm, halfMm }) => round(pegMm, yMm, d.pegR, `peg ${mmText(halfMm)}`)),
    ],
    dimensions: [
      ...d.lanes.map(({ pegMm, yMm, halfMm }) =>
        across(0, pegMm, yMm, 'above', said`loop ${mmText(halfMm)}: ${size(pegMm)}`),
      ),
      across(0, d.lengthMm, -half, 'below'),
      upright(-half, half, 0, 'left'),
      callout(d.lanes[0]!.pegMm, d.lanes[0]!.yMm, 'right', said`pegs dia ${size(2 * d.pegR)}`),
    ],
  };
  const top = d.plateMm + d.pegHeightMm;
  const elevation: View = {
    title: 'elevation',
    shapes: [
      box(0, 0, d.lengthMm, d.plateMm),
      ...d.lanes.map(({ pegMm }) => box(pegMm - d.pegR, d.plateMm, 2 * d.pegR, d.pegHeightMm)),
    ],
    dimensions: [upright(0, d.plateMm, 0, 'left'), upright(0, top, d.lengthMm, 'right')],
  };
  return { 'loop-gauge': [plan, elevation] };
}
