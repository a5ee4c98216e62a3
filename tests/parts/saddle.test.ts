import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { saddleViews } from '../../src/drawing/parts/saddle-views.ts';
import { Fault } from '../../src/fault.ts';
import { saddleParts } from '../../src/parts/saddle.ts';
import { type SaddleDimensions, saddleDimensions } from '../../src/parts/saddle-dimensions.ts';
import { type SaddlePiece, webBetween } from '../../src/parts/saddle-pieces.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { extentOf, type Jig, jigsOf, keepsJigRules, planeDistances } from '../helpers/jigs.ts';
import { type SampleOptions, sampleRecord } from '../helpers/sample.ts';
import { type Facet, radialHole, type Vec } from '../helpers/stl.ts';

/** A tenth of what a printer can place; chords and float32 stay below it. */
const PLACE_MM = 0.02;

type Printer = Partial<CoilRecord['printer']>;

function tube(options: SampleOptions = {}, printer: Printer = {}): CoilRecord {
  const record = sampleRecord({ kind: 'tube', surface: 'smooth', method: 'drawn in', pitchMm: 1.3, ...options });
  return { ...record, printer: { ...record.printer, ...printer } };
}

/** Moved so that the tube's axis is at x = y = 0 and its lower end at z = 0, turned to the record's angles. */
function onTube({ facets, solid }: Jig, d: SaddleDimensions, piece: SaddlePiece): Facet[] {
  // The middle of the outside reaches farthest along x; chords stay within 0.01 mm of it.
  const axis = solid.expected.maxMm[0] - d.outsideR;
  const [c, s] = [Math.cos((piece.middleDeg * Math.PI) / 180), Math.sin((piece.middleDeg * Math.PI) / 180)];
  const turn = ([x, y]: Vec, z: number): Vec => [c * x - s * y, s * x + c * y, z];
  return facets.map(({ corners, normal, area }) => {
    const move = ([x, y, z]: Vec) => turn([x - axis, y, 0], z + piece.fromMm);
    return { corners: [move(corners[0]), move(corners[1]), move(corners[2])], normal: turn(normal, normal[2]), area };
  });
}

interface Made {
  readonly d: SaddleDimensions;
  readonly pieces: { piece: SaddlePiece; jig: Jig; facets: Facet[] }[];
}

async function made(record: CoilRecord): Promise<Made> {
  const d = saddleDimensions(record);
  const jigs = await jigsOf(saddleParts(record));
  return { d, pieces: d.pieces.map((piece, i) => ({ piece, jig: jigs[i]!, facets: onTube(jigs[i]!, d, piece) })) };
}

/** Every hole of the record is guided once, each guide is where its hole is and wider by what was meant. */
function worstGuide({ d, pieces }: Made, record: CoilRecord): number {
  let worst = 0;
  const guided = pieces.flatMap(({ piece }) =>
    piece.guides.filter(({ index }) => !index).map(({ hole }) => hole.label),
  );
  expect([...guided].sort()).toEqual(record.holes.map(({ label }) => label).sort());
  for (const { piece, facets } of pieces)
    for (const { hole } of piece.guides) {
      const wide = hole.diameterMm + 0.1 + record.printer.holeCompensationMm;
      const fit = radialHole(facets, hole.angleDeg, hole.axialMm, wide);
      expect(fit.walls).toBeGreaterThan(9);
      worst = Math.max(worst, Math.hypot(fit.acrossMm, fit.alongMm), Math.abs(fit.diameterMm - wide));
    }
  expect(d.widerMm).toBeCloseTo(0.1 + record.printer.holeCompensationMm, 9);
  return worst;
}

