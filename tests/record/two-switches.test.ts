/** Coils with a units and a tens switch, from the job to the record. */
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { recordOf } from '../../src/plan.ts';
import { workingCoilOf } from '../../src/record/rebuild.ts';
import { type CoilRecord, recordSchema } from '../../src/record/schema.ts';
import { type Winding, wireM } from '../coil/brute.ts';
import { change, FOUR_WIRES, jobOf, type Parts } from '../helpers/jobs.ts';
import { stretchUh } from './stretch.ts';

const SET = { capacitor: '15 pF to 380 pF', stray: '12 pF', lead: '2 pF' };

const PRINTED: Parts = {
  want: { inductance: '5 uH to 900 uH', taps: 12 },
  set: SET,
  former: { 'outside-diameter': '50 mm to 90 mm' },
  wire: FOUR_WIRES,
  winding: { units: 10 },
};
/** Without a set: on a coil whose taps push its turns aside, ranges take seconds. */
const LOOPS: Parts = {
  want: PRINTED.want,
  former: { 'outside-diameter': '50 mm to 90 mm' },
  wire: ['0.5 mm enamel'],
  winding: { units: 10, 'tap-method': 'twisted loop' },
};

const JOBS: readonly [string, Parts][] = [
  ['ten units and twelve tens, whichever wire', PRINTED],
  ['twisted loops that push turns aside', LOOPS],
  [
    'loops drawn in through holes',
    {
      ...PRINTED,
      want: { inductance: '2 uH to 100 uH', taps: 6 },
      wire: ['24 AWG enamel'],
      winding: { units: 5, pitch: 'spaced' },
    },
  ],
  [
    'two units, whose tens are too near for one line',
    { ...LOOPS, want: { inductance: '1 uH to 60 uH', taps: 10 }, winding: { units: 2 } },
  ],
  [
    'twenty units and four tens, shorted in sections',
    {
      ...LOOPS,
      want: { inductance: '5 uH to 500 uH', taps: 4 },
      set: { ...SET, switch: 'shorted in sections' },
      winding: { units: 20 },
    },
  ],
  [
    'a tube, left hand, finish earthed, no set',
    {
      want: { inductance: '5 uH to 900 uH', taps: 12 },
      former: { kind: 'tube', 'outside-diameter': '3 in' },
      winding: { units: 10, hand: 'left', earthed: 'finish' },
    },
  ],
];

const RECORDS = JOBS.map(([name, parts]): [string, CoilRecord, Parts] => [
  name,
  recordOf(jobOf(parts), '1.2.3'),
  parts,
]);

const windingOf = (record: CoilRecord): Winding => {
  const one = record.windings[0]!;
  const { turnPositionsMm: places, turns, pitchMm, meanDiameterMm } = one;
  return { places, turns, pitchMm, meanDiameterMm, bareMm: one.wire.bareMm };
};

const between = (a: number, b: number) => {
  const turn = Math.abs(a - b) / 360;
  return 360 * Math.min(turn % 1, 1 - (turn % 1));
};

/** Degrees or else turns between neighbouring taps (common practice; drawn in and cut pair by the webs between holes). */
const APART: Readonly<Record<CoilRecord['tapMethod']['name'], readonly [degrees: number, turns: number]>> = {
  'twisted loop': [15, 3],
  'lifted turn': [20, 3],
  'cut pair': [20, 2],
  lug: [30, 3],
  'drawn in': [15, 2],
};

