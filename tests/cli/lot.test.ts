import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { runLot } from '../../cli/lot.ts';
import { lotProgress, progressText } from '../../cli/lot-progress.ts';
import { statusLine } from '../../cli/terminal.ts';
import { Fault } from '../../src/fault.ts';
import type { LotRecord } from '../../src/lot/schema.ts';
import { makeLot } from '../../src/lot.ts';
import { counted, hashes, SMALL_JOBS, smallText } from '../lot/lots.ts';
import { command, type TestTerminal, testTerminal } from './terminal.ts';

/** A folder with the lot and its jobs. */
function workshop(terminal: TestTerminal = testTerminal()): TestTerminal {
  for (const [path, text] of Object.entries(SMALL_JOBS)) writeFileSync(join(terminal.folder, path), text);
  writeFileSync(
    join(terminal.folder, 'drums.yaml'),
    smallText([
      ['drum.yaml', 3],
      ['second.yaml', 2],
    ]),
  );
  return terminal;
}

const version = '9.9.9';
/** Threads cannot run TypeScript: orders are carried out in this one. */
const load = async (): Promise<typeof makeLot> => (lot, options) => makeLot(lot, { ...options, crew: counted().crew });

let terminal: TestTerminal;
let statuses: string[];
beforeAll(async () => {
  statuses = [];
  const plain = workshop();
  terminal = { ...plain, status: (text) => statuses.push(text) };
  await runLot({ file: 'drums.yaml', json: false }, terminal, version, load);
}, 60_000);

describe('lot', () => {
  it('writes the folder, leaves nothing beside it, and tells what came of it on a page', () => {
    const out = join(terminal.folder, 'out', 'two-drums');
    const record: LotRecord = JSON.parse(readFileSync(join(out, 'lot.json'), 'utf8'));
    const { 'lot.json': own, ...others } = hashes(out);
    expect(own).toBeDefined();
    expect(others).toEqual(Object.fromEntries(record.files.map(({ path, sha256 }) => [path, sha256])));
    expect(readdirSync(join(terminal.folder, 'out'))).toEqual(['two-drums']);
    const { out: said, err } = terminal.said;
    expect(err).toBe('');
    expect(Math.max(...said.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(80);
    for (const text of [
      'Two drums\n5 coils of 2 kinds, serials TD-001 to TD-005\n',
      'Wire from the reels\n',
      'To buy\n  - 0.5 mm enamel: ',
      'Written to out/two-drums\n',
      '  kinds/ ',
    ])
      expect(said).toContain(text);
  });

  it('tells a person who watches how far it is, and takes that line away', () => {
    expect(statuses[0]).toBe('kinds: 0 of 2 done');
    expect(statuses.some((text) => /^kinds: 2 of 2 done, /.test(text))).toBe(true);
    expect(statuses.at(-1)).toBe('');
  });

  it('takes standard input, prints the record alone, and carries on what another run finished', async () => {
    const again = workshop(testTerminal(readFileSync(join(terminal.folder, 'drums.yaml'))));
    const orders = counted(1);
    const stopped: typeof load = async () => (lot, options) => makeLot(lot, { ...options, crew: orders.crew });
    await expect(runLot({ file: '-', json: true, out: 'here' }, again, version, stopped)).rejects.toThrow('lights');
    expect(readdirSync(again.folder).filter((name) => name.includes('coilwright'))).toEqual(['.here.coilwright-work']);
    await runLot({ file: '-', json: true, out: 'here' }, again, version, load);
    expect(readdirSync(again.folder).filter((name) => name.includes('coilwright'))).toEqual([]);
    expect(hashes(join(again.folder, 'here'))).toEqual(hashes(join(terminal.folder, 'out', 'two-drums')));
    expect(JSON.parse(again.said.out)).toEqual(
      JSON.parse(readFileSync(join(again.folder, 'here', 'lot.json'), 'utf8')),
    );
  });

  it('that cannot be leaves nothing behind', async () => {
    const mine = workshop();
    writeFileSync(join(mine.folder, 'lot.yaml'), smallText([['never.yaml', 1]]));
    const error = await runLot({ file: 'lot.yaml', json: false }, mine, version, load).catch((reason) => reason);
    expect(error).toBeInstanceOf(Fault);
    expect(error.exit).toBe(4);
    expect(error.faults[0].place).toMatchObject({ file: 'never.yaml', key: 'former.longest' });
    expect(existsSync(join(mine.folder, 'out')) ? readdirSync(join(mine.folder, 'out')) : []).toEqual([]);
  });

  it('refuses a lot whose jobs are not there, before anything is made', async () => {
    const mine = workshop();
    writeFileSync(join(mine.folder, 'lot.yaml'), smallText([['drun.yaml', 1]]));
    expect(await command(['lot', 'lot.yaml'], mine)).toMatchObject({
      exit: 3,
      out: '',
      err: `coilwright: drun.yaml
  got       no file of this name; named in lot.yaml, line 1
  expected  a job file in YAML or JSON
  to do     did you mean drum.yaml?
`,
    });
    expect(await command(['lot', 'lots.yaml'], mine)).toMatchObject({
      exit: 3,
      out: '',
      err: `coilwright: lots.yaml
  got       no file of this name
  expected  a lot file in YAML, JSON or CSV
  to do     did you mean lot.yaml?
`,
    });
    expect(await command(['lot'], mine)).toMatchObject({
      exit: 2,
      out: '',
      err: `coilwright: not a command
  got       lot without a lot
  expected  coilwright lot LOT, a file in YAML, JSON or CSV, or - for standard
            input
  to do     name the lot file; "coilwright start saltmarsh-lot" writes one to
            begin with
`,
    });
  });
});

describe('how far a run is', () => {
  it('is told with an estimate once something was made', () => {
    const kinds = { stage: 'kinds', of: 20 } as const;
    expect(progressText({ ...kinds, done: 0, found: 0 }, 500)).toBe('kinds: 0 of 20 done');
    expect(progressText({ ...kinds, done: 7, found: 7 }, 500)).toBe('kinds: 7 of 20 done, 7 found finished');
    // Ten made in 20 s: ten more as long, and papers and beds a third of all twenty.
    expect(progressText({ ...kinds, done: 10, found: 0 }, 20_000)).toBe('kinds: 10 of 20 done, about 35 s left');
    expect(progressText({ ...kinds, done: 2, found: 0 }, 40_000)).toBe('kinds: 2 of 20 done, about 8 min left');
    const last = { stage: 'beds and papers', of: 8, done: 7, found: 0 } as const;
    expect(progressText(last, 8_000)).toBe('beds and papers: 7 of 8 done, a few seconds left');
  });

  it('is not told where nobody watches', () => {
    const { tell, end } = lotProgress(undefined, () => {
      throw new Error('the clock was asked');
    });
    tell({ stage: 'kinds', done: 1, of: 2, found: 0 });
    end();
  });

  it('writes over what it wrote, within the page', () => {
    let line = '';
    const status = statusLine((text) => {
      line += text;
    }, 12);
    status('as long as it likes');
    status('short');
    status('');
    expect(line).toBe('\ras long as \rshort      \r     \r');
  });
});