function keepsRules({ d, pieces }: Made, printer: CoilRecord['printer']): void {
  for (const { piece, jig } of pieces) {
    const axis = jig.solid.expected.maxMm[0] - d.outsideR;
    // Letters, lines and ticks are cut half a millimetre into the round.
    keepsJigRules(jig, ([x, y]) => Math.hypot(x - axis, y) > d.outsideR - 0.6);
    expect(piece.toMm - piece.fromMm).toBeLessThanOrEqual(printer.heightMm + 1e-9);
    for (const [i, a] of piece.guides.entries()) {
      expect(Math.abs(a.turnDeg)).toBeLessThanOrEqual(90 + 1e-9);
      // The planner keeps 7 mm from a tube's end; pieces above keep a margin of 8 mm to the middle.
      expect(a.hole.axialMm - a.diameterMm / 2 - Math.max(0, piece.fromMm)).toBeGreaterThan(4);
      expect(piece.toMm - a.hole.axialMm - a.diameterMm * Math.SQRT1_2).toBeGreaterThan(4);
      for (const b of piece.guides.slice(i + 1))
        expect(webBetween(a, b, d.insideR)).toBeGreaterThanOrEqual(2 * printer.lineMm - 1e-9);
    }
  }
}

/** Words apart from one another and from guides, on the piece; own arithmetic. */
function wordsClear({ d, pieces }: Made): number {
  let words = 0;
  for (const { piece } of pieces) {
    const boxes = piece.words.map(({ u, z, widthMm, heightMm }) => ({ u, z, w: widthMm, h: heightMm }));
    for (const [i, a] of boxes.entries()) {
      expect(Math.max(Math.abs(a.u), Math.abs(a.u + a.w))).toBeLessThan((d.outsideR * d.halfSweepDeg * Math.PI) / 180);
      expect(a.z).toBeGreaterThan(piece.fromMm + 0.3);
      expect(a.z + a.h).toBeLessThan(piece.toMm - 0.3);
      for (const b of boxes.slice(i + 1))
        expect(a.u + a.w + 0.6 < b.u || b.u + b.w + 0.6 < a.u || a.z + a.h + 0.6 < b.z || b.z + b.h + 0.6 < a.z).toBe(
          true,
        );
      for (const { hole, diameterMm, turnDeg } of piece.guides) {
        const [u, z] = [(d.outsideR * turnDeg * Math.PI) / 180, hole.axialMm];
        const off = Math.hypot(Math.max(a.u - u, u - a.u - a.w, 0), Math.max(a.z - z, z - a.z - a.h, 0));
        expect(off - diameterMm / 2).toBeGreaterThan(0.3);
      }
      words++;
    }
  }
  return words;
}

function faultOf(record: CoilRecord) {
  try {
    saddleParts(record);
  } catch (error) {
    if (error instanceof Fault) return error.faults[0]!;
    throw error;
  }
  return null;
}

