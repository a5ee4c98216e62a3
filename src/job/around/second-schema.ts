/** Keys of the second winding: an aerial or coupling coil beside the tapped one. */
import * as z from 'zod';
import { type Parsed, parseQuantity, type Range } from '../../quantity/parse.ts';
import { isRange, parseRange } from '../../quantity/range.ts';
import { SECOND_KINDS } from '../../record/around-schema.ts';
import { choice, choiceOrLength, count, field, quantity, shown } from '../field.ts';
import { readWire } from '../wire-field.ts';

/** Most turns of a second winding. */
export const MOST_SECOND_TURNS = 500;
/** Weaker is no coupling that anyone could set; tighter no two windings on formers of their own reach. */
export const COUPLINGS = { least: 0.001, most: 0.95 } as const;

const EXPECTED = 'a coupling coefficient such as 0.2, or a range such as 0.05 to 0.3 for a winding that slides';

/** One coupling, or a range; both as ends, equal for one. */
function readCoupling(raw: unknown): Parsed<Range> {
  const refused = (got: string, todo: string) => ({ ok: false, got, expected: EXPECTED, todo }) as const;
  if (typeof raw !== 'string' && typeof raw !== 'number')
    return refused(shown(raw), 'write one number, or two with "to" between');
  const written = String(raw);
  const one = isRange(written) ? null : parseQuantity(written, 'ratio');
  if (one?.ok === false)
    return refused(one.got, `write a number from ${COUPLINGS.least} to ${COUPLINGS.most}, or two with "to" between`);
  const both = one === null ? parseRange(written, 'ratio') : null;
  if (both?.ok === false) return { ...both, expected: EXPECTED };
  const found = both?.ok ? both.value : { low: one!.value, high: one!.value };
  const { least, most } = COUPLINGS;
  if (found.low < least) return refused(`a coupling of ${found.low}`, `write ${least} or more`);
  if (found.high > most) return refused(`a coupling of ${found.high}`, `write ${most} or less`);
  return { ok: true, value: found };
}

export const secondSchema = z
  .strictObject({
    kind: choice(
      SECOND_KINDS,
      'Where it is wound. same former: beyond an end of the main winding. sleeve: on a tube over it. inner: on a smaller former in the bore. beside: on a former of its own on the same axis.',
    ),
    coupling: field(
      readCoupling,
      'Coupling coefficient with the whole coil: "0.2"; or a range "0.05 to 0.3": then it slides (sleeve, inner, beside).',
      { type: ['string', 'number'] },
    ).optional(),
    turns: count(1, MOST_SECOND_TURNS, 'Its turns; chosen for the coupling when left out.').optional(),
    inductance: quantity('inductance', 'Its inductance alone, in place of its turns; met by whole turns.').optional(),
    wire: field(readWire, 'Its wire, "32 AWG enamel"; that of the main winding when left out.', {
      type: 'string',
    }).optional(),
    pitch: choiceOrLength(['close'], 'Close wound, or a pitch centre to centre.'),
    end: choice(
      ['start', 'finish'],
      'The end of the main winding towards which it lies. The earthed end; the finish when it slides or stands beside.',
    ),
    distance: quantity(
      'length',
      'Edge to edge of the two windings, for same former and beside. The least that there can be, or what gives the coupling, when left out.',
      { zero: true },
    ).optional(),
  })
  .describe('A second winding on the same axis, for the aerial or to couple by.');
