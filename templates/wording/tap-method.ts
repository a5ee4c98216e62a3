/** What is written under the three pictures of a tap, by method and covering. Common practice, from memory. */

type Method = 'twisted loop' | 'lifted turn' | 'cut pair' | 'lug' | 'drawn in';

export const HEADING: Record<Method, string> = {
  'twisted loop': 'Each tap: a twisted loop',
  'lifted turn': 'Each tap: a turn lifted over a strip',
  'cut pair': 'Each tap: cut, anchored as a pair',
  lug: 'Each tap: a lug under the turn',
  'drawn in': 'Each tap: a loop drawn in through its hole',
};

export const STAGES: Record<Method, readonly [string, string, string]> = {
  'twisted loop': ['pull out a loop', 'twist it tight to the root', 'bare, tin, solder the root'],
  'lifted turn': ['slip a strip under one turn', 'bare its crown', 'solder the lead to it'],
  'cut pair': ['lead the end in and cut', 'lead the next end in; bare and tin both', 'twist and solder the pair'],
  lug: ['lay the lug under the turn', 'bare the wire on the lug', 'solder; lead to the eye'],
  'drawn in': ['draw a loop in (wall cut through)', 'twist it tight inside', 'bare its end and tin it'],
};

/** How this covering is taken off. */
export function baring(covering: string, strands: number, solderable: boolean): string {
  if (covering === 'bare') return 'Bare wire: clean it bright, then tin.';
  const enamel = solderable
    ? 'this enamel tins through with a hot iron; mind the fumes.'
    : 'scrape the enamel off all round, then tin.';
  if (strands > 1) return `Litz: tie the silk with thread before baring; every strand must be tinned: ${enamel}`;
  if (covering.includes('cotton') || covering.includes('silk'))
    return 'Wax or tie the covering with thread before baring, so that it does not run back; then tin.';
  return `Baring: ${enamel}`;
}
