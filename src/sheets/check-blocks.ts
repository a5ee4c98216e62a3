/** The blocks of the page to check by. */
import { CHECKS } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import type { Shape } from '../drawing/drawing.ts';
import { label, line, SMALL_MM } from '../drawing/shapes.ts';
import type { CoilRecord, Setting, Tap } from '../record/schema.ts';
import { type Block, heading, list, paragraph, stack } from './block.ts';
import { type Column, shares, table } from './table.ts';
import { figures, fixed, sentence, short, signed } from './text.ts';

function columnsOf(widthMm: number, parts: readonly (readonly [string, number, Partial<Column>])[]): Column[] {
  const widths = shares(
    widthMm,
    parts.map(([, part]) => part),
  );
  return parts.map(([head, , rest], i) => ({ head, widthMm: widths[i]!, ...rest }));
}

const RIGHT = { align: 'right' } as const;
const CENTRE = { align: 'centre' } as const;
const BLANK = { kind: 'blank', align: 'centre' } as const;
const TICK = { kind: 'tick', align: 'centre' } as const;

export function checks(record: CoilRecord, widthMm: number, rowMm: number, measure: Measure): Block {
  const columns = columnsOf(widthMm, [
    [CHECKS.what, 74, {}],
    [CHECKS.low, 18, RIGHT],
    [CHECKS.nominal, 18, { ...RIGHT, bold: true }],
    [CHECKS.high, 18, RIGHT],
    [CHECKS.unit, 14, {}],
    [CHECKS.reading, 28, BLANK],
    [CHECKS.good, 16, TICK],
  ]);
  const rows = record.checks.map((check) => [
    check.what,
    fixed(check.low, check.digits),
    fixed(check.nominal, check.digits),
    fixed(check.high, check.digits),
    check.unit,
  ]);
  return stack([heading(CHECKS.heading, widthMm, measure), table(columns, rows, measure, { rowMm })], 0);
}

/** Rows of a table of taps that go on one page at most. */
const ROWS = 30;

/** Every tap with its limits, in as many tables as go on one page each. */
export function tapChecks(record: CoilRecord, widthMm: number, rowMm: number, measure: Measure): Block[] {
  const { taps } = record.windings[0]!;
  const parts = Math.ceil(taps.length / ROWS);
  const each = Math.ceil(taps.length / parts);
  const words = paragraph(CHECKS.limits(dominants(record)), widthMm, measure, { sizeMm: SMALL_MM });
  return Array.from({ length: parts }, (_, i) => {
    const head = heading(i === 0 ? CHECKS.taps : CHECKS.tapsMore, widthMm, measure);
    const body = [head, tapCheckTable(taps.slice(i * each, (i + 1) * each), widthMm, rowMm, measure)];
    return stack(i === parts - 1 ? [...body, { ...words, heightMm: words.heightMm + 0.5 }] : body, 0.8);
  });
}

function tapCheckTable(taps: readonly Tap[], widthMm: number, rowMm: number, measure: Measure): Block {
  const ranged = taps.some((tap) => tap.range !== null);
  const columns = columnsOf(widthMm, [
    ['tap', 10, { ...CENTRE, bold: true }],
    [CHECKS.deviation, 14, RIGHT],
    [CHECKS.length, 18, RIGHT],
    [CHECKS.reading, 19, BLANK],
    [CHECKS.inductance, 30, CENTRE],
    [CHECKS.reading, 20, BLANK],
    [CHECKS.resistance, 32, CENTRE],
    [CHECKS.reading, 20, BLANK],
    ...(ranged ? ([[CHECKS.range, 26, CENTRE]] as const) : []),
    [CHECKS.good, 13, TICK],
  ]);
  const rows = taps.map((tap) => {
    const cells = [
      `${tap.tap}`,
      signed(tap.deviationPercent, 2),
      fixed(tap.woundLengthMm, 2),
      '',
      CHECKS.between(figures(tap.inductanceLowUh), figures(tap.inductanceHighUh)),
      '',
      CHECKS.between(figures(tap.resistanceLowOhm), figures(tap.resistanceHighOhm)),
      '',
    ];
    if (ranged) cells.push(tap.range ? CHECKS.between(fixed(tap.range.lowKhz, 0), fixed(tap.range.highKhz, 0)) : '');
    return cells;
  });
  return table(columns, rows, measure, { rowMm });
}

