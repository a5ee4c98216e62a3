/** What generator and probe will show, in the record: against its own table without them, and as the instruments change. */
import { describe, expect, it } from 'vitest';
import { recordOf } from '../../src/plan.ts';
import { instrumentsOf } from '../../src/record/instruments.ts';
import { workingCoilOf } from '../../src/record/rebuild.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { change, jobOf, type Parts, RANGE, TUBE } from '../helpers/jobs.ts';

const shop = (keys: Readonly<Record<string, unknown>>) => ({ shop: keys }) as unknown as Partial<Parts>;
const made = (parts: Parts) => recordOf(jobOf(parts), '1.2.3');

const RECORDS: readonly [string, CoilRecord][] = [
  ['a tube', made(TUBE)],
  ['a tube with other instruments', made({ ...TUBE, ...shop({ generator: '600 ohm', 'generator-coupling': 'loop' }) })],
  ['litz, hot at the start', made(change(RANGE, 'winding', { earthed: 'finish' }))],
];
const NONE = { generatorOhm: 50, couplingPf: null, probePf: 0, probeOhm: 1e9, stated: true };

describe.each(RECORDS)('generator and probe on %s', (name, record) => {
  const { measuring, surroundings } = record;
  const { taps } = record.windings[0]!;
  const { rows } = measuring.instruments!;
  const anew = (change: object, capacitorsPf = record.shop.capacitorsPf) =>
    instrumentsOf(
      workingCoilOf(record),
      taps,
      { ...record.shop, capacitorsPf, instruments: { ...record.shop.instruments!, ...change } },
      surroundings.formerLossTangent,
    ).rows;

  it('has every tap with the largest capacitor, the whole coil with none and all', () => {
    const told = rows.map(({ tap, capacitancePf }) => [tap, capacitancePf]);
    const { capacitorsPf } = record.shop;
    const last = taps.length;
    expect(told).toEqual([
      ...taps.slice(0, -1).map(({ tap }) => [tap, capacitorsPf.at(-1)]),
      ...[0, ...capacitorsPf].map((pf) => [last, pf]),
    ]);
  });

  it('is the resonance of the table without them', () => {
    let checked = 0;
    for (const { tap, capacitancePf, aloneKhz } of rows) {
      const found = measuring.resonances.find((one) => one.tap === tap && one.capacitancePf === capacitancePf);
      if (found === undefined) continue;
      checked++;
      // Crowding is taken in between at other frequencies: 2e-5.
      expect(Math.abs(aloneKhz / found.frequencyKhz - 1)).toBeLessThan(5e-5);
    }
    expect(checked).toBe(taps.length + record.shop.capacitorsPf.length - 1);
    // Nothing to load it: both columns are one, to what loss does at the peak.
    for (const { aloneKhz, frequencyKhz, aloneWidthKhz, widthKhz, lowKhz, highKhz } of anew(NONE)) {
      expect(Math.abs(frequencyKhz! / aloneKhz - 1)).toBeLessThan(1e-5);
      expect(Math.abs(widthKhz! / aloneWidthKhz! - 1)).toBeLessThan(0.01);
      expect(lowKhz!).toBeLessThan(frequencyKhz!);
      expect(highKhz!).toBeGreaterThan(frequencyKhz!);
    }
    console.log(`${name}: ${checked} resonances with and without`);
  });

  it('lowers as the capacitance of the probe says, and widens with its loss', () => {
    let ran = 0;
    for (const { tap, capacitancePf: pf, aloneKhz, frequencyKhz, ...row } of rows) {
      const { probePf, couplingPf } = record.shop.instruments!;
      const added = probePf + (couplingPf ?? 0);
      const own = workingCoilOf(record).coil.selfPf(taps[tap - 1]!.turn);
      // As if own capacitance and the turns beyond were one capacitor: what those turns add at a tap, and the spread along the coil, take up to a tenth off that.
      const fall = 1 - Math.sqrt((pf + own) / (pf + own + added));
      expect(Math.abs((1 - frequencyKhz! / aloneKhz) / fall - 1)).toBeLessThan(0.12);
      expect(row.widthLowKhz!).toBeLessThan(row.widthKhz!);
      expect(row.widthHighKhz!).toBeGreaterThan(row.widthKhz!);
      ran++;
    }
    expect(ran).toBe(rows.length);
    const heavier = anew({ probePf: 20 });
    const lossy = anew({ probeOhm: 3e5 });
    rows.forEach((row, i) => {
      expect(heavier[i]!.frequencyKhz!).toBeLessThan(row.frequencyKhz!);
      expect(lossy[i]!.widthKhz!).toBeGreaterThan(row.widthKhz!);
    });
    console.log(`${name}: ${ran} rows, ${heavier.length} heavier and lossier`);
  });

  it('says nothing where the probe damps everything away', () => {
    for (const { frequencyKhz, widthKhz, q } of anew({ probeOhm: 20 }))
      expect([frequencyKhz, widthKhz, q]).toEqual([null, null, null]);
  });

  it('is asked without a capacitor where there is none', () => {
    const bare = anew({}, []);
    expect(bare.map(({ tap, capacitancePf }) => [tap, capacitancePf])).toEqual(taps.map(({ tap }) => [tap, 0]));
  });
});
