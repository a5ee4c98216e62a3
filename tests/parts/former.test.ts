import { describe, expect, test } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { formerDimensions } from '../../src/parts/dimensions.ts';
import { formerParts } from '../../src/parts/former.ts';
import { teardrop } from '../../src/parts/holes.ts';
import type { Engraving } from '../../src/parts/solid.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { sampleRecord } from '../helpers/sample.ts';

function codes(record: CoilRecord): string[] {
  try {
    formerParts(record);
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    expect(error.exit).toBe(4);
    return error.faults.map((fault) => fault.code);
  }
  return [];
}

function todo(record: CoilRecord): string {
  try {
    formerParts(record);
  } catch (error) {
    if (error instanceof Fault) return error.faults[0]!.todo;
  }
  throw new Error('not refused');
}

const base = sampleRecord();
const former = (change: Partial<CoilRecord['former']>): CoilRecord => ({
  ...base,
  former: { ...base.former, ...change },
});
const hole = (label: string, change: Partial<CoilRecord['holes'][number]>): CoilRecord => ({
  ...base,
  holes: base.holes.map((h) => (h.label === label ? { ...h, ...change } : h)),
});
const ear = base.former.ears[0]!;
const foot = {
  diameterMm: 92,
  thicknessMm: 3,
  holes: 4,
  circleDiameterMm: 81,
  holeDiameterMm: 4.4,
  firstDeg: 45,
};
const post = {
  label: '1',
  tap: 1,
  angleDeg: 40,
  axialMm: 4.8,
  widthMm: 2.4,
  reachMm: 3.7,
  heightMm: 4.5,
  eyeMm: 1.4,
  eyeReachMm: 1.9,
};
const ridges = {
  heightMm: 0.27,
  widthMm: 0.9,
  start: { fromTurn: 0.1, toTurn: 0.9, footMm: -1.17 },
  finish: { fromTurn: 61.8, toTurn: 62.6, footMm: 0.11 },
};
const even = sampleRecord({ surface: 'smooth' });
const smooth = (change: CoilRecord['former']['ridges']): CoilRecord => ({
  ...even,
  former: { ...even.former, ridges: change },
});

