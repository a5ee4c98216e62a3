/**
 * A chart of individuals with its chart of moving ranges below, on one axis of serials, to be read from a step away. What a value is
 * is told by the shape of its mark, what a line is by its dashes and by strokes on its outer side. Origin at the lower left, Y up, mm.
 */
import { CONTROL } from '../../templates/wording/control-charts.ts';
import type { Chart, ChartPoint } from '../prove/charts-schema.ts';
import { fixed, signed } from '../quantity/decimals.ts';
import type { Measure } from './boxes.ts';
import { beyondMark, type MarkSizes, offMark, outlierMark, runMark, valueMark } from './chart-marks.ts';
import type { Drawing, Shape } from './drawing.ts';
import { label, line, polyline, rectangle } from './shapes.ts';
import { spread } from './spread.ts';
import { heightOf, roundValues, type ValueAxis } from './value-axis.ts';

export type ChartPicture = Pick<
  Chart,
  'unit' | 'points' | 'limits' | 'centre' | 'lower' | 'upper' | 'rangeCentre' | 'rangeUpper'
>;

/** Figures beside lines and axes. */
const FIGURE_MM = 3.9;
const SERIAL_MM = 3.1;
const CAPTION_MM = 4.2;
/** Between the lines of text at the right, and between serials along the axis. */
const APART_MM = { lines: 5, serials: 4.4, ticks: 7.5 } as const;
/** Longest a serial may be along its line; a longer one keeps its end. */
const SERIAL_MOST_MM = 32;
/** Height of the ranges against that of the individuals. */
const RANGE_SHARE = 0.34;
const CAPTION_ROOM_MM = 8.5;
/** A row of names of outliers over the chart. */
const NAMES_MM = 6;
/** A limit of the record this many times as far off as the rest is told, not drawn: the values would lie on a line. */
const FAR = 3;

export interface ChartScales {
  /** Middle of the mark of a point, by its place in the file. */
  readonly x: (index: number) => number;
  readonly values: ValueAxis;
  readonly ranges: ValueAxis;
  readonly leftMm: number;
  readonly rightMm: number;
  readonly namesMm: number;
}

/** Decimals that show a fiftieth of the distance between the control limits. */
export function digitsOf({ upper, lower, points }: ChartPicture): number {
  const values = points.map(({ value }) => value);
  const span = upper - lower || Math.max(...values) - Math.min(...values) || Math.abs(upper) / 100 || 1;
  return Math.min(4, Math.max(0, Math.ceil(-Math.log10(span / 50))));
}

/** A value of a chart as text: deviations with their sign. */
export const figureText = ({ unit }: Pick<ChartPicture, 'unit'>, value: number, digits: number): string =>
  unit === '%' ? signed(value, digits) : fixed(value, digits);

/** Lowest and highest value of the picture: all that belongs together, control limits, and limits of the record unless far off. */
function endsOf({ points, lower, upper, limits, centre }: ChartPicture): [number, number] {
  const own = points.filter(({ outlier }) => !outlier).map(({ value }) => value);
  let [low, high] = [Math.min(lower, ...own), Math.max(upper, ...own)];
  const half = Math.max(high - centre, centre - low);
  if (limits !== null && limits.high - centre <= FAR * half) high = Math.max(high, limits.high);
  if (limits !== null && centre - limits.low <= FAR * half) low = Math.min(low, limits.low);
  // An outlier that is not far off is drawn where it lies.
  const room = 0.5 * (high - low);
  for (const { value } of points) {
    if (value > high && value <= high + room) high = value;
    if (value < low && value >= low - room) low = value;
  }
  const span = high - low || Math.abs(high) * 0.01 || 1;
  return [low - 0.07 * span, high + 0.07 * span];
}

function rangeEnd({ points, rangeUpper }: ChartPicture): number {
  const most = Math.max(...points.map(({ range }) => range ?? 0));
  return Math.max(Math.min(most, 1.7 * rangeUpper), rangeUpper, 1e-6) * 1.12;
}

