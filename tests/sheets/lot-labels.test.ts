/** Labels: each coil once, in its own box of the stated size, its code read back. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { inside, overlap, shapeBox, textBox } from '../../src/drawing/boxes.ts';
import { LABEL_MM, labelGrid, labels, labelsFrame, layOutLabels } from '../../src/sheets/labels.ts';
import { PAPER_MM, type Page, Paper } from '../../src/sheets/page.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { lotOf } from '../helpers/lot.ts';
import { readPdf } from '../helpers/pdf.ts';
import { readCode } from '../helpers/qr.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const HASH = 'c4'.repeat(32);

/** Box of a label on its page. */
function labelBox(paper: 'A4' | 'Letter', i: number) {
  const { across, x, y } = labelGrid(paper);
  const left = x + (i % across) * LABEL_MM.width;
  const top = y - Math.floor(i / across) * LABEL_MM.height;
  return { left, right: left + LABEL_MM.width, top, bottom: top - LABEL_MM.height };
}

const textsIn = (page: Page, box: ReturnType<typeof labelBox>) =>
  page.shapes.flatMap((shape) =>
    shape.shape === 'text' && inside(textBox(shape, measure), box, 0.01) ? [shape.text] : [],
  );

test.each(['A4', 'Letter'] as const)('%s: serial, kind, job, hash and code of every coil in its own label', (paper) => {
  const sample = lotOf(
    [
      { record: sampleRecord({ job: 'Harbour receiver' }), quantity: 20, prefix: 'HR' },
      { record: { ...sampleRecord({ job: 'Light' }), hash: HASH }, quantity: 19, prefix: 'LT' },
    ],
    { paper },
  );
  const pages = [...layOutLabels(sample.lot, measure)];
  const { across, down } = labelGrid(paper);
  const each = across * down;
  expect(pages.length).toBe(Math.ceil(39 / each));
  expect(layoutFaults(pages, labelsFrame, measure)).toEqual([]);
  let read = 0;
  sample.lot.coils.forEach(({ serial, kind }, i) => {
    const box = labelBox(paper, i % each);
    const page = pages[Math.floor(i / each)]!;
    const texts = textsIn(page, box);
    const { hash, job } = sample.lot.kinds.find((one) => one.kind === kind)!;
    expect(texts).toEqual(expect.arrayContaining([serial, `kind ${kind}`, hash.slice(0, 8)]));
    expect(texts.join(' ')).toContain(job);
    expect(readCode(page.shapes, { ...box, right: box.left + 25.5 })).toBe(`${serial} ${hash}`);
    read++;
  });
  console.log(`labels on ${paper}: ${read} of ${each} a page read back`);
  expect(read).toBe(39);
});

test('true scale in the file: lines a label apart, a ruler of 100 mm, nothing outside the paper', async () => {
  const { lot } = lotOf([{ record: sampleRecord(), quantity: 30, prefix: 'HR' }]);
  const bytes = await labels(lot);
  expect(Buffer.compare(bytes, await labels(lot))).toBe(0);
  const pdf = await readPdf(bytes);
  expect([pdf.title, pdf.printScaling]).toEqual(['Labels: Harbour sets, spring', 'None']);
  const { paths, texts } = pdf.pages[0]!;
  const { across, down } = labelGrid('A4');
  const upright = paths.filter(({ points: [a, b, c] }) => a && b && !c && Math.abs(a[0] - b[0]) < 1e-3);
  const long = upright.filter(({ points }) => Math.abs(points[0]![1] - points[1]![1]) > down * LABEL_MM.height - 0.01);
  const xs = long.map(({ points }) => points[0]![0]).sort((a, b) => a - b);
  expect(xs.length).toBe(across + 1);
  // Points are written to a thousandth: half a micrometre.
  for (let i = 1; i < xs.length; i++) expect(xs[i]! - xs[i - 1]!).toBeCloseTo(LABEL_MM.width, 2);
  const ruler = paths.some(({ points: [a, b, c] }) => a && b && !c && Math.abs(Math.abs(a[0] - b[0]) - 100) < 0.002);
  expect(ruler).toBe(true);
  expect(texts.some(({ text }) => text.includes('Each label 62 × 26 mm'))).toBe(true);
  for (const page of layOutLabels(lot, measure))
    for (const shape of page.shapes) {
      const paper = { left: 5, bottom: 5, right: PAPER_MM.A4[0] - 5, top: PAPER_MM.A4[1] - 5 };
      expect(inside(shapeBox(shape, measure), paper)).toBe(true);
    }
});

test('long names stay in their label, and a label over its neighbour is noticed', () => {
  let runs = 0;
  const cases = fc.record({
    job: fc.oneof(fc.string({ minLength: 1, maxLength: 80 }), fc.constant('Unbroken'.repeat(10))),
    serial: fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9._-]{0,37}[A-Za-z0-9]$/),
    paper: fc.constantFrom('A4' as const, 'Letter' as const),
  });
  fc.assert(
    fc.property(cases, ({ job, serial, paper }) => {
      const options = { paper, serials: (_: string, n: number) => `${serial}${n}` };
      const { lot } = lotOf([{ record: sampleRecord({ job }), quantity: 4, prefix: '' }], options);
      const [page] = [...layOutLabels(lot, measure)];
      expect(layoutFaults([page!], labelsFrame, measure)).toEqual([]);
      for (let i = 0; i < 4; i++) {
        const box = labelBox(paper, i);
        for (const shape of page!.shapes) {
          if (shape.shape !== 'text') continue;
          const own = textBox(shape, measure);
          if (overlap(own, box, 0.01)) expect(inside(own, box, 0.01)).toBe(true);
        }
      }
      runs++;
    }),
    { seed: 5, numRuns: 12 },
  );
  console.log(`labels: ${runs} random names`);
  expect(runs).toBe(12);
  const { lot } = lotOf([{ record: sampleRecord(), quantity: 2, prefix: 'HR' }]);
  const [page] = [...layOutLabels(lot, measure)];
  const text = page!.shapes.find((shape) => shape.shape === 'text' && shape.text === 'HR-001')!;
  expect(layoutFaults([{ ...page!, shapes: [...page!.shapes, text] }], labelsFrame, measure).length).toBe(1);
});
