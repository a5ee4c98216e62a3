import { describe, expect, it } from 'vitest';
import { SOLDERABLE_TO_MM } from '../../src/stock/enamel.ts';
import { IEC_ROWS } from '../../src/stock/iec60317.ts';
import { heavyMaxOverallMil, MM_PER_MIL, NEMA_ROWS } from '../../src/stock/nemaMw1000.ts';
import { TEXTILE_ADDS_MIL } from '../../src/stock/textile.ts';
import { COVERINGS, type Wire } from '../../src/stock/wire.ts';
import { allWires, wireNamed } from '../../src/stock/wires.ts';
import { COVERED_PRINTED, SINGLE_SILK_MISPRINTS } from './published.ts';

/** Floating point only: every figure has at most six decimals. */
const EXACT = 1e-9;
const mil = (wire: Wire | undefined): number => wire!.overallMm / MM_PER_MIL;

describe('IEC 60317-0-1 table', () => {
  it('orders bare, least, greatest, and grade 2 above grade 1, at every size', () => {
    console.log(`IEC rows: ${IEC_ROWS.length}`);
    expect(IEC_ROWS.length).toBe(39);
    for (const [i, row] of IEC_ROWS.entries()) {
      expect(row.bareMm).toBeGreaterThan(IEC_ROWS[i - 1]?.bareMm ?? 0);
      const least1 = row.bareMm + row.grade1MinIncreaseMm;
      const least2 = row.bareMm + row.grade2MinIncreaseMm;
      expect(least1, `${row.bareMm}`).toBeLessThan(row.grade1MaxOverallMm);
      expect(least2, `${row.bareMm}`).toBeLessThan(row.grade2MaxOverallMm);
      expect(least2, `${row.bareMm}`).toBeGreaterThan(least1);
      expect(row.grade2MaxOverallMm, `${row.bareMm}`).toBeGreaterThan(row.grade1MaxOverallMm);
      // the tolerance is 1 % of the conductor, rounded up to a micrometre, and 3 micrometres at least
      expect(Math.abs(row.toleranceMm - Math.max(0.003, row.bareMm / 100)), `${row.bareMm}`).toBeLessThan(0.00101);
    }
  });

  it('never has a thicker wire with less enamel', () => {
    for (const key of ['grade1MinIncreaseMm', 'grade2MinIncreaseMm'] as const) {
      for (let i = 1; i < IEC_ROWS.length; i++) {
        expect(IEC_ROWS[i]![key], `${IEC_ROWS[i]!.bareMm} ${key}`).toBeGreaterThanOrEqual(IEC_ROWS[i - 1]![key]);
      }
    }
  });
});

describe('NEMA MW 1000 table', () => {
  it('orders its limits, and heavy above single, at every size', () => {
    let both = 0;
    for (const row of NEMA_ROWS.values()) {
      const heavy = heavyMaxOverallMil(row).mil;
      expect(row.bareMinMil).toBeLessThan(row.bareMaxMil);
      expect(row.bareMinMil + row.heavyMinIncreaseMil, `${row.awg} AWG`).toBeLessThan(heavy);
      if (row.singleMaxOverallMil === undefined || row.singleMinIncreaseMil === undefined) continue;
      both++;
      expect(row.bareMinMil + row.singleMinIncreaseMil, `${row.awg} AWG`).toBeLessThan(row.singleMaxOverallMil);
      expect(row.heavyMinIncreaseMil, `${row.awg} AWG`).toBeGreaterThan(row.singleMinIncreaseMil);
      expect(heavy, `${row.awg} AWG`).toBeGreaterThan(row.singleMaxOverallMil);
    }
    console.log(`NEMA sizes with both builds: ${both}`);
    expect(both).toBe(27);
  });

  it('keeps the table where it speaks and lies between its neighbours where it does not', () => {
    expect(heavyMaxOverallMil(NEMA_ROWS.get(24)!)).toEqual({ mil: 22.7, estimated: false });
    // room above the bare wire: 2.7 at 22 AWG, 2.5 at 24 AWG
    const guess = heavyMaxOverallMil(NEMA_ROWS.get(23)!);
    expect(guess.estimated).toBe(true);
    expect(guess.mil).toBeCloseTo(22.7 + 2.6, 9);
    expect(wireNamed('23 AWG enamel heavy')!.status).toContain('estimated');
    expect(wireNamed('24 AWG enamel heavy')!.status).not.toContain('estimated');
  });
});

