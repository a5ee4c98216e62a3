/**
 * What may be off for all coils of a kind, as columns of the fit, with what each may be before anything is read (half widths at 95 %):
 * instruments as the shop states them; diameter, pitch and gaps by the record's spread. That spread is of one coil among a bench's;
 * a bench as a whole may be off by four times as much.
 */

import type { CoilRecord } from '../record/schema.ts';
import type { KindModel, Shape, Slot } from './systematic-model.ts';
import { FITTED, type Fitted, type UnknownName } from './systematic-schema.ts';

/** 95 % of a normal distribution lie within so many standard deviations. */
export const Z95 = 1.96;
const TIMES = 4;
/** How far the wire's bed and a caliper may part what is read across a former from the turns, mm (common practice, from memory). */
const BEDDING_MM = 0.05;
/** Medhurst's table is stated to 5 %. */
const SELF_SPREAD = 0.05;
/** Reading of a rule, as limits of wound lengths count it: a part of the wire. */
const RULE_OF_WIRE = 0.05;

/** First guesses of the noise of one reading, standard deviations: fractions, and mm (common practice, from memory). */
export const NOISE: Readonly<Record<Fitted, number>> = {
  inductance: 0.003,
  resonance: 0.002,
  length: 0.05,
  twenty: 0.05,
  former: 0.03,
};

export const noiseOf = (of: Fitted): number => FITTED.indexOf(of);

export interface Column {
  readonly name: UnknownName | 'bedding' | 'rule' | 'place';
  readonly capacitancePf: number | null;
  readonly priorHalf: number;
  /** Deviation of a slot for each unit of the unknown. */
  readonly per: (slot: Slot) => number;
}

/** Half widths of what the shape may be off by, before anything is read. */
export function shapeHalves({ spread, windings }: CoilRecord): Shape {
  const gaps =
    windings[0]!.taps.some(({ gapMm }) => gapMm > 0) || windings[0]!.unitTaps?.some(({ gapMm }) => gapMm > 0);
  return { diameterMm: TIMES * spread.diameterMm, pitch: TIMES * spread.pitch, gaps: gaps ? spread.gap : 0 };
}

/** Steps by which the shape is moved to see what follows: small beside what bends, large beside rounding. */
const STEP: Shape = { diameterMm: 0.05, pitch: 1e-3, gaps: 0.05 };

type Line = Readonly<Record<keyof Shape | 'base', number>>;

/** Deviations of every slot about a shape: the value there, and for each unit of diameter, pitch and gaps. */
export class Slopes {
  readonly #model: KindModel;
  readonly #about: Shape;
  readonly #lines = new Map<Slot, Line>();

  constructor(model: KindModel, about: Shape) {
    this.#model = model;
    this.#about = about;
  }

  base(slot: Slot): number {
    return this.#line(slot).base;
  }

  per(slot: Slot, of: keyof Shape): number {
    return this.#line(slot)[of];
  }

  #line(slot: Slot): Line {
    const known = this.#lines.get(slot);
    if (known !== undefined) return known;
    const at = (shape: Shape) => this.#model.deviation(slot, this.#model.at(shape), shape.diameterMm);
    const base = at(this.#about);
    const per = (of: keyof Shape) => (at({ ...this.#about, [of]: this.#about[of] + STEP[of] }) - base) / STEP[of];
    const line = { base, diameterMm: per('diameterMm'), pitch: per('pitch'), gaps: per('gaps') };
    this.#lines.set(slot, line);
    return line;
  }
}

/** The columns of the slots that are read. */
export function columnsOf(model: KindModel, slots: readonly Slot[], slopes: Slopes): Column[] {
  const { record } = model;
  const { shop, measuring, spread } = record;
  const halves = shapeHalves(record);
  const shape = (name: UnknownName, of: keyof Shape, priorHalf: number): Column => ({
    name,
    capacitancePf: null,
    priorHalf,
    per: (slot) => slopes.per(slot, of),
  });
  const columns: Column[] = [shape('diameter', 'diameterMm', halves.diameterMm), shape('pitch', 'pitch', halves.pitch)];
  if (halves.gaps > 0) columns.push(shape('gaps', 'gaps', halves.gaps));
  const has = (of: Fitted) => slots.some((slot) => slot.of === of);
  const add = (name: Column['name'], priorHalf: number, per: Column['per'], capacitancePf: number | null = null) =>
    columns.push({ name, capacitancePf, priorHalf, per });
  if (has('inductance')) {
    add('meter', shop.meterAccuracy, (slot) => (slot.of === 'inductance' ? 1 : 0));
    add('leads', measuring.leadUh, (slot) => slot.perLeadUh);
  }
  const known = [...new Set(slots.flatMap(({ capacitancePf }) => (capacitancePf === null ? [] : [capacitancePf])))];
  for (const pf of known.sort((a, b) => a - b))
    add('capacitor', shop.capacitorTolerance, (slot) => (slot.capacitancePf === pf ? slot.perCapacitor : 0), pf);
  if (known.length > 0 || has('inductance')) {
    const own = SELF_SPREAD * model.coil.selfPf(model.coil.turns);
    add('strays', Math.hypot(measuring.clipPf, own), (slot) => slot.perStrayPf);
  }
  if (has('former')) add('bedding', BEDDING_MM, (slot) => (slot.of === 'former' ? 1 : 0));
  const rule = RULE_OF_WIRE * model.coil.shape.wire.overallMm;
  for (const slot of slots)
    if (slot.of === 'length' || slot.of === 'twenty') add('rule', rule, (each) => (each === slot ? 1 : 0));
  // Where a tap really ends and what its own lead adds, alike at all coils as the holes are.
  for (const { tap, turn, inductanceUh } of model.taps) {
    const own = slots.filter((slot) => slot.tap === tap && slot.perLn !== 0);
    if (own.length === 0) continue;
    const half = Math.hypot(model.perTurn(own[0]!) * Math.min(spread.turn, turn / 2), spread.leadUh / inductanceUh);
    add('place', half, (slot) => (slot.tap === tap ? slot.perLn : 0));
  }
  return columns;
}
