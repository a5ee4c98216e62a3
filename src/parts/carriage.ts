/**
 * The carriage of a second winding with a former of its own: a rail on the axis with the scale of coupling on it, a plug for the bore of
 * the main former, and hubs for what the second winding is wound on. What slides is read at its outer edge, with which the outer hub is flush.
 */
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { requireSolidsFit } from './bed-fit.ts';
import { type CarriageDimensions, carriageDimensions, type Disc, discOutline, GAP_MM } from './carriage-dimensions.ts';
import { textStrokes, textWidthMm } from './lettering.ts';
import { secondOnItsOwn } from './second-dimensions.ts';
import { areaOf, rectangle } from './shapes.ts';
import { slab, slabMm3 } from './slab.ts';
import type { Engraving, Frame, Loft, Point2, Point3, Solid } from './solid.ts';
import { CUT_MM, cutMm3, plainer, STROKE_MM } from './words.ts';

/** Ticks run out over the edge of the rail by this. */
const OVER_MM = 0.5;

/** @throws Fault (exit 4) as `carriageDimensions`, `carriage-long`, and as `requireFit` */
export function carriageParts(record: PartsRecord): Solid[] {
  const d = carriageDimensions(record);
  requireBed(record, d);
  const solids = [railSolid(record, d), discSolid(record, d, d.plug), discSolid(record, d, d.hub)];
  requireSolidsFit(solids, record.printer);
  return solids;
}

/**
 * Ticks and numbers on the upper face, in a frame whose x runs across the rail from the edge with the ticks and whose y runs up in use: from
 * the plug outwards where the rail points up, towards the plug where it hangs. So the numbers stand upright either way.
 */
export function scaleStrokes({ rail, marks, out }: CarriageDimensions): { ticks: Point2[][]; figures: Point2[][] } {
  const half = rail.widthMm / 2;
  const ticks = marks.map(({ atMm, text }): Point2[] => [
    [-half - OVER_MM, out * atMm],
    [-half + (text === null ? rail.tickMm : rail.longTickMm), out * atMm],
  ]);
  const figures = marks.flatMap(({ atMm, text }) => {
    if (text === null) return [];
    const wide = textWidthMm(text, rail.figureMm);
    const from = -half + rail.longTickMm + GAP_MM;
    if (rail.figures === 'across') {
      return textStrokes(text, rail.figureMm, from, out * atMm - rail.figureMm / 2);
    }
    // Beyond the tick, letters one above the other when the rail stands: read from the side.
    const start = out > 0 ? atMm + GAP_MM : -atMm - GAP_MM - wide;
    return textStrokes(text, rail.figureMm, 0, 0).map((line) =>
      line.map(([x, y]): Point2 => [half - GAP_MM - y, start + x]),
    );
  });
  return { ticks, figures: figures.map((line) => plainer(line)) };
}

function railSolid(record: PartsRecord, d: CarriageDimensions): Solid {
  const { rail, out } = d;
  const { printer } = record;
  const [half, across] = [rail.lengthMm / 2, rail.widthMm / 2];
  const body = slab('rail', -half, -across, rail.lengthMm, rail.widthMm, rail.heightMm, rail.chamferMm);
  const { ticks, figures } = scaleStrokes(d);
  const strokes = [...ticks, ...figures];
  const scale: Engraving = {
    kind: 'engraving',
    name: 'scale',
    zMm: rail.heightMm,
    depthMm: CUT_MM,
    widthMm: STROKE_MM,
    strokes,
    frame: frameOf(rail.lengthMm, out),
  };
  return {
    part: 'carriage-rail',
    name: 'Carriage, rail',
    kind: 'carriage',
    quantity: 1,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [body],
    cutters: strokes.length === 0 ? [] : [scale],
    expected: {
      bodies: 1,
      genus: 0,
      genusIs: 'no hole',
      minMm: [-half, -across, 0],
      maxMm: [half, across, rail.heightMm],
      volumeMm3:
        slabMm3(rail.lengthMm, rail.widthMm, rail.heightMm, rail.chamferMm) -
        (strokes.length === 0 ? 0 : cutMm3(scale) - ticks.length * OVER_MM * STROKE_MM * CUT_MM),
    },
    use: railUse(record, d),
    printNote: 'flat as it lies, scale up, no supports; a slow top layer keeps the figures sharp',
  };
}

/** The rail lies along x, its end in the plug at the left. */
function frameOf(lengthMm: number, out: 1 | -1): Frame {
  const origin: Point3 = [-lengthMm / 2, 0, 0];
  return out > 0 ? { origin, x: [0, -1, 0], y: [1, 0, 0] } : { origin, x: [0, 1, 0], y: [-1, 0, 0] };
}

