import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { axialAt } from '../../src/coil/layout.ts';
import type { Design } from '../../src/solve/design.ts';
import { search } from '../../src/solve/search.ts';
import { change, FOUR_WIRES, jobOf, type Parts, TUBE } from '../helpers/jobs.ts';

const WIRES = [
  ...FOUR_WIRES,
  '22 SWG enamel heavy',
  '1 mm enamel',
  '18 AWG bare',
  '28 AWG single silk',
  '0.315 mm enamel',
];

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** Ranges on printed formers of all sorts; some of them cannot be met. */
const printed = fc
  .record({
    high: between(0.8, 2.7),
    ratio: between(1.5, 15),
    taps: fc.integer({ min: 2, max: 12 }),
    spacing: fc.constantFrom('even ratio', 'even turns', 'even frequency'),
    diameter: fc.integer({ min: 25, max: 100 }),
    isRange: fc.boolean(),
    longest: fc.integer({ min: 60, max: 240 }),
    flanges: fc.boolean(),
    mounting: fc.constantFrom('ears', 'none'),
    wire: fc.constantFrom(...WIRES),
    hand: fc.constantFrom('right', 'left'),
    pitch: fc.constantFrom('any', 'close', 'spaced'),
    method: fc.constantFrom('auto', 'twisted loop', 'lifted turn', 'cut pair', 'lug', 'drawn in'),
    layout: fc.constantFrom('auto', 'in line', 'staggered'),
    trim: fc.boolean(),
    prefer: fc.constantFrom('least loss', 'compact', 'least wire', 'closest taps'),
  })
  .map((one): Parts => {
    const high = 10 ** one.high;
    return {
      want: {
        inductance: `${(high / one.ratio).toPrecision(4)} uH to ${high.toPrecision(4)} uH`,
        taps: one.taps,
        spacing: one.spacing,
      },
      former: {
        'outside-diameter': one.isRange ? `${one.diameter} mm to ${one.diameter + 6} mm` : `${one.diameter} mm`,
        longest: `${one.longest} mm`,
        flanges: one.flanges,
        mounting: one.mounting,
      },
      wire: [one.wire],
      winding: {
        hand: one.hand,
        pitch: one.pitch,
        'tap-method': one.method,
        'tap-layout': one.layout,
        'finish-trim': one.trim,
      },
      prefer: one.prefer,
    };
  });

/** Thick wire on thin formers, with holes at every tap: where holes would run into one another. */
const thin = printed.map(
  (one): Parts => ({
    ...one,
    want: { ...one.want, inductance: '0.4 uH to 3 uH' },
    former: { ...one.former, 'outside-diameter': '17 mm', longest: '120 mm' },
    wire: ['1 mm enamel'],
    winding: { ...one.winding, pitch: 'spaced', 'tap-method': 'drawn in', 'tap-layout': 'staggered' },
  }),
);

/** So few turns that a degree of the finish or a tap beside it is felt. */
const FEW_TURNS: readonly Parts[] = (
  [
    ['0.8783 uH to 3.406 uH', 5, '99 mm', '22 AWG double cotton', 'lug', 'close'],
    ['0.2730 uH to 3.683 uH', 9, '66.7 mm', '28 AWG single silk', 'twisted loop', 'close'],
    ['0.4346 uH to 7.110 uH', 8, '101.3 mm', '28 AWG single silk', 'auto', 'close'],
    ['2.940 uH to 5.317 uH', 4, '68.1 mm', '0.2 mm enamel', 'lug', 'any'],
    ['3.030 uH to 8.134 uH', 10, '64 mm', '0.5 mm enamel', 'lug', 'close'],
  ] as const
).map(([inductance, taps, diameter, wire, method, pitch]) => ({
  want: { inductance, taps },
  former: { 'outside-diameter': diameter, longest: '240 mm' },
  wire: [wire],
  winding: { pitch, 'tap-method': method, 'tap-layout': 'staggered', hand: 'left' },
}));

