/** What to do when the coil or a tap reads high or low: blocks of the page to check by. */
import { ADVICE } from '../../templates/wording/winding-sheet.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import type { AdviceTap, Correction } from '../record/advice-schema.ts';
import type { CoilRecord } from '../record/schema.ts';
import { type Block, beside, heading, paragraph, stack } from './block.ts';
import { CENTRE, columnsOf, type Parts, RIGHT } from './check-blocks-columns.ts';
import { table } from './table.ts';
import { figures, fixed, signed } from './text.ts';
import { lengthText, unitsOf } from './units.ts';

/** A row of these tables, where room is not short. */
const ROW_MM = 4.6;

/** Taps with a column of their own; of more the first stands for those before the whole coil. */
const MOST_COLUMNS = 3;

/** From which reading to which a trim is for. */
function when({ fromUh, toUh }: Correction): string {
  if (fromUh === null) return toUh === null ? ADVICE.never : ADVICE.under(figures(toUh));
  return toUh === null ? ADVICE.over(figures(fromUh)) : ADVICE.between(figures(fromUh), figures(toUh));
}

/** A change in percent; none is told plainly. */
const change = (percent: number) => (percent === 0 ? '0' : signed(percent, 2));

/** The whole coil: what can be done, from which reading on, and what that does to the taps. */
export function corrections(record: CoilRecord, widthMm: number, measure: Measure, rowMm = ROW_MM): Block {
  const { taps } = record.windings[0]!;
  const last = taps.length - 1;
  const shown = taps.length <= MOST_COLUMNS ? taps.slice(0, -1).map((_, i) => i) : [0];
  const { lowUh, highUh, doubt } = record.measuring.meter[last]!;
  const trusted = doubt === null && lowUh !== null && highUh !== null;
  const columns = columnsOf(widthMm, [
    [ADVICE.doing, 42, {}],
    ...(trusted ? [[ADVICE.when, 22, CENTRE] as const] : []),
    ...shown.map((i) => [ADVICE.tapPercent(i + 1), 11, RIGHT] as const),
    [ADVICE.whole, 12, { ...RIGHT, bold: true }],
  ]);
  const rows = record.corrections.map((each) => [
    each.doing,
    ...(trusted ? [when(each)] : []),
    ...shown.map((i) => change(each.tapsPercent[i]!)),
    change(each.tapsPercent[last]!),
  ]);
  const how = trusted ? ADVICE.how(figures(lowUh), figures(highUh)) : ADVICE.howNoMeter;
  const words = paragraph(how, widthMm, measure, { sizeMm: SMALL_MM });
  const body = table(columns, rows, measure, { sizeMm: SMALL_MM, rowMm });
  return { ...stack([heading(ADVICE.heading, widthMm, measure), stack([body, words], 0.8)], 0), widthMm };
}

/** Taps in one table of their own with the readings to count again by; more stand in two side by side, without those. */
const ONE_TABLE = 8;
/** Taps of one block at most. */
const MOST_TAPS = 60;

/** By how much a section is longer in the table: a millimetre, or a twentieth of an inch. */
const stretchOf = (record: CoilRecord) => (unitsOf(record) === 'inch' ? 1.27 : 1);

/** What a turn does, in percent: to a tenth where it is a few. */
const turn = (percent: number) => signed(percent, Math.abs(percent) < 10 ? 1 : 0);

/** Columns that tell what to do about a tap, the readings to count again by left out. */
export function sectionParts(record: CoilRecord): Parts {
  const stretch = lengthText(stretchOf(record), unitsOf(record) === 'inch' ? 'inch' : 'metric', { digits: 0 });
  return [
    [ADVICE.aTurn, 18, CENTRE],
    [ADVICE.longer(stretch), 14, RIGHT],
    [ADVICE.degrees, 9, RIGHT],
  ];
}

/** The cells of those columns. */
export function sectionCells(record: CoilRecord, tap: number): string[] {
  const each = record.advice[tap - 1]!;
  return [
    `${turn(each.fewPercent)}/${turn(each.manyPercent)}`,
    signed(each.millimetrePercent * stretchOf(record), 2),
    fixed(each.degreesPerPercent, 0),
  ];
}

function sectionTable(
  record: CoilRecord,
  list: readonly AdviceTap[],
  widthMm: number,
  rowMm: number,
  measure: Measure,
): Block {
  const full = record.advice.length <= ONE_TABLE;
  const columns = columnsOf(widthMm, [
    [ADVICE.tap, 7, { ...CENTRE, bold: true }],
    ...(full ? [[ADVICE.countAgain, 26, CENTRE] as const] : []),
    ...sectionParts(record),
  ]);
  const rows = list.map(({ tap, fewUh, manyUh }) => [
    `${tap}`,
    ...(full
      ? [fewUh === null || manyUh === null ? ADVICE.never : ADVICE.between(figures(fewUh), figures(manyUh))]
      : []),
    ...sectionCells(record, tap),
  ]);
  return table(columns, rows, measure, { sizeMm: SMALL_MM, rowMm });
}

/** Section by section, in blocks of so many taps as go on a page; of one tap nothing, for it is the whole coil. */
export function sections(record: CoilRecord, widthMm: number, measure: Measure, rowMm = ROW_MM): Block[] {
  const { advice } = record;
  if (advice.length < 2) return [];
  const blocks: Block[] = [];
  for (let from = 0; from < advice.length; from += MOST_TAPS) {
    const some = advice.slice(from, from + MOST_TAPS);
    const half = Math.ceil(some.length / 2);
    const body =
      advice.length <= ONE_TABLE
        ? sectionTable(record, some, widthMm, rowMm, measure)
        : beside(
            [some.slice(0, half), some.slice(half)].map((part) =>
              sectionTable(record, part, (widthMm - 2) / 2, rowMm, measure),
            ),
            2,
          );
    const head = heading(from === 0 ? ADVICE.sections : ADVICE.sectionsMore, widthMm, measure);
    const last = from + MOST_TAPS >= advice.length;
    const words = last ? [paragraph(sectionWords(record), widthMm, measure, { sizeMm: SMALL_MM })] : [];
    blocks.push({ ...stack([head, stack([body, ...words], 0.8)], 0), widthMm });
  }
  return blocks;
}

/** How a tap that is out is found and put right, for this winding and its taps. */
export function sectionWords(record: CoilRecord): string {
  const { pitchKind } = record.windings[0]!;
  return [ADVICE.sectionsHow, ADVICE.tight[pitchKind], ADVICE.move[record.tapMethod.name]].join(' ');
}
