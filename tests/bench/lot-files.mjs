// Lots for the bench, written as a person would: one job file a kind, and the lot that names them.
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/** A kind as the starter jobs are: twelve taps on a printed former, wire to be chosen, all jigs that suit it. */
const whole = (n) => ({
  job: `Bench kind ${n}`,
  want: { inductance: `${18 + n} uH to ${200 + 4 * n} uH`, taps: 8 + (n % 5), spacing: 'even ratio' },
  set: { capacitor: '15 pF to 380 pF', stray: '12 pF', aerial: '60 pF', switch: n % 2 ? 'open' : 'shorted' },
  former: { 'outside-diameter': `${60 + n} mm`, longest: '150 mm', kind: 'printed' },
  wire: ['24 AWG enamel', '0.5 mm enamel', '22 AWG double cotton', '20 x 0.1 mm litz single silk'],
});

/** A kind that is quickly planned, so that what goes with the number of coils can be seen beside it. */
const small = (n) => ({
  job: `Small kind ${n}`,
  want: { inductance: `20 uH to ${60 + n} uH`, taps: 3 },
  former: { kind: 'printed', 'outside-diameter': `${48 + n} mm`, longest: '100 mm' },
  wire: '0.5 mm enamel',
});

/** Path of the lot file; `coils` are shared out evenly among `kinds` kinds. */
export function writeLot(folder, { kinds, coils, size, jigs = 'once' }) {
  mkdirSync(folder, { recursive: true });
  const job = size === 'whole' ? whole : small;
  const entries = Array.from({ length: kinds }, (_, k) => {
    const path = `kind-${k + 1}.json`;
    writeFileSync(join(folder, path), JSON.stringify(job(k + 1)));
    return { job: path, quantity: Math.floor(coils / kinds) + (k < coils % kinds ? 1 : 0) };
  });
  const lot = {
    lot: `Lot of ${coils} coils of ${kinds} kinds`,
    coils: entries,
    serials: 'BL-####',
    jigs,
    spools: ['0.5 mm enamel', '24 AWG enamel', '20 x 0.1 mm litz single silk'].flatMap((wire, w) =>
      Array.from({ length: 4 }, (_, r) => ({ name: `Reel ${w + 1}${'abcd'[r]}`, wire, left: `${150 + 37 * r} m` })),
    ),
    printers: [{ name: 'bench', bed: '250 mm x 210 mm', height: '220 mm', count: 2 }],
  };
  const file = join(folder, 'lot.json');
  writeFileSync(file, JSON.stringify(lot));
  return file;
}
