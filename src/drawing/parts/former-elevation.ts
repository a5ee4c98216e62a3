/** The former from outside, the start hole in front: angles grow to the right on the side that is seen. */
import type { FormerDimensions } from '../../parts/dimensions.ts';
import { earOutline, earOverlapMm } from '../../parts/holes.ts';
import { postTopMm, standsOnFoot } from '../../parts/posts.ts';
import { formerSkin } from '../../parts/skin.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { Line, Polyline } from '../drawing.ts';
import { circle, line, polygon, polyline, rectangle } from '../shapes.ts';
import type { Callout, Span, View } from '../views.ts';
import { said } from '../words.ts';
import { callout, mm, type Point, round, span } from './sizes.ts';

const RAD = Math.PI / 180;
type Shapes = View['shapes'][number];

/** Seen from outside: right of the start hole for angles up to 180 degrees. */
const across = (angleDeg: number, r: number) => r * Math.sin(angleDeg * RAD);
const inFront = (angleDeg: number) => Math.cos(angleDeg * RAD) > -1e-9;

export function elevation(d: FormerDimensions, record: PartsRecord): View {
  const { outer } = formerSkin(d);
  const right = outer.map(({ rMm, zMm }): Point => [rMm, zMm]);
  const left = right.map(([r, z]): Point => [-r, z]).reverse();
  const edges = outer.slice(1, -1).map(({ rMm, zMm }) => line(-rMm, zMm, rMm, zMm, 'hair'));
  const shapes: Shapes[] = [
    polygon([...right, ...left], 'outline'),
    ...edges,
    ...earsSeen(d),
    ...postsSeen(d),
    ...datumSeen(d),
    ...turnsSeen(d, record),
    ...grooveSeen(d),
    ...ridgesSeen(d),
    ...d.holes
      .filter((hole) => inFront(hole.angleDeg))
      .map((hole) =>
        circle(across(hole.angleDeg, d.outsideR), hole.axialMm, hole.diameterMm / 2, 'thin', 1, `hole ${hole.label}`),
      ),
    line(0, -3, 0, d.lengthMm + 3, 'hair', 'centre'),
  ];
  return { title: 'elevation', shapes, dimensions: elevationSizes(d, record) };
}

function elevationSizes(d: FormerDimensions, record: PartsRecord): View['dimensions'] {
  const { former, groove, ridges } = d;
  const winding = record.windings[0]!;
  const { outsideR: r, lengthMm } = d;
  const dimensions: (Span | Callout)[] = [
    span('y', [-d.footR, 0], [-d.topR, lengthMm], 'left', mm(lengthMm)),
    span('y', [r, 0], [r, d.axialMm(0)], 'right', mm(d.axialMm(0))),
    span('y', [r, 0], [r, winding.finishMm], 'right', mm(winding.finishMm)),
  ];
  if (former.footMm > 0) {
    const at: Point = [-d.footR, d.surfaceFromMm];
    dimensions.unshift(span('y', [-d.footR, 0], at, 'left', mm(d.surfaceFromMm)));
  }
  if (former.flange) {
    const low = lengthMm - former.flange.upperMm;
    dimensions.unshift(span('y', [d.topR, low], [d.topR, lengthMm], 'right', mm(former.flange.upperMm)));
    dimensions.push(span('x', [-d.topR, lengthMm], [d.topR, lengthMm], 'above', round(2 * d.topR)));
  }
  const [post] = former.posts;
  if (post)
    dimensions.unshift(
      span('y', [r + post.reachMm, 0], [r + post.reachMm, postTopMm(d, post)], 'right', mm(postTopMm(d, post))),
    );
  const waist = (d.surfaceFromMm + d.surfaceToMm) / 2;
  dimensions.push(span('x', [-r, waist], [r, waist], 'below', round(2 * r)));
  if (former.base) dimensions.push(span('x', [-d.footR, 0], [d.footR, 0], 'below', round(2 * d.footR)));
  if (groove) {
    const text = said`groove ${mm(groove.depthMm)} deep, floor ${mm(groove.floorMm)}, pitch ${mm(winding.pitchMm)}`;
    dimensions.push(callout([-r, d.axialMm(winding.turns / 2)], 'left', text));
  }
  const [ridge] = ridges;
  if (ridge) {
    const z = d.axialMm(ridge.fromTurn + 0.25) + ridge.footMm + ridge.widthMm / 2;
    const text = said`ridge ${mm(ridge.heightMm)} high, ${mm(ridge.widthMm)} wide`;
    dimensions.push(callout([-r, z], 'left', text));
  }
  return dimensions;
}

