/** A record's coil as a value again, its turns at the places that the record states: what is reckoned anew comes from here. */
import { Coil } from '../coil/coil.ts';
import { WorkingCoil } from '../coil/working-coil.ts';
import type { FiguresRecord } from './survey-schema.ts';

/** The first winding of a record, at work. Agrees with the coil that the record was made of to the record's own rounding. */
export function workingCoilOf(record: Pick<FiguresRecord, 'windings' | 'surroundings' | 'frame'>): WorkingCoil {
  const winding = record.windings[0];
  if (winding === undefined) throw new RangeError('a record has a winding');
  const {
    wire,
    meanDiameterMm,
    corners,
    bendMm,
    pitchMm,
    turns,
    startMm,
    taps,
    unitTaps = [],
    turnPositionsMm,
  } = winding;
  const gaps = [...unitTaps, ...taps].filter(({ gapMm }) => gapMm > 0).map(({ turn, gapMm }) => ({ turn, gapMm }));
  const { leadPf, celsius } = record.surroundings;
  return new WorkingCoil(
    new Coil({ wire, meanDiameterMm, corners, bendMm, pitchMm, turns, gaps, startMm }, turnPositionsMm),
    taps.map(({ turn }) => turn),
    { leadPf, celsius, earthed: record.frame.earthedEnd },
    unitTaps.map(({ turn }) => turn),
  );
}
