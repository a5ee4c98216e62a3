/**
 * The coil seen from outside, the start hole in front, to scale: former, turns where they lie, taps and their distance
 * from the datum. Angles grow to the right on the side that is seen, so a right-hand coil climbs to the right.
 * Millimetres on paper; the origin is where the axis meets the datum.
 */
import type { CoilRecord } from '../record/schema.ts';
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { formerOutline, turns } from './elevation-body.ts';
import { seamLines } from './seam-lines.ts';
import { secondHere, secondTurns } from './second-turns.ts';
import { arrow, arrowHead, circle, earthSymbol, label, line, polyline, SMALL_MM } from './shapes.ts';
import { spread } from './spread.ts';

export { frontOfTurn } from './elevation-body.ts';

export interface ElevationWords {
  readonly datum: string;
  readonly start: string;
  readonly finish: string;
  readonly tap: string;
  readonly top: string;
  readonly rightHand: string;
  readonly leftHand: string;
  /** Beside the seam of a former in sections. */
  readonly seam: string;
}

/** How lengths are written beside the coil: in millimetres to the hundredth where nothing else is said. */
export type WriteLength = (mm: number) => string;
const millimetres: WriteLength = (mm) => mm.toFixed(2);

export interface Elevation extends Drawing {
  readonly scale: number;
  /** How far it reaches left and right of the axis, above the datum and below it. */
  readonly leftMm: number;
  readonly rightMm: number;
  readonly upMm: number;
  readonly downMm: number;
}

/** Usual scales, the largest first. */
export const SCALES = [
  5,
  4,
  3,
  2.5,
  2,
  1.5,
  1,
  1 / 1.5,
  1 / 2,
  1 / 2.5,
  1 / 3,
  1 / 4,
  1 / 5,
  1 / 7.5,
  1 / 10,
  1 / 15,
  1 / 20,
];
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

/** Taps named beside the drawing where nothing else is said, at most: more would make the column higher than a page. */
const MOST_NAMED = 40;

/** Taps for whose names there is room beside a drawing of such a height, with those of datum, start and top. */
export const namesIn = (heightMm: number): number => Math.max(4, Math.floor((heightMm + 10) / STEP) - 3);

/** Of so many taps one in how many is named, the last always, so that `most` are. */
export const oneNamedIn = (taps: number, most: number): number => Math.ceil(taps / most);

/** The column of distances: what is named and where it lies. */
function ordinateItems(
  record: CoilRecord,
  words: ElevationWords,
  length: WriteLength,
  mostNamed: number,
): { name: string; z: number; value: string }[] {
  const winding = record.windings[0]!;
  const last = winding.taps.length;
  const keep = oneNamedIn(last, mostNamed);
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
  const second = secondHere(record);
  if (second !== null) {
    for (const { label: name, axialMm } of second.holes)
      if (name === 'P1' || name === 'P2') items.push({ name, z: axialMm });
    items.sort((a, b) => a.z - b.z);
  }
  return items.map((item) => ({ ...item, value: length(item.z) }));
}

