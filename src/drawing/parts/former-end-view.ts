/** The former from above. */
import type { FormerDimensions } from '../../parts/dimensions.ts';
import { EAR_ROOT_CHORDS, earOutline } from '../../parts/holes.ts';
import { circle, line, polygon, polyline } from '../shapes.ts';
import type { Callout, Mark, Span, View } from '../views.ts';
import { said } from '../words.ts';
import { callout, degrees, mark, mm, type Point, round, span } from './sizes.ts';

const RAD = Math.PI / 180;
type Shapes = View['shapes'][number];

/** From above, the start hole at the bottom, angles counterclockwise. */
function fromAbove(angleDeg: number, r: number): Point {
  return [r * Math.sin(angleDeg * RAD), -r * Math.cos(angleDeg * RAD)];
}

export function endView(d: FormerDimensions): View {
  const { former } = d;
  const shapes: Shapes[] = [
    circle(0, 0, d.boreR, 'outline'),
    circle(0, 0, d.topR, 'outline'),
    line(-4, 0, 4, 0, 'hair', 'centre'),
    line(0, -4, 0, 4, 'hair', 'centre'),
  ];
  if (d.topR > d.outsideR) shapes.push({ ...circle(0, 0, d.outsideR, 'hair'), dash: 'dashed' });
  if (d.footR > d.topR) shapes.push(circle(0, 0, d.footR, 'outline'));
  for (const ear of former.ears) {
    const outline = earOutline(ear, d.footR, 0);
    // From root to root round the end: the edge along the foot belongs to the foot.
    const points = [...outline.slice(EAR_ROOT_CHORDS), outline[0]!];
    shapes.push(
      polyline(
        points.map(([x, y]) => fromAbove(ear.angleDeg + Math.atan2(y, x) / RAD, Math.hypot(x, y))),
        'outline',
      ),
    );
  }
  for (const screw of d.screws) {
    const [x, y] = fromAbove(screw.angleDeg, screw.radiusMm);
    shapes.push(circle(x, y, screw.diameterMm / 2, 'outline', undefined, 'screw hole'));
  }
  if (d.screws.length > 2) shapes.push({ ...circle(0, 0, d.screws[0]!.radiusMm, 'hair'), dash: 'centre' });
  const hidden = d.topR > d.outsideR;
  for (const post of former.posts)
    shapes.push(
      polygon(
        [
          [d.outsideR, -post.widthMm / 2],
          [d.outsideR + post.reachMm, -post.widthMm / 2],
          [d.outsideR + post.reachMm, post.widthMm / 2],
          [d.outsideR, post.widthMm / 2],
        ].map(([x, y]) => fromAbove(post.angleDeg + Math.atan2(y!, x!) / RAD, Math.hypot(x!, y!))),
        'thin',
        undefined,
        hidden ? 'dashed' : 'solid',
      ),
    );
  const { datumMark } = former;
  if (datumMark) {
    const half = Math.asin(datumMark.widthMm / 2 / d.footR) / RAD;
    const notch = [
      fromAbove(datumMark.angleDeg - half, d.footR),
      fromAbove(datumMark.angleDeg, d.footR - datumMark.depthMm),
      fromAbove(datumMark.angleDeg + half, d.footR),
    ];
    shapes.push(polyline(notch, 'thin'));
  }
  return { title: 'end view', shapes, dimensions: endSizes(d) };
}

function endSizes(d: FormerDimensions): View['dimensions'] {
  const { former } = d;
  const wall = fromAbove(135, (d.outsideR + d.boreR) / 2);
  const dimensions: (Span | Callout | Mark)[] = [
    span('x', [-d.boreR, 0], [d.boreR, 0], 'above', round(2 * d.boreR)),
    callout(wall, 'right', said`wall ${mm(former.wallMm)}`),
  ];
  const [screw] = d.screws;
  if (screw) {
    const at = d.screws.map(({ angleDeg }) => degrees(angleDeg)).join(', ');
    const text = said`${d.screws.length} x ${round(screw.diameterMm)} on ${round(2 * screw.radiusMm)}, at ${at}`;
    dimensions.push(callout(fromAbove(screw.angleDeg, screw.radiusMm), 'right', text));
  }
  const [post] = former.posts;
  if (post) {
    dimensions.push(
      callout(
        fromAbove(post.angleDeg, d.outsideR + post.reachMm),
        'below',
        said`${former.posts.length} posts ${mm(post.widthMm)} wide, out ${mm(post.reachMm)}, eye ${round(post.eyeMm)}`,
      ),
    );
    for (const each of former.posts)
      dimensions.push(mark(fromAbove(each.angleDeg, Math.max(d.topR, d.footR) + 2), each.label));
  }
  if (former.datumMark)
    dimensions.push(
      callout(
        fromAbove(former.datumMark.angleDeg, d.footR),
        'below',
        `datum mark ${degrees(former.datumMark.angleDeg)}`,
      ),
    );
  return dimensions;
}
