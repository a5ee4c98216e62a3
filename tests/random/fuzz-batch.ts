/** A child of `fuzz.mjs`: takes seeds as its arguments and prints one outcome a line. */
import { fuzzOutcome } from './fuzz.ts';

for (const seed of process.argv.slice(2)) console.log(JSON.stringify(await fuzzOutcome(Number(seed))));