/** What makes the limits wide, with the taps where it does: `pitch (taps 1 to 3), former diameter (tap 4)`. */
function dominants(record: CoilRecord): string {
  const runs: { input: string; first: number; last: number }[] = [];
  for (const { tap, dominant } of record.windings[0]!.taps) {
    const last = runs[runs.length - 1];
    if (last?.input === dominant) last.last = tap;
    else runs.push({ input: dominant, first: tap, last: tap });
  }
  return runs.map(({ input, first, last }) => CHECKS.dominant(input, first, last)).join(', ');
}

/** What the two switches set, in as many tables as go on one page each; nothing for one switch. */
export function settings(record: CoilRecord, widthMm: number, rowMm: number, measure: Measure): Block[] {
  const rows = record.settings ?? [];
  const parts = Math.ceil(rows.length / ROWS);
  const each = Math.ceil(rows.length / parts);
  return Array.from({ length: parts }, (_, i) =>
    settingsOf(rows.slice(i * each, (i + 1) * each), i === parts - 1, widthMm, rowMm, measure),
  );
}

function settingsOf(
  rows: readonly Setting[],
  isLast: boolean,
  widthMm: number,
  rowMm: number,
  measure: Measure,
): Block {
  const last = rows[rows.length - 1]!;
  const ranged = rows.some((row) => row.lowKhz !== null);
  const columns = columnsOf(widthMm, [
    [CHECKS.tens, 12, { ...CENTRE, bold: true }],
    [CHECKS.turnsUsed, 26, CENTRE],
    [CHECKS.unitLast(last.inductancesUh.length - 1), 22, RIGHT],
    [CHECKS.unitZero, 22, { ...RIGHT, bold: true }],
    [CHECKS.step, 18, RIGHT],
    [CHECKS.q, 18, RIGHT],
    [CHECKS.atKhz, 18, RIGHT],
    ...(ranged ? ([[CHECKS.range, 34, CENTRE]] as const) : []),
  ]);
  const lines = rows.map((row) => {
    const cells = [
      `${row.tens}`,
      CHECKS.between(`${row.turnsLeast}`, `${row.turnsMost}`),
      figures(row.inductancesUh[row.inductancesUh.length - 1]!),
      figures(row.inductancesUh[0]!),
      fixed(row.stepPercent, 1),
      fixed(row.q, 0),
      fixed(row.frequencyKhz, 0),
    ];
    if (row.lowKhz !== null && row.highKhz !== null)
      cells.push(CHECKS.between(fixed(row.lowKhz, 0), fixed(row.highKhz, 0)));
    return cells;
  });
  const how = paragraph(CHECKS.settingsHow('1', `${last.turnsMost}`), widthMm, measure, { sizeMm: SMALL_MM });
  const body = [heading(CHECKS.settings, widthMm, measure), table(columns, lines, measure, { rowMm })];
  return stack(isLast ? [...body, how] : body, 0.5);
}

export function corrections(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const columns = columnsOf(widthMm, [
    [CHECKS.doing, 70, {}],
    [CHECKS.whole, 16, RIGHT],
    [CHECKS.first, 15, RIGHT],
  ]);
  const rows = record.corrections.map((each) => [
    each.doing,
    signed(each.wholePercent, 2),
    signed(each.firstTapPercent, 2),
  ]);
  const how = paragraph(CHECKS.correctionsHow, widthMm, measure, { sizeMm: SMALL_MM });
  return stack([heading(CHECKS.corrections, widthMm, measure), table(columns, rows, measure), how], 1);
}

