/** The fixed words of the wrap template. */

export const WRAP = {
  document: 'Wrap template',
  part: (scale: string) => `true scale ${scale}`,
  tile: (name: string) => `true scale, tile ${name}`,
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  unit: 'mm',
  inch: 'in',
  print: (rulers: string, square: string) =>
    `Print at 100 %, no scaling. First measure the rulers (${rulers}) and the square (${square}).`,
  rulers: '100 mm',
  rulersInch: '100 mm and 4 in',
  side: 'Printed side out, arrow up. Cut along the thick outline; wrap it round; the left edge comes to the line beside the overlap.',
  setTube: 'Lower edge: the datum. Set it flush with the lower end.',
  setFoot: 'Lower edge: the datum. Set it flush with the lower face of the foot.',
  setRim: (length: string) => `Lower edge: set it on the rim of the foot; it lies ${length} above the datum.`,
  jig: 'Prick each centre through, then drill. Dashed: edges of the winding.',
  printed: 'The holes are in the former: this sheet checks and marks them. Dashed: edges of the winding.',
  /** Common practice, from memory. */
  seam: (angle: string) =>
    `Overlap at ${angle}°, clear of holes: turn a straight seam of the tube under it. A spiral seam: glue down what lifts, and turn the tube so that no hole meets it.`,
  /** What stands at the taps, and on which side; for those without holes where the method needs none. */
  taps: {
    'twisted loop': 'X, with a loop where there is room: a tap without a hole; its loop stands outwards, on this side.',
    'lifted turn': 'X in a frame: a tap without a hole; the turn is lifted over a strip, on this side.',
    lug: 'X with a bar: a tap without a hole; its lug stands outwards, on this side, above the turn; dashed: its foot.',
    'drawn in': 'Dashed loops: at these holes the taps go in, behind the paper.',
    'cut pair': 'At the pairs of holes a and b both ends of the wire go in, behind the paper.',
  },
  sections: 'Thin line all round: the seam of the sections.',
  unlabelled: (names: string) => `No room for the label of ${names}: see the tap table of the winding sheet.`,
  measure: (outside: string, half: string, paper: string, round: string, unit: string, from = 'the datum') =>
    `Across: angle × (outside radius ${outside} + ${half}, half of ${paper} paper); ${round} once round. Up: ${unit} from ${from}.`,
  tiles:
    'Join the tiles so that crosses of the same letter cover one another; cut one of the two along the line of crosses.',
  overlap: ['overlap here:', 'edge to this line'],
  tubeSeam: 'seam of the tube',
  up: 'up',
  out: 'printed side out',
  wire: { right: 'the wire climbs to the right', left: 'the wire climbs to the left' },
  square: (size: string) => [
    'check square',
    'from the left edge of the',
    'left line to the left edge',
    'of the right line:',
    `${size};`,
    'bottom to top likewise',
  ],
  datum: 'lower edge = datum',
  aboveDatum: (length: string) => `lower edge = datum + ${length}`,
} as const;
