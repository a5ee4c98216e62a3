/** What a verb has of the outside: where it writes, how wide that is, standard input, the current folder. */

export interface Terminal {
  readonly out: (text: string) => void;
  readonly err: (text: string) => void;
  /** Width of the page in characters. */
  readonly columns: number;
  /** It shows signs of ASCII alone. */
  readonly plain?: boolean;
  /** Writes over the line that tells how far a run is; empty text takes the line away. Only where a person watches. */
  readonly status?: ((text: string) => void) | undefined;
  /** Standard input, at most `most` bytes and one more. */
  readonly input: (most: number) => Promise<Uint8Array>;
  readonly folder: string;
}

/** Narrower pages are not laid out for; wider lines are hard to read. */
const WIDTH = { least: 40, usual: 80, most: 110 } as const;

export function systemTerminal(): Terminal {
  const columns = process.stdout.columns ?? process.stderr.columns ?? WIDTH.usual;
  return {
    out: (text) => void process.stdout.write(text),
    err: (text) => void process.stderr.write(text),
    columns: Math.min(WIDTH.most, Math.max(WIDTH.least, columns)),
    plain: isPlain(process.env, process.platform),
    status: process.stderr.isTTY ? statusLine((text) => void process.stderr.write(text), columns) : undefined,
    input: readInput,
    folder: process.cwd(),
  };
}

/** Writes over what it wrote before with blanks and returns of the carriage, which every terminal knows. */
export function statusLine(write: (text: string) => void, columns: number): (text: string) => void {
  let shown = 0;
  return (text) => {
    // A full line would be broken by some terminals.
    const line = text.slice(0, columns - 1);
    write(`\r${line.padEnd(shown)}${line === '' ? '\r' : ''}`);
    shown = line.length;
  };
}

/** A dumb terminal, or a locale that is not UTF-8; the standard locale of POSIX, taken when none is named, is not. */
export function isPlain(env: Readonly<Record<string, string | undefined>>, platform: string): boolean {
  if (env.TERM === 'dumb') return true;
  const locale = [env.LC_ALL, env.LC_CTYPE, env.LANG].find((one) => one !== undefined && one !== '');
  if (locale === undefined) return platform !== 'win32' && platform !== 'darwin';
  return !/utf-?8/i.test(locale);
}

async function readInput(most: number): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of process.stdin) {
    const piece = chunk as Uint8Array;
    chunks.push(piece);
    bytes += piece.length;
    if (bytes > most) break;
  }
  return Buffer.concat(chunks);
}
