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
import type { CoilRecord, Tap } from '../src/record/schema.ts';
import { showRanges } from './show-ranges.ts';
import { settingsTable } from './show-settings.ts';
import { lay, wrap } from './table.ts';

export interface Written {
  readonly path: string;
  readonly bytes: Uint8Array;
  readonly note: string;
}

/** Plain text, no wider than `columns`, no colours. `folder` is where the files went. */
export function showPlan(
  record: CoilRecord,
  folder: string,
  files: readonly Written[],
  columns: number,
  plain = false,
): string {
  const chart = showRanges(record, columns - 2, plain);
  const sections = [
    [...wrap(record.job, columns), ...wrap(record.demand.text, columns)],
    chosen(record, columns),
    tapTable(record, columns),
    settingsTable(record, columns),
    chart.length === 0
      ? []
      : ['What they tune; on the right how far the next reaches into it', ...chart.map((row) => `  ${row}`)],
    others(record, columns),
    record.warnings.length === 0 ? [] : ['Warnings', ...record.warnings.flatMap(({ text }) => item(text, columns))],
    written(record, folder, files, columns),
  ];
  return `${sections
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n')}\n`;
}

function chosen(record: CoilRecord, columns: number): string[] {
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
  return ['The coil', ...facts.flatMap((fact) => item(fact, columns))];
}

/** Columns of the tap table, the most needed first; what does not fit the page is in plan.json and on the sheet. */
const TAP_COLUMNS: readonly (readonly [title: string, cell: (tap: Tap) => string])[] = [
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

function tapTable(record: CoilRecord, columns: number): string[] {
  const taps = record.windings[0]?.taps ?? [];
  const used = TAP_COLUMNS.filter(([title]) => title !== 'kHz' || taps.some((tap) => tap.range !== null));
  for (let count = used.length; count > 0; count -= 1) {
    const shown = used.slice(0, count);
    const rows = lay(
      shown.map(([title]) => title),
      taps.map((tap) => shown.map(([, cell]) => cell(tap))),
      shown.map(() => true),
    );
    if (count === 1 || rows.every((row) => row.length + 2 <= columns)) {
      const kind = taps[0]?.working.kind;
      const note = shown.some(([title]) => title === 'Q') && kind !== undefined ? ` (Q: ${kind})` : '';
      return [`Taps${note}`, ...rows.map((row) => `  ${row}`)];
    }
  }
  return [];
}

function others(record: CoilRecord, columns: number): string[] {
  const winding = record.windings[0];
  if (winding === undefined || record.alternatives.length === 0) return [];
  const letter = (index: number) => String.fromCharCode('a'.charCodeAt(0) + index);
  const row = (name: string, figures: readonly number[]) => [
    name,
    ...FIGURES.map(([, digits], i) => (figures[i] ?? 0).toFixed(digits)),
  ];
  const first = row('*', [
    record.former.outsideDiameterMm,
    winding.pitchMm,
    winding.turns,
    record.former.lengthMm,
    winding.wireLengthM,
    record.chosen.massG,
    record.chosen.worstTapPercent,
    1000 * record.chosen.lossFactor,
  ]);
  const rest = record.alternatives.map((one, index) =>
    row(letter(index), [
      one.formerMm,
      one.pitchMm,
      one.turns,
      one.lengthMm,
      one.wireM,
      one.massG,
      one.worstTapPercent,
      1000 * one.lossFactor,
    ]),
  );
  const rows = lay(
    ['', ...FIGURES.map(([title]) => title)],
    [first, ...rest],
    ['', ...FIGURES].map((_, index) => index > 0),
  );
  const legend = record.alternatives.flatMap((one, index) =>
    hung(
      `  ${letter(index)}  `,
      `${one.wire}, ${one.pitchKind}, ${one.tapMethod}: better in ${one.betterIn.join(', ')}`,
      columns,
    ),
  );
  return [
    ...wrap(`What else was possible (${record.chosen.feasible} of ${record.chosen.tried} tried fit)`, columns),
    ...rows.map((line) => `  ${line}`),
    ...hung('  *  ', `${winding.wire.name}, ${winding.pitchKind}: the one chosen, by ${record.chosen.prefer}`, columns),
    ...legend,
  ];
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

function written(record: CoilRecord, folder: string, files: readonly Written[], columns: number): string[] {
  const name = Math.max(...files.map(({ path }) => path.length)) + 2;
  const lines = files.flatMap(({ path, bytes, note }) =>
    hung(`  ${path.padEnd(name)}${sizeText(bytes.length).padStart(8)}  `, note, columns),
  );
  const assumed = Object.keys(record.assumed).length;
  const left = assumed === 1 ? '1 value was' : `${assumed} values were`;
  const remark = assumed === 0 ? [] : wrap(`${left} left to the program; plan.json lists them under assumed.`, columns);
  return [...wrap(`Written to ${folder}`, columns), ...lines, ...remark];
}

/** Decimal: 1 kB is 1000 bytes. */
function sizeText(bytes: number): string {
  return bytes < 1e6 ? `${(bytes / 1e3).toFixed(1)} kB` : `${(bytes / 1e6).toFixed(2)} MB`;
}

const item = (text: string, columns: number): string[] => hung('  - ', text, columns);

/** The text behind its mark, further lines under its first word; on a narrow page under the mark. */
function hung(mark: string, text: string, columns: number): string[] {
  const indent = mark.length > columns / 2 ? 4 : mark.length;
  if (indent < mark.length)
    return [mark.trimEnd(), ...wrap(text, columns - indent).map((line) => ' '.repeat(indent) + line)];
  return wrap(text, columns - indent).map((line, index) => (index === 0 ? mark : ' '.repeat(indent)) + line);
}
