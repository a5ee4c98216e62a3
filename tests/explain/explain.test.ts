import { describe, expect, test } from 'vitest';
import { showExplain } from '../../cli/show-explain.ts';
import { type ExplainedRecord, type Explanation, explainTap } from '../../src/explain/explain.ts';
import { Fault } from '../../src/fault.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { recordOf } from '../../src/plan.ts';
import { surveyRecordOf } from '../../src/survey.ts';
import { STARTERS, starterJob } from '../helpers/jobs.ts';

const COILS: Record<string, string> = {
  'part turns, sections, finish earthed': `
coil: { former-diameter: 50 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 30.5, pitch: 0.8 mm, taps: [0.4, 7.25, 12, 17.5], earthed: finish }
set: { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, lead: 3 pF, switch: shorted }
`,
  'in sections, disconnected': `
coil: { former-diameter: 50 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 24, pitch: 0.8 mm, taps: [6, 12] }
set: { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, lead: 0 pF, switch: disconnected }
`,
  'without a set': `
coil: { former-diameter: 76.2 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 100, pitch: 0.6 mm, taps: [20, 40, 60, 80] }
at: 1 MHz
`,
};

const records: [string, ExplainedRecord][] = [
  ...STARTERS.map((name): [string, ExplainedRecord] => [name, recordOf(starterJob(name), '0')]),
  ...Object.entries(COILS).map(([name, text]): [string, ExplainedRecord] => [
    name,
    surveyRecordOf(readCoilFile(text, 'coil.yaml'), '0'),
  ]),
];

/**
 * Significant digits or decimals that the record keeps of each figure. The tolerance is one unit in the last of them and 2e-6: the
 * record's places, rounded to 0.1 um, are what is reckoned from here, and half of that is 1e-6 of an inductance.
 */
const KEPT: readonly (readonly [name: RegExp, kept: { digits?: number; decimals?: number; unit?: number }])[] = [
  [/^(place|length over the wires)/, { decimals: 4 }],
  // A millionth of a turn, to which the record keeps turns, is 0.00036 degrees.
  [/^angle/, { unit: 3.6e-4 }],
  [/^wire from/, { decimals: 4 }],
  [/^off the target/, { decimals: 3 }],
  [/^uncertainty/, { digits: 2 }],
  [/edge of the range/, { digits: 5 }],
  [/^second/, { digits: 4 }],
  [/^(resistance at \d[\d.]* kHz|R there|self-capacitance)/, { digits: 4 }],
  [/^(Q|bandwidth|parallel)/, { digits: 3 }],
];

function unitOf(name: string, value: number): number {
  const kept = KEPT.find(([pattern]) => pattern.test(name))?.[1] ?? { digits: 6 };
  if (kept.unit !== undefined) return kept.unit;
  if (kept.decimals !== undefined) return 10 ** -kept.decimals;
  return value === 0 ? 1e-9 : 10 ** (Math.floor(Math.log10(Math.abs(value))) + 1 - (kept.digits ?? 6));
}

interface Checked {
  readonly name: string;
  readonly value: number;
  readonly recorded: number;
}

function recordedOf({ figures }: Explanation): Checked[] {
  return figures
    .flatMap(({ figure, value, recorded, intermediates }) => [{ name: figure, value, recorded }, ...intermediates])
    .flatMap(({ name, value, recorded }) => (recorded === null ? [] : [{ name, value, recorded }]));
}

describe('every figure comes out as the record has it', () => {
  let compared = 0;
  test.each(records)('%s', (_, record) => {
    for (const { tap } of record.windings[0]!.taps) {
      for (const { name, value, recorded } of recordedOf(explainTap(record, tap))) {
        compared++;
        const off = Math.max(0, Math.abs(value - recorded) - 2e-6 * Math.abs(recorded)) / unitOf(name, recorded);
        expect(off, `tap ${tap}, ${name}: ${value} against ${recorded}`).toBeLessThanOrEqual(1.01);
      }
    }
  });
  test('there were figures to compare', () => {
    console.log(`explain: ${compared} figures against ${records.length} records`);
    expect(compared).toBeGreaterThan(400);
  });
});

const LEAST = records[5]![1];