/** What all serials begin with, up to their last sign that parts. */
export function sharedStart(serials: readonly string[]): number {
  const [first = '', ...rest] = serials;
  let count = 0;
  while (count < first.length && rest.every((one) => one[count] === first[count])) count++;
  const parts = first.slice(0, count).match(/^.*(?=[-_/. ])/u);
  return rest.length === 0 || parts === null ? 0 : parts[0].length;
}

/** A serial no longer than its room, of a long one its end. */
export function shortSerial(serial: string, mostMm: number, sizeMm: number, measure: Measure): string {
  if (measure.width(serial, sizeMm) <= mostMm) return serial;
  const signs = Array.from(serial);
  for (let from = 1; from < signs.length; from++) {
    const text = `…${signs.slice(from).join('')}`;
    if (measure.width(text, sizeMm) <= mostMm) return text;
  }
  return '…';
}

/** Serials as they stand along the axis: without what they all begin with, which the head of the page tells. */
function axisSerials(points: readonly ChartPoint[]): string[] {
  const all = points.map(({ serial }) => serial);
  const shared = sharedStart(all);
  return all.map((serial) => serial.slice(shared));
}

const lineTexts = (chart: ChartPicture) => {
  const digits = digitsOf(chart);
  const at = (value: number) => figureText(chart, value, digits);
  const found = [
    { value: chart.upper, text: CONTROL.line.upper(at(chart.upper)) },
    { value: chart.centre, text: CONTROL.line.centre(at(chart.centre)) },
    { value: chart.lower, text: CONTROL.line.lower(at(chart.lower)) },
  ];
  if (chart.limits !== null)
    found.push(
      { value: chart.limits.high, text: CONTROL.line.recordHigh(at(chart.limits.high)) },
      { value: chart.limits.low, text: CONTROL.line.recordLow(at(chart.limits.low)) },
    );
  return found;
};

export function chartScales(chart: ChartPicture, widthMm: number, heightMm: number, measure: Measure): ChartScales {
  const { points } = chart;
  const serialMm = Math.max(
    ...axisSerials(points).map((serial) => Math.min(SERIAL_MOST_MM, measure.width(serial, SERIAL_MM))),
  );
  const named = points.some(({ outlier }) => outlier);
  const foot = serialMm + 3;
  const plots = heightMm - foot - 2 * CAPTION_ROOM_MM - (named ? NAMES_MM : 0) + CAPTION_ROOM_MM;
  const rangeMm = (plots * RANGE_SHARE) / (1 + RANGE_SHARE);
  const ranges = { low: 0, high: rangeEnd(chart), fromMm: foot, toMm: foot + rangeMm };
  const [low, high] = endsOf(chart);
  const top = heightMm - (named ? NAMES_MM : 0) - 1.5;
  const values = { low, high, fromMm: ranges.toMm + CAPTION_ROOM_MM, toMm: top };
  const tickMm = Math.max(
    ...[values, ranges].flatMap((axis) => {
      const { values: round, digits } = roundValues(axis, APART_MM.ticks);
      return round.map((value) => measure.width(figureText(chart, value, digits), FIGURE_MM));
    }),
  );
  const textMm = Math.max(
    ...lineTexts(chart).map(({ text }) => measure.width(CONTROL.line.above(text), FIGURE_MM, true)),
  );
  const leftMm = tickMm + 3;
  const rightMm = widthMm - textMm - 8;
  const step = (rightMm - leftMm) / points.length;
  return { x: (i) => leftMm + (i + 0.5) * step, values, ranges, leftMm, rightMm, namesMm: heightMm - NAMES_MM };
}

/** Axis with its round values at the left. */
function axisShapes(
  axis: ValueAxis,
  { leftMm, rightMm }: ChartScales,
  text: (value: number, digits: number) => string,
) {
  const { values, digits } = roundValues(axis, APART_MM.ticks);
  return [
    ...values.flatMap((value): Shape[] => {
      const y = heightOf(axis, value);
      return [
        line(leftMm - 1.4, y, leftMm, y, 'thin'),
        label(leftMm - 2, y, text(value, digits), { sizeMm: FIGURE_MM, align: 'right', anchor: 'middle' }),
      ];
    }),
    rectangle(leftMm, axis.fromMm, rightMm - leftMm, axis.toMm - axis.fromMm, 'thin'),
  ];
}

