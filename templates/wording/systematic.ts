/** What is said of the error that all coils of a kind share. Figures come with their unit. */

export const SYSTEMATIC = {
  slot: ({ of, tap, capacitancePf }: { of: string; tap: number | null; capacitancePf: number | null }): string =>
    of === 'former'
      ? 'the former'
      : of === 'twenty'
        ? '20 turns'
        : of === 'length'
          ? `the wound length up to tap ${tap}`
          : of === 'resonance'
            ? `the resonance of tap ${tap} with ${capacitancePf} pF`
            : `the inductance of tap ${tap}`,

  /** What is off: `size` with its limits. */
  off: {
    diameter: (high: boolean, size: string, seen: boolean) =>
      seen
        ? `The former comes out ${high ? 'wide' : 'small'}: mean diameter ${size}, measured across it too.`
        : `The turns come out ${high ? 'wide' : 'narrow'}: mean diameter ${size}. Most likely the former is ${high ? 'wide' : 'small'}.`,
    pitch: {
      close: (high: boolean, size: string) =>
        high
          ? `The wire lies loose: pitch ${size}.`
          : `The wire lies tight, or is thinner over its covering than its table says: pitch ${size}.`,
      spacer: (high: boolean, size: string) =>
        high
          ? `The turns lie wide: pitch ${size}. The spacer or the wire is thicker than planned, or they are laid loose.`
          : `The turns lie narrow: pitch ${size}. The spacer or the wire is thinner than planned.`,
      groove: (high: boolean, size: string) =>
        `The print comes out ${high ? 'tall' : 'low'}: pitch of the groove ${size}. That is mended by the z of printer.scale.`,
    },
    gaps: (high: boolean, size: string) =>
      `Taps push the next turn ${high ? 'farther aside' : 'less aside'} than planned: gaps ${size}.`,
    meter: (high: boolean, size: string) => `The meter reads ${high ? 'high' : 'low'}: ${size}.`,
    leads: (high: boolean, size: string) =>
      high
        ? `The leads of the meter are in its readings: ${size}. Zero it with its clips shorted where the coil will lie.`
        : `The meter takes too much off for its leads: ${size}. Zero it anew, its clips shorted as they lie at a coil.`,
    capacitor: (high: boolean, size: string, pf: string) =>
      `The capacitor marked ${pf} pF has ${high ? 'more' : 'less'}: ${size}.`,
    strays: (high: boolean, size: string) =>
      `Clips and coil put ${high ? 'more' : 'less'} capacitance across the readings than reckoned: ${size}.`,
  },
  nothing: 'Nothing is off for all coils alike beyond what these readings can tell.',
  within: {
    diameter: (size: string) => `Mean diameter ${size}: as planned, as far as these readings tell.`,
    pitch: (size: string) => `Pitch ${size}: as planned, as far as these readings tell.`,
    gaps: (size: string) => `Gaps at taps ${size}: as planned, as far as these readings tell.`,
    meter: (size: string) => `Meter ${size}: as stated, as far as these readings tell.`,
    leads: (size: string) => `Leads of the meter ${size}: zeroed, as far as these readings tell.`,
    capacitor: (size: string, pf: string) => `Capacitor of ${pf} pF ${size}: as marked, as far as these readings tell.`,
    strays: (size: string) => `Clips and coil ${size}: as reckoned, as far as these readings tell.`,
  },
  signed: (value: string, half: string, unit: string, percent: string | null) =>
    `${value} ± ${half} ${unit}${percent === null ? '' : ` (${percent} %)`}`,

  name: {
    diameter: 'mean diameter',
    pitch: 'pitch',
    gaps: 'gaps at taps',
    meter: 'meter',
    leads: 'leads of the meter',
    capacitor: 'known capacitor',
    strays: 'capacitance of clips and coil',
  },
  apart: (a: string, b: string) =>
    `Something is off, and these readings cannot tell ${a} from ${b}: either may be the cause, or both in part.`,
  measure: {
    former: 'Measure some formers across at three places each.',
    resonance: 'Take the resonance of the whole coil with a known capacitor.',
    formerOrResonance:
      'Measure some formers across at three places each, or take the resonance of the whole coil with a known capacitor.',
    length: 'Measure the wound length of the whole coil.',
    twenty: 'Measure over 20 turns between two taps.',
    inductance: 'Read the inductance of the first tap and of the whole coil on the meter.',
    another: 'Read one coil with another meter, or a standard coil with this one.',
  },

  misfit: {
    fits: 'What is left lies within the noise of reading: these causes are enough.',
    few: 'Too few things are read to tell whether these causes are enough.',
    tap: (tap: number, percent: string, turns: string) =>
      `Tap ${tap} stands off by ${percent} % at all coils (${turns} of a turn): look at its hole, its place in the template and its lead.`,
    other:
      'What is left is more than the noise of reading: something else is off, or readings were taken otherwise than planned.',
  },

  leftOut: {
    counted: (counted: number, planned: number, tap: number | null) =>
      `${counted} turns counted up to ${tap === null ? 'the finish' : `tap ${tap}`}, ${Number(planned.toFixed(2))} planned: the error is this coil’s own.`,
    step: (turns: number, from: number | null, to: number) =>
      `Reads like ${Math.abs(turns)} ${Math.abs(turns) === 1 ? 'turn' : 'turns'} too ${turns > 0 ? 'many' : 'few'} between ${from === null ? 'the start' : `tap ${from}`} and tap ${to}: the error is this coil’s own.`,
    slip: (slot: string, written: string, percent: number) =>
      `${written} for ${slot} is ${Math.abs(percent).toFixed(0)} % too ${percent > 0 ? 'high' : 'low'}: another coil, tap or unit.`,
    reading: (slot: string, written: string, sigmas: number) =>
      `${written} for ${slot} lies ${sigmas.toFixed(0)} standard deviations off what the coil’s other readings tell.`,
    coil: 'Stands farther off all other coils than one coil in ten thousand would: the error is this coil’s own.',
  },
} as const;
