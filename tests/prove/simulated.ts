/**
 * Lots of coils made and measured by chance: every coil is laid anew with its own diameter, pitch and gaps and summed by the full physics,
 * then read with the errors of the instruments and noise. Nothing of the fit's own slopes is used.
 */
import { Coil } from '../../src/coil/coil.ts';
import type { CoilReadings, KindReadings, Reading } from '../../src/prove/types.ts';
import { coilOf } from '../../src/record/rebuild.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { stream } from '../helpers/jobs.ts';

/** What is off for all coils, in the units of the names; fractions where there is none. */
export interface Truth {
  readonly diameterMm: number;
  readonly pitch: number;
  readonly gaps: number;
  readonly meter: number;
  readonly leadUh: number;
  readonly capacitor: number;
}

export const NOTHING: Truth = { diameterMm: 0, pitch: 0, gaps: 0, meter: 0, leadUh: 0, capacitor: 0 };

export interface Lot {
  readonly seed: number;
  readonly coils: number;
  readonly truth: Truth;
  /** Standard deviations from coil to coil. */
  readonly scatterMm: number;
  readonly scatterPitch: number;
  /** Of one reading of inductance or resonance, a fraction; of lengths, mm. */
  readonly noise: number;
  readonly lengthMm: number;
  readonly reads: readonly ('inductance' | 'resonance' | 'length' | 'former')[];
  /** Draw the places of taps within their spread; else they lie as planned. */
  readonly places?: boolean;
  /** This coil has a turn more before this tap. */
  readonly miscounted?: { readonly coil: number; readonly tap: number; readonly turns: number };
}

/** A stream of standard normal numbers (Box and Muller). */
export function normals(seed: number): () => number {
  const uniform = stream(1 + ((seed * 7919) % 2147483000));
  for (let i = 0; i < 8; i++) uniform();
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

const readingOf = (
  line: number,
  quantity: Reading['quantity'],
  tap: number | null,
  value: number,
  more: Partial<Reading> = {},
): Reading => ({
  line,
  quantity,
  tap,
  value,
  written: value.toPrecision(6),
  capacitancePf: null,
  frequencyKhz: null,
  celsius: null,
  key: null,
  remark: '',
  ...more,
});

export function simulated(record: CoilRecord, lot: Lot): KindReadings {
  const gauss = normals(lot.seed);
  const { shape } = coilOf(record);
  const winding = record.windings[0]!;
  const plain = coilOf(record);
  const { truth } = lot;
  const { spread, measuring } = record;
  // Where each tap really ends, alike at all coils, and what its lead adds.
  const places = winding.taps.map(() =>
    lot.places ? { turn: (gauss() * spread.turn) / 1.96, uh: (gauss() * spread.leadUh) / 1.96 } : { turn: 0, uh: 0 },
  );
  const rules = winding.taps.map(() => (lot.places ? (gauss() * 0.05 * shape.wire.overallMm) / 1.96 : 0));
  const bedding = lot.places ? (gauss() * 0.05) / 1.96 : 0;
  let line = 1;
  const coils = Array.from({ length: lot.coils }, (_, i): CoilReadings => {
    const diameterMm = truth.diameterMm + gauss() * lot.scatterMm;
    const pitch = truth.pitch + gauss() * lot.scatterPitch;
    const turned = lot.miscounted?.coil === i ? lot.miscounted : null;
    const more = (tap: number) => (turned !== null && tap >= turned.tap ? turned.turns : 0);
    const coil = new Coil({
      ...shape,
      meanDiameterMm: shape.meanDiameterMm + diameterMm,
      pitchMm: shape.pitchMm * (1 + pitch),
      turns: shape.turns + more(winding.taps.length),
      gaps: shape.gaps.map(({ turn, gapMm }) => ({
        turn: turn + more(1 + winding.taps.findIndex((tap) => Math.abs(tap.turn - turn) < 1e-6)),
        gapMm: gapMm * (1 + truth.gaps),
      })),
    });
    const readings: Reading[] = [];
    const add = (...args: Parameters<typeof readingOf> extends [number, ...infer Rest] ? Rest : never) =>
      readings.push(readingOf(++line, ...args));
    if (lot.reads.includes('former'))
      add(
        'diameter',
        null,
        record.former.outsideDiameterMm + (record.asMade?.diameterMm ?? 0) + diameterMm + bedding + gauss() * 0.03,
        { key: 'former' },
      );
    winding.taps.forEach(({ tap, turn }, t) => {
      const at = turn + more(tap);
      const ends = Math.min(Math.max(at + places[t]!.turn, 0.1), coil.turns + 0.49);
      const beyond = ends - coil.turns;
      const slope = coil.inductanceUh(coil.turns) - coil.inductanceUh(coil.turns - 0.5);
      const uh =
        (beyond > 0 ? coil.inductanceUh(coil.turns) + 2 * slope * beyond : coil.inductanceUh(ends)) + places[t]!.uh;
      const entry = measuring.meter.find((one) => one.tap === tap)!;
      if (lot.reads.includes('inductance') && entry.readingUh !== null) {
        const crowded = (uh * entry.inductanceUh) / plain.inductanceUh(turn);
        // L / (1 - omega^2 L C) with the C that the record's reading tells of.
        const rise = (1 - entry.inductanceUh / entry.readingUh) * (crowded / entry.inductanceUh);
        const shown = crowded / (1 - rise);
        const read = (shown * (1 + truth.meter) + truth.leadUh) * (1 + gauss() * lot.noise);
        add('inductance', tap, read, { frequencyKhz: record.shop.meterKhz });
      }
      if (lot.reads.includes('length') && (tap % 3 === 0 || tap === winding.taps.length))
        add('length', tap, coil.woundMm(at) + rules[t]! + gauss() * lot.lengthMm);
      const pf = record.shop.capacitorsPf.at(-1)!;
      const resonance = measuring.resonances.find((one) => one.tap === tap && one.capacitancePf === pf);
      if (lot.reads.includes('resonance') && resonance !== undefined && tap === winding.taps.length) {
        const own = coil.selfPf(turn);
        const capacitance = (pf * (1 + truth.capacitor) + own) / (pf + plain.selfPf(turn));
        const kHz = resonance.frequencyKhz / Math.sqrt((uh / plain.inductanceUh(turn)) * capacitance);
        add('resonance', tap, kHz * (1 + (gauss() * lot.noise) / 2), { capacitancePf: pf });
      }
    });
    return { serial: `${record.job} ${String(i + 1).padStart(3, '0')}`, readings, dial: [], remarks: [] };
  });
  return { record, coils };
}
