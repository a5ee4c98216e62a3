import { describe, expect, test } from 'vitest';
import type { CoilRecord } from '../../src/record/schema.ts';
import { holePatternFiles } from '../../src/sheets/hole-pattern.ts';
import { readDxf } from '../helpers/dxf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { readXml } from '../helpers/xml.ts';

/** What the files must hold; they are written to 0.0001 mm. */
const PLACE_MM = 0.001;

interface Round {
  readonly x: number;
  readonly y: number;
  readonly r: number;
}

const filesOf = (record: CoilRecord) => {
  const [svg, dxf] = holePatternFiles(record).map(({ bytes }) => new TextDecoder().decode(bytes));
  return { svg: svg!, dxf: dxf! };
};

/** Holes and outline of the SVG, turned back to Y up; one user unit must be one millimetre. */
function fromSvg(text: string) {
  const all = readXml(text);
  const root = all[0]!.attributes;
  const [, , width, height] = root.viewBox!.split(' ').map(Number);
  expect([root.width, root.height]).toEqual([`${width}mm`, `${height}mm`]);
  const of = (name: string) => all.filter((each) => each.name === name).map(({ attributes }) => attributes);
  const outline = of('polygon').map(({ points }) =>
    points!.split(' ').map((pair) => {
      const [x, y] = pair.split(',').map(Number) as [number, number];
      return [x, -y] as const;
    }),
  );
  const holes = of('circle').map(({ cx, cy, r }) => ({ x: Number(cx), y: -Number(cy), r: Number(r) }));
  return { holes, outline, all };
}

/** Holes and outline of the DXF, each only from the layer it belongs on. */
function fromDxf(text: string) {
  const { entities } = readDxf(text);
  const number = (pairs: readonly (readonly [number, string])[], code: number) =>
    Number(pairs.find(([each]) => each === code)![1]);
  const on = (type: string, layer: string) =>
    entities.filter(({ pairs, ...each }) => each.type === type && pairs.some(([c, v]) => c === 8 && v === layer));
  const holes = on('CIRCLE', 'HOLES').map(({ pairs }) => ({
    x: number(pairs, 10),
    y: number(pairs, 20),
    r: number(pairs, 40),
  }));
  const corners = on('VERTEX', 'CUT').map(({ pairs }) => [number(pairs, 10), number(pairs, 20)] as const);
  expect(on('POLYLINE', 'CUT').length).toBe(1);
  expect(entities.filter(({ type }) => type === 'CIRCLE').length).toBe(holes.length);
  return { holes, outline: [corners], entities };
}

/**
 * The largest distance, mm, of a hole of the record from a circle that is its own, with the outline's lower left corner
 * as the frame and the shift round the former taken from the start hole. Infinite when the counts differ.
 */
function worstMm(
  found: { holes: readonly Round[]; outline: readonly (readonly (readonly [number, number])[])[] },
  record: CoilRecord,
) {
  const round = 2 * Math.PI * (record.former.outsideDiameterMm / 2);
  const corners = found.outline[0]!;
  const low = corners.reduce((least, [, y]) => Math.min(least, y), Infinity) - (record.former.flange?.lowerMm ?? 0);
  if (found.holes.length !== record.holes.length) return Infinity;
  const start = record.holes.find(({ purpose }) => purpose === 'start')!;
  const fits = found.holes
    .filter((hole) => Math.abs(hole.y - low - start.axialMm) < PLACE_MM)
    .map((origin) =>
      Math.max(
        ...record.holes.map((hole) =>
          Math.min(
            ...found.holes.map((circle) => {
              const off = circle.x - origin.x - (hole.angleDeg / 360) * round;
              const across = off - Math.round(off / round) * round;
              const up = circle.y - low - hole.axialMm;
              return Math.max(Math.hypot(across, up), Math.abs(2 * circle.r - hole.diameterMm));
            }),
          ),
        ),
      ),
    );
  return Math.min(Infinity, ...fits);
}

