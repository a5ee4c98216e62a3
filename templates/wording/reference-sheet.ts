/** The fixed words of the reference sheet. */

export const REFERENCE = {
  document: 'Reference sheet',
  chart: 'what every position tunes',
  curves: 'tuning curves',
  wiring: 'switch wiring',
  explained: 'how the figures come about',
  chosen: 'why this coil, and others',
  figures: 'figures of every position',
  kinds: 'switch, conditions, notes',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
} as const;

export const CHART = {
  heading: 'What every switch position tunes',
  kHz: 'kHz',
  metres: 'm',
  overlap: (percent: string) => `${percent} %`,
  gap: (percent: string) => `gap ${percent} %`,
  band: (low: string, high: string) => `band ${low} – ${high} kHz`,
  /** The signs of the picture, in words. */
  signs: {
    bar: 'capacitor in (left) to out (right)',
    shared: 'shared with a neighbour',
    uncertainty: 'uncertainty of an end',
    second: 'second resonance, by the dead turns',
    gap: 'gap: no position tunes there',
    band: 'ends of the band asked for',
  },
  right: 'At the right: overlap of two neighbours, in frequency. Upper edge: wavelength in metres.',
  beyond: 'Second resonances beyond the right edge are in the table only.',
  none: 'The record holds no set, so there is no range to draw: the figures below are at the frequency stated.',
} as const;

export const CURVES = {
  heading: 'Tuning curves: frequency against capacitance',
  across: 'pF across the position: capacitor, stray, aerial',
  alone: 'pF of the capacitor alone',
  kHz: 'kHz',
  tap: 'tap',
  how: (fixed: string) =>
    `Every curve has its tap's number at its right end. Coil, leads and dead turns are counted in it, so it is not the line of a plain coil; from the lower edge to the upper: ${fixed} pF of stray and aerial.`,
  band: 'Chain lines: ends of the band.',
  units: 'Drawn for unit 0 of the units switch; higher units tune higher.',
  none: 'Tuning curves are left out: without a set there is no capacitance to draw them over. State a capacitor in the job to have them.',
} as const;

export const WIRING = {
  heading: 'Switch wiring',
  one: 'The coil has one position: there is no switch to wire.',
  front: 'from the front',
  behind: 'from behind, to wire by',
  wafer: (name: string, side: string) => `${name}, ${side}`,
  single: 'Switch',
  tens: 'Tens switch',
  units: 'Units switch',
  first: (name: string) => `${name}, wafer A`,
  second: (name: string) => `${name}, wafer B`,
  tap: (tap: number) => `tap ${tap}`,
  unit: (unit: number) => `u${unit}`,
  finish: 'F',
  start: 'S',
  set: 'common: to the set',
  turning: (step: string, shown: string) =>
    `Numbers run clockwise seen from the front, the side of the knob, and counterclockwise from behind, the side it is wired from. Drawn: ${shown}; ${step}° from one position to the next, and on a switch with another step in the same order.`,
  at: (name: string, position: string) => `${name} in position ${position}`,
  stop: (name: string, positions: number) => `${name}: set the stop to ${positions} positions.`,
  names: 'Contact and tap have the same number; the last contact takes the finish F.',
  namesUnits:
    'Tens: contact and tap have the same number, the last takes the finish F. Units: 0 takes the start S, the others unit taps u1, u2 and so on.',
  earth: {
    start: 'The start S goes to earth, past the switch; the common is hot and goes to the set.',
    finish: 'The start S is hot and goes to the set, past the switch; the common goes to earth.',
  },
  earthUnits: {
    start: 'The common of the units switch goes to earth, that of the tens is hot and goes to the set.',
    finish: 'The common of the units switch is hot and goes to the set, that of the tens goes to earth.',
  },
  rest: {
    open: 'Turns not in use: left open. Their contacts touch nothing.',
    shorted:
      'Turns not in use: shorted. The heavy link from the common to the end of the winding stays; beyond the contact in use the turns are one closed loop.',
    'shorted in sections':
      'Turns not in use: shorted step by step. The rotor (grey) joins the contact in use with all those beyond it.',
    disconnected:
      'Turns not in use: cut off. At each tap the wire is cut: the side that is in use goes to the outer contact of wafer B and to wafer A, the other side to the inner contact. The rotor of B joins every pair but the one that it points at. It must break before it makes.',
  },
  reach: (positions: number, places: number) =>
    `Such a rotor covers ${positions} contacts, so the switch needs ${places} places.`,
} as const;

