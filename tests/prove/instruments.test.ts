/** Readings with generator and probe: asked where the job states them, written as CSV, taken back and judged. */
import { describe, expect, it } from 'vitest';
import { judge, questionsOf, SHORTED_FROM } from '../../src/bench/judge.ts';
import { rowOf, toCsv } from '../../src/bench/readings-csv.ts';
import { recordOf } from '../../src/plan.ts';
import { judgeCoil } from '../../src/prove/judge.ts';
import { Asking } from '../../src/prove/judge-at.ts';
import { readReadings } from '../../src/prove/read.ts';
import { proofSchema } from '../../src/prove/schema.ts';
import { proofOf } from '../../src/prove.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { jobOf, type Parts } from '../helpers/jobs.ts';
import { fromCsv } from '../helpers/readings.ts';

const PARTS: Parts = {
  want: { inductance: '2 uH to 60 uH', taps: 3 },
  former: { kind: 'tube', 'outside-diameter': '40 mm' },
  wire: ['0.5 mm enamel'],
};
const made = (shop?: Readonly<Record<string, string>>) =>
  recordOf(jobOf({ ...PARTS, ...(shop === undefined ? {} : { shop }) } as unknown as Parts), '1.2.3');
const RECORD = made({ 'probe-capacitance': '12 pF' });
const SILENT = made();

const WITH_PROBE = ['probed resonance', 'width'];
const asked = (record: CoilRecord) => questionsOf(record).filter(({ quantity }) => WITH_PROBE.includes(quantity));
const read = (text: string, record = RECORD) => readReadings(text, 'r.csv', new Map([[record.hash, record]]));
const judged = (text: string, record = RECORD) => {
  const [kind] = read(text, record).kinds;
  return judgeCoil(record, new Asking(record), kind!.coils[0]!);
};
const HEAD = 'serial,tap,quantity,condition,value,unit';

