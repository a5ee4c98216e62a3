/**
 * The coil seen from outside, the start hole in front, to scale: former, turns where they lie, taps and their distance
 * from the datum. Angles grow to the right on the side that is seen, so a right-hand coil climbs to the right.
 * Millimetres on paper; the origin is where the axis meets the datum.
 */
import { axialAt } from '../coil/layout.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { arrow, arrowHead, circle, earthSymbol, label, line, polyline, rectangle, SMALL_MM } from './shapes.ts';
import { spread } from './spread.ts';

export interface ElevationWords {
  readonly datum: string;
  readonly start: string;
  readonly finish: string;
  readonly tap: string;
  readonly top: string;
  readonly rightHand: string;
  readonly leftHand: string;
}

export interface Elevation extends Drawing {
  readonly scale: number;
  /** How far it reaches left and right of the axis, above the datum and below it. */
  readonly leftMm: number;
  readonly rightMm: number;
  readonly upMm: number;
  readonly downMm: number;
}

const SCALES = [5, 4, 3, 2.5, 2, 1.5, 1, 1 / 1.5, 1 / 2, 1 / 2.5, 1 / 3, 1 / 4, 1 / 5, 1 / 7.5, 1 / 10, 1 / 15, 1 / 20];
/** Room for the leads left of the coil, and from its right edge to the column of text. */
const LEADS_MM = 9;
const TEXT_MM = 7;
/** From one label to the next. */
const STEP = SMALL_MM * 1.25;

/** Half the width of the former with its rims and ears, as seen. */
function halfWidth(record: CoilRecord): number {
  const { former } = record;
  const reach = [
    former.outsideDiameterMm / 2,
    (former.flange?.diameterMm ?? 0) / 2,
    (former.base?.diameterMm ?? 0) / 2,
    record.windings[0]!.meanDiameterMm / 2,
  ];
  for (const ear of former.ears)
    reach.push(Math.abs(Math.sin((ear.angleDeg * Math.PI) / 180)) * ear.centreRadiusMm + ear.widthMm / 2);
  return Math.max(...reach);
}

/** Taps named beside the drawing, at most: more would make the column higher than a page. */
const MOST_NAMED = 40;

/** The column of distances: what is named and where it lies. */
function ordinateItems(record: CoilRecord, words: ElevationWords): { name: string; z: number; value: string }[] {
  const winding = record.windings[0]!;
  const last = winding.taps.length;
  // Of very many taps every second or third is named beside the drawing; the tap table has them all.
  const keep = Math.ceil(last / MOST_NAMED);
  const items = [
    { name: words.datum, z: 0 },
    { name: words.start, z: winding.startMm },
    ...winding.taps
      .filter(({ tap }) => (last - tap) % keep === 0)
      .map(({ tap, positionMm }) => ({
        name: tap === last ? `${words.finish}, ${words.tap} ${tap}` : `${words.tap} ${tap}`,
        z: positionMm,
      })),
    { name: words.top, z: record.former.lengthMm },
  ];
  return items.map((item) => ({ ...item, value: item.z.toFixed(2) }));
}

/** Widths of the two columns of text beside the coil. */
function ordinateWidths(record: CoilRecord, words: ElevationWords, measure: Measure): [number, number] {
  const items = ordinateItems(record, words);
  return [
    Math.max(...items.map((item) => measure.width(item.name, SMALL_MM))),
    Math.max(...items.map((item) => measure.width(item.value, SMALL_MM, true))),
  ];
}

/** The largest usual scale at which the picture takes no more than a width, and the former no more than a height. */
export function elevationScale(
  record: CoilRecord,
  widthMm: number,
  heightMm: number,
  words: ElevationWords,
  measure: Measure,
): number {
  const [names, values] = ordinateWidths(record, words, measure);
  const room = widthMm - 2 - LEADS_MM - TEXT_MM - names - 2 - values;
  const wide = 2 * halfWidth(record);
  const fits = SCALES.find((scale) => wide * scale <= room && record.former.lengthMm * scale <= heightMm);
  return fits ?? Math.min(room / wide, heightMm / record.former.lengthMm);
}

/** `1:2`, `2:1`. */
export function scaleText(scale: number): string {
  const digits = (x: number) => `${Number(x.toFixed(2))}`;
  return scale >= 1 ? `${digits(scale)}:1` : `1:${digits(1 / scale)}`;
}

