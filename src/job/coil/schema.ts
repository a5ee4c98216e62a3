/**
 * The coil file, defined once: a coil as it was measured, and what it works with. The JSON Schema that editors use and the
 * reader are both made from it. What depends on two keys at once is in `measure.ts`, defaults are in `defaults.ts`.
 */
import * as z from 'zod';
import type { Parsed } from '../../quantity/parse.ts';
import { type FoundWire, findWire } from '../../stock/find.ts';
import { findMaterial } from '../../stock/materials.ts';
import { COVERINGS } from '../../stock/wire.ts';
import { choice, field, listOf, quantities, quantity, range, shown } from '../field.ts';
import { readDate, readName } from '../name.ts';
import { jobSchema } from '../schema.ts';

/** Most turns that the field solution is made for. */
export const MOST_TURNS = 500;
/** Figures are made for frequencies between these. */
export const LOWEST_KHZ = 30;
export const HIGHEST_KHZ = 30_000;

/** A plain number, such as turns; a fraction of a turn is the angle of its end over 360 degrees. */
function plainNumber(low: number, high: number, noun: string, example: string) {
  return (raw: unknown): Parsed<number> => {
    if (typeof raw === 'number' && raw >= low && raw <= high) return { ok: true, value: raw };
    return {
      ok: false,
      got: shown(raw),
      expected: `${noun}, a number from ${low} to ${high}, without a unit`,
      todo: `write a number, such as ${example}`,
    };
  };
}

const readTurns = plainNumber(0.25, MOST_TURNS, 'turns', '100 or 60.5');
const turns = (doc: string) => field(readTurns, doc, { type: 'number', minimum: 0.25, maximum: MOST_TURNS });
const perLength = (doc: string) =>
  field(plainNumber(0.1, 1000, 'turns', '42'), doc, { type: 'number', minimum: 0.1, maximum: 1000 });

const wireGroup = z
  .strictObject({
    bare: quantity('length', 'Diameter of the bare copper; inferred from the overall one when left out.').optional(),
    overall: quantity('length', 'Diameter over the covering; inferred from the bare one when left out.').optional(),
    covering: choice(
      COVERINGS.filter((covering) => !covering.startsWith('litz')),
      'What covers the copper; the nearest in stock when left out.',
    ).optional(),
  })
  .describe('The wire as measured; or its size and covering as text, such as 24 AWG enamel.');

/** A wire by its size and covering in words. */
export const readWireText = (raw: unknown): Parsed<FoundWire> => {
  const found = findWire(String(raw).slice(0, 200));
  return found.ok ? { ok: true, value: found } : found;
};
const wireText = field(readWireText, 'The wire by size and covering, such as 24 AWG enamel.', { type: 'string' });

/** What a former is of; null for none, whose loss is then left out. */
export const readMaterial = (raw: unknown): Parsed<string | null> => {
  if (raw === 'none' || raw === 'air') return { ok: true, value: null };
  const found = findMaterial(typeof raw === 'string' ? raw : '');
  if (found.ok) return { ok: true, value: found.material.name };
  const expected = `none, ${found.expected}`;
  return typeof raw === 'string' ? { ...found, expected } : { ...found, got: shown(raw), expected };
};

const sectionSchema = z.strictObject({
  turns: turns('Turns of this section; whole ones but in the last section.'),
  pitch: quantity('length', 'Centre to centre within the section.').optional(),
  length: quantity(
    'length',
    'Instead of pitch: over the wires of the section, edge to edge, away from where the wire crosses to the next.',
  ).optional(),
  'gap-after': quantity('length', 'Clear distance to the next section, edge to edge; needed in all but the last.', {
    zero: true,
  }).optional(),
});

const coilKeys = {
  'former-diameter': quantity('length', 'Outside diameter of what the wire lies on.').optional(),
  'over-wire-diameter': quantity('length', 'Instead: the diameter over the wire.').optional(),
  'mean-diameter': quantity('length', 'Instead: twice the radius of the wire centre.').optional(),
  turns: turns('Turns of the whole coil; a fraction is the angle of the finish.').optional(),
  pitch: quantity('length', 'Centre to centre, even over the whole coil.').optional(),
  'winding-length': quantity(
    'length',
    'Over the wires, from the outer edge at the start to the outer edge at the finish: turns x pitch + one wire.',
  ).optional(),
  'turns-per-inch': perLength('Instead of pitch: turns to the inch.').optional(),
  'turns-per-cm': perLength('Instead of pitch: turns to the centimetre.').optional(),
  sections: z
    .array(sectionSchema)
    .min(1)
    .max(40)
    .describe('Instead of turns and pitch: a winding in sections, from the start.')
    .optional(),
  taps: listOf(readTurns, 'turns', 'Taps as turns from the start, ascending; the whole coil need not be among them.', {
    type: 'number',
  }).optional(),
  'tap-positions': quantities(
    'length',
    'Instead of taps: along the axis, from the middle of the wire at the start to the middle of the wire at the tap.',
  ).optional(),
  hand: choice(['right', 'left'], 'Hand of the helix; a right-hand one climbs counterclockwise seen from above.'),
  earthed: choice(
    ['start', 'finish'],
    'Which end is earthed; taps are counted from the start. finish: the start is hot, the switch earths the tap in use.',
  ),
  'former-material': field(readMaterial, 'What the former is made of, for its loss; none leaves that out.', {
    type: 'string',
  }),
};

const spreadSchema = z
  .strictObject({
    diameter: quantity('length', 'How well the diameter is known, plus or minus.'),
    pitch: quantity('ratio', 'How well pitch or winding length is known, plus or minus.'),
    bare: quantity('ratio', 'How well the bare wire is known, plus or minus.'),
    tap: quantity('angle', 'How well the place of a tap along the wire is known, plus or minus.').optional(),
  })
  .describe('Uncertainty of the measurements, 95 % limits; the limits of the figures follow from it.');

const asText = <T extends z.ZodType>(coil: T) =>
  z
    .strictObject({
      $schema: z.unknown().optional().meta({ description: 'For editors; not read.', type: 'string' }),
      name: field(readName, 'Name of the coil; that of the file when left out. job may stand for name.', {
        type: 'string',
        minLength: 1,
        maxLength: 80,
      }),
      job: field(readName, 'The same as name.', { type: 'string', minLength: 1, maxLength: 80 }).optional(),
      date: field(readDate, 'Printed on the sheet, as YYYY-MM-DD; none when left out.', {
        type: 'string',
        format: 'date',
      }).optional(),
      paper: choice(['A4', 'Letter'], 'Paper of the sheet.'),
      coil,
      set: jobSchema.shape.set,
      band: range('frequency', 'The band that the set should tune; marked in the chart.').optional(),
      at: quantity('frequency', 'Frequency of the figures; the middle of each range when there is a set.').optional(),
      temperature: quantity('temperature', 'Temperature of the copper.'),
      spread: spreadSchema,
    })
    .meta({
      title: 'Measured coil',
      description: 'A coil as it was measured, and what it works with. Every quantity carries its unit.',
    });

const coilDoc = 'The coil as measured.';

/** For a file whose wire is a group of diameters. */
export const groupFileSchema = asText(z.strictObject({ ...coilKeys, wire: wireGroup }).describe(coilDoc));
/** For a file whose wire is named in words. */
export const textFileSchema = asText(z.strictObject({ ...coilKeys, wire: wireText }).describe(coilDoc));

export type ReadCoilFile = z.output<typeof groupFileSchema> | z.output<typeof textFileSchema>;
export type ReadCoil = ReadCoilFile['coil'];
export type ReadSection = z.output<typeof sectionSchema>;