/** Words for lines at the right, kept apart, with leaders to their lines. */
function lineWords(
  lines: readonly { readonly value: number; readonly text: string }[],
  axis: ValueAxis,
  right: number,
): Shape[] {
  const placed = lines
    .map(({ value, text }) => {
      const y = heightOf(axis, value);
      const off = value > axis.high ? CONTROL.line.above(text) : value < axis.low ? CONTROL.line.below(text) : null;
      return { y: Math.min(axis.toMm, Math.max(axis.fromMm, y)), text: off ?? text, off: off !== null };
    })
    .sort((a, b) => a.y - b.y);
  const places = spread(
    placed.map(({ y }) => y),
    APART_MM.lines,
    axis.fromMm + 1,
    axis.toMm - 1,
  );
  return placed.flatMap(({ y, text, off }, i): Shape[] => [
    ...(off ? [] : [line(right, y, right + 5, places[i]!, 'hair')]),
    label(right + 6, places[i]!, text, { sizeMm: FIGURE_MM, bold: true, anchor: 'middle' }),
  ]);
}

/** A limit of the record: a solid line with strokes on the side where nothing may lie. */
export function recordLine(from: number, to: number, y: number, outward: 1 | -1): Shape[] {
  const strokes = Math.floor((to - from) / 4);
  return [
    line(from, y, to, y, 'outline'),
    ...Array.from({ length: strokes }, (_, i) => {
      const x = from + 2 + i * 4;
      return line(x, y, x + 1.4, y + outward * 1.6, 'thin');
    }),
  ];
}

/** Serials along the axis, every so many that they keep apart. */
function serials(points: readonly ChartPoint[], scales: ChartScales, measure: Measure): Shape[] {
  const { x, ranges } = scales;
  const step = points.length > 1 ? x(1) - x(0) : APART_MM.serials;
  const every = Math.max(1, Math.ceil(APART_MM.serials / step - 1e-9));
  // Round steps are counted off more easily.
  const round = [1, 2, 5, 10, 20, 50, 100, 200, 500].find((one) => one >= every) ?? every;
  return axisSerials(points).flatMap((serial, i): Shape[] => {
    if (i % round !== 0) return [];
    const text = shortSerial(serial, SERIAL_MOST_MM, SERIAL_MM, measure);
    return [
      line(x(i), ranges.fromMm, x(i), ranges.fromMm - 1.4, 'thin'),
      label(x(i) + 0.36 * SERIAL_MM, ranges.fromMm - 2.2, text, { sizeMm: SERIAL_MM, turnDeg: 90, align: 'right' }),
    ];
  });
}

/** Serial and figure of every outlier over the chart, with a line down to its mark. */
function names(chart: ChartPicture, scales: ChartScales, measure: Measure): Shape[] {
  const digits = digitsOf(chart);
  const width = scales.rightMm - scales.leftMm;
  const found = chart.points.flatMap(({ serial, value, outlier }, index) =>
    outlier ? [{ index, value, serial, figure: figureText(chart, value, digits) }] : [],
  );
  if (found.length === 0) return [];
  const most = width / found.length - 2;
  const texts = found.map(({ serial, figure }) => {
    const full = CONTROL.value(serial, figure);
    return measure.width(full, SERIAL_MM, true) <= most ? full : shortSerial(serial, most * 0.85, SERIAL_MM, measure);
  });
  const step = Math.max(...texts.map((text) => measure.width(text, SERIAL_MM, true))) + 2;
  const places = spread(
    found.map(({ index }) => scales.x(index)),
    step,
    scales.leftMm + step / 2 - 1,
    scales.rightMm - step / 2 + 1,
  );
  return found.flatMap(({ index, value }, i): Shape[] => {
    const y = Math.min(scales.values.toMm, Math.max(scales.values.fromMm, heightOf(scales.values, value)));
    return [
      label(places[i]!, scales.namesMm + 1.8, texts[i]!, { sizeMm: SERIAL_MM, bold: true, align: 'centre' }),
      line(places[i]!, scales.namesMm + 1, scales.x(index), y, 'hair'),
    ];
  });
}

