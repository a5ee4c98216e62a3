/** One random job to its sheets as drawings: no text over another, outside its frame or too small to read. */
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { makeRecord } from '../../src/record/make.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type Page, Paper } from '../../src/sheets/page.ts';
import { layOutPartsSheet, partsFrame } from '../../src/sheets/parts-sheet.ts';
import { layOutRangePlate, plateFrame } from '../../src/sheets/range-plate.ts';
import { layOutReferenceSheet, referenceFrame } from '../../src/sheets/reference-sheet.ts';
import { layOutWindingSheet, sheetFrame } from '../../src/sheets/winding-sheet.ts';
import { layOutWrapTemplate, templateFrame } from '../../src/sheets/wrap-template.ts';
import { search } from '../../src/solve/search.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { chance, randomJob } from './jobs.ts';

export interface SheetsOutcome {
  readonly seed: number;
  readonly result: 'made' | 'refused' | 'failed';
  readonly said: readonly string[];
  readonly pages: number;
  readonly texts: number;
}

const NAMES = [
  'Coil',
  'Spare for the upper shelf, second of three, wound on the wide tube in the autumn',
  'Ääkköset ≤ µ Ω',
];

/** A random job as text, with what only sheets care for. */
export function sheetJob(seed: number): string {
  const random = chance(seed + 77);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const job = JSON.parse(randomJob(seed));
  const set = {
    capacitor: '15 pF to 380 pF',
    stray: '12 pF',
    aerial: '60 pF',
    switch: pick(['open', 'shorted', 'shorted in sections', 'disconnected']),
  };
  return JSON.stringify({
    ...job,
    job: pick(NAMES),
    paper: pick(['A4', 'Letter']),
    units: pick(['metric', 'inch', 'both']),
    ...(random() < 0.5 ? { set } : {}),
    ...(random() < 0.3 ? { date: '2031-05-17' } : {}),
    shop: {
      ...job.shop,
      meter: pick(['1 kHz', '100 kHz', '1 MHz']),
      ...(random() < 0.3 ? { 'meter-name': 'bridge no. 2 of the back room' } : {}),
    },
  });
}

/** Every sheet of a record as drawings: what is wrong with their texts, and how many pages and texts there are. */
export function sheetFaults(record: CoilRecord): { faults: string[]; pages: number; texts: number } {
  const paper = new Paper({ title: 'x', subject: 'x' });
  const sheets: [name: string, pages: readonly Page[], frame: (page: Page) => ReturnType<typeof sheetFrame>][] = [
    ['winding sheet', layOutWindingSheet(record, paper), sheetFrame],
    ['reference sheet', layOutReferenceSheet(record, paper), referenceFrame],
    ['range plate', layOutRangePlate(record, paper), plateFrame],
    ['parts sheet', layOutPartsSheet(record, new Map(), paper), partsFrame],
  ];
  if (record.former.body === 'full') sheets.push(['wrap template', layOutWrapTemplate(record, paper), templateFrame]);
  const faults = sheets.flatMap(([name, pages, frame]) =>
    layoutFaults(pages, frame, paper).map((fault) => `${name}: ${fault}`),
  );
  const pages = sheets.flatMap(([, list]) => list);
  const texts = pages.reduce((sum, page) => sum + page.shapes.filter(({ shape }) => shape === 'text').length, 0);
  return { faults, pages: pages.length, texts };
}

/** Never throws. */
export function sheetsOutcome(seed: number): SheetsOutcome {
  const none = { seed, pages: 0, texts: 0 };
  try {
    const job = readJob(sheetJob(seed), `random ${seed}`);
    const found = search(job);
    if (!('chosen' in found)) return { ...none, result: 'refused', said: ['nothing-fits'] };
    const record = makeRecord(job, found, '0.0.0');
    const { faults, pages, texts } = sheetFaults(record);
    if (faults.length > 0) return { ...none, result: 'failed', said: faults.slice(0, 8) };
    return { seed, result: 'made', said: [], pages, texts };
  } catch (error) {
    if (error instanceof Fault && (error.exit === 3 || error.exit === 4))
      return { ...none, result: 'refused', said: error.faults.map(({ code }) => code) };
    return {
      ...none,
      result: 'failed',
      said: [error instanceof Error ? (error.stack ?? error.message) : String(error)],
    };
  }
}
