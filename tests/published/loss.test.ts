import { expect, test } from 'vitest';
import { lossEstimate } from '../../src/physics/loss.ts';
import { resistanceRatio, selfCapacitance, selfCapacitanceValid } from '../../src/physics/medhurst.ts';
import { skinDepth, skinRatio } from '../../src/physics/skin.ts';
import { accuracy, off } from './accuracy.ts';
import { DOUBTFUL, PITCH_OVER_WIRE, RESISTANCE, SELF_CAPACITANCE } from './medhurst.ts';
import { SKIN } from './skin.ts';
import { TRANSVERSE_LOSS } from './transverse.ts';

const FREQUENCY = 1e6;
const ratioAt = (x: number) => skinRatio(Math.SQRT2 * x * skinDepth(FREQUENCY), FREQUENCY);

test('skin effect of a straight wire', () => {
  // Six decimals are kept.
  accuracy(
    'skin effect, computed from Bessel functions (absolute)',
    SKIN.map(([x, ratio]) => ratioAt(x) - ratio),
    6e-7,
  );
  // Four digits, and the slip of memory at x = 2.5.
  const printed = SKIN.flatMap(([x, , p]) => (p === undefined ? [] : [off(ratioAt(x), p)]));
  accuracy('skin effect, Terman 1943, from memory (relative)', printed, 5e-4);
});

test("Medhurst's self-capacitance at its points", () => {
  const errors = SELF_CAPACITANCE.map(([ratio, h]) => off(selfCapacitance(0.05 * ratio, 0.05), h * 5e-12));
  // The curve goes through the points; only rounding is left.
  accuracy('self-capacitance, Medhurst 1947, read as quoted (relative)', errors, 1e-14);
  // Medhurst 1947 states no value outside; the ends are kept and flagged.
  expect(selfCapacitance(5, 0.05)).toBe(selfCapacitance(2.5, 0.05));
  expect([0.09, 0.1, 50, 51].map(selfCapacitanceValid)).toEqual([false, true, true, false]);
});

test("Medhurst's resistance ratio at its entries", () => {
  const errors = RESISTANCE.flatMap(([length, ratios]) =>
    ratios.map((ratio, column) => {
      const pitch = PITCH_OVER_WIRE[column]!;
      const doubtful = length === DOUBTFUL.lengthOverDiameter && pitch === DOUBTFUL.pitchOverWire;
      if (doubtful) expect(ratio).toBe(DOUBTFUL.remembered);
      return off(resistanceRatio(length, pitch), doubtful ? DOUBTFUL.likely : ratio);
    }),
  );
  expect(errors).toHaveLength(120);
  accuracy('resistance ratio, Medhurst 1947, from memory (relative)', errors, 2e-15);
});

test('eddy loss of thin strands', () => {
  // A hundred strands in one turn of a huge ring leave only the bundle's own field, whose H^2 is known.
  const rows = TRANSVERSE_LOSS.filter(([mm, hertz]) => mm / 1e3 < 1.5 * skinDepth(hertz));
  const loss = (mm: number, frequency: number) => {
    const coil = {
      turns: 1,
      meanDiameter: 1e6,
      length: 1,
      pitch: 1,
      wireDiameter: 2e-3,
      strands: 100,
      strandDiameter: mm / 1e3,
      wireLength: 1,
    };
    const eddy =
      lossEstimate({ ...coil, frequency }).resistance - lossEstimate({ ...coil, frequency: 1e-3 }).resistance;
    return eddy / 2 / 100 / (1 / (8 * Math.PI ** 2 * 1e-3 ** 2));
  };
  // Seven digits are kept of the limit, and the difference of two resistances costs some.
  accuracy(
    'strand loss, low-frequency limit (relative)',
    rows.map(([mm, f, , limit]) => off(loss(mm, f), limit)),
    1e-6,
  );
  // Methods of litz: 4 % at 1.5 skin depths.
  accuracy(
    'strand loss, exact, ds < 1.5 delta (relative)',
    rows.map(([mm, f, exact]) => off(loss(mm, f), exact)),
    0.04,
  );
});

test('the estimate of solid coils against finite elements', () => {
  // Axisymmetric, second-order elements, COMPUTED: turns, D, p, d in mm, MHz, ohm.
  const coils = [
    [5, 60, 4, 1.5, 1, 0.06405],
    [20, 50, 0.56, 0.5, 1.5, 2.2864],
  ] as const;
  const errors = coils.map(([turns, diameter, pitch, wire, megahertz, ohm]) => {
    const { resistance, kind } = lossEstimate({
      turns,
      meanDiameter: diameter / 1e3,
      length: (turns * pitch) / 1e3,
      pitch: pitch / 1e3,
      wireDiameter: wire / 1e3,
      strands: 1,
      strandDiameter: wire / 1e3,
      wireLength: (turns * Math.PI * diameter) / 1e3,
      frequency: megahertz * 1e6,
    });
    expect(kind).toBe('estimate');
    return off(resistance, ohm);
  });
  // Short close coils lose more than Medhurst's table: 15 % more for the second.
  accuracy('loss estimate of two solid coils, finite elements (relative)', errors, 0.2);
});
