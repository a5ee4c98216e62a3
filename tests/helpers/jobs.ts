/** Jobs for tests of the planner: texts as a person writes them, and a builder that puts one together. */
import { readFileSync } from 'node:fs';
import type { Job } from '../../src/job/job.ts';
import { readJob } from '../../src/job/read.ts';
import { findWire } from '../../src/stock/find.ts';
import type { Wire } from '../../src/stock/wire.ts';

/** What a job says, section by section, each value as written; a section left out is left to its defaults. */
export interface Parts {
  readonly want: Readonly<Record<string, unknown>>;
  readonly set?: Readonly<Record<string, unknown>>;
  readonly former?: Readonly<Record<string, unknown>>;
  readonly wire?: readonly string[];
  readonly winding?: Readonly<Record<string, unknown>>;
  readonly printer?: Readonly<Record<string, unknown>>;
  readonly prefer?: string;
  readonly at?: string;
}

/** JSON is YAML: one line of text a section would be, with every quantity in its unit. */
export function jobText(parts: Parts): string {
  return JSON.stringify({ job: 'Test coil', ...parts });
}

export function jobOf(parts: Parts): Job {
  return readJob(jobText(parts), 'test.json');
}

export function starterJob(name: string): Job {
  const path = new URL(`../../templates/jobs/${name}.yaml`, import.meta.url);
  return readJob(readFileSync(path, 'utf8'), `${name}.yaml`);
}

export const STARTERS = ['low-bench-receiver', 'cracked-form-replacement', 'forty-coil-lot'] as const;

export const FOUR_WIRES = ['24 AWG enamel', '0.5 mm enamel', '22 AWG double cotton', '20 x 0.1 mm litz single silk'];

/** An inductance range on a printed former of one diameter. */
export const RANGE: Parts = {
  want: { inductance: '20 uH to 240 uH', taps: 12, spacing: 'even ratio' },
  former: { 'outside-diameter': '76 mm', longest: '140 mm', kind: 'printed' },
  wire: FOUR_WIRES,
};

/** A band with its set, on a printed former whose diameter may be chosen. */
export const BAND: Parts = {
  want: { band: '530 kHz to 1700 kHz', overlap: '5 %' },
  set: { capacitor: '15 pF to 380 pF', stray: '12 pF', aerial: '60 pF', switch: 'open' },
  former: { 'outside-diameter': '70 mm to 82 mm', longest: '140 mm', kind: 'printed' },
  wire: FOUR_WIRES,
};

/** A list of inductances on a bought tube. */
export const TUBE: Parts = {
  want: { inductance: ['14.5 uH', '31 uH', '58 uH', '96 uH', '142 uH', '205 uH'] },
  former: { 'outside-diameter': '3 in', longest: '5 1/2 in', kind: 'tube' },
  wire: ['24 AWG double cotton', '26 AWG enamel', '28 AWG enamel'],
};

/** The same parts with some keys of one section changed. */
export function change(parts: Parts, section: keyof Parts, keys: Readonly<Record<string, unknown>>): Parts {
  const before = parts[section];
  const held = typeof before === 'object' && !Array.isArray(before) ? before : {};
  return { ...parts, [section]: { ...held, ...keys } };
}

export function wireOf(name: string): Wire {
  const found = findWire(name);
  if (!found.ok) throw new Error(`no wire ${name}`);
  return found.wire;
}

/** A fixed stream of numbers in (0, 1): Lehmer's generator, modulus 2^31 - 1. */
export function stream(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return state / 2147483647;
  };
}
