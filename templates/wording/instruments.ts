/** The fixed words of what generator and probe will show, in the reference sheet. */

export const INSTRUMENTS = {
  part: 'generator and probe',
  heading: 'On the bench with generator and probe',
  more: 'On the bench with generator and probe, continued',
  tap: 'tap',
  with: 'with pF',
  alone: 'alone kHz',
  aloneWidth: 'width',
  aloneQ: 'Q',
  shows: 'shows kHz',
  limits: 'limits',
  width: 'width kHz',
  widthLimits: 'limits',
  q: 'Q',
  none: '–',
  stated: 'As the job states them',
  usual: 'As is usual, for the job does not say',
  set: (source: string, generator: string, probe: string) =>
    `${source}: ${generator}; ${probe}. S on the earthy terminal, turns beyond the tap open, nothing else connected; capacitor, generator and probe at the tap.`,
  generator: (ohm: string, pf: string | null) =>
    pf === null ? `generator of ${ohm}, by a loop so loose that it loads nothing` : `generator of ${ohm} through ${pf}`,
  probe: (pf: string, ohm: string) => `probe of ${pf} and ${ohm}`,
  how: 'Alone: coil and capacitor without them. Width: between the two frequencies at which 0.707 of the most is left, the generator’s level kept even; Q is resonance over width. 0 pF: no capacitor.',
  limitsAre: (tolerance: string, copper: string, former: string, reading: string, capacitor: string, probe: string) =>
    `Limits of the resonance: 95 of 100 coils, capacitors, clips, probes and couplings (± ${tolerance} %). Limits of the width: loss of the wire to ${copper} %, of the former to ${former} %, of the instruments to ${tolerance} %, the reading to ${reading} %; the upper one counts loss tangents of ${capacitor} in the capacitor and ${probe} in the probe besides.`,
  /** Common practice. */
  suspect:
    'Much wider than that: couple the generator more loosely until the width stays; try another capacitor; look for a joint that is not through, for damp, wax or metal about the coil, and for a probe whose resistance at this frequency is below that at DC, as its data sheet tells. Twice the upper limit: look for a shorted turn, which lowers the inductance too. Much lower in frequency: a probe set to ×1 adds about 100 pF.',
} as const;
