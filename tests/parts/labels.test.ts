import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { joinTexts, type Label, placeLabels, type Ring, spread } from '../../src/parts/labels.ts';

const ring: Ring = {
  radiusMm: 30,
  tickGapMm: 1.2,
  moveMm: 2,
  gapMm: 2.2,
  widthMm: (text) => 2.5 * text.length,
};
const mm = (deg: number) => (deg * Math.PI * ring.radiusMm) / 180;

test('texts are joined as spans where they run on', () => {
  expect(joinTexts(['S', '1', '2', '3', '12'])).toBe('S,1-3,12');
  expect(joinTexts(['4', '5'])).toBe('4,5');
  expect(joinTexts(['S'])).toBe('S');
});

test('spread keeps order and widths and moves as little as it can', () => {
  expect(spread([0, 0], [2, 2])).toEqual([-1, 1]);
  expect(spread([0, 5], [2, 2])).toEqual([0, 5]);
  expect(spread([0, 1, 2], [3, 3, 3])).toEqual([-2, 1, 4]);
});

describe('placing', () => {
  test('taps in line share one tick and one text', () => {
    const labels: Label[] = [
      { text: 'S', angleDeg: 0, tap: null },
      ...Array.from({ length: 12 }, (_, i) => ({ text: `${i + 1}`, angleDeg: 0, tap: i + 1 })),
    ];
    const placed = placeLabels(labels, ring)!;
    expect(placed.texts).toEqual([{ text: 'S,1-12', angleDeg: 0, ticksDeg: [0] }]);
  });

  test('numbers far apart stand at their own angle', () => {
    const placed = placeLabels(
      [
        { text: '1', angleDeg: 350, tap: 1 },
        { text: '2', angleDeg: 100, tap: 2 },
      ],
      ring,
    )!;
    expect(placed.texts.map((t) => [t.text, Math.round(t.angleDeg) % 360])).toEqual([
      ['1', 350],
      ['2', 100],
    ]);
  });

  test('nothing overlaps, nothing strays, every tick is true', () => {
    let runs = 0;
    let full = 0;
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0, max: 359.9, noNaN: true }), { minLength: 1, maxLength: 26 }),
        (angles) => {
          runs++;
          const labels = angles.map((angleDeg, i) => ({ text: `${i + 1}`, angleDeg, tap: i + 1 }));
          const placed = placeLabels(labels, ring);
          if (!placed) return;
          full++;
          const texts = placed.texts.filter((t) => t.text !== '').sort((a, b) => a.angleDeg - b.angleDeg);
          for (const [i, a] of texts.entries()) {
            if (texts.length < 2) break;
            const b = texts[(i + 1) % texts.length]!;
            const apart = b.angleDeg - a.angleDeg + (i + 1 === texts.length ? 360 : 0);
            expect(mm(apart)).toBeGreaterThanOrEqual(
              (ring.widthMm(a.text) + ring.widthMm(b.text)) / 2 + ring.gapMm - 1e-6,
            );
          }
          for (const { angleDeg, ticksDeg } of texts) {
            expect(Math.abs(mm(angleDeg - (ticksDeg[0]! + ticksDeg[ticksDeg.length - 1]!) / 2))).toBeLessThan(2 + 1e-6);
            expect(ticksDeg.length).toBeLessThanOrEqual(3);
          }
          const ticks = placed.texts.flatMap((t) => t.ticksDeg);
          for (const angle of angles) {
            const off = ticks.map((tick) => Math.abs(((tick - angle + 540) % 360) - 180));
            // A chain of near ticks becomes one in its middle; three in a row already span two gaps.
            expect(mm(Math.min(...off))).toBeLessThan(ring.tickGapMm * 3);
          }
        },
      ),
      { seed: 42, numRuns: 300 },
    );
    console.log(`${full} of ${runs} rings placed`);
    expect(full).toBeGreaterThan(250);
  });

  test('a crowded ring leaves numbers out but keeps their ticks', () => {
    const small: Ring = { ...ring, radiusMm: 13 };
    const labels = Array.from({ length: 24 }, (_, i) => ({ text: `${i + 1}`, angleDeg: 15 * i, tap: i + 1 }));
    const placed = placeLabels(labels, small)!;
    expect(placed.leftOut).toBeGreaterThan(0);
    expect(placed.texts.flatMap((t) => t.ticksDeg)).toHaveLength(24);
  });
});
