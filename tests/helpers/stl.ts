/** Reads a binary STL back and measures it: own code, so that it and the kernel can be wrong apart. Millimetres, degrees. */
export type Vec = readonly [number, number, number];

export interface Facet {
  readonly corners: readonly [Vec, Vec, Vec];
  /** Unit, from the corners' order (the stored normal is not trusted). */
  readonly normal: Vec;
  readonly area: number;
}

const RAD = Math.PI / 180;
const sub = (a: Vec, b: Vec): Vec => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
const cross = (a: Vec, b: Vec): Vec => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];
const dot = (a: Vec, b: Vec) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

export function facetsOf(bytes: Uint8Array): Facet[] {
  const data = Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const count = data.readUInt32LE(80);
  if (data.length !== 84 + 50 * count) throw new Error(`${data.length} bytes for ${count} facets`);
  const facets: Facet[] = [];
  for (let i = 0; i < count; i++) {
    const corner = (k: number): Vec => {
      const at = 84 + 50 * i + 12 + 12 * k;
      return [data.readFloatLE(at), data.readFloatLE(at + 4), data.readFloatLE(at + 8)];
    };
    const corners = [corner(0), corner(1), corner(2)] as const;
    const n = cross(sub(corners[1], corners[0]), sub(corners[2], corners[0]));
    const length = Math.hypot(...n);
    const normal: Vec = length > 0 ? [n[0] / length, n[1] / length, n[2] / length] : [0, 0, 0];
    facets.push({ corners, normal, area: length / 2 });
  }
  return facets;
}

export function boxOf(facets: readonly Facet[]): { min: Vec; max: Vec } {
  const min = [Infinity, Infinity, Infinity];
  const max = [-Infinity, -Infinity, -Infinity];
  for (const { corners } of facets)
    for (const corner of corners)
      for (let i = 0; i < 3; i++) {
        min[i] = Math.min(min[i]!, corner[i]!);
        max[i] = Math.max(max[i]!, corner[i]!);
      }
  return { min: min as unknown as Vec, max: max as unknown as Vec };
}

export function volumeOf(facets: readonly Facet[]): number {
  return facets.reduce((sum, { corners: [a, b, c] }) => sum + dot(a, cross(b, c)) / 6, 0);
}

export interface Surface {
  /** Directed sides without exactly one opposite. */
  readonly faultySides: number;
  readonly bodies: number;
  readonly genus: number;
}

/** Corners are joined where their coordinates are equal. */
export function surfaceOf(facets: readonly Facet[]): Surface {
  const ids = new Map<string, number>();
  const idOf = (v: Vec) => {
    const key = `${v[0]},${v[1]},${v[2]}`;
    let id = ids.get(key);
    if (id === undefined) {
      id = ids.size;
      ids.set(key, id);
    }
    return id;
  };
  const triangles = facets.map(({ corners }) => corners.map(idOf));
  const sides = new Map<number, number>();
  const key = (a: number, b: number) => a * ids.size + b;
  for (const t of triangles)
    for (let k = 0; k < 3; k++) {
      const side = key(t[k]!, t[(k + 1) % 3]!);
      sides.set(side, (sides.get(side) ?? 0) + 1);
    }
  let faultySides = 0;
  for (const [side, n] of sides) {
    const a = Math.floor(side / ids.size);
    if (n !== 1 || sides.get(key(side - a * ids.size, a)) !== 1) faultySides++;
  }
  const parent = Array.from({ length: ids.size }, (_, i) => i);
  const root = (i: number): number => {
    let k = i;
    while (parent[k] !== k) k = parent[k] = parent[parent[k]!]!;
    return k;
  };
  for (const [a, b, c] of triangles) {
    parent[root(a!)] = root(b!);
    parent[root(b!)] = root(c!);
  }
  const bodies = parent.filter((p, i) => p === i).length;
  const euler = ids.size - sides.size / 2 + facets.length;
  return { faultySides, bodies, genus: bodies - euler / 2 };
}

export interface FittedHole {
  /** From the place asked for: across the wall (counterclockwise positive) and along the axis. */
  readonly acrossMm: number;
  readonly alongMm: number;
  /** Of the greatest rod that passes. */
  readonly diameterMm: number;
  readonly walls: number;
}

/**
 * A hole along a direction, near a place: its walls are parallel to the direction and all tangent to one circle, whose
 * centre and radius are fitted by least squares.
 */
