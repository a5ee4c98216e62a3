/** What `plan` says when it is done: the coil, why it, its taps, what else was possible, what was written. */
import {
  capacitanceText,
  inductanceText,
  lengthText,
  resistanceText,
  significantText,
  tidy,
  wireText,
} from '../src/quantity/format.ts';
import type { OutputFile } from '../src/record/listing.ts';
import type { CoilRecord, Tap } from '../src/record/schema.ts';
import { fileList } from './file-list.ts';
import { type Figure, heading, hung, list, type Page, pageText, paragraph, table } from './page.ts';
import { showAround } from './show-around.ts';
import { showElevation } from './show-elevation.ts';
import { showRanges } from './show-ranges.ts';
import { settingsTable } from './show-settings.ts';

type Made = Pick<OutputFile, 'path' | 'bytes' | 'note'>;

/** `folder` is where the files went. */
export function showPlan(record: CoilRecord, folder: string, files: readonly Made[], page: Page): string {
  return pageText([
    [...heading(page, record.job), ...paragraph(page, record.demand.text)],
    chosen(record, page),
    showElevation(record, page),
    tapTable(record, page),
    settingsTable(record, page),
    showRanges(record, page),
    showAround(record, page),
    others(record, page),
    list(
      page,
      'Warnings',
      record.warnings.map(({ text }) => text),
      'trouble',
    ),
    written(record, folder, files, page),
  ]);
}

function chosen(record: CoilRecord, page: Page): string[] {
  const winding = record.windings[0];
  if (winding === undefined) return [];
  const { former, tapMethod } = record;
  const pitch = { close: 'close wound', spacer: `spaced by ${winding.spacerName}`, groove: 'in a groove' }[
    winding.pitchKind
  ];
  const facts = [
    `${winding.wire.name}, ${tidy(Number(winding.turns.toFixed(3)))} turns ${pitch}, pitch ${lengthText(winding.pitchMm, 3)}, ${record.frame.hand} hand, ${record.frame.earthedEnd} earthed`,
    `former: ${former.kind}, ${former.material}, ${lengthText(former.outsideDiameterMm, 3)} outside, ${lengthText(former.lengthMm)} long; winding ${lengthText(winding.windingLengthMm)}`,
    `whole coil: ${inductanceText(winding.inductanceUh)}, ${resistanceText(winding.resistanceDcOhm)} at DC, ${capacitanceText(winding.selfCapacitancePf)} of its own`,
    `wire: ${wireText(winding.wireLengthM)} and ${wireText(winding.leadsM)} for the ends, ${tidy(winding.wireMassG, 3)} g`,
    `taps: ${tapMethod.name}, ${tapMethod.layout}; ${tapMethod.why}`,
    `why this one: ${record.chosen.why}`,
  ];
  return list(page, 'The coil', facts);
}

/** Columns of the tap table, the most needed first; what does not fit the page is in plan.json and on the sheet. */
const TAP_COLUMNS: readonly Figure<Tap>[] = [
  ['tap', (tap) => String(tap.tap)],
  ['turn', (tap) => tap.turn.toFixed(3)],
  ['angle', (tap) => `${tap.angleDeg.toFixed(1)}°`],
  ['at mm', (tap) => tap.positionMm.toFixed(2)],
  ['µH', (tap) => significantText(tap.inductanceUh, 4)],
  ['off %', (tap) => signed(tap.deviationPercent)],
  ['wire m', (tap) => tap.wireFromStartM.toFixed(2)],
  ['kHz', (tap) => (tap.range === null ? '' : `${tap.range.lowKhz.toFixed(0)}..${tap.range.highKhz.toFixed(0)}`)],
  ['Q', (tap) => tap.working.q.toFixed(0)],
  ['at kHz', (tap) => tap.working.frequencyKhz.toFixed(0)],
];

function signed(percent: number): string {
  const text = percent.toFixed(2);
  return percent > 0 && Number(text) !== 0 ? `+${text}` : text;
}

function tapTable(record: CoilRecord, page: Page): string[] {
  const taps = record.windings[0]?.taps ?? [];
  const used = TAP_COLUMNS.filter(([title]) => title !== 'kHz' || taps.some((tap) => tap.range !== null));
  const kind = taps[0]?.working.kind;
  const title = (shown: readonly string[]) => `Taps${shown.includes('Q') && kind !== undefined ? ` (Q: ${kind})` : ''}`;
  return table(page, title, used, taps);
}

/** One of the coils that were possible, as a row. */
interface Possible {
  readonly name: string;
  readonly figures: readonly number[];
  /** How it is wound, and what speaks for it. */
  readonly about: string;
}

function possible(record: CoilRecord): readonly Possible[] {
  const winding = record.windings[0]!;
  const { chosen, former } = record;
  const own: Possible = {
    name: '*',
    figures: [
      former.outsideDiameterMm,
      winding.pitchMm,
      winding.turns,
      former.lengthMm,
      winding.wireLengthM,
      chosen.massG,
      chosen.worstTapPercent,
      1000 * chosen.lossFactor,
    ],
    about: `${winding.wire.name}, ${winding.pitchKind}: the one chosen, by ${chosen.prefer}`,
  };
  const rest = record.alternatives.map((one, index): Possible => {
    const { formerMm, pitchMm, turns, lengthMm, wireM, massG, worstTapPercent, lossFactor } = one;
    return {
      name: String.fromCharCode('a'.charCodeAt(0) + index),
      figures: [formerMm, pitchMm, turns, lengthMm, wireM, massG, worstTapPercent, 1000 * lossFactor],
      about: `${one.wire}, ${one.pitchKind}, ${one.tapMethod}: better in ${one.betterIn.join(', ')}`,
    };
  });
  return [own, ...rest];
}

function others(record: CoilRecord, page: Page): string[] {
  if (record.windings[0] === undefined || record.alternatives.length === 0) return [];
  const rows = possible(record);
  const figures: readonly Figure<Possible>[] = [
    ['', ({ name }) => (page.plain === true ? (name === '*' ? 'the one chosen' : name) : name)],
    ...FIGURES.map(([title, digits], i) => [title, (row: Possible) => (row.figures[i] ?? 0).toFixed(digits)] as const),
    ...(page.plain === true ? [['wound', ({ about }: Possible) => about] as const] : []),
  ];
  const title = `What else was possible (${record.chosen.feasible} of ${record.chosen.tried} tried fit)`;
  const legend = page.plain === true ? [] : rows.flatMap(({ name, about }) => hung(page, `  ${name}  `, about));
  return [...table(page, title, figures, rows), ...legend];
}

const FIGURES: readonly (readonly [title: string, digits: number])[] = [
  ['on mm', 2],
  ['pitch mm', 3],
  ['turns', 2],
  ['long mm', 1],
  ['wire m', 1],
  ['g', 1],
  ['tap off %', 2],
  ['1000/Q', 2],
];

function written(record: CoilRecord, folder: string, files: readonly Made[], page: Page): string[] {
  const assumed = Object.keys(record.assumed).length;
  const left = assumed === 1 ? '1 value was' : `${assumed} values were`;
  const remark = `${left} left to the program; plan.json lists them under assumed.`;
  const sized = files.map(({ path, bytes, note }) => ({ path, size: bytes.length, note }));
  return [...fileList(page, folder, sized), ...(assumed === 0 ? [] : paragraph(page, remark))];
}