/** Where the taps leave the finish no place at which the whole coil would be right: such a coil is not taken. */
const BESIDE_FINISH: readonly Parts[] = [
  {
    want: { inductance: '1.856 uH to 8.918 uH', taps: 8 },
    former: { 'outside-diameter': '94 mm to 102 mm', longest: '55 mm', mounting: 'none' },
    wire: ['22 AWG double cotton'],
    winding: { hand: 'left', 'tap-method': 'lug', 'tap-layout': 'staggered', 'finish-trim': false },
    prefer: 'closest taps',
  },
  {
    want: { inductance: '0.7861 uH to 12.66 uH', taps: 7 },
    former: { 'outside-diameter': '79 mm to 87 mm', longest: '157 mm', flanges: false, mounting: 'none' },
    wire: ['0.5 mm enamel'],
    winding: { pitch: 'close', 'tap-method': 'lug' },
    prefer: 'closest taps',
  },
];

function designsOf(parts: Parts): readonly Design[] {
  const found = search(jobOf(parts));
  return 'chosen' in found ? [found.chosen, ...found.others] : [];
}

/** Least material between two round holes, measured round the outside, mm. */
function narrowest({ holes, former }: Design): number {
  let least = Number.POSITIVE_INFINITY;
  holes.forEach((a, i) => {
    for (const b of holes.slice(i + 1)) {
      const turn = Math.abs(a.angleDeg - b.angleDeg) % 360;
      const arc = (Math.min(turn, 360 - turn) / 360) * Math.PI * former.outsideDiameterMm;
      least = Math.min(least, Math.hypot(arc, a.axialMm - b.axialMm) - (a.diameterMm + b.diameterMm) / 2);
    }
  });
  return least;
}

const apart = (a: number, b: number) => {
  const degrees = ((((a - b) * 360) % 360) + 360) % 360;
  return Math.min(degrees, 360 - degrees);
};

