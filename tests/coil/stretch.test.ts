/** Turns in use that begin within the winding: by symmetry the same as those of the coil seen from its other end. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Coil } from '../../src/coil/coil.ts';
import { RESTS, WorkingCoil } from '../../src/coil/working-coil.ts';
import { wireOf } from '../helpers/jobs.ts';

const shapes = fc.record({
  turns: fc.integer({ min: 6, max: 24 }),
  pitchMm: fc.double({ min: 0.6, max: 2, noNaN: true }),
  meanDiameterMm: fc.double({ min: 20, max: 90, noNaN: true }),
  kHz: fc.double({ min: 200, max: 3000, noNaN: true }),
  share: fc.double({ min: 0.1, max: 0.8, noNaN: true }),
  pf: fc.double({ min: 20, max: 500, noNaN: true }),
  rest: fc.constantFrom(...RESTS),
});

const around = (earthed: 'start' | 'finish') => ({ leadPf: 0, earthed, celsius: 20 });

describe('the turns from a unit tap to the finish', () => {
  it('are those of the coil turned round, at any switch', () => {
    let runs = 0;
    let worst = 0;
    fc.assert(
      fc.property(shapes, ({ turns, pitchMm, meanDiameterMm, kHz, share, pf, rest }) => {
        const shape = { wire: wireOf('0.5 mm enamel'), meanDiameterMm, pitchMm, turns, gaps: [], startMm: 10 };
        const from = Math.max(1, Math.round(share * turns));
        const coil = new Coil(shape);
        const two = new WorkingCoil(coil, [turns], around('start'), [from]);
        const turned = new WorkingCoil(coil, [turns - from, turns], around('finish'));
        const [a, b] = [two.terminal(turns, kHz, rest, from), turned.terminal(turns - from, kHz, rest)];
        const [c, d] = [two.tuned(turns, pf, rest, 1, from), turned.tuned(turns - from, pf, rest)];
        const pairs = [
          [two.inductanceUh(from, turns), turned.inductanceUh(0, turns - from)],
          [a.inductanceUh, b.inductanceUh],
          [a.resistanceOhm, b.resistanceOhm],
          [c.kHz, d.kHz],
          [two.crowding(turns, kHz, from), turned.crowding(turns - from, kHz)],
        ] as const;
        for (const [one, other] of pairs) {
          worst = Math.max(worst, Math.abs(one / other - 1));
          // The iteration ends at 1e-7, and nodes lie at other turns on the way from the other end.
          expect(Math.abs(one / other - 1)).toBeLessThan(1e-6);
        }
        runs++;
      }),
      { seed: 41, numRuns: 60 },
    );
    console.log(`turns in use from within: ${runs} coils, worst ${worst.toExponential(1)}`);
    expect(runs).toBe(60);
  });

  it('lose to a second lead at the start, and to dead turns at both ends', () => {
    const shape = { wire: wireOf('0.5 mm enamel'), meanDiameterMm: 60, pitchMm: 0.8, turns: 40, gaps: [], startMm: 10 };
    const coil = (leadPf: number) =>
      new WorkingCoil(new Coil(shape), [20, 40], { ...around('start'), leadPf }, [1, 2, 3, 4, 5]);
    const open = coil(0);
    const at = (rest: (typeof RESTS)[number], one = open) => one.tuned(20, 60, rest, 1, 5).kHz;
    expect(at('open', coil(5))).toBeLessThan(at('open'));
    // Dead turns that hang on pull the resonance down, shorted ones take inductance away and push it up.
    expect(at('open')).toBeLessThan(at('disconnected'));
    expect(at('shorted')).toBeGreaterThan(at('disconnected'));
    const [whole, sections] = (['shorted', 'shorted in sections'] as const).map((rest) =>
      open.terminal(20, 800, rest, 5),
    );
    const free = open.terminal(20, 800, 'open', 5);
    expect(whole!.inductanceUh).toBeLessThan(free.inductanceUh);
    expect(sections!.inductanceUh).toBeLessThan(free.inductanceUh);
    expect(sections!.inductanceUh).not.toBeCloseTo(whole!.inductanceUh, 6);
  });
});
