import fc from 'fast-check';
import { afterAll, describe, expect, test } from 'vitest';
import { Fault } from '../../src/fault.ts';
import type { BedPart, BedSize } from '../../src/parts/bed-fit.ts';
import { type Bed, layOutBeds } from '../../src/parts/bed-layout.ts';
import { EDGE_MARGIN_MM } from '../../src/parts/bed-rectangles.ts';

/** A millionth of a millimetre beyond a micrometre is taken for noise, on both sides of a gap; and doubles add a little. */
const NOISE_MM = 2.1e-6;

interface Box {
  readonly part: BedPart;
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

function boxesOf(bed: Bed, parts: readonly BedPart[]): Box[] {
  return bed.items.map((item) => {
    const part = parts.find(({ id }) => id === item.part)!;
    const [w, d] = item.turned ? [part.depthMm, part.widthMm] : [part.widthMm, part.depthMm];
    return { part, x0: item.xMm, y0: item.yMm, x1: item.xMm + w, y1: item.yMm + d };
  });
}

const fitsInside = (part: BedPart, x: number, y: number) =>
  (part.widthMm <= x && part.depthMm <= y) || (part.depthMm <= x && part.widthMm <= y);

let cases = 0;
let bedsMade = 0;
let bedsByArea = 0;
afterAll(() => {
  console.log(`beds: ${cases} jobs on ${bedsMade} beds; ${bedsByArea} would do by area alone`);
  expect(cases).toBeGreaterThan(0);
});

/** Everything that a layout promises, whatever the parts. */
function check(parts: readonly BedPart[], printer: BedSize, gapMm: number): readonly Bed[] {
  const beds = layOutBeds(parts, printer, gapMm);
  for (const bed of beds) {
    expect(bed.items.length).toBeGreaterThan(0);
    const boxes = boxesOf(bed, parts);
    // The margin holds unless something on this bed does not fit inside it.
    const margin = (size: number) => Math.max(0, size - 2 * EDGE_MARGIN_MM);
    const loose = boxes.every(({ part }) => fitsInside(part, margin(printer.bedXMm), margin(printer.bedYMm)));
    // Parts stand on the middle of the bed, rounded down to a micrometre.
    const edge = loose ? EDGE_MARGIN_MM - 0.001 : 0;
    for (const { x0, y0, x1, y1 } of boxes) {
      expect(Math.min(x0, y0)).toBeGreaterThanOrEqual(edge - NOISE_MM);
      expect(x1).toBeLessThanOrEqual(printer.bedXMm - edge + NOISE_MM);
      expect(y1).toBeLessThanOrEqual(printer.bedYMm - edge + NOISE_MM);
    }
    for (const [i, a] of boxes.entries())
      for (const b of boxes.slice(i + 1)) {
        const between = Math.max(a.x0 - b.x1, b.x0 - a.x1, a.y0 - b.y1, b.y0 - a.y1);
        expect(between).toBeGreaterThanOrEqual(gapMm - NOISE_MM);
      }
    const left = Math.min(...boxes.map(({ x0 }) => x0));
    const right = printer.bedXMm - Math.max(...boxes.map(({ x1 }) => x1));
    // Sizes are rounded up and places down to a micrometre.
    expect(Math.abs(left - right)).toBeLessThan(0.005);
  }
  const found = beds.flatMap(({ items }) => items.map(({ part, copy }) => `${part} ${copy}`));
  const wanted = parts.flatMap(({ id, quantity }) => Array.from({ length: quantity }, (_, i) => `${id} ${i + 1}`));
  expect(found.toSorted()).toEqual(wanted.toSorted());
  // Copies count on over the beds.
  for (const { id } of parts) {
    const copies = beds.flatMap(({ items }) => items.filter(({ part }) => part === id).map(({ copy }) => copy));
    expect(copies).toEqual(copies.toSorted((a, b) => a - b));
  }
  cases++;
  bedsMade += beds.length;
  const area = parts.reduce((sum, p) => sum + p.quantity * (p.widthMm + gapMm) * (p.depthMm + gapMm), 0);
  bedsByArea += Math.ceil(area / ((printer.bedXMm + gapMm) * (printer.bedYMm + gapMm)) - 1e-9);
  return beds;
}

const length = (min: number, max: number) =>
  fc.oneof(fc.double({ min, max, noNaN: true }), fc.integer({ min: Math.ceil(min), max: Math.floor(max) }));
/** Beds are stated in whole micrometres; parts have any size. */
const bedLength = length(80, 400).map((mm) => Math.round(mm * 1000) / 1000);
const printers: fc.Arbitrary<BedSize> = fc.record({
  bedXMm: bedLength,
  bedYMm: bedLength,
  heightMm: fc.constant(250),
});
/** Sizes as a share of the bed, so that all fit; some of them exactly. */
const share = fc.oneof({ weight: 8, arbitrary: fc.double({ min: 0.02, max: 1, noNaN: true }) }, fc.constant(1));
const jobs = printers.chain((printer) =>
  fc.record({
    printer: fc.constant(printer),
    gapMm: fc.constantFrom(5, 5, 5, 0, 2.5, 12),
    parts: fc
      .array(fc.record({ quantity: fc.integer({ min: 0, max: 4 }), x: share, y: share, aside: fc.boolean() }), {
        maxLength: 9,
      })
      .map((list) =>
        list.map(({ quantity, x, y, aside }, i): BedPart => {
          const [w, d] = [x * printer.bedXMm, y * printer.bedYMm];
          return {
            id: `part-${i}`,
            quantity,
            widthMm: aside ? d : w,
            depthMm: aside ? w : d,
            heightMm: 1 + ((17 * i) % 250),
          };
        }),
      ),
  }),
);

const part = (id: string, widthMm: number, depthMm: number, quantity = 1, heightMm = 10): BedPart => ({
  id,
  quantity,
  widthMm,
  depthMm,
  heightMm,
});
const printer: BedSize = { bedXMm: 220, bedYMm: 220, heightMm: 250 };

describe('any parts that fit', () => {
  test('lie apart, inside the bed, all of them, round its middle', () => {
    fc.assert(
      fc.property(jobs, ({ parts, printer: bed, gapMm }) => {
        check(parts, bed, gapMm);
      }),
      { numRuns: 300, seed: 21 },
    );
  });

  test('lie the same way again, whatever else the printer is', () => {
    fc.assert(
      fc.property(jobs, ({ parts, printer: bed, gapMm }) => {
        const again = layOutBeds(structuredClone(parts), { ...bed, nozzleMm: 0.4, material: 'x' } as BedSize, gapMm);
        expect(again).toEqual(layOutBeds(parts, bed, gapMm));
      }),
      { numRuns: 60, seed: 22 },
    );
  });

  test('of a bed cut up by straight cuts all go back on one or two', () => {
    // Two beds are what a poor packing takes; the area says that one could do.
    let one = 0;
    const pieces = fc.array(fc.tuple(fc.double({ min: 0.25, max: 0.75, noNaN: true }), fc.boolean()), {
      minLength: 1,
      maxLength: 11,
    });
    const runs = 200;
    fc.assert(
      fc.property(pieces, (cuts) => {
        let boxes = [[216, 216]] as [number, number][];
        for (const [at, across] of cuts) {
          boxes = boxes.toSorted((a, b) => b[0] * b[1] - a[0] * a[1]);
          const [w, d] = boxes.shift()!;
          const [long, short] = across ? [w, d] : [d, w];
          const first = (long - 5) * at;
          for (const size of [first, long - 5 - first])
            if (size > 1) boxes.push(across ? [size - 0.002, short] : [short, size - 0.002]);
        }
        const beds = check(
          boxes.map(([w, d], i) => part(`p${i}`, w, d)),
          printer,
          5,
        );
        expect(beds.length).toBeLessThanOrEqual(2);
        if (beds.length === 1) one++;
      }),
      { numRuns: runs, seed: 23 },
    );
    console.log(`beds: ${one} of ${runs} cut-up beds put together again on one`);
    // Measured 154; 133 with the first rule alone, 121 with the first order alone.
    expect(one).toBeGreaterThan(0.7 * runs);
  });
});

describe('known cases', () => {
  test('a grid that just fits', () => {
    // Four of 50.25 and three gaps of 5 are 216, the bed inside its margins.
    expect(check([part('a', 50.25, 50.25, 16)], printer, 5).length).toBe(1);
    expect(check([part('a', 50.25, 50.25, 17)], printer, 5).length).toBe(2);
    expect(check([part('a', 50.26, 50.25, 16)], printer, 5).length).toBeGreaterThan(1);
  });

  test('a quarter turn saves a bed', () => {
    const beds = check([part('a', 216, 100), part('b', 100, 216)], printer, 5);
    expect(beds.length).toBe(1);
    expect(beds[0]!.items.filter(({ turned }) => turned).length).toBe(1);
  });

  test('a part as large as the bare bed is placed, alone', () => {
    expect(check([part('a', 220, 220)], printer, 5)).toEqual([
      { items: [{ part: 'a', copy: 1, xMm: 0, yMm: 0, turned: false }] },
    ]);
    const wide: BedSize = { bedXMm: 300, bedYMm: 200, heightMm: 250 };
    expect(check([part('a', 200, 300)], wide, 5)[0]!.items[0]).toMatchObject({ xMm: 0, yMm: 0, turned: true });
    // What noise of arithmetic adds does not count as longer.
    expect(check([part('a', 220 + 1e-7, 0.1 + 0.2)], printer, 5).length).toBe(1);
  });

  test('others join a part that fits only without the margin', () => {
    const beds = check([part('a', 219, 100), part('b', 60, 40, 5)], printer, 5);
    expect(beds.length).toBe(1);
    expect(beds[0]!.items[0]!.xMm).toBe(0.5);
  });

  test('nothing to print needs no bed', () => {
    expect(layOutBeds([], printer)).toEqual([]);
    expect(layOutBeds([part('a', 900, 10, 0)], printer)).toEqual([]);
  });

  test('the gap is 5 mm unless another is asked for', () => {
    const [a, b] = layOutBeds([part('a', 100, 50, 2)], printer)[0]!.items;
    expect(Math.max(Math.abs(a!.xMm - b!.xMm) - (a!.turned ? 50 : 100), Math.abs(a!.yMm - b!.yMm) - 50)).toBe(5);
  });
});

describe('what the printer cannot take', () => {
  const faultsOf = (parts: readonly BedPart[], bed: BedSize) => {
    try {
      layOutBeds(parts, bed);
    } catch (error) {
      if (error instanceof Fault && error.exit === 4) return error.faults;
      throw error;
    }
    return [];
  };

  test('the bed that is named as nearest takes it, and one a little smaller does not', () => {
    let refused = 0;
    fc.assert(
      fc.property(length(10, 600), length(10, 600), printers, (w, d, bed) => {
        const faults = faultsOf([part('a', w, d)], bed);
        expect(faults.length).toBe(fitsInside(part('a', w, d), bed.bedXMm, bed.bedYMm) ? 0 : 1);
        if (!faults[0]) return;
        refused++;
        expect(faults[0].code).toBe('part-larger-than-bed');
        const [, x, y] = /bed of ([\d.]+) x ([\d.]+) mm/.exec(faults[0].todo)!.map(Number);
        expect(faultsOf([part('a', w, d)], { ...bed, bedXMm: x!, bedYMm: y! })).toEqual([]);
        for (const [dx, dy] of [
          [0.002, 0],
          [0, 0.002],
        ] as const) {
          const [sx, sy] = [x! - dx, y! - dy];
          // An axis in which the printer's own bed is enough is not for making smaller.
          if (sx < bed.bedXMm - 0.001 || sy < bed.bedYMm - 0.001) continue;
          expect(faultsOf([part('a', w, d)], { ...bed, bedXMm: sx, bedYMm: sy }).length).toBe(1);
        }
      }),
      { numRuns: 400, seed: 24 },
    );
    console.log(`beds: ${refused} parts refused`);
    expect(refused).toBeGreaterThan(50);
  });

  test('an oblique turn that would fit is named', () => {
    let named = 0;
    fc.assert(
      fc.property(length(10, 330), length(1, 60), (w, d) => {
        const [fault] = faultsOf([part('a', w, d)], printer);
        if (!fault) return;
        const degrees = /turned by ([\d.]+) degrees/.exec(fault.todo)?.[1];
        // On a square bed 45 degrees is the best: (w + d) / sqrt 2 counts.
        const room = 220 - (w + d) * Math.SQRT1_2;
        // A window narrower than a tenth of a degree may be missed.
        if (Math.abs(room) > 0.01) expect(degrees !== undefined).toBe(room > 0);
        if (degrees === undefined) return;
        named++;
        const turn = (Number(degrees) * Math.PI) / 180;
        const [c, s] = [Math.cos(turn), Math.sin(turn)];
        expect(Math.max(w * c + d * s, w * s + d * c)).toBeLessThanOrEqual(220 + 0.001);
      }),
      { numRuns: 400, seed: 25 },
    );
    console.log(`beds: ${named} oblique turns named`);
    expect(named).toBeGreaterThan(20);
  });

  test('all of it is said at once, in words with numbers', () => {
    const faults = faultsOf([part('crank', 260, 20), part('ok', 10, 10), part('former', 300, 225, 1, 251.5)], printer);
    expect(faults).toEqual([
      {
        code: 'part-larger-than-bed',
        place: { key: 'printer.bed' },
        got: 'part crank of 260 x 20 mm for a bed of 220 x 220 mm',
        expected: 'parts that lie on the bed as drawn or turned by a quarter',
        todo: 'place it by hand, turned by 45 degrees, which this bed has room for; or use a printer with a bed of 260 x 220 mm or larger, or make the part smaller',
      },
      {
        code: 'part-larger-than-bed',
        place: { key: 'printer.bed' },
        got: 'part former of 300 x 225 mm for a bed of 220 x 220 mm',
        expected: 'parts that lie on the bed as drawn or turned by a quarter',
        todo: 'use a printer with a bed of 300 x 225 mm or larger, or make the part smaller',
      },
      {
        code: 'part-taller-than-printer',
        place: { key: 'printer.height' },
        got: 'part former, 251.5 mm high, for a printer of 250 mm',
        expected: 'parts no higher than the printer can build',
        todo: 'use a printer that builds 251.5 mm or more, or make the part lower',
      },
    ]);
    expect(faultsOf([part('tall', 10, 10, 1, 251.5)], { ...printer, heightMm: 251.5 })).toEqual([]);
  });

  test.each([
    ['no width', [part('a', 0, 10)], 5],
    ['no number', [part('a', Number.NaN, 10)], 5],
    ['half a copy', [part('a', 10, 10, 0.5)], 5],
    ['a gap below nothing', [part('a', 10, 10)], -1],
  ])('%s is a mistake of the program', (_, parts, gapMm) => {
    expect(() => layOutBeds(parts, printer, gapMm)).toThrow(RangeError);
  });
});
