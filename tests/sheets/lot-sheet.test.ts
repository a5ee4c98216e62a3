/** The lot sheet: its figures are sums of the records, its lists lose nothing, its beds lie as the record says. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { inside, shapeBox } from '../../src/drawing/boxes.ts';
import { boughtFor } from '../../src/lot/bought.ts';
import { serialRanges } from '../../src/lot/serial-ranges.ts';
import { partsOf } from '../../src/parts/parts.ts';
import { entriesOf } from '../../src/record/printed.ts';
import type { CoilRecord, PartEntry } from '../../src/record/schema.ts';
import { layOutLotSheet, lotSheet, lotSheetFrame } from '../../src/sheets/lot-sheet.ts';
import { type Page, Paper } from '../../src/sheets/page.ts';
import { HOW } from '../../templates/wording/steps.ts';
import { layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { type LotSample, lotOf } from '../helpers/lot.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });

/** With its former, arbor and winding stand as parts. */
function withParts(record: CoilRecord): CoilRecord {
  const wanted: CoilRecord['wanted'] = ['former', 'arbor', 'stand'];
  return { ...record, wanted, parts: entriesOf(partsOf({ ...record, wanted })) };
}

const printed = withParts(sampleRecord({ job: 'Harbour receiver' }));
const tube: CoilRecord = {
  ...sampleRecord({ kind: 'tube', surface: 'smooth', job: 'Light on the tube' }),
  tapMethod: { ...printed.tapMethod, name: 'lug', how: HOW.lug(0, (mm) => `${mm} mm`) },
  cautions: ['Wire under tension and cut ends fly: wear eye protection.', 'Clamp the tube to drill it.'],
};
const spaced: CoilRecord = {
  ...tube,
  job: 'Spaced',
  windings: [{ ...tube.windings[0]!, pitchKind: 'spacer', spacerMm: 0.4, spacerName: 'button thread' }],
};

const sample = (options: Parameters<typeof lotOf>[1] = {}) =>
  lotOf(
    [
      { record: printed, quantity: 13, prefix: 'HR' },
      { record: tube, quantity: 5, prefix: 'LT' },
      { record: spaced, quantity: 2, prefix: 'SP' },
    ],
    options,
  );

const pagesOf = ({ lot, kinds }: LotSample) => layOutLotSheet(lot, kinds, measure);
const textsOf = (pages: readonly Page[]) => layoutBoxes(pages, measure).map(({ text }) => text);

function faultsOf(pages: readonly Page[]): string[] {
  const faults = layoutFaults(pages, lotSheetFrame, measure);
  pages.forEach((page, i) => {
    for (const shape of page.shapes)
      if (!inside(shapeBox(shape, measure), lotSheetFrame(page), 0.01))
        faults.push(`page ${i + 1}: ${shape.shape} outside`);
  });
  return faults;
}

/** Cells of the row of a table whose first text is this, from left to right. */
function rowOf(
  pages: readonly Page[],
  first: string,
  isRow: (cells: readonly string[]) => boolean = () => true,
): string[] {
  const boxes = layoutBoxes(pages, measure);
  for (const at of boxes.filter(({ text }) => text === first)) {
    const row = boxes
      .filter(
        ({ page, box }) => page === at.page && Math.abs(box.bottom - at.box.bottom) < 0.3 && box.left > at.box.left,
      )
      .sort((a, b) => a.box.left - b.box.left)
      .map(({ text }) => text);
    if (isRow(row)) return row;
  }
  throw new Error(`no row of ${first}`);
}

