import { describe, expect, it } from 'vitest';
import { nearest } from '../../src/job/nearest.ts';

const KEYS = ['name', 'date', 'want', 'band', 'plan', 'tap-method', 'outside-diameter', 'paper'];

describe('the nearest known word', () => {
  it.each([
    ['nmae', 'name'],
    ['bnd', 'band'],
    ['pln', 'plan'],
    ['papper', 'paper'],
    ['Tap Method', 'tap-method'],
    ['tapmethd', 'tap-method'],
    ['outside_diametre', 'outside-diameter'],
  ])('%s is taken for %s', (typed, meant) => {
    expect(nearest(typed, KEYS)).toBe(meant);
  });

  it.each([
    ['name', ['date', 'job']],
    ['want', ['band', 'coil']],
    ['colour', ['kind', 'wall']],
    ['x'.repeat(61), KEYS],
    ['name', []],
  ])('%s is near none of its list', (typed, known) => {
    expect(nearest(typed, known)).toBeNull();
  });
});
