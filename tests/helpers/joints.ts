/** Sample records of coils too long for a printer, with and without their joints. */
import * as fc from 'fast-check';
import { axialAt } from '../../src/coil/layout.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { type Split, splitOf } from '../../src/solve/joints.ts';
import { type SampleOptions, sampleRecord } from './sample.ts';

export const axialOf = ({ windings: [winding] }: CoilRecord) => {
  const { turnPositionsMm, turns, pitchMm } = winding!;
  return (turn: number) => axialAt(turnPositionsMm, turns, pitchMm, turn);
};

export function splitFor(record: CoilRecord, heightMm: number): Split {
  return splitOf({
    former: record.former,
    holes: record.holes,
    hand: record.frame.hand,
    overallMm: record.windings[0]!.wire.overallMm,
    axialMm: axialOf(record),
    mostMm: 1e4,
    printer: { ...record.printer, heightMm },
  });
}

/** The record with its former split for a printer of that height. */
export function splitRecord(record: CoilRecord, heightMm: number): CoilRecord {
  const split = splitFor(record, heightMm);
  if ('none' in split) throw new Error(split.none);
  const { former, printer } = record;
  return { ...record, former: { ...former, joints: split.joints }, printer: { ...printer, heightMm } };
}

export interface Long {
  readonly options: SampleOptions;
  /** Height of the printer as a share of the former's length. */
  readonly share: number;
}

/** Coils grooved and close, of both hands, with gaps or without, on formers one to three times as tall as the printer. */
export const longCoils: fc.Arbitrary<Long> = fc
  .record({
    hand: fc.constantFrom('right' as const, 'left' as const),
    surface: fc.constantFrom('grooved' as const, 'smooth' as const),
    lengthMm: fc.double({ min: 65, max: 130, noNaN: true }),
    pitchMm: fc.double({ min: 1, max: 2, noNaN: true }),
    wireMm: fc.double({ min: 0.45, max: 0.7, noNaN: true }),
    diameterMm: fc.double({ min: 30, max: 70, noNaN: true }),
    taps: fc.array(fc.double({ min: 0.03, max: 0.93, noNaN: true }), { minLength: 1, maxLength: 5 }),
    gapMm: fc.constantFrom(0, 0.7),
    flanges: fc.boolean(),
    ears: fc.boolean(),
    share: fc.double({ min: 0.45, max: 0.9, noNaN: true }),
  })
  .map(({ lengthMm, pitchMm, wireMm, taps, share, ...rest }) => {
    const overallMm = Math.round(wireMm * 1000) / 1000;
    const pitch = rest.surface === 'smooth' ? overallMm * 1.02 : Math.round(pitchMm * 100) / 100;
    const turns = Math.round((100 * lengthMm) / pitch) / 100;
    const places = taps.map((tap) => Math.round(8 * tap * turns) / 8).sort((a, b) => a - b);
    const apart = places.filter((turn, i) => i === 0 || (turn - places[i - 1]!) * pitch > 3);
    const diameterMm = Math.round(rest.diameterMm * 10) / 10;
    return { options: { ...rest, diameterMm, overallMm, pitchMm: pitch, turns: [...apart, turns] }, share };
  });

/** A coarse record of it: chords within 0.035 mm. */
export function longRecord({ options }: Long): CoilRecord {
  const record = sampleRecord(options);
  return { ...record, former: { ...record.former, segments: 72 } };
}
