/** Outlines of flat parts, and how much of them is left where shapes are joined and cut: by strips, without a mesh. */

import { boundsOf, chordsFor, SAG_MM } from './shapes.ts';
import { ringAt } from './slab.ts';
import type { Cutter, Loft, Point2, Point3, ProfileRow, Shape } from './solid.ts';

/** The convex outline round some points, counterclockwise (Andrew's monotone chain). */
export function hull(points: readonly Point2[]): Point2[] {
  const sorted = points.toSorted((a, b) => a[0] - b[0] || a[1] - b[1]);
  const half = (list: readonly Point2[]): Point2[] => {
    const chain: Point2[] = [];
    for (const p of list) {
      while (chain.length > 1 && turn(chain[chain.length - 2]!, chain[chain.length - 1]!, p) <= 1e-9) chain.pop();
      chain.push(p);
    }
    return chain.slice(0, -1);
  };
  return [...half(sorted), ...half(sorted.toReversed())];
}

const turn = (a: Point2, b: Point2, c: Point2): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);

type Interval = readonly [number, number];

/** Where a level line at `y` runs inside an outline, from left to right. */
export function chordsAt(outline: readonly Point2[], y: number): Interval[] {
  const xs: number[] = [];
  // By index and without destructuring: this runs a million times for a stand.
  let a = outline[outline.length - 1]!;
  for (let i = 0; i < outline.length; i++) {
    const b = outline[i]!;
    if (a[1] > y !== b[1] > y) xs.push(a[0] + ((y - a[1]) / (b[1] - a[1])) * (b[0] - a[0]));
    a = b;
  }
  xs.sort((a, b) => a - b);
  const chords: Interval[] = [];
  for (let i = 1; i < xs.length; i += 2) chords.push([xs[i - 1]!, xs[i]!]);
  return chords;
}

function merged(intervals: readonly Interval[]): Interval[] {
  const out: [number, number][] = [];
  for (const [from, to] of intervals.toSorted((a, b) => a[0] - b[0])) {
    const last = out[out.length - 1];
    if (last && from <= last[1]) last[1] = Math.max(last[1], to);
    else out.push([from, to]);
  }
  return out;
}

const length = (intervals: readonly Interval[]): number => intervals.reduce((sum, [from, to]) => sum + to - from, 0);

/** Strips across a part; a hole of 4 mm in a plate of 200 mm still meets fifteen. */
const STRIPS = 800;

/** Area of the outlines joined, less that of the cuts joined. Good to 0.02 % of the outlines' area. */
export function areaLeft(outlines: readonly (readonly Point2[])[], cuts: readonly (readonly Point2[])[]): number {
  const ys = outlines.flat().map((p) => p[1]);
  const low = Math.min(...ys);
  const step = (Math.max(...ys) - low) / STRIPS;
  let area = 0;
  for (let i = 0; i < STRIPS; i++) {
    const y = low + (i + 0.5) * step;
    const kept = merged(outlines.flatMap((outline) => chordsAt(outline, y)));
    const gone = merged(cuts.flatMap((cut) => chordsAt(cut, y)));
    // What both cover is the two lengths less that of their union.
    area += (length(merged([...kept, ...gone])) - length(gone)) * step;
  }
  return area;
}

/** An outline turned by degrees counterclockwise about the origin, then moved. */
export function placed(outline: readonly Point2[], turnDeg: number, x = 0, y = 0): Point2[] {
  const c = Math.cos((turnDeg * Math.PI) / 180);
  const s = Math.sin((turnDeg * Math.PI) / 180);
  return outline.map(([px, py]): Point2 => [x + c * px - s * py, y + s * px + c * py]);
}

/** A slot with one round end at the origin, open towards +x at `lengthMm`; its full width stays clear. */
export function slotted(widthMm: number, lengthMm: number): Point2[] {
  const r = widthMm / 2;
  const n = Math.max(9, Math.ceil(Math.PI / (2 * Math.acos(1 - SAG_MM / r))));
  const step = Math.PI / n;
  const corner = r / Math.cos(step / 2);
  const end = Array.from({ length: n }, (_, i): Point2 => {
    const a = Math.PI / 2 + (i + 0.5) * step;
    return [corner * Math.cos(a), corner * Math.sin(a)];
  });
  return [[lengthMm, -r], [lengthMm, r], ...end];
}

/**
 * An outline with a slot as of {@link slotted} cut in from outside, both counterclockwise; the outline must not begin inside
 * the slot.
 */
export function notched(outline: readonly Point2[], slot: readonly Point2[]): Point2[] {
  const [outerRight, outerLeft, ...end] = slot;
  const right: Segment = [end[end.length - 1]!, outerRight!];
  const left: Segment = [outerLeft!, end[0]!];
  const out: Point2[] = [];
  let inside = false;
  for (const [i, a] of outline.entries()) {
    if (!inside) out.push(a);
    const edge: Segment = [a, outline[(i + 1) % outline.length]!];
    const enters = crossing(edge, right);
    if (enters) {
      out.push(enters, ...end.toReversed());
      inside = true;
    }
    const leaves = crossing(edge, left);
    if (leaves) {
      out.push(leaves);
      inside = false;
    }
  }
  if (inside || out.length === outline.length) throw new Error('a slot that does not run out of its outline');
  return out;
}

