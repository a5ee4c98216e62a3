/** A child of `sheets.mjs`: prints the outcome of every seed in its arguments, one a line. */
import { sheetsOutcome } from './sheets.ts';

for (const seed of process.argv.slice(2)) console.log(JSON.stringify(sheetsOutcome(Number(seed))));
