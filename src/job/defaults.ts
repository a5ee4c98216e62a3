/**
 * What is taken when a key is left out, written as a person would write it, by dotted key. Sizes of shop and printer
 * are common practice, not from a source.
 */

import { parseQuantity } from '../quantity/parse.ts';
import { isRange } from '../quantity/range.ts';
import { findMaterial } from '../stock/materials.ts';
import { aroundDefaults } from './around/aerial-defaults.ts';

export const DEFAULTS = {
  paper: 'A4',
  prefer: 'least loss',
  'set.stray': '12 pF',
  'set.aerial': '0 pF',
  'set.switch': 'open',
  'set.lead': '2 pF',
  temperature: '20 °C',
  'former.kind': 'printed',
  'winding.hand': 'right',
  'winding.earthed': 'start',
  'winding.pitch': 'any',
  'winding.tap-method': 'auto',
  'winding.tap-layout': 'auto',
  'winding.finish-trim': true,
  'printer.bed': '220 x 220 mm',
  'printer.height': '250 mm',
  'printer.nozzle': '0.4 mm',
  'printer.hole-compensation': '0 mm',
  'printer.clearance': '0.3 mm',
  'printer.scale': '100 %',
  'printer.material': 'PLA',
  'shop.shaft': '8 mm',
  'shop.shaft-form': 'round',
  'shop.spool': '80 x 70 mm',
  'shop.spool-bore': '16 mm',
  'shop.meter': '100 kHz',
  'shop.meter-accuracy': '1 %',
  'shop.capacitor-tolerance': '1 %',
  'shop.generator': '50 ohm',
  'shop.generator-coupling': '1 pF',
  'shop.probe-capacitance': '10 pF',
  'shop.probe-resistance': '10 Mohm',
  'as-made.diameter': '0 mm',
  'as-made.pitch': '0 %',
  'second.pitch': 'close',
  'aerial.kind': 'dummy',
  'aerial.to': 'best',
  'detector.kind': 'galena crystal',
  'detector.to': 'best',
  units: 'metric',
} as const;

/** What a job says of generator and probe; where it says nothing of any, nobody is asked to measure with them. */
export const INSTRUMENT_KEYS = [
  'shop.generator',
  'shop.generator-coupling',
  'shop.probe-capacitance',
  'shop.probe-resistance',
] as const;

export type Data = Record<string, unknown>;
export type Assumed = Record<string, string | number | boolean | readonly string[]>;

export interface Completed {
  /** The job with every default filled in, in the order of the file. */
  readonly data: unknown;
  /** What was filled in, by dotted key. */
  readonly assumed: Assumed;
}

/** Sections that may be left out whole, or left with nothing under them. */
const SECTIONS = ['former', 'winding', 'printer', 'shop'] as const;

/** Fills in what was left out. Does not judge what is there. */
export function complete(written: unknown): Completed {
  if (!isData(written)) return { data: written, assumed: {} };
  const data: Data = { ...written };
  for (const section of [...SECTIONS, 'want', 'set', 'as-made', 'second', 'aerial', 'detector'] as const) {
    if (isData(data[section])) data[section] = { ...data[section] };
    // A heading whose lines are all commented out is a section left out.
    else if (data[section] === null) delete data[section];
  }
  for (const section of SECTIONS) data[section] ??= {};
  const assumed: Assumed = {};
  for (const [key, value] of Object.entries({ ...DEFAULTS, ...dependent(data) })) {
    if (value !== undefined && fill(data, key.split('.'), value)) assumed[key] = value;
  }
  return { data, assumed };
}

/** Defaults that depend on another key. */
function dependent(data: Data): Record<string, Assumed[string] | undefined> {
  const printed = at(data, 'former', 'kind') !== 'tube';
  const band = at(data, 'want', 'band') !== undefined;
  const nozzle = millimetres(at(data, 'printer', 'nozzle') ?? DEFAULTS['printer.nozzle']);
  const range = isData(data.want) && data.want.inductance !== undefined && !Array.isArray(data.want.inductance);
  return {
    'want.overlap': band ? (at(data, 'want', 'taps') === undefined ? '5 %' : '0 %') : undefined,
    'want.spacing': range && !band && at(data, 'winding', 'units') === undefined ? 'even ratio' : undefined,
    'former.outside-diameter': printed ? '50 mm to 90 mm' : undefined,
    'former.longest': printed ? String(at(data, 'printer', 'height') ?? DEFAULTS['printer.height']) : '200 mm',
    'former.wall': printed ? undefined : '1.5 mm',
    'former.material': printed ? printMaterial(at(data, 'printer', 'material')) : 'card',
    'former.mounting': printed ? 'ears' : 'none',
    'former.flanges': printed,
    'second.end': secondEnd(data),
    ...aroundDefaults(isData(data.aerial) ? data.aerial : {}, isData(data.detector) ? data.detector : {}),
    'shop.capacitors': ['100 pF', '330 pF'],
    'former.body': printed ? 'full' : undefined,
    'former.ribs': printed && at(data, 'former', 'body') === 'ribbed' ? 12 : undefined,
    'former.screw': printed && at(data, 'former', 'mounting') !== 'none' ? '4.4 mm' : undefined,
    'printer.line': nozzle === null ? '0.45 mm' : `${Number((nozzle * 1.125).toFixed(3))} mm`,
    'printer.layer': nozzle === null ? '0.2 mm' : `${Number((nozzle / 2).toFixed(3))} mm`,
  };
}

/** What slides, or stands beside, does so at the upper end: below is the foot. */
function secondEnd(data: Data): string {
  const coupling = at(data, 'second', 'coupling');
  if (at(data, 'second', 'kind') === 'beside') return 'finish';
  if (typeof coupling === 'string' && isRange(coupling)) return 'finish';
  return at(data, 'winding', 'earthed') === 'finish' ? 'finish' : 'start';
}

/** The material of jigs serves for the former too; one that cannot be printed is reported where it was written. */
function printMaterial(written: unknown): string {
  const found = findMaterial(typeof written === 'string' ? written : '');
  return found.ok && found.material.use === 'print' ? found.material.name : DEFAULTS['printer.material'];
}

/** Whether the value was put in: not when the key is there, nor when its section is missing or not a section. */
function fill(data: Data, key: readonly string[], value: unknown): boolean {
  const [first, second] = key;
  if (first === undefined) return false;
  const holder = second === undefined ? data : data[first];
  const name = second ?? first;
  if (!isData(holder) || Object.hasOwn(holder, name)) return false;
  holder[name] = value;
  return true;
}

function at(data: Data, section: string, key: string): unknown {
  const holder = data[section];
  return isData(holder) ? holder[key] : undefined;
}

export function isData(value: unknown): value is Data {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** Null when it is no length: then the fault is reported where it was written. */
function millimetres(written: unknown): number | null {
  const parsed = parseQuantity(String(written), 'length');
  return parsed.ok ? parsed.value : null;
}