export function formerSizes(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const { former } = record;
  const rows: [string, string][] = [
    [CHECKS.outside, fixed(former.outsideDiameterMm, 2)],
    [CHECKS.length2, fixed(former.lengthMm, 2)],
    [CHECKS.bore, fixed(former.boreDiameterMm, 2)],
    former.ribs === null
      ? [CHECKS.wall, fixed(former.wallMm, 2)]
      : [CHECKS.ribSize, `${fixed(former.ribs.widthMm, 2)} x ${fixed(former.ribs.depthMm, 2)}`],
  ];
  if (former.flange) rows.push([CHECKS.rim, fixed(former.flange.diameterMm, 2)]);
  if (former.groove) rows.push([former.ribs === null ? CHECKS.groove : CHECKS.notch, fixed(former.groove.depthMm, 2)]);
  const columns = columnsOf(widthMm, [
    [CHECKS.part, 36, {}],
    [CHECKS.mm, 18, { ...RIGHT, bold: true }],
    [CHECKS.reading, 24, BLANK],
  ]);
  const what = paragraph(`${sentence(former.material)} ${sentence(former.stiffness)}`, widthMm, measure, {
    sizeMm: SMALL_MM,
  });
  return stack([heading(CHECKS.former, widthMm, measure), table(columns, rows, measure), what], 1);
}

export function signature(widthMm: number, measure: Measure): Block {
  const heightMm = 9;
  const widths = shares(widthMm, [48, 30, 48, 30, 30]);
  const shapes: Shape[] = [];
  let x = 0;
  CHECKS.signature.forEach((words, i) => {
    shapes.push(label(x, -heightMm + 1, words));
    shapes.push(line(x + measure.width(words, SMALL_MM) + 1.5, -heightMm + 0.6, x + widths[i]! - 3, -heightMm + 0.6));
    x += widths[i]!;
  });
  return { widthMm, heightMm, shapes };
}

export function reasons(record: CoilRecord, widthMm: number, measure: Measure): Block {
  const { chosen } = record;
  const first = CHECKS.chosen(chosen.prefer, `${chosen.tried}`, `${chosen.feasible}`);
  const text = paragraph(`${first} ${sentence(chosen.why)}`, widthMm, measure);
  return stack([heading(CHECKS.why, widthMm, measure), text], 0);
}

export function alternatives(record: CoilRecord, widthMm: number, measure: Measure): Block | null {
  if (record.alternatives.length === 0) return null;
  const columns = columnsOf(widthMm, [
    [CHECKS.wire, 46, {}],
    [CHECKS.formerMm, 14, RIGHT],
    [CHECKS.pitch, 21, RIGHT],
    [CHECKS.turns, 13, RIGHT],
    [CHECKS.windingMm, 13, RIGHT],
    [CHECKS.wireM, 14, RIGHT],
    [CHECKS.worst, 13, RIGHT],
    [CHECKS.loss, 15, RIGHT],
    [CHECKS.better, 42, {}],
  ]);
  const rows = record.alternatives.map((each) => [
    each.wire,
    short(each.formerMm, 2),
    `${short(each.pitchMm, 3)} ${each.pitchKind}`,
    short(each.turns, 2),
    fixed(each.lengthMm, 1),
    fixed(each.wireM, 2),
    fixed(each.worstTapPercent, 2),
    fixed(each.lossFactor, 5),
    each.betterIn.join(', '),
  ]);
  const body = table(columns, rows, measure, { sizeMm: SMALL_MM, rowMm: 4.8 });
  return stack([heading(CHECKS.alternatives, widthMm, measure), body], 0);
}

export function warnings(record: CoilRecord, widthMm: number, measure: Measure): Block | null {
  if (record.warnings.length === 0) return null;
  const items = list(
    record.warnings.map((each) => ({ mark: '•', text: each.text })),
    widthMm,
    measure,
  );
  return stack([heading(CHECKS.warnings, widthMm, measure), ...items], 0.5);
}
