/** `start`: writes a commented job, coil file or lot to begin with, and beside it the schema that editors complete and check it by. */
import { readFile, writeFile } from 'node:fs/promises';
import { dirname, join, relative, resolve } from 'node:path';
import { Fault } from '../src/fault.ts';
import { nearest } from '../src/job/nearest.ts';
import { outputFault } from '../src/output/faults.ts';
import { hung, outPage, paragraph, shown } from './page.ts';
import { ALL_STARTERS, type AnyStarter, JOB_SCHEMA, type SchemaFile } from './starters.ts';
import { say, type Terminal } from './terminal.ts';

export interface StartOptions {
  readonly name?: string | undefined;
  readonly out?: string | undefined;
  readonly list: boolean;
  readonly schema: boolean;
}

/** Throws a Fault with exit code 2 or 5. A file that is there is never overwritten. */
export async function runStart(options: StartOptions, terminal: Terminal): Promise<void> {
  if (options.list) return showList(options, terminal);
  const starter = find(options.name);
  const { schema } = starter;
  const text = options.schema ? await schema.text() : starter.text;
  if (options.out === '-') return terminal.out(text);
  const path = resolve(terminal.folder, options.out ?? (options.schema ? schema.file : `${starter.name}.yaml`));
  const there = shownFrom(terminal.folder, path);
  await writeNew(path, there, text);
  const tell = (said: string) => say(terminal, `${shown(outPage(terminal), said)}\n`);
  if (options.schema) return tell(`${there} written; name it in the file of ${schema.of}: $schema: ./${schema.file}`);
  tell(`${there} written; edit it, then: coilwright ${starter.verb} ${there}`);
  const beside = (file: string) => {
    const whole = join(dirname(path), file);
    return [whole, shownFrom(terminal.folder, whole)] as const;
  };
  for (const job of starter.jobs) {
    const [other, named] = beside(`${job.name}.yaml`);
    const wrote = await writeMissing(other, named, job.text);
    tell(wrote ? `${named} written, which it names` : `${named} was there already and is kept; it names that`);
  }
  for (const one of schemasOf(starter)) await writeSchema(one, ...beside(one.file), tell);
}

const shownFrom = (folder: string, path: string): string =>
  relative(folder, path).startsWith('..') ? path : relative(folder, path);

const schemasOf = ({ schema, jobs }: AnyStarter): readonly SchemaFile[] =>
  jobs.length === 0 ? [schema] : [schema, JOB_SCHEMA];

/** One schema serves every file of its kind in the folder: nothing is said of one that is there and the same. */
async function writeSchema(
  schema: SchemaFile,
  path: string,
  named: string,
  tell: (said: string) => void,
): Promise<void> {
  const text = await schema.text();
  if (await writeMissing(path, named, text))
    return tell(`${named} written, by which an editor completes and checks it`);
  const there = await readFile(path, 'utf8').catch(() => null);
  if (there !== text)
    tell(
      `${named} was there already, is not that of this version, and is kept; remove it and start again to have this one`,
    );
}

function showList(options: StartOptions, terminal: Terminal): void {
  if (options.out !== undefined || options.schema || options.name !== undefined)
    throw new Fault(2, {
      code: 'list-alone',
      place: { key: '--list' },
      got: '--list together with something to write',
      expected: '--list alone',
      todo: 'run start twice',
    });
  const page = outPage(terminal);
  const width = Math.max(...ALL_STARTERS.map(({ name }) => name.length)) + 2;
  const lines = ALL_STARTERS.flatMap(({ name, use }) =>
    page.plain === true ? paragraph(page, `${name}: ${use}`) : hung(page, name.padEnd(width), use),
  );
  say(terminal, `${lines.join('\n')}\n`);
}

function find(name: string | undefined): AnyStarter {
  if (name === undefined) return ALL_STARTERS[0]!;
  const names = ALL_STARTERS.map((starter) => starter.name);
  const found = ALL_STARTERS.find((starter) => starter.name === name.replace(/\.ya?ml$/, ''));
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
