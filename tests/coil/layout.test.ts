import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { angleOf, axialAt, type Gap, layTurns, turnMiddles } from '../../src/coil/layout.ts';

const RUNS = { numRuns: 300, seed: 20 };
const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** Whole turns, turns of whole degrees, and anything. */
const turns = fc.oneof(
  fc.integer({ min: 1, max: 80 }),
  fc.integer({ min: 200, max: 28800 }).map((degrees) => degrees / 360),
  number(0.3, 80),
);
const coil = fc.record({
  turns,
  pitchMm: number(0.1, 5),
  startMm: number(3, 30),
  gaps: fc.array(fc.record({ share: number(0, 1), gapMm: number(0, 3) }), { maxLength: 12 }),
});
const laid = coil.map(({ turns: n, pitchMm, startMm, gaps }) => {
  const list: Gap[] = gaps.map(({ share, gapMm }) => ({ turn: share * n, gapMm }));
  return { turns: n, pitchMm, startMm, gaps: list, places: layTurns(n, pitchMm, list, startMm) };
});

describe('the layout of turns', () => {
  it('has one place a turn, rising, each further by the pitch at least', () => {
    let cases = 0;
    fc.assert(
      fc.property(laid, ({ turns: n, pitchMm, places }) => {
        cases++;
        const middles = turnMiddles(n);
        expect(places.length).toBe(Math.ceil(n - 1e-9));
        for (let i = 1; i < places.length; i++)
          expect(places[i]! - places[i - 1]!).toBeGreaterThan(pitchMm * (middles[i]! - middles[i - 1]!) - 1e-9);
      }),
      RUNS,
    );
    console.log(`layout: ${cases} windings rise`);
    expect(cases).toBeGreaterThan(0);
  });

  it('passes through its own places, without a jump and never backwards', () => {
    fc.assert(
      fc.property(laid, number(-2, 3), ({ turns: n, pitchMm, gaps, places }, share) => {
        const middles = turnMiddles(n);
        middles.forEach((u, i) => {
          expect(axialAt(places, n, pitchMm, u)).toBeCloseTo(places[i]!, 9);
        });
        const u = share * n;
        const step = 1e-6;
        const climb = axialAt(places, n, pitchMm, u + step) - axialAt(places, n, pitchMm, u);
        // A gap lies within one turn: no place is steeper than the pitch and all gaps in one turn, and a part turn at
        // the end may have its middle less than half a turn after the one before.
        const steepest = pitchMm + gaps.reduce((sum, gap) => sum + gap.gapMm, 0);
        expect(climb).toBeGreaterThan(0);
        expect(climb).toBeLessThan(steepest * step * 1.001 + 1e-11);
      }),
      RUNS,
    );
  });

  it('is an even helix where no tap pushes, part turns included', () => {
    fc.assert(
      fc.property(turns, number(0.1, 5), number(3, 30), number(-1, 2), (n, pitch, start, share) => {
        const places = layTurns(n, pitch, [], start);
        expect(axialAt(places, n, pitch, share * n)).toBeCloseTo(start + pitch * share * n, 8);
      }),
      RUNS,
    );
  });

  it('is longer by the sum of its gaps', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 4, max: 80 }),
        number(0.1, 5),
        fc.array(fc.record({ share: number(0, 1), gapMm: number(0, 3) }), { maxLength: 12 }),
        (n, pitch, gaps) => {
          // Gaps whose turn lies wholly between the first middle and the last.
          const list = gaps.map(({ share, gapMm }) => ({ turn: 1 + share * (n - 2), gapMm }));
          const places = layTurns(n, pitch, list, 7);
          const length = axialAt(places, n, pitch, n) - axialAt(places, n, pitch, 0);
          expect(length).toBeCloseTo(n * pitch + list.reduce((sum, gap) => sum + gap.gapMm, 0), 8);
        },
      ),
      RUNS,
    );
  });

  it('moves the ring after a tap by the whole gap and the ring before it not at all', () => {
    const even = layTurns(20, 0.6, [], 10);
    const pushed = layTurns(20, 0.6, [{ turn: 8, gapMm: 0.4 }], 10);
    expect(Array.from(pushed, (z, k) => Math.round((z - even[k]!) * 1e9) / 1e9)).toEqual([
      ...Array.from({ length: 8 }, () => 0),
      ...Array.from({ length: 12 }, () => 0.4),
    ]);
    // At a tap in the middle of a turn the ring that holds it takes half.
    const shared = layTurns(20, 0.6, [{ turn: 8.5, gapMm: 0.4 }], 10);
    expect([7, 8, 9].map((k) => Math.round((shared[k]! - even[k]!) * 1e9) / 1e9)).toEqual([0, 0.2, 0.4]);
  });
});

describe('the angle of a place', () => {
  it('lies in [0, 360), mirrored between the hands, 0 at every whole turn', () => {
    let cases = 0;
    fc.assert(
      fc.property(number(0, 100), (turn) => {
        cases++;
        const right = angleOf(turn, 'right');
        const left = angleOf(turn, 'left');
        for (const angle of [right, left]) {
          expect(angle).toBeGreaterThanOrEqual(0);
          expect(angle).toBeLessThan(360);
        }
        expect((right + left) % 360).toBeCloseTo(0, 3);
        // Rounded to 0.1 millidegree.
        const apart = Math.abs(right - 360 * (turn - Math.floor(turn)));
        expect(Math.min(apart, 360 - apart)).toBeLessThanOrEqual(5.1e-5);
      }),
      { numRuns: 500, seed: 21 },
    );
    for (let turn = 0; turn < 50; turn++) expect([angleOf(turn, 'right'), angleOf(turn, 'left')]).toEqual([0, 0]);
    for (const turn of [11.9999999999, 12.0000000001]) {
      expect(angleOf(turn, 'right')).toBe(0);
      expect(angleOf(turn, 'left')).toBe(0);
    }
    expect([angleOf(3.25, 'right'), angleOf(3.25, 'left'), angleOf(-0.1, 'right')]).toEqual([90, 270, 324]);
    console.log(`angles: ${cases} places`);
    expect(cases).toBeGreaterThan(0);
  });
});
