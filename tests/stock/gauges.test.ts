import { describe, expect, it } from 'vitest';
import { awgDiameterMm } from '../../src/stock/awg.ts';
import { MM_PER_MIL, NEMA_ROWS } from '../../src/stock/nemaMw1000.ts';
import { SWG_INCHES } from '../../src/stock/swg.ts';
import { AWG_PRINTED } from './published.ts';

/** Half of the last printed digit: four figures of the mil. */
function rounding(mil: number): number {
  return 0.5 * 10 ** (Math.floor(Math.log10(mil)) - 3);
}

describe('American Wire Gauge, against ASTM B258', () => {
  it('gives the printed mils within their four-figure rounding', () => {
    console.log(`AWG against ASTM B258: ${AWG_PRINTED.length} sizes`);
    expect(AWG_PRINTED.length).toBeGreaterThan(0);
    for (const [awg, mil] of AWG_PRINTED) {
      const error = Math.abs(awgDiameterMm(awg) / MM_PER_MIL - mil);
      // the printed table cuts some figures to three (40.3 for 40.30); its last digit is still the fourth
      expect(error, `${awg} AWG`).toBeLessThanOrEqual(rounding(mil) * 1.0001);
    }
  });

  it('has the two sizes that define it, exactly', () => {
    expect(awgDiameterMm(36)).toBeCloseTo(0.127, 12);
    expect(awgDiameterMm(-3)).toBeCloseTo(11.684, 12);
  });

  it('gives the ohms per km that follow from 0.017241 ohm mm2/m', () => {
    expect(AWG_PRINTED.length).toBeGreaterThan(0);
    for (const [awg, , ohmsPerKm] of AWG_PRINTED) {
      const area = (Math.PI / 4) * awgDiameterMm(awg) ** 2;
      // the table is rounded to 1e-4 ohm, at worst 1.5e-5 of a value
      expect(Math.abs(17.241 / area / ohmsPerKm - 1), `${awg} AWG`).toBeLessThan(2e-5);
    }
  });

  it('lies within the bare limits of NEMA MW 1000 and rounds to its nominal', () => {
    console.log(`AWG against NEMA MW 1000: ${NEMA_ROWS.size} sizes`);
    expect(NEMA_ROWS.size).toBe(32);
    for (const row of NEMA_ROWS.values()) {
      const mil = awgDiameterMm(row.awg) / MM_PER_MIL;
      expect(mil).toBeGreaterThan(row.bareMinMil);
      expect(mil).toBeLessThan(row.bareMaxMil);
      // nominal printed to a tenth of a mil
      expect(Math.abs(mil - row.bareNominalMil), `${row.awg} AWG`).toBeLessThanOrEqual(0.0501);
    }
  });
});

describe('Standard Wire Gauge, against the rule of BS 3737', () => {
  it('steps 0.8 thousandths from 30 to 39 and 0.4 from 39 to 49', () => {
    let cases = 0;
    for (let number = 30; number < 49; number++) {
      const step = SWG_INCHES.get(number)! - SWG_INCHES.get(number + 1)!;
      expect(step, `${number} to ${number + 1} SWG`).toBeCloseTo(number < 39 ? 0.0008 : 0.0004, 12);
      cases++;
    }
    console.log(`SWG steps: ${cases}`);
    expect(cases).toBe(19);
  });

  it('falls with every number, in shrinking steps', () => {
    const inches = [...SWG_INCHES.values()];
    expect([...SWG_INCHES.keys()]).toEqual(Array.from({ length: 41 }, (_, i) => i + 10));
    for (let i = 2; i < inches.length; i++) {
      expect(inches[i]!).toBeLessThan(inches[i - 1]!);
      expect(inches[i - 1]! - inches[i]!).toBeLessThanOrEqual(inches[i - 2]! - inches[i - 1]! + 1e-12);
    }
  });
});
