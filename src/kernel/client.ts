/** The kernel as the pipeline sees it: started early, asked once, closed. */
import { Worker } from 'node:worker_threads';
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import type { PartFile } from './make.ts';
import type { MakeReply, MakeRequest } from './message.ts';

export type { PartFile, PartReport } from './make.ts';

export interface Kernel {
  /**
   * @throws Fault for dimensions that cannot be (exit 4)
   * @throws Error with one line when a part did not come out as described or the thread died
   */
  make(record: PartsRecord, named?: readonly string[]): Promise<PartFile[]>;
  close(): Promise<void>;
}

interface Waiting {
  readonly resolve: (parts: PartFile[]) => void;
  readonly reject: (error: Error) => void;
}

/** Starts the thread; it warms up beside whatever the caller does next and does not by itself keep the process alive. */
export function startKernel(script: URL = new URL('./worker.js', import.meta.url)): Kernel {
  const worker = new Worker(script);
  worker.unref();
  const waiting = new Map<number, Waiting>();
  let dead: Error | null = null;
  let asked = 0;
  const settle = (id: number): Waiting | undefined => {
    const entry = waiting.get(id);
    waiting.delete(id);
    if (waiting.size === 0) worker.unref();
    return entry;
  };
  const die = (error: Error) => {
    dead ??= error;
    for (const id of [...waiting.keys()]) settle(id)?.reject(dead);
  };
  worker.on('message', (reply: MakeReply) => {
    const entry = settle(reply.id);
    if (reply.kind === 'made') entry?.resolve(reply.parts);
    else if (reply.kind === 'fault') entry?.reject(new Fault(reply.exit, reply.faults));
    else entry?.reject(new Error(reply.text));
  });
  worker.on('error', (error: Error) => die(new Error(`the part kernel stopped: ${error.message}`)));
  worker.on('exit', (code) => die(new Error(`the part kernel ended with code ${code} before it answered`)));
  return {
    make(record, named) {
      if (dead) return Promise.reject(dead);
      return new Promise((resolve, reject) => {
        const id = ++asked;
        waiting.set(id, { resolve, reject });
        worker.ref();
        worker.postMessage({ id, record, named } satisfies MakeRequest);
      });
    },
    async close() {
      await worker.terminate();
    },
  };
}
