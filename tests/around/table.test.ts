/** The table of contacts: limits, monotony, reciprocity, and that its rows are what a look at one pair gives. */
import fc from 'fast-check';
import { beforeAll, describe, expect, test } from 'vitest';
import { aerialImpedance, DUMMY } from '../../src/around/aerial.ts';
import { bestOf, judged, mostPower, tunesMost, USES, WEAKEST_DB } from '../../src/around/best.ts';
import { type Contact, type Load, leftOf, tunedTo } from '../../src/around/response.ts';
import {
  type Arrangement,
  LEAST_Q,
  OFF_KHZ,
  portsOf,
  rangeOf,
  type TablePair,
  tableOf,
} from '../../src/around/table.ts';
import { Coil } from '../../src/coil/coil.ts';
import { spanOf } from '../../src/coil/positions.ts';
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import { findWire } from '../../src/stock/find.ts';

const TAPS = [14, 22, 32.5, 48];
const NUMBERS = TAPS.map((_, i) => i + 1);
const made = (earthed: 'start' | 'finish') => {
  const found = findWire('0.5 mm enamel');
  if (!found.ok) throw new Error('no wire');
  const shape = { wire: found.wire, meanDiameterMm: 60, pitchMm: 0.6, turns: 48, gaps: [], startMm: 10 };
  return new WorkingCoil(new Coil(shape), TAPS, { leadPf: 2, earthed, celsius: 20 });
};
const load = (ohm: number, pf = 0): Load => ({ conductance: 1 / ohm, capacitance: pf * 1e-12 });
const loose = (pf: number) =>
  aerialImpedance({ resistanceOhm: 25, inductanceUh: 0, capacitancePf: pf, shunt: null, seriesPf: null });

let plain: Arrangement;
let table: TablePair[];
const CHANNELS = [600, 900, 1300];
beforeAll(() => {
  plain = {
    coil: made('start'),
    rest: 'open',
    lossTangent: 0.01,
    second: null,
    capacitorLowPf: 15,
    capacitorHighPf: 500,
    strayPf: 12,
    source: aerialImpedance({ ...DUMMY, seriesPf: 47 }),
    load: load(50e3, 5),
  };
  table = tableOf(plain, NUMBERS, NUMBERS, CHANNELS);
});
const connect = (of: Arrangement, aerial: Contact, detector: Contact) => ({
  aerial: { at: aerial, source: of.source },
  detector: { at: detector, load: of.load },
});
const tunedAt = (of: Arrangement, aerial: Contact, detector: Contact, kHz = 900, tap = 4) =>
  tunedTo(portsOf(of, of.coil.taps[tap - 1]!, kHz), connect(of, aerial, detector), kHz)!;

