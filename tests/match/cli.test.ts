import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
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
  it('writes what plan writes and old against new, and says both', async () => {
    const terminal = testTerminal(SMALL, 100);
    const { exit, out, err, folder } = await command(['match', '-'], terminal);
    expect([exit, err]).toEqual([0, '']);
    const files = readdirSync(join(folder, 'out', 'small-old-coil'));
    for (const wanted of [
      'plan.json',
      'winding-sheet.pdf',
      'comparison-sheet.pdf',
      'reference-sheet.pdf',
      'wrap-template.pdf',
    ])
      expect(files).toContain(wanted);
    const record = recordSchema.parse(
      JSON.parse(readFileSync(join(folder, 'out', 'small-old-coil', 'plan.json'), 'utf8')),
    );
    expect(record.verb).toBe('match');
    expect(record.matched!.old.taps.map(({ turn }) => turn)).toEqual([10, 20, 40]);
    for (const wanted of ['The old coil', 'Old against new', 'Both ways', 'The coil', 'comparison-sheet.pdf'])
      expect(out).toContain(wanted);
    const rows = out.split('\n').map((line) => line.trim().split(/\s+/));
    let compared = 0;
    for (const one of record.matched!.comparison) {
      const row = rows.find((cells) => cells[0] === `${one.tap}` && cells[1] === `${one.oldTurn}` && cells.length > 8)!;
      expect(Math.abs(Number(row[3]) / one.oldWorkingUh - 1)).toBeLessThan(1e-3);
      expect(Math.abs(Number(row[4]) / one.newWorkingUh - 1)).toBeLessThan(1e-3);
      compared++;
    }
    expect(compared).toBe(3);
    for (const line of out.split('\n')) expect(line.length).toBeLessThanOrEqual(100);
    // The same file a second time: the folder is replaced, the same bytes come out.
    const before = readFileSync(join(folder, 'out', 'small-old-coil', 'comparison-sheet.pdf'));
    writeFileSync(join(folder, 'old.yaml'), SMALL);
    const again = await command(['match', 'old.yaml', '--json'], terminal);
    expect([again.exit, again.err]).toEqual([0, '']);
    expect(JSON.parse(again.out).hash).toBe(record.hash);
    expect(readFileSync(join(folder, 'out', 'small-old-coil', 'comparison-sheet.pdf')).equals(before)).toBe(true);
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
