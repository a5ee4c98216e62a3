/** Makes the record of a proof: coils judged and, where they fail, what saves them; tallies; signed with its hash. */
import { hashOf } from '../record/hash.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Chart, Dial } from './charts-schema.ts';
import { judgeCoil } from './judge.ts';
import { Asking } from './judge-at.ts';
import { rescueOf } from './rescue.ts';
import { Turned } from './rescue-effects.ts';
import {
  type ProofCoil,
  type ProofFirstOff,
  type ProofKind,
  type ProofRecord,
  proofSchema,
  type State,
  type Tally,
} from './schema.ts';
import type { Systematic } from './systematic-schema.ts';
import type { FileNote, KindReadings, ReadingsFile } from './types.ts';

/** The coils of a kind, each judged, in the order of the file. */
export function judgeKind({ record, coils }: KindReadings): ProofCoil[] {
  const asking = new Asking(record);
  let turned: Turned | null = null;
  return coils.map((coil) => {
    const judged = judgeCoil(record, asking, coil);
    if (judged.state !== 'fail') return { ...judged, rescue: null };
    turned ??= new Turned(record);
    return { ...judged, rescue: rescueOf(record, judged, turned) };
  });
}

/** Without readings that are not of their coil: what is fitted and charted. */
export function believable({ record, coils }: KindReadings, judged: readonly ProofCoil[]): KindReadings {
  return {
    record,
    coils: coils.map((coil, i) => {
      const { readings, taps } = judged[i]!;
      // A line may hold several readings: one is known by its tap and what is written as well.
      const isOdd = (tap: number | null, line: number, written: string) =>
        (tap === null ? readings : taps[tap - 1]!.readings).some(
          (one) => one.verdict === 'implausible' && one.line === line && one.written === written,
        );
      return { ...coil, readings: coil.readings.filter(({ tap, line, written }) => !isOdd(tap, line, written)) };
    }),
  };
}

export interface KindProof {
  readonly record: CoilRecord;
  readonly coils: readonly ProofCoil[];
  readonly systematic: Systematic | null;
  readonly charts: readonly Chart[];
  readonly firstOff: ProofFirstOff | null;
}

export interface ProofParts {
  /** Name of the file, without its ending. */
  readonly name: string;
  readonly file: string;
  /** Of its bytes. */
  readonly sha256: string;
  readonly count: ReadingsFile['count'];
  readonly notes: readonly FileNote[];
  readonly kinds: readonly KindProof[];
  readonly dials: readonly Dial[];
}

function tallyOf(coils: readonly Pick<ProofCoil, 'state'>[]): Tally {
  const of = (state: State) => coils.filter((coil) => coil.state === state).length;
  return { coils: coils.length, pass: of('pass'), fail: of('fail'), missing: of('missing') };
}

/** The schema is checked, so that nothing leaves in another shape; paper and units are those of the first record. */
export function makeProof(
  { name, file, sha256, count, notes, kinds, dials }: ProofParts,
  version: string,
): ProofRecord {
  const first = kinds[0]!.record;
  const body: Omit<ProofRecord, 'hash' | 'files' | 'program'> = {
    record: 1,
    verb: 'prove',
    job: name,
    date: null,
    paper: first.paper,
    ...(first.units === undefined ? {} : { units: first.units }),
    input: { file, sha256 },
    count: { ...count },
    tally: tallyOf(kinds.flatMap(({ coils }) => coils)),
    kinds: kinds.map(
      ({ record, coils, systematic, charts, firstOff }): ProofKind => ({
        hash: record.hash,
        job: record.job,
        taps: record.windings[0]!.taps.length,
        tally: tallyOf(coils),
        coils: [...coils],
        systematic,
        charts: [...charts],
        firstOff,
      }),
    ),
    dials: [...dials],
    notes: notes.map((note) => ({ ...note })),
  };
  return proofSchema.parse({ ...body, program: `coilwright ${version}`, hash: hashOf(body), files: [] });
}
