/** What comes out of texts that would break it: every format read back by a reader of its own. */
import { existsSync, mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { toCsv } from '../../src/bench/readings-csv.ts';
import { readCsv, unguarded } from '../../src/csv/read.ts';
import { Fault } from '../../src/fault.ts';
import { readName, slug } from '../../src/job/name.ts';
import { threemfBytes } from '../../src/kernel/threemf.ts';
import { netlistOf } from '../../src/netlist/netlist.ts';
import { writeFolder } from '../../src/output/transaction.ts';
import { holePatternFiles } from '../../src/sheets/hole-pattern.ts';
import { windingSheet } from '../../src/sheets/winding-sheet.ts';
import { testTerminal } from '../cli/terminal.ts';
import { readDxf } from '../helpers/dxf.ts';
import { readPdf } from '../helpers/pdf.ts';
import { sampleRecord } from '../helpers/sample.ts';
import { readThreemf } from '../helpers/threemf.ts';
import { readXml } from '../helpers/xml.ts';
import { HOSTILE } from './mutate.ts';

/** What a job may be called. */
const NAMES = HOSTILE.flatMap((text) => {
  const read = readName(text);
  return read.ok ? [read.value] : [];
});

const textOf = (bytes: Uint8Array) => new TextDecoder('utf-8', { fatal: true }).decode(bytes);

describe('names of a job', () => {
  it('are refused where they steer a terminal, and taken where they are only strange', () => {
    console.log(`hostile texts: ${HOSTILE.length}, of these names that are taken: ${NAMES.length}`);
    expect(NAMES.length).toBeGreaterThan(25);
    expect(HOSTILE.length - NAMES.length).toBeGreaterThan(8);
  });

  it('leave drawings, netlist and beds as they are', () => {
    const filesOf = (job: string) => {
      const [svg, dxf] = ['svg', 'dxf'].map((kind) =>
        textOf(holePatternFiles(sampleRecord({ job })).find((file) => file.kind === kind)!.bytes),
      );
      return { svg: svg!, dxf: dxf!, netlist: netlistOf(sampleRecord({ job })) };
    };
    const shape = (svg: string) => readXml(svg).map(({ name, attributes }) => `${name} ${Object.keys(attributes)}`);
    const cards = (netlist: string) => netlist.split('\n').filter((line) => line !== '' && !line.startsWith('*'));
    const plain = filesOf('Plain');
    const tally = (all: readonly string[]) => new Set(all);
    let read = 0;
    for (const job of NAMES) {
      const { svg, dxf, netlist } = filesOf(job);
      expect(tally(shape(svg)), job).toEqual(tally(shape(plain.svg)));
      const { sections, entities } = readDxf(dxf);
      expect(sections, job).toEqual(readDxf(plain.dxf).sections);
      expect(tally(entities.map(({ type }) => type)), job).toEqual(
        tally(readDxf(plain.dxf).entities.map(({ type }) => type)),
      );
      expect(cards(netlist), job).toEqual(cards(plain.netlist));
      read += 3;
    }
    console.log(`drawings and netlists of hostile names: ${read}`);
    expect(read).toBeGreaterThan(75);
  });

  it('stand in a PDF as text and title', async () => {
    const strange = NAMES.filter((name) => /[<(\\%]/.test(name)).slice(0, 2);
    for (const job of strange) {
      const bytes = await windingSheet(sampleRecord({ job }));
      expect(Buffer.from(bytes).toString('latin1'), job).not.toMatch(
        /\/(?:JS|JavaScript|OpenAction|Launch|EmbeddedFile)\b/,
      );
      const { title, pages } = await readPdf(bytes);
      expect(title).toContain(job);
      expect(pages.length).toBeLessThan(4);
    }
    console.log(`PDF of hostile names: ${strange.length}`);
    expect(strange.length).toBe(2);
  });
});

it('no name breaks the XML of a bed', () => {
  const mesh = {
    vertices: Float32Array.from([0, 0, 0, 9, 0, 0, 0, 9, 0, 0, 0, 9]),
    triangles: Uint32Array.from([0, 2, 1, 0, 1, 3, 0, 3, 2, 1, 2, 3]),
  };
  for (const title of HOSTILE) {
    const item = { object: 'a', name: title, xMm: 1, yMm: 1, turned: false };
    const bed = threemfBytes({ title, objects: [{ id: 'a', name: title, mesh }], items: [item] });
    const { objects, metadata } = readThreemf(bed);
    expect(objects).toHaveLength(1);
    expect(Object.keys(metadata)).toEqual(Object.keys(metadata).filter((key) => /^(?:Title|Application)$/.test(key)));
    if (NAMES.includes(title) && !/[\ufffe\uffff]/.test(title)) expect(metadata.Title).toBe(title);
  }
  console.log(`beds of hostile names: ${HOSTILE.length}`);
});

it('no serial or remark in a table becomes a formula or another cell', () => {
  const row = {
    record: 'ab',
    tap: 1,
    quantity: 'inductance',
    condition: '',
    value: 1,
    unit: 'uH',
    low: null,
    high: null,
    verdict: '',
  };
  const csv = toCsv(HOSTILE.map((text) => ({ ...row, serial: text, remark: text })) as never);
  const { header, rows } = readCsv(csv, { code: 'x', todo: 'x' });
  expect(rows).toHaveLength(HOSTILE.length);
  rows.forEach(({ cells }, i) => {
    expect(cells).toHaveLength(header.cells.length);
    for (const at of [1, header.cells.length - 1]) {
      expect(cells[at]).not.toMatch(/^[=+\-@\t\r]/);
      expect(unguarded(cells[at]!)).toBe(HOSTILE[i]);
    }
  });
  console.log(`rows of hostile texts: ${rows.length}`);
});

describe('the output folder', () => {
  it('of any name lies where it is put, in letters, digits and hyphens', () => {
    for (const text of HOSTILE) expect(slug(text), text).toMatch(/^[a-z0-9](?:[a-z0-9-]{0,58}[a-z0-9])?$/);
    for (const name of ['con', 'NUL', 'com1', '..', '../..']) expect(slug(name)).not.toMatch(/^(?:con|nul|com1)$|\./);
    console.log(`folders: ${HOSTILE.length}`);
  });

  it('takes no path that leads out of it, follows no link, and trusts no list of another hand', async () => {
    const { folder } = testTerminal();
    const outside = join(folder, 'outside');
    mkdirSync(outside);
    writeFileSync(join(outside, 'mine.txt'), 'mine');
    const bytes = new TextEncoder().encode('x');
    const paths = ['../x', '/x', 'a/../../x', '..', '', 'a//b', 'a\\..\\x', '.x', 'a\u0000b'];
    for (const path of paths)
      await expect(writeFolder(join(folder, 'coil'), [{ path, bytes }]), path).rejects.toThrow(
        'not a plain relative path',
      );
    symlinkSync(outside, join(folder, 'linked'));
    await expect(writeFolder(join(folder, 'linked'), [{ path: 'a.txt', bytes }])).rejects.toBeInstanceOf(Fault);
    // A folder that looks like ours, whose record lists what is not, with a link where a file goes.
    const forged = join(folder, 'forged');
    mkdirSync(forged);
    const files = ['../outside/mine.txt', 'sub/mine.txt', 'a.txt'].map((path) => ({ path }));
    writeFileSync(join(forged, 'plan.json'), JSON.stringify({ record: 1, program: 'coilwright 0', files }));
    symlinkSync(outside, join(forged, 'sub'));
    symlinkSync(join(outside, 'mine.txt'), join(forged, 'a.txt'));
    await writeFolder(forged, [
      { path: 'a.txt', bytes },
      { path: 'plan.json', bytes },
    ]);
    expect(readFileSync(join(forged, 'a.txt'), 'utf8')).toBe('x');
    expect(readdirSync(outside)).toEqual(['mine.txt']);
    expect(readFileSync(join(outside, 'mine.txt'), 'utf8')).toBe('mine');
    expect(existsSync(join(folder, 'x'))).toBe(false);
    console.log(`paths that lead out: ${paths.length}`);
  });
});
