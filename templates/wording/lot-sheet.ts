/** The fixed words of the lot sheet: what a lot takes and how it goes through the shop. */

export const LOT_SHEET = {
  document: 'Lot sheet',
  lot: 'lot',
  summary: 'coils and wire',
  more: 'continued',
  print: 'beds and runs',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
  none: '–',
} as const;

export const KINDS = {
  heading: 'Kinds',
  more: 'Kinds, continued',
  kind: 'kind',
  job: 'job',
  coils: 'coils',
  taps: 'taps',
  turns: 'turns',
  wire: 'wire',
  cut: (unit: string) => `wire a coil ${unit}`,
  cutG: 'g a coil',
  plastic: 'former g',
  serials: 'serials',
  total: (coils: string, kinds: string, wire: string, grams: string) => `${coils} of ${kinds}; ${wire}, ${grams} g.`,
  coilsOf: (count: number) => (count === 1 ? '1 coil' : `${count} coils`),
  kindsOf: (count: number) => (count === 1 ? '1 kind' : `${count} kinds`),
  totalWire: (length: string) => `${length} of wire`,
} as const;

export const WIRES = {
  heading: 'Wire',
  more: 'Wire, continued',
  wire: 'wire',
  coils: 'coils',
  needed: (unit: string) => `needed ${unit}`,
  neededG: 'needed g',
  shelf: (unit: string) => `on reels ${unit}`,
  buy: (unit: string) => `to buy ${unit}`,
  scrap: (unit: string) => `ends too short ${unit}`,
  plan: 'plan',
  best: 'proven best',
  /** Of a plan that may be bettered: what no plan can go below. */
  bound: (parts: readonly string[]) => `not proven; at best ${parts.join(', ')}`,
  boundUnserved: (coils: number) => (coils === 1 ? '1 coil short' : `${coils} coils short`),
  boundBuy: (length: string) => `${length} to buy`,
  boundScrap: (length: string) => `${length} of ends`,
  how: 'Every coil is one piece of wire without a joint. Ends too short: what stays on reels that were cut from and is too short for any coil of the lot.',
} as const;

export const REELS = {
  heading: 'Reel by reel: cut in this order',
  more: 'Reel by reel, continued',
  reel: 'reel',
  wire: 'wire',
  left: (unit: string) => `before ${unit}`,
  used: (unit: string) => `cut off ${unit}`,
  rest: (unit: string) => `remains ${unit}`,
  coils: 'coils',
  serials: 'for',
  untouched: 'not cut from',
} as const;

export const BUY = {
  heading: 'Wire to buy: each coil wants one piece',
  more: 'Wire to buy, continued',
  wire: 'wire',
  pieces: 'pieces',
  each: (unit: string) => `each ${unit}`,
  all: (unit: string) => `together ${unit}`,
  serials: 'for',
  total: (wire: string, length: string, grams: string) => `${wire}: ${length}, ${grams} g.`,
} as const;

export const BED = {
  heading: 'Beds, seen from above',
  title: (bed: number, count: number) => `Bed ${bed}: print ${count === 1 ? 'once' : `${count} times`}`,
  facts: (material: string, layer: string, nozzle: string, grams: string) =>
    `${material}, layer ${layer}, nozzle ${nozzle} mm; ${grams} g`,
  where: (path: string, printer: string, size: string) => `${path}; ${printer}, ${size} mm`,
  front: 'front',
  holds: (number: number, name: string, count: number) => `${number} ${name}${count === 1 ? '' : ` (${count})`}`,
} as const;

export const RUNS = {
  heading: 'Run list, machine by machine: tick when it is taken off',
  more: 'Run list, continued',
  machine: 'machine',
  run: 'run',
  bed: 'bed',
  mass: 'g',
  serials: 'formers of',
  jigs: 'jigs',
} as const;

export const MATERIALS = {
  heading: 'Plastic',
  material: 'material',
  mass: 'g if printed solid',
  total: 'all',
  how: 'Infill makes it less; brims and first lines make it more. The slicer says how much.',
} as const;

export const BOUGHT = {
  heading: 'To have ready besides wire and plastic',
  more: 'To have ready, continued',
  what: 'what',
  count: 'how much',
  kinds: 'for',
  none: 'Nothing besides wire and plastic is named by the records of the kinds.',
  tube: (material: string, size: string, bore: string) => `tube, ${material}, ${size}, bore ${bore}`,
  spacer: (name: string) => `spacer, ${name}`,
  spacerHow: (length: string) => `${length} at least`,
  shaft: (size: string, length: string) => `shaft, ${size}, ${length} long`,
  washer: (size: string) => `washer, ${size}`,
  band: 'rubber band for the drag',
  glue: 'slow epoxy for formers in sections',
  pieces: (count: number) => `${count}`,
  kind: (letters: string) => `kind ${letters}`,
  kindsOf: (letters: string) => `kinds ${letters}`,
  formers: (count: number) => (count === 1 ? '1 former' : `${count} formers`),
} as const;

export const CAUTIONS = { heading: 'Take care' } as const;
export const NOTES = { heading: 'What to know' } as const;

export const LABELS = {
  document: 'Labels',
  print: 'Print at 100 %, cut along the lines.',
  size: (size: string) => `Each label ${size} mm.`,
  kind: (kind: string) => `kind ${kind}`,
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  unit: 'mm',
} as const;
