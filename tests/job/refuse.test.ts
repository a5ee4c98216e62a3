import { describe, expect, it } from 'vitest';
import { decode, LARGEST_BYTES, readTree } from '../../src/job/tree.ts';
import { lines, refusals } from './faults.ts';

const WISH = 'job: x\nwant: { inductance: 240 uH }\n';

/** Text, and what it is refused for: line, key, what was got. */
const CASES: readonly (readonly [string, readonly string[]])[] = [
  // Nothing, or no job at all.
  ['', ['- -: an empty job']],
  ['# only a remark\n', ['- -: an empty job']],
  ['---\n...\n', ['- -: an empty job']],
  ['null', ['- -: an empty job']],
  ['just words', ['- -: "just words"']],
  ['[1, 2]', ['- -: a list of 2']],
  ['job: x', ['- want: nothing: the key is missing']],
  ['{}', ['- job: nothing: the key is missing', '- want: nothing: the key is missing']],
  ['job: x\nwant: many', ['2 want: "many"']],
  ['job: x\nwant:\n', ['2 want: nothing']],
  // Quantities.
  ['job: x\nwant: { inductance: 20 mm }', ['2 want.inductance: "20 mm", whose unit measures a length']],
  ['job: x\nwant: { inductance: 240 }', ['2 want.inductance: "240", a number without a unit']],
  ['job: x\nwant: { inductance: .nan }', ['2 want.inductance: NaN, which is no number']],
  ['job: x\nwant: { inductance: -.inf }', ['2 want.inductance: -Infinity']],
  ['job: x\nwant: { inductance: -20 uH }', ['2 want.inductance: "-20 uH", which is negative']],
  ['job: x\nwant: { inductance: 0 uH }', ['2 want.inductance: "0 uH", which is zero']],
  ['job: x\nwant: { inductance: 1e400 uH }', ['2 want.inductance: "1e400 uH", more than a number can hold']],
  ['job: x\nwant: { inductance: true }', ['2 want.inductance: true']],
  [
    'job: x\nwant: { inductance: 240 uH to 20 uH, taps: 3 }',
    ['2 want.inductance: "240 uH to 20 uH", whose first end lies above its second'],
  ],
  [
    `${WISH}former: { longest: 76 Mm }`,
    ['3 former.longest: "76 Mm", which is above the 10000 mm that make sense here'],
  ],
  [`${WISH}former:\n  longest: 76,2 mm`, ['4 former.longest: "76,2 mm", with a comma']],
  [
    `${WISH}former: { longest: 76,2 mm }`,
    ['3 former.longest: "76", a number without a unit', '3 former.2 mm: a key that is not known'],
  ],
  [
    `${WISH}set: { capacitor: 380 pF to 15 pF }`,
    ['3 set.capacitor: "380 pF to 15 pF", whose first end lies above its second'],
  ],
  [`${WISH}set: { capacitor: 100 pF }`, ['3 set.capacitor: "100 pF"']],
  [`${WISH}set: { stray: 12 pF }`, ['3 set.capacitor: nothing: the key is missing']],
  [`${WISH}set: { capacitor: 15 pF to 380 pF, stray: -1 pF }`, ['3 set.stray: "-1 pF", which is negative']],
  [`${WISH}printer:\n  height: 250`, ['4 printer.height: "250", a number without a unit']],
  [`${WISH}printer: { nozzle: 0.4 }`, ['3 printer.nozzle: "0.4", a number without a unit']],
  // Words, flags, counts, names, dates.
  [`${WISH}prefer: cheap`, ['3 prefer: "cheap"']],
  [`${WISH}winding: { finish-trim: maybe }`, ['3 winding.finish-trim: "maybe"']],
  ['job: x\nwant: { inductance: 20 uH to 240 uH, taps: 2.5 }', ['2 want.taps: 2.5']],
  ['job: x\nwant: { inductance: 20 uH to 240 uH, taps: 61 }', ['2 want.taps: 61']],
  ['job: x\nwant: { inductance: 20 uH to 240 uH, taps: 0 }', ['2 want.taps: 0']],
  ['job: x\nwant: { inductance: 20 uH to 240 uH, taps: 3 uH }', ['2 want.taps: "3 uH"']],
  ['job: ""\nwant: { inductance: 9 uH }', ['1 job: nothing']],
  ['job: 12\nwant: { inductance: 9 uH }', ['1 job: 12']],
  ['job: "a\\u0007b"\nwant: { inductance: 9 uH }', ['1 job: "a?b", which holds control characters']],
  ['job: "a\\u202eb"\nwant: { inductance: 9 uH }', ['1 job: "a?b", which holds control characters']],
  [`job: ${'x'.repeat(81)}\nwant: { inductance: 9 uH }`, ['1 job: 81 characters']],
  [`${WISH}date: 2031-02-30`, ['3 date: "2031-02-30"']],
  [`${WISH}wire: [24 AWG enamel, 0.513 mm enamel]`, ['3 wire[2]: "0.513 mm enamel"']],
  [`${WISH}wire:\n  - 24 AWG enamel\n  - 5`, ['5 wire[2]: 5']],
  [`${WISH}wire: []`, ['3 wire: an empty list']],
  [`${WISH}former: { material: cheese }`, ['3 former.material: "cheese"']],
  // Between keys.
  ['job: x\nwant: { taps: 3 }', ['2 want: neither an inductance nor a band']],
  [
    'job: x\nwant: { inductance: 20 uH to 240 uH }',
    ['2 want.taps: the range 20 µH to 240 µH without a number of taps'],
  ],
  ['job: x\nwant: { inductance: 20 uH to 240 uH, taps: 1 }', ['2 want.taps: 1 tap for the range 20 µH to 240 µH']],
  [
    'job: x\nwant:\n  inductance:\n    - 20 uH\n    - 90 uH\n    - 80 uH\n    - 80 uH',
    ['6 want.inductance[3]: 80 µH, below 90 µH before it', '7 want.inductance[4]: 80 µH, equal to 80 µH before it'],
  ],
  ['job: x\nwant: { inductance: [20 uH, 80 uH], taps: 3 }', ['2 want.taps: 3 taps for 2 inductances']],
  [
    'job: x\nwant: { inductance: [20 uH, 80 uH], spacing: [20 uH, 80 uH] }',
    ['2 want.spacing: a list of inductances in want.inductance and another here'],
  ],
  [
    'job: x\nwant: { inductance: 20 uH to 240 uH, spacing: [21 uH, 80 uH] }',
    ['2 want.spacing: 21 µH as the first of the list', '2 want.spacing: 80 µH as the last of the list'],
  ],
  [
    'job: x\nwant: { inductance: [20 uH, 80 uH] }\nwinding: { units: 10 }',
    ['3 winding.units: two switches (winding.units: 10) for a list of inductances'],
  ],
  [
    'job: x\nset: { capacitor: 15 pF to 380 pF }\nwant: { band: 530 kHz to 1700 kHz }\nwinding: { units: 8 }',
    ['4 winding.units: two switches (winding.units: 8) for a band'],
  ],
  [
    'job: x\nwant: { inductance: 5 uH to 240 uH, taps: 12, spacing: even turns }\nwinding: { units: 10 }',
    ['2 want.spacing: a spacing for two switches (winding.units: 10)'],
  ],
  ['job: x\nwant: { inductance: 5 uH to 240 uH, taps: 12 }\nwinding: { units: 1 }', ['3 winding.units: 1']],
  ['job: x\nwant: { inductance: 5 uH to 240 uH, taps: 12 }\nwinding: { units: 21 }', ['3 winding.units: 21']],
  [
    'job: x\nwant: { band: 530 kHz to 1700 kHz }',
    ['- set: the band 530 kHz to 1700 kHz without the set that tunes it'],
  ],
  [
    'job: x\nset: { capacitor: 15 pF to 380 pF }\nwant: { band: 530 kHz to 1700 kHz, spacing: even ratio }',
    ['3 want.spacing: a spacing besides the band 530 kHz to 1700 kHz'],
  ],
  [
    'job: x\nset: { capacitor: 15 pF to 380 pF }\nwant: { band: 530 kHz to 1700 kHz, inductance: 9 uH }',
    ['3 want.inductance: an inductance besides the band 530 kHz to 1700 kHz'],
  ],
  [
    'job: x\nset: { capacitor: 15 pF to 380 pF }\nwant: { band: 530 kHz to 1700 kHz, overlap: 60 % }',
    ['3 want.overlap: an overlap of 60 %'],
  ],
  ['job: x\nwant: { inductance: 9 uH, overlap: 5 % }', ['2 want.overlap: an overlap without a band']],
  [`${WISH}former: { kind: tube }`, ['3 former.outside-diameter: nothing: the key is missing']],
  [
    `${WISH}former: { kind: tube, outside-diameter: 76 mm, mounting: ears, flanges: true }`,
    ['3 former.mounting: ears on a tube that is bought', '3 former.flanges: flanges on a tube that is bought'],
  ],
  [
    `${WISH}former: { kind: tube, outside-diameter: 76 mm, material: PLA }`,
    ['3 former.material: PLA for a former of kind tube'],
  ],
  [
    `${WISH}former: { outside-diameter: 76 mm, wall: 40 mm }`,
    ['3 former.wall: a wall of 40 mm at a diameter of 76 mm'],
  ],
  [
    `${WISH}former: { kind: tube, outside-diameter: 76 mm, mounting: base, body: ribbed, ribs: 8, screw: 4 mm }`,
    [
      '3 former.mounting: a base on a tube that is bought',
      '3 former.body: ribs on a tube that is bought',
      '3 former.ribs: ribs on a tube that is bought',
      '3 former.screw: mounting screws on a tube that is bought',
    ],
  ],
  [
    `${WISH}former: { ribs: 8, mounting: none, screw-circle: 90 mm }`,
    [
      '3 former.ribs: ribs for a former with body: full',
      '3 former.screw-circle: mounting screws for a former with mounting: none',
    ],
  ],
  [`${WISH}printer: { material: card }`, ['3 printer.material: card for a printer']],
  [`${WISH}printer: { scale: [100 %, 100.2 %] }`, ['3 printer.scale: a list of 2']],
  [`${WISH}printer: { scale: 120 % }`, ['3 printer.scale: "120 %", which is above the 1.1 that make sense here']],
  [`${WISH}parts: [former, cone]`, ['3 parts[2]: "cone"']],
  [`${WISH}parts: [former, saddle]`, ['3 parts[2]: saddle for a printed former, whose holes come with it']],
  [
    `${WISH}former: { kind: tube, outside-diameter: 76 mm }\nparts: former`,
    ['4 parts[1]: former for a former of kind tube, which is bought'],
  ],
  [
    `${WISH}former: { outside-diameter: 60 mm to 230 mm }`,
    ['3 former.outside-diameter: a printed former 230 mm wide on a bed of 220 mm x 220 mm'],
  ],
  [`${WISH}winding: { pitch: close, spacers: 0.3 mm }`, ['3 winding.spacers: spacers for a winding with pitch: close']],
  [`${WISH}printer: { layer: 0.5 mm }`, ['3 printer.layer: a layer of 0.5 mm from a nozzle of 0.4 mm']],
  [`${WISH}printer: { line: 1 mm }`, ['3 printer.line: a line of 1 mm from a nozzle of 0.4 mm']],
  // YAML that is broken or more than plain.
  ['job: x\njob: y\nwant: { inductance: 9 uH }', ['2 -: a key that was given before']],
  ['job: &a x\nwant: { inductance: 9 uH }', ['1 -: an anchor "&a"']],
  ['job: x\nwant: !wish { inductance: 9 uH }', ['2 -: Unresolved tag: !wish']],
  [`${WISH}---\njob: y\n`, ['4 -: 2 documents in one file']],
  ['? [a]\n: b', ['1 -: With stringKeys, all keys must be strings']],
];

