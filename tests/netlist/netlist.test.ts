import { describe, expect, test } from 'vitest';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { netlistOf } from '../../src/netlist/netlist.ts';
import { coupledResonances } from '../../src/physics/coupled/coupled.ts';
import { symmetricEigen } from '../../src/physics/coupled/eigen.ts';
import { recordOf } from '../../src/plan.ts';
import { workingCoilOf } from '../../src/record/rebuild.ts';
import type { FiguresRecord } from '../../src/record/survey-schema.ts';
import { surveyRecordOf } from '../../src/survey.ts';
import { jobOf } from '../helpers/jobs.ts';
import { moved } from './moved.ts';
import { parse, resonancesOf } from './solve.ts';

const SWITCHES = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;

function record(rest: (typeof SWITCHES)[number], earthed: 'start' | 'finish', more: object = {}): FiguresRecord {
  const coil = {
    'former-diameter': '50 mm',
    wire: { bare: '0.5 mm', overall: '0.56 mm' },
    turns: 24,
    pitch: '0.8 mm',
    taps: [7.25, 12, 17.5],
    earthed,
  };
  const set = { capacitor: '15 pF to 380 pF', stray: '12 pF', aerial: '60 pF', lead: '3 pF', switch: rest };
  return surveyRecordOf(readCoilFile(JSON.stringify({ coil, set, at: '1 MHz', ...more }), 'coil.json'), '0');
}

/** Both are the same circuit; what differs is rounding of 15 digits through an inverse: 1e-6 leaves room for nothing else. */
const AGREES = 1e-6;

describe('the circuit of the netlist', () => {
  let cases = 0;
  let worst = 0;
  for (const rest of SWITCHES) {
    for (const earthed of ['start', 'finish'] as const) {
      test(`${rest}, ${earthed} earthed: resonances as the coupled circuit has them`, () => {
        const one = record(rest, earthed);
        const coil = workingCoilOf(one);
        const text = netlistOf(one);
        for (const tap of one.windings[0]!.taps) {
          for (const spread of [0, 1] as const) {
            for (const capacitorPf of [15, 380]) {
              const { winding, on } = coil.circuit(coil.taps[tap.tap - 1]!, capacitorPf + 72, rest);
              const distribution = spread === 1 ? 'spread' : 'open end';
              const expected = coupledResonances(winding, { ...on, distribution });
              const net = parse(moved(text, tap.tap), { shrink: 1, spread, ccap: capacitorPf * 1e-12 });
              // Below lies only the part that floats, held by the 100 H of the check.
              const [first, second] = resonancesOf(net).filter((hertz) => hertz > 3e4);
              const off = Math.abs(first! / expected.first - 1);
              worst = Math.max(worst, off);
              cases++;
              expect(off, `position ${tap.tap}, spread ${spread}, ${capacitorPf} pF`).toBeLessThan(AGREES);
              if (expected.second !== undefined) expect(Math.abs(second! / expected.second - 1)).toBeLessThan(AGREES);
            }
          }
        }
      });
    }
  }
  test('there were cases', () => {
    console.log(`netlist: ${cases} resonances, worst ${worst.toExponential(1)}`);
    expect(cases).toBe(4 * 2 * 4 * 2 * 2);
  });
});

