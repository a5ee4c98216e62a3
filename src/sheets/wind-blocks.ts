/** The blocks of the page to wind from. */
import * as TAP_WORDS from '../../templates/wording/tap-method.ts';
import { CAUTIONS, DRAWING, FACTS, STEPS, TAPS } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { elevation, elevationScale, namesIn, oneNamedIn, scaleText } from '../drawing/elevation.ts';
import { endView, isStaggered } from '../drawing/end-view.ts';
import { BODY_MM, CAP_SHARE, label, line, movedAll, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import { PANEL_MM, panelHeight, tapPicture } from '../drawing/tap-picture.ts';
import { BARING_MM, baringPicture, coveringKind } from '../drawing/tap-picture-end.ts';
import { ribName } from '../record/rib-name.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, columns, heading, list, paragraph, stack, tickBox } from './block.ts';
import { type Column, NO_BOX, shares, table } from './table.ts';
import { figures, fixed, short } from './text.ts';
import {
  forcesText,
  lengthCell,
  lengthHeads,
  lengthText,
  lengthUnit,
  unitsOf,
  wireCell,
  wireText,
  wireUnit,
} from './units.ts';

/** Moved from one cell to another at a time, the least width of a cell, and how often at most. */
const SHIFT_MM = 1.5;
const LEAST_CELL_MM = 22;
const MOST_SHIFTS = 24;

/** Widths at which the highest of some cells is lowest: it takes from cells that stay lower than it; as given where that gains nothing. */
function levelled(given: readonly number[], heightOf: (cell: number, widthMm: number) => number): readonly number[] {
  const widths = [...given];
  const heights = widths.map((width, i) => heightOf(i, width));
  let best = { widths: given, high: Math.max(...heights) };
  for (let n = 0; n < MOST_SHIFTS; n++) {
    const high = Math.max(...heights);
    const to = heights.indexOf(high);
    const from = widths
      .map((width, i) => ({ i, width, after: i === to ? Infinity : heightOf(i, width - SHIFT_MM) }))
      .filter(({ width, after }) => width - SHIFT_MM >= LEAST_CELL_MM && after < high - 1e-9)
      .sort((a, b) => a.after - b.after || b.width - a.width)[0];
    if (!from) break;
    widths[from.i]! -= SHIFT_MM;
    widths[to]! += SHIFT_MM;
    for (const i of [from.i, to]) heights[i] = heightOf(i, widths[i]!);
    const now = Math.max(...heights);
    if (now < best.high - 1e-9) best = { widths: [...widths], high: now };
  }
  return best.widths;
}

/** Wire, winding, pitch, tension, what to have ready, the whole coil: one strip. */
export function facts(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const winding = record.windings[0]!;
  const { wire } = winding;
  const units = unitsOf(record);
  const named = (mm: number) => lengthText(mm, units, { digits: 3, trim: true });
  const pitchWords =
    winding.pitchKind === 'close'
      ? FACTS.close
      : winding.pitchKind === 'groove'
        ? FACTS.groove
        : FACTS.spacer(winding.spacerName, named(winding.spacerMm));
  const cells: [string, string, string][] = [
    [FACTS.wire, wire.name, FACTS[wire.covering === 'bare' ? 'uncovered' : 'overall'](named(wire.overallMm))],
    [FACTS.winding, FACTS.turns(short(winding.turns, 3)), FACTS.hand[record.frame.hand]],
    [FACTS.pitch, lengthText(winding.pitchMm, units, { digits: units === 'metric' ? 4 : 3, trim: true }), pitchWords],
    [FACTS.tension, forcesText([winding.tensionLowN, winding.tensionHighN], units), FACTS.steady],
    [
      FACTS.cut,
      wireText(winding.wireLengthM + winding.leadsM, units),
      FACTS.ends(wireText(winding.leadsM, units, 1), fixed(winding.wireMassG, 1)),
    ],
    [FACTS.coil, `${figures(winding.inductanceUh)} µH`, FACTS.low],
  ];
  const cell = ([name, value, more]: [string, string, string], width: number): Block => {
    const inner = width - 3;
    const parts = [
      paragraph(name, inner, measure, { sizeMm: SMALL_MM }),
      paragraph(value, inner, measure, { sizeMm: 3.4, bold: true }),
      paragraph(more, inner, measure, { sizeMm: SMALL_MM }),
    ];
    return { ...stack(parts, 0.5), widthMm: width };
  };
  const widths = levelled(shares(widthMm, [34, 30, 31, 29, 35, 27]), (i, width) => cell(cells[i]!, width).heightMm);
  const blocks = cells.map((each, i) => cell(each, widths[i]!));
  const row = beside(blocks, 0);
  const heightMm = row.heightMm + 2;
  const shapes: Shape[] = [rectangle(0, -heightMm, widthMm, heightMm, 'thin')];
  let x = 0;
  for (const width of widths.slice(0, -1)) {
    x += width;
    shapes.push(line(x, 0, x, -heightMm, 'hair'));
  }
  shapes.push(...movedAll(row, 1.5, -1.2));
  return { widthMm, heightMm, shapes };
}

/** The coil to scale, with what must be said about the frame. */
export function coilDrawing(record: CoilRecord, widthMm: number, highMm: number, measure: Measure): Block {
  const words = { ...DRAWING };
  const units = unitsOf(record);
  const length = (mm: number) => lengthCell(mm, units);
  const scale = elevationScale(record, widthMm, highMm, words, measure, length);
  const most = namesIn(highMm);
  const picture = elevation(record, scale, words, measure, length, most);
  const oneIn = oneNamedIn(record.windings[0]!.taps.length, most);
  const head = heading(DRAWING.heading(scaleText(scale)), widthMm, measure);
  const spare = Math.max(0, widthMm - picture.leftMm - picture.rightMm);
  const drawn: Block = {
    widthMm,
    heightMm: picture.upMm + picture.downMm,
    shapes: movedAll(picture, picture.leftMm + spare / 2, -picture.upMm),
  };
  const words8 = (text: string, bold = false) => paragraph(text, widthMm, measure, { sizeMm: SMALL_MM, bold });
  const notes = [
    words8(`${DRAWING.hand[record.frame.hand]} ${DRAWING.earthed[record.frame.earthedEnd]}`, true),
    words8(
      [
        DRAWING.seen(lengthUnit(units)),
        DRAWING.datumIs(record.frame.datum),
        ...(oneIn > 1 ? [DRAWING.named(oneIn)] : []),
      ].join(' '),
    ),
  ];
  return stack([head, drawn, ...notes], 1);
}

/** Rows of the tap table of a record. */
export function tapRows(record: CoilRecord): number {
  const { taps, unitTaps = [] } = record.windings[0]!;
  return unitTaps.length + taps.length;
}

/**
 * The taps in the order of winding, or the rows `from` up to `to` of them; each row is a step and has its box. The finish is
 * ticked among the other steps.
 */
export function tapTable(
  record: CoilRecord,
  widthMm: number,
  rowMm: number,
  measure: Measure,
  from = 0,
  to = tapRows(record),
  sizeMm: number = BODY_MM,
): Block {
  const { taps, unitTaps = [] } = record.windings[0]!;
  const units = unitsOf(record);
  // Both units take room: there thousandths of an inch do, and the angle tells what a hundredth of a turn leaves out.
  const both = units === 'both';
  const heights = (mm: number) =>
    both ? [lengthCell(mm, 'metric'), lengthCell(mm, 'inch', { digits: 1 })] : [lengthCell(mm, units)];
  const stepOf = new Map(record.steps.map((step) => [step.unit === undefined ? step.tap : `u${step.unit}`, step]));
  const parts: readonly (readonly [string, number, Partial<Column>])[] = [
    [TAPS.step, 8, {}],
    [TAPS.done, 7, { kind: 'tick' }],
    [TAPS.tap, 7, { align: 'centre', bold: true }],
    [TAPS.turn, 15, { bold: true }],
    [record.former.ribs === null ? TAPS.angle : TAPS.rib, 12, { bold: true }],
    ...lengthHeads(units).map((unit, i) => [i === 0 ? TAPS.positionIn(unit) : unit, 13, {}] as const),
    [TAPS.inductance, 13, {}],
    [TAPS.wireIn(wireUnit(both ? 'metric' : units)), 13, {}],
  ];
  const widths = shares(
    widthMm,
    parts.map(([, width]) => width),
  );
  // In the order of winding: all unit taps come before the first of the tens.
  const made = [
    ...unitTaps.map((tap) => ({ ...tap, key: `u${tap.unit}` })),
    ...taps.map((tap) => ({ ...tap, key: tap.tap })),
  ];
  const rows = made.slice(from, to).map((tap) => {
    const step = stepOf.get(tap.key);
    return [
      step ? `${step.step}` : '',
      step?.kind === 'tap' ? '' : NO_BOX,
      `${tap.key}`,
      short(tap.turn, both ? 2 : 3),
      ribName(record.former, tap.angleDeg) ?? fixed(tap.angleDeg, 1),
      ...heights(tap.positionMm),
      figures(tap.inductanceUh),
      wireCell(tap.wireFromStartM, both ? 'metric' : units),
    ];
  });
  const columnsOf = parts.map(([head, , more], i) => ({ head, widthMm: widths[i]!, align: 'right' as const, ...more }));
  const head = heading(from === 0 ? TAPS.heading : TAPS.more, widthMm, measure);
  const whole = stack([head, table(columnsOf, rows, measure, { rowMm, sizeMm: both ? SMALL_MM : sizeMm })], 0);
  if (unitTaps.length === 0 || to < made.length) return whole;
  return stack([whole, paragraph(TAPS.switches, widthMm, measure, { sizeMm: SMALL_MM })], 0.8);
}

/** The coil seen from above as a block. */
function seenFromAbove(record: CoilRecord, measure: Measure): Block {
  const { shapes, box } = endView(record, 11, measure);
  return {
    widthMm: box.right - box.left,
    heightMm: box.top - box.bottom,
    shapes: movedAll({ shapes }, -box.left, -box.top),
  };
}

/** Where round the former the taps stand; nothing when they stand in one line. */
export function tapAngles(record: CoilRecord, widthMm: number, measure: Measure): Block | null {
  if (!isStaggered(record)) return null;
  const drawn = seenFromAbove(record, measure);
  const words = paragraph(DRAWING.aboveWords, widthMm - drawn.widthMm - 4, measure, { sizeMm: SMALL_MM });
  return { ...stack([heading(DRAWING.above, widthMm, measure), beside([words, drawn], 4)], 0), widthMm };
}

/** The three pictures of the tap of this coil, with their words. */
function tapPanels(record: CoilRecord, measure: Measure): Block {
  const { name } = record.tapMethod;
  const panels = TAP_WORDS.STAGES[name].map((words, i) => {
    const stage = i as 0 | 1 | 2;
    const drawn: Block = {
      widthMm: PANEL_MM.width,
      heightMm: panelHeight(name),
      shapes: movedAll(tapPicture(name, stage), 0, -panelHeight(name)),
    };
    const under = paragraph(words, PANEL_MM.width - 2, measure, { sizeMm: SMALL_MM });
    return { ...stack([drawn, under], 0.8), widthMm: PANEL_MM.width };
  });
  return beside(panels, 0.5);
}

/** How an end of this wire is bared: its picture, and the words at that width. */
function baring(record: CoilRecord, widthMm: number, measure: Measure): [picture: Block, words: Block] {
  const { wire } = record.windings[0]!;
  const picture: Block = {
    widthMm: BARING_MM.width,
    heightMm: BARING_MM.height,
    shapes: movedAll(baringPicture(coveringKind(wire)), 0, -BARING_MM.height),
  };
  const text = TAP_WORDS.baring(wire.covering, wire.strands, wire.solderable);
  return [picture, paragraph(text, widthMm, measure, { sizeMm: SMALL_MM })];
}

/** The tap of this coil, drawn, and how it is made. */
export function tapMethod(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const { name, how } = record.tapMethod;
  const steps = list(
    how.map((text, i) => ({ mark: `${i + 1}.`, text })),
    widthMm,
    measure,
  );
  const head = heading(TAP_WORDS.HEADING[name], widthMm, measure);
  const bared = beside(baring(record, widthMm - BARING_MM.width - 3, measure), 3);
  return { ...stack([head, tapPanels(record, measure), ...steps, bared], 0.8), widthMm };
}

/** The same where room is short: the words under the pictures do, and the view from above stands beside the bared end. */
export function tapBriefly(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const head = heading(TAP_WORDS.HEADING[record.tapMethod.name], widthMm, measure);
  const panels = tapPanels(record, measure);
  if (!isStaggered(record)) {
    const bared = beside(baring(record, widthMm - BARING_MM.width - 3, measure), 3);
    return { ...stack([head, panels, bared], 0.8), widthMm };
  }
  const above = seenFromAbove(record, measure);
  const inner = widthMm - above.widthMm - 4;
  const words = paragraph(DRAWING.aboveBrief, inner, measure, { sizeMm: SMALL_MM });
  const left = { ...stack([...baring(record, inner, measure), words], 0.8), widthMm: inner };
  return { ...stack([head, panels, beside([left, above], 4)], 0.8), widthMm };
}

/** All steps; those up to the end of winding, with or without a word where the rest stand; or those that come when all is wound. */
export type StepPart = 'all' | 'winding' | 'during' | 'after';

/** The other steps, each with its box and number; steps that are rows of the tap table are named in their place. */
export function stepItems(
  record: CoilRecord,
  widthMm: number,
  measure: Measure,
  sizeMm: number = BODY_MM,
  part: StepPart = 'all',
): Block[] {
  const items: Block[] = [];
  const steps = record.steps.filter(({ kind }) => part === 'all' || (kind === 'after') === (part === 'after'));
  const indent = 11;
  const add = (mark: Shape[], words: string) => {
    const text = paragraph(words, widthMm - indent, measure, { sizeMm });
    const shapes: Shape[] = [...mark, ...movedAll(text, indent, 0)];
    items.push({ widthMm, heightMm: Math.max(4.2, text.heightMm), shapes });
  };
  const base = -(CAP_SHARE + 0.1) * sizeMm;
  for (let i = 0; i < steps.length; i++) {
    const step = steps[i]!;
    if (step.kind !== 'tap' || (step.tap === null && step.unit === undefined)) {
      const number = label(9.6, base, `${step.step}`, { sizeMm, align: 'right', bold: true });
      add([tickBox(0, -3.3), number], step.text);
      continue;
    }
    let last = step;
    while (steps[i + 1]?.kind === 'tap') last = steps[++i]!;
    add([], STEPS.rows(step.step, last.step));
  }
  const after = record.steps.filter(({ kind }) => kind === 'after');
  if (part === 'winding' && after.length > 0) add([], STEPS.overleaf(after[0]!.step, after.at(-1)!.step));
  return items;
}

/** Cautions in a frame, in one column or two. */
export function cautions(record: CoilRecord, widthMm: number, count: 1 | 2, measure: Measure): Block {
  const inner = widthMm - 5;
  const items = list(
    record.cautions.map((text) => ({ mark: '•', text })),
    count === 1 ? inner : (inner - 5) / 2,
    measure,
  );
  const body = stack([heading(CAUTIONS.heading, inner, measure), columns(items, count, 5, 0.5)], 0);
  const heightMm = body.heightMm + 3;
  const shapes: Shape[] = [rectangle(0, -heightMm, widthMm, heightMm, 'outline'), ...movedAll(body, 2.5, -1.5)];
  return { widthMm, heightMm, shapes };
}
