import fc from 'fast-check';
import { expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';

/** What a slip of the hand, or malice, may put into a file. */
const SLIPS = [
  '',
  ' ',
  '\n',
  '\t',
  ':',
  '- ',
  '[',
  ']',
  '{',
  '}',
  '"',
  "'",
  '#',
  '&a ',
  '*a',
  '!!x ',
  '---\n',
  '%',
  '0',
  '-',
  '1e999',
  'null',
  '~',
  '\u0000',
  '\ud800',
  '\u202e',
  'é',
  '? ',
  '|',
  '>',
  '<<: ',
  '__proto__: ',
  ',',
  'uH',
  'mm',
  '.nan',
];

/** A place in the text, how much of it goes, what comes instead. */
const slip = fc.record({
  at: fc.integer({ min: 0, max: 9999 }).map((n) => n / 10_000),
  cut: fc.integer({ min: 0, max: 4 }),
  put: fc.constantFrom(...SLIPS),
});

it('any damaged starter is read whole or refused with faults that say something', () => {
  let ran = 0;
  let refused = 0;
  const texts = STARTERS.map(({ text }) => text.replace(/^\s*#.*\n/gm, ''));
  fc.assert(
    fc.property(fc.constantFrom(...texts), fc.array(slip, { minLength: 1, maxLength: 2 }), (text, slips) => {
      ran += 1;
      let damaged = text;
      for (const { at, cut, put } of slips) {
        const place = Math.floor(at * damaged.length);
        damaged = damaged.slice(0, place) + put + damaged.slice(place + cut);
      }
      try {
        const job = readJob(damaged, 'x');
        expect(JSON.stringify(job)).not.toContain('null,null');
        const { instruments, ...shop } = job.shop;
        const figures = [job.printer, shop, instruments!]
          .flatMap((section) => Object.values(section))
          .filter((one) => typeof one !== 'string' && typeof one !== 'boolean' && one !== null);
        expect(figures.flat().every(Number.isFinite)).toBe(true);
      } catch (error) {
        if (!(error instanceof Fault)) throw error;
        refused += 1;
        expect(error.exit).toBe(3);
        expect(error.faults.length).toBeGreaterThan(0);
        for (const { code, got, expected, todo, place } of error.faults) {
          expect([code, got, expected, todo].every((part) => part.length > 0 && part.length < 600)).toBe(true);
          expect(place?.file).toBe('x');
        }
      }
    }),
    { seed: 23, numRuns: 1500 },
  );
  console.log(`damaged jobs: ${ran}, refused: ${refused}`);
  expect(refused).toBeGreaterThan(500);
  expect(ran - refused).toBeGreaterThan(20);
});
