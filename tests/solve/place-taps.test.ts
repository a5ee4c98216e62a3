import { describe, expect, it } from 'vitest';
import { Coil } from '../../src/coil/coil.ts';
import { placeTaps, STAGGER_STEPS } from '../../src/solve/place-taps.ts';
import { type TapLayout, type TapMethod, tapMethodsFor } from '../../src/solve/tap-methods.ts';
import { stream, wireOf } from '../helpers/jobs.ts';

const WIRES = ['0.5 mm enamel', '22 AWG double cotton', '1 mm enamel', '20 x 0.1 mm litz single silk'].map(wireOf);

const apart = (a: number, b: number) => {
  const degrees = ((((a - b) * 360) % 360) + 360) % 360;
  return Math.min(degrees, 360 - degrees);
};

/** Two taps stand so many turns apart, or else so many degrees (common practice for each method). */
function interfere(a: number, b: number, method: TapMethod): boolean {
  return Math.abs(a - b) < method.turnsApart - 1e-6 && apart(a, b) < method.degreesApart - 1e-6;
}

/** The start hole within the first turn, and the finish with its row of spare holes where the tap has holes too. */
function nearEnd(turn: number, turns: number, method: TapMethod): boolean {
  if (turn < 1 && apart(turn, 0) < method.degreesApart - 1e-6) return true;
  const [row, degrees] =
    method.holes > 0 ? [3 + method.turnsApart, method.degreesApart + 15] : [method.turnsApart, method.degreesApart];
  return turns - turn < row - 1e-6 && apart(turn, turns) < degrees - 1e-6;
}

interface Case {
  readonly coil: Coil;
  readonly method: TapMethod;
  readonly layout: TapLayout;
  readonly targets: readonly number[];
}

function cases(count: number): Case[] {
  const random = stream(41);
  return Array.from({ length: count }, () => {
    const wire = WIRES[Math.floor(random() * WIRES.length)]!;
    const close = random() < 0.5;
    const pitchMm = wire.overallMm * (close ? 1.02 : 1.5 + random());
    const methods = tapMethodsFor(wire, pitchMm, close);
    const method = methods[Math.floor(random() * methods.length)]!;
    const layout = random() < 0.5 ? 'in line' : 'staggered';
    const whole = 8 + Math.floor(random() * 60);
    const turns = layout === 'in line' ? whole : whole + Math.floor(random() * 360) / 360;
    const coil = new Coil({ wire, meanDiameterMm: 30 + random() * 60, pitchMm, turns, gaps: [], startMm: 10 });
    const high = coil.inductanceUh(turns);
    const low = coil.inductanceUh(1.2 + random() * turns * 0.3);
    const taps = 2 + Math.floor(random() * 8);
    const targets = Array.from({ length: taps }, (_, i) => low * (high / low) ** (i / taps));
    return { coil, method, layout, targets };
  });
}

const ALL = cases(250);

