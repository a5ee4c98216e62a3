/** Completion for zsh. */
import { endingsOf, type WordsFor } from './completes.ts';
import { COMMON_OPTIONS, entryOf, type Option, optionsOf, type Takes, VERB_NAMES } from './verbs.ts';

export function zshScript(wordsFor: WordsFor): string {
  const verbs = VERB_NAMES.map((verb) => `    ${quoted(`${verb}:${entryOf(verb).does}`)}`);
  const cases = VERB_NAMES.map((verb) => {
    const words = entryOf(verb).words.map(
      ({ name, takes, many }, i) => `${many === true ? '*' : `${i + 1}`}:${name}:${offer(takes, wordsFor)}`,
    );
    return `    ${verb}) _arguments ${[...options(optionsOf(verb), wordsFor), ...words].map(quoted).join(' ')} ;;`;
  });
  return `#compdef coilwright
# coilwright in zsh: complete verbs, options, starters and files.
_coilwright() {
  local -a verbs
  verbs=(
${verbs.join('\n')}
  )
  if (( CURRENT == 2 )); then
    if [[ $PREFIX == -* ]]; then _arguments ${options(COMMON_OPTIONS, wordsFor).map(quoted).join(' ')}; else _describe verb verbs; fi
    return
  fi
  local verb=$words[2]
  shift words
  (( CURRENT-- ))
  case $verb in
${cases.join('\n')}
  esac
}
if [[ $funcstack[1] == _coilwright ]]; then _coilwright "$@"; else compdef _coilwright coilwright; fi
`;
}

const quoted = (text: string): string => `'${text.replaceAll("'", "'\\''")}'`;

function options(of: Readonly<Record<string, Option>>, wordsFor: WordsFor): string[] {
  return Object.entries(of).flatMap(([name, { short, takes, value, does }]) => {
    const told = `[${does.replace(/[[\]\\:]/g, '\\$&')}]`;
    const taken = takes === undefined ? '' : `:${value ?? name}:${offer(takes, wordsFor)}`;
    return [
      `--${name}${takes === undefined ? '' : '='}${told}${taken}`,
      ...(short === undefined ? [] : [`-${short}${told}`]),
    ];
  });
}

function offer(takes: Takes, wordsFor: WordsFor): string {
  const words = wordsFor(takes);
  if (words !== null) return `(${words.join(' ')})`;
  const endings = endingsOf(takes);
  if (endings !== null) return `_files -g "*.(${endings.join('|')})(-.)"`;
  return takes === 'folder' ? '_files -/' : takes === 'new file' ? '_files' : ' ';
}