describe('the netlist of a coil', () => {
  test('shrunk as the position asks, it resonates where the record says', () => {
    const one = record('open', 'start');
    const text = netlistOf(one);
    for (const tap of one.windings[0]!.taps) {
      const [, low, lowShrink, high, highShrink] =
        new RegExp(`^\\* position ${tap.tap}:.*low (\\S+) kHz shrink (\\S+), high (\\S+) kHz shrink (\\S+)$`, 'm').exec(
          text,
        ) ?? [];
      for (const [kHz, shown, shrink, ccap] of [
        [tap.range!.lowKhz, low, lowShrink, 380e-12],
        [tap.range!.highKhz, high, highShrink, 15e-12],
      ] as const) {
        const at = (spread: number) =>
          resonancesOf(parse(moved(text, tap.tap), { shrink: Number(shrink), spread, ccap }))[0]! / 1e3;
        // Five digits of the record, six of the inductances behind `shrink`.
        expect(Math.abs((at(0) + at(1)) / 2 / kHz - 1)).toBeLessThan(3e-5);
        expect(Math.abs(Number(shown) - kHz)).toBeLessThanOrEqual(0.05 + 1e-9);
      }
    }
  });

  test('without a set the capacitor tunes the position to the frequency that it is judged at', () => {
    const one = record('open', 'start', { set: undefined });
    const last = one.windings[0]!.taps.length;
    const text = netlistOf(one, { position: last });
    // The self-capacitance comes on top of that capacitor.
    const first = resonancesOf(parse(text))[0]!;
    expect(first).toBeLessThan(1e6);
    expect(first).toBeGreaterThan(0.9e6);
  });

  test('no coupling reaches 1, and together they are positive definite', () => {
    const { K, L } = parse(netlistOf(record('open', 'start')));
    expect(K.length).toBeGreaterThan(100);
    const size = L.length;
    const matrix = Float64Array.from({ length: size * size }, (_, i) => (i % (size + 1) === 0 ? 1 : 0));
    for (const { a, b, value } of K) {
      expect(Math.abs(value)).toBeLessThan(1);
      const [i, j] = [Number(a.slice(1)) - 1, Number(b.slice(1)) - 1];
      matrix[i * size + j] = value;
      matrix[j * size + i] = value;
    }
    expect(Math.min(...symmetricEigen(matrix, size).values)).toBeGreaterThan(1e-3);
  });

  test('resistances in series are those of the record at its working frequency', () => {
    const one = record('open', 'start');
    const tap = one.windings[0]!.taps[1]!;
    const { R } = parse(netlistOf(one, { position: 2 }));
    const series = R.filter(({ a }) => a.startsWith('x')).slice(0, R.findIndex(({ b }) => b === 't2') + 1);
    const copper = series.reduce((sum, { value }) => sum + value, 0);
    // No material is named, so that the former loses nothing; four digits in the record.
    expect(Math.abs(copper / tap.working.resistanceOhm - 1)).toBeLessThan(1e-3);
  });

  test.each(['start', 'finish'])('two switches, %s earthed: every contact of the units switch', (earthed) => {
    const job = jobOf({
      want: { inductance: '2 uH to 100 uH', taps: 6 },
      set: { capacitor: '15 pF to 380 pF', stray: '12 pF', lead: '2 pF' },
      former: { 'outside-diameter': '50 mm to 90 mm' },
      wire: ['24 AWG enamel'],
      winding: { units: 5, pitch: 'spaced', earthed },
    });
    const one = recordOf(job, '0');
    const coil = workingCoilOf(one);
    const text = netlistOf(one);
    const from = [0, ...coil.unitTaps];
    expect(from.length).toBe(5);
    from.forEach((start, unit) => {
      for (const tap of one.windings[0]!.taps) {
        const { winding, on } = coil.circuit(tap.turn, 72, 'open', start);
        const expected = coupledResonances(winding, { ...on, distribution: 'spread' });
        const units = moved(text, tap.tap).replace(/^\*?(Vunit(\d+) .*)$/gm, (_, card, of) =>
          Number(of) === unit ? card : `*${card}`,
        );
        const params = { shrink: 1, ccap: 0, cstray: 72e-12, caerial: 0 };
        expect(Math.abs(resonancesOf(parse(units, params))[0]! / expected.first - 1)).toBeLessThan(AGREES);
      }
    });
  });

  test('a position that is not there is refused', () => {
    expect(() => netlistOf(record('open', 'start'), { position: 9 })).toThrow(RangeError);
  });

  test('no text of a job can put a card into it', () => {
    const bad = 'x\nR1 0 0 1\n.include /etc/passwd\r\n+ {a=1} ; $ " \u2028 .end';
    const one = record('open', 'start');
    const clean = netlistOf(one);
    const wire = { ...one.windings[0]!.wire, name: bad };
    const text = netlistOf({ ...one, job: bad, program: bad, windings: [{ ...one.windings[0]!, wire }] });
    const cards = (whole: string) => whole.split('\n').filter((line) => !line.startsWith('*'));
    expect(cards(text)).toEqual(cards(clean));
    expect(text.replace(/\n/g, '')).toMatch(/^[ -~]*$/);
    expect(text.split('\n').length).toBeLessThan(clean.split('\n').length + 4);
  });
});