describe('rows of the table', () => {
  test('every row is what one look at its pair and position gives, and no other position serves better', () => {
    let ran = 0;
    for (const { aerial, detector, rows } of table) {
      expect(rows.map(({ kHz }) => kHz)).toEqual(CHANNELS.filter((kHz) => rows.some((row) => row.kHz === kHz)));
      for (const kHz of CHANNELS) {
        const row = rows.find((one) => one.kHz === kHz) ?? null;
        for (const tap of NUMBERS) {
          const ports = portsOf(plain, TAPS[tap - 1]!, kHz);
          const connected = connect(plain, aerial, detector);
          const tuned = tunedTo(ports, connected, kHz);
          const capacitor = (tuned?.tuningPf ?? Number.NaN) - plain.strayPf;
          const tunes = tuned !== null && capacitor >= 15 && capacitor <= 500 && tuned.q >= LEAST_Q;
          const dead = Math.max(aerial as number, detector as number) > tap;
          if (!tunes) {
            expect(row?.tap).not.toBe(tap);
            continue;
          }
          expect(row).not.toBeNull();
          if (row!.dead === dead) expect(tuned.power).toBeLessThanOrEqual(row!.tuned.power * (1 + 1e-12));
          else expect(row!.dead).toBe(false);
          if (row!.tap !== tap) continue;
          expect(row!.capacitorPf).toBeCloseTo(capacitor, 6);
          expect(row!.tuned.q).toBeCloseTo(tuned.q, 6);
          OFF_KHZ.forEach((off, i) => {
            expect(row!.left[i]).toBeCloseTo(leftOf(ports, connected, tuned, off), 9);
          });
          ran++;
        }
      }
    }
    console.log(`rows of the table looked at again: ${ran}`);
    expect(ran).toBeGreaterThan(30);
  });

  test('farther off less is left, where the peak is the only one near', () => {
    let ran = 0;
    for (const { rows } of table)
      for (const { tuned, left, dead } of rows) {
        if (dead || tuned.q < 30) continue;
        for (let i = 1; i < left.length; i++) expect(left[i]).toBeLessThan(left[i - 1]!);
        expect(left[0]).toBeLessThan(1);
        ran++;
      }
    console.log(`rows with less left farther off: ${ran}`);
    expect(ran).toBeGreaterThan(15);
  });

  test('a contact on earth has no rows: the whole coil in use with its finish earthed', () => {
    const other: Arrangement = { ...plain, coil: made('finish') };
    const [pair] = tableOf(other, [0], [4], [600]);
    // Only positions with fewer turns could, and those do not tune so low.
    expect(pair!.rows.every(({ tap }) => tap !== 4)).toBe(true);
    const [start] = tableOf(other, [0], [0], [600]);
    expect(start!.rows).toHaveLength(1);
    expect(start!.rows[0]!.dead).toBe(false);
  });
});

describe('what aerial and detector do', () => {
  test('no coupling of the aerial: the gain goes to 0 with its capacitance, and nothing is left of its pull', () => {
    const at = (pf: number) => tunedAt({ ...plain, source: loose(pf) }, 1, 4);
    const bare = at(1e-6);
    let before = Number.POSITIVE_INFINITY;
    for (const pf of [1, 0.1, 0.01, 0.001]) {
      const { gain, tuningPf, q } = at(pf);
      expect(gain).toBeLessThan(before / 5);
      // In proportion, as soon as the aerial no longer loads the coil.
      if (pf < 1) expect(gain / before).toBeCloseTo(0.1, 3);
      expect(Math.abs(tuningPf - bare.tuningPf)).toBeLessThan(pf);
      expect(Math.abs(q / bare.q - 1)).toBeLessThan(0.01 * pf);
      before = gain;
    }
    expect(bare.gain).toBeLessThan(1e-6);
  });

  test('a detector of twice the resistance raises the loaded Q, and halves its part of the loss', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 4 }),
        fc.integer({ min: 1, max: 4 }),
        fc.double({ min: 1e4, max: 1e6, noNaN: true }),
        (aerial, detector, ohm) => {
          const q = (each: number) => tunedAt({ ...plain, load: load(each) }, aerial, detector).q;
          const [once, twice, four] = [q(ohm), q(2 * ohm), q(4 * ohm)];
          expect(twice).toBeGreaterThan(once);
          expect(four).toBeGreaterThan(twice);
          // 1/Q is a straight line in the conductance as long as the load does not move currents: 5 % at a tap that is loaded hard.
          const share = (1 / once - 1 / twice) / (1 / twice - 1 / four);
          if (once > 20) expect(Math.abs(share / 2 - 1)).toBeLessThan(0.05);
        },
      ),
      { seed: 7, numRuns: 25 },
    );
  });

  test('down the coil the aerial pulls the tuning less, tap by tap', () => {
    let ran = 0;
    for (const kHz of [500, 700, 900]) {
      const bare = tunedAt({ ...plain, source: loose(1e-6) }, 1, 1, kHz).tuningPf;
      const pulls = NUMBERS.map((aerial) => bare - tunedAt(plain, aerial, 1, kHz).tuningPf);
      pulls.forEach((pull, i) => {
        expect(pull).toBeGreaterThan(i === 0 ? 0 : pulls[i - 1]!);
        ran++;
      });
    }
    console.log(`pulls of the aerial in order: ${ran}`);
    expect(ran).toBe(12);
  });

  test('reciprocity: source and detector change places, with equal impedances, and the gain is the same', () => {
    let ran = 0;
    // A source behind 30 kohm and 40 kohm as the load: what the one tap gives to the other, the other gives to the one.
    const equal: Arrangement = { ...plain, source: () => ({ re: 30e3, im: 0 }), load: load(30e3) };
    for (const a of NUMBERS)
      for (const d of NUMBERS) {
        const [there, back] = [tunedAt(equal, a, d), tunedAt(equal, d, a)];
        // Rounding only.
        expect(Math.abs(there.gain / back.gain - 1)).toBeLessThan(1e-8);
        expect(Math.abs(there.tuningPf - back.tuningPf)).toBeLessThan(1e-6);
        ran++;
      }
    console.log(`pairs the other way round: ${ran}`);
    expect(ran).toBe(16);
  });
});