describe('designs on a printed former', () => {
  const designs: { parts: Parts; design: Design }[] = [];
  let refused = 0;
  const thins = fc.sample(thin, { numRuns: 30, seed: 17 });
  for (const parts of [...fc.sample(printed, { numRuns: 150, seed: 76 }), ...thins, ...FEW_TURNS, ...BESIDE_FINISH]) {
    const found = designsOf(parts);
    if (found.length === 0) refused++;
    for (const design of found) designs.push({ parts, design });
  }
  const many = (of: (design: Design) => string) => [...new Set(designs.map(({ design }) => of(design)))].sort();

  it('are many and of every kind', () => {
    console.log(
      `designs: ${designs.length} from 187 jobs (${refused} of them refused); ${many((d) => d.method.name).join(', ')}; ${many((d) => d.layout).join(', ')}; ${many((d) => d.candidate.pitch.kind).join(', ')}`,
    );
    expect(designs.length).toBeGreaterThan(300);
    expect(many((d) => d.method.name)).toEqual(['cut pair', 'drawn in', 'lifted turn', 'lug', 'twisted loop']);
    expect(many((d) => d.layout)).toEqual(['in line', 'staggered']);
    expect(many((d) => d.candidate.pitch.kind)).toEqual(['close', 'groove']);
  });

  it('meet the inductance of the whole coil to 0.1 %', () => {
    let worst = 0;
    for (const { design } of designs) {
      const off = Math.abs(design.taps.at(-1)!.deviation);
      expect(off).toBeLessThanOrEqual(1e-3);
      worst = Math.max(worst, off);
    }
    console.log(`whole coil: worst ${(worst * 100).toFixed(3)} %`);
  });

  it('are found for few turns too', () => {
    for (const parts of FEW_TURNS) expect(designs.some((one) => one.parts === parts)).toBe(true);
  });

  it('stay within the job and hold everything that is on them', () => {
    for (const { parts, design } of designs) {
      const { former, coil, holes } = design;
      const longest = Number.parseFloat(String(parts.former!.longest));
      expect(former.lengthMm).toBeLessThanOrEqual(longest);
      expect(former.boreDiameterMm).toBeGreaterThan(0);
      const span = String(parts.former!['outside-diameter'])
        .match(/[\d.]+/g)!
        .map(Number);
      expect(former.outsideDiameterMm).toBeGreaterThanOrEqual(span[0]!);
      expect(former.outsideDiameterMm).toBeLessThanOrEqual(span.at(-1)!);
      const half = coil.shape.wire.overallMm / 2;
      expect(coil.positionMm(0) - half).toBeGreaterThan(former.footMm);
      expect(coil.positionMm(coil.turns) + half).toBeLessThan(former.lengthMm - former.topMm);
      for (const hole of holes) {
        expect(hole.axialMm - hole.diameterMm / 2).toBeGreaterThan(former.footMm);
        expect(hole.axialMm + hole.diameterMm / 2).toBeLessThan(former.lengthMm - former.topMm);
        expect(hole.angleDeg).toBeGreaterThanOrEqual(0);
        expect(hole.angleDeg).toBeLessThan(360);
      }
      const tops = holes.map((hole) => hole.axialMm + hole.diameterMm / 2);
      expect(former.lengthMm).toBeGreaterThan(Math.max(...tops, coil.positionMm(coil.turns) + half));
    }
  });

  it('leave 0.8 mm at least between any two holes', () => {
    let least = Number.POSITIVE_INFINITY;
    for (const { design } of designs) least = Math.min(least, narrowest(design));
    console.log(`holes: ${least.toFixed(3)} mm between the nearest two of ${designs.length} designs`);
    expect(least).toBeGreaterThanOrEqual(0.8 - 1e-6);
    expect(least).toBeLessThan(100);
  });

  it('keep taps apart as their method asks, in ascending order, with some coil below the first (common practice)', () => {
    for (const { design } of designs) {
      const { method, layout } = design;
      const turns = design.taps.map((tap) => tap.turn);
      const tapped = turns.slice(0, -1);
      expect(turns[0]!).toBeGreaterThan(0);
      expect(turns.at(-1)).toBe(design.coil.turns);
      for (let i = 1; i < turns.length; i++) expect(turns[i]!).toBeGreaterThan(turns[i - 1]!);
      tapped.forEach((turn, i) => {
        if (layout === 'in line') expect(turn).toBe(Math.round(turn));
        // Staggered taps stand on a circle of 5 degree steps.
        else expect(Math.abs(turn * 72 - Math.round(turn * 72))).toBeLessThan(1e-6);
        for (const other of tapped.slice(0, i)) {
          const clear =
            Math.abs(turn - other) > method.turnsApart - 1e-6 || apart(turn, other) > method.degreesApart - 1e-6;
          expect(clear).toBe(true);
        }
      });
      const tops = design.taps.map((tap) => tap.inductanceUh);
      for (let i = 1; i < tops.length; i++) expect(tops[i]!).toBeGreaterThan(tops[i - 1]!);
    }
  });

  it('put every hole where the wire passes', () => {
    let count = 0;
    for (const { design } of designs)
      for (const hole of design.holes)
        if (hole.turn !== null) {
          const { places, turns, shape } = design.coil;
          expect(hole.axialMm).toBeCloseTo(axialAt(places, turns, shape.pitchMm, hole.turn), 9);
          count++;
        }
    console.log(`holes: ${count} on the wire`);
    expect(count).toBeGreaterThan(0);
  });

  it('set each tap on the nearest place that is free, in line within half a turn of the ideal one', () => {
    let count = 0;
    for (const { design } of designs.filter(({ design: { layout } }) => layout === 'in line')) {
      const { coil } = design;
      for (const { turn, targetUh } of design.taps.slice(0, -1)) {
        for (const other of [turn - 1, turn + 1]) {
          if (other < 1 || other > coil.turns) continue;
          const off = Math.abs(coil.inductanceUh(turn) - targetUh);
          // A tap that moves takes its gap along: between two places that are equally good either may be settled on.
          expect(off).toBeLessThan(Math.abs(coil.inductanceUh(other) - targetUh) + 0.02 * targetUh);
          count++;
        }
      }
    }
    console.log(`taps in line: ${count} neighbouring places are no nearer`);
    expect(count).toBeGreaterThan(0);
  });
});

