/** Aerial and detector in a job: what is read, what is taken when left out, and what each mistake is told. */
import { describe, expect, it } from 'vitest';
import { readJob } from '../../src/job/read.ts';
import { DETECTORS } from '../../src/stock/detectors.ts';
import { refusals } from './faults.ts';

const WISH = 'job: x\nwant: { inductance: 20 uH to 240 uH, taps: 6 }\n';
const SET = `${WISH}set: { capacitor: 15 pF to 380 pF }\n`;
const KINDS =
  'galena crystal, iron pyrites crystal, silicon carbide crystal, germanium diode, schottky diode, diode valve, grid-leak valve, anode-bend valve, infinite-impedance valve, other';
const AT = 'or a tap such as tap 3';

/** What is written below the set, and for each fault: line key: got | expected | to do. */
const CASES: readonly (readonly [string, readonly string[]])[] = [
  [
    'aerial: { kind: horizontal wire }',
    [
      '4 aerial.length: nothing: the key is missing | the length of the wire, such as 20 m | add the key length',
      '4 aerial.height: nothing: the key is missing | the height of the wire above ground, such as 8 m | add the key height',
    ],
  ],
  [
    'aerial: { kind: capacitor, length: 3 m }',
    [
      '4 aerial.length: length for an aerial of kind capacitor | keys that belong to it | remove aerial.length, or take kind: horizontal wire or vertical wire',
      '4 aerial.capacitance: nothing: the key is missing | the capacitance of the aerial, such as 150 pF | add the key capacitance',
    ],
  ],
  [
    'aerial: { length: 20 m, resistance: 3 ohm }',
    [
      '4 aerial.length: length for an aerial of kind dummy | keys that belong to it | remove aerial.length, or take kind: horizontal wire or vertical wire',
      '4 aerial.resistance: resistance for an aerial of kind dummy | keys that belong to it | remove aerial.resistance, or take kind: capacitor',
    ],
  ],
  [
    'aerial: { kind: horizontal wire, length: 20 m, height: 8 m, capacitance: 200 pF }',
    [
      '4 aerial.height: height of a wire whose capacitance is stated | keys that belong to it | remove aerial.height, or aerial.capacitance',
    ],
  ],
  [
    'aerial: { kind: horizontal wire, length: 2 cm, height: 8 m, thickness: 5 mm }',
    [
      '4 aerial.thickness: a wire 5 mm thick, 0.02 m long | at most a tenth of that, 2 mm | check the units of aerial.thickness, aerial.length and aerial.height',
    ],
  ],
  [
    'aerial: { kind: horizontal wire, length: 20 m, height: 5 cm, thickness: 6 mm }',
    [
      '4 aerial.thickness: a wire 6 mm thick, 0.05 m above ground | at most a tenth of that, 5 mm | check the units of aerial.thickness, aerial.length and aerial.height',
    ],
  ],
  [
    'aerial: { to: second }',
    [
      '4 aerial.to: the aerial on a second winding, and no second winding | a job with second | add second, such as { kind: sleeve, coupling: 0.2 }, or take to: best',
    ],
  ],
  [
    'aerial: { to: start }',
    [
      '4 aerial.to: the aerial on the start, which is earthed | a tap, or the start of a coil with earthed: finish | take to: best, or a tap such as tap 1',
    ],
  ],
  [
    'detector: { to: start }',
    [
      '4 detector.to: the detector on the start, which is earthed | a tap, or the start of a coil with earthed: finish | take to: best, or a tap such as tap 1',
    ],
  ],
  ['aerial: { to: 3 }', [`4 aerial.to: 3 | one of: best, second, start, ${AT} | write tap 3`]],
  ['aerial: { to: sekond }', [`4 aerial.to: "sekond" | one of: best, second, start, ${AT} | did you mean second?`]],
  [
    'detector: { to: second }',
    [`4 detector.to: "second" | one of: best, start, ${AT} | choose one of these words, or write tap and its number`],
  ],
  [
    'aerial: { to: tap 0 }',
    [
      `4 aerial.to: "tap 0" | one of: best, second, start, ${AT} | choose one of these words, or write tap and its number`,
    ],
  ],
  [
    'aerial: { kind: horizontle wire }',
    [
      '4 aerial.kind: "horizontle wire" | one of: horizontal wire, vertical wire, capacitor, dummy | did you mean horizontal wire?',
    ],
  ],
  [
    'aerial: { hight: 3 m }',
    [
      '4 aerial.hight: a key that is not known | one of: kind, length, height, thickness, capacitance, resistance, series, to | did you mean height?',
    ],
  ],
  [
    'detector: { kind: gallena crystal }',
    [`4 detector.kind: "gallena crystal" | one of: ${KINDS} | did you mean galena crystal?`],
  ],
  [
    'detector: { kind: other }',
    [
      '4 detector.resistance: nothing: the key is missing | the resistance of the detector, such as 50 kohm | add the key resistance, or take a kind of the list',
    ],
  ],
  [
    'aerial: { kind: vertical wire, length: 20000 m }',
    [
      '4 aerial.length: "20000 m", which is above the 10000 m that make sense here | a length of wire, such as 15.2 m | check the unit (m or ft?) and the number',
    ],
  ],
  [
    'aerial: { kind: vertical wire, length: 9 m, height: 3 ohm }',
    [
      '4 aerial.height: "3 ohm", whose unit measures a resistance | a height, such as 8 m or 26 ft | give a height in m or ft',
    ],
  ],
  [
    'aerial: { series: 0 pF }',
    ['4 aerial.series: "0 pF", which is zero | a capacitance, such as 380 pF | write a value above zero'],
  ],
  [
    'aerial: many',
    [
      '4 aerial: "many" | a group of keys: kind, length, height, thickness, capacitance, resistance, series, to | write the keys below aerial, indented',
    ],
  ],
];

