/**
 * Every contact of the aerial with every contact of the detector, over the band: which switch position serves best there, how it is
 * tuned, and what comes of it. Everything that hangs on the coil is connected while it is worked out.
 */
import type { CoilPair } from '../coil/pair.ts';
import type { Rest, WorkingCoil } from '../coil/working-coil.ts';
import { positionNetwork } from './position.ts';
import {
  type Connected,
  type Contact,
  gainAt,
  type Load,
  leftOf,
  Ports,
  type SourceImpedance,
  type TunedTo,
  tunedTo,
  tuningFor,
} from './response.ts';
import { secondSide } from './second-side.ts';

/** The coil in its set. */
export interface Arrangement {
  readonly coil: WorkingCoil;
  readonly rest: Rest;
  /** Of the former's material. */
  readonly lossTangent: number;
  /** The second winding, with the permittivity of what lies between; null: none. */
  readonly second: { readonly pair: CoilPair; readonly permittivity: number } | null;
  /** The tuning capacitor, and what is always across it, pF. */
  readonly capacitorLowPf: number;
  readonly capacitorHighPf: number;
  readonly strayPf: number;
  readonly source: SourceImpedance;
  readonly load: Load;
}

/** What is left of a neighbour is worked out this far off, kHz: one and two channels of 9 and of 10 kHz. */
export const OFF_KHZ = [9, 10, 18, 20] as const;

export interface TableRow {
  readonly kHz: number;
  /** Switch position, counted from 1. */
  readonly tap: number;
  readonly tuned: TunedTo;
  /** Of the tuning capacitor alone. */
  readonly capacitorPf: number;
  /** Voltage over that on frequency, one for each of `OFF_KHZ`. */
  readonly left: readonly number[];
  /** Whether a contact lies on turns that are not in use there. */
  readonly dead: boolean;
}

export interface TablePair {
  readonly aerial: Contact;
  readonly detector: Contact;
  /** Lowest frequency first; those that it cannot tune are left out. */
  readonly rows: readonly TableRow[];
}

/** A position near a frequency, as it stands in its set. */
export function portsOf(arrangement: Arrangement, turn: number, kHz: number): Ports {
  const { coil, rest, lossTangent, second } = arrangement;
  const side = second === null ? null : secondSide(second.pair, turn, kHz, second.permittivity);
  return new Ports(positionNetwork(coil, turn, kHz, { rest, lossTangent, second: side }));
}

const connectedAs = ({ source, load }: Arrangement, aerial: Contact, detector: Contact): Connected => ({
  aerial: { at: aerial, source },
  detector: { at: detector, load },
});

/** Loaded Q below which there is no peak to tune to. */
export const LEAST_Q = 5;

/**
 * The table. Of the positions that tune a pair to a frequency with what the capacitor has, to a peak with a loaded Q of 5 at least, the
 * one with the most power into the detector stands in its row; one that has a contact on turns that are not in use only where no other
 * tunes there.
 */
export function tableOf(
  arrangement: Arrangement,
  aerials: readonly Contact[],
  detectors: readonly Contact[],
  channelsKhz: readonly number[],
): TablePair[] {
  const pairs = aerials.flatMap((aerial) => detectors.map((detector) => ({ aerial, detector })));
  const rows: TableRow[][] = pairs.map(() => []);
  const { coil, strayPf, capacitorLowPf, capacitorHighPf } = arrangement;
  for (const kHz of channelsKhz) {
    const best: ({ at: number; ports: Ports; tuned: TunedTo; dead: boolean } | null)[] = pairs.map(() => null);
    coil.taps.forEach((turn, i) => {
      const ports = portsOf(arrangement, turn, kHz);
      pairs.forEach(({ aerial, detector }, p) => {
        const connected = connectedAs(arrangement, aerial, detector);
        const tuningPf = tuningFor(ports, connected, kHz);
        if (tuningPf === null || tuningPf < capacitorLowPf + strayPf || tuningPf > capacitorHighPf + strayPf) return;
        const dead = [aerial, detector].some((contact) => typeof contact === 'number' && contact > i + 1);
        const before = best[p];
        if (before && dead && !before.dead) return;
        const better = !before || before.dead !== dead || gainAt(ports, connected, kHz, tuningPf) > before.tuned.gain;
        if (!better) return;
        const tuned = tunedTo(ports, connected, kHz);
        if (tuned !== null && tuned.q >= LEAST_Q) best[p] = { at: i + 1, ports, tuned, dead };
      });
    });
    pairs.forEach(({ aerial, detector }, p) => {
      const found = best[p] ?? null;
      if (found === null) return;
      const { at, ports, tuned, dead } = found;
      const connected = connectedAs(arrangement, aerial, detector);
      const left = OFF_KHZ.map((off) => leftOf(ports, connected, tuned, off));
      rows[p]!.push({ kHz, tap: at, tuned, capacitorPf: tuned.tuningPf - strayPf, left, dead });
    });
  }
  return pairs.map((pair, p) => ({ ...pair, rows: rows[p]! }));
}

