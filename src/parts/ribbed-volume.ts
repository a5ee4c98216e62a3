/**
 * A ribbed former's volume from its dimensions: end rings by frusta, ribs by their side view less what lies in the end rings, inner
 * rings by their sections between the ribs. Independent of any mesh; good to about 0.1 %.
 */

import { gableMm, type RibbedDimensions, ringFootMm } from './ribbed-dimensions.ts';
import { leadMm, ribOutline } from './ribbed-shapes.ts';
import { areaOf } from './shapes.ts';
import type { Engraving, Skin } from './solid.ts';
import { baseHolesVolume, datumVolume, earsVolume, engravedVolume, turned } from './volume.ts';

/** Strips in which a rib's part inside the upper end ring is summed. */
const STRIPS = 400;

export function ribbedVolume(d: RibbedDimensions, ends: readonly Skin[], engravings: readonly Engraving[]): number {
  const n = d.segments;
  const inscribed = (n / (2 * Math.PI)) * Math.sin((2 * Math.PI) / n);
  const circumscribed = (n / Math.PI) * Math.tan(Math.PI / n);
  const ring = (skin: Skin) => inscribed * turned(skin.outer) - circumscribed * turned([...skin.inner].reverse());
  const ribs = d.notchesMm.reduce((sum, heights) => sum + areaOf(ribOutline(d, heights)), 0) * d.ribs.widthMm;
  return (
    ends.reduce((sum, skin) => sum + ring(skin), 0) +
    ribs -
    d.ribs.count * d.ribs.widthMm * (inLower(d) + inUpper(d)) +
    d.ribs.innerRings.topsMm.reduce((sum, top) => sum + innerRingVolume(d, top), 0) -
    letIn(d) -
    holesVolume(d) +
    earsVolume(d) -
    baseHolesVolume(d) -
    datumVolume(d) -
    engravings.reduce((sum, e) => sum + engravedVolume(e, d), 0)
  );
}

/** Area of a rib's side view inside the lower end ring. */
function inLower(d: RibbedDimensions): number {
  return (d.surfaceFromMm - d.ribFromMm) * (d.outsideR - d.ribInnerR);
}

/** And inside the upper one, which widens at 45 degrees. */
function inUpper(d: RibbedDimensions): number {
  const seat = d.ribs.seatMm;
  const height = d.ribToMm - seat;
  let area = 0;
  for (let i = 0; i < STRIPS; i++) {
    const up = (height * (i + 0.5)) / STRIPS;
    const inside = Math.max(d.ribInnerR, d.boreR + Math.max(0, leadMm(d) - up));
    area += (Math.max(0, Math.min(d.outsideR, d.seatR + up) - inside) * height) / STRIPS;
  }
  return area;
}

/** What lies between the ribs: at a distance a from the axis a strip 2 g(a) wide, less the gable under it. */
function innerRingVolume(d: RibbedDimensions, topMm: number): number {
  const height = topMm - ringFootMm(d, topMm);
  const area = (flat: number) => {
    const g = gableMm(d, flat);
    return 2 * g * height - g * g;
  };
  const { ringInnerA: i, ringOuterA: o } = d;
  // Simpson, exact for a square.
  return (d.ribs.count * (o - i) * (area(i) + 4 * area((i + o) / 2) + area(o))) / 6;
}

/** The last inner ring's part inside the upper end ring, between the ribs. */
function letIn(d: RibbedDimensions): number {
  const { innerRings, seatMm, count, widthMm } = d.ribs;
  const height = innerRings.topsMm[innerRings.topsMm.length - 1]! - seatMm;
  // Both edges of the upper end ring slope at 45 degrees.
  const inner = d.boreR + leadMm(d) - height / 2;
  const outer = d.seatR + height / 2;
  return height * (Math.PI * (outer ** 2 - inner ** 2) - count * widthMm * (outer - inner));
}

function holesVolume(d: RibbedDimensions): number {
  return d.holes.reduce((sum, hole) => {
    const notched = hole.purpose === 'anchor' || hole.purpose === 'mount' ? 0 : d.notch.depthMm / 2;
    const section = (hole.diameterMm / 2) ** 2 * (0.75 * Math.PI + 1);
    return sum + section * (d.outsideR - d.ribInnerR - notched);
  }, 0);
}
