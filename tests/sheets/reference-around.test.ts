/** The page on the set around the coil: laid out for few and many contacts, and its figures are those of the record. */
import { describe, expect, test } from 'vitest';
import type { Around } from '../../src/record/around-schema.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { Paper } from '../../src/sheets/page.ts';
import { layOutReferenceSheet, referenceFrame, referenceSheet } from '../../src/sheets/reference-sheet.ts';
import { AROUND } from '../../templates/wording/around-sheet.ts';
import { layoutFaults } from '../helpers/layout.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const CHANNELS = [530, 950, 1700];

/** Invented figures, as wide as they come. */
function arranged(taps: number, second: boolean): Around {
  const tap = (i: number) => i + 1;
  const aerials: (number | 'second')[] = [
    ...Array.from({ length: taps }, (_, i) => tap(i)),
    ...(second ? (['second'] as const) : []),
  ];
  const pairs = aerials.flatMap((aerial, a) =>
    Array.from({ length: taps }, (_, d) => ({
      aerial,
      detector: tap(d),
      rows: CHANNELS.filter((_, c) => (a + d + c) % 7 !== 6).map((kHz) => ({
        kHz,
        tap: taps,
        tuningPf: 123.4,
        q: 87.6,
        bandwidthKhz: 12.3,
        outputDb: -((a * 3 + d * 5) % 48) - 0.1 * (a % 9),
        off9Db: taps < 20 && (a + d) % 11 === 10 ? 0.4 : -((a + 2 * d) % 17) - 0.3,
        off10Db: -4,
        off18Db: -8,
        off20Db: -9,
        dead: (a * d) % 5 === 4,
      })),
    })),
  );
  const why = 'The most power into the detector, by the mean over the band. '.repeat(4).trim();
  const best = (['strongest', 'most selective', 'balanced'] as const).map((use, i) => ({
    use,
    aerial: i === 1 && second ? ('second' as const) : 1,
    detector: Math.min(taps, 2),
    outputDb: -4.56,
    off9Db: -7.89,
    why,
  }));
  return {
    second: null,
    aerial: {
      kind: 'horizontal wire',
      capacitancePf: 123.2,
      inductanceUh: 12.04,
      resistanceOhm: 25,
      shunt: null,
      seriesPf: 47,
      to: null,
      source: 'by a formula that takes a few words to tell; '.repeat(4),
    },
    detector: {
      kind: 'germanium diode',
      resistanceKohm: 30,
      capacitancePf: 3,
      with: 'headphones',
      to: null,
      source: 'typical of the kind',
    },
    ranges: Array.from({ length: taps }, (_, i) => ({
      tap: tap(i),
      lowKhz: i === 1 ? null : 480.25,
      highKhz: i === 1 ? null : 1543.2,
      aerial: 1,
      detector: 2,
    })),
    channelsKhz: CHANNELS,
    pairs,
    best,
    notes: ['A remark of some length. '.repeat(8)],
  };
}

function recordWith(taps: number, second: boolean, paper: 'A4' | 'Letter' = 'A4'): CoilRecord {
  const record = sampleRecord({ paper, turns: Array.from({ length: taps }, (_, i) => 10 + 7.5 * i) });
  return { ...record, around: arranged(taps, second) };
}

describe('the set around the coil, laid out', () => {
  test.each([
    [2, false, 'A4'],
    [6, true, 'Letter'],
    [12, true, 'A4'],
    [20, false, 'Letter'],
    [24, false, 'A4'],
    [31, true, 'A4'],
  ] as const)('%d taps: no text over another, none outside, none below 8 pt', (taps, second, paper) => {
    const pages = layOutReferenceSheet(recordWith(taps, second, paper), measure);
    expect(layoutFaults(pages, referenceFrame, measure)).toEqual([]);
    const texts = pages.flatMap(({ shapes }) =>
      shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : [])),
    );
    expect(texts).toContain(AROUND.heading);
    expect(texts.some((text) => text.startsWith(AROUND.map.many.slice(0, 30)))).toBe(taps > 24);
    expect(texts.some((text) => text.startsWith(AROUND.caution))).toBe(true);
  });

  test('nothing of it where the record has none, or only a second winding', () => {
    const plain = sampleRecord({ turns: [10, 20, 30] });
    const pages = layOutReferenceSheet(plain, measure).length;
    const bare: Around = { ...arranged(3, false), aerial: null, detector: null, pairs: [], best: [], ranges: [] };
    expect(layOutReferenceSheet({ ...plain, around: bare }, measure)).toHaveLength(pages);
    expect(layOutReferenceSheet({ ...plain, around: arranged(3, false) }, measure).length).toBeGreaterThan(pages);
  });

  test('the figures in the PDF are those of the record', async () => {
    const record = recordWith(6, true);
    const text = JSON.stringify(await readPdf(await referenceSheet(record)));
    for (const figure of ['123.2 pF', '47 pF', '30 kΩ', '−4.6', '−7.9', '480.3', '1543', AROUND.ranges.nothing])
      expect(text, figure).toContain(figure);
  });
});
