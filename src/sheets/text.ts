/** Text as the sheets print it: wrapped in columns, and numbers. */
export { wrap } from '../drawing/wrap.ts';
export { figures, fixed, short, signed } from '../quantity/decimals.ts';

/** With a capital first and a full stop last. */
export function sentence(text: string): string {
  const whole = text.charAt(0).toUpperCase() + text.slice(1);
  return /[.!?]$/.test(whole) ? whole : `${whole}.`;
}
