import { readdirSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { command, testTerminal } from './terminal.ts';

const COIL = `coil: { former-diameter: 76.2 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 100, pitch: 0.6 mm, taps: [20, 40] }
set: { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, switch: open }
`;
const explained = (...words: string[]) => command(['survey', '-', ...words], testTerminal(COIL));

describe('--explain', () => {
  test('follows what the verb says', async () => {
    const { exit, out } = await explained('--explain', '2');
    expect(exit).toBe(0);
    expect(out).toContain('\n\nTap 2 of ');
    expect(out.indexOf('Tap 2 of ')).toBeGreaterThan(200);
    for (const word of ['formula', 'source', 'from', 'by way of', 'holds for', 'error'])
      expect(out).toContain(`\n${word} `);
    expect(Math.max(...out.split('\n').map((line) => line.length))).toBeLessThanOrEqual(80);
  });

  test('with --json is the explanation alone', async () => {
    const { exit, out } = await explained('--explain', '3', '--json');
    expect(exit).toBe(0);
    const { tap, turn, figures } = JSON.parse(out);
    expect([tap, turn]).toEqual([3, 100]);
    expect(figures.length).toBeGreaterThan(10);
  });

  test('of a tap that is not there is wrong use, and nothing is written', async () => {
    const { exit, out, err, folder } = await explained('--explain', '4', '--out', 'coil');
    expect([exit, out]).toEqual([2, '']);
    expect(err).toContain('one of the taps 1, 2, 3');
    expect(readdirSync(folder)).toEqual([]);
  });
});
