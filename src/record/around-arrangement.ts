/** Aerial, detector and their contacts of a record as plain data, for whoever writes or works out the whole arrangement. */
import { type AerialElement, aerialElements } from '../around/aerial.ts';
import type { AerialAt, Around } from './around-schema.ts';

export interface ArrangementEntry {
  /** From `source` to `contact`; empty without an aerial. */
  readonly aerial: readonly AerialElement[];
  readonly aerialAt: AerialAt;
  /** ohm and F to earth; null without a detector. */
  readonly detector: { readonly resistance: number; readonly capacitance: number } | null;
  readonly detectorAt: number | null;
}

/** With the contacts of a use of the record, the balanced one when left out; those of the job where it names them. */
export function arrangementOf(around: Around, use: Around['best'][number]['use'] = 'balanced'): ArrangementEntry {
  const { aerial, detector, best } = around;
  const chosen = best.find((one) => one.use === use) ?? null;
  return {
    aerial: aerial === null ? [] : aerialElements(aerial),
    aerialAt: aerial === null ? null : (aerial.to ?? chosen?.aerial ?? null),
    detector:
      detector === null
        ? null
        : { resistance: detector.resistanceKohm * 1e3, capacitance: detector.capacitancePf * 1e-12 },
    detectorAt: detector?.to ?? chosen?.detector ?? null,
  };
}
