import fc from 'fast-check';
import { create, unitDependencies } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { KINDS, type KindName } from '../../src/quantity/kind.ts';
import { parseQuantity } from '../../src/quantity/parse.ts';

/** Exact: conversion by defined factors (25.4 mm to the inch) is cleaned to twelve digits. */
const ACCEPTED: readonly (readonly [string, KindName, number])[] = [
  ['76 mm', 'length', 76],
  ['76mm', 'length', 76],
  ['7.6 cm', 'length', 76],
  ['.5 mm', 'length', 0.5],
  ['5. mm', 'length', 5],
  ['+5 mm', 'length', 5],
  ['3 in', 'length', 76.2],
  ['3 in.', 'length', 76.2],
  ['3 inches', 'length', 76.2],
  ['3"', 'length', 76.2],
  ['3.5"', 'length', 88.9],
  ['3.5″', 'length', 88.9],
  ['3 1/2 in', 'length', 88.9],
  ['3-1/2 in', 'length', 88.9],
  ['3 1/2"', 'length', 88.9],
  ['3½ in', 'length', 88.9],
  ['½ in', 'length', 12.7],
  ['1/4 in', 'length', 6.35],
  ['1⁄4 in', 'length', 6.35],
  ['20 thou', 'length', 0.508],
  ['20 mil', 'length', 0.508],
  ['560 um', 'length', 0.56],
  ['560 µm', 'length', 0.56],
  ['1 ft', 'length', 304.8],
  ['76\u00a0mm', 'length', 76],
  ['20uH', 'inductance', 20],
  ['20 uH', 'inductance', 20],
  ['20 µH', 'inductance', 20],
  ['20 μH', 'inductance', 20],
  ['20 microhenry', 'inductance', 20],
  ['0.24 mH', 'inductance', 240],
  ['2.4e2 uH', 'inductance', 240],
  ['240000 nH', 'inductance', 240],
  ['380 pF', 'capacitance', 380],
  ['0.38 nF', 'capacitance', 380],
  ['0.00038 µF', 'capacitance', 380],
  ['530 kHz', 'frequency', 530],
  ['0.53 MHz', 'frequency', 530],
  ['5 %', 'ratio', 0.05],
  ['5%', 'ratio', 0.05],
  ['5 percent', 'ratio', 0.05],
  ['0.05', 'ratio', 0.05],
  ['2.5 Ω', 'resistance', 2.5],
  ['2.5 ohm', 'resistance', 2.5],
  ['1 kΩ', 'resistance', 1000],
  ['1 MΩ', 'resistance', 1e6],
  ['30°', 'angle', 30],
  ['30 deg', 'angle', 30],
  ['20 °C', 'temperature', 20],
  ['−20 degC', 'temperature', -20],
  ['68 degF', 'temperature', 20],
];

/** What was wrong must be in `got`; the way out in `todo`. */
const REFUSED: readonly (readonly [string, KindName, string, string])[] = [
  ['', 'length', 'nothing', 'with its unit'],
  ['  ', 'length', 'nothing', 'with its unit'],
  ['76', 'length', '"76", a number without a unit', '76 mm or 76 in'],
  ['mm', 'length', 'no number in front', '76 mm'],
  ['76,2 mm', 'length', 'with a comma', '76.2 mm'],
  ['1,000 mm', 'length', 'with a comma', 'no mark between thousands'],
  ['-5 mm', 'length', 'which is negative', 'above zero'],
  ['−5 mm', 'length', 'which is negative', 'above zero'],
  ['0 mm', 'length', 'which is zero', 'above zero'],
  ['NaN mm', 'length', 'no number in front', '76 mm'],
  ['.nan', 'length', 'no number in front', '76 mm'],
  ['Infinity mm', 'length', 'no number in front', '76 mm'],
  ['1e400 mm', 'length', 'more than a number can hold', 'exponent'],
  ['1e-400 mm', 'length', 'which is zero', 'above zero'],
  ['76 Mm', 'length', 'above the 10000 mm', 'mm or in?'],
  ['76 pm', 'length', 'below the 0.001 mm', 'mm or in?'],
  ['20 mm', 'inductance', 'measures a length', 'uH or mH'],
  ['20 uF', 'inductance', 'measures a capacitance', 'uH or mH'],
  ['20 uh', 'inductance', '"uh" is not known', 'write uH'],
  ['530 khz', 'frequency', '"khz" is not known', 'write kHz'],
  ['20 kg', 'inductance', 'measures a weight', 'uH or mH'],
  ['20 furlong', 'length', '"furlong" is not known', 'mm or in'],
  ['1/0 in', 'length', 'a fraction over zero', '76 mm'],
  ['60-90 mm', 'length', 'looks like a range', '"to"'],
  ['60 to 90 mm', 'length', 'looks like a range', '"to"'],
  ['5', 'ratio', 'above the 1', '5 %'],
  ['5 mm', 'ratio', 'not a proportion', '5 %'],
  ['20 mm/s', 'length', 'not known', 'mm or in'],
  ['20 constructor', 'length', 'not known', 'mm or in'],
  ['20 __proto__', 'length', 'not known', 'mm or in'],
  ['x'.repeat(5000), 'length', '5000 characters', 'one number'],
];

