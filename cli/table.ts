/** Plain tables and paragraphs for a page so many characters wide. */

const GAP = '  ';

/** Breaks at blanks; a word longer than the page stands alone. */
export function wrap(text: string, columns: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    if (line !== '' && line.length + 1 + word.length > columns) {
      lines.push(line);
      line = word;
    } else {
      line = line === '' ? word : `${line} ${word}`;
    }
  }
  return [...lines, line];
}

/** A header, a rule, the rows; columns as wide as their widest cell. */
export function lay(
  header: readonly string[],
  body: readonly (readonly string[])[],
  right: readonly boolean[],
): string[] {
  const rows = [header, ...body];
  const widths = header.map((_, i) => rows.reduce((most, row) => Math.max(most, row[i]!.length), 0));
  const pad = (text: string, i: number) => (right[i] ? text.padStart(widths[i]!) : text.padEnd(widths[i]!));
  const lines = rows.map((row) => row.map(pad).join(GAP).trimEnd());
  return [lines[0]!, widths.map((width) => '-'.repeat(width)).join(GAP), ...lines.slice(1)];
}
