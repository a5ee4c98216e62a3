/** What `lot` says when it is done: kinds and coils, wire from the reels, what to buy, beds and runs, what was written. */
import type { LotRecord } from '../src/lot/schema.ts';
import type { MadeLot } from '../src/lot.ts';
import { tidy } from '../src/quantity/format.ts';
import { fileList, type Written } from './file-list.ts';
import { type Figure, heading, hung, list, type Page, pageText, paragraph, table } from './page.ts';

/** `folder` is where the files went. */
export function showLot({ record, files }: MadeLot, folder: string, page: Page): string {
  return pageText([
    head(record, page),
    kinds(record, page),
    wire(record, page),
    toBuy(record, page),
    printing(record, page),
    list(
      page,
      'Warnings',
      record.warnings.map(({ text }) => text),
      'trouble',
    ),
    fileList(page, folder, listed(files)),
  ]);
}

const counted = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;
const metres = (m: number): string => m.toFixed(2);

function head({ lot, coils, kinds }: LotRecord, page: Page): string[] {
  const first = coils[0]!.serial;
  const last = coils.at(-1)!.serial;
  const serials = coils.length === 1 ? first : `${first} to ${last}`;
  const what = `${counted(coils.length, 'coil')} of ${counted(kinds.length, 'kind')}, serials ${serials}`;
  return [...heading(page, lot), ...paragraph(page, what)];
}

function kinds({ kinds }: LotRecord, page: Page): string[] {
  const figures: readonly Figure<LotRecord['kinds'][number]>[] = [
    [page.plain === true ? 'kind' : '', ({ kind }) => kind, 'left'],
    ['coils', ({ quantity }) => `${quantity}`],
    ['job', ({ job }) => short(job, 26, page), 'left'],
    ['wire', ({ wire }) => wire, 'left'],
    ['turns', ({ turns }) => turns.toFixed(2)],
    ['taps', ({ taps }) => `${taps}`],
    ['m each', ({ cutM }) => metres(cutM)],
    ['plastic g', ({ plasticG }) => tidy(plasticG, 3)],
  ];
  return table(page, 'Kinds', figures, kinds);
}

function wire({ wires, spools }: LotRecord, page: Page): string[] {
  if (spools.length === 0) return [];
  const title = 'Wire from the reels';
  const figures: readonly Figure<LotRecord['spools'][number]>[] = [
    ['reel', ({ spool }) => short(spool, 24, page), 'left'],
    ['wire', ({ wire }) => wire, 'left'],
    ['coils', ({ serials }) => `${serials.length}`],
    ['left m', ({ leftM }) => metres(leftM)],
    ['used m', ({ usedM }) => metres(usedM)],
    ['rest m', ({ restM }) => metres(restM)],
  ];
  const cut = spools.filter(({ serials }) => serials.length > 0);
  const untouched = spools.length - cut.length;
  const notes = wires.flatMap(({ wire, scrapM, scrapBoundM, unserved, exact }) => {
    const scrap = `${wire}: ${metres(scrapM)} m too short for any coil is left`;
    const proof = exact ? 'no plan is better' : `no plan leaves less than ${metres(scrapBoundM)} m`;
    return unserved > 0 && scrapM === 0 ? [] : [`${scrap}; ${proof}`];
  });
  const remarks = [...notes, ...(untouched === 0 ? [] : [`not cut from: ${counted(untouched, 'reel')}`])];
  return [
    ...(cut.length === 0 ? heading(page, title) : table(page, title, figures, cut)),
    ...remarks.flatMap((text) => hung(page, '  - ', text)),
  ];
}

function toBuy({ toBuy }: LotRecord, page: Page): string[] {
  const lines = toBuy.map(({ wire, totalM, totalG, coils }) => {
    const longest = coils.reduce((most, { cutM }) => Math.max(most, cutM), 0);
    const pieces = `${counted(coils.length, 'piece')} of up to ${metres(longest)} m`;
    return `${wire}: ${metres(totalM)} m, ${tidy(totalG, 3)} g, in ${pieces}`;
  });
  return list(page, 'To buy', lines);
}

function printing({ beds, runs, materials }: LotRecord, page: Page): string[] {
  if (beds.length === 0) return [];
  const prints = beds.reduce((sum, { count }) => sum + count, 0);
  const mass = materials.map(({ material, solidG }) => `${material} ${tidy(solidG, 4)} g`).join(', ');
  const printers = runs.map(({ printer, runs: own }) => `${printer}: ${counted(own.length, 'run')}`).join('; ');
  return list(page, 'Printing', [
    `${counted(beds.length, 'bed')} to print ${counted(prints, 'time')} in all`,
    printers,
    `of solid plastic ${mass}`,
  ]);
}

/** Files of the folder itself; what lies in folders below is counted. */
function listed(files: MadeLot['files']): readonly Written[] {
  const below = new Map<string, number>();
  for (const { path } of files) {
    const of = path.split('/')[0]!;
    if (of !== path) below.set(of, (below.get(of) ?? 0) + 1);
  }
  return [
    ...files.filter(({ path }) => !path.includes('/')),
    ...[...below].map(([path, count]) => ({ path: `${path}/`, note: counted(count, 'file') })),
  ];
}

const short = (text: string, most: number, page: Page): string =>
  page.plain === true || text.length <= most ? text : `${text.slice(0, most - 1)}…`;
