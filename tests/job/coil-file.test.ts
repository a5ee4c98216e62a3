import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { coilJsonSchema } from '../../src/job/coil/json-schema.ts';
import { readCoilFile } from '../../src/job/coil-file.ts';

const read = (text: string) => readCoilFile(text, 'bench/old coil.yaml');
const coil = (keys: string) => read(`coil: { former-diameter: 76 mm, wire: 0.5 mm enamel, ${keys} }`).coil;

/** `line key: got` for every fault. */
function refused(text: string): string[] {
  try {
    readCoilFile(text, 'coil.yaml');
  } catch (error) {
    if (error instanceof Fault && error.exit === 3)
      return error.faults.map(({ place, got }) => `${place?.line ?? '-'} ${place?.key ?? '-'}: ${got}`);
    throw error;
  }
  return [];
}

const LEAST = `coil: { former-diameter: 76.2 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 100, pitch: 0.6 mm, taps: [20, 40, 60, 80] }
set:  { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, switch: open }
at: 1 MHz
`;

describe('a coil file', () => {
  it('of the least keys is read, whole coil added as the last tap', () => {
    const file = read(LEAST);
    expect(file).toMatchObject({
      name: 'old coil',
      atKhz: 1000,
      celsius: 20,
      set: { capacitorLowPf: 15, capacitorHighPf: 380, strayPf: 12, aerialPf: 60, switch: 'open', leadPf: 2 },
      coil: { turns: 100, taps: [20, 40, 60, 80, 100], hand: 'right', earthed: 'start', formerMaterial: null },
    });
    expect(file.coil.meanDiameterMm).toBeCloseTo(76.76, 9);
    expect(file.assumed).toMatchObject({ name: 'old coil', 'set.lead': '2 pF', 'coil.former-material': 'none' });
    expect(file.given).toMatchObject({ 'coil.wire.bare': '0.5 mm', 'coil.turns': 100, at: '1 MHz' });
  });

  it('is read the same as JSON', () => {
    const json = JSON.stringify({
      coil: {
        'former-diameter': '76.2 mm',
        wire: { bare: '0.5 mm', overall: '0.56 mm' },
        turns: 100,
        pitch: '0.6 mm',
        taps: [20, 40, 60, 80],
      },
      set: { capacitor: '15 pF to 380 pF', stray: '12 pF', aerial: '60 pF', switch: 'open' },
      at: '1 MHz',
    });
    expect(read(json)).toEqual(read(LEAST));
  });

  it('without a set states the frequency that it takes', () => {
    const file = read(
      'job: Attic coil\ncoil: { mean-diameter: 3 in, wire: 24 AWG enamel, turns: 60, turns-per-inch: 32 }',
    );
    expect([file.name, file.set, file.atKhz, file.assumed.at]).toEqual(['Attic coil', null, 1000, '1 MHz']);
    expect(file.coil.sections[0]!.pitchMm).toBeCloseTo(25.4 / 32, 12);
  });

  it('takes one diameter for another', () => {
    const of = (key: string, mm: number) =>
      read(`coil: { ${key}: ${mm} mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 10, pitch: 1 mm }`).coil;
    const all = [of('former-diameter', 76), of('over-wire-diameter', 77.12), of('mean-diameter', 76.56)];
    for (const one of all) {
      expect(one.meanDiameterMm).toBeCloseTo(76.56, 9);
      expect(one.formerDiameterMm).toBeCloseTo(76, 9);
    }
  });

  it('takes pitch, length and turns by the inch or centimetre for one another', () => {
    const mean = coil('turns: 100, pitch: 0.6 mm').sections;
    // 0.534 mm is the mean overall diameter of 0.5 mm enamel: 100 x 0.6 + 0.534.
    const others = ['winding-length: 60.534 mm', `turns-per-inch: ${25.4 / 0.6}`, `turns-per-cm: ${10 / 0.6}`];
    for (const other of others) expect(coil(`turns: 100, ${other}`).sections[0]!.pitchMm).toBeCloseTo(0.6, 9);
    const counted = read(
      'coil: { former-diameter: 76 mm, wire: 0.5 mm enamel, pitch: 0.6 mm, winding-length: 60.4 mm }',
    );
    expect(counted.coil.sections).toEqual(mean);
    expect(counted.assumed['coil.turns']).toBe('100, by length over pitch 99.78');
  });

  it('takes a close winding that measures a part of a wire short, and touching turns no nearer', () => {
    // 100 wires of 0.534 mm side by side along a line away from the start: 53.4 mm.
    const { pitchMm } = coil('turns: 100, winding-length: 53.4 mm').sections[0]!;
    expect(pitchMm).toBeGreaterThan(0.534 * 0.97);
    expect(pitchMm).toBeLessThanOrEqual(0.534);
  });

  it('takes an empty list of taps for none', () => {
    expect(coil('turns: 100, pitch: 0.6 mm, taps: []').taps).toEqual([100]);
  });

  it('takes taps by places for taps by turns', () => {
    const byTurns = coil('turns: 100, pitch: 0.6 mm, taps: [20, 40.5, 60]').taps;
    const byPlace = coil('turns: 100, pitch: 0.6 mm, tap-positions: [12 mm, 24.3 mm, 36 mm, 60 mm]').taps;
    expect(byPlace).toHaveLength(byTurns.length);
    for (const [i, turn] of byPlace.entries()) expect(turn).toBeCloseTo(byTurns[i]!, 5);
  });

  it('infers the diameter that is missing from the stock, and says so', () => {
    const bare = read('coil: { mean-diameter: 76 mm, wire: { bare: 0.5 mm }, turns: 10, pitch: 1 mm }');
    expect(bare.coil.wire.overallMm).toBeCloseTo(0.534, 3);
    expect(bare.assumed['coil.wire.overall']).toBe('0.534 mm, as 0.5 mm enamel has 0.034 mm of covering');
    const over = read(
      'coil: { mean-diameter: 76 mm, wire: { overall: 0.71 mm, covering: double cotton }, turns: 10, pitch: 1 mm }',
    );
    expect(over.coil.wire.covering).toBe('double cotton');
    expect(over.coil.wire.bareMm).toBeGreaterThan(0.4);
    expect(over.coil.wire.bareMm).toBeLessThan(0.5);
    expect(Object.keys(over.assumed)).toContain('coil.wire.bare');
    // Both given: nothing of the size is inferred, only the covering by its thickness.
    expect(read(LEAST).coil.wire).toMatchObject({ bareMm: 0.5, overallMm: 0.56, covering: 'enamel heavy' });
    expect(read(LEAST).assumed['coil.wire.covering']).toBe('enamel heavy, by its thickness');
  });
});