describe.each(RECORDS)('%s', (_name, record, parts) => {
  const winding = record.windings[0]!;
  const { taps, unitTaps = [] } = winding;
  const settings = record.settings ?? [];
  const units = Number(parts.winding?.units);
  const from = [0, ...unitTaps.map(({ turn }) => turn)];

  it('has the shape of its schema', () => {
    expect(recordSchema.parse(JSON.parse(JSON.stringify(record)))).toEqual(record);
  });

  it('has units times tens turns, a tap at every one of them and every so many', () => {
    const tens = Number(parts.want.taps);
    expect(winding.turns).toBe(units * tens);
    expect([unitTaps.length, taps.length, settings.length]).toEqual([units - 1, tens, tens]);
    unitTaps.forEach(({ unit, turn }, i) => {
      expect(unit).toBe(i + 1);
      expect(Math.abs(turn - unit)).toBeLessThanOrEqual(0.25 + 1e-6);
    });
    for (const { tap, turn } of taps) expect(Math.abs(turn - tap * units)).toBeLessThanOrEqual(0.25 + 1e-6);
    expect(settings.map(({ turnsLeast, turnsMost }) => [turnsLeast, turnsMost])).toEqual(
      Array.from({ length: tens }, (_, i) => [i * units + 1, (i + 1) * units]),
    );
    // 0.1 % where the diameter is free; told, and 3 % at most, where it is not.
    const allowed = record.former.kind === 'printed' ? 0.1 : 3;
    expect(Math.abs(taps.at(-1)!.deviationPercent)).toBeLessThanOrEqual(allowed + 1e-3);
  });

  it('keeps its taps and its holes apart', () => {
    const [degrees, turns] = APART[record.tapMethod.name];
    const all = [{ turn: 0, angleDeg: 0 }, ...unitTaps, ...taps.slice(0, -1)];
    let pairs = 0;
    all.forEach((one, i) => {
      for (const other of all.slice(i + 1)) {
        pairs++;
        const apart =
          Math.abs(one.turn - other.turn) >= turns - 1e-6 || between(one.angleDeg, other.angleDeg) >= degrees - 1e-3;
        expect([one.turn, other.turn, apart]).toEqual([one.turn, other.turn, true]);
      }
    });
    expect(pairs).toBeGreaterThan(20);
    const { holes, former } = record;
    holes.forEach((one, i) => {
      for (const other of holes.slice(i + 1)) {
        const arc = (between(one.angleDeg, other.angleDeg) / 360) * Math.PI * former.boreDiameterMm;
        const left = Math.hypot(arc, one.axialMm - other.axialMm) - (one.diameterMm + other.diameterMm) / 2;
        // 0.8 mm of wall between two holes, less the rounding of angles and places.
        expect([one.label, other.label, left > 0.8 - 1e-3]).toEqual([one.label, other.label, true]);
      }
    });
    const bored = new Set(
      holes.filter(({ purpose }) => purpose === 'tap').map(({ label }) => label.replace(/[ab]$/, '')),
    );
    const none = record.tapMethod.name !== 'drawn in' && record.tapMethod.name !== 'cut pair';
    for (const { unit } of unitTaps) expect(bored.has(`u${unit}`)).toBe(!none);
  });

  it('sets what the rings of its own turn positions say, pair by pair', () => {
    let worst = 0;
    let checked = 0;
    settings.forEach((row, i) => {
      expect(row.inductancesUh.length).toBe(units);
      row.inductancesUh.forEach((uh, u) => {
        worst = Math.max(worst, Math.abs(uh / stretchUh(windingOf(record), from[u]!, taps[i]!.turn) - 1));
        checked++;
      });
    });
    for (const tap of unitTaps)
      worst = Math.max(worst, Math.abs(tap.inductanceUh / stretchUh(windingOf(record), 0, tap.turn) - 1));
    console.log(`two switches: ${checked} settings from the record, worst ${worst.toExponential(1)}`);
    expect(checked).toBe(units * taps.length);
    // Positions are rounded to 0.1 um, inductances to six digits, turns to six decimals.
    expect(worst).toBeLessThan(1e-4);
  });

  it('is as long as its turns and what every tap pushes aside, and its wire as long as its turns and loops', () => {
    const between = unitTaps.length + taps.length - 1;
    const long = winding.finishMm - winding.startMm;
    // Places are written to 0.1 um, pitch and gap too: 120 turns add their roundings up.
    expect(Math.abs(long - winding.pitchMm * winding.turns - record.tapMethod.gapMm * between)).toBeLessThan(0.01);
    for (const tap of taps) {
      const loops = record.tapMethod.loopM * (unitTaps.length + tap.tap - 1);
      const length = wireM(windingOf(record), tap.turn);
      expect(Math.abs(tap.wireFromStartM - length - loops)).toBeLessThan(1e-4 * length + 6e-5);
    }
  });

  it('sets more with every turn more', () => {
    const rising = settings.flatMap((row) => row.inductancesUh.toReversed());
    for (let i = 1; i < rising.length; i++) expect(rising[i]!).toBeGreaterThan(rising[i - 1]!);
    settings.forEach((row, i) => {
      const falling = [...row.inductancesUh, ...(i > 0 ? [settings[i - 1]!.inductancesUh[0]!] : [])];
      const steps = falling.slice(1).map((uh, k) => 100 * (falling[k]! / uh - 1));
      // Written to a hundredth; six digits of an inductance move a step of a hundred percent by a thousandth.
      expect(Math.abs(Math.max(...steps) - row.stepPercent)).toBeLessThan(0.0051 + 1e-5 * row.stepPercent);
    });
  });

  it('tunes from unit 0 up to the last unit', () => {
    settings.forEach((row, i) => {
      const { range, working } = taps[i]!;
      expect([row.q, row.frequencyKhz]).toEqual([working.q, working.frequencyKhz]);
      expect(row.lowKhz).toBe(range?.lowKhz ?? null);
      if (range === null || row.highKhz === null) return;
      expect(row.highKhz).toBeGreaterThan(range.highKhz);
      if (record.surroundings.rest !== 'open') return;
      // Open dead turns only pull a resonance down, below that of the turns in use with the set alone.
      const alone = 1e3 / (2 * Math.PI * Math.sqrt(row.inductancesUh.at(-1)! * range.capacitanceLowPf * 1e-6));
      expect(row.highKhz).toBeLessThan(alone);
    });
    expect(settings.length).toBeGreaterThan(3);
  });

  it('is wound in order, unit taps first, each a step of its own', () => {
    const made = record.steps.filter(({ turn }) => turn !== null);
    for (let i = 1; i < made.length; i++) {
      expect(made[i]!.turn!).toBeGreaterThanOrEqual(made[i - 1]!.turn!);
      expect(made[i]!.wireM!).toBeGreaterThanOrEqual(made[i - 1]!.wireM!);
    }
    expect(record.steps.flatMap(({ unit }) => unit ?? [])).toEqual(unitTaps.map(({ unit }) => unit));
    expect(record.steps.flatMap(({ tap }) => tap ?? [])).toEqual(taps.map(({ tap }) => tap));
  });

  it('is the same coil when it is made again from its record', () => {
    const coil = workingCoilOf(record);
    settings.forEach((row, i) => {
      const uh = coil.inductanceUh(from[units - 1]!, taps[i]!.turn);
      expect(Math.abs(uh / row.inductancesUh[units - 1]! - 1)).toBeLessThan(1e-4);
    });
  });
});

