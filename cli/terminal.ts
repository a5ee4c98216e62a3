/** What a verb has of the outside: where it writes, how wide that is, standard input, the current folder. */
import { basename } from 'node:path';
import { startTicking, type Ticking } from './ticking.ts';

export interface Terminal {
  /** Standard output: what was asked for. */
  readonly out: (text: string) => void;
  /** Standard error: everything else. */
  readonly err: (text: string) => void;
  /** Width of the page in characters. */
  readonly columns: number;
  /** That of standard error, where it is another one. */
  readonly errColumns?: number;
  /** It shows signs of ASCII alone. */
  readonly ascii?: boolean;
  /** A fact a line, no drawings, nothing written over. */
  readonly plain?: boolean;
  /** Nothing is said but what is wrong. */
  readonly quiet?: boolean;
  /** Which of the two streams shows colours. */
  readonly colours?: { readonly out: boolean; readonly err: boolean };
  /** Writes over the line that tells how far a run is; empty text takes the line away. Only where a person watches. */
  readonly status?: ((text: string) => void) | undefined;
  /** Counts the seconds of work that does not know how far it is. Only where a person watches. */
  readonly ticking?: ((work: string) => Ticking) | undefined;
  /** Standard input, at most `most` bytes and one more. */
  readonly input: (most: number) => Promise<Uint8Array>;
  readonly folder: string;
  /** Name of the login shell, where there is one. */
  readonly shell?: string | undefined;
}

/** What a person reads, on standard output; nothing when the terminal is to be quiet. */
export function say(terminal: Terminal, text: string): void {
  if (terminal.quiet !== true) terminal.out(text);
}

/** Narrower pages are not laid out for; wider lines are hard to read. */
const WIDTH = { least: 40, usual: 80, most: 110 } as const;

type Env = Readonly<Record<string, string | undefined>>;
interface Stream {
  readonly isTTY?: boolean;
  readonly columns?: number;
}

export function systemTerminal(): Terminal {
  const { env, stdout, stderr } = process;
  const plain = env.TERM === 'dumb';
  const errWidth = widthOf([stderr, stdout], env);
  const watched = stderr.isTTY === true;
  return {
    out: (text) => void stdout.write(text),
    err: (text) => void stderr.write(text),
    columns: widthOf([stdout, stderr], env),
    errColumns: errWidth,
    ascii: isAscii(env, process.platform),
    plain,
    colours: { out: hasColours(stdout, env), err: hasColours(stderr, env) },
    status: watched ? statusOf(plain, (text) => void stderr.write(text), stderr.columns ?? errWidth) : undefined,
    ticking: watched ? (work) => startTicking(work, { fd: 2, columns: stderr.columns ?? errWidth, plain }) : undefined,
    input: readInput,
    folder: process.cwd(),
    shell: env.SHELL === undefined ? undefined : basename(env.SHELL),
  };
}

/** The width asked for by COLUMNS (POSIX: what the user prefers), else that of the first stream that has one. */
export function widthOf(streams: readonly Stream[], env: Env): number {
  const wanted = /^[1-9]\d{0,4}$/.test(env.COLUMNS ?? '') ? Number(env.COLUMNS) : undefined;
  // A terminal that does not know its width says 0.
  const own = streams.map(({ columns }) => columns).find((columns) => columns !== undefined && columns > 0);
  return Math.min(WIDTH.most, Math.max(WIDTH.least, wanted ?? own ?? WIDTH.usual));
}

/** Only on a terminal, not on a dumb one, and not where NO_COLOR holds anything. */
export function hasColours({ isTTY = false }: Stream, env: Env): boolean {
  return isTTY && (env.NO_COLOR ?? '') === '' && env.TERM !== 'dumb';
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

/** Least time between two lines of a run that are written one under the other. */
const APART_MS = 10_000;

/** For somebody who listens: now and then a line of its own, nothing over another. */
export function spokenStatus(write: (text: string) => void, clock: () => number): (text: string) => void {
  let last = Number.NEGATIVE_INFINITY;
  return (text) => {
    if (text === '' || clock() - last < APART_MS) return;
    last = clock();
    write(`${text}\n`);
  };
}

const statusOf = (plain: boolean, write: (text: string) => void, columns: number) =>
  plain ? spokenStatus(write, () => performance.now()) : statusLine(write, columns);

/** A dumb terminal, or a locale that is not UTF-8; the standard locale of POSIX, taken when none is named, is not. */
export function isAscii(env: Env, platform: string): boolean {
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
