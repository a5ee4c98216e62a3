/**
 * The questions of the bench at the conditions of a reading. A record has tables for the meter and the capacitors of its shop;
 * for others the same laws are asked again (record/meter.ts), once for each frequency and capacitor.
 */
import type { Question } from '../bench/api.ts';
import type { JudgedRecord } from '../bench/questions.ts';
import { questionsOf } from '../bench/questions.ts';
import { instrumentsOf, USUAL } from '../record/instruments.ts';
import { measuringOf } from '../record/meter.ts';
import { workingCoilOf } from '../record/rebuild.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Reading } from './types.ts';

/** A record that asks at certain conditions, and its questions by their key. */
export interface Asked {
  readonly record: JudgedRecord;
  readonly questions: ReadonlyMap<string, Question>;
}

/** A frequency stated to this share of that of the record is that. */
const SAME_KHZ = 1e-3;

/** Which meter frequency or capacitor a reading was taken with; null: those of the record. */
function conditionOf(record: CoilRecord, { quantity, capacitancePf, frequencyKhz }: Reading): string | null {
  const { meterKhz } = record.shop;
  if (quantity === 'resonance') return `${capacitancePf} pF`;
  if (quantity === 'probed resonance' || quantity === 'width') return `${capacitancePf} pF, probe`;
  if (quantity !== 'inductance' || frequencyKhz === null) return null;
  return Math.abs(frequencyKhz / meterKhz - 1) <= SAME_KHZ ? null : `${frequencyKhz} kHz`;
}

const asked = (record: JudgedRecord): Asked => ({
  record,
  questions: new Map(questionsOf(record).map((question) => [question.key, question])),
});

/** Questions of a record at any conditions; each is worked out once. */
export class Asking {
  readonly #record: CoilRecord;
  readonly #plain: Asked;
  readonly #known = new Map<string, Asked>();

  constructor(record: CoilRecord) {
    this.#record = record;
    this.#plain = asked(record);
  }

  /** The record that asks as the reading was taken. */
  for(reading: Reading): Asked {
    const condition = conditionOf(this.#record, reading);
    if (condition === null) return this.#plain;
    const known = this.#known.get(condition) ?? asked(this.#at(reading));
    this.#known.set(condition, known);
    return known;
  }

  /** With generator and probe and one capacitor, 0 for none: what the record has of it, the rest worked out anew. */
  #probed(pf: number): JudgedRecord {
    const record = this.#record;
    const { measuring } = record;
    const { taps } = record.windings[0]!;
    const shop = {
      ...record.shop,
      capacitorsPf: pf === 0 ? [] : [pf],
      instruments: { ...(record.shop.instruments ?? USUAL), stated: true },
    };
    const anew = instrumentsOf(workingCoilOf(record), taps, shop, record.surroundings.formerLossTangent);
    const known = measuring.instruments?.rows ?? [];
    const rows = anew.rows
      .filter(({ capacitancePf }) => capacitancePf === pf)
      .map((row) => known.find((one) => one.tap === row.tap && one.capacitancePf === pf) ?? row);
    return { ...record, shop, measuring: { ...measuring, instruments: { ...anew, rows } } };
  }

  /** With one capacitor, so that it is asked for at every tap; or with a meter of another frequency. */
  #at({ quantity, capacitancePf, frequencyKhz }: Reading): JudgedRecord {
    if (quantity === 'probed resonance' || quantity === 'width') return this.#probed(capacitancePf!);
    const record = this.#record;
    const { measuring } = record;
    const pf = quantity === 'resonance' ? capacitancePf : null;
    const shop = { ...record.shop, ...(pf === null ? { meterKhz: frequencyKhz! } : { capacitorsPf: [pf] }) };
    const resonances = measuring.resonances.filter((one) => one.capacitancePf === pf);
    if (resonances.length > 0) return { ...record, shop, measuring: { ...measuring, resonances } };
    const bench = pf === null ? { ...shop, capacitorsPf: [] } : shop;
    const { taps } = record.windings[0]!;
    const { formerLossTangent } = record.surroundings;
    const anew = measuringOf(workingCoilOf(record), taps, bench, record.spread, formerLossTangent);
    return {
      ...record,
      shop,
      measuring: pf === null ? { ...measuring, meter: anew.meter } : { ...measuring, resonances: anew.resonances },
    };
  }
}
