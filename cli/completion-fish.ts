/** Completion for fish. */
import { endingsOf, type WordsFor } from './completes.ts';
import { COMMON_OPTIONS, entryOf, type Option, optionsOf, type Takes, VERB_NAMES } from './verbs.ts';

export function fishScript(wordsFor: WordsFor): string {
  const none = '__fish_use_subcommand';
  const lines = VERB_NAMES.flatMap((verb) => {
    const when = `__fish_seen_subcommand_from ${verb}`;
    const { does, words } = entryOf(verb);
    return [
      line(none, `-a ${verb} -d ${quoted(does)}`),
      ...options(when, optionsOf(verb), wordsFor),
      ...(words[0] === undefined ? [] : offer(words[0].takes, wordsFor).map((rest) => line(when, rest))),
    ];
  });
  return `# coilwright in fish: complete verbs, options, starters and files.
complete -c coilwright -f
${[...lines, ...options(none, COMMON_OPTIONS, wordsFor)].join('\n')}
`;
}

const line = (when: string, rest: string): string => `complete -c coilwright -n ${quoted(when)} ${rest}`;
const quoted = (text: string): string => `'${text.replace(/['\\]/g, '\\$&')}'`;

const options = (when: string, of: Readonly<Record<string, Option>>, wordsFor: WordsFor): string[] =>
  Object.entries(of).map(([name, { short, takes, does }]) => {
    const letter = short === undefined ? '' : ` -s ${short}`;
    const value = takes === undefined ? '' : ` -x ${offer(takes, wordsFor).join(' ')}`.trimEnd();
    return line(when, `-l ${name}${letter}${value} -d ${quoted(does)}`);
  });

function offer(takes: Takes, wordsFor: WordsFor): string[] {
  const words = wordsFor(takes);
  if (words !== null) return [`-a ${quoted(words.join(' '))}`];
  const endings = endingsOf(takes);
  if (endings !== null)
    return [`-k -a ${quoted(`(__fish_complete_suffix ${endings.map((ending) => `.${ending}`).join(' ')})`)}`];
  return takes === 'folder'
    ? [`-a ${quoted('(__fish_complete_directories)')}`]
    : takes === 'new file'
      ? [`-a ${quoted('(__fish_complete_path)')}`]
      : [];
}
