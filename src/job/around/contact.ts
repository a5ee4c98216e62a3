/** Where aerial or detector is connected, as a job says it. */
import type { Parsed } from '../../quantity/parse.ts';
import { field, shown } from '../field.ts';
import { nearest } from '../nearest.ts';

/** `best`: wherever serves best; a number: that tap; `start`: the hot end of a coil whose finish is earthed. */
export type JobContact = 'best' | 'second' | 'start' | number;

const TAP = /^tap ([1-9]\d?)$/;

export function contact<const W extends 'best' | 'second' | 'start'>(words: readonly W[], doc: string) {
  const expected = `one of: ${words.join(', ')}, or a tap such as tap 3`;
  const read = (raw: unknown): Parsed<W | number> => {
    const word = words.find((one) => one === raw);
    if (word !== undefined) return { ok: true, value: word };
    const tap = typeof raw === 'string' ? TAP.exec(raw.trim()) : null;
    if (tap !== null) return { ok: true, value: Number(tap[1]) };
    if (typeof raw === 'number' && Number.isInteger(raw) && raw > 0 && raw < 100)
      return { ok: false, got: shown(raw), expected, todo: `write tap ${raw}` };
    const near = typeof raw === 'string' ? nearest(raw, words) : null;
    const todo = near === null ? 'choose one of these words, or write tap and its number' : `did you mean ${near}?`;
    return { ok: false, got: shown(raw), expected, todo };
  };
  return field(read, doc, { type: 'string' });
}
