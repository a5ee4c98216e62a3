/**
 * What a verb says, laid out for the page there is: headings, lists, tables, drawings. Every text goes through here, so that width,
 * signs, colours and the plain way are settled once.
 */
import { lay, wrap } from './table.ts';
import type { Terminal } from './terminal.ts';

export interface Page {
  /** Width in characters; endless on a plain page, where a fact must not be broken. */
  readonly columns: number;
  /** Signs of ASCII alone. */
  readonly ascii?: boolean;
  /** A fact a line, tables as `key: value`, no drawings: for somebody who listens. */
  readonly plain?: boolean;
  /** Heads in bold, trouble in the one accent; never the only bearer of a meaning. */
  readonly colours?: boolean;
}

type Terminals = Pick<Terminal, 'columns' | 'errColumns' | 'ascii' | 'plain' | 'colours'>;

/** The page of standard output. */
export function outPage({ columns, ascii = false, plain = false, colours }: Terminals): Page {
  return {
    columns: plain ? Number.POSITIVE_INFINITY : columns,
    ascii,
    plain,
    colours: !plain && (colours?.out ?? false),
  };
}

/** The page of standard error, which may be another one. */
export function errPage(terminal: Terminals): Page {
  const { errColumns: columns = terminal.columns, colours } = terminal;
  const out = colours?.err ?? false;
  return outPage({ ...terminal, columns, colours: { out, err: out } });
}

/** Bold, and the accent besides: magenta, which can be read on light and on dark. */
const SIGNS = { head: '\u001b[1m', trouble: '\u001b[1;35m', end: '\u001b[0m' } as const;

export const styled = (page: Page, kind: 'head' | 'trouble', text: string): string =>
  page.colours === true && text !== '' ? `${SIGNS[kind]}${text}${SIGNS.end}` : text;

const IN_ASCII: Readonly<Record<string, string>> = {
  µ: 'u',
  Ω: 'ohm',
  '±': '+-',
  '°': ' deg ',
  '’': "'",
  '–': '-',
  '−': '-',
  '²': '2',
  '³': '3',
  '…': '.',
};

/** The same in signs of ASCII. */
export function inAscii(text: string): string {
  return text.replace(/ ?° ?(?=C)/g, ' deg ').replace(/[^\n -~]/gu, (sign) => IN_ASCII[sign] ?? '?');
}

/** The text in the signs that this page shows. */
export const shown = (page: Page, text: string): string => (page.ascii === true ? inAscii(text) : text);

export function paragraph(page: Page, text: string): string[] {
  return [...wrap(shown(page, text), page.columns)];
}

export function heading(page: Page, text: string, kind: 'head' | 'trouble' = 'head'): string[] {
  return paragraph(page, text).map((line) => styled(page, kind, line));
}

/** The text behind its mark, further lines under its first word; on a narrow page under the mark. */
export function hung(page: Page, mark: string, text: string): string[] {
  if (page.plain === true) {
    const name = mark.trim().replace(/ {2,}/g, ', ');
    return [shown(page, name === '' || name === '-' ? text : `${name}: ${text}`)];
  }
  const said = shown(page, text);
  const indent = mark.length > page.columns / 2 ? 4 : mark.length;
  if (indent < mark.length)
    return [mark.trimEnd(), ...wrap(said, page.columns - indent).map((line) => ' '.repeat(indent) + line)];
  return wrap(said, page.columns - indent).map((line, index) => (index === 0 ? mark : ' '.repeat(indent)) + line);
}

/** Facts under a heading; nothing for none. */
export function list(page: Page, title: string, items: readonly string[], kind: 'head' | 'trouble' = 'head'): string[] {
  return items.length === 0
    ? []
    : [...heading(page, title, kind), ...items.flatMap((text) => hung(page, '  - ', text))];
}

/** Title and cell of a column, the most needed ones first; numbers stand to the right. */
export type Figure<T> = readonly [title: string, cell: (row: T) => string, left?: 'left'];

/**
 * Rows under a heading. As many of the columns as the page holds, the first ones first; all of them on a plain page, a line each.
 * `title` may depend on the columns shown.
 */
export function table<T>(
  page: Page,
  title: string | ((shown: readonly string[]) => string),
  figures: readonly Figure<T>[],
  rows: readonly T[],
): string[] {
  if (rows.length === 0) return [];
  const titled = (used: readonly Figure<T>[]) =>
    heading(page, typeof title === 'string' ? title : title(used.map(([head]) => head)));
  if (page.plain === true) return [...titled(figures), ...rows.flatMap((row) => facts(page, figures, row))];
  for (let count = figures.length; count > 0; count--) {
    const used = figures.slice(0, count);
    const lines = lay(
      used.map(([head]) => shown(page, head)),
      rows.map((row) => used.map(([, cell]) => shown(page, cell(row)))),
      used.map(([, , left]) => left === undefined),
    );
    if (count === 1 || lines.every((line) => line.length + 2 <= page.columns))
      return [...titled(used), ...lines.map((line) => `  ${line}`.slice(0, page.columns))];
  }
  return [];
}

/** One row for the ear: what it is, then every figure under its name. */
function facts<T>(page: Page, [first, ...rest]: readonly Figure<T>[], row: T): string[] {
  const [title, cell] = first!;
  return [
    shown(page, `${title} ${cell(row)}`.trim()),
    ...rest.flatMap(([head, of], i) => {
      // Beside a number it says enough; alone it does not.
      const name = head === '±' ? `${head} of ${rest[i - 1]?.[0]}` : head;
      return of(row) === '' ? [] : [shown(page, `${name}: ${of(row)}`)];
    }),
  ];
}

/** A drawing under its heading. A plain page has none: whoever calls says the same in words. */
export function drawing(page: Page, title: string, lines: readonly string[]): string[] {
  if (page.plain === true || lines.length === 0) return [];
  return [...heading(page, title), ...lines.map((line) => `  ${line}`.trimEnd())];
}

/** Sections with a blank line between them; empty ones are passed over. */
export function pageText(sections: readonly (readonly string[])[]): string {
  const full = sections.filter((lines) => lines.length > 0);
  return full.length === 0 ? '' : `${full.map((lines) => lines.join('\n')).join('\n\n')}\n`;
}