describe('an explanation', () => {
  test('has every part of every figure, all numbers finite', () => {
    for (const [, record] of records) {
      for (const { tap } of record.windings[0]!.taps) {
        for (const figure of explainTap(record, tap).figures) {
          for (const text of [figure.formula, figure.source, figure.error, figure.validity.domain])
            expect(text).not.toBe('');
          const numbers = [figure, ...figure.inputs, ...figure.intermediates].map(({ value }) => value);
          expect(numbers.every(Number.isFinite), figure.figure).toBe(true);
        }
      }
    }
  });

  test('by hand and by the ring sum agree as the error says, and the differences add up', () => {
    for (const [, record] of records) {
      for (const { tap, turn } of record.windings[0]!.taps) {
        const { figures } = explainTap(record, tap);
        const hand = figures.find(({ figure }) => figure === 'inductance by hand');
        const rings = figures.find(({ figure }) => figure === 'inductance, low frequency')!;
        expect(hand === undefined).toBe(turn < 1);
        if (hand === undefined) continue;
        const at = (start: string) => rings.intermediates.find(({ name }) => name.startsWith(start))!.value;
        const parts = at('- rings') + at('- the part turn') + at('- turns that');
        expect(parts).toBeCloseTo(rings.value - hand.value, 9);
        expect(at('difference')).toBeCloseTo(parts, 9);
        // 0.1 % of the law itself, the rest is what gaps and part turns do to the few turns of a low tap.
        expect(Math.abs(hand.value / rings.value - 1), `tap ${tap}`).toBeLessThan(0.01);
      }
    }
  });

  test('the inputs and steps written down give the figure by school arithmetic', () => {
    const { figures } = explainTap(LEAST, 2);
    const of = (figure: string) => figures.find((one) => one.figure.startsWith(figure))!;
    const value = (figure: string, name: string) =>
      [...of(figure).inputs, ...of(figure).intermediates].find((one) => one.name.startsWith(name))!.value;
    const hand = (name: string) => value('inductance by hand', name);
    const radius = hand('mean diameter') / 2e3;
    const mu0 = 4e-7 * Math.PI;
    const n = hand('turns');
    const sheet = (mu0 * Math.PI * radius ** 2 * n ** 2 * hand("Nagaoka's K")) / (hand('electrical length') / 1e3);
    const L = sheet - mu0 * radius * n * (hand("Rosa's A") + hand("Rosa's B"));
    expect(of('inductance by hand').value / (L * 1e6)).toBeCloseTo(1, 9);
    const ohm = ((0.017241 * value('resistance at direct', 'wire in circuit')) / (Math.PI * 0.5 ** 2)) * 4;
    expect(of('resistance at direct').value / ohm).toBeCloseTo(1, 9);
    const copper =
      value('resistance at 1000', 'direct') *
      value('resistance at 1000', 'isolated straight wire over') *
      value('resistance at 1000', 'what the other');
    expect((copper + value('resistance at 1000', 'loss of the former')) / of('resistance at 1000').value).toBeCloseTo(
      1,
      9,
    );
    const q = (2e-3 * Math.PI * 1000 * value('Q at', 'inductance')) / value('Q at', 'resistance');
    expect(of('Q at').value / q).toBeCloseTo(1, 9);
    const squares = ['mean diameter', 'pitch', 'bare wire', 'gaps', 'place', 'lead'].map(
      (name) => of('lower limit').intermediates.find((one) => one.name.startsWith(name))!.value,
    );
    expect(of('lower limit').value).toBeCloseTo(of('inductance, low').value - Math.hypot(...squares), 9);
  });

  test.each(['0', '6', 'two', ''])('tap %j is refused, the taps there are named', (asked) => {
    const fault = (() => {
      try {
        explainTap(LEAST, asked);
        return null;
      } catch (error) {
        return error;
      }
    })();
    expect(fault).toBeInstanceOf(Fault);
    expect((fault as Fault).exit).toBe(2);
    expect((fault as Fault).faults[0]!.expected).toContain('1, 2, 3, 4, 5');
  });

  test('fits every page from 40 to 110 columns and says where a law does not hold', () => {
    for (const columns of [40, 80, 110]) {
      for (const [, record] of records) {
        const text = showExplain(explainTap(record, 1), { columns });
        const longest = Math.max(...text.split('\n').map((line) => line.length));
        expect(longest, `${columns}`).toBeLessThanOrEqual(columns);
        expect(text).not.toMatch(/NaN|undefined|null|Infinity/);
      }
    }
    const lowest = showExplain(explainTap(records[3]![1], 2), { columns: 80 });
    expect(lowest).toContain('NOT SO HERE');
  });
});
