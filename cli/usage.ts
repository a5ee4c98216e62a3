/** Wrong use of the command line: from what the parser says to a fault with exit code 2. */
import { Fault, type FaultParts } from '../src/fault.ts';
import { COIL_FILE, type FileKind, JOB_FILE, LOT_FILE, OLD_COIL_FILE, READINGS_FILE } from '../src/job/file-kind.ts';
import { nearest } from '../src/job/nearest.ts';
import { WrongUse } from './command-line.ts';
import { isVerb, optionsOf, VERB_NAMES, type Verb } from './verbs.ts';

/** A fault for what the parser has against the arguments `given`; anything else is handed back as it is. */
export function asUsageFault(error: unknown, given: readonly string[]): unknown {
  return error instanceof WrongUse ? new Fault(2, parts(error.message, given)) : error;
}

function parts(message: string, given: readonly string[]): readonly FaultParts[] {
  const verb = given.find(isVerb);
  if (verb === undefined) return [wrongVerb(given.find((word) => !word.startsWith('-')))];
  const help = `see: coilwright ${verb} --help`;
  const unknown = /^Unknown arguments?: (.*)$/s.exec(message)?.[1];
  if (unknown !== undefined) return unknown.split(', ').map((word) => unknownWord(word, verb, given));
  const valueless = /^Not enough arguments following: (.*)$/s.exec(message)?.[1];
  if (valueless !== undefined) {
    return [
      { code: 'no-value', place: { key: `--${valueless}` }, got: 'nothing behind it', expected: 'a value', todo: help },
    ];
  }
  if (message.startsWith('Not enough non-option arguments')) {
    return [noFile(verb)];
  }
  return [{ code: 'usage', got: message.toLowerCase(), expected: `options of ${verb} that go together`, todo: help }];
}

/** What each verb that takes a file takes, and what that is called in its fault. */
const TAKEN: Partial<Record<Verb, readonly [kind: FileKind, word: string]>> = {
  survey: [COIL_FILE, 'coil'],
  match: [OLD_COIL_FILE, 'coil'],
  lot: [LOT_FILE, 'lot'],
  prove: [READINGS_FILE, 'readings'],
};

function noFile(verb: Verb): FaultParts {
  const [{ noun, begin, form }, word] = TAKEN[verb] ?? [JOB_FILE, 'job'];
  return {
    code: `no-${word}`,
    got: `${verb} without ${noun}`,
    expected: `coilwright ${verb} ${word.toUpperCase()}, a file in ${form}, or - for standard input`,
    todo: `name the ${word} file; "${begin}" writes one to begin with`,
  };
}

function wrongVerb(word: string | undefined): FaultParts {
  const near = word === undefined ? null : nearest(word, VERB_NAMES);
  return {
    code: word === undefined ? 'no-verb' : 'unknown-verb',
    got: word === undefined ? 'no verb' : `the verb "${word.slice(0, 60)}"`,
    expected: `one of: ${VERB_NAMES.join(', ')}`,
    todo: near === null ? 'see: coilwright --help' : `did you mean ${near}?`,
  };
}

function unknownWord(word: string, verb: Verb, given: readonly string[]): FaultParts {
  const typed = given.find((one) => one.startsWith('-') && one.replace(/^-+/, '').split('=')[0] === word);
  if (typed === undefined) {
    return {
      code: 'word-too-many',
      got: `"${word.slice(0, 60)}", a word too many`,
      expected: `what coilwright ${verb} --help shows`,
      todo: 'remove it; put a name with blanks in quotes',
    };
  }
  const options = Object.keys(optionsOf(verb));
  const near = nearest(word, options);
  return {
    code: 'unknown-option',
    place: { key: typed.split('=')[0]?.slice(0, 60) },
    got: 'an option that is not known',
    expected: `one of: ${options.map((option) => `--${option}`).join(', ')}`,
    todo: near === null ? `see: coilwright ${verb} --help` : `did you mean --${near}?`,
  };
}
