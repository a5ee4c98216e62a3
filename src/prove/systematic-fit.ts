/** The fit of a kind: readings to rows, rows to the shape that they are about, twice where that is far from the plan. */
import { type Column, columnsOf, NOISE, noiseOf, Slopes, Z95 } from './systematic-columns.ts';
import { fitMixed, type MixedFit } from './systematic-mixed.ts';
import { AS_PLANNED, deviationOf, type KindModel, type Shape, type Slot } from './systematic-model.ts';
import { FITTED } from './systematic-schema.ts';
import type { Reading } from './types.ts';

/** A reading that is fitted. */
export interface Fitting {
  readonly slot: Slot;
  readonly reading: Reading;
}

/** A coil with what is fitted of it. */
export interface FittedCoil {
  readonly serial: string;
  readonly readings: readonly Fitting[];
}

export interface KindFit {
  readonly slots: readonly Slot[];
  readonly columns: readonly Column[];
  /** About which the columns were taken. */
  readonly about: Shape;
  readonly slopes: Slopes;
  readonly fit: MixedFit;
}

/** Of a coil: the record's spread, a half of which is taken as from coil to coil. */
const SCATTER_SHARE = 0.5;
/** ln L from which on a second round is worth its time: what bends is half its square. */
const BENDS = 4e-3;
const ROUNDS = 3;

/** What a fit finds of an unknown, counted from the plan; 0 where it is none of its columns. */
export const foundOf = ({ columns, fit }: Pick<KindFit, 'columns' | 'fit'>, name: Column['name']): number =>
  fit.x[columns.findIndex((column) => column.name === name)] ?? 0;

/** Steps of the shapes that columns are taken about: near enough to what is found, and the same coils serve again. */
const GRID: Shape = { diameterMm: 0.1, pitch: 2e-3, gaps: 0.1 };

const shapeOf = (found: KindFit): Shape => {
  const near = (name: Column['name'], step: number) => Math.round(foundOf(found, name) / step) * step;
  return {
    diameterMm: near('diameter', GRID.diameterMm),
    pitch: near('pitch', GRID.pitch),
    gaps: near('gaps', GRID.gaps),
  };
};

/** Where an unknown stands in the shape that columns are taken about; all but those of the shape count from 0. */
const originOf = (about: Shape, { name }: Column): number =>
  name === 'diameter' ? about.diameterMm : name === 'pitch' || name === 'gaps' ? about[name] : 0;

/** Deviation of a slot that the fit expects of every coil, by the columns that are asked for. */
export function expectedOf(found: KindFit, slot: Slot, asked: (column: Column) => boolean = () => true): number {
  const { columns, fit, about, slopes } = found;
  return columns.reduce(
    (sum, column, k) => (asked(column) ? sum + column.per(slot) * (fit.x[k]! - originOf(about, column)) : sum),
    slopes.base(slot),
  );
}

function fitAbout(model: KindModel, coils: readonly FittedCoil[], about: Shape, near?: KindFit): KindFit {
  const slots = [...new Set(coils.flatMap(({ readings }) => readings.map(({ slot }) => slot)))];
  const slopes = new Slopes(model, about);
  const columns = columnsOf(model, slots, slopes);
  // Deviations bend with the shape and are taken about the one found before, but counted from the plan, as what was known of it is.
  const origin = columns.map((column) => originOf(about, column));
  const rows = slots.map((slot) => {
    const a = Float64Array.from(columns, ({ per }) => per(slot));
    return { a, b: [a[0]!, a[1]!], noise: noiseOf(slot.of) };
  });
  const bases = slots.map(
    (slot, i) => slopes.base(slot) - origin.reduce((sum, value, k) => sum + value * rows[i]!.a[k]!, 0),
  );
  const index = new Map(slots.map((slot, i) => [slot, i]));
  const groups = coils.map(({ readings }) => ({
    rows: readings.map(({ slot }) => index.get(slot)!),
    y: readings.map(({ slot, reading }) => deviationOf(slot, reading.value) - bases[index.get(slot)!]!),
  }));
  const { spread } = model.record;
  const mixed = {
    rows,
    groups,
    priorSd: columns.map(({ priorHalf }) => priorHalf / Z95),
    scatter: [spread.diameterMm, spread.pitch].map((half) => (SCATTER_SHARE * half) / Z95),
    noise: FITTED.map((of) => NOISE[of]),
  };
  const fit = fitMixed(mixed, near?.fit);
  return { slots, columns, about, slopes, fit };
}

/** The fit of these coils, about the shape that it finds; `near`: a fit of nearly the same coils, to set out from. */
export function fitKind(model: KindModel, coils: readonly FittedCoil[], near?: KindFit): KindFit {
  let found = fitAbout(model, coils, near?.about ?? AS_PLANNED, near);
  for (let round = 1; round < ROUNDS; round++) {
    const shape = shapeOf(found);
    const step = Math.max(
      Math.abs(shape.diameterMm - found.about.diameterMm) / model.coil.shape.meanDiameterMm,
      Math.abs(shape.pitch - found.about.pitch),
    );
    if (step < BENDS) break;
    found = fitAbout(model, coils, shape, found);
  }
  return found;
}
