/** `plan`: reads a job, plans it, writes the output folder, says what came of it. */
import { join, relative, resolve } from 'node:path';
import type { Argv } from 'yargs';
import { slug } from '../src/job/name.ts';
import { readJob } from '../src/job/read.ts';
import { checkFolder, writeFolder } from '../src/output/transaction.ts';
import type { planJob } from '../src/plan.ts';
import { checkOut } from './check-out.ts';
import { explainedTap } from './explained-tap.ts';
import { readJobText } from './read-job.ts';
import { showExplain } from './show-explain.ts';
import { showPlan } from './show-plan.ts';
import type { Terminal } from './terminal.ts';

export function describePlan(yargs: Argv) {
  return yargs
    .positional('job', { type: 'string', demandOption: true, describe: 'job file, YAML or JSON; - for standard input' })
    .option('out', {
      type: 'string',
      requiresArg: true,
      describe: 'folder to write; out/<name of the job> when left out',
    })
    .option('json', { type: 'boolean', default: false, describe: 'print the record, and nothing else' })
    .option('explain', {
      type: 'string',
      requiresArg: true,
      describe: 'number of a tap: how each of its figures comes about; with --json that instead of the record',
    })
    .example('$0 plan low-bench-receiver.yaml', 'writes out/low-bench-receiver')
    .example(
      '$0 plan - --out coil --json < job.yaml',
      'reads standard input, writes the folder coil, prints the record',
    );
}

export interface PlanOptions {
  readonly job: string;
  readonly out?: string | undefined;
  readonly json: boolean;
  readonly explain?: string | undefined;
}

/** The planner, loaded only once there is a job to plan. */
export type LoadPlanner = () => Promise<typeof planJob>;

/** Throws a Fault with exit code 2, 3, 4 or 5. Nothing is written unless all of it is. */
export async function runPlan(
  options: PlanOptions,
  terminal: Terminal,
  version: string,
  load: LoadPlanner,
): Promise<void> {
  checkOut(options.out);
  const job = readJob(await readJobText(options.job, terminal), options.job);
  const target = resolve(terminal.folder, options.out ?? join('out', slug(job.name)));
  await checkFolder(target);
  const planner = await load();
  const { record, files } = await planner(job, { version });
  const explained = await explainedTap(record, options.explain);
  const folder = await writeFolder(target, files);
  if (options.json) {
    terminal.out(`${JSON.stringify(explained ?? record, null, 2)}\n`);
    return;
  }
  const below = relative(terminal.folder, folder);
  const shown = below === '' ? '.' : below.startsWith('..') ? folder : below;
  terminal.out(showPlan(record, shown, files, terminal.columns, terminal.plain ?? false));
  if (explained !== null) terminal.out(`\n${showExplain(explained, terminal.columns)}`);
}

/** With the real planner. */
export async function plan(options: PlanOptions, terminal: Terminal, version: string): Promise<void> {
  await runPlan(options, terminal, version, async () => (await import('../src/plan.ts')).planJob);
}
