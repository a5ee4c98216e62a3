import { expect, test } from 'vitest';
import { coverageOf, kindsOf, turnsOf } from './coverage.ts';
import { type MatchOutcome, matchOutcome } from './match.ts';

// A short run of `npm run check:match`, other seeds than its own, and coils of fewer turns.
const FROM = 900_001;
const COUNT = 60;
const MOST_TURNS = 40;

test('the truth lies within the stated limits of an inferred coil, and determined turns are right', () => {
  const outcomes: MatchOutcome[] = [];
  for (let seed = FROM; outcomes.filter(({ result }) => result === 'inferred').length < COUNT; seed++) {
    expect(seed - FROM).toBeLessThan(2 * COUNT);
    outcomes.push(matchOutcome(seed, MOST_TURNS));
  }
  expect(outcomes.filter(({ result }) => result === 'failed')).toEqual([]);
  const all = coverageOf(outcomes, null);
  const turns = turnsOf(outcomes);
  const sure = turns.filter(({ determined }) => determined);
  const count = sure.reduce((sum, one) => sum + one.count, 0);
  const right = sure.reduce((sum, one) => sum + one.right, 0);
  const open = turns.find(({ kind, determined }) => kind === 'inferred' && !determined)!;
  console.log(
    `random coils: ${outcomes.length}, ${COUNT} inferred; ${all.percent.toFixed(1)} % of ${all.figures} figures within their limits ` +
      `(±${all.byCoils.toFixed(1)}), ${all.halfPercent.toFixed(0)} % within half; ${right} of ${count} determined turns right, ${open.right} of ${open.count} left open`,
  );
  // 95 %, give or take 2 and, of so few coils whose figures share their errors, twice the error of the share.
  expect(all.percent).toBeGreaterThan(93 - 2 * all.byCoils);
  expect(all.percent).toBeLessThan(97 + 2 * all.byCoils);
  // Limits that were merely wide would hold nearly all within half.
  expect(all.halfPercent).toBeGreaterThan(55);
  expect(all.halfPercent).toBeLessThan(80);
  for (const kind of kindsOf(outcomes)) {
    const one = coverageOf(outcomes, kind);
    expect(one.percent, kind).toBeGreaterThan(93 - 4 * Math.max(one.alone, one.byCoils));
  }
  // Said to be determined from 95 % of the weight on.
  expect(count).toBeGreaterThan(100);
  expect(right).toBeGreaterThanOrEqual(0.95 * count);
  // What is left open is wrong now and then, or it would have been said to be determined.
  expect(open.count).toBeGreaterThan(10);
  expect(open.right).toBeLessThan(open.count);
}, 60_000);
