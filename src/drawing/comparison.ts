/**
 * An old coil and its replacement side by side, both to one scale and with their starts at one height: outlines, turns where they
 * lie, taps, and between the two a row a tap with its distance from the start on either. The start hole is in front. Of the
 * old form only the diameter is known, so its ends are drawn broken. Millimetres on paper; the origin is at the left edge, at
 * the height of both starts.
 */
import type { Matched } from '../record/match-schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { SCALES, type WriteLength } from './elevation.ts';
import { formerOutline, frontOfTurn, type Wound } from './elevation-body.ts';
import { arrow, circle, earthSymbol, label, line, moved, polyline, SMALL_MM } from './shapes.ts';
import { spread } from './spread.ts';

export interface ComparisonWords {
  /** Over the coils. */
  readonly old: string;
  readonly new: string;
  readonly start: string;
  readonly finish: string;
  readonly tap: string;
  readonly hand: { readonly right: string; readonly left: string };
}

export interface Comparison extends Drawing {
  readonly scale: number;
  readonly widthMm: number;
  readonly upMm: number;
  readonly downMm: number;
}

/** A record that was made to replace a coil. */
export type MatchRecord = CoilRecord & { readonly matched: Matched };

/** From a coil's edge to where its leads end, and to the rows between the coils. */
const LEADS_MM = 9;
const LEADERS_MM = 9;
/** From one row to the next. */
const STEP = SMALL_MM * 1.25;
/** Over a coil two lines of words; under it its diameter. */
const HEAD_MM = 10;
const FOOT_MM = 11;
/** What is drawn of a form beyond its winding, where its ends are not known. */
const BEYOND_MM = 7;
/** Limits narrower than this on paper are not drawn. */
const LEAST_BAR_MM = 0.8;

/** One of the two, in its own millimetres from the start. */
interface Side {
  readonly wound: Wound;
  readonly title: string;
  readonly hand: 'right' | 'left';
  readonly earthedEnd: 'start' | 'finish';
  readonly bodyMm: number;
  /** Half the width of all that is drawn of it. */
  readonly reachMm: number;
  /** Of the start, where turn positions are counted from. */
  readonly startMm: number;
  /** Its form goes on beyond what is known. */
  readonly broken: boolean;
  readonly lowMm: number;
  readonly highMm: number;
  readonly finishMm: number;
  readonly overallMm: number;
  readonly taps: readonly { readonly tap: number; readonly angleDeg: number; readonly mm: number }[];
  outline(s: number): Shape[];
}

const BROKEN = 6;

/** The sides of a form and its broken ends. */
function brokenForm(r: number, low: number, high: number): Shape[] {
  const end = (y: number) =>
    polyline(
      Array.from(
        { length: 2 * BROKEN + 1 },
        (_, i) => [-r + (r * i) / BROKEN, y + (i % 2 === 0 ? -0.6 : 0.6)] as const,
      ),
      'thin',
    );
  return [
    line(-r, low - 0.6, -r, high - 0.6, 'outline'),
    line(r, low - 0.6, r, high - 0.6, 'outline'),
    end(low),
    end(high),
  ];
}

function oldSide({ matched: { old } }: MatchRecord, words: ComparisonWords): Side {
  const winding = {
    turns: old.turns,
    pitchMm: old.pitchMm[0]!.value,
    meanDiameterMm: old.meanDiameterMm.value,
    turnPositionsMm: old.turnPositionsMm,
  };
  const bodyMm = old.formerDiameterMm.value / 2;
  const finishMm = old.taps[old.taps.length - 1]!.positionMm.value;
  return {
    wound: { windings: [winding], frame: { hand: old.hand }, former: { ribs: null } },
    title: words.old,
    hand: old.hand,
    earthedEnd: old.earthedEnd,
    bodyMm,
    reachMm: Math.max(bodyMm, winding.meanDiameterMm / 2),
    startMm: 0,
    broken: true,
    lowMm: 0,
    highMm: finishMm,
    finishMm,
    overallMm: old.overallMm.value,
    taps: old.taps.map(({ tap, angleDeg, positionMm }) => ({ tap, angleDeg, mm: positionMm.value })),
    outline: (s) => brokenForm(bodyMm * s, -BEYOND_MM, finishMm * s + BEYOND_MM),
  };
}

