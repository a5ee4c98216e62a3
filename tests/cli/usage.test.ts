import { describe, expect, it } from 'vitest';
import { COMMON_OPTIONS, VERB_NAMES, VERBS } from '../../cli/verbs.ts';
import { command, testTerminal } from './terminal.ts';

describe('help', () => {
  it('names every verb and fits the page', async () => {
    for (const columns of [40, 80, 110]) {
      const { exit, out, err } = await command(['--help'], testTerminal('', columns));
      expect([exit, err]).toEqual([0, '']);
      expect(VERB_NAMES.every((verb) => out.includes(`\n  ${VERBS[verb].written} `))).toBe(true);
      expect(Math.max(...out.split('\n').map((line) => line.length))).toBeLessThanOrEqual(columns);
    }
  });

  it.each(VERB_NAMES)('of %s shows the options that the hints know, and no others', async (verb) => {
    const { exit, out } = await command([verb, '--help']);
    const shown = [...out.matchAll(/^ {2}--([a-z]+)/gm)].map((match) => match[1]);
    expect([exit, shown.sort()]).toEqual([0, [...VERBS[verb].options, ...COMMON_OPTIONS].sort()]);
  });

  it('and version need no verb', async () => {
    expect((await command(['--help', '--json'])).out).toContain('coilwright VERB');
    expect(await command(['--version'])).toMatchObject({ exit: 0, out: '9.9.9\n', err: '' });
  });
});

const WRONG: readonly (readonly [readonly string[], string])[] = [
  [
    [],
    `coilwright: not a command
  got       no verb
  expected  one of: start, plan, survey, match, lot, prove, stock
  to do     see: coilwright --help
`,
  ],
  [
    ['pln', 'job.yaml'],
    `coilwright: not a command
  got       the verb "pln"
  expected  one of: start, plan, survey, match, lot, prove, stock
  to do     did you mean plan?
`,
  ],
  [
    ['wind'],
    `coilwright: not a command
  got       the verb "wind"
  expected  one of: start, plan, survey, match, lot, prove, stock
  to do     see: coilwright --help
`,
  ],
  [
    ['plan'],
    `coilwright: not a command
  got       plan without a job
  expected  coilwright plan JOB, a file in YAML or JSON, or - for standard input
  to do     name the job file; "coilwright start" writes one to begin with
`,
  ],
  [
    ['plan', 'job.yaml', '--ot', 'x'],
    `coilwright: --ot
  got       an option that is not known
  expected  one of: --out, --json, --explain, --help, --version
  to do     did you mean --out?
`,
  ],
  [
    ['plan', 'job.yaml', 'low', 'bench', '-q'],
    `coilwright: -q
  got       an option that is not known
  expected  one of: --out, --json, --explain, --help, --version
  to do     see: coilwright plan --help

coilwright: not a command
  got       "low", a word too many
  expected  what coilwright plan --help shows
  to do     remove it; put a name with blanks in quotes

coilwright: not a command
  got       "bench", a word too many
  expected  what coilwright plan --help shows
  to do     remove it; put a name with blanks in quotes
`,
  ],
  [
    ['plan', 'job.yaml', '--out'],
    `coilwright: --out
  got       nothing behind it
  expected  a value
  to do     see: coilwright plan --help
`,
  ],
  [
    ['plan', 'job.yaml', '--out', '-'],
    `coilwright: --out
  got       -, which is standard output
  expected  a folder
  to do     name a folder; --json prints the record besides
`,
  ],
  [
    ['plan', 'job.yaml', '--out='],
    `coilwright: --out
  got       nothing
  expected  a folder
  to do     name a folder, or leave the option out
`,
  ],
  [
    ['start', 'low-bench-reciever'],
    `coilwright: not a command
  got       the starter "low-bench-reciever"
  expected  one of: low-bench-receiver, cracked-form-replacement,
            forty-coil-lot, found-coil, found-sections, broken-form,
            saltmarsh-lot
  to do     did you mean low-bench-receiver?
`,
  ],
  [
    ['start', '--list', '--schema'],
    `coilwright: --list
  got       --list together with something to write
  expected  --list alone
  to do     run start twice
`,
  ],
  [
    ['start', 'forty-coil-lot', '--schema'],
    `coilwright: --schema
  got       --schema together with forty-coil-lot
  expected  one of the two: the schema is the same for every job
  to do     run start twice
`,
  ],
];

describe('wrong use', () => {
  it.each(WRONG)('%j', async (given, expected) => {
    expect(await command(given)).toMatchObject({ exit: 2, out: '', err: expected });
  });

  it('is told as data with --json', async () => {
    const { exit, out, err } = await command(['plan', '--json']);
    expect([exit, out]).toEqual([2, '']);
    expect(JSON.parse(err)).toMatchObject({ exit: 2, faults: [{ code: 'no-job' }] });
  });

  it('cannot steer the terminal', async () => {
    const { err } = await command(['\u001b[2Jx', '\u0007']);
    expect(err).toContain('"?[2Jx"');
    expect([...err].filter((c) => c < ' ' && c !== '\n')).toEqual([]);
  });
});
