/** The fixed words of the winding sheet. */

export const TITLE = {
  document: 'Winding sheet',
  wind: 'to wind from',
  more: 'to wind from, continued',
  check: 'to check by',
  checkMore: 'to check by, continued',
  why: 'why this coil',
  job: 'job',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
  date: (date: string) => `date ${date}`,
} as const;

export const FACTS = {
  wire: 'Wire',
  overall: (mm: string) => `${mm} mm over the covering`,
  uncovered: (mm: string) => `${mm} mm thick`,
  winding: 'Winding',
  turns: (turns: string) => `${turns} turns`,
  hand: { right: 'right-hand', left: 'left-hand' },
  pitch: 'Pitch',
  close: 'close wound, turn against turn',
  groove: 'in the groove of the former',
  /** Lines are named by their size, threads are not. */
  spacer: (name: string, mm: string) => `spacer: ${name}${name.endsWith(' mm') ? '' : `, ${mm} mm`}`,
  tension: 'Tension',
  newton: (low: string, high: string) => `${low} to ${high} N`,
  steady: 'steady, from start to finish',
  cut: 'Wire to have ready',
  ends: (metres: string, grams: string) => `${metres} m of it in the two ends; ${grams} g`,
  former: 'Former',
  coil: 'Whole coil',
  low: 'at low frequency',
} as const;

export const DRAWING = {
  datum: 'datum',
  start: 'S start',
  finish: 'F',
  tap: 'tap',
  top: 'top',
  rightHand: 'right-hand',
  leftHand: 'left-hand',
  seam: 'seam',
  heading: (scale: string) => `The coil, scale ${scale}`,
  seen: 'Start hole in front. Dots: full on this side, hollow behind. Heights: mm from the datum to the wire centre.',
  hand: {
    right: 'Climbs to the right on this side.',
    left: 'Climbs to the left on this side.',
  },
  earthed: {
    start: 'Earthed end: start S.',
    finish: 'Hot end: start S. The switch earths the tap in use, F for the whole coil.',
  },
  datumIs: (words: string) => `Datum: ${words}.`,
  above: 'Seen from above',
  aboveWords: 'Angles from the start hole S, counterclockwise; F is the finish.',
} as const;

export const TAPS = {
  heading: 'Taps: tick each row when it is wound',
  more: 'Taps, continued',
  step: 'step',
  done: '',
  tap: 'tap',
  turn: 'turn',
  position: 'height mm',
  angle: 'angle °',
  rib: 'rib',
  inductance: 'µH',
  deviation: 'off %',
  wire: 'wire m',
  switches: 'u1, u2, ...: units switch, with S as its 0. Numbers: tens switch. µH: from the start S.',
} as const;

export const STEPS = {
  heading: 'Steps: tick each when it is done',
  more: 'Steps, continued',
  rows: (first: number, last: number) =>
    first === last ? `Step ${first}: in the table.` : `Steps ${first} to ${last}: row by row in the table.`,
} as const;

export const CAUTIONS = { heading: 'Take care' } as const;

export const CHECKS = {
  heading: 'Measure and write down',
  what: 'what',
  low: 'low',
  nominal: 'nominal',
  high: 'high',
  unit: 'unit',
  reading: 'reading',
  good: 'in limits',
  taps: 'Every tap, measured from the start S',
  tapsMore: 'Every tap, continued',
  deviation: 'off target %',
  length: 'wound length mm',
  inductance: 'inductance µH',
  resistance: 'DC resistance Ω at 20 °C',
  range: 'tunes kHz',
  limits: (inputs: string) => `Limits hold for 95 of 100 coils. What widens them most: ${inputs}.`,
  dominant: (input: string, first: number, last: number) =>
    first === last ? `${input} (tap ${first})` : `${input} (taps ${first} to ${last})`,
  between: (low: string, high: string) => `${low} – ${high}`,
  settings: 'What the two switches set: low-frequency inductance in µH',
  settingsHow: (least: string, most: string) =>
    `Turns in use: from the unit tap to the tens tap, ${least} to ${most} in steps of one. Turns beyond either are dead. Step: the greatest change of inductance from one turn to the next.`,
  tens: 'tens',
  unitZero: 'unit 0',
  unitLast: (unit: number) => `unit ${unit}`,
  turnsUsed: 'turns',
  step: 'step %',
  q: 'Q, unit 0',
  atKhz: 'at kHz',
  corrections: 'When it reads high or low',
  correctionsHow:
    'A reading that is too high wants a line with a minus, one too low a line with a plus. Measure again after each.',
  doing: 'what to do',
  whole: 'whole coil %',
  first: 'first tap %',
  former: 'Former, before winding',
  part: 'size',
  mm: 'mm',
  outside: 'outside diameter',
  bore: 'bore',
  wall: 'wall',
  ribSize: 'ribs, width x depth',
  notch: 'depth of the notches',
  length2: 'length, foot to top',
  rim: 'rim diameter',
  groove: 'depth of the groove',
  signature: ['wound by', 'date', 'checked by', 'date', 'coil no.'],
  why: 'Why this coil',
  chosen: (prefer: string, tried: string, feasible: string) =>
    `Chosen for ${prefer}: ${tried} coils were tried, ${feasible} met the demands.`,
  alternatives: 'Other coils that meet the demands',
  wire: 'wire',
  formerMm: 'former ⌀ mm',
  pitch: 'pitch mm',
  turns: 'turns',
  windingMm: 'length mm',
  wireM: 'wire m',
  worst: 'worst tap %',
  loss: 'loss 1/Q',
  better: 'better in',
  warnings: 'Note',
} as const;
