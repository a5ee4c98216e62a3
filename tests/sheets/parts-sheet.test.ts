import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { inside, overlap, shapeBox, textBox } from '../../src/drawing/boxes.ts';
import { viewsOf } from '../../src/drawing/parts/views.ts';
import type { View } from '../../src/drawing/views.ts';
import { PARTS } from '../../src/job/schema.ts';
import { greyPng } from '../../src/kernel/png.ts';
import { partsOf } from '../../src/parts/parts.ts';
import { bedsOf, entriesOf } from '../../src/record/printed.ts';
import type { CoilRecord, PartEntry } from '../../src/record/schema.ts';
import { type Page, Paper } from '../../src/sheets/page.ts';
import { layOutPartsSheet, type Picture, partsFrame, partsSheet } from '../../src/sheets/parts-sheet.ts';
import { anyView, plateViews, tubeViews } from '../drawing/sample-views.ts';
import { splitRecord } from '../helpers/joints.ts';
import { layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { withSecondWinding } from '../helpers/second.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

/** A grey picture without any meaning. */
function picture(widthPx: number, heightPx: number): Picture {
  const grey = Uint8Array.from({ length: widthPx * heightPx }, (_, i) => 140 + ((i * 7) % 100));
  return { png: greyPng(grey, widthPx, heightPx), widthPx, heightPx };
}
const TALL = [picture(330, 550), picture(330, 550)];
const WIDE = [picture(550, 260), picture(550, 260)];

function entry(part: string, rest: Partial<PartEntry> = {}): PartEntry {
  return {
    part,
    name: part.replaceAll('-', ' '),
    kind: 'stand',
    path: `${part}.stl`,
    quantity: 1,
    material: 'PLA',
    sizeMm: [80, 40, 4],
    volumeMm3: 11_000,
    massG: 13.6,
    use: 'holds the shaft while the coil is wound',
    printNote: 'print flat, no supports; three walls',
    ...rest,
  };
}

/** A record with the parts that it makes itself and others. */
function withParts(record: CoilRecord, others: readonly PartEntry[]): CoilRecord {
  const parts = [...entriesOf(partsOf(record)), ...others];
  return { ...record, parts, beds: bedsOf(parts, record.printer) };
}

const OTHERS = [
  entry('stand-base', { quantity: 2, sizeMm: [80, 40, 4.25] }),
  entry('coupon', { kind: 'coupon', sizeMm: [60, 20, 6], massG: 7.31, use: 'finds the gap that your printer needs' }),
  entry('arbor-cone', { kind: 'arbor', quantity: 2, sizeMm: [70, 70, 31.5], massG: 48.2, material: 'ABS' }),
];
const VIEWS: ReadonlyMap<string, readonly View[]> = new Map([
  ['former', tubeViews()],
  ['stand-base', plateViews()],
  ['coupon', plateViews()],
]);
const PICTURES: ReadonlyMap<string, readonly Picture[]> = new Map([
  ['former', TALL],
  ['stand-base', WIDE],
  ['coupon', WIDE],
]);
const joined = (texts: readonly { text: string }[]) =>
  texts
    .map((text) => text.text)
    .join(' ')
    .replace(/\s+/g, ' ');

/** Anything that leaves the frame, and words or pictures over a picture. Lines may stand out by half their breadth. */
function pageFaults(pages: readonly Page[]): string[] {
  const faults = layoutFaults(pages, partsFrame, measure);
  for (const [i, page] of pages.entries()) {
    const frame = partsFrame(page);
    for (const shape of page.shapes)
      if (!inside(shapeBox(shape, measure), frame, 0.01))
        faults.push(`page ${i + 1}: a ${shape.shape} leaves the frame`);
    const boxes = (page.pictures ?? []).map(({ x, y, widthMm, heightMm }) => ({
      left: x,
      right: x + widthMm,
      bottom: y,
      top: y + heightMm,
    }));
    boxes.forEach((box, k) => {
      if (!inside(box, frame, 0.01)) faults.push(`page ${i + 1}: a picture leaves the frame`);
      if (boxes.slice(k + 1).some((other) => overlap(box, other))) faults.push(`page ${i + 1}: pictures overlap`);
      for (const shape of page.shapes)
        if (shape.shape === 'text' && overlap(box, textBox(shape, measure), 0.05))
          faults.push(`page ${i + 1}: ${shape.text} on a picture`);
    });
  }
  return faults;
}

describe('parts sheet, read back', () => {
  test('prints the figures of the record', async () => {
    const base = sampleRecord();
    const record = withParts({ ...base, assumed: { ...base.assumed, 'printer.nozzle': '0.4 mm' } }, OTHERS);
    const paper = new Paper({ title: 'a', subject: 'b' });
    const pdf = await readPdf(await paper.write(layOutPartsSheet(record, PICTURES, paper, VIEWS)));
    const [first] = pdf.pages;
    const words = joined(first!.texts);
    /** Texts on the line of the one given, left to right. */
    const row = (text: string) => {
      const at = first!.texts.find((each) => each.text === text)!;
      return first!.texts
        .filter((each) => Math.abs(each.y - at.y) < 0.3)
        .sort((a, b) => a.x - b.x)
        .map((each) => each.text);
    };
    let checked = 0;
    for (const part of record.parts) {
      const [name, pieces, material, mass, size, file, bed, sheet] = row(part.path);
      expect(name!.toLowerCase()).toBe(part.name.toLowerCase());
      expect([pieces, material, file]).toEqual([`${part.quantity}`, part.material, part.path]);
      // Half a unit of the last figure printed.
      expect(Math.abs(Number(mass) - part.massG)).toBeLessThanOrEqual(0.051);
      size!.split(' × ').forEach((mm, i) => {
        expect(Math.abs(Number(mm) - part.sizeMm[i]!)).toBeLessThanOrEqual(0.00501);
      });
      const on = record.beds.findIndex((each) => each.items.some((item) => item.part === part.part));
      expect(bed).toBe(`${on + 1}`);
      // The sheet named in the list is the one that shows the part.
      const page = joined(pdf.pages[Number(sheet) - 1]!.texts);
      expect(page).toContain(part.path);
      expect(page).toContain(part.use.slice(1));
      expect(page.replace(/ /g, '')).toContain(part.printNote.slice(1).replace(/ /g, ''));
      checked += 10;
    }
    const total = record.parts.reduce((sum, part) => sum + part.quantity * part.massG, 0);
    const [, said] = /, (\d+) g if printed solid/.exec(words)!;
    expect(Math.abs(Number(said) - total)).toBeLessThanOrEqual(0.5);
    expect(words).toContain(`${record.parts.reduce((sum, part) => sum + part.quantity, 0)} pieces`);
    const { printer, former } = record;
    const mm = (...sizes: number[]) => `${sizes.join(' × ')} mm`;
    for (const [what, value, from] of [
      ['bed', mm(printer.bedXMm, printer.bedYMm), 'given'],
      ['tallest part', mm(printer.heightMm), 'given'],
      ['nozzle', mm(printer.nozzleMm), 'assumed'],
      ['width of a line', mm(printer.lineMm), 'given'],
      ['height of a layer', mm(printer.layerMm), 'given'],
      ['added to holes, on diameter', mm(printer.holeCompensationMm), 'given'],
      ['gap of fits, on diameter', mm(printer.clearanceMm), 'given'],
      ['files enlarged, x y z', '100, 100, 100 %', 'given'],
    ]) {
      const found = first!.texts
        .filter((text) => text.text === what)
        .map((text) => {
          const line = first!.texts.filter((each) => Math.abs(each.y - text.y) < 0.3 && each.x >= text.x);
          return line.sort((a, b) => a.x - b.x).map((each) => each.text);
        });
      expect(found.some((line) => line[1] === value && line[2] === from)).toBe(true);
      checked++;
    }
    expect(words).toContain(former.outsideDiameterMm.toFixed(2));
    expect(words).toContain(former.lengthMm.toFixed(2));
    expect(words).toContain(`the inductance ${former.tenthMmPercent} % greater`);
    expect(words).toContain(former.stiffness);
    for (const caution of [
      'Nozzle and bed',
      'PLA softens near 60 °C',
      'PETG softens near 75 °C',
      'ABS gives off fumes',
    ])
      expect(words).toContain(caution);
    expect(words).toContain('No carbon- or metal-filled filament');
    // Every length of every view, as it was given.
    const drawn = joined(pdf.pages.flatMap((page) => page.texts));
    for (const views of VIEWS.values())
      for (const view of views)
        for (const each of view.dimensions)
          if (each.kind === 'span') {
            expect(drawn).toContain(each.text);
            checked++;
          }
    console.log(`parts sheet: ${checked} printed figures agree with the record`);
    expect(checked).toBeGreaterThan(70);
  });

  test('a part without views is shown by its size, so that none is missing', async () => {
    const record = withParts(sampleRecord(), [entry('odd', { sizeMm: [33.3, 22.2, 11.1] })]);
    const pages = layOutPartsSheet(record, new Map(), measure, new Map());
    const texts = layoutBoxes(pages, measure).map((each) => each.text);
    for (const size of ['33.3', '22.2', '11.1']) expect(texts).toContain(size);
    // In the list, and over its drawing.
    expect(texts.filter((text) => text === 'Odd').length).toBe(2);
  });

  test('every part that is made has views of its own', () => {
    let parts = 0;
    for (const kind of ['printed', 'tube'] as const) {
      const not = kind === 'printed' ? 'saddle' : 'former';
      const record = {
        ...withSecondWinding(sampleRecord({ kind }), { kind: kind === 'printed' ? 'inner' : 'sleeve', travelMm: 30 }),
        wanted: PARTS.filter((part) => part !== not),
      };
      const views = viewsOf(record);
      for (const { part } of partsOf(record)) {
        expect(views.get(part)?.length ?? 0, part).toBeGreaterThan(0);
        parts++;
      }
    }
    console.log(`parts sheet: ${parts} parts have views`);
    expect(parts).toBeGreaterThan(6);
  });

  test('title, language, scaling, sheet numbers; nothing printed is said', async () => {
    const pdf = await readPdf(await partsSheet(withParts(sampleRecord(), OTHERS), PICTURES));
    expect(pdf.title).toBe('Parts sheet: Sample coil for tests');
    expect([pdf.language, pdf.printScaling]).toEqual(['en', 'None']);
    pdf.pages.forEach((page, i) => {
      expect(page.texts.some((text) => text.text === `sheet ${i + 1} of ${pdf.pages.length}`)).toBe(true);
    });
    const none = await readPdf(await partsSheet(sampleRecord({ kind: 'tube' }), new Map()));
    expect(none.pages.length).toBe(1);
    expect(joined(none.pages[0]!.texts)).toContain('Nothing is printed');
  });

  test('same record and pictures, same bytes; pictures lie in it at 250 dots to the inch or finer', async () => {
    const record = withParts(sampleRecord(), OTHERS);
    const [one, two] = [await partsSheet(record, PICTURES), await partsSheet(record, PICTURES)];
    expect(Buffer.compare(one, two)).toBe(0);
    const shown = [...PICTURES.values()].flat().length;
    expect(Buffer.from(one).toString('latin1').split('/Subtype /Image').length - 1).toBe(shown);
    const placed = layOutPartsSheet(record, PICTURES, measure).flatMap((page) => page.pictures ?? []);
    expect(placed.length).toBe(shown);
    const sizes = [...PICTURES.values()].flat();
    for (const { png, widthMm, heightMm } of placed) {
      const { widthPx, heightPx } = sizes.find((each) => each.png === png)!;
      expect(widthPx / (widthMm / 25.4)).toBeGreaterThan(249.99);
      expect(widthMm / heightMm).toBeCloseTo(widthPx / heightPx, 9);
    }
  });
});

describe('parts sheet in other units', () => {
  const sample = withSecondWinding(sampleRecord(), { kind: 'beside', travelMm: 40, turns: 14 });
  const jigs = {
    ...sample,
    // So that no length reads like a mass.
    printer: { ...sample.printer, clearanceMm: 0.4 },
    wanted: PARTS.filter((part) => part !== 'saddle'),
  };

  test.each(['inch', 'both'] as const)('%s: every size of every part, and nothing overlaps', (units) => {
    const record = { ...withParts(jigs, []), units };
    const pages = layOutPartsSheet(record, PICTURES, measure);
    expect(pageFaults(pages)).toEqual([]);
    const texts = layoutBoxes(pages, measure).map((each) => each.text);
    const inch = (mm: number) => `${Number((mm / 25.4).toFixed(4))}`;
    const said = (mm: number) => (units === 'both' ? `${Number(mm.toFixed(2))} (${inch(mm)})` : inch(mm));
    let checked = 0;
    for (const views of viewsOf(record).values())
      for (const view of views)
        for (const each of view.dimensions) {
          if (each.kind !== 'span' || each.pieces?.length !== 1) continue;
          const axis = each.along === 'x' ? 0 : 1;
          const mm = Math.abs(each.to[axis] - each.from[axis]);
          // A length that is nothing but a number, written from the length itself and not from the millimetres.
          expect(texts, `${view.title} ${each.text}`).toContain(said(mm));
          checked++;
        }
    // No word of a view kept its millimetres: those with lengths in them are all written anew.
    const plain = new Set(
      [...viewsOf(record).values()].flat().flatMap((view) => view.dimensions.map(({ text }) => text)),
    );
    const kept = texts.filter((text) => plain.has(text) && /\d\.\d/.test(text) && !/°|loop/.test(text));
    expect(kept).toEqual([]);
    const words = texts.join(' ');
    expect(words).toContain(units === 'both' ? 'sizes in mm (inches)' : 'sizes in inches');
    expect(texts).toContain((record.former.outsideDiameterMm / 25.4).toFixed(4));
    expect(texts.includes(record.former.outsideDiameterMm.toFixed(2))).toBe(units === 'both');
    console.log(`parts sheet, ${units}: ${checked} lengths on ${pages.length} pages`);
    expect(checked).toBeGreaterThan(30);
  });

  test('a former in sections is drawn section by section', () => {
    const whole = sampleRecord();
    const record = { ...withParts(splitRecord(whole, 0.6 * whole.former.lengthMm), []) };
    expect(record.parts.filter(({ kind }) => kind === 'former').length).toBe(2);
    const pages = layOutPartsSheet(record, new Map(), measure);
    expect(pageFaults(pages)).toEqual([]);
    const titles = layoutBoxes(pages, measure).filter(({ text }) => text === 'developed surface');
    expect(titles.length).toBe(2);
  });
});

describe('parts sheet, laid out', () => {
  test('nothing overlaps or leaves the frame over random records, parts and views', () => {
    let runs = 0;
    let pagesAll = 0;
    let texts = 0;
    const parts = fc.array(
      fc.record({
        views: fc.array(anyView, { maxLength: 3 }),
        pictures: fc.constantFrom(TALL, WIDE, [], [TALL[0]!]),
        quantity: fc.integer({ min: 1, max: 40 }),
        material: fc.constantFrom('PLA', 'PETG', 'ABS'),
        size: fc.tuple(
          ...([1, 2, 3].map(() => fc.double({ min: 0.5, max: 200, noNaN: true })) as [
            fc.Arbitrary<number>,
            fc.Arbitrary<number>,
            fc.Arbitrary<number>,
          ]),
        ),
        massG: fc.double({ min: 0.01, max: 2000, noNaN: true }),
        name: fc.constantFrom(
          'key',
          'fit coupon for shafts, bores, slots and everything else that goes together',
          'x'.repeat(90),
        ),
      }),
      { maxLength: 4 },
    );
    const options = fc.record({
      hand: fc.constantFrom('right' as const, 'left' as const),
      kind: fc.constantFrom('printed' as const, 'tube' as const),
      surface: fc.constantFrom('smooth' as const, 'grooved' as const),
      paper: fc.constantFrom('A4' as const, 'Letter' as const),
      diameterMm: fc.double({ min: 50, max: 140, noNaN: true }),
      job: fc.oneof(fc.string({ minLength: 1, maxLength: 160 }), fc.constant('Unbroken'.repeat(10))),
    });
    fc.assert(
      fc.property(options, parts, (option, some) => {
        const others = some.map(({ quantity, material, size, massG, name }, i) =>
          entry(`part-${i}`, { quantity, material, sizeMm: size, massG, name, use: `${name} `.repeat(2) }),
        );
        const record = withParts(sampleRecord(option), []);
        const whole = { ...record, parts: [...record.parts, ...others] };
        const views = new Map<string, readonly View[]>(some.map((each, i) => [`part-${i}`, each.views]));
        const pictures = new Map(some.map((each, i) => [`part-${i}`, each.pictures]));
        const pages = layOutPartsSheet(whole, pictures, measure, views.set('former', tubeViews()));
        expect(pageFaults(pages)).toEqual([]);
        pagesAll += pages.length;
        texts += layoutBoxes(pages, measure).length;
        runs++;
      }),
      { seed: 9, numRuns: 25 },
    );
    console.log(`parts sheet: ${runs} random records, ${pagesAll} pages, ${texts} texts`);
    expect(runs).toBe(25);
    expect(texts).toBeGreaterThan(2000);
  });

  test('small parts share pages; a long list goes on', () => {
    const small = Array.from({ length: 9 }, (_, i) => entry(`key-${i + 1}`, { sizeMm: [20, 12, 8] }));
    const few = layOutPartsSheet(withParts(sampleRecord(), small), new Map(), measure);
    // A list, the former, and three small parts a page.
    expect(few.length).toBeLessThanOrEqual(5);
    const many = Array.from({ length: 60 }, (_, i) => entry(`piece-${i + 1}`, { quantity: 2 }));
    const pages = layOutPartsSheet(withParts(sampleRecord({ paper: 'Letter' }), many), new Map(), measure);
    expect(pageFaults(pages)).toEqual([]);
    const names = layoutBoxes(pages.slice(0, 3), measure).map((each) => each.text);
    for (const part of many) expect(names).toContain(part.path);
    expect(names).toContain('Parts, continued');
  });

  test('a view that needs a page to itself, and more of them, go on over several', () => {
    const tall: View = {
      title: 'section',
      shapes: [],
      dimensions: Array.from({ length: 40 }, (_, i) => ({
        kind: 'callout' as const,
        at: [0, i] as const,
        side: 'right' as const,
        text: `hole ${i}`,
      })),
    };
    const record = withParts(sampleRecord(), []);
    const pages = layOutPartsSheet(
      record,
      new Map([['former', TALL]]),
      measure,
      new Map([['former', [tall, tall, tall]]]),
    );
    expect(pageFaults(pages)).toEqual([]);
    const texts = layoutBoxes(pages, measure).map((each) => each.text);
    for (let i = 0; i < 40; i++) expect(texts.filter((text) => text === `hole ${i}`).length).toBe(3);
    expect(pages.flatMap((page) => page.pictures ?? []).length).toBe(2);
  });

  test('text set over text, and over a picture, is noticed', () => {
    const pages = layOutPartsSheet(withParts(sampleRecord(), OTHERS), PICTURES, measure, VIEWS);
    expect(pageFaults(pages)).toEqual([]);
    const page = pages[1]!;
    const text = page.shapes.find((shape) => shape.shape === 'text')!;
    expect(pageFaults([{ ...page, shapes: [...page.shapes, text] }]).length).toBe(1);
    const [shown] = page.pictures!;
    const over = { ...text, x: shown!.x + 5, y: shown!.y + 5 };
    expect(pageFaults([{ ...page, shapes: [...page.shapes, over] }]).length).toBeGreaterThanOrEqual(1);
  });
});
