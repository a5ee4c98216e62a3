/**
 * Works the accuracy ledger out afresh and prints it as a table in Markdown; with --write it also puts errors and numbers of cases into
 * ledger.json and the table into README. Bounds are changed by hand, or with --bounds to what is needed now (never more than
 * was asked for).
 */
import { readFileSync, rmSync, writeFileSync } from 'node:fs';
import { build } from 'esbuild';
import { ledgerTable, withTable } from './table.mjs';

const here = new URL('.', import.meta.url);
const data = new URL('ledger.json', here);
const bundle = new URL(`.ledger.${process.pid}.mjs`, here);
await build({
  entryPoints: [new URL('ledger.ts', here).pathname],
  outfile: bundle.pathname,
  bundle: true,
  platform: 'node',
  format: 'esm',
  packages: 'external',
  logLevel: 'error',
});
try {
  const { boundFor, canMeasure, canTighten, measure } = await import(bundle.href);
  const cases = JSON.parse(readFileSync(data, 'utf8')).map((row) => {
    if (!canMeasure(row)) return row;
    const now = measure(row.id);
    const error = Number(now.error.toPrecision(3));
    const needed = Math.min(boundFor(now.error), row.demand ?? Number.POSITIVE_INFINITY);
    const bound = process.argv.includes('--bounds') ? needed : row.bound;
    return { ...row, cases: now.cases, error, bound };
  });
  console.log(ledgerTable(cases));
  for (const { id, error, bound } of cases) {
    if (canTighten(bound, error)) console.error(`${id}: the bound ${bound} can be tightened, the error is ${error}`);
    if (error > bound) {
      console.error(`${id}: the error ${error} is past its bound ${bound}`);
      process.exitCode = 1;
    }
  }
  if (process.argv.includes('--write') || process.argv.includes('--bounds')) {
    writeFileSync(data, `${JSON.stringify(cases, null, 2)}\n`);
    const readme = new URL('../../README.md', here);
    writeFileSync(readme, withTable(readFileSync(readme, 'utf8'), cases));
  }
} finally {
  rmSync(bundle);
}
