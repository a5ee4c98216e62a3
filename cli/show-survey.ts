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
import { fileList, type Written } from './file-list.ts';
import { type Figure, heading, list, type Page, pageText, paragraph, table } from './page.ts';
import { showElevation } from './show-elevation.ts';
import { showRanges } from './show-ranges.ts';

/** What was written, when something was. */
export interface SurveyOutput {
  readonly folder: string;
  readonly files: readonly Written[];
}

/** `written`: what went to a folder; null when none was named. */
export function showSurvey(record: SurveyRecord, page: Page, written: SurveyOutput | null): string {
  return pageText([
    [...heading(page, record.job), ...paragraph(page, record.demand.text)],
    coil(record, page),
    showElevation(record, page),
    positions(record, page),
    ranges(record, page),
    showRanges(record, page),
    ...kinds(record, page),
    list(
      page,
      'Warnings',
      record.warnings.map(({ text }) => text),
      'trouble',
    ),
    list(page, 'Taken where the file is silent', assumed(record)),
    written === null ? [] : fileList(page, written.folder, written.files),
  ]);
}

function coil(record: SurveyRecord, page: Page): string[] {
  const winding = record.windings[0]!;
  const { former, frame, sections } = record;
  const pitch =
    sections.length === 1
      ? `pitch ${lengthText(winding.pitchMm, 4)}`
      : `in ${sections.length} sections, mean pitch ${lengthText(winding.pitchMm, 4)}`;
  return list(page, 'The coil', [
    `${winding.wire.name}, ${tidy(winding.turns)} turns, ${pitch}, ${lengthText(winding.windingLengthMm)} over the wires; ${frame.hand} hand, ${frame.earthedEnd} earthed`,
    `former ${lengthText(former.outsideDiameterMm, 3)}${former.material === null ? '' : ` of ${former.material}`}, mean diameter of the wire ${lengthText(winding.meanDiameterMm, 3)}`,
    `whole coil: ${inductanceText(winding.inductanceUh)}, ${resistanceText(winding.resistanceDcOhm)} at DC, ${capacitanceText(winding.selfCapacitancePf)} of its own, ${wireText(winding.wireLengthM)} of wire`,
  ]);
}

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

function positions(record: SurveyRecord, page: Page): string[] {
  return table(
    page,
    'Positions (µH at low frequency; Q, R and µH there at the frequency stated)',
    POSITION,
    record.windings[0]!.taps,
  );
}

function ranges(record: SurveyRecord, page: Page): string[] {
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
  return table(page, 'Ranges (below 0 % to the next: a gap)', figures, taps);
}

type KindFigures = SurveyRecord['switchKinds'][number]['positions'][number];

/** A table of the kinds, or on a narrow page a line for each. */
function kindTable(record: SurveyRecord, title: string, cell: (at: KindFigures) => string, page: Page): string[] {
  const { switchKinds } = record;
  const heads = switchKinds.map(({ kind, inUse }) => (inUse ? `${kind}*` : kind));
  const figures: readonly Figure<number>[] = [
    ['tap', (i) => `${switchKinds[0]!.positions[i]!.tap}`],
    ...heads.map((head, kind) => [head, (i: number) => cell(switchKinds[kind]!.positions[i]!)] as const),
  ];
  const indices = (switchKinds[0]?.positions ?? []).map((_, i) => i);
  const widths = figures.map(([head, of]) => Math.max(head.length, ...indices.map((i) => of(i).length)));
  // All kinds or none: what is compared must stand side by side.
  if (page.plain === true || widths.reduce((sum, width) => sum + width + 2, 0) <= page.columns)
    return table(page, title, figures, indices);
  return list(
    page,
    title,
    switchKinds.map(({ positions: of }, i) => `${heads[i]}: ${of.map(cell).join(', ')}`),
  );
}

function kinds(record: SurveyRecord, page: Page): string[][] {
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
