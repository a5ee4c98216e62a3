/** The fixed words of the parts sheet. Cautions: common practice, from memory. */

export const PARTS_SHEET = {
  document: 'Parts sheet',
  list: 'what is printed',
  more: 'what is printed, continued',
  drawings: 'part by part',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  record: (hash: string) => `record ${hash}`,
  none: 'Nothing is printed for this coil.',
} as const;

export const LIST = {
  heading: 'Parts',
  continued: 'Parts, continued',
  part: 'part',
  pieces: 'pieces',
  material: 'material',
  mass: 'g each',
  size: (unit: string) => `size ${unit}, as it is printed`,
  file: 'file',
  bed: 'bed',
  ofLot: 'lot',
  sheet: 'sheet',
  total: (pieces: string, grams: string, each: string) =>
    `${pieces}, ${grams} g if printed solid (${each}). Infill makes it less; the slicer says how much.`,
  piece: (count: number) => (count === 1 ? '1 piece' : `${count} pieces`),
  ofMaterial: (material: string, grams: string) => `${material} ${grams} g`,
} as const;

export const BEDS = {
  heading: 'Beds',
  continued: 'Beds, continued',
  bed: 'bed',
  file: 'file',
  material: 'material',
  holds: 'what lies on it',
  copies: (part: string, count: number) => (count === 1 ? part : `${count} × ${part}`),
} as const;

export const PRINTER = {
  heading: 'Printer, as it was taken',
  what: 'what',
  value: 'value',
  from: '',
  given: 'given',
  assumed: 'assumed',
  bed: 'bed',
  height: 'tallest part',
  nozzle: 'nozzle',
  line: 'width of a line',
  layer: 'height of a layer',
  holes: 'added to holes, on diameter',
  clearance: 'gap of fits, on diameter',
  scale: 'files enlarged, x y z',
  material: 'material of jigs',
  shaft: { round: 'round shaft', hexagon: 'hexagon shaft, across flats' },
  spool: 'wire spool, diameter × width',
  spoolBore: 'bore of the spool',
  mm: (text: string) => `${text} mm`,
  percent: (text: string) => `${text} %`,
  note: 'Assumed: left out of the job. Measure yours and write them in before a long print.',
} as const;

export const FINISHED = {
  heading: 'Measure on the finished former',
  what: 'size',
  reading: 'reading',
  outside: 'outside diameter',
  length: 'length, foot to top',
  tenth: (length: string, percent: string, more: boolean) =>
    `${length} more of outside diameter makes the inductance ${percent} % ${more ? 'greater' : 'smaller'}, as much less ${percent} % ${more ? 'smaller' : 'greater'}.`,
  scale: 'If it came out off size: wanted size over measured size is the scale to write under printer.',
} as const;

export const CAUTIONS = {
  heading: 'Take care',
  hot: 'Nozzle and bed burn skin: let both cool before a part is taken off.',
  fumes: (material: string) => `${material} gives off fumes while it is printed: air the room.`,
  softens: (material: string, celsius: number) =>
    `${material} softens near ${celsius} °C: no lamp, sun, iron or hot glue on it.`,
  filled: 'No carbon- or metal-filled filament anywhere near a coil: it takes power out of it and may short turns.',
  turning: 'Nothing printed on a shaft that a drill turns fast: only by hand, or at its slowest speed.',
  edges: 'Trim away from the hand; printed edges and thin strings of plastic cut.',
} as const;

export const CARD = {
  facts: (pieces: number, material: string, grams: string, size: string) =>
    `${LIST.piece(pieces)}, ${material}, ${grams} g ${pieces === 1 ? '' : 'each '}if solid, ${size}`,
  where: (file: string, bed: string) =>
    bed === '' ? file : bed === LIST.ofLot ? `${file}, on the beds of the lot` : `${file}, bed ${bed}`,
  use: (text: string) => `Use: ${text}`,
  print: (text: string) => `Print: ${text}`,
  scale: (text: string, unit: string) => `scale ${text}, sizes in ${unit}`,
  missing: (names: string) => `No room for the mark of ${names}.`,
  continued: (name: string) => `${name}, continued`,
} as const;
