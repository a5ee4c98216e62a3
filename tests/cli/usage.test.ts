import { describe, expect, it } from 'vitest';
import { entryOf, optionsOf, VERB_NAMES, writtenOf } from '../../cli/verbs.ts';
import { command, testTerminal } from './terminal.ts';

describe('help', () => {
  it('names every verb and fits the page', async () => {
    for (const columns of [40, 80, 110]) {
      const { exit, out, err } = await command(['--help'], testTerminal('', columns));
      expect([exit, err]).toEqual([0, '']);
      expect(VERB_NAMES.every((verb) => out.includes(`\n  ${writtenOf(verb)}`))).toBe(true);
      const others = out.split('\n').filter((line) => !line.startsWith('  coilwright '));
      expect(Math.max(...others.map((line) => line.length))).toBeLessThanOrEqual(columns);
    }
  });

  it.each(VERB_NAMES)('of %s shows its options, words and examples on every page', async (verb) => {
    const { words, examples } = entryOf(verb);
    for (const columns of [40, 80, 110]) {
      const { exit, out, err } = await command([verb, '--help'], testTerminal('', columns));
      const shown = [...out.matchAll(/^ {2}--([a-z]+)/gm)].map((match) => match[1]);
      expect([exit, err, shown]).toEqual([0, '', Object.keys(optionsOf(verb))]);
      for (const { name } of words) expect(out).toContain(`\n  ${name.toUpperCase()} `);
      expect(examples.length).toBeGreaterThanOrEqual(2);
      // What is to be typed is not broken.
      for (const [line] of examples) expect(out).toContain(`\n  coilwright ${line}\n`);
      const others = out.split('\n').filter((line) => !line.startsWith('  coilwright '));
      expect(Math.max(...others.map((line) => line.length))).toBeLessThanOrEqual(columns);
    }
  });

  it('of a verb on a plain page has a fact a line', async () => {
    expect(
      (await command(['lot', '--help', '--plain'], testTerminal('', 40))).out,
    ).toBe(`coilwright lot FILE [OPTION ...]

Make a lot: every kind of coil planned once, travellers, wire from reels, print beds, lists.

Words
FILE: file of a lot, YAML or JSON, or a table of jobs in CSV; - for standard input

Options
--out FOLDER: folder to write; out/<name of the lot> when left out
--json: print the record of the lot, and nothing else
--quiet, -q: say nothing but what is wrong; data that was asked for is printed all the same
--plain: a fact a line and no drawings, for a screen reader; so too where TERM is dumb
--help: show this
--version: show the version

Examples
coilwright lot saltmarsh-lot.yaml: writes out/saltmarsh-lot
coilwright lot orders.csv --out winter: a lot from a table of jobs and quantities
`);
  });

  it('has examples that the parser takes', async () => {
    let tried = 0;
    for (const verb of VERB_NAMES)
      for (const [line] of entryOf(verb).examples) {
        const words = line.replace(/ [<>]+ .*$/, '').split(/ (?=(?:[^"]*"[^"]*")*[^"]*$)/);
        const { exit } = await command(words.map((word) => word.replaceAll('"', '')));
        // Files that are not there are refused with 3, wrong use would be 2.
        expect([line, exit === 0 || exit === 3]).toEqual([line, true]);
        tried++;
      }
    console.log(`examples tried: ${tried}`);
    expect(tried).toBeGreaterThanOrEqual(2 * VERB_NAMES.length);
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
  expected  one of: start, plan, survey, match, lot, prove, stock, completion
  to do     see: coilwright --help
`,
  ],
  [
    ['pln', 'job.yaml'],
    `coilwright: not a command
  got       the verb "pln"
  expected  one of: start, plan, survey, match, lot, prove, stock, completion
  to do     did you mean plan?
`,
  ],
  [
    ['wind'],
    `coilwright: not a command
  got       the verb "wind"
  expected  one of: start, plan, survey, match, lot, prove, stock, completion
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
  expected  one of: --out, --json, --explain, --quiet, --plain, --help,
            --version
  to do     did you mean --out?
`,
  ],
  [
    ['plan', 'job.yaml', 'low', 'bench', '-x'],
    `coilwright: -x
  got       an option that is not known
  expected  one of: --out, --json, --explain, --quiet, --plain, --help,
            --version
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
            forty-coil-lot, coupled-aerial-receiver, found-coil, found-sections,
            broken-form, saltmarsh-lot
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
    ['survey', 'coil.yaml', '--explian', '3'],
    `coilwright: --explian
  got       an option that is not known
  expected  one of: --out, --json, --explain, --quiet, --plain, --help,
            --version
  to do     did you mean --explain?
`,
  ],
  [
    ['completion', 'bsh'],
    `coilwright: not a command
  got       the shell "bsh"
  expected  one of: bash, zsh, fish
  to do     did you mean bash?
`,
  ],
  [
    ['completion'],
    `coilwright: not a command
  got       no shell
  expected  one of: bash, zsh, fish
  to do     name the shell that you use: coilwright completion bash
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
