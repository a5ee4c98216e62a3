/**
 * The range chart: one bar a switch position on a logarithmic frequency axis, wavelengths on the upper edge. Shared and missing
 * stretches, second resonances and the band are marked. Origin at the lower left corner of the picture, Y up, millimetres.
 */
import { CHART } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import type { Sign } from './legend.ts';
import { type LogAxis, placeOn, ticksOf, written } from './log-axis.ts';
import { arrowHead, label, line, rectangle, SMALL_MM } from './shapes.ts';

export interface ChartPosition {
  readonly tap: number;
  readonly lowKhz: number;
  readonly lowUncertaintyKhz: number;
  readonly highKhz: number;
  readonly highUncertaintyKhz: number;
  readonly secondLowKhz: number | null;
  readonly secondHighKhz: number | null;
}

export interface RangeChart {
  readonly positions: readonly ChartPosition[];
  readonly band: { readonly lowKhz: number; readonly highKhz: number } | null;
}

/** Speed of light in m kHz. */
const LIGHT_M_KHZ = 299_792.458;
const LEFT_MM = 9;
/** Room for `gap 45.8 %` behind the last bar. */
const RIGHT_MM = 25;
const FOOT_MM = 6;
const HEAD_MM = 6;
const BAND_MM = 5.5;
/** Rows are as high as this allows. */
export const ROW_MM = { least: 2.9, most: 8 } as const;
const FILL = { own: 0.82, shared: 0.5 } as const;

/** Height of the chart with rows of this height. */
export function chartHeight(chart: RangeChart, rowMm: number): number {
  return FOOT_MM + HEAD_MM + (chart.band === null ? 0 : BAND_MM) + chart.positions.length * rowMm + 2;
}

/** The second resonance from capacitor in to out, when there is one. */
function secondsOf({ secondLowKhz, secondHighKhz }: ChartPosition): [number, number][] {
  const both = [secondLowKhz, secondHighKhz].filter((kHz) => kHz !== null);
  return both.length === 0 ? [] : [[Math.min(...both), Math.max(...both)]];
}

/** Ends of the axis: all ranges and the band, and second resonances up to an octave above them. */
export function axisOf({ positions, band }: RangeChart, lengthMm: number): LogAxis {
  const lows = positions.map((one) => one.lowKhz - one.lowUncertaintyKhz);
  const highs = positions.map((one) => one.highKhz + one.highUncertaintyKhz);
  const low = Math.min(...lows, band?.lowKhz ?? Number.POSITIVE_INFINITY);
  const high = Math.max(...highs, band?.highKhz ?? 0);
  const seconds = positions.flatMap(secondsOf).filter(([from]) => from < 1.9 * high);
  const reach = Math.min(2 * high, Math.max(high, ...seconds.map(([, to]) => to)));
  return { low: low / 1.08, high: reach * 1.08, lengthMm };
}

/** Stretches of a position that its neighbours in the list tune too. */
function sharedBy(positions: readonly ChartPosition[], index: number): [number, number][] {
  const own = positions[index]!;
  return [positions[index - 1], positions[index + 1]].flatMap((other): [number, number][] => {
    if (other === undefined) return [];
    const from = Math.max(own.lowKhz, other.lowKhz);
    const to = Math.min(own.highKhz, other.highKhz);
    return from < to ? [[from, to]] : [];
  });
}

