/** A general circuit simulator, where it is installed, on the netlist of a measured coil. */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { readCoilFile } from '../../src/job/coil-file.ts';
import { netlistOf } from '../../src/netlist/netlist.ts';
import { surveyRecordOf } from '../../src/survey.ts';
import { checkNetlist } from '../outside/ngspice.mjs';
import type { Measures } from './measures.ts';

const run = (args: string[]) => spawnSync('ngspice', args, { encoding: 'utf8' });

/** Whether a program that a case needs is there. */
export const present = (program: string): boolean => spawnSync(program, ['--version']).error === undefined;

const COIL = `
coil: { former-diameter: 76.2 mm, wire: { bare: 0.5 mm, overall: 0.56 mm }, turns: 100, pitch: 0.6 mm, taps: [20, 40, 60, 80] }
set: { capacitor: 15 pF to 380 pF, stray: 12 pF, aerial: 60 pF, switch: open }
`;

/** Largest error over both ends of every position, both distributions of the self-capacitance. */
function resonances(): number[] {
  const folder = mkdtempSync(join(tmpdir(), 'ledger-'));
  try {
    const record = surveyRecordOf(readCoilFile(COIL, 'coil.yaml'), '0');
    const file = join(folder, 'coil.cir');
    writeFileSync(file, netlistOf(record));
    const worst: number = checkNetlist(
      file,
      record,
      (path: string) => {
        const { stdout, stderr } = run(['-b', path]);
        return stdout + stderr;
      },
      () => undefined,
    );
    return [worst];
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

export const SIMULATOR: Measures = { 'ngspice-resonances': resonances };
