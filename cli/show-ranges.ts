/**
 * The range chart in the terminal: one bar a switch position on a logarithmic frequency axis, from the record of any verb.
 *
 *      kHz  300        500     700    1000       1600
 *       1 |                       ▓▓▓▓▓▓▓▓▓░░░░░░ |   21 %
 *       2 |          ▓▓▓▓▓▓▓▓▓▓▓▓▓▓▓▓▓             |
 */
import { placeOn, written } from '../src/drawing/log-axis.ts';
import { axisOf, type ChartPosition } from '../src/drawing/range-chart.ts';
import type { FiguresRecord } from '../src/record/survey-schema.ts';
import { drawing, list, type Page } from './page.ts';

interface Signs {
  readonly own: string;
  readonly shared: string;
  readonly second: string;
  readonly band: string;
  readonly edge: string;
}

const DRAWN: Signs = { own: '░', shared: '▓', second: '·', band: '┊', edge: '│' };
const PLAIN: Signs = { own: '-', shared: '=', second: '.', band: ':', edge: '|' };

const LEFT = 6;
const RIGHT = 9;

/** The section of a page, in words on a plain one; nothing when the record has no ranges. */
export function showRanges(record: FiguresRecord, page: Page): string[] {
  if (page.plain === true) return list(page, 'What they tune', spoken(positionsOf(record)));
  const title = 'What they tune; on the right how far the next reaches into it';
  return drawing(page, title, rangeChart(record, page.columns - 2, page.ascii === true));
}

const spoken = (positions: readonly ChartPosition[]): string[] =>
  positions.map((own, i) => {
    const reach = reachText(own, positions[i + 1]);
    const next = reach.startsWith('gap') ? `, ${reach} to the next` : `, the next reaches ${reach} into it`;
    const range = `${own.lowKhz.toFixed(0)} to ${own.highKhz.toFixed(0)} kHz`;
    return `tap ${own.tap}: ${range}${reach === '' ? '' : next}`;
  });

const positionsOf = (record: FiguresRecord) =>
  record.windings[0]!.taps.flatMap(({ tap, range }) => (range === null ? [] : [{ tap, ...range }]));

/** Lines no wider than `columns`; none when the record has no ranges. */
export function rangeChart(record: FiguresRecord, columns: number, ascii: boolean): string[] {
  const positions = positionsOf(record);
  if (positions.length === 0) return [];
  const { bandLowKhz, bandHighKhz } = record.demand;
  const band = bandLowKhz === null || bandHighKhz === null ? null : { lowKhz: bandLowKhz, highKhz: bandHighKhz };
  const cells = Math.max(12, columns - LEFT - RIGHT - 2);
  const axis = axisOf({ positions, band }, cells);
  const cell = (kHz: number) => Math.min(cells - 1, Math.max(0, Math.floor(placeOn(axis, kHz))));
  const signs = ascii ? PLAIN : DRAWN;
  const rows = positions.map((own, i) => {
    const line = Array.from({ length: cells }, () => ' ');
    const fill = (from: number, to: number, sign: string) => {
      if (from > axis.high || to < axis.low) return;
      for (let at = cell(from); at <= cell(to); at++) line[at] = sign;
    };
    if (band !== null) for (const kHz of [band.lowKhz, band.highKhz]) line[cell(kHz)] = signs.band;
    const seconds = [own.secondLowKhz, own.secondHighKhz].filter((kHz) => kHz !== null);
    if (seconds.length > 0) fill(Math.min(...seconds), Math.max(...seconds), signs.second);
    fill(own.lowKhz, own.highKhz, signs.own);
    for (const other of [positions[i - 1], positions[i + 1]]) {
      if (other === undefined) continue;
      const [from, to] = [Math.max(own.lowKhz, other.lowKhz), Math.min(own.highKhz, other.highKhz)];
      if (from < to) fill(from, to, signs.shared);
    }
    const next = reachText(own, positions[i + 1]);
    return `${String(own.tap).padStart(LEFT - 2)} ${signs.edge}${line.join('')}${signs.edge}${next.padStart(RIGHT)}`;
  });
  const legend = [
    `${signs.own} tuned`,
    `${signs.shared} by a neighbour too`,
    `${signs.second} second resonance`,
    ...(band === null ? [] : [`${signs.band} band`]),
  ];
  return [scale(axis, cells), ...rows, ...legendLines(legend, columns)].map((row) => row.trimEnd());
}

/** How far the next position reaches into this one. */
function reachText(own: ChartPosition, next: ChartPosition | undefined): string {
  if (next === undefined) return '';
  const percent = 100 * (next.highKhz / own.lowKhz - 1);
  const text = Math.abs(percent) < 10 ? Math.abs(percent).toFixed(1) : Math.abs(percent).toFixed(0);
  return percent < 0 ? `gap ${text}%` : `${text} %`;
}

function scale(axis: { low: number; high: number; lengthMm: number }, cells: number): string {
  const line = Array.from({ length: cells }, () => ' ');
  const start = (kHz: number) => Math.round(placeOn(axis, kHz) - `${kHz}`.length / 2);
  for (const kHz of written(
    axis,
    (one) => start(one) + `${one}`.length / 2,
    (one) => `${one}`.length,
    2,
  )) {
    const from = start(kHz);
    if (from < 0 || from + `${kHz}`.length > cells) continue;
    [...`${kHz}`].forEach((sign, i) => {
      line[from + i] = sign;
    });
  }
  return `${'kHz'.padStart(LEFT - 2)}  ${line.join('')}`;
}

function legendLines(legend: readonly string[], columns: number): string[] {
  const lines: string[] = [];
  for (const entry of legend) {
    const last = lines[lines.length - 1];
    if (last !== undefined && last.length + 3 + entry.length <= columns) lines[lines.length - 1] = `${last}   ${entry}`;
    else lines.push(`${' '.repeat(LEFT)}${entry}`);
  }
  return lines;
}
