/** Pass, fail and missing, by readings whose limits are known. */
import { describe, expect, it } from 'vitest';
import { judge, questionsOf } from '../../src/bench/judge.ts';
import { recordOf } from '../../src/plan.ts';
import { Asking } from '../../src/prove/judge-at.ts';
import { rescueOf } from '../../src/prove/rescue.ts';
import type { Reading } from '../../src/prove/types.ts';
import { jobOf } from '../helpers/jobs.ts';
import { asPlanned, judged, readingsOf } from '../helpers/proved.ts';

const RECORD = recordOf(
  jobOf({
    want: { inductance: '2 uH to 60 uH', taps: 3 },
    former: { kind: 'tube', 'outside-diameter': '40 mm' },
    wire: ['0.5 mm enamel'],
  }),
  '1.2.3',
);
const ASKING = new Asking(RECORD);
const BLANK: Omit<Reading, 'quantity' | 'value' | 'tap'> = {
  line: 9,
  written: 'x',
  capacitancePf: null,
  frequencyKhz: null,
  celsius: null,
  key: null,
  remark: '',
};
const GOOD = readingsOf(RECORD, asPlanned(RECORD)).readings;
const question = (key: string) => questionsOf(RECORD).find((one) => one.key === key)!;
const coilOf = (readings: readonly Reading[]) =>
  judged(RECORD, { serial: '1', readings, dial: [], remarks: [] }, ASKING);
const states = (readings: readonly Reading[]) => {
  const { state, taps } = coilOf(readings);
  return [state, ...taps.map((tap) => (tap.again ? 'again' : tap.state))].join(' ');
};
const ohm = (tap: number, share: number): Reading => ({
  ...BLANK,
  quantity: 'resistance',
  tap,
  value: question(`ohm-${tap}`).nominal! * share,
  key: `ohm-${tap}`,
});
const former = (share: number): Reading => ({
  ...BLANK,
  quantity: 'diameter',
  tap: null,
  value: question('former').nominal! * share,
  key: 'former',
});
const scaled = (tap: number, share: number) =>
  GOOD.map((one) => (one.tap === tap ? { ...one, value: one.value * share } : one));

describe('a coil', () => {
  it.each([
    ['all within', GOOD, 'pass pass pass pass'],
    ['nothing read', [], 'missing missing missing missing'],
    ['no electrical reading of a tap', GOOD.slice(0, 2), 'missing pass pass missing'],
    ['resistances alone', [1, 2, 3].map((tap) => ohm(tap, 1)), 'missing missing missing missing'],
    ['one tap outside', scaled(2, 1.1), 'fail pass fail pass'],
    ['outside, and another not read', scaled(1, 1.1).slice(0, 2), 'fail fail pass missing'],
    ['a slip of the unit', scaled(2, 1000), 'missing pass again pass'],
    ['a resistance outside', [...GOOD, ohm(3, 1.3)], 'fail pass pass fail'],
    ['a resistance far off', [...GOOD, ohm(3, 3)], 'missing pass pass again'],
    ['a former outside', [...GOOD, former(1.05)], 'fail pass pass pass'],
    ['a former within', [...GOOD, former(1)], 'pass pass pass pass'],
    [
      'a turn too many by the count',
      [...GOOD, { ...BLANK, quantity: 'turns' as const, tap: 2, value: RECORD.windings[0]!.taps[1]!.turn + 1 }],
      'fail pass fail pass',
    ],
  ])('%s', (_what, readings, expected) => {
    expect(states(readings)).toBe(expected);
  });

  it('is judged as the bench judges it, warm resistances too', () => {
    const questions = questionsOf(RECORD);
    const spread = [0.5, 0.93, 0.99, 1, 1.02, 1.1, 2, 1000];
    let cases = 0;
    for (const one of questions)
      for (const share of one.nominal === null ? [] : spread) {
        const { quantity, tap, capacitancePf, frequencyKhz, key } = one;
        const celsius = quantity === 'resistance' ? 35 : null;
        const value = one.nominal! * share;
        const reading: Reading = { ...BLANK, quantity, tap, value, capacitancePf, frequencyKhz, celsius, key };
        const coil = coilOf([reading]);
        const [found] = [...coil.readings, ...coil.taps.flatMap(({ readings }) => readings)];
        const expected = judge(RECORD, one, value, { celsius });
        expect(found!.verdict).toBe(expected.verdict);
        expect(found!.low! / expected.low!).toBeCloseTo(1, 4);
        cases++;
      }
    console.log(`${cases} readings judged as at the bench`);
    expect(cases).toBeGreaterThan(60);
  });

  it('does not fail by a meter that the record does not trust', () => {
    const meter = RECORD.measuring.meter.map((one, i) => (i === 0 ? { ...one, doubt: 'leads' as const } : one));
    const doubted = { ...RECORD, measuring: { ...RECORD.measuring, meter } };
    const readings = scaled(1, 1.1);
    const coil = judged(doubted, { serial: '1', readings, dial: [], remarks: [] });
    expect([coil.state, coil.taps[0]!.state]).toEqual(['missing', 'missing']);
  });
});

describe('what saves it', () => {
  const rescue = (readings: readonly Reading[]) => rescueOf(RECORD, coilOf(readings));

  it('asks for an electrical reading where only the resistance was read', () => {
    expect(rescue([ohm(3, 1.3)])).toMatchObject({ can: 'no', actions: [], out: [3] });
    expect(rescue([ohm(3, 1.3)]).causes[0]).toContain('a joint');
  });

  it('leaves a former that is off to whoever checks where all taps are within', () => {
    expect(rescue([...GOOD, former(1.05)])).toMatchObject({ can: 'yes', actions: [], out: [] });
  });

  it('names readings that do not go together', () => {
    const turned = [
      ...scaled(3, 1.2),
      ...readingsOf(RECORD, asPlanned(RECORD), { capacitorsPf: [100] }).readings.filter(
        ({ quantity }) => quantity === 'resonance',
      ),
    ];
    const found = rescue(turned);
    expect(found.causes[0]).toContain('do not go together');
    expect(found.can).toBe('no');
  });

  it('says what stays outside', () => {
    // Tap 1 lies half a turn off; tap 3 is far beyond what two turns mend.
    const found = rescue([...scaled(3, 1.4).slice(2), ...scaled(1, 1.06).slice(0, 1)]);
    expect(found.out).toContain(3);
    expect(found.can).not.toBe('yes');
  });
});
