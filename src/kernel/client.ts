/** The kernel as the pipeline sees it: threads started early, orders handed to whichever is free, closed at the end. */
import type { Solid } from '../parts/solid.ts';
import { startHands } from './hands.ts';
import type { BedFile, BedOrder, PicturedPart } from './make.ts';
import type { Order, Reply } from './message.ts';

export type { BedFile, BedOrder, PartFile, PartReport, PicturedPart } from './make.ts';

export interface Kernel {
  /** @throws Error with one line when a part did not come out as described or a thread died */
  part(solid: Solid, scale: readonly number[]): Promise<PicturedPart>;
  /** The meshes of the order are handed over: they are empty afterwards. */
  bed(order: BedOrder): Promise<BedFile>;
  close(): Promise<void>;
}

/** Two parts at a time: a part is one thread's work, and the former takes as long as all the others. */
const THREADS = 2;

/**
 * Starts the threads; they warm up beside whatever the caller does next and do not by themselves keep the process alive.
 * Orders are taken up in their order.
 */
export function startKernel(script: URL = new URL('./worker.js', import.meta.url), threads: number = THREADS): Kernel {
  const hands = startHands<Order, Reply>(script, threads, 'the part kernel');
  const ask = async (order: Order): Promise<Reply> => {
    const reply = await hands.ask(order, handedOver(order));
    if (reply.kind === 'error') throw new Error(reply.text);
    return reply;
  };
  return {
    async part(solid, scale) {
      const reply = await ask({ kind: 'part', solid, scale });
      if (reply.kind !== 'part') throw new Error(`the part kernel answered a part with a ${reply.kind}`);
      return reply.part;
    },
    async bed(bed) {
      const reply = await ask({ kind: 'bed', bed });
      if (reply.kind !== 'bed') throw new Error(`the part kernel answered a bed with a ${reply.kind}`);
      return reply.bed;
    },
    close: hands.close,
  };
}

function handedOver(order: Order): ArrayBuffer[] {
  if (order.kind === 'part') return [];
  return order.bed.objects.flatMap(({ mesh }) => [mesh.vertices.buffer, mesh.triangles.buffer] as ArrayBuffer[]);
}
