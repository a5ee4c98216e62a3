import { expect, test } from 'vitest';
import { type SheetsOutcome, sheetsOutcome } from './sheets.ts';

// A short run of `npm run check:sheets`, other seeds than its own.
const FROM = 900_001;
const COUNT = 5;

test('sheets of random jobs: no text over another, outside its frame, or too small', () => {
  const outcomes = Array.from({ length: COUNT }, (_, i) => sheetsOutcome(FROM + i));
  const of = (result: SheetsOutcome['result']) => outcomes.filter((one) => one.result === result);
  const pages = of('made').reduce((sum, one) => sum + one.pages, 0);
  console.log(
    `random jobs: ${outcomes.length}, ${of('made').length} with sheets (${pages} pages), ${of('refused').length} refused`,
  );
  expect(of('failed')).toEqual([]);
  expect(of('made').length).toBeGreaterThan(1);
});
