import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import cases from './ledger.json' with { type: 'json' };
import { ledgerTable } from './table.mjs';

test('README shows the ledger as it stands', () => {
  const readme = readFileSync(new URL('../../README.md', import.meta.url), 'utf8');
  console.log(`accuracy ledger in README: ${cases.length} cases`);
  expect(cases.length).toBeGreaterThan(20);
  expect(readme).toContain(ledgerTable(cases));
});
