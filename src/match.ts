/**
 * The pipeline of `match`, without I/O:
 *
 *     old coil's file ──> what was measured ──> the coil that fits ──> at work in its set ──┬──> as it worked ──┬──> record ──> all files of
 *     (job/old-coil-file)  (match/types)        (match/infer)          (match/old-at-work)  └──> as it was ─────┘   (record/    plan (plan.ts),
 *             │                                                                              (match/replace,         make,       comparison
 *             └── what is on hand: a job without a wish ───────────────────────────────────>  solve/search)          matched)    sheet
 *
 * The record is that of `plan` for the replacement; the old coil, and old against new, stand in its key `matched`.
 */
import { Fault } from './fault.ts';
import type { Job } from './job/job.ts';
import type { MatchFile } from './job/old-coil-file.ts';
import { infer } from './match/infer.ts';
import { oldAtWork } from './match/old-at-work.ts';
import { asItWas, asItWorked, type Replacement, type Tried } from './match/replace.ts';
import type { Contradiction, InferredCoil } from './match/types.ts';
import { type Produced, type ProduceOptions, produce } from './plan.ts';
import { lengthText, percentText, tidy } from './quantity/format.ts';
import type { Output, OutputFile } from './record/listing.ts';
import { makeRecord } from './record/make.ts';
import { matchedOf } from './record/matched.ts';
import type { CoilRecord } from './record/schema.ts';
import { withSecond } from './solve/second.ts';

/** What is on hand, the old coil's own where the file is silent. */
function jobFor({ job, asOld, boreMm }: MatchFile, inferred: InferredCoil): Job {
  const oldMm = Math.round(100 * inferred.formerDiameterMm.value) / 100;
  const diametersMm = asOld.diameter ? { listMm: [oldMm] } : job.former.diametersMm;
  const narrowest = 'listMm' in diametersMm ? Math.min(...diametersMm.listMm) : diametersMm.lowMm;
  if (boreMm !== null && boreMm >= narrowest)
    throw new Fault(3, {
      code: 'bore',
      place: { file: job.source.file, line: job.source.lines['fits.bore'], key: 'fits.bore' },
      got: `a bore of ${lengthText(boreMm)} in a former of ${lengthText(narrowest)}`,
      expected: 'a bore narrower than the former',
      todo: 'check both, or choose a wider former',
    });
  const thins = boreMm !== null && job.former.kind === 'printed' && job.former.wallMm === null;
  const assumed = { ...job.assumed };
  if (asOld.diameter) assumed['former.outside-diameter'] = `${oldMm} mm, as the old one`;
  if (asOld.wire) assumed.wire = `${inferred.wire.name}, as the old one`;
  return {
    ...job,
    wires: asOld.wire ? [inferred.wire] : job.wires,
    former: {
      ...job.former,
      diametersMm,
      wallMm: thins ? Math.floor(50 * (narrowest - boreMm)) / 100 : job.former.wallMm,
    },
    assumed,
  };
}

function refuse({ job }: MatchFile, contradictions: readonly Contradiction[]): Fault {
  return new Fault(
    3,
    contradictions.map(({ key, text, sigmas, unit, expected }) => {
      const dotted = /^(?:meter|set)\./.test(key) ? key : `old.${key}`;
      return {
        code: 'contradiction',
        place: { file: job.source.file, line: lineOf(job, dotted), key: dotted },
        got: `${text} (${tidy(Math.abs(sigmas), 2)} standard deviations off)`,
        expected: `measurements that go together: ${tidy(expected, 4)}${unit === '' ? '' : ` ${unit}`} by all the others`,
        todo: 'measure or count it again; or state its uncertainty, or leave it out by contradictions: leave out',
      };
    }),
  );
}

/** The line of the key, or of the first one in its section. */
function lineOf({ source }: Job, dotted: string): number | undefined {
  let key = dotted;
  while (key !== '') {
    const line = source.lines[key];
    if (line !== undefined) return line;
    const cut = Math.max(key.lastIndexOf('.'), key.lastIndexOf('['));
    key = cut < 0 ? '' : key.slice(0, cut);
  }
  const section = dotted.split('.')[0] ?? '';
  const lines = Object.entries(source.lines).flatMap(([at, line]) => (at.startsWith(`${section}.`) ? [line] : []));
  return lines.length === 0 ? undefined : Math.min(...lines);
}

