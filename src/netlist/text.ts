/** Text and numbers as a circuit simulator reads them. */

/** Longest line of the notes; a simulator may cut longer ones. */
const LONGEST = 100;

/**
 * A text from outside, safe in a note: letters, digits, blank, point, hyphen and underscore alone, on one line. No sign is
 * left that could begin a card, go on with one, or end the note.
 */
export function plain(text: string, longest = 60): string {
  const kept = text.replace(/[^A-Za-z0-9 ._-]+/g, ' ').replace(/ +/g, ' ');
  return kept.trim().slice(0, longest).trimEnd();
}

/** Notes, each line behind an asterisk; broken at blanks. What is not plain ASCII of a note's own wording is left out. */
export function note(text: string): string[] {
  const lines: string[] = [];
  let line = '*';
  for (const word of text.replace(/[^ -~]+/g, ' ').split(' ')) {
    if (line.length > 1 && line.length + 1 + word.length > LONGEST) {
      lines.push(line);
      line = '*';
    }
    line += ` ${word}`;
  }
  return [...lines, line];
}

/** A number with so many digits that nothing is lost, without the suffixes that mean different things to different programs. */
export function exact(value: number): string {
  return value === 0 ? '0' : value.toExponential(14).replace(/\.?0+e/, 'e');
}
