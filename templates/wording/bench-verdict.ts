/** What the bench page says about a reading. Percentages come with their sign, figures without a unit unless one stands here. */

const beside = (pf: string) => (pf === '0' ? 'the probe alone' : `${pf} pF and probe`);

export const VERDICT = {
  what: {
    former: 'former, outside diameter',
    twenty: '20 turns, edge to edge',
    whole: 'whole coil',
    tap: (tap: number) => `tap ${tap}`,
    length: (where: string) => `wound length, ${where}`,
    resistance: (where: string) => `DC resistance at 20 °C, ${where}`,
    inductance: (where: string, kHz: string) => `meter at ${kHz} kHz, ${where}`,
    resonance: (where: string, pf: string) => `resonance with ${pf} pF, ${where}`,
    probed: (where: string, pf: string) => `resonance with ${beside(pf)}, ${where}`,
    width: (where: string, pf: string) => `width at 0.707 with ${beside(pf)}, ${where}`,
  },
  notAFigure: 'A reading is a figure above 0.',
  unit: (unit: string) => `Looks like a slip of the unit: the reading is wanted in ${unit}.`,
  otherTap: (tap: string) => `It is what ${tap} should read: look where the clip sits.`,
  far: 'Too far off for this coil: look at unit, clips and range, and read again.',

  doubt: (why: string) => `The meter is not to be trusted here: ${why}.`,
  tooHigh: 'Above the resonance of the coil with itself the meter shows nothing of use: go by the resonance.',

  former: {
    effect: (percent: string) => `The whole coil will read about ${percent} % of inductance.`,
    low: 'Measure the former again at three places; the taps can be placed anew while winding.',
    high: 'Measure the former again at three places; the taps can be placed anew while winding, or take it down with fine paper.',
  },
  length: {
    low: 'Wound tighter than planned, or a turn is missing: count the wires along one line.',
    high: 'Wound looser than planned, or there is a turn too many: count the wires along one line.',
    press: 'Press the turns together with a card, or enter the length under “Correct while winding”.',
    ease: 'Ease the turns apart with a card, or enter the length under “Correct while winding”.',
    groove: 'The groove sets the pitch: look for a turn out of it, or one that skipped.',
  },
  resistance: {
    low: 'Too low: look for turns that touch bare, a turn too few, or thicker wire.',
    high: 'Too high: a joint that is not through, a clip, a turn too many, or thinner wire.',
    fourWires: 'Below 1 Ω measure with four wires.',
    warm: 'Enter the temperature of the coil: 10 °C are 3.9 %.',
    earlier: 'The first tap from S that is out names the section with the fault.',
  },
  inductance: {
    few: (percent: string) => `Count the turns up to here again: one too few reads ${percent} %.`,
    many: (percent: string) => `Count the turns up to here again: one too many reads ${percent} %.`,
    trim: (doing: string, percent: string) =>
      `Best remedy: ${doing} (${percent} % on the whole coil). Then measure again.`,
    low: 'The section that ends here is wound loosely: press its turns together.',
    high: 'The section that ends here is wound tightly: ease its turns apart.',
    groove: 'Look for a turn out of its groove or slack, or a tap in the wrong place.',
    back: (degrees: string) => `Or move the tap ${degrees}° along the wire, back towards S.`,
    on: (degrees: string) => `Or move the tap ${degrees}° along the wire, on towards F.`,
    next: (degrees: string, way: 'back' | 'on') =>
      `Its holes hold the tap; on the next former move it ${degrees}°, ${way === 'back' ? 'back towards S' : 'on towards F'}.`,
    first: 'If a tap nearer to S is out as well, mend that one first.',
  },
  resonance: {
    low: (percent: string) => `Too low: inductance or stray capacitance is high, by ${percent} % if it is inductance.`,
    high: (percent: string) => `Too high: inductance is low, by ${percent} % if the capacitor is true.`,
    couple: 'Couple more loosely and keep hands and metal a diameter away before believing it.',
  },
  probed: {
    low: 'A probe set to ×1 adds about 100 pF: look at its switch, and at the coupling of the generator.',
    high: 'Look whether probe and generator are those of the job, and whether the capacitor is on.',
  },
  width: {
    q: (q: string, nominal: string) => `It stands for a Q of ${q}; ${nominal} was expected, instruments counted in.`,
    low: 'Narrower than this coil can be: take the two frequencies again where 0.707 of the most is left, and keep the generator’s level even.',
    high: 'Couple the generator more loosely first; then try another capacitor, and look for damp or metal about the coil, a joint that is not through, and what the probe’s data sheet says of its resistance at this frequency.',
    shorted:
      'So wide a resonance is what a shorted turn gives, which lowers the inductance too: look for bare wire that touches.',
  },
  other: { low: 'Below its limits.', high: 'Above its limits.' },
} as const;
