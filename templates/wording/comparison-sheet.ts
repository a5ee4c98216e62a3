/** The fixed words of the comparison sheet. */

export const COMPARISON = {
  document: 'Comparison sheet',
  against: 'old against new',
  known: 'what is known of the old coil',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
} as const;

export const PAIR = {
  heading: (scale: string) => `Both coils to one scale, ${scale}`,
  old: 'old, as inferred',
  new: (way: string) => `new, ${way}`,
  start: 'S start',
  finish: 'F',
  tap: 'tap',
  hand: { right: 'right-hand', left: 'left-hand' },
  how: (unit: string) =>
    `Start hole in front, both starts at one height. Between the coils: ${unit} along the axis from the wire centre at the start to each tap, old and new. Dots: full on this side, hollow behind. Bars beside the old coil: 95 % limits of a tap. The old form is drawn broken: its ends are not known.`,
} as const;

export const AGAINST = {
  heading: 'Tap by tap, old over new',
  more: 'Tap by tap, continued',
  tap: 'tap',
  which: '',
  old: (by: string) => `old, ${by}`,
  new: 'new',
  turns: 'turns',
  position: (unit: string) => `from start ${unit}`,
  spread: '±',
  inductance: 'µH',
  limits: '95 % limits µH',
  off: 'off %',
  at: 'at kHz',
  working: 'µH at work',
  workingOff: 'off at work %',
  q: 'Q',
  low: 'from kHz',
  high: 'to kHz',
  within: 'within',
  outside: 'outside',
  between: (low: string, high: string) => `${low} – ${high}`,
  plusMinus: (value: string, half: string) => `${value} ±${half}`,
  /** After turns that are not determined. */
  doubt: (turns: string) => `${turns}?`,
  how: 'µH: low frequency, start to tap; at work: at the frequency beside it, with what the switch leaves of the rest. Off: new over old. Within, outside: at work, of the 95 % limits of the old tap in proportion. ±: half width at 95 %, the wider side. A turn with a question mark is the likeliest of several.',
  worst: (tap: number, percent: string) => `Farthest off at work: tap ${tap}, ${percent} %.`,
  named: (tap: number, name: string) => `${tap} ${name}`,
  names: (names: string) => `On the old set the taps are called: ${names}.`,
  band: (low: string, high: string) => `The old set was marked ${low} to ${high} kHz.`,
} as const;

export const WAYS = {
  heading: 'As it worked, as it was',
  way: 'way',
  made: 'this folder makes',
  yes: 'yes',
  wire: 'wire',
  former: (unit: string) => `former ⌀ ${unit}`,
  turns: 'turns',
  worst: 'worst tap %',
  worstTap: (percent: string, tap: number) => `${percent}, tap ${tap}`,
  farthest: (unit: string) => `farthest tap ${unit}`,
  how: 'As it worked: the inductances of the old taps. As it was: their places, for looks. Farthest: from a tap to where it was.',
  none: '–',
  same: 'As it worked and as it was come to the same coil: the inductances of the old taps, at their places.',
  taps: 'Both ways, tap by tap',
  tapsMore: 'Both ways, tap by tap, continued',
  tap: 'tap',
  turn: (way: string) => `${way}: turn`,
  position: (unit: string) => `from start ${unit}`,
  off: 'off at work %',
} as const;

export const COILS = {
  heading: 'What was inferred',
  more: 'What was inferred, continued',
  figure: '',
  old: 'old',
  limits: '95 % limits',
  new: 'new',
  wire: 'wire',
  turns: 'turns',
  former: 'former ⌀',
  mean: 'mean diameter',
  bare: 'wire, bare',
  overall: 'wire, over the covering',
  pitch: 'pitch',
  pitchOf: (section: number, turns: string) => `pitch of section ${section}, ${turns} turns`,
  sectionGap: (section: number) => `clear distance behind section ${section}`,
  tapGap: 'gap at a tap',
  length: 'winding, over the wires',
  wireLength: 'wire in the coil',
  self: 'self-capacitance',
  pf: (value: string) => `${value} pF`,
  hand: 'hand, earthed end',
  wound: (hand: string, end: string) => `${hand}-hand, ${end}`,
  none: '',
} as const;

export const TURNS = {
  heading: 'Turns that the measurements do not determine',
  tap: (name: string, fits: string) => `${name}: ${fits}`,
  fit: (turn: string, percent: string) => `${turn} (${percent} %)`,
  all: 'Every turn follows from the measurements: more than 95 % of the weight lies on one number for each tap.',
} as const;

export const PROPOSED = {
  heading: 'Lost taps, proposed from the pattern of the others',
  text: (text: string, percent: string) => `${text} Confidence ${percent} %.`,
} as const;

export const CONTRADICTED = {
  heading: 'Measurements that contradict the others',
  text: (text: string, got: string, expected: string, sigmas: string) =>
    `${text} Written: ${got}; the others make it ${expected}: ${sigmas} standard deviations off.`,
  none: 'No measurement contradicts the others.',
} as const;

export const NEXT = {
  heading: 'What to measure next',
  text: (text: string, now: string, then: string) => `${text} Widest limit of a tap: now ±${now} %, then ±${then} %.`,
  none: 'Nothing that is left to measure would narrow the limits by a tenth.',
} as const;

export const MEASURED = {
  heading: 'What was measured, and what the inferred coil would have shown',
  more: 'What was measured, continued',
  key: 'measurement',
  measured: 'measured',
  fitted: 'inferred',
  sigmas: 'off σ',
  fit: (chiSquare: string, freedom: number, verdict: string) =>
    `All together: chi-square ${chiSquare} with ${freedom} ${freedom === 1 ? 'measurement' : 'measurements'} to spare, ${verdict}.`,
  good: 'as the stated uncertainties lead to expect',
  tight: 'closer than the stated uncertainties lead to expect',
  loose: 'more than the stated uncertainties lead to expect',
  spare: 'No more was measured than the coil needs, so nothing tests the measurements against one another.',
} as const;

export const ASSUMED = { heading: 'Taken where nothing was measured' } as const;
