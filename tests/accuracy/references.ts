/**
 * Axisymmetric finite elements of second order, copper of 1.7241e-8 ohm m, COMPUTED. Turns, D, p, d in mm, MHz; turns in use from the start,
 * what is done with the rest, and what came out.
 */
export const FINITE_ELEMENTS = [
  {
    turns: 5,
    diameter: 60,
    pitch: 4,
    wire: 1.5,
    megahertz: 1,
    used: 5,
    rest: 'open',
    microhenry: 1.8883,
    ohm: 0.06405,
  },
  {
    turns: 20,
    diameter: 50,
    pitch: 0.56,
    wire: 0.5,
    megahertz: 1.5,
    used: 20,
    rest: 'open',
    microhenry: 29.177,
    ohm: 2.2864,
  },
  {
    turns: 30,
    diameter: 76,
    pitch: 0.45,
    wire: 0.4,
    megahertz: 1.5,
    used: 10,
    rest: 'open',
    microhenry: 16.843,
    ohm: 3.2381,
  },
  {
    turns: 30,
    diameter: 76,
    pitch: 0.45,
    wire: 0.4,
    megahertz: 1.5,
    used: 10,
    rest: 'shorted',
    microhenry: 10.432,
    ohm: 5.0919,
  },
] as const;

/**
 * First resonance in MHz of 100 turns, D = 76.6, p = 0.6, d = 0.5 mm, by rings and Medhurst's capacitance (3.54 pF), COMPUTED to four digits:
 * tap, pF at the tap, capacitance spread along the turns, all of it at the open end.
 */
export const COUPLED = [
  [20, 400, 1.065, 1.079],
  [20, 92, 1.985, 2.084],
  [20, 27, 2.741, 2.959],
  [40, 92, 1.234, 1.261],
  [40, 27, 1.989, 2.096],
  [100, 92, 0.66, 0.66],
] as const;

/** The coil of 30 turns above, tap at 10, with its rest bridged in four sections of five turns, COMPUTED to three digits. */
export const SHORTED_IN_SECTIONS = { cuts: [0, 10, 15, 20, 25, 30], microhenry: 8.41 } as const;
