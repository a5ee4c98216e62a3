/** Views of the pitch comb. */
import { combDimensions, combOutline } from '../../parts/comb.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { said } from '../words.ts';
import { across, box, callout, outline, size, upright } from './strokes.ts';

/** @throws Fault (exit 4) as `combDimensions` */
export function combViews(record: PartsRecord): Record<string, View[]> {
  const d = combDimensions(record);
  const half = d.lengthMm / 2;
  const step = d.everyTurns * d.pitchMm;
  const span = (d.teeth - 1) * step;
  const floor = d.heightMm - d.notchDepthMm;
  const plan: View = {
    title: 'plan',
    shapes: [outline(combOutline(d))],
    dimensions: [
      across(d.goFromMm, d.goFromMm + d.goMm, d.heightMm, 'above', said`go ${size(d.goMm)}`),
      across(d.noGoFromMm, d.noGoFromMm + d.noGoMm, d.heightMm, 'above', said`no go ${size(d.noGoMm)}`),
      across(-span / 2, span / 2, 0, 'below', said`${d.teeth - 1} x ${size(step)} = ${size(span)}`),
      across(-half, half, 0, 'below'),
      upright(0, d.heightMm, -half, 'left'),
      upright(floor, d.heightMm, half, 'right'),
      callout(
        -span / 2,
        d.toothLengthMm / 2,
        'left',
        said`teeth ${size(d.toothMm)} wide, ${size(d.toothLengthMm)} long`,
      ),
    ],
  };
  const elevation: View = {
    title: 'elevation',
    shapes: [box(-half, 0, d.lengthMm, d.plateMm)],
    dimensions: [upright(0, d.plateMm, -half, 'left')],
  };
  return { comb: [plan, elevation] };
}