describe('designs on a bought tube', () => {
  it('have whole turns in one line and say how far each tap is off', () => {
    let count = 0;
    for (const longest of ['4 in', '6 in', '10 in'])
      for (const prefer of ['least loss', 'compact', 'closest taps']) {
        const parts = { ...change(TUBE, 'former', { longest }), winding: { 'tap-layout': 'in line' }, prefer };
        for (const design of designsOf(parts).filter(({ layout }) => layout === 'in line')) {
          expect(design.former.outsideDiameterMm).toBeCloseTo(76.2, 9);
          expect(design.coil.shape.pitchMm).toBe(design.candidate.pitch.mm);
          for (const tap of design.taps) {
            expect(Number.isInteger(tap.turn)).toBe(true);
            expect(tap.inductanceUh).toBe(design.coil.inductanceUh(tap.turn));
            expect(tap.deviation).toBeCloseTo(tap.inductanceUh / tap.targetUh - 1, 12);
            count++;
          }
          // Nothing is free: it would be luck to meet the inductance to 0.001 %.
          expect(Math.abs(design.taps.at(-1)!.deviation)).toBeGreaterThan(1e-5);
          expect(design.metrics.worstTap).toBe(Math.max(...design.taps.map((tap) => Math.abs(tap.deviation))));
        }
      }
    console.log(`tube: ${count} taps on whole turns`);
    expect(count).toBeGreaterThan(0);
  });
});

describe('changed wishes', () => {
  const wound = (high: number) => {
    const found = search(
      jobOf({
        want: { inductance: `10 uH to ${high} uH`, taps: 5 },
        former: { 'outside-diameter': '60 mm', longest: '240 mm' },
        wire: ['0.5 mm enamel'],
        winding: { pitch: 'close', 'tap-method': 'twisted loop', 'tap-layout': 'staggered' },
      }),
    );
    if (!('chosen' in found)) throw new Error(`no coil of ${high} uH`);
    return found.chosen.coil;
  };

  it('never shorten the winding when more inductance is asked for', () => {
    let before = 0;
    let turns = 0;
    let count = 0;
    for (let high = 60; high < 400; high *= 1.07) {
      const coil = wound(high);
      expect(coil.woundMm(coil.turns)).toBeGreaterThan(before);
      expect(coil.turns).toBeGreaterThan(turns);
      before = coil.woundMm(coil.turns);
      turns = coil.turns;
      count++;
    }
    console.log(`more inductance: ${count} windings, each longer`);
    expect(count).toBeGreaterThan(0);
  });

  it('come nearer, or no farther, when taps may be staggered', () => {
    let count = 0;
    for (const parts of fc.sample(printed, { numRuns: 20, seed: 9 })) {
      const tube: Parts = {
        ...parts,
        former: {
          kind: 'tube',
          'outside-diameter': String(parts.former!['outside-diameter']).slice(0, 5),
          longest: '240 mm',
        },
        winding: { 'tap-method': 'twisted loop' },
        prefer: 'closest taps',
      };
      const worst = (layout: string) => {
        const found = search(jobOf(change(tube, 'winding', { 'tap-layout': layout })));
        return 'chosen' in found ? found.chosen.metrics.worstTap : null;
      };
      const line = worst('in line');
      const staggered = worst('staggered');
      if (line === null) continue;
      expect(staggered).not.toBeNull();
      expect(staggered!).toBeLessThanOrEqual(line);
      count++;
    }
    console.log(`staggered against in line: ${count} jobs`);
    expect(count).toBeGreaterThan(0);
  });
});
