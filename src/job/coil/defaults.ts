/** What is taken when a key of a coil file is left out, written as a person would write it, by dotted key. Common practice. */
import { type Assumed, type Data, DEFAULTS, isData } from '../defaults.ts';

export const COIL_DEFAULTS = {
  paper: DEFAULTS.paper,
  'coil.hand': DEFAULTS['winding.hand'],
  'coil.earthed': DEFAULTS['winding.earthed'],
  'coil.former-material': 'none',
  'set.stray': DEFAULTS['set.stray'],
  'set.aerial': DEFAULTS['set.aerial'],
  'set.switch': DEFAULTS['set.switch'],
  'set.lead': DEFAULTS['set.lead'],
  temperature: DEFAULTS.temperature,
  'spread.diameter': '0.1 mm',
  'spread.pitch': '1 %',
  'spread.bare': '1 %',
} as const;

/** Frequency of the figures when the file has neither a set nor `at`. */
const AT = '1 MHz';

/** Fills in what was left out; `fallback` names a coil without a name. Does not judge what is there. */
export function completeCoil(written: unknown, fallback: string): { data: unknown; assumed: Assumed } {
  if (!isData(written)) return { data: written, assumed: {} };
  const data: Data = { ...written };
  for (const section of ['coil', 'set', 'spread']) {
    const held = data[section];
    if (isData(held)) data[section] = { ...held };
    // A heading whose lines are all commented out is a section left out.
    else if (held === null) delete data[section];
  }
  data.spread ??= {};
  // A coil without taps may say so.
  if (isData(data.coil))
    for (const key of ['taps', 'tap-positions']) {
      const list = data.coil[key];
      if (Array.isArray(list) && list.length === 0) delete data.coil[key];
    }
  const assumed: Assumed = {};
  const take = (key: string, value: string) => {
    const [first = '', second] = key.split('.');
    const holder = second === undefined ? data : data[first];
    const name = second ?? first;
    if (!isData(holder) || Object.hasOwn(holder, name)) return;
    holder[name] = value;
    assumed[key] = value;
  };
  for (const [key, value] of Object.entries(COIL_DEFAULTS)) take(key, value);
  if (data.set === undefined) take('at', AT);
  if (Object.hasOwn(data, 'job') && !Object.hasOwn(data, 'name')) data.name = data.job;
  else take('name', fallback);
  return { data, assumed };
}
