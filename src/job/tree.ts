/**
 * Text of a job to plain data, with the line of every key. YAML 1.2 or JSON. What could hurt is refused before it is
 * parsed: great size, deep nesting, aliases, tags of other programs.
 */
import {
  Composer,
  type CST,
  type Document,
  isAlias,
  isMap,
  isPair,
  isSeq,
  LineCounter,
  type Node,
  Parser,
  visit,
  type YAMLError,
} from 'yaml';
import { Fault, type FaultParts } from '../fault.ts';
import { cut, quote, visible } from '../quantity/parse.ts';
import { type FileKind, JOB_FILE, otherKind } from './file-kind.ts';

export type Path = readonly (string | number)[];

export interface Tree {
  /** Maps, lists, texts, numbers, booleans and null. */
  readonly data: unknown;
  /** Line of the key or list entry at the path; of the nearest enclosing one when the path itself is not there. */
  readonly lineOf: (path: Path) => number | undefined;
}

/** 1 MB: a job is a page. */
export const LARGEST_BYTES = 1_000_000;
/** A job nests three deep. */
const DEEPEST = 32;
/** A group of a job has some twenty keys. */
const MOST_KEYS = 500;
/** The longest list is of the serials of a lot. */
const MOST_ENTRIES = 20_000;
/** Ends of lines and commas: a lot of ten thousand coils has some forty thousand. The parser takes half a kilobyte for each. */
const MOST_MARKS = 100_000;
/** Documents and errors that are looked at: what comes behind them changes nothing. */
const MOST_DOCUMENTS = 20;
const MOST_ERRORS = 200;

/** Bytes to text: UTF-8, with or without its mark. Throws a {@link Fault} with exit code 3. */
export function decode(bytes: Uint8Array, file: string, kind: FileKind = JOB_FILE): string {
  if (bytes.length > LARGEST_BYTES) throw tooLarge(bytes.length, file, kind);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    throw new Fault(3, {
      code: 'not-utf-8',
      place: { file },
      got: 'bytes that are not UTF-8 text',
      expected: `${kind.noun} in ${kind.form}, in UTF-8`,
      todo: 'save the file as UTF-8 text; PDF, ZIP and word processor files cannot be read',
    });
  }
}

/** Text to data. Throws a {@link Fault} with exit code 3 that carries every fault found. */
export function readTree(text: string, file: string, kind: FileKind = JOB_FILE): Tree {
  const bytes = Buffer.byteLength(text);
  if (bytes > LARGEST_BYTES) throw tooLarge(bytes, file, kind);
  const source = text.replace(/^\ufeff/, '');
  const deep = firstTooDeep(source);
  if (deep !== null) {
    throw new Fault(3, {
      code: 'too-deep',
      place: { file, line: deep },
      got: `more than ${DEEPEST} levels, one inside the other`,
      expected: `${kind.noun}, which needs three or four`,
      todo: 'look for brackets or indents that are never closed',
    });
  }
  const marks = source.match(/[\n\r,]/g)?.length ?? 0;
  if (marks > MOST_MARKS) throw tooMany(`${marks} lines and commas`, `at most ${MOST_MARKS}`, { file });
  const lines = new LineCounter();
  const documents = documentsOf(source, lines);
  const document = documents[0];
  if (document?.contents == null || document.contents.range == null) {
    if (document !== undefined && document.errors.length > 0) throw broken(document.errors, lines, file);
    throw empty(file, kind);
  }
  const faults = documents.flatMap((one) => [...one.errors, ...one.warnings]);
  if (faults.length > 0) throw broken(faults, lines, file);
  for (const one of documents) refuseSize(one.contents, lines, file);
  refuseTwice(document.contents, lines, file);
  if (documents.length > 1) {
    const second = documents[1]?.contents?.range?.[0];
    throw new Fault(3, {
      code: 'several-documents',
      place: { file, line: second === undefined ? undefined : lines.linePos(second).line },
      got: `${documents.length}${documents.length === MOST_DOCUMENTS ? ' or more' : ''} documents in one file`,
      expected: `${kind.noun} in a file of its own`,
      todo: 'put each into a file of its own and remove the line ---',
    });
  }
  const contents = document.contents as Node;
  refuseAliases(contents, lines, file);
  const data: unknown = document.toJS({ maxAliasCount: 0 });
  if (data === null || data === '') throw empty(file, kind);
  const lineOf = (path: Path) => lineAt(contents, path, lines);
  const other = otherKind(data, kind);
  if (other !== null) throw notThis(other.kind, other.key, kind, file, other.key === null ? 1 : lineOf([other.key]));
  return { data, lineOf };
}

