/** Verdicts on readings, and the advice that comes with them. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Question } from '../../src/bench/api.ts';
import { judge, questionsOf } from '../../src/bench/judge.ts';
import { TEMPERATURE_COEFFICIENT } from '../../src/physics/copper.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { sampleRecord } from '../helpers/sample.ts';

const record = sampleRecord({ surface: 'smooth' });
const questions = questionsOf(record);
const ask = (key: string, of: CoilRecord = record): Question => {
  const found = questionsOf(of).find((one) => one.key === key);
  if (found === undefined) throw new Error(`no question ${key}`);
  return found;
};

describe('questions', () => {
  test('every tap has length, resistance, meter and a resonance; the whole coil one with every capacitor', () => {
    const { taps } = record.windings[0]!;
    const { capacitorsPf } = record.shop;
    for (const { tap } of taps)
      for (const key of [`length-${tap}`, `ohm-${tap}`, `uh-${tap}`, `khz-${tap}-${capacitorsPf.at(-1)}`]) ask(key);
    for (const pf of capacitorsPf) ask(`khz-${taps.length}-${pf}`);
    expect(new Set(questions.map(({ key }) => key)).size).toBe(questions.length);
    console.log(`questions: ${questions.length}`);
  });

  test('checks are known by what they are of; one that is not known is asked all the same', () => {
    const limits = { low: 1, nominal: 2, high: 3, digits: 1 };
    const of = {
      ...record,
      checks: [
        { what: 'former, outside diameter', unit: 'mm', ...limits },
        { what: '20 turns, edge to edge', unit: 'mm', ...limits },
        { what: 'resonance S to F with 100 pF', unit: 'kHz', ...limits },
        { what: 'weight of the coil', unit: 'g', ...limits },
      ],
    };
    const keys = questionsOf(of).flatMap(({ key, tap }) => (tap === null ? [key] : []));
    expect(keys).toEqual(['former', 'turns-20', 'check-4']);
    expect(judge(of, ask('check-4', of), 3.5).verdict).toBe('high');
  });
});

describe('verdicts', () => {
  test('pass within the limits, ends counted; low below, high above, and never without advice', () => {
    let judged = 0;
    fc.assert(
      fc.property(fc.constantFrom(...questions), fc.double({ min: 0.9, max: 1.1, noNaN: true }), (question, factor) => {
        const { low, nominal, high } = question;
        if (low === null || nominal === null || high === null) return;
        const value = nominal * factor;
        const { verdict, advice, deviationPercent } = judge(record, question, value);
        const side = value < low ? 'low' : value > high ? 'high' : 'pass';
        expect([side, 'implausible']).toContain(verdict);
        if (verdict === 'implausible') expect(Math.abs(factor - 1)).toBeGreaterThan(0.09);
        expect(advice.length > 0).toBe(verdict !== 'pass');
        expect(deviationPercent).toBeCloseTo(100 * (factor - 1), 6);
        for (const line of advice) expect(line).not.toMatch(/NaN|undefined|null|Infinity/);
        for (const end of [low, nominal, high]) expect(judge(record, question, end).verdict).toBe('pass');
        judged++;
      }),
      { seed: 15_302, numRuns: 400 },
    );
    expect(judged).toBeGreaterThan(300);
    console.log(`readings judged: ${judged}`);
  });

  test('what is no reading, a slip of the unit, another coil: implausible', () => {
    const question = ask('uh-5');
    for (const value of [0, -3, Number.NaN, Number.POSITIVE_INFINITY])
      expect(judge(record, question, value)).toMatchObject({ verdict: 'implausible', deviationPercent: null });
    const slip = judge(record, question, question.nominal! / 1000);
    expect(slip.verdict).toBe('implausible');
    expect(slip.advice.join()).toContain('µH');
    expect(judge(record, question, question.nominal! * 4).verdict).toBe('implausible');
  });

  test('the reading of another tap is told as that', () => {
    const { verdict, advice } = judge(record, ask('ohm-4'), ask('ohm-2').nominal!);
    expect(verdict).toBe('implausible');
    expect(advice[0]).toContain('tap 2');
    expect(judge(record, ask('uh-3'), ask('uh-5').nominal!).advice[0]).toContain('whole coil');
  });

  test('a warm coil is held against limits at its temperature', () => {
    const question = ask('ohm-5');
    const warm = 1 + TEMPERATURE_COEFFICIENT * 20;
    const value = question.nominal! * warm;
    expect(judge(record, question, value).verdict).toBe('high');
    const judged = judge(record, question, value, { celsius: 40 });
    expect(judged.verdict).toBe('pass');
    expect(judged.nominal! / question.nominal!).toBeCloseTo(1.0786, 12);
    expect(judged.deviationPercent).toBeCloseTo(0, 9);
    expect(judge(record, question, question.nominal!, { celsius: 40 }).verdict).toBe('low');
  });

  test('a meter above the resonance of the coil is not judged', () => {
    const meter = record.measuring.meter.map((one) => ({
      ...one,
      readingUh: null,
      lowUh: null,
      highUh: null,
      doubt: 'capacitance' as const,
    }));
    const of = { ...record, measuring: { ...record.measuring, meter } };
    expect(judge(of, ask('uh-2', of), 20)).toMatchObject({ verdict: 'not judged', deviationPercent: null });
  });
});

describe('advice', () => {
  test('the whole coil: the trim whose window the reading lies in, and no other', () => {
    const [trim, spread] = record.corrections;
    const { advice } = judge(record, ask('uh-5'), ask('uh-5').nominal! * 1.03);
    expect(advice.join()).toContain(trim!.doing);
    expect(advice.join()).toContain('−2.1');
    expect(advice.join()).not.toContain(spread!.doing);
    expect(judge(record, ask('uh-5'), ask('uh-5').nominal! * 0.97).advice.join()).not.toContain(trim!.doing);
  });

  test('a tap: a turn miscounted beyond half a turn, else moved by its own degrees a percent', () => {
    const { fewPercent, degreesPerPercent } = record.advice[2]!;
    const question = ask('uh-3');
    const few = judge(record, question, question.nominal! * (1 + fewPercent / 100));
    expect(few.advice.join()).toContain('one too few');
    expect(few.advice.join()).not.toContain('along the wire');
    const high = judge(record, question, question.nominal! * 1.025);
    expect(high.advice.join()).not.toContain('one too');
    expect(high.advice.join()).toContain(`${(2.5 * degreesPerPercent).toFixed(0)}° along the wire, back`);
    const fast = { ...record, tapMethod: { ...record.tapMethod, name: 'cut pair' as const } };
    expect(judge(fast, question, question.nominal! * 1.025).advice.join()).toContain('on the next former');
  });

  test('a low resonance is a high inductance of twice the share', () => {
    const question = ask('khz-5-330');
    const { verdict, advice } = judge(record, question, question.nominal! * 0.985);
    expect(verdict).toBe('low');
    expect(advice[0]).toContain('3.1 %');
    expect(advice.join()).toContain(record.corrections[0]!.doing);
  });

  test('a groove lets nothing be pressed; a doubted meter says why', () => {
    const grooved = sampleRecord({ surface: 'grooved' });
    const length = ask('length-4', grooved);
    expect(judge(grooved, length, length.high! * 1.01).advice.join()).toMatch(/groove/);
    const meter = record.measuring.meter.map((one) => ({ ...one, doubt: 'leads' as const }));
    const of = { ...record, measuring: { ...record.measuring, meter } };
    const question = ask('uh-1', of);
    expect(judge(of, question, question.high! * 1.01).advice[0]).toMatch(/not to be trusted here: its leads/);
  });
});
