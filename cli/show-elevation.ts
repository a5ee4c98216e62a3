/**
 * The coil on its side in the terminal: former, turns, where start and taps lie, from the record of any verb.
 *
 *           S                 1      2        3            4
 *     ┌─────┴─────────────────┴──────┴────────┴────────────┴─────┐
 *     │     \\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\     │
 *     │     \\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\\     │
 *     └──────────────────────────────────────────────────────────┘
 *     0        20        40        60        80       100     mm
 */
import type { CoilRecord } from '../src/record/schema.ts';
import type { FiguresRecord, SurveyRecord } from '../src/record/survey-schema.ts';
import { drawing, type Page } from './page.ts';

interface Signs {
  readonly corners: readonly [string, string, string, string];
  readonly edge: string;
  readonly side: string;
  readonly tap: string;
  readonly lead: string;
}
const DRAWN: Signs = { corners: ['┌', '┐', '└', '┘'], edge: '─', side: '│', tap: '┴', lead: '│' };
const ASCII: Signs = { corners: ['+', '+', '+', '+'], edge: '-', side: '|', tap: '+', lead: '|' };
const SECOND = 'x';
/** Turns that lie on their side lean the other way: a right-hand helix that stands rises to the right. */
const LEANS = { right: '\\', left: '/' } as const;

/** Rows for labels above the coil; what finds no room in them keeps its mark alone. */
const LABEL_ROWS = 3;
/** Least cells between two figures of the scale. */
const SCALE_GAP = 9;
/** Turns at least so many cells apart are drawn one by one; between others no cell stays empty. */
const APART_CELLS = 2;

/** The section of a page; none on a plain one, where the table of the taps says the same. */
export function showElevation(record: CoilRecord | SurveyRecord, page: Page): string[] {
  if (page.plain === true) return [];
  const from = record.verb === 'survey' ? 'the start' : 'the foot';
  const title = `The coil on its side, start to the left, mm from ${from}`;
  return drawing(page, title, elevation(record, lengthOf(record), page.columns - 2, page.ascii === true));
}

/** Ends of what is drawn; a coil that was found has no former with ends. */
function lengthOf(record: CoilRecord | SurveyRecord): readonly [low: number, high: number] {
  if ('lengthMm' in record.former) return [0, record.former.lengthMm];
  const { startMm, finishMm, wire } = record.windings[0]!;
  const margin = 2 * wire.overallMm;
  return [startMm - margin, finishMm + margin];
}

/** Lines no wider than `columns`. */
export function elevation(
  record: Pick<FiguresRecord, 'windings' | 'frame' | 'around'>,
  [lowMm, highMm]: readonly [low: number, high: number],
  columns: number,
  ascii: boolean,
): string[] {
  const signs = ascii ? ASCII : DRAWN;
  const { taps, startMm, turnPositionsMm } = record.windings[0]!;
  const second = record.around?.second ?? null;
  // A second winding may stand out beyond the former that carries the first.
  const lows = [lowMm, ...(second === null ? [] : second.turnPositionsMm.map((mm) => mm - second.wire.overallMm))];
  const highs = [highMm, ...(second === null ? [] : second.turnPositionsMm.map((mm) => mm + second.wire.overallMm))];
  const [low, high] = [Math.min(...lows), Math.max(...highs)];
  const cells = Math.max(12, columns);
  const perMm = (cells - 1) / (high - low);
  const cell = (mm: number) => Math.min(cells - 1, Math.max(0, Math.round((mm - low) * perMm)));
  const marks = [
    { label: 'S', at: cell(startMm) },
    ...taps.map(({ tap, positionMm }) => ({ label: `${tap}`, at: cell(positionMm) })),
  ];
  const [from, to] = [cell(lowMm), cell(highMm)];
  const edge = (left: string, right: string) =>
    Array.from({ length: cells }, (_, i) =>
      i === from ? left : i === to ? right : i > from && i < to ? signs.edge : ' ',
    );
  const [topLeft, topRight, footLeft, footRight] = signs.corners;
  const top = edge(topLeft, topRight);
  for (const { at } of marks) top[at] = signs.tap;
  const body = Array.from({ length: cells }, (_, i) => (i === from || i === to ? signs.side : ' '));
  fill(body, turnPositionsMm, cell, perMm, LEANS[record.frame.hand]);
  const beside = Array.from({ length: cells }, () => ' ');
  if (second !== null) fill(beside, second.turnPositionsMm, cell, perMm, SECOND);
  const rows = [
    ...labels(marks, cells, signs),
    top,
    body,
    body,
    edge(footLeft, footRight),
    ...(second === null ? [] : [beside]),
    scale(low, high, cells, cell),
  ].map((row) => row.join('').trimEnd());
  return second === null ? rows : [...rows, `${SECOND} second winding`];
}

/** Turns where they lie: a sign for each, or a closed row where the cells are too wide for that. */
function fill(
  row: string[],
  turnsMm: readonly number[],
  cell: (mm: number) => number,
  perMm: number,
  sign: string,
): void {
  const steps = turnsMm.slice(1).map((mm, i) => Math.abs(mm - turnsMm[i]!));
  const usual = [...steps].sort((a, b) => a - b)[Math.floor(steps.length / 2)] ?? 0;
  const closed = usual * perMm < APART_CELLS;
  turnsMm.forEach((mm, i) => {
    const next = turnsMm[i + 1];
    row[cell(mm)] = sign;
    // A gap that is wider than the others is one to be seen.
    if (next === undefined || !closed || Math.abs(next - mm) > 1.8 * usual) return;
    for (let at = Math.min(cell(mm), cell(next)); at <= Math.max(cell(mm), cell(next)); at++) row[at] = sign;
  });
}

interface Mark {
  readonly label: string;
  readonly at: number;
}

/** The lowest row in which each label has room beside its neighbours, and leads down from the higher ones. */
function labels(marks: readonly Mark[], cells: number, signs: Signs): string[][] {
  const rows = Array.from({ length: LABEL_ROWS }, () => Array.from({ length: cells }, () => ' '));
  const free = (row: string[], from: number, to: number) => row.slice(from, to).every((sign) => sign === ' ');
  for (const { label, at } of marks) {
    const start = Math.min(cells - label.length, Math.max(0, at - Math.floor(label.length / 2)));
    const index = rows.findIndex(
      (row, i) =>
        free(row, Math.max(0, start - 1), start + label.length + 1) &&
        rows.slice(0, i).every((below) => below[at] === ' '),
    );
    if (index < 0) continue;
    rows[index]!.splice(start, label.length, ...label);
    for (const below of rows.slice(0, index)) below[at] = signs.lead;
  }
  return rows.filter((row) => row.some((sign) => sign !== ' ')).reverse();
}

/** Figures at round millimetres. */
function scale(low: number, high: number, cells: number, cell: (mm: number) => number): string[] {
  const row = Array.from({ length: cells }, () => ' ');
  const least = ((high - low) * SCALE_GAP) / cells;
  const decade = 10 ** Math.floor(Math.log10(least));
  const step = [1, 2, 5, 10].map((of) => of * decade).find((one) => one >= least) ?? 10 * decade;
  for (let i = Math.ceil(low / step); i * step <= high; i++) {
    const text = `${Number((i * step).toPrecision(6))}`;
    const start = Math.max(0, cell(i * step) - Math.floor(text.length / 2));
    if (start + text.length <= cells) row.splice(start, text.length, ...text);
  }
  return row;
}
