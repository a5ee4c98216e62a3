/** A file of one kind given to a verb for another: one fault, with the verb that takes it. */
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { readLotFile } from '../../src/job/lot-file.ts';
import { readOldCoil } from '../../src/job/old-coil-file.ts';
import { readJob } from '../../src/job/read.ts';
import { COILS } from '../../templates/coils/coils.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';
import { LOTS } from '../../templates/lots/lots.ts';
import { MATCHES } from '../../templates/matches/matches.ts';

const READERS = { plan: readJob, survey: readCoilFile, match: readOldCoil, lot: readLotFile } as const;
const FILES = [
  ...STARTERS.map(({ text }) => ['plan', text, 'a job', 'want'] as const),
  ...COILS.map(({ text }) => ['survey', text, 'a measured coil', 'coil'] as const),
  ...MATCHES.map(({ text }) => ['match', text, 'an old coil', 'old'] as const),
  ...LOTS.map(({ text }) => ['lot', text, 'a lot', 'coils'] as const),
];
const PAIRS = FILES.flatMap(([own, text, is, key]) =>
  Object.entries(READERS).flatMap(([verb, read]) => (verb === own ? [] : [{ own, verb, text, is, key, read }])),
);

describe('a file of another kind', () => {
  it.each(PAIRS)('$is given to $verb', ({ own, text, is, key, read }) => {
    expect.assertions(1);
    try {
      read(text, 'x.yaml');
    } catch (error) {
      expect(error instanceof Fault ? error.faults : error).toEqual([
        {
          code: 'other-kind',
          place: { file: 'x.yaml', line: text.split('\n').findIndex((line) => line.startsWith(`${key}:`)) + 1, key },
          got: is,
          expected: expect.stringContaining(', with at least'),
          todo: `give it to: coilwright ${own} x.yaml`,
        },
      ]);
    }
  });

  it('a table of jobs given to plan', () => {
    expect.assertions(2);
    try {
      readJob('job,quantity\na.yaml,3\n', 'orders.csv');
    } catch (error) {
      if (!(error instanceof Fault)) throw error;
      expect(error.faults).toHaveLength(1);
      expect(error.faults[0]).toMatchObject({
        got: 'a lot',
        place: { line: 1 },
        todo: 'give it to: coilwright lot orders.csv',
      });
    }
  });
});
