/** A lot file: what is read of it, what it changes in its jobs, what it is refused for. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import type { Job } from '../../src/job/job.ts';
import { jobPaths, lotOf, readLot, readLotFile, withTable } from '../../src/job/lot-file.ts';
import { readJob } from '../../src/job/read.ts';
import { linearMassGM } from '../../src/stock/linear-mass.ts';
import { STARTERS } from '../../templates/jobs/starters.ts';
import { LOTS } from '../../templates/lots/lots.ts';

const JOBS: Readonly<Record<string, string>> = {
  'a.yaml':
    'job: A\nwant: { inductance: 100 uH }\npaper: Letter\ndate: 2030-01-02\nprinter: { height: 200 mm, nozzle: 0.6 mm }',
  'sub/b.yaml': 'job: B\nwant: { inductance: 200 uH }\nwire: 24 AWG enamel\nformer: { longest: 120 mm }',
  'tube.yaml': 'job: T\nwant: { inductance: 200 uH }\nformer: { kind: tube, outside-diameter: 240 mm }',
  'wide.yaml':
    'job: W\nwant: { inductance: 200 uH }\nformer: { outside-diameter: 230 mm }\nprinter: { bed: 300 x 300 mm }',
  'bad.yaml': 'job: X\nwant: { inductance: 20 mm }\nfromer: {}',
  'orders.csv': 'job,quantity\na.yaml,3\n../sub/b.yaml,2',
};
const read = (path: string): string => {
  const text = JOBS[path.replace(/^lists\/orders/, 'orders').replace(/^lists\//, '')];
  if (text !== undefined) return text;
  throw new Fault(3, {
    code: 'no-such-file',
    place: { file: path },
    got: 'no file of this name',
    expected: 'x',
    todo: 'y',
  });
};
const lot = (text: string) => readLot(text, 'lot.yaml', read);

/** `file line key: got` for every fault. */
async function refused(text: string, file = 'lot.yaml'): Promise<string[]> {
  try {
    await readLot(text, file, read);
  } catch (error) {
    if (error instanceof Fault && error.exit === 3)
      return error.faults.map(({ place, got }) => {
        const where = place?.file === file ? '' : `${place?.file} `;
        return `${where}${place?.line ?? '-'} ${place?.key ?? '-'}: ${got}`;
      });
    throw error;
  }
  return [];
}

const FULL = `lot: Harbour stock
date: 2031-05-17
paper: A4
checked-by: Bench two
serials: HS-###
first-serial: 9
coils:
  - { job: a.yaml, quantity: 2 }
  - { job: sub/b.yaml, serials: [X-1, X-2] }
  - { job: ./a.yaml, quantity: 1 }
spools:
  - { name: reel 1, wire: 0.5 mm enamel, left: 120 m }
  - { name: reel 2, wire: 22 AWG DCC, left: 400 ft }
  - { name: reel 3, wire: 0.5 mm, left: 250 g }
printers:
  - { name: low, bed: 300 x 300 mm, height: 180 mm }
  - { name: tall, bed: 210 x 200 mm, height: 260 mm, count: 2 }
  - { name: tall and wide, bed: 8 x 9 in, height: 260 mm }
jigs: none
`;

