/** Views of what the second winding is wound on: elevation with its turns hinted at, end view, and the surface rolled out with the holes. */
import { secondSkin } from '../../parts/second.ts';
import { type SecondDimensions, secondDimensions } from '../../parts/second-dimensions.ts';
import type { PartsRecord } from '../../record/schema.ts';
import { circle, line, polygon, rectangle } from '../shapes.ts';
import type { View } from '../views.ts';
import { said } from '../words.ts';
import { callout, mark, mm, type Point, round, span } from './sizes.ts';
import { across, round as ring, size, upright } from './strokes.ts';

const RAD = Math.PI / 180;

/** @throws Fault (exit 4) as `secondDimensions` */
export function secondViews(record: PartsRecord): Record<string, View[]> {
  const d = secondDimensions(record);
  return { [d.part]: [elevation(d), endView(d), developed(d)] };
}

/** Seen from the side on which the holes are. */
function elevation(d: SecondDimensions): View {
  const r = d.outsideMm / 2;
  const rim = r + d.rimMm;
  const { outer } = secondSkin(d);
  const right = outer.map(({ rMm, zMm }): Point => [rMm, zMm]);
  const left = right.map(([x, z]): Point => [-x, z]).reverse();
  const front = d.holes.find(({ label }) => label === 'P1')?.angleDeg ?? 0;
  const turns = [...new Set([d.firstTurnMm, d.lastTurnMm])];
  return {
    title: 'elevation',
    shapes: [
      polygon([...right, ...left], 'outline'),
      ...outer.slice(1, -1).map(({ rMm, zMm }) => line(-rMm, zMm, rMm, zMm, 'hair')),
      ...turns.map((z) => line(-r, z, r, z, 'hair', 'dashed')),
      ...d.holes.map(({ label, angleDeg, zMm, diameterMm }) =>
        circle(r * Math.sin((angleDeg - front) * RAD), zMm, diameterMm / 2, 'thin', 1, `hole ${label}`),
      ),
      line(0, -3, 0, d.lengthMm + 3, 'hair', 'centre'),
    ],
    dimensions: [
      upright(0, d.lengthMm, -rim, 'left'),
      ...d.holes
        .filter(({ label }) => label === 'P1' || label === 'P2')
        .map(({ zMm }) => span('y', [r, 0], [r, zMm], 'right', mm(zMm))),
      across(-r, r, d.lengthMm / 2, 'below', round(d.outsideMm)),
      ...(d.rimMm > 0 ? [across(-rim, rim, d.lengthMm, 'above', round(2 * rim))] : []),
    ],
  };
}

function endView(d: SecondDimensions): View {
  const r = d.outsideMm / 2;
  return {
    title: 'end view',
    shapes: [
      ring(0, 0, r + d.rimMm),
      ...(d.rimMm > 0 ? [circle(0, 0, r, 'thin')] : []),
      ring(0, 0, d.insideMm / 2, 'bore'),
    ],
    dimensions: [
      across(-d.insideMm / 2, d.insideMm / 2, 0, 'below', round(d.insideMm)),
      callout([r * Math.SQRT1_2, r * Math.SQRT1_2], 'right', said`wall ${size((d.outsideMm - d.insideMm) / 2)}`),
    ],
  };
}

/** The line of P1 and P2 at x = 0. */
function developed(d: SecondDimensions): View {
  const half = (Math.PI * d.outsideMm) / 2;
  const front = d.holes.find(({ label }) => label === 'P1')?.angleDeg ?? 0;
  const x = (angleDeg: number) => ((((angleDeg - front + 180) % 360) + 360) % 360) * (half / 180) - half;
  const [from, to] = [d.lowerRim?.toMm ?? 0, d.upperRim?.slopeFromMm ?? d.lengthMm];
  const tie = d.holes.find(({ label }) => label === 'P1a');
  return {
    title: 'developed surface',
    shapes: [
      rectangle(-half, 0, 2 * half, d.lengthMm, 'outline'),
      ...[from, to].filter((z) => z > 0 && z < d.lengthMm).map((z) => line(-half, z, half, z, 'hair')),
      ...[d.firstTurnMm, d.lastTurnMm].map((z) => line(-half, z, half, z, 'hair', 'dashed')),
      ...d.holes.map(({ label, angleDeg, zMm, diameterMm }) =>
        circle(x(angleDeg), zMm, diameterMm / 2, 'thin', undefined, `hole ${label}`),
      ),
    ],
    dimensions: [
      span('x', [-half, 0], [half, 0], 'below', mm(2 * half)),
      ...(tie === undefined
        ? []
        : [
            span('y', [half, 0], [half, tie.zMm], 'right', mm(tie.zMm)),
            span(
              'x',
              [Math.min(0, x(tie.angleDeg)), d.lengthMm],
              [Math.max(0, x(tie.angleDeg)), d.lengthMm],
              'above',
              mm(Math.abs(x(tie.angleDeg))),
            ),
          ]),
      ...d.holes.map(({ label, angleDeg, zMm, diameterMm }) => mark([x(angleDeg) + diameterMm / 2, zMm], label)),
      callout(
        [x(d.holes[0]!.angleDeg), d.holes[0]!.zMm],
        'left',
        said`${d.holes.length} x ${round(d.holes[0]!.diameterMm)}`,
      ),
    ],
  };
}
