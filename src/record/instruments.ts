/**
 * What generator and probe will show of the finished coil: resonance and width of every tap with what the two do to it counted in,
 * beside what they would be without. Start earthed, the rest open, no switch: as in `meter.ts`, whose resonance this is with
 * what probe and coupling add to the capacitor; what loss does to it, and the width, are those of the network with losses.
 */
import { BenchCoil, type Seen } from '../around/bench.ts';
import { formerShuntOhm } from '../coil/positions.ts';
import type { WorkingCoil } from '../coil/working-coil.ts';
import type { BenchInstruments } from '../job/job.ts';
import { type Bench, CLIP_PF, resonanceAt, SELF_SPREAD, type WorkedOut, workedBetween } from './bench-figures.ts';
import type { InstrumentsMeasuring, InstrumentsRow } from './instruments-schema.ts';
import { significant } from './rounding.ts';
import type { Tap } from './schema.ts';

/** Where a shop says nothing. What a passive divider of ten has at DC; common practice. */
export const USUAL: BenchInstruments = { generatorOhm: 50, couplingPf: 1, probePf: 10, probeOhm: 1e7, stated: false };

/** Probes of one type differ by about so much, and so does a twisted pair of wires that couples (common practice, from memory). */
const TOLERANCE = 0.2;
/** Loss of the wire by the field of every turn: what is measured of it on real coils is about so far off (from memory). */
const COPPER = 0.1;
/** The former's loss is an estimate: share of the field and loss tangent are both taken from tables. */
const FORMER = 0.5;
/** Two frequencies at 0.707 of a height that has to be read as well. */
const READING = 0.05;
/** Loss tangents: of mica, polystyrene and the better ceramics below the first; of probe and cable at radio frequency (from memory). */
const CAPACITOR_LOSS = 1e-3;
const PROBE_LOSS = 1e-2;

interface Situation {
  readonly tap: Tap;
  readonly index: number;
  readonly pf: number;
}

/** Every tap with the largest known capacitor, the whole coil with none and all of them; without capacitors every tap with none. */
function situationsOf(taps: readonly Tap[], capacitorsPf: readonly number[]): Situation[] {
  const most = capacitorsPf.at(-1) ?? 0;
  return taps.flatMap((tap, index) =>
    (index === taps.length - 1 ? [...new Set([0, ...capacitorsPf])] : [most]).map((pf) => ({ tap, index, pf })),
  );
}

/** The bench's network of a tap at a frequency. */
function benchCoil(
  coil: WorkingCoil,
  index: number,
  kHz: number,
  { crowding, usedOhm, deadOhm }: WorkedOut,
  lossTangent: number,
): BenchCoil {
  const turn = coil.taps[index]!;
  const inductanceUh = coil.coil.inductanceUh(turn) / crowding;
  return new BenchCoil(coil.circuit(turn, 0, 'open').winding, {
    turn,
    inductanceUh,
    usedOhm,
    deadOhm,
    formerSiemens: 1 / formerShuntOhm(inductanceUh, coil.coil.selfPf(turn), lossTangent, kHz),
    selfPf: coil.coil.selfPf(coil.coil.turns),
  });
}

const rounded = (value: number | null, digits?: number) => (value === null ? null : significant(value, digits));

