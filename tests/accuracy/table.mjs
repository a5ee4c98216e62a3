/** The ledger as a table in Markdown, and its place in README. */
const shown = (value) => (value < 1e-3 ? value.toExponential() : `${Number((100 * value).toPrecision(3))} %`);

export function ledgerTable(cases) {
  const rows = cases.map(({ what, kind, reference, status, cases: count, error, bound }) => {
    const unit = kind === 'absolute' ? ' (absolute)' : '';
    const cell = (value) => (kind === 'absolute' ? value.toExponential() : shown(value));
    return `| ${what}${unit} | ${reference} | ${status} | ${count} | ${cell(error)} | ${cell(bound)} |`;
  });
  return [
    '| what | against | status | cases | error now | bound |',
    '| --- | --- | --- | --: | --: | --: |',
    ...rows,
  ].join('\n');
}

const BEGIN = '<!-- accuracy ledger: npm run accuracy -- --write -->';
const END = '<!-- end of the ledger -->';

/** README with the table in its place. */
export function withTable(readme, cases) {
  const from = readme.indexOf(BEGIN);
  const to = readme.indexOf(END);
  if (from < 0 || to < from) throw new Error('README has no place for the ledger');
  return `${readme.slice(0, from)}${BEGIN}\n${ledgerTable(cases)}\n${readme.slice(to)}`;
}
