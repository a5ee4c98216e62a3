/**
 * Views of a ribbed former: from outside with the start hole in front, from above with it at the bottom, the circle over the ribs
 * developed, and a section along the start rib. Sizes are those that should come out.
 */
import {
  gableMm,
  type RibbedDimensions,
  ribAngleDeg,
  ribbedDimensions,
  ringFootMm,
} from '../../parts/ribbed-dimensions.ts';
import { endRings, ribOutline } from '../../parts/ribbed-shapes.ts';
import { ribName } from '../../record/rib-name.ts';
import type { PartsRecord } from '../../record/schema.ts';
import { circle, line, polygon, polyline, rectangle } from '../shapes.ts';
import type { Callout, Mark, Span, View } from '../views.ts';
import { said } from '../words.ts';
import { developed } from './former-developed.ts';
import { endView } from './former-end-view.ts';
import { callout, degrees, mark, mm, type Point, round, span } from './sizes.ts';

const RAD = Math.PI / 180;
type Shapes = View['shapes'][number];

/** The views by part; none of a full body. */
export function ribbedViews(record: PartsRecord): Record<string, View[]> {
  if (record.former.ribs === null) return {};
  const d = ribbedDimensions({ ...record, printer: { ...record.printer, holeCompensationMm: 0 } });
  return { former: [elevation(d, record), fromAbove(d), rolledOut(d, record), alongRib(d, record)] };
}

/** Seen from outside: a place at a distance from the axis at an angle, and `t` beside it the way angles grow. */
const seen = (angleDeg: number, r: number, t = 0) => r * Math.sin(angleDeg * RAD) + t * Math.cos(angleDeg * RAD);
const inFront = (angleDeg: number) => Math.cos(angleDeg * RAD) > 1e-6;

function elevation(d: RibbedDimensions, record: PartsRecord): View {
  const { lengthMm } = d;
  const shapes: Shapes[] = [
    ...endRings(d).map(({ outer }) => {
      const right = outer.map(({ rMm, zMm }): Point => [rMm, zMm]);
      return polygon([...right, ...right.map(([r, z]): Point => [-r, z]).reverse()], 'outline');
    }),
    ...ribsSeen(d),
    ...ringsSeen(d),
    ...turnsSeen(d, record),
    ...d.former.ears.map((ear) => {
      const x = seen(ear.angleDeg, ear.centreRadiusMm);
      return rectangle(x - ear.widthMm / 2, 0, ear.widthMm, ear.thicknessMm, 'outline');
    }),
    ...d.holes
      .filter((hole) => inFront(hole.angleDeg))
      .map((hole) =>
        circle(seen(hole.angleDeg, d.outsideR), hole.axialMm, hole.diameterMm / 2, 'thin', 1, `hole ${hole.label}`),
      ),
    line(0, -3, 0, lengthMm + 3, 'hair', 'centre'),
  ];
  return { title: 'elevation', shapes, dimensions: elevationSizes(d, record) };
}

/** Outer faces of the ribs in front, and the edges of the sides that are seen. */
function ribsSeen(d: RibbedDimensions): Shapes[] {
  const half = d.ribs.widthMm / 2;
  const top = d.ribs.seatMm + d.outsideR - d.seatR;
  return d.notchesMm.flatMap((_, rib): Shapes[] => {
    const a = ribAngleDeg(d, rib);
    if (!inFront(a)) return [];
    const [left, right] = [seen(a, d.outsideR, -half), seen(a, d.outsideR, half)];
    const inner = Math.sin(a * RAD) > 0 ? seen(a, d.ribInnerR, -half) : seen(a, d.ribInnerR, half);
    const hidden = inner > left && inner < right;
    return [
      rectangle(left, d.surfaceFromMm, right - left, top - d.surfaceFromMm, 'outline'),
      ...(hidden ? [] : [line(inner, d.surfaceFromMm, inner, d.ribs.seatMm, 'hair')]),
    ];
  });
}

