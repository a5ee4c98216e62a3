/** The fixed words of the winding sheet. */

export const TITLE = {
  document: 'Winding sheet',
  wind: 'to wind from',
  more: 'to wind from, continued',
  check: 'to check by',
  checkMore: 'to check by, continued',
  job: 'job',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
  date: (date: string) => `date ${date}`,
} as const;

export const FACTS = {
  wire: 'Wire',
  overall: (length: string) => `${length} over the covering`,
  uncovered: (length: string) => `${length} thick`,
  winding: 'Winding',
  turns: (turns: string) => `${turns} turns`,
  hand: { right: 'right-hand', left: 'left-hand' },
  pitch: 'Pitch',
  close: 'close wound, turn against turn',
  groove: 'in the groove of the former',
  /** Lines are named by their size, threads are not. */
  spacer: (name: string, length: string) =>
    `spacer: ${name}${name.endsWith(' mm') && length.endsWith(' mm') ? '' : `, ${length}`}`,
  tension: 'Tension',
  steady: 'steady, from start to finish',
  cut: 'Wire to have ready',
  ends: (wire: string, grams: string) => `${wire} of it in the two ends; ${grams} g`,
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
  seen: (unit: string) =>
    `Start hole in front. Dots: full on this side, hollow behind. Heights: ${unit} from the datum to the wire centre.`,
  /** One tap in `n` has its name beside the drawing. */
  named: (n: number) => `One tap in ${n} is named here; the table has all.`,
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
  aboveBrief: 'Seen from above: angles from S, counterclockwise.',
  aboveWords: 'Angles from the start hole S, counterclockwise; F is the finish.',
} as const;

export const TAPS = {
  heading: 'Taps: tick each row when it is wound',
  more: 'Taps, continued',
  step: 'step',
  done: '',
  tap: 'tap',
  turn: 'turn',
  positionIn: (unit: string) => `height ${unit}`,
  angle: 'angle °',
  rib: 'rib',
  inductance: 'µH',
  wireIn: (unit: string) => `wire ${unit}`,
  switches: 'u1, u2, ...: units switch, with S as its 0. Numbers: tens switch. µH: from the start S.',
} as const;

export const STEPS = {
  heading: 'Steps: tick each when it is done',
  more: 'Steps, continued',
  after: 'Steps when it is wound',
  overleaf: (first: number, last: number) =>
    `${first === last ? `Step ${first}` : `Steps ${first} to ${last}`}: on the sheet to check by.`,
  rows: (first: number, last: number) =>
    first === last ? `Step ${first}: in the table.` : `Steps ${first} to ${last}: row by row in the table.`,
} as const;

export const CAUTIONS = { heading: 'Take care' } as const;

export const CHECKS = {
  heading: 'Before and while winding',
  what: 'what',
  nominal: 'nominal',
  limits: 'limits',
  unit: 'unit',
  reading: 'reading',
  read: 'read',
  good: 'in limits',
  none: '–',
  tap: 'tap',
  taps: 'Every tap, measured from the start S',
  tapsMore: 'Every tap, continued',
  lengthIn: (unit: string) => `wound length ${unit}`,
  resistance: 'DC Ω at 20 °C',
  meterShows: (kHz: string) => `meter µH at ${kHz} kHz`,
  resonance: (pf: string) => `kHz with ${pf} pF`,
  meter: (name: string | null, kHz: string, percent: string) => `${name ?? 'Meter'} at ${kHz} kHz, ± ${percent} %:`,
  nowhere: 'not to be trusted on this coil.',
  trusted: (from: number, to: number, of: number) => {
    if (from === 1 && to === of) return of === 1 ? 'can be trusted.' : 'can be trusted on every tap.';
    if (to === of)
      return from === of ? 'can be trusted on the whole coil only.' : `can be trusted from tap ${from} on.`;
    return from === to ? `can be trusted on tap ${from} only.` : `can be trusted on taps ${from} to ${to}.`;
  },
  brackets: (why: string) => `In brackets where not: ${why}.`,
  doubts: {
    leads: (uh: string) => `its leads, ± ${uh} µH after zeroing, weigh more than its accuracy`,
    resistance: () => 'it sees more resistance than reactance, Q is below 1',
    capacitance: () => 'it measures too near the resonance of the coil with itself',
  },
  insteadResonance: 'Measure resonance there.',
  instead:
    'Measure resonance with a known capacitor there, or take an instrument with four wires and a higher frequency.',
  limitsHold: (inputs: string) => `Limits hold for 95 of 100 coils; widened most by ${inputs}.`,
  measureHow:
    'S on the earthy terminal, turns beyond the tap open, a diameter clear all round; leads zeroed. Four wires below 1 Ω.',
  resonanceHow: 'Resonance: couple loosely, no probe on the coil.',
  probed: (pf: string) => `kHz, ${pf} pF + probe`,
  probedElsewhere: 'With generator and probe: in the reference sheet.',
  probedAlone: 'kHz, probe alone',
  width: 'width kHz',
  generator: (ohm: string, pf: string | null) =>
    pf === null ? `a loose loop from the generator (${ohm})` : `the generator (${ohm}) through ${pf}`,
  probe: (pf: string, ohm: string) => `probe (${pf}, ${ohm})`,
  /** Common practice. */
  probedHow: (generator: string, probe: string) =>
    `Resonance: ${generator} and the ${probe} on the tap, whatever they do to it counted in; width: between the two frequencies with 0.707 of the most. Much wider: couple more loosely, look at capacitor and joints, for damp and metal; twice as wide: for a shorted turn.`,
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
  range: 'tunes kHz',
  former: 'Former, before winding',
  part: 'size',
  bore: 'bore',
  wall: 'wall',
  ribSize: 'ribs, width × depth',
  notch: 'depth of the notches',
  length: 'length, foot to top',
  rim: 'rim diameter',
  groove: 'depth of the groove',
  signature: ['wound by', 'date', 'checked by', 'date', 'coil no.'],
} as const;

