/** The netlist of a set in a general circuit simulator: its tuning, its response from the aerial to the detector, against the table's circuit. */
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type Contact, gainAt, tunedTo } from '../../src/around/response.ts';
import { portsOf } from '../../src/around/table.ts';
import { setNetlistOf } from '../../src/netlist/set.ts';
import { setOf } from '../../src/record/around-arrangement.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { peakOf } from '../helpers/peak.ts';

export interface Look {
  readonly position: number;
  readonly kHz: number;
  readonly aerial: Contact;
  readonly detector: Contact;
  /** What the record's table says; null where the look is not one of its rows. */
  readonly bandwidthKhz: number | null;
}

/** Relative errors of the simulator against us; null of what is not there on either side. */
export interface LookOutcome {
  readonly q: number;
  /** Where the susceptance at the hot end is 0, and frequency over Q by its slope there. */
  readonly resonance: number;
  readonly width: number;
  /** The latter against the row of the table, three digits. */
  readonly rowWidth: number | null;
  /** Voltage at the detector: its peak, and its width at 0.707. */
  readonly peak: number | null;
  readonly peakWidth: number | null;
  readonly gain: number;
  /** The same peak and width against tuning and bandwidth, which are those of one circuit by itself: the rest of the arrangement pulls them. */
  readonly pulled: number | null;
  readonly pulledWidth: number | null;
}

/** What is demanded; the gain besides. */
export const SWEEP_AGREES = { resonance: 1e-3, width: 2e-2, gain: 1e-2 } as const;

/** Points of a sweep; bandwidths that the response is swept either way; share of the frequency that the tuning is. */
const POINTS = 801;
const REACH = 5;
const NEAR = 0.01;

interface Sweep {
  readonly kHz: number[];
  readonly volts: readonly (readonly [re: number, im: number])[];
}

