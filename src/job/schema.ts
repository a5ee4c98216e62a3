/**
 * The job file, defined once: keys, meaning, units. The JSON Schema that editors use and the reader of jobs
 * are both made from it. Whatever depends on two keys at once is in `checks.ts`; what is taken when a key is left out
 * is in `defaults.ts`.
 */
import * as z from 'zod';
import type { Parsed } from '../quantity/parse.ts';
import { findMaterial } from '../stock/materials.ts';
import { aerialSchema, detectorSchema } from './around/aerial-schema.ts';
import { secondSchema } from './around/second-schema.ts';
import {
  choice,
  choiceOr,
  choiceOrLength,
  choiceOrList,
  count,
  field,
  flag,
  listOf,
  quantities,
  quantity,
  range,
  readChoice,
  scales,
  shown,
  size,
  values,
} from './field.ts';
import { readDate, readName } from './name.ts';
import { readWire } from './wire-field.ts';

export { readWire } from './wire-field.ts';

export const SPACINGS = ['even ratio', 'even turns', 'even frequency'] as const;
export const SWITCHES = ['open', 'shorted', 'shorted in sections', 'disconnected'] as const;
export const TAP_METHODS = ['auto', 'twisted loop', 'lifted turn', 'cut pair', 'lug', 'drawn in'] as const;
export const TAP_LAYOUTS = ['auto', 'in line', 'staggered'] as const;
export const BODIES = ['full', 'ribbed'] as const;
export const MOUNTINGS = ['ears', 'base', 'none'] as const;
/** What can be printed; `all` in a job stands for every one that suits its former. */
export const PARTS = [
  'former',
  'second former',
  'carriage',
  'arbor',
  'stand',
  'saddle',
  'comb',
  'loop gauge',
  'coupon',
] as const;
/** Of these every coil has its own; the others are jigs that serve any number of them. */
export const COIL_PARTS: readonly (typeof PARTS)[number][] = ['former', 'second former', 'carriage'];
export const SHAFTS = ['round', 'hexagon'] as const;
export const UNITS = ['metric', 'inch', 'both'] as const;
export const PREFERENCES = ['least loss', 'compact', 'least wire', 'closest taps'] as const;
/** Most switch positions of one coil. */
export const MOST_TAPS = 60;
/** Most contacts of a units switch. */
const MOST_UNITS = 20;

const wantSchema = z
  .strictObject({
    inductance: values(
      'inductance',
      'A range "20 uH to 240 uH", shared out among the taps by spacing; or a list, one inductance a tap, lowest first.',
    ).optional(),
    band: range(
      'frequency',
      'The band the set must tune, all positions together, "530 kHz to 1700 kHz". Needs set.',
    ).optional(),
    overlap: quantity(
      'ratio',
      'How far, in frequency, one position must reach into the next: "5 %". For a band. 5 % when taps are left out, else 0 %.',
      { zero: true },
    ).optional(),
    taps: count(
      1,
      MOST_TAPS,
      'Switch positions, the whole coil included. For a band it may be left out: then the fewest that give the overlap.',
    ).optional(),
    spacing: choiceOrList(
      SPACINGS,
      'inductance',
      'How the taps share out the range: by even ratio, turns or frequency; or a list of inductances, lowest first.',
    ).optional(),
  })
  .describe('What the coil must do: an inductance range, a list of inductances, or a band.');

const setSchema = z
  .strictObject({
    capacitor: range('capacitance', 'Tuning capacitor, least to greatest: "15 pF to 380 pF".'),
    stray: quantity('capacitance', 'Wiring, valve and switch, always across the coil.', { zero: true }),
    aerial: quantity('capacitance', 'What the aerial adds across the coil.', { zero: true }),
    switch: choice(SWITCHES, 'What the range switch does with the turns that are not in use.'),
    lead: quantity('capacitance', 'Lead and switch contact of each tap to earth.', { zero: true }),
  })
  .describe('The receiver that the coil goes into; needed for a band.');