it('is mirrored by the other hand', () => {
  const [, right, parts] = RECORDS[0]!;
  const left = recordOf(jobOf(change(parts, 'winding', { hand: 'left' })), '1.2.3');
  const mirrored = (angle: number) => (360 - angle) % 360;
  const places = (record: CoilRecord) => [
    ...(record.windings[0]!.unitTaps ?? []).map(({ turn, positionMm, angleDeg }) => [turn, positionMm, angleDeg]),
    ...record.holes.map(({ turn, axialMm, angleDeg }) => [turn, axialMm, angleDeg]),
  ];
  const [a, b] = [places(right), places(left)];
  expect(a.length).toBeGreaterThan(12);
  a.forEach(([turn, z, angle], i) => {
    expect(b[i]!.slice(0, 2)).toEqual([turn, z]);
    expect(Math.abs(b[i]![2]! - mirrored(angle!))).toBeLessThan(1e-3);
  });
  expect(right.settings!.map((row) => row.inductancesUh)).toEqual(left.settings!.map((row) => row.inductancesUh));
});

describe('is refused', () => {
  const refused = (parts: Parts) => {
    try {
      recordOf(jobOf(parts), '1.2.3');
    } catch (error) {
      if (error instanceof Fault && error.exit === 4) return error.faults[0]!;
      throw error;
    }
    throw new Error('accepted');
  };

  it('when a single turn is more than the lower end, with both numbers', () => {
    const fault = refused(change(LOOPS, 'want', { inductance: '0.1 uH to 900 uH' }));
    expect(fault.place?.key).toBe('want.inductance');
    expect(fault.got).toMatch(
      /^the least that the switches set, one turn from unit 9 to the first tens contact, is 0\.\d{3} µH, more than the lower end 0\.1 µH$/,
    );
    expect(fault.todo).toMatch(/raise the lower end of want\.inductance to 0\.\d+ µH/);
  });

  it('when no wire has the upper end at these turns on a given diameter, with the nearest', () => {
    const fault = refused(change(PRINTED, 'former', { 'outside-diameter': '76 mm' }));
    expect(fault.place?.key).toBe('winding.units');
    expect(fault.got).toMatch(
      /^10 units and 12 tens make 120 turns; the coil nearest to that, .+ on 76 mm, has 900 µH at about \d+\.\d turns$/,
    );
    expect(fault.todo).toMatch(/any one of these alone would do: .*raise want\.taps to 13/);
  });
});