function newSide(record: MatchRecord, words: ComparisonWords): Side {
  const winding = record.windings[0]!;
  const { former, frame } = record;
  const reach = [
    former.outsideDiameterMm / 2,
    (former.flange?.diameterMm ?? 0) / 2,
    (former.base?.diameterMm ?? 0) / 2,
    winding.meanDiameterMm / 2,
    ...former.ears.map(
      (ear) => Math.abs(Math.sin((ear.angleDeg * Math.PI) / 180)) * ear.centreRadiusMm + ear.widthMm / 2,
    ),
  ];
  const { startMm } = winding;
  return {
    wound: record,
    title: words.new,
    hand: frame.hand,
    earthedEnd: frame.earthedEnd,
    bodyMm: former.outsideDiameterMm / 2,
    reachMm: Math.max(...reach),
    startMm,
    broken: false,
    lowMm: -startMm,
    highMm: former.lengthMm - startMm,
    finishMm: winding.finishMm - startMm,
    overallMm: winding.wire.overallMm,
    taps: winding.taps.map(({ tap, angleDeg, positionMm }) => ({ tap, angleDeg, mm: positionMm - startMm })),
    outline: (s) => formerOutline(record, s).map((shape) => moved(shape, 0, -startMm * s)),
  };
}

/** Rows between the coils: the start, taps, the finish; of very many taps every second or third, the last always. */
function rowsOf(record: MatchRecord, words: ComparisonWords, length: WriteLength, most: number) {
  const { comparison } = record.matched;
  const last = comparison.length;
  const keep = Math.max(1, Math.ceil(last / most));
  const rows = [
    { name: words.start, oldMm: 0, newMm: 0 },
    ...comparison
      .filter(({ tap }) => (last - tap) % keep === 0)
      .map(({ tap, oldPositionMm, newPositionMm }) => ({
        name: tap === last ? `${words.finish}, ${words.tap} ${tap}` : `${words.tap} ${tap}`,
        oldMm: oldPositionMm,
        newMm: newPositionMm,
      })),
  ];
  return rows.map((row) => ({ ...row, old: length(row.oldMm), new: length(row.newMm) }));
}

type TableRow = ReturnType<typeof rowsOf>[number];

function widthsOf(rows: readonly TableRow[], measure: Measure): { old: number; name: number; new: number } {
  const widest = (of: (row: TableRow) => string, bold: boolean) =>
    Math.max(...rows.map((row) => measure.width(of(row), SMALL_MM, bold)));
  return {
    old: widest((row) => row.old, true),
    name: widest((row) => row.name, false),
    new: widest((row) => row.new, true),
  };
}

const diameterText = (side: Side, length: WriteLength) => `⌀ ${length(2 * side.bodyMm)}`;

/** Half the width of a side on paper, its words counted. */
function halfOf(side: Side, s: number, words: ComparisonWords, measure: Measure, length: WriteLength): number {
  const texts = [
    measure.width(side.title, SMALL_MM, true),
    measure.width(words.hand[side.hand], SMALL_MM),
    measure.width(diameterText(side, length), SMALL_MM, true),
  ];
  return Math.max(side.reachMm * s + 1, ...texts.map((width) => width / 2 + 0.5));
}

/** Height of the upper end, the broken one where it is not known. */
const topOf = (side: Side, s: number) => side.highMm * s + (side.broken ? BEYOND_MM + 0.6 : 0);
const bottomOf = (side: Side, s: number) => side.lowMm * s - (side.broken ? BEYOND_MM + 0.6 : 0);

/** The heights that both take at a scale, words aside. */
function heightsOf(sides: readonly Side[], s: number): { up: number; down: number } {
  return {
    up: Math.max(...sides.map((side) => topOf(side, s))),
    down: Math.max(...sides.map((side) => -bottomOf(side, s))),
  };
}

