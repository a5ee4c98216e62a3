/** A figure for every contact of the aerial with every one of the detector, in a grid: black ink only, so marks are frames and corners. */
import { AROUND } from '../../templates/wording/around-sheet.ts';
import type { Measure } from './boxes.ts';
import type { Drawing, Shape } from './drawing.ts';
import type { Sign } from './legend.ts';
import { label, polygon, rectangle, SMALL_MM } from './shapes.ts';

export type MapMark = 'strongest' | 'most selective' | 'balanced';

export interface MapCell {
  /** Null: not tuned. */
  readonly text: string | null;
  readonly dead: boolean;
  readonly marks: readonly MapMark[];
}

export interface PairMap {
  readonly title: string;
  readonly rows: readonly string[];
  readonly columns: readonly string[];
  /** Row by row. */
  readonly cells: readonly (readonly MapCell[])[];
}

const ROW_MM = 4.6;
const DEAD = 0.86;

function markShapes(mark: MapMark, x: number, y: number, width: number, height: number): Shape[] {
  if (mark === 'strongest') return [rectangle(x + 0.25, y + 0.25, width - 0.5, height - 0.5, 'outline')];
  if (mark === 'most selective')
    return [rectangle(x + 0.75, y + 0.65, width - 1.5, height - 1.3, 'thin', undefined, 'dashed')];
  const side = 1.5;
  return [
    polygon(
      [
        [x + width, y + height],
        [x + width - side, y + height],
        [x + width, y + height - side],
      ],
      'hair',
      0,
    ),
  ];
}

/** Signs of the marks for a legend. */
export function mapSigns(): Sign[] {
  const { signs } = AROUND.map;
  const cell = (fill?: number) => rectangle(1, 0, 6, 3.6, 'hair', fill);
  return [
    ...(['strongest', 'most selective', 'balanced'] as const).map((mark) => ({
      shapes: [cell(), ...markShapes(mark, 1, 0, 6, 3.6)],
      words: signs[mark],
    })),
    { shapes: [cell(DEAD)], words: signs.dead },
    {
      shapes: [cell(), label(4, 1.8, AROUND.map.none, { align: 'centre', anchor: 'middle' })],
      words: signs.untuned,
    },
  ];
}

/** Width of the widest text of a column, with room on both sides. */
export function mapLeastMm(map: PairMap, measure: Measure): number {
  const widest = (texts: readonly string[]) => Math.max(0, ...texts.map((text) => measure.width(text, SMALL_MM)));
  const cell = widest([...map.columns, ...map.cells.flat().map(({ text }) => text ?? AROUND.map.none)]) + 1.4;
  return headMm(map, measure) + cell * map.columns.length;
}

const headMm = ({ rows }: PairMap, measure: Measure): number =>
  Math.max(...rows.map((row) => measure.width(row, SMALL_MM, true)), measure.width(AROUND.map.aerial, SMALL_MM)) + 2.4;

/** Origin at the upper left corner, Y up. */
export function drawPairMap(map: PairMap, widthMm: number, measure: Measure): Drawing & { heightMm: number } {
  const shapes: Shape[] = [];
  const left = headMm(map, measure);
  const cell = Math.min(11, (widthMm - left) / map.columns.length);
  const right = left + cell * map.columns.length;
  shapes.push(label(0, -3.2, map.title, { bold: true }));
  const top = -4.6 - 2 * ROW_MM;
  shapes.push(
    label(left + (right - left) / 2, -4.6 - ROW_MM / 2, AROUND.map.detector, { align: 'centre', anchor: 'middle' }),
    label(0.4, top + ROW_MM / 2, AROUND.map.aerial, { anchor: 'middle' }),
  );
  map.columns.forEach((name, c) => {
    const at = { align: 'centre', anchor: 'middle', bold: true } as const;
    shapes.push(label(left + (c + 0.5) * cell, top + ROW_MM / 2, name, at));
  });
  map.rows.forEach((name, r) => {
    const y = top - (r + 1) * ROW_MM;
    shapes.push(label(left - 1.2, y + ROW_MM / 2, name, { align: 'right', anchor: 'middle', bold: true }));
    map.cells[r]!.forEach(({ text, dead }, c) => {
      const x = left + c * cell;
      shapes.push(rectangle(x, y, cell, ROW_MM, 'hair', dead ? DEAD : undefined));
      const words = text ?? AROUND.map.none;
      shapes.push(label(x + cell / 2, y + ROW_MM / 2, words, { align: 'centre', anchor: 'middle' }));
    });
  });
  // On top of the grid, which would cut them.
  map.cells.forEach((row, r) => {
    row.forEach(({ marks }, c) => {
      for (const mark of marks) shapes.push(...markShapes(mark, left + c * cell, top - (r + 1) * ROW_MM, cell, ROW_MM));
    });
  });
  return { shapes, heightMm: -(top - map.rows.length * ROW_MM) };
}