describe('a quantity', () => {
  it.each(ACCEPTED)('%s as %s is %d', (text, kind, value) => {
    expect(parseQuantity(text, kind)).toEqual({ ok: true, value });
  });

  it.each(REFUSED)('%j as %s is refused', (text, kind, got, todo) => {
    const parsed = parseQuantity(text, kind);
    expect(parsed.ok).toBe(false);
    if (!parsed.ok) {
      expect(parsed.got).toContain(got);
      expect(parsed.todo).toContain(todo);
      expect(parsed.expected).toContain(KINDS[kind].noun);
    }
  });

  it('may be zero or negative where that is allowed', () => {
    expect(parseQuantity('0 pF', 'capacitance', { zero: true })).toEqual({ ok: true, value: 0 });
    expect(parseQuantity('-0.1 mm', 'length', { negative: true })).toEqual({ ok: true, value: -0.1 });
    expect(parseQuantity('-0 mm', 'length', { zero: true })).toEqual({ ok: true, value: 0 });
  });

  it('comes back from its own text, in every unit of its kind', () => {
    const units: readonly (readonly [KindName, string, number])[] = [
      ['length', 'mm', 1],
      ['length', 'in', 25.4],
      ['length', 'cm', 10],
      ['inductance', 'uH', 1],
      ['inductance', 'mH', 1000],
      ['capacitance', 'nF', 1000],
      ['frequency', 'MHz', 1000],
      ['resistance', 'kohm', 1000],
    ];
    let ran = 0;
    fc.assert(
      fc.property(fc.constantFrom(...units), fc.integer({ min: 1, max: 9999 }), ([kind, unit, factor], n) => {
        ran += 1;
        const parsed = parseQuantity(`${n / 100} ${unit}`, kind);
        expect(parsed.ok).toBe(true);
        // Half a unit of the twelfth digit, to which conversions are cleaned.
        if (parsed.ok) expect(Math.abs(parsed.value / ((n / 100) * factor) - 1)).toBeLessThan(5e-12);
      }),
      { seed: 20, numRuns: 400 },
    );
    console.log(`quantities there and back: ${ran}`);
    expect(ran).toBeGreaterThan(0);
  });

  it('knows or refuses every unit of the library, for every kind, without throwing', () => {
    const { Unit } = create({ ...unitDependencies });
    const names = Object.keys(Reflect.get(Unit, 'UNITS'));
    let ran = 0;
    for (const name of names) {
      for (const kind of Object.keys(KINDS) as KindName[]) {
        parseQuantity(`5 ${name}`, kind);
        parseQuantity(`5 k${name}`, kind);
        ran += 2;
      }
    }
    console.log(`units of the library tried: ${names.length}, quantities: ${ran}`);
    expect(names.length).toBeGreaterThan(100);
  });

  it('answers any text without throwing, and any accepted value lies in the range of its kind', () => {
    let ran = 0;
    let accepted = 0;
    const piece = fc.constantFrom(
      '1',
      '76',
      ' ',
      '.',
      ',',
      '/',
      '-',
      '−',
      'mm',
      'uH',
      'µ',
      'Ω',
      '%',
      '"',
      'e',
      '9',
      'to',
      'in',
      '\u0000',
      '½',
    );
    const number = fc.constantFrom(
      '1',
      '76',
      '3 1/2',
      '.5',
      '1e3',
      '2e-2',
      '-4',
      '0',
      '1/0',
      '9'.repeat(30),
      '5,2',
      '',
    );
    const unit = fc.constantFrom('mm', 'in', '"', 'uH', 'µH', 'pF', 'kHz', 'Ω', '%', 'deg', 'degC', 'kg', 'mm mm', '');
    const likely = fc.tuple(number, fc.constantFrom('', ' ', '\u00a0'), unit).map((parts) => parts.join(''));
    const text = fc.oneof(
      fc.string(),
      fc.array(piece, { maxLength: 8 }).map((list) => list.join('')),
      { arbitrary: likely, weight: 3 },
    );
    fc.assert(
      fc.property(text, fc.constantFrom(...(Object.keys(KINDS) as KindName[])), (written, kind) => {
        ran += 1;
        const parsed = parseQuantity(written, kind);
        if (!parsed.ok) {
          expect(parsed.got.length * parsed.todo.length).toBeGreaterThan(0);
          return;
        }
        accepted += 1;
        expect(parsed.value).toBeGreaterThanOrEqual(KINDS[kind].low);
        expect(parsed.value).toBeLessThanOrEqual(KINDS[kind].high);
      }),
      { seed: 21, numRuns: 3000 },
    );
    console.log(`texts tried as quantities: ${ran}, accepted: ${accepted}`);
    expect(accepted).toBeGreaterThan(50);
  });
});
