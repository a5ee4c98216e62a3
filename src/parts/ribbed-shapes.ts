/** What a ribbed former is joined of: end rings, ribs, inner rings. */
import { gableMm, type RibbedDimensions, ribAngleDeg, ringFootMm } from './ribbed-dimensions.ts';
import { prism } from './shapes.ts';
import type { Loft, Point2, Point3, Prism, ProfileRow, Skin } from './solid.ts';

const RAD = Math.PI / 180;
/** How far the slopes under an inner ring run on inside the ribs, so that no edge lies on a rib's face. */
const INTO_RIB_MM = 0.2;
/** How far the slope inside the upper end ring reaches beyond the corners of the inner ring that carries it. */
const OVER_CORNER_MM = 0.2;

/** Height and width of that slope. */
export const leadMm = (d: RibbedDimensions): number => d.ringCornerR - d.boreR + OVER_CORNER_MM;

/** Lower and upper end ring. */
export function endRings(d: RibbedDimensions): Skin[] {
  const { segments, hand, chamferMm: c, footR, topR, boreR, surfaceFromMm: foot, lengthMm } = d;
  const skin = (outer: ProfileRow[], inner: ProfileRow[]): Skin => ({
    kind: 'skin',
    segments,
    hand,
    outer,
    inner,
    groove: null,
  });
  const row = (rMm: number, zMm: number): ProfileRow => ({ rMm, zMm });
  const cut = c > 0;
  const seat = d.ribs.seatMm;
  const rim = lengthMm - d.former.flange!.upperMm;
  return [
    skin(
      [row(footR - c, 0), ...(cut ? [row(footR, c)] : []), row(footR, foot)],
      [row(boreR, foot), row(boreR, c), ...(cut ? [row(boreR + c, 0)] : [])],
    ),
    skin(
      [row(d.seatR, seat), row(topR, rim), row(topR, lengthMm)],
      [row(boreR, lengthMm), row(boreR, seat + leadMm(d)), row(boreR + leadMm(d), seat)],
    ),
  ];
}

/** Side view of a rib, x along the radius, y up. */
export function ribOutline(d: RibbedDimensions, heights: readonly number[]): Point2[] {
  const { ribInnerR: inner, outsideR: outer, ribFromMm: from, ribToMm: to, notch } = d;
  const floor = outer - notch.depthMm;
  const notches = heights.flatMap((z): Point2[] => [
    [outer, z - notch.openMm / 2],
    [floor, z - notch.floorMm / 2],
    [floor, z + notch.floorMm / 2],
    [outer, z + notch.openMm / 2],
  ]);
  return [[inner, from], [outer, from], ...notches, [outer, to], [inner, to]];
}

export function ribs(d: RibbedDimensions): Prism[] {
  const half = d.ribs.widthMm / 2;
  return d.notchesMm.map((heights, rib) => {
    const a = ribAngleDeg(d, rib) * RAD;
    const frame = { origin: [0, 0, 0], x: [Math.cos(a), Math.sin(a), 0], y: [0, 0, 1] } as const;
    return prism(`rib ${rib}`, [ribOutline(d, heights)], -half, half, frame);
  });
}

/** A ring with a flat a span, through its sections: at a rib's middle, in its side, midway, in the next rib's side. */
export function innerRing(d: RibbedDimensions, topMm: number, index: number): Loft {
  const { count } = d.ribs;
  const half = Math.PI / count;
  const foot = ringFootMm(d, topMm) - INTO_RIB_MM;
  const section = (span: number, along: (flatMm: number) => number, rise: (flatMm: number) => number): Point3[] => {
    const a = (2 * span + 1) * half;
    const [c, s] = [Math.cos(a), Math.sin(a)];
    const at = (flat: number, z: number): Point3 => {
      const t = along(flat);
      return [c * flat - s * t, s * flat + c * t, z];
    };
    const { ringInnerA: i, ringOuterA: o } = d;
    return [at(i, foot + rise(i)), at(o, foot + rise(o)), at(o, topMm), at(i, topMm)];
  };
  const side = (flat: number) => gableMm(d, flat) + INTO_RIB_MM;
  const rings = Array.from({ length: count }, (_, span) => [
    section(
      span,
      (flat) => -flat * Math.tan(half),
      () => 0,
    ),
    section(
      span,
      (flat) => -side(flat),
      () => 0,
    ),
    section(span, () => 0, side),
    section(span, side, () => 0),
  ]).flat();
  return { kind: 'loft', name: `inner ring ${index + 1}`, rings, joined: true, hubs: null };
}
