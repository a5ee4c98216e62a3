/** The fixed words of the reference sheet. */

export const REFERENCE = {
  document: 'Reference sheet',
  chart: 'what every position tunes',
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
  next: 'overlap',
  legend:
    'Bar: capacitor in (left) to out (right). Dark: shared with a neighbour. I: uncertainty of an end. Dashed: second resonance, by the dead turns. Upper edge: wavelength in metres.',
  beyond: 'Second resonances beyond the right edge are in the table only.',
  none: 'The record holds no set, so there is no range to draw: the figures below are at the frequency stated.',
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
  inUse: (kind: string) => `${kind} (in use):`,
  other: (kind: string) => `${kind}:`,
} as const;

export const TAKEN = {
  heading: 'What the figures were taken with',
  coil: (turns: string, mean: string, length: string) =>
    `${turns} turns, mean diameter ${mean} mm, ${length} mm over the wires`,
  wire: (name: string, bare: string, overall: string) => `Wire ${name}: ${bare} mm bare, ${overall} mm overall`,
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
