// Lots in the bench: time and peak memory against the number of coils and of kinds.
import { join } from 'node:path';
import { writeLot } from './lot-files.mjs';
import { once } from './measure.mjs';

function timed(program, work, name, lot) {
  const file = writeLot(join(work, name), lot);
  return once([program, 'lot', file, '--out', join(work, `${name}-out`)]);
}

const figures = ({ ms, cpuMs, mb }) =>
  `${(ms / 1000).toFixed(1)} s (${(cpuMs / 1000).toFixed(1)} s of processors) and ${mb.toFixed(0)} MB`;

/** Small lots: nearly flat in coils, linear in kinds. */
export function lots(program, work) {
  const coils = [10, 100, 1000].map((count) => [
    count,
    timed(program, work, `coils-${count}`, { kinds: 1, coils: count, size: 'small', jigs: 'none' }),
  ]);
  for (const [count, run] of coils) console.log(`lot of ${count} coils of one small kind: ${figures(run)}`);
  const [[, ten], , [, thousand]] = coils;
  console.log(
    `a thousand coils against ten: ${(thousand.ms / ten.ms).toFixed(2)} of the time, ${(thousand.mb / ten.mb).toFixed(2)} of the memory (goal 1.3 or less in memory)`,
  );
  const [two, four] = [2, 4].map((kinds) =>
    timed(program, work, `kinds-${kinds}`, { kinds, coils: 12, size: 'small', jigs: 'none' }),
  );
  console.log(
    `lot of 12 coils, 2 small kinds: ${figures(two)}; 4 kinds: ${figures(four)}, ratio ${(four.cpuMs / two.cpuMs).toFixed(2)} of processors (goal 2 or less)`,
  );
}

/** The largest lot there are goals for. */
export function wholeLot(program, work) {
  const run = timed(program, work, 'whole', { kinds: 20, coils: 300, size: 'whole' });
  console.log(
    `lot of 300 coils of 20 kinds, all papers and beds: ${figures(run)} (goals on two free cores: 90 s, 600 MB)`,
  );
}
