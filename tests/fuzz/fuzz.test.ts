import { expect, it } from 'vitest';
import { Fault, type FaultParts } from '../../src/fault.ts';
import { fuzzOutcome } from '../random/fuzz.ts';
import { dataFlaws, faultFlaws, nameFlaws, shownFlaws } from './check.ts';
import { KINDS } from './sources.ts';

it('damaged files of every kind are read whole or refused with place, value and expectation', async () => {
  const seen = new Map<string, number>();
  const failed: string[] = [];
  for (let seed = 20_001; seed <= 20_120; seed++) {
    const { kind, result, said } = await fuzzOutcome(seed, Number.POSITIVE_INFINITY);
    // The size of the process is that of all tests before: only the run in processes of its own tells it.
    if (result === 'failed') failed.push(`seed ${seed} (${kind}): ${said[0]}`);
    for (const key of [kind, result]) seen.set(key, (seen.get(key) ?? 0) + 1);
  }
  console.log(`damaged files: ${[...seen].map(([what, n]) => `${what} ${n}`).join(', ')}`);
  expect(failed).toEqual([]);
  for (const kind of KINDS) expect(seen.get(kind), kind).toBeGreaterThan(9);
  for (const result of ['refused', 'made']) expect(seen.get(result), result).toBeGreaterThan(0);
});

it('the checks see a refusal that lacks something, and data that are none', () => {
  const good: FaultParts = {
    code: 'value',
    place: { file: 'x', line: 2, key: 'want' },
    got: 'a',
    expected: 'b',
    todo: 'c',
  };
  expect(faultFlaws(new Fault(3, good), 2, '')).toEqual([]);
  expect(shownFlaws(new Fault(3, good))).toEqual([]);
  const planted: readonly [string, Fault][] = [
    ['no fault', new Fault(3, [])],
    ['no code', new Fault(3, { ...good, code: 'No Code' })],
    ['no got', new Fault(3, { ...good, got: ' ' })],
    ['no expectation', new Fault(3, { ...good, expected: '' })],
    ['nothing to do', new Fault(3, { ...good, todo: '' })],
    ['no place', new Fault(3, { ...good, place: undefined })],
    ['behind the end', new Fault(3, { ...good, place: { file: 'x', line: 3 } })],
    ['endless', new Fault(3, { ...good, got: 'x'.repeat(701) })],
    ['a slip of the program', new Fault(3, { ...good, got: 'undefined' })],
    ['half a character', new Fault(3, { ...good, got: '\ud83d' })],
  ];
  for (const [what, fault] of planted) expect(faultFlaws(fault, 2, ''), what).not.toEqual([]);
  expect(dataFlaws({ a: [1, Number.NaN] })).toEqual(['$.a[1] is NaN']);
  expect(dataFlaws({ a: Object.create({ b: 1 }) })).toEqual(['$.a has a prototype of its own']);
  for (const name of ['', 'a\u202eb', 'a\nb', '\ud83d']) expect(nameFlaws(name, 'x')).not.toEqual([]);
  for (const folder of ['..', 'a/b', 'A', '-a', '', 'x'.repeat(61)]) expect(nameFlaws('x', folder)).not.toEqual([]);
  console.log(`planted: ${planted.length + 2} and ${4 + 6} names`);
});
