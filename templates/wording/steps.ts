/** The steps of winding in words, and how each tap method is done. Common practice, from memory. */

export type MethodName = 'twisted loop' | 'lifted turn' | 'cut pair' | 'lug' | 'drawn in';

export const HOW: Record<MethodName, (loopMm: number) => string[]> = {
  'twisted loop': (mm) => [
    `Stop at the tap's turn and angle and pull out a loop of ${mm} mm of wire.`,
    'Hold the root against the former and twist the loop tight down to the root.',
    'Go on winding; the next turn lies against the root.',
    'When the coil is done, bare the end of each loop, tin it, and solder the twist at its root.',
  ],
  'lifted turn': () => [
    'Slip a strip of card or plastic, 5 mm wide and 1 mm thick, under the turn at the tap’s angle.',
    'Go on winding with the strip in place; neither neighbour is moved.',
    'When the coil is done, bare the crown of the lifted turn and tin it.',
    'Solder the lead to the crown; leave the strip in.',
  ],
  'cut pair': (mm) => [
    `Lead the wire in through hole a, leave ${mm / 2} mm inside and cut.`,
    `Lead the new end out through hole b with ${mm / 2} mm inside and go on winding, as tight as before.`,
    'Bare both ends, tin every strand, twist the pair and solder it.',
  ],
  lug: () => [
    'Lay a lug of 0.5 mm sheet, 4 mm wide, under the turn at the tap’s angle.',
    'Go on winding; the next turn lies against the lug’s edge.',
    'When the coil is done, bare the wire on the lug, solder it, and lead off from the eye.',
  ],
  'drawn in': (mm) => [
    `Stop at the tap's hole and draw a loop of ${mm} mm of wire in through it.`,
    'Twist the loop tight inside the former, up to the wall.',
    'Go on winding in the next turn.',
    'When the coil is done, bare the end of each loop and tin it.',
  ],
};

export const STEP = {
  measure: (mm: string, effect: string) =>
    `Measure the former: ${mm} mm outside. 0.1 mm more is ${effect} % more inductance.`,
  /** `gap` on the radius; `climbs`: the seam has a step. */
  glue: (sections: number, gap: string, climbs: boolean, length: string) =>
    `Try the ${sections} sections of the former dry, former-1 lowest: notch over tongue${climbs ? ', the steps of the seam together' : ''}, the seam closed all round. Glue them with slow epoxy (glue gap ${gap} mm round the spigot), keep the holes free, let it cure, and file the seam flush. Length: ${length} mm.`,
  drill: (what: string) => `Wrap the template round the tube, printed side out, and drill ${what}. Take the burrs off.`,
  /** `size` when all holes are alike. */
  holes: (count: number, size: string | null, taps: string, rest: string) =>
    size === null ? `the ${count} holes (taps ${taps}, all others ${rest})` : `the ${count} holes (${size})`,
  mark: 'Wrap the template and mark the angle and place of every tap on the former.',
  markRibs: 'Mark the notch of every tap: the upper ring numbers the ribs, heights are in the table.',
  set: (metres: string, low: string, high: string) =>
    `Have ${metres} m of wire on the spool. Set the drag to ${low} to ${high} N.`,
  spacer: (name: string) => `Have the spacer ready: ${name}, wound along beside the wire from start to finish.`,
  start: (mm: number) => `Lead the end in at A and out at S; leave ${mm} mm outside.`,
  direction: {
    right: 'Wind right-hand: as you face the coil, foot down, the turns climb to the right.',
    left: 'Wind left-hand: as you face the coil, foot down, the turns climb to the left.',
  },
  /** `to` says where to stop, as a turn and an angle. */
  wind: (turns: string, to: string) => `Wind ${turns} turns, to ${to}`,
  turn: (turn: number) => `turn ${turn}`,
  turnAndAngle: (turn: number, angle: string) => `turn ${turn} and on to ${angle}°`,
  /** `rib` as it stands on the upper ring. */
  turnAndRib: (turn: number, rib: string) => `turn ${turn}, ${rib === 'S' ? 'at rib S' : `and on to rib ${rib}`}`,
  tap: (tap: number) => `make tap ${tap}.`,
  unitTap: (unit: number) => `make unit tap u${unit}.`,
  check: (mm: string) => `At turn 20 stop: 20 turns measure ${mm} mm edge to edge; press or ease them until they do.`,
  finish: (mm: number) => `Keep the tension; lead the end in at F and out at F+1, tight; leave ${mm} mm.`,
  afterMeasure: 'Measure by the sheet “to check by” before the wire is cut short; trim at the finish row.',
  takeSpacer: 'Unwind the spacer, or leave it in; little changes if it stays.',
  taps: {
    firm: 'Bare, tin and solder the taps.',
    soft: 'Bare, tin and solder the taps, with card between joint and former and the iron on for seconds only: the former softens.',
  },
  posts:
    'Sleeve each lug’s lead and lead it straight down to its post at the foot: through the eye, once round the post, and on. Joints go beyond the post, off the plastic.',
  seal: {
    textile:
      'Dry the coil in a warm place for a day; dope it sparingly (try the dope on a scrap of the former first), let it cure a day, measure again.',
    other: 'Fix the end turns with a touch of varnish at three places; let it cure a day, measure again.',
  },
} as const;

export const CORRECTION = {
  turnOff: 'one turn off at the finish (into F-1)',
  turnOn: 'one turn on at the finish (into F+1)',
  spreadFinish: 'last five turns spread, one wire apart each',
  spreadStart: 'first five turns spread, one wire apart each',
  thicker: 'former 0.1 mm larger (next coil)',
} as const;