describe('a job that is refused', () => {
  it.each(CASES)('%j', (text, expected) => {
    expect(lines(text)).toEqual(expected);
    for (const fault of refusals(text)) {
      expect(fault.place?.file).toBe('job.yaml');
      expect([fault.code, fault.expected, fault.todo].every((part) => part.length > 2)).toBe(true);
    }
  });

  it('for all its faults at once, in the order of the lines', () => {
    const text =
      'job: x\npapper: A4\nwant:\n  inductance: 20 uH to 240 uH\nformer:\n  longest: 76\n  knd: tube\nprinter: { layer: 9 mm }\n';
    expect(lines(text)).toEqual([
      '2 papper: a key that is not known',
      '3 want.taps: the range 20 µH to 240 µH without a number of taps',
      '6 former.longest: "76", a number without a unit',
      '7 former.knd: a key that is not known',
      '8 printer.layer: a layer of 9 mm from a nozzle of 0.4 mm',
    ]);
  });

  it('for a set that is wrong, and not for one that is missing besides', () => {
    expect(lines('job: x\nwant: { band: 530 kHz to 1700 kHz }\nset: { capacitor: 15 pf to 380 pF }')).toEqual([
      '3 set.capacitor: "15 pf", whose unit "pf" is not known (lower end of "15 pf to 380 pF")',
    ]);
  });

  it('with one fault for a line that is not YAML', () => {
    expect(lines('job: x\nwant:\n%  band: 5')).toEqual([
      '3 -: Plain value cannot start with directive indicator character %',
    ]);
  });

  it('with the nearest known key or word', () => {
    const todo = (text: string) => refusals(text).map((fault) => fault.todo);
    expect(todo(`${WISH}papper: A4`)).toEqual(['did you mean paper?']);
    expect(todo(`${WISH}paper: a4`)).toEqual(['did you mean A4?']);
    expect(todo(`${WISH}former: { outside_diameter: 76 mm }`)).toEqual(['did you mean outside-diameter?']);
    expect(todo(`${WISH}winding: { tapMethod: lug }`)).toEqual(['did you mean tap-method?']);
    expect(todo(`${WISH}winding: { tap-method: twistd loop }`)).toEqual(['did you mean twisted loop?']);
    expect(todo(`${WISH}zzzzzzzz: 1`)).toEqual(['remove the key, or put it where it belongs']);
    expect(todo(`${WISH}former: { longest: 76,2 mm }`)[1]).toContain('decimal point');
    expect(todo(`${WISH}__proto__: { polluted: true }`)).toEqual(['remove the key, or put it where it belongs']);
    expect(todo(`${WISH}constructor: 1`)).toEqual(['remove the key, or put it where it belongs']);
  });

  it.each([
    ['aliases that multiply', 'a: &a [x, x, x, x, x, x, x, x, x]\nb: &b [*a, *a, *a, *a]\nc: [*b, *b]', 'alias'],
    ['brackets without end', '['.repeat(100_000), 'too-deep'],
    ['braces without end', '{a: '.repeat(100_000), 'too-deep'],
    ['lists in lists', `${'- '.repeat(100_000)}x`, 'too-deep'],
    ['keys in keys', `${'? '.repeat(100_000)}x`, 'too-deep'],
    ['indents', Array.from({ length: 900 }, (_, n) => `${' '.repeat(n)}a:`).join('\n'), 'too-deep'],
    ['a megabyte', `job: ${'x'.repeat(LARGEST_BYTES)}`, 'too-large'],
    ['an open quote', 'job: "x\nwant: 1', 'not-yaml'],
    ['a tab as indent', 'job: x\nwant:\n\tinductance: 9 uH', 'not-yaml'],
    ['an object of a program', 'job: !!js/function x', 'tag'],
  ])('before it can do harm: %s', (_name, text, code) => {
    expect([...new Set(refusals(text).map((fault) => fault.code))]).toEqual([code]);
  });

  it('when its bytes are no UTF-8, or too many', () => {
    expect(() => decode(Uint8Array.from([0x6a, 0xff, 0xfe]), 'x')).toThrow('not-utf-8');
    expect(() => decode(new Uint8Array(LARGEST_BYTES + 1), 'x')).toThrow('too-large');
    expect(decode(Buffer.from('\ufeffjob: x'), 'x')).toBe('job: x');
  });

  it('leaves no trace in the prototypes', () => {
    readTree('__proto__: { polluted: true }\nconstructor: { prototype: { polluted: true } }', 'x');
    expect('polluted' in {}).toBe(false);
  });
});
