/** The answer to a wire whose size cannot be read: what the writer most likely meant. */
import { eitherSide, type Refusal, refuse } from './found.ts';
import { COVERING_WORDS, nearestSeries, quoted } from './names.ts';
import { allWires } from './wires.ts';

const EXPECTED = 'a size and a covering, such as `24 AWG enamel`, `0.5 mm enamel heavy` or `22 SWG double cotton`';

/** One likely slip: how it looks, and the answer to it; undefined when it is not this one after all. */
interface Slip {
  readonly looks: RegExp;
  readonly answer: (got: string, parts: RegExpExecArray) => Refusal | undefined;
}

const decimalComma: Slip = {
  looks: /^(\d+),(\d+)(.*)$/,
  answer: (got, [, whole, part, rest]) => refuse(got, 'a decimal point', `write \`${whole}.${part}${rest}\``),
};

const gaugeWithoutName: Slip = {
  looks: /^(?:#|no\.?|gauge)? ?(\d+)(?: ?ga(?:uge)?\b)?(?: (.*))?$/,
  answer: (got, [, number, words]) => {
    const covering = COVERING_WORDS.get(words ?? 'enamel');
    if (covering === undefined) return undefined;
    return refuse(
      got,
      'a gauge by its name, since gauges differ, or mm',
      `write \`${number} AWG ${covering}\` or \`${number} SWG ${covering}\``,
    );
  },
};

const inches: Slip = {
  looks: /^(\d+(?:\.\d+)?|\.\d+) ?(?:in|inch|inches|")(?: (.*))?$/,
  answer: (got, [, number, words]) => {
    const covering = COVERING_WORDS.get(words ?? '') ?? 'enamel';
    const stocked = allWires()
      .filter((wire) => wire.covering === covering)
      .map((wire) => ({ name: wire.name, value: wire.bareMm }));
    return refuse(got, 'AWG, SWG or mm', `take ${eitherSide(stocked, Number(number) * 25.4)}, the nearest in stock`);
  },
};

const unknownUnit: Slip = {
  looks: /^(\d+(?:\.\d+)?|\.\d+) ?([a-z]+)\b ?(.*)$/,
  answer: (got, [, number, unit, words]) =>
    refuse(
      got,
      'AWG, SWG or mm behind the size',
      `did you mean \`${number} ${nearestSeries(unit!)}${words === '' ? '' : ` ${words}`}\`?`,
    ),
};

const SLIPS: readonly Slip[] = [decimalComma, gaugeWithoutName, inches, unknownUnit];

/** `tidied` is `text` as `tidy` leaves it, and begins with no size. */
export function noSize(text: string, tidied: string): Refusal {
  if (tidied === '') return refuse('nothing', EXPECTED, 'write the wire; `coilwright stock` lists them');
  for (const slip of SLIPS) {
    const parts = slip.looks.exec(tidied);
    const answer = parts === null ? undefined : slip.answer(quoted(text), parts);
    if (answer !== undefined) return answer;
  }
  return refuse(quoted(text), EXPECTED, 'begin with the size; `coilwright stock` lists what is known');
}
