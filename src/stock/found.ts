/** What comes of asking the stock for something: the thing, or what is wrong and what to do. */
import type { Wire } from './wire.ts';

/** What a caller needs for a {@link Fault}. */
export interface Refusal {
  readonly ok: false;
  readonly got: string;
  readonly expected: string;
  readonly todo: string;
}

export interface FoundWire {
  readonly ok: true;
  readonly wire: Wire;
  /** No covering was written: `enamel` was taken for solid wire, `single silk` for litz. */
  readonly coveringAssumed: boolean;
}

export const refuse = (got: string, expected: string, todo: string): Refusal => ({ ok: false, got, expected, todo });

/** The names on either side of `at`, quoted and joined: `` `0.5 mm` or `0.56 mm` ``; one alone at the end of the range. */
export function eitherSide(stock: readonly { readonly name: string; readonly value: number }[], at: number): string {
  const sorted = [...stock].sort((a, b) => a.value - b.value);
  const below = sorted.findLast((one) => one.value <= at);
  const above = sorted.find((one) => one.value > at);
  return [below, above].flatMap((one) => (one === undefined ? [] : [`\`${one.name}\``])).join(' or ');
}
