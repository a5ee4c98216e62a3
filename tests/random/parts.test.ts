import { expect, test } from 'vitest';
import { type Outcome, partsOutcome } from './parts.ts';

// A short run of `npm run check:parts`, other seeds than its own.
const FROM = 900_001;
const COUNT = 8;

test('random jobs give parts that pass every check on their bytes, or are refused with a reason', async () => {
  const outcomes: Outcome[] = [];
  for (let seed = FROM; seed < FROM + COUNT; seed++) outcomes.push(await partsOutcome(seed, false));
  const of = (result: Outcome['result']) => outcomes.filter((one) => one.result === result);
  const files = of('made').reduce((sum, { said }) => sum + said.length, 0);
  console.log(
    `random jobs: ${outcomes.length}, ${of('made').length} made (${files} files), ${of('refused').length} refused`,
  );
  expect(of('failed')).toEqual([]);
  expect(of('made').length).toBeGreaterThan(COUNT / 4);
  expect(files).toBeGreaterThan(of('made').length);
}, 60_000);