/** Step of frequency in which a range is followed. */
const STEP = 1.04;
/** Steps that its first frequency may lie away from the middle of what the coil alone tunes. */
const AWAY = 24;

/**
 * What a position tunes with aerial and detector connected, kHz: followed both ways from near `middleKhz` until the capacitor ends, or the
 * frequency no longer rises as it is opened (a circuit of aerial and dead turns has its own resonance there; known to a step of 4 % then).
 * Null where nothing is tuned near there, or a contact is on earth.
 */
export function rangeOf(
  arrangement: Arrangement,
  turn: number,
  aerial: Contact,
  detector: Contact,
  middleKhz: number,
): { lowKhz: number; highKhz: number } | null {
  const connected = connectedAs(arrangement, aerial, detector);
  const least = arrangement.capacitorLowPf + arrangement.strayPf;
  const most = arrangement.capacitorHighPf + arrangement.strayPf;
  const ports = portsOf(arrangement, turn, middleKhz);
  const tuning = (kHz: number, of = ports) => tuningFor(of, connected, kHz) ?? Number.NaN;
  const within = (pf: number) => pf >= least && pf <= most;
  let from = middleKhz;
  for (let away = 0; away <= AWAY && !within(tuning(from)); away++)
    from = middleKhz * STEP ** (away % 2 === 0 ? -(away / 2 + 1) : (away + 1) / 2);
  if (!within(tuning(from))) return null;
  const edge = (way: 1 | -1): number => {
    let [here, pf] = [from, tuning(from)];
    for (;;) {
      const next = here * STEP ** way;
      const then = tuning(next);
      // Less capacitance the higher, or there is another resonance between.
      if (!(way * (pf - then) > 0)) return here;
      const end = way > 0 ? least : most;
      if (way * (then - end) > 0) {
        [here, pf] = [next, then];
        continue;
      }
      // Losses and crowding are those of the edge itself.
      const there = portsOf(arrangement, turn, Math.sqrt(here * next));
      const slack = STEP ** (0.2 * way);
      return crossing((kHz) => tuning(kHz, there) - end, here / slack, next * slack, way);
    }
  };
  const [lowKhz, highKhz] = [edge(-1), edge(1)];
  // Another resonance close on either side leaves nothing to tune.
  return lowKhz < highKhz ? { lowKhz, highKhz } : null;
}

/** Where a function that falls with frequency is 0, between two frequencies in either order; 1e-9 of the frequency. */
function crossing(of: (kHz: number) => number, a: number, b: number, way: 1 | -1): number {
  let [low, high] = way > 0 ? [a, b] : [b, a];
  let [atLow, atHigh] = [of(low), of(high)];
  let kept = 0;
  let middle = (low + high) / 2;
  for (let i = 0; i < 40 && high / low - 1 > 1e-9; i++) {
    // The chord (Illinois): an end that stays counts half as much the next time, so that both close in.
    const chord = low + ((high - low) * atLow) / (atLow - atHigh);
    middle = chord > low && chord < high ? chord : (low + high) / 2;
    const at = of(middle);
    if (Math.abs(at) < 1e-7) return middle;
    if (at > 0) {
      [low, atLow] = [middle, at];
      if (kept > 0) atHigh /= 2;
      kept = 1;
    } else {
      [high, atHigh] = [middle, at];
      if (kept < 0) atLow /= 2;
      kept = -1;
    }
  }
  return middle;
}
