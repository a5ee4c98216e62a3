/** `completion`: prints what lets a shell complete the command; made from the table of the verbs, so that no program runs at a key. */
import { Fault } from '../src/fault.ts';
import { nearest } from '../src/job/nearest.ts';
import type { WordsFor } from './completes.ts';
import { bashScript } from './completion-bash.ts';
import { fishScript } from './completion-fish.ts';
import { zshScript } from './completion-zsh.ts';
import { ALL_STARTERS } from './starters.ts';
import type { Terminal } from './terminal.ts';
import { SHELLS, STOCK_KINDS } from './verbs.ts';

const SCRIPTS = { bash: bashScript, zsh: zshScript, fish: fishScript } as const;

const wordsFor: WordsFor = (takes) => {
  if (takes === 'starter') return ALL_STARTERS.map(({ name }) => name);
  return takes === 'stock' ? STOCK_KINDS : takes === 'shell' ? SHELLS : null;
};

/** Throws a Fault with exit code 2 for a shell that is not known, or that nobody named. */
export async function completion({ shell }: { readonly shell: string | undefined }, terminal: Terminal): Promise<void> {
  const wanted = shell ?? terminal.shell;
  const known = SHELLS.find((one) => one === wanted);
  if (known !== undefined) return terminal.out(SCRIPTS[known](wordsFor));
  const near = wanted === undefined ? null : nearest(wanted, SHELLS);
  throw new Fault(2, {
    code: 'no-such-shell',
    got: wanted === undefined ? 'no shell' : `the shell "${wanted.slice(0, 60)}"`,
    expected: `one of: ${SHELLS.join(', ')}`,
    todo: near === null ? 'name the shell that you use: coilwright completion bash' : `did you mean ${near}?`,
  });
}
