/** Thread that makes parts and beds. It loads the kernel at once, so that it is warm when the first order comes. */
import { parentPort } from 'node:worker_threads';
import { loadKernel } from './load.ts';
import { makeBed, makePart, pictured } from './make.ts';
import type { Reply, Request } from './message.ts';

const port = parentPort;
if (!port) throw new Error('worker.js runs only as a worker thread');

// A failure to load is reported with the first order.
loadKernel().catch(() => undefined);

port.on('message', async (request: Request) => {
  const reply = await answer(request);
  port.postMessage(reply, buffersOf(reply));
});

async function answer({ id, order }: Request): Promise<Reply> {
  try {
    if (order.kind === 'bed') return { id, kind: 'bed', bed: makeBed(order.bed) };
    return { id, kind: 'part', part: pictured(await makePart(order.solid, order.scale)) };
  } catch (error) {
    return { id, kind: 'error', text: error instanceof Error ? error.message : String(error) };
  }
}

/** What changes hands rather than being copied. */
function buffersOf(reply: Reply): ArrayBuffer[] {
  if (reply.kind === 'bed') return [reply.bed.bytes.buffer];
  if (reply.kind === 'error') return [];
  const { bytes, mesh, pictures } = reply.part;
  const buffers = [bytes, mesh.vertices, mesh.triangles, ...pictures.map(({ png }) => png)].map(({ buffer }) => buffer);
  return [...new Set(buffers)] as ArrayBuffer[];
}