describe('figures', () => {
  test('kinds, wires, reels and plastic are those of the record, totals their sums', () => {
    const whole = sample();
    const { lot } = whole;
    const pages = pagesOf(whole);
    const texts = textsOf(pages);
    let rows = 0;
    for (const kind of lot.kinds) {
      const row = rowOf(pages, kind.kind, (cells) => cells[0] === kind.job);
      expect(row.slice(1, 3)).toEqual([`${kind.quantity}`, `${kind.taps}`]);
      expect(row).toContain(kind.cutM.toFixed(2));
      rows++;
    }
    for (const spool of lot.spools) {
      const row = rowOf(pages, spool.spool);
      expect(row.slice(1, 5)).toEqual([
        spool.leftM.toFixed(2),
        spool.usedM.toFixed(2),
        spool.restM.toFixed(2),
        `${spool.serials.length}`,
      ]);
      expect(row.slice(5).join(' ')).toBe(serialRanges(spool.serials));
      rows++;
    }
    const sum = (values: readonly number[]) => values.reduce((all, value) => all + value, 0);
    const needed = sum(lot.kinds.map(({ quantity, cutM }) => quantity * cutM));
    const grams = sum(lot.kinds.map(({ quantity, cutG }) => quantity * cutG));
    expect(texts).toContain(`20 coils of 3 kinds; ${needed.toFixed(2)} m of wire, ${grams.toFixed(0)} g.`);
    const [buy] = lot.toBuy;
    expect(sum(buy!.coils.map(({ cutM }) => cutM))).toBeCloseTo(buy!.totalM, 9);
    expect(texts).toContain(
      `${buy!.wire}: ${buy!.totalM.toFixed(2)} m, ${buy!.totalG.toFixed(buy!.totalG < 100 ? 1 : 0)} g.`,
    );
    const plastic = sum(lot.beds.map(({ massG, count }) => massG * count));
    const [material] = lot.materials;
    const told = rowOf(pages, material!.material, (cells) => /^\d+$/.test(cells[0] ?? ''));
    expect(lot.materials.length).toBe(2);
    expect(Number(told[0])).toBeCloseTo(material!.solidG, -0.5);
    // Each of the two is told to a gram.
    expect(Math.abs(Number(rowOf(pages, 'all')[0]) - plastic)).toBeLessThan(1);
    console.log(`lot sheet: ${rows} rows held against the record`);
    expect(rows).toBeGreaterThan(7);
  });

  test('every coil to buy for and every run are listed; cautions once', () => {
    const whole = sample({ share: 0.4 });
    const { lot, kinds } = whole;
    const texts = textsOf(pagesOf(whole));
    const said = texts.join(' ');
    for (const { coils } of lot.toBuy) {
      const of = (letter: string) =>
        coils.flatMap(({ serial }) =>
          lot.coils.find((coil) => coil.serial === serial)!.kind === letter ? [serial] : [],
        );
      // Kinds B and C take the same length: they stand in one row.
      for (const range of serialRanges(of('A')).split(', ')) expect(said).toContain(range);
    }
    for (const { runs } of lot.runs) for (const { serials } of runs) expect(said).toContain(serialRanges(serials));
    for (const caution of new Set([...kinds.values()].flatMap(({ cautions }) => cautions)))
      expect(texts.filter((text) => text === caution).length).toBe(1);
    expect(texts).toContain('Take care');
  });

  test('what else is bought: tubes, thread, lugs, screws of the parts on the beds', () => {
    const { lot, kinds } = sample();
    const bought = boughtFor(lot, kinds);
    const amount = (what: RegExp) => bought.find((each) => what.test(each.what))?.amount;
    const long = `${tube.former.lengthMm}`;
    expect(bought.find(({ what }) => what === `tube, phenolic paper, 60 × ${long} mm, bore 54.6 mm`)?.amount).toBe('7');
    expect(amount(/^lug of 0.5 mm sheet, 4 mm wide$/)).toBe(`${7 * (tube.windings[0]!.taps.length - 1)}`);
    const metres = 2 * spaced.windings[0]!.wireLengthM;
    expect(amount(/^spacer, button thread$/)).toBe(`${Math.ceil(metres)} m at least`);
    const onBeds = (part: PartEntry) =>
      lot.beds.reduce((all, bed) => all + bed.count * bed.items.filter((item) => item.part === part.part).length, 0);
    const screws = new Map<string, number>();
    for (const part of printed.parts)
      for (const [, count, size] of part.use.matchAll(/(?:(four) )?(M4 x \d+(?: countersunk)?) screw/g))
        screws.set(size!, (screws.get(size!) ?? 0) + onBeds(part) * (count === 'four' ? 4 : 1));
    let checked = 0;
    for (const [size, count] of screws) {
      const named = bought.filter(({ what }) => what.startsWith(`${size} screw`));
      expect(
        named.reduce((all, each) => all + Number(each.amount), 0),
        size,
      ).toBe(count);
      checked++;
    }
    console.log(`lot sheet: ${checked} sorts of screws, ${bought.length} things to have ready`);
    expect(checked).toBeGreaterThan(2);
    expect(bought.every(({ kinds: of }) => of.length > 0)).toBe(true);
  });
});

