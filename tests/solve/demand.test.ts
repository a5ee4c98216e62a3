import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Job } from '../../src/job/job.ts';
import { recordOf } from '../../src/plan.ts';
import { type CoilView, demandOf, fewestPositions, positionsFor } from '../../src/solve/demand.ts';
import { hasCoil } from '../../src/solve/search.ts';
import { BAND, change, jobOf, type Parts, RANGE } from '../helpers/jobs.ts';

/** A made-up coil, L = n^1.5 up to 30 turns, with one self-capacitance for all sections. */
const view = (selfPf: number): CoilView => ({
  selfPf: () => selfPf,
  at: (n) => n ** 1.5,
  turnFor: (uh) => uh ** (1 / 1.5),
});

const range = (spacing: string) =>
  demandOf(jobOf(change(RANGE, 'want', { inductance: '16 uH to 144 uH', taps: 5, spacing })), 0);

/** L in uH that tunes to f in kHz with C in pF. */
const tuned = (kHz: number, pF: number) => 1e15 / ((2 * Math.PI * kHz) ** 2 * pF) / 1e3;

describe('demands of an inductance range', () => {
  it('go by even ratio', () => {
    // 144/16 = 9, four steps of the factor sqrt 3.
    const targets = range('even ratio').targetsUh(view(0));
    for (const [i, uh] of [16, 27.7128, 48, 83.1384, 144].entries()) expect(targets[i]).toBeCloseTo(uh, 3);
  });

  it('go by even turns', () => {
    // 16 uH at 16^(2/3) = 6.3496 turns, 144 uH at 27.4731, steps of 5.2809 turns.
    const targets = range('even turns').targetsUh(view(0));
    for (const [i, n] of [6.3496, 11.6305, 16.9114, 22.1922, 27.4731].entries())
      expect(targets[i]).toBeCloseTo(n ** 1.5, 2);
  });

  it('go by even frequency', () => {
    // 1/sqrt(L) from 1/4 to 1/12 in four steps of 1/24.
    const targets = range('even frequency').targetsUh(view(0));
    for (const [i, root] of [4, 24 / 5, 6, 8, 12].entries()) expect(targets[i]).toBeCloseTo(root ** 2, 6);
  });

  it('are those of a list as listed', () => {
    const demand = demandOf(jobOf({ ...RANGE, want: { inductance: ['10 uH', '33 uH', '0.1 mH'] } }), 0);
    expect(demand.taps).toBe(3);
    expect(demand.targetsUh(view(0))).toEqual([10, 33, 100]);
  });
});

describe('demands of a band', () => {
  const band = (want: Record<string, unknown>, set: Record<string, unknown> = {}) =>
    jobOf(change(change(BAND, 'want', want), 'set', set));

  it('reach both edges and overlap alike, self-capacitance counted', () => {
    // 15 to 380 pF with 72 pF, and 4 pF of the coil: 91 to 456 pF, a position covers sqrt(456/91) = 2.2385.
    const demand = demandOf(band({}), 4);
    const targets = demand.targetsUh(view(4));
    expect(demand.taps).toBe(2);
    expect(targets[1]).toBeCloseTo(tuned(530, 456), 6);
    expect(targets[0]).toBeCloseTo(tuned(1700, 91), 6);
    const three = demandOf(band({ taps: 3 }), 4).targetsUh(view(4));
    // Upper edges in even ratio: 1700, sqrt(1700 x 1186.42), 1186.42 kHz.
    expect(three[1]).toBeCloseTo(tuned(Math.sqrt(1700 * 530 * Math.sqrt(456 / 91)), 91), 6);
  });

  it('take the fewest positions that fill it: so many do, one fewer does not', () => {
    let cases = 0;
    const number = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(number(1.05, 40), number(1.1, 4), number(0, 0.5), (ratio, cover, overlap) => {
        const n = fewestPositions(ratio, cover, overlap);
        // From the lower edge up: each position goes on where the one below ends, less the overlap.
        const reach = (positions: number) => cover * (cover / (1 + overlap)) ** (positions - 1);
        if (cover <= 1 + overlap) {
          // More positions gain nothing: one must do.
          expect(n).toBe(ratio <= cover ? 1 : Number.POSITIVE_INFINITY);
        } else {
          expect(reach(n)).toBeGreaterThan(ratio * (1 - 1e-6));
          if (n > 1) expect(reach(n - 1)).toBeLessThan(ratio);
        }
        cases++;
      }),
      { numRuns: 1000, seed: 530 },
    );
    console.log(`fewest positions: ${cases} bands`);
    expect(cases).toBeGreaterThan(0);
    const job = band({});
    if (job.want.kind !== 'band' || job.set === null) throw new Error('a band');
    expect(positionsFor(job.want, job.set, 4)).toBe(2);
  });
});

