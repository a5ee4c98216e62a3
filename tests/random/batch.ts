/** A child of `parts.mjs`: takes `seed full` lines from its arguments and prints one outcome a line. */
import { partsOutcome } from './parts.ts';

for (const order of process.argv.slice(2)) {
  const [seed, full] = order.split(':');
  console.log(JSON.stringify(await partsOutcome(Number(seed), full === 'full')));
}
