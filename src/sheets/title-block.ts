/** The frame and the head of every sheet: job, which document, sheet n of m, record, program, and the date if given. */
import { TITLE } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { BODY_MM, label, line, moved, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, paragraph } from './block.ts';
import { wrap } from './text.ts';

/** What tells one sheet from the next. */
export interface SheetName {
  readonly document: string;
  readonly part: string;
  readonly sheet: string;
  /** What the name in the head is the name of; a job when left out. */
  readonly of?: string;
}

const NAME_SIZES_MM = [5.6, 5, 4.4, 3.9];

/** The largest type in which the name takes one line, else two; a longer name takes the lines it needs. */
function jobName(job: string, widthMm: number, measure: Measure): Block {
  for (const most of [1, 2])
    for (const sizeMm of NAME_SIZES_MM)
      if (wrap(job, widthMm, sizeMm, true, measure).length <= most)
        return paragraph(job, widthMm, measure, { sizeMm, bold: true });
  return paragraph(job, widthMm, measure, { sizeMm: BODY_MM, bold: true });
}

/** What the head reads, of the record of any verb. */
export type Headed = Pick<CoilRecord, 'job' | 'hash' | 'program' | 'date'>;

export function titleBlock(record: Headed, name: SheetName, widthMm: number, measure: Measure): Block {
  const right = [TITLE.record(record.hash.slice(0, 12)), record.program];
  if (record.date !== null) right.push(TITLE.date(record.date));
  const middleWidth = Math.max(
    measure.width(name.document, 4.2, true),
    measure.width(name.part, BODY_MM),
    measure.width(name.sheet, BODY_MM, true),
  );
  const rightWidth = Math.max(...right.map((text) => measure.width(text, SMALL_MM)));
  const rightX = widthMm - rightWidth - 4;
  const middleX = rightX - Math.max(middleWidth, 40) - 4;
  const job = jobName(record.job, middleX - 4, measure);
  const heightMm = Math.max(14.5, job.heightMm + 6.4);
  const shapes: Shape[] = [
    rectangle(0, -heightMm, widthMm, heightMm, 'outline'),
    line(middleX, 0, middleX, -heightMm, 'thin'),
    line(rightX, 0, rightX, -heightMm, 'thin'),
    label(2, -3.7, name.of ?? TITLE.job),
    ...job.shapes.map((shape) => moved(shape, 2, -4.8)),
    label(middleX + 2, -4.6, name.document, { sizeMm: 4.2, bold: true }),
    label(middleX + 2, -8.7, name.part, { sizeMm: BODY_MM }),
    label(middleX + 2, -12.8, name.sheet, { sizeMm: BODY_MM, bold: true }),
    ...right.map((text, i) => label(rightX + 2, -4.3 - i * 4.2, text)),
  ];
  return { widthMm, heightMm, shapes };
}
