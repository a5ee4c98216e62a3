/** Views of the arbor's cone and collar; the stand's cones and collars are drawn by the same. */
import { arborDimensions } from '../../parts/arbor.ts';
import type { ProfileRow } from '../../parts/solid.ts';
import { type ClampDimensions, clampOutline, slitOutline } from '../../parts/stand-clamp.ts';
import { type ConeDimensions, discRows } from '../../parts/stand-cone.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { said, type Wording } from '../words.ts';
import { across, box, callout, hidden, outline, round, size, upright } from './strokes.ts';

export function arborViews(record: PartsRecord): Record<string, View[]> {
  const { clamp, cone } = arborDimensions(record);
  return { 'arbor-cone': coneViews(clamp, cone, discRows(cone)), 'arbor-collar': collarViews(clamp) };
}

/** A cone from the side and from its keyway's side. */
export function coneViews(clamp: ClampDimensions, d: ConeDimensions, disc: readonly ProfileRow[]): View[] {
  const [big, small, top] = [d.bigMm / 2, d.smallMm / 2, d.heightMm];
  const rows = [...disc, { rMm: small, zMm: top }];
  const widest = Math.max(...disc.map((row) => row.rMm));
  const bore = clamp.form === 'round' ? clamp.boreMm / 2 : clamp.boreMm / Math.sqrt(3);
  const { widthMm, depthMm, halfLengthMm } = d.keyway;
  const half = Math.min(halfLengthMm, widest);
  const elevation: View = {
    title: 'elevation',
    shapes: [
      outline([
        ...rows.map(({ rMm, zMm }): [number, number] => [rMm, zMm]),
        ...rows.toReversed().map(({ rMm, zMm }): [number, number] => [-rMm, zMm]),
      ]),
      ...[-bore, bore].map((x) =>
        hidden([
          [x, 0],
          [x, top],
        ]),
      ),
    ],
    dimensions: [
      across(-small, small, top, 'above', said`dia ${size(d.smallMm)}`),
      across(-big, big, d.discMm, 'above', said`dia ${size(d.bigMm)}`),
      ...(widest > big ? [across(-widest, widest, 0, 'below', said`dia ${size(2 * widest)}`)] : []),
      upright(0, top, -widest, 'left'),
      upright(0, d.discMm, widest, 'right'),
    ],
  };
  const plan: View = {
    title: 'plan',
    shapes: [
      round(0, 0, widest),
      boreShape(clamp),
      box(-widthMm / 2, -half, widthMm, 2 * half),
      ...(d.windows
        ? [0, 60, 120, 180, 240, 300].map((deg) => {
            const a = (deg * Math.PI) / 180;
            const { circleRMm, diameterMm } = d.windows!;
            return round(circleRMm * Math.cos(a), circleRMm * Math.sin(a), diameterMm / 2, 'window');
          })
        : []),
    ],
    dimensions: [
      callout(-bore, 0, 'left', boreText(clamp)),
      callout(widthMm / 2, half * 0.7, 'right', said`keyway ${size(widthMm)} wide, ${size(depthMm)} deep`),
    ],
  };
  return [elevation, plan];
}

const boreText = ({ form, boreMm }: ClampDimensions): Wording =>
  form === 'round' ? said`bore dia ${size(boreMm)}` : said`bore ${size(boreMm)} across flats`;

/** The bore as it should come out. */
export function boreShape({ form, boreMm, bore, boreReachMm }: ClampDimensions): View['shapes'][number] {
  if (form === 'round') return round(0, 0, boreMm / 2, 'bore');
  const scale = boreMm / Math.sqrt(3) / boreReachMm;
  return outline(bore.map(([x, y]): [number, number] => [x * scale, y * scale]));
}

/** The collar from its keys' side, and from the head of its screw. */
export function collarViews(d: ClampDimensions): View[] {
  const { key } = d;
  const top = d.heightMm + key.heightMm;
  const keys = [key.fromMm, -key.toMm].map((y) => box(-key.widthMm / 2, y, key.widthMm, key.toMm - key.fromMm));
  const slit = slitOutline(d, 0);
  const slitFrom = Math.sqrt(Math.max(0, (d.boreMm / 2) ** 2 - (d.slitMm / 2) ** 2));
  const plan: View = {
    title: 'plan',
    shapes: [
      outline(clampOutline(d)),
      boreShape(d),
      box(slitFrom, slit[0]![1], d.endXMm - slitFrom, d.slitMm),
      box(d.screwXMm - d.nutMm / 2, d.nutFromMm, d.nutMm, d.nutDepthMm),
      ...keys,
    ],
    dimensions: [
      across(-d.ringRMm, d.endXMm, -d.halfWidthMm, 'below'),
      upright(-d.halfWidthMm, d.halfWidthMm, -d.ringRMm, 'left'),
      across(-key.widthMm / 2, key.widthMm / 2, key.toMm, 'above', said`keys ${size(key.widthMm)}`),
      callout(-d.boreMm / 2, 0, 'left', boreText(d)),
      callout(d.endXMm, 0, 'right', said`slit ${size(d.slitMm)}`),
      callout(d.screwXMm + d.nutMm / 2, d.nutFromMm + d.nutDepthMm / 2, 'right', 'M4 nut'),
    ],
  };
  const elevation: View = {
    title: 'elevation',
    shapes: [
      box(-d.ringRMm, 0, d.ringRMm + d.endXMm, d.heightMm),
      box(-key.widthMm / 2, d.heightMm, key.widthMm, key.heightMm),
      round(d.screwXMm, d.heightMm / 2, d.screwHoleMm / 2, 'screw'),
    ],
    dimensions: [
      upright(0, d.heightMm, d.endXMm, 'right'),
      upright(0, top, -d.ringRMm, 'left'),
      callout(d.screwXMm, d.heightMm / 2, 'below', said`dia ${size(d.screwHoleMm)} for M4 x ${d.screwLengthMm}`),
    ],
  };
  return [plan, elevation];
}