describe('places of taps', () => {
  it('are the nearest that clear the taps below, the start and the finish: by trying every place', () => {
    let placed = 0;
    let moved = 0;
    let refused = 0;
    for (const { coil, method, layout, targets } of ALL) {
      const result = placeTaps(coil, targets, { layout, method, turns: coil.turns, firstNotAbove: false });
      const steps = layout === 'in line' ? 1 : STAGGER_STEPS;
      const count = Math.ceil(coil.turns * steps) - 1;
      const grid = Array.from({ length: count }, (_, i) => (i + 1) / steps).filter((turn) => turn >= 0.5);
      const at = new Map(grid.map((turn) => [turn, coil.inductanceUh(turn)]));
      const chosen: number[] = [];
      const stop = 'noPlaceFor' in result ? result.noPlaceFor - 1 : targets.length;
      for (let i = 0; i < stop + 1 && i < targets.length; i++) {
        const off = (turn: number) => Math.abs((at.get(turn) ?? coil.inductanceUh(turn)) - targets[i]!);
        const admissible = (turn: number) =>
          turn > (chosen[i - 1] ?? 0) &&
          !nearEnd(turn, coil.turns, method) &&
          chosen.every((other) => !interfere(turn, other, method));
        const nearest = grid.reduce((a, b) => (off(b) < off(a) ? b : a));
        const reach = layout === 'in line' ? 0 : 0.25;
        if (i === stop) {
          // Refused: nothing within reach of the best place was free.
          const free = grid.filter((turn) => Math.abs(turn - nearest) <= reach - 0.02 && admissible(turn));
          expect(free).toEqual([]);
          refused++;
          continue;
        }
        const turn = 'turns' in result ? result.turns[i]! : replay(coil, targets, i, layout, method);
        expect(admissible(turn)).toBe(true);
        const best = grid.filter(admissible).reduce((a, b) => (off(b) < off(a) ? b : a));
        expect(turn).toBeCloseTo(best, 9);
        if (!admissible(nearest)) moved++;
        chosen.push(turn);
        placed++;
      }
    }
    console.log(
      `places: ${ALL.length} windings, ${placed} taps placed, ${moved} of them moved aside, ${refused} refused`,
    );
    expect(Math.min(placed, moved, refused)).toBeGreaterThan(0);
  });

  it('stay below the target for the first tap of a band', () => {
    let count = 0;
    for (const { coil, method, layout, targets } of ALL) {
      const result = placeTaps(coil, targets, { layout, method, turns: coil.turns, firstNotAbove: true });
      if ('noPlaceFor' in result) continue;
      const first = coil.inductanceUh(result.turns[0]!);
      expect(first).toBeLessThanOrEqual(targets[0]! * (1 + 1e-9));
      count++;
    }
    console.log(`first tap not above: ${count} windings`);
    expect(count).toBeGreaterThan(0);
  });

  it('keep clear of the start hole, downwards where the first tap may not lie above', () => {
    const wire = WIRES[0]!;
    const coil = new Coil({ wire, meanDiameterMm: 60, pitchMm: 0.57, turns: 30, gaps: [], startMm: 10 });
    const method = tapMethodsFor(wire, 0.57, true).find(({ name }) => name === 'twisted loop')!;
    const placing = { layout: 'staggered', method, turns: 30 } as const;
    const target = coil.inductanceUh(0.985);
    // A whole turn is above the start, not beside it; 15 degrees before it is the next place down.
    expect(placeTaps(coil, [target], { ...placing, firstNotAbove: false })).toEqual({ turns: [1] });
    expect(placeTaps(coil, [target], { ...placing, firstNotAbove: true })).toEqual({ turns: [69 * (1 / 72)] });
  });

  it('refuse a tap that asks for more than the whole coil', () => {
    const { coil, method, layout } = ALL[0]!;
    const whole = coil.inductanceUh(coil.turns);
    const placing = { layout, method, turns: coil.turns, firstNotAbove: true };
    expect(placeTaps(coil, [whole * 3], placing)).toEqual({ noPlaceFor: 1, beyond: true });
  });
});

/** The taps below one that was refused: placed alone they must come out the same. */
function replay(coil: Coil, targets: readonly number[], index: number, layout: TapLayout, method: TapMethod): number {
  const result = placeTaps(coil, targets.slice(0, index + 1), {
    layout,
    method,
    turns: coil.turns,
    firstNotAbove: false,
  });
  if ('noPlaceFor' in result) throw new Error('a tap below the refused one finds no place');
  return result.turns[index]!;
}

describe('tap methods', () => {
  it('keep a twisted loop 15 degrees or three turns from its neighbours (common practice)', () => {
    const loop = tapMethodsFor(wireOf('0.5 mm enamel'), 0.6, true).find(({ name }) => name === 'twisted loop')!;
    expect([loop.turnsApart, loop.degreesApart]).toEqual([3, 15]);
    expect(loop.gapMm).toBeCloseTo(wireOf('0.5 mm enamel').overallMm / 2, 9);
  });

  it('cut litz, twist thin wire, lift thick wire, and draw in where there is land', () => {
    const first = (name: string, times: number, close: boolean) => {
      const wire = wireOf(name);
      return tapMethodsFor(wire, wire.overallMm * times, close)[0]!.name;
    };
    expect(first('20 x 0.1 mm litz single silk', 1, true)).toBe('cut pair');
    expect(first('0.5 mm enamel', 1.02, true)).toBe('twisted loop');
    expect(first('1 mm enamel', 1.02, true)).toBe('lifted turn');
    expect(first('0.5 mm enamel', 3, false)).toBe('drawn in');
    // Litz that is cut is never twisted or lifted.
    const names = tapMethodsFor(wireOf('20 x 0.1 mm litz single silk'), 1, true).map(({ name }) => name);
    expect(names).not.toContain('twisted loop');
    expect(names).not.toContain('lifted turn');
  });
});