describe('a lot file', () => {
  it('is read whole', async () => {
    const read = await lot(FULL);
    expect(read).toMatchObject({
      name: 'Harbour stock',
      date: '2031-05-17',
      paper: 'A4',
      checkedBy: 'Bench two',
      jigs: 'none',
      entries: [
        { path: 'a.yaml', quantity: 2, serials: ['HS-009', 'HS-010'], job: { name: 'A' } },
        { path: 'sub/b.yaml', quantity: 2, serials: ['X-1', 'X-2'], job: { name: 'B' } },
        { path: './a.yaml', quantity: 1, serials: ['HS-011'], job: { name: 'A' } },
      ],
      printers: [
        { name: 'low', bedXMm: 300, bedYMm: 300, heightMm: 180, count: 1 },
        { name: 'tall', bedXMm: 210, bedYMm: 200, heightMm: 260, count: 2 },
        { name: 'tall and wide', bedXMm: 203.2, bedYMm: 228.6, heightMm: 260, count: 1 },
      ],
    });
    expect(read.spools.map(({ name, wire, leftM }) => [name, wire.name, leftM])).toEqual([
      ['reel 1', '0.5 mm enamel', 120],
      ['reel 2', '22 AWG double cotton', 121.92],
      ['reel 3', '0.5 mm enamel', Math.floor(250_000 / linearMassGM(read.spools[0]!.wire)) / 1000],
    ]);
    // Read once, so that it is one kind.
    expect(read.entries[2]!.job).toBe(read.entries[0]!.job);
    expect(jobPaths(readLotFile(FULL, 'shop/lot.yaml'))).toEqual([
      { readFrom: 'shop/a.yaml', place: { file: 'shop/lot.yaml', line: 8, key: 'coils[1].job' } },
      { readFrom: 'shop/sub/b.yaml', place: { file: 'shop/lot.yaml', line: 9, key: 'coils[2].job' } },
    ]);
  });

  it('is read the same as JSON', async () => {
    const json = JSON.stringify({
      lot: 'L',
      coils: [{ job: 'a.yaml', quantity: 2 }],
      spools: [{ name: 'r', wire: '0.5 mm enamel', left: '9 m' }],
    });
    const yaml = 'lot: L\ncoils: [{ job: a.yaml, quantity: 2 }]\nspools: [{ name: r, wire: 0.5 mm enamel, left: 9 m }]';
    expect(await lot(json)).toEqual(await lot(yaml));
  });

  it('of the least keys takes name and serials from its file, paper from its first job, and leaves the jobs as they are', async () => {
    const read = await readLot(
      'coils: [{ job: a.yaml, quantity: 2 }, { job: sub/b.yaml, quantity: 1 }]\nspools:\n',
      'old stock.yaml',
      (path) => JOBS[path]!,
    );
    expect(read).toMatchObject({
      name: 'old stock',
      date: null,
      paper: 'Letter',
      checkedBy: null,
      spools: [],
      printers: [],
      jigs: 'once',
    });
    expect(read.entries.map(({ serials }) => serials)).toEqual([['OS-001', 'OS-002'], ['OS-003']]);
    expect(read.entries.map(({ job }) => job)).toEqual([
      readJob(JOBS['a.yaml']!, 'a.yaml'),
      readJob(JOBS['sub/b.yaml']!, 'sub/b.yaml'),
    ]);
  });

  it('takes its coils from a table, whose paths go from the folder of the table', async () => {
    const text = 'lot: L\nserials: T-##\ncoils: lists/orders.csv';
    const file = readLotFile(text, 'lot.yaml');
    expect(file).toMatchObject({
      entries: [],
      table: { path: 'lists/orders.csv', readFrom: 'lists/orders.csv', place: { line: 3 } },
    });
    expect(() => lotOf(file, new Map())).toThrow('was not read');
    expect(withTable(file, JOBS['orders.csv']!).entries).toMatchObject([
      {
        path: 'lists/a.yaml',
        readFrom: 'lists/a.yaml',
        serials: ['T-01', 'T-02', 'T-03'],
        place: { file: 'lists/orders.csv', line: 2 },
      },
      { path: 'sub/b.yaml', readFrom: 'sub/b.yaml', serials: ['T-04', 'T-05'], place: { line: 3 } },
    ]);
    expect((await lot(text)).entries.map(({ job }) => job.name)).toEqual(['A', 'B']);
  });
});

describe('jobs in a lot', () => {
  it('have paper, date, bed and height of the lot, its wires where they name none, and what follows from these', async () => {
    const [a, b] = (await lot(FULL)).entries.map(({ job }) => job) as [Job, Job];
    const alone = readJob(JOBS['a.yaml']!, 'a.yaml');
    for (const job of [a, b]) {
      expect(job).toMatchObject({ paper: 'A4', date: '2031-05-17' });
      // The tallest, and of these the widest.
      expect(job.printer).toMatchObject({ bedXMm: 203.2, bedYMm: 228.6, heightMm: 260 });
      expect(job.given).toMatchObject({
        paper: 'A4',
        date: '2031-05-17',
        'printer.bed': '203.2 mm x 228.6 mm',
        'printer.height': '260 mm',
      });
      for (const key of ['paper', 'date', 'printer.bed', 'printer.height']) {
        expect(Object.keys(job.assumed)).not.toContain(key);
        expect(Object.keys(job.source.lines)).not.toContain(key);
      }
    }
    expect([a.printer.nozzleMm, a.former.longestMm, b.former.longestMm]).toEqual([0.6, 260, 120]);
    expect(a.assumed['former.longest']).toBe('260 mm');
    expect(a.wires === 'stock' ? [] : a.wires.map(({ name }) => name)).toEqual([
      '0.5 mm enamel',
      '22 AWG double cotton',
    ]);
    expect(a.assumed.wire).toBe('0.5 mm enamel, 22 AWG double cotton: on the shelf');
    expect(b.wires === 'stock' ? [] : b.wires.map(({ name }) => name)).toEqual(['24 AWG enamel']);
    expect(b.assumed.wire).toBeUndefined();
    expect(a.source.lines.job).toBe(alone.source.lines.job);
  });

  it('of tube keep their length', async () => {
    const text = 'coils: [{ job: tube.yaml, quantity: 2 }]\nprinters: [{ name: p, bed: 100 x 100 mm, height: 90 mm }]';
    expect((await lot(text)).entries[0]!.job).toMatchObject({ former: { longestMm: 200 }, printer: { heightMm: 90 } });
  });
});

