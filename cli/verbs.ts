/**
 * The verbs: what each does, its words, options and examples. Help, the parser, the hints on mistyped words and the completion
 * of shells all read this.
 */

/** What a word or the value of an option is: what a shell offers to complete it. */
export type Takes = 'data file' | 'table' | 'new file' | 'folder' | 'starter' | 'stock' | 'shell' | 'text';

export interface Word {
  readonly name: string;
  readonly takes: Takes;
  readonly does: string;
  readonly needed: boolean;
  /** Any number of them, the last word of the verb. */
  readonly many?: boolean;
}

export interface Option {
  /** The letter that stands for it behind a single dash. */
  readonly short?: string;
  /** Left out: it takes no value. */
  readonly takes?: Takes;
  /** What the value is called. */
  readonly value?: string;
  readonly does: string;
}

export interface VerbEntry {
  readonly does: string;
  readonly words: readonly Word[];
  readonly options: Readonly<Record<string, Option>>;
  readonly examples: readonly (readonly [line: string, does: string])[];
}

const EXPLAIN = {
  takes: 'text',
  value: 'TAP',
  does: 'number of a tap: how each of its figures comes about; with --json that instead of the record',
} as const;
const RECORD = { does: 'print the record, and nothing else' } as const;
const OUT_OF_JOB = {
  takes: 'folder',
  value: 'FOLDER',
  does: 'folder to write; out/<name of the job> when left out',
} as const;

export const STOCK_KINDS = ['wires', 'tubes', 'materials', 'spacers'] as const;
export const SHELLS = ['bash', 'zsh', 'fish'] as const;

