/** Aerial and detector of a job as the record holds them. */
import { DUMMY } from '../around/aerial.ts';
import type { JobAerial, JobDetector } from '../job/around/aerial.ts';
import type { JobContact } from '../job/around/contact.ts';
import { horizontalWireCapacitance, verticalWireCapacitance, wireAerialInductance } from '../physics/aerial.ts';
import { DETECTOR_STATUS, detectorOf } from '../stock/detectors.ts';
import type { AerialEntry, DetectorEntry } from './around-schema.ts';
import { AERIAL_SOURCE, DETECTOR_SOURCE } from './around-words.ts';
import { significant } from './rounding.ts';

const place = (to: JobContact): number | 'second' | null => (to === 'best' ? null : to === 'start' ? 0 : to);

/** `stated` tells whether a key stands in the job, by its dotted name. */
export function aerialEntry(aerial: JobAerial, stated: (key: string) => boolean): AerialEntry {
  const { kind, seriesPf, to } = aerial;
  const both = { kind, seriesPf, to: place(to) };
  if (kind === 'dummy') {
    const { capacitancePf, inductanceUh, resistanceOhm, shunt } = DUMMY;
    return {
      ...both,
      capacitancePf,
      inductanceUh,
      resistanceOhm,
      shunt: shunt && { ...shunt },
      source: AERIAL_SOURCE.dummy,
    };
  }
  const capacitance = aerial.capacitancePf === null ? wireFarad(aerial) : aerial.capacitancePf * 1e-12;
  const { lengthM } = aerial;
  const source = [
    aerial.capacitancePf === null ? AERIAL_SOURCE.wire : AERIAL_SOURCE.measured,
    ...(lengthM === null ? [] : [AERIAL_SOURCE.inductance]),
    AERIAL_SOURCE.resistance(stated('aerial.resistance')),
  ];
  return {
    ...both,
    capacitancePf: significant(capacitance * 1e12, 4),
    inductanceUh: lengthM === null ? 0 : significant(wireAerialInductance(lengthM, capacitance) * 1e6, 4),
    resistanceOhm: aerial.resistanceOhm ?? 0,
    shunt: null,
    source: source.join('; '),
  };
}

/** F of a wire by its sizes; the checks of the job have seen to their being there. */
function wireFarad({ kind, lengthM, heightM, thicknessMm }: JobAerial): number {
  if (lengthM === null || heightM === null || thicknessMm === null)
    throw new Error(`an aerial of kind ${kind} without its sizes passed the reading of the job`);
  const of = kind === 'vertical wire' ? verticalWireCapacitance : horizontalWireCapacitance;
  return of(lengthM, heightM, thicknessMm / 1e3);
}

export function detectorEntry(detector: JobDetector, stated: (key: string) => boolean): DetectorEntry {
  const { kind, resistanceKohm, capacitancePf, to } = detector;
  const typical = detectorOf(kind);
  const given = ['detector.resistance', 'detector.capacitance'].filter(stated).length;
  const source =
    typical === null || given === 2
      ? DETECTOR_SOURCE.stated
      : given === 1
        ? DETECTOR_SOURCE.half(DETECTOR_STATUS)
        : DETECTOR_SOURCE.typical(DETECTOR_STATUS);
  const at = place(to);
  return {
    kind,
    resistanceKohm,
    capacitancePf,
    with: given === 0 ? (typical?.with ?? null) : null,
    to: at === 'second' ? null : at,
    source,
  };
}
