/** The fixed words of the wrap template. */

export const WRAP = {
  document: 'Wrap template',
  part: (scale: string) => `true scale ${scale}`,
  tile: (name: string) => `true scale, tile ${name}`,
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  unit: 'mm',
  print: 'Print at 100 %, no scaling. First measure the two rulers (100 mm) and the square (50 mm).',
  side: 'Printed side out, arrow up. Cut along the thick outline; wrap it round; the left edge comes to the line beside the overlap.',
  setTube: 'Lower edge: the datum. Set it flush with the lower end.',
  setFoot: 'Lower edge: the datum. Set it flush with the lower face of the foot.',
  setRim: (mm: string) => `Lower edge: set it on the rim of the foot; it lies ${mm} mm above the datum.`,
  jig: 'Prick each centre through, then drill. Dashed: edges of the winding.',
  printed: 'The holes are in the former: this sheet checks and marks them. Dashed: edges of the winding.',
  unbored: 'X: place of a tap without a hole.',
  unlabelled: (names: string) => `No room for the label of ${names}: see the tap table of the winding sheet.`,
  measure: (outside: string, paper: string, round: string) =>
    `Across: angle × (outside radius ${outside} mm + ${paper} mm, half of 0.1 mm paper); ${round} mm once round. Up: mm from the datum.`,
  tiles:
    'Join the tiles so that crosses of the same letter cover one another; cut one of the two along the line of crosses.',
  overlap: ['overlap here:', 'edge to this line'],
  up: 'up',
  out: 'printed side out',
  wire: { right: 'the wire climbs to the right', left: 'the wire climbs to the left' },
  square: [
    'check square',
    'from the left edge of the',
    'left line to the left edge',
    'of the right line: 50 mm;',
    'bottom to top likewise',
  ],
  datum: 'lower edge = datum',
  aboveDatum: (mm: string) => `lower edge = datum + ${mm} mm`,
} as const;
