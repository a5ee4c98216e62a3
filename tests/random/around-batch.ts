/** A child of the outside checks: takes `seed` or `seed:path of a starter` from its arguments and prints one outcome a line. */
import { aroundOutcome } from './around.ts';

for (const order of process.argv.slice(2)) {
  const [seed, path] = order.split(':');
  console.log(JSON.stringify(aroundOutcome(Number(seed), path ?? null)));
}