const readMaterial = (raw: unknown): Parsed<string> => {
  const found = findMaterial(typeof raw === 'string' ? raw : '');
  if (found.ok) return { ok: true, value: found.material.name };
  return typeof raw === 'string' ? found : { ...found, got: shown(raw) };
};

const formerSchema = z
  .strictObject({
    kind: choice(['printed', 'tube'], 'Printed for this coil, or a tube that is bought or found.'),
    'outside-diameter': values(
      'length',
      'One diameter, a range "60 mm to 90 mm", or a list of those on hand. Needed for a tube; 50 mm to 90 mm when printed.',
    ),
    longest: quantity(
      'length',
      'The whole former at most, ends included. The height of the printer when printed, else 200 mm.',
    ),
    wall: quantity(
      'length',
      'Wall thickness. Derived from the line width when printed and left out; 1.5 mm for a tube.',
    ).optional(),
    material: field(readMaterial, 'What the former is made of. PLA when printed, card for a tube.', { type: 'string' }),
    body: choice(
      BODIES,
      'Of a printed former. full: a wall all round. ribbed: end rings and ribs with a notch a turn, so that little plastic stands in the field.',
    ).optional(),
    ribs: count(6, 24, 'How many ribs a ribbed former has; 12 when left out.').optional(),
    mounting: choice(
      MOUNTINGS,
      'Ears with a hole for a screw, a round base with a ring of holes, or none. Ears when printed, none on a tube.',
    ),
    screw: quantity(
      'length',
      'Holes for the mounting screws, as they should come out; 4.4 mm when left out.',
    ).optional(),
    'screw-circle': quantity(
      'length',
      'Diameter of the circle on which the mounting screws stand; as near to the former as they can when left out.',
    ).optional(),
    flanges: flag('Rims at both ends. True when printed, false on a tube.'),
  })
  .describe('What the wire is wound on.');

const windingSchema = z
  .strictObject({
    hand: choice(['right', 'left'], 'Hand of the helix; a right-hand one climbs counterclockwise seen from above.'),
    earthed: choice(
      ['start', 'finish'],
      'Which end is earthed; taps are counted from the start. finish: the start is hot, the switch earths the tap in use.',
    ),
    pitch: choiceOrLength(
      ['any', 'close', 'spaced'],
      'Close wound, spaced, whichever is better, or a pitch centre to centre such as 0.6 mm.',
    ),
    spacers: quantities(
      'length',
      'Thicknesses of what can be wound along as a spacer; all in stock when left out.',
    ).optional(),
    'tap-method': choice(TAP_METHODS, 'How taps are made; auto goes by covering and pitch.'),
    'tap-layout': choice(TAP_LAYOUTS, 'Taps in one line are whole turns; staggered ones may be fractions of a turn.'),
    units: count(
      2,
      MOST_UNITS,
      'Two switches: contacts of the units switch, a turn apart from the start on; want.taps are then the tens, so many turns apart.',
    ).optional(),
    'finish-trim': flag('Spare finish holes for a turn more or less.'),
  })
  .describe('How it is wound.');

const printerSchema = z
  .strictObject({
    bed: size('Bed, width x depth.'),
    height: quantity('length', 'Tallest part.'),
    nozzle: quantity('length', 'Nozzle bore.'),
    line: quantity('length', 'Width of a printed line. 1.125 of the nozzle when left out.'),
    layer: quantity('length', 'Layer height. Half of the nozzle when left out.'),
    'hole-compensation': quantity('length', 'Added to the diameter of every hole, because holes print small.', {
      zero: true,
      negative: true,
    }),
    clearance: quantity('length', 'Gap, on diameter, between printed parts that go into one another.'),
    scale: scales('What a part is enlarged by against its shrinking: one scale, or one each for x, y and z.'),
    material: field(readMaterial, 'What jigs are printed of, and the former unless former.material says else.', {
      type: 'string',
    }),
  })
  .describe('The printer, for a printed former and for jigs.');

