/** A record's coil as a value again, its turns at the places that the record states: what is reckoned anew comes from here. */
import { Coil } from '../coil/coil.ts';
import { WorkingCoil } from '../coil/working-coil.ts';
import type { FiguresRecord } from './survey-schema.ts';

/** The first winding of a record. Agrees with the coil that the record was made of to the record's own rounding. */
export function coilOf(record: Pick<FiguresRecord, 'windings'>): Coil {
  const winding = record.windings[0];
  if (winding === undefined) throw new RangeError('a record has a winding');
  const { wire, meanDiameterMm, corners, bendMm, pitchMm, turns, startMm, taps, unitTaps = [] } = winding;
  const gaps = [...unitTaps, ...taps].filter(({ gapMm }) => gapMm > 0).map(({ turn, gapMm }) => ({ turn, gapMm }));
  const shape = { wire, meanDiameterMm, corners, bendMm, pitchMm, turns, gaps, startMm };
  return new Coil(shape, winding.turnPositionsMm);
}

/** The same at work. */
export function workingCoilOf(record: Pick<FiguresRecord, 'windings' | 'surroundings' | 'frame'>): WorkingCoil {
  const coil = coilOf(record);
  const { taps, unitTaps = [] } = record.windings[0]!;
  const { leadPf, celsius } = record.surroundings;
  return new WorkingCoil(
    coil,
    taps.map(({ turn }) => turn),
    { leadPf, celsius, earthed: record.frame.earthedEnd },
    unitTaps.map(({ turn }) => turn),
  );
}
