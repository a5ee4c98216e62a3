/** The table of a traveller: what is wound tap by tap, with the limits of what is measured there and blanks to write in. */
import { TABLE, TRAVELLER } from '../../templates/wording/lot-traveller.ts';
import type { Question } from '../bench/api.ts';
import { questionsOf } from '../bench/questions.ts';
import type { Measure } from '../drawing/boxes.ts';
import { SMALL_MM } from '../drawing/shapes.ts';
import { ribName } from '../record/rib-name.ts';
import type { CoilRecord, Tap } from '../record/schema.ts';
import { type Block, heading, paragraph, stack } from './block.ts';
import { kiloHertz, ohms } from './check-blocks.ts';
import { BLANK, CENTRE, columnsOf, type Parts, RIGHT, TICK } from './check-blocks-columns.ts';
import { table } from './table.ts';
import { figures, short } from './text.ts';
import { lengthCells, lengthHeads, unitsOf, wireCell, wireUnit } from './units.ts';

const between = ({ low, high }: Question, told: (value: number) => string): string =>
  low === null || high === null ? TABLE.none : TABLE.between(told(low), told(high));

/** What tells an inductance: the meter where the record trusts it, else the resonance with the largest known capacitor. */
export function inductanceQuestion(questions: readonly Question[], tap: number): Question | null {
  const of = questions.filter((question) => question.tap === tap);
  const meter = of.find(({ quantity, doubt, low }) => quantity === 'inductance' && doubt === null && low !== null);
  return meter ?? of.filter(({ quantity }) => quantity === 'resonance').at(-1) ?? null;
}

/** Rows of the table: unit taps first, as they are wound, then the taps. */
export function travellerRows(record: CoilRecord): string[][] {
  const { taps, unitTaps = [] } = record.windings[0]!;
  const units = unitsOf(record);
  const questions = questionsOf(record);
  const steps = new Map(record.steps.map((step) => [step.unit === undefined ? `${step.tap}` : `u${step.unit}`, step]));
  const made = (key: string, tap: Pick<Tap, 'turn' | 'angleDeg' | 'wireFromStartM'>) => [
    '',
    `${steps.get(key)?.step ?? ''}`,
    key,
    short(tap.turn, units === 'both' ? 2 : 3),
    ribName(record.former, tap.angleDeg) ?? short(tap.angleDeg, 1),
    wireCell(tap.wireFromStartM, units === 'both' ? 'metric' : units),
  ];
  const nothing = [...lengthHeads(units).map(() => TABLE.none), '', TABLE.none, '', TABLE.none, '', ''];
  return [
    ...unitTaps.map((tap) => [...made(`u${tap.unit}`, tap), ...nothing]),
    ...taps.map((tap) => {
      const of = (quantity: Question['quantity']) =>
        questions.find((question) => question.tap === tap.tap && question.quantity === quantity);
      const length = of('length');
      const resistance = of('resistance');
      const told = inductanceQuestion(questions, tap.tap);
      const lengths =
        length === undefined || length.low === null || length.high === null
          ? lengthHeads(units).map(() => TABLE.none)
          : lengthCells(length.low, units).map((low, i) => TABLE.between(low, lengthCells(length.high!, units)[i]!));
      return [
        ...made(`${tap.tap}`, tap),
        ...lengths,
        '',
        resistance === undefined ? TABLE.none : between(resistance, ohms),
        '',
        told === null ? TABLE.none : between(told, told.unit === 'kHz' ? kiloHertz : figures),
        told?.unit ?? '',
        '',
      ];
    }),
  ];
}

/** With what the last column is measured, and how. */
function words(record: CoilRecord): string {
  const questions = questionsOf(record);
  const told = record.windings[0]!.taps.flatMap(({ tap }) => inductanceQuestion(questions, tap) ?? []);
  const meter = told.find(({ quantity }) => quantity === 'inductance');
  const resonance = told.find(({ quantity }) => quantity === 'resonance');
  return [
    ...(meter ? [TABLE.µH(short(record.shop.meterKhz, 3))] : []),
    ...(resonance ? [TABLE.resonance(short(resonance.capacitancePf!, 3))] : []),
    TABLE.how,
  ].join(' ');
}

/** The rows `from` up to `to` of `rows`, with a sentence under them where they go on elsewhere. */
export function travellerTable(
  record: CoilRecord,
  rows: readonly (readonly string[])[],
  [from, to]: readonly [from: number, to: number],
  { rowMm, sizeMm }: { readonly rowMm: number; readonly sizeMm: number },
  widthMm: number,
  measure: Measure,
): Block {
  const units = unitsOf(record);
  const parts: Parts = [
    ['', 6, TICK],
    [TABLE.step, 8, RIGHT],
    [TABLE.tap, 7, { ...CENTRE, bold: true }],
    [TABLE.turn, 14, { ...RIGHT, bold: true }],
    [record.former.ribs === null ? TABLE.angle : TABLE.rib, 11, { ...RIGHT, bold: true }],
    [TABLE.wire(wireUnit(units === 'both' ? 'metric' : units)), 13, RIGHT],
    ...lengthHeads(units).map((unit) => [TABLE.length(unit), 24, CENTRE] as const),
    [TABLE.read, 18, BLANK],
    [TABLE.ohms, 24, CENTRE],
    [TABLE.read, 18, BLANK],
    [TABLE.meter, 24, CENTRE],
    ['', 8, CENTRE],
    [TABLE.read, 18, BLANK],
  ];
  const body = table(columnsOf(widthMm, parts), rows.slice(from, to), measure, { rowMm, sizeMm });
  const goesOn = to < rows.length ? rows.slice(to) : null;
  return stack(
    [
      stack([heading(from === 0 ? TABLE.heading : TABLE.more, widthMm, measure), body], 0),
      paragraph(words(record), widthMm, measure, { sizeMm: SMALL_MM }),
      ...(goesOn ? [paragraph(goesOnWords(goesOn), widthMm, measure, { bold: true })] : []),
    ],
    0.8,
  );
}

const TAP = 2;
const goesOnWords = (rest: readonly (readonly string[])[]): string =>
  TRAVELLER.goesOn(rest[0]![TAP]!, rest.at(-1)![TAP]!);
