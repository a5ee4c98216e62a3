/** Thread that plans kinds and makes beds of a lot, one order at a time. */
import { parentPort } from 'node:worker_threads';
import type { Numbered } from '../kernel/hands.ts';
import { loadKernel } from '../kernel/load.ts';
import { carryOut, type LotOrder } from './orders.ts';

const port = parentPort;
if (!port) throw new Error('planner.js runs only as a worker thread');

// A failure to load is reported with the first order.
loadKernel().catch(() => undefined);

port.on('message', async ({ order }: Numbered<LotOrder>) => port.postMessage(await carryOut(order)));
