import { describe, expect, it } from 'vitest';
import type { KindName } from '../../src/quantity/kind.ts';
import { isRange, parseRange, parseSize } from '../../src/quantity/range.ts';

describe('a range', () => {
  it.each<[string, KindName, number, number]>([
    ['20 uH to 240 uH', 'inductance', 20, 240],
    ['20 µH to 0.24 mH', 'inductance', 20, 240],
    ['20 to 240 uH', 'inductance', 20, 240],
    ['60 to 90 mm', 'length', 60, 90],
    ['60..90 mm', 'length', 60, 90],
    ['60 mm – 90 mm', 'length', 60, 90],
    ['2 1/2 to 3-1/2 in', 'length', 63.5, 88.9],
    ['2 1/2" to 3 1/2"', 'length', 63.5, 88.9],
    ['530 kHz to 1.7 MHz', 'frequency', 530, 1700],
  ])('%s', (text, kind, low, high) => {
    expect(isRange(text)).toBe(true);
    expect(parseRange(text, kind)).toEqual({ ok: true, value: { low, high } });
  });

  it.each<[string, KindName, string]>([
    ['240 uH to 20 uH', 'inductance', 'first end lies above'],
    ['20 uH to 20 uH', 'inductance', 'ends are equal'],
    ['20 uH', 'inductance', '"20 uH"'],
    ['20 uH to 30 uH to 40 uH', 'inductance', '"20 uH to 30 uH to 40 uH"'],
    ['20 mm to 240 uH', 'inductance', 'measures a length'],
    ['20 to 240', 'inductance', 'without a unit'],
    ['20 uH to', 'inductance', 'nothing'],
  ])('%s is refused', (text, kind, got) => {
    const parsed = parseRange(text, kind);
    expect(parsed.ok ? '' : parsed.got).toContain(got);
  });

  it('is not seen in a single quantity', () => {
    expect(['3 1/2 in', '3-1/2 in', '76 mm', '1e-3 mm', '5 ton'].filter(isRange)).toEqual([]);
  });
});

describe('a size', () => {
  it.each(['220 x 220 mm', '220x220mm', '220 mm x 220 mm', '220 × 220 mm', '22 cm x 220 mm'])('%s', (text) => {
    expect(parseSize(text)).toEqual({ ok: true, value: { x: 220, y: 220 } });
  });
  it.each(['220 mm', '220 x 220', 'x', '220 x 220 x 250 mm', '220 x 5 uH'])('%s is refused', (text) => {
    expect(parseSize(text).ok).toBe(false);
  });
});
