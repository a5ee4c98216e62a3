import { describe, expect, it } from 'vitest';
import { recordOf } from '../../src/plan.ts';
import { hashOf } from '../../src/record/hash.ts';
import { type CoilRecord, recordSchema } from '../../src/record/schema.ts';
import { COPPER, inductanceUh, placeAt, type Winding, wireM } from '../coil/brute.ts';
import { BAND, change, jobOf, type Parts, RANGE, STARTERS, starterJob, TUBE } from '../helpers/jobs.ts';

const NAMED: readonly [string, Parts][] = [
  ['twelve taps', RANGE],
  ['staggered, left hand', { ...RANGE, winding: { 'tap-layout': 'staggered', hand: 'left' } }],
  ['grooved, drawn in', { ...RANGE, want: { inductance: '8 uH to 60 uH', taps: 5 }, winding: { pitch: 'spaced' } }],
  ['a band on one diameter', change(BAND, 'former', { 'outside-diameter': '76 mm' })],
  ['a tube', TUBE],
  ['litz', { ...RANGE, wire: ['20 x 0.1 mm litz single silk'], want: { inductance: '20 uH to 150 uH', taps: 6 } }],
  [
    'a few turns',
    {
      want: { inductance: '0.5 uH to 4 uH', taps: 4 },
      former: { 'outside-diameter': '50 mm' },
      wire: ['0.5 mm enamel'],
    },
  ],
];

const RECORDS: readonly [string, CoilRecord][] = [
  ...STARTERS.map((name): [string, CoilRecord] => [name, recordOf(starterJob(name), '1.2.3')]),
  ...NAMED.map(([name, parts]): [string, CoilRecord] => [name, recordOf(jobOf(parts), '1.2.3')]),
];

const RIGHT = recordOf(jobOf(change(RANGE, 'winding', { 'tap-layout': 'staggered' })), '1.2.3');
const LEFT = recordOf(jobOf(change(RANGE, 'winding', { 'tap-layout': 'staggered', hand: 'left' })), '1.2.3');

function windingOf(record: CoilRecord): Winding {
  const one = record.windings[0]!;
  return {
    places: one.turnPositionsMm,
    turns: one.turns,
    pitchMm: one.pitchMm,
    meanDiameterMm: one.meanDiameterMm,
    bareMm: one.wire.bareMm,
  };
}

