/** The steps of winding in words, and how each tap method is done. Common practice, from memory. */

export type MethodName = 'twisted loop' | 'lifted turn' | 'cut pair' | 'lug' | 'drawn in';

/** Says a length given in mm, with its unit. */
export type Size = (mm: number, digits: number) => string;

export const HOW: Record<MethodName, (loopMm: number, size: Size) => string[]> = {
  'twisted loop': (mm, size) => [
    `Stop at the tap's turn and angle and pull out a loop of ${size(mm, 0)} of wire.`,
    'Hold the root against the former and twist the loop tight down to the root.',
    'Go on winding; the next turn lies against the root.',
    'When the coil is done, bare the end of each loop, tin it, and solder the twist at its root.',
  ],
  'lifted turn': (_, size) => [
    `Slip a strip of card or plastic, ${size(5, 0)} wide and ${size(1, 0)} thick, under the turn at the tap’s angle.`,
    'Go on winding with the strip in place; neither neighbour is moved.',
    'When the coil is done, bare the crown of the lifted turn and tin it.',
    'Solder the lead to the crown; leave the strip in.',
  ],
  'cut pair': (mm, size) => [
    `Lead the wire in through hole a, leave ${size(mm / 2, 0)} inside and cut.`,
    `Lead the new end out through hole b with ${size(mm / 2, 0)} inside and go on winding, as tight as before.`,
    'Bare both ends, tin every strand, twist the pair and solder it.',
  ],
  lug: (_, size) => [
    `Lay a lug of ${size(0.5, 1)} sheet, ${size(4, 0)} wide, under the turn at the tap’s angle.`,
    'Go on winding; the next turn lies against the lug’s edge.',
    'When the coil is done, bare the wire on the lug, solder it, and lead off from the eye.',
  ],
  'drawn in': (mm, size) => [
    `Stop at the tap's hole and draw a loop of ${size(mm, 0)} of wire in through it.`,
    'Twist the loop tight inside the former, up to the wall.',
    'Go on winding in the next turn.',
    'When the coil is done, bare the end of each loop and tin it.',
  ],
};

export const STEP = {
  measure: (outside: string, more: string, effect: string) =>
    `Measure the former: ${outside} outside. ${more} more is ${effect} % more inductance.`,
  /** `gap` on the radius; `climbs`: the seam has a step. */
  glue: (sections: number, gap: string, climbs: boolean, length: string) =>
    `Try the ${sections} sections of the former dry, former-1 lowest: notch over tongue${climbs ? ', the steps of the seam together' : ''}, the seam closed all round. Glue them with slow epoxy (glue gap ${gap} round the spigot), keep the holes free, let it cure, and file the seam flush. Length: ${length}.`,
  /** Paper and wood give off and take up water for as long as they live, and shrink under the turns. */
  dry: 'Dry the tube in a warm place for a day, then seal it inside, outside and in its holes with two thin coats of shellac or varnish; let it cure. Measure it again.',
  drill: (what: string) => `Wrap the template round the tube, printed side out, and drill ${what}. Take the burrs off.`,
  /** `size` when all holes are alike. */
  holes: (count: number, size: string | null, taps: string, rest: string) =>
    size === null ? `the ${count} holes (taps ${taps}, all others ${rest})` : `the ${count} holes (${size})`,
  mark: 'Wrap the template and mark the angle and place of every tap on the former.',
  markRibs: 'Mark the notch of every tap: the upper ring numbers the ribs, heights are in the table.',
  set: (wire: string, tension: string) => `Have ${wire} of wire on the spool. Set the drag to ${tension}.`,
  spacer: (name: string) => `Have the spacer ready: ${name}, wound along beside the wire from start to finish.`,
  start: (left: string) => `Lead the end in at A and out at S; leave ${left} outside.`,
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
  check: (length: string) =>
    `At turn 20 stop: 20 turns measure ${length} edge to edge; press or ease them until they do.`,
  finish: (left: string) => `Keep the tension; lead the end in at F and out at F+1, tight; leave ${left}.`,
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
  /** `by` turns on, or off when below 0; `hole` of the finish row where there is one. */
  turns: (by: number, hole: string | null) => {
    const count = Math.abs(by);
    const what = `${count} turn${count === 1 ? '' : 's'} ${by < 0 ? 'off' : 'on'}`;
    return hole === null ? `${what} at the finish` : `${what}, into ${hole}`;
  },
  spreadFinish: (count: number) => `last ${count} spread by a wire`,
  pressFinish: (count: number) => `last ${count} pressed by ½ spacer`,
  spreadStart: (count: number) => `first ${count} spread by a wire`,
  wider: 'next coil: pitch +1 %',
  thicker: (length: string) => `next coil: former +${length}`,
} as const;
