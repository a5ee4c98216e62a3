/** Holes, ears, screw holes and the datum mark of the former: what is cut out of the turned body and set on it. */
import type { Former } from '../record/schema.ts';
import { type FormerDimensions, roofMm } from './dimensions.ts';
import { chordsFor } from './shapes.ts';
import type { Loft, Point2, Point3 } from './solid.ts';

const RAD = Math.PI / 180;
/** Cutters stand this far out of what they cut, so that no two faces coincide. */
export const PROUD_MM = 1;

/** A place in the frame: `x` along the radius at the angle, `y` across it, counterclockwise positive. */
export function at(angleDeg: number, x: number, y: number, z: number): Point3 {
  const c = Math.cos(angleDeg * RAD);
  const s = Math.sin(angleDeg * RAD);
  return [c * x - s * y, s * x + c * y, z];
}

/**
 * A hole that is printed lying: a circle whose upper quarter is a roof at 45 degrees. All sides are tangents, so that
 * the full diameter stays clear. Points are (across, up) from the centre, counterclockwise from the roof's point.
 */
export function teardrop(diameterMm: number): Point2[] {
  const r = diameterMm / 2;
  const n = chordsFor(r, 1.5 * Math.PI, 9);
  const step = (1.5 * Math.PI) / n;
  const corner = r / Math.cos(step / 2);
  const points: Point2[] = [[0, r * Math.SQRT2]];
  for (let i = 0; i < n; i++) {
    const a = 0.75 * Math.PI + (i + 0.5) * step;
    points.push([corner * Math.cos(a), corner * Math.sin(a)]);
  }
  return points;
}

/** Holes along a radius, through the near wall only. */
export function wallCutters(d: FormerDimensions): Loft[] {
  const inside = d.boreR / 2;
  return d.holes.map((hole) => {
    // Beside the winding surface a cutter stays clear of what stands on the foot.
    const low = hole.axialMm - hole.diameterMm / 2 < d.surfaceFromMm;
    const high = hole.axialMm + roofMm(hole.diameterMm) > d.surfaceToMm;
    const ridge = d.former.ridges?.heightMm ?? 0;
    const outside = Math.max(low ? d.footR : 0, high ? d.topR : 0, d.outsideR + ridge) + PROUD_MM;
    const shape = teardrop(hole.diameterMm);
    const ring = (x: number) => shape.map(([y, z]) => at(hole.angleDeg, x, y, hole.axialMm + z));
    return { kind: 'loft', name: `hole ${hole.label}`, rings: [ring(inside), ring(outside)], hubs: null };
  });
}

type Ear = Former['ears'][number];

/** How far an ear reaches into the foot's ring. */
export function earOverlapMm(d: FormerDimensions): number {
  return Math.min(2, (d.footR - d.boreR) / 2);
}

/** Half the width of an ear where it meets the foot. */
export function earHalfRootMm(ear: Ear, rootR: number): number {
  return Math.min(0.7 * ear.widthMm, rootR * Math.sin(0.8 * Math.acos(rootR / ear.centreRadiusMm)));
}

/** An ear's outline begins with so many chords along its root. */
export const EAR_ROOT_CHORDS = 8;

/**
 * Outline of an ear in its own frame (x along the radius), shrunk by `insetMm`: the root follows the foot, a third wider
 * than the ear at most, and its sides run tangent into the round end. All of it is seen from the centre of that end.
 */
