/**
 * The file of an old coil, defined once: what was measured of it (`old`), how (`meter`), and what is on hand for its replacement,
 * in the sections of a job. What depends on two keys at once is in `measured.ts`, defaults are in `defaults.ts`.
 */
import * as z from 'zod';
import type { Parsed } from '../../quantity/parse.ts';
import { COVERINGS } from '../../stock/wire.ts';
import { MOST_TURNS, readMaterial, readWireText } from '../coil/schema.ts';
import { choice, count, field, flag, quantity, range, shown } from '../field.ts';
import { readName } from '../name.ts';
import { jobSchema } from '../schema.ts';
import { plain, plainReading, reading, readWritten, valueReader, type Written } from './reading.ts';

const MOST_TAPS = 60;

const turnsNumber = plain(0.25, MOST_TURNS, 'turns', '31 or 20.5');
const perLength = plain(0.1, 1000, 'turns', '54');

/** One or more readings of the same thing. */
function readings(kind: Parameters<typeof valueReader>[0], doc: string) {
  const one = (raw: unknown) => readWritten(raw, valueReader(kind), kind);
  const read = (raw: unknown): Parsed<readonly Written[]> => {
    const found: Written[] = [];
    for (const entry of Array.isArray(raw) ? raw : [raw]) {
      const parsed = one(entry);
      if (!parsed.ok) return parsed;
      found.push(parsed.value);
    }
    if (found.length > 0 && found.length <= 12) return { ok: true, value: found };
    return {
      ok: false,
      got: shown(raw),
      expected: 'one reading, or a list of up to 12',
      todo: 'write each with its unit',
    };
  };
  return field(read, doc, { anyOf: [{ type: 'string' }, { type: 'object' }, { type: 'array' }] });
}

const wireGroup = z
  .strictObject({
    bare: reading('length', 'Diameter of the bare copper.').optional(),
    overall: reading('length', 'Diameter over the covering.').optional(),
    'turns-per-inch': plainReading(
      perLength,
      'turns',
      'Turns of it to the inch, laid side by side: the covered wire.',
    ).optional(),
    'turns-per-cm': plainReading(perLength, 'turns', 'Turns of it to the centimetre, laid side by side.').optional(),
    covering: choice(
      COVERINGS.filter((covering) => !covering.startsWith('litz')),
      'What covers the copper; enamel when left out.',
    ).optional(),
    weight: reading('mass', 'All the wire of the coil, taken off and weighed with its covering.').optional(),
    length: reading('wire', 'All the wire of the coil, taken off and measured.').optional(),
  })
  .describe('The wire as measured; or its size and covering as text, such as 26 AWG single silk.');

const wireText = field(readWireText, 'The wire by size and covering, such as 26 AWG single silk.', { type: 'string' });

/** Counted turns; the word unknown is nothing. */
const readTurns = (raw: unknown): Parsed<Written | null> =>
  raw === 'unknown' || raw === null ? { ok: true, value: null } : readWritten(raw, turnsNumber, 'turns');
const turns = (doc: string) => field(readTurns, doc, { anyOf: [{ type: ['number', 'string'] }, { type: 'object' }] });

const closeOrLength = (raw: unknown): Parsed<Written | 'close'> =>
  raw === 'close' ? { ok: true, value: 'close' } : readWritten(raw, valueReader('length'), 'a length');

const inductance = z
  .strictObject({
    value: quantity('inductance', 'As the meter showed it, the turns beyond the tap open.'),
    uncertainty: z
      .unknown()
      .optional()
      .meta({ description: 'Half of the 95 % limits, beside what meter.accuracy says.' }),
    at: quantity('frequency', 'Frequency of the meter for this reading; meter.frequency when left out.').optional(),
  })
  .describe('Inductance from the start to here, such as 240 uH.');

const resonance = z
  .strictObject({
    frequency: reading('frequency', 'Where it resonates with that capacitor across it.'),
    capacitor: reading('capacitance', 'The known capacitor, its leads counted.'),
  })
  .describe('Resonance with a known capacitor from the start to here, the turns beyond open.');

const electrical = {
  angle: reading('angle', 'Of the tap in the frame, counterclockwise seen from the finish; 0 is the start.', {
    zero: true,
  }).optional(),
  inductance: inductance.optional(),
  resonance: resonance.optional(),
  resistance: reading('resistance', 'DC resistance from the start to here.').optional(),
};

