/** The record of a proof, `proof.json`. Numbers are rounded once, when it is made. Keys end in their unit. */
import * as z from 'zod';
import { chartSchema, dialSchema } from './charts-schema.ts';
import { systematicSchema } from './systematic-schema.ts';

const text = z.string();
const num = z.number();

/** Of a tap and of a coil; what each means stands on the sheet (`templates/wording/proof.ts`). */
export const STATES = ['pass', 'fail', 'missing'] as const;

const noteSchema = z.strictObject({
  line: num.int(),
  column: text.nullable(),
  code: text,
  fate: z.enum(['left out', 'kept']),
  figures: num.int().describe('that are left out by this note'),
  got: text,
  expected: text,
  todo: text,
});

const judgedSchema = z.strictObject({
  line: num.int().describe('of the file'),
  quantity: z.enum([
    'diameter',
    'length',
    'resistance',
    'inductance',
    'resonance',
    'probed resonance',
    'width',
    'other',
    'turns',
  ]),
  what: text.describe('in words'),
  key: text.nullable().describe('of the question at the bench, where it asks the same'),
  written: text,
  value: num,
  unit: text,
  capacitancePf: num.nullable(),
  frequencyKhz: num.nullable(),
  celsius: num.nullable(),
  low: num.nullable().describe('limits as they were held against the reading'),
  nominal: num.nullable(),
  high: num.nullable(),
  deviationPercent: num.nullable(),
  verdict: z.enum(['pass', 'low', 'high', 'implausible', 'not judged']),
  trusted: z
    .boolean()
    .describe(
      'false: the meter is not to be trusted at this tap, or a width is not twice its upper limit; outside its limits it fails nothing',
    ),
  advice: z.array(text),
  remark: text,
});

const lineSchema = z.strictObject({
  capacitancesPf: z.array(num).length(2).describe('the least and the greatest known capacitor'),
  inductanceUh: num.describe('by the method of two capacitors'),
  selfPf: num.describe('what coil and clips add'),
  deviationPercent: num.nullable().describe('of the inductance, against the same method on the figures of the record'),
  halfPercent: num.describe('half width of the inductance by the tolerance of the capacitors alone'),
});

const tapSchema = z.strictObject({
  tap: num.int(),
  state: z.enum(STATES),
  again: z.boolean().describe('a reading that is not of this coil; it is to be taken again'),
  deviationPercent: num
    .nullable()
    .describe('of the inductance by the reading with the narrowest limits; null without an electrical one'),
  readings: z.array(judgedSchema),
  line: lineSchema.nullable().describe('null without two capacitors'),
});

const actionSchema = z.strictObject({
  kind: z.enum(['turns', 'finish', 'start', 'tap']),
  doing: text,
  tap: num.int().nullable().describe('that is moved'),
  turns: num.describe('off (below 0) or on at the finish; or along the wire that the tap moves, below 0 towards S'),
  share: num.describe('of the full move of end turns, one wire after each of five; below 0 pressed'),
});

const rescueSchema = z.strictObject({
  can: z.enum(['yes', 'partly', 'no']),
  causes: z.array(text).describe('what the readings look like, the likeliest first'),
  actions: z.array(actionSchema).describe('in the order in which they are done'),
  taps: z
    .array(
      z.strictObject({
        tap: num.int(),
        beforePercent: num,
        afterPercent: num.describe('expected'),
        within: z.boolean(),
      }),
    )
    .describe('with an electrical reading'),
  out: z.array(num.int()).describe('taps that stay outside their limits'),
  why: z.array(text).describe('what it rests on, or why nothing helps'),
});

const coilSchema = z.strictObject({
  serial: text,
  state: z.enum(STATES),
  readings: z.array(judgedSchema).describe('of no tap: former, 20 turns, other checks'),
  taps: z.array(tapSchema),
  remarks: z.array(text),
  rescue: rescueSchema.nullable().describe('of a coil that fails'),
});

const tallySchema = z.strictObject({ coils: num.int(), pass: num.int(), fail: num.int(), missing: num.int() });

const firstOffSchema = z.strictObject({
  path: text.nullable().describe('of the job for the next lot; null: there is none'),
  why: text.nullable().describe('why there is none'),
  changes: z.array(z.strictObject({ key: text, before: text.describe('empty: it was not there'), after: text, text })),
  notes: z.array(text).describe('what was found and is not put into the job'),
});

const kindSchema = z.strictObject({
  hash: text.describe('of its record'),
  job: text,
  taps: num.int(),
  tally: tallySchema,
  coils: z.array(coilSchema).describe('in the order of the file'),
  systematic: systematicSchema.nullable().describe('null: too little was read'),
  charts: z.array(chartSchema),
  firstOff: firstOffSchema.nullable().describe('null: too little was read'),
});

export const proofSchema = z.strictObject({
  record: z.literal(1),
  program: text,
  verb: z.literal('prove'),
  job: text.describe('name of the file of readings'),
  date: text.nullable(),
  hash: text.describe('sha256 of all but hash, files, program'),
  paper: z.enum(['A4', 'Letter']),
  units: z.enum(['metric', 'inch', 'both']).optional(),
  input: z.strictObject({ file: text, sha256: text.describe('of its bytes') }),
  count: z
    .strictObject({
      figures: num.int(),
      readings: num.int(),
      dial: num.int(),
      missing: num.int(),
      leftOut: num.int(),
    })
    .describe('cells for readings of the file: each is a reading, of a dial, blank, or left out by a note'),
  tally: tallySchema,
  kinds: z.array(kindSchema).min(1),
  dials: z.array(dialSchema).describe('of the coils whose dial was read'),
  notes: z.array(noteSchema),
  files: z.array(z.strictObject({ path: text, kind: text, sha256: text })),
});

export type ProofRecord = z.infer<typeof proofSchema>;
export type ProofKind = z.infer<typeof kindSchema>;
export type ProofCoil = z.infer<typeof coilSchema>;
export type ProofTap = z.infer<typeof tapSchema>;
export type Judged = z.infer<typeof judgedSchema>;
export type TwoCapacitors = z.infer<typeof lineSchema>;
export type Rescue = z.infer<typeof rescueSchema>;
export type RescueAction = z.infer<typeof actionSchema>;
export type ProofFirstOff = z.infer<typeof firstOffSchema>;
export type Tally = z.infer<typeof tallySchema>;
export type State = (typeof STATES)[number];