const partsField = listOf(
  (raw) => readChoice(raw, [...PARTS, 'all'] as const),
  'a part',
  `What is printed: ${PARTS.join(', ')}; or all. What suits the former when left out.`,
  { enum: [...PARTS, 'all'] },
).optional();

const shopSchema = z
  .strictObject({
    shaft: quantity('length', 'Shaft of the arbor: diameter, or across the flats.'),
    'shaft-form': choice(SHAFTS, 'A round shaft or a hexagon.'),
    spool: size('Largest wire spool: diameter x width.'),
    'spool-bore': quantity('length', 'Hole of the wire spool.'),
    meter: quantity('frequency', 'Frequency at which the inductance meter measures.'),
    'meter-name': field(readName, 'What the meter is called on the sheets.', { type: 'string' }).optional(),
    'meter-accuracy': quantity('ratio', 'Its accuracy, of the reading.'),
    capacitors: quantities(
      'capacitance',
      'Known capacitors to measure resonance with; two or more, the smaller and the greater far apart, for the two-capacitor method.',
    ),
    'capacitor-tolerance': quantity('ratio', 'How well they are known.'),
    generator: quantity('resistance', 'Of the source of the signal generator: 50 ohm, or 600 ohm of an older one.'),
    'generator-coupling': choiceOr(
      ['loop'],
      'capacitance',
      'What it is coupled to the hot end by: a capacitance such as 1 pF, or loop for one so loose that it loads nothing.',
    ),
    'probe-capacitance': quantity(
      'capacitance',
      'Of the oscilloscope probe, which lies at the hot end; 0 pF without.',
      {
        zero: true,
      },
    ),
    'probe-resistance': quantity(
      'resistance',
      'Of the probe. At radio frequency it is far below that at DC: its data sheet tells.',
    ),
  })
  .describe('What is on the bench: for arbor and winding stand, and to measure with.');

const asMadeSchema = z
  .strictObject({
    diameter: quantity(
      'length',
      'What the mean diameter of the turns comes out larger than planned, or smaller with a minus.',
      { zero: true, negative: true },
    ),
    pitch: quantity(
      'ratio',
      'What the pitch of turns that are laid by hand comes out larger than planned, or smaller with a minus.',
      { zero: true, negative: true },
    ),
  })
  .describe('What this bench makes of a plan, from finished coils: the next is designed as it will come out.');

export const jobSchema = z
  .strictObject({
    $schema: z.unknown().optional().meta({ description: 'For editors; not read.', type: 'string' }),
    job: field(readName, 'Name of the job; the output folder is named after it.', {
      type: 'string',
      minLength: 1,
      maxLength: 80,
    }),
    date: field(readDate, 'Printed on the sheets, as YYYY-MM-DD; none when left out.', {
      type: 'string',
      format: 'date',
    }).optional(),
    paper: choice(['A4', 'Letter'], 'Paper of sheets and templates.'),
    units: choice(UNITS, 'Lengths on the sheets in millimetres, in inches, or in both where a shop would want both.'),
    want: wantSchema,
    set: setSchema.optional(),
    former: formerSchema,
    wire: listOf(readWire, 'a wire', 'The wires to choose from, "24 AWG enamel"; all in stock when left out.', {
      type: 'string',
    }).optional(),
    winding: windingSchema,
    second: secondSchema.optional(),
    aerial: aerialSchema.optional(),
    detector: detectorSchema.optional(),
    prefer: choice(PREFERENCES, 'What the best coil is.'),
    at: quantity('frequency', 'Frequency at which losses are compared when there is no set.').optional(),
    temperature: quantity('temperature', 'Temperature of the copper at work.'),
    printer: printerSchema,
    shop: shopSchema,
    'as-made': asMadeSchema.optional(),
    parts: partsField,
  })
  .meta({
    title: 'Coil job',
    description: 'What a coil must do and what it may be made of. Every quantity carries its unit.',
  });

/** A job as read: complete, in the units of the code, not yet checked across keys. */
export type ReadJob = z.output<typeof jobSchema>;
