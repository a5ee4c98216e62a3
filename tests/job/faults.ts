/** What a job is refused for, in one line a fault. */
import { Fault, type FaultParts } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';

export function refusals(text: string): readonly FaultParts[] {
  try {
    readJob(text, 'job.yaml');
  } catch (error) {
    if (error instanceof Fault && error.exit === 3) return error.faults;
    throw error;
  }
  throw new Error(`accepted: ${text}`);
}

/** `line key: got` for every fault. */
export function lines(text: string): readonly string[] {
  return refusals(text).map(({ place, got }) => `${place?.line ?? '-'} ${place?.key ?? '-'}: ${got}`);
}
