/** What of the record concerns printing and the bench: printer, shop, the list of parts, and their beds. Keys end in their unit. */
import * as z from 'zod';
import { PARTS } from '../job/schema.ts';

const text = z.string();
const num = z.number();

export const printerSchema = z.strictObject({
  bedXMm: num,
  bedYMm: num,
  heightMm: num,
  nozzleMm: num,
  lineMm: num,
  layerMm: num,
  holeCompensationMm: num.describe('added to the diameter of every hole as modelled'),
  clearanceMm: num.describe('gap on diameter between printed parts that go into one another'),
  scale: z
    .array(num)
    .length(3)
    .describe('what files are enlarged by along x, y and z; every other figure is as it should come out'),
  material: text.describe('of jigs'),
  densityGCm3: num.describe('of that material'),
});

export const shopSchema = z.strictObject({
  shaftMm: num.describe('diameter, or across the flats'),
  shaftForm: z.enum(['round', 'hexagon']),
  spoolDiameterMm: num,
  spoolWidthMm: num,
  spoolBoreMm: num,
  meterKhz: num.describe('at which the inductance meter measures'),
  meterName: text.nullable(),
  meterAccuracy: num.describe('a fraction of the reading'),
  capacitorsPf: z.array(num).describe('known capacitors, ascending'),
  capacitorTolerance: num.describe('a fraction'),
  instruments: z
    .strictObject({
      generatorOhm: num,
      couplingPf: num.nullable().describe('between generator and hot end; null: a loose loop that loads nothing'),
      probePf: num,
      probeOhm: num,
      stated: z.boolean().describe('false: nothing was said of them, what is usual was taken'),
    })
    .optional()
    .describe('generator and oscilloscope probe; absent of older records'),
});

export const partSchema = z.strictObject({
  part: text.describe('stands in file names and on beds'),
  name: text,
  kind: z.enum(PARTS),
  path: text,
  quantity: num.int(),
  material: text,
  sizeMm: z.array(num).length(3).describe('outer size as it should come out, in print orientation'),
  volumeMm3: num.describe('of the solid'),
  massG: num.describe('of solid plastic, one piece'),
  use: text,
  printNote: text,
});

export const bedSchema = z.strictObject({
  path: text,
  material: text,
  items: z.array(
    z.strictObject({
      part: text,
      copy: num.int(),
      xMm: num.describe('left edge of its box on the bed'),
      yMm: num.describe('front edge'),
      turned: z.boolean().describe('by a quarter turn'),
    }),
  ),
});

export type PrinterFigures = z.infer<typeof printerSchema>;
export type PartEntry = z.infer<typeof partSchema>;
export type BedEntry = z.infer<typeof bedSchema>;