export const POSITIONS = {
  heading: 'Positions',
  more: 'Positions, continued',
  tap: 'tap',
  turn: 'turn',
  inductance: 'µH, low frequency',
  limits: '95 % limits µH',
  dominant: 'widest by',
  dc: 'DC Ω',
  low: 'from kHz',
  high: 'to kHz',
  second: 'second kHz',
  q: 'Q',
  at: 'at kHz',
  plusMinus: (value: string, half: string) => `${value} ±${half}`,
  between: (low: string, high: string) => `${low} – ${high}`,
} as const;

export const ENDS = {
  heading: 'At both ends and the middle of each range',
  more: 'At both ends and the middle of each range, continued',
  alone: 'At work',
  tap: 'tap',
  at: 'at',
  kHz: 'kHz',
  inductance: 'µH',
  resistance: 'R Ω',
  q: 'Q',
  bandwidth: 'bandwidth kHz',
  parallel: 'parallel kΩ',
  how: 'Inductance, resistance and Q as they are at that frequency, current crowding and dead turns counted; bandwidth and parallel resistance of the coil alone, unloaded.',
} as const;

export const KINDS = {
  heading: 'Switch kinds compared, each position at the frequency it works at',
  more: 'Switch kinds compared, continued',
  tap: 'tap',
  inductance: (kind: string) => `${kind} µH`,
  q: 'Q',
  range: 'kHz',
  megaRange: 'MHz',
  inUse: (kind: string) => `${kind} (in use):`,
  other: (kind: string) => `${kind}:`,
} as const;

export const TAKEN = {
  heading: 'What the figures were taken with',
  coil: (turns: string, mean: string, length: string) =>
    `${turns} turns, mean diameter ${mean}, ${length} over the wires`,
  wire: (name: string, bare: string, overall: string) => `Wire ${name}: ${bare} bare, ${overall} overall`,
  set: (low: string, high: string, stray: string, aerial: string) =>
    `Capacitor ${low} to ${high} pF, stray ${stray} pF, aerial ${aerial} pF`,
  noSet: 'No set',
  leads: (pf: string) => `Lead and switch contact of each tap: ${pf} pF`,
  rest: (rest: string, earthed: string) => `Turns not in use: ${rest}; earthed end: ${earthed}`,
  copper: (celsius: string) => `Copper at ${celsius} °C`,
  self: (pf: string) => `Self-capacitance of the whole coil ${pf} pF, ± 5 %`,
  loss: (how: string) => `Loss of the former: ${how}`,
  assumed: 'Taken where nothing was said',
} as const;

export const NOTES = { heading: 'Note' } as const;

export const EXPLAINED = {
  heading: (tap: number) => `How the figures come about: tap ${tap} as an example`,
  more: 'How the figures come about, continued',
  value: (figure: string, value: string) => `${figure}: ${value}`,
  how: (formula: string, source: string) => `${formula} (${source})`,
  from: (inputs: string) => `From: ${inputs}.`,
  by: (steps: string) => `By way of: ${steps}.`,
  error: (error: string) => `Error: ${error}.`,
  outside: (domain: string) => `Outside of where it holds (${domain}): take it with care.`,
  rest: 'Every figure of every tap, with all that it takes to work it out again: option --explain of the command that made this sheet.',
} as const;

export const CHOSEN = {
  heading: 'Why this coil',
  chosen: (prefer: string, tried: string, feasible: string) =>
    `Chosen for ${prefer}: ${tried} coils were tried, ${feasible} met the demands.`,
  alternatives: 'Other coils that meet the demands',
  more: 'Other coils that meet the demands, continued',
  none: 'No other coil that was tried meets the demands and is better in anything.',
  wire: 'wire',
  former: 'former ⌀',
  pitch: 'pitch',
  turns: 'turns',
  length: 'length',
  wireLength: 'wire',
  mass: 'copper g',
  worst: 'worst tap %',
  loss: 'loss 1/Q',
  taps: 'taps brought out',
  better: 'better in',
} as const;
