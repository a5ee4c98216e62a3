import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { axialAt } from '../../src/coil/layout.ts';
import { comparison, type MatchRecord } from '../../src/drawing/comparison.ts';
import { comparisonFrame, comparisonSheet, layOutComparisonSheet } from '../../src/sheets/comparison-sheet.ts';
import { Paper } from '../../src/sheets/page.ts';
import { evenTurns, layoutFaults } from '../helpers/layout.ts';
import { type MatchedOptions, matchedRecord } from '../helpers/matched.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { chance } from '../random/jobs.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const textsOf = (record: MatchRecord) =>
  layOutComparisonSheet(record, measure).flatMap((page) =>
    page.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : [])),
  );

const optionsOf = fc.record({
  count: fc.integer({ min: 1, max: 30 }),
  seed: fc.nat(1e6),
  staggered: fc.boolean(),
  hand: fc.constantFrom('right' as const, 'left' as const),
  kind: fc.constantFrom('printed' as const, 'tube' as const),
  paper: fc.constantFrom('A4' as const, 'Letter' as const),
  units: fc.constantFrom('metric' as const, 'inch' as const, 'both' as const),
  diameterMm: fc.integer({ min: 12, max: 160 }),
  ways: fc.constantFrom('differ' as const, 'same' as const, 'one' as const),
  sections: fc.integer({ min: 1, max: 4 }),
  lines: fc.integer({ min: 0, max: 6 }),
  residuals: fc.integer({ min: 0, max: 90 }),
  ranged: fc.boolean(),
});

function recordOf({ count, seed, staggered, ...rest }: typeof optionsOf extends fc.Arbitrary<infer T> ? T : never) {
  const turns = evenTurns(count, Math.max(count, 4 * count + (seed % 60)), staggered);
  const options: MatchedOptions = { ...rest, turns, random: chance(seed) };
  return matchedRecord(options);
}

describe('comparison sheet, laid out', () => {
  test('no text over another, none outside, none below 8 pt, whatever the coils', () => {
    let cases = 0;
    fc.assert(
      fc.property(optionsOf, (options) => {
        const record = recordOf(options);
        const pages = layOutComparisonSheet(record, measure);
        expect(layoutFaults(pages, comparisonFrame, measure)).toEqual([]);
        for (const page of pages) expect(page.shapes.length).toBeGreaterThan(10);
        cases++;
      }),
      { seed: 20, numRuns: 20 },
    );
    console.log(`comparison sheet: ${cases} layouts`);
    expect(cases).toBe(20);
  });

  test('takes two pages for a coil of twelve taps with two readings each and little amiss', () => {
    for (const paper of ['A4', 'Letter'] as const) {
      const turns = evenTurns(12, 72, false);
      const record = matchedRecord({ paper, turns, residuals: 24, lines: 1, ways: 'same' });
      expect(layOutComparisonSheet(record, measure).length).toBe(paper === 'A4' ? 2 : 3);
    }
  });

  test('a record that replaces nothing is refused', () => {
    expect(() => layOutComparisonSheet(sampleRecord(), measure)).toThrow('replaces nothing');
  });
});

describe('both coils drawn', () => {
  test('to one scale, starts at one height, every tap where it lies', () => {
    let checked = 0;
    for (let seed = 1; seed <= 40; seed++) {
      const turns = evenTurns(2 + (seed % 14), 40 + seed, seed % 2 === 0);
      const record = matchedRecord({ turns, hand: seed % 3 ? 'right' : 'left', random: chance(seed) });
      const words = {
        old: 'old',
        new: 'new',
        start: 'S',
        finish: 'F',
        tap: 'tap',
        hand: { right: 'right', left: 'left' },
      };
      const drawn = comparison(record, 186, 100, words, measure, (mm) => mm.toFixed(2));
      const circles = drawn.shapes.flatMap((shape) => (shape.shape === 'circle' && shape.name ? [shape] : []));
      const { scale } = drawn;
      const find = (name: string) => circles.find((one) => one.name === name)!;
      const winding = record.windings[0]!;
      expect([find('old start').y, find('new start').y]).toEqual([0, 0]);
      for (const [name, coil, taps, sense, r] of [
        [
          'old',
          record.matched.old,
          record.matched.old.taps.map((tap) => ({ ...tap, mm: tap.positionMm.value })),
          record.matched.old.hand,
          record.matched.old.formerDiameterMm.value / 2,
        ],
        [
          'new',
          winding,
          winding.taps.map((tap) => ({ ...tap, mm: tap.positionMm - winding.startMm })),
          record.frame.hand,
          record.former.outsideDiameterMm / 2,
        ],
      ] as const) {
        const axis = find(`${name} start`).x;
        for (const tap of taps) {
          const dot = find(`${name} tap ${tap.tap}`);
          expect(dot.y).toBeCloseTo(tap.mm * scale, 9);
          expect(dot.x - axis).toBeCloseTo(r * scale * Math.sin((tap.angleDeg * Math.PI) / 180), 9);
          checked++;
        }
        // The middle of the third turn's front, on the axis.
        const pitch = name === 'old' ? record.matched.old.pitchMm[0]!.value : winding.pitchMm;
        const zero = name === 'old' ? 0 : winding.startMm;
        const at = (axialAt(coil.turnPositionsMm, coil.turns, pitch, 3) - zero) * scale;
        const through = drawn.shapes.filter(
          (shape) =>
            shape.shape === 'polyline' &&
            shape.points.length === 11 &&
            Math.abs(shape.points[5]![0] - axis) < 1e-6 &&
            Math.abs(shape.points[5]![1] - at) < 1e-6,
        );
        expect(through.length).toBe(1);
        const [line] = through;
        if (line?.shape === 'polyline') {
          // On the side that is seen a right-hand coil climbs to the right.
          const climbs = line.points[10]![0] > line.points[0]![0] === line.points[10]![1] > line.points[0]![1];
          expect(climbs).toBe(sense === 'right');
        }
      }
    }
    console.log(`comparison drawing: ${checked} taps where they lie`);
    expect(checked).toBeGreaterThan(500);
  });
});

