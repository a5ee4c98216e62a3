/** Aerial, detector and the table in the record of a plan. */
import { beforeAll, describe, expect, it } from 'vitest';
import { aerialImpedance } from '../../src/around/aerial.ts';
import { tunedTo } from '../../src/around/response.ts';
import { type Arrangement, portsOf } from '../../src/around/table.ts';
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { recordOf } from '../../src/plan.ts';
import { arrangementOf } from '../../src/record/around-arrangement.ts';
import type { Around } from '../../src/record/around-schema.ts';
import { workingCoilOf } from '../../src/record/rebuild.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

const JOB = `job: Shed receiver
want: { inductance: 25 uH to 240 uH, taps: 5 }
set: { capacitor: 15 pF to 380 pF }
wire: [24 AWG enamel]
former: { outside-diameter: 76 mm }
`;
const WIRE = 'aerial: { kind: horizontal wire, length: 20 m, height: 8 m, series: 47 pF }\n';
const planned = (more: string) => recordOf(readJob(JOB + more, 'shed.yaml'), '0');

let record: CoilRecord;
let around: Around;
let bare: CoilRecord;
beforeAll(() => {
  record = planned(`${WIRE}detector: { kind: germanium diode }\n`);
  around = record.around!;
  bare = planned('');
});

describe('the set around the coil in the record', () => {
  it('is absent where the job says nothing of it, and changes nothing of the coil', () => {
    expect(bare.around).toBeUndefined();
    expect(record.windings).toEqual(bare.windings);
    expect(record.hash).not.toBe(bare.hash);
    expect(record.cautions.join(' ')).toContain('unplug it and earth it before a storm');
    expect(bare.cautions.join(' ')).not.toContain('before a storm');
  });

  it('has aerial and detector with values, sources and what was taken', () => {
    // 2 pi epsilon0 l/(F(a) - F(2h)): 123.2 pF; l^2/(3 c^2 C): 12.04 uH.
    expect(around.aerial).toMatchObject({
      kind: 'horizontal wire',
      capacitancePf: 123.2,
      inductanceUh: 12.04,
      resistanceOhm: 25,
      seriesPf: 47,
      shunt: null,
      to: null,
    });
    expect(around.aerial!.source).toMatch(/Howe 1914.*common practice/);
    expect(around.detector).toMatchObject({ kind: 'germanium diode', resistanceKohm: 30, capacitancePf: 3, to: null });
    expect(around.detector!.source).toContain('common practice, from memory');
    expect(record.assumed).toMatchObject({ 'aerial.resistance': '25 ohm', 'detector.resistance': '30 kohm' });
  });

  it('has every pair, over the band, and 0 dB once at each frequency', () => {
    expect(around.pairs.map(({ aerial, detector }) => `${aerial}/${detector}`)).toEqual(
      [1, 2, 3, 4, 5].flatMap((a) => [1, 2, 3, 4, 5].map((d) => `${a}/${d}`)),
    );
    expect(around.channelsKhz).toHaveLength(7);
    const { taps } = record.windings[0]!;
    expect(around.channelsKhz[0]).toBeCloseTo(taps.at(-1)!.range!.lowKhz, 0);
    for (const kHz of around.channelsKhz) {
      const levels = around.pairs.flatMap(({ rows }) => rows.filter((row) => row.kHz === kHz));
      for (const { tuningPf, outputDb } of levels) {
        expect(tuningPf).toBeGreaterThanOrEqual(15);
        expect(tuningPf).toBeLessThanOrEqual(380);
        expect(outputDb).toBeLessThanOrEqual(0);
      }
      if (levels.length > 0) expect(Math.max(...levels.map(({ outputDb }) => outputDb))).toBe(0);
    }
  });

  it('says the same as the coil rebuilt from the record', () => {
    const arrangement: Arrangement = {
      coil: workingCoilOf(record),
      rest: 'open',
      lossTangent: record.surroundings.formerLossTangent,
      second: null,
      capacitorLowPf: 15,
      capacitorHighPf: 380,
      strayPf: 12,
      source: aerialImpedance(around.aerial!),
      load: { conductance: 1 / 30e3, capacitance: 3e-12 },
    };
    let ran = 0;
    for (const { aerial, detector, rows } of around.pairs.slice(0, 8))
      for (const row of rows.slice(0, 3)) {
        const ports = portsOf(arrangement, arrangement.coil.taps[row.tap - 1]!, row.kHz);
        const found = tunedTo(
          ports,
          { aerial: { at: aerial!, source: arrangement.source }, detector: { at: detector, load: arrangement.load } },
          row.kHz,
        )!;
        // Three figures of Q, a tenth of a picofarad, and the rounding of the record's places.
        expect(Math.abs(found.q / row.q - 1)).toBeLessThan(0.006);
        expect(Math.abs(found.tuningPf - 12 - row.tuningPf)).toBeLessThan(0.06);
        ran++;
      }
    console.log(`rows of a record worked out again: ${ran}`);
    expect(ran).toBeGreaterThan(15);
  });

  it('tells the three pairs and why, and ranges that the aerial lowers', () => {
    expect(around.best.map(({ use }) => use)).toEqual(['strongest', 'most selective', 'balanced']);
    for (const { why, off9Db } of around.best) {
      expect(why).toMatch(/loaded Q \d+.* where the coil alone has \d+/);
      expect(why).toContain(`${off9Db.toFixed(1).replace('-', '−')} dB (mean)`);
    }
    const [strongest, selective] = around.best;
    expect(selective!.off9Db).toBeLessThanOrEqual(strongest!.off9Db);
    expect(around.ranges.map(({ tap }) => tap)).toEqual([1, 2, 3, 4, 5]);
    for (const { tap, lowKhz, highKhz } of around.ranges) {
      const alone = record.windings[0]!.taps[tap - 1]!.range!;
      expect(lowKhz).toBeLessThan(alone.lowKhz);
      expect(highKhz).toBeLessThan(alone.highKhz);
    }
  });

  it('is plain data for a netlist: aerial from its source to its contact, and both contacts', () => {
    const { aerial, aerialAt, detector, detectorAt } = arrangementOf(around);
    expect(aerial.map(({ kind, from, to }) => `${kind} ${from} ${to}`)).toEqual([
      'R source a1',
      'C a1 a2',
      'L a2 a3',
      'C a3 contact',
    ]);
    expect(detector).toEqual({ resistance: 30e3, capacitance: 3e-12 });
    const balanced = around.best[2]!;
    expect([aerialAt, detectorAt]).toEqual([balanced.aerial, balanced.detector]);
  });
});

