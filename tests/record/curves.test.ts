import { describe, expect, test } from 'vitest';
import { endOf, positionOf } from '../../src/coil/positions.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { curveOf } from '../../src/record/curves.ts';
import { surveyRecordOf, workingOf } from '../../src/survey.ts';

const FILE = readCoilFile(
  `name: Curves
coil: { former-diameter: 76.2 mm, wire: 24 AWG enamel, turns: 90, pitch: 0.6 mm, taps: [12, 30, 55] }
set: { capacitor: 15 pF to 380 pF, aerial: 40 pF, switch: open }`,
  'x',
);

describe('tuning curves', () => {
  const record = surveyRecordOf(FILE, '9.9.9');

  test('begin and end where the range does, and fall all the way', () => {
    let checked = 0;
    for (const { curve, range } of record.windings[0]!.taps) {
      expect(curve.length).toBeGreaterThan(2);
      expect(curve[0]).toEqual({ capacitancePf: range!.capacitanceLowPf, frequencyKhz: range!.highKhz });
      expect(curve.at(-1)).toEqual({ capacitancePf: range!.capacitanceHighPf, frequencyKhz: range!.lowKhz });
      for (const [i, point] of curve.entries()) {
        if (i === 0) continue;
        expect(point.capacitancePf).toBeGreaterThan(curve[i - 1]!.capacitancePf);
        expect(point.frequencyKhz).toBeLessThan(curve[i - 1]!.frequencyKhz);
        checked++;
      }
    }
    console.log(`tuning curves: ${checked} stretches fall`);
    expect(checked).toBe(4 * 8);
  });

  // On a sheet 0.2 % are a tenth of a millimetre. The crowding between the ends is taken in between, where the field would give it.
  test('hold what the circuit gives with the field at every point, within 0.05 %; drawn straight between points, within 0.2 %', () => {
    const { working, conditions } = workingOf(FILE);
    let worst = 0;
    let straight = 0;
    let checked = 0;
    for (const turn of working.taps) {
      const curve = curveOf(working, positionOf(working, turn, conditions), conditions);
      for (const [i, { capacitancePf, frequencyKhz }] of curve.entries()) {
        worst = Math.max(worst, Math.abs(frequencyKhz / endOf(working, turn, capacitancePf, 'open').kHz - 1));
        checked++;
        const next = curve[i + 1];
        if (next === undefined) continue;
        const middle = endOf(working, turn, Math.sqrt(capacitancePf * next.capacitancePf), 'open').kHz;
        straight = Math.max(straight, Math.abs(Math.sqrt(frequencyKhz * next.frequencyKhz) / middle - 1));
      }
    }
    console.log(
      `tuning curves: ${checked} points within ${(100 * worst).toFixed(4)} %, ${(100 * straight).toFixed(4)} % between`,
    );
    expect(checked).toBe(36);
    expect(worst).toBeLessThan(5e-4);
    expect(straight).toBeLessThan(2e-3);
  });

  test('are left out without a set', () => {
    const bare = readCoilFile('coil: { mean-diameter: 76 mm, wire: 24 AWG enamel, turns: 6, pitch: 1 mm }', 'x');
    expect(surveyRecordOf(bare, '9.9.9').windings[0]!.taps.map(({ curve }) => curve)).toEqual([[]]);
  });
});
