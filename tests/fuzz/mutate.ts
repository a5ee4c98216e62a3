/** Damage to a file of text: slips of the hand, other programs, and malice. The same for the same stream of chance. */

type Chance = () => number;

export const pick = <T>(random: Chance, list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
const upTo = (random: Chance, most: number): number => Math.floor(random() * most);

/** Texts that break what they are put into: terminals, markup, formulas, scripts, cards, paths, prototypes. */
export const HOSTILE: readonly string[] = [
  '',
  ' ',
  '-',
  '../x',
  '..\\..\\x',
  '/etc/passwd',
  'C:\\x',
  'con',
  'NUL.txt',
  'trailing...',
  'a/b',
  '.hidden',
  '__proto__',
  'constructor',
  'toString',
  'hasOwnProperty',
  '=1+1',
  '+cmd|x',
  '@SUM(A1)',
  '-2+3',
  '\ttab first',
  '</script><script>alert(1)</script>',
  '<!--<script>',
  ']]>',
  '&lt;&#x0;&amp;',
  `"'\`\\`,
  '%PDF',
  '(\\(',
  ')',
  '\r\n.end\r\n* x',
  '.include /etc/passwd',
  '+ R1 0 1 1',
  '0\r\nEOF',
  '%%d \\U+0041 \\P',
  '{{title}} $' + '{x} $(x) `x`',
  '\u202eresrever\u202c',
  'אבגד 12 שלום',
  'مرحبا ١٢',
  '😀👩‍👩‍👧‍👦🇳🇴',
  'Z̷̲̈́a͘l̷g̸o'.repeat(3),
  '\u0000',
  '\u0007\u001b[2J\u001b]0;x\u0007',
  '\u009b31m',
  '\u2028\u2029',
  '\ufeff',
  '\ufffe\uffff',
  '\ud800',
  'ﬁ ½ ㎜ Å',
  'x'.repeat(81),
  'long '.repeat(400),
  '😀'.repeat(79),
  `a${'😀'.repeat(60)}`,
];

const NUMBERS = [
  '0',
  '-0',
  '-1',
  '1e-300',
  '1e308',
  '1e999',
  '9007199254740993',
  '0x1f',
  '0o17',
  '0b1',
  '1_000',
  '1,5',
  '1/0',
  '3 1/2',
  '.nan',
  '.inf',
  '-.inf',
  'NaN',
  'Infinity',
  '1e',
  '00012',
  '٣',
  '0.1',
  '2',
  '10',
  '100',
  '1000',
];
const UNITS = [
  'mm',
  'cm',
  'm',
  'in',
  'thou',
  'uH',
  'mH',
  'nH',
  'kHz',
  'MHz',
  'pF',
  'nF',
  '%',
  'g',
  'deg',
  'degC',
  'ohm',
];
const TOKENS = [
  ': ',
  '- ',
  '[',
  ']',
  '{',
  '}',
  '"',
  "'",
  '#',
  '&a ',
  '*a',
  '!!x ',
  '!!js/function ',
  '!!binary ',
  '---\n',
  '...\n',
  '%YAML 1.1\n',
  '%TAG ! x:\n',
  '? ',
  '|\n',
  '>-\n',
  '<<: ',
  ',',
  ';',
  '\t',
  '~',
  'null',
  'yes',
  'true',
  '2031-05-17',
  '0',
];
const KEYS = [
  '__proto__',
  'constructor',
  'toString',
  'prototype',
  'job',
  'want',
  '$schema',
  '',
  '0',
  'é',
  'x'.repeat(90),
];

type Mutator = (text: string, random: Chance) => string;

const lines = (text: string): string[] => text.split('\n');
/** Lines that say something are hit most. */
function lineIn(list: readonly string[], random: Chance): number {
  const said = list.flatMap((line, i) => (/^\s*(?:#|$)/.test(line) ? [] : [i]));
  return said.length > 0 && random() < 0.8 ? pick(random, said) : upTo(random, list.length);
}
const edited = (text: string, random: Chance, edit: (list: string[], at: number) => void): string => {
  const list = lines(text);
  edit(list, lineIn(list, random));
  return list.join('\n');
};
const replaceOne = (text: string, random: Chance, found: RegExp, by: (match: string) => string): string => {
  const all = [...text.matchAll(found)];
  if (all.length === 0) return text;
  const one = pick(random, all);
  return text.slice(0, one.index) + by(one[0]) + text.slice(one.index + one[0].length);
};
/** A value behind a key, a comma or a dash. */
const VALUE = /(?<=^[^\n#]*(?:: |, ?|- |\[))[^\n,[\]{}#:]+/gm;

/** Those that leave most files readable come first. */
const MILD: Readonly<Record<string, Mutator>> = {
  number: (text, random) => replaceOne(text, random, /\d+(?:\.\d+)?/g, () => pick(random, NUMBERS)),
  scaled: (text, random) =>
    replaceOne(text, random, /\d+(?:\.\d+)?/g, (found) =>
      String(Number(found) * pick(random, [0.5, 0.9, 1.1, 2, 10, 1000])),
    ),
  unit: (text, random) =>
    replaceOne(text, random, /(?<=\d ?)(?:[mc]?m|in|[um]H|[kM]Hz|pF|%)\b/g, () => pick(random, UNITS)),
  value: (text, random) => {
    const values = [...text.matchAll(VALUE)].map(([found]) => found);
    return values.length === 0 ? text : replaceOne(text, random, VALUE, () => pick(random, values));
  },
  unmarked: (text, random) => replaceOne(text, random, /^(\s*)# (?=\s*[\w-]+:)/gm, (found) => found.replace('# ', '')),
  duplicated: (text, random) => edited(text, random, (list, at) => list.splice(at, 0, list[at]!)),
  removed: (text, random) => edited(text, random, (list, at) => list.splice(at, 1 + upTo(random, 3))),
  named: (text, random) =>
    replaceOne(text, random, VALUE, () => {
      const named = pick(random, HOSTILE);
      return random() < 0.7 ? JSON.stringify(named) : named;
    }),
};
const WILD: Readonly<Record<string, Mutator>> = {
  character: (text, random) => {
    const at = upTo(random, text.length);
    return (
      text.slice(0, at) +
      String.fromCharCode(upTo(random, random() < 0.8 ? 128 : 65536)) +
      text.slice(at + upTo(random, 3))
    );
  },
  token: (text, random) => {
    const at = upTo(random, text.length);
    return text.slice(0, at) + pick(random, TOKENS) + text.slice(at + upTo(random, 4));
  },
  hostile: (text, random) => {
    const at = upTo(random, text.length);
    return text.slice(0, at) + pick(random, HOSTILE) + text.slice(at);
  },
  moved: (text, random) =>
    edited(text, random, (list, at) => {
      const [line] = list.splice(at, 1);
      list.splice(upTo(random, list.length), 0, line!);
    }),
  indented: (text, random) =>
    edited(text, random, (list, at) => (list[at] = `${pick(random, [' ', '  ', '\t', '      '])}${list[at]}`)),
  key: (text, random) =>
    edited(text, random, (list, at) => {
      const indent = /^ */.exec(list[at]!)![0];
      list.splice(
        at,
        0,
        `${indent}${JSON.stringify(pick(random, KEYS))}: ${pick(random, ['1', '{ a: 1 }', '[1]', '"x"', ''])}`,
      );
    }),
  renamed: (text, random) => replaceOne(text, random, /[\w-]+(?=:)/g, () => pick(random, KEYS)),
  nested: (text, random) => {
    const deep = pick(random, [3, 20, 31, 33, 200, 5000]);
    const [open, close] = pick(random, [
      ['[', ']'],
      ['{a: ', '}'],
      ['- ', ''],
      ['? ', ''],
      ['"', '"'],
    ] as const);
    return replaceOne(text, random, VALUE, (found) => open.repeat(deep) + found + close.repeat(deep));
  },
  indents: (text, random) => {
    const deep = pick(random, [10, 60, 400]);
    return `${text}\n${Array.from({ length: deep }, (_, i) => `${' '.repeat(i)}k${i}:`).join('\n')} 1\n`;
  },
  bomb: (text, random) => {
    const width = pick(random, [2, 9]);
    const rows = Array.from({ length: 12 }, (_, i) =>
      i === 0 ? 'a0: &a0 [x, x]' : `a${i}: &a${i} [${Array.from({ length: width }, () => `*a${i - 1}`).join(', ')}]`,
    );
    return random() < 0.5 ? `${rows.join('\n')}\n${text}` : `${text}\n${rows.join('\n')}\n`;
  },
  repeated: (text, random) => {
    const list = lines(text);
    const at = lineIn(list, random);
    list.splice(at, 1, ...Array<string>(pick(random, [10, 300, 4000])).fill(list[at]!));
    return list.join('\n');
  },
  counted: (text, random) => {
    const list = lines(text);
    const at = lineIn(list, random);
    const indent = /^ */.exec(list[at]!)![0];
    const many = Array.from({ length: pick(random, [50, 3000]) }, (_, i) => `${indent}key${i}: ${i} mm`);
    list.splice(at, 0, ...many);
    return list.join('\n');
  },
  cut: (text, random) => text.slice(0, upTo(random, text.length)),
  twice: (text) => text + text,
  documents: (text, random) => `${text}\n---\n${pick(random, ['', 'x: 1', text])}`,
  returns: (text) => text.replace(/\n/g, '\r\n'),
  oldReturns: (text) => text.replace(/\n/g, '\r'),
};
type Encoder = (text: string, random: Chance) => Uint8Array;

const utf16 = (text: string): Buffer => Buffer.from(text, 'utf16le');
const ENCODERS: Readonly<Record<string, Encoder>> = {
  mark: (text) => Buffer.from(`\ufeff${text}`),
  utf16le: (text) => Buffer.concat([Buffer.from([0xff, 0xfe]), utf16(text)]),
  utf16be: (text) => Buffer.concat([Buffer.from([0xfe, 0xff]), utf16(text).swap16()]),
  unmarked16: (text) => utf16(text),
  latin1: (text) => Buffer.from(`${text}\n# caf\u00e9 \u00b5`, 'latin1'),
  flipped: (text, random) => {
    const bytes = Buffer.from(text);
    for (let i = 0; i <= upTo(random, 4) && bytes.length > 0; i++)
      bytes[upTo(random, bytes.length)]! ^= 1 << upTo(random, 8);
    return bytes;
  },
  overwritten: (text, random) => {
    const bytes = Buffer.from(text);
    for (let i = 0; i <= upTo(random, 4) && bytes.length > 0; i++)
      bytes[upTo(random, bytes.length)] = upTo(random, 256);
    return bytes;
  },
  nuls: (text, random) => {
    const at = upTo(random, text.length);
    return Buffer.from(text.slice(0, at) + '\u0000'.repeat(1 + upTo(random, 40)) + text.slice(at));
  },
  noise: (_text, random) => Buffer.from(Array.from({ length: upTo(random, 3000) }, () => upTo(random, 256))),
  empty: (_text, random) =>
    Buffer.from(pick(random, ['', '\n', '# only words\n', '---\n', '{}', '[]', 'null', '"x"', '0'])),
};

export interface Mutated {
  readonly bytes: Uint8Array;
  /** Names of what was done. */
  readonly by: readonly string[];
}

/** One to four kinds of damage; `splice` is a file that pieces are taken from. */
export function mutate(source: string, splice: string, random: Chance): Mutated {
  const by: string[] = [];
  let text = source;
  const apply = (mutators: Readonly<Record<string, Mutator>>) => {
    const name = pick(random, Object.keys(mutators));
    by.push(name);
    text = mutators[name]!(text, random);
  };
  const wild = random() < 0.5;
  for (let i = 0; i <= upTo(random, 3); i++) apply(wild && random() < 0.6 ? WILD : MILD);
  if (random() < 0.06) {
    const [from, at] = [upTo(random, splice.length), upTo(random, text.length)];
    text = text.slice(0, at) + splice.slice(from, from + 20 + upTo(random, 2000)) + text.slice(at);
    by.push('splice');
  }
  if (random() < 0.82) return { bytes: Buffer.from(text), by };
  const name = pick(random, Object.keys(ENCODERS));
  return { bytes: ENCODERS[name]!(text, random), by: [...by, name] };
}
