/** The same job, the same bytes; `npm run check:same` does it for every starter and more surroundings. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { scratch } from '../output/folder.ts';
import { jobsIn } from './ground.mjs';
import { differences, outcomeIn, programsIn, surroundings } from './same-bytes.mjs';

/** On a machine that has much else to do. */
const BUSY_MS = 240_000;

it(
  'whatever the locale, zone, cores, folder and age of the job; the record says which version made it',
  async () => {
    const base = scratch();
    const words = (await jobsIn(base, ['plan'])).get('plan')!;
    const all = surroundings();
    const how = {
      ...all['Turkish, half hours'],
      ...all['another folder, tight mask, old files'],
      ...all['one core'],
      inputs: ['small.yaml'],
    };
    const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { readonly version: string };
    const [first, found] = await Promise.all([outcomeIn(base, words, {}, 'first'), outcomeIn(base, words, how)]);
    expect(programsIn(join(base, 'first'), first)).toEqual([`coilwright ${version}`]);
    expect(differences(first, found)).toEqual([]);
    const compared = first.split('\n').length - 1;
    console.log(`files compared with those made in other surroundings: ${compared}`);
    expect(compared).toBeGreaterThan(8);
  },
  BUSY_MS,
);

it('a byte that differs, or a file too many, is seen', () => {
  expect(differences('a 1\nb 2\n', 'a 1\nb 3\nc 4\n').sort()).toEqual(['b', 'c']);
});