/** Two sweeps of one circuit: one volt at the aerial, then one ampere into the hot end. */
function sweeps(text: string, kHz: number, reach: number): { detector: Sweep; hot: Sweep } {
  const folder = mkdtempSync(join(tmpdir(), 'set-'));
  try {
    const hot = /^Ctune (\S+) /m.exec(text)![1]!;
    const [a, b] = ['aerial.txt', 'hot.txt'].map((name) => join(folder, name)) as [string, string];
    const over = (share: number) => `ac lin ${POINTS} ${(kHz - share) * 1e3} ${(kHz + share) * 1e3}`;
    const control = [
      `Iprobe 0 ${hot} DC 0 AC 0`,
      '.control',
      'set wr_singlescale',
      'set numdgt=12',
      over(reach),
      `wrdata ${a} v(det)`,
      'alter @vsource[acmag] = 0',
      'alter @iprobe[acmag] = 1',
      over(NEAR * kHz),
      `wrdata ${b} v(${hot})`,
      '.endc',
      '.end',
    ];
    const file = join(folder, 'set.cir');
    const cards = text.replace(/^\.(ac|meas|end|save).*\n/gm, '');
    writeFileSync(file, `${cards}${control.join('\n')}\n`);
    const { stdout, stderr } = spawnSync('ngspice', ['-b', file], { encoding: 'utf8' });
    const rows = (path: string): Sweep => {
      const lines = existsSync(path) ? readFileSync(path, 'utf8').trim().split('\n') : [];
      if (lines.length !== POINTS)
        throw new Error(`the simulator wrote ${lines.length} points: ${stdout}${stderr}`.slice(0, 2000));
      const numbers = lines.map((line) => line.trim().split(/\s+/).map(Number));
      return { kHz: numbers.map(([hertz]) => hertz! / 1e3), volts: numbers.map(([, re, im]) => [re!, im!] as const) };
    };
    return { detector: rows(a), hot: rows(b) };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** A sweep read between its points: by the parabola through the three nearest. */
function between({ kHz, volts }: Sweep) {
  const values = volts.map(([re, im]) => Math.hypot(re, im));
  const step = kHz[1]! - kHz[0]!;
  return (at: number): number => {
    const i = Math.round((at - kHz[0]!) / step);
    if (i < 1 || i > kHz.length - 2) return 0;
    const t = (at - kHz[i]!) / step;
    const [a, b, c] = [values[i - 1]!, values[i]!, values[i + 1]!];
    return b + (t * (c - a)) / 2 + (t * t * (a - 2 * b + c)) / 2;
  };
}

/** Zero of the susceptance nearest to a frequency, and frequency over Q there; null without one. */
function tuningOf({ kHz, volts }: Sweep, near: number): { kHz: number; widthKhz: number } | null {
  const Y = volts.map(([re, im]) => {
    const square = re * re + im * im;
    return { re: re / square, im: -im / square };
  });
  let best: { kHz: number; widthKhz: number } | null = null;
  for (let i = 1; i < Y.length; i++) {
    const [a, b] = [Y[i - 1]!, Y[i]!];
    if (!(a.im < 0 && b.im >= 0)) continue;
    const t = -a.im / (b.im - a.im);
    const at = kHz[i - 1]! + t * (kHz[i]! - kHz[i - 1]!);
    const slope = (b.im - a.im) / (kHz[i]! - kHz[i - 1]!);
    const found = { kHz: at, widthKhz: (2 * (a.re + t * (b.re - a.re))) / slope };
    if (best === null || Math.abs(at - near) < Math.abs(best.kHz - near)) best = found;
  }
  return best;
}

/** Null where the capacitor does not tune the position there, or a contact is on earth. Throws where the simulator has nothing to say. */
export function lookAt(record: CoilRecord, look: Look): LookOutcome | null {
  const { position, kHz, aerial, detector, bandwidthKhz } = look;
  const set = setOf(record);
  const connected = { aerial: { at: aerial, source: set.source }, detector: { at: detector, load: set.load } };
  const ports = portsOf(set, set.coil.taps[position - 1]!, kHz);
  const tuned = tunedTo(ports, connected, kHz);
  if (tuned === null || !(tuned.q >= 5)) return null;
  const ccap = tuned.tuningPf - set.strayPf;
  if (ccap < set.capacitorLowPf || ccap > set.capacitorHighPf) return null;
  const reach = Math.min(0.6 * kHz, Math.max(REACH * tuned.bandwidthKhz, 0.01 * kHz));
  const swept = sweeps(setNetlistOf(record, { position, kHz, aerial, detector }), kHz, reach);
  const found = tuningOf(swept.hot, kHz);
  if (found === null) throw new Error(`no resonance within 1 % of ${kHz} kHz`);
  const simulated = between(swept.detector);
  const ours = peakOf((at) => gainAt(ports, connected, at, tuned.tuningPf), kHz);
  const seen = ours === null || Math.abs(ours.at - kHz) > 0.9 * reach ? null : peakOf(simulated, kHz);
  const off = (one: number, other: number) => Math.abs(one / other - 1);
  const widths = seen !== null && seen.width !== null && ours!.width !== null && ours!.width < reach;
  return {
    q: tuned.q,
    resonance: off(found.kHz, kHz),
    width: off(found.widthKhz, tuned.bandwidthKhz),
    rowWidth: bandwidthKhz === null ? null : off(found.widthKhz, bandwidthKhz),
    peak: seen === null ? null : off(seen.at, ours!.at),
    peakWidth: widths ? off(seen.width!, ours!.width!) : null,
    gain: off(simulated(kHz), tuned.gain),
    pulled: seen === null ? null : off(seen.at, kHz),
    pulledWidth: widths ? off(seen.width!, tuned.bandwidthKhz) : null,
  };
}

/** What of an outcome is further off than is allowed, in words. */
export function faultsOf(look: Look, found: LookOutcome): string[] {
  const { resonance, width, gain } = SWEEP_AGREES;
  const limits: [name: keyof LookOutcome, limit: number][] = [
    ['resonance', resonance],
    ['peak', resonance],
    ['width', width],
    ['rowWidth', width],
    ['peakWidth', width],
    ['gain', gain],
  ];
  const what = `position ${look.position} at ${look.kHz} kHz, aerial ${look.aerial}, detector ${look.detector}, Q ${found.q.toFixed(1)}`;
  return limits.flatMap(([name, limit]) => {
    const value = found[name];
    return value === null || value < limit ? [] : [`${what}: ${name} ${(100 * value).toFixed(3)} % off`];
  });
}
