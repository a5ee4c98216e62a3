/**
 * The record of a lot, `lot.json`: what travellers, lists and labels read, beside the records of its kinds in
 * `kinds/<folder>/plan.json`. Numbers are rounded once, when it is made. Keys end in their unit.
 */
import * as z from 'zod';

const text = z.string();
const num = z.number();

/** What has one design: entries of a lot whose jobs are the same are one kind. */
const kindSchema = z.strictObject({
  kind: text.describe('A, B, ... Z, AA: on beds, labels and lists'),
  job: text,
  folder: text.describe('below the folder of the lot, with its plan.json and sheets'),
  hash: text.describe('of the record of the kind'),
  quantity: num.int(),
  turns: num,
  taps: num.int(),
  wire: text,
  cutM: num.describe('wire for one coil: winding, loops of taps and both ends that are left long'),
  cutG: num.describe('its mass'),
  plasticG: num.describe('of solid plastic for the former of one coil, all its pieces; 0 for a tube'),
});

const coilSchema = z.strictObject({
  serial: text,
  kind: text,
  spool: text.nullable().describe('the reel it is wound from; null: no reel on the shelf has enough left'),
});

const spoolSchema = z.strictObject({
  spool: text,
  wire: text,
  leftM: num.describe('before the lot'),
  usedM: num,
  restM: num.describe('after the lot'),
  serials: z.array(text).describe('in the order in which they are cut from it'),
});

const wirePlanSchema = z.strictObject({
  wire: text,
  coils: num.int(),
  neededM: num.describe('all coils of the lot that take it'),
  neededG: num,
  shelfM: num.describe('on all reels of it before the lot'),
  unserved: num.int().describe('coils that no reel has enough left for'),
  unservedBound: num.int().describe('no plan leaves fewer'),
  buyM: num.describe('all that they take'),
  buyBoundM: num.describe('no plan that leaves as few unserved leaves less to buy'),
  scrapM: num.describe(
    'what is left on reels that were cut from and is too short for any coil of the lot in this wire',
  ),
  scrapBoundM: num.describe('no plan that leaves as few unserved and as little to buy leaves less'),
  exact: z.boolean().describe('the plan is proven to be a best one'),
});

const toBuySchema = z.strictObject({
  wire: text,
  totalM: num,
  totalG: num,
  coils: z.array(z.strictObject({ serial: text, cutM: num })).describe('each wants one piece without a joint'),
});

const pieceSchema = z.strictObject({
  kind: text,
  part: text.describe('as in the record of the kind'),
  name: text.describe('for people, with the letter of the kind'),
  xMm: num.describe('left edge of its box on the bed'),
  yMm: num.describe('front edge'),
  turned: z.boolean().describe('by a quarter turn'),
});

const bedSchema = z.strictObject({
  bed: num.int().describe('from 1'),
  path: text.describe('its 3MF'),
  material: text,
  layerMm: num,
  nozzleMm: num,
  printer: text.describe('name of the printers whose bed it is laid out for'),
  bedXMm: num.describe('of that bed, across'),
  bedYMm: num.describe('of that bed, from front to back'),
  count: num.int().describe('how often it is printed'),
  massG: num.describe('of solid plastic, once'),
  items: z.array(pieceSchema).min(1),
});

const runSchema = z.strictObject({
  printer: text.describe('name and number of the machine, as "bench 2"'),
  runs: z.array(
    z.strictObject({
      run: num.int().describe('from 1, in order on this machine'),
      bed: num.int(),
      serials: z.array(text).describe('whose formers come off it; a former in sections is named with each of them'),
      massG: num,
    }),
  ),
});

const materialSchema = z.strictObject({
  material: text,
  solidG: num.describe('of solid plastic, all parts of the lot'),
});

export const lotSchema = z.strictObject({
  record: z.literal(1),
  program: text,
  verb: z.literal('lot'),
  lot: text,
  date: text.nullable(),
  hash: text.describe('sha256 of all but hash, files, program'),
  paper: z.enum(['A4', 'Letter']),
  checkedBy: text.nullable(),
  kinds: z.array(kindSchema).min(1),
  coils: z.array(coilSchema).min(1).describe('in the order of their serials as given'),
  spools: z.array(spoolSchema),
  wires: z.array(wirePlanSchema),
  toBuy: z.array(toBuySchema),
  beds: z.array(bedSchema),
  runs: z.array(runSchema),
  materials: z.array(materialSchema),
  warnings: z.array(z.strictObject({ code: text, text })),
  files: z.array(z.strictObject({ path: text, kind: text, sha256: text })),
});

export type LotRecord = z.infer<typeof lotSchema>;
export type LotKind = z.infer<typeof kindSchema>;
export type LotCoil = z.infer<typeof coilSchema>;
export type LotSpool = z.infer<typeof spoolSchema>;
export type LotWire = z.infer<typeof wirePlanSchema>;
export type ToBuy = z.infer<typeof toBuySchema>;
export type LotBed = z.infer<typeof bedSchema>;
export type LotRun = z.infer<typeof runSchema>;
