/** Finished coils as they might have come out, and what instruments would show of them, by the program's own physics. */
import { Coil } from '../../src/coil/coil.ts';
import type { Gap } from '../../src/coil/layout.ts';
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import { judgeCoil } from '../../src/prove/judge.ts';
import { Asking } from '../../src/prove/judge-at.ts';
import type { CoilReadings, Reading } from '../../src/prove/types.ts';
import { measuringOf } from '../../src/record/meter.ts';
import { coilOf } from '../../src/record/rebuild.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

/** A coil as wound: where its taps lie, how many turns, what was pushed apart beyond the plan. */
export interface Wound {
  readonly turns: number;
  readonly taps: readonly number[];
  readonly more: readonly Gap[];
  readonly diameterMm: number;
}

export function asPlanned(record: CoilRecord): Wound {
  const { turns, taps, meanDiameterMm } = record.windings[0]!;
  return { turns, taps: taps.map(({ turn }) => turn), more: [], diameterMm: meanDiameterMm };
}

export function coilAsWound(record: CoilRecord, { turns, more, diameterMm, taps }: Wound): Coil {
  const { shape } = coilOf(record);
  // Each gap of the plan goes with its tap.
  const gaps = shape.gaps.map(({ turn, gapMm }) => {
    const index = record.windings[0]!.taps.findIndex((tap) => Math.abs(tap.turn - turn) < 1e-6);
    return { turn: index < 0 ? turn : taps[index]!, gapMm };
  });
  return new Coil({ ...shape, meanDiameterMm: diameterMm, turns, gaps: [...gaps, ...more] });
}

export interface Shown {
  readonly meterKhz?: number;
  readonly capacitorsPf?: readonly number[];
  readonly lengths?: boolean;
}

const PLAIN: Omit<Reading, 'quantity' | 'value' | 'tap'> = {
  line: 2,
  written: '',
  capacitancePf: null,
  frequencyKhz: null,
  celsius: null,
  key: null,
  remark: '',
};

/** What meter and capacitors show of it, without any error of theirs. */
export function readingsOf(record: CoilRecord, wound: Wound, shown: Shown = {}, serial = '1'): CoilReadings {
  const coil = coilAsWound(record, wound);
  const { leadPf, celsius, formerLossTangent } = record.surroundings;
  const working = new WorkingCoil(coil, [...wound.taps], { leadPf, celsius, earthed: record.frame.earthedEnd });
  const shop = {
    ...record.shop,
    meterKhz: shown.meterKhz ?? record.shop.meterKhz,
    capacitorsPf: [...(shown.capacitorsPf ?? [])],
  };
  const { meter, resonances } = measuringOf(working, record.windings[0]!.taps, shop, record.spread, formerLossTangent);
  const readings: Reading[] = [];
  const add = (of: Pick<Reading, 'quantity' | 'value' | 'tap'> & Partial<Reading>) =>
    readings.push({ ...PLAIN, written: `${of.value}`, ...of });
  for (const { tap, readingUh } of meter)
    if (readingUh !== null)
      add({ quantity: 'inductance', tap, value: readingUh, frequencyKhz: shop.meterKhz, key: `uh-${tap}` });
  for (const { tap, capacitancePf, frequencyKhz } of resonances)
    add({ quantity: 'resonance', tap, value: frequencyKhz, capacitancePf, key: `khz-${tap}-${capacitancePf}` });
  if (shown.lengths)
    wound.taps.forEach((turn, i) => {
      add({ quantity: 'length', tap: i + 1, value: coil.woundMm(turn), key: `length-${i + 1}` });
    });
  return { serial, readings, dial: [], remarks: [] };
}

export const judged = (record: CoilRecord, coil: CoilReadings, asking = new Asking(record)) =>
  judgeCoil(record, asking, coil);