describe('drill saddle', () => {
  test('guides every hole once, where it is, at random', async () => {
    let guides = 0;
    let words = 0;
    let several = 0;
    await fc.assert(
      fc.asyncProperty(
        fc.record({
          diameterMm: fc.integer({ min: 12, max: 120 }),
          pitchUm: fc.integer({ min: 600, max: 6000 }),
          taps: fc.integer({ min: 1, max: 5 }),
          turns: fc.integer({ min: 6, max: 24 }),
          seed: fc.integer({ min: 0, max: 96 }),
          hand: fc.constantFrom<'right' | 'left'>('right', 'left'),
          drawn: fc.boolean(),
          printer: fc.record({
            heightMm: fc.integer({ min: 40, max: 300 }),
            clearanceMm: fc.integer({ min: 0, max: 60 }).map((x) => x / 100),
            holeCompensationMm: fc.integer({ min: 0, max: 40 }).map((x) => x / 100),
            lineMm: fc.integer({ min: 25, max: 90 }).map((x) => x / 100),
          }),
        }),
        async ({ diameterMm, pitchUm, taps, turns, seed, hand, drawn, printer }) => {
          const at = Array.from(
            { length: taps + 1 },
            (_, i) => ((i + 1) * turns) / (taps + 1) + ((seed * (i + 3)) % 24) / 48,
          );
          const record = tube(
            { diameterMm, pitchMm: pitchUm / 1000, turns: at, hand, method: drawn ? 'drawn in' : 'twisted loop' },
            printer,
          );
          const it = await made(record);
          keepsRules(it, record.printer);
          expect(worstGuide(it, record)).toBeLessThan(PLACE_MM);
          words += wordsClear(it);
          guides += it.pieces.reduce((sum, { piece }) => sum + piece.guides.length, 0);
          if (it.pieces.length > 2) several++;
        },
      ),
      { numRuns: 9, seed: 11 },
    );
    console.log(`saddle: ${guides} guides, ${words} words, ${several} records of more than two pieces`);
    expect(guides).toBeGreaterThan(60);
    expect(words).toBeGreaterThan(60);
    expect(several).toBeGreaterThan(0);
  });

  test('goes on the tube with exactly the clearance, its rim under the lower end', async () => {
    for (const clearanceMm of [0, 0.3]) {
      const { d, pieces } = await made(tube({}, { clearanceMm }));
      for (const { piece, facets } of pieces) {
        const walls = planeDistances(facets, [0, 0, 0], ({ normal: n, corners, area }) => {
          const [x, y] = corners[0];
          const inwards = n[0] * x + n[1] * y < -0.99 * Math.hypot(x, y);
          return area > 0.05 && inwards && corners.every(([, , z]) => z > -0.001);
        });
        expect(walls.length).toBeGreaterThan(20);
        for (const r of walls) expect(Math.abs(2 * r - 60 - clearanceMm)).toBeLessThan(PLACE_MM);
        // The ledge that the tube stands on.
        const ledge = facets.filter(
          ({ normal, corners }) =>
            normal[2] > 0.99 && corners.every(([x, y, z]) => z < 1 && Math.hypot(x, y) < d.insideR + 0.1),
        );
        expect(ledge.length).toBeGreaterThan(10);
        for (const { corners } of ledge) for (const [, , z] of corners) expect(Math.abs(z)).toBeLessThan(0.001);
        expect(piece.rim).toBe(true);
      }
      expect(d.snapMm).toBeGreaterThan(0.1);
      expect(d.snapN).toBeLessThan(60);
    }
  });

  test('the notches of the opposite half stand over the lines along the lips of the first', () => {
    const d = saddleDimensions(tube());
    const [a, b] = d.pieces;
    expect([a!.lined, b!.lined, b!.notches]).toEqual([null, 'saddle-a', true]);
    const round = (deg: number) => ((deg % 360) + 360) % 360;
    const lips = [-1, 1].map((side) => round(a!.middleDeg + side * d.halfSweepDeg)).sort();
    const notches = [-1, 1].map((side) => round(b!.middleDeg + side * (180 - d.halfSweepDeg))).sort();
    for (const i of [0, 1]) expect(notches[i]).toBeCloseTo(lips[i]!, 9);
    expect(b!.fromMm).toBe(a!.fromMm);
    expect(b!.toMm).toBe(a!.toMm);
  });

  test('holes on less than half of the tube take one piece', () => {
    const d = saddleDimensions(tube({ turns: [4.05, 8.1, 12.2] }));
    expect(d.pieces.map(({ part }) => part)).toEqual(['saddle-a']);
    expect(saddleParts(tube({ turns: [4.05, 8.1, 12.2] }))[0]!.use).not.toContain('line');
  });

  test('a long tube takes pieces that are placed by a shank through a hole bored before', async () => {
    const record = tube({}, { heightMm: 60 });
    const it = await made(record);
    keepsRules(it, record.printer);
    expect(worstGuide(it, record)).toBeLessThan(PLACE_MM);
    const above = it.d.pieces.filter(({ rim }) => !rim);
    expect(above.length).toBeGreaterThan(0);
    const bored = new Set<string>();
    for (const piece of it.d.pieces) {
      const pin = piece.guides.find(({ index }) => index);
      if (pin) expect(bored.has(pin.hole.label)).toBe(true);
      expect(piece.rim || pin !== undefined || piece.lined !== null || piece.standsOn !== null).toBe(true);
      for (const { hole } of piece.guides) bored.add(hole.label);
    }
  });

  test('guides that would run together are shared out among passes', () => {
    const coarse = saddleDimensions(tube({ turns: [6.2, 12.3] }, { lineMm: 1.2 }));
    const fine = saddleDimensions(tube({ turns: [6.2, 12.3] }));
    expect(coarse.pieces.length).toBeGreaterThan(fine.pieces.length);
  });

  test('where the next hole is out of reach, pieces stand on one another', async () => {
    const record = tube({ pitchMm: 6, turns: [20.5] }, { heightMm: 50 });
    const it = await made(record);
    keepsRules(it, record.printer);
    expect(worstGuide(it, record)).toBeLessThan(PLACE_MM);
    const standing = it.d.pieces.filter(({ standsOn }) => standsOn !== null);
    expect(standing.length).toBeGreaterThan(0);
    for (const piece of standing) {
      const under = it.d.pieces.find(({ part }) => part === piece.standsOn)!;
      expect([piece.fromMm, piece.middleDeg]).toEqual([under.toMm, under.middleDeg]);
    }
  });

  test('pieces cover the holes of any tube, whatever the printer builds', () => {
    let pieces = 0;
    for (let heightMm = 40; heightMm <= 300; heightMm += 1)
      for (const pitchMm of [2.1, 5]) {
        const d = saddleDimensions(tube({ pitchMm }, { heightMm }));
        for (const { fromMm, toMm, guides, rim } of d.pieces) {
          expect(toMm - fromMm).toBeLessThanOrEqual(heightMm + 1e-9);
          for (const { hole } of guides) {
            expect(hole.axialMm - fromMm).toBeGreaterThanOrEqual(rim ? 5 : 8 - 1e-9);
            expect(toMm - hole.axialMm).toBeGreaterThanOrEqual(8 - 1e-9);
          }
          pieces++;
        }
      }
    console.log(`saddle: ${pieces} pieces on printers of 40 to 300 mm`);
    expect(pieces).toBeGreaterThan(1000);
  });

  test('a printer too low is refused with the least that works', () => {
    const fault = faultOf(tube({}, { heightMm: 39 }))!;
    expect(fault.code).toBe('saddle-low-printer');
    const heightMm = Number(/builds ([\d.]+) mm/.exec(fault.todo)![1]);
    expect(faultOf(tube({}, { heightMm }))).toBeNull();
  });

  test('printed formers, thin tubes and tubes without holes have no saddle', () => {
    expect(faultOf(sampleRecord())?.code).toBe('saddle-no-tube');
    expect(faultOf(tube({ diameterMm: 11.9 }))?.code).toBe('saddle-small-tube');
    expect(faultOf(tube({ diameterMm: 12 }))).toBeNull();
    expect(faultOf({ ...tube(), holes: [] })?.code).toBe('saddle-no-holes');
  });

  test('a mirrored saddle would not pass: guides of one hand against holes of the other', async () => {
    const left = await made(tube({ hand: 'left', turns: [6.3, 12.55] }));
    const right = tube({ hand: 'right', turns: [6.3, 12.55] });
    const tap = right.holes.find(({ purpose }) => purpose === 'tap')!;
    const found = left.pieces.map(({ facets }) => radialHole(facets, tap.angleDeg, tap.axialMm, 1.7).walls);
    expect(Math.max(...found)).toBeLessThan(9);
  });

  test('its views have the size of the pieces and every guide in its place', () => {
    const record = tube();
    const d = saddleDimensions(record);
    const views = saddleViews(record);
    const parts = saddleParts(record);
    expect(Object.keys(views)).toEqual(parts.map(({ part }) => part));
    for (const [i, { part, expected }] of parts.entries()) {
      const [elevation, end, developed] = views[part]!;
      expect(extentOf(elevation!)[1]).toBeCloseTo(expected.maxMm[2], 6);
      expect(extentOf(end!)[0]).toBeCloseTo(2 * expected.maxMm[0], 1);
      for (const { hole } of d.pieces[i]!.guides) {
        const circle = developed!.shapes.find((s) => s.shape === 'circle' && s.name === `guide ${hole.label}`);
        expect(circle).toMatchObject({ y: hole.axialMm });
        const deg = (((circle as { x: number }).x / d.outsideR) * 180) / Math.PI + d.pieces[i]!.middleDeg;
        expect(Math.cos(((deg - hole.angleDeg) * Math.PI) / 180)).toBeCloseTo(1, 9);
      }
    }
  });
});
