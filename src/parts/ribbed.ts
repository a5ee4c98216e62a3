/**
 * The ribbed former: a cage that is printed standing, without supports.
 *
 *     dimensions -> room -> end rings (turned), ribs (each a side view with its notches, drawn out across), inner rings
 *                            + ears
 *                            - holes, screw holes, datum mark, rib numbers
 *
 * Inner rings have a flat a span; underneath they fall to the ribs at 45 degrees, and from the last of them the upper end ring
 * widens at 45 degrees. A notch is level across its rib where the wire climbs by some hundredths of a millimetre.
 */

import { Fault, type FaultParts } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { datumCutters, earAdders, screwCutters, wallCutters } from './holes.ts';
import { numberCutters } from './numbers.ts';
import { type RibbedDimensions, ribbedDimensions } from './ribbed-dimensions.ts';
import { ribFaults } from './ribbed-room.ts';
import { endRings, innerRing, ribs } from './ribbed-shapes.ts';
import { ribbedVolume } from './ribbed-volume.ts';
import { requireRoom } from './room.ts';
import type { Expected, Loft, Skin, Solid } from './solid.ts';

/** @throws Fault (exit 4) that names every dimension that cannot be */
export function ribbedParts(record: PartsRecord): Solid[] {
  const d = ribbedDimensions(record);
  requireRibbedRoom(d);
  const rings = endRings(d);
  const adders = earAdders(d);
  const holes = wallCutters(d);
  const screws = screwCutters(d);
  const numbers = numberCutters(d);
  const { count, innerRings } = d.ribs;
  const windows = count * innerRings.topsMm.length;
  return [
    {
      part: 'former',
      name: 'Former, ribbed',
      kind: 'former',
      quantity: 1,
      material: record.former.material,
      densityGCm3: record.former.densityGCm3,
      shapes: [...rings, ...ribs(d), ...innerRings.topsMm.map((top, i) => innerRing(d, top, i)), ...adders],
      cutters: [...holes, ...screws, ...datumCutters(d), ...numbers],
      expected: {
        bodies: 1,
        // A window between any two ribs and any two rings, and the bore.
        genus: 1 + windows + holes.length + screws.length,
        genusIs: `1 bore, ${windows} windows, ${holes.length} holes in ribs, ${screws.length} for screws`,
        ...box(rings, adders),
        volumeMm3: ribbedVolume(d, rings, numbers),
      },
      use: 'the coil is wound on it',
      printNote: `print standing on the foot, no supports; every layer between rings is ${count} islands: slow enough to cool; seam inside; no carbon- or metal-filled filament`,
    },
  ];
}

function requireRibbedRoom(d: RibbedDimensions): void {
  const faults: FaultParts[] = ribFaults(d);
  try {
    requireRoom(d);
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    faults.push(...error.faults);
  }
  if (faults.length > 0) throw new Fault(4, faults);
}

/** Extremes of the end rings and ears. */
function box(rings: readonly Skin[], ears: readonly Loft[]): Pick<Expected, 'minMm' | 'maxMm'> {
  const rows = rings.flatMap((skin) => skin.outer);
  const widest = Math.max(...rows.map((row) => row.rMm)) * Math.cos(Math.PI / rings[0]!.segments);
  const heights = rows.map((row) => row.zMm);
  const points = ears.flatMap((ear) => ear.rings.flat());
  const reach = (axis: 0 | 1, sign: 1 | -1) => sign * Math.max(widest, ...points.map((p) => sign * p[axis]));
  return {
    minMm: [reach(0, -1), reach(1, -1), Math.min(...heights)],
    maxMm: [reach(0, 1), reach(1, 1), Math.max(...heights)],
  };
}
