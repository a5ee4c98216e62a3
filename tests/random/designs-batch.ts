/** A child of `designs.mjs`: takes `seed:whole` or `seed:record` from its arguments and prints one outcome a line. */
import { designOutcome } from './designs.ts';

for (const order of process.argv.slice(2)) {
  const [seed, kind] = order.split(':');
  console.log(JSON.stringify(await designOutcome(Number(seed), kind === 'whole')));
}