/** The flats of inner rings in front. */
function ringsSeen(d: RibbedDimensions): Shapes[] {
  const { count, innerRings } = d.ribs;
  const gable = gableMm(d, d.ringOuterA);
  const spans = Array.from({ length: count }, (_, i) => ((2 * i + 1) * 180) / count).filter(inFront);
  return innerRings.topsMm.flatMap((top) =>
    spans.flatMap((a) => {
      const at = (t: number, z: number): Point => [seen(a, d.ringOuterA, t), z];
      const foot = ringFootMm(d, top);
      return [
        polyline([at(-gable, foot), at(0, foot + gable), at(gable, foot)], 'thin'),
        polyline([at(-gable, Math.min(top, d.ribs.seatMm)), at(gable, Math.min(top, d.ribs.seatMm))], 'thin'),
      ];
    }),
  );
}

/** The first turn and the last, straight from rib to rib, as far as they are in front. */
function turnsSeen(d: RibbedDimensions, record: PartsRecord): Shapes[] {
  const { turns } = record.windings[0]!;
  const { count } = d.ribs;
  const sense = d.hand === 'right' ? 360 : -360;
  const runs = [0, Math.max(0, Math.ceil(turns - 1) * count)];
  return runs.flatMap((from) =>
    Array.from({ length: count }, (_, i) => [(from + i) / count, (from + i + 1) / count] as const)
      .filter(([a, b]) => b <= turns + 1e-6 && inFront(((a + b) / 2) * sense))
      .map(([a, b]) =>
        polyline(
          [a, b].map((turn): Point => [seen(turn * sense, d.outsideR), d.axialMm(turn)]),
          'hair',
        ),
      ),
  );
}

function elevationSizes(d: RibbedDimensions, record: PartsRecord): View['dimensions'] {
  const winding = record.windings[0]!;
  const { lengthMm, outsideR: r, notch, ribs } = d;
  const low = lengthMm - d.former.flange!.upperMm;
  const waist = (d.surfaceFromMm + ribs.seatMm) / 2;
  const inner = ribs.innerRings.topsMm.slice(0, -1);
  return [
    span('y', [-d.footR, 0], [-d.footR, d.surfaceFromMm], 'left', mm(d.surfaceFromMm)),
    ...inner.map((top) => span('y', [-r, 0], [-r, top], 'left', mm(top))),
    span('y', [-d.footR, 0], [-d.topR, lengthMm], 'left', mm(lengthMm)),
    span('y', [d.topR, low], [d.topR, lengthMm], 'right', mm(lengthMm - low)),
    span('y', [r, 0], [r, d.axialMm(0)], 'right', mm(d.axialMm(0))),
    span('y', [r, 0], [r, winding.finishMm], 'right', mm(winding.finishMm)),
    span('x', [-d.topR, lengthMm], [d.topR, lengthMm], 'above', round(2 * d.topR)),
    span('x', [-r, waist], [r, waist], 'below', said`${round(2 * r)} over the ribs`),
    ...(d.former.base ? [span('x', [-d.footR, 0], [d.footR, 0], 'below', round(2 * d.footR))] : []),
    callout(
      [seen(0, r, ribs.widthMm / 2), d.axialMm(Math.floor(winding.turns / 2))],
      'right',
      said`notches ${mm(notch.depthMm)} deep, floor ${mm(notch.floorMm)}, pitch ${mm(winding.pitchMm)}`,
    ),
  ];
}

