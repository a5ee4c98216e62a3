import ellipe from '@stdlib/math-base-special-ellipe';
import ellipk from '@stdlib/math-base-special-ellipk';
import { ellipticKE } from '../../src/physics/elliptic.ts';
import { nagaokaK, sheetInductance } from '../../src/physics/nagaoka.ts';
import { coaxialMutual, cumulativeInductance, ringMutual, ringSumMatrixFree } from '../../src/physics/rings.ts';
import { rosaA, rosaB, roundWireInductance } from '../../src/physics/rosa.ts';
import { wheeler1928, wheeler1982 } from '../../src/physics/wheeler.ts';
import { even } from '../physics/field/coils.ts';
import { neumannMutual } from '../physics/neumann.ts';
import { COMPUTED_COILS, type ComputedCoil } from '../published/coils.ts';
import { BARE_INCH, COILS_1922, COVERED_INCH, TURNS_PER_INCH } from '../published/coils1922.ts';
import { NAGAOKA } from '../published/nagaoka.ts';
import { ROSA_A, ROSA_B } from '../published/rosa.ts';
import { type Measures, off, spread } from './measures.ts';

const INCH = 0.0254;

const sheet = ({ turns, meanDiameterMm: d, pitchMm: p }: ComputedCoil) =>
  sheetInductance(turns, d / 1e3, (turns * p) / 1e3);
const rings = ({ turns, meanDiameterMm: d, pitchMm: p, bareMm: w }: ComputedCoil) =>
  ringSumMatrixFree(even(turns, p / 1e3), d / 2e3, w / 2e3);
const rosa = ({ turns, meanDiameterMm: d, pitchMm: p, bareMm: w }: ComputedCoil) =>
  roundWireInductance(turns, d / 1e3, p / 1e3, w / 1e3);
const close = COMPUTED_COILS.filter((coil) => coil.pitchMm < coil.meanDiameterMm / 80 && coil.turns > 5);

const TAPPED = even(30, 6e-4).map((z, i) => z + 3e-4 * Math.floor(i / 7));

function printed1922(from: number, below: number): number[] {
  return COILS_1922.filter(([, turns]) => turns >= from && turns < below).map(([tube, turns, millihenries]) => {
    const radius = ((tube + COVERED_INCH) / 2) * INCH;
    return off(
      ringSumMatrixFree(even(turns, INCH / TURNS_PER_INCH), radius, (BARE_INCH / 2) * INCH),
      millihenries / 1e3,
    );
  });
}

/** Section identity L = L1 + L2 + 2M at every tap, with M by an integral that shares nothing with the ring sum. */
function sectionIdentity(): number[] {
  const coil = cumulativeInductance(TAPPED, 0.038, 2.5e-4);
  return Array.from({ length: 29 }, (_, i) => {
    const tap = i + 1;
    const rest = ringSumMatrixFree(TAPPED.slice(tap), 0.038, 2.5e-4);
    let mutual = 0;
    for (const low of TAPPED.slice(0, tap))
      for (const high of TAPPED.slice(tap)) mutual += neumannMutual(0.038, 0.038, high - low, 2200);
    return off(coil.at(tap) + rest + 2 * mutual, coil.at(30));
  });
}

/** Errors of every case of the laws of low frequency, all relative but where the ledger says absolute. */
export const LOW_FREQUENCY: Measures = {
  'elliptic-k': () => spread(0.01, 1, 400).map((m1) => off(ellipticKE(Math.sqrt(m1)).K, ellipk(1 - m1))),
  'elliptic-e': () => spread(0.01, 1, 400).map((m1) => off(ellipticKE(Math.sqrt(m1)).E, ellipe(1 - m1))),
  'nagaoka-computed': () => NAGAOKA.map(([ratio, exact]) => off(nagaokaK(ratio, 1), exact)),
  'nagaoka-printed': () =>
    NAGAOKA.flatMap(([ratio, , printed]) => (printed === undefined ? [] : [nagaokaK(ratio, 1) - printed])),
  'rosa-a-computed': () => ROSA_A.map(([x, exact]) => rosaA(x) - exact),
  'rosa-b-computed': () => ROSA_B.map(([n, exact]) => rosaB(n) - exact),
  'rosa-a-printed': () => ROSA_A.map(([x, , printed]) => rosaA(x) - printed),
  'rosa-b-printed': () => ROSA_B.map(([n, , printed]) => rosaB(n) - printed),
  'sheet-computed': () => COMPUTED_COILS.map((coil) => off(1e6 * sheet(coil), coil.sheetUh)),
  'rosa-coils': () => COMPUTED_COILS.map((coil) => off(1e6 * rosa(coil), coil.rosaUh)),
  'rings-computed': () => COMPUTED_COILS.map((coil) => off(1e6 * rings(coil), coil.ringsUh)),
  'rings-helix': () => COMPUTED_COILS.map((coil) => off(1e6 * rings(coil), coil.helixUh)),
  'rings-helix-close': () => close.map((coil) => off(1e6 * rings(coil), coil.helixUh)),
  'mutual-equal': () => spread(0.02, 4, 40).map((h) => off(ringMutual(1, h), neumannMutual(1, 1, h))),
  'mutual-unequal': () => spread(0.02, 4, 40).map((h) => off(coaxialMutual(1, 0.6, h), neumannMutual(1, 0.6, h))),
  'section-identity': sectionIdentity,
  'wheeler-1928': () =>
    spread(0.4, 50, 200).map((r) => off(wheeler1928(100, 0.1, 0.1 * r), sheetInductance(100, 0.1, 0.1 * r))),
  'wheeler-1982': () =>
    spread(1e-3, 1e3, 400).map((r) => off(wheeler1982(100, 0.1, 0.1 * r), sheetInductance(100, 0.1, 0.1 * r))),
  'printed-1922': () => printed1922(92, 1000),
  'printed-1922-small': () => printed1922(1, 92),
};
