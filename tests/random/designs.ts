/** One random job to its record, and on with all outputs: every claim recomputed, or the job refused with a reason. */
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { planJob, recordOf } from '../../src/plan.ts';
import { Claims } from '../plain/claims.ts';
import { recordClaims } from '../plain/record.ts';
import { kernelHere, wholeClaims } from './design-files.ts';
import { designJob } from './design-jobs.ts';
import { chance } from './jobs.ts';

export interface DesignOutcome {
  readonly seed: number;
  readonly result: 'made' | 'whole' | 'refused' | 'failed';
  readonly said: readonly string[];
  /** Figures held against their recomputation. */
  readonly figures: number;
  /** Numeric fields of the record that were looked at. */
  readonly fields: readonly string[];
  readonly features: readonly string[];
}

/** Of so many jobs, one has a tap's limits drawn at random as well. */
const DRAWN = 25;

/** `whole`: with all outputs. Never throws. */
export async function designOutcome(seed: number, whole: boolean): Promise<DesignOutcome> {
  const none = { seed, figures: 0, fields: [], features: [] };
  try {
    const job = readJob(designJob(seed), `random ${seed}`);
    const claims = new Claims();
    const output = whole ? await planJob(job, { version: '0.0.0', kernel: kernelHere }) : null;
    const record = output?.record ?? recordOf(job, '0.0.0');
    recordClaims(claims, record, seed % DRAWN === 0 && record.windings[0]!.turns < 70 ? { random: chance(seed) } : {});
    if (output !== null) await wholeClaims(claims, record, output.files);
    const { former, tapMethod, windings, demand, around } = record;
    const features = [
      former.kind === 'tube' ? 'tube' : former.body,
      tapMethod.name,
      windings[0]!.pitchKind,
      demand.kind,
      record.surroundings.rest,
      ...(windings[0]!.unitTaps?.length ? ['two switches'] : []),
      ...(record.asMade ? ['as made'] : []),
      ...(around?.second ? [`second: ${around.second.kind}`] : []),
      ...(around?.pairs.length ? ['table'] : []),
    ];
    const said = claims.faults.slice(0, 12);
    const result = said.length > 0 ? 'failed' : whole ? 'whole' : 'made';
    return { seed, result, said, figures: claims.count, fields: [...claims.reached], features };
  } catch (error) {
    if (error instanceof Fault && (error.exit === 3 || error.exit === 4))
      return { ...none, result: 'refused', said: error.faults.map(({ code }) => code) };
    return {
      ...none,
      result: 'failed',
      said: [error instanceof Error ? (error.stack ?? error.message) : String(error)],
    };
  }
}