/** The end view of any former, with ribs and inner rings under the upper end ring and their numbers on it. */
function fromAbove(d: RibbedDimensions): View {
  const { shapes } = endView(d);
  const { count, widthMm, depthMm } = d.ribs;
  const place = (angleDeg: number, r: number, t = 0): Point => [
    r * Math.sin(angleDeg * RAD) + t * Math.cos(angleDeg * RAD),
    -r * Math.cos(angleDeg * RAD) + t * Math.sin(angleDeg * RAD),
  ];
  const half = widthMm / 2;
  const hidden = (points: readonly Point[]) => polygon(points, 'hair', undefined, 'dashed');
  const flats = (flat: number) =>
    hidden(Array.from({ length: count }, (_, i) => place((360 * i) / count, flat / Math.cos(Math.PI / count))));
  const ribs = d.notchesMm.map((_, rib) => {
    const a = ribAngleDeg(d, rib);
    return hidden([
      place(a, d.ribInnerR, -half),
      place(a, d.outsideR, -half),
      place(a, d.outsideR, half),
      place(a, d.ribInnerR, half),
    ]);
  });
  const [screw] = d.screws;
  const dimensions: (Span | Callout | Mark)[] = [
    span('x', [-d.boreR, 0], [d.boreR, 0], 'above', round(2 * d.boreR)),
    callout(
      place(ribAngleDeg(d, 1), d.outsideR - depthMm / 2),
      'right',
      said`${count} ribs ${mm(widthMm)} x ${mm(depthMm)}`,
    ),
    callout(
      place(180 / count, d.ringOuterA),
      'below',
      said`inner rings ${mm(2 * d.ringOuterA)} across flats, ${mm(2 * d.ringInnerA)} inside`,
    ),
    ...d.notchesMm.map((_, rib) => {
      const a = ribAngleDeg(d, rib);
      return mark(place(a, (d.topR + d.boreR) / 2), ribName(d.former, a) ?? '');
    }),
  ];
  if (screw)
    dimensions.push(
      callout(
        place(screw.angleDeg, screw.radiusMm),
        'right',
        said`${d.screws.length} x ${round(screw.diameterMm)} on ${round(2 * screw.radiusMm)}, at ${d.screws.map(({ angleDeg }) => degrees(angleDeg)).join(', ')}`,
      ),
    );
  return { title: 'end view', shapes: [...shapes, flats(d.ringOuterA), flats(d.ringInnerA), ...ribs], dimensions };
}

/** The circle over the ribs rolled out: ribs, holes, first turn and last. */
function rolledOut(d: RibbedDimensions, record: PartsRecord): View {
  const { title, shapes, dimensions } = developed(d, record);
  const round = 2 * Math.PI * d.outsideR;
  const half = d.ribs.widthMm / 2;
  const x = (angleDeg: number) => ((((angleDeg + 180) % 360) + 360) % 360) * (round / 360) - round / 2;
  const ribs = d.notchesMm.flatMap((_, rib): Shapes[] => {
    const at = x(ribAngleDeg(d, rib));
    // The rib opposite the start hole is cut by both edges.
    const places = at - half < -round / 2 ? [at, at + round] : [at];
    return places.map((place) => {
      const [left, right] = [Math.max(place - half, -round / 2), Math.min(place + half, round / 2)];
      return rectangle(left, d.surfaceFromMm, right - left, d.surfaceToMm - d.surfaceFromMm, 'thin');
    });
  });
  const names = d.notchesMm.map((_, rib) => {
    const a = ribAngleDeg(d, rib);
    return mark([x(a), d.surfaceToMm], `rib ${ribName(d.former, a)}`);
  });
  return { title, shapes: [...shapes, ...ribs], dimensions: [...dimensions, ...names] };
}

/** The start rib from its side, and the end rings cut there. */
function alongRib(d: RibbedDimensions, record: PartsRecord): View {
  const { outsideR: r, ribInnerR, ribs, lengthMm } = d;
  const first = d.axialMm(0);
  return {
    title: 'section',
    shapes: [
      ...endRings(d).map(({ outer, inner }) =>
        polygon(
          [...outer, ...inner].map(({ rMm, zMm }): Point => [rMm, zMm]),
          'outline',
        ),
      ),
      polygon(ribOutline(d, d.notchesMm[0]!), 'thin'),
    ],
    dimensions: [
      span('x', [ribInnerR, first - 1], [r, first - 1], 'below', mm(ribs.depthMm)),
      span('y', [d.seatR, 0], [d.seatR, ribs.seatMm], 'left', mm(ribs.seatMm)),
      span('y', [d.topR, 0], [d.topR, lengthMm], 'right', mm(lengthMm)),
      callout(
        [r - d.notch.depthMm, d.axialMm(1)],
        'right',
        said`notches every ${mm(record.windings[0]!.pitchMm)}, flanks 45°`,
      ),
    ],
  };
}
