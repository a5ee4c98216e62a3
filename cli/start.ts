/** `start`: writes a commented job, coil file or lot to begin with. */
import { writeFile } from 'node:fs/promises';
import { dirname, join, relative, resolve } from 'node:path';
import type { Argv } from 'yargs';
import { Fault } from '../src/fault.ts';
import { nearest } from '../src/job/nearest.ts';
import { outputFault } from '../src/output/faults.ts';
import { COILS } from '../templates/coils/coils.ts';
import { STARTERS, type Starter } from '../templates/jobs/starters.ts';
import { LOTS, type LotStarter } from '../templates/lots/lots.ts';
import { MATCHES } from '../templates/matches/matches.ts';
import type { Terminal } from './terminal.ts';

const ALL: readonly Starter[] = [...STARTERS, ...COILS, ...MATCHES, ...LOTS];
const isCoil = (starter: Starter): boolean => COILS.includes(starter);
const isOld = (starter: Starter): boolean => MATCHES.includes(starter);
const isLot = (starter: Starter): starter is LotStarter => LOTS.some((lot) => lot === starter);
/** The verb that a starter is for. */
const verbOf = (starter: Starter): string =>
  isOld(starter) ? 'match' : isCoil(starter) ? 'survey' : isLot(starter) ? 'lot' : 'plan';

export function describeStart(yargs: Argv) {
  return yargs
    .positional('name', {
      type: 'string',
      describe: `starter job, coil file or lot; ${STARTERS[0].name} when left out`,
    })
    .option('out', {
      type: 'string',
      requiresArg: true,
      describe: 'file to write, - for standard output; <name>.yaml when left out',
    })
    .option('list', { type: 'boolean', default: false, describe: 'list the starters' })
    .option('schema', {
      type: 'boolean',
      default: false,
      describe:
        'write the schema of the file instead, for editors: job.schema.json, coil.schema.json, match.schema.json or lot.schema.json',
    })
    .example('$0 start', `writes ${STARTERS[0].name}.yaml`)
    .example('$0 start forty-coil-lot --out lot.yaml', 'writes that starter as lot.yaml');
}

export interface StartOptions {
  readonly name?: string | undefined;
  readonly out?: string | undefined;
  readonly list: boolean;
  readonly schema: boolean;
}

/** Throws a Fault with exit code 2 or 5. A file that is there is never overwritten. */
export async function runStart(options: StartOptions, terminal: Terminal): Promise<void> {
  if (options.list) {
    if (options.out !== undefined || options.schema || options.name !== undefined) throw listAlone();
    const width = Math.max(...ALL.map(({ name }) => name.length)) + 2;
    for (const { name, use } of ALL) terminal.out(`${name.padEnd(width)}${use}\n`);
    return;
  }
  const { name, text, next, beside = [] } = options.schema ? await schemaFile(options.name) : jobFile(options);
  if (options.out === '-') {
    terminal.out(text);
    return;
  }
  const path = resolve(terminal.folder, options.out ?? name);
  const shown = shownFrom(terminal.folder, path);
  await writeNew(path, shown, text);
  terminal.out(`${shown} written; ${next(shown)}\n`);
  for (const one of beside) {
    const other = join(dirname(path), `${one.name}.yaml`);
    const there = shownFrom(terminal.folder, other);
    const wrote = await writeMissing(other, there, one.text);
    terminal.out(
      wrote ? `${there} written, which it names\n` : `${there} was there already and is kept; it names that\n`,
    );
  }
}

const shownFrom = (folder: string, path: string): string =>
  relative(folder, path).startsWith('..') ? path : relative(folder, path);

function listAlone(): Fault {
  return new Fault(2, {
    code: 'list-alone',
    place: { key: '--list' },
    got: '--list together with something to write',
    expected: '--list alone',
    todo: 'run start twice',
  });
}

interface NewFile {
  readonly name: string;
  readonly text: string;
  /** What to do with the file written under this name. */
  readonly next: (shown: string) => string;
  /** Files that it names, to be written where they are missing. */
  readonly beside?: readonly Starter[];
}

function jobFile({ name }: StartOptions): NewFile {
  const starter = find(name);
  return {
    name: `${starter.name}.yaml`,
    text: starter.text,
    next: (shown) => `edit it, then: coilwright ${verbOf(starter)} ${shown}`,
    beside: isLot(starter) ? starter.jobs : [],
  };
}

async function schemaFile(starter: string | undefined): Promise<NewFile> {
  if (starter !== undefined && isLot(find(starter))) {
    const { lotJsonSchema } = await import('../src/job/lot/json-schema.ts');
    return {
      name: 'lot.schema.json',
      text: `${JSON.stringify(lotJsonSchema(), null, 2)}\n`,
      next: (shown) => `name it in a lot file: $schema: ./${shown}`,
    };
  }
  if (starter !== undefined && isOld(find(starter))) {
    const { oldCoilJsonSchema } = await import('../src/job/old-coil/json-schema.ts');
    return {
      name: 'match.schema.json',
      text: `${JSON.stringify(oldCoilJsonSchema(), null, 2)}\n`,
      next: (shown) => `name it in the file of an old coil: $schema: ./${shown}`,
    };
  }
  if (starter !== undefined && isCoil(find(starter))) {
    const { coilJsonSchema } = await import('../src/job/coil/json-schema.ts');
    return {
      name: 'coil.schema.json',
      text: `${JSON.stringify(coilJsonSchema(), null, 2)}\n`,
      next: (shown) => `name it in a coil file: $schema: ./${shown}`,
    };
  }
  if (starter !== undefined) {
    throw new Fault(2, {
      code: 'schema-of-starter',
      place: { key: '--schema' },
      got: `--schema together with ${starter}`,
      expected: 'one of the two: the schema is the same for every job',
      todo: 'run start twice',
    });
  }
  const { jobJsonSchema } = await import('../src/job/jsonSchema.ts');
  return {
    name: 'job.schema.json',
    text: `${JSON.stringify(jobJsonSchema(), null, 2)}\n`,
    next: (shown) => `name it in a job: $schema: ./${shown}`,
  };
}

function find(name: string | undefined): Starter {
  if (name === undefined) return STARTERS[0];
  const names = ALL.map((starter) => starter.name);
  const found = ALL.find((starter) => starter.name === name.replace(/\.ya?ml$/, ''));
  if (found !== undefined) return found;
  const near = nearest(name, names);
  throw new Fault(2, {
    code: 'no-such-starter',
    got: `the starter "${name.slice(0, 60)}"`,
    expected: `one of: ${names.join(', ')}`,
    todo: near === null ? 'choose one; coilwright start --list says what each is for' : `did you mean ${near}?`,
  });
}

async function writeNew(path: string, shown: string, text: string): Promise<void> {
  if (await writeMissing(path, shown, text)) return;
  throw new Fault(5, {
    code: 'already-there',
    place: { file: shown },
    got: 'a file or folder that is there already',
    expected: 'a new file',
    todo: 'choose another name with --out; nothing was changed',
  });
}

/** Whether it was written: not when something is there. */
async function writeMissing(path: string, shown: string, text: string): Promise<boolean> {
  try {
    await writeFile(path, text, { flag: 'wx' });
    return true;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'EEXIST') return false;
    throw outputFault(error, shown);
  }
}
