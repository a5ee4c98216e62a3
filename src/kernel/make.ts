/**
 * Record to printable files:
 *
 *     record -> solid description -> mesh -> weld, canonical order -> STL bytes -> checked -> file
 *
 * The same record gives the same bytes.
 */
import { formerSolid } from '../parts/former.ts';
import type { Solid } from '../parts/solid.ts';
import type { PartsRecord } from '../record/schema.ts';
import { buildSolid } from './build.ts';
import { checkBytes } from './check.ts';
import { loadKernel } from './load.ts';
import { stlBytes } from './stl.ts';
import { canonical, weld } from './weld.ts';

export interface PartFile {
  readonly path: string;
  readonly kind: 'stl';
  readonly bytes: Uint8Array<ArrayBuffer>;
  readonly report: PartReport;
}

export interface PartReport {
  readonly triangles: number;
  readonly volumeMm3: number;
  /** Of solid plastic; infill and walls of the job make it less. */
  readonly massG: number;
  /** Outer size in x, y and z. */
  readonly boxMm: readonly [number, number, number];
  readonly printNote: string;
}

/**
 * No files for a bought tube.
 * @throws Fault for dimensions that cannot be (exit 4)
 * @throws MeshError when a part did not come out as described
 */
export async function makeParts(record: PartsRecord): Promise<PartFile[]> {
  const solid = formerSolid(record);
  return solid ? [await makeFile(solid)] : [];
}

async function makeFile(solid: Solid): Promise<PartFile> {
  const kernel = await loadKernel();
  const bytes = stlBytes(canonical(weld(buildSolid(kernel, solid))));
  const { triangles, volumeMm3, minMm, maxMm } = checkBytes(kernel, solid.part, bytes, solid.expected);
  const size = (i: 0 | 1 | 2) => Math.round((maxMm[i] - minMm[i]) * 1000) / 1000;
  return {
    path: solid.path,
    kind: 'stl',
    bytes,
    report: {
      triangles,
      volumeMm3: Math.round(volumeMm3),
      massG: Math.round(volumeMm3 * solid.densityGCm3) / 1000,
      boxMm: [size(0), size(1), size(2)],
      printNote: solid.printNote,
    },
  };
}
