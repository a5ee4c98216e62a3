/** The kernel as the pipeline sees it: threads started early, orders handed to whichever is free, closed at the end. */
import { Worker } from 'node:worker_threads';
import type { Solid } from '../parts/solid.ts';
import type { BedFile, BedOrder, PicturedPart } from './make.ts';
import type { Order, Reply, Request } from './message.ts';

export type { BedFile, BedOrder, PartFile, PartReport, PicturedPart } from './make.ts';

export interface Kernel {
  /** @throws Error with one line when a part did not come out as described or a thread died */
  part(solid: Solid, scale: readonly number[]): Promise<PicturedPart>;
  /** The meshes of the order are handed over: they are empty afterwards. */
  bed(order: BedOrder): Promise<BedFile>;
  close(): Promise<void>;
}

interface Waiting {
  readonly order: Order;
  readonly resolve: (reply: Reply) => void;
  readonly reject: (error: Error) => void;
}

/** Two parts at a time: a part is one thread's work, and the former takes as long as all the others. */
const THREADS = 2;

/**
 * Starts the threads; they warm up beside whatever the caller does next and do not by themselves keep the process alive.
 * Orders are taken up in their order.
 */
export function startKernel(script: URL = new URL('./worker.js', import.meta.url), threads: number = THREADS): Kernel {
  const queue: Waiting[] = [];
  let dead: Error | null = null;
  let asked = 0;
  const hands = Array.from({ length: threads }, () => {
    const worker = new Worker(script);
    worker.unref();
    const hand = { worker, busy: null as Waiting | null };
    const settle = (): Waiting | null => {
      const { busy } = hand;
      hand.busy = null;
      worker.unref();
      return busy;
    };
    worker.on('message', (reply: Reply) => {
      const done = settle();
      if (reply.kind === 'error') done?.reject(new Error(reply.text));
      else done?.resolve(reply);
      next();
    });
    const die = (error: Error) => {
      dead ??= error;
      settle()?.reject(dead);
      for (const waiting of queue.splice(0)) waiting.reject(dead);
    };
    worker.on('error', (error: Error) => die(new Error(`the part kernel stopped: ${error.message}`)));
    worker.on('exit', (code) => die(new Error(`the part kernel ended with code ${code} before it answered`)));
    return hand;
  });
  function next(): void {
    for (const hand of hands) {
      if (hand.busy !== null) continue;
      const waiting = queue.shift();
      if (waiting === undefined) return;
      hand.busy = waiting;
      hand.worker.ref();
      hand.worker.postMessage({ id: ++asked, order: waiting.order } satisfies Request, handedOver(waiting.order));
    }
  }
  const ask = (order: Order): Promise<Reply> => {
    if (dead) return Promise.reject(dead);
    return new Promise((resolve, reject) => {
      queue.push({ order, resolve, reject });
      next();
    });
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
    async close() {
      await Promise.all(hands.map(({ worker }) => worker.terminate()));
    },
  };
}

function handedOver(order: Order): ArrayBuffer[] {
  if (order.kind === 'part') return [];
  return order.bed.objects.flatMap(({ mesh }) => [mesh.vertices.buffer, mesh.triangles.buffer] as ArrayBuffer[]);
}
