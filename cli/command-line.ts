/** The arguments of the command line, by the table of the verbs. What a verb needs is loaded only when it is called. */
import yargs, { type ArgumentsCamelCase, type Argv } from 'yargs';
import type { Terminal } from './terminal.ts';
import { COMMON_OPTIONS, entryOf, type Option, optionsOf, VERB_NAMES, type VERBS, type Verb } from './verbs.ts';

/** Stands for `-`, which the parser would turn into an empty text. */
const STANDARD_STREAM = '\u0000-';

/** What the parser has against the arguments, in English. */
export class WrongUse extends Error {}

type Entry<V extends Verb> = (typeof VERBS)[V];
type Value<O> = O extends { readonly takes: string } ? string | undefined : boolean;
type Words<W extends readonly unknown[]> = {
  readonly [One in W[number] as One extends { readonly name: infer N extends string } ? N : never]: One extends {
    readonly many: true;
  }
    ? readonly string[]
    : One extends { readonly needed: true }
      ? string
      : string | undefined;
};
/** What the parser makes of the arguments of a verb. */
export type Found<V extends Verb> = Words<Entry<V>['words']> & {
  readonly [K in keyof Entry<V>['options']]: Value<Entry<V>['options'][K]>;
};

type Run<V extends Verb> = (found: Found<V>, terminal: Terminal, version: string) => Promise<void>;

const RUN: { readonly [V in Verb]: Run<V> } = {
  start: async (found, terminal) => (await import('./start.ts')).runStart(found, terminal),
  plan: async (found, terminal, version) => (await import('./plan.ts')).plan(found, terminal, version),
  survey: async (found, terminal, version) => (await import('./survey.ts')).survey(found, terminal, version),
  match: async (found, terminal, version) => (await import('./match.ts')).match(found, terminal, version),
  lot: async (found, terminal, version) => (await import('./lot.ts')).lot(found, terminal, version),
  prove: async (found, terminal, version) => (await import('./prove.ts')).prove(found, terminal, version),
  stock: async (found, terminal) => (await import('./stock.ts')).stock(found, terminal),
  completion: async (found, terminal) => (await import('./completion.ts')).completion(found, terminal),
};

/** Parses, and runs the verb. Throws {@link WrongUse}, and whatever the verb throws. */
export async function obey(given: readonly string[], terminal: Terminal, version: string): Promise<void> {
  const marked = given.map((word) => (word === '-' ? STANDARD_STREAM : word));
  try {
    await parser(terminal, version).parseAsync(marked);
  } catch (error) {
    throw error instanceof Error && error.name === 'YError' ? new WrongUse(error.message) : error;
  }
}

/** Help and version never come here. */
function parser(terminal: Terminal, version: string): Argv {
  const all = yargs()
    .scriptName('coilwright')
    .locale('en')
    .version(false)
    .help(false)
    .exitProcess(false)
    .strict()
    .demandCommand(1)
    .parserConfiguration({
      'duplicate-arguments-array': false,
      'dot-notation': false,
      'parse-numbers': false,
      'boolean-negation': false,
    })
    .middleware(unmark, true)
    .fail((message: string | null, error: Error | undefined) => {
      throw error ?? new WrongUse(message ?? '');
    });
  for (const [name, { short }] of Object.entries<Option>(COMMON_OPTIONS))
    all.option(name, { type: 'boolean', ...(short === undefined ? {} : { alias: short }) });
  for (const verb of VERB_NAMES) declare(all, verb, terminal, version);
  return all;
}

function declare<V extends Verb>(all: Argv, verb: V, terminal: Terminal, version: string): void {
  const { does, words } = entryOf(verb);
  const written = words.map(({ name, needed, many }) => {
    const text = `${name}${many === true ? '..' : ''}`;
    return needed ? `<${text}>` : `[${text}]`;
  });
  all.command(
    [verb, ...written].join(' '),
    does,
    (one) => {
      for (const { name, many } of words) one.positional(name, { type: 'string', array: many === true });
      for (const [name, { takes }] of Object.entries(optionsOf(verb)))
        one.option(
          name,
          takes === undefined ? { type: 'boolean', default: false } : { type: 'string', requiresArg: true },
        );
      return one;
    },
    // The parser was told what there is by the same table that Found is made from.
    async (found) => RUN[verb](found as unknown as Found<V>, terminal, version),
  );
}

/** Puts `-` back. */
function unmark(found: ArgumentsCamelCase): void {
  for (const [key, value] of Object.entries(found)) {
    if (value === STANDARD_STREAM) found[key] = '-';
  }
}
