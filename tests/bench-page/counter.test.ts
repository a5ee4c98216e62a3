/** The count: events are taken back exactly, stops hold it, what is kept comes back, wire used goes with the record. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Count, Stop } from '../../src/bench/api.ts';
import {
  confirmStop,
  countTurn,
  heldBy,
  NEW,
  NOTHING,
  nextStop,
  parse,
  plannedAgain,
  serialise,
  stopsOf,
  takeBack,
  turnOf,
  turnsToGo,
} from '../../src/bench/counter.ts';
import { spoolAt, wireUsedM } from '../../src/bench/spool.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { sampleRecord } from '../helpers/sample.ts';

const SEED = { seed: 52_077, numRuns: 150 };

/** Quarter turns from tap to tap, now and then within one turn. */
const coilArbitrary = fc.record({
  steps: fc.array(fc.integer({ min: 1, max: 40 }), { minLength: 1, maxLength: 6 }),
  hand: fc.constantFrom('right' as const, 'left' as const),
});

/** A sample whose wire counts the loops of earlier taps, as the program's records do. */
function recordOf({ steps, hand }: { steps: readonly number[]; hand: 'right' | 'left' }): CoilRecord {
  let turn = 1;
  const turns = steps.map((step) => {
    turn += step / 4;
    return turn;
  });
  const record = sampleRecord({ turns, hand, surface: 'smooth' });
  const winding = record.windings[0]!;
  const { loopM } = record.tapMethod;
  const taps = winding.taps.map((tap, i) => ({ ...tap, wireFromStartM: tap.wireFromStartM + loopM * i }));
  return { ...record, windings: [{ ...winding, taps, wireLengthM: taps.at(-1)!.wireFromStartM }] };
}

/** Presses of the counting key and, more seldom, of Enter, as they come. */
const pressesArbitrary = fc.array(
  fc.nat(5).map((key) => key > 0),
  { minLength: 60, maxLength: 120 },
);

const press = (stops: readonly Stop[], count: Count, counts: boolean) =>
  counts ? countTurn(stops, count) : confirmStop(stops, count);

/** Winds the whole coil, every stop confirmed. */
function windAll(stops: readonly Stop[]): Count {
  let count = NOTHING;
  for (let i = 0; i < 10_000 && nextStop(stops, count) !== null; i++)
    count = heldBy(stops, count) === null ? countTurn(stops, count) : confirmStop(stops, count);
  return count;
}

describe('counting', () => {
  test('taking back is the inverse of every event, down to the start', () => {
    let events = 0;
    fc.assert(
      fc.property(coilArbitrary, pressesArbitrary, (coil, presses) => {
        const stops = stopsOf(recordOf(coil));
        const before: Count[] = [];
        let count = NOTHING;
        for (const counts of presses) {
          const after = press(stops, count, counts);
          if (after !== count) before.push(count);
          count = after;
        }
        events += before.length;
        while (before.length > 0) {
          count = takeBack(count);
          expect(count).toEqual(before.pop());
        }
        expect(takeBack(count)).toBe(count);
      }),
      SEED,
    );
    expect(events).toBeGreaterThan(1000);
    console.log(`events taken back: ${events}`);
  });

  test('stops at the turn before each tap, with the part turn to go on by, and passes none', () => {
    let stopped = 0;
    fc.assert(
      fc.property(coilArbitrary, (coil) => {
        const record = recordOf(coil);
        const stops = stopsOf(record);
        let count = NOTHING;
        for (const stop of stops) {
          while (heldBy(stops, count) === null) count = countTurn(stops, count);
          expect(heldBy(stops, count)).toBe(stop);
          expect(count.whole).toBe(Math.floor(stop.turn + 1e-6));
          expect(countTurn(stops, count)).toBe(count);
          // To 1e-6 of a turn, as the record states it.
          expect(stop.whole + stop.onDeg / 360).toBeCloseTo(stop.turn, 6);
          count = confirmStop(stops, count);
          expect(turnOf(stops, count)).toBe(stop.turn);
          stopped++;
        }
        expect(nextStop(stops, count)).toBeNull();
        expect(turnsToGo(stops, count)).toBe(0);
        expect(turnOf(stops, count)).toBe(record.windings[0]!.turns);
      }),
      SEED,
    );
    expect(stopped).toBeGreaterThan(300);
    console.log(`stops reached: ${stopped}`);
  });

  test('turn 31.125: count to 31, then 45 degrees on, whatever the hand', () => {
    for (const hand of ['right', 'left'] as const) {
      const stop = stopsOf(sampleRecord({ hand })).find(({ key }) => key === 't3')!;
      expect(stop).toMatchObject({ whole: 31, number: 3, kind: 'tap' });
      expect(stop.onDeg).toBeCloseTo(45, 9);
      expect(stop.angleDeg).toBeCloseTo(hand === 'right' ? 45 : 315, 9);
    }
  });

  test('taps of a units switch have names of their own', () => {
    const keys = stopsOf(sampleRecord({ unitTurns: [1, 2, 3], turns: [12, 24, 36] })).map(({ key }) => key);
    expect(new Set(keys).size).toBe(keys.length);
  });
});

