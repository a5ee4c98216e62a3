/** One vertex a place, no collapsed triangles, and an order that depends on the shape alone. */
import type { TriangleMesh } from './mesh.ts';

/** Joins vertices with equal float32 coordinates and drops triangles that lose a corner by it. */
export function weld(mesh: TriangleMesh): TriangleMesh {
  const { vertices: v, triangles: t } = mesh;
  const count = v.length / 3;
  // Adding 0 turns -0 into 0, so that equal numbers have equal bits.
  const places = v.map((x) => x + 0);
  const bits = new Int32Array(places.buffer);
  const size = 1 << Math.ceil(Math.log2(2 * count + 2));
  const table = new Int32Array(size).fill(-1);
  const kept = new Uint32Array(count);
  let unique = 0;
  const first = new Uint32Array(count);
  for (let i = 0; i < count; i++) {
    const x = bits[3 * i]!;
    const y = bits[3 * i + 1]!;
    const z = bits[3 * i + 2]!;
    let slot = (Math.imul(x, 73856093) ^ Math.imul(y, 19349663) ^ Math.imul(z, 83492791)) >>> 0;
    slot = (slot ^ (slot >>> 15)) & (size - 1);
    for (;;) {
      const k = table[slot]!;
      if (k < 0) {
        table[slot] = unique;
        first[unique] = i;
        kept[i] = unique++;
        break;
      }
      const f = 3 * first[k]!;
      if (bits[f] === x && bits[f + 1] === y && bits[f + 2] === z) {
        kept[i] = k;
        break;
      }
      slot = (slot + 1) & (size - 1);
    }
  }
  const vertices = new Float32Array(3 * unique);
  for (let k = 0; k < unique; k++) vertices.set(places.subarray(3 * first[k]!, 3 * first[k]! + 3), 3 * k);
  const triangles = new Uint32Array(t.length);
  let end = 0;
  for (let i = 0; i < t.length; i += 3) {
    const a = kept[t[i]!]!;
    const b = kept[t[i + 1]!]!;
    const c = kept[t[i + 2]!]!;
    if (a === b || b === c || c === a) continue;
    triangles[end] = a;
    triangles[end + 1] = b;
    triangles[end + 2] = c;
    end += 3;
  }
  return { vertices, triangles: triangles.slice(0, end) };
}

/**
 * Vertices by z, y, x; each triangle from its lowest vertex on; triangles by their vertices. Takes a welded mesh of up to
 * 200,000 vertices.
 */
export function canonical(mesh: TriangleMesh): TriangleMesh {
  const { vertices: v, triangles: t } = mesh;
  const count = v.length / 3;
  // Three indices packed in one double must stay exact.
  if (count > 200_000) throw new RangeError(`${count} vertices; at most 200000 can be put in order`);
  const order = new Uint32Array(count).map((_, i) => i);
  order.sort((a, b) => v[3 * a + 2]! - v[3 * b + 2]! || v[3 * a + 1]! - v[3 * b + 1]! || v[3 * a]! - v[3 * b]!);
  const rank = new Uint32Array(count);
  const vertices = new Float32Array(v.length);
  for (let k = 0; k < count; k++) {
    const i = order[k]!;
    rank[i] = k;
    vertices[3 * k] = v[3 * i]!;
    vertices[3 * k + 1] = v[3 * i + 1]!;
    vertices[3 * k + 2] = v[3 * i + 2]!;
  }
  const keys = new Float64Array(t.length / 3);
  for (let i = 0; i < t.length; i += 3) {
    let a = rank[t[i]!]!;
    let b = rank[t[i + 1]!]!;
    let c = rank[t[i + 2]!]!;
    if (b < a && b < c) [a, b, c] = [b, c, a];
    else if (c < a && c < b) [a, b, c] = [c, a, b];
    keys[i / 3] = (a * count + b) * count + c;
  }
  keys.sort();
  const triangles = new Uint32Array(t.length);
  for (let i = 0; i < keys.length; i++) {
    const key = keys[i]!;
    const ab = Math.floor(key / count);
    const a = Math.floor(ab / count);
    triangles[3 * i] = a;
    triangles[3 * i + 1] = ab - a * count;
    triangles[3 * i + 2] = key - ab * count;
  }
  return { vertices, triangles };
}