export const VERBS = {
  start: {
    does: 'write a commented job, coil file or lot to begin with',
    words: [
      {
        name: 'name',
        takes: 'starter',
        needed: false,
        does: 'starter job, coil file or lot; low-bench-receiver when left out',
      },
    ],
    options: {
      out: {
        takes: 'new file',
        value: 'FILE',
        does: 'file to write, - for standard output; <name>.yaml when left out',
      },
      list: { does: 'list the starters' },
      schema: {
        does: 'write only the schema by which editors complete and check such a file; a starter brings it along',
      },
    },
    examples: [
      ['start', 'writes low-bench-receiver.yaml, and its schema beside it'],
      ['start forty-coil-lot --out lot.yaml', 'writes that starter as lot.yaml'],
      ['start --list', 'names them all'],
    ],
  },
  plan: {
    does: 'choose the coil for a job; write sheet, template, former and record',
    words: [{ name: 'job', takes: 'data file', needed: true, does: 'job file, YAML or JSON; - for standard input' }],
    options: { out: OUT_OF_JOB, json: RECORD, explain: EXPLAIN },
    examples: [
      ['plan low-bench-receiver.yaml', 'writes out/low-bench-receiver'],
      ['plan - --out coil --json < job.yaml', 'reads standard input, writes the folder coil, prints the record'],
      ['plan job.yaml --explain 3', 'shows besides how the figures of tap 3 come about'],
    ],
  },
  survey: {
    does: 'work out the figures of a coil from its measured dimensions: inductance, loss, range of every tap',
    words: [
      {
        name: 'coil',
        takes: 'data file',
        needed: true,
        does: 'file of a measured coil, YAML or JSON; - for standard input',
      },
    ],
    options: {
      out: {
        takes: 'folder',
        value: 'FOLDER',
        does: 'folder to write the record and the reference sheet to; nothing is written when left out',
      },
      json: RECORD,
      explain: EXPLAIN,
    },
    examples: [
      ['survey found-coil.yaml', 'shows its figures'],
      ['survey found-coil.yaml --out found', 'writes the folder found besides'],
    ],
  },
  match: {
    does: 'infer an old coil from what can be measured of it, and make its replacement: every tap as it was',
    words: [
      {
        name: 'coil',
        takes: 'data file',
        needed: true,
        does: 'file of an old coil, YAML or JSON; - for standard input',
      },
    ],
    options: { out: OUT_OF_JOB, json: RECORD, explain: EXPLAIN },
    examples: [
      ['match broken-form.yaml', 'writes out/broken-form'],
      ['match - --out coil --json < old.yaml', 'reads standard input, writes the folder coil, prints the record'],
    ],
  },
  lot: {
    does: 'make a lot: every kind of coil planned once, travellers, wire from reels, print beds, lists',
    words: [
      {
        name: 'file',
        takes: 'table',
        needed: true,
        does: 'file of a lot, YAML or JSON, or a table of jobs in CSV; - for standard input',
      },
    ],
    options: {
      out: { takes: 'folder', value: 'FOLDER', does: 'folder to write; out/<name of the lot> when left out' },
      json: { does: 'print the record of the lot, and nothing else' },
    },
    examples: [
      ['lot saltmarsh-lot.yaml', 'writes out/saltmarsh-lot'],
      ['lot orders.csv --out winter', 'a lot from a table of jobs and quantities'],
    ],
  },
  prove: {
    does: 'judge finished coils by what was measured: pass, fail, what saves them, what they have in common, charts, dial',
    words: [
      {
        name: 'readings',
        takes: 'table',
        needed: true,
        does: 'readings of finished coils in CSV, from the bench page, a lot or a spreadsheet; - for standard input',
      },
    ],
    options: {
      from: {
        takes: 'folder',
        value: 'FOLDER',
        does: 'folder below which the records of the coils lie; out and the folder of the readings when left out',
      },
      out: { takes: 'folder', value: 'FOLDER', does: 'folder to write; out/<name of the file>-proof when left out' },
      dial: {
        takes: 'text',
        value: 'SIZE',
        does: 'diameter of the dial to draw from readings of one, with its span if it is not 180 deg: "150 mm, 270 deg"',
      },
      json: { does: 'print the record of the proof, and nothing else' },
    },
    examples: [
      ['prove out/saltmarsh-lot/readings.csv', 'writes out/readings-proof'],
      ['prove bench.csv --from out/low-bench-receiver --dial "120 mm"', 'records of one folder, and a dial'],
    ],
  },
  stock: {
    does: 'list the wires, tubes, materials and spacers that are known',
    words: [
      { name: 'what', takes: 'stock', needed: false, does: 'wires (taken when left out), tubes, materials or spacers' },
      { name: 'words', takes: 'text', needed: false, many: true, does: 'words that the name must have' },
    ],
    options: {
      from: { takes: 'text', value: 'LENGTH', does: 'least diameter, such as 0.3mm (wires: bare)' },
      to: { takes: 'text', value: 'LENGTH', does: 'greatest diameter, such as 0.6mm or 0.02in' },
      json: { does: 'write the list as JSON' },
    },
    examples: [
      ['stock 24 awg enamel', 'the 24 AWG wires with enamel'],
      ['stock wires cotton --from 0.4mm --to 0.7mm', 'cotton-covered wire of these bare diameters'],
      ['stock tubes', 'the tubes'],
    ],
  },
  completion: {
    does: 'print what lets a shell complete verbs, options, starters and files',
    words: [{ name: 'shell', takes: 'shell', needed: false, does: 'bash, zsh or fish; the login shell when left out' }],
    options: {},
    examples: [
      ['completion bash >> ~/.bashrc', 'from the next shell on'],
      ['completion fish > ~/.config/fish/completions/coilwright.fish', 'the same for fish'],
      ['completion zsh > ~/.zfunc/_coilwright', 'the same for zsh, whose fpath must hold ~/.zfunc'],
    ],
  },
} as const satisfies Readonly<Record<string, VerbEntry>>;
export type Verb = keyof typeof VERBS;

export const VERB_NAMES = Object.keys(VERBS) as readonly Verb[];
/** Every verb has these. */
export const COMMON_OPTIONS = {
  quiet: { short: 'q', does: 'say nothing but what is wrong; data that was asked for is printed all the same' },
  plain: { does: 'a fact a line and no drawings, for a screen reader; so too where TERM is dumb' },
  help: { does: 'show this' },
  version: { does: 'show the version' },
} as const satisfies Readonly<Record<string, Option>>;

export const isVerb = (word: string): word is Verb => VERB_NAMES.some((verb) => verb === word);
export const entryOf = (verb: Verb): VerbEntry => VERBS[verb];
/** Options of the verb, the common ones behind. */
export const optionsOf = (verb: Verb): Readonly<Record<string, Option>> => ({
  ...entryOf(verb).options,
  ...COMMON_OPTIONS,
});

/** `plan JOB`, `stock [WHAT] [WORDS ...]`. */
export function writtenOf(verb: Verb): string {
  const words = entryOf(verb).words.map(({ name, needed, many }) => {
    const text = `${name.toUpperCase()}${many === true ? ' ...' : ''}`;
    return needed ? text : `[${text}]`;
  });
  return [verb, ...words].join(' ');
}
