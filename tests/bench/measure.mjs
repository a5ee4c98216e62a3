// Times whole processes side by side: A B A B ..., so that a machine that slows down slows both.
import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const preload = fileURLToPath(new URL('./rss.cjs', import.meta.url));

export const median = (values) => [...values].sort((a, b) => a - b)[values.length >> 1];

/** One run of a process; one that takes longer than `mostMs` is stopped and counts as that long. */
export function once(args, mostMs) {
  const dir = mkdtempSync(join(tmpdir(), 'bench-'));
  const rss = join(dir, 'rss');
  const from = process.hrtime.bigint();
  const run = spawnSync(process.execPath, ['--require', preload, ...args], {
    env: { ...process.env, BENCH_RSS: rss },
    stdio: ['ignore', 'ignore', 'pipe'],
    timeout: mostMs,
  });
  const ms = Number(process.hrtime.bigint() - from) / 1e6;
  if (run.error?.code === 'ETIMEDOUT') return { ms, mb: Number.NaN, stopped: true };
  if (run.status !== 0) throw new Error(`node ${args.join(' ')} ended with ${run.status}: ${run.stderr}`);
  const [kb, us] = readFileSync(rss, 'utf8').split(' ').map(Number);
  rmSync(dir, { recursive: true });
  return { ms, mb: kb / 1024, cpuMs: us / 1000, stopped: false };
}

/** Medians of `runs` paired runs after one of each to warm up; `ratio` is the median of the ratios pair by pair. */
export function pair(a, b, runs) {
  once(a);
  once(b);
  const pairs = Array.from({ length: runs }, () => ({ a: once(a), b: once(b) }));
  const of = (side, what) => median(pairs.map((one) => one[side][what]));
  return {
    a: { ms: of('a', 'ms'), mb: of('a', 'mb') },
    b: { ms: of('b', 'ms'), mb: of('b', 'mb') },
    ratio: median(pairs.map((one) => one.a.ms / one.b.ms)),
    runs,
  };
}
