/** A small lot for tests of the pipeline: two tubes of three taps, nothing printed. */
import { createHash } from 'node:crypto';
import { lstatSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readLot } from '../../src/job/lot-file.ts';
import { type Crew, unitOf } from '../../src/lot/crew.ts';
import { carryOut, type LotOrder } from '../../src/lot/orders.ts';
import type { Lot } from '../../src/lot/types.ts';

export const SMALL_JOBS: Readonly<Record<string, string>> = {
  'drum.yaml':
    'job: Small drum\nwant: { inductance: 20 uH to 60 uH, taps: 3 }\nwire: 0.5 mm enamel\n' +
    'former: { kind: tube, outside-diameter: 50 mm, longest: 120 mm, material: card }\n',
  // The same coil as a person might write it for another lot.
  'again.yaml':
    '# found in the drawer\njob: Small drum\nformer:\n  kind: tube\n  material: card\n  outside-diameter: 5 cm\n' +
    '  longest: 12 cm\nwire: [0.5 mm enamel]\nwant: { taps: 3, inductance: 20 uH to 60 uH }\n',
  'second.yaml':
    'job: Second drum\nwant: { inductance: 20 uH to 60 uH, taps: 3 }\nwire: 0.5 mm enamel\n' +
    'former: { kind: tube, outside-diameter: 40 mm, longest: 120 mm, material: card }\n',
  'never.yaml':
    'job: Never\nwant: { inductance: 20 uH to 60 uH, taps: 3 }\nwire: 0.5 mm enamel\n' +
    'former: { kind: tube, outside-diameter: 40 mm, longest: 20 mm, material: card }\n',
  'nor-this.yaml':
    'job: Nor this\nwant: { inductance: 20 uH to 60 uH, taps: 3 }\nwire: 0.5 mm enamel\n' +
    'former: { kind: tube, outside-diameter: 40 mm, longest: 15 mm, material: card }\n',
};

/** Reels: the first serves three coils, so that two are short of wire. */
export function smallText(jobs: readonly (readonly [path: string, quantity: number])[]): string {
  return JSON.stringify({
    lot: 'Two drums',
    coils: jobs.map(([job, quantity]) => ({ job, quantity })),
    spools: [{ name: 'Reel 1', wire: '0.5 mm enamel', left: '30 m' }],
    jigs: 'none',
  });
}

export function smallLot(...jobs: (readonly [path: string, quantity: number])[]): Promise<Lot> {
  return readLot(smallText(jobs), 'lot.json', (path) => SMALL_JOBS[path] ?? '');
}

export interface Counted {
  readonly crew: () => Crew;
  readonly orders: LotOrder[];
}

/** Carries out orders in this thread and counts them; from the order `failsAt` on it fails. */
export function counted(failsAt = Number.POSITIVE_INFINITY): Counted {
  const orders: LotOrder[] = [];
  const unit = async (order: LotOrder) => {
    if (orders.length >= failsAt) throw new Error('the lights went out');
    orders.push(order);
    return unitOf(await carryOut(order));
  };
  return { orders, crew: () => ({ unit, close: async () => undefined }) };
}

export const digest = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

/** Every file below a folder with the hash of its bytes; anything that is no file as what it is. */
export function hashes(folder: string, prefix = ''): Record<string, string> {
  const found: Record<string, string> = {};
  for (const name of readdirSync(folder).sort()) {
    const path = join(folder, name);
    const kind = lstatSync(path);
    if (kind.isDirectory()) Object.assign(found, hashes(path, `${prefix}${name}/`));
    else found[prefix + name] = kind.isFile() ? digest(readFileSync(path)) : 'neither file nor folder';
  }
  return found;
}