describe('covered wire, against the table of 1919 (Cyclopedia of Telephony and Telegraphy, Table IV; READ)', () => {
  it('adds the same at every printed gauge, but for three misprints in single silk', () => {
    let cases = 0;
    const misprints: number[] = [];
    for (const [awg, bare, ...covered] of COVERED_PRINTED) {
      for (const [i, covering] of (
        ['single cotton', 'double cotton', 'single silk', 'double silk'] as const
      ).entries()) {
        cases++;
        const error = Math.abs(covered[i]! - bare - TEXTILE_ADDS_MIL[covering]);
        // printed to a thousandth of a mil
        if (error < 0.0006) continue;
        expect(covering, `${awg} AWG`).toBe('single silk');
        misprints.push(awg);
      }
    }
    console.log(`covered wire of 1919: ${cases} entries, misprints at ${misprints.join(', ')} AWG`);
    expect(cases).toBe(84);
    expect(misprints).toEqual(SINGLE_SILK_MISPRINTS);
  });

  it('has the printed overall diameters in stock', () => {
    for (const [awg, , singleCotton, doubleCotton, , doubleSilk] of COVERED_PRINTED) {
      // the bare column of 1919 rounds otherwise than ASTM B258, by up to 0.006 mil
      expect(Math.abs(mil(wireNamed(`${awg} AWG single cotton`)) - singleCotton)).toBeLessThan(0.007);
      expect(Math.abs(mil(wireNamed(`${awg} AWG double cotton`)) - doubleCotton)).toBeLessThan(0.007);
      expect(Math.abs(mil(wireNamed(`${awg} AWG double silk`)) - doubleSilk)).toBeLessThan(0.007);
    }
  });

  it('winds as many enamelled turns to the inch as Collins printed in 1922 (READ)', () => {
    let cases = 0;
    let worst = 0;
    for (const [awg, , , , , , turns] of COVERED_PRINTED) {
      if (turns === undefined) continue;
      cases++;
      const wire = wireNamed(`${awg} AWG enamel`)!;
      worst = Math.max(worst, Math.abs((turns * wire.overallMm) / 25.4 - 1));
    }
    console.log(`enamelled turns to the inch: ${cases} gauges, worst ${(100 * worst).toFixed(1)} %`);
    expect(cases).toBe(11);
    // enamel of 1922 was no NEMA build; a whole turn is up to 3 % of the count
    expect(worst).toBeLessThan(0.04);
  });
});

describe('every wire in stock', () => {
  const wires = allWires();

  it('has limits around its diameters, a copper core inside and a source', () => {
    console.log(`wires in stock: ${wires.length}`);
    expect(wires.length).toBeGreaterThan(500);
    for (const wire of wires) {
      expect(wire.bareMm, wire.name).toBeGreaterThanOrEqual(0.05);
      expect(wire.bareMm, wire.name).toBeLessThanOrEqual(3);
      expect(wire.bareLowMm, wire.name).toBeLessThan(wire.bareMm);
      expect(wire.bareHighMm, wire.name).toBeGreaterThan(wire.bareMm);
      expect(wire.overallLowMm, wire.name).toBeLessThan(wire.overallMm);
      expect(wire.overallHighMm, wire.name).toBeGreaterThan(wire.overallMm);
      if (wire.covering !== 'bare') expect(wire.overallLowMm, wire.name).toBeGreaterThan(wire.bareMm);
      expect([wire.strands, wire.strandMm], wire.name).toEqual([1, wire.bareMm]);
      expect(wire.standard, wire.name).not.toBe('');
      expect(wire.status, wire.name).toMatch(/read|computed|memory|estimated/);
      expect(COVERINGS).toContain(wire.covering);
    }
    expect(new Set(wires.map((wire) => wire.name)).size).toBe(wires.length);
  });

  it('is thicker the more there is on it', () => {
    let cases = 0;
    const rising = [
      ['bare', 'enamel', 'enamel heavy'],
      ['bare', 'single cotton', 'double cotton'],
      ['bare', 'single silk', 'double silk'],
      ['bare', 'single silk', 'single cotton'],
    ] as const;
    const sizes = wires.filter((wire) => wire.covering === 'bare').map((wire) => wire.name.replace(/ bare$/, ''));
    for (const size of sizes) {
      for (const chain of rising) {
        const stocked = chain.flatMap((covering) => wireNamed(`${size} ${covering}`) ?? []);
        for (let i = 1; i < stocked.length; i++) {
          cases++;
          expect(stocked[i]!.overallMm, stocked[i]!.name).toBeGreaterThan(stocked[i - 1]!.overallMm);
        }
      }
    }
    console.log(`thicker by covering: ${cases} pairs`);
    expect(cases).toBeGreaterThan(500);
  });

  it('tins through as stated: bare, and enamel up to 0.5 mm', () => {
    for (const wire of wires) {
      const enamelled = wire.covering.startsWith('enamel') && wire.bareMm <= SOLDERABLE_TO_MM;
      expect(wire.solderable, wire.name).toBe(enamelled || wire.covering === 'bare');
    }
  });

  it('has the standard limits of a wire looked up by hand', () => {
    const metric = wireNamed('0.5 mm enamel')!;
    expect([metric.bareLowMm, metric.bareHighMm, metric.overallLowMm, metric.overallHighMm]).toEqual([
      0.495, 0.505, 0.524, 0.544,
    ]);
    expect(metric.overallMm).toBeCloseTo(0.534, 9);
    const awg = wireNamed('20 AWG enamel')!;
    expect(Math.abs(awg.overallLowMm - 32.9 * MM_PER_MIL)).toBeLessThan(EXACT);
    expect(Math.abs(awg.overallHighMm - 33.9 * MM_PER_MIL)).toBeLessThan(EXACT);
    // SWG 20 (0.036 in) borrows the enamel of 0.9 mm: 0.032 at least, 0.059 at most
    const swg = wireNamed('20 SWG enamel')!;
    expect(swg.overallLowMm).toBeCloseTo(0.9144 + 0.032, 9);
    expect(swg.overallHighMm).toBeCloseTo(0.9144 + 0.059, 9);
    expect(swg.status).toContain('estimated');
  });

  it('is built once', () => {
    expect(allWires()).toBe(wires);
  });
});
