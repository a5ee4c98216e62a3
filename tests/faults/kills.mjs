// Runs that are killed at random moments, most of them while they write, and runs that meet in one folder.
import { existsSync, mkdirSync, rmSync, watch } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { coilwright, demand, leftIn, must, putMine, told, withoutMine } from './ground.mjs';

/** Longest time after the lock is there at which a run is killed; fewer have long ended by then than with a longer one. */
const WRITING_MS = 60;

/**
 * Kills a run of `words` into `base`/coil, whose whole output is `expected`. Under its name or as the backup something whole lies
 * then, all that is not ours with it; the next run ends as if nothing had been. `next` gives chance, `wholeMs` is how long a run takes.
 * @returns whether it was killed before it ended
 */
export async function killOnce({ base, words, expected, next, wholeMs }) {
  rmSync(base, { recursive: true, force: true });
  mkdirSync(base);
  const coil = join(base, 'coil');
  const backup = join(base, '.coil.coilwright-old');
  const there = next() < 0.75;
  const whileWriting = next() < 0.75;
  const after = next() * (whileWriting ? WRITING_MS : wholeMs);
  const given = [...words, '--out', coil];
  // Another verb's folder or job would do as well; the same bytes show mixtures by their names alone, so one is taken out.
  if (there) {
    await must(join(base, '..'), given);
    putMine(coil);
    rmSync(join(coil, expected.split(' ')[0]), { force: true });
  }
  const old = there ? told(coil) : '';
  const { signal, code, err } = await coilwright(join(base, '..'), given, {
    onStart(child) {
      const kill = () => setTimeout(() => child.kill('SIGKILL'), after).unref();
      if (!whileWriting) return kill();
      const watcher = watch(base, (_, name) => {
        if (!name?.includes('-lock')) return;
        watcher.close();
        kill();
      });
      child.on('close', () => watcher.close());
    },
  });
  const killed = signal === 'SIGKILL';
  demand(killed || code === 0, `ended with ${code}: ${err}`);
  const mineAnd = (text) => ({ ...withoutMine(text), text });
  const whole = [coil, backup]
    .map((folder) => mineAnd(told(folder)))
    .some(({ rest, all, text }) => {
      if (text === '') return false;
      return there ? text === old || (rest === expected && all) : text === expected;
    });
  // Where nothing was there, nothing may be there yet.
  demand(whole || (!there && killed && !existsSync(coil)), `nothing whole is left:\n${told(base)}`);
  await must(join(base, '..'), given);
  const { rest, all } = withoutMine(told(coil));
  demand(rest === expected && all === there, `the next run left\n${told(coil)}`);
  demand(leftIn(base).length === 0, `left beside: ${leftIn(base).join(', ')}`);
  return killed;
}

/** `count` runs into one folder at once, one of them killed where `next` says so. Ends with one whole output. */
export async function meetOnce({ base, words, expected, count, next, wholeMs }) {
  rmSync(base, { recursive: true, force: true });
  mkdirSync(base);
  const coil = join(base, 'coil');
  if (next() < 0.5) {
    await must(join(base, '..'), [...words[0], '--out', coil]);
    putMine(coil);
  }
  const mine = existsSync(coil);
  const victim = next() < 0.5 ? Math.floor(next() * count) : -1;
  const ended = await Promise.all(
    Array.from({ length: count }, async (_, i) => {
      await wait(next() * 100);
      return coilwright(join(base, '..'), [...words[i % words.length], '--out', coil], {
        onStart: (child) => i === victim && setTimeout(() => child.kill('SIGKILL'), next() * wholeMs).unref(),
      });
    }),
  );
  for (const [i, { code, signal, err }] of ended.entries()) {
    const well = code === 0 || (code === 5 && /another run that is writing it/.test(err));
    demand(well || (i === victim && signal === 'SIGKILL'), `run ${i} ended with ${code ?? signal}: ${err}`);
  }
  // The killed one may have been the last; then the old folder, or nothing, waits for the next run.
  if (victim >= 0) await must(join(base, '..'), [...words[0], '--out', coil]);
  const { rest, all } = withoutMine(told(coil));
  demand(expected.includes(rest), `a mixture of runs:\n${rest}`);
  demand(all === mine, 'a file that is not ours is lost');
  demand(leftIn(base).length === 0, `left beside: ${leftIn(base).join(', ')}`);
}
