/**
 * Record to printable files:
 *
 *     record -> solid description -> mesh -> scaled, welded, canonical order -> STL bytes -> checked -> file
 *
 * The same record gives the same bytes.
 */

import { partsOf } from '../parts/parts.ts';
import { type Expected, type Point3, type Solid, stlPath } from '../parts/solid.ts';
import type { PartsRecord } from '../record/schema.ts';
import { buildSolid } from './build.ts';
import { checkBytes } from './check.ts';
import { loadKernel } from './load.ts';
import type { TriangleMesh } from './mesh.ts';
import { PICTURE_PX, PICTURE_VIEWS, type ShadedPicture, shadedPicture } from './shade.ts';
import { stlBytes } from './stl.ts';
import { type PrintBed, threemfBytes } from './threemf.ts';
import { canonical, weld } from './weld.ts';

export interface PartFile {
  readonly part: string;
  readonly path: string;
  readonly kind: 'stl';
  readonly bytes: Uint8Array<ArrayBuffer>;
  /** The same triangles by index, for a bed. */
  readonly mesh: TriangleMesh;
  readonly report: PartReport;
}

/** A part with its shaded pictures, for the parts sheet. */
export interface PicturedPart extends PartFile {
  readonly pictures: readonly ShadedPicture[];
}

/** Measured on the bytes. */
export interface PartReport {
  readonly triangles: number;
  readonly volumeMm3: number;
  readonly minMm: Point3;
  readonly maxMm: Point3;
}

export interface BedOrder extends PrintBed {
  readonly path: string;
}

export interface BedFile {
  readonly path: string;
  readonly kind: '3mf';
  readonly bytes: Uint8Array<ArrayBuffer>;
}

/**
 * The parts that the record wants, in this thread, one after the other.
 * @throws Fault for dimensions that cannot be (exit 4)
 * @throws MeshError when a part did not come out as described
 */
export async function makeParts(record: PartsRecord): Promise<PartFile[]> {
  const files: PartFile[] = [];
  for (const solid of partsOf(record)) files.push(await makePart(solid, record.printer.scale));
  return files;
}

/** One part as the bytes of its file, enlarged by `scale` along x, y and z. */
export async function makePart(solid: Solid, scale: readonly number[] = [1, 1, 1]): Promise<PartFile> {
  const kernel = await loadKernel();
  const mesh = canonical(weld(scaled(buildSolid(kernel, solid), scale)));
  const bytes = stlBytes(mesh);
  const { part } = solid;
  const report = checkBytes(kernel, part, bytes, scaledExpectation(solid.expected, scale));
  return { part, path: stlPath(part), kind: 'stl', bytes, mesh, report };
}

export function pictured(part: PartFile): PicturedPart {
  return { ...part, pictures: PICTURE_VIEWS.map((view) => shadedPicture(part.mesh, view, PICTURE_PX, PICTURE_PX)) };
}

export function makeBed({ path, ...bed }: BedOrder): BedFile {
  return { path, kind: '3mf', bytes: threemfBytes(bed) };
}

function scaled(mesh: TriangleMesh, scale: readonly number[]): TriangleMesh {
  if (scale.every((s) => s === 1)) return mesh;
  return { ...mesh, vertices: mesh.vertices.map((x, i) => x * scale[i % 3]!) };
}

function scaledExpectation(expected: Expected, scale: readonly number[]): Expected {
  const [x, y, z] = scale as readonly [number, number, number];
  const by = (p: Point3): Point3 => [p[0] * x, p[1] * y, p[2] * z];
  return {
    ...expected,
    minMm: by(expected.minMm),
    maxMm: by(expected.maxMm),
    volumeMm3: expected.volumeMm3 * x * y * z,
  };
}