function bar(axis: LogAxis, positions: readonly ChartPosition[], index: number, y: number, barMm: number): Shape[] {
  const own = positions[index]!;
  const at = (kHz: number) => LEFT_MM + placeOn(axis, kHz);
  const shapes: Shape[] = [];
  const [left, right] = [at(own.lowKhz), at(own.highKhz)];
  shapes.push(rectangle(left, y - barMm / 2, right - left, barMm, 'hair', FILL.own));
  for (const [from, to] of sharedBy(positions, index))
    shapes.push(rectangle(at(from), y - barMm / 2, at(to) - at(from), barMm, 'hair', FILL.shared));
  shapes.push(rectangle(left, y - barMm / 2, right - left, barMm, 'thin'));
  for (const [kHz, half] of [
    [own.lowKhz, own.lowUncertaintyKhz],
    [own.highKhz, own.highUncertaintyKhz],
  ] as const) {
    const [from, to] = [at(kHz - half), at(kHz + half)];
    // Narrower than its own lines it would be a blot.
    if (to - from < 0.8) continue;
    const tall = barMm * 0.3;
    shapes.push(line(from, y, to, y, 'thin'));
    for (const x of [from, to]) shapes.push(line(x, y - tall, x, y + tall, 'thin'));
  }
  for (const [from, upTo] of secondsOf(own)) {
    if (from >= axis.high) continue;
    const width = at(Math.min(upTo, axis.high)) - at(from);
    const middle = at(from) + width / 2;
    // A narrow box would be a blot of dashes.
    shapes.push(
      width < 1.4
        ? line(middle, y - barMm / 2, middle, y + barMm / 2, 'outline', 'dashed')
        : rectangle(at(from), y - barMm / 2, width, barMm, 'thin', undefined, 'dashed'),
    );
  }
  return shapes;
}

function bandOver(
  axis: LogAxis,
  band: { lowKhz: number; highKhz: number },
  top: number,
  foot: number,
  measure: Measure,
) {
  const [left, right] = [LEFT_MM + placeOn(axis, band.lowKhz), LEFT_MM + placeOn(axis, band.highKhz)];
  const y = top - BAND_MM / 2;
  const text = CHART.band(`${Math.round(band.lowKhz)}`, `${Math.round(band.highKhz)}`);
  const width = measure.width(text, SMALL_MM, true);
  const room = right - left - 8;
  const shapes: Shape[] = [left, right].map((x) => line(x, foot, x, top, 'thin', 'centre'));
  shapes.push(arrowHead(left, y, 180, 2), arrowHead(right, y, 0, 2));
  if (width < room) {
    const middle = (left + right) / 2;
    shapes.push(label(middle, y, text, { align: 'centre', anchor: 'middle', bold: true }));
    shapes.push(line(left + 1.5, y, middle - width / 2 - 1, y), line(middle + width / 2 + 1, y, right - 1.5, y));
  } else {
    shapes.push(line(left + 1.5, y, right - 1.5, y));
    const rightwards = right + 2 + width < LEFT_MM + axis.lengthMm;
    const x = rightwards ? right + 2 : left - 2;
    shapes.push(label(x, y, text, { align: rightwards ? 'left' : 'right', anchor: 'middle', bold: true }));
  }
  return shapes;
}

/** What the chart's signs mean, each as it is drawn; only those that this chart has. */
export function chartSigns(chart: RangeChart): Sign[] {
  const { positions, band } = chart;
  const { signs } = CHART;
  const tuned = positions.slice(1).map((next, i) => next.highKhz - positions[i]!.lowKhz);
  const box = (fill: number) => rectangle(0, 0.2, 8, 2.6, 'thin', fill);
  const whisker = [line(1, 1.5, 7, 1.5), line(1, 0.6, 1, 2.4), line(7, 0.6, 7, 2.4)];
  const all: (Sign | null)[] = [
    { shapes: [box(FILL.own)], words: signs.bar },
    tuned.some((kHz) => kHz > 0) ? { shapes: [box(FILL.shared)], words: signs.shared } : null,
    { shapes: whisker, words: signs.uncertainty },
    positions.some((one) => secondsOf(one).length > 0)
      ? { shapes: [rectangle(0, 0.2, 8, 2.6, 'thin', undefined, 'dashed')], words: signs.second }
      : null,
    tuned.some((kHz) => kHz < 0)
      ? { shapes: [line(0, 0.8, 0, 2.2), line(8, 0.8, 8, 2.2), line(0, 1.5, 8, 1.5, 'outline')], words: signs.gap }
      : null,
    band === null
      ? null
      : {
          shapes: [line(2, -0.5, 2, 3.5, 'thin', 'centre'), line(6, -0.5, 6, 3.5, 'thin', 'centre')],
          words: signs.band,
        },
  ];
  return all.filter((sign) => sign !== null);
}

