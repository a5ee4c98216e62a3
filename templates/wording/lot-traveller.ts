/** The fixed words of the travellers: a page that goes with each coil of a lot, and the contents before them. */

export const TRAVELLER = {
  document: 'Traveller',
  all: 'Travellers',
  serial: 'serial',
  job: 'job',
  kind: 'kind',
  lot: 'lot',
  page: (n: number, of: number) => `page ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
  made: (program: string, date: string | null) => (date === null ? program : `${program}, ${date}`),
  /** Of a coil whose taps need more than one page. */
  part: (n: number, of: number) => `sheet ${n} of ${of} of this coil`,
  goesOn: (from: string, to: string) => `Goes on on the next page with taps ${from} to ${to}.`,
} as const;

export const CONTENTS = {
  part: 'contents',
  more: 'contents, continued',
  kinds: 'Kinds',
  kindsMore: 'Kinds, continued',
  coils: 'Coils',
  coilsMore: 'Coils, continued',
  kind: 'kind',
  job: 'job',
  count: 'coils',
  turns: 'turns',
  taps: 'taps',
  wire: 'wire',
  record: 'record',
  serial: 'serial',
  page: 'page',
  reel: 'reel',
  toBuy: 'to buy',
  sheet: (n: number, of: number) => `page ${n} of ${of}`,
  how: 'Pages are counted from the first of this file. The code on a traveller says its serial and the hash of its record, a blank between them.',
} as const;

export const STRIP = {
  wire: 'Wire',
  reel: 'Reel',
  reelHow: 'one piece, no joint',
  toBuy: 'to buy',
  toBuyHow: 'no reel has enough left',
  cut: 'Wire to cut',
  ends: (wire: string, grams: string) => `${wire} of it in the ends; ${grams} g`,
  winding: 'Winding',
  turns: (turns: string) => `${turns} turns`,
  pitch: (hand: string, pitch: string, how: string) => `${hand}; pitch ${pitch}, ${how}`,
  close: 'close wound',
  groove: 'in the groove',
  spacer: (name: string) => `spacer ${name}`,
  drag: 'Drag',
  steady: 'steady throughout',
  former: 'Former',
  made: { printed: (material: string) => `printed, ${material}`, tube: (material: string) => `tube, ${material}` },
} as const;

export const STEPS = {
  before: 'Steps up to the last tap',
  after: 'Steps when it is wound',
  elsewhere: (numbers: string) => `Steps ${numbers}: by the winding sheet.`,
} as const;

export const TABLE = {
  heading: 'Tap by tap: tick when made, then measure from the start S',
  more: 'Tap by tap, continued',
  step: 'step',
  tap: 'tap',
  turn: 'turn',
  angle: 'at °',
  rib: 'rib',
  wire: (unit: string) => `wire ${unit}`,
  length: (unit: string) => `wound length ${unit}`,
  ohms: 'DC Ω',
  meter: 'µH or kHz',
  read: 'read',
  none: '–',
  between: (low: string, high: string) => `${low}–${high}`,
  µH: (kHz: string) => `µH: meter at ${kHz} kHz.`,
  resonance: (pf: string) => `kHz: resonance with ${pf} pF, loosely coupled.`,
  how: 'Resistance at 20 °C. Turns beyond the tap open, a diameter clear all round. Limits hold for 95 of 100 coils.',
} as const;

export const READINGS = {
  heading: 'Other readings',
  what: 'what',
  limits: 'limits',
  read: 'read',
} as const;

export const RESULT = {
  heading: 'Result',
  boxes: ['pass', 'rework', 'scrap'],
  remarks: 'remarks: tap, fault, what was done',
  wound: 'wound by',
  checked: 'checked by',
  signature: 'signature',
  date: 'date',
} as const;
