import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { laySections } from '../../src/job/coil/lay.ts';
import { below, quantile } from '../../src/match/figures.ts';
import { jacobian, residuals, stateOf } from '../../src/match/fit.ts';
import { placesOf } from '../../src/match/layout.ts';
import { cholesky, gram, solveWith } from '../../src/match/linear.ts';
import { lostTaps } from '../../src/match/patterns.ts';
import { boundsOf, fractionAt, type Problem, problemOf } from '../../src/match/problem.ts';
import { startOf } from '../../src/match/start.ts';
import { linearised, wholeTurns } from '../../src/match/whole-turns.ts';
import { EMPTY, named, reading } from './coils.ts';

const SEED = 20260601;

describe('whole turns', () => {
  /** Two taps and a whole coil by their places alone, the pitch hardly known: their turns hang together. */
  const problem = (): Problem =>
    problemOf({
      ...EMPTY,
      diameters: [{ of: 'former', how: 'caliper', mm: reading(60, 0.2) }],
      wire: { ...EMPTY.wire, bareMm: reading(0.5, 0.01), overallMm: reading(0.56, 0.01) },
      pitchMm: reading(0.6, 0.02),
      windingLengthMm: reading(30.3, 0.5),
      taps: named([{ positionMm: reading(6.2, 0.4) }, { positionMm: reading(17.9, 0.4) }, {}]),
    });

  it('weighs every set as a least-squares fit with those turns does', () => {
    const one = problem();
    const { state } = startOf(one);
    const rows = [...one.rows, ...boundsOf(one, state.x, state.turns)];
    const free = [0, 1, 2];
    const linear = linearised(rows, jacobian(one, rows, state), free)!;
    const found = wholeTurns(one, linear, state);
    // By brute force: for each set of turns near, the chi-square of the linear problem with the rest solved for.
    const slopes = linear.slopes;
    const chi = (turns: readonly number[]) => {
      const left = Float64Array.from(residuals(rows, state), (value, i) =>
        free.reduce((sum, t) => sum + slopes.turns[i]![t]! * (turns[t]! - state.turns[t]!), value),
      );
      const count = state.x.length;
      const b = new Float64Array(count);
      slopes.x.forEach((row, i) => {
        for (let k = 0; k < count; k++) b[k]! -= row[k]! * left[i]!;
      });
      const step = solveWith(cholesky(gram(slopes.x, count))!, b);
      return left.reduce(
        (sum, value, i) => sum + (value + slopes.x[i]!.reduce((s, v, k) => s + v * step[k]!, 0)) ** 2,
        0,
      );
    };
    const all: { key: string; chi: number }[] = [];
    const [a, b, c] = state.turns as [number, number, number];
    for (let i = -6; i <= 6; i++)
      for (let j = -6; j <= 6; j++)
        for (let k = -8; k <= 8; k++) {
          const turns = [a + i, b + j, c + k];
          all.push({ key: turns.join(' '), chi: chi(turns) });
        }
    const least = Math.min(...all.map((each) => each.chi));
    const sum = all.reduce((total, each) => total + Math.exp(-(each.chi - least) / 2), 0);
    let compared = 0;
    for (const { turns, weight } of found.slice(0, 60)) {
      const brute = all.find(({ key }) => key === turns.join(' '))!;
      // The list leaves out what weighs less than 1e-4 of the best.
      expect(Math.abs(weight - Math.exp(-(brute.chi - least) / 2) / sum)).toBeLessThan(2e-3 * weight + 1e-6);
      compared++;
    }
    console.log(`sets of whole turns against brute force: ${compared} of ${found.length}`);
    expect(compared).toBeGreaterThan(8);
    expect(stateOf(one, state.x, found[0]!.turns).whole).toBe(found[0]!.turns[2]);
  });
});