export const ADVICE = {
  heading: 'The whole coil reads high or low',
  doing: 'what to do',
  /** Of the meter, on the whole coil. */
  when: 'when it shows µH',
  tapPercent: (tap: number) => `tap ${tap} %`,
  whole: 'whole %',
  over: (uh: string) => `over ${uh}`,
  under: (uh: string) => `under ${uh}`,
  never: '–',
  between: (low: string, high: string) => `${low}–${high}`,
  how: (low: string, high: string) => `From ${low} to ${high} µH leave it. Measure again after each.`,
  howNoMeter:
    'The meter is not to be trusted here: go by the resonance. 1 % more inductance is 0.5 % less frequency. Take the line that comes nearest, measure again after each.',
  sections: 'One tap reads high or low',
  sectionsMore: 'One tap, continued',
  tap: 'tap',
  aTurn: 'turn ∓ %',
  countAgain: 'count again outside µH',
  longer: (length: string) => `+${length} %`,
  degrees: '°/%',
  /** The first tap that is out names the section. */
  sectionsHow:
    'The first tap from S that is out names the section: the one that ends there. Out by more than half of what a turn less or more does (turn ∓): count again.',
  /** What the section itself allows. */
  tight: {
    groove: 'Else look for a turn out of the groove or slack, or a tap in the wrong place.',
    close: 'Else it is tight when it reads high, loose when low: ease or press its turns.',
    spacer: 'Else it is tight when it reads high, loose when low: ease or press its turns.',
  },
  /** Whether a tap of this kind can be moved. */
  move: {
    'twisted loop':
      'Or, before it is soldered, wind back and twist the tap anew, moved by °/%: back towards S when high, on when low.',
    'lifted turn': 'Or move the strip along the turn by °/%: back towards S when high, on when low.',
    'cut pair': 'Its holes hold the tap; on the next former move it by °/%, back towards S when high, on when low.',
    lug: 'Or slide the lug along the turn by °/%: back towards S when high, on when low.',
    'drawn in': 'Its hole holds the tap; on the next former move it by °/%, back towards S when high, on when low.',
  },
} as const;

export const LINE = {
  heading: 'L and own capacitance by two capacitors',
  across: 'added pF',
  up: '1/f² in 1/MHz²',
  capacitor: 'pF',
  expected: 'kHz',
  limits: 'limits kHz',
  reading: 'f kHz',
  square: '(1000/f)²',
  /** y is (1000/f)². */
  formula: (factor: string) => [`L = ${factor} × (y₂ − y₁)/(C₂ − C₁) =`, 'C₀ = y₁ × (C₂ − C₁)/(y₂ − y₁) − C₁ ='],
  formulaUnits: ['µH', 'pF'],
  how: 'Whole coil, S earthed; y is (1000/f)². Draw the readings in: sound ones lie on a straight line. Its slope gives L; it meets the axis C₀ left of 0, the coil’s own capacitance and clips.',
  expect: (uh: string, pf: string) => `Expected: L ${uh} µH, C₀ ${pf} pF; grey: the limits.`,
  /** Of a graph that holds without them. */
  probed: (pf: string) =>
    `With generator and probe on the coil the line lies ${pf} pF further left: C₀ is so much more.`,
  known: (percent: string, uhPercent: string, pf: string) =>
    `Capacitors known to ${percent} % leave ± ${uhPercent} % of L and ± ${pf} pF of C₀ open.`,
  second: 'A second known capacitor is needed, two to four times the first.',
} as const;
