/**
 * Part of the bench: a winding sheet against the bare PDF library writing as many texts and paths, and many sheets in one
 * file. `sheet.mjs plan.json`.
 */
import { readFileSync } from 'node:fs';
import PDFDocument from 'pdfkit';
import type { CoilRecord } from '../../src/record/schema.ts';
import { fontFiles } from '../../src/sheets/fonts.ts';
import { type Page, Paper } from '../../src/sheets/page.ts';
import { layOutWindingSheet, windingSheet } from '../../src/sheets/winding-sheet.ts';

const median = (values: readonly number[]) => [...values].sort((a, b) => a - b)[values.length >> 1]!;
const record: CoilRecord = JSON.parse(readFileSync(process.argv[2]!, 'utf8'));
const paper = () => new Paper({ title: 'bench', subject: 'bench' });
const pages = layOutWindingSheet(record, paper());
const shapes = pages.flatMap((page) => page.shapes);
const texts = shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : []));
const paths = shapes.length - texts.length;

/** As many pages, texts and paths, with the same fonts and nothing measured. */
async function bare(): Promise<number> {
  const document = new PDFDocument({ font: null as unknown as string, autoFirstPage: false });
  let bytes = 0;
  document.on('data', (chunk: Uint8Array) => {
    bytes += chunk.length;
  });
  const ended = new Promise((resolve) => document.on('end', resolve));
  document.registerFont('plain', fontFiles().plain).font('plain').fontSize(9);
  for (let page = 0; page < pages.length; page++) {
    document.addPage({ size: 'A4', margin: 0 });
    for (let i = page; i < texts.length; i += pages.length)
      document.text(texts[i]!, 40 + (i % 200), 40 + (i % 700), { lineBreak: false });
    for (let i = page; i < paths; i += pages.length)
      document
        .moveTo(40, 40 + (i % 700))
        .lineTo(200, 60 + (i % 700))
        .stroke();
  }
  document.end();
  await ended;
  return bytes;
}

const timed = async (run: () => Promise<unknown>) => {
  const from = performance.now();
  await run();
  return performance.now() - from;
};
await windingSheet(record);
await bare();
const ratios: number[] = [];
const own: number[] = [];
for (let i = 0; i < 9; i++) {
  const ours = await timed(() => windingSheet(record));
  ratios.push(ours / (await timed(bare)));
  own.push(ours);
}
console.log(
  `winding sheet of ${pages.length} pages, ${texts.length} texts and ${paths} paths, laid out and written, against the bare library ` +
    `writing as many: ratio ${median(ratios).toFixed(2)} (goal 3 or less); ${median(own).toFixed(0)} ms, medians of 9 pairs`,
);

const resident = () => process.memoryUsage().rss / 1e6;
async function* many(count: number, seen: number[]): AsyncGenerator<Page> {
  for (let i = 0; i < count; i++) {
    if (i === count / 8 || i === count - 1) seen.push(resident());
    yield* pages;
  }
}
const seen: number[] = [];
let bytes = 0;
await paper().stream(many(400, seen), (chunk) => {
  bytes += chunk.length;
});
const [early, late] = seen as [number, number];
console.log(
  `400 winding sheets in one file of ${(bytes / 1e6).toFixed(1)} MB: ${early.toFixed(0)} MB resident after 50, ${late.toFixed(0)} MB at the end, ` +
    `ratio ${(late / early).toFixed(2)} (goal 1.2 or less)`,
);