describe('layout', () => {
  it('lays sections as a measured coil does', () => {
    let checked = 0;
    const turns = fc.integer({ min: 1, max: 40 });
    const mm = fc.double({ min: 0.3, max: 2, noNaN: true });
    fc.assert(
      fc.property(fc.array(fc.tuple(turns, mm, mm), { minLength: 1, maxLength: 4 }), mm, (list, overallMm) => {
        const sections = list.map(([count, pitchMm, gapAfterMm], i) => ({
          turns: count,
          pitchMm,
          gapAfterMm: i === list.length - 1 ? 0 : gapAfterMm,
        }));
        const ends = sections.map((_, i) => sections.slice(0, i + 1).reduce((sum, one) => sum + one.turns, 0));
        const measures = {
          meanMm: 60,
          bareMm: 0.3,
          overallMm,
          tapGapMm: 0,
          pitchMm: sections.map(({ pitchMm }) => pitchMm),
          sectionGapMm: sections.slice(0, -1).map(({ gapAfterMm }) => gapAfterMm),
        };
        const own = placesOf(measures, ends, [], ends[ends.length - 1]!);
        const { places } = laySections(sections, overallMm);
        own.forEach((z, i) => {
          expect(z - own[0]!).toBeCloseTo(places[i]! - places[0]!, 9);
        });
        checked += own.length;
      }),
      { seed: SEED, numRuns: 100 },
    );
    console.log(`turns laid both ways: ${checked}`);
    expect(checked).toBeGreaterThan(1000);
  });
});

describe('limits', () => {
  it('takes quantiles of one normal distribution as tables have them', () => {
    // Abramowitz & Stegun 1964, table 26.1; the formula of 26.2 is good to 1e-6 here.
    for (const [x, share] of [
      [0, 0.5],
      [1, 0.841345],
      [1.959964, 0.975],
      [-1.959964, 0.025],
      [3, 0.99865],
    ] as const) {
      expect(below(x)).toBeCloseTo(share, 5);
      expect(quantile({ centres: [2], weights: [1], sigma: 0.5 }, share)).toBeCloseTo(2 + 0.5 * x, 4);
    }
  });

  it('reaches over to a second place only when it has its share of the weight', () => {
    const two = (weight: number) => quantile({ centres: [0, 10], weights: [1 - weight, weight], sigma: 0.1 }, 0.975);
    expect(two(0.01)).toBeLessThan(1);
    expect(two(0.1)).toBeGreaterThan(9);
  });
});

describe('patterns of lost taps', () => {
  const propose = (turns: readonly number[], lost: number) =>
    lostTaps(
      [{ index: lost, name: `${lost + 1}` }],
      turns.flatMap((turn, index) => (index === lost ? [] : [{ index, turn }])),
    )[0]!;

  it('sees equal steps, growing steps and an equal ratio', () => {
    const cases: readonly (readonly [string, readonly number[]])[] = [
      ['equal steps', [10, 20, 30, 40, 50, 60, 70, 80]],
      ['growing steps', [6, 13, 22, 33, 46, 61, 78, 97]],
      ['equal ratio', [8, 12, 18, 27, 41, 61, 91, 137]],
    ];
    let seen = 0;
    for (const [pattern, turns] of cases)
      for (let lost = 1; lost < turns.length - 1; lost++) {
        const { proposals, candidates } = propose(turns, lost);
        expect(proposals[0]!.pattern).toBe(pattern);
        expect(Math.abs(candidates[0]!.turn - turns[lost]!)).toBeLessThanOrEqual(1);
        expect(proposals.reduce((sum, { confidence }) => sum + confidence, 0)).toBeLessThanOrEqual(1 + 1e-9);
        seen++;
      }
    console.log(`lost taps proposed: ${seen}`);
    expect(seen).toBe(18);
  });

  it('is less sure of a pattern that the others keep loosely, and proposes nothing without two', () => {
    const sure = propose([10, 20, 30, 40, 50, 60, 70, 80], 3).candidates[0]!.weight;
    const loose = propose([10, 23, 28, 40, 52, 58, 74, 80], 3).candidates[0]!.weight;
    expect(loose).toBeLessThan(sure * 0.8);
    expect(lostTaps([{ index: 0, name: '1' }], [{ index: 1, turn: 40 }])[0]!.candidates).toEqual([]);
  });

  it('keeps a turn for every tap between its neighbours', () => {
    const [first, second] = lostTaps(
      [
        { index: 1, name: '2' },
        { index: 2, name: '3' },
      ],
      [
        { index: 0, turn: 10 },
        { index: 3, turn: 13 },
        { index: 4, turn: 40 },
      ],
    );
    expect(first!.candidates.map(({ turn }) => turn)).toEqual([11]);
    expect(second!.candidates.map(({ turn }) => turn)).toEqual([12]);
  });
});

describe('angles', () => {
  it('are parts of a turn the way the winding climbs', () => {
    expect([0, 90, 270, 360].map((angle) => fractionAt(angle, 'right'))).toEqual([0, 0.25, 0.75, 0]);
    expect([0, 90, 270, 360].map((angle) => fractionAt(angle, 'left'))).toEqual([0, 0.75, 0.25, 0]);
  });
});
