/** What instruments will show, against formulas of their own and against the record's own figures. */
import { describe, expect, it } from 'vitest';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { change, jobOf, type Parts, RANGE, TUBE } from '../helpers/jobs.ts';

const shop = (keys: Readonly<Record<string, unknown>>) => ({ shop: keys }) as unknown as Partial<Parts>;
const made = (parts: Parts) => recordOf(jobOf(parts), '1.2.3');

const TUBE_1KHZ = made({ ...TUBE, ...shop({ meter: '1 kHz', capacitors: ['100 pF'] }) });
const TUBE_2MHZ = made({ ...TUBE, ...shop({ meter: '2 MHz', capacitors: ['47 pF', '100 pF', '1000 pF'] }) });
const FEW = made({
  want: { inductance: '0.5 uH to 4 uH', taps: 4 },
  former: { 'outside-diameter': '50 mm' },
  wire: ['0.5 mm enamel'],
});
const LITZ = made(change(RANGE, 'winding', { earthed: 'finish' }));
const RECORDS: readonly [string, CoilRecord][] = [
  ['a tube', made(TUBE)],
  ['a tube, meter of 1 kHz', TUBE_1KHZ],
  ['a tube, meter of 2 MHz', TUBE_2MHZ],
  ['a few turns', FEW],
  ['litz, hot at the start', LITZ],
];

/** kHz of uH and pF. */
const resonanceKhz = (uh: number, pf: number) => 1e6 / (2 * Math.PI * Math.sqrt(uh * pf));

describe.each(RECORDS)('the instruments for %s', (name, record) => {
  const { measuring, shop, windings } = record;
  const winding = windings[0]!;
  const last = winding.taps.length;
  const whole = winding.taps[last - 1]!;

  it('resonates the whole coil where its own L and C say', () => {
    let worst = 0;
    const found = measuring.resonances.filter(({ tap }) => tap === last);
    for (const { capacitancePf, frequencyKhz, lowKhz, highKhz } of found) {
      const plain = resonanceKhz(whole.inductanceUh, capacitancePf + winding.selfCapacitancePf);
      // Crowding of the current raises it by up to half a percent of L; nothing lowers it but the spread of the capacitance.
      worst = Math.max(worst, Math.abs(frequencyKhz / plain - 1));
      expect(lowKhz).toBeLessThan(frequencyKhz);
      expect(highKhz).toBeGreaterThan(frequencyKhz);
      // The capacitor alone accounts for that much.
      const share = (shop.capacitorTolerance * capacitancePf) / (2 * (capacitancePf + winding.selfCapacitancePf));
      expect((highKhz - lowKhz) / (2 * frequencyKhz)).toBeGreaterThan(share);
    }
    console.log(`${name}: ${found.length} resonances of the whole coil, worst ${worst.toExponential(1)}`);
    expect(found.length).toBe(shop.capacitorsPf.length);
    expect(worst).toBeLessThan(0.01);
  });

  it('shows the inductance at the frequency, raised by the capacitance', () => {
    let checked = 0;
    for (const { tap, inductanceUh, readingUh, lowUh, highUh } of measuring.meter) {
      const { inductanceUh: lowFrequency } = winding.taps[tap - 1]!;
      expect(inductanceUh).toBeLessThanOrEqual(lowFrequency * (1 + 1e-5));
      expect(inductanceUh).toBeGreaterThan(0.97 * lowFrequency);
      if (readingUh === null) continue;
      checked++;
      // The whole coil has its self-capacitance across it: L/(1 - w²LC), to what is not known of where that lies.
      const omega = 2e3 * Math.PI * shop.meterKhz;
      const rise = omega ** 2 * inductanceUh * winding.selfCapacitancePf * 1e-18;
      // The two distributions differ in the second order of that.
      if (tap === last) expect(Math.abs((readingUh * (1 - rise)) / inductanceUh - 1)).toBeLessThan(1e-4 + rise ** 2);
      else expect(readingUh).toBeGreaterThanOrEqual(inductanceUh * (1 - 1e-5));
      expect((highUh! - lowUh!) / (2 * readingUh)).toBeGreaterThan(shop.meterAccuracy);
    }
    expect(checked).toBeGreaterThan(0);
  });

  it('doubts the meter where its rule says, and nowhere else', () => {
    for (const { tap, readingUh, q, doubt } of measuring.meter) {
      const leads = readingUh === null || measuring.leadUh / readingUh > shop.meterAccuracy;
      if (doubt === null) expect([tap, leads, q >= 1]).toEqual([tap, false, true]);
      if (doubt === 'leads') expect([tap, leads]).toEqual([tap, true]);
      if (doubt === 'resistance') expect([tap, leads, q < 1]).toEqual([tap, false, true]);
    }
    const trusted = measuring.meter.filter(({ doubt }) => doubt === null).map(({ tap }) => tap);
    expect([measuring.fromTap, measuring.toTap]).toEqual([trusted[0] ?? null, trusted.at(-1) ?? null]);
  });

  it('has the line of its resonances', () => {
    const found = measuring.resonances.filter(({ tap }) => tap === last);
    const square = (kHz: number) => (1e3 / kHz) ** 2;
    const { slopePerPf, selfPf, inductanceUh } = measuring.line;
    expect(inductanceUh / (slopePerPf / (4e-6 * Math.PI ** 2))).toBeCloseTo(1, 4);
    // Through the first and the last; one alone lies on it to the crowding of the current.
    const within = found.length > 1 ? 1e-3 : 1e-2;
    for (const each of [found[0]!, found.at(-1)!])
      expect(Math.abs((slopePerPf * (each.capacitancePf + selfPf)) / square(each.frequencyKhz) - 1)).toBeLessThan(
        within,
      );
  });
});

describe('where a meter is of no use', () => {
  it('is doubted for resistance at 1 kHz, and gives no reading to trim by', () => {
    const { meter } = TUBE_1KHZ.measuring;
    expect(meter.map(({ doubt }) => doubt)).toContain('resistance');
    expect(meter.at(-1)!.doubt).toBe('resistance');
    expect(TUBE_1KHZ.corrections.every(({ fromUh, toUh }) => fromUh === null && toUh === null)).toBe(true);
  });

  it('is doubted for its leads on a few turns', () => {
    expect(FEW.measuring.meter[0]!.doubt).toBe('leads');
    expect(FEW.measuring.fromTap).toBeGreaterThan(1);
  });

  it('shows far more than there is near the resonance of the coil with itself', () => {
    const { readingUh, inductanceUh, doubt } = TUBE_2MHZ.measuring.meter.at(-1)!;
    expect(readingUh!).toBeGreaterThan(1.02 * inductanceUh);
    expect(doubt).toBe('capacitance');
  });
});
