/** What `survey` says: the coil, the figures of its positions, what they tune, the switch kinds compared, warnings. */
import {
  capacitanceText,
  inductanceText,
  lengthText,
  resistanceText,
  significantText,
  tidy,
  wireText,
} from '../src/quantity/format.ts';
import type { Tap } from '../src/record/schema.ts';
import type { SurveyRecord } from '../src/record/survey-schema.ts';
import { showRanges } from './show-ranges.ts';
import { lay, wrap } from './table.ts';

export interface SurveyPage {
  readonly columns: number;
  /** Signs of ASCII alone. */
  readonly plain: boolean;
}

/** What was written, when something was. */
export interface SurveyOutput {
  readonly folder: string;
  readonly files: readonly { readonly path: string; readonly note: string }[];
}

/** Plain text, no wider than the page, no colours. */
export function showSurvey(record: SurveyRecord, page: SurveyPage, written: SurveyOutput | null): string {
  const { columns } = page;
  const chart = showRanges(record, columns - 2, page.plain);
  const sections = [
    [...lines(record.job, page), ...lines(record.demand.text, page)],
    coil(record, page),
    positions(record, page),
    ranges(record, page),
    indented(chart, 'What they tune; on the right how far the next reaches into it', page),
    ...kinds(record, page),
    list(
      'Warnings',
      record.warnings.map(({ text }) => text),
      page,
    ),
    list('Taken where the file is silent', assumed(record), page),
    written === null
      ? []
      : [
          ...lines(`Written to ${written.folder}`, page),
          ...written.files.flatMap(({ path, note }) => lines(`  ${path}  ${note}`, page)),
        ],
  ];
  return `${sections
    .filter((section) => section.length > 0)
    .map((section) => section.join('\n'))
    .join('\n\n')}\n`;
}

/** The text as this page shows it. */
const shown = (text: string, page: SurveyPage): string => (page.plain ? inAscii(text) : text);
const lines = (text: string, page: SurveyPage): readonly string[] => wrap(shown(text, page), page.columns);

/** The same in signs of ASCII. */
export function inAscii(text: string): string {
  const written: Readonly<Record<string, string>> = {
    µ: 'u',
    Ω: 'ohm',
    '±': '+-',
    '°': ' deg ',
    '’': "'",
    '–': '-',
    '−': '-',
    '²': '2',
    '³': '3',
  };
  return text.replace(/ ?° ?(?=C)/g, ' deg ').replace(/[^\n -~]/gu, (sign) => written[sign] ?? '?');
}

function coil(record: SurveyRecord, page: SurveyPage): string[] {
  const winding = record.windings[0]!;
  const { former, frame, sections } = record;
  const pitch =
    sections.length === 1
      ? `pitch ${lengthText(winding.pitchMm, 4)}`
      : `in ${sections.length} sections, mean pitch ${lengthText(winding.pitchMm, 4)}`;
  return list(
    'The coil',
    [
      `${winding.wire.name}, ${tidy(winding.turns)} turns, ${pitch}, ${lengthText(winding.windingLengthMm)} over the wires; ${frame.hand} hand, ${frame.earthedEnd} earthed`,
      `former ${lengthText(former.outsideDiameterMm, 3)}${former.material === null ? '' : ` of ${former.material}`}, mean diameter of the wire ${lengthText(winding.meanDiameterMm, 3)}`,
      `whole coil: ${inductanceText(winding.inductanceUh)}, ${resistanceText(winding.resistanceDcOhm)} at DC, ${capacitanceText(winding.selfCapacitancePf)} of its own, ${wireText(winding.wireLengthM)} of wire`,
    ],
    page,
  );
}

type Figure<T> = readonly [title: string, cell: (one: T) => string];

const uh = (value: number) => significantText(value, 4);

const POSITION: readonly Figure<Tap>[] = [
  ['tap', (tap) => String(tap.tap)],
  ['turn', (tap) => tidy(Number(tap.turn.toFixed(3)))],
  ['µH', (tap) => uh(tap.inductanceUh)],
  ['95 % limits', (tap) => `${uh(tap.inductanceLowUh)}..${uh(tap.inductanceHighUh)}`],
  ['at kHz', (tap) => tidy(tap.working.frequencyKhz, 4)],
  ['Q', (tap) => tap.working.q.toFixed(0)],
  ['R ohm', (tap) => significantText(tap.working.resistanceOhm, 3)],
  ['µH there', (tap) => uh(tap.working.inductanceUh)],
  ['DC ohm', (tap) => significantText(tap.resistanceDcOhm, 3)],
  ['widest by', (tap) => tap.dominant],
];

function positions(record: SurveyRecord, page: SurveyPage): string[] {
  return narrowed(
    'Positions (µH at low frequency; Q, R and µH there at the frequency stated)',
    POSITION,
    record.windings[0]!.taps,
    page,
  );
}

