/** The last gate: the bytes that are about to be written are read back and must be the part that was described. */
import type { ManifoldToplevel } from 'manifold-3d';
import type { Expected } from '../parts/solid.ts';
import { fromMesh, good } from './build.ts';
import { signedVolume, type TriangleMesh } from './mesh.ts';
import { MeshError } from './mesh-error.ts';
import { readStl } from './stl.ts';
import { weld } from './weld.ts';

/** Outer size against the dimensions. */
const BOX_TOLERANCE_MM = 0.01;
/** Volume against the formula, which leaves out where strokes and holes cross; a lost ear or flange is several percent. */
const VOLUME_TOLERANCE = 0.005;

export interface Measured {
  readonly triangles: number;
  readonly volumeMm3: number;
  readonly minMm: readonly [number, number, number];
  readonly maxMm: readonly [number, number, number];
}

/** @throws MeshError that names part, check and numbers */
export function checkBytes(kernel: ManifoldToplevel, part: string, bytes: Uint8Array, expected: Expected): Measured {
  const mesh = weld(readStl(bytes));
  const count = mesh.triangles.length / 3;
  const fail = (operation: string, got: string): never => {
    throw new MeshError(part, `checking ${operation}`, got);
  };
  const faulty = faultyEdges(mesh);
  if (count === 0 || faulty > 0)
    fail('edges', `${faulty} of ${3 * count} edge sides lack exactly one opposite side; expected 0`);
  const bodies = countBodies(mesh);
  if (bodies !== expected.bodies) fail('bodies', `${bodies}, expected ${expected.bodies}`);
  good(part, 'checking status', () => fromMesh(kernel, mesh)).delete();
  // Euler: vertices - edges + triangles = 2 (bodies - genus), and every triangle owns one and a half edges.
  const genus = bodies - (mesh.vertices.length / 3 - count / 2) / 2;
  if (genus !== expected.genus) fail('genus', `${genus}, expected ${expected.genus} (${expected.genusIs})`);
  const { min, max } = boxOf(mesh);
  for (const [i, axis] of ['x', 'y', 'z'].entries())
    if (
      !(Math.abs(min[i]! - expected.minMm[i]!) <= BOX_TOLERANCE_MM) ||
      !(Math.abs(max[i]! - expected.maxMm[i]!) <= BOX_TOLERANCE_MM)
    )
      fail('outer size', `${axis} ${min[i]} to ${max[i]} mm, expected ${expected.minMm[i]} to ${expected.maxMm[i]}`);
  const volumeMm3 = signedVolume(mesh);
  if (!(Math.abs(volumeMm3 - expected.volumeMm3) <= VOLUME_TOLERANCE * expected.volumeMm3))
    fail('volume', `${volumeMm3.toFixed(1)} mm3, expected ${expected.volumeMm3.toFixed(1)} within 0.5 %`);
  return { triangles: count, volumeMm3, minMm: min, maxMm: max };
}

/** Directed sides that occur twice or whose opposite is missing: 0 for a closed surface that faces one way. */
export function faultyEdges(mesh: TriangleMesh): number {
  const { triangles: t } = mesh;
  const start = new Uint32Array(mesh.vertices.length / 3 + 1);
  for (let i = 0; i < t.length; i++) start[t[i]! + 1]! += 1;
  for (let i = 1; i < start.length; i++) start[i]! += start[i - 1]!;
  const fill = start.slice();
  const ends = new Uint32Array(t.length);
  const next = (i: number) => t[i % 3 === 2 ? i - 2 : i + 1]!;
  for (let i = 0; i < t.length; i++) ends[fill[t[i]!]!++] = next(i);
  const sides = (from: number, to: number) => {
    let n = 0;
    for (let k = start[from]!; k < start[from + 1]!; k++) if (ends[k] === to) n++;
    return n;
  };
  let faulty = 0;
  for (let i = 0; i < t.length; i++) if (sides(t[i]!, next(i)) !== 1 || sides(next(i), t[i]!) !== 1) faulty++;
  return faulty;
}

/** Closed surfaces that share no vertex. */
export function countBodies(mesh: TriangleMesh): number {
  const parent = new Uint32Array(mesh.vertices.length / 3).map((_, i) => i);
  const root = (i: number): number => {
    let k = i;
    while (parent[k] !== k) {
      parent[k] = parent[parent[k]!]!;
      k = parent[k]!;
    }
    return k;
  };
  let bodies = parent.length;
  const join = (a: number, b: number) => {
    const p = root(a);
    const q = root(b);
    if (p === q) return;
    parent[Math.max(p, q)] = Math.min(p, q);
    bodies--;
  };
  const { triangles: t } = mesh;
  for (let i = 0; i < t.length; i += 3) {
    join(t[i]!, t[i + 1]!);
    join(t[i]!, t[i + 2]!);
  }
  return bodies;
}

type Corner = [number, number, number];

function boxOf(mesh: TriangleMesh): { min: Corner; max: Corner } {
  const min: Corner = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  const max: Corner = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  const { vertices: v } = mesh;
  for (let i = 0; i < v.length; i++) {
    const axis = i % 3;
    if (v[i]! < min[axis]!) min[axis] = v[i]!;
    if (v[i]! > max[axis]!) max[axis] = v[i]!;
  }
  return { min, max };
}