/** Widths of the two columns of text beside the coil. */
function ordinateWidths(
  record: CoilRecord,
  words: ElevationWords,
  measure: Measure,
  length: WriteLength,
): [number, number] {
  // Of all taps, so that the scale does not hang on which are named.
  const items = ordinateItems(record, words, length, MOST_NAMED);
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
  length: WriteLength = millimetres,
): number {
  const [names, values] = ordinateWidths(record, words, measure, length);
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
function ordinates(
  record: CoilRecord,
  s: number,
  words: ElevationWords,
  edge: number,
  measure: Measure,
  length: WriteLength,
  mostNamed: number,
) {
  const items = ordinateItems(record, words, length, mostNamed);
  const [nameWidth, valueWidth] = ordinateWidths(record, words, measure, length);
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

/** Where the leads of start and finish stand: apart even on a coil drawn small. */
function leadHeights(record: CoilRecord, s: number): [number, number] {
  const { startMm, finishMm } = record.windings[0]!;
  return [startMm * s, Math.max(finishMm * s, startMm * s + 9)];
}

/** Start and finish as leads on the left; the earthed one ends in the earth symbol. */
function leads(record: CoilRecord, s: number, edge: number): Shape[] {
  const winding = record.windings[0]!;
  const body = -(record.former.outsideDiameterMm / 2) * s;
  const shapes: Shape[] = [];
  const [startZ, finishZ] = leadHeights(record, s);
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

/** Least from a lead to the word beside a seam. */
const CLEAR_OF_LEADS = 6;

/** Seams of a former in sections, as far as they are in front, named at the left. */
function seams(record: CoilRecord, s: number, edge: number, words: ElevationWords): Shape[] {
  const r = (record.former.outsideDiameterMm / 2) * s;
  const taken = leadHeights(record, s);
  return seamLines(record, -90, 90).flatMap((places) => {
    const points = places.map(([a, z]) => [r * Math.sin((a * Math.PI) / 180), z * s] as const);
    const z = points[0]![1];
    // Up and down in turns, until the word is clear of both leads.
    let y = z;
    for (let off = 0; taken.some((at) => Math.abs(at - y) < CLEAR_OF_LEADS); off++)
      y = z + (off % 2 === 0 ? 1 : -1) * Math.ceil((off + 1) / 2);
    return [
      polyline(points, 'outline'),
      line(-r, z, -edge, y, 'hair'),
      label(-edge - 0.6, y, words.seam, { align: 'right', anchor: 'middle' }),
    ];
  });
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

/** The whole picture at a scale; of more than `mostNamed` taps every second, third ... is named beside it. */
export function elevation(
  record: CoilRecord,
  scale: number,
  words: ElevationWords,
  measure: Measure,
  length: WriteLength = millimetres,
  mostNamed = MOST_NAMED,
): Elevation {
  const edge = halfWidth(record) * scale + 1;
  const top = record.former.lengthMm * scale;
  const r = (record.former.outsideDiameterMm / 2) * scale;
  const column = ordinates(record, scale, words, edge, measure, length, mostNamed);
  const shapes: Shape[] = [
    ...formerOutline(record, scale),
    line(0, -3, 0, top + 2, 'hair', 'centre'),
    ...turns(record, scale),
    ...secondTurns(record, scale),
    ...seams(record, scale, edge, words),
    ...dots(record, scale),
    ...leads(record, scale, edge),
    ...column.shapes,
    ...handArrow(record, top + 2.5, words),
    // The datum runs on under the foot; the diameter stands below it.
    line(-edge, 0, edge + 1, 0, 'thin'),
    line(-r, -1, -r, -7, 'hair'),
    line(r, -1, r, -7, 'hair'),
  ];
  const size = `⌀ ${length(record.former.outsideDiameterMm)}`;
  const half = measure.width(size, SMALL_MM, true) / 2 + 1.5;
  let reach = edge + LEADS_MM;
  if (r > half + 3) {
    shapes.push(...arrow(-half, -6, -r, -6), ...arrow(half, -6, r, -6));
    shapes.push(label(0, -6, size, { align: 'centre', anchor: 'middle', bold: true }));
  } else {
    shapes.push(...arrow(-r - 5, -6, -r, -6), ...arrow(r + 5, -6, r, -6));
    // Beside a slim former the column of text may reach down to it.
    const x = Math.min(0, edge + TEXT_MM - 1 - half);
    shapes.push(label(x, -10.5, size, { align: 'centre', bold: true }));
    reach = Math.max(reach, half - x);
  }
  return {
    shapes,
    scale,
    leftMm: reach,
    rightMm: column.right,
    upMm: Math.max(top + 12, column.top),
    downMm: Math.max(r > half + 3 ? 8 : 12, -column.bottom),
  };
}
