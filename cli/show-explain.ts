/** The explanation of a tap as text: one figure after the other, each with all that it takes to check it by hand. */
import type { Explanation, Figure } from '../src/explain/explain.ts';
import { tidy } from '../src/quantity/format.ts';
import { heading, hung, type Page, pageText, paragraph, shown } from './page.ts';
import { wrap } from './table.ts';

const HEAD = 10;
/** Kept for formulas beside the values; names longer than what is then left are broken. */
const BESIDE = 24;
/** With less room than this nothing stands side by side. */
const NARROW = 54;

export function showExplain({ job, hash, tap, turn, figures }: Explanation, page: Page): string {
  return pageText([
    [
      ...heading(page, `Tap ${tap} of ${job}: how its figures come about`),
      ...paragraph(page, `${tidy(turn)} turns from the start; record ${hash.slice(0, 12)}`),
    ],
    ...figures.map((figure, index) => block(figure, index + 1, page)),
  ]);
}

function block(figure: Figure, number: number, page: Page): string[] {
  const { value, unit, recorded, formula, source, inputs, intermediates, validity, error } = figure;
  const inRecord = recorded === null ? 'not in it; a check by hand of the next' : withUnit(recorded, unit);
  return [
    ...heading(page, `${number}  ${figure.figure} = ${withUnit(value, unit)}`),
    ...headed(page, 'record', inRecord),
    ...headed(page, 'formula', formula),
    ...headed(page, 'source', source),
    ...rows(
      page,
      'from',
      inputs.map((one) => ({ ...one, formula: '' })),
    ),
    ...rows(page, 'by way of', intermediates),
    ...headed(
      page,
      'holds for',
      `${validity.domain}; ${validity.inside ? 'so it is here' : 'NOT SO HERE, take it with care'}`,
    ),
    ...headed(page, 'error', error),
  ];
}

const headed = (page: Page, head: string, text: string): string[] => hung(page, head.padEnd(HEAD + 2), text);

const withUnit = (value: number, unit: string) =>
  unit === '' || unit === '°' ? tidy(value) + unit : `${tidy(value)} ${unit}`;

interface Row {
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly formula: string;
}

/** Names, values and how they follow, in columns; on a narrow page one under the other. */
function rows(page: Page, head: string, all: readonly Row[]): string[] {
  const list = all.map((row) => ({
    ...row,
    name: shown(page, row.name),
    unit: shown(page, row.unit),
    formula: shown(page, row.formula),
  }));
  if (page.plain === true)
    return list.map(({ name, value, unit, formula }) =>
      [`${head}: ${name} = ${withUnit(value, unit)}`, ...(formula === '' ? [] : [formula])].join(', '),
    );
  const room = page.columns - HEAD - 2;
  const lines = room < NARROW ? stacked(list, room) : inColumns(list, room);
  return lines.map((line, i) => `${(i === 0 ? head : '').padEnd(HEAD)}  ${line}`.trimEnd());
}

function stacked(list: readonly Row[], room: number): string[] {
  return list.flatMap(({ name, value, unit, formula }) => [
    ...wrap(`${name} = ${withUnit(value, unit)}`, room),
    ...(formula === '' ? [] : wrap(formula, room - 4).map((line) => `    ${line}`)),
  ]);
}

function inColumns(list: readonly Row[], room: number): string[] {
  const values = list.map(({ value, unit }) => withUnit(value, unit));
  const valueWidth = Math.max(0, ...values.map((text) => text.length));
  const beside = list.some(({ formula }) => formula !== '') ? BESIDE : 0;
  const longest = Math.max(0, ...list.map(({ name }) => name.length));
  const nameWidth = Math.min(longest, room - valueWidth - 2 - beside);
  const indent = ' '.repeat(nameWidth + 2 + valueWidth + 2);
  return list.flatMap(({ name, formula }, index) => {
    const names = wrap(name, nameWidth);
    const last = names[names.length - 1] ?? '';
    const [first = '', ...further] = wrap(formula, room - indent.length);
    const line = `${last.padEnd(nameWidth)}  ${(values[index] ?? '').padEnd(valueWidth)}  ${first}`;
    return [...names.slice(0, -1), line, ...further.map((text) => indent + text)];
  });
}
