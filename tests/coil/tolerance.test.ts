import { describe, expect, it } from 'vitest';
import { Coil, type CoilShape } from '../../src/coil/coil.ts';
import { limitsOf, type Spread } from '../../src/coil/tolerance.ts';
import { stream, wireOf } from '../helpers/jobs.ts';

const TAPS = [6, 13, 22, 40];
const SHAPE: CoilShape = {
  wire: wireOf('0.5 mm enamel'),
  meanDiameterMm: 60.5,
  pitchMm: 0.57,
  turns: 40,
  gaps: TAPS.slice(0, -1).map((turn) => ({ turn, gapMm: 0.28 })),
  startMm: 10,
};
const SPREAD: Spread = { diameterMm: 0.3, pitch: 0.02, bareMm: 0.004, gap: 0.5, turn: 3 / 360, leadUh: 0.025 };
const NONE: Spread = { diameterMm: 0, pitch: 0, bareMm: 0, gap: 0, turn: 0, leadUh: 0 };

/** Normal deviates of a fixed seed, by Box and Muller. */
function normals(seed: number): () => number {
  const uniform = stream(seed);
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

const COILS = 400;

/** Half widths that hold 95 % of coils made with this spread; half widths of the inputs are 1.96 deviations. */
function monteCarlo(gapsAlike: boolean): number[] {
  const normal = normals(1922);
  const drawn: number[][] = TAPS.map(() => []);
  for (let n = 0; n < COILS; n++) {
    const one = () => normal() / 1.96;
    const [diameter, pitch, bare, gap] = [one(), one(), one(), one()];
    const coil = new Coil({
      ...SHAPE,
      meanDiameterMm: SHAPE.meanDiameterMm + SPREAD.diameterMm * diameter,
      pitchMm: SHAPE.pitchMm * (1 + SPREAD.pitch * pitch),
      turns: 41,
      wire: { ...SHAPE.wire, bareMm: SHAPE.wire.bareMm + SPREAD.bareMm * bare },
      gaps: SHAPE.gaps.map((each) => ({
        ...each,
        gapMm: each.gapMm * (1 + SPREAD.gap * (gapsAlike ? gap : one())),
      })),
    });
    TAPS.forEach((turn, i) => {
      drawn[i]!.push(coil.inductanceUh(turn + SPREAD.turn * one()) + SPREAD.leadUh * one());
    });
  }
  return drawn.map((values) => {
    const mean = values.reduce((sum, value) => sum + value, 0) / COILS;
    return 1.96 * Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (COILS - 1));
  });
}

describe('limits of a finished coil', () => {
  const limits = limitsOf(new Coil(SHAPE), TAPS, SPREAD);

  it('agree with 400 coils of a fixed seed', () => {
    const widths = monteCarlo(true);
    const ratios = limits.map(({ lowUh, highUh }, i) => (highUh - lowUh) / 2 / widths[i]!);
    console.log(
      `tolerance: ${COILS} coils x ${TAPS.length} taps, limits over Monte Carlo ${ratios.map((r) => r.toFixed(3)).join(' ')}`,
    );
    expect(ratios.length).toBe(4);
    // The deviation of 400 draws is itself uncertain by 1/sqrt(800) = 3.5 %: three times that.
    for (const ratio of ratios) expect(Math.abs(ratio - 1)).toBeLessThan(0.11);
  });

  it('are rather too wide than too narrow when every tap makes a gap of its own', () => {
    const widths = monteCarlo(false);
    for (const [i, { lowUh, highUh }] of limits.entries())
      expect((highUh - lowUh) / 2).toBeGreaterThan(widths[i]! * 0.9);
  });

  it('lie on both sides of the value, wider for more spread of any kind', () => {
    const coil = new Coil(SHAPE);
    let cases = 0;
    for (const input of Object.keys(SPREAD) as (keyof Spread)[]) {
      const wider = limitsOf(coil, TAPS, { ...SPREAD, [input]: SPREAD[input] * 2 });
      const alone = limitsOf(coil, TAPS, { ...NONE, [input]: SPREAD[input] });
      TAPS.forEach((turn, i) => {
        const nominal = coil.inductanceUh(turn);
        expect(limits[i]!.lowUh).toBeLessThan(nominal);
        expect(limits[i]!.highUh).toBeGreaterThan(nominal);
        // Before the first tap no gap can matter.
        const matters = input !== 'gap' || i > 0;
        if (matters) {
          expect(wider[i]!.highUh - wider[i]!.lowUh).toBeGreaterThan(limits[i]!.highUh - limits[i]!.lowUh);
          expect(alone[i]!.dominant).toBe(input);
        }
        cases++;
      });
    }
    console.log(`tolerance: ${cases} widened limits`);
    expect(cases).toBeGreaterThan(0);
  });

  it('are as wide for one input alone as that input moves the coil', () => {
    const { wire, meanDiameterMm, pitchMm, gaps } = SHAPE;
    const moved: Record<keyof Spread, (side: number, turn: number) => number> = {
      diameterMm: (side, turn) =>
        new Coil({ ...SHAPE, meanDiameterMm: meanDiameterMm + side * SPREAD.diameterMm }).inductanceUh(turn),
      pitch: (side, turn) => new Coil({ ...SHAPE, pitchMm: pitchMm * (1 + side * SPREAD.pitch) }).inductanceUh(turn),
      bareMm: (side, turn) =>
        new Coil({ ...SHAPE, wire: { ...wire, bareMm: wire.bareMm + side * SPREAD.bareMm } }).inductanceUh(turn),
      gap: (side, turn) =>
        new Coil({
          ...SHAPE,
          gaps: gaps.map((gap) => ({ ...gap, gapMm: gap.gapMm * (1 + side * SPREAD.gap) })),
        }).inductanceUh(turn),
      turn: (side, turn) => new Coil({ ...SHAPE, turns: 41 }).inductanceUh(turn + side * SPREAD.turn),
      leadUh: (side, turn) => new Coil(SHAPE).inductanceUh(turn) + side * SPREAD.leadUh,
    };
    for (const [input, at] of Object.entries(moved) as [keyof Spread, (side: number, turn: number) => number][])
      for (const [i, { lowUh, highUh }] of limitsOf(new Coil(SHAPE), TAPS, {
        ...NONE,
        [input]: SPREAD[input],
      }).entries()) {
        const both = Math.abs(at(1, TAPS[i]!) - at(-1, TAPS[i]!));
        // One side stands for both: the response bends by a few percent over these widths, the gap's by more.
        expect(Math.abs(highUh - lowUh - both)).toBeLessThanOrEqual(0.08 * both + 1e-9);
      }
  });

  it('close on the value when nothing spreads', () => {
    for (const [i, { lowUh, highUh }] of limitsOf(new Coil(SHAPE), TAPS, NONE).entries()) {
      expect(lowUh).toBe(highUh);
      expect(lowUh).toBe(new Coil(SHAPE).inductanceUh(TAPS[i]!));
    }
  });
});