describe('what is kept', () => {
  const progressArbitrary = fc.tuple(
    coilArbitrary,
    pressesArbitrary,
    fc.array(
      fc.record({
        turn: fc.integer({ min: 1, max: 60 }),
        lengthMm: fc.double({ min: 0.1, max: 500, noNaN: true }),
        halfMm: fc.double({ min: 0.01, max: 1, noNaN: true }),
        over: fc.constantFrom('extent' as const, 'wires' as const),
      }),
      { maxLength: 4 },
    ),
  );

  test('comes back as it was', () => {
    let cases = 0;
    fc.assert(
      fc.property(progressArbitrary, ([coil, presses, measures]) => {
        const record = recordOf(coil);
        const finish = record.windings[0]!.turns;
        const places = { F: { turn: finish + 0.5, positionMm: 71.25 } };
        const stops = stopsOf(record, places);
        const count = presses.reduce((each, counts) => press(stops, each, counts), NOTHING);
        const progress = { count, places, measures };
        expect(parse(record, serialise(record, progress))).toEqual({ ok: true, progress });
        cases++;
      }),
      SEED,
    );
    expect(cases).toBe(SEED.numRuns);
    console.log(`progress kept and read: ${cases}`);
  });

  test('is refused when of another record, of another version, or spoilt', () => {
    const record = sampleRecord();
    const good = serialise(record, NEW);
    const why = (text: string) => {
      const read = parse(record, text);
      return read.ok ? 'ok' : read.why;
    };
    expect(why(good)).toBe('ok');
    expect(why(serialise({ hash: 'f00d' }, NEW))).toBe('another record');
    expect(why(good.replace('"bench":1', '"bench":2'))).toBe('version');
    const change = (change: object) => JSON.stringify({ ...(JSON.parse(good) as object), ...change });
    const spoilt = [
      '',
      'null',
      '[]',
      good.slice(0, -4),
      change({ log: 'ttx' }),
      change({ log: 's'.repeat(99) }),
      change({ log: 't'.repeat(5000) }),
      change({ places: null }),
      change({ places: { F: { turn: -1, positionMm: 2 } } }),
      change({ measures: [{ turn: 20, lengthMm: null, halfMm: 0.1, over: 'extent' }] }),
      change({ measures: [{ turn: 20, lengthMm: 10, halfMm: 0.1, over: 'across' }] }),
    ];
    for (const text of spoilt) expect(['damaged', 'version'], text).toContain(why(text));
  });

  test('any text is either refused or a count that this coil can have', () => {
    const record = sampleRecord();
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.json()), (text) => {
        expect(parse(record, text).ok).toBe(false);
      }),
      SEED,
    );
  });

  test('places of stops already made stay when a correction is given up', () => {
    const record = sampleRecord({ surface: 'smooth' });
    const places = { t1: { turn: 12.5, positionMm: 20 }, t2: { turn: 21, positionMm: 25 } };
    const stops = stopsOf(record, places);
    let count = NOTHING;
    while (count.done === 0) count = heldBy(stops, count) ? confirmStop(stops, count) : countTurn(stops, count);
    expect(stops[0]).toMatchObject({ key: 't1', turn: 12.5, whole: 12, onDeg: 180, text: '' });
    expect(plannedAgain(stops, count, places)).toEqual({ t1: places.t1 });
  });
});

describe('wire', () => {
  test('used at each tap is that of the record, its loop once it is made; it never shrinks', () => {
    let taps = 0;
    fc.assert(
      fc.property(coilArbitrary, (coil) => {
        const record = recordOf(coil);
        const stops = stopsOf(record);
        let count = NOTHING;
        let last = 0;
        while (nextStop(stops, count) !== null) {
          const held = heldBy(stops, count);
          count = held === null ? countTurn(stops, count) : confirmStop(stops, count);
          const used = wireUsedM(record, stops, count);
          expect(used).toBeGreaterThanOrEqual(last - 1e-9);
          last = used;
          if (held?.kind !== 'tap') continue;
          const { wireFromStartM } = record.windings[0]!.taps.find(({ tap }) => tap === held.number)!;
          expect(used).toBeCloseTo(wireFromStartM + record.tapMethod.loopM, 9);
          taps++;
        }
        expect(last).toBeCloseTo(record.windings[0]!.taps.at(-1)!.wireFromStartM, 9);
      }),
      { ...SEED, numRuns: 100 },
    );
    expect(taps).toBeGreaterThan(100);
    console.log(`taps with their wire: ${taps}`);
  });

  test('left and lacking: what the spool held, less both ends and what is used', () => {
    const record = recordOf({ steps: [20, 30, 25], hand: 'right' });
    const stops = stopsOf(record);
    const { leadsM, taps } = record.windings[0]!;
    const whole = taps.at(-1)!.wireFromStartM + leadsM;
    const start = spoolAt(record, stops, NOTHING, whole + 1);
    expect(start.usedM).toBe(0);
    expect(start.leftM! - start.neededM).toBeCloseTo(1, 9);
    expect(start.lackM).toBe(0);
    const end = spoolAt(record, stops, windAll(stops), whole - 1);
    expect(end.lackM).toBeCloseTo(1, 9);
    expect(end.neededM).toBeCloseTo(leadsM / 2, 9);
    expect(spoolAt(record, stops, NOTHING, null)).toMatchObject({ leftM: null, lackM: null });
  });
});