function discSolid(record: PartsRecord, d: CarriageDimensions, disc: Disc): Solid {
  const { printer } = record;
  const { depthMm, chamferMm: c, slotWidthMm, slotDepthMm } = disc;
  const ring = (inset: number, z: number) => discOutline(disc, inset).map(([x, y]): Point3 => [x, y, z]);
  const body: Loft = {
    kind: 'loft',
    name: 'disc',
    rings: [ring(c, 0), ring(0, c), ring(0, depthMm)],
    hubs: [
      [0, 0, 0],
      [0, 0, depthMm],
    ],
  };
  const mouth = (more: number, z: number): Point3[] =>
    rectangle(-slotWidthMm / 2 - more, -slotDepthMm / 2 - more, slotWidthMm + 2 * more, slotDepthMm + 2 * more).map(
      ([x, y]): Point3 => [x, y, z],
    );
  // Opened out at the bed, where the first layers would narrow it.
  const slot: Loft = {
    kind: 'loft',
    name: 'hole for the rail',
    rings: [mouth(c + 1, -1), mouth(0, c), mouth(0, depthMm + 1)],
    hubs: null,
  };
  const area = areaOf(discOutline(disc));
  const foot = (areaOf(discOutline(disc, c)) + area + 4 * areaOf(discOutline(disc, c / 2))) * (c / 6);
  const bored = slotWidthMm * slotDepthMm * depthMm + (slotWidthMm + slotDepthMm) * c ** 2 + (4 / 3) * c ** 3;
  const plug = disc.part === 'carriage-plug';
  return {
    part: disc.part,
    name: plug ? 'Carriage, plug' : 'Carriage, hub',
    kind: 'carriage',
    quantity: disc.quantity,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [body],
    cutters: [slot],
    expected: {
      bodies: 1,
      genus: 1,
      genusIs: '1 hole for the rail',
      minMm: [-disc.armR, -disc.armR, 0],
      maxMm: [disc.armR, disc.armR, depthMm],
      volumeMm3: area * (depthMm - c) + foot - bored,
    },
    use: plug ? plugUse(record, d) : hubUse(record, d),
    printNote: 'flat as it lies, no supports; the face that was on top in printing looks outwards in use',
  };
}

const mm = (x: number): string => `${Number(x.toFixed(1))} mm`;
const BODY = { sleeve: 'sleeve', inner: 'inner former', beside: 'former beside', 'same former': '' } as const;

function railUse(record: PartsRecord, d: CarriageDimensions): string {
  const { second } = secondOnItsOwn(record);
  const glued = `glued into carriage-plug, its ${d.marks.length > 0 ? 'end without marks' : 'end'} flush with the face of the plug ${second.kind === 'inner' ? 'that will be outside' : 'that will be inside'}`;
  if (!d.slides)
    return `${glued}; the outer hub is glued on flush with its other end, which puts the ${BODY[second.kind]} in its place`;
  return `${glued}; the outer edge of the ${BODY[second.kind]} stands at its coupling with the whole coil; a slip of paper beside the rail keeps it where it is put`;
}

function plugUse({ former }: PartsRecord, d: CarriageDimensions): string {
  const inner = d.railZeroMm === 0 || d.railZeroMm === former.lengthMm;
  const end = d.out > 0 === inner ? 'lower' : 'upper';
  return `pressed into the ${end} end of the main former after winding, flush with it, its gaps where wires pass, then fixed with a touch of glue`;
}

function hubUse(record: PartsRecord, { hub, slides }: CarriageDimensions): string {
  const { second } = secondOnItsOwn(record);
  const where = hub.quantity > 1 ? 'one flush with each end' : 'flush with the outer end';
  return `glued into the ${BODY[second.kind]}, ${where}, gaps where wires pass; ${slides ? 'slides along' : 'glued to'} the rail`;
}

function requireBed(record: PartsRecord, { rail }: CarriageDimensions): void {
  const { printer } = record;
  const most = Math.floor(10 * Math.max(printer.bedXMm / printer.scale[0]!, printer.bedYMm / printer.scale[1]!)) / 10;
  if (rail.lengthMm <= most) return;
  const { second } = secondOnItsOwn(record);
  const over = rail.lengthMm - most;
  // The loosest mark that a rail for this bed would end with.
  const far = second.slide?.scale.filter((mark) => mark.mm <= Math.abs(second.slide!.travelMm) - over).at(-1) ?? null;
  const narrower =
    far === null || far.mm === 0
      ? ''
      : `end the range of second.coupling at ${far.coupling} instead of ${second.slide!.scale.at(-1)!.coupling}, or `;
  throw new Fault(4, {
    code: 'carriage-long',
    place: { key: 'second' },
    got: `a rail ${mm(rail.lengthMm)} long, printed lying`,
    expected: `${mm(most)} or less, which the bed takes`,
    todo: `${narrower}use a printer with a bed ${mm(Math.ceil(rail.lengthMm))} wide, or leave carriage out of parts`,
  });
}