describe('the three pairs', () => {
  test('are what their rules say, over all that are judged', () => {
    const all = judged(table);
    const best = bestOf(table)!;
    expect(all.length).toBeGreaterThan(4);
    expect(all.every(({ pair }) => pair.rows.filter(({ dead }) => !dead).length === tunesMost(table))).toBe(true);
    for (const one of all) {
      expect(one.outputDb).toBeLessThanOrEqual(best.strongest.outputDb + 1e-6);
      if (one.outputDb >= best.strongest.outputDb - WEAKEST_DB)
        expect(one.off9Db).toBeGreaterThanOrEqual(best['most selective'].off9Db - 1e-6);
      expect(one.outputDb - one.off9Db).toBeLessThanOrEqual(best.balanced.outputDb - best.balanced.off9Db + 1e-6);
    }
    expect(best['most selective'].outputDb).toBeGreaterThanOrEqual(best.strongest.outputDb - WEAKEST_DB);
    expect(Object.keys(best)).toEqual([...USES]);
    expect(bestOf([])).toBeNull();
    expect([...mostPower(table).keys()].sort((a, b) => a - b)).toEqual(CHANNELS);
  });
});

describe('ranges in the set', () => {
  test('with next to nothing connected they are those of the coil alone', () => {
    const bare: Arrangement = { ...plain, source: loose(1e-6), load: load(1e9) };
    let ran = 0;
    for (const turn of TAPS) {
      const span = spanOf(plain.coil, turn, { outPf: 27, inPf: 512 }, 'open');
      const found = rangeOf(bare, turn, 1, 1, Math.sqrt(span.low.kHz * span.high.kHz))!;
      for (const [at, edge] of [
        [found.lowKhz, span.low],
        [found.highKhz, span.high],
      ] as const) {
        // Of two distributions of the self-capacitance one is taken here; loss moves an edge by 1/(2 Q^2), crowding a little with the frequency it is taken at.
        expect(Math.abs(at - edge.kHz)).toBeLessThan(edge.uncertaintyKhz + 1e-3 * edge.kHz);
        ran++;
      }
    }
    console.log(`edges of ranges with nothing connected: ${ran}`);
    expect(ran).toBe(8);
  });

  test('an edge is where the capacitor ends; a larger aerial lowers both', () => {
    let before = { lowKhz: Number.POSITIVE_INFINITY, highKhz: Number.POSITIVE_INFINITY };
    for (const pf of [5, 20, 60]) {
      const of: Arrangement = { ...plain, source: loose(pf) };
      const found = rangeOf(of, 48, 2, 1, 900)!;
      expect(found.lowKhz).toBeLessThan(before.lowKhz);
      expect(found.highKhz).toBeLessThan(before.highKhz);
      before = found;
      expect(tunedAt(of, 2, 1, found.lowKhz).tuningPf).toBeCloseTo(512, 0);
      expect(tunedAt(of, 2, 1, found.highKhz).tuningPf).toBeCloseTo(27, 0);
    }
  });

  test('null on earth', () => {
    expect(rangeOf({ ...plain, coil: made('finish') }, 48, 4, 1, 900)).toBeNull();
  });
});
