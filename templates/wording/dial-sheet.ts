/** The fixed words of the dial sheet. */

export const DIAL = {
  document: 'Dial sheet',
  part: (serial: string) => `coil ${serial}, true scale 1:1`,
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  print: 'Print at 100 %, no scaling. First measure both rulers (100 mm).',
  scale: (diameter: string, span: string) =>
    `A scale of ${diameter} that stands still on the panel, seen from the front, under a pointer on the shaft of the capacitor. The pointer turns clockwise over ${span}° from the mark F (stop, capacitor fully in) to the mark E (stop, fully out).`,
  arcs: 'One arc a position of the switch, its number where it begins, higher numbers outside.',
  made: (serial: string) =>
    `Made from readings of coil ${serial} in its set, and true for that set alone: another coil, capacitor or wiring wants its own. Nothing is marked beyond the first and last reading of a position.`,
  fit: (hole: string, mount: string) =>
    `Cut along the outer circle and out of the middle one, which is ${hole} for the bush. Turn the capacitor fully in, set the pointer on F, and prick through the four crosses (holes of ${mount}).`,
  miss: (percent: string) =>
    `Between its readings each arc is a smooth curve: worked out without it, an inner reading is missed by ${percent} % at most.`,
  several: (n: number, of: number, from: number, to: number) => `Dial ${n} of ${of}: positions ${from} to ${to}.`,
  from: 'F',
  to: 'E',
  kHz: 'kHz',
  MHz: 'MHz',
  unit: 'mm',
  coil: (serial: string) => `coil ${serial}`,
  plate: {
    words:
      'For under the knob of the switch: what each position was tuned over, from its first reading to its last, in kHz.',
    angle: (step: string) =>
      `${step}° from one position to the next, numbers clockwise, seen from the front. Hold the switch against the marks before you cut.`,
    listed: 'There is no room for the figures on the plate; they stand in the table.',
    foot: 'kHz',
    between: (low: string, high: string) => `${low}–${high}`,
  },
  table: {
    heading: 'What each arc was drawn from',
    more: 'What each arc was drawn from, continued',
    position: 'position',
    readings: 'readings',
    degrees: 'angles, °',
    low: 'from kHz',
    high: 'to kHz',
    smooth: 'smooth in',
    miss: 'misses, %',
  },
} as const;
