import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { infer } from '../../src/match/infer.ts';
import type { OldCoil } from '../../src/match/types.ts';
import { EMPTY, named, reading } from './coils.ts';

/** Taps at 10, 20, 30, 40 of 50 turns of 1 mm, each pushing the next turn by 0.8 mm; of some nothing is known. */
const pushed = (lost: readonly number[]): OldCoil => {
  const placeMm = (turn: number) =>
    turn + 0.8 * ([10, 20, 30, 40].filter((tap) => tap < turn).length + (turn < 50 ? 0.5 : 0));
  return {
    ...EMPTY,
    diameters: [{ of: 'former', how: 'caliper', mm: reading(60, 0.1) }],
    wire: { ...EMPTY.wire, bareMm: reading(0.5, 0.01), overallMm: reading(0.56, 0.01) },
    pitchMm: reading(1, 0.01),
    tapGapMm: reading(0.8, 0.05),
    windingLengthMm: reading(placeMm(50) + 0.56, 0.1),
    taps: named(
      [10, 20, 30, 40, 50].map((turn, i) =>
        lost.includes(i)
          ? {}
          : { turns: reading(turn, 0), positionMm: turn === 50 ? null : reading(placeMm(turn), 0.1) },
      ),
    ),
  };
};

describe('taps of which nothing is known', () => {
  it('push the wire aside as the others do', () => {
    let coils = 0;
    for (const lost of [[], [1], [1, 2], [0, 3]]) {
      const found = infer(pushed(lost));
      // Were they left out, the pitch would come out greater by 0.8 mm over 50 turns for each.
      expect(found.pitchMm[0]!.value).toBeCloseTo(1, 3);
      expect(found.tapGapMm.value).toBeCloseTo(0.8, 2);
      expect(found.contradictions).toEqual([]);
      for (const i of lost) expect(found.taps[i]).toMatchObject({ by: 'proposed', turn: 10 * (i + 1) });
      coils++;
    }
    console.log(`coils with lost taps: ${coils}`);
    expect(coils).toBe(4);
  });

  it('have their turns from the section that ends there, where its length was measured', () => {
    const section = { turns: null, endsAtTap: null, pitchMm: reading(0.7, 0.007), lengthMm: null, gapAfterMm: null };
    const first = { ...section, endsAtTap: 2, gapAfterMm: reading(3, 0.1) };
    const old = {
      ...pushed([]),
      pitchMm: null,
      windingLengthMm: null,
      tapGapMm: reading(0, 0.02),
      taps: named([{ turns: reading(10, 0) }, {}, { turns: reading(30, 0) }, { turns: reading(50, 0) }]),
    };
    // 20 turns, 19 pitches and a wire.
    const lengthMm = reading(19 * 0.7 + 0.56, 0.2);
    const found = infer({ ...old, sections: [{ ...first, lengthMm }, section] });
    expect(found.taps[1]).toMatchObject({ by: 'inferred', turn: 20, determined: true });
    expect(found.sectionTurns).toEqual([20, 30]);
    let fault: unknown = null;
    try {
      infer({ ...old, sections: [first, section] });
    } catch (error) {
      fault = error;
    }
    expect(fault).toBeInstanceOf(Fault);
    expect(fault).toMatchObject({ exit: 3, faults: [{ code: 'too-little', place: { key: 'old.taps[2]' } }] });
    expect((fault as Fault).faults[0]!.todo).toContain('length of the section');
  });

  it('are proposed between their neighbours also when all else is sure', () => {
    const found = infer(pushed([2]));
    expect(found.taps[2]!.candidates[0]!.turn).toBe(30);
    expect(found.proposals.map(({ tap }) => tap)).toContain('3');
  });
});