/** The coil that fits what was measured; throws a Fault (exit 3). */
export function inferredOf(file: MatchFile): InferredCoil {
  let inferred: InferredCoil;
  try {
    inferred = infer(file.old, { leaveOut: file.leaveOut });
  } catch (error) {
    if (!(error instanceof Fault)) throw error;
    const { source } = file.job;
    const placed = error.faults.map((fault) => ({
      ...fault,
      place: { file: source.file, line: lineOf(file.job, fault.place?.key ?? ''), key: fault.place?.key },
    }));
    throw new Fault(error.exit, placed);
  }
  if (inferred.contradictions.length > 0 && !file.leaveOut) throw refuse(file, inferred.contradictions);
  return inferred;
}

function warningsOf(file: MatchFile, inferred: InferredCoil, chosen: Replacement): CoilRecord['warnings'] {
  const list: CoilRecord['warnings'] = [];
  for (const { text } of inferred.contradictions) list.push({ code: 'left-out', text: `Left out: ${text}.` });
  const proposed = inferred.taps.filter(({ by }) => by === 'proposed');
  if (proposed.length > 0)
    list.push({
      code: 'tap-proposed',
      text: `${proposed.map(({ name, turn }) => `Tap ${name} at turn ${tidy(turn)}`).join(', ')}: proposed from the pattern of the others, nothing of it was measured.`,
    });
  const open = inferred.taps.filter(({ by, determined }) => by === 'inferred' && !determined);
  if (open.length > 0)
    list.push({
      code: 'turns-not-determined',
      text: `The turns of ${open.map(({ name }) => (name === 'whole' ? 'the whole coil' : `tap ${name}`)).join(', ')} do not follow surely from what was measured; the likeliest are taken.`,
    });
  if (chosen.worst.working > WORST)
    list.push({
      code: 'tap-off-the-old',
      text: `Tap ${chosen.worst.tap + 1} has ${percentText(chosen.worst.working)} ${chosen.taps[chosen.worst.tap]!.working > 0 ? 'more' : 'less'} inductance at work than the old one.`,
    });
  if (file.boreMm !== null && chosen.found.chosen.former.boreDiameterMm < file.boreMm - 1e-6)
    throw tooNarrow(file, chosen);
  return list;
}

/** A deviation worth a warning: about what a trimmer takes up. */
const WORST = 0.02;

function tooNarrow({ job, boreMm }: MatchFile, chosen: Replacement): Fault {
  const { former } = chosen.found.chosen;
  return new Fault(4, {
    code: 'bore',
    place: { file: job.source.file, line: job.source.lines['fits.bore'], key: 'fits.bore' },
    got: `a former with a bore of ${lengthText(former.boreDiameterMm)}`,
    expected: `a bore of ${lengthText(boreMm ?? 0)}, as the old mounting needs`,
    todo: `state former.wall: ${lengthText(Math.max(0.8, (former.outsideDiameterMm - (boreMm ?? 0)) / 2))}, or take a wider former`,
  });
}

function matched(file: MatchFile): Produced {
  const inferred = inferredOf(file);
  const job = jobFor(file, inferred);
  const work = oldAtWork(inferred, file.old, job);
  const worked = asItWorked(job, inferred, work);
  const was = asItWas(job, inferred, work);
  const tried: Tried = file.replacement === 'as it was' ? was : worked;
  if (!tried.ok) throw tried.why;
  const chosen = tried.of;
  const block = matchedOf({ name: job.name, old: file.old, inferred, work, chosen, worked, was });
  const extra = { verb: 'match' as const, matched: block, warnings: warningsOf(file, inferred, chosen) };
  // The taps follow the old coil: no other one is looked for.
  return { job: chosen.job, found: withSecond(chosen.job, chosen.found, null), extra };
}

/** The record alone; throws the faults of exit 3 and 4. */
export function matchRecordOf(file: MatchFile, version: string): CoilRecord {
  const { job, found, extra } = matched(file);
  return makeRecord(job, found, version, undefined, extra);
}

async function comparison(record: CoilRecord): Promise<readonly OutputFile[]> {
  const { comparisonSheet } = await import('./sheets/comparison-sheet.ts');
  const bytes = await comparisonSheet(record);
  return [{ path: 'comparison-sheet.pdf', kind: 'pdf', bytes, note: 'old against new, tap by tap' }];
}

/** The record and every file of the output folder. */
export async function matchCoil(file: MatchFile, options: ProduceOptions): Promise<Output<CoilRecord>> {
  return produce(() => matched(file), options, comparison);
}
