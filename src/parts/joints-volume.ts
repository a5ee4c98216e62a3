/**
 * Volumes of the sections of a former by formula: the wall above a seam is that above the plane at the seam's mean height,
 * moved down by what the seam falls inwards; grooves, holes and figures go with their section, and what is left of the
 * whole belongs to the lowest. Spigot and tongue come to it. Independent of any mesh.
 */
import type { Hole } from '../record/schema.ts';
import type { FormerDimensions } from './dimensions.ts';
import type { Bored, JointDimensions } from './joint-dimensions.ts';
import { ridgesVolume } from './ridges.ts';
import type { ProfileRow, Skin, Solid } from './solid.ts';
import { engravedVolume } from './volume.ts';

/** mm3 from below. */
export function sectionVolumes(
  d: FormerDimensions,
  whole: Solid,
  body: Skin,
  joints: readonly JointDimensions[],
  bored: readonly Bored[],
): number[] {
  const above = joints.map((joint, i) => volumeAbove(d, whole, body, joint, bored, i + 1));
  const bounds = [whole.expected.volumeMm3, ...above];
  return bounds.map((volume, i) => {
    const [below, over] = [joints[i - 1], joints[i]];
    const through = bored.filter(({ spigotOf }) => spigotOf === i);
    return volume - (bounds[i + 1] ?? 0) + (below ? spigotVolume(below, through) : 0) + (over ? tongueVolume(over) : 0);
  });
}

/** What of the former lies above a seam. */
function volumeAbove(
  d: FormerDimensions,
  whole: Solid,
  body: Skin,
  joint: JointDimensions,
  bored: readonly Bored[],
  section: number,
): number {
  const [outer, inner] = [d.outsideR, d.boreR];
  const meanMm = meanSeamMm(joint);
  const planeMm = meanMm - outer + ((2 / 3) * (outer ** 3 - inner ** 3)) / (outer ** 2 - inner ** 2);
  const n = body.segments;
  const inscribed = (n / (2 * Math.PI)) * Math.sin((2 * Math.PI) / n);
  const circumscribed = (n / Math.PI) * Math.tan(Math.PI / n);
  const wall =
    inscribed * turnedAbove(body.outer, planeMm) - circumscribed * turnedAbove([...body.inner].reverse(), planeMm);
  const holes = bored
    .filter((one) => one.section >= section)
    .reduce((sum, { hole }) => sum + teardropArea(hole.diameterMm) * (outer - inner), 0);
  const engravings = whole.cutters.filter((cutter) => cutter.kind === 'engraving' && cutter.zMm > meanMm);
  const figures = engravings.reduce((sum, e) => sum + (e.kind === 'engraving' ? engravedVolume(e, d) : 0), 0);
  const ridges = d.ridges.filter(({ fromTurn }) => d.axialMm(fromTurn) > meanMm);
  return wall + ridgesVolume({ ...d, ridges }) - inscribed * grooveAbove(d, body, joint) - holes - figures;
}

const STEPS = 360;

function meanSeamMm(joint: JointDimensions): number {
  let sum = 0;
  for (let i = 0; i < STEPS; i++) sum += joint.seamAt((i + 0.5) / STEPS);
  return sum / STEPS;
}

const teardropArea = (diameterMm: number) => (diameterMm / 2) ** 2 * (0.75 * Math.PI + 1);

/** Frusta of a rising profile above a plane. */
function turnedAbove(rows: readonly ProfileRow[], planeMm: number): number {
  let sum = 0;
  for (let i = 1; i < rows.length; i++) {
    const [a, b] = [rows[i - 1]!, rows[i]!];
    const from = Math.max(a.zMm, planeMm);
    if (b.zMm <= from) continue;
    const share = (from - a.zMm) / (b.zMm - a.zMm);
    const r = a.rMm + share * (b.rMm - a.rMm);
    sum += ((b.zMm - from) * (r * r + r * b.rMm + b.rMm * b.rMm) * Math.PI) / 3;
  }
  return sum;
}

/** The groove passes a seam once, at its step, a turn above the turn over which the seam begins. */
function grooveAbove(d: FormerDimensions, { groove, segments }: Skin, joint: JointDimensions): number {
  if (!groove) return 0;
  let sum = 0;
  for (const [i, { depthMm, zMm }] of groove.samples.entries()) {
    const turn = (groove.firstColumn + i + 0.5) / segments;
    if (joint.turn === null ? zMm < joint.seamMm : turn < joint.turn + 1) continue;
    const area = depthMm * (groove.floorMm + depthMm);
    const centroid =
      depthMm > 0 ? (depthMm * (3 * groove.floorMm + 2 * depthMm)) / (6 * (groove.floorMm + depthMm)) : 0;
    sum += (area * 2 * Math.PI * (d.outsideR - centroid)) / segments;
  }
  return sum;
}

/** Volume between radii `from` and `to` of what is `a + b r` high. */
function ringVolume(from: number, to: number, a: number, b: number): number {
  return 2 * Math.PI * ((a * (to ** 2 - from ** 2)) / 2 + (b * (to ** 3 - from ** 3)) / 3);
}

/** The spigot with its collar, as far as the bore; less chamfer, notch and holes. */
function spigotVolume(j: JointDimensions, through: readonly { readonly hole: Hole }[]): number {
  const over = j.collarMm - j.ringR;
  const ring = ringVolume(j.ringR, j.spigotR, over - j.endMm, 1);
  // Between spigot and bore the collar stands on the seam, which falls inwards.
  const filling = ringVolume(j.spigotR, j.boreR, over - (meanSeamMm(j) - j.outsideR), 0);
  const chamfer = Math.PI * j.spigotR * j.chamferMm ** 2;
  const thick = j.spigotR - j.ringR;
  const notch = j.notchWidthMm * (j.notchToMm - j.endMm + j.notchWidthMm / 4) * thick;
  const holes = through.reduce((sum, { hole }) => sum + teardropArea(hole.diameterMm) * thick, 0);
  return ring + filling - chamfer - notch - holes;
}

function tongueVolume(j: JointDimensions): number {
  return j.tongueWidthMm * j.tongueReachMm * (j.tongueToMm - j.tongueFromMm + j.tongueReachMm / 2);
}
