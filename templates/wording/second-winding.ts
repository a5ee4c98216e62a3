/** Words about a second winding: its steps, its block on the winding sheet, its template. Common practice, from memory. */

type Kind = 'same former' | 'sleeve' | 'inner' | 'beside';
type End = 'start' | 'finish';

/** What it is wound on. */
const ON: Readonly<Record<Kind, string>> = {
  'same former': 'the former of the main winding',
  sleeve: 'the sleeve',
  inner: 'the inner former',
  beside: 'its own former',
};

export const SECOND_STEP = {
  /** `size` is told of a body of its own. */
  start: (kind: Kind, size: string | null, wire: string, name: string, left: string) =>
    `Second winding, on ${ON[kind]}${size === null ? '' : ` (${size})`}: have ${wire} of ${name} ready. Lead the end in at P1a and out at P1; leave ${left}.`,
  wind: (turns: number, hand: 'right' | 'left', spacer: string | null) =>
    `Wind ${turns} ${turns === 1 ? 'turn' : 'turns'} up from P1, ${hand}-hand as the main winding, ${spacer === null ? 'turn against turn' : `with ${spacer} between the turns`}, to P2. Lead the end in at P2 and out at P2a, tight. Fix both end turns with a touch of varnish.`,
  place: {
    sleeve: (edge: string) =>
      `Lay the ends of the main winding that it will cover flat along the former. Put the sleeve over it, P1 below: its lower edge ${edge}.`,
    inner: (edge: string) =>
      `Press the ends of taps in the bore flat against the wall. Put the inner former in, P1 below: its lower edge ${edge}.`,
    beside: (edge: string) => `Stand it on the axis of the main former, P1 below: its lower edge ${edge}.`,
  },
  above: (mm: string) => `${mm} above the datum`,
  below: (mm: string) => `${mm} below the datum`,
  fixed: 'Fix it there.',
  slides: (way: 'up' | 'down', travel: string, tight: string, loose: string) =>
    `There it couples by ${tight}; ${travel} ${way} by ${loose}.`,
  /** Of the whole coil and the second winding in series, one way round and the other. */
  measure: (aiding: string, opposing: string, mutual: string) =>
    `Join whole coil and second winding in series and measure; turn the ends of one round, measure again: ${aiding} and ${opposing} µH at low frequency. A quarter of the difference is M: ${mutual} µH.`,
} as const;

export const SECOND_BLOCK = {
  heading: (kind: Kind, end: End) =>
    ({
      'same former': `Second winding, on the same former beyond the ${end}`,
      sleeve: 'Second winding, on a sleeve over the main one',
      inner: 'Second winding, on a former in the bore',
      beside: `Second winding, on a former of its own beyond the ${end}`,
    })[kind],
  wire: 'wire',
  turns: 'turns',
  pitch: (unit: string) => `pitch ${unit}`,
  cut: 'have ready',
  height: (hole: string, unit: string) => `${hole} height ${unit}`,
  angle: 'P1, P2 angle °',
  edge: (unit: string) => `lower edge ${unit}`,
  alone: 'µH alone',
  mutual: 'M µH',
  coupling: 'coupling',
  ends: (wire: string, grams: string, length: string) =>
    `${wire} of it in the turns, ${grams} g. Ends are tied at P1a and P2a, ${length} beyond along the axis.`,
  heights: 'Heights from the datum, at the tightest place.',
  apart: (length: string) => `Edge to edge of both windings ${length}.`,
  body: (outside: string, inside: string, long: string) => `Wound on ${outside}, ${inside} inside, ${long} long.`,
  working: (each: string) => `Coupling with the turns up to each tap, where it works: ${each}.`,
  scale: { up: 'moved up', down: 'moved down' },
  inUnit: (words: string, unit: string) => `${words} ${unit}`,
} as const;

export const SECOND_TEMPLATE = {
  part: { sleeve: 'for the sleeve', inner: 'for the inner former', beside: 'for the former beside' },
  set: 'Lower edge: set it flush with the lower edge of what the second winding is wound on; P1 is below. The holes are printed: this strip checks and marks them. Dashed: edges of the winding.',
  edge: 'lower edge',
  from: 'the lower edge',
} as const;
