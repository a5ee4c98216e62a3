/** What a metre of wire weighs, covering included: how a reel on the scales becomes metres. */
import { DENSITY } from '../physics/copper.ts';
import type { Covering, Wire } from './wire.ts';
import { wireNamed } from './wires.ts';

/**
 * Of the covering as it lies on the wire, the air between fibres counted, g/cm3. From memory: enamels 1.3 to 1.4; cotton and
 * silk fibre 1.5 and 1.3, a little over half of the space theirs.
 */
const COVERING_G_CM3: Readonly<Record<Covering, number>> = {
  bare: 0,
  enamel: 1.35,
  'enamel heavy': 1.35,
  'single cotton': 0.85,
  'double cotton': 0.85,
  'single silk': 0.75,
  'double silk': 0.75,
  'litz single silk': 0.75,
  'litz double silk': 0.75,
};

const discMm2 = (mm: number): number => (Math.PI * mm ** 2) / 4;

/**
 * g/m at the nominal diameters; the take-up of stranding (1.5 to 2.5 %) is not in it. Enamel adds 1 to 8 % to the copper, so
 * that its density hardly counts. Fibres add 2 % to thick wire and as much again as the copper to the thinnest: a quarter more or
 * less in their density moves 24 AWG double cotton by 3 %. The diameter of the copper may be off by 1 %, its weight by 2 %.
 *
 * Example: 0.5 mm enamel, 1.783 g/m.
 */
export function linearMassGM(wire: Wire): number {
  const copperMm2 = wire.strands * discMm2(wire.strandMm);
  const around = COVERING_G_CM3[wire.covering] * (discMm2(wire.overallMm) - discMm2(wire.bareMm));
  // Strands of litz are enamelled each; where the size is not in stock as a single wire, as much as 0.1 mm has.
  const strand = wire.strands > 1 ? wireNamed(`${wire.strandMm} mm enamel`) : undefined;
  const share = strand === undefined ? 0.4 : (strand.overallMm / strand.bareMm) ** 2 - 1;
  const onStrands = wire.strands > 1 ? COVERING_G_CM3.enamel * share * copperMm2 : 0;
  return (copperMm2 * DENSITY) / 1000 + around + onStrands;
}
