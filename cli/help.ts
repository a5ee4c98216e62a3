/** Help on the whole, laid out here so that it needs no parser and is quick. */
import { wrap } from './table.ts';
import { VERB_NAMES, VERBS } from './verbs.ts';

const PURPOSE = 'Plans tapped single-layer coils: which wire, what former, how many turns, where the taps lie.';
const MORE =
  'coilwright VERB --help shows the options of a verb; --version the version. ' +
  'Exit codes: 0 done, 1 fault of the program, 2 wrong use, 3 input not accepted, 4 nothing fits, 5 not written.';

export function helpText(columns: number): string {
  const width = Math.max(...VERB_NAMES.map((verb) => VERBS[verb].written.length)) + 4;
  const verbs = VERB_NAMES.flatMap((verb) =>
    wrap(VERBS[verb].does, columns - width).map(
      (line, index) => `${index === 0 ? `  ${VERBS[verb].written}` : ''}`.padEnd(width) + line,
    ),
  );
  return [...wrap(PURPOSE, columns), '', 'coilwright VERB ...', '', ...verbs, '', ...wrap(MORE, columns), ''].join(
    '\n',
  );
}