const C = 'coils: [{ job: a.yaml, quantity: 2 }]\n';
/** Text, and what it is refused for. */
const CASES: readonly (readonly [string, readonly string[]])[] = [
  ['', ['- -: an empty file']],
  ['[1]', ['- -: a list of 1']],
  ['lot: x', ['- coils: nothing: the key is missing']],
  ['coils:', ['1 coils: nothing']],
  ['coils: []', ['1 coils: a list of 0']],
  ['coils: 3', ['1 coils: 3']],
  ['coils: [a.yaml]', ['1 coils[1]: "a.yaml"']],
  ['coils: [{ quantity: 3 }]', ['1 coils[1].job: nothing: the key is missing']],
  ['coils: [{ job: a.yaml }]', ['1 coils[1].quantity: nothing: the key is missing']],
  ['coils: [{ job: "-", quantity: 1 }]', ['1 coils[1].job: standard input']],
  ['coils: [{ job: a.yaml, qantity: 3 }]', ['1 coils[1].qantity: a key that is not known']],
  [
    'coils: [{ job: a.yaml, quantity: 0 }, { job: b, quantity: 10001 }, { job: c, quantity: 2.5 }]',
    ['1 coils[1].quantity: 0', '1 coils[2].quantity: 10001', '1 coils[3].quantity: 2.5'],
  ],
  [`${C}papre: A4\nserials: HS-`, ['2 papre: a key that is not known', '3 serials: "HS-", without #']],
  [`${C}serials: A-#\nfirst-serial: 9`, ['1 coils[1].quantity: numbers up to 10 for the pattern A-#']],
  [
    'coils:\n  - { job: a.yaml, quantity: 2 }\n  - { job: a.yaml, quantity: 2, first-serial: 2 }\nserials: A-#\njigs: twice',
    ['3 coils[2].first-serial: the serial "A-2" a second time, after line 2', '5 jigs: "twice"'],
  ],
  [
    'coils:\n  - { job: a.yaml, serials: [A-1, A-2, a-1] }',
    ['2 coils[1].serials: the serial "a-1" a second time, in the same list'],
  ],
  [
    `${C}spools:\n  - { name: r, wire: 0.5 mm enamel, left: 1 l }\n  - { name: R, wire: 0.5 mm emamel, left: 0 m }\n  - { name: s, wire: 3, left: 20 }`,
    [
      '3 spools[1].left: "1 l", whose unit does not measure a length of wire',
      '4 spools[2].wire: "0.5 mm emamel"',
      '4 spools[2].left: "0 m", which is zero',
      '5 spools[3].wire: 3',
      '5 spools[3].left: 20',
    ],
  ],
  [
    `${C}spools:\n  - { name: r, wire: 0.5 mm enamel, left: 1 m }\n  - { name: R, wire: 0.5 mm enamel, left: 1 m }`,
    ['4 spools[2].name: the name R a second time, after line 3'],
  ],
  [
    `${C}printers: [{ name: p, bed: 220 mm, height: 9 mm, count: 0 }]`,
    ['2 printers[1].bed: "220 mm"', '2 printers[1].count: 0'],
  ],
  [
    `${C}printers: [{ name: p, bed: 220 x 220 mm, height: 90 mm }, { name: P, bed: 220 x 220 mm, height: 90 mm }]`,
    ['2 printers[2].name: the name P a second time, after line 2'],
  ],
  ['coils: [{ job: a.yaml, quantity: 6000 }, { job: a.yaml, quantity: 4001 }]', ['1 -: 10001 coils in one lot']],
  ['coils: [{ job: wide.yaml, quantity: 1 }]', []],
  [
    'coils:\n  - { job: wide.yaml, quantity: 1 }\nprinters: [{ name: p, bed: 220 x 240 mm, height: 90 mm }]',
    ['2 coils[1].job: a printed former 230 mm wide for the bed of p, 220 mm x 240 mm'],
  ],
];

