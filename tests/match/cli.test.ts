import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { type LoadMatcher, runMatch } from '../../cli/match.ts';
import { matchRecordOf } from '../../src/match.ts';
import { listed } from '../../src/record/listing.ts';
import { recordSchema } from '../../src/record/schema.ts';
import { command, testTerminal } from '../cli/terminal.ts';

/** Small, on a tube: quick to make. */
const SMALL = `job: Small old coil
old:
  former-diameter: 40 mm
  wire: { bare: 0.4 mm, overall: 0.45 mm, covering: enamel }
  turns: 40
  winding-length: 18.85 mm
  taps: [10, { position: 9.2 mm }]
former: { kind: tube, outside-diameter: 40 mm, longest: 60 mm }
parts: [saddle]
`;

describe('match', () => {
  it('writes the folder, and says of the old coil and of the new one what the record holds', async () => {
    const terminal = testTerminal(SMALL, 100);
    // Without the parts, whose threads run only when the program is built; see built.test.ts.
    const load: LoadMatcher = async () => async (file, options) => listed(matchRecordOf(file, options.version), []);
    await runMatch({ coil: '-', json: false }, terminal, '9.9.9', load);
    const { out } = terminal.said;
    const path = join(terminal.folder, 'out', 'small-old-coil', 'plan.json');
    const record = recordSchema.parse(JSON.parse(readFileSync(path, 'utf8')));
    expect(record.verb).toBe('match');
    expect(record.matched!.old.taps.map(({ turn }) => turn)).toEqual([10, 20, 40]);
    for (const wanted of ['The old coil', 'Old against new', 'Both ways', 'The coil']) expect(out).toContain(wanted);
    const rows = out.split('\n').map((line) => line.trim().split(/\s+/));
    let compared = 0;
    for (const one of record.matched!.comparison) {
      const row = rows.find(
        (cells) =>
          cells[1] === `${one.oldTurn}` && cells[2] === `${Number(one.newTurn.toFixed(3))}` && cells.length > 8,
      )!;
      expect(Math.abs(Number(row[3]) / one.oldWorkingUh - 1)).toBeLessThan(1e-3);
      expect(Math.abs(Number(row[4]) / one.newWorkingUh - 1)).toBeLessThan(1e-3);
      compared++;
    }
    expect(compared).toBe(3);
    for (const line of out.split('\n')) expect(line.length).toBeLessThanOrEqual(100);
    terminal.said.out = '';
    await runMatch({ coil: '-', json: true }, terminal, '9.9.9', load);
    expect(JSON.parse(terminal.said.out).hash).toBe(record.hash);
  }, 30_000);

  it('refuses with 3 what contradicts itself, with 4 what nothing fits, with 2 what is no command; writes nothing', async () => {
    const contradicting = await command(
      ['match', '-'],
      testTerminal(SMALL.replace('position: 9.2 mm', 'position: 9.2 mm, turns: 26')),
    );
    expect(contradicting.exit).toBe(3);
    expect(contradicting.err).toContain('26 turns do not fit 9.2 mm at the pitch of the others');
    expect(readdirSync(contradicting.folder)).toEqual([]);
    const short = await command(
      ['match', '-', '--json'],
      testTerminal(SMALL.replace('longest: 60 mm', 'longest: 12 mm')),
    );
    expect(short.exit).toBe(4);
    expect(JSON.parse(short.err)).toMatchObject({ exit: 4 });
    const none = await command(['match']);
    expect([none.exit, none.err.includes('coilwright start broken-form')]).toEqual([2, true]);
  }, 30_000);

  it('has a starter and its schema', async () => {
    const listed = await command(['start', '--list']);
    expect(listed.out).toContain('broken-form');
    const { out } = await command(['start', 'broken-form']);
    expect(out).toContain('coilwright match broken-form.yaml');
    const schema = await command(['start', 'broken-form', '--schema', '--out', '-']);
    expect(JSON.parse(schema.out).properties.old.properties.taps).toBeDefined();
  });
});
