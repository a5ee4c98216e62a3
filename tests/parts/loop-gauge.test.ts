import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { loopGaugeViews } from '../../src/drawing/parts/loop-gauge-views.ts';
import { Fault } from '../../src/fault.ts';
import { loopGaugeDimensions, loopGaugeParts } from '../../src/parts/loop-gauge.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, jigsOf, keepsJigRules } from '../helpers/jigs.ts';
import { sampleRecord } from '../helpers/sample.ts';
import type { Facet } from '../helpers/stl.ts';

function withLoop(loopM: number, overallMm = 0.5): CoilRecord {
  const record = sampleRecord({ surface: 'smooth', turns: [4.5, 9.5], overallMm, bareMm: 0.9 * overallMm });
  return { ...record, tapMethod: { ...record.tapMethod, loopM } };
}

/** Middle of the peg that stands nearest to a place, from the corners of its upright wall. */
function pegAt(facets: readonly Facet[], x: number, y: number): [number, number, number] {
  const wall = facets.flatMap(({ corners, normal }) =>
    Math.abs(normal[2]) < 1e-3 ? corners.filter((c) => c[2] > 5 && Math.hypot(c[0] - x, c[1] - y) < 4) : [],
  );
  const of = (i: 0 | 1) => wall.map((c) => c[i]);
  const [x0, x1, y0, y1] = [Math.min(...of(0)), Math.max(...of(0)), Math.min(...of(1)), Math.max(...of(1))];
  return [(x0 + x1) / 2, (y0 + y1) / 2, (x1 - x0) / 2];
}

/** A thread drawn tight from a point round a circle and back: the outline of the smallest convex shape round both. */
function threadMm(distance: number, r: number): number {
  const n = 20000;
  const touch = Math.acos(r / distance);
  const onPeg = Array.from({ length: n + 1 }, (_, i) => {
    const a = Math.PI - touch - ((2 * Math.PI - 2 * touch) * i) / n;
    return [distance + r * Math.cos(a), r * Math.sin(a)] as const;
  });
  const all = [[0, 0] as const, ...onPeg, [0, 0] as const];
  return all.slice(1).reduce((sum, [x, y], i) => sum + Math.hypot(x - all[i]![0], y - all[i]![1]), 0);
}

function faultOf(record: CoilRecord) {
  try {
    loopGaugeParts(record);
  } catch (error) {
    if (error instanceof Fault) return error.faults[0]!;
    throw error;
  }
  return null;
}

describe('tap-loop gauge', () => {
  test('a wire laid round a peg is as long as the loop, at random', async () => {
    let pegs = 0;
    await fc.assert(
      fc.asyncProperty(
        fc.integer({ min: 40, max: 300 }),
        fc.integer({ min: 10, max: 120 }),
        async (loopMm, overall) => {
          const record = withLoop(loopMm / 1000, overall / 100);
          const d = loopGaugeDimensions(record);
          const [gauge] = await jigsOf(loopGaugeParts(record));
          keepsJigRules(gauge!);
          const edge = -d.lengthMm / 2;
          expect(d.lanes.some(({ halfMm }) => Math.abs(halfMm - loopMm / 2) < 1e-9)).toBe(true);
          for (const { halfMm, pegMm, yMm } of d.lanes) {
            const [x, y, r] = pegAt(gauge!.facets, edge + pegMm, yMm);
            expect(Math.abs(y - yMm)).toBeLessThan(0.02);
            expect(Math.abs(r - d.pegR)).toBeLessThan(0.02);
            // Half a tenth: far less than a hand does, far more than chords do.
            expect(Math.abs(threadMm(x - edge, r + overall / 200) - 2 * halfMm)).toBeLessThan(0.05);
            pegs++;
          }
        },
      ),
      { numRuns: 10, seed: 7 },
    );
    console.log(`loop gauge: ${pegs} pegs measured`);
    expect(pegs).toBeGreaterThan(20);
  });

  test('both legs go into the slot, the figures are beside their pegs', () => {
    const record = withLoop(0.1);
    const d = loopGaugeDimensions(record);
    expect(d.slotMm).toBeGreaterThanOrEqual(2 * record.windings[0]!.wire.overallHighMm + 0.4);
    expect(d.words.map(({ text }) => text)).toEqual(['LOOP 40', 'LOOP 50', 'LOOP 60']);
  });

  test('a loop too short is refused with the least that works', () => {
    const fault = faultOf(withLoop(0.004))!;
    expect(fault.code).toBe('loop-gauge-short');
    expect(fault.got).toContain('4 mm');
    const least = Number(/loops of (\d+) mm/.exec(fault.expected)![1]);
    expect(faultOf(withLoop(least / 1000))).toBeNull();
    expect(faultOf(withLoop((least - 1) / 1000))?.code).toBe('loop-gauge-short');
  });

  test('its views have the size of the part', () => {
    const record = withLoop(0.1);
    const [{ expected }] = loopGaugeParts(record) as [ReturnType<typeof loopGaugeParts>[number]];
    const [plan, elevation] = loopGaugeViews(record)['loop-gauge']!;
    expect(extentOf(plan!)[0]).toBeCloseTo(2 * expected.maxMm[0], 6);
    expect(extentOf(plan!)[1]).toBeCloseTo(2 * expected.maxMm[1], 6);
    expect(extentOf(elevation!)[1]).toBeCloseTo(expected.maxMm[2], 6);
  });
});