export function earOutline(ear: Ear, rootR: number, insetMm: number): Point2[] {
  const end = ear.widthMm / 2;
  const halfRoot = earHalfRootMm(ear, rootR);
  const tangentAngle = (() => {
    const y = halfRoot;
    const x = Math.sqrt(rootR * rootR - y * y) - ear.centreRadiusMm;
    return Math.atan2(y, x) - Math.acos(end / Math.hypot(x, y));
  })();
  const rootAngle = Math.asin((halfRoot - insetMm) / rootR);
  const points: Point2[] = [];
  for (let i = 0; i <= EAR_ROOT_CHORDS; i++) {
    const a = rootAngle * (1 - (2 * i) / EAR_ROOT_CHORDS);
    points.push([rootR * Math.cos(a), rootR * Math.sin(a)]);
  }
  const n = chordsFor(end, 2 * tangentAngle, 12);
  for (let i = 0; i <= n; i++) {
    const a = tangentAngle * ((2 * i) / n - 1);
    points.push([ear.centreRadiusMm + (end - insetMm) * Math.cos(a), (end - insetMm) * Math.sin(a)]);
  }
  return points;
}

export function earAdders(d: FormerDimensions): Loft[] {
  const rootR = d.footR - earOverlapMm(d);
  return d.former.ears.map((ear, i) => {
    const ring = (z: number, inset: number) => earOutline(ear, rootR, inset).map(([x, y]) => at(ear.angleDeg, x, y, z));
    const c = d.chamferMm;
    const rings = c > 0 ? [ring(0, c), ring(c, 0)] : [ring(0, 0)];
    const hub = (z: number) => at(ear.angleDeg, ear.centreRadiusMm, 0, z);
    return {
      kind: 'loft',
      name: `ear ${i + 1}`,
      rings: [...rings, ring(ear.thicknessMm, 0)],
      hubs: [hub(0), hub(ear.thicknessMm)],
    };
  });
}

/** Upright holes of ears and base, opened out at the bed by the foot's chamfer. */
export function screwCutters(d: FormerDimensions): Loft[] {
  return d.screws.map((screw, i) => {
    const r = screw.diameterMm / 2;
    const n = chordsFor(r, 2 * Math.PI, 16);
    const ring = (radius: number, z: number): Point3[] =>
      Array.from({ length: n }, (_, k) => {
        const a = (2 * Math.PI * (k + 0.5)) / n;
        const corner = radius / Math.cos(Math.PI / n);
        return at(screw.angleDeg, screw.radiusMm + corner * Math.cos(a), corner * Math.sin(a), z);
      });
    const c = Math.min(d.chamferMm, screw.sideMm - d.lineMm);
    const foot = c > 0 ? [ring(r + c + PROUD_MM, -PROUD_MM), ring(r, c)] : [ring(r, -PROUD_MM)];
    return {
      kind: 'loft',
      name: `screw hole ${i + 1}`,
      rings: [...foot, ring(r, screw.thicknessMm + PROUD_MM)],
      hubs: null,
    };
  });
}

/** A V notch up the foot's edge whose bottom lies at the datum angle; on a plain foot it runs out upwards at 45 degrees. */
export function datumCutters(d: FormerDimensions): Loft[] {
  const mark = d.former.datumMark;
  if (!mark) return [];
  const depth = datumDepthMm(d);
  const half = ((mark.widthMm / 2) * (depth + PROUD_MM)) / depth;
  const ring = (z: number, out: number): Point3[] => [
    at(mark.angleDeg, d.footR - depth + out, 0, z),
    at(mark.angleDeg, d.footR + PROUD_MM + out, -half, z),
    at(mark.angleDeg, d.footR + PROUD_MM + out, half, z),
  ];
  const plain = d.footR - d.outsideR < 1e-9;
  const rings = plain
    ? [ring(-PROUD_MM, 0), ring(d.former.footMm - depth, 0), ring(d.former.footMm + PROUD_MM, depth + PROUD_MM)]
    : [ring(-PROUD_MM, 0), ring(d.surfaceFromMm + PROUD_MM, 0)];
  return [{ kind: 'loft', name: 'datum mark', rings, hubs: null }];
}

/** The notch stays inside the rim, or inside half the wall of a plain foot. */
export function datumDepthMm(d: FormerDimensions): number {
  const room = d.footR > d.outsideR ? 0.7 * (d.footR - d.outsideR) : 0.5 * (d.outsideR - d.boreR);
  return Math.min(d.former.datumMark?.depthMm ?? 0, room);
}
