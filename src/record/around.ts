/** The set around the coil in the record; absent where the job says nothing of it. */
import { aerialImpedance } from '../around/aerial.ts';
import { bestOf, decibels, type Judged, mostPower, tunesMost, USES } from '../around/best.ts';
import type { Contact } from '../around/response.ts';
import { BETWEEN_PERMITTIVITY } from '../around/second-side.ts';
import { type Arrangement, rangeOf, type TablePair, type TableRow, tableOf } from '../around/table.ts';
import type { CoilPair } from '../coil/pair.ts';
import { atFrequency } from '../coil/positions.ts';
import type { Rest, WorkingCoil } from '../coil/working-coil.ts';
import { Fault } from '../fault.ts';
import type { Job } from '../job/job.ts';
import { quarterWave } from '../physics/aerial.ts';
import { frequencyText, tidy } from '../quantity/format.ts';
import { aerialEntry, detectorEntry } from './around-aerial.ts';
import { loadOf, NO_AERIAL } from './around-arrangement.ts';
import type {
  AerialAt,
  AerialEntry,
  Around,
  AroundPair,
  BestEntry,
  DetectorEntry,
  SecondEntry,
} from './around-schema.ts';
import { AROUND_NOTES, whyBest } from './around-words.ts';
import { decimals, significant } from './rounding.ts';
import type { Tap } from './schema.ts';

export interface AroundInput {
  readonly job: Job;
  readonly coil: WorkingCoil;
  /** Of the coil alone. */
  readonly taps: readonly Pick<Tap, 'tap' | 'range'>[];
  readonly rest: Rest;
  readonly lossTangent: number;
  readonly second: { readonly entry: SecondEntry; readonly pair: CoilPair } | null;
}

/** Frequencies of the table, by how many positions there are: every one costs a network a position. */
const channelCount = (taps: number): number => (taps <= 8 ? 7 : taps <= 16 ? 5 : 3);
/** Of its quarter wave a wire is no longer a capacitor with an inductance. */
const WIRE_SHARE = 0.6;
const WEAK_Q = 10;

/**
 * Null where the job has neither second winding nor aerial nor detector.
 * @throws Fault (exit 4) for a tap that the coil has not
 */
export function aroundOf(input: AroundInput): Around | null {
  const { job, second } = input;
  if (second === null && job.aerial === null && job.detector === null) return null;
  const stated = (key: string) => key in job.given;
  const aerial = job.aerial === null ? null : aerialEntry(job.aerial, stated);
  const detector = job.detector === null ? null : detectorEntry(job.detector, stated);
  for (const [key, to] of [
    ['aerial.to', aerial?.to],
    ['detector.to', detector?.to],
  ] as const)
    if (typeof to === 'number' && to > input.taps.length) throw noSuchTap(job, key, to, input.taps.length);
  const kept = { second: second?.entry ?? null, aerial, detector };
  if ((aerial === null && detector === null) || job.set === null)
    return { ...kept, ranges: [], channelsKhz: [], pairs: [], best: [], notes: [] };
  return { ...kept, ...tabled(input, job.set, aerial, detector) };
}

function noSuchTap(job: Job, key: string, tap: number, taps: number): Fault {
  const { file, lines } = job.source;
  return new Fault(4, {
    code: 'no-such-tap',
    place: { file, line: lines[key], key },
    got: `tap ${tap} of a coil with ${taps === 1 ? 'one position' : `${taps} positions`}`,
    expected: taps === 1 ? 'tap 1' : `tap 1 to tap ${taps}`,
    todo: `write tap ${taps}, or best`,
  });
}

/** Band of the table: what was asked for, else what all positions together tune. */
function bandOf({ job, taps }: AroundInput): { low: number; high: number } {
  if (job.want.kind === 'band') return { low: job.want.lowKhz, high: job.want.highKhz };
  const ranges = taps.flatMap(({ range }) => (range === null ? [] : [range]));
  return {
    low: Math.min(...ranges.map(({ lowKhz }) => lowKhz)),
    high: Math.max(...ranges.map(({ highKhz }) => highKhz)),
  };
}

function channelsOf(input: AroundInput): number[] {
  const { low, high } = bandOf(input);
  const count = channelCount(input.taps.length);
  const all = Array.from({ length: count }, (_, i) => significant(low * (high / low) ** (i / (count - 1)), 4));
  return [...new Set(all)];
}

/** Where aerial and detector may be: all there is, or the one that the job names. */
function contactsOf(input: AroundInput, aerial: AerialEntry | null, detector: DetectorEntry | null) {
  const { coil, taps, second } = input;
  const start = coil.around.earthed === 'finish' ? [0] : [];
  const all: number[] = [...start, ...taps.map(({ tap }) => tap)];
  const aerials: Contact[] =
    aerial === null
      ? ['hot']
      : aerial.to !== null
        ? [aerial.to]
        : [...all, ...(second === null ? [] : (['second'] as const))];
  const detectors = detector !== null && detector.to !== null ? [detector.to] : all;
  return { aerials, detectors };
}

const aerialAt = (at: Contact): AerialAt => (at === 'hot' ? null : at);