describe('beds', () => {
  test('every piece is drawn where it lies, to scale, and named', () => {
    const whole = sample();
    const pages = pagesOf(whole);
    const texts = textsOf(pages).join(' ');
    let pieces = 0;
    for (const bed of whole.lot.beds) {
      const names = new Set(bed.items.map(({ name }) => name));
      for (const name of names) expect(texts.replace(/\s+/g, ' ')).toContain(name);
      const scale = Math.min(54 / bed.bedXMm, 54 / bed.bedYMm);
      for (const { kind, part, turned } of bed.items) {
        const [across, deep] = whole.kinds.get(kind)!.parts.find((each) => each.part === part)!.sizeMm;
        const size = turned ? [deep! * scale, across! * scale] : [across! * scale, deep! * scale];
        const drawn = pages.some(({ shapes }) =>
          shapes.some((shape) => {
            if (shape.shape !== 'polyline' || shape.fill !== 0.94) return false;
            const { left, right, bottom, top } = shapeBox(shape, measure);
            return Math.abs(right - left - size[0]!) < 1e-6 && Math.abs(top - bottom - size[1]!) < 1e-6;
          }),
        );
        expect(drawn, `${part} on bed ${bed.bed}`).toBe(true);
        pieces++;
      }
    }
    console.log(`lot sheet: ${pieces} pieces on ${whole.lot.beds.length} beds drawn`);
    expect(pieces).toBeGreaterThan(10);
  });

  test('a part that the record of its kind does not have is our mistake', () => {
    const { lot, kinds } = sample();
    const bed = lot.beds[0]!;
    const beds = [{ ...bed, items: [{ ...bed.items[0]!, part: 'nothing' }] }];
    expect(() => layOutLotSheet({ ...lot, beds }, kinds, measure)).toThrow(/nothing/);
  });
});

describe('layout', () => {
  test.each(['A4', 'Letter'] as const)(
    '%s: nothing overlaps or leaves the frame over random lots and names',
    (paper) => {
      let runs = 0;
      const name = fc.oneof(
        fc.stringMatching(/^[A-Za-zÄöß ,.'-]{1,80}$/).filter((text) => text.trim() !== ''),
        fc.constant('Unbroken'.repeat(10)),
      );
      const cases = fc.record({
        quantities: fc.array(fc.integer({ min: 1, max: 30 }), { minLength: 1, maxLength: 9 }),
        units: fc.constantFrom('metric' as const, 'inch' as const, 'both' as const),
        name,
        job: name,
        reel: name,
        share: fc.constantFrom(0, 0.5, 1),
      });
      fc.assert(
        fc.property(cases, ({ quantities, units, name: lotName, job, reel, share }) => {
          const entries = quantities.map((quantity, i) => ({
            record: { ...[printed, tube, spaced][i % 3]!, job, units },
            quantity,
            prefix: `K${i}-LONG`,
          }));
          const pages = pagesOf(lotOf(entries, { paper, name: lotName, share, reelNames: (n) => `${reel} ${n}` }));
          expect(faultsOf(pages)).toEqual([]);
          runs++;
        }),
        { seed: 8, numRuns: 7 },
      );
      console.log(`lot sheet on ${paper}: ${runs} random lots`);
      expect(runs).toBe(7);
    },
  );

  test('text over text is noticed', () => {
    const pages = pagesOf(sample());
    expect(faultsOf(pages)).toEqual([]);
    const page = pages[0]!;
    const text = page.shapes.find((shape) => shape.shape === 'text')!;
    expect(faultsOf([{ ...page, shapes: [...page.shapes, text] }]).length).toBe(1);
  });

  test('as a PDF: title, sheet numbers, same bytes', async () => {
    const { lot, kinds } = sample({ paper: 'Letter' });
    const [one, two] = [await lotSheet(lot, kinds), await lotSheet(lot, kinds)];
    expect(Buffer.compare(one, two)).toBe(0);
    const pdf = await readPdf(one);
    expect(pdf.title).toBe('Lot sheet: Harbour sets, spring');
    pdf.pages.forEach(({ texts }, i) => {
      expect(texts.some(({ text }) => text === `sheet ${i + 1} of ${pdf.pages.length}`)).toBe(true);
    });
  });
});
