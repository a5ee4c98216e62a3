/** Second winding, aerial, detector and their contacts of a record, for whoever writes or works out the whole arrangement. */
import { type AerialCircuit, type AerialElement, aerialElements, aerialImpedance } from '../around/aerial.ts';
import type { Load } from '../around/response.ts';
import { BETWEEN_PERMITTIVITY } from '../around/second-side.ts';
import type { Arrangement } from '../around/table.ts';
import { Coil } from '../coil/coil.ts';
import { CoilPair } from '../coil/pair.ts';
import { findWire } from '../stock/find.ts';
import type { AerialAt, Around, DetectorEntry, SecondEntry } from './around-schema.ts';
import { workingCoilOf } from './rebuild.ts';
import type { FiguresRecord } from './survey-schema.ts';

/** Stands for no aerial: next to nothing, at the hot end. */
export const NO_AERIAL: AerialCircuit = {
  resistanceOhm: 0,
  inductanceUh: 0,
  capacitancePf: 0.01,
  shunt: null,
  seriesPf: null,
};

/** Stands for no detector, ohm. */
const NO_LOAD_OHM = 1e6;

export const loadOf = (detector: Pick<DetectorEntry, 'resistanceKohm' | 'capacitancePf'> | null): Load => ({
  conductance: 1 / (detector === null ? NO_LOAD_OHM : detector.resistanceKohm * 1e3),
  capacitance: (detector?.capacitancePf ?? 0) * 1e-12,
});

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

/** The second winding where the record has its turns, at the tightest place. */
function secondCoilOf({ wire: { name }, turnPositionsMm, ...shape }: SecondEntry): Coil {
  const found = findWire(name);
  if (!found.ok) throw new RangeError(`no wire ${name} is known`);
  const { meanDiameterMm, pitchMm, turns, startMm } = shape;
  return new Coil({ wire: found.wire, meanDiameterMm, pitchMm, turns, gaps: [], startMm }, turnPositionsMm);
}

/**
 * What the table of a record was worked out from, to the record's own rounding. Without a set any capacitance will do.
 * @throws RangeError for a record without `around`
 */
export function setOf(record: FiguresRecord): Arrangement {
  const { around, demand, surroundings } = record;
  if (around === undefined) throw new RangeError('a record without a set around the coil');
  const { second, aerial, detector } = around;
  const coil = workingCoilOf(record);
  return {
    coil,
    rest: surroundings.rest,
    lossTangent: surroundings.formerLossTangent,
    second:
      second === null ? null : { pair: new CoilPair(coil, secondCoilOf(second)), permittivity: BETWEEN_PERMITTIVITY },
    capacitorLowPf: demand.set?.capacitorLowPf ?? 0,
    capacitorHighPf: demand.set?.capacitorHighPf ?? Number.POSITIVE_INFINITY,
    strayPf: (demand.set?.strayPf ?? 0) + (demand.set?.aerialPf ?? 0),
    source: aerialImpedance(aerial ?? NO_AERIAL),
    load: loadOf(detector),
  };
}
