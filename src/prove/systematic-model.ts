/**
 * What can be read of a coil, and what it moves with when all coils of a kind come out otherwise than planned: the record's coil,
 * rebuilt with another diameter, pitch and gaps, summed anew. Ratios of what the meter shows to the low-frequency inductance are
 * the record's.
 *
 * Deviations are ln(read / expected) for inductance and resonance, and millimetres for lengths.
 */
import { questionsOf } from '../bench/questions.ts';
import type { Coil } from '../coil/coil.ts';
import { measuringOf } from '../record/meter.ts';
import type { Measuring } from '../record/meter-schema.ts';
import { coilOf, workingCoilOf } from '../record/rebuild.ts';
import type { CoilRecord, Tap } from '../record/schema.ts';
import type { Fitted } from './systematic-schema.ts';
import type { Reading } from './types.ts';

/** How a kind may come out: mean diameter in mm, pitch and gaps at taps as fractions. */
export interface Shape {
  readonly diameterMm: number;
  readonly pitch: number;
  readonly gaps: number;
}

export const AS_PLANNED: Shape = { diameterMm: 0, pitch: 0, gaps: 0 };

/** One thing that is read of every coil. */
export interface Slot {
  readonly key: string;
  readonly of: Fitted;
  /** Null: of no tap. */
  readonly tap: number | null;
  readonly turn: number;
  readonly expected: number;
  readonly capacitancePf: number | null;
  /** Of the deviation over ln of the low-frequency inductance; 0 for lengths. */
  readonly perLn: number;
  /** What a µH more in the leads, a pF more across the coil, and a known capacitor 1 % large (a fraction of it) do. */
  readonly perLeadUh: number;
  readonly perStrayPf: number;
  readonly perCapacitor: number;
}

const relative = (of: Fitted) => of === 'inductance' || of === 'resonance';

/** The deviation of a reading; see above. */
export const deviationOf = (slot: Slot, value: number): number =>
  relative(slot.of) ? Math.log(value / slot.expected) : value - slot.expected;

const SAME_KHZ = 1e-6;
/** What the mean diameter and its gauge may differ by in ln L to count as the same place. */
const PLACE = 1e-9;

export class KindModel {
  readonly record: CoilRecord;
  readonly coil: Coil;
  readonly taps: readonly Tap[];
  readonly #slots = new Map<string, Slot | null>();
  readonly #shapes = new Map<string, Coil>();
  readonly #perTurn = new Map<number, number>();
  readonly #measuring = new Map<string, Measuring>();
  readonly #nominal: ReadonlyMap<string, number>;