describe('comparison sheet, read back', () => {
  test('prints old and new of every tap, the limits, and what is known', async () => {
    const record = matchedRecord({ turns: evenTurns(9, 60, true), random: chance(7) });
    const { matched } = record;
    const pdf = await readPdf(await comparisonSheet(record));
    const cells = pdf.pages.flatMap((page) => page.texts.map((one) => one.text));
    const all = cells.join(' ').replace(/\s+/g, ' ');
    let checked = 0;
    const has = (wanted: string) => {
      expect(cells).toContain(wanted);
      checked++;
    };
    const four = (uh: number) => uh.toFixed(uh >= 100 ? 1 : uh >= 10 ? 2 : 3);
    const sign = (value: number) =>
      `${value > 0 ? '+' : ''}${value.toFixed(2)}`.replace('-', '−').replace(/^[+−]0\.00$/, '0.00');
    for (const each of matched.comparison) {
      const old = matched.old.taps[each.tap - 1]!;
      has(`old, ${old.by}`);
      has(each.oldPositionMm.toFixed(2));
      has(each.newPositionMm.toFixed(2));
      has(`${Number(each.oldTurn.toFixed(3))}${old.determined ? '' : '?'}`);
      has(four(each.newUh));
      has(`${four(old.inductanceUh.low)} – ${four(old.inductanceUh.high)}`);
      has(sign(each.workingPercent));
      has(each.oldQ.toFixed(0));
      has(each.newQ.toFixed(0));
    }
    for (const { diameter } of [{ diameter: matched.old.formerDiameterMm }]) {
      has(`${diameter.value.toFixed(2)} mm`);
      has(`${diameter.low.toFixed(2)} mm – ${diameter.high.toFixed(2)} mm`);
    }
    for (const { key } of matched.residuals) has(key);
    for (const tap of matched.old.taps)
      if (!tap.determined) expect(all).toContain(`${tap.turn} (${(100 * tap.candidates[0]!.weight).toFixed(0)} %)`);
    for (const words of ['Confidence 71 %', 'standard deviations off', 'now ±3.21 %, then ±1.23 %', 'as it was'])
      expect(all).toContain(words);
    console.log(`comparison sheet: ${checked} printed figures agree with the record`);
    expect(checked).toBe(9 * 9 + 2 + matched.residuals.length);
    expect([pdf.title, pdf.printScaling, pdf.language]).toEqual([`Comparison sheet: ${record.job}`, 'None', 'en']);
  });

  test('is the same for the same record; one way, both in one, and nothing amiss are told', async () => {
    const record = matchedRecord({ random: chance(3) });
    const [first, second] = [await comparisonSheet(record), await comparisonSheet(record)];
    expect(Buffer.compare(Buffer.from(first), Buffer.from(second))).toBe(0);
    const calm = matchedRecord({ ways: 'same', lines: 0, ranged: false });
    const texts = textsOf(calm).join(' ');
    for (const words of ['come to the same coil', 'contradicts the others', 'Every turn follows', 'would narrow'])
      expect(texts).toContain(words);
    expect(texts).not.toContain('from kHz');
    expect(texts).not.toContain('Lost taps');
    const one = textsOf(matchedRecord({ ways: 'one' })).join(' ');
    expect(one).toContain('do not go with where the tap');
    expect(one).not.toContain('Both ways, tap by tap');
  });

  test('writes inches where they are wanted', () => {
    const record = matchedRecord({ units: 'inch' });
    const texts = textsOf(record);
    for (const { oldPositionMm } of record.matched.comparison)
      expect(texts).toContain((oldPositionMm / 25.4).toFixed(4));
    // Wires keep the name they are sold by.
    expect(texts.filter((text) => /\d mm\b/.test(text) && !/enamel|silk/.test(text))).toEqual([]);
  });
});