function tabled(
  input: AroundInput,
  set: NonNullable<Job['set']>,
  aerial: AerialEntry | null,
  detector: DetectorEntry | null,
): Pick<Around, 'ranges' | 'channelsKhz' | 'pairs' | 'best' | 'notes'> {
  const { coil, rest, lossTangent, taps, second } = input;
  const arrangement: Arrangement = {
    coil,
    rest,
    lossTangent,
    second: second === null ? null : { pair: second.pair, permittivity: BETWEEN_PERMITTIVITY },
    capacitorLowPf: set.capacitorLowPf,
    capacitorHighPf: set.capacitorHighPf,
    strayPf: set.strayPf + set.aerialPf,
    source: aerialImpedance(aerial ?? NO_AERIAL),
    load: loadOf(detector),
  };
  const channelsKhz = channelsOf(input);
  const { aerials, detectors } = contactsOf(input, aerial, detector);
  const table = tableOf(arrangement, aerials, detectors, channelsKhz);
  const most = mostPower(table);
  const found = bestOf(table);
  const balanced = found?.balanced.pair ?? null;
  return {
    channelsKhz,
    pairs: table.map((pair) => pairEntry(pair, most)),
    best: found === null ? [] : USES.map((use) => bestEntry(use, found[use], found.strongest, arrangement)),
    ranges: balanced === null ? [] : taps.map((tap) => rangeEntry(tap, balanced, arrangement)),
    notes: notesOf(input, aerial, detector, table, channelsKhz),
  };
}

function pairEntry({ aerial, detector, rows }: TablePair, most: ReadonlyMap<number, number>): AroundPair {
  return {
    aerial: aerialAt(aerial),
    detector: detector as number,
    rows: rows.map(({ kHz, tap, tuned, capacitorPf, left, dead }) => {
      const [off9Db, off10Db, off18Db, off20Db] = left.map((ratio) => decimals(decibels(ratio), 2)) as [
        number,
        number,
        number,
        number,
      ];
      return {
        kHz,
        tap,
        tuningPf: decimals(capacitorPf, 1),
        q: significant(tuned.q, 3),
        bandwidthKhz: significant(tuned.bandwidthKhz, 3),
        outputDb: decimals(decibels(tuned.power / most.get(kHz)!) / 2, 2),
        off9Db,
        off10Db,
        off18Db,
        off20Db,
        dead,
      };
    }),
  };
}

/** The row nearest the middle of those that count. */
function middleOf({ rows }: TablePair): TableRow {
  const counted = rows.filter(({ dead }) => !dead);
  return counted[Math.floor((counted.length - 1) / 2)]!;
}

function bestEntry(
  use: BestEntry['use'],
  one: Judged,
  strongest: Judged,
  { coil, rest, lossTangent }: Arrangement,
): BestEntry {
  const told = ({ pair, outputDb, off9Db }: Judged) => {
    const { kHz, tap, tuned } = middleOf(pair);
    const coilQ = atFrequency(coil, coil.taps[tap - 1]!, kHz, rest, lossTangent).q;
    return { outputDb, off9Db, kHz, q: tuned.q, bandwidthKhz: tuned.bandwidthKhz, coilQ };
  };
  return {
    use,
    aerial: aerialAt(one.pair.aerial),
    detector: one.pair.detector as number,
    outputDb: decimals(one.outputDb, 2),
    off9Db: decimals(one.off9Db, 2),
    why: whyBest(use, told(one), told(strongest)),
  };
}

function rangeEntry(
  { tap, range }: AroundInput['taps'][number],
  { aerial, detector }: TablePair,
  arrangement: Arrangement,
): Around['ranges'][number] {
  // Not as the record rounds it.
  const turn = arrangement.coil.taps[tap - 1]!;
  const found =
    range === null ? null : rangeOf(arrangement, turn, aerial, detector, Math.sqrt(range.lowKhz * range.highKhz));
  return {
    tap,
    lowKhz: found === null ? null : significant(found.lowKhz, 5),
    highKhz: found === null ? null : significant(found.highKhz, 5),
    aerial: aerialAt(aerial),
    detector: detector as number,
  };
}

function notesOf(
  { job, second }: AroundInput,
  aerial: AerialEntry | null,
  detector: DetectorEntry | null,
  table: readonly TablePair[],
  channelsKhz: readonly number[],
): string[] {
  const notes: string[] = [];
  const [from, to] = [channelsKhz[0]!, channelsKhz.at(-1)!];
  if (aerial === null) notes.push(AROUND_NOTES.noAerial);
  if (detector === null) notes.push(AROUND_NOTES.noDetector);
  if (table.some((pair) => pair.aerial === 'second')) notes.push(AROUND_NOTES.ends);
  if (second?.entry.slide && table.some((pair) => pair.aerial === 'second')) notes.push(AROUND_NOTES.slides);
  const tuned = tunesMost(table);
  if (tuned === 0) notes.push(AROUND_NOTES.none);
  else if (tuned < channelsKhz.length)
    notes.push(AROUND_NOTES.short(tuned, channelsKhz.length, frequencyText(from), frequencyText(to)));
  const length = job.aerial?.lengthM ?? null;
  const limit = length === null ? Number.POSITIVE_INFINITY : (WIRE_SHARE * quarterWave(length)) / 1e3;
  if (to > limit) notes.push(AROUND_NOTES.quarter(frequencyText(limit)));
  const mostQ = Math.max(0, ...table.flatMap(({ rows }) => rows.map((row) => row.tuned.q)));
  if (tuned > 0 && mostQ < WEAK_Q) notes.push(AROUND_NOTES.weak(tidy(mostQ, 2)));
  return notes;
}
