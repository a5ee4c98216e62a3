/** The aerial and the detector that a job states: as planned with, and what must hold between their keys. */
import { capacitanceText, lengthText } from '../../quantity/format.ts';
import { OTHER } from '../../stock/detectors.ts';
import type { Readable } from '../checks.ts';
import { type Finding, finding } from '../finding.ts';
import type { ReadJob } from '../schema.ts';
import type { AERIAL_KINDS } from './aerial-schema.ts';
import type { JobContact } from './contact.ts';

export interface JobAerial {
  readonly kind: (typeof AERIAL_KINDS)[number];
  /** Of a wire; null for others. */
  readonly lengthM: number | null;
  /** Null where the capacitance is stated. */
  readonly heightM: number | null;
  readonly thicknessMm: number | null;
  /** Null: by formula, or the dummy's. */
  readonly capacitancePf: number | null;
  /** Null for the dummy aerial. */
  readonly resistanceOhm: number | null;
  readonly seriesPf: number | null;
  readonly to: JobContact;
}

export interface JobDetector {
  readonly kind: string;
  readonly resistanceKohm: number;
  readonly capacitancePf: number;
  readonly to: Exclude<JobContact, 'second'>;
}

type ReadAerial = NonNullable<ReadJob['aerial']>;
type ReadDetector = NonNullable<ReadJob['detector']>;

export function toAerial(read: ReadAerial | undefined): JobAerial | null {
  if (read === undefined) return null;
  return {
    kind: read.kind,
    lengthM: read.length ?? null,
    heightM: read.height ?? null,
    thicknessMm: read.thickness ?? null,
    capacitancePf: read.capacitance ?? null,
    resistanceOhm: read.resistance ?? null,
    seriesPf: read.series ?? null,
    to: read.to,
  };
}

export function toDetector(read: ReadDetector | undefined): JobDetector | null {
  if (read === undefined) return null;
  const { kind, resistance = 0, capacitance = 0, to } = read;
  return { kind, resistanceKohm: resistance / 1e3, capacitancePf: capacitance, to };
}

/** Keys of an aerial that say nothing of one of its kind, or of one whose capacitance is stated. */
function notOf({ kind, capacitance }: ReadAerial): readonly (keyof ReadAerial)[] {
  if (kind === 'dummy') return ['length', 'height', 'thickness', 'capacitance', 'resistance'];
  if (kind === 'capacitor') return ['length', 'height', 'thickness'];
  return capacitance === undefined ? [] : ['height', 'thickness'];
}

function checkKeys(aerial: ReadAerial): Finding[] {
  const found: Finding[] = [];
  const { kind, length, height, thickness, capacitance } = aerial;
  const wire = kind === 'horizontal wire' || kind === 'vertical wire';
  for (const key of notOf(aerial)) {
    if (aerial[key] === undefined) continue;
    const stated = wire && capacitance !== undefined;
    found.push(
      finding(
        'not-used',
        ['aerial', key],
        stated ? `${key} of a wire whose capacitance is stated` : `${key} for an aerial of kind ${kind}`,
        'keys that belong to it',
        stated
          ? `remove aerial.${key}, or aerial.capacitance`
          : kind === 'dummy'
            ? `remove aerial.${key}, or take kind: ${key === 'capacitance' || key === 'resistance' ? 'capacitor' : 'horizontal wire or vertical wire'}`
            : `remove aerial.${key}, or take kind: horizontal wire or vertical wire`,
      ),
    );
  }
  const lacks = (key: string, what: string, example: string) =>
    found.push(
      finding(
        'missing-key',
        ['aerial', key],
        'nothing: the key is missing',
        `${what}, such as ${example}`,
        `add the key ${key}`,
      ),
    );
  if (kind === 'capacitor' && capacitance === undefined)
    lacks('capacitance', 'the capacitance of the aerial', '150 pF');
  if (!wire) return found;
  if (length === undefined) lacks('length', 'the length of the wire', '20 m');
  if (kind === 'horizontal wire' && height === undefined && capacitance === undefined)
    lacks('height', 'the height of the wire above ground', '8 m');
  if (capacitance !== undefined || thickness === undefined) return found;
  const least = Math.min(
    length ?? Number.POSITIVE_INFINITY,
    kind === 'horizontal wire' ? (height ?? Infinity) : Infinity,
  );
  if (thickness > 100 * least)
    found.push(
      finding(
        'thick-aerial',
        ['aerial', 'thickness'],
        `a wire ${lengthText(thickness)} thick, ${least} m ${least === length ? 'long' : 'above ground'}`,
        `at most a tenth of that, ${lengthText(100 * least)}`,
        'check the units of aerial.thickness, aerial.length and aerial.height',
      ),
    );
  return found;
}

function checkPlace(
  at: 'aerial' | 'detector',
  to: JobContact,
  { second, winding }: Readable,
  hasSecond: boolean,
): Finding[] {
  if (to === 'second' && !hasSecond && second === undefined)
    return [
      finding(
        'no-second',
        [at, 'to'],
        'the aerial on a second winding, and no second winding',
        'a job with second',
        'add second, such as { kind: sleeve, coupling: 0.2 }, or take to: best',
      ),
    ];
  if (to === 'start' && winding?.earthed === 'start')
    return [
      finding(
        'on-earth',
        [at, 'to'],
        `the ${at} on the start, which is earthed`,
        'a tap, or the start of a coil with earthed: finish',
        'take to: best, or a tap such as tap 1',
      ),
    ];
  return [];
}

export function checkAerial(job: Readable): Finding[] {
  const { aerial, detector, set } = job;
  const found: Finding[] = [];
  for (const [at, stated] of [
    ['aerial', aerial],
    ['detector', detector],
  ] as const) {
    if (stated === undefined) continue;
    if (!('set' in job))
      found.push(
        finding(
          'no-set',
          [at],
          `${at === 'aerial' ? 'an aerial' : 'a detector'} without the set that tunes the coil`,
          'a job with set',
          'add set, such as { capacitor: 15 pF to 380 pF }',
        ),
      );
    found.push(...checkPlace(at, stated.to, job, 'second' in job));
  }
  if (aerial !== undefined) {
    found.push(...checkKeys(aerial));
    if (set !== undefined && set.aerial !== 0)
      found.push(
        finding(
          'aerial-twice',
          ['set', 'aerial'],
          `${capacitanceText(set.aerial)} in set.aerial, and an aerial of kind ${aerial.kind}`,
          'one of the two',
          'remove set.aerial: what the aerial does to every position is worked out',
        ),
      );
  }
  if (detector?.kind === OTHER && detector.resistance === undefined)
    found.push(
      finding(
        'missing-key',
        ['detector', 'resistance'],
        'nothing: the key is missing',
        'the resistance of the detector, such as 50 kohm',
        'add the key resistance, or take a kind of the list',
      ),
    );
  return found;
}