  constructor(record: CoilRecord) {
    this.record = record;
    this.coil = coilOf(record);
    this.taps = record.windings[0]!.taps;
    this.#nominal = new Map(
      questionsOf(record).flatMap((one) => (one.nominal === null ? [] : [[one.key, one.nominal]])),
    );
  }

  get whole(): Tap {
    return this.taps.at(-1)!;
  }

  /** The coil as it comes out so. */
  at({ diameterMm, pitch, gaps }: Shape): Coil {
    const key = [diameterMm, pitch, gaps].map((value) => Math.round(value / PLACE)).join(' ');
    const known = this.#shapes.get(key);
    if (known !== undefined) return known;
    const { shape } = this.coil;
    const made = this.coil.changed({
      meanDiameterMm: shape.meanDiameterMm + diameterMm,
      pitchMm: shape.pitchMm * (1 + pitch),
      gaps: shape.gaps.map((gap) => ({ ...gap, gapMm: gap.gapMm * (1 + gaps) })),
    });
    this.#shapes.set(key, made);
    return made;
  }

  /** Deviation of what a coil of this shape shows in a slot. */
  deviation(slot: Slot, made: Coil, diameterMm: number): number {
    if (relative(slot.of))
      return slot.perLn * Math.log(made.inductanceUh(slot.turn) / this.coil.inductanceUh(slot.turn));
    if (slot.of === 'former') return diameterMm;
    if (slot.of === 'length') return made.woundMm(slot.turn) - this.coil.woundMm(slot.turn);
    return made.places[19]! - made.places[0]! - (this.coil.places[19]! - this.coil.places[0]!);
  }

  /** ln L a turn at a tap. */
  perTurn({ turn }: Slot): number {
    const known = this.#perTurn.get(turn);
    if (known !== undefined) return known;
    const back = Math.min(0.5, turn / 2);
    const per = Math.log(this.coil.inductanceUh(turn) / this.coil.inductanceUh(turn - back)) / back;
    this.#perTurn.set(turn, per);
    return per;
  }

  /** What a reading is one of; null for what is not fitted, and where the meter is not to be trusted. */
  slotOf(reading: Reading): Slot | null {
    const { quantity, tap, capacitancePf, frequencyKhz } = reading;
    const key = [quantity, tap, reading.key, capacitancePf, frequencyKhz].join('|');
    const known = this.#slots.get(key);
    if (known !== undefined) return known;
    const slot = this.#slot(key, reading);
    this.#slots.set(key, slot);
    return slot;
  }

  #slot(key: string, { quantity, tap, key: asked, capacitancePf, frequencyKhz }: Reading): Slot | null {
    const bare = { key, tap, turn: 0, capacitancePf: null, perLn: 0, perLeadUh: 0, perStrayPf: 0, perCapacitor: 0 };
    const one = this.taps.find((each) => each.tap === tap);
    if (quantity === 'diameter' || asked === 'former') return this.#plain('former', { ...bare, tap: null }, 'former');
    if (quantity === 'length' && asked === 'turns-20') return this.#plain('twenty', { ...bare, tap: null }, 'turns-20');
    if (one === undefined) return null;
    const at = { ...bare, turn: one.turn };
    if (quantity === 'length') return { ...at, of: 'length', expected: one.woundLengthMm };
    if (quantity === 'inductance') return this.meterSlot(key, one.tap, frequencyKhz ?? this.record.shop.meterKhz);
    if (quantity !== 'resonance' || capacitancePf === null) return null;
    const found = this.#measured(this.record.shop.meterKhz, capacitancePf).resonances.find(
      (each) => each.tap === tap && each.capacitancePf === capacitancePf,
    );
    if (found === undefined) return null;
    const acting = capacitancePf + this.coil.selfPf(one.turn);
    return {
      ...at,
      of: 'resonance',
      expected: found.frequencyKhz,
      capacitancePf,
      perLn: -0.5,
      perStrayPf: -0.5 / acting,
      perCapacitor: (-0.5 * capacitancePf) / acting,
    };
  }

  /** Whether wires can be measured over twenty turns in the coil, and what is asked under a key. */
  #plain(of: 'former' | 'twenty', bare: Omit<Slot, 'of' | 'expected'>, key: string): Slot | null {
    const expected = this.#nominal.get(key);
    return expected === undefined ? null : { ...bare, of, expected };
  }

  /** Of a meter at this frequency; null where it is not to be trusted for what its leads do not explain. */
  meterSlot(key: string, tap: number, kHz: number): Slot | null {
    const entry = this.#measured(kHz, null).meter.find((each) => each.tap === tap);
    const of = this.taps.find((each) => each.tap === tap);
    if (entry === undefined || of === undefined || entry.readingUh === null) return null;
    if (entry.doubt === 'capacitance' || entry.doubt === 'resistance') return null;
    const { readingUh, inductanceUh } = entry;
    return {
      key,
      of: 'inductance',
      tap,
      turn: of.turn,
      expected: readingUh,
      capacitancePf: null,
      // L / (1 - omega^2 L C) goes with L to the power of what it is raised by.
      perLn: readingUh / inductanceUh,
      perLeadUh: 1 / readingUh,
      perStrayPf: (2e3 * Math.PI * kHz) ** 2 * readingUh * 1e-18,
      perCapacitor: 0,
    };
  }

  /** What the instruments show at a frequency and with a capacitor: the record's own, or worked out anew where it has neither. */
  #measured(kHz: number, pf: number | null): Measuring {
    const { shop, measuring, spread, surroundings } = this.record;
    if (Math.abs(kHz / shop.meterKhz - 1) < SAME_KHZ && (pf === null || shop.capacitorsPf.includes(pf)))
      return measuring;
    const key = `${kHz} ${pf}`;
    const known = this.#measuring.get(key);
    if (known !== undefined) return known;
    const bench = { ...shop, meterKhz: kHz, capacitorsPf: pf === null ? [] : [pf] };
    const made = measuringOf(workingCoilOf(this.record), this.taps, bench, spread, surroundings.formerLossTangent);
    this.#measuring.set(key, made);
    return made;
  }
}

const models = new WeakMap<CoilRecord, KindModel>();

/** The model of a record, made once. */
export function modelOf(record: CoilRecord): KindModel {
  const known = models.get(record) ?? new KindModel(record);
  models.set(record, known);
  return known;
}