type Segment = readonly [Point2, Point2];

function crossing([a, b]: Segment, [c, d]: Segment): Point2 | null {
  const [ux, uy, vx, vy] = [b[0] - a[0], b[1] - a[1], d[0] - c[0], d[1] - c[1]];
  const det = ux * vy - uy * vx;
  if (det === 0) return null;
  const s = ((c[0] - a[0]) * vy - (c[1] - a[1]) * vx) / det;
  const t = ((c[0] - a[0]) * uy - (c[1] - a[1]) * ux) / det;
  return s >= 0 && s < 1 && t >= 0 && t <= 1 ? [a[0] + s * ux, a[1] + s * uy] : null;
}

/** A hexagon with corners at both ends of its x axis, counterclockwise. */
export function hexagon(acrossFlatsMm: number): Point2[] {
  const r = acrossFlatsMm / Math.sqrt(3);
  return Array.from({ length: 6 }, (_, k): Point2 => {
    const a = (Math.PI * k) / 3;
    return [r * Math.cos(a), r * Math.sin(a)];
  });
}

/** Corners round a turned body: a multiple of four, so that it reaches equally far on all sides. */
const sidesOf = (rows: readonly ProfileRow[]): number =>
  4 * Math.ceil(chordsFor(Math.max(...rows.map((row) => row.rMm))) / 4);

/** How far a turned body reaches from its axis along x and y. */
export const turnedReachMm = (rows: readonly ProfileRow[]): number =>
  Math.max(...rows.map((row) => row.rMm)) * Math.cos(Math.PI / sidesOf(rows));

/** A body turned about the upright axis through the origin. */
export function turned(name: string, rows: readonly ProfileRow[]): Loft {
  const sides = sidesOf(rows);
  return {
    kind: 'loft',
    name,
    rings: rows.map(({ rMm, zMm }) => ringAt(rMm, zMm, sides)),
    hubs: [
      [0, 0, rows[0]!.zMm],
      [0, 0, rows[rows.length - 1]!.zMm],
    ],
  };
}

/** Volume of such a body by its frusta. */
export function turnedMm3(rows: readonly ProfileRow[]): number {
  const sides = sidesOf(rows);
  let sum = 0;
  for (let i = 1; i < rows.length; i++) {
    const { rMm: a, zMm: from } = rows[i - 1]!;
    const { rMm: b, zMm: to } = rows[i]!;
    sum += ((to - from) * (a * a + a * b + b * b)) / 3;
  }
  return sum * (sides / 2) * Math.sin((2 * Math.PI) / sides);
}

/** Shapes moved over the bed, so that a part lies on its middle. */
export function moved<S extends Shape | Cutter>(shapes: readonly S[], dx: number, dy: number): S[] {
  return shapes.map((shape) => {
    if (shape.kind === 'skin') return shape;
    if (shape.kind === 'loft') {
      const shift = ([x, y, z]: readonly [number, number, number]) => [x + dx, y + dy, z] as const;
      const hubs = shape.hubs && ([shift(shape.hubs[0]), shift(shape.hubs[1])] as const);
      return { ...shape, rings: shape.rings.map((ring) => ring.map(shift)), hubs };
    }
    const [x, y, z] = shape.frame.origin;
    return { ...shape, frame: { ...shape.frame, origin: [x + dx, y + dy, z] } };
  });
}

/** How far an outline must be moved to lie on the middle of the bed, and the box of what is drawn out over it. */
export function onBed(
  outline: readonly Point2[],
  heightMm: number,
): { readonly dx: number; readonly dy: number; readonly minMm: Point3; readonly maxMm: Point3 } {
  const { min, max } = boundsOf(outline);
  const half: Point2 = [(max[0] - min[0]) / 2, (max[1] - min[1]) / 2];
  return {
    dx: -(min[0] + max[0]) / 2,
    dy: -(min[1] + max[1]) / 2,
    minMm: [-half[0], -half[1], 0],
    maxMm: [half[0], half[1], heightMm],
  };
}

/**
 * The lower edges of something that stands out of an outline, taken off at 45 degrees so that it enters its fellow. `line`
 * runs round it counterclockwise, from root to root; the cuts begin and end half a millimetre from the roots.
 */
export function edgeCutters(line: readonly Point2[], chamferMm: number): Cutter[] {
  // Past a corner both cuts run on into the air, so that no two faces of cutters coincide.
  const [short, past, out] = [-0.5, 0.7, 0.3];
  return line.slice(1).map((b, i): Cutter => {
    const a = line[i]!;
    const long = Math.hypot(b[0] - a[0], b[1] - a[1]);
    const [dx, dy] = [(b[0] - a[0]) / long, (b[1] - a[1]) / long];
    return {
      kind: 'prism',
      name: 'lower edge',
      outlines: [
        [
          [-chamferMm - 1, -1],
          [out, -1],
          [out, chamferMm + out],
        ],
      ],
      fromMm: -long - (i === line.length - 2 ? short : past),
      toMm: i === 0 ? short : past,
      frame: { origin: [a[0], a[1], 0], x: [dy, -dx, 0], y: [0, 0, 1] },
    };
  });
}
