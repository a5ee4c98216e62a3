/**
 * The method of two capacitors, with its graph to fill in (common practice): 1/f² = 4 pi² L (C + C0) is a straight line over
 * the added capacitance C, its slope gives the inductance and its intercept the coil's own capacitance with strays.
 */
import { LINE } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { arrowHead, circle, label, line, movedAll, polygon, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, heading, paragraph, stack } from './block.ts';
import { kiloHertz } from './check-blocks.ts';
import { BLANK, CENTRE, columnsOf } from './check-blocks-columns.ts';
import { table } from './table.ts';
import { figures, short } from './text.ts';

/** Of inductance in uH: over 1/(MHz² pF). */
const FACTOR = 1e6 / (4 * Math.PI ** 2);
/** The axis runs on beyond the largest capacitor by this share, and to the left of none by that. */
const BEYOND = 0.08;
const BEFORE = 0.12;
/** Widest step between lines of the grid, in millimetres; they are as near as a pencil can use. */
const GRID_MM = 9;

/** A round step that divides a length into pieces of `GRID_MM` at most. */
function roundStep(range: number, lengthMm: number): number {
  const least = (range * GRID_MM) / lengthMm;
  const power = 10 ** Math.floor(Math.log10(least));
  const digit = [1, 2, 5, 10].find((each) => each * power >= least * 0.999) ?? 10;
  return digit * power;
}

const stepsTo = (from: number, to: number, step: number): number[] => {
  const first = Math.ceil(from / step - 1e-9);
  return Array.from({ length: Math.floor(to / step + 1e-9) - first + 1 }, (_, i) => (first + i) * step);
};

interface Point {
  readonly pf: number;
  readonly low: number;
  readonly nominal: number;
  readonly high: number;
}

/** 1/f² in 1/MHz² of the whole coil with every known capacitor; the limits of f the other way round. */
function pointsOf(record: CoilRecord): Point[] {
  const whole = record.windings[0]!.taps.length;
  const square = (kHz: number) => (1e3 / kHz) ** 2;
  return record.measuring.resonances
    .filter(({ tap }) => tap === whole)
    .map(({ capacitancePf, frequencyKhz, lowKhz, highKhz }) => ({
      pf: capacitancePf,
      low: square(highKhz),
      nominal: square(frequencyKhz),
      high: square(lowKhz),
    }));
}

/** The graph, its lower left corner at the origin: grid, band of the limits, expected line and points. */
function graph(record: CoilRecord, widthMm: number, heightMm: number, measure: Measure): Shape[] {
  const points = pointsOf(record);
  const { slopePerPf, selfPf } = record.measuring.line;
  const most = points[points.length - 1]!.pf;
  const left = Math.min(-BEFORE * most, -1.5 * selfPf);
  const right = most * (1 + BEYOND);
  const yOf = (pf: number) => slopePerPf * (pf + selfPf);
  const top = 1.05 * Math.max(yOf(right), points[points.length - 1]!.high);
  const [footMm, headMm] = [8, 5];
  const up = heightMm - footMm - headMm;
  const yStep = roundStep(top, up);
  const yTexts = stepsTo(0, top, yStep).map((value) => short(value, 6));
  const marginMm = Math.max(...yTexts.map((text) => measure.width(text, SMALL_MM))) + 1.5;
  const across = widthMm - marginMm - 3;
  const x = (pf: number) => marginMm + (across * (pf - left)) / (right - left);
  const y = (value: number) => footMm + (up * value) / top;
  const shapes: Shape[] = [];
  const xStep = roundStep(right - left, across);
  // Lines between those that are labelled, for the pencil.
  for (const pf of stepsTo(left, right, xStep / 2)) shapes.push(line(x(pf), y(0), x(pf), y(top), 'hair'));
  for (const value of stepsTo(0, top, yStep / 2)) shapes.push(line(x(left), y(value), x(right), y(value), 'hair'));
  // What the limits say at the ends of the axis: in proportion to the total capacitance, as most of them go.
  const edge = (share: (point: Point) => number, pf: number) => {
    const near = pf < most / 2 ? points[0]! : points[points.length - 1]!;
    return yOf(pf) * (1 + share(near));
  };
  const low = (point: Point) => point.low / point.nominal - 1;
  const high = (point: Point) => point.high / point.nominal - 1;
  const band: [number, number][] = [
    [x(-selfPf), y(0)],
    ...points.map(({ pf, high: value }): [number, number] => [x(pf), y(value)]),
    [x(right), y(edge(high, right))],
    [x(right), y(edge(low, right))],
    ...[...points].reverse().map(({ pf, low: value }): [number, number] => [x(pf), y(value)]),
  ];
  shapes.push(polygon(band, 'hair', 0.8));
  for (const pf of stepsTo(left, right, xStep)) {
    shapes.push(label(x(pf), footMm - 3.4, short(pf, 6).replace('-', '−'), { align: 'centre' }));
  }
  for (const value of stepsTo(0, top, yStep)) {
    shapes.push(label(marginMm - 1, y(value), short(value, 6), { align: 'right', anchor: 'middle' }));
  }
  shapes.push(line(x(left), y(0), x(right), y(0)), line(x(0), y(0), x(0), y(top)));
  shapes.push(line(x(-selfPf), y(0), x(right), y(yOf(right)), 'thin', 'dashed'));
  for (const { pf, nominal } of points) shapes.push(circle(x(pf), y(nominal), 0.9, 'thin', 1));
  const acrossWords = LINE.across;
  const width = measure.width(acrossWords, SMALL_MM);
  shapes.push(label(x(right), 0.7, acrossWords, { align: 'right' }));
  shapes.push(line(x(right) - width - 8, 1.6, x(right) - width - 3, 1.6), arrowHead(x(right) - width - 1.5, 1.6, 0, 2));
  shapes.push(label(0, heightMm - 3, LINE.up));
  return shapes;
}