/** The first documents of the text. Keys given twice are looked for later: the library compares every key with every other. */
function documentsOf(source: string, lines: LineCounter): readonly Document[] {
  const composer = new Composer({
    schema: 'core',
    stringKeys: true,
    uniqueKeys: false,
    prettyErrors: false,
    logLevel: 'silent',
  });
  const parser = new Parser(lines.addNewLine);
  const found: Document[] = [];
  for (const document of composer.compose(tokensOf(parser.parse(source)), true, source.length)) {
    found.push(document);
    if (found.length === MOST_DOCUMENTS) break;
  }
  return found;
}

function* tokensOf(all: Iterable<CST.Token>): Generator<CST.Token> {
  let errors = 0;
  for (const token of all) {
    if (token.type === 'error' && ++errors > MOST_ERRORS) return;
    yield token;
  }
}

const lineOfNode = (node: unknown, lines: LineCounter): number | undefined => {
  const start =
    typeof node === 'object' && node !== null && 'range' in node && Array.isArray(node.range) ? node.range[0] : null;
  return typeof start === 'number' ? lines.linePos(start).line : undefined;
};

/** Groups and lists far longer than any of ours: to judge each entry would take longer than anybody waits. */
function refuseSize(contents: unknown, lines: LineCounter, file: string): void {
  visit(contents as Node | null, {
    Collection: (_key, node) => {
      const most = isMap(node) ? MOST_KEYS : MOST_ENTRIES;
      if (node.items.length <= most) return;
      const noun = isMap(node) ? 'keys in one group' : 'entries in one list';
      throw tooMany(`${node.items.length} ${noun}`, `at most ${most}`, { file, line: lineOfNode(node, lines) });
    },
  });
}

const tooMany = (got: string, expected: string, place: FaultParts['place']): Fault =>
  new Fault(3, {
    code: 'too-many',
    place,
    got,
    expected,
    todo: 'check that this is the right file, and that nothing was pasted into it many times',
  });

function refuseTwice(contents: unknown, lines: LineCounter, file: string): void {
  const faults: FaultParts[] = [];
  visit(contents as Node | null, {
    Map: (_key, { items }) => {
      const seen = new Set<string>();
      for (const { key } of items) {
        const text = keyText(key);
        if (seen.has(text)) faults.push(keyTwice({ file, line: lineOfNode(key, lines) }));
        seen.add(text);
      }
    },
  });
  if (faults.length > 0) throw new Fault(3, faults);
}

const keyTwice = (place: FaultParts['place']): FaultParts => ({
  code: 'key-twice',
  place,
  got: 'a key that was given before',
  expected: 'every key once',
  todo: 'remove one of the two',
});

/** One fault for a file of another kind: what it lacks of this one would only bury it. */
function notThis(is: FileKind, key: string | null, asked: FileKind, file: string, line: number | undefined): Fault {
  return new Fault(3, {
    code: 'other-kind',
    place: { file, line, key: key ?? undefined },
    got: is.noun,
    expected: `${asked.noun}, with ${asked.least}`,
    todo: `give it to: coilwright ${is.verb} ${file}`,
  });
}

function tooLarge(bytes: number, file: string, kind: FileKind): Fault {
  return new Fault(3, {
    code: 'too-large',
    place: { file },
    got: `${bytes} bytes`,
    expected: `${kind.noun} of at most ${LARGEST_BYTES} bytes`,
    todo: kind === JOB_FILE ? 'check that this is the job file' : 'check that this is the right file',
  });
}