describe('readings with generator and probe', () => {
  it('are asked of those who state their instruments, and of nobody else', () => {
    expect(asked(SILENT)).toEqual([]);
    const keys = asked(RECORD).map(({ key }) => key);
    const { capacitorsPf } = RECORD.shop;
    const most = capacitorsPf.at(-1);
    const rows = [`1-${most}`, `2-${most}`, ...[0, ...capacitorsPf].map((pf) => `3-${pf}`)];
    expect(keys).toEqual(rows.flatMap((row) => [`probed-${row}`, `width-${row}`]));
    // More on the coil: below the resonance that is asked without.
    const bare = questionsOf(RECORD).find(({ key }) => key === `khz-3-${most}`)!;
    expect(asked(RECORD).find(({ key }) => key === `probed-3-${most}`)!.nominal!).toBeLessThan(bare.nominal!);
  });

  it('go through the file of the bench page to a verdict each, the same', () => {
    let ran = 0;
    for (const factor of [0.5, 0.97, 1, 1.03, 1.6, 5]) {
      const rows = asked(RECORD).map((question) => {
        const value = Number((question.nominal! * factor).toPrecision(6));
        return rowOf(RECORD, question, value, judge(RECORD, question, value), { serial: '7' });
      });
      const text = toCsv(rows);
      expect(fromCsv(text)).toEqual(rows);
      const { taps } = judged(text);
      const back = taps.flatMap(({ readings }) => readings);
      expect(back).toHaveLength(rows.length);
      for (const question of asked(RECORD)) {
        const one = back.find(({ key }) => key === question.key)!;
        const { verdict, low, high, advice } = judge(RECORD, question, one.value);
        expect(one).toMatchObject({ quantity: question.quantity, verdict, low, high });
        // Of far ones it is asked at every tap which it would suit.
        if (verdict !== 'implausible') expect(one.advice).toEqual(advice);
        const outside = question.quantity === 'probed resonance' || one.value > SHORTED_FROM * high!;
        expect(one.trusted).toBe(outside);
        ran++;
      }
    }
    console.log(`readings there and back: ${ran}`);
    expect(ran).toBe(60);
  });

  it('pass a tap, fail it by the resonance, and by the width only where it is twice too wide', () => {
    const [f, w] = [330, 330].map(
      (pf, i) => asked(RECORD).find(({ key }) => key === `${['probed', 'width'][i]}-1-${pf}`)!,
    );
    const state = (kHz: number, width: number) =>
      judged(`${HEAD}\n7,1,resonance,"330 pF, probe",${kHz},kHz\n7,1,width,"330 pF, probe",${width},kHz`).taps[0]!
        .state;
    const wide = w!.high!;
    expect([
      state(f!.nominal!, w!.nominal!),
      state(f!.nominal!, 1.5 * wide),
      state(f!.nominal!, 2.1 * wide),
      state(f!.nominal! * 0.9, w!.nominal!),
      state(f!.nominal! * 0.5, w!.nominal!),
    ]).toEqual(['pass', 'pass', 'fail', 'fail', 'missing']);
  });

  it('are known however people write them, also of a record that states no instruments', () => {
    const plain = '7,3,resonance,100 pF,900,kHz\n';
    const told = (text: string, record = RECORD) =>
      read(text, record).kinds[0]!.coils[0]!.readings.map(
        ({ quantity, tap, capacitancePf, value }) => `${quantity} ${tap} ${capacitancePf} ${value}`,
      );
    expect(told(`${HEAD}\n${plain}7,3,resonance,100 pF with probe,880,kHz\n7,3,width,"100 pF, probe",4,kHz\n`)).toEqual(
      ['resonance 3 100 900', 'probed resonance 3 100 880', 'width 3 100 4'],
    );
    expect(told('serial,tap 3 resonance 100 pF probe (kHz),tap 3 width 100 pF (Hz)\n7,880,650')).toEqual([
      'probed resonance 3 100 880',
      'width 3 100 0.65',
    ]);
    expect(
      told('serial;tap;quantity;condition;value\n7;3;probed resonance;generator and probe, 0 pF;2,5 MHz', SILENT),
    ).toEqual(['probed resonance 3 0 2500']);
    const { notes, count } = read(`${HEAD}\n7,1,width,probe,4,kHz\n7,1,resonance,100 pF,900,kHz`);
    expect([notes.map(({ code }) => code), count.leftOut]).toEqual([['no-capacitor'], 1]);
  });

  it('are judged with any capacitor, and where the record states none of its instruments', () => {
    for (const record of [RECORD, SILENT]) {
      const of = (pf: string) => judged(`${HEAD}\n7,2,resonance,"${pf}, probe",900,kHz`, record).taps[1]!.readings[0]!;
      const [none, some, more] = [of('0 pF'), of('47 pF'), of('470 pF')];
      expect(none.nominal!).toBeGreaterThan(some.nominal!);
      expect(some.nominal!).toBeGreaterThan(more.nominal!);
    }
    // 12 pF against the usual 10.
    const at = (record: CoilRecord) =>
      judged(`${HEAD}\n7,2,resonance,"47 pF, probe",900,kHz`, record).taps[1]!.readings[0]!.nominal!;
    expect(at(RECORD)).toBeLessThan(at(SILENT));
  });

  it('say what to look for where the resonance is wide', () => {
    const width = asked(RECORD).find(({ key }) => key === 'width-3-330')!;
    const said = (value: number) => judge(RECORD, width, value).advice.join(' ');
    expect(said(1.3 * width.high!)).toMatch(
      /Couple the generator more loosely.*damp.*It stands for a Q of \d+; \d+ was expected/,
    );
    expect(said(1.3 * width.high!)).not.toMatch(/shorted/);
    expect(said(2.5 * width.high!)).toMatch(/shorted turn/);
    expect(judge(RECORD, width, width.nominal!).advice).toEqual([]);
  });

  it('stand in the proof: a coil that passes by them alone, one with a resonance too wide', () => {
    const rows = asked(RECORD).filter(({ capacitancePf }) => capacitancePf === 330);
    const lines = ['1', '2'].flatMap((serial) =>
      rows.map((question) => {
        const wide = serial === '2' && question.key === 'width-3-330';
        const value = Number((question.nominal! * (wide ? 6 : 1)).toPrecision(6));
        return rowOf(RECORD, question, value, judge(RECORD, question, value), { serial });
      }),
    );
    const { record } = proofOf(
      {
        name: 'r',
        file: 'r.csv',
        text: toCsv(lines),
        sha256: '0'.repeat(64),
        records: new Map([[RECORD.hash, RECORD]]),
        lots: [],
        searched: 'here',
        dial: null,
        notes: [],
      },
      '1.2.3',
    );
    expect(proofSchema.parse(record).count).toMatchObject({ figures: 12, readings: 12, leftOut: 0 });
    const coils = record.kinds[0]!.coils;
    expect(coils.map(({ state }) => state)).toEqual(['pass', 'fail']);
    expect(coils[1]!.rescue!.causes.join(' ')).toContain('The resonance of the whole coil is more than twice as wide');
  });
});