/** Every number in a value, with the path to it. */
function numbersIn(value: unknown, path = ''): [string, number][] {
  if (typeof value === 'number') return [[path, value]];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}/${key}`));
}

describe.each(RECORDS)('the record of %s', (name, record) => {
  const winding = record.windings[0]!;
  const { taps } = winding;

  it('has the shape of its schema, unchanged by writing and reading', () => {
    expect(recordSchema.parse(record)).toEqual(record);
    const again = recordSchema.parse(JSON.parse(JSON.stringify(record)));
    expect(again).toEqual(record);
    expect(hashOf(again)).toBe(record.hash);
  });

  it('holds only finite numbers, and angles in [0, 360)', () => {
    const numbers = numbersIn(record);
    expect(numbers.length).toBeGreaterThan(100);
    for (const [path, value] of numbers) {
      expect([path, Number.isFinite(value)]).toEqual([path, true]);
      if (path.endsWith('angleDeg')) expect([path, value >= 0 && value < 360]).toEqual([path, true]);
    }
  });

  it('keeps what was given apart from what was assumed', () => {
    const given = new Set(Object.keys(record.given));
    expect(given.size).toBeGreaterThan(0);
    expect(Object.keys(record.assumed).length).toBeGreaterThan(0);
    expect(Object.keys(record.assumed).filter((key) => given.has(key))).toEqual([]);
  });

  it('has its taps in order, the whole coil last, and some coil in circuit at the first (common practice)', () => {
    expect(taps.length).toBe(record.demand.taps);
    expect(taps.map((tap) => tap.tap)).toEqual(taps.map((_tap, i) => i + 1));
    expect(taps[0]!.turn).toBeGreaterThan(0);
    const last = taps.at(-1)!;
    expect([last.turn, last.inductanceUh, last.resistanceDcOhm, last.wireFromStartM, last.woundLengthMm]).toEqual([
      winding.turns,
      winding.inductanceUh,
      winding.resistanceDcOhm,
      winding.wireLengthM,
      winding.windingLengthMm,
    ]);
    for (let i = 1; i < taps.length; i++)
      for (const key of [
        'turn',
        'positionMm',
        'inductanceUh',
        'targetUh',
        'wireFromStartM',
        'resistanceDcOhm',
      ] as const)
        expect(taps[i]![key]).toBeGreaterThan(taps[i - 1]![key]);
    // More turns tune lower (common practice).
    for (let i = 1; i < taps.length; i++) {
      const [upper, lower] = [taps[i - 1]!.range, taps[i]!.range];
      if (upper === null || lower === null) continue;
      expect(lower.lowKhz).toBeLessThan(upper.lowKhz);
      expect(lower.highKhz).toBeLessThan(upper.highKhz);
    }
  });

  it('agrees with the rings of its own turn positions, pair by pair', () => {
    let worst = 0;
    for (const tap of taps) {
      const expected = inductanceUh(windingOf(record), tap.turn);
      worst = Math.max(worst, Math.abs(tap.inductanceUh / expected - 1));
      expect(Math.abs(tap.deviationPercent - 100 * (tap.inductanceUh / tap.targetUh - 1))).toBeLessThan(1e-3);
      expect(tap.inductanceLowUh).toBeLessThan(tap.inductanceUh);
      expect(tap.inductanceHighUh).toBeGreaterThan(tap.inductanceUh);
    }
    console.log(`record of ${name}: ${taps.length} inductances from the record, worst ${worst.toExponential(1)}`);
    // Positions are rounded to 0.1 um and inductances to six digits.
    expect(worst).toBeLessThan(1e-4);
    const whole = taps.at(-1)!;
    if (record.former.kind === 'printed') expect(Math.abs(whole.deviationPercent)).toBeLessThanOrEqual(0.1);
  });

  it('agrees with its own wire, piece by piece', () => {
    const { strands, strandMm, bareMm } = winding.wire;
    const mm2 = strands > 1 ? (strands * Math.PI * strandMm ** 2) / 4 : (Math.PI * bareMm ** 2) / 4;
    for (const tap of taps) {
      const length = wireM(windingOf(record), tap.turn);
      const loops = record.tapMethod.loopM * (tap.tap - 1);
      // Written to a tenth of a millimetre.
      expect(Math.abs(tap.wireFromStartM - length - loops)).toBeLessThan(1e-4 * length + 6e-5);
      // A twisted loop is soldered at its root and carries nothing, others are wound through; a tap is measured at the
      // end of its loop, half way along. Strands of one bunching are 1.5 % longer than the bundle.
      const own = tap.tap < taps.length ? record.tapMethod.loopM / 2 : 0;
      const through = record.tapMethod.name === 'twisted loop' ? 0 : loops + own;
      const ohm = (COPPER * (length + through) * (strands > 1 ? 1.015 : 1)) / mm2;
      expect(Math.abs(tap.resistanceDcOhm / ohm - 1)).toBeLessThan(1e-4);
      expect(tap.resistanceLowOhm).toBeLessThan(tap.resistanceDcOhm);
      expect(tap.resistanceHighOhm).toBeGreaterThan(tap.resistanceDcOhm);
    }
    // Copper of 8.89 g/cm3 (NBS Circular 31), of strands as long as they are.
    const copperM = winding.wireLengthM * (strands > 1 ? 1.015 : 1);
    expect(Math.abs(winding.wireMassG / (copperM * mm2 * 8.89) - 1)).toBeLessThan(1e-3);
  });

  it('has every hole and tap where the wire of its turn positions passes', () => {
    const hand = record.frame.hand === 'right' ? 1 : -1;
    const check = (turn: number, axialMm: number, angleDeg: number) => {
      expect(Math.abs(axialMm - placeAt(windingOf(record), turn))).toBeLessThan(2e-4);
      const apart = (((angleDeg - hand * turn * 360) % 360) + 360) % 360;
      // The turn is rounded to a millionth, which is 0.36 millidegree.
      expect(Math.min(apart, 360 - apart)).toBeLessThan(3e-4);
    };
    let count = 0;
    for (const hole of record.holes)
      if (hole.turn !== null) {
        check(hole.turn, hole.axialMm, hole.angleDeg);
        count++;
      }
    for (const tap of taps) check(tap.turn, tap.positionMm, tap.angleDeg);
    check(0, winding.startMm, 0);
    expect(count).toBeGreaterThan(1);
    const finish = record.holes.find((hole) => hole.label === 'F')!;
    expect([finish.turn, finish.axialMm, finish.angleDeg, finish.tap]).toEqual([
      winding.turns,
      winding.finishMm,
      taps.at(-1)!.angleDeg,
      taps.length,
    ]);
    expect(winding.windingLengthMm).toBeCloseTo(winding.finishMm - winding.startMm + winding.wire.overallMm, 3);
  });
});

describe('the hash of a record', () => {
  const record = RECORDS[4]![1];

  it('is that of the figures and not of the order of keys, nor of program and files', () => {
    const turned = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(turned);
      if (typeof value !== 'object' || value === null) return value;
      return Object.fromEntries(
        Object.entries(value)
          .reverse()
          .map(([key, inner]) => [key, turned(inner)]),
      );
    };
    const reversed = recordSchema.parse(record);
    expect(hashOf(turned(reversed) as CoilRecord)).toBe(record.hash);
    expect(
      hashOf({ ...record, program: 'another', files: [{ path: 'x', kind: 'y', sha256: 'z' }] } as CoilRecord),
    ).toBe(record.hash);
    expect(record.hash).toMatch(/^[0-9a-f]{64}$/);
  });

  it('changes with every single figure', () => {
    let changes = 0;
    const seen = new Set([record.hash]);
    const { hash: _hash, program: _program, files: _files, ...body } = record;
    const walk = (value: Record<string, unknown>) => {
      for (const [key, inner] of Object.entries(value)) {
        if (typeof inner === 'number') {
          value[key] = inner + 1e-4;
          seen.add(hashOf(copy));
          value[key] = inner;
          changes++;
        } else if (typeof inner === 'object' && inner !== null) walk(inner as Record<string, unknown>);
      }
    };
    const copy = structuredClone(body) as typeof body;
    // Places of turns are many and alike: a few of them stand for all.
    copy.windings[0]!.turnPositionsMm.splice(3);
    seen.add(hashOf(copy));
    walk(copy as unknown as Record<string, unknown>);
    console.log(`hash: ${changes} figures changed one at a time`);
    expect(changes).toBeGreaterThan(100);
    expect(seen.size).toBe(changes + 2);
  });

  it('is the same for the same job and another for another', () => {
    expect(recordOf(jobOf(TUBE), '1.2.3').hash).toBe(recordOf(jobOf(TUBE), '9.9.9').hash);
    expect(new Set(RECORDS.map(([, one]) => one.hash)).size).toBe(RECORDS.length);
  });
});

describe('the other hand', () => {
  it('mirrors every angle and changes no other figure', () => {
    const mirror = (value: unknown, key: string, feature: unknown): unknown => {
      // Ears and the mark of the datum belong to the former and not to the helix.
      if (key === 'angleDeg' && !['ears', 'datumMark'].includes(String(feature)))
        return Math.round(((360 - (value as number)) % 360) * 1e4) / 1e4;
      if (Array.isArray(value)) return value.map((inner) => mirror(inner, '', key));
      if (typeof value !== 'object' || value === null) return value;
      return Object.fromEntries(Object.entries(value).map(([inner, of]) => [inner, mirror(of, inner, key || feature)]));
    };
    const { windings, holes, former, ...rest } = RIGHT;
    expect(mirror(windings, 'windings', '')).toEqual(LEFT.windings);
    expect(mirror(holes, 'holes', '')).toEqual(LEFT.holes);
    expect(mirror(former, 'former', '')).toEqual(LEFT.former);
    expect([RIGHT.frame.hand, LEFT.frame.hand]).toEqual(['right', 'left']);
    expect(new Set(windings[0]!.taps.map((tap) => tap.angleDeg)).size).toBeGreaterThan(5);
    for (const key of ['chosen', 'alternatives', 'checks', 'corrections', 'demand', 'tapMethod'] as const)
      expect(LEFT[key]).toEqual(rest[key]);
  });
});

describe('what the bench is told', () => {
  const steps = (record: CoilRecord) => record.steps.map(({ text }) => text).join('\n');
  const tube = recordOf(starterJob('cracked-form-replacement'), '1.2.3');

  it('says of every hole in a tube how wide it is drilled', () => {
    const said = /the (\d+) holes \(taps ([\d.]+) mm, all others ([\d.]+) mm\)/.exec(steps(tube))!;
    expect(Number(said[1])).toBe(tube.holes.length);
    expect(tube.holes.length).toBeGreaterThan(5);
    for (const { purpose, diameterMm } of tube.holes) expect(diameterMm).toBe(Number(said[purpose === 'tap' ? 2 : 3]));
  });

  it('shields a former that softens from the iron, and only such a one', () => {
    expect([tube.former.material, RIGHT.former.material]).toEqual(['phenolic paper', 'PLA']);
    expect(steps(RIGHT)).toContain('the former softens');
    expect(steps(tube)).not.toContain('softens');
  });

  it('warns of the dust of phenolic paper, and of baking only with card', () => {
    expect(tube.cautions.join(' ')).toContain('dust');
    expect(tube.cautions.join(' ')).not.toContain('baked');
    const card = recordOf(jobOf(change(TUBE, 'former', { material: 'card' })), '1.2.3').cautions.join(' ');
    expect(card).toContain('baked');
    expect(card).not.toContain('dust');
  });
});
