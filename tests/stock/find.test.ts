import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findWire } from '../../src/stock/find.ts';
import { allStrands, bundleFactor } from '../../src/stock/litz.ts';
import { COVERING_WORDS } from '../../src/stock/names.ts';
import { allWires } from '../../src/stock/wires.ts';

const wires = allWires();
const found = (text: string): string => {
  const answer = findWire(text);
  return answer.ok ? answer.wire.name : `refused: ${answer.todo}`;
};

describe('findWire', () => {
  it('finds every wire in stock by its own name, and as the same wire', () => {
    console.log(`names that come back: ${wires.length}`);
    expect(wires.length).toBeGreaterThan(0);
    for (const wire of wires) expect(findWire(wire.name)).toEqual({ ok: true, wire, coveringAssumed: false });
  });

  it('does not mind case, blanks, the order of gauge and number, or zeros behind the point', () => {
    const blanks = fc.constantFrom(' ', '  ', '\t');
    fc.assert(
      fc.property(fc.constantFrom(...wires), blanks, fc.boolean(), fc.boolean(), (wire, blank, upper, close) => {
        const [number, unit, ...covering] = wire.name.split(' ');
        const size = close ? `${number}${unit}` : `${number}${blank}${unit}`;
        const turned = unit === 'mm' ? `${Number(number).toFixed(4)}${blank}mm` : `${unit}${blank}${number}`;
        for (const written of [size, turned]) {
          const text = ` ${[written, ...covering].join(blank)} `;
          expect(found(upper ? text.toUpperCase() : text)).toBe(wire.name);
        }
      }),
      { seed: 2201, numRuns: 300 },
    );
  });

  it('knows the synonyms of the trade', () => {
    let cases = 0;
    for (const [words, covering] of COVERING_WORDS) {
      expect(found(`24 AWG ${words}`)).toBe(`24 AWG ${covering}`);
      cases++;
    }
    console.log(`synonyms: ${cases}`);
    expect(cases).toBeGreaterThan(20);
    expect(found('22 awg DCC')).toBe('22 AWG double cotton');
    expect(found('0.5mm grade 2')).toBe('0.5 mm enamel heavy');
  });

  it('takes enamel, or single silk on litz, when no covering is written, and says so', () => {
    expect(findWire('20 SWG')).toMatchObject({ ok: true, coveringAssumed: true, wire: { name: '20 SWG enamel' } });
    expect(findWire('20x0.1 mm litz')).toMatchObject({
      ok: true,
      coveringAssumed: true,
      wire: { name: '20 x 0.1 mm litz single silk' },
    });
    expect(findWire('20 SWG enamel')).toMatchObject({ coveringAssumed: false });
  });

  const refusals: readonly (readonly [text: string, todo: RegExp])[] = [
    ['#24', /^write `24 AWG enamel` or `24 SWG enamel`$/],
    ['24', /^write `24 AWG enamel` or `24 SWG enamel`$/],
    ['24 gauge dcc', /^write `24 AWG double cotton` or `24 SWG double cotton`$/],
    ['0.55 mm', /^take `0\.5 mm enamel` or `0\.56 mm enamel`$/],
    ['0.55 mm double cotton', /^take `0\.5 mm double cotton` or `0\.56 mm double cotton`$/],
    ['9 mm bare', /^take `2 mm bare`$/],
    ['0 mm', /^take `0\.071 mm enamel`$/],
    ['24.5 AWG', /^take `24 AWG enamel` or `25 AWG enamel`$/],
    ['12 AWG enamel', /^take `14 AWG enamel`; 12 AWG is in stock as bare, enamel heavy$/],
    ['16 AWG single silk', /^take `20 AWG single silk`; 16 AWG is in stock as bare, enamel/],
    ['24 AWG enamal', /`24 AWG enamel`/],
    ['24 AWG silk', /`24 AWG single silk`/],
    ['24 AWF enamel', /`24 AWG enamel`/],
    ['0,5 mm enamel', /^write `0\.5 mm enamel`$/],
    ['0.02 in enamel', /^take `25 SWG enamel` or `24 AWG enamel`/],
    ['', /coilwright stock/],
    ['wire', /begin with the size/],
    ['-1 mm', /begin with the size/],
    ['0.1 mm litz', /number of strands/],
    ['20 x litz', /size of a strand/],
    ['20 x 0.11 mm litz', /`20 x 0\.1 mm litz single silk` or `20 x 0\.112 mm litz single silk`/],
    ['20 x 0.1 mm cotton', /`20 x 0\.1 mm litz single silk`/],
    ['20 x 0.1 mm litz double silc', /`20 x 0\.1 mm litz double silk`/],
    ['2 x 0.1 mm litz', /number of strands/],
    ['1000 x 0.2 mm litz', /fewer or thinner/],
  ];
  it.each(refusals)('refuses %j with what to do', (text, todo) => {
    const answer = findWire(text);
    expect(answer.ok).toBe(false);
    if (answer.ok) return;
    expect(answer.todo).toMatch(todo);
    expect(answer.got).toContain(text === '' ? 'nothing' : text);
    expect(answer.expected).not.toBe('');
  });

  it('names in its advice only what can be had', () => {
    let cases = 0;
    for (const [text] of refusals) {
      const answer = findWire(text);
      if (answer.ok) continue;
      for (const [, name] of answer.todo.matchAll(/`([^`]+)`/g)) {
        if (name!.startsWith('coilwright') || name === 'x') continue;
        cases++;
        expect(findWire(name!).ok, `${text}: ${name}`).toBe(true);
      }
    }
    console.log(`wires offered instead: ${cases}`);
    expect(cases).toBeGreaterThan(20);
  });

  it('answers any text, without throwing, and finds only what is in stock', () => {
    const word = fc.constantFrom(
      '24',
      '0.5',
      '1e9',
      '.',
      ',',
      'x',
      'AWG',
      'mm',
      'in',
      'litz',
      'enamel',
      'silk',
      '#',
      '"',
      '-',
      '½',
    );
    const sentence = fc.array(word, { maxLength: 7 }).map((words) => words.join(' '));
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.string({ unit: 'binary' }), sentence), (text) => {
        const answer = findWire(text);
        if (answer.ok) expect(answer.wire.strands > 1 || wires.includes(answer.wire)).toBe(true);
        else expect(answer.got.length).toBeLessThanOrEqual(62);
      }),
      { seed: 2202, numRuns: 2000 },
    );
  });
});

describe('litz', () => {
  it('has the bundle factors of the rule', () => {
    // common practice, from memory
    const rule = [
      [3, 1.25],
      [12, 1.25],
      [16, 1.26],
      [20, 1.27],
      [25, 1.28],
      [400, 1.28],
    ] as const;
    for (const [strands, factor] of rule) expect(bundleFactor(strands)).toBeCloseTo(factor, 12);
    expect(bundleFactor(18)).toBeCloseTo(1.265, 12);
  });

  it('works out a bundle by hand: 20 strands of 0.1 mm, 0.1125 over the enamel', () => {
    const answer = findWire('20 x 0.1 mm litz double silk');
    if (!answer.ok) throw new Error(answer.got);
    expect(answer.wire.bareMm).toBeCloseTo(1.27 * Math.sqrt(20) * 0.1125, 9);
    expect(answer.wire.overallMm - answer.wire.bareMm).toBeCloseTo(0.065, 9);
    expect(answer.wire).toMatchObject({ strands: 20, strandMm: 0.1, covering: 'litz double silk', solderable: true });
  });

  it('comes back by its own name from every strand, within limits and never denser than packed circles', () => {
    let cases = 0;
    for (const strand of allStrands()) {
      for (const strands of [3, 7, 19, 40]) {
        for (const serving of ['single', 'double']) {
          const name = `${strands} x ${strand.name} litz ${serving} silk`;
          const answer = findWire(name);
          if (!answer.ok) {
            expect(answer.todo, name).toContain('fewer or thinner');
            continue;
          }
          const { wire } = answer;
          cases++;
          expect(wire.name).toBe(name);
          expect(wire.bareLowMm).toBeLessThan(wire.bareMm);
          expect(wire.bareHighMm).toBeGreaterThan(wire.bareMm);
          expect(wire.overallLowMm).toBeLessThan(wire.overallMm);
          expect(wire.overallHighMm).toBeGreaterThan(wire.overallMm);
          expect(wire.overallMm).toBeGreaterThan(wire.bareMm);
          // circles in a circle fill at most pi / sqrt(12) of it
          const fill = (strands * strand.overallMm ** 2) / wire.bareMm ** 2;
          expect(fill, name).toBeLessThan(Math.PI / Math.sqrt(12));
        }
      }
    }
    console.log(`litz bundles: ${cases}`);
    expect(cases).toBeGreaterThan(200);
  });
});
