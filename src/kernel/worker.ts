/** Thread that makes parts. It loads the kernel at once, so that it is warm when the first record comes. */
import { parentPort } from 'node:worker_threads';
import { Fault } from '../fault.ts';
import { loadKernel } from './load.ts';
import { makeParts } from './make.ts';
import type { MakeReply, MakeRequest } from './message.ts';

const port = parentPort;
if (!port) throw new Error('worker.js runs only as a worker thread');

// A failure to load is reported with the first request.
loadKernel().catch(() => undefined);

port.on('message', async (request: MakeRequest) => {
  const reply = await answer(request);
  const bytes = reply.kind === 'made' ? reply.parts.map((part) => part.bytes.buffer) : [];
  port.postMessage(reply, bytes);
});

async function answer({ id, record, named }: MakeRequest): Promise<MakeReply> {
  try {
    return { id, kind: 'made', parts: await makeParts(record, named) };
  } catch (error) {
    if (error instanceof Fault) return { id, kind: 'fault', exit: error.exit, faults: error.faults };
    return { id, kind: 'error', text: error instanceof Error ? error.message : String(error) };
  }
}
