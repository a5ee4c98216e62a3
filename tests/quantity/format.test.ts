import { describe, expect, it } from 'vitest';
import * as format from '../../src/quantity/format.ts';

describe('numbers for people', () => {
  it.each<[string, string]>([
    [format.tidy(0), '0'],
    [format.tidy(76.2), '76.2'],
    [format.tidy(100000), '100000'],
    [format.tidy(1e-6), '0.000001'],
    [format.tidy(0.1 + 0.2), '0.3'],
    [format.tidy(1234567, 3), '1230000'],
    [format.significantText(14.5, 4), '14.50'],
    [format.significantText(205.0001, 4), '205.0'],
    [format.significantText(99.999, 4), '100.0'],
    [format.significantText(17004, 4), '17000'],
    [format.significantText(0, 4), '0'],
    [format.inductanceText(240), '240 µH'],
    [format.inductanceText(3.4821), '3.482 µH'],
    [format.inductanceText(0.345), '345 nH'],
    [format.inductanceText(12_000), '12 mH'],
    [format.inductanceText(0), '0 µH'],
    [format.frequencyText(1700), '1700 kHz'],
    [format.frequencyText(12_500), '12.5 MHz'],
    [format.capacitanceText(380), '380 pF'],
    [format.capacitanceText(12_000), '12 nF'],
    [format.lengthText(76.2), '76.2 mm'],
    [format.lengthText(-0.001), '0 mm'],
    [format.lengthText(0.4567, 3), '0.457 mm'],
    [format.wireText(12.345), '12.35 m'],
    [format.resistanceText(2.3146), '2.31 Ω'],
    [format.resistanceText(14_200), '14.2 kΩ'],
    [format.percentText(0.05), '5 %'],
  ])('%s', (shown, wanted) => {
    expect(shown).toBe(wanted);
  });
});
