/**
 * The line that tells what is being worked on, and for how long. A search keeps its thread busy for seconds without a pause, so a
 * thread of its own counts; it says nothing before a second is over.
 */
import type { Worker } from 'node:worker_threads';

export interface Ticking {
  /** What is worked on from now on. */
  readonly tell: (stage: string) => void;
  /** Takes the line away, and is not back before it is gone. */
  readonly end: () => void;
}

export interface TickingOptions {
  /** Where to: 2 for standard error. */
  readonly fd: number;
  readonly columns: number;
  /** Lines one under the other, seldom. */
  readonly plain: boolean;
  /** Milliseconds before anything is said; a second when left out. */
  readonly quietMs?: number;
  /** Milliseconds between two lines; a second, or ten where they stand under one another. */
  readonly everyMs?: number;
}

const ROOM = 200;
/** Milliseconds that the thread is waited for when the line is to go. */
const PATIENCE_MS = 300;

/** Shared with the thread: [0] 1 when it is to end, [1] 1 when it has, [2] bytes of the text, then the text. */
interface Shared {
  readonly words: Int32Array;
  readonly text: Uint8Array;
}

function shared(buffer: SharedArrayBuffer): Shared {
  return { words: new Int32Array(buffer, 0, 3), text: new Uint8Array(buffer, 12) };
}

export function startTicking(work: string, options: TickingOptions): Ticking {
  const buffer = new SharedArrayBuffer(12 + ROOM);
  const { words, text } = shared(buffer);
  let stage = work;
  let worker: Worker | null = null;
  let over = false;
  const tell = (next: string) => {
    stage = next;
    const bytes = new TextEncoder().encode(stage).slice(0, ROOM);
    text.set(bytes);
    Atomics.store(words, 2, bytes.length);
  };
  tell(work);
  const { fd, columns, plain, quietMs = 1000, everyMs = plain ? 10_000 : 1000 } = options;
  // Loaded while the work begins: whoever only asks for help needs no threads.
  const ready = import('node:worker_threads').then(({ Worker }) => {
    if (over) return;
    const workerData = { buffer, fd, columns, plain, quietMs, everyMs, begun: Date.now() };
    worker = new Worker(`(${tick.toString()})(require)`, { eval: true, workerData });
    worker.unref();
    worker.on('error', () => Atomics.store(words, 1, 1));
  });
  ready.catch(() => undefined);
  return {
    tell,
    end: () => {
      if (over) return;
      over = true;
      if (worker === null) return;
      Atomics.store(words, 0, 1);
      Atomics.notify(words, 0);
      Atomics.wait(words, 1, 0, PATIENCE_MS);
      void worker.terminate();
    },
  };
}

/** The thread. It is handed over as text, and so must use nothing of this file. */
function tick(load: (name: string) => unknown): void {
  const { workerData } = load('node:worker_threads') as { workerData: Record<string, never> };
  const { writeSync } = load('node:fs') as { writeSync: (fd: number, text: string) => void };
  const { buffer, fd, columns, plain, quietMs, everyMs, begun } = workerData as unknown as {
    readonly buffer: SharedArrayBuffer;
    readonly fd: number;
    readonly columns: number;
    readonly plain: boolean;
    readonly quietMs: number;
    readonly everyMs: number;
    readonly begun: number;
  };
  const words = new Int32Array(buffer, 0, 3);
  const text = new Uint8Array(buffer, 12);
  let width = 0;
  const write = (said: string) => {
    try {
      writeSync(fd, said);
    } catch {
      // A terminal that is gone, or busy, misses a line.
    }
  };
  // Ready before the first wait, or the end might be waited for in vain.
  const ended = () => {
    if (width > 0) write(`\r${' '.repeat(width)}\r`);
    Atomics.store(words, 1, 1);
    Atomics.notify(words, 1);
  };
  let wait = Math.max(1, quietMs - (Date.now() - begun));
  while (Atomics.wait(words, 0, 0, wait) === 'timed-out') {
    wait = everyMs;
    const stage = Buffer.from(text.slice(0, Atomics.load(words, 2))).toString();
    const said = `${stage}, ${Math.round((Date.now() - begun) / 1000)} s`.slice(0, columns - 1);
    if (plain) write(`${said}\n`);
    else {
      write(`\r${said.padEnd(width)}`);
      width = said.length;
    }
  }
  ended();
}