function empty(file: string, kind: FileKind): Fault {
  return new Fault(3, {
    code: 'empty',
    place: { file },
    got: kind === JOB_FILE ? 'an empty job' : 'an empty file',
    expected: kind.least,
    todo: `begin with: ${kind.begin}`,
  });
}

/** One fault a line: what follows on the same line is mostly the same slip seen again. */
function broken(errors: readonly YAMLError[], lines: LineCounter, file: string): Fault {
  const lineOf = (error: YAMLError) => lines.linePos(error.pos[0]).line;
  const seen = new Set<number>();
  const first = errors.slice(0, MOST_ERRORS).filter((error) => {
    const line = lineOf(error);
    return !seen.has(line) && seen.add(line);
  });
  return new Fault(
    3,
    first.map((error): FaultParts => {
      const place = { file, line: lineOf(error) };
      const got = visible(cut(error.message.split('\n')[0] ?? '', 200));
      if (error.code === 'TAG_RESOLVE_FAILED') {
        return {
          code: 'tag',
          place,
          got,
          expected: 'plain values',
          todo: 'remove the tag, or put the text in quotes when it starts with !',
        };
      }
      return {
        code: 'not-yaml',
        place,
        got,
        expected: 'YAML or JSON',
        todo: 'check indents, colons, quotes and brackets on this line and the one before',
      };
    }),
  );
}

/** Line at which the nesting passes the limit. Counts generously: brackets in quotes and comments count too. */
function firstTooDeep(source: string): number | null {
  let open = 0;
  let line = 0;
  for (const row of source.split('\n')) {
    line += 1;
    // A level of a block needs a column of indent, and in lists a mark of its own.
    const indent = /^[ \t]*(?:[-?:][ \t]+)*/.exec(row)?.[0] ?? '';
    const marks = indent.replace(/[ \t]/g, '').length;
    if (marks > DEEPEST || indent.length > DEEPEST * 6) return line;
    for (const character of row) {
      if (character === '[' || character === '{') open += 1;
      else if ((character === ']' || character === '}') && open > 0) open -= 1;
      if (open > DEEPEST) return line;
    }
  }
  return null;
}

function refuseAliases(contents: Node, lines: LineCounter, file: string): void {
  const faults: FaultParts[] = [];
  visit(contents, {
    Node: (_key, node) => {
      if (!isAlias(node) && !('anchor' in node && node.anchor !== undefined)) return;
      const start = node.range?.[0];
      faults.push({
        code: 'alias',
        place: { file, line: start === undefined ? undefined : lines.linePos(start).line },
        got: isAlias(node)
          ? `a reference ${quote(`*${node.source}`)}`
          : `an anchor ${quote(`&${String(node.anchor)}`)}`,
        expected: 'every value written out',
        todo: 'write the value itself, or put the text in quotes when it starts with * or &',
      });
    },
  });
  if (faults.length > 0) throw new Fault(3, faults);
}

function lineAt(contents: Node, path: Path, lines: LineCounter): number | undefined {
  let node: unknown = contents;
  let at: number | undefined;
  for (const step of path) {
    let found: { readonly range?: unknown } | null = null;
    if (isMap(node)) {
      const entry = node.items.find((item) => isPair(item) && keyText(item.key) === String(step));
      found = (entry?.key ?? null) as { readonly range?: unknown } | null;
      node = entry?.value;
    } else if (isSeq(node)) {
      node = node.items[Number(step)];
      found = (node ?? null) as { readonly range?: unknown } | null;
    }
    if (found === null) break;
    const start = Array.isArray(found.range) ? Number(found.range[0]) : undefined;
    if (start !== undefined) at = lines.linePos(start).line;
  }
  return at;
}

function keyText(key: unknown): string {
  return typeof key === 'object' && key !== null && 'value' in key ? String(key.value) : String(key);
}
