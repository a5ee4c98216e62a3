import { describe, expect, test } from 'vitest';
import { boundFor, canMeasure, canTighten, LEDGER, MEASURES, measure, ROUNDING } from './ledger.ts';

const loose: string[] = [];

describe('accuracy ledger', () => {
  test('every case has a measure, a source and a status, and every measure a case', () => {
    expect(LEDGER.map(({ id }) => id).sort()).toEqual(Object.keys(MEASURES).sort());
    for (const { id, what, reference, status, kind, bound, demand } of LEDGER) {
      expect(what.length * reference.length, id).toBeGreaterThan(0);
      expect(['READ', 'COMPUTED', 'FROM MEMORY'], id).toContain(status);
      expect(['relative', 'absolute'], id).toContain(kind);
      if (demand !== undefined) expect(bound, `${id}: looser than was asked for`).toBeLessThanOrEqual(demand);
    }
  });

  test.each(LEDGER.map((row) => [row.id, row] as const))('%s', (id, row) => {
    if (!canMeasure(row)) {
      console.log(`accuracy ledger: ${id} skipped, ${row.needs} is not installed`);
      return;
    }
    const { cases, error } = measure(id);
    expect(cases, 'ran on nothing').toBeGreaterThan(0);
    expect(cases, 'another number of cases: npm run accuracy -- --write').toBe(row.cases);
    expect(error, `${row.what}: past the bound`).toBeLessThanOrEqual(row.bound);
    // The ledger says what the error is now, to a tenth; rounding may differ from machine to machine.
    const drift = Math.abs(error - row.error);
    expect(drift, 'the error in the ledger is out of date: npm run accuracy -- --write').toBeLessThanOrEqual(
      0.1 * row.error + ROUNDING,
    );
    if (canTighten(row.bound, error)) loose.push(`${id}: ${row.bound} against ${error.toExponential(2)}`);
  });

  test('says which bounds can be tightened', () => {
    console.log(`accuracy ledger: ${LEDGER.length} cases, bounds that can be tightened: ${loose.join('; ') || 'none'}`);
    expect(canTighten(1e-3, 4e-4)).toBe(true);
    expect(canTighten(1e-3, 6e-4)).toBe(false);
    expect(canTighten(ROUNDING, 0)).toBe(false);
    for (const error of [1e-17, 3.3e-9, 4.16e-4, 8.5e-2]) {
      expect(boundFor(error)).toBeGreaterThan(error);
      expect(canTighten(boundFor(error), error)).toBe(false);
    }
  });
});
