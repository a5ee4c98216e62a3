/**
 * A mesh as a shaded picture for paper: seen along parallel lines, light greys on white, dark lines where the shape ends,
 * where one part of it stands before another, and along sharp edges.
 *
 *     mesh -> turned to the viewer -> nearest triangle of every sample (z-buffer) -> grey and lines -> 2 x 2 samples a pixel -> PNG
 *
 * A pure function: the same mesh gives the same bytes.
 */
import type { TriangleMesh } from './mesh.ts';
import { greyPng } from './png.ts';
import { cornerGreys, triangleNormals } from './shade-greys.ts';

export interface ViewAngle {
  /** Where the viewer stands: degrees counterclockwise from the x axis, seen from above. */
  readonly yawDeg: number;
  /** How far above the horizon, degrees; 90 looks down. */
  readonly pitchDeg: number;
}

export interface ShadedPicture {
  readonly png: Uint8Array<ArrayBuffer>;
  readonly widthPx: number;
  readonly heightPx: number;
}

/**
 * Two sides of a part. In the first, what is lettered along x reads from left to right, and the start hole of a former is in
 * front on the right.
 */
export const PICTURE_VIEWS: readonly ViewAngle[] = [
  { yawDeg: -55, pitchDeg: 32 },
  { yawDeg: 125, pitchDeg: 32 },
];
/** Largest picture on a parts sheet, either way: 56 mm at 250 dots to the inch. */
export const PICTURE_PX = 550;

/** Samples a pixel, along either side. */
const FINE = 2;
/** White round the shape, pixels: room for its outline. */
const RIM_PX = 2;
/** Cosine of the least angle between two faces whose edge is drawn: flanks of a groove, at 45 degrees, are not. */
const SHARP = Math.cos((52 * Math.PI) / 180);
/** One surface before another is outlined when it is nearer by this share of the picture's longer side. */
const STEP_SHARE = 0.012;

/** Darkness of a sample. */
const PLAIN = 0;
const EDGE = 1;
const OUTLINE = 2;
const EDGE_GREY = 70;
const OUTLINE_GREY = 0;

/**
 * @param widthPx, heightPx most that the picture may measure; it is as large as that allows and cut to the shape
 * @throws RangeError when the mesh is empty or the picture too small to hold one
 */
export function shadedPicture(mesh: TriangleMesh, view: ViewAngle, widthPx: number, heightPx: number): ShadedPicture {
  const seen = turned(mesh, view);
  const room = [widthPx - 2 * RIM_PX, heightPx - 2 * RIM_PX] as const;
  const size = [seen.max[0] - seen.min[0], seen.max[1] - seen.min[1]] as const;
  if (mesh.triangles.length === 0 || Math.min(...room) < 1 || !(Math.max(...size) > 0))
    throw new RangeError(`no picture of ${mesh.triangles.length / 3} triangles in ${widthPx} x ${heightPx} pixels`);
  const pixelsPerMm = Math.min(room[0] / Math.max(size[0], 1e-9), room[1] / Math.max(size[1], 1e-9));
  const width = Math.min(widthPx, Math.ceil(size[0] * pixelsPerMm) + 2 * RIM_PX);
  const height = Math.min(heightPx, Math.ceil(size[1] * pixelsPerMm) + 2 * RIM_PX);

  // To samples: x right, y down, depth towards the viewer, one unit the same length along each.
  const scale = pixelsPerMm * FINE;
  const { points } = seen;
  const left = (width * FINE) / 2 - ((seen.min[0] + seen.max[0]) / 2) * scale;
  const top = (height * FINE) / 2 + ((seen.min[1] + seen.max[1]) / 2) * scale;
  for (let i = 0; i < points.length; i += 3) {
    points[i] = left + points[i]! * scale;
    points[i + 1] = top - points[i + 1]! * scale;
    points[i + 2] = points[i + 2]! * scale;
  }
  const normals = triangleNormals(mesh, seen.axes);
  const samples = nearest(points, mesh.triangles, normals, width * FINE, height * FINE);
  const lines = linesOf(samples, normals, STEP_SHARE * Math.max(width, height) * FINE);
  const greys = cornerGreys(mesh, normals);
  return { png: greyPng(pixels(samples, lines, points, mesh, greys), width, height), widthPx: width, heightPx: height };
}

type Axis = readonly [number, number, number];

