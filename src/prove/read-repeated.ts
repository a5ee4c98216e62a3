/** What was measured more than once: the last line counts, the others are named. */
import type { Told } from './read-row.ts';
import type { DialReading, FileNote, Reading } from './types.ts';

/** A figure of a file, a reading or one of a dial. */
export interface Read {
  readonly line: number;
  readonly column: string;
  readonly reading: Reading | null;
  readonly dial: DialReading | null;
  /** What is to be said of it though it counts. */
  readonly note: Told | null;
}

/** Temperature is no condition of a resistance of its own: it is reckoned to 20 degrees before it is judged. */
function sameAs({ reading, dial }: Read): string {
  if (dial !== null) return `dial ${dial.tap} ${dial.degrees}`;
  const { quantity, tap, capacitancePf, frequencyKhz, key } = reading!;
  return `${quantity} ${tap} ${capacitancePf} ${frequencyKhz} ${tap === null ? key : ''}`;
}

interface Repeated {
  readonly line: number;
  readonly column: string;
  readonly note: Pick<FileNote, 'code' | 'got' | 'expected' | 'todo'>;
}

/** In the order of the file. */
export function unrepeated(all: readonly Read[]): {
  readonly kept: readonly Read[];
  readonly repeated: readonly Repeated[];
} {
  const last = new Map<string, Read>();
  for (const read of all) last.set(sameAs(read), read);
  const kept = all.filter((read) => last.get(sameAs(read)) === read);
  const repeated = all.flatMap((read): Repeated[] => {
    const counts = last.get(sameAs(read))!;
    if (counts === read) return [];
    const written = read.reading?.written ?? `${read.dial!.frequencyKhz}`;
    const note = {
      code: 'measured-again',
      got: `"${written}", measured again in line ${counts.line}`,
      expected: 'one line for each thing measured',
      todo: `line ${counts.line} counts, the last one; remove the line that is wrong`,
    };
    return [{ line: read.line, column: read.column, note }];
  });
  return { kept, repeated };
}