function ranges(record: SurveyRecord, page: SurveyPage): string[] {
  const { taps } = record.windings[0]!;
  if (taps.every(({ range }) => range === null)) return [];
  const half = (value: number) => `${Number(value.toPrecision(2))}`;
  const of = (tap: Tap, cell: (range: NonNullable<Tap['range']>) => string) =>
    tap.range === null ? '' : cell(tap.range);
  const seconds = (range: NonNullable<Tap['range']>) =>
    [range.secondLowKhz, range.secondHighKhz].filter((kHz) => kHz !== null);
  const overlap = (tap: Tap) =>
    record.coverage?.neighbours.find(({ from }) => from === tap.tap)?.overlapPercent ?? null;
  const figures: readonly Figure<Tap>[] = [
    ['tap', (tap) => String(tap.tap)],
    ['from kHz', (tap) => of(tap, (range) => tidy(range.lowKhz, 4))],
    ['±', (tap) => of(tap, (range) => half(range.lowUncertaintyKhz))],
    ['to kHz', (tap) => of(tap, (range) => tidy(range.highKhz, 4))],
    ['±', (tap) => of(tap, (range) => half(range.highUncertaintyKhz))],
    [
      'to next %',
      (tap) => {
        const percent = overlap(tap);
        return percent === null ? '' : percent.toFixed(1);
      },
    ],
    [
      'second kHz',
      (tap) => of(tap, (range) => (seconds(range).length === 0 ? '' : tidy(Math.min(...seconds(range)), 4))),
    ],
    ['Q low', (tap) => tap.ends[0]?.q.toFixed(0) ?? ''],
    ['Q high', (tap) => tap.ends[2]?.q.toFixed(0) ?? ''],
  ];
  return narrowed('Ranges (below 0 % to the next: a gap)', figures, taps, page);
}

/** As many of the columns as the page holds, the first ones first. */
function narrowed<T>(title: string, figures: readonly Figure<T>[], rows: readonly T[], page: SurveyPage): string[] {
  for (let count = figures.length; count > 0; count--) {
    const used = figures.slice(0, count);
    const table = lay(
      used.map(([head]) => shown(head, page)),
      rows.map((row) => used.map(([, cell]) => cell(row))),
      used.map(() => true),
    );
    if (count === 1 || table.every((line) => line.length + 2 <= page.columns)) return indented(table, title, page);
  }
  return [];
}

type KindFigures = SurveyRecord['switchKinds'][number]['positions'][number];

/** A table of the kinds, or on a narrow page a line for each. */
function kindTable(record: SurveyRecord, title: string, cell: (at: KindFigures) => string, page: SurveyPage): string[] {
  const { switchKinds } = record;
  const heads = switchKinds.map(({ kind, inUse }) => (inUse ? `${kind}*` : kind));
  const table = lay(
    ['tap', ...heads],
    (switchKinds[0]?.positions ?? []).map(({ tap }, i) => [
      `${tap}`,
      ...switchKinds.map(({ positions: of }) => cell(of[i]!)),
    ]),
    ['tap', ...heads].map(() => true),
  );
  if (table.every((line) => line.length + 2 <= page.columns)) return indented(table, title, page);
  const rows = switchKinds.map(({ positions: of }, i) => `${heads[i]}: ${of.map(cell).join(', ')}`);
  return list(title, rows, page);
}

function kinds(record: SurveyRecord, page: SurveyPage): string[][] {
  if (record.switchKinds.length === 0) return [];
  const work = (at: KindFigures) => `${uh(at.inductanceUh)} / ${at.q.toFixed(0)}`;
  const tuned = (at: KindFigures) => `${at.lowKhz?.toFixed(0) ?? ''}..${at.highKhz?.toFixed(0) ?? ''}`;
  return [
    kindTable(record, 'Switch kinds, µH / Q at work (* in use)', work, page),
    record.coverage === null ? [] : kindTable(record, 'Switch kinds, kHz tuned (* in use)', tuned, page),
  ];
}

function assumed(record: SurveyRecord): string[] {
  return Object.entries(record.assumed).map(([key, value]) => `${key}: ${String(value)}`);
}

/** Rows of a table or a picture under their title; what is too wide for any page is cut. */
const indented = (rows: readonly string[], title: string, page: SurveyPage): string[] =>
  rows.length === 0 ? [] : [...lines(title, page), ...rows.map((row) => `  ${row}`.slice(0, page.columns))];

function list(title: string, items: readonly string[], page: SurveyPage): string[] {
  if (items.length === 0) return [];
  const rows = items.flatMap((item) =>
    wrap(shown(item, page), page.columns - 4).map((line, index) => (index === 0 ? `  - ${line}` : `    ${line}`)),
  );
  return [...lines(title, page), ...rows];
}
