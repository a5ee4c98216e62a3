/** What to do about a coil that reads high or low, against the rings of the changed coil, pair by pair. */
import { describe, expect, it } from 'vitest';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { inductanceUh, type Winding } from '../coil/brute.ts';
import { jobOf, RANGE, TUBE } from '../helpers/jobs.ts';

const CLOSE = recordOf(jobOf({ ...RANGE, wire: ['0.5 mm enamel'], winding: { pitch: 'close' } }), '1.2.3');
const SPACED = recordOf(jobOf({ ...TUBE, wire: ['26 AWG enamel'] }), '1.2.3');
const GROOVE = recordOf(jobOf(RANGE), '1.2.3');
const RECORDS: readonly [string, CoilRecord][] = [
  ['a close winding', CLOSE],
  ['a tube with a spacer', SPACED],
  ['a groove', GROOVE],
];

/** Half of the last digit that is written, 0.01 %, and what six figures and positions to 0.1 um leave. */
const PERCENT = 0.0075;

const windingOf = ({ windings: [one] }: CoilRecord): Winding => ({
  places: one!.turnPositionsMm,
  turns: one!.turns,
  pitchMm: one!.pitchMm,
  meanDiameterMm: one!.meanDiameterMm,
  bareMm: one!.wire.bareMm,
});

describe.each(RECORDS)('advice for %s', (name, record) => {
  const winding = windingOf(record);
  const { taps } = record.windings[0]!;
  const nominal = (tap: number) => inductanceUh(winding, taps[tap - 1]!.turn);

  it('says what a turn off does, to each tap', () => {
    const off = record.corrections.find(({ doing }) => doing.startsWith('1 turn off'))!;
    const hole = record.holes.find(({ label }) => label === 'F-1')!;
    const wanted = 100 * (inductanceUh(winding, hole.turn!) / nominal(taps.length) - 1);
    expect(Math.abs(off.tapsPercent.at(-1)! - wanted)).toBeLessThan(PERCENT);
    expect(off.tapsPercent.slice(0, -1).every((percent) => percent === 0)).toBe(true);
  });

  it('says what spreading the first turns does', () => {
    const each = record.corrections.find(({ kind }) => kind === 'start');
    if (record === GROOVE) {
      expect(each).toBeUndefined();
      return;
    }
    const wire = record.windings[0]!.wire.overallMm;
    // A gap at turn t is spread over the turn round it: a ring at u moves by the share of it that lies behind t - 1/2.
    const whole = Math.floor(winding.turns + 1e-9);
    const places = Array.from(winding.places, (place, i) => {
      const u = i < whole ? i + 0.5 : (whole + winding.turns) / 2;
      const moved = [1, 2, 3, 4, 5].reduce((sum, turn) => sum + Math.min(1, Math.max(0, u - turn + 0.5)), 0);
      return place + wire * moved;
    });
    taps.forEach(({ turn }, i) => {
      const wanted = 100 * (inductanceUh({ ...winding, places }, turn) / nominal(i + 1) - 1);
      expect(Math.abs(each!.tapsPercent[i]! - wanted)).toBeLessThan(PERCENT);
    });
  });

  it('says section by section what a turn, a millimetre and a shift do', () => {
    let checked = 0;
    const whole = Math.floor(winding.turns + 1e-9);
    for (const { tap, fewPercent, manyPercent, millimetrePercent, degreesPerPercent } of record.advice) {
      const { turn } = taps[tap - 1]!;
      const from = taps[tap - 2]?.turn ?? 0;
      const by = (uh: number) => 100 * (uh / nominal(tap) - 1);
      expect(Math.abs(fewPercent - by(inductanceUh(winding, turn - 1)))).toBeLessThan(PERCENT);
      if (turn + 1 <= winding.turns)
        expect(Math.abs(manyPercent - by(inductanceUh(winding, turn + 1)))).toBeLessThan(PERCENT);
      expect(manyPercent).toBeGreaterThan(0);
      const places = Array.from(winding.places, (place, i) => {
        const u = i < whole ? i + 0.5 : (whole + winding.turns) / 2;
        return place + Math.min(1, Math.max(0, (u - from) / (turn - from)));
      });
      expect(Math.abs(millimetrePercent - by(inductanceUh({ ...winding, places }, turn)))).toBeLessThan(PERCENT);
      // Moved on or back by that, it reads a percent more or less, give or take the bend of the curve.
      const back = by(inductanceUh(winding, turn - degreesPerPercent / 360));
      expect(Math.abs(back + 1)).toBeLessThan(0.06);
      checked++;
    }
    console.log(`advice for ${name}: ${checked} taps against rings, pair by pair`);
    expect(checked).toBe(taps.length);
  });

  it('trims only outside the limits, every reading once, to where the coil comes nearest', () => {
    const { readingUh, lowUh, highUh } = record.measuring.meter.at(-1)!;
    const trims = record.corrections.filter(({ kind }) => kind === 'trim');
    let readings = 0;
    for (let share = 0.94; share <= 1.06; share += 0.0007) {
      const reading = readingUh! * share;
      const said = trims.filter(
        ({ fromUh, toUh }) =>
          (fromUh !== null || toUh !== null) &&
          reading > (fromUh ?? 0) &&
          reading <= (toUh ?? Number.POSITIVE_INFINITY),
      );
      expect([share, said.length]).toEqual([share, reading > lowUh! && reading <= highUh! ? 0 : 1]);
      if (said.length === 0) continue;
      const left = (percent: number) => Math.abs(share * (1 + percent / 100) - 1);
      const best = Math.min(...trims.map(({ tapsPercent }) => left(tapsPercent.at(-1)!)));
      // Effects are written to 0.01 %.
      expect(left(said[0]!.tapsPercent.at(-1)!) - best).toBeLessThan(0.0002);
      readings++;
    }
    console.log(`advice for ${name}: ${readings} readings outside the limits`);
    expect(readings).toBeGreaterThan(20);
  });
});

it('a tap less than a turn from the finish has a turn to come for its advice', () => {
  const record = recordOf(
    jobOf({
      ...RANGE,
      want: { inductance: '3 uH to 12 uH', taps: 15, spacing: 'even turns' },
      wire: ['0.5 mm enamel'],
      winding: { 'tap-layout': 'staggered' },
    }),
    '1.2.3',
  );
  const { taps, turns } = record.windings[0]!;
  const before = taps.at(-2)!;
  expect(before.turn + 1).toBeGreaterThan(turns);
  const { manyPercent } = record.advice[before.tap - 1]!;
  // A turn more of about 15 is some 10 % of the inductance.
  expect(manyPercent).toBeGreaterThan(5);
  expect(manyPercent).toBeLessThan(25);
});
