/** A wire of the stock by its size and covering in words. */
import type { Parsed } from '../quantity/parse.ts';
import { type FoundWire, findWire } from '../stock/find.ts';
import { shown } from './field.ts';

export const readWire = (raw: unknown): Parsed<FoundWire> => {
  if (typeof raw !== 'string') {
    return {
      ok: false,
      got: shown(raw),
      expected: 'a wire: a size and a covering, such as 24 AWG enamel',
      todo: 'write AWG, SWG or mm behind the number, and the covering; "coilwright stock" lists them',
    };
  }
  const found = findWire(raw.slice(0, 200));
  return found.ok ? { ok: true, value: found } : found;
};