const C = 'coil: { former-diameter: 76.2 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, ';
/** Text, and what it is refused for: line, key, what was got. */
const CASES: readonly (readonly [string, readonly string[]])[] = [
  ['', ['- -: an empty file']],
  ['coil:', ['1 coil: nothing']],
  ['name: x', ['- coil: nothing: the key is missing']],
  ['coil: 3', ['1 coil: 3']],
  ['[1]', ['- -: a list of 1']],
  [`${C} turns: 100, pitch: 0.4 mm }`, ['1 coil.pitch: a pitch of 0.4 mm for wire of 0.56 mm']],
  [
    `${C} turns: 100, turns-per-inch: 60 }`,
    ['1 coil.turns-per-inch: 60 turns per inch, a pitch of 0.4233 mm, for wire of 0.56 mm'],
  ],
  [
    `${C} turns: 100, winding-length: 40 mm }`,
    ['1 coil.winding-length: 100 turns of 0.56 mm wire in a winding of 40 mm'],
  ],
  [
    `${C} turns: 100, pitch: 0.6 mm, taps: [20, 10, 120] }`,
    [
      '1 coil.taps[2]: a tap at turn 10 behind one at turn 20',
      '1 coil.taps[3]: a tap at turn 120 of a coil of 100 turns',
    ],
  ],
  [
    `${C} turns: 100, pitch: 0.4 mm, taps: [120] }`,
    ['1 coil.pitch: a pitch of 0.4 mm for wire of 0.56 mm', '1 coil.taps[1]: a tap at turn 120 of a coil of 100 turns'],
  ],
  [
    `${C} turns: 100, pitch: 0.6 mm, tap-positions: [12 mm, 70 mm] }`,
    ['1 coil.tap-positions[2]: a tap at 70 mm of a coil of 60 mm'],
  ],
  [`${C} turns: 100, pitch: 0.6 mm, taps: [20, 20] }`, ['1 coil.taps[2]: a tap at turn 20 behind one at turn 20']],
  [`${C} turns: 100, pitch: 0.6 mm, taps: [0] }`, ['1 coil.taps[1]: 0']],
  [`${C} turns: 100 }`, ['1 coil: 100 turns without a pitch']],
  [`${C} pitch: 0.6 mm }`, ['1 coil: a coil without turns']],
  [`${C} turns: 600, pitch: 0.6 mm }`, ['1 coil.turns: 600']],
  [
    `${C} turns: 100, pitch: 0.6 mm, winding-length: 80 mm }`,
    ['1 coil.winding-length: a winding of 80 mm, so a pitch of 0.7944 mm, besides a pitch of 0.6 mm'],
  ],
  [
    `${C} turns: 10, pitch: 0.6 mm, turns-per-cm: 16 }`,
    ['1 coil.turns-per-cm: 16 turns per cm besides a pitch of 0.6 mm'],
  ],
  [
    `${C} mean-diameter: 77 mm, turns: 10, pitch: 0.6 mm }`,
    ['1 coil.mean-diameter: mean-diameter 77 mm besides former-diameter 76.2 mm'],
  ],
  ['coil: { wire: 0.5 mm enamel, turns: 10, pitch: 0.6 mm }', ['1 coil: a coil without a diameter']],
  [
    'coil: { former-diameter: 1 mm, wire: 1 mm enamel, turns: 10, pitch: 2 mm }',
    ['1 coil.former-diameter: wire of 1.048 mm on a former of 1 mm'],
  ],
  [
    'coil: { former-diameter: 50 mm, wire: { bare: 0.6 mm, overall: 0.5 mm }, turns: 10, pitch: 2 mm }',
    ['1 coil.wire.overall: 0.5 mm over the covering of a wire of 0.6 mm bare'],
  ],
  ['coil: { former-diameter: 50 mm, wire: {}, turns: 10, pitch: 2 mm }', ['1 coil.wire: a wire without a diameter']],
  ['coil: { former-diameter: 50 mm, wire: 0.5 mm emamel, turns: 10, pitch: 2 mm }', ['1 coil.wire: "0.5 mm emamel"']],
  [
    'coil: { former-diameter: 50 mm, wire: { bare: 0.5 mm, ovrall: 0.6 mm }, turns: 10, pitch: 2 mm }',
    ['1 coil.wire.ovrall: a key that is not known'],
  ],
  [
    `${C} turns: 10, pitch: 0.6 mm }\nset: { capacitor: 380 pF to 15 pF }`,
    ['2 set.capacitor: "380 pF to 15 pF", whose first end lies above its second'],
  ],
  [`${C} turns: 100, pitch: 0.6 mm }\nat: 10 kHz`, ['2 at: 10 kHz']],
  [`${C} turns: 100, pitch: 0.6 mm }\nat: 50 MHz`, ['2 at: 50 MHz']],
  [
    `${C} turns: 100, pitch: 0.6 mm }\nat: 20 MHz`,
    ['2 at: 20 MHz for 24.11 m of wire, 161 % of a wavelength of 14.99 m'],
  ],
  [`${C} turns: 10, pitch: 0.6 mm }\nnmae: x`, ['2 nmae: a key that is not known']],
  [`${C} turns: 10, pitch: 0.6 mm }\njob: 12`, ['2 job: 12']],
  [`${C} sections: 3 }`, ['1 coil.sections: 3']],
  [`${C} sections: [{ turns: 3, pich: 1 mm }] }`, ['1 coil.sections[1].pich: a key that is not known']],
  [`${C} sections: [{ turns: 3, pitch: 1 mm }], pitch: 1 mm }`, ['1 coil.pitch: pitch besides sections']],
  [
    `${C} turns: 9, sections: [{ turns: 3, pitch: 1 mm, gap-after: 2 mm }, { turns: 4, pitch: 1 mm }] }`,
    ['1 coil.turns: 9 turns, and sections of 7 together'],
  ],
  [
    `${C} sections: [{ turns: 3.5, pitch: 1 mm }, { turns: 10, length: 4 mm, gap-after: 1 mm }] }`,
    [
      '1 coil.sections[1].turns: 3.5 turns in section 1 of 2',
      '1 coil.sections[1].gap-after: section 1 of 2 without a gap behind it',
      '1 coil.sections[2].gap-after: a gap of 1 mm behind the last section',
      '1 coil.sections[2].length: 10 turns of 0.56 mm wire in a section of 4 mm',
    ],
  ],
];