/** Positions in order from the top; the picture is `widthMm` wide and as high as `chartHeight` says. */
export function drawRangeChart(chart: RangeChart, widthMm: number, rowMm: number, measure: Measure): Drawing {
  const { positions, band } = chart;
  const axis = axisOf(chart, widthMm - LEFT_MM - RIGHT_MM);
  const foot = FOOT_MM;
  const top = chartHeight(chart, rowMm) - HEAD_MM;
  const right = LEFT_MM + axis.lengthMm;
  const at = (kHz: number) => LEFT_MM + placeOn(axis, kHz);
  const shapes: Shape[] = [];
  for (const kHz of ticksOf(axis)) shapes.push(line(at(kHz), foot, at(kHz), top, 'hair'));

  const widthOf = (value: number) => measure.width(`${value}`, SMALL_MM);
  // What would stand under the unit is left out.
  const clear = (place: number, value: number) => place + widthOf(value) / 2 <= right + 2;
  for (const kHz of written(axis, at, widthOf, 1.6).filter((one) => clear(at(one), one))) {
    shapes.push(line(at(kHz), foot - 1, at(kHz), foot, 'thin'));
    shapes.push(label(at(kHz), foot - 4, `${kHz}`, { align: 'centre' }));
  }
  shapes.push(label(right + 3, foot - 4, CHART.kHz, { bold: true }));
  const metres = { low: LIGHT_M_KHZ / axis.high, high: LIGHT_M_KHZ / axis.low };
  const atMetres = (m: number) => at(LIGHT_M_KHZ / m);
  for (const m of written(metres, atMetres, widthOf, 1.6).filter((one) => clear(atMetres(one), one))) {
    shapes.push(line(atMetres(m), top, atMetres(m), top + 1, 'thin'));
    shapes.push(label(atMetres(m), top + 2, `${m}`, { align: 'centre' }));
  }
  shapes.push(label(right + 3, top + 2, CHART.metres, { bold: true }));

  if (band !== null) shapes.push(...bandOver(axis, band, top, foot, measure));
  const first = top - (band === null ? 0 : BAND_MM) - 1 - rowMm / 2;
  const barMm = Math.min(4.2, rowMm * 0.62);
  positions.forEach((own, i) => {
    const y = first - i * rowMm;
    shapes.push(label(LEFT_MM - 2, y, `${own.tap}`, { align: 'right', anchor: 'middle', bold: true }));
    shapes.push(...bar(axis, positions, i, y, barMm));
    const next = positions[i + 1];
    if (next === undefined) return;
    // The next position reaches up to the foot of this one, or not quite.
    const reach = 100 * (next.highKhz / own.lowKhz - 1);
    const between = y - rowMm / 2;
    if (reach >= 0) {
      shapes.push(label(right + 3, between, CHART.overlap(reach.toFixed(reach < 10 ? 1 : 0)), { anchor: 'middle' }));
      return;
    }
    const [from, to] = [at(next.highKhz), at(own.lowKhz)];
    const tick = rowMm * 0.17;
    for (const x of [from, to]) shapes.push(line(x, between - tick, x, between + tick, 'thin'));
    shapes.push(line(from, between, to, between, 'outline'));
    shapes.push(label(right + 3, between, CHART.gap((-reach).toFixed(1)), { anchor: 'middle', bold: true }));
  });
  shapes.push(rectangle(LEFT_MM, foot, axis.lengthMm, top - foot, 'outline'));
  return { shapes };
}