/** All of it, for the taps of a winding as the record has them. */
export function instrumentsOf(
  coil: WorkingCoil,
  taps: readonly Tap[],
  shop: Bench,
  lossTangent: number,
): InstrumentsMeasuring {
  const instruments = shop.instruments ?? USUAL;
  const addedPf = instruments.probePf + (instruments.couplingPf ?? 0);
  const plain = situationsOf(taps, shop.capacitorsPf).map((one) => {
    const turn = coil.taps[one.index]!;
    return { ...one, found: resonanceAt(coil, turn, one.pf), loaded: resonanceAt(coil, turn, one.pf + addedPf) };
  });
  const worked = workedBetween(
    coil,
    Math.min(...plain.map(({ loaded }) => loaded.kHz)),
    Math.max(...plain.map(({ found }) => found.kHz)),
  );
  const rows = plain.map(({ tap, index, pf, found, loaded }): InstrumentsRow => {
    const at = ({ kHz: plainKhz }: { kHz: number }) => {
      const works = worked(index, plainKhz);
      return {
        bench: benchCoil(coil, index, plainKhz, works, lossTangent),
        kHz: plainKhz * Math.sqrt(works.crowding),
      };
    };
    const { bench: bare, kHz: aloneKhz } = at(found);
    const alone = bare.seen(pf, null, aloneKhz);
    const { bench, kHz: loadedKhz } = at(loaded);
    const seen = bench.seen(pf, instruments, loadedKhz);
    // What loss does to the peak; where the capacitance of the coil lies is in `loaded`, in both of its ways.
    const without = bench.seen(pf + addedPf, null, loadedKhz);
    const kHz = seen === null || without === null ? null : (loadedKhz * seen.kHz) / without.kHz;
    return {
      tap: tap.tap,
      capacitancePf: pf,
      aloneKhz: significant(aloneKhz),
      aloneWidthKhz: rounded(alone === null ? null : (alone.widthKhz * aloneKhz) / alone.kHz, 4),
      aloneQ: rounded(alone === null ? null : alone.kHz / alone.widthKhz, 3),
      ...(seen === null || kHz === null
        ? NOT_SEEN
        : limited(tap, kHz, seen, loaded.halfKhz / loaded.kHz, {
            pf,
            tolerance: shop.capacitorTolerance,
            own: coil.coil.selfPf(coil.taps[index]!),
            instruments,
          })),
    };
  });
  return {
    tolerancePercent: 100 * TOLERANCE,
    copperPercent: 100 * COPPER,
    formerPercent: 100 * FORMER,
    readingPercent: 100 * READING,
    capacitorLoss: CAPACITOR_LOSS,
    probeLoss: PROBE_LOSS,
    rows,
  };
}

const NOT_SEEN = {
  frequencyKhz: null,
  lowKhz: null,
  highKhz: null,
  widthKhz: null,
  widthLowKhz: null,
  widthHighKhz: null,
  q: null,
} as const;

interface Acting {
  readonly pf: number;
  readonly own: number;
  readonly tolerance: number;
  readonly instruments: BenchInstruments;
}

/**
 * Resonance and width with their limits. Errors of capacitances are independent; the resonance goes with the root of their sum and of
 * the inductance. The width goes with the loss: of wire, former and instruments by their shares, joined with the reading as squares;
 * what known capacitor and probe lose themselves can only widen it, and stands on top of the upper limit.
 */
function limited(tap: Tap, kHz: number, seen: Seen, spread: number, acting: Acting) {
  const { pf, own, tolerance, instruments } = acting;
  const { probePf, couplingPf } = instruments;
  const allPf = pf + own + probePf + (couplingPf ?? 0);
  const capacitance = Math.hypot(
    tolerance * pf,
    SELF_SPREAD * own,
    CLIP_PF,
    TOLERANCE * probePf,
    TOLERANCE * (couplingPf ?? 0),
  );
  const inductance = (tap.inductanceHighUh - tap.inductanceLowUh) / (4 * tap.inductanceUh);
  const half = kHz * Math.hypot(capacitance / (2 * allPf), inductance, spread);
  const { formerShare, instrumentShare } = seen;
  const width = (kHz * seen.widthKhz) / seen.kHz;
  const q = kHz / width;
  const loss = Math.hypot(
    COPPER * (1 - formerShare - instrumentShare),
    FORMER * formerShare,
    TOLERANCE * instrumentShare,
    READING,
  );
  const more = (q * (CAPACITOR_LOSS * pf + PROBE_LOSS * probePf)) / allPf;
  return {
    frequencyKhz: significant(kHz),
    lowKhz: significant(kHz - half),
    highKhz: significant(kHz + half),
    widthKhz: significant(width, 4),
    widthLowKhz: significant(width * (1 - loss), 4),
    widthHighKhz: significant(width * (1 + loss + more), 4),
    q: significant(q, 3),
  };
}