describe('a coil file is refused', () => {
  it.each(CASES)('%s', (text, expected) => {
    expect(refused(text)).toEqual(expected);
  });

  it('with file, line, key, got, expected and what to do', () => {
    expect.assertions(1);
    try {
      readCoilFile(`${C} turns: 100, winding-length: 40 mm }`, 'coil.yaml');
    } catch (error) {
      expect(error instanceof Fault ? error.faults : error).toEqual([
        {
          code: 'turns-do-not-fit',
          place: { file: 'coil.yaml', line: 1, key: 'coil.winding-length' },
          got: '100 turns of 0.56 mm wire in a winding of 40 mm',
          expected: 'no more than 71 turns, or a winding of 56.56 mm or more',
          todo: 'count the turns again, or measure length and wire again',
        },
      ]);
    }
  });

  it('as data or not at all, whatever is written', () => {
    const value = fc.oneof(
      fc.constantFrom('1 mm', '0.6 mm', '0 mm', '-1 mm', '3 in', 'none', '24 AWG enamel', '', null, true),
      fc.double({ min: -5, max: 700 }),
      fc.array(fc.oneof(fc.double({ min: -1, max: 120 }), fc.constantFrom('12 mm', 'x')), { maxLength: 4 }),
      fc.record({ bare: fc.constantFrom('0.5 mm', '3 mm', 'x'), overall: fc.constantFrom('0.56 mm', '9 mm') }),
    );
    const keys = [
      ...['former-diameter', 'over-wire-diameter', 'mean-diameter', 'wire', 'turns', 'pitch', 'winding-length'],
      ...['turns-per-inch', 'sections', 'taps', 'tap-positions', 'hand', 'former-material', 'other'],
    ];
    const entries = fc.array(fc.tuple(fc.constantFrom(...keys), value), { maxLength: 8 });
    let ran = 0;
    let accepted = 0;
    fc.assert(
      fc.property(entries, fc.constantFrom('1 MHz', '2 GHz', 'x', 5), (pairs, at) => {
        ran++;
        // A base that is right, so that some are accepted.
        const base = { 'mean-diameter': '50 mm', wire: '0.5 mm enamel', turns: 20, pitch: '1 mm' };
        if (refused(JSON.stringify({ coil: { ...base, ...Object.fromEntries(pairs) }, at })).length === 0) accepted++;
      }),
      { seed: 7, numRuns: 600 },
    );
    console.log(`coil files written at random: ${ran}, accepted ${accepted}`);
    expect(ran).toBe(600);
    expect(accepted).toBeGreaterThan(5);
  });
});

