/** Travellers: a page a coil, its code read back, the contents true, and nothing over anything else. */
import fc from 'fast-check';
import { getDocument } from 'pdfjs-dist/legacy/build/pdf.mjs';
import { describe, expect, test } from 'vitest';
import { questionsOf } from '../../src/bench/questions.ts';
import { type Box, inside, overlap, shapeBox } from '../../src/drawing/boxes.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type Page, Paper } from '../../src/sheets/page.ts';
import { layOutTravellers, travellerFrame, travellers } from '../../src/sheets/traveller.ts';
import { evenTurns, fullRecord, layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { type LotSample, lotOf } from '../helpers/lot.ts';
import { readPdf } from '../helpers/pdf.ts';
import { blackIn, readCode } from '../helpers/qr.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const pagesOf = ({ lot, kinds }: LotSample) => [...layOutTravellers(lot, kinds, measure)];
const textsOf = (page: Page) => layoutBoxes([page], measure).map(({ text }) => text);

/** The upper right of a page, where the code stands. */
function codeWindow(page: Page): Box {
  const { right, top } = travellerFrame(page);
  return { left: right - 32, right, bottom: top - 60, top };
}

/** Black rectangles of the code as one box. */
function codeBox(page: Page): Box {
  const boxes = blackIn(page.shapes, codeWindow(page));
  return {
    left: Math.min(...boxes.map(({ left }) => left)),
    right: Math.max(...boxes.map(({ right }) => right)),
    bottom: Math.min(...boxes.map(({ bottom }) => bottom)),
    top: Math.max(...boxes.map(({ top }) => top)),
  };
}

/** Texts over one another or outside, ink outside the frame, and anything in the border of the code. */
function faultsOf(pages: readonly Page[], contents: number): string[] {
  const faults = layoutFaults(pages, travellerFrame, measure);
  pages.forEach((page, i) => {
    const frame = travellerFrame(page);
    for (const shape of page.shapes)
      if (!inside(shapeBox(shape, measure), frame, 0.01)) faults.push(`page ${i + 1}: ${shape.shape} outside`);
    if (i < contents) return;
    const code = codeBox(page);
    if (code.right - code.left < 22) faults.push(`page ${i + 1}: code of ${code.right - code.left} mm`);
    // Four modules of the finest code: 41 modules and eight more on 31 mm.
    const quiet = 4 * ((code.right - code.left) / 41);
    const zone = {
      left: code.left - quiet,
      right: code.right + quiet,
      bottom: code.bottom - quiet,
      top: code.top + quiet,
    };
    const known = new Set(page.shapes.filter((shape) => shape.shape === 'polyline' && shape.fill === 0));
    for (const shape of page.shapes) {
      const box = shapeBox(shape, measure);
      // The frame of the head goes round it.
      const round = box.left < zone.left && box.right > zone.right;
      if (!known.has(shape) && !round && overlap(box, zone, 0.05)) faults.push(`page ${i + 1}: in the code's border`);
    }
  });
  return faults;
}

const taps = (count: number, rest: Partial<CoilRecord> = {}): CoilRecord => ({
  ...sampleRecord({ turns: evenTurns(count, 5 * count + 20, true), job: `Coil of ${count} taps` }),
  ...rest,
});

describe('one page a coil', () => {
  test.each(['A4', 'Letter'] as const)(
    '%s: 1 to 24 taps, any unit of length, whatever the meter is good for',
    (paper) => {
      let laid = 0;
      for (const count of [1, 3, 6, 12, 18, 24])
        for (const units of ['metric', 'inch', 'both'] as const)
          for (const trusted of [true, false]) {
            if (![3, 12, 24].includes(count) && (units !== 'metric' || !trusted)) continue;
            const plain = taps(count, { units });
            const meter = plain.measuring.meter.map((entry) => ({
              ...entry,
              doubt: trusted ? null : ('leads' as const),
            }));
            const record = { ...plain, measuring: { ...plain.measuring, meter } };
            const sample = lotOf([{ record, quantity: 1, prefix: 'HS' }], { paper });
            const pages = pagesOf(sample);
            expect(pages.length, `${count} taps, ${units}`).toBe(2);
            expect(faultsOf(pages, 1), `${count} taps, ${units}`).toEqual([]);
            const texts = textsOf(pages[1]!);
            const asked = questionsOf(record).filter(
              ({ quantity }) => quantity === (trusted ? 'inductance' : 'resonance'),
            );
            expect(texts.filter((text) => text === (trusted ? 'µH' : 'kHz')).length).toBe(count);
            expect(asked.length).toBeGreaterThanOrEqual(count);
            for (const { tap, turn } of record.windings[0]!.taps) {
              expect(texts).toContain(`${tap}`);
              expect(texts).toContain(`${Number(turn.toFixed(units === 'both' ? 2 : 3))}`);
            }
            laid++;
          }
      console.log(`travellers on ${paper}: ${laid} records laid out on one page`);
      expect(laid).toBe(21);
    },
  );

  test('also with long steps, checks and names, and the unit taps of two switches', () => {
    const full = fullRecord({ turns: evenTurns(24, 130, true), stepWords: 40, job: 'x'.repeat(80) });
    const two = sampleRecord({ turns: evenTurns(10, 100, false), unitTurns: [1, 2, 3, 4, 5, 6, 7, 8, 9] });
    for (const paper of ['A4', 'Letter'] as const)
      for (const record of [full, two]) {
        const sample = lotOf([{ record, quantity: 1, prefix: 'HS' }], { paper, name: 'Lot '.repeat(20) });
        const pages = pagesOf(sample);
        expect(faultsOf(pages, 1)).toEqual([]);
        expect(pages.length).toBe(2);
      }
  });

  test('beyond 24 it may go on, says so on both pages, and both have the code', () => {
    const record = taps(60);
    const sample = lotOf([{ record, quantity: 2, prefix: 'HS' }], { paper: 'Letter' });
    const pages = pagesOf(sample);
    const [, first, second] = pages;
    expect(faultsOf(pages, 1)).toEqual([]);
    expect(pages.length).toBeGreaterThan(4);
    const each = (pages.length - 1) / 2;
    expect(textsOf(first!)).toContain(`sheet 1 of ${each} of this coil`);
    expect(textsOf(first!).some((text) => /^Goes on on the next page with taps \d+ to 60\.$/.test(text))).toBe(true);
    expect(textsOf(second!)).toContain(`sheet 2 of ${each} of this coil`);
    for (const page of [first!, second!]) expect(readCode(page.shapes, codeWindow(page))).toBe(`HS-001 ${record.hash}`);
    // All taps, each once, over the pages of a coil.
    const all = pages.slice(1, 1 + each).flatMap(textsOf);
    const last = record.windings[0]!.taps.map(({ turn }) => `${Number(turn.toFixed(3))}`);
    for (const turn of last) expect(all.filter((text) => text === turn).length).toBeGreaterThanOrEqual(1);
    expect(textsOf(pages.at(-1)!)).toContain('rework');
    expect(textsOf(first!)).not.toContain('rework');
  });
});

const mixed = (options: Parameters<typeof lotOf>[1] = {}) =>
  lotOf(
    [
      { record: taps(3), quantity: 4, prefix: 'LB' },
      { record: { ...taps(30), hash: 'e1'.repeat(32) }, quantity: 2, prefix: 'CF' },
      { record: { ...taps(12), hash: 'd2'.repeat(32) }, quantity: 5, prefix: 'HS' },
    ],
    options,
  );

describe('the document', () => {
  test('page numbers of the contents are true, links lead there, every serial stands once on its page', async () => {
    const { lot, kinds } = mixed();
    const bytes = await travellers(lot, kinds);
    const pdf = await readPdf(bytes);
    const contents = pdf.pages.filter(({ texts }) => texts.some(({ text }) => text === 'Travellers'));
    const rows = contents.flatMap(({ texts }) =>
      lot.coils.flatMap(({ serial, spool }) => {
        const at = texts.find(({ text }) => text === serial);
        if (!at) return [];
        const right = texts.filter(({ y, x }) => Math.abs(y - at.y) < 0.1 && x > at.x).sort((a, b) => a.x - b.x);
        expect(right[2]!.text).toBe(spool ?? 'to buy');
        return [{ serial, page: Number(right[0]!.text) }];
      }),
    );
    expect(rows.map(({ serial }) => serial)).toEqual(lot.coils.map(({ serial }) => serial));
    for (const { serial, page } of rows) {
      const { texts } = pdf.pages[page - 1]!;
      expect(texts.filter(({ text }) => text === serial).length, serial).toBe(1);
      expect(texts.find(({ text }) => text === serial)!.sizeMm).toBeGreaterThan(9.9);
      expect(texts.some(({ text }) => text === `page ${page} of ${pdf.pages.length}`)).toBe(true);
    }
    const document = await getDocument({ data: Uint8Array.from(bytes), verbosity: 0 }).promise;
    const led: [number, number][] = [];
    for (let n = 1; n <= contents.length; n++)
      for (const { dest } of await (await document.getPage(n)).getAnnotations()) {
        const found = await document.getDestination(dest as string);
        led.push([Number((dest as string).slice(5)), 1 + (await document.getPageIndex(found![0]))]);
      }
    await document.destroy();
    expect(led.map(([said]) => said)).toEqual(rows.map(({ page }) => page));
    for (const [said, leads] of led) expect(leads).toBe(said);
    console.log(`travellers: ${rows.length} coils on ${pdf.pages.length} pages, ${led.length} links followed`);
    expect(rows.length).toBe(11);
  });

  test('every code says its serial and the hash of its record', () => {
    const sample = mixed({ paper: 'Letter' });
    const pages = pagesOf(sample);
    let read = 0;
    for (const { serial, kind } of sample.lot.coils)
      for (const page of pages.filter(
        (each) => textsOf(each).includes(serial) && textsOf(each).includes('Traveller'),
      )) {
        expect(readCode(page.shapes, codeWindow(page))).toBe(`${serial} ${sample.kinds.get(kind)!.hash}`);
        read++;
      }
    console.log(`travellers: ${read} codes read back`);
    expect(read).toBe(pages.length - 1);
  });

  test('same records, same bytes; title and language; who checks', async () => {
    const { lot, kinds } = mixed();
    const [one, two] = [await travellers(lot, kinds), await travellers(lot, kinds)];
    expect(Buffer.compare(one, two)).toBe(0);
    const pdf = await readPdf(one);
    expect([pdf.title, pdf.language]).toEqual(['Travellers: Harbour sets, spring', 'en']);
    expect(pdf.pages.at(-1)!.texts.some(({ text }) => text === 'Ilse Varn')).toBe(true);
    const nobody = mixed({ checkedBy: null });
    expect(textsOf(pagesOf(nobody).at(-1)!)).toContain('checked by');
  });

  test('kinds and coils that fill several pages of contents are all in it', () => {
    const record = taps(3);
    const entries = Array.from({ length: 60 }, (_, i) => ({ record, quantity: 8, prefix: `K${i}` }));
    const sample = lotOf(entries);
    const contents: Page[] = [];
    for (const page of layOutTravellers(sample.lot, sample.kinds, measure)) {
      if (page.anchor !== undefined) break;
      contents.push(page);
    }
    expect(contents.length).toBeGreaterThan(3);
    expect(faultsOf(contents, contents.length)).toEqual([]);
    const numbers = contents.flatMap(({ links }) => (links ?? []).map(({ to }) => to));
    expect(numbers).toEqual(sample.lot.coils.map((_, i) => `page-${contents.length + 1 + i}`));
  });
});

describe('layout', () => {
  test('nothing overlaps or leaves the frame over random names, taps and units', () => {
    let runs = 0;
    const name = fc.oneof(
      fc.stringMatching(/^[A-Za-zÄöß ,.'-]{1,80}$/).filter((text) => text.trim() !== ''),
      fc.constant('Unbroken'.repeat(10)),
    );
    const cases = fc.record({
      count: fc.integer({ min: 1, max: 24 }),
      paper: fc.constantFrom('A4' as const, 'Letter' as const),
      units: fc.constantFrom('metric' as const, 'inch' as const, 'both' as const),
      job: name,
      lotName: name,
      reel: name,
      checkedBy: fc.oneof(name, fc.constant(null)),
      serial: fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9._-]{0,34}[A-Za-z0-9]$/),
      surface: fc.constantFrom('smooth' as const, 'grooved' as const),
      words: fc.integer({ min: 0, max: 40 }),
    });
    fc.assert(
      fc.property(cases, ({ count, paper, units, job, lotName, reel, checkedBy, serial, surface, words }) => {
        const turns = evenTurns(count, 5 * count + 20, true);
        const record = { ...fullRecord({ turns, surface, job, stepWords: words }), units };
        const sample = lotOf([{ record, quantity: 2, prefix: 'x' }], {
          paper,
          name: lotName,
          checkedBy,
          share: 0.5,
          reelNames: () => reel,
          serials: (_, n) => `${serial}${n}`,
        });
        const pages = pagesOf(sample);
        expect(pages.length).toBe(3);
        expect(faultsOf(pages, 1)).toEqual([]);
        runs++;
      }),
      { seed: 21, numRuns: 12 },
    );
    console.log(`travellers: ${runs} random lots laid out`);
    expect(runs).toBe(12);
  });

  test('text over text, ink in the border of a code and a code too small are noticed', () => {
    const pages = pagesOf(lotOf([{ record: taps(3), quantity: 1, prefix: 'HS' }]));
    expect(faultsOf(pages, 1)).toEqual([]);
    const page = pages[1]!;
    const text = page.shapes.find((shape) => shape.shape === 'text')!;
    const faultsWith = (shapes: Page['shapes']) => faultsOf([pages[0]!, { ...page, shapes }], 1).length;
    expect(faultsWith([...page.shapes, text])).toBe(1);
    const { left, top } = codeBox(page);
    expect(faultsWith([...page.shapes, { ...text, text: '.', x: left - 1, y: top - 5 }])).toBe(1);
    const window = codeWindow(page);
    const fewer = page.shapes.filter((shape) => {
      const [box] = blackIn([shape], window);
      return box === undefined || box.left < window.left + 20;
    });
    expect(faultsWith(fewer)).toBeGreaterThan(0);
  });
});
