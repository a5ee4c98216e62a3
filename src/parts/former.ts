/**
 * The printed former: a tube, plain or grooved, on its foot as it is printed.
 *
 *     dimensions -> room -> turned body (rims, slope, groove, bore)
 *                            + ears, ridges, posts
 *                            - holes, screw holes, eyes, datum mark, numbers
 *
 * A round base is the turned body's own foot.
 *
 * The axis stays at x = y = 0, so that angles of the record are angles of the part.
 */
import type { PartsRecord } from '../record/schema.ts';
import { type FormerDimensions, formerDimensions } from './dimensions.ts';
import { datumCutters, earAdders, screwCutters, wallCutters } from './holes.ts';
import { formerSections } from './joints.ts';
import { numberCutters } from './numbers.ts';
import { eyeCutters, postAdders } from './posts.ts';
import { ribbedParts } from './ribbed.ts';
import { ridgeAdders } from './ridges.ts';
import { requireRoom } from './room.ts';
import { formerSkin } from './skin.ts';
import type { Expected, Loft, Point3, Skin, Solid } from './solid.ts';
import { formerVolume } from './volume.ts';

/** @throws Fault (exit 4) that names every dimension that cannot be */
export function formerParts(record: PartsRecord): Solid[] {
  if (record.former.body === 'ribbed') return ribbedParts(record);
  const d = formerDimensions(record);
  requireRoom(d);
  const body = formerSkin(d);
  const adders = [...earAdders(d), ...ridgeAdders(d), ...postAdders(d)];
  const numbers = numberCutters(d);
  const holes = wallCutters(d);
  const screws = screwCutters(d);
  const eyes = eyeCutters(d);
  const whole: Solid = {
    part: 'former',
    name: 'Former',
    kind: 'former',
    quantity: 1,
    material: record.former.material,
    densityGCm3: record.former.densityGCm3,
    shapes: [body, ...adders],
    cutters: [...holes, ...screws, ...eyes, ...datumCutters(d), ...numbers],
    expected: {
      bodies: 1,
      genus: 1 + holes.length + screws.length + eyes.length,
      genusIs: `1 bore, ${holes.length} holes in the wall, ${screws.length} for screws, ${eyes.length} in posts`,
      ...box(body, adders),
      volumeMm3: formerVolume(d, body, numbers),
    },
    use: 'the coil is wound on it',
    printNote: printNote(d),
  };
  return record.former.joints.length === 0 ? [whole] : formerSections(record, d, whole, body);
}

/** Extremes of the dimensioned solid; cutters cannot enlarge it. */
function box(skin: Skin, adders: readonly Loft[]): Pick<Expected, 'minMm' | 'maxMm'> {
  const widest = Math.max(...skin.outer.map((row) => row.rMm)) * Math.cos(Math.PI / skin.segments);
  const min: [number, number, number] = [-widest, -widest, Math.min(...skin.outer.map((row) => row.zMm))];
  const max: [number, number, number] = [widest, widest, Math.max(...skin.outer.map((row) => row.zMm))];
  const include = (p: Point3) => {
    for (let i = 0; i < 3; i++) {
      min[i] = Math.min(min[i]!, p[i]!);
      max[i] = Math.max(max[i]!, p[i]!);
    }
  };
  for (const adder of adders) for (const ring of adder.rings) ring.forEach(include);
  return { minMm: min, maxMm: max };
}

function printNote(d: FormerDimensions): string {
  return [
    'print standing on the foot, no supports',
    `seam aligned at ${seamDeg(d)} degrees, away from the holes`,
    'no carbon- or metal-filled filament',
  ].join('; ');
}

/** Middle of the widest angle free of holes: the ridge of the seam lifts every turn, least where no lead comes through. */
function seamDeg(d: FormerDimensions): number {
  const angles = d.holes.map((hole) => hole.angleDeg).sort((a, b) => a - b);
  let best = 180;
  let widest = -1;
  for (const [i, angle] of angles.entries()) {
    const next = i + 1 < angles.length ? angles[i + 1]! : angles[0]! + 360;
    if (next - angle > widest + 1e-9) {
      widest = next - angle;
      best = (angle + next) / 2;
    }
  }
  return Math.round(best % 360);
}