/** What of an ear is seen beside the foot, or before it. */
function earsSeen(d: FormerDimensions): Polyline[] {
  return d.former.ears.flatMap((ear) => {
    const points = earOutline(ear, d.footR - earOverlapMm(d), 0).map(([x, y]) => {
      const angle = ear.angleDeg + Math.atan2(y, x) / RAD;
      return across(angle, Math.hypot(x, y));
    });
    const [low, high] = [Math.min(...points), Math.max(...points)];
    const parts: (readonly [number, number])[] =
      Math.cos(ear.angleDeg * RAD) > 0.01
        ? [[low, high]]
        : [
            [Math.max(low, d.footR), high],
            [low, Math.min(high, -d.footR)],
          ];
    return parts
      .filter(([from, to]) => to - from > 1e-6)
      .map(([from, to]) => rectangle(from, 0, to - from, ear.thicknessMm, 'outline'));
  });
}

function postsSeen(d: FormerDimensions): Polyline[] {
  return d.former.posts
    .filter((post) => Math.cos(post.angleDeg * RAD) > -0.2)
    .map((post) => {
      const out = d.outsideR + post.reachMm;
      const corners = [-1, 1].flatMap((side) =>
        [d.outsideR, out].map((x) => {
          const angle = post.angleDeg + Math.atan2((side * post.widthMm) / 2, x) / RAD;
          return across(angle, Math.hypot(x, post.widthMm / 2));
        }),
      );
      const [low, high] = [Math.min(...corners), Math.max(...corners)];
      const under = standsOnFoot(d, post) ? d.surfaceFromMm : 0;
      return rectangle(low, under, high - low, postTopMm(d, post) - under, 'thin', 1);
    });
}

function datumSeen(d: FormerDimensions): Line[] {
  const mark = d.former.datumMark;
  if (!mark || !inFront(mark.angleDeg)) return [];
  const x = across(mark.angleDeg, d.footR);
  const top = d.footR > d.outsideR ? d.surfaceFromMm : d.former.footMm;
  return [-1, 0, 1].map((k) => line(x + (k * mark.widthMm) / 2, 0, x + (k * mark.widthMm) / 2, top, 'hair'));
}

/** Places on the winding surface along a run of turns, for each stretch that is seen from outside. */
function helixSeen(d: FormerDimensions, from: number, to: number, upMm: number, r: number): Polyline[] {
  const sense = d.hand === 'right' ? 1 : -1;
  const runs: Point[][] = [];
  let run: Point[] = [];
  const steps = Math.max(8, Math.ceil((to - from) * 48));
  for (let i = 0; i <= steps; i++) {
    const turn = from + ((to - from) * i) / steps;
    const angle = 360 * turn * sense;
    if (inFront(angle)) run.push([across(angle, r), d.axialMm(turn) + upMm]);
    else if (run.length > 0) {
      runs.push(run);
      run = [];
    }
  }
  runs.push(run);
  return runs.filter((points) => points.length > 1).map((points) => polyline(points, 'hair'));
}

/** The winding is hinted at by its first and its last turn. */
function turnsSeen(d: FormerDimensions, record: PartsRecord): Polyline[] {
  const { turns } = record.windings[0]!;
  const first = helixSeen(d, 0, Math.min(1, turns), 0, d.outsideR);
  return turns > 1 ? [...first, ...helixSeen(d, turns - 1, turns, 0, d.outsideR)] : first;
}

/** The floor of the groove behind the outline. */
function grooveSeen(d: FormerDimensions): Line[] {
  const { groove } = d;
  if (groove === null) return [];
  const r = d.outsideR - groove.depthMm;
  const [low, high] = [d.axialMm(groove.fromTurn), d.axialMm(groove.toTurn)];
  return [-r, r].map((x) => line(x, low, x, high, 'hair', 'dashed'));
}

function ridgesSeen(d: FormerDimensions): Polyline[] {
  return d.ridges.flatMap((ridge) =>
    [0, ridge.widthMm].flatMap((up) =>
      helixSeen(d, ridge.fromTurn, ridge.toTurn, ridge.footMm + up, d.outsideR + ridge.heightMm),
    ),
  );
}