function formerOutline(record: CoilRecord, s: number): Shape[] {
  const { former } = record;
  const r = (former.outsideDiameterMm / 2) * s;
  const top = former.lengthMm * s;
  const shapes: Shape[] = [];
  for (const ear of former.ears) {
    const a = (ear.angleDeg * Math.PI) / 180;
    const x = Math.sin(a) * ear.centreRadiusMm * s;
    const half = (ear.widthMm / 2) * s;
    const behind = Math.cos(a) < 0;
    shapes.push(rectangle(x - half, 0, 2 * half, ear.thicknessMm * s, 'thin', undefined, behind ? 'dashed' : 'solid'));
  }
  const { flange, base } = former;
  const low = (base?.thicknessMm ?? flange?.lowerMm ?? 0) * s;
  const high = top - (flange ? flange.upperMm * s : 0);
  shapes.push(rectangle(-r, low, 2 * r, high - low, 'outline', 1));
  if (flange) {
    const rim = (flange.diameterMm / 2) * s;
    if (!base) shapes.push(rectangle(-rim, 0, 2 * rim, flange.lowerMm * s, 'outline'));
    shapes.push(rectangle(-rim, high, 2 * rim, flange.upperMm * s, 'outline'));
  }
  if (base) shapes.push(rectangle((-base.diameterMm / 2) * s, 0, base.diameterMm * s, base.thicknessMm * s, 'outline'));
  return shapes;
}

/** The front half of the turn that comes round to the start hole's side at `k` turns, as points of the picture at a scale. */
export function frontOfTurn(record: Pick<CoilRecord, 'windings' | 'frame'>, k: number, s: number): [number, number][] {
  const winding = record.windings[0]!;
  const sense = record.frame.hand === 'right' ? 1 : -1;
  const r = (winding.meanDiameterMm / 2) * s;
  const from = Math.max(0, k - 0.25);
  const to = Math.min(winding.turns, k + 0.25);
  return Array.from({ length: 11 }, (_, i) => {
    const u = from + ((to - from) * i) / 10;
    const z = axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, u);
    return [sense * r * Math.sin(2 * Math.PI * u), z * s];
  });
}

/** The front half of every turn. */
function turns(record: CoilRecord, s: number): Shape[] {
  const winding = record.windings[0]!;
  const shapes: Shape[] = [];
  for (let k = 0; k - 0.25 < winding.turns; k++)
    shapes.push(polyline(frontOfTurn(record, k, s), winding.wire.overallMm * s > 0.6 ? 'thin' : 'hair'));
  return shapes;
}

/** A dot at a place on the surface: full in front, hollow behind. */
function dot(record: CoilRecord, s: number, angleDeg: number, axialMm: number, name: string): Shape {
  const a = (angleDeg * Math.PI) / 180;
  const x = (record.former.outsideDiameterMm / 2) * s * Math.sin(a);
  return circle(x, axialMm * s, 0.75, 'thin', Math.cos(a) > -1e-9 ? 0 : 1, name);
}

function dots(record: CoilRecord, s: number): Shape[] {
  const winding = record.windings[0]!;
  const shapes = winding.taps.slice(0, -1).map((tap) => dot(record, s, tap.angleDeg, tap.positionMm, `tap ${tap.tap}`));
  for (const { unit, angleDeg, positionMm } of winding.unitTaps ?? [])
    shapes.push(dot(record, s, angleDeg, positionMm, `unit tap ${unit}`));
  const whole = winding.taps[winding.taps.length - 1]!;
  shapes.push(dot(record, s, 0, winding.startMm, 'start'));
  shapes.push(dot(record, s, whole.angleDeg, winding.finishMm, 'finish'));
  return shapes;
}

/** Distances from the datum, in a column right of the coil. */
function ordinates(record: CoilRecord, s: number, words: ElevationWords, edge: number, measure: Measure) {
  const items = ordinateItems(record, words);
  const [nameWidth, valueWidth] = ordinateWidths(record, words, measure);
  const places = spread(
    items.map((item) => item.z * s),
    STEP,
    -16,
  );
  const body = (record.former.outsideDiameterMm / 2) * s;
  const shapes: Shape[] = [];
  items.forEach((item, i) => {
    const z = item.z * s;
    const y = places[i]!;
    shapes.push(line(body + 1, z, edge + 1, z, 'hair'), line(edge + 1, z, edge + TEXT_MM - 2, y, 'hair'));
    shapes.push(line(edge + TEXT_MM - 2, y, edge + TEXT_MM - 1, y, 'hair'));
    shapes.push(label(edge + TEXT_MM, y, item.name, { anchor: 'middle' }));
    const right = edge + TEXT_MM + nameWidth + 2 + valueWidth;
    shapes.push(label(right, y, item.value, { anchor: 'middle', align: 'right', bold: true }));
  });
  return {
    shapes,
    right: edge + TEXT_MM + nameWidth + 2 + valueWidth,
    top: places[places.length - 1]! + STEP / 2,
    bottom: places[0]! - STEP / 2,
  };
}

