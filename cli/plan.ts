/** `plan`: reads a job, plans it, writes the output folder, says what came of it. */
import { readJob } from '../src/job/read.ts';
import type { planJob } from '../src/plan.ts';
import { checkOut } from './check-out.ts';
import { type ProduceOptions, produceFolder } from './produce.ts';
import { readJobText } from './read-job.ts';
import type { Terminal } from './terminal.ts';

export interface PlanOptions extends ProduceOptions {
  readonly job: string;
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
  await produceFolder(options, terminal, job.name, async (tell) => (await load())(job, { version, tell }));
}

/** With the real planner. */
export async function plan(options: PlanOptions, terminal: Terminal, version: string): Promise<void> {
  await runPlan(options, terminal, version, async () => (await import('../src/plan.ts')).planJob);
}
