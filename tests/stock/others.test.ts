import { describe, expect, it } from 'vitest';
import { findMaterial, materials } from '../../src/stock/materials.ts';
import { spacers } from '../../src/stock/spacers.ts';
import { tubes } from '../../src/stock/tubes.ts';

const rising = (values: readonly number[]): boolean => values.every((value, i) => i === 0 || value >= values[i - 1]!);

describe('tubes', () => {
  it('lists metric and inch tubes, thinnest first, each once', () => {
    const list = tubes();
    console.log(`tubes: ${list.length}`);
    expect(rising(list.map((tube) => tube.outsideDiameterMm))).toBe(true);
    expect(new Set(list.map((tube) => tube.outsideDiameterMm)).size).toBe(list.length);
    expect(list.find((tube) => tube.name === '3 in')?.outsideDiameterMm).toBe(76.2);
    expect(list.find((tube) => tube.name === '3/4 in')?.outsideDiameterMm).toBe(19.05);
    for (const mm of [19, 25, 32, 40, 50, 63, 75, 76.2, 90, 101.6, 110]) {
      expect(
        list.some((tube) => tube.outsideDiameterMm === mm),
        `${mm} mm`,
      ).toBe(true);
    }
  });
});

describe('spacers', () => {
  it('lists lines and threads, thinnest first', () => {
    const list = spacers();
    console.log(`spacers: ${list.length}`);
    expect(rising(list.map((spacer) => spacer.thicknessMm))).toBe(true);
    expect(new Set(list.map((spacer) => spacer.name)).size).toBe(list.length);
    for (const mm of [0.2, 0.25, 0.3, 0.35, 0.4, 0.5, 0.6, 0.8, 1]) {
      expect(
        list.some((spacer) => spacer.thicknessMm === mm),
        `${mm} mm`,
      ).toBe(true);
    }
  });
});

describe('materials', () => {
  it('finds each by name in any case, with figures in the range of solids that formers are made of', () => {
    const list = materials();
    console.log(`materials: ${list.length}`);
    expect(list.length).toBe(10);
    for (const material of list) {
      expect(findMaterial(` ${material.name.toUpperCase()} `)).toEqual({ ok: true, material });
      expect(material.densityGPerCm3).toBeGreaterThan(0.4);
      expect(material.densityGPerCm3).toBeLessThan(2);
      expect(material.modulusGPa).toBeGreaterThanOrEqual(1);
      expect(material.modulusGPa).toBeLessThanOrEqual(15);
      // every print material softens, PLA first: near 60 degrees by common practice
      if (material.use === 'print') expect(material.softensC).toBeGreaterThanOrEqual(60);
    }
    expect(list.find((material) => material.name === 'PLA')?.softensC).toBe(60);
  });

  it('refuses an unknown one with the nearest name', () => {
    expect(findMaterial('polystyrine')).toMatchObject({ ok: false, todo: 'did you mean `polystyrene`?' });
    expect(findMaterial('petq')).toMatchObject({ ok: false, todo: 'did you mean `PETG`?' });
    expect(findMaterial('')).toMatchObject({ ok: false, got: 'nothing' });
  });
});
