/** A few of the faults that `npm run check:faults` plays at length: the built program is killed, and meets itself in one folder. */
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { scratch } from '../output/folder.ts';
import { jobsIn, must, random, told } from './ground.mjs';
import { killOnce, meetOnce } from './kills.mjs';

/** On a machine that has much else to do. */
const BUSY_MS = 240_000;

it(
  'killed, or two at once: one whole output, and what is not ours',
  async () => {
    const base = scratch();
    const words = (await jobsIn(base, ['survey'])).get('survey')!;
    const from = performance.now();
    await must(base, [...words, '--out', 'expected']);
    const wholeMs = performance.now() - from;
    const expected = told(join(base, 'expected'));
    expect(expected).toContain('plan.json');
    let killed = 0;
    let done = 0;
    if (await killOnce({ base: join(base, 'killed'), words, expected, wholeMs, next: random(2) })) killed++;
    done++;
    await meetOnce({
      base: join(base, 'met'),
      words: [words],
      expected: [expected],
      count: 2,
      wholeMs,
      // A new folder, and neither of the two killed.
      next: () => 0.9,
    });
    done++;
    console.log(`faults played on the built program: ${done}, ${killed} of them a run killed before it ended`);
    expect(done).toBe(2);
  },
  BUSY_MS,
);
