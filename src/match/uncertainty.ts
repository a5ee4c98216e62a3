/**
 * How well things are measured when the file does not say: half widths at 95 %, as a person would write them. Common practice
 * for hand tools on an old coil, from memory.
 */
export const UNCERTAINTY = {
  /** By caliper, on a form that may be out of round. */
  diameter: '0.2 mm',
  /** By a strip of paper round it; the diameter follows. */
  circumference: '0.5 mm',
  /** By micrometer. */
  wire: '0.01 mm',
  'turns-per-inch': '1 %',
  pitch: '1 %',
  weight: '2 %',
  'wire-length': '1 %',
  length: '0.3 mm',
  gap: '0.2 mm',
  position: '0.3 mm',
  angle: '5 deg',
  inductance: '0.5 %',
  resonance: '0.5 %',
  capacitor: '1 %',
  resistance: '1 %',
  'meter.accuracy': '1 %',
  'self-capacitance': '15 %',
} as const;

/** Half of the last digit that a meter shows of a low inductance, and its leads, uH; added to the proportion. */
export const INDUCTANCE_FLOOR_UH = 0.05;
/** Of contacts and leads, ohm; added to the proportion. */
export const RESISTANCE_FLOOR_OHM = 0.02;
/** A tap's gap that was not measured: none, within this part of the wire. */
export const TAP_GAP_OF_WIRE = 0.1;
