/**
 * Binary STL, out and in.
 *
 * Only the writing half of the serializer is used. Its public entry first snaps the mesh and looks for T-junctions, which
 * takes three quarters of its time; a welded mesh out of the kernel has none, and the bytes are checked afterwards.
 */
import stlb from '@jscad/stl-serializer/CSGToStlb.js';
import type { TriangleMesh } from './mesh.ts';

const IDENTITY = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1];
const HEADER = 84;
const TRIANGLE = 50;

export function stlBytes(mesh: TriangleMesh): Uint8Array<ArrayBuffer> {
  const { vertices: v, triangles: t } = mesh;
  const points = Array.from({ length: v.length / 3 }, (_, i) => [v[3 * i]!, v[3 * i + 1]!, v[3 * i + 2]!]);
  const polygons = Array.from({ length: t.length / 3 }, (_, i) => ({
    vertices: [points[t[3 * i]!]!, points[t[3 * i + 1]!]!, points[t[3 * i + 2]!]!],
  }));
  const pieces = stlb.serializeBinary([{ polygons, transforms: IDENTITY }], {});
  const bytes = new Uint8Array(pieces.reduce((sum, piece) => sum + piece.byteLength, 0));
  let at = 0;
  for (const piece of pieces) {
    bytes.set(new Uint8Array(piece), at);
    at += piece.byteLength;
  }
  return bytes;
}

/** Three vertices a triangle, none shared yet. @throws RangeError when length and count disagree */
export function readStl(bytes: Uint8Array): TriangleMesh {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const count = bytes.byteLength >= HEADER ? view.getUint32(80, true) : -1;
  if (bytes.byteLength !== HEADER + TRIANGLE * count)
    throw new RangeError(`${bytes.byteLength} bytes for ${count} triangles`);
  const vertices = new Float32Array(9 * count);
  for (let i = 0; i < count; i++)
    for (let k = 0; k < 9; k++) vertices[9 * i + k] = view.getFloat32(HEADER + TRIANGLE * i + 12 + 4 * k, true);
  return { vertices, triangles: new Uint32Array(3 * count).map((_, i) => i) };
}
