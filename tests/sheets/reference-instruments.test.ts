/** The table of generator and probe in the reference sheet: every row of the record, and words for what is taken. */
import { expect, test } from 'vitest';
import { recordOf } from '../../src/plan.ts';
import { Paper } from '../../src/sheets/page.ts';
import { instruments, instrumentWords } from '../../src/sheets/reference-instruments.ts';
import { jobOf, type Parts, RANGE } from '../helpers/jobs.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
const made = (shop: object) => recordOf(jobOf({ ...RANGE, shop } as unknown as Parts), '1.2.3');
const textsOf = (shapes: readonly object[]) => shapes.flatMap((shape) => ('text' in shape ? [String(shape.text)] : []));

test('has a row for each of the record, its tap named once', () => {
  const record = made({ generator: '600 ohm', 'generator-coupling': 'loop' });
  const table = instruments(record, 180, measure)!;
  const { rows } = record.measuring.instruments!;
  expect(table.groups).toHaveLength(rows.length);
  let checked = 0;
  rows.forEach((row, i) => {
    const [tap, pf, alone, , , shows, , width, , q] = table.groups[i]![0]!;
    expect(tap).toBe(rows[i - 1]?.tap === row.tap ? '' : `${row.tap}`);
    expect(Number(pf)).toBe(row.capacitancePf);
    // To the last digit that is printed: a thousandth of a frequency, a hundredth of a width.
    expect(Math.abs(Number(alone) / row.aloneKhz - 1)).toBeLessThan(1e-3);
    expect(Math.abs(Number(shows) / row.frequencyKhz! - 1)).toBeLessThan(1e-3);
    expect(Math.abs(Number(width) / row.widthKhz! - 1)).toBeLessThan(1e-2);
    expect(Math.abs(Number(q) - row.q!)).toBeLessThanOrEqual(0.5);
    checked++;
  });
  console.log(`rows of generator and probe: ${checked}`);
  expect(checked).toBeGreaterThan(3);
  const words = textsOf(instrumentWords(record, 180, measure)!.shapes).join(' ');
  expect(words).toContain('As the job states them: generator of 600 Ω, by a loop so loose');
});

test('says so where nothing was stated, and is not there where nothing is known', () => {
  const words = textsOf(instrumentWords(made({}), 180, measure)!.shapes).join(' ');
  expect(words).toContain(
    'As is usual, for the job does not say: generator of 50 Ω through 1 pF; probe of 10 pF and 10 MΩ.',
  );
  expect([instruments({}, 180, measure), instrumentWords({}, 180, measure)]).toEqual([null, null]);
  // Damped away: a dash stands for each figure.
  const damped = instruments(made({ 'probe-resistance': '20 ohm' }), 180, measure)!;
  for (const [row] of damped.groups) expect(row!.filter((cell) => cell === '–')).toHaveLength(5);
});
