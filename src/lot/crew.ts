/** Who carries out the orders of a lot: threads, as many as the machine has hands for. */
import { availableParallelism } from 'node:os';
import { Fault } from '../fault.ts';
import { startHands } from '../kernel/hands.ts';
import type { LotOrder, LotReply } from './orders.ts';
import type { Unit } from './work.ts';

export interface Crew {
  /** @throws Fault of the job that is planned; Error for a mistake of the program */
  readonly unit: (order: LotOrder) => Promise<Unit>;
  readonly close: () => Promise<void>;
}

/** Each takes up to 200 MB at work; more of them than this gain little. */
const MOST = 4;
/** So that two threads and the papers stay below 600 MB: without a limit the heap grows as long as there is room. */
const LIMITS = { maxOldGenerationSizeMb: 192, maxYoungGenerationSizeMb: 16 };

export function startCrew(
  threads: number = Math.min(MOST, availableParallelism()),
  script: URL = new URL('./planner.js', import.meta.url),
): Crew {
  const hands = startHands<LotOrder, LotReply>(script, threads, 'a thread of the lot', LIMITS);
  return { unit: async (order) => unitOf(await hands.ask(order)), close: hands.close };
}

/** The unit that came of an order, or what it threw. */
export function unitOf(reply: LotReply): Unit {
  if (reply.kind === 'fault') throw new Fault(reply.exit, reply.faults);
  if (reply.kind === 'error') throw new Error(reply.text);
  return reply.unit;
}