function turnsOf(side: Side, s: number): Shape[] {
  const { turns } = side.wound.windings[0]!;
  const weight = side.overallMm * s > 0.6 ? 'thin' : 'hair';
  const shapes: Shape[] = [];
  for (let k = 0; k - 0.25 < turns; k++)
    shapes.push(moved(polyline(frontOfTurn(side.wound, k, s), weight), 0, -side.startMm * s));
  return shapes;
}

/** A dot at a place on the surface: full in front, hollow behind. */
function dotsOf(side: Side, s: number, name: string): Shape[] {
  const dot = (angleDeg: number, mm: number, what: string) => {
    const a = (angleDeg * Math.PI) / 180;
    return circle(side.bodyMm * s * Math.sin(a), mm * s, 0.75, 'thin', Math.cos(a) > -1e-9 ? 0 : 1, `${name} ${what}`);
  };
  return [dot(0, 0, 'start'), ...side.taps.map(({ tap, angleDeg, mm }) => dot(angleDeg, mm, `tap ${tap}`))];
}

/** Start and finish as leads, away from the other coil; the earthed one ends in the earth symbol. */
function leadsOf(side: Side, s: number, half: number, out: 1 | -1): Shape[] {
  const finish = side.finishMm * s;
  return [
    { end: 'start', z: 0, place: 0, letter: 'S' },
    { end: 'finish', z: finish, place: Math.max(finish, 9), letter: 'F' },
  ].flatMap(({ end, z, place, letter }) => {
    const x = out * (half + 4);
    const shapes: Shape[] = [
      line(out * (side.bodyMm * s + 1), z, out * half, z, 'thin'),
      line(out * half, z, x, place, 'thin'),
      label(x + 2 * out, place + 1.2, letter, { align: 'centre', bold: true }),
    ];
    if (side.earthedEnd === end)
      shapes.push(line(x, place, x + 2 * out, place, 'thin'), ...earthSymbol(x + 2 * out, place));
    else shapes.push(circle(x + 0.6 * out, place, 0.6, 'thin', 1));
    return shapes;
  });
}

/** Former diameter under a coil. */
function diameterOf(side: Side, s: number, down: number, length: WriteLength, measure: Measure): Shape[] {
  const r = side.bodyMm * s;
  const low = bottomOf(side, s);
  const y = -down - 6;
  const text = diameterText(side, length);
  const half = measure.width(text, SMALL_MM, true) / 2 + 1.5;
  const shapes: Shape[] = [line(-r, low - 0.6, -r, y - 1, 'hair'), line(r, low - 0.6, r, y - 1, 'hair')];
  if (r > half + 3)
    shapes.push(
      ...arrow(-half, y, -r, y),
      ...arrow(half, y, r, y),
      label(0, y, text, { align: 'centre', anchor: 'middle', bold: true }),
    );
  else
    shapes.push(
      ...arrow(-r - 5, y, -r, y),
      ...arrow(r + 5, y, r, y),
      label(0, y - 4.5, text, { align: 'centre', bold: true }),
    );
  return shapes;
}

/** Where the taps of the old coil may lie, at its edge that faces the rows. */
function limitBars(record: MatchRecord, s: number, x: number): Shape[] {
  return record.matched.old.taps.flatMap(({ positionMm: { low, high } }) =>
    (high - low) * s < LEAST_BAR_MM
      ? []
      : [
          line(x, low * s, x, high * s, 'thin'),
          line(x - 0.6, low * s, x + 0.6, low * s, 'thin'),
          line(x - 0.6, high * s, x + 0.6, high * s, 'thin'),
        ],
  );
}