describe('the record of a band', () => {
  const ONE = change(BAND, 'former', { 'outside-diameter': '76 mm' });
  /** Bands with the taps left out. */
  const BANDS: readonly [string, Parts][] = [
    ['two positions', ONE],
    ['three positions', change(ONE, 'want', { band: '530 kHz to 3200 kHz' })],
    ['one position', change(ONE, 'want', { band: '600 kHz to 1200 kHz' })],
    ['where only the coil tells whether two are enough', change(BAND, 'want', { band: '530 kHz to 2540 kHz' })],
    [
      'long wave, a wide overlap',
      change(change(ONE, 'want', { band: '150 kHz to 420 kHz', overlap: '20 %' }), 'former', { longest: '220 mm' }),
    ],
    [
      'staggered',
      { ...change(ONE, 'want', { band: '1.6 MHz to 12 MHz' }), winding: { 'tap-layout': 'staggered', hand: 'left' } },
    ],
    ['on a tube', { ...change(BAND, 'former', { kind: 'tube', 'outside-diameter': '3 in' }), wire: ['26 AWG enamel'] }],
  ];

  const withTaps = (parts: Parts, taps: number, overlap: unknown): Job =>
    jobOf(change(parts, 'want', { taps, overlap }));

  it.each(BANDS)('covers it with the overlap and no position too many: %s', (_, parts) => {
    const record = recordOf(jobOf(parts), '0');
    const { demand } = record;
    const ranges = record.windings[0]!.taps.map((tap) => tap.range!);
    expect(ranges.length).toBe(demand.taps);
    // A fifth of a percent is less than the width of a dial mark, and what whole degrees and turns leave.
    expect(ranges.at(-1)!.lowKhz).toBeLessThan(demand.bandLowKhz! * 1.002);
    expect(ranges[0]!.highKhz).toBeGreaterThan(demand.bandHighKhz! * 0.998);
    for (let i = 1; i < ranges.length; i++)
      expect(ranges[i]!.highKhz / ranges[i - 1]!.lowKhz - 1).toBeGreaterThan(demand.overlapPercent! / 100 - 0.002);
    if (demand.taps > 1) expect(hasCoil(withTaps(parts, demand.taps - 1, `${demand.overlapPercent} %`))).toBe(false);
  });

  it('keeps the number of positions that is asked, with no overlap asked', () => {
    const record = recordOf(jobOf({ ...BAND, want: { band: '530 kHz to 1700 kHz', taps: 4 } }), '0');
    expect([record.demand.taps, record.demand.overlapPercent, record.windings[0]!.taps.length]).toEqual([4, 0, 4]);
    const overlaps = record.windings[0]!.taps.slice(1).map(
      (tap, i) => tap.range!.highKhz / record.windings[0]!.taps[i]!.range!.lowKhz,
    );
    // Spread evenly: a whole turn of the first tap is 3 % in frequency.
    expect(Math.max(...overlaps) / Math.min(...overlaps)).toBeLessThan(1.06);
  });
});
