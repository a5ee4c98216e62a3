/** How the figures of one tap come about. Everything is worked out anew from the record alone. */
import { Fault } from '../fault.ts';
import { workingCoilOf } from '../record/rebuild.ts';
import { capacitanceFigure } from './capacitance.ts';
import type { ExplainedRecord, Explanation, Subject } from './explanation.ts';
import { ringFigure, sheetFigure, wheelerFigure } from './inductance.ts';
import { limitFigures } from './limits.ts';
import { lossFigures } from './loss.ts';
import { angleFigure, dcFigure, positionFigure, wireFigure } from './place.ts';
import { rangeFigures } from './range.ts';

export type { ExplainedRecord, Explanation, Figure, Input, Step } from './explanation.ts';

/** Explains a tap by its number, as typed or as a number. Fault of exit 2 when the coil has no such tap. */
export function explainTap(record: ExplainedRecord, asked: string | number): Explanation {
  const winding = record.windings[0];
  if (winding === undefined) throw new RangeError('a record has a winding');
  const tap = winding.taps.find((one) => String(one.tap) === String(asked).trim());
  if (tap === undefined) {
    const numbers = winding.taps.map((one) => one.tap).join(', ');
    throw new Fault(2, {
      code: 'no-such-tap',
      place: { key: '--explain' },
      got: String(asked).trim() === '' ? 'nothing' : `tap ${String(asked).slice(0, 40)}`,
      expected: `one of the taps ${numbers}`,
      todo: 'name a tap by its number; the last is the whole coil',
    });
  }
  const subject: Subject = { record, winding, tap, coil: workingCoilOf(record) };
  const byHand = tap.turn >= 1 ? [sheetFigure(subject), wheelerFigure(subject)] : [];
  return {
    job: record.job,
    hash: record.hash,
    tap: tap.tap,
    turn: tap.turn,
    figures: [
      positionFigure(subject),
      angleFigure(subject),
      wireFigure(subject),
      dcFigure(subject),
      ...byHand,
      ringFigure(subject),
      ...limitFigures(subject),
      capacitanceFigure(subject),
      ...rangeFigures(subject),
      ...lossFigures(subject),
    ],
  };
}