describe('a former that cannot be is refused by name', () => {
  test.each<[string, CoilRecord]>([
    ['former-wall-thin', former({ boreDiameterMm: 58 })],
    ['former-segments', former({ segments: 30 })],
    ['former-flange-small', former({ flange: { diameterMm: 50, lowerMm: 3, upperMm: 3 } })],
    ['former-rim-no-room', former({ flange: { diameterMm: 80, lowerMm: 3, upperMm: 3 } })],
    ['former-groove-no-room', former({ groove: { ...base.former.groove!, runInTurns: 9 } })],
    ['former-groove-no-land', former({ groove: { ...base.former.groove!, depthMm: 0.6 } })],
    ['former-hole-no-room', hole('A', { axialMm: 0.6 })],
    ['former-hole-no-room', hole('A', { diameterMm: 40 })],
    ['former-holes-meet', hole('A', { angleDeg: 0, axialMm: 11 })],
    ['former-ear-no-room', former({ ears: [{ ...ear, widthMm: 5 }] })],
    ['former-ear-no-room', former({ ears: [{ ...ear, centreRadiusMm: 33 }] })],
    ['former-ear-hides-datum', former({ ears: [{ ...ear, angleDeg: 5 }] })],
    ['former-numbers-no-room', former({ numberHeightMm: 1.5 })],
    ['former-base-no-room', former({ ears: [], base: { ...foot, circleDiameterMm: 70 } })],
    ['former-base-small', former({ ears: [], base: { ...foot, diameterMm: 84 } })],
    ['former-base-small', former({ ears: [], base: { ...foot, thicknessMm: 1 } })],
    ['former-base-holes', former({ ears: [], base: { ...foot, holes: 40 } })],
    ['former-base-holes', former({ ears: [], base: { ...foot, holes: 1 } })],
    ['former-base-hides-datum', former({ ears: [], base: { ...foot, firstDeg: 0 } })],
    ['former-post-no-room', former({ posts: [{ ...post, eyeMm: 2.6 }] })],
    ['former-post-no-room', former({ posts: [{ ...post, axialMm: 6.6 }] })],
    ['former-post-tall', former({ posts: [{ ...post, heightMm: 6 }] })],
    ['former-posts-close', former({ posts: [post, { ...post, label: '2', angleDeg: 44 }] })],
    ['former-ridge-no-room', former({ ridges })],
    ['former-ridge-no-room', smooth({ ...ridges, start: { fromTurn: 0.1, toTurn: 1.2, footMm: -1 } })],
    ['former-ridge-no-room', smooth({ ...ridges, finish: { fromTurn: 70, toTurn: 70.8, footMm: 0.1 } })],
    ['former-ridge-steep', smooth({ ...ridges, widthMm: 0.27 })],
  ])('%s', (code, record) => {
    expect(codes(record)).toContain(code);
  });

  test('the sample itself is not, nor a base, a post and ridges with the values that are named', () => {
    expect(codes(base)).toEqual([]);
    expect(codes(former({ ears: [], base: foot, posts: [post] }))).toEqual([]);
    expect(codes(smooth(ridges))).toEqual([]);
  });

  test.each<[CoilRecord, RegExp, (value: number) => CoilRecord]>([
    [
      former({ boreDiameterMm: 58 }),
      /wall ([\d.]+) mm or thicker/,
      (wall) => former({ boreDiameterMm: 60 - 2 * wall - 1e-6 }),
    ],
    [
      former({ ears: [], base: { ...foot, circleDiameterMm: 70 } }),
      /circle of ([\d.]+) mm or more/,
      (circleDiameterMm) => former({ ears: [], base: { ...foot, circleDiameterMm } }),
    ],
    [
      former({ ears: [], base: { ...foot, diameterMm: 84 } }),
      /make it ([\d.]+) mm wide/,
      (diameterMm) => former({ ears: [], base: { ...foot, diameterMm } }),
    ],
    [
      former({ ears: [], base: { ...foot, holes: 40 } }),
      /use 2 to (\d+)/,
      (holes) => former({ ears: [], base: { ...foot, holes } }),
    ],
    [
      former({ posts: [{ ...post, heightMm: 6 }] }),
      /lower it to ([\d.]+) mm/,
      (heightMm) => former({ posts: [{ ...post, heightMm }] }),
    ],
    [smooth({ ...ridges, widthMm: 0.27 }), /make it ([\d.]+) mm wide/, (widthMm) => smooth({ ...ridges, widthMm })],
  ])('the nearest value that is named is taken (%#)', (record, named, take) => {
    const [, value] = named.exec(todo(record))!;
    expect(codes(take(Number(value)))).toEqual([]);
  });

  test('a groove of one turn', () => {
    const one = sampleRecord({ turns: [0.4, 0.8] });
    expect(codes({ ...one, holes: [], former: { ...one.former, numbers: [] } })).toContain('former-groove-short');
  });
});

test('a teardrop clears its whole diameter and has a roof at 45 degrees', () => {
  for (const d of [0.6, 1.2, 1.6, 4.3]) {
    const points = teardrop(d);
    for (const [i, [x, y]] of points.entries()) {
      const [u, v] = points[(i + 1) % points.length]!;
      // Distance of the side from the centre.
      expect(Math.abs(x * v - y * u) / Math.hypot(u - x, v - y)).toBeCloseTo(d / 2, 9);
    }
    const [top, left] = points;
    expect(top![1] - left![1]).toBeCloseTo(Math.abs(left![0]), 9);
    expect(Math.max(...points.slice(1).map(([x, y]) => Math.hypot(x, y))) - d / 2).toBeLessThan(0.02);
  }
});

