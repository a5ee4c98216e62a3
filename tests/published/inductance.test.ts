import { expect, test } from 'vitest';
import { nagaokaK, sheetInductance } from '../../src/physics/nagaoka.ts';
import { ringSumMatrixFree } from '../../src/physics/rings.ts';
import { rosaA, rosaB, roundWireInductance } from '../../src/physics/rosa.ts';
import { wheeler1928, wheeler1982 } from '../../src/physics/wheeler.ts';
import { accuracy, off, spread } from './accuracy.ts';
import { COMPUTED_COILS, type ComputedCoil } from './coils.ts';
import { BARE_INCH, COILS_1922, COVERED_INCH, TURNS_PER_INCH } from './coils1922.ts';
import { NAGAOKA } from './nagaoka.ts';
import { ROSA_A, ROSA_B } from './rosa.ts';

const INCH = 0.0254;

test("Nagaoka's coefficient over the whole table", () => {
  // Ten digits are kept of values down to 0.035: half a unit of the last is 5e-10 of 0.1.
  const exact = NAGAOKA.map(([ratio, k]) => off(nagaokaK(ratio, 1), k));
  accuracy('Nagaoka 1909, computed with 30 digits (relative)', exact, 6e-10);
  // Four printed decimals, rounded by hand.
  const printed = NAGAOKA.flatMap(([ratio, , k]) => (k === undefined ? [] : [nagaokaK(ratio, 1) - k]));
  accuracy('Nagaoka, NBS Circular 74, from memory (absolute)', printed, 6e-5);
});

test("Rosa's corrections against exact and printed values", () => {
  // Half a unit of the last decimal kept.
  accuracy(
    'Rosa A, computed (absolute)',
    ROSA_A.map(([x, exact]) => rosaA(x) - exact),
    5.1e-7,
  );
  accuracy(
    'Rosa B, computed (absolute)',
    ROSA_B.map(([n, exact]) => rosaB(n) - exact),
    5.1e-9,
  );
  // Three decimals, and up to 0.0015 of hand errors in the old tables.
  accuracy(
    'Rosa A, 1912 Table VII, from memory (absolute)',
    ROSA_A.map(([x, , p]) => rosaA(x) - p),
    1.6e-3,
  );
  accuracy(
    'Rosa B, 1912 Table VIII, from memory (absolute)',
    ROSA_B.map(([n, , p]) => rosaB(n) - p),
    1.6e-3,
  );
});

function metres(coil: ComputedCoil) {
  return { turns: coil.turns, diameter: coil.meanDiameterMm / 1e3, pitch: coil.pitchMm / 1e3, wire: coil.bareMm / 1e3 };
}

function rings(coil: ComputedCoil): number {
  const { turns, diameter, pitch, wire } = metres(coil);
  const places = Array.from({ length: turns }, (_, i) => i * pitch);
  return 1e6 * ringSumMatrixFree(places, diameter / 2, wire / 2);
}

test('eleven coils computed three independent ways', () => {
  const sheet = COMPUTED_COILS.map((coil) => {
    const { turns, diameter, pitch } = metres(coil);
    return off(1e6 * sheetInductance(turns, diameter, turns * pitch), coil.sheetUh);
  });
  // Six decimals of microhenries are kept; the smallest coil has 0.3 uH. Its own rounding is 2e-6 of that.
  accuracy('current sheet of computed coils (relative)', sheet, 2e-6);
  const rosa = COMPUTED_COILS.map((coil) => {
    const { turns, diameter, pitch, wire } = metres(coil);
    return off(1e6 * roundWireInductance(turns, diameter, pitch, wire), coil.rosaUh);
  });
  accuracy('sheet with Rosa of computed coils (relative)', rosa, 2e-6);
  accuracy(
    'ring sum of computed coils (relative)',
    COMPUTED_COILS.map((coil) => off(rings(coil), coil.ringsUh)),
    2e-6,
  );
});

test('coils of ten microhenries and more, where the table has seven digits and more', () => {
  // One coil has its pitch itself rounded, to 1e-6 of it, so it can be held to that only.
  const large = COMPUTED_COILS.filter((coil) => coil.sheetUh > 10 && coil.pitchMm !== 0.47037);
  const sheet = large.map((coil) => {
    const { turns, diameter, pitch } = metres(coil);
    return off(1e6 * sheetInductance(turns, diameter, turns * pitch), coil.sheetUh);
  });
  // Half a unit of the sixth decimal.
  accuracy('current sheet of large computed coils (relative)', sheet, 1e-8);
  accuracy(
    'ring sum of large computed coils (relative)',
    large.map((coil) => off(rings(coil), coil.ringsUh)),
    1e-8,
  );
});

test('rings stand in for the true helix', () => {
  // What the helix has and rings have not: the slant. It goes as (p/D)^2 and is 0.2 % at the worst coil, p = D/10 and ten turns.
  const all = COMPUTED_COILS.map((coil) => off(rings(coil), coil.helixUh));
  accuracy('ring sum against the helix, every coil (relative)', all, 2.5e-3);
  const close = COMPUTED_COILS.filter((coil) => coil.pitchMm < coil.meanDiameterMm / 80 && coil.turns > 5);
  // Close windings: 2e-5.
  accuracy(
    'ring sum against the helix, p < D/80 (relative)',
    close.map((coil) => off(rings(coil), coil.helixUh)),
    6e-5,
  );
});

test('Wheeler 1928 and 1982 within what they claim', () => {
  const error = (law: typeof wheeler1928, ratio: number) =>
    off(law(100, 0.1, 0.1 * ratio), sheetInductance(100, 0.1, 0.1 * ratio));
  const long = spread(0.4, 50, 200).map((ratio) => error(wheeler1928, ratio));
  // Wheeler 1928, Proc. IRE 16, 1398: -0.6 % to +0.06 % for l > 0.4 D, -2.5 % at l = D/4.
  accuracy('Wheeler 1928, l > 0.4 D (relative)', long, 6e-3);
  expect(Math.max(...long)).toBeLessThan(6e-4);
  expect(error(wheeler1928, 0.25)).toBeCloseTo(-0.025, 3);
  // Wheeler 1982, Proc. IEEE 70, 1449: 0.1 % for every shape.
  accuracy(
    'Wheeler 1982, l/D 0.001 to 1000 (relative)',
    spread(1e-3, 1e3, 400).map((r) => error(wheeler1982, r)),
    1e-3,
  );
});

test('coils printed in 1922', () => {
  const coil = ([tube, turns]: (typeof COILS_1922)[number]) => {
    const radius = ((tube + COVERED_INCH) / 2) * INCH;
    const places = Array.from({ length: turns }, (_, i) => (i * INCH) / TURNS_PER_INCH);
    return 1e3 * ringSumMatrixFree(places, radius, (BARE_INCH / 2) * INCH);
  };
  // J. Mills 1922, Letter 21, Table II (READ): calculated and rounded there, so 2 % from 92 turns on.
  const large = COILS_1922.filter(([, turns]) => turns >= 92).map((row) => off(coil(row), row[2]));
  accuracy('printed coils of 1922, 92 turns and more (relative)', large, 0.02);
  // Below, one or two printed digits: 0.1 mH may be 0.095 or 0.105.
  const small = COILS_1922.filter(([, turns]) => turns < 92).map((row) => off(coil(row), row[2]));
  accuracy('printed coils of 1922, fewer turns (relative)', small, 0.06);
});
