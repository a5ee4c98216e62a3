/** A netlist's text with the block of another position active: asterisks moved as the notes in it say. */
export function moved(text: string, position: number): string {
  let block = 0;
  return text
    .split('\n')
    .map((line) => {
      const [, begins] = /^\* position (\d+)/.exec(line) ?? [];
      if (begins !== undefined) block = Number(begins);
      else if (line.startsWith('* end of positions')) block = 0;
      else if (block > 0) return (block === position ? '' : '*') + line.replace(/^\*/, '');
      return line;
    })
    .join('\n');
}
