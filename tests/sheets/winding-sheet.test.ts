import { describe, expect, test } from 'vitest';
import { PAPER_MM, Paper } from '../../src/sheets/page.ts';
import { layOutWindingSheet, windingSheet } from '../../src/sheets/winding-sheet.ts';
import { fullRecord, layoutBoxes } from '../helpers/layout.ts';
import { type PdfPage, type PdfText, readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const number = (text: string) => Number(text.replace('−', '-').replace('+', ''));

/** Texts of a page that stand on the line of another, from left to right. */
function onLine(page: PdfPage, of: PdfText): string[] {
  return page.texts
    .filter((text) => Math.abs(text.y - of.y) < 0.4)
    .sort((a, b) => a.x - b.x)
    .map((text) => text.text);
}

describe('winding sheet, read back', () => {
  test.each(['right', 'left'] as const)('prints the figures of a %s-hand record', async (hand) => {
    const record = sampleRecord({ hand });
    const pdf = await readPdf(await windingSheet(record));
    const [first, second] = pdf.pages as [PdfPage, PdfPage];
    const all = pdf.pages.map((page) => page.texts.map((text) => text.text).join(' ')).join(' ');
    expect(all).toContain(record.job);
    expect(all).toContain(record.hash.slice(0, 12));
    expect(all).toContain(record.program);
    expect(all).toContain(hand === 'right' ? 'right-hand' : 'left-hand');
    expect(all).not.toContain(hand === 'right' ? 'left-hand' : 'right-hand');
    expect(all).toContain('Earthed end: start S.');
    // Steps that are rows of the tap table are checked there by their figures.
    for (const step of record.steps) if (step.kind !== 'tap') expect(all.replace(/\s+/g, ' ')).toContain(step.text);
    for (const caution of record.cautions) expect(all.replace(/\s+/g, ' ')).toContain(caution);

    // The tap table: the columns stand right of the middle of the sheet. Half a unit of the last digit printed.
    const { taps } = record.windings[0]!;
    const middle = first.widthMm / 2;
    const table = { ...first, texts: first.texts.filter((text) => text.x > middle) };
    let checked = 0;
    for (const tap of taps) {
      const rows = table.texts.filter((text) => text.text === `${tap.tap}`).map((text) => onLine(table, text));
      const row = rows.find((cells) => cells.length === 7 && cells[1] === `${tap.tap}`)!.map(number);
      const step = record.steps.find((each) => each.tap === tap.tap)!;
      const wanted = [step.step, tap.tap, tap.turn, tap.angleDeg, tap.positionMm, tap.inductanceUh, tap.wireFromStartM];
      const within = [0, 0, 0.0005, 0.05, 0.005, tap.inductanceUh * 5e-4, 0.005];
      wanted.forEach((value, i) => {
        expect(Math.abs(row[i]! - value)).toBeLessThanOrEqual(within[i]! + 1e-9);
        checked++;
      });
      // Beside the drawing: the distance from the datum.
      expect(first.texts.some((text) => text.x < middle && text.text === tap.positionMm.toFixed(2))).toBe(true);
    }
    // Page 2: limits of every tap, in the order of their columns.
    const between = (text: string) => text.split('–').map(number) as [number, number];
    const pf = record.shop.capacitorsPf.at(-1);
    for (const tap of taps) {
      const rows = second.texts.filter((text) => text.text === `${tap.tap}`).map((text) => onLine(second, text));
      const row = rows
        .find((cells) => cells.length === 5)!
        .slice(1)
        .map(between);
      const { lengths, meter, resonances } = record.measuring;
      const { lowMm, highMm } = lengths[tap.tap - 1]!;
      const { lowUh, highUh } = meter[tap.tap - 1]!;
      const at = resonances.find((one) => one.tap === tap.tap && one.capacitancePf === pf)!;
      const wanted = [
        [lowMm, highMm],
        [tap.resistanceLowOhm, tap.resistanceHighOhm],
        [lowUh!, highUh!],
        [at.lowKhz, at.highKhz],
      ];
      // Half a unit of the last digit that is printed: 0.01 mm, 0.001 ohm, four figures, 0.1 or 1 kHz.
      const within = [0.0051, 0.00051, highUh! * 5.1e-4, at.lowKhz < 1000 ? 0.051 : 0.51];
      wanted.forEach((pair, i) => {
        pair.forEach((value, k) => {
          expect(Math.abs(row[i]![k]! - value)).toBeLessThanOrEqual(within[i]!);
          checked++;
        });
      });
    }
    for (const check of record.checks)
      if (check.unit !== 'kHz') expect(all).toContain(check.nominal.toFixed(check.digits));
    for (const each of record.corrections) expect(all).toContain(each.doing);
    for (const each of record.advice) expect(all).toContain(each.degreesPerPercent.toFixed(0));
    console.log(`winding sheet, ${hand}: ${checked} printed figures agree with the record`);
    expect(checked).toBe(taps.length * 15);
  });

  test('signs, title, language, scaling and sheet numbers', async () => {
    const record = { ...sampleRecord(), job: 'Signs: µ Ω ≤ → ⌀ °' };
    const pdf = await readPdf(await windingSheet(record));
    const all = pdf.pages.flatMap((page) => page.texts.map((text) => text.text)).join(' ');
    for (const sign of ['µH', 'Ω', '≤', '→', '⌀', '°', '−']) expect(all).toContain(sign);
    expect(pdf.title).toBe(`Winding sheet: ${record.job}`);
    expect(pdf.language).toBe('en');
    expect(pdf.printScaling).toBe('None');
    pdf.pages.forEach((page, i) => {
      const found = page.texts.some((text) => text.text === `sheet ${i + 1} of ${pdf.pages.length}`);
      expect(found).toBe(true);
    });
  });

  test('a date only when given', async () => {
    const without = await readPdf(await windingSheet(sampleRecord()));
    const dated = await readPdf(await windingSheet({ ...sampleRecord(), date: '2031-05-17' }));
    const has = (pdf: typeof without) => pdf.pages[0]!.texts.some((text) => text.text.startsWith('date 2031-05-17'));
    expect([has(without), has(dated)]).toEqual([false, true]);
  });

  test.each(['A4', 'Letter'] as const)('%s has its size, and two pages do for five taps', async (paper) => {
    const pdf = await readPdf(await windingSheet(sampleRecord({ paper })));
    expect(pdf.pages.length).toBe(2);
    for (const page of pdf.pages) {
      expect(page.widthMm).toBeCloseTo(PAPER_MM[paper][0], 3);
      expect(page.heightMm).toBeCloseTo(PAPER_MM[paper][1], 3);
    }
  });

  test('same record, same bytes', async () => {
    const [one, two] = [await windingSheet(sampleRecord()), await windingSheet(sampleRecord())];
    expect(Buffer.compare(one, two)).toBe(0);
  });

  test('what was measured is where it was printed', async () => {
    const record = fullRecord();
    const pages = layOutWindingSheet(record, measure);
    const pdf = await readPdf(await windingSheet(record));
    let found = 0;
    layoutBoxes(pages, measure).forEach((each) => {
      const middle = (each.box.left + each.box.right) / 2;
      // The reader works in 32 bit floats and joins neighbouring runs: only whole ones are compared, to 0.05 mm.
      const match = pdf.pages[each.page - 1]!.texts.find(
        (text) => text.text === each.text && Math.abs(text.x + text.width / 2 - middle) < 0.05,
      );
      if (match && match.turnDeg === 0) found++;
    });
    const all = layoutBoxes(pages, measure).length;
    console.log(`winding sheet: ${found} of ${all} texts found where they were measured`);
    expect(found / all).toBeGreaterThan(0.9);
  });
});
