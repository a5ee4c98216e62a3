/** The winding surface of the former rolled out. */
import type { FormerDimensions } from '../../parts/dimensions.ts';
import { postTopMm } from '../../parts/posts.ts';
import type { Hole, PartsRecord } from '../../record/schema.ts';
import type { Polyline } from '../drawing.ts';
import { circle, line, polyline, rectangle } from '../shapes.ts';
import type { Callout, Mark, Span, View } from '../views.ts';
import { said } from '../words.ts';
import { callout, mark, mm, type Point, round, span } from './sizes.ts';

type Shapes = View['shapes'][number];

/** The winding surface rolled out, the start hole's line at x = 0. */
export function developed(d: FormerDimensions, record: PartsRecord): View {
  const half = Math.PI * d.outsideR;
  const x = (angleDeg: number) => ((((angleDeg + 180) % 360) + 360) % 360) * (half / 180) - half;
  const [low, high] = [d.surfaceFromMm, d.surfaceToMm];
  const winding = record.windings[0]!;
  const shapes: Shapes[] = [
    rectangle(-half, low, 2 * half, high - low, 'outline'),
    line(0, low, 0, high, 'hair', 'centre'),
    ...rolled(d, 0, Math.min(1, winding.turns), 0, x),
    ...(winding.turns > 1 ? rolled(d, winding.turns - 1, winding.turns, 0, x) : []),
    ...d.ridges.flatMap((ridge) =>
      [0, ridge.widthMm].flatMap((up) => rolled(d, ridge.fromTurn, ridge.toTurn, ridge.footMm + up, x, 'thin')),
    ),
    ...d.former.posts.map((post) =>
      rectangle(x(post.angleDeg) - post.widthMm / 2, low, post.widthMm, postTopMm(d, post) - low, 'thin'),
    ),
    ...d.holes.map((hole) =>
      circle(x(hole.angleDeg), hole.axialMm, hole.diameterMm / 2, 'thin', undefined, `hole ${hole.label}`),
    ),
  ];
  const dimensions: (Span | Callout | Mark)[] = [
    span('x', [-half, low], [half, low], 'below', mm(2 * half)),
    span('y', [half, low], [half, high], 'right', mm(high - low)),
    ...holeSizes(d.holes, x),
    ...d.holes.map((hole) => mark([x(hole.angleDeg) + hole.diameterMm / 2, hole.axialMm], hole.label)),
    ...d.former.posts.map((post) => mark([x(post.angleDeg) + post.widthMm / 2, post.axialMm], post.label)),
  ];
  return { title: 'developed surface', shapes, dimensions };
}

/** One callout a size of hole, at the first of it. */
export function holeSizes(holes: readonly Hole[], x: (angleDeg: number) => number): Callout[] {
  const sizes = [...new Set(holes.map((hole) => hole.diameterMm))];
  return sizes.map((size) => {
    const alike = holes.filter((hole) => hole.diameterMm === size);
    const first = alike[0]!;
    const many = alike.length > 1 ? `${alike.length} x ` : '';
    return callout([x(first.angleDeg), first.axialMm], 'left', said`${many}${round(size)}`);
  });
}

/** A run of turns on the developed surface, cut where it passes the edge. */
function rolled(
  d: FormerDimensions,
  from: number,
  to: number,
  upMm: number,
  x: (angleDeg: number) => number,
  weight: 'hair' | 'thin' = 'hair',
): Polyline[] {
  const sense = d.hand === 'right' ? 360 : -360;
  const runs: Point[][] = [[]];
  const steps = Math.max(8, Math.ceil((to - from) * 48));
  for (let i = 0; i <= steps; i++) {
    const turn = from + ((to - from) * i) / steps;
    const point: Point = [x(turn * sense), d.axialMm(turn) + upMm];
    const last = runs.at(-1)!.at(-1);
    if (last && Math.abs(last[0] - point[0]) > d.outsideR) runs.push([]);
    runs.at(-1)!.push(point);
  }
  return runs.filter((points) => points.length > 1).map((points) => polyline(points, weight));
}