/** Coordinates right, up and towards the viewer, with the extremes of the first two. */
function turned(mesh: TriangleMesh, { yawDeg, pitchDeg }: ViewAngle) {
  const a = (yawDeg * Math.PI) / 180;
  const e = (pitchDeg * Math.PI) / 180;
  const axes: readonly [Axis, Axis, Axis] = [
    [-Math.sin(a), Math.cos(a), 0],
    [-Math.cos(a) * Math.sin(e), -Math.sin(a) * Math.sin(e), Math.cos(e)],
    [Math.cos(a) * Math.cos(e), Math.sin(a) * Math.cos(e), Math.sin(e)],
  ];
  const { vertices: v } = mesh;
  const points = new Float64Array(v.length);
  const min = [Infinity, Infinity] as [number, number];
  const max = [-Infinity, -Infinity] as [number, number];
  const [right, up, out] = axes;
  for (let i = 0; i < v.length; i += 3) {
    const x = v[i]!;
    const y = v[i + 1]!;
    const z = v[i + 2]!;
    const u = x * right[0] + y * right[1] + z * right[2];
    const w = x * up[0] + y * up[1] + z * up[2];
    points[i] = u;
    points[i + 1] = w;
    points[i + 2] = x * out[0] + y * out[1] + z * out[2];
    if (u < min[0]) min[0] = u;
    if (u > max[0]) max[0] = u;
    if (w < min[1]) min[1] = w;
    if (w > max[1]) max[1] = w;
  }
  return { points, axes, min, max };
}

interface Samples {
  readonly width: number;
  readonly height: number;
  /** Which triangle is nearest; -1 for none. */
  readonly triangle: Int32Array;
  readonly depth: Float32Array;
}

/**
 * The nearest triangle at the middle of every sample. Each row is filled between the triangle's two sides there; a side is
 * always reckoned from its upper end, so that neighbours meet without a gap.
 */
function nearest(
  points: Float64Array,
  triangles: Uint32Array,
  normals: Float32Array,
  width: number,
  height: number,
): Samples {
  const triangle = new Int32Array(width * height).fill(-1);
  const depth = new Float32Array(width * height).fill(-Infinity);
  for (let t = 0; t < triangles.length; t += 3) {
    const nz = normals[t + 2]!;
    if (nz <= 1e-6) continue;
    let a = 3 * triangles[t]!;
    let b = 3 * triangles[t + 1]!;
    let c = 3 * triangles[t + 2]!;
    // Sorted from the top; the place breaks ties, so that neighbours sort alike.
    if (points[b + 1]! < points[a + 1]! || (points[b + 1]! === points[a + 1]! && b < a)) [a, b] = [b, a];
    if (points[c + 1]! < points[b + 1]! || (points[c + 1]! === points[b + 1]! && c < b)) [b, c] = [c, b];
    if (points[b + 1]! < points[a + 1]! || (points[b + 1]! === points[a + 1]! && b < a)) [a, b] = [b, a];
    const ax = points[a]!;
    const ay = points[a + 1]!;
    const bx = points[b]!;
    const by = points[b + 1]!;
    const cx = points[c]!;
    const cy = points[c + 1]!;
    const first = Math.max(0, Math.ceil(ay - 0.5));
    const last = Math.min(height - 1, Math.ceil(cy - 0.5) - 1);
    if (first > last) continue;
    // The plane of the triangle: depth falls to the right when the normal leans to the right.
    const zx = -normals[t]! / nz;
    const zy = normals[t + 1]! / nz;
    const z0 = points[a + 2]! - zx * ax - zy * ay;
    const nearestZ = Math.max(points[a + 2]!, points[b + 2]!, points[c + 2]!);
    const farthestZ = Math.min(points[a + 2]!, points[b + 2]!, points[c + 2]!);
    const long = (cx - ax) / (cy - ay);
    const upper = by > ay ? (bx - ax) / (by - ay) : 0;
    const lower = cy > by ? (cx - bx) / (cy - by) : 0;
    for (let y = first; y <= last; y++) {
      const at = y + 0.5;
      const x1 = ax + long * (at - ay);
      const x2 = at < by ? ax + upper * (at - ay) : bx + lower * (at - by);
      const from = Math.max(0, Math.ceil(Math.min(x1, x2) - 0.5));
      const to = Math.min(width - 1, Math.ceil(Math.max(x1, x2) - 0.5) - 1);
      const row = y * width;
      for (let x = from; x <= to; x++) {
        // Slivers have no reliable plane: their depth stays between those of their corners.
        const z = Math.min(nearestZ, Math.max(farthestZ, z0 + zx * (x + 0.5) + zy * at));
        if (z > depth[row + x]!) {
          depth[row + x] = z;
          triangle[row + x] = t;
        }
      }
    }
  }
  return { width, height, triangle, depth };
}

