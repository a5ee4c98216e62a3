/** Help on the whole and on a verb, laid out here so that it needs no parser and is quick. */
import { heading, hung, type Page, pageText, paragraph } from './page.ts';
import { COMMON_OPTIONS, entryOf, type Option, optionsOf, VERB_NAMES, type Verb, writtenOf } from './verbs.ts';

const PURPOSE = 'Plans tapped single-layer coils: which wire, what former, how many turns, where the taps lie.';
const MORE = [
  'coilwright VERB --help shows words, options and examples of a verb.',
  'Exit codes: 0 done, 1 fault of the program, 2 wrong use, 3 input not accepted, 4 nothing fits, 5 not written.',
];
const EXAMPLES = [
  ['start', 'a commented job to edit'],
  ['plan low-bench-receiver.yaml', 'the coil, its sheets and its parts'],
] as const;

/** Rows with what they are about in a column of its own; under one another where the page is narrow. */
function rows(page: Page, list: readonly (readonly [mark: string, text: string])[]): string[] {
  const width = Math.max(...list.map(([mark]) => mark.length)) + 4;
  return list.flatMap(([mark, text]) => hung(page, `  ${mark}`.padEnd(width), text));
}

export function helpText(page: Page): string {
  return pageText([
    paragraph(page, PURPOSE),
    ['coilwright VERB ...'],
    [
      ...heading(page, 'Verbs'),
      ...rows(
        page,
        VERB_NAMES.map((verb) => [writtenOf(verb), entryOf(verb).does] as const),
      ),
    ],
    [...heading(page, 'Options of every verb'), ...options(page, COMMON_OPTIONS)],
    [...heading(page, 'Examples'), ...examples(page, EXAMPLES)],
    MORE.flatMap((text) => paragraph(page, text)),
  ]);
}

export function verbHelp(verb: Verb, page: Page): string {
  const { does, words, examples: lines } = entryOf(verb);
  return pageText([
    paragraph(page, `coilwright ${writtenOf(verb)} [OPTION ...]`),
    paragraph(page, `${does.charAt(0).toUpperCase()}${does.slice(1)}.`),
    words.length === 0
      ? []
      : [
          ...heading(page, 'Words'),
          ...rows(
            page,
            words.map(({ name, does }) => [name.toUpperCase(), does] as const),
          ),
        ],
    [...heading(page, 'Options'), ...options(page, optionsOf(verb))],
    [...heading(page, 'Examples'), ...examples(page, lines)],
  ]);
}

const options = (page: Page, of: Readonly<Record<string, Option>>): string[] =>
  rows(
    page,
    Object.entries(of).map(([name, { short, value, does }]) => {
      const letter = short === undefined ? '' : `, -${short}`;
      return [`--${name}${letter}${value === undefined ? '' : ` ${value}`}`, does] as const;
    }),
  );

/** A line to type is never broken: it could not be copied. */
const examples = (page: Page, lines: readonly (readonly [line: string, does: string])[]): string[] =>
  lines.flatMap(([line, does]) =>
    page.plain === true ? [`coilwright ${line}: ${does}`] : [`  coilwright ${line}`, ...hung(page, '      ', does)],
  );
