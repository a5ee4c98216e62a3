/** One random job to its printed parts: every file is made and passes its checks, or the job is refused with a reason. */
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { makePart } from '../../src/kernel/make.ts';
import { threemfBytes } from '../../src/kernel/threemf.ts';
import { partsOf } from '../../src/parts/parts.ts';
import { printedOf } from '../../src/record/make.ts';
import { bedsOf, entriesOf } from '../../src/record/printed.ts';
import { refusal } from '../../src/solve/refusal.ts';
import { search } from '../../src/solve/search.ts';
import { withSecond } from '../../src/solve/second.ts';
import { randomJob } from './jobs.ts';

export interface Outcome {
  readonly seed: number;
  readonly result: 'made' | 'refused' | 'failed';
  /** Parts made, or the codes of the refusal, or what went wrong. */
  readonly said: readonly string[];
  readonly triangles: number;
  readonly features: readonly string[];
}

/** Chords round a former in a coarse run. Sections keep theirs: their seams are keyed at them. */
const COARSE = 48;

/** `full` keeps the chords that the planner chose. Never throws. */
export async function partsOutcome(seed: number, full: boolean): Promise<Outcome> {
  const none = { seed, triangles: 0, features: [] };
  try {
    const job = readJob(randomJob(seed), `random ${seed}`);
    const found = search(job);
    if (!('chosen' in found)) throw refusal(job, found);
    const { record: planned } = printedOf(job, withSecond(job, found));
    const fine = full || planned.former.joints.length > 0;
    const segments = fine ? planned.former.segments : Math.min(COARSE, planned.former.segments);
    const record = { ...planned, former: { ...planned.former, segments } };
    const solids = partsOf(record);
    const entries = entriesOf(solids);
    const beds = bedsOf(entries, record.printer);
    let triangles = 0;
    const meshes = new Map();
    for (const solid of solids) {
      const { part, mesh, report } = await makePart(solid, record.printer.scale);
      triangles += report.triangles;
      meshes.set(part, mesh);
    }
    for (const bed of beds) {
      const objects = [...new Set(bed.items.map((item) => item.part))].map((id) => ({
        id,
        name: id,
        mesh: meshes.get(id),
      }));
      threemfBytes({
        title: 'x',
        objects,
        items: bed.items.map((item) => ({ object: item.part, name: item.part, ...item })),
      });
    }
    const { former, tapMethod, windings } = record;
    const features = [
      former.kind === 'tube' ? 'tube' : former.body,
      former.surface,
      tapMethod.name,
      windings[0]!.pitchKind,
      ...(former.joints.length > 0 ? [`${former.joints.length + 1} sections`] : []),
      ...(former.base === null ? [] : ['base']),
      ...(record.around?.second == null ? [] : [`second: ${record.around.second.kind}`]),
      ...solids.map(({ kind }) => kind),
    ];
    if (solids.length === 0) return { ...none, result: 'refused', said: ['nothing wanted'] };
    return { seed, result: 'made', said: solids.map(({ part }) => part), triangles, features: [...new Set(features)] };
  } catch (error) {
    if (error instanceof Fault && (error.exit === 3 || error.exit === 4)) {
      const empty = error.faults.filter(({ got, expected, todo }) => !got || !expected || !todo);
      if (error.faults.length > 0 && empty.length === 0)
        return { ...none, result: 'refused', said: error.faults.map(({ code }) => code) };
    }
    const text = error instanceof Error ? (error.stack ?? error.message) : String(error);
    return { ...none, result: 'failed', said: [text] };
  }
}
