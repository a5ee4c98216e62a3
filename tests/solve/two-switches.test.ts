import { describe, expect, it } from 'vitest';
import { candidatesOf } from '../../src/solve/candidates.ts';
import { designOf } from '../../src/solve/design.ts';
import { degreesBetween } from '../../src/solve/place-taps.ts';
import { demandFor, hopefulOf } from '../../src/solve/search.ts';
import { hasDiameterRange } from '../../src/solve/settle.ts';
import { tapMethodsFor } from '../../src/solve/tap-methods.ts';
import { placeBothSwitches } from '../../src/solve/two-switches.ts';
import { FOUR_WIRES, jobOf, wireOf } from '../helpers/jobs.ts';

const METHODS = FOUR_WIRES.flatMap((name) => {
  const wire = wireOf(name);
  return [...tapMethodsFor(wire, wire.overallMm * 1.02, true), ...tapMethodsFor(wire, wire.overallMm * 2.5, false)];
});

describe('taps of two switches', () => {
  it('stand at their whole turns or in the nearest line beside them that is free', () => {
    let placed = 0;
    let refused = 0;
    for (const method of METHODS)
      for (const layout of ['in line', 'staggered'] as const)
        for (const units of [2, 3, 5, 8, 10, 12, 20])
          for (const tens of [2, 6, 24]) {
            const turns = units * tens;
            const both = placeBothSwitches(units, tens, { layout, method, turns, firstNotAbove: false });
            if ('noPlaceFor' in both) {
              refused++;
              continue;
            }
            const { unitTaps, taps } = both;
            expect([unitTaps.length, taps.length]).toEqual([units - 1, tens - 1]);
            const all = [0, ...unitTaps, ...taps];
            all.forEach((turn, i) => {
              placed++;
              if (i > 0) expect(turn).toBeGreaterThan(all[i - 1]!);
              const whole = i < units ? i : (i - units + 1) * units;
              expect(Math.abs(turn - whole)).toBeLessThanOrEqual(0.25 + 1e-9);
              if (i >= units && layout === 'in line') expect(turn).toBe(whole);
              const lines = (Math.abs(turn - whole) * 360) / method.degreesApart;
              expect(Math.abs(lines - Math.round(lines))).toBeLessThan(1e-9);
              for (const other of all.slice(0, i))
                expect(
                  turn - other >= method.turnsApart - 1e-9 || degreesBetween(turn, other) >= method.degreesApart - 1e-6,
                ).toBe(true);
            });
          }
    console.log(`two switches: ${placed} taps placed, ${refused} coils refused`);
    expect(placed).toBeGreaterThan(5000);
    expect(refused).toBeGreaterThan(0);
  });
});

describe('the turns of two switches', () => {
  it('are met by the diameter, one a wire and a pitch, and by every design exactly', () => {
    let designs = 0;
    let worst = 0;
    for (const [uh, units, taps] of [
      [900, 10, 12],
      [240, 10, 7],
      [120, 5, 8],
      [60, 4, 8],
    ] as const) {
      const job = jobOf({
        want: { inductance: `2 uH to ${uh} uH`, taps },
        former: { 'outside-diameter': '40 mm to 95 mm' },
        winding: { units },
      });
      expect(hasDiameterRange(job)).toBe(true);
      const demand = demandFor(job);
      const candidates = candidatesOf(job);
      const keys = candidates.map(({ wire, pitch }) => `${wire.name} ${pitch.kind} ${pitch.mm}`);
      expect(new Set(keys).size).toBe(keys.length);
      for (const { candidate } of hopefulOf(job, demand, candidates).slice(0, 40)) {
        const outcome = designOf(job, demand, candidate);
        if (!outcome.ok) continue;
        designs++;
        const { coil, unitTaps } = outcome.design;
        expect([coil.turns, unitTaps.length]).toEqual([units * taps, units - 1]);
        worst = Math.max(worst, Math.abs(coil.inductanceUh(coil.turns) / uh - 1));
      }
    }
    console.log(`two switches: ${designs} designs, the whole coil worst ${(worst * 100).toFixed(3)} % off`);
    expect(designs).toBeGreaterThan(60);
    // A printed former whose diameter may be chosen is held to 0.1 %.
    expect(worst).toBeLessThanOrEqual(1e-3);
  });
});
