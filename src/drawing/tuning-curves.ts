/**
 * Tuning curves: frequency against capacitance, one line a position, both axes logarithmic. Capacitance across the position on the
 * lower edge, that of the capacitor alone on the upper. Origin at the lower left corner of the picture, Y up, millimetres.
 */
import { CURVES } from '../../templates/wording/reference-sheet.ts';
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import { type LogAxis, placeOn, ticksOf, written } from './log-axis.ts';
import { label, line, polyline, rectangle, SMALL_MM } from './shapes.ts';
import { spread } from './spread.ts';

export interface TuningCurve {
  readonly tap: number;
  /** By rising capacitance, two at least. */
  readonly points: readonly { readonly capacitancePf: number; readonly frequencyKhz: number }[];
}

export interface TuningCurves {
  readonly curves: readonly TuningCurve[];
  /** What lies across the position besides the capacitor, pF. */
  readonly fixedPf: number;
  readonly band: { readonly lowKhz: number; readonly highKhz: number } | null;
}

const LEFT_MM = 13;
const RIGHT_MM = 22;
const FOOT_MM = 11;
const HEAD_MM = 11;
/** From one number to the next at the right; nearer than `apart` they stand in two columns. */
const NUMBER_MM = { least: 2.6, apart: 3.4 } as const;

/** The least height at which all the numbers of the curves have room. */
export const curvesLeastMm = (count: number): number => FOOT_MM + HEAD_MM + count * NUMBER_MM.least;

/** Ends of both axes: those of the curves, and of the band on that of frequency. */
export function curveAxes({ curves, band }: TuningCurves, widthMm: number, heightMm: number): [LogAxis, LogAxis] {
  const points = curves.flatMap((curve) => curve.points);
  const pf = points.map((point) => point.capacitancePf);
  const kHz = [...points.map((point) => point.frequencyKhz), ...(band === null ? [] : [band.lowKhz, band.highKhz])];
  return [
    { low: Math.min(...pf), high: Math.max(...pf), lengthMm: widthMm - LEFT_MM - RIGHT_MM },
    { low: Math.min(...kHz) / 1.06, high: Math.max(...kHz) * 1.06, lengthMm: heightMm - FOOT_MM - HEAD_MM },
  ];
}

/** Numbers of the curves at their right ends, with lines that lead there. */
function numbers(ends: readonly { tap: number; y: number }[], right: number, low: number, high: number): Shape[] {
  const sorted = [...ends].sort((a, b) => a.y - b.y);
  const step = Math.min(NUMBER_MM.apart, (high - low) / Math.max(1, sorted.length - 1));
  const places = spread(
    sorted.map(({ y }) => y),
    step,
    low,
    high,
  );
  const staggered = step < NUMBER_MM.apart - 1e-9;
  return sorted.flatMap(({ tap, y }, i) => {
    const at = places[i]!;
    const x = right + 6 + (staggered && i % 2 === 1 ? 6 : 0);
    return [
      line(right, y, right + 5, at, 'hair'),
      ...(x > right + 6 ? [line(right + 5, at, x - 0.8, at, 'hair')] : []),
      label(x, at, `${tap}`, { anchor: 'middle', bold: true }),
    ];
  });
}

export function drawTuningCurves(drawn: TuningCurves, widthMm: number, heightMm: number, measure: Measure): Drawing {
  const [pfAxis, kHzAxis] = curveAxes(drawn, widthMm, heightMm);
  const x = (pf: number) => LEFT_MM + placeOn(pfAxis, pf);
  const y = (kHz: number) => FOOT_MM + placeOn(kHzAxis, kHz);
  const [right, top] = [LEFT_MM + pfAxis.lengthMm, FOOT_MM + kHzAxis.lengthMm];
  const widthOf = (value: number) => measure.width(`${value}`, SMALL_MM);
  const shapes: Shape[] = [];
  for (const pf of ticksOf(pfAxis)) shapes.push(line(x(pf), FOOT_MM, x(pf), top, 'hair'));
  for (const kHz of ticksOf(kHzAxis)) shapes.push(line(LEFT_MM, y(kHz), right, y(kHz), 'hair'));

  for (const pf of written(pfAxis, x, widthOf, 1.6)) {
    shapes.push(line(x(pf), FOOT_MM - 1, x(pf), FOOT_MM, 'thin'));
    shapes.push(label(x(pf), FOOT_MM - 4, `${pf}`, { align: 'centre' }));
  }
  const middle = (LEFT_MM + right) / 2;
  shapes.push(label(middle, FOOT_MM - 8.6, CURVES.across, { align: 'centre', bold: true }));
  const alone = { low: Math.max(pfAxis.low - drawn.fixedPf, 1), high: pfAxis.high - drawn.fixedPf };
  const xAlone = (pf: number) => x(pf + drawn.fixedPf);
  // What would stand under the unit of the frequencies is left out.
  const clear = (pf: number) => xAlone(pf) - widthOf(pf) / 2 >= LEFT_MM - 1;
  for (const pf of written(alone, xAlone, widthOf, 1.6).filter(clear)) {
    shapes.push(line(xAlone(pf), top, xAlone(pf), top + 1, 'thin'));
    shapes.push(label(xAlone(pf), top + 2, `${pf}`, { align: 'centre' }));
  }
  shapes.push(label(middle, top + 6.4, CURVES.alone, { align: 'centre', bold: true }));
  for (const kHz of written(kHzAxis, y, () => 2.8, 1)) {
    shapes.push(line(LEFT_MM - 1, y(kHz), LEFT_MM, y(kHz), 'thin'));
    shapes.push(label(LEFT_MM - 1.6, y(kHz), `${kHz}`, { align: 'right', anchor: 'middle' }));
  }
  shapes.push(label(LEFT_MM - 1.6, top + 2, CURVES.kHz, { align: 'right', bold: true }));
  shapes.push(label(right + 6, top + 2, CURVES.tap, { bold: true }));

  if (drawn.band !== null)
    for (const kHz of [drawn.band.lowKhz, drawn.band.highKhz])
      shapes.push(line(LEFT_MM, y(kHz), right, y(kHz), 'thin', 'centre'));
  for (const { points } of drawn.curves)
    shapes.push(
      polyline(
        points.map(({ capacitancePf, frequencyKhz }) => [x(capacitancePf), y(frequencyKhz)] as const),
        'outline',
      ),
    );
  const ends = drawn.curves.map(({ tap, points }) => ({ tap, y: y(points.at(-1)!.frequencyKhz) }));
  shapes.push(...numbers(ends, right, FOOT_MM + 1.3, top - 1.3));
  shapes.push(rectangle(LEFT_MM, FOOT_MM, pfAxis.lengthMm, kHzAxis.lengthMm, 'outline'));
  return { shapes };
}
