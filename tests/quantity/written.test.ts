import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  forcesText,
  forceText,
  lengthCell,
  lengthCells,
  lengthHeads,
  lengthsText,
  lengthText,
  lengthUnit,
  lengthWord,
  unitsOf,
  wireCell,
  wireText,
  wireUnit,
} from '../../src/quantity/written.ts';

describe('lengths on paper', () => {
  it('tells an exact inch in each of the three ways', () => {
    expect(lengthText(76.2, 'metric')).toBe('76.20 mm');
    expect(lengthText(76.2, 'metric', { digits: 1 })).toBe('76.2 mm');
    expect(lengthText(76.2, 'inch', { digits: 1 })).toBe('3.000 in');
    expect(lengthText(76.2, 'both', { digits: 1 })).toBe('76.2 mm (3.000 in)');
    expect(lengthText(76.2, 'both', { trim: true })).toBe('76.2 mm (3 in)');
    expect(lengthsText([80, 130], 'both', ' × ', { digits: 1 })).toBe('80.0 × 130.0 mm (3.150 × 5.118 in)');
  });

  it('fills columns: one with brackets, or one a unit', () => {
    expect(lengthUnit('both')).toBe('mm (in)');
    expect(lengthWord('inch')).toBe('inches');
    expect(lengthCell(25.4, 'both')).toBe('25.40 (1.0000)');
    expect(lengthHeads('both')).toEqual(['mm', 'in']);
    expect(lengthCells(25.4, 'both', { digits: 1 })).toEqual(['25.4', '1.000']);
    for (const units of ['metric', 'inch', 'both'] as const)
      expect(lengthCells(10, units)).toHaveLength(lengthHeads(units).length);
  });

  it('is metric where the record does not say', () => {
    expect(unitsOf({})).toBe('metric');
    expect(unitsOf({ units: 'both' })).toBe('both');
  });

  it('never writes minus nought', () => {
    expect(lengthText(-0.001, 'both')).toBe('0.00 mm (0.0000 in)');
    expect(lengthCell(-0.0001, 'inch', { trim: true })).toBe('0');
  });

  it('loses nothing by inches: what is read back lies as near as the millimetres do', () => {
    let ran = 0;
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 5000, noNaN: true }),
        fc.integer({ min: 0, max: 3 }),
        fc.boolean(),
        (mm, digits, trim) => {
          ran++;
          const inches = Number(lengthCell(mm, 'inch', { digits, trim }));
          // Half a unit of the last decimal of the millimetres, and what toFixed may miss at 5000.
          expect(Math.abs(inches * 25.4 - mm)).toBeLessThanOrEqual(0.5 * 10 ** -digits + 1e-9);
          expect(lengthCell(mm, 'both', { digits, trim })).toBe(
            `${lengthCell(mm, 'metric', { digits, trim })} (${lengthCell(mm, 'inch', { digits, trim })})`,
          );
        },
      ),
      { seed: 20, numRuns: 500 },
    );
    console.log(`${ran} lengths read back from inches`);
    expect(ran).toBeGreaterThan(0);
  });
});

describe('wire on paper', () => {
  it('tells feet and inches, and never twelve inches', () => {
    expect(wireText(12.34, 'metric')).toBe('12.34 m');
    expect(wireText(12.34, 'inch')).toBe('40 ft 5.8 in');
    expect(wireText(12.34, 'both', 1)).toBe('12.3 m (40 ft 6 in)');
    // 3.048 m is 10 ft; 3.0475 m is 9 ft 11.98 in, which rounds up.
    expect(wireText(3.0475, 'inch')).toBe('10 ft 0.0 in');
    expect(wireCell(12.34, 'both')).toBe('12.34 (40-5.8)');
    expect(wireUnit('both')).toBe('m (ft-in)');
  });

  it('reads back as near as the metres', () => {
    let ran = 0;
    fc.assert(
      fc.property(fc.double({ min: 0, max: 2000, noNaN: true }), fc.integer({ min: 0, max: 3 }), (m, digits) => {
        ran++;
        const [feet, inches] = wireCell(m, 'inch', digits).split('-').map(Number) as [number, number];
        expect(inches).toBeLessThan(12);
        // Half of the last decimal of the metres: whole inches (12.7 mm) are fine enough for 1 and 0 decimals.
        expect(Math.abs((feet * 12 + inches) * 0.0254 - m)).toBeLessThanOrEqual(0.5 * 10 ** -digits + 1e-9);
      }),
      { seed: 21, numRuns: 500 },
    );
    console.log(`${ran} lengths of wire read back from feet and inches`);
    expect(ran).toBeGreaterThan(0);
  });
});

describe('forces on paper', () => {
  it('keeps newtons and adds pounds-force where inches are wanted', () => {
    expect(forceText(9.8, 'metric')).toBe('9.8 N');
    expect(forceText(9.8, 'inch')).toBe('9.8 N (2.20 lbf)');
    expect(forcesText([4, 6], 'both', ' to ', 0)).toBe('4 to 6 N (0.9 to 1.3 lbf)');
  });
});
