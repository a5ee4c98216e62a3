/**
 * What the second winding is wound on: a sleeve over the main one, a smaller former in its bore, or a former beside it. A plain tube with a
 * rim below and above the winding, and the holes by which its ends are tied.
 *
 *     upper rim   )=====(     P2a, P2
 *                 |     |     turns
 *     lower rim   )=====(     P1, P1a     on the bed
 *
 * The axis stays at x = y = 0, so that angles of the record are angles of the part.
 */
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { requireSolidsFit } from './bed-fit.ts';
import { at, PROUD_MM, teardrop } from './holes.ts';
import { type SecondDimensions, secondDimensions, secondOnItsOwn } from './second-dimensions.ts';
import { areaOf } from './shapes.ts';
import type { Loft, ProfileRow, Skin, Solid } from './solid.ts';
import { turned } from './volume.ts';

const NAMES = { sleeve: 'Sleeve', 'inner-former': 'Inner former', 'beside-former': 'Former beside' } as const;

/** @throws Fault (exit 4) `no-second-former`, `second-former-tall`, and as `requireFit` */
export function secondParts(record: PartsRecord): Solid[] {
  const d = secondDimensions(record);
  requireHeight(record, d);
  const { printer, former } = record;
  const own = former.kind === 'printed';
  const body = secondSkin(d);
  const holes = d.holes.map((hole) => cutter(d, hole));
  const widest = (d.outsideMm / 2 + d.rimMm) * Math.cos(Math.PI / d.segments);
  const solids: Solid[] = [
    {
      part: d.part,
      name: NAMES[d.part],
      kind: 'second former',
      quantity: 1,
      material: own ? former.material : printer.material,
      densityGCm3: own ? former.densityGCm3 : printer.densityGCm3,
      shapes: [body],
      cutters: holes,
      expected: {
        bodies: 1,
        genus: 1 + holes.length,
        genusIs: `1 bore, ${holes.length} holes in the wall`,
        minMm: [-widest, -widest, 0],
        maxMm: [widest, widest, d.lengthMm],
        volumeMm3: volumeOf(d, body),
      },
      use: useOf(record),
      printNote:
        'print standing as it lies in the file, P1 below, no supports; seam opposite the holes; no carbon- or metal-filled filament',
    },
  ];
  requireSolidsFit(solids, printer);
  return solids;
}

/** The turned body: outside with its rims, bore. */
export function secondSkin(d: SecondDimensions): Skin {
  const [r, bore, c] = [d.outsideMm / 2, d.insideMm / 2, d.chamferMm];
  const rim = r + d.rimMm;
  const { lowerRim, upperRim } = d;
  const outer: ProfileRow[] = [];
  const add = (rMm: number, zMm: number) => outer.push({ rMm, zMm });
  const onBed = lowerRim !== null && lowerRim.fromMm === 0;
  add((onBed ? rim : r) - c, 0);
  add(onBed ? rim : r, c);
  if (lowerRim !== null) {
    if (!onBed) {
      add(r, lowerRim.slopeFromMm);
      add(rim, lowerRim.fromMm);
    }
    add(rim, lowerRim.toMm);
    add(r, lowerRim.toMm);
  }
  if (upperRim !== null) {
    add(r, upperRim.slopeFromMm);
    add(rim, upperRim.fromMm);
    add(rim, upperRim.toMm);
    if (upperRim.toMm < d.lengthMm) add(r, upperRim.toMm);
  }
  if (upperRim === null || upperRim.toMm < d.lengthMm) add(r, d.lengthMm);
  return {
    kind: 'skin',
    segments: d.segments,
    hand: 'right',
    outer,
    inner: [
      { rMm: bore, zMm: d.lengthMm },
      { rMm: bore, zMm: c },
      { rMm: bore + c, zMm: 0 },
    ],
    groove: null,
  };
}

function cutter(d: SecondDimensions, { label, angleDeg, zMm, diameterMm }: SecondDimensions['holes'][number]): Loft {
  const shape = teardrop(diameterMm);
  const ring = (x: number) => shape.map(([y, z]) => at(angleDeg, x, y, zMm + z));
  // Between the rims, which a cutter keeps clear of.
  return {
    kind: 'loft',
    name: `hole ${label}`,
    rings: [ring(d.insideMm / 4), ring(d.outsideMm / 2 + PROUD_MM)],
    hubs: null,
  };
}

function volumeOf(d: SecondDimensions, skin: Skin): number {
  const n = d.segments;
  const inscribed = (n / (2 * Math.PI)) * Math.sin((2 * Math.PI) / n);
  const circumscribed = (n / Math.PI) * Math.tan(Math.PI / n);
  const holes = d.holes.reduce((sum, { diameterMm }) => sum + areaOf(teardrop(diameterMm)), 0);
  return (
    inscribed * turned(skin.outer) -
    circumscribed * turned([...skin.inner].reverse()) -
    (holes * (d.outsideMm - d.insideMm)) / 2
  );
}

const mm = (x: number): string => `${Number(x.toFixed(1))} mm`;

function useOf(record: PartsRecord): string {
  const { second, body } = secondOnItsOwn(record);
  const { slide, kind } = second;
  const { lowMm } = body;
  const place = `P1 below, its lower edge ${mm(Math.abs(lowMm))} ${lowMm < 0 ? 'below' : 'above'} the datum`;
  if (slide !== null)
    return `the second winding is wound on it; it slides on the carriage, at its tightest place ${place}`;
  const held = {
    sleeve: 'centred over the main winding by strips of card under both edges and fixed with a touch of varnish',
    inner: 'held in the bore by the carriage',
    beside: 'held on the axis by the carriage',
    'same former': '',
  }[kind];
  return `the second winding is wound on it; ${held}, ${place}`;
}

function requireHeight({ printer }: PartsRecord, d: SecondDimensions): void {
  const most = Math.floor((printer.heightMm / printer.scale[2]!) * 10) / 10;
  if (d.lengthMm <= most) return;
  throw new Fault(4, {
    code: 'second-former-tall',
    place: { key: 'second' },
    got: `${NAMES[d.part].toLowerCase()} ${mm(d.lengthMm)} long, printed standing`,
    expected: `${mm(most)} or less, which the printer can build`,
    todo: `take a narrower range of second.coupling or fewer second.turns, or a printer that builds ${mm(Math.ceil(d.lengthMm * printer.scale[2]!))}`,
  });
}
