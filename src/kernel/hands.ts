/** Threads that carry out orders: started early, each order handed to whichever is free, all ended when nothing more is to do. */
import { Worker } from 'node:worker_threads';

export interface Hands<Order, Reply> {
  /**
   * The reply to an order; orders are taken up in their order. `handed` changes hands rather than being copied.
   * @throws Error with one line when a thread died
   */
  readonly ask: (order: Order, handed?: readonly ArrayBuffer[]) => Promise<Reply>;
  readonly close: () => Promise<void>;
}

/** What goes to a thread; its answer carries the same number. */
export interface Numbered<Order> {
  readonly id: number;
  readonly order: Order;
}

interface Waiting<Order, Reply> {
  readonly order: Order;
  readonly handed: readonly ArrayBuffer[];
  readonly resolve: (reply: Reply) => void;
  readonly reject: (error: Error) => void;
}

export interface ThreadLimits {
  /** Of the heap of each thread, beyond which it collects harder, and in the end dies. */
  readonly maxOldGenerationSizeMb?: number;
  readonly maxYoungGenerationSizeMb?: number;
}

/**
 * Starts the threads; they warm up beside whatever the caller does next and do not by themselves keep the process alive.
 * @param name of what they do, for the message when one dies
 */
export function startHands<Order, Reply>(
  script: URL,
  threads: number,
  name: string,
  resourceLimits: ThreadLimits = {},
): Hands<Order, Reply> {
  const queue: Waiting<Order, Reply>[] = [];
  let dead: Error | null = null;
  let closed = false;
  let asked = 0;
  const hands = Array.from({ length: threads }, () => {
    const worker = new Worker(script, { resourceLimits });
    worker.unref();
    const hand = { worker, busy: null as Waiting<Order, Reply> | null };
    const settle = (): Waiting<Order, Reply> | null => {
      const { busy } = hand;
      hand.busy = null;
      worker.unref();
      return busy;
    };
    worker.on('message', (reply: Reply) => {
      settle()?.resolve(reply);
      next();
    });
    const die = (error: Error) => {
      dead ??= error;
      settle()?.reject(dead);
      for (const waiting of queue.splice(0)) waiting.reject(dead);
    };
    worker.on('error', (error: Error) => die(new Error(`${name} stopped: ${error.message}`)));
    worker.on('exit', (code) => die(new Error(`${name} ended with code ${code} before it answered`)));
    return hand;
  });
  function next(): void {
    for (const hand of hands) {
      if (hand.busy !== null) continue;
      const waiting = queue.shift();
      if (waiting === undefined) return;
      hand.busy = waiting;
      hand.worker.ref();
      hand.worker.postMessage({ id: ++asked, order: waiting.order } satisfies Numbered<Order>, [...waiting.handed]);
    }
  }
  return {
    ask: (order, handed = []) => {
      if (dead) return Promise.reject(dead);
      return new Promise((resolve, reject) => {
        queue.push({ order, handed, resolve, reject });
        next();
      });
    },
    close: async () => {
      if (closed) return;
      closed = true;
      await Promise.all(hands.map(({ worker }) => worker.terminate()));
    },
  };
}