describe('parts of it', () => {
  it('named contacts are the only ones; what the job leaves out is told', () => {
    const one = planned('aerial: { to: tap 1, series: 20 pF }\n').around!;
    expect([...new Set(one.pairs.map(({ aerial }) => aerial))]).toEqual([1]);
    expect(one.detector).toBeNull();
    expect(one.aerial).toMatchObject({ kind: 'dummy', capacitancePf: 200, inductanceUh: 20, seriesPf: 20, to: 1 });
    expect(one.notes.join(' ')).toContain('The job has no detector');
    const other = planned('detector: { to: tap 2 }\n').around!;
    expect(other.pairs.map(({ aerial, detector }) => [aerial, detector])).toEqual([[null, 2]]);
    expect(other.notes.join(' ')).toContain('The job has no aerial');
    expect(arrangementOf(other)).toMatchObject({ aerial: [], aerialAt: null, detectorAt: 2 });
  });

  it('a tap that the coil has not is refused, and the last one offered', () => {
    let ran = 0;
    for (const key of ['aerial', 'detector']) {
      try {
        planned(`${key}: { to: tap 9 }\n`);
      } catch (error) {
        if (!(error instanceof Fault)) throw error;
        expect([error.exit, error.faults]).toEqual([
          4,
          [
            {
              code: 'no-such-tap',
              place: { file: 'shed.yaml', line: 6, key: `${key}.to` },
              got: 'tap 9 of a coil with 5 positions',
              expected: 'tap 1 to tap 5',
              todo: 'write tap 5, or best',
            },
          ],
        ]);
        ran++;
      }
    }
    expect(ran).toBe(2);
  });
});