/** Marks of a row of figures; those off the picture are arrows at its edge. */
function marks(
  figures: readonly {
    readonly index: number;
    readonly value: number;
    readonly point: ChartPoint;
    readonly beyond: boolean;
  }[],
  axis: ValueAxis,
  scales: ChartScales,
  sizes: MarkSizes,
  name: string,
): Shape[] {
  return figures.flatMap(({ index, value, point, beyond }): Shape[] => {
    const [x, y] = [scales.x(index), heightOf(axis, value)];
    if (value > axis.high) return [offMark(x, axis.toMm, 1, sizes)];
    if (value < axis.low) return [offMark(x, axis.fromMm, -1, sizes)];
    const ring = name === 'value' && point.outlier ? [outlierMark(x, y, sizes)] : [];
    if (beyond) return [...ring, beyondMark(x, y, sizes)];
    const run = name === 'value' && point.run;
    return [...ring, run ? runMark(x, y, sizes, `${name} ${index}`) : valueMark(x, y, sizes, `${name} ${index}`)];
  });
}

/** The line from mark to mark, kept in the picture. */
const trace = (places: readonly (readonly [number, number])[], { fromMm, toMm }: ValueAxis, many: boolean): Shape =>
  polyline(
    places.map(([x, y]) => [x, Math.min(toMm, Math.max(fromMm, y))] as const),
    many ? 'hair' : 'thin',
  );

/** Both charts in a box of this size. At least two points. */
export function drawControlChart(chart: ChartPicture, widthMm: number, heightMm: number, measure: Measure): Drawing {
  const scales = chartScales(chart, widthMm, heightMm, measure);
  const { leftMm: left, rightMm: right, values, ranges, x } = scales;
  const { points, limits } = chart;
  const sizes: MarkSizes = { r: Math.min(1.5, Math.max(0.5, (0.36 * (right - left)) / points.length)) };
  const many = points.length > 80;
  const shapes: Shape[] = axisShapes(values, scales, (value, digits) => figureText(chart, value, digits));
  shapes.push(...axisShapes(ranges, scales, (value, digits) => fixed(value, digits)));
  const across = (axis: ValueAxis, value: number, dash: 'solid' | 'dashed') => {
    if (value < axis.low || value > axis.high) return;
    const y = heightOf(axis, value);
    shapes.push(line(left, y, right, y, dash === 'solid' ? 'thin' : 'outline', dash));
  };
  across(values, chart.centre, 'solid');
  across(values, chart.upper, 'dashed');
  across(values, chart.lower, 'dashed');
  across(ranges, chart.rangeCentre, 'solid');
  across(ranges, chart.rangeUpper, 'dashed');
  if (limits !== null) {
    if (limits.high <= values.high) shapes.push(...recordLine(left, right, heightOf(values, limits.high), 1));
    if (limits.low >= values.low) shapes.push(...recordLine(left, right, heightOf(values, limits.low), -1));
  }
  shapes.push(...names(chart, scales, measure));
  const individuals = points.map((point, index) => ({ index, value: point.value, point, beyond: point.beyond }));
  const moving = points.flatMap((point, index) =>
    point.range === null ? [] : [{ index, value: point.range, point, beyond: point.rangeBeyond }],
  );
  for (const [figures, axis, name] of [
    [individuals, values, 'value'],
    [moving, ranges, 'range'],
  ] as const) {
    shapes.push(
      trace(
        figures.map(({ index, value }) => [x(index), heightOf(axis, value)] as const),
        axis,
        many,
      ),
    );
    shapes.push(...marks(figures, axis, scales, sizes, name));
  }
  shapes.push(...lineWords(lineTexts(chart), values, right));
  const digits = digitsOf(chart);
  const rangeLines = [
    { value: chart.rangeUpper, text: CONTROL.line.upper(fixed(chart.rangeUpper, digits)) },
    { value: chart.rangeCentre, text: CONTROL.line.centre(fixed(chart.rangeCentre, digits)) },
  ];
  shapes.push(...lineWords(rangeLines, ranges, right));
  shapes.push(label(left, ranges.toMm + 2, CONTROL.ranges, { sizeMm: CAPTION_MM, bold: true }));
  shapes.push(...serials(points, scales, measure));
  return { shapes };
}
