/** A child of `match.mjs`: takes seeds from its arguments and prints one outcome a line. */
import { matchOutcome } from './match.ts';

for (const seed of process.argv.slice(2)) console.log(JSON.stringify(matchOutcome(Number(seed))));
