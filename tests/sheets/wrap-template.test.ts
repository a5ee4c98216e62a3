import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { textBox } from '../../src/drawing/boxes.ts';
import { developed, PAPER_THICKNESS_MM } from '../../src/drawing/template.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { PAPER_MM, type Page, Paper } from '../../src/sheets/page.ts';
import { layOutWrapTemplate, templateFrame, wrapTemplate } from '../../src/sheets/wrap-template.ts';
import { splitRecord } from '../helpers/joints.ts';
import { evenTurns, fullRecord, layoutBoxes, layoutFaults } from '../helpers/layout.ts';
import { type PdfCircle, type PdfPage, type PdfText, readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';

const measure = new Paper({ title: 'measure', subject: 'measure' });
/** The reader's 32 bit floats carry 4e-5 mm; what is drawn is held to a fiftieth of a millimetre. */
const PLACE_MM = 0.02;

interface Wanted {
  readonly name: string;
  readonly x: number;
  readonly y: number;
  readonly r: number;
}

/** Where the record puts its holes on the developed surface, worked out here: the arc to the right, Z up. */
function wantedHoles(record: CoilRecord): Wanted[] {
  const round = 2 * Math.PI * (record.former.outsideDiameterMm / 2 + PAPER_THICKNESS_MM / 2);
  return record.holes.map((hole) => ({
    name: `${hole.purpose} ${hole.label}`,
    x: (hole.angleDeg / 360) * round,
    y: hole.axialMm,
    r: hole.diameterMm / 2,
  }));
}

/**
 * Fits the circles of a page on the wanted holes by a shift alone, up to whole turns round the former. The names of
 * the holes that were found, or null when no shift puts every circle on a hole.
 */
function matchHoles(circles: readonly PdfCircle[], record: CoilRecord): string[] | null {
  const round = Math.PI * (record.former.outsideDiameterMm + PAPER_THICKNESS_MM);
  const wanted = wantedHoles(record);
  const first = circles[0];
  if (!first) return null;
  for (const start of wanted) {
    const dx = first.x - start.x;
    const dy = first.y - start.y;
    const names = new Set<string>();
    for (const circle of circles) {
      const hole = wanted.find((each) => {
        const off = circle.x - dx - each.x;
        const away = Math.abs(off - Math.round(off / round) * round);
        return away < PLACE_MM && Math.abs(circle.y - dy - each.y) < PLACE_MM && Math.abs(circle.r - each.r) < PLACE_MM;
      });
      if (hole) names.add(hole.name);
    }
    if (names.size === circles.length) return [...names];
  }
  return null;
}

/** Lays pages together so that equal letters cover one another; their circles, each once, in the frame of the first. */
function joinTiles(pages: readonly PdfPage[]): PdfCircle[] {
  const lettersOf = (page: PdfPage) => page.texts.filter((text) => /^[a-z]$/.test(text.text));
  const placed = new Map<PdfPage, { dx: number; dy: number }>([[pages[0]!, { dx: 0, dy: 0 }]]);
  for (const [page, at] of placed)
    for (const other of pages) {
      const shared = lettersOf(page).flatMap((one) => {
        const same = lettersOf(other).find((two) => two.text === one.text);
        return same && other !== page ? [{ dx: at.dx + one.x - same.x, dy: at.dy + one.y - same.y }] : [];
      });
      if (shared.length === 0) continue;
      const known = placed.get(other) ?? shared[0]!;
      for (const each of shared) expect(Math.hypot(each.dx - known.dx, each.dy - known.dy)).toBeLessThan(PLACE_MM);
      if (!placed.has(other)) placed.set(other, known);
    }
  expect(placed.size).toBe(pages.length);
  const circles: PdfCircle[] = [];
  for (const [page, { dx, dy }] of placed)
    for (const circle of page.circles) {
      const moved = { x: circle.x + dx, y: circle.y + dy, r: circle.r };
      if (!circles.some((each) => Math.hypot(each.x - moved.x, each.y - moved.y) < PLACE_MM)) circles.push(moved);
    }
  return circles;
}

/** Straight strokes of a page as [x1, y1, x2, y2]. */
function strokes(page: PdfPage): [number, number, number, number][] {
  return page.paths
    .filter((path) => path.points.length === 2 && !path.closed)
    .map((path) => [...path.points[0]!, ...path.points[1]!]);
}

const centre = (text: PdfText) => text.x + text.width / 2;

/** A staggered coil that no mirror and no turn maps on itself. */
const asymmetric = (hand: 'right' | 'left', rest = {}) =>
  sampleRecord({ hand, turns: [12.25, 20.5, 31.125, 47.4, 60.8], ...rest });

describe('wrap template, measured', () => {
  test.each(['right', 'left'] as const)('holes of a %s-hand coil lie where the record has them', async (hand) => {
    const record = asymmetric(hand);
    const pdf = await readPdf(await wrapTemplate(record));
    expect(pdf.pages.length).toBe(1);
    const page = pdf.pages[0]!;
    const names = matchHoles(page.circles, record);
    expect(names?.sort()).toEqual(
      wantedHoles(record)
        .map((hole) => hole.name)
        .sort(),
    );
    // A mirrored sheet must not pass, nor one of the other hand.
    expect(
      matchHoles(
        page.circles.map((circle) => ({ ...circle, x: -circle.x })),
        record,
      ),
    ).toBeNull();
    expect(matchHoles(page.circles, asymmetric(hand === 'right' ? 'left' : 'right'))).toBeNull();
    console.log(`wrap template, ${hand}: ${page.circles.length} holes within ${PLACE_MM} mm`);

    // The figures of the scale agree: 0 over the start hole, and a quarter of the round from one right angle to the next.
    const start = record.holes.find((hole) => hole.purpose === 'start')!;
    const edge = page.paths.find((path) => path.closed && path.points.length === 4 && isSheet(path.points, record))!;
    const bottom = Math.min(...edge.points.map(([, y]) => y));
    const drawn = page.circles.find((circle) => Math.abs(circle.y - bottom + 3 - start.axialMm) < PLACE_MM)!;
    expect(drawn).toBeDefined();
    const figure = (angle: number) => page.texts.find((text) => text.text === `${angle}°`)!;
    expect(Math.abs(centre(figure(0)) - drawn.x)).toBeLessThan(0.05);
    const round = Math.PI * (record.former.outsideDiameterMm + PAPER_THICKNESS_MM);
    const step = centre(figure(30)) - centre(figure(0));
    expect(Math.abs(step - round / 12)).toBeLessThan(0.05);
  });

  test('labels stand nearest to their own hole or are led to it', async () => {
    const record = asymmetric('right');
    const [page] = (await readPdf(await wrapTemplate(record))).pages as [PdfPage];
    for (const hole of record.holes)
      expect(page.texts.filter((text) => text.text === hole.label).length, hole.label).toBe(1);
    const taps = record.holes.filter((hole) => hole.purpose === 'tap');
    for (const tap of taps) {
      const text = page.texts.find((each) => each.text === tap.label)!;
      const near = [...page.circles].sort(
        (a, b) => Math.hypot(a.x - text.x, a.y - text.y) - Math.hypot(b.x - text.x, b.y - text.y),
      );
      const found = matchHoles([near[0]!, ...page.circles.filter((circle) => circle !== near[0])], record);
      expect(found?.[0]).toBe(`tap ${tap.label}`);
    }
    expect(taps.length).toBe(4);
  });

  test('a tap without a hole is a cross at its place', async () => {
    const record = sampleRecord({ surface: 'smooth', kind: 'tube', method: 'twisted loop', gapMm: 0.3 });
    const [page] = (await readPdf(await wrapTemplate(record))).pages as [PdfPage];
    const holes = wantedHoles(record);
    const named = page.circles.map(
      (circle, i) => matchHoles([circle, ...page.circles.filter((_, k) => k !== i)], record)![0]!,
    );
    const anchor = page.circles[named.indexOf('start S')]!;
    const start = holes.find((hole) => hole.name === 'start S')!;
    const round = Math.PI * (record.former.outsideDiameterMm + PAPER_THICKNESS_MM);
    const crosses = strokes(page)
      .filter(([x1, y1, x2, y2]) => Math.abs(Math.abs(x2 - x1) - 2.8) < 1e-3 && Math.abs(y2 - y1 - 2.8) < 1e-3)
      .map(([x1, y1, x2, y2]) => [(x1 + x2) / 2, (y1 + y2) / 2] as const);
    const taps = record.windings[0]!.taps.slice(0, -1);
    for (const tap of taps) {
      const hit = crosses.some(([x, y]) => {
        const off = x - anchor.x - ((tap.angleDeg / 360) * round - start.x);
        const away = Math.abs(off - Math.round(off / round) * round);
        return away < PLACE_MM && Math.abs(y - anchor.y - (tap.positionMm - start.y)) < PLACE_MM;
      });
      expect(hit, `tap ${tap.tap}`).toBe(true);
    }
    expect(taps.length).toBe(4);
  });

  test('tiles: every hole whole on some page, every page true, crosses shared', async () => {
    const record = asymmetric('left', { diameterMm: 130, pitchMm: 4.2 });
    const pdf = await readPdf(await wrapTemplate(record));
    const names = pdf.pages.map(
      (page) => /tile ([A-Z]\d)$/.exec(page.texts.find((each) => /tile/.test(each.text))?.text ?? '')?.[1],
    );
    const rows = new Set(names.map((name) => name![0])).size;
    const columns = new Set(names.map((name) => name![1])).size;
    expect(new Set(names).size).toBe(rows * columns);
    expect(Math.min(rows, columns)).toBeGreaterThan(1);
    const text = pdf.pages.map((page) => page.texts.map((each) => each.text));
    // Two crosses to each shared side, each on two pages or, where four meet, more.
    const letters = [...new Set(text.flat().filter((each) => /^[a-z]$/.test(each)))];
    expect(letters.length).toBe(2 * (rows * (columns - 1) + columns * (rows - 1)));
    for (const letter of letters) expect(text.filter((page) => page.includes(letter)).length).toBeGreaterThanOrEqual(2);
    // Joined by the letters of their crosses the pages give one sheet, and on it every hole.
    const whole = joinTiles(pdf.pages);
    const found = matchHoles(whole, record);
    expect(found?.sort()).toEqual(
      wantedHoles(record)
        .map((hole) => hole.name)
        .sort(),
    );
    console.log(`wrap template: ${whole.length} holes over ${pdf.pages.length} tiles, ${letters.length} crosses`);
  });

  test.each(['A4', 'Letter'] as const)('%s: size, rulers, square, words', async (paper) => {
    for (const diameterMm of [25, 76, 130]) {
      const record = sampleRecord({ paper, diameterMm });
      const pdf = await readPdf(await wrapTemplate(record));
      expect(pdf.printScaling).toBe('None');
      expect(pdf.language).toBe('en');
      let squares = 0;
      for (const page of pdf.pages) {
        const size = [page.widthMm, page.heightMm].sort((a, b) => a - b);
        expect(size[0]).toBeCloseTo(PAPER_MM[paper][0], 3);
        expect(size[1]).toBeCloseTo(PAPER_MM[paper][1], 3);
        // On paper 100 mm within 0.1 mm; the drawing itself within the reader's accuracy.
        const across = strokes(page).filter(([x1, y1, x2, y2]) => y1 === y2 && Math.abs(x2 - x1 - 100) < 1e-3);
        const up = strokes(page).filter(([x1, y1, x2, y2]) => x1 === x2 && Math.abs(y2 - y1 - 100) < 1e-3);
        expect([across.length, up.length]).toEqual([1, 1]);
        const ticks = strokes(page).filter(
          ([x1, y1, x2, y2]) => x1 === x2 && Math.abs(y1 - across[0]![1]) < 1e-3 && y2 < y1,
        );
        expect(ticks.length).toBe(101);
        squares += page.paths.filter((path) => {
          const xs = path.points.map(([x]) => x);
          const ys = path.points.map(([, y]) => y);
          const wide = Math.max(...xs) - Math.min(...xs);
          const high = Math.max(...ys) - Math.min(...ys);
          return path.closed && path.points.length === 4 && Math.abs(wide - 50) < 1e-3 && Math.abs(high - 50) < 1e-3;
        }).length;
        const words = page.texts.map((text) => text.text).join(' ');
        for (const said of ['Print at 100 %, no scaling', record.job, record.hash.slice(0, 12), 'Printed side out'])
          expect(words).toContain(said);
      }
      expect(squares).toBe(1);
    }
  });

  test('a 76 mm former takes one page of either paper, turned', async () => {
    for (const paper of ['A4', 'Letter'] as const) {
      const pdf = await readPdf(await wrapTemplate(sampleRecord({ diameterMm: 76, paper })));
      expect(pdf.pages.length).toBe(1);
      expect(pdf.pages[0]!.widthMm).toBeCloseTo(PAPER_MM[paper][1], 3);
    }
  });

  test('same record, same bytes', async () => {
    const [one, two] = [await wrapTemplate(sampleRecord()), await wrapTemplate(sampleRecord())];
    expect(Buffer.compare(one, two)).toBe(0);
  });
});

/** The outline of the sheet: as wide as the round. */
function isSheet(points: readonly (readonly [number, number])[], record: CoilRecord): boolean {
  const xs = points.map(([x]) => x);
  const round = Math.PI * (record.former.outsideDiameterMm + PAPER_THICKNESS_MM);
  return Math.abs(Math.max(...xs) - Math.min(...xs) - round) < 1e-3;
}

/** What the lower edge is said to be, where a dashed edge of the winding runs through the words. */
function edgesThroughWords(pages: readonly Page[]): string[] {
  return pages.flatMap((page) => {
    const edges = page.shapes.filter(
      (shape) => shape.shape === 'line' && shape.dash === 'dashed' && shape.y1 === shape.y2,
    );
    return page.shapes.flatMap((shape) => {
      if (shape.shape !== 'text' || !shape.text.startsWith('lower edge')) return [];
      const box = textBox(shape, measure);
      const through = edges.some((edge) => edge.shape === 'line' && edge.y1 > box.bottom && edge.y1 < box.top);
      return through ? [shape.text] : [];
    });
  });
}

describe('wrap template: taps, seams and units', () => {
  const made = (method: string, rest = {}) =>
    sampleRecord({ surface: 'smooth', kind: 'tube', method: method as 'lug', gapMm: 0.3, ...rest });
  const words = (pages: readonly Page[]) =>
    pages.flatMap((page) => page.shapes.flatMap((shape) => (shape.shape === 'text' ? [shape.text] : []))).join(' ');
  const lines = (pages: readonly Page[]) =>
    pages.flatMap((page) => page.shapes.flatMap((shape) => (shape.shape === 'polyline' ? [shape] : [])));
  /** Closed outlines of sixteen corners: the eyes of loops. Behind the paper a loop is ten dashes. */
  const outwards = (pages: readonly Page[]) =>
    lines(pages).filter(({ closed, points }) => closed && points.length === 16).length;
  const behind = (pages: readonly Page[]) => lines(pages).filter(({ points }) => points.length === 2).length / 10;

  test.each([
    ['twisted loop', 'stands outwards, on this side', 4, 0],
    ['lifted turn', 'lifted over a strip, on this side', 0, 0],
    ['lug', 'its lug stands outwards, on this side', 0, 0],
    ['drawn in', 'behind the paper', 0, 4],
    ['cut pair', 'behind the paper', 0, 0],
  ] as const)('%s: its mark at every tap, and the side it is on', (method, said, out, inside) => {
    const pages = layOutWrapTemplate(made(method), measure);
    expect(words(pages)).toContain(said);
    // Four taps far apart: there is room for the loop of each.
    expect([outwards(pages), behind(pages)]).toEqual([out, inside]);
  });

  test('the overlap is told with its angle, and the seam of a tube belongs under it', () => {
    const tube = layOutWrapTemplate(made('lug'), measure);
    expect(words(tube)).toMatch(/Overlap at [\d.]+°, clear of holes: turn a straight seam of the tube under it/);
    expect(words(tube)).toContain('seam of the tube');
    expect(words(layOutWrapTemplate(sampleRecord(), measure))).not.toContain('seam of the tube');
  });

  test('the seam of sections runs all round at its height', () => {
    const whole = sampleRecord();
    const record = splitRecord(whole, 0.6 * whole.former.lengthMm);
    const pages = layOutWrapTemplate(record, measure);
    expect(words(pages)).toContain('the seam of the sections');
    const { shapes, circumferenceMm } = developed(record, measure);
    const [joint] = record.former.joints;
    const seam = shapes.find((shape) => shape.shape === 'polyline' && !shape.closed && shape.points.length > 60);
    if (seam?.shape !== 'polyline') throw new Error('no seam');
    expect(seam.points[0]![0]).toBeCloseTo(0, 4);
    expect(seam.points.at(-1)![0]).toBeCloseTo(circumferenceMm, 4);
    for (const [, z] of seam.points) {
      expect(z).toBeGreaterThan(joint!.seamMm - 0.001);
      expect(z).toBeLessThan(joint!.seamMm + joint!.climbMm + 0.001);
    }
  });

  test.each(['inch', 'both'] as const)(
    '%s: a ruler of four inches besides those of 100 mm, on every page',
    async (units) => {
      let rulers = 0;
      for (const diameterMm of [25, 76, 130]) {
        const record = { ...sampleRecord({ diameterMm }), units };
        const { pages } = await readPdf(await wrapTemplate(record));
        for (const page of pages) {
          const long = (mm: number) =>
            strokes(page).filter(([x1, y1, x2, y2]) => Math.abs(Math.hypot(x2 - x1, y2 - y1) - mm) < 1e-3);
          expect([long(100).length, long(101.6).length]).toEqual([2, 1]);
          expect(page.texts.map((text) => text.text)).toContain('4 in');
          rulers++;
        }
        const said = pages[0]!.texts
          .map((text) => text.text)
          .join(' ')
          .replace(/\s+/g, ' ');
        const round = Math.PI * (record.former.outsideDiameterMm + PAPER_THICKNESS_MM);
        expect(said).toContain(`${(round / 25.4).toFixed(4)} in`);
        expect(said.includes(`${round.toFixed(2)} mm`)).toBe(units === 'both');
      }
      console.log(`wrap template, ${units}: ${rulers} rulers of four inches`);
      expect(rulers).toBeGreaterThan(3);
    },
  );
});

describe('wrap template, laid out', () => {
  test('nothing overlaps, leaves the margins or is too small, over random records', () => {
    let runs = 0;
    let boxes = 0;
    const options = fc.record({
      hand: fc.constantFrom('right' as const, 'left' as const),
      kind: fc.constantFrom('printed' as const, 'tube' as const),
      surface: fc.constantFrom('smooth' as const, 'grooved' as const),
      paper: fc.constantFrom('A4' as const, 'Letter' as const),
      method: fc.constantFrom('twisted loop', 'lug', 'drawn in', 'lifted turn'),
      units: fc.constantFrom('metric' as const, 'inch' as const, 'both' as const),
      taps: fc.integer({ min: 1, max: 24 }),
      whole: fc.integer({ min: 25, max: 150 }),
      staggered: fc.boolean(),
      diameterMm: fc.double({ min: 12, max: 160, noNaN: true }),
      pitchMm: fc.double({ min: 0.6, max: 3, noNaN: true }),
      job: fc.string({ minLength: 1, maxLength: 160 }),
      lowMm: fc.integer({ min: 0, max: 60 }).map((tenths) => tenths / 10),
    });
    fc.assert(
      fc.property(options, ({ taps, whole, staggered, method, units, lowMm, ...rest }) => {
        const turns = evenTurns(taps, whole, staggered);
        const full = fullRecord({ ...rest, method: method as 'lug', turns });
        // A start so low that the edge of the winding runs where the lower edge is named, or a little higher.
        const startMm = (full.former.flange?.lowerMm ?? 0) + full.windings[0]!.wire.overallMm / 2 + lowMm;
        const record = { ...full, units, windings: [{ ...full.windings[0]!, startMm }] };
        const pages = layOutWrapTemplate(record, measure);
        expect(layoutFaults(pages, templateFrame, measure)).toEqual([]);
        expect(edgesThroughWords(pages)).toEqual([]);
        boxes += layoutBoxes(pages, measure).length;
        runs++;
      }),
      { seed: 21, numRuns: 60 },
    );
    console.log(`wrap template: ${runs} random records laid out, ${boxes} texts`);
    expect(runs).toBe(60);
  });
});
