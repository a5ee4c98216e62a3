/** The blocks of a traveller that are the same on every coil of a kind: steps, other readings, result and signatures. */
import { READINGS, RESULT, STEPS, TABLE } from '../../templates/wording/lot-traveller.ts';
import { questionsOf } from '../bench/questions.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { BODY_MM, CAP_SHARE, label, line, movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord, Step } from '../record/schema.ts';
import { type Block, heading, paragraph, stack, tickBox } from './block.ts';
import { BLANK, CENTRE, columnsOf } from './check-blocks-columns.ts';
import { table } from './table.ts';
import { fixed } from './text.ts';
import { lengthCells, lengthHeads, unitsOf } from './units.ts';

/** How much of a step is said: all, or its first sentence. */
export type StepWords = 'whole' | 'first';

const sentences = (text: string): string[] => text.split(/(?<=\.)\s+(?=\p{Lu})/u);

/** What the table does not say of a step: of the finish all but how far to wind. */
function said({ kind, text }: Step, words: StepWords): string {
  const all = sentences(text);
  const rest = kind === 'finish' && all.length > 1 ? all.slice(1) : all;
  return words === 'whole' ? rest.join(' ') : rest[0]!;
}

const othersOf = ({ steps }: CoilRecord): Step[] => steps.filter(({ kind }) => kind !== 'tap');

/** A box for the steps that are not rows of the table, where there is no room for what they say. */
export function stepsElsewhere(record: CoilRecord, widthMm: number, measure: Measure): Block | null {
  const numbers = othersOf(record).map(({ step }) => `${step}`);
  if (numbers.length === 0) return null;
  const told = paragraph(STEPS.elsewhere(numbers.join(', ')), widthMm - 6, measure, { sizeMm: SMALL_MM });
  return { widthMm, heightMm: Math.max(4, told.heightMm), shapes: [tickBox(0, -3.3), ...movedAll(told, 6, 0)] };
}

/** Steps with a box each; those of the taps are rows of the table. */
export function steps(
  record: CoilRecord,
  part: 'before' | 'after',
  { words, sizeMm }: { readonly words: StepWords; readonly sizeMm: number },
  widthMm: number,
  measure: Measure,
): Block | null {
  const isAfter = ({ kind }: Step) => kind === 'after' || kind === 'finish';
  const chosen = othersOf(record).filter((step) => isAfter(step) === (part === 'after'));
  if (chosen.length === 0) return null;
  const indent = 11;
  const base = -(CAP_SHARE + 0.1) * sizeMm;
  const blocks = chosen.map((step): Block => {
    const told = paragraph(said(step, words), widthMm - indent, measure, { sizeMm });
    const mark = label(9.7, base, `${step.step}`, { align: 'right', sizeMm, bold: true });
    const shapes: Shape[] = [tickBox(0, -3.3), mark, ...movedAll(told, indent, 0)];
    return { widthMm, heightMm: Math.max(4, told.heightMm), shapes };
  });
  return stack([heading(STEPS[part], widthMm, measure), stack(blocks, 0.6)], 0);
}

/** What is measured besides the taps: former, 20 turns, and the whole coil with each known capacitor. */
export function otherReadings(
  record: CoilRecord,
  rowMm: number,
  sizeMm: number,
  widthMm: number,
  measure: Measure,
): Block | null {
  const units = unitsOf(record);
  const asked = questionsOf(record).filter(({ tap, quantity }) => tap === null || quantity === 'resonance');
  const whole = record.windings[0]!.taps.length;
  const rows = asked
    .filter(({ tap }) => tap === null || tap === whole)
    .map(({ what, low, high, unit, digits }) => {
      const told = (value: number) => (unit === 'mm' ? lengthCells(value, units, { digits }) : [fixed(value, digits)]);
      const named = unit === 'mm' ? lengthHeads(units) : [unit];
      const limits =
        low === null || high === null
          ? [TABLE.none]
          : told(low).map((text, i) => `${TABLE.between(text, told(high)[i]!)} ${named[i]!}`);
      return [what, limits.join('\n'), ''];
    });
  if (rows.length === 0) return null;
  const columns = columnsOf(widthMm, [
    [READINGS.what, 46, {}],
    [READINGS.limits, 27, CENTRE],
    [READINGS.read, 17, BLANK],
  ]);
  const body = table(columns, rows, measure, { rowMm, sizeMm });
  return stack([heading(READINGS.heading, widthMm, measure), body], 0);
}

const BOX_MM = 5.5;
/** Between two lines to write on. */
export const LINE_MM = 6.6;

/** Three boxes and `lines` lines to write on. */
export function result(lines: number, widthMm: number, measure: Measure): Block {
  const step = widthMm / RESULT.boxes.length;
  const boxes = RESULT.boxes.flatMap((word, i): Shape[] => [
    rectangle(i * step, -BOX_MM, BOX_MM, BOX_MM, 'outline'),
    label(i * step + BOX_MM + 2, -BOX_MM / 2, word, { sizeMm: 4.2, bold: true, anchor: 'middle' }),
  ]);
  const ruled = Array.from({ length: lines }, (_, i) =>
    line(0, -(i + 1) * LINE_MM - 1.5, widthMm, -(i + 1) * LINE_MM - 1.5, 'hair'),
  );
  return stack(
    [
      heading(RESULT.heading, widthMm, measure),
      { widthMm, heightMm: BOX_MM + 1.5, shapes: boxes },
      {
        widthMm,
        heightMm: lines * LINE_MM + 1.6,
        shapes: [label(0, -SMALL_MM * 0.9, RESULT.remarks), ...ruled],
      },
    ],
    0.5,
  );
}

const SIGN_MM = 9;

/** Who wound and who checks, with signature and date; the name of who checks where the lot says it. */
export function signatures(checkedBy: string | null, widthMm: number, measure: Measure): Block {
  const starts = [0, 0.5 * widthMm, 0.8 * widthMm] as const;
  const indent = measure.width(RESULT.checked, SMALL_MM) + 5;
  const name = checkedBy === null ? null : nameIn(checkedBy, starts[1] - indent - 2, measure);
  const heights = [SIGN_MM, Math.max(SIGN_MM, (name?.heightMm ?? 0) + 1.6)] as const;
  const heightMm = heights[0] + heights[1];
  const shapes: Shape[] = [rectangle(0, -heightMm, widthMm, heightMm, 'outline')];
  shapes.push(line(0, -heights[0], widthMm, -heights[0], 'thin'));
  for (const x of starts.slice(1)) shapes.push(line(x, 0, x, -heightMm, 'thin'));
  [RESULT.wound, RESULT.checked].forEach((who, i) => {
    const y = (i === 0 ? 0 : -heights[0]) - 3.6;
    shapes.push(label(2, y, who), label(starts[1] + 2, y, RESULT.signature), label(starts[2] + 2, y, RESULT.date));
  });
  if (name) shapes.push(...movedAll(name, indent, -heights[0] - (heights[1] - name.heightMm) / 2));
  return { widthMm, heightMm, shapes };
}

/** In the type of the body where one line or two take it, else smaller. */
function nameIn(name: string, widthMm: number, measure: Measure): Block {
  const large = paragraph(name, widthMm, measure, { sizeMm: BODY_MM, bold: true });
  if (large.heightMm < SIGN_MM) return large;
  return paragraph(name, widthMm, measure, { sizeMm: SMALL_MM, bold: true });
}