function fitHole(facets: readonly Facet[], near: Vec, along: Vec, u: Vec, v: Vec, windowMm: number): FittedHole {
  const rows: [number, number, number][] = [];
  for (const { corners, normal, area } of facets) {
    if (area < 1e-6 || Math.abs(dot(normal, along)) > 1e-3) continue;
    const inside = corners.every((corner) => {
      const d = sub(corner, near);
      return Math.hypot(dot(d, u), dot(d, v)) < windowMm && dot(d, along) > -windowMm * 4;
    });
    if (!inside) continue;
    const p = sub(corners[0], near);
    const nu = dot(normal, u);
    const nv = dot(normal, v);
    // The wall looks at the axis: n . (centre - p) = radius.
    rows.push([nu, nv, nu * dot(p, u) + nv * dot(p, v)]);
  }
  const [cu, cv, r] = leastSquares(rows);
  return { acrossMm: cu, alongMm: cv, diameterMm: 2 * r, walls: rows.length };
}

/** Solves a x + b y - r = c. */
function leastSquares(rows: readonly [number, number, number][]): [number, number, number] {
  if (rows.length < 3) return [Number.NaN, Number.NaN, Number.NaN];
  const m = Array.from({ length: 3 }, () => [0, 0, 0, 0]);
  for (const [a, b, c] of rows) {
    const x = [a, b, -1];
    for (let i = 0; i < 3; i++) {
      for (let j = 0; j < 3; j++) m[i]![j]! += x[i]! * x[j]!;
      m[i]![3]! += x[i]! * c;
    }
  }
  for (let i = 0; i < 3; i++)
    for (let j = 0; j < 3; j++) {
      if (i === j) continue;
      const f = m[j]![i]! / m[i]![i]!;
      for (let k = i; k < 4; k++) m[j]![k]! -= f * m[i]![k]!;
    }
  return [m[0]![3]! / m[0]![0]!, m[1]![3]! / m[1]![1]!, m[2]![3]! / m[2]![2]!];
}

/** A hole through the wall at an angle and a height, expected near `diameterMm`. */
export function radialHole(
  facets: readonly Facet[],
  angleDeg: number,
  axialMm: number,
  diameterMm: number,
): FittedHole {
  const c = Math.cos(angleDeg * RAD);
  const s = Math.sin(angleDeg * RAD);
  return fitHole(facets, [0, 0, axialMm], [c, s, 0], [-s, c, 0], [0, 0, 1], 0.75 * diameterMm + 0.05);
}

/** An upright hole at an angle and a radius. */
export function uprightHole(
  facets: readonly Facet[],
  angleDeg: number,
  radiusMm: number,
  diameterMm: number,
): FittedHole {
  const c = Math.cos(angleDeg * RAD);
  const s = Math.sin(angleDeg * RAD);
  return fitHole(facets, [radiusMm * c, radiusMm * s, 0], [0, 0, 1], [-s, c, 0], [c, s, 0], 0.55 * diameterMm + 0.05);
}

/** A lying hole across the radius at an angle, its middle at a radius and a height. */
export function tangentHole(
  facets: readonly Facet[],
  angleDeg: number,
  radiusMm: number,
  axialMm: number,
  diameterMm: number,
): FittedHole {
  const c = Math.cos(angleDeg * RAD);
  const s = Math.sin(angleDeg * RAD);
  const near: Vec = [radiusMm * c, radiusMm * s, axialMm];
  return fitHole(facets, near, [-s, c, 0], [c, s, 0], [0, 0, 1], 0.75 * diameterMm + 0.05);
}

export interface GrooveVertex {
  readonly angleDeg: number;
  readonly zMm: number;
  readonly rMm: number;
}

/** Corners of the facets below `belowZ` that look outwards from between two radii: the floor of the groove. */
export function floorVertices(facets: readonly Facet[], fromR: number, toR: number, belowZ: number): GrooveVertex[] {
  const found = new Map<string, GrooveVertex>();
  for (const { corners, normal } of facets) {
    const [x, y, z] = corners[0];
    if (z > belowZ) continue;
    if ((normal[0] * x + normal[1] * y) / Math.hypot(x, y) < 0.98) continue;
    if (!corners.every(([cx, cy]) => Math.hypot(cx, cy) > fromR && Math.hypot(cx, cy) < toR)) continue;
    for (const [cx, cy, cz] of corners)
      found.set(`${cx},${cy},${cz}`, {
        angleDeg: (Math.atan2(cy, cx) / RAD + 360) % 360,
        zMm: cz,
        rMm: Math.hypot(cx, cy),
      });
  }
  return [...found.values()];
}