describe('a lot file is refused', () => {
  it.each(CASES)('%j', async (text, expected) => {
    expect(await refused(text)).toEqual(expected);
  });

  it('for what is wrong with its jobs, all together, each fault with its own place and where the lot names the job', async () => {
    expect(
      await refused(
        'coils:\n  - { job: bad.yaml, quantity: 2 }\n  - { job: none.yaml, quantity: 1 }\n  - { job: bad.yaml, quantity: 1 }',
      ),
    ).toEqual([
      'bad.yaml 2 want.inductance: "20 mm", whose unit measures a length; named in lot.yaml, line 2',
      'bad.yaml 3 fromer: a key that is not known; named in lot.yaml, line 2',
      'none.yaml - -: no file of this name; named in lot.yaml, line 3',
    ]);
    expect(await refused('coils: no.csv')).toEqual(['no.csv - -: no file of this name; named in lot.yaml, line 1']);
  });

  it('for every key that is not known, wherever it stands', async () => {
    let tried = 0;
    await fc.assert(
      fc.asyncProperty(
        fc.stringMatching(/^[a-z]{1,3}-?[a-z]{3,8}z$/),
        fc.constantFrom('', 'coils', 'spools', 'printers'),
        async (key, section) => {
          const data: Record<string, unknown> = {
            coils: [{ job: 'a.yaml', quantity: 1 }],
            spools: [{ name: 'r', wire: '0.5 mm enamel', left: '9 m' }],
            printers: [{ name: 'p', bed: '220 x 220 mm', height: '200 mm' }],
          };
          const holder = section === '' ? data : (data[section] as Record<string, unknown>[])[0]!;
          holder[key] = 1;
          expect(await refused(JSON.stringify(data, null, 1))).toEqual([
            expect.stringMatching(
              new RegExp(`^\\d+ ${section === '' ? '' : `${section}\\[1\\]\\.`}${key}: a key that is not known$`),
            ),
          ]);
          tried++;
        },
      ),
      { seed: 77, numRuns: 60 },
    );
    console.log(`unknown keys tried: ${tried}`);
    expect(tried).toBe(60);
  });

  it('as data or not at all, whatever is written', async () => {
    const value = fc.oneof(
      fc.constantFrom('A-#', 'a.yaml', '1 m', '', null, true, '220 x 220 mm', '0.5 mm enamel'),
      fc.double(),
      fc.anything(),
    );
    const group = fc.dictionary(
      fc.constantFrom('job', 'quantity', 'serials', 'first-serial', 'name', 'wire', 'left', 'bed', 'height', 'count'),
      value,
    );
    const keys = fc.constantFrom(
      'lot',
      'date',
      'paper',
      'checked-by',
      'serials',
      'first-serial',
      'coils',
      'spools',
      'printers',
      'jigs',
    );
    let [ran, taken] = [0, 0];
    fc.assert(
      fc.property(fc.dictionary(keys, fc.oneof(value, fc.array(group, { maxLength: 3 })), { maxKeys: 4 }), (data) => {
        ran++;
        try {
          readLotFile(JSON.stringify({ coils: [{ job: 'a.yaml', quantity: 1 }], ...data }) ?? '', 'lot.json');
          taken++;
        } catch (error) {
          if (!(error instanceof Fault)) throw error;
          expect(error.exit).toBe(3);
          for (const { got, expected, todo } of error.faults)
            for (const part of [got, expected, todo]) expect(part).not.toBe('');
        }
      }),
      { seed: 78, numRuns: 150 },
    );
    console.log(`lots written at random: ${ran}, taken ${taken}`);
    expect(taken).toBeGreaterThan(5);
  });
});

describe('the starter lots', () => {
  it.each(LOTS)('$name is read with the jobs that come with it', async ({ name, text, jobs }) => {
    const texts = new Map(STARTERS.map((one) => [`${one.name}.yaml`, one.text]));
    const read = await readLot(text, `${name}.yaml`, (path) => texts.get(path)!);
    expect(new Set(read.entries.map(({ path }) => path))).toEqual(new Set(jobs.map((one) => `${one.name}.yaml`)));
    expect(read.name.toLowerCase().replaceAll(' ', '-')).toBe(name);
    expect(read.entries.reduce((sum, { quantity }) => sum + quantity, 0)).toBe(40);
    expect([read.spools.length, read.printers.length]).toEqual([6, 2]);
  });
});