const told = (text: string) =>
  refusals(text).map(
    ({ place, got, expected, todo }) => `${place?.line} ${place?.key}: ${got} | ${expected} | ${todo}`,
  );

describe('aerial and detector', () => {
  it('are refused with what was got, what would do, and what to do', () => {
    for (const [text, faults] of CASES) expect(told(SET + text), text).toEqual(faults);
    console.log(`aerials and detectors refused: ${CASES.length}`);
    expect(CASES.length).toBeGreaterThan(15);
  });

  it('need a set, whose own aerial is then left out', () => {
    expect(told(`${WISH}aerial: {}\ndetector: {}`)).toEqual([
      '3 aerial: an aerial without the set that tunes the coil | a job with set | add set, such as { capacitor: 15 pF to 380 pF }',
      '4 detector: a detector without the set that tunes the coil | a job with set | add set, such as { capacitor: 15 pF to 380 pF }',
    ]);
    expect(told(`${WISH}set: { capacitor: 15 pF to 380 pF, aerial: 60 pF }\naerial: {}`)).toEqual([
      '3 set.aerial: 60 pF in set.aerial, and an aerial of kind dummy | one of the two | remove set.aerial: what the aerial does to every position is worked out',
    ]);
    // 0 is what is taken when left out; and a detector alone goes with it.
    expect(readJob(`${WISH}set: { capacitor: 15 pF to 380 pF, aerial: 0 pF }\naerial: {}`, 'x').aerial?.kind).toBe(
      'dummy',
    );
    expect(readJob(`${WISH}set: { capacitor: 15 pF to 380 pF, aerial: 9 pF }\ndetector: {}`, 'x').set?.aerialPf).toBe(
      9,
    );
  });

  it('are read in the units of the code, and tell what was taken', () => {
    const wire = readJob(`${SET}aerial: { kind: vertical wire, length: 30 ft, to: tap 2, series: 100 pF }`, 'x');
    expect(wire.aerial).toEqual({
      kind: 'vertical wire',
      lengthM: 9.144,
      heightM: 1,
      thicknessMm: 2,
      capacitancePf: null,
      resistanceOhm: 25,
      seriesPf: 100,
      to: 2,
    });
    expect(wire.assumed).toMatchObject({
      'aerial.height': '1 m',
      'aerial.thickness': '2 mm',
      'aerial.resistance': '25 ohm',
    });
    expect(wire.detector).toBeNull();
    const bare = readJob(`${SET}aerial:\ndetector:\n`, 'x');
    expect([bare.aerial, bare.detector]).toEqual([null, null]);
    const measured = readJob(`${SET}aerial: { kind: horizontal wire, length: 20 m, capacitance: 180 pF }`, 'x').aerial;
    expect(measured).toMatchObject({ capacitancePf: 180, heightM: null, thicknessMm: null, lengthM: 20 });
    const finish = readJob(`${SET}winding: { earthed: finish }\naerial: { to: start }\ndetector: { to: start }`, 'x');
    expect([finish.aerial?.to, finish.detector?.to]).toEqual(['start', 'start']);
  });

  it('every kind of detector has its resistance and capacitance, which the job may state', () => {
    let ran = 0;
    for (const { kind, resistanceKohm, capacitancePf } of DETECTORS) {
      const { detector, assumed } = readJob(`${SET}detector: { kind: ${kind} }`, 'x');
      expect(detector).toEqual({ kind, resistanceKohm, capacitancePf, to: 'best' });
      expect(assumed['detector.resistance']).toBe(`${resistanceKohm} kohm`);
      ran++;
    }
    const own = readJob(`${SET}detector: { kind: other, resistance: 40 kohm }`, 'x').detector;
    expect(own).toEqual({ kind: 'other', resistanceKohm: 40, capacitancePf: 0, to: 'best' });
    console.log(`kinds of detectors: ${ran}`);
    expect(ran).toBe(9);
  });
});
