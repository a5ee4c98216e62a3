/** Labels to cut for bags and bases: one a coil, at true scale, in a grid with marks to cut along. */
import { LABELS } from '../../templates/wording/lot-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { coilText, qrCode } from '../drawing/qr.ts';
import { RULER_BREADTH_MM, rulerAcross } from '../drawing/rulers.ts';
import { BODY_MM, label, line, movedAll, SMALL_MM } from '../drawing/shapes.ts';
import type { LotKind, LotRecord } from '../lot/schema.ts';
import { paragraph } from './block.ts';
import { PAPER_MM, type Page, Paper } from './page.ts';
import { frameOf, MARGIN_MM } from './sheet-frame.ts';
import { wrap } from './text.ts';

/** Of a label, its edges in the middle of the cut. */
export const LABEL_MM = { width: 62, height: 26 } as const;
/** Edge of the code with its quiet zone. */
const CODE_MM = 24.5;
const MARK_MM = 2.4;
const HEAD_MM = 9.5;
const SERIAL_SIZES_MM = [5.6, 5, 4.4, 3.9, 3.4];
const JOB_LINES = 2;

interface Grid {
  readonly across: number;
  readonly down: number;
  /** Upper left corner. */
  readonly x: number;
  readonly y: number;
}

/** As many labels as go between the head and the ruler. */
export function labelGrid(paper: LotRecord['paper']): Grid {
  const [width, height] = PAPER_MM[paper];
  const top = height - MARGIN_MM.along - HEAD_MM - MARK_MM;
  const low = MARGIN_MM.along + RULER_BREADTH_MM + MARK_MM + 1;
  const across = Math.floor((width - 2 * MARGIN_MM.across) / LABEL_MM.width);
  const down = Math.floor((top - low) / LABEL_MM.height);
  return { across, down, x: (width - across * LABEL_MM.width) / 2, y: top };
}

/** The name of a job on two lines; what does not go on them is cut off with an ellipsis: the serial tells the coil. */
function jobLines(job: string, widthMm: number, measure: Measure): string[] {
  const lines = wrap(job, widthMm, SMALL_MM, false, measure);
  if (lines.length <= JOB_LINES) return lines;
  let last = lines[JOB_LINES - 1]!;
  while (measure.width(`${last}…`, SMALL_MM) > widthMm) last = [...last].slice(0, -1).join('');
  return [...lines.slice(0, JOB_LINES - 1), `${last.trimEnd()}…`];
}

/** What every label of a kind says besides its serial, from the label's upper left corner. */
function kindShapes(kind: LotKind, measure: Measure): Shape[] {
  const x = CODE_MM + 1.5;
  const room = LABEL_MM.width - x - 2;
  return [
    ...jobLines(kind.job, room, measure).map((text, i) => label(x, -13.2 - i * SMALL_MM * 1.25, text)),
    label(x, -23.4, LABELS.kind(kind.kind), { bold: true }),
    label(LABEL_MM.width - 2, -23.4, kind.hash.slice(0, 8), { align: 'right' }),
  ];
}

function serialShapes(serial: string, measure: Measure): Shape[] {
  const x = CODE_MM + 1.5;
  const room = LABEL_MM.width - x - 2;
  const sizeMm = SERIAL_SIZES_MM.find((size) => measure.width(serial, size, true) <= room);
  if (sizeMm !== undefined) return [label(x, -8, serial, { sizeMm, bold: true })];
  return movedAll(paragraph(serial, room, measure, { sizeMm: SMALL_MM, bold: true }), x, -1.2);
}

/** Hair lines between the labels, and short strokes at the margin that stay when the labels are gone. */
function cutMarks({ across, down, x, y }: Grid): Shape[] {
  const [right, low] = [x + across * LABEL_MM.width, y - down * LABEL_MM.height];
  const shapes: Shape[] = [];
  for (let i = 0; i <= across; i++) {
    const at = x + i * LABEL_MM.width;
    shapes.push(line(at, y, at, low, 'hair', 'dashed'));
    shapes.push(line(at, y, at, y + MARK_MM, 'thin'), line(at, low, at, low - MARK_MM, 'thin'));
  }
  for (let i = 0; i <= down; i++) {
    const at = y - i * LABEL_MM.height;
    shapes.push(line(x, at, right, at, 'hair', 'dashed'));
    shapes.push(line(x - MARK_MM, at, x, at, 'thin'), line(right, at, right + MARK_MM, at, 'thin'));
  }
  return shapes;
}

function head(lot: LotRecord, sheet: string, widthMm: number, measure: Measure): Shape[] {
  const size = LABELS.size(`${LABEL_MM.width} × ${LABEL_MM.height}`);
  const right = measure.width(sheet, BODY_MM, true) + 4;
  const title = wrap(`${LABELS.document}: ${lot.lot}`, widthMm - right, BODY_MM, true, measure)[0]!;
  return [
    label(0, -3.2, title, { sizeMm: BODY_MM, bold: true }),
    label(widthMm, -3.2, sheet, { sizeMm: BODY_MM, bold: true, align: 'right' }),
    label(0, -7.4, `${LABELS.print} ${size}`),
  ];
}

/** The pages as drawings, each made when it is asked for. */
export function* layOutLabels(lot: LotRecord, measure: Measure): Generator<Page> {
  const [widthMm, heightMm] = PAPER_MM[lot.paper];
  const grid = labelGrid(lot.paper);
  const each = grid.across * grid.down;
  const count = Math.ceil(lot.coils.length / each);
  const kinds = new Map(lot.kinds.map((kind) => [kind.kind, { kind, shapes: kindShapes(kind, measure) }]));
  const shared = [
    ...cutMarks(grid),
    ...movedAll(rulerAcross(LABELS.unit), MARGIN_MM.across + 3, MARGIN_MM.along + RULER_BREADTH_MM),
  ];
  for (let n = 0; n < count; n++) {
    const shapes: Shape[] = [...shared];
    const words = head(lot, LABELS.sheet(n + 1, count), widthMm - 2 * MARGIN_MM.across, measure);
    shapes.push(...movedAll({ shapes: words }, MARGIN_MM.across, heightMm - MARGIN_MM.along));
    for (const [i, coil] of lot.coils.slice(n * each, (n + 1) * each).entries()) {
      const of = kinds.get(coil.kind);
      if (of === undefined) throw new Error(`kind ${coil.kind} is not among the kinds of the lot`);
      const x = grid.x + (i % grid.across) * LABEL_MM.width;
      const y = grid.y - Math.floor(i / grid.across) * LABEL_MM.height;
      const code = qrCode(coilText(coil.serial, of.kind.hash), CODE_MM, 'medium');
      const low = y - (LABEL_MM.height + CODE_MM) / 2;
      shapes.push(
        ...movedAll({ shapes: of.shapes }, x, y),
        ...movedAll({ shapes: serialShapes(coil.serial, measure) }, x, y),
        ...movedAll(code, x + 0.5, low),
      );
    }
    yield { widthMm, heightMm, shapes };
  }
}

export { frameOf as labelsFrame };

/** The labels of a lot as the bytes of a PDF. */
export async function labels(lot: LotRecord): Promise<Uint8Array> {
  const paper = new Paper({ title: `${LABELS.document}: ${lot.lot}`, subject: `record ${lot.hash.slice(0, 12)}` });
  const chunks: Uint8Array[] = [];
  await paper.stream(layOutLabels(lot, paper), (chunk) => chunks.push(chunk));
  return Buffer.concat(chunks);
}