test('numbers read from outside: up is inwards, on runs counterclockwise', () => {
  // One figure 1 at angle 0: the font draws it from the flag over the top down to the foot.
  const record = former({ numbers: [{ text: '7', angleDeg: 0, tap: 7 }] });
  const numbers = formerParts(record)[0]!.cutters.find((c): c is Engraving => c.kind === 'engraving')!;
  const figure = numbers.strokes.filter((line) => line.every(([x]) => x < base.former.flange!.diameterMm / 2 - 1.5));
  const points = figure.flat();
  // The bar of a 7 is its top: it lies inwards; its foot lies outwards, left of the bar's right end.
  const inner = Math.min(...points.map((p) => p[0]));
  const bar = points.filter((p) => p[0] < inner + 0.01);
  expect(Math.max(...bar.map((p) => p[1])) - Math.min(...bar.map((p) => p[1]))).toBeGreaterThan(1.5);
  const foot = points.reduce((a, b) => (b[0] > a[0] ? b : a));
  const middle = (Math.max(...points.map((p) => p[1])) + Math.min(...points.map((p) => p[1]))) / 2;
  expect(foot[1]).toBeLessThan(middle + 0.1);
  expect(foot[0] - inner).toBeCloseTo(base.former.numberHeightMm, 1);
});

test('no numbers without a flange, no datum notch when there is none', () => {
  const names = (record: CoilRecord) => formerParts(record)[0]!.cutters.map((c) => c.name);
  expect(names(base)).toContain('numbers');
  expect(names(base)).toContain('datum mark');
  const plain = former({ flange: null, datumMark: null, ears: [] });
  expect(names(plain)).not.toContain('numbers');
  expect(names(plain)).not.toContain('datum mark');
});

test('the groove goes on to the last hole of the finish row when there is room, else it ends at the finish', () => {
  const last = (record: CoilRecord) => {
    const groove = formerParts(record)[0]!.shapes.find((shape) => shape.kind === 'skin')!.groove!;
    return (groove.firstColumn + groove.samples.length - 0.5) / record.former.segments;
  };
  const turns = base.windings[0]!.turns;
  const row = Math.max(...base.holes.map((h) => h.turn ?? 0));
  const runIn = base.former.groove!.runInTurns;
  expect(last(base)).toBeCloseTo(row + runIn, 1);
  const finish = base.holes.filter((h) => h.purpose !== 'finish' || h.turn! <= turns);
  expect(last({ ...base, holes: finish })).toBeCloseTo(turns + runIn, 1);
});

test('a mounting hole that stands in an ear is not cut through the wall too', () => {
  const mount = { purpose: 'mount' as const, tap: null, turn: null, label: 'M', axialMm: 20, diameterMm: 4 };
  const genus = (angleDeg: number) =>
    formerParts({ ...base, holes: [...base.holes, { ...mount, angleDeg }] })[0]!.expected.genus;
  expect(genus(ear.angleDeg)).toBe(formerParts(base)[0]!.expected.genus);
  expect(genus(ear.angleDeg + 90)).toBe(formerParts(base)[0]!.expected.genus + 1);
});

describe('hole compensation of the printer', () => {
  test('widens every modelled hole, in wall and ears, and leaves the record alone', () => {
    const record = sampleRecord({ surface: 'grooved' });
    const wider = { ...record, printer: { ...record.printer, holeCompensationMm: 0.2 } };
    const plain = formerDimensions(record);
    const cut = formerDimensions(wider);
    expect(cut.holes.length).toBeGreaterThan(5);
    for (const [i, hole] of cut.holes.entries())
      expect(hole.diameterMm).toBeCloseTo(plain.holes[i]!.diameterMm + 0.2, 9);
    for (const [i, ear] of cut.former.ears.entries())
      expect(ear.holeDiameterMm).toBeCloseTo(plain.former.ears[i]!.holeDiameterMm + 0.2, 9);
    expect(wider.holes).toEqual(record.holes);
  });
});
