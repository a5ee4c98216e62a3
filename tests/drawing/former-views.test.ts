/** The views of the former against the record: holes and outlines where they are, every size by its own arithmetic. */
import { describe, expect, test } from 'vitest';
import { formerViews } from '../../src/drawing/parts/former-views.ts';
import type { View } from '../../src/drawing/views.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { sampleRecord } from '../helpers/sample.ts';

const base = sampleRecord();
const records: Record<string, CoilRecord> = {
  'grooved, ears': base,
  'grooved, left, plain': sampleRecord({ hand: 'left', flanges: false, ears: false }),
  'on a base, with posts': {
    ...base,
    former: {
      ...base.former,
      ears: [],
      base: { diameterMm: 92, thicknessMm: 3, holes: 4, circleDiameterMm: 81, holeDiameterMm: 4.4, firstDeg: 45 },
      posts: [1, 2].map((tap) => ({
        label: `${tap}`,
        tap,
        angleDeg: 40 * tap,
        axialMm: 4.8,
        widthMm: 2.4,
        reachMm: 3.7,
        heightMm: 4.5,
        eyeMm: 1.4,
        eyeReachMm: 1.9,
      })),
    },
  },
  'smooth, with ridges': (() => {
    const smooth = sampleRecord({ surface: 'smooth', hand: 'left' });
    const start = { fromTurn: 0.1, toTurn: 0.9, footMm: -1.17 };
    return { ...smooth, former: { ...smooth.former, ridges: { heightMm: 0.27, widthMm: 0.9, start, finish: null } } };
  })(),
};

const named = (view: View) =>
  view.shapes.filter((shape) => shape.shape === 'circle' && shape.name?.startsWith('hole '));
const texts = (view: View) => view.dimensions.map(({ text }) => text);

describe.each(Object.entries(records))('views of a former: %s', (name, record) => {
  const [elevation, end, developed] = formerViews(record).former! as [View, View, View];
  const { former, holes } = record;
  const r = former.outsideDiameterMm / 2;
  const num = (x: number) => `${Number(x.toFixed(2))}`;

  test('three of them, with the outer size of the former', () => {
    expect([elevation, end, developed].map(({ title }) => title)).toEqual([
      'elevation',
      'end view',
      'developed surface',
    ]);
    const outline = elevation.shapes.find((shape) => shape.shape === 'polyline')!;
    if (outline.shape !== 'polyline') throw new Error('no outline');
    const widest = Math.max(former.flange?.diameterMm ?? 0, former.base?.diameterMm ?? 0, 2 * r) / 2;
    expect(Math.max(...outline.points.map(([x]) => x))).toBeCloseTo(widest, 9);
    expect(Math.min(...outline.points.map(([x]) => x))).toBeCloseTo(-widest, 9);
    expect(Math.max(...outline.points.map(([, z]) => z))).toBeCloseTo(former.lengthMm, 9);
    expect(Math.min(...outline.points.map(([, z]) => z))).toBeCloseTo(0, 9);
  });

  test('holes where they are: the near half from outside, all of them rolled out', () => {
    const flat = named(developed);
    expect(flat).toHaveLength(holes.length);
    let near = 0;
    for (const hole of holes) {
      const turned = ((hole.angleDeg + 180) % 360) - 180;
      const here = flat.find((shape) => shape.shape === 'circle' && shape.name === `hole ${hole.label}`)!;
      expect(here).toMatchObject({ r: hole.diameterMm / 2, y: hole.axialMm });
      if (here.shape === 'circle') expect(here.x).toBeCloseTo((turned * Math.PI * r) / 180, 9);
      const seen = named(elevation).find((shape) => shape.shape === 'circle' && shape.name === `hole ${hole.label}`);
      expect(seen !== undefined).toBe(Math.abs(turned) <= 90);
      if (seen?.shape !== 'circle') continue;
      near++;
      expect(seen.x).toBeCloseTo(r * Math.sin((hole.angleDeg * Math.PI) / 180), 9);
    }
    console.log(`views, ${name}: ${holes.length} holes rolled out, ${near} on the near side`);
    expect(near).toBeGreaterThan(2);
    for (const hole of holes) expect(texts(developed)).toContain(hole.label);
  });

  test('the sizes that somebody would check, as they should come out', () => {
    const wider = { ...record, printer: { ...record.printer, holeCompensationMm: 0.2 } };
    expect(formerViews(wider)).toEqual(formerViews(record));
    const at = texts(elevation);
    const winding = record.windings[0]!;
    for (const size of [former.lengthMm, winding.startMm, winding.finishMm]) expect(at).toContain(num(size));
    expect(at).toContain(`⌀ ${num(former.outsideDiameterMm)}`);
    if (former.flange) expect(at).toContain(`⌀ ${num(former.flange.diameterMm)}`);
    if (former.groove)
      expect(at.join()).toContain(`groove ${num(former.groove.depthMm)} deep, floor ${num(former.groove.floorMm)}`);
    if (former.ridges) expect(at).toContain('ridge 0.27 high, 0.9 wide');
    expect(texts(end)).toContain(`⌀ ${num(former.boreDiameterMm)}`);
    expect(texts(end)).toContain(`wall ${num(former.wallMm)}`);
    if (former.base) {
      expect(texts(end)).toContain('4 x ⌀ 4.4 on ⌀ 81, at 45°, 135°, 225°, 315°');
      expect(at).toContain('⌀ 92');
      expect(texts(end)).toContain('2');
    }
    if (former.ears.length > 0) expect(texts(end).join()).toContain(`on ⌀ ${num(2 * former.ears[0]!.centreRadiusMm)}`);
    expect(texts(developed)).toContain(num(Math.PI * former.outsideDiameterMm));
    // Every length is as long as it says.
    let spans = 0;
    for (const view of [elevation, end, developed])
      for (const each of view.dimensions) {
        if (each.kind !== 'span') continue;
        spans++;
        const axis = each.along === 'x' ? 0 : 1;
        const value = Number(each.text.replace(/[^\d.]/g, ''));
        expect(Math.abs(Math.abs(each.to[axis] - each.from[axis]) - value)).toBeLessThan(0.0051);
      }
    expect(spans).toBeGreaterThan(6);
  });
});

test('no views of a bought tube, nor of ribs that the record does not have', () => {
  expect(formerViews(sampleRecord({ kind: 'tube' }))).toEqual({});
  expect(formerViews({ ...base, former: { ...base.former, body: 'ribbed' } })).toEqual({});
});
