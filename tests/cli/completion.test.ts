/** What is printed for shells: held against the table of the verbs, and asked in the shells that are installed. */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { ALL_STARTERS } from '../../cli/starters.ts';
import { optionsOf, SHELLS, VERB_NAMES } from '../../cli/verbs.ts';
import { command, testTerminal } from './terminal.ts';

const installed = (shell: string) => spawnSync(shell, ['-c', 'true']).status === 0;

async function scriptIn(shell: string): Promise<{ readonly path: string; readonly folder: string }> {
  const { folder } = testTerminal();
  const { exit, out, err } = await command(['completion', shell]);
  expect([exit, err]).toEqual([0, '']);
  const path = join(folder, `complete.${shell}`);
  writeFileSync(path, out);
  const work = join(folder, 'work');
  mkdirSync(join(work, 'my jobs'), { recursive: true });
  for (const name of ['one.yaml', 'two of them.yml', 'three.json', 'readings.csv', 'notes.txt'])
    writeFileSync(join(work, name), '');
  return { path, folder: work };
}

describe.each(SHELLS)('the script for %s', (shell) => {
  it('has every verb, option and starter', async () => {
    const { out } = await command(['completion', shell]);
    for (const verb of VERB_NAMES) {
      expect(out).toContain(verb);
      for (const option of Object.keys(optionsOf(verb)))
        expect(out).toContain(shell === 'fish' ? `-l ${option}` : `--${option}`);
    }
    for (const { name } of ALL_STARTERS) expect(out).toContain(name);
  });

  it('is for the login shell when none is named', async () => {
    expect((await command(['completion'], { ...testTerminal(), shell })).out).toBe(
      (await command(['completion', shell])).out,
    );
  });

  it.skipIf(!installed(shell))('is one that the shell takes', async () => {
    const { path } = await scriptIn(shell);
    expect(spawnSync(shell, ['-n', path], { encoding: 'utf8' })).toMatchObject({ status: 0, stderr: '' });
  });
});

/** Words typed, the last of them unfinished, and what is offered for it. */
const OFFERED: readonly (readonly [typed: readonly string[], offered: readonly string[]])[] = [
  [['p'], ['plan', 'prove']],
  [['--'], ['--help', '--plain', '--quiet', '--version']],
  [['plan', '--e'], ['--explain']],
  [
    ['prove', '--'],
    ['--dial', '--from', '--help', '--json', '--out', '--plain', '--quiet', '--version'],
  ],
  [
    ['start', 'found'],
    ['found-coil', 'found-sections'],
  ],
  [['stock', 'tu'], ['tubes']],
  [
    ['completion', ''],
    ['bash', 'fish', 'zsh'],
  ],
  [
    ['plan', ''],
    ['my jobs', 'one.yaml', 'three.json', 'two of them.yml'],
  ],
  [
    ['plan', 't'],
    ['three.json', 'two of them.yml'],
  ],
  [['prove', 'r'], ['readings.csv']],
  [['plan', 'one.yaml', '--out', ''], ['my jobs']],
  [['plan', 'one.yaml', '--out', '=', 'm'], ['my jobs']],
  [['plan', '--json', 'o'], ['one.yaml']],
  [['plan', '--explain', ''], []],
];

describe.skipIf(!installed('bash'))('in bash', () => {
  it('is offered what fits', async () => {
    const { path, folder } = await scriptIn('bash');
    for (const [typed, offered] of OFFERED) {
      const ask = `source "$1"; shift; COMP_WORDS=(coilwright "$@"); COMP_CWORD=$#; _coilwright; printf '%s\n' "\${COMPREPLY[@]}"`;
      const said = execFileSync('bash', ['--norc', '-c', ask, 'bash', path, ...typed], {
        cwd: folder,
        encoding: 'utf8',
      });
      expect([
        typed,
        said
          .split('\n')
          .filter((word) => word !== '')
          .sort(),
      ]).toEqual([typed, offered]);
    }
    console.log(`completions asked of bash: ${OFFERED.length}`);
  });
});

describe.skipIf(!installed('fish'))('in fish', () => {
  it('is offered what fits', async () => {
    const { path, folder } = await scriptIn('fish');
    let asked = 0;
    for (const [typed, offered] of OFFERED) {
      // Files come with others of the folder, for fish offers those too.
      if (typed.includes('=') || offered.some((word) => word.includes('.') || word.includes(' '))) continue;
      const ask = `source "${path}"; complete -C "coilwright ${typed.join(' ')}"`;
      const said = execFileSync('fish', ['--no-config', '-c', ask], { cwd: folder, encoding: 'utf8' });
      const words = said
        .split('\n')
        .map((line) => line.split('\t')[0] ?? '')
        .filter((word) => word !== '');
      expect([typed, [...new Set(words)].filter((word) => word !== '-q').sort()]).toEqual([typed, offered]);
      asked++;
    }
    console.log(`completions asked of fish: ${asked}`);
    expect(asked).toBeGreaterThan(5);
  });
});
