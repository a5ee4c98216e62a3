/**
 * The mesh of a turned skin, made directly: columns of vertices round the axis, rows of quads between them. A groove is a
 * helical strip of four chords a pitch (flank, floor, flank, land) whose rows climb from column to column; its lower and
 * upper edges are closed to plain circles, with a fan where the strip begins and where it ends.
 *
 * Columns stand half a segment off angle 0, so that they do not fall on cutters at round angles.
 */
import type { Groove, Skin } from '../parts/solid.ts';
import { MeshBuilder, type TriangleMesh } from './mesh.ts';

export function skinMesh(skin: Skin): TriangleMesh {
  const { segments } = skin;
  const build = new MeshBuilder();
  const turn = skin.hand === 'right' ? 1 : -1;
  // Columns run the way the helix climbs, so that sample and column agree for both hands.
  const columns = Array.from({ length: segments }, (_, j) => {
    const a = (2 * Math.PI * (j + 0.5)) / segments;
    return { x: Math.cos(a), y: turn * Math.sin(a) };
  });
  const point = (column: number, r: number, z: number) => {
    const { x, y } = columns[column % segments]!;
    return build.vertex(r * x, r * y, z);
  };
  const clear = 1 / Math.cos(Math.PI / segments);
  const rows = [
    ...skin.outer.map((row) => ({ r: row.rMm, z: row.zMm })),
    ...skin.inner.map((row) => ({ r: row.rMm * clear, z: row.zMm })),
  ].map(({ r, z }) => columns.map((_, j) => point(j, r, z)));
  for (const [i, row] of rows.entries()) {
    const above = rows[(i + 1) % rows.length]!;
    if (skin.groove && i === skin.groove.afterRow) grooveZone(build, skin, skin.groove, row, above, point);
    else
      for (let j = 0; j < segments; j++) {
        const k = (j + 1) % segments;
        build.quad(row[j]!, row[k]!, above[k]!, above[j]!);
      }
  }
  return build.build(skin.hand === 'left');
}

type PointAt = (column: number, r: number, z: number) => number;

/** Between the circle `below` and the circle `above`. The groove must span more than one turn. */
function grooveZone(
  build: MeshBuilder,
  skin: Skin,
  groove: Groove,
  below: readonly number[],
  above: readonly number[],
  point: PointAt,
): void {
  const n = skin.segments;
  const { samples, floorMm } = groove;
  if (samples.length <= n + 1) throw new RangeError('a groove must span more than one turn');
  const first = ((groove.firstColumn % n) + n) % n;
  const outside = skin.outer[groove.afterRow]!.rMm;
  // Lower lip, floor, floor, upper lip; where the depth is 0 lip and floor are one point.
  const cross = samples.map(({ zMm, depthMm }, i): readonly [number, number, number, number] => {
    const c = first + i;
    const half = floorMm / 2;
    const low = point(c, outside - depthMm, zMm - half);
    const high = point(c, outside - depthMm, zMm + half);
    if (depthMm === 0) return [low, low, high, high];
    return [point(c, outside, zMm - half - depthMm), low, high, point(c, outside, zMm + half + depthMm)];
  });
  const last = cross.length - 1;
  const under = (i: number) => below[(first + i) % n]!;
  const over = (i: number) => above[(first + i) % n]!;
  for (let i = 0; i < last; i++) {
    const a = cross[i]!;
    const b = cross[i + 1]!;
    for (let m = 0; m < 3; m++) build.quad(a[m]!, b[m]!, b[m + 1]!, a[m + 1]!);
    if (i + 1 + n <= last) {
      const c = cross[i + n]!;
      const d = cross[i + 1 + n]!;
      build.quad(a[3], b[3], d[0], c[0]);
    }
  }
  for (let i = 0; i < n - 1; i++) build.quad(under(i), under(i + 1), cross[i + 1]![0], cross[i]![0]);
  for (let i = last - n + 1; i < last; i++) build.quad(cross[i]![3], cross[i + 1]![3], over(i + 1), over(i));
  // Where the strip begins: the column on its right carries the strip's first points besides.
  const left = cross[n - 1]![0];
  const begin = cross[0]!;
  build.triangle(left, under(n - 1), under(n));
  build.triangle(left, under(n), begin[0]);
  build.triangle(left, begin[0], begin[3]);
  build.triangle(left, begin[3], cross[n]![0]);
  // Where it ends: the column on its left carries the strip's last points.
  const right = cross[last - n + 1]![3];
  const end = cross[last]!;
  build.triangle(right, over(last + 1), over(last));
  build.triangle(right, over(last), end[3]);
  build.triangle(right, end[3], end[0]);
  build.triangle(right, end[0], cross[last - n]![3]);
}