/** A formula with a line for what comes out of it. */
function result(text: string, unit: string, widthMm: number, measure: Measure): Block {
  const block = paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold: true });
  const end = widthMm - measure.width(unit, SMALL_MM) - 1;
  const heightMm = 5.4;
  return {
    widthMm,
    heightMm,
    shapes: [
      ...movedAll(block, 0, block.heightMm - heightMm),
      label(end + 1, -heightMm + 1.2, unit),
      line(measure.width(text, SMALL_MM, true) + 2, -heightMm + 0.8, end - 0.5, -heightMm + 0.8),
    ],
  };
}

/** The block, its graph so high; nothing without a known capacitor. */
export function twoCapacitors(record: CoilRecord, widthMm: number, graphMm: number, measure: Measure): Block[] {
  const { measuring, shop, windings } = record;
  const whole = windings[0]!.taps.length;
  const known = measuring.resonances.filter(({ tap }) => tap === whole);
  if (known.length === 0) return [];
  const columns = columnsOf(widthMm, [
    [LINE.capacitor, 12, { ...CENTRE, bold: true }],
    [LINE.expected, 14, CENTRE],
    [LINE.limits, 24, CENTRE],
    [LINE.reading, 19, BLANK],
    [LINE.square, 19, BLANK],
  ]);
  const rows = known.map(({ capacitancePf, frequencyKhz, lowKhz, highKhz }) => [
    short(capacitancePf, 3),
    kiloHertz(frequencyKhz),
    `${kiloHertz(lowKhz)}–${kiloHertz(highKhz)}`,
  ]);
  const { inductanceUh, selfPf, inductancePercent, selfHalfPf } = measuring.line;
  const small = (text: string, bold = false) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold });
  const expect = LINE.expect(figures(inductanceUh), short(selfPf, 1));
  const open =
    inductancePercent === null || selfHalfPf === null
      ? LINE.second
      : LINE.known(short(100 * shop.capacitorTolerance, 3), short(inductancePercent, 1), short(selfHalfPf, 1));
  const { instruments } = shop;
  const addedPf = instruments?.stated ? instruments.probePf + (instruments.couplingPf ?? 0) : 0;
  const drawn: Block = {
    widthMm,
    heightMm: graphMm,
    shapes: movedAll({ shapes: graph(record, widthMm, graphMm, measure) }, 0, -graphMm),
  };
  const body = [
    table(columns, rows, measure, { sizeMm: SMALL_MM, rowMm: 5.6 }),
    drawn,
    stack(
      [
        ...LINE.formula(figures(FACTOR)).map((text, i) => result(text, LINE.formulaUnits[i]!, widthMm, measure)),
        small(LINE.how),
        small(`${expect} ${open}`),
        ...(addedPf > 0 ? [small(LINE.probed(short(addedPf, 1)))] : []),
      ],
      0.3,
    ),
  ];
  return [{ ...stack([heading(LINE.heading, widthMm, measure), stack(body, 1)], 0), widthMm }];
}
