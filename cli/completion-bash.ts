/** Completion for bash 3.2 and later. */
import { endingsOf, type WordsFor } from './completes.ts';
import { COMMON_OPTIONS, entryOf, optionsOf, type Takes, VERB_NAMES } from './verbs.ts';

export function bashScript(wordsFor: WordsFor): string {
  const values = VERB_NAMES.flatMap((verb) =>
    Object.entries(optionsOf(verb)).flatMap(([name, { takes }]) =>
      takes === undefined ? [] : [`    ${verb}:--${name}) ${offer(takes, wordsFor)} ;;`],
    ),
  );
  const rest = VERB_NAMES.map((verb) => {
    const [first] = entryOf(verb).words;
    return `    ${verb}) ${offer(first?.takes ?? 'text', wordsFor)} ;;`;
  });
  return `# coilwright in bash: complete verbs, options, starters and files.
_coilwright_words() { COMPREPLY=($(compgen -W "$1" -- "$word")); }
_coilwright_paths() {
  local IFS=$'\\n'
  compopt -o filenames 2>/dev/null
  COMPREPLY=($(compgen -d -- "$word"))
  local path
  for path in $(compgen -f -- "$word"); do
    [[ ! -d $path && $path =~ \\.($1)$ ]] && COMPREPLY+=("$path")
  done
}
_coilwright() {
  local word=\${COMP_WORDS[COMP_CWORD]} before=\${COMP_WORDS[COMP_CWORD - 1]} verb= i
  # --out=there comes as three words.
  if [[ $word == = ]]; then word=; elif [[ $before == = ]]; then before=\${COMP_WORDS[COMP_CWORD - 2]}; fi
  for ((i = 1; i < COMP_CWORD; i++)); do
    case \${COMP_WORDS[i]} in ${VERB_NAMES.join('|')}) verb=\${COMP_WORDS[i]} && break ;; esac
  done
  COMPREPLY=()
  case $verb:$before in
${values.join('\n')}
    *)
      case $verb:$word in
        :-*) _coilwright_words '${dashed(COMMON_OPTIONS)}' ;;
        :*) _coilwright_words '${VERB_NAMES.join(' ')}' ;;
${VERB_NAMES.map((verb) => `        ${verb}:-*) _coilwright_words '${dashed(optionsOf(verb))}' ;;`).join('\n')}
        *) _coilwright_rest ;;
      esac
      ;;
  esac
}
_coilwright_rest() {
  case $verb in
${rest.join('\n')}
  esac
}
complete -F _coilwright coilwright
`;
}

const dashed = (options: object): string =>
  Object.keys(options)
    .map((name) => `--${name}`)
    .join(' ');

function offer(takes: Takes, wordsFor: WordsFor): string {
  const words = wordsFor(takes);
  if (words !== null) return `_coilwright_words '${words.join(' ')}'`;
  const endings = endingsOf(takes);
  if (endings !== null) return `_coilwright_paths '${endings.join('|')}'`;
  // No file ends in nothing: folders alone are left.
  return takes === 'folder' ? "_coilwright_paths '/'" : takes === 'new file' ? "_coilwright_paths 'yaml'" : ':';
}