/** A staggered coil that no mirror and no turn maps on itself. */
const asymmetric = (hand: 'right' | 'left', rest = {}) =>
  sampleRecord({ hand, turns: [12.25, 20.5, 31.125, 47.4, 60.8], ...rest });

describe('hole pattern', () => {
  test.each(['right', 'left'] as const)('%s hand: both files have the holes of the record', (hand) => {
    let holes = 0;
    let worst = 0;
    for (const rest of [
      {},
      { kind: 'tube' as const },
      { diameterMm: 25 },
      { unitTurns: [1, 2, 3.5], diameterMm: 110 },
    ]) {
      const record = asymmetric(hand, rest);
      const other = asymmetric(hand === 'right' ? 'left' : 'right', rest);
      const files = filesOf(record);
      for (const found of [fromSvg(files.svg), fromDxf(files.dxf)]) {
        const off = worstMm(found, record);
        expect(off).toBeLessThan(PLACE_MM);
        worst = Math.max(worst, off);
        holes += found.holes.length;
        // Mirrored, of the other hand, upside down, or with the thickness of a sheet added, it must not pass.
        const mirrored = found.holes.map((hole) => ({ ...hole, x: -hole.x }));
        expect(worstMm({ ...found, holes: mirrored }, record)).toBeGreaterThan(0.1);
        expect(worstMm(found, other)).toBeGreaterThan(0.1);
        const over = found.outline.map((corners) => corners.map(([x, y]) => [x, -y] as const));
        const turned = found.holes.map((hole) => ({ ...hole, y: -hole.y }));
        expect(worstMm({ holes: turned, outline: over }, record)).toBeGreaterThan(0.1);
        const thicker = {
          ...record,
          former: { ...record.former, outsideDiameterMm: record.former.outsideDiameterMm + 0.1 },
        };
        expect(worstMm(found, thicker)).toBeGreaterThan(PLACE_MM);
        // Cut along the outline it goes round once, from rim to rim, and every centre lies on it.
        const xs = found.outline[0]!.map(([x]) => x);
        const ys = found.outline[0]!.map(([, y]) => y);
        expect(found.outline.length).toBe(1);
        const { outsideDiameterMm, lengthMm, flange } = record.former;
        expect(Math.abs(Math.max(...xs) - Math.min(...xs) - Math.PI * outsideDiameterMm)).toBeLessThan(PLACE_MM);
        const high = lengthMm - (flange ? flange.lowerMm + flange.upperMm : 0);
        expect(Math.abs(Math.max(...ys) - Math.min(...ys) - high)).toBeLessThan(PLACE_MM);
        for (const hole of found.holes) {
          expect(hole.x).toBeGreaterThan(Math.min(...xs));
          expect(hole.x).toBeLessThan(Math.max(...xs));
        }
      }
    }
    console.log(`hole pattern, ${hand}: ${holes} holes read back, worst ${worst.toExponential(1)} mm`);
    expect(holes).toBeGreaterThan(80);
  });

  test('the DXF counts heights from the datum and angles from its left edge', () => {
    const record = asymmetric('right');
    const { holes, outline } = fromDxf(filesOf(record).dxf);
    const [x, y] = outline[0]![0]!;
    expect([x, y]).toEqual([0, record.former.flange!.lowerMm]);
    for (const hole of record.holes)
      expect(holes.some((circle) => Math.abs(circle.y - hole.axialMm) < PLACE_MM)).toBe(true);
  });

  test('a tap without a hole is an oblique cross on the layer of marks', () => {
    const record = sampleRecord({ surface: 'smooth', kind: 'tube', method: 'twisted loop', gapMm: 0.3 });
    const { svg, dxf } = filesOf(record);
    const crosses = readDxf(dxf).entities.filter(({ type, pairs }) => {
      const at = (code: number) => Number(pairs.find(([each]) => each === code)?.[1]);
      return type === 'LINE' && at(11) - at(10) > 2 && Math.abs(at(21) - at(20)) > 2.7 && at(21) !== at(20);
    });
    const taps = record.windings[0]!.taps.slice(0, -1);
    expect(crosses.length).toBe(2 * taps.length);
    for (const { pairs } of crosses) expect(pairs).toContainEqual([8, 'MARKS']);
    expect(readXml(svg).some(({ text }) => text.includes('place of a tap without a hole'))).toBe(true);
    expect(taps.length).toBe(4);
  });

  test('it says how it is measured, and every hole has its label', () => {
    const record = asymmetric('left');
    const { svg, dxf } = filesOf(record);
    const inSvg = readXml(svg).filter(({ name }) => name === 'text');
    const inDxf = readDxf(dxf).entities.filter(({ type }) => type === 'TEXT');
    for (const hole of record.holes) expect(inSvg.filter(({ text }) => text === hole.label).length).toBe(1);
    // A blank for the plus of F+1 would mislead.
    for (const hole of record.holes)
      expect(inDxf.filter(({ pairs }) => pairs.some(([c, v]) => c === 1 && v === hole.label)).length).toBe(1);
    const words = inSvg.map(({ text }) => text).join(' ');
    for (const said of [
      'no paper thickness added',
      'outside radius 30 mm',
      'seen from outside',
      record.hash.slice(0, 12),
    ])
      expect(words).toContain(said);
    expect(dxf).not.toMatch(/[^ -~\n]/);
  });

  test('no name of a job breaks out of either file', () => {
    const names = [
      '</text><script>alert(1)</script>',
      '"><svg onload="x()">',
      ']]>--><!-- &amp; &#x3c;',
      "a' onclick='b",
      '<!DOCTYPE a [<!ENTITY b "c">]>&b;',
      '  0\nENDSEC\n  0\nEOF\n',
      'line\r\nbreak\u0000\u0001\u001b\u2028\u0085',
      '%%c %%d \\P ^J {\\fArial;x}',
      '5 µH at 3 Ω, 20°',
      '\ud800 lone \ufffe',
      '線圈 катушка \u202e',
    ];
    const plain = filesOf(sampleRecord({ job: 'Plain' }));
    const shape = (svg: string) =>
      readXml(svg)
        .filter(({ name }) => name !== 'text')
        .map(({ name, attributes }) => [name, Object.keys(attributes)]);
    const kinds = (dxf: string) => readDxf(dxf).entities.filter(({ type }) => type !== 'TEXT');
    for (const job of names) {
      const { svg, dxf } = filesOf(sampleRecord({ job }));
      expect(shape(svg)).toEqual(shape(plain.svg));
      expect(kinds(dxf)).toEqual(kinds(plain.dxf));
      expect(dxf).not.toMatch(/[^ -~\n]|[%^\\{}]/);
    }
    const said = (job: string) =>
      readXml(filesOf(sampleRecord({ job })).svg).find(({ name }) => name === 'title')!.text;
    expect(said(names[0]!)).toBe(`Hole pattern: ${names[0]}`);
    expect(filesOf(sampleRecord({ job: names[8]! })).dxf).toContain('5 uH at 3 ohm, 20 deg');
    console.log(`hole pattern: ${names.length} hostile names`);
    expect(names.length).toBe(11);
  });

  test('same record, same bytes', () => {
    const [one, two] = [holePatternFiles(sampleRecord()), holePatternFiles(sampleRecord())];
    expect(one.map(({ path, kind }) => [path, kind])).toEqual([
      ['hole-pattern.svg', 'svg'],
      ['hole-pattern.dxf', 'dxf'],
    ]);
    one.forEach((file, i) => {
      expect(Buffer.compare(file.bytes, two[i]!.bytes)).toBe(0);
    });
  });
});

test('the readers refuse what is not well formed', () => {
  for (const text of [
    '<a><b></a></b>',
    '<a x="1" x="2"/>',
    '<a>&b;</a>',
    '<a x="<"/>',
    '<a/><b/>',
    '<a>\u0001</a>',
    '<a',
  ])
    expect(() => readXml(text), text).toThrow();
  for (const text of ['  0\nEOF', '  0\nSECTION\n  2\nA\n  0\nEOF\n', '  0\nEOF\n  0\nX\n', 'x\nEOF\n'])
    expect(() => readDxf(text), text).toThrow();
});
