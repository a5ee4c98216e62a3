/** The explanation of a tap as text: one figure after the other, each with all that it takes to check it by hand. */
import type { Explanation, Figure } from '../src/explain/explain.ts';
import { tidy } from '../src/quantity/format.ts';
import { wrap } from './table.ts';

const HEAD = 10;
/** Kept for formulas beside the values; names longer than what is then left are broken. */
const BESIDE = 24;
/** With less room than this nothing stands side by side. */
const NARROW = 54;

/** Plain text, no wider than `columns`. */
export function showExplain({ job, hash, tap, turn, figures }: Explanation, columns: number): string {
  const title = `Tap ${tap} of ${job}: how its figures come about`;
  const where = `${tidy(turn)} turns from the start; record ${hash.slice(0, 12)}`;
  const blocks = figures.map((figure, index) => block(figure, index + 1, columns));
  return `${[[...wrap(title, columns), ...wrap(where, columns)], ...blocks].map((lines) => lines.join('\n')).join('\n\n')}\n`;
}

function block(figure: Figure, number: number, columns: number): string[] {
  const { value, unit, recorded, formula, source, inputs, intermediates, validity, error } = figure;
  const inRecord = recorded === null ? 'not in it; a check by hand of the next' : withUnit(recorded, unit);
  return [
    ...wrap(`${number}  ${figure.figure} = ${withUnit(value, unit)}`, columns),
    ...hung('record', inRecord, columns),
    ...hung('formula', formula, columns),
    ...hung('source', source, columns),
    ...rows(
      'from',
      inputs.map((one) => ({ ...one, formula: '' })),
      columns,
    ),
    ...rows('by way of', intermediates, columns),
    ...hung(
      'holds for',
      `${validity.domain}; ${validity.inside ? 'so it is here' : 'NOT SO HERE, take it with care'}`,
      columns,
    ),
    ...hung('error', error, columns),
  ];
}

const withUnit = (value: number, unit: string) =>
  unit === '' || unit === '°' ? tidy(value) + unit : `${tidy(value)} ${unit}`;

interface Row {
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly formula: string;
}

/** Names, values and how they follow, in columns; on a narrow page one under the other. */
function rows(head: string, list: readonly Row[], columns: number): string[] {
  const room = columns - HEAD - 2;
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

function hung(head: string, text: string, columns: number): string[] {
  return wrap(text, columns - HEAD - 2).map((line, i) => `${(i === 0 ? head : '').padEnd(HEAD)}  ${line}`);
}
