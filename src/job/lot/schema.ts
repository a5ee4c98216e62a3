/**
 * The lot file, defined once: keys, meaning, units. The JSON Schema that editors use and the reader are both made from it.
 * What depends on two keys at once is in `read.ts`, `entries.ts` and `serials.ts`, the table of jobs in CSV in `orders.ts`.
 */
import * as z from 'zod';
import { type Parsed, parseQuantity } from '../../quantity/parse.ts';
import { choice, count, field, quantity, shown, size } from '../field.ts';
import { readDate, readName } from '../name.ts';
import { readWire } from '../schema.ts';
import { readPath } from './path.ts';
import { LARGEST_NUMBER, MOST_COILS, readNumbering, readPattern } from './serials.ts';

export const JIGS = ['once', 'none'] as const;

/** Metres, or grams to be turned into metres once the wire is known. */
export type Left = { readonly m: number } | { readonly g: number };

function readLeft(raw: unknown): Parsed<Left> {
  const expected = 'a length of wire or its weight without the reel, such as 120 m or 250 g';
  if (typeof raw !== 'string') return { ok: false, got: shown(raw), expected, todo: 'write one number and its unit' };
  const metres = parseQuantity(raw, 'wire');
  if (metres.ok) return { ok: true, value: { m: metres.value } };
  const grams = parseQuantity(raw, 'mass');
  if (grams.ok) return { ok: true, value: { g: grams.value } };
  // Whichever got further: the unit of a weight, or else a length.
  const refused = metres.got.includes('measures a weight') ? grams : metres;
  return { ...refused, expected };
}

const nameField = (doc: string) => field(readName, doc, { type: 'string', minLength: 1, maxLength: 80 });

const coilsDoc = 'The jobs of the lot and how many coils of each; or the name of a CSV file with such a table.';
const jobOf = (doc: string) => field(readPath, doc, { type: 'string', minLength: 1 });

const entrySchema = z.strictObject({
  job: jobOf('Job file, from the folder of the lot file.'),
  quantity: count(
    1,
    MOST_COILS,
    'How many coils of it; as many as there are serials when these are listed.',
  ).optional(),
  serials: field(readNumbering, 'Pattern for these coils alone, or a list with one serial a coil.', {
    anyOf: [{ type: 'string' }, { type: 'array', items: { type: 'string' }, minItems: 1, maxItems: MOST_COILS }],
  }).optional(),
  'first-serial': count(
    0,
    LARGEST_NUMBER,
    'Number of its first coil; on from the coils before when left out.',
  ).optional(),
});

const spoolSchema = z.strictObject({
  name: nameField('As written on the reel.'),
  wire: field(readWire, 'Size and covering, such as 0.5 mm enamel.', { type: 'string' }),
  left: field(
    readLeft,
    'What is on it: metres or feet; or the weight of the wire without the reel, in grams or ounces, such as 120 m or 250 g.',
    {
      type: 'string',
    },
  ),
});

const printerSchema = z.strictObject({
  name: nameField('What the machine is called on the run list.'),
  bed: size('Bed, width x depth.'),
  height: quantity('length', 'Tallest part.'),
  count: count(1, 100, 'How many of them there are; 1 when left out.').optional(),
});

const asText = <T extends z.ZodType>(coils: T) =>
  z
    .strictObject({
      $schema: z.unknown().optional().meta({ description: 'For editors; not read.', type: 'string' }),
      lot: nameField('Name of the lot, and of its output folder; that of the file when left out.'),
      date: field(readDate, 'Printed on all papers in place of the date of the jobs, as YYYY-MM-DD.', {
        type: 'string',
        format: 'date',
      }).optional(),
      paper: choice(
        ['A4', 'Letter'],
        'Paper of all sheets, in place of that of the jobs; that of the first job when left out.',
      ).optional(),
      'checked-by': nameField('Who checks the finished coils, printed at the foot of the travellers.').optional(),
      serials: field(
        readPattern,
        'Pattern of the serials: one run of # is replaced by the number. Initials of the lot and three # or more when left out.',
        { type: 'string' },
      ).optional(),
      'first-serial': count(0, LARGEST_NUMBER, 'Number of the first coil.'),
      coils,
      spools: z
        .array(spoolSchema)
        .min(1)
        .max(1000)
        .describe(
          'The reels on the shelf; without them all wire is to be bought. A job without wire chooses among theirs.',
        )
        .optional(),
      printers: z
        .array(printerSchema)
        .min(1)
        .max(100)
        .describe(
          'The printers; the tallest, then widest, sets bed and height of every job. Those of the jobs when left out.',
        )
        .optional(),
      jigs: choice(JIGS, 'Arbor, comb and other jigs: once for each kind that needs them, or none at all.'),
    })
    .meta({
      title: 'Coil lot',
      description: 'Coils that are made together: jobs with quantities, serials, reels and printers.',
    });

/** For a lot whose coils are listed in it. */
export const listedLotSchema = asText(z.array(entrySchema).min(1).max(MOST_COILS).describe(coilsDoc));
/** For a lot whose coils are in a table of their own. */
export const tabledLotSchema = asText(jobOf(coilsDoc));

export type ReadLotFile = z.output<typeof listedLotSchema> | z.output<typeof tabledLotSchema>;
export type ReadEntry = z.output<typeof entrySchema>;

/** What is taken when a key is left out. */
export const LOT_DEFAULTS = { 'first-serial': 1, jigs: 'once' } as const;