/** The pair at the largest usual scale at which it takes no more than the width and about the height. */
export function comparison(
  record: MatchRecord,
  widthMm: number,
  heightMm: number,
  words: ComparisonWords,
  measure: Measure,
  length: WriteLength,
): Comparison {
  const sides = [oldSide(record, words), newSide(record, words)] as const;
  const rows = rowsOf(record, words, length, Math.max(4, Math.floor(heightMm / STEP) - 2));
  const widths = widthsOf(rows, measure);
  const between = 2 * LEADERS_MM + widths.old + widths.name + widths.new + 5;
  const wide = (s: number) =>
    between + 2 * LEADS_MM + sides.reduce((sum, side) => sum + 2 * halfOf(side, s, words, measure, length), 0);
  const high = (s: number) => {
    const { up, down } = heightsOf(sides, s);
    return up + down + HEAD_MM + FOOT_MM;
  };
  let scale = SCALES.find((one) => wide(one) <= widthMm && high(one) <= heightMm) ?? SCALES[SCALES.length - 1]!;
  while (wide(scale) > widthMm && scale > 1e-3) scale *= 0.8;
  return drawn(record, sides, rows, widths, { scale, widthMm, spareMm: Math.max(0, widthMm - wide(scale)) }, words, {
    measure,
    length,
  });
}

function drawn(
  record: MatchRecord,
  sides: readonly [Side, Side],
  rows: readonly TableRow[],
  widths: ReturnType<typeof widthsOf>,
  { scale, widthMm, spareMm }: { scale: number; widthMm: number; spareMm: number },
  words: ComparisonWords,
  { measure, length }: { measure: Measure; length: WriteLength },
): Comparison {
  const halves = sides.map((side) => halfOf(side, scale, words, measure, length)) as [number, number];
  const { up, down } = heightsOf(sides, scale);
  const axes = [spareMm / 2 + LEADS_MM + halves[0], widthMm - spareMm / 2 - LEADS_MM - halves[1]] as const;
  const shapes: Shape[] = [];
  sides.forEach((side, i) => {
    const name = i === 0 ? 'old' : 'new';
    const top = topOf(side, scale) + 2;
    const own: Shape[] = [
      ...side.outline(scale),
      line(0, -down - 2, 0, top, 'hair', 'centre'),
      ...turnsOf(side, scale),
      ...dotsOf(side, scale, name),
      ...leadsOf(side, scale, halves[i]!, i === 0 ? -1 : 1),
      ...diameterOf(side, scale, down, length, measure),
      label(0, top + 5.6, side.title, { align: 'centre', bold: true }),
      label(0, top + 1.6, words.hand[side.hand], { align: 'centre' }),
    ];
    shapes.push(...own.map((shape) => moved(shape, axes[i]!, 0)));
  });
  const left = axes[0] + halves[0];
  const right = axes[1] - halves[1];
  shapes.push(...limitBars(record, scale, left + 1));
  const places = spread(
    rows.map((row) => ((row.oldMm + row.newMm) / 2) * scale),
    STEP,
    -down - FOOT_MM + STEP,
  );
  const middle = (left + LEADERS_MM + right - LEADERS_MM + widths.old - widths.new) / 2;
  const oldX = left + LEADERS_MM + widths.old;
  const newX = right - LEADERS_MM - widths.new;
  rows.forEach((row, i) => {
    const y = places[i]!;
    const from = [row.oldMm * scale, row.newMm * scale] as const;
    const edge = [axes[0] + sides[0].bodyMm * scale + 1, axes[1] - sides[1].bodyMm * scale - 1] as const;
    shapes.push(
      line(edge[0], from[0], left + 2, from[0], 'hair'),
      line(left + 2, from[0], left + LEADERS_MM - 2, y, 'hair'),
      line(left + LEADERS_MM - 2, y, left + LEADERS_MM - 1, y, 'hair'),
      line(edge[1], from[1], right - 2, from[1], 'hair'),
      line(right - 2, from[1], right - LEADERS_MM + 2, y, 'hair'),
      line(right - LEADERS_MM + 2, y, right - LEADERS_MM + 1, y, 'hair'),
      label(oldX, y, row.old, { align: 'right', anchor: 'middle', bold: true }),
      label(middle, y, row.name, { align: 'centre', anchor: 'middle' }),
      label(newX, y, row.new, { align: 'left', anchor: 'middle', bold: true }),
    );
  });
  return {
    shapes,
    scale,
    widthMm,
    upMm: Math.max(up + HEAD_MM, places[places.length - 1]! + STEP / 2),
    downMm: Math.max(down + FOOT_MM, -places[0]! + STEP / 2),
  };
}