/** Where the shape ends, stands before itself, or has a sharp edge. */
function linesOf({ width, height, triangle, depth }: Samples, normals: Float32Array, step: number): Uint8Array {
  const lines = new Uint8Array(width * height);
  const mark = (i: number, kind: number) => {
    if (lines[i]! < kind) lines[i] = kind;
  };
  /** How far sample `j` lies off the plane at sample `i`, one to the right of it (or below). */
  const off = (i: number, j: number, t: number, down: boolean) => {
    const slope = (down ? normals[t + 1]! : -normals[t]!) / normals[t + 2]!;
    return depth[j]! - depth[i]! - slope;
  };
  const compare = (i: number, j: number, down: boolean) => {
    const s = triangle[i]!;
    const t = triangle[j]!;
    const jump = s < 0 || t < 0 ? Infinity : Math.min(Math.abs(off(i, j, s, down)), Math.abs(off(i, j, t, down)));
    if (jump > step) {
      // Two samples on either side.
      const next = down ? width : 1;
      for (const near of [i - next, i, j, j + next]) if (near >= 0 && near < lines.length) mark(near, OUTLINE);
      return;
    }
    const cosine = normals[s]! * normals[t]! + normals[s + 1]! * normals[t + 1]! + normals[s + 2]! * normals[t + 2]!;
    if (cosine < SHARP) {
      mark(i, EDGE);
      mark(j, EDGE);
    }
  };
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) {
      const i = y * width + x;
      const t = triangle[i]!;
      if (x + 1 < width && triangle[i + 1] !== t) compare(i, i + 1, false);
      if (y + 1 < height && triangle[i + width] !== t) compare(i, i + width, true);
    }
  return lines;
}

/** Means of 2 x 2 samples: the grey of the face, interpolated between its corners, or that of a line. */
function pixels(
  { width, height, triangle }: Samples,
  lines: Uint8Array,
  points: Float64Array,
  mesh: TriangleMesh,
  greys: Float32Array,
): Uint8Array {
  const across = width / FINE;
  const out = new Uint8Array(across * (height / FINE));
  const sums = new Float32Array(across);
  for (let y = 0; y < height; y++) {
    if (y % FINE === 0) sums.fill(0);
    // Along a row the same triangle comes many times: its plane of greys is kept.
    let known = -1;
    let gx = 0;
    let g0 = 0;
    let least = 0;
    let most = 0;
    for (let x = 0; x < width; x++) {
      const i = y * width + x;
      const t = triangle[i]!;
      let grey = 255;
      if (lines[i] === OUTLINE) grey = OUTLINE_GREY;
      else if (lines[i] === EDGE) grey = EDGE_GREY;
      else if (t >= 0 && lines[i] === PLAIN) {
        if (t !== known) {
          known = t;
          const a = 3 * mesh.triangles[t]!;
          const b = 3 * mesh.triangles[t + 1]!;
          const c = 3 * mesh.triangles[t + 2]!;
          const [ga, gb, gc] = [greys[t]!, greys[t + 1]!, greys[t + 2]!] as const;
          const ux = points[b]! - points[a]!;
          const uy = points[b + 1]! - points[a + 1]!;
          const wx = points[c]! - points[a]!;
          const wy = points[c + 1]! - points[a + 1]!;
          const twice = ux * wy - uy * wx;
          gx = ((gb - ga) * wy - (gc - ga) * uy) / twice;
          const gy = ((gc - ga) * ux - (gb - ga) * wx) / twice;
          g0 = ga - gx * points[a]! + gy * (y + 0.5 - points[a + 1]!);
          least = Math.min(ga, gb, gc);
          most = Math.max(ga, gb, gc);
          // A sliver seen on edge has no slope of greys.
          if (!Number.isFinite(gx) || !Number.isFinite(g0)) {
            gx = 0;
            g0 = ga;
          }
        }
        grey = Math.min(most, Math.max(least, g0 + gx * (x + 0.5)));
      }
      sums[(x / FINE) | 0]! += grey;
    }
    if (y % FINE === FINE - 1) {
      const row = ((y / FINE) | 0) * across;
      for (let x = 0; x < across; x++) out[row + x] = Math.round(sums[x]! / (FINE * FINE));
    }
  }
  return out;
}
