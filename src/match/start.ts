/** Where the fit begins: each unknown from the reading that tells it most directly. */
import { RESISTIVITY_20C } from '../physics/copper.ts';
import { stateOf } from './fit.ts';
import type { Problem } from './problem.ts';
import { placesIn, type State, UNKNOWN } from './state.ts';
import type { OldTap } from './types.ts';

/** Diameter to begin with when none was read: in the middle of what receiving coils have, mm. */
const MIDDLE_MM = 65;
/** Looser than the wire by this when nothing tells the pitch. */
const LOOSE = 1.05;

function meanMm({ old, wire }: Problem): number {
  if (old.diameters.length === 0) return MIDDLE_MM;
  const wires = { former: 1, mean: 0, 'over wire': -1 };
  return (
    old.diameters.reduce((sum, { of, mm }) => sum + mm.value + wires[of] * wire.overallMm, 0) / old.diameters.length
  );
}

/** Steps between taps and the whole winding that have both turns and a place, pooled; null without any. */
function pitchByPlaces({ old, known, wire }: Problem): number | null {
  const length = old.windingLengthMm;
  const placed = known.flatMap(({ tap, exact }, i) => {
    const turn = exact ?? tap.turns?.value ?? null;
    const mm =
      tap.positionMm?.value ?? (i === known.length - 1 && length !== null ? length.value - wire.overallMm : null);
    return turn === null || mm === null || turn <= 0 ? [] : [{ turn, mm }];
  });
  const sum = placed.reduce((all, { turn }) => all + turn * turn, 0);
  return sum === 0 ? null : placed.reduce((all, { turn, mm }) => all + turn * mm, 0) / sum;
}

function pitches(problem: Problem): number[] {
  const { old, shape, wire } = problem;
  const base =
    (typeof old.pitchMm === 'string' ? wire.overallMm * 1.02 : old.pitchMm?.value) ??
    pitchByPlaces(problem) ??
    wire.overallMm * LOOSE;
  return Array.from({ length: shape.sections }, (_, s) => {
    const section = old.sections[s];
    if (section?.pitchMm) return section.pitchMm.value;
    if (section?.lengthMm && section.turns !== null && section.turns > 1)
      return Math.max(wire.bareMm, (section.lengthMm.value - wire.overallMm) / (section.turns - 1));
    return base;
  });
}

/** Turn at a place, sections and their gaps counted. */
function turnAt(problem: Problem, state: State, mm: number): number {
  let [low, high] = [0, MOST_TURNS];
  // A section that ends at a tap whose turns are not known yet has no end: the first pitch serves.
  if (!state.ends.every((end) => Number.isFinite(end))) return mm / state.measures.pitchMm[0]!;
  for (let k = 0; k < 40; k++) {
    const middle = (low + high) / 2;
    if (state.placeMm(middle) < mm) low = middle;
    else high = middle;
  }
  return problem.known.length > 0 ? (low + high) / 2 : 0;
}

/** Most turns that the figures are made for. */
export const MOST_TURNS = 500;

/** Turns by what was read of a tap; null when that tells nothing of them. */
function turnsBy(problem: Problem, state: State, tap: OldTap, whole: boolean): number | null {
  const { old } = problem;
  const { measures } = state;
  if (tap.turns !== null) return tap.turns.value;
  const mm =
    tap.positionMm?.value ??
    (whole && old.windingLengthMm !== null ? old.windingLengthMm.value - measures.overallMm : null);
  if (mm !== null) return turnAt(problem, state, mm);
  const uh =
    tap.inductance?.uh.value ??
    (tap.resonance === null
      ? null
      : 1e18 / ((2e3 * Math.PI * tap.resonance.kHz.value) ** 2 * tap.resonance.capacitorPf.value));
  if (uh !== null) return Math.min(MOST_TURNS, state.coilOf(200).turnFor(uh));
  const metres =
    tap.resistanceOhm !== null
      ? (tap.resistanceOhm.value * Math.PI * measures.bareMm ** 2 * 1e-6) / 4 / RESISTIVITY_20C
      : whole && old.wire.lengthM !== null
        ? old.wire.lengthM.value
        : whole && old.wire.massG !== null
          ? old.wire.massG.value / (9.1 * (Math.PI / 4) * measures.bareMm ** 2)
          : null;
  return metres === null ? null : (1e3 * metres) / (Math.PI * measures.meanMm);
}

/** Turns of the tap at which a section ends, by the length of that section; null when it was not measured. */
function turnsBySection({ old }: Problem, state: State, index: number): number | null {
  const s = old.sections.findIndex(({ endsAtTap }) => endsAtTap === index + 1);
  const lengthMm = old.sections[s]?.lengthMm?.value;
  if (lengthMm === undefined) return null;
  const before = s === 0 ? 0 : state.ends[s - 1]!;
  return before + 1 + (lengthMm - state.measures.overallMm) / state.measures.pitchMm[s]!;
}

export interface Start {
  readonly state: State;
  /** Known taps about whose turns nothing was read. */
  readonly untold: readonly number[];
}

export function startOf(problem: Problem): Start {
  const { old, shape, known, wire } = problem;
  const at = placesIn(shape);
  const x = new Float64Array(at.count);
  x[UNKNOWN.mean] = meanMm(problem);
  x[UNKNOWN.bare] = wire.bareMm;
  x[UNKNOWN.overall] = wire.overallMm;
  x[UNKNOWN.tapGap] = old.tapGapMm.value;
  pitches(problem).forEach((pitch, s) => {
    x[UNKNOWN.pitch + s] = pitch;
  });
  for (let s = 0; s < shape.sections - 1; s++) x[at.gap + s] = old.sections[s]?.gapAfterMm?.value ?? 0;
  const untold: number[] = [];
  // Without turns yet: one even winding as long as need be.
  let turns: number[] = known.map(({ exact }) => exact ?? MOST_TURNS);
  for (let round = 0; round < 2; round++) {
    const rough = stateOf(problem, x, turns);
    const even = known.map(({ tap, exact, fraction, index }, i) => {
      if (exact !== null) return exact;
      const found = turnsBy(problem, rough, tap, i === known.length - 1) ?? turnsBySection(problem, rough, index);
      if (found === null && round === 0) untold.push(i);
      return found === null ? null : Math.max(Math.round(found - fraction) + fraction, fraction > 0 ? fraction : 1);
    });
    const inSections = old.sections.reduce(
      (sum: number | null, { turns: of }) => (of === null || sum === null ? null : sum + of),
      0,
    );
    turns = even.map(
      (turn, i) => turn ?? (i === known.length - 1 && inSections ? inSections : (even[i + 1] ?? MOST_TURNS) / 2),
    );
  }
  return { state: stateOf(problem, x, turns), untold };
}
