/** What is taken when a key of an old coil's file is left out, by dotted key. Common practice. */
import { UNCERTAINTY } from '../../match/uncertainty.ts';
import { type Assumed, complete, type Data, DEFAULTS, isData } from '../defaults.ts';
import { PLUS_MINUS } from './reading.ts';

export const OLD_DEFAULTS = {
  'old.layers': 'single',
  'old.hand': DEFAULTS['winding.hand'],
  'old.earthed': DEFAULTS['winding.earthed'],
  'old.former-material': 'none',
  'meter.frequency': DEFAULTS['shop.meter'],
  'meter.accuracy': UNCERTAINTY['meter.accuracy'],
  replacement: 'as it worked',
  contradictions: 'refuse',
} as const;

/** A list entry that is only a word or a number. */
function tapOf(raw: unknown): unknown {
  if (raw === 'lost' || raw === null) return { lost: true };
  return typeof raw === 'number' ? { turns: raw } : withGroup(raw);
}

/** An inductance that is written without its group of keys. */
function withGroup(raw: unknown): unknown {
  if (!isData(raw) || typeof raw.inductance !== 'string') return raw;
  const [value, uncertainty] = raw.inductance.split(PLUS_MINUS);
  return { ...raw, inductance: uncertainty === undefined ? { value } : { value, uncertainty } };
}

/** Fills in what was left out; `fallback` names a job without a name. Does not judge what is there. */
export function completeOld(written: unknown, fallback: string): { data: unknown; assumed: Assumed } {
  if (!isData(written)) return { data: written, assumed: {} };
  const own: Data = { ...written };
  for (const section of ['old', 'meter', 'fits', 'winding']) {
    if (isData(own[section])) own[section] = { ...own[section] };
    else if (own[section] === null) delete own[section];
  }
  own.meter ??= {};
  own.fits ??= {};
  const { old } = own;
  if (isData(old) && Array.isArray(old.taps)) {
    if (old.taps.length === 0) delete old.taps;
    else old.taps = old.taps.map(tapOf);
  }
  if (isData(old)) old.whole = withGroup(old.whole);
  if (isData(old) && old.whole === undefined) delete old.whole;
  const assumed: Assumed = {};
  if (!Object.hasOwn(own, 'job')) {
    own.job = fallback;
    assumed.job = fallback;
  }
  // Wound as the old one was, unless the job says otherwise.
  own.winding ??= {};
  if (isData(old) && isData(own.winding))
    for (const key of ['hand', 'earthed'] as const)
      if (!Object.hasOwn(own.winding, key) && Object.hasOwn(old, key)) {
        own.winding[key] = old[key];
        assumed[`winding.${key}`] = `${String(old[key])}, as the old one`;
      }
  for (const [key, value] of Object.entries(OLD_DEFAULTS)) {
    const [first = '', second] = key.split('.');
    const holder = second === undefined ? own : own[first];
    const name = second ?? first;
    if (!isData(holder) || Object.hasOwn(holder, name)) continue;
    holder[name] = value;
    assumed[key] = value;
  }
  const job = complete(own);
  return { data: job.data, assumed: { ...job.assumed, ...assumed } };
}