const tapSchema = z.strictObject({
  name: field(readName, 'What it is called on the old set.', { type: 'string', maxLength: 80 }).optional(),
  lost: flag('Nothing of it is left: it is proposed from the pattern of the others.').optional(),
  turns: turns('Turns from the start, counted; or unknown. A fraction is an angle.').optional(),
  position: reading(
    'length',
    'Along the axis, from the middle of the wire at the start to that at the tap.',
  ).optional(),
  ...electrical,
});

const sectionSchema = z.strictObject({
  turns: field(turnsNumber, 'Turns of this section, counted.', { type: 'number' }).optional(),
  'ends-at-tap': count(1, MOST_TAPS, 'Number of the tap in the list at which it ends.').optional(),
  pitch: reading('length', 'Centre to centre within the section.').optional(),
  length: reading('length', 'Instead of pitch: over the wires of the section, edge to edge.').optional(),
  'gap-after': reading('length', 'Clear distance to the next section, edge to edge.', { zero: true }).optional(),
});

const oldKeys = {
  'former-diameter': readings(
    'length',
    'Outside of the form, by caliper; several readings as a list: two at right angles.',
  ).optional(),
  'former-circumference': readings('length', 'Round the form, by a strip of paper.').optional(),
  'over-wire-diameter': readings('length', 'Diameter over the wire, by caliper.').optional(),
  'over-wire-circumference': readings('length', 'Round the winding, by a strip of paper.').optional(),
  'mean-diameter': readings('length', 'Twice the radius of the wire centre.').optional(),
  layers: choice(['single', 'multilayer', 'bank'], 'How it is wound. Only a single layer can be matched.'),
  turns: turns('Turns of the whole coil, counted; or unknown.').optional(),
  pitch: field(closeOrLength, 'Centre to centre, such as 0.6 mm; or close: the turns touch.', {
    anyOf: [{ type: 'string' }, { type: 'object' }],
  }).optional(),
  'turns-per-inch': plainReading(perLength, 'turns', 'Instead of pitch: turns of the winding to the inch.').optional(),
  'turns-per-cm': plainReading(
    perLength,
    'turns',
    'Instead of pitch: turns of the winding to the centimetre.',
  ).optional(),
  'winding-length': reading('length', 'Over all the wires, edge to edge.').optional(),
  sections: z.array(sectionSchema).min(1).max(40).describe('A winding in sections, from the start.').optional(),
  'tap-gap': reading(
    'length',
    'How far a tap pushes the next turn aside; none within a tenth of the wire when left out.',
    { zero: true },
  ).optional(),
  taps: z
    .array(tapSchema)
    .max(MOST_TAPS - 1)
    .describe('From the start, in order; the whole coil is not among them.')
    .optional(),
  whole: z.strictObject(electrical).describe('What was measured over the whole coil.').optional(),
  hand: choice(['right', 'left'], 'Hand of the helix; a right-hand one climbs counterclockwise seen from above.'),
  earthed: choice(['start', 'finish'], 'Which end was earthed; taps are counted from the start.'),
  'former-material': field(readMaterial, 'What the form is made of, for its loss; none leaves that out.', {
    type: 'string',
  }),
  band: range('frequency', 'The band that the set was marked with.').optional(),
};

const meterSchema = z
  .strictObject({
    frequency: quantity('frequency', 'At which the inductance meter measures.'),
    accuracy: quantity('ratio', 'What all its readings may be off together.'),
  })
  .describe('The inductance meter.');

const fitsSchema = z
  .strictObject({
    bore: quantity('length', 'What must go through the new former: a spindle, a second coil.').optional(),
  })
  .describe('What the new former must fit, besides former.longest, former.screw and former.screw-circle.');

export const WAYS = ['as it worked', 'as it was'] as const;

const { want: _, ...jobKeys } = jobSchema.shape;

const asText = <T extends z.ZodType>(old: T) =>
  z
    .strictObject({
      ...jobKeys,
      old,
      meter: meterSchema,
      replacement: choice(
        WAYS,
        'as it worked: every tap has the inductance of the old one; as it was: every tap lies where it lay.',
      ),
      contradictions: choice(['refuse', 'leave out'], 'What to do with a reading that does not go with the others.'),
      fits: fitsSchema,
    })
    .meta({
      title: 'Old coil',
      description: 'An old coil as far as it was measured, and what is on hand for its replacement.',
    });

const oldDoc = 'The old coil, as far as it was measured.';
export const groupFileSchema = asText(z.strictObject({ ...oldKeys, wire: wireGroup }).describe(oldDoc));
export const textFileSchema = asText(z.strictObject({ ...oldKeys, wire: wireText }).describe(oldDoc));

export type ReadOldFile = z.output<typeof groupFileSchema> | z.output<typeof textFileSchema>;
export type ReadOld = ReadOldFile['old'];
