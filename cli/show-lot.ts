/** What `lot` says when it is done: kinds and coils, wire from the reels, what to buy, beds and runs, what was written. */
import type { LotRecord } from '../src/lot/schema.ts';
import type { MadeLot } from '../src/lot.ts';
import { tidy } from '../src/quantity/format.ts';
import { lay, wrap } from './table.ts';

/** Plain text, no wider than `columns` where words allow, no colours. `folder` is where the files went. */
export function showLot({ record, files }: MadeLot, folder: string, columns: number): string {
  const sections = [
    head(record, columns),
    kinds(record, columns),
    wire(record, columns),
    toBuy(record, columns),
    printing(record, columns),
    record.warnings.length === 0 ? [] : ['Warnings', ...record.warnings.flatMap(({ text }) => item(text, columns))],
    written(files, folder, columns),
  ];
  return `${sections
    .filter((lines) => lines.length > 0)
    .map((lines) => lines.join('\n'))
    .join('\n\n')}\n`;
}

const counted = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;
const metres = (m: number): string => m.toFixed(2);

function head({ lot, coils, kinds }: LotRecord, columns: number): string[] {
  const first = coils[0]!.serial;
  const last = coils.at(-1)!.serial;
  const serials = coils.length === 1 ? first : `${first} to ${last}`;
  const what = `${counted(coils.length, 'coil')} of ${counted(kinds.length, 'kind')}, serials ${serials}`;
  return [...wrap(lot, columns), ...wrap(what, columns)];
}

/** The rows under a heading; columns go from the right until the page is wide enough. */
function fitted(
  heading: string,
  titles: readonly (readonly [title: string, right: boolean])[],
  rows: readonly (readonly string[])[],
  columns: number,
): string[] {
  for (let count = titles.length; count > 0; count -= 1) {
    const shown = titles.slice(0, count);
    const lines = lay(
      shown.map(([title]) => title),
      rows.map((row) => row.slice(0, count)),
      shown.map(([, right]) => right),
    );
    if (count === 1 || lines.every((line) => line.length + 2 <= columns))
      return [heading, ...lines.map((line) => `  ${line}`)];
  }
  return [];
}

function kinds({ kinds }: LotRecord, columns: number): string[] {
  const titles = [
    ['', false],
    ['coils', true],
    ['job', false],
    ['wire', false],
    ['turns', true],
    ['taps', true],
    ['m each', true],
    ['plastic g', true],
  ] as const;
  const rows = kinds.map(({ kind, quantity, job, wire, turns, taps, cutM, plasticG }) => [
    kind,
    `${quantity}`,
    short(job, 26),
    wire,
    turns.toFixed(2),
    `${taps}`,
    metres(cutM),
    tidy(plasticG, 3),
  ]);
  return fitted('Kinds', titles, rows, columns);
}

function wire({ wires, spools }: LotRecord, columns: number): string[] {
  if (spools.length === 0) return [];
  const titles = [
    ['reel', false],
    ['wire', false],
    ['coils', true],
    ['left m', true],
    ['used m', true],
    ['rest m', true],
  ] as const;
  const cut = spools.filter(({ serials }) => serials.length > 0);
  const untouched = spools.length - cut.length;
  const rows = cut.map(({ spool, wire, leftM, usedM, restM, serials }) => [
    short(spool, 24),
    wire,
    `${serials.length}`,
    metres(leftM),
    metres(usedM),
    metres(restM),
  ]);
  const notes = wires.flatMap(({ wire, scrapM, scrapBoundM, unserved, exact }) => {
    const scrap = `${wire}: ${metres(scrapM)} m too short for any coil is left`;
    const proof = exact ? 'no plan is better' : `no plan leaves less than ${metres(scrapBoundM)} m`;
    return unserved > 0 && scrapM === 0 ? [] : item(`${scrap}; ${proof}`, columns);
  });
  return [
    ...(cut.length === 0 ? ['Wire from the reels'] : fitted('Wire from the reels', titles, rows, columns)),
    ...notes,
    ...(untouched === 0 ? [] : item(`not cut from: ${counted(untouched, 'reel')}`, columns)),
  ];
}

function toBuy({ toBuy }: LotRecord, columns: number): string[] {
  if (toBuy.length === 0) return [];
  const lines = toBuy.flatMap(({ wire, totalM, totalG, coils }) => {
    const longest = coils.reduce((most, { cutM }) => Math.max(most, cutM), 0);
    const pieces = `${counted(coils.length, 'piece')} of up to ${metres(longest)} m`;
    return item(`${wire}: ${metres(totalM)} m, ${tidy(totalG, 3)} g, in ${pieces}`, columns);
  });
  return ['To buy', ...lines];
}

function printing({ beds, runs, materials }: LotRecord, columns: number): string[] {
  if (beds.length === 0) return [];
  const prints = beds.reduce((sum, { count }) => sum + count, 0);
  const mass = materials.map(({ material, solidG }) => `${material} ${tidy(solidG, 4)} g`).join(', ');
  const printers = runs.map(({ printer, runs: own }) => `${printer}: ${counted(own.length, 'run')}`).join('; ');
  return [
    'Printing',
    ...item(`${counted(beds.length, 'bed')} to print ${counted(prints, 'time')} in all`, columns),
    ...item(printers, columns),
    ...item(`of solid plastic ${mass}`, columns),
  ];
}

function written(files: MadeLot['files'], folder: string, columns: number): string[] {
  const top = files.filter(({ path }) => !path.includes('/'));
  const below = new Map<string, number>();
  for (const { path } of files) {
    const of = path.split('/')[0]!;
    if (of !== path) below.set(of, (below.get(of) ?? 0) + 1);
  }
  const rows = [
    ...top.map(({ path, size, note }) => [path, sizeText(size), note] as const),
    ...[...below].map(([path, count]) => [`${path}/`, '', counted(count, 'file')] as const),
  ];
  const name = Math.max(...rows.map(([path]) => path.length)) + 2;
  return [
    ...wrap(`Written to ${folder}`, columns),
    ...rows.flatMap(([path, size, note]) => {
      const mark = `  ${path.padEnd(name)}${size.padStart(8)}  `;
      return mark.length > columns / 2
        ? [`  ${path}${size === '' ? '' : `  ${size}`}`, ...wrap(note, columns - 6).map((line) => `      ${line}`)]
        : wrap(note, columns - mark.length).map((line, index) => (index === 0 ? mark : ' '.repeat(mark.length)) + line);
    }),
  ];
}

/** Decimal: 1 kB is 1000 bytes. */
function sizeText(bytes: number): string {
  return bytes < 1e6 ? `${(bytes / 1e3).toFixed(1)} kB` : `${(bytes / 1e6).toFixed(2)} MB`;
}

const short = (text: string, most: number): string => (text.length <= most ? text : `${text.slice(0, most - 1)}…`);

const item = (text: string, columns: number): string[] =>
  wrap(text, columns - 4).map((line, index) => (index === 0 ? '  - ' : '    ') + line);