interface Node {
  readonly description?: string;
  readonly default?: unknown;
  readonly required?: readonly string[];
  readonly properties?: Readonly<Record<string, Node>>;
}

const keysOf = (node: Node, prefix = ''): readonly (readonly [string, Node])[] =>
  Object.entries(node.properties ?? {}).flatMap(([key, inner]) => [
    [`${prefix}${key}`, inner] as const,
    ...keysOf(inner, `${prefix}${key}.`),
  ]);

describe('the JSON Schema of a coil file', () => {
  const shipped = new URL('../../templates/schemas/coil.schema.json', import.meta.url);

  it('is shipped up to date (UPDATE=1 writes it anew)', () => {
    const text = `${JSON.stringify(coilJsonSchema(), null, 2)}\n`;
    if (process.env.UPDATE === '1') writeFileSync(shipped, text);
    expect(existsSync(shipped) ? readFileSync(shipped, 'utf8') : '').toBe(text);
  });

  it('describes every key and shows the defaults that the reader takes', () => {
    const all = keysOf(coilJsonSchema() as Node);
    expect(all.length).toBeGreaterThan(30);
    expect(all.filter(([, node]) => (node.description ?? '').length < 10).map(([key]) => key)).toEqual([]);
    expect(coilJsonSchema().required).toEqual(['coil']);
    const { assumed } = read(`${C} turns: 10, pitch: 1 mm }\nset: { capacitor: 15 pF to 380 pF }`);
    const shown = all.filter(([, node]) => node.default !== undefined);
    expect(shown.length).toBeGreaterThan(8);
    for (const [key, node] of shown) expect([key, assumed[key]]).toEqual([key, node.default]);
  });
});