/** Start and finish as leads on the left; the earthed one ends in the earth symbol. */
function leads(record: CoilRecord, s: number, edge: number): Shape[] {
  const winding = record.windings[0]!;
  const body = -(record.former.outsideDiameterMm / 2) * s;
  const shapes: Shape[] = [];
  const startZ = winding.startMm * s;
  // The two stand apart even on a coil drawn small.
  const finishZ = Math.max(winding.finishMm * s, startZ + 9);
  for (const [end, z, place, letter] of [
    ['start', startZ, startZ, 'S'],
    ['finish', winding.finishMm * s, finishZ, 'F'],
  ] as const) {
    const x = -edge - 4;
    shapes.push(line(body - 1, z, -edge, z, 'thin'), line(-edge, z, x, place, 'thin'));
    if (record.frame.earthedEnd === end) {
      shapes.push(...earthSymbol(x - 2, place), line(x, place, x - 2, place, 'thin'));
      shapes.push(label(x - 2, place + 1.2, letter, { align: 'centre', bold: true }));
    } else {
      shapes.push(circle(x - 0.6, place, 0.6, 'thin', 1));
      shapes.push(label(x - 2, place + 1.2, letter, { align: 'centre', bold: true }));
    }
  }
  return shapes;
}

/** An arrow that climbs the way the wire runs on the side that is seen. */
function handArrow(record: CoilRecord, y: number, words: ElevationWords): Shape[] {
  const sense = record.frame.hand === 'right' ? 1 : -1;
  const points: [number, number][] = [];
  for (let i = 0; i <= 16; i++) {
    const t = Math.PI + (Math.PI * 0.93 * i) / 16;
    points.push([sense * 11 * Math.cos(t), y + 3 + 2.4 * Math.sin(t) + (1.6 * i) / 16]);
  }
  const [x1, y1] = points[points.length - 2]!;
  const [x2, y2] = points[points.length - 1]!;
  const angle = (Math.atan2(y2 - y1, x2 - x1) * 180) / Math.PI;
  const hand = record.frame.hand === 'right' ? words.rightHand : words.leftHand;
  return [
    polyline(points, 'outline'),
    arrowHead(x2 + Math.cos((angle * Math.PI) / 180), y2 + Math.sin((angle * Math.PI) / 180), angle, 3.2),
    label(0, y + 6.2, hand, { align: 'centre', bold: true }),
  ];
}

/** The whole picture at a scale. */
export function elevation(record: CoilRecord, scale: number, words: ElevationWords, measure: Measure): Elevation {
  const edge = halfWidth(record) * scale + 1;
  const top = record.former.lengthMm * scale;
  const r = (record.former.outsideDiameterMm / 2) * scale;
  const column = ordinates(record, scale, words, edge, measure);
  const shapes: Shape[] = [
    ...formerOutline(record, scale),
    line(0, -3, 0, top + 2, 'hair', 'centre'),
    ...turns(record, scale),
    ...dots(record, scale),
    ...leads(record, scale, edge),
    ...column.shapes,
    ...handArrow(record, top + 2.5, words),
    // The datum runs on under the foot; the diameter stands below it.
    line(-edge, 0, edge + 1, 0, 'thin'),
    line(-r, -1, -r, -7, 'hair'),
    line(r, -1, r, -7, 'hair'),
  ];
  const size = `⌀ ${record.former.outsideDiameterMm.toFixed(2)}`;
  const half = measure.width(size, SMALL_MM, true) / 2 + 1.5;
  if (r > half + 3) {
    shapes.push(...arrow(-half, -6, -r, -6), ...arrow(half, -6, r, -6));
    shapes.push(label(0, -6, size, { align: 'centre', anchor: 'middle', bold: true }));
  } else {
    shapes.push(...arrow(-r - 5, -6, -r, -6), ...arrow(r + 5, -6, r, -6));
    shapes.push(label(0, -10.5, size, { align: 'centre', bold: true }));
  }
  return {
    shapes,
    scale,
    leftMm: edge + LEADS_MM,
    rightMm: column.right,
    upMm: Math.max(top + 12, column.top),
    downMm: Math.max(r > half + 3 ? 8 : 12, -column.bottom),
  };
}
