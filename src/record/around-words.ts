/** What the record says of aerial, detector and their contacts, in words. */
import { signed } from '../quantity/decimals.ts';
import { frequencyText, tidy } from '../quantity/format.ts';
import type { AerialAt, BestEntry } from './around-schema.ts';

export const contactText = (at: AerialAt): string =>
  at === null ? 'no aerial' : at === 'second' ? 'the second winding' : at === 0 ? 'the start' : `tap ${at}`;

export const AERIAL_SOURCE = {
  wire: 'by an even charge on the wire and its image in the ground (Howe 1914, Grover 1928, from memory), 0 to 1.5 % low; the lead down to the set is not in it and adds about 6 pF a metre',
  measured: 'as stated in the job',
  dummy:
    'the standard dummy aerial (Institute of Radio Engineers 1948, from memory): 200 pF and 20 µH, across which are 400 pF and 400 Ω',
  inductance: 'inductance: a third of that of the wire as a line (Zenneck 1905, from memory)',
  resistance: (stated: boolean) =>
    stated ? 'resistance as stated in the job' : 'resistance of a fair earth: common practice, 10 to 50 Ω are met with',
} as const;

export const DETECTOR_SOURCE = {
  typical: (status: string) => `typical of the kind: ${status}; specimens differ by a factor of two or three`,
  stated: 'as stated in the job',
  half: (status: string) => `as stated in the job, the rest typical of the kind: ${status}`,
} as const;

export const AROUND_NOTES = {
  noAerial:
    'The job has no aerial: output is told for one that is coupled as loosely as can be to the hot end, and what it would do to the coil is not counted.',
  noDetector: 'The job has no detector: one of 1 MΩ is taken, which draws next to nothing.',
  ends: 'The figures take P1 of the second winding to the aerial and P2 to earth.',
  slides: 'The second winding is counted at its tightest place.',
  short: (tuned: number, all: number, from: string, to: string) =>
    `No pair of contacts tunes all ${all} frequencies from ${from} to ${to} with both on turns in use; the best tune ${tuned}. A smaller capacitor in series with the aerial (aerial.series), or a looser place for it, pulls the coil less.`,
  none: 'No pair of contacts tunes any of these frequencies with both on turns in use: the aerial is too large for the coil. Put a capacitor in series with it (aerial.series).',
  quarter: (from: string) =>
    `From ${from} on, 0.6 of its quarter wave, the wire is no longer a capacitor with an inductance: figures above that are a guide only.`,
  weak: (mostQ: string) => `The loaded Q is ${mostQ} at best: aerial or detector takes nearly all the power there is.`,
} as const;

/** Means of one pair as the texts tell them. */
interface Told {
  readonly outputDb: number;
  readonly off9Db: number;
  /** At the frequency in the middle. */
  readonly kHz: number;
  readonly q: number;
  readonly bandwidthKhz: number;
  readonly coilQ: number;
}

const db = (value: number) => `${signed(value, 1).replace('+', '')} dB`;

/** Why a pair is the best for a use, with its figures; `strongest` is what it is measured against. */
export function whyBest(use: BestEntry['use'], told: Told, strongest: Told): string {
  const { outputDb, off9Db, kHz, q, bandwidthKhz, coilQ } = told;
  const below = strongest.outputDb - outputDb;
  const first = {
    strongest: 'The most power into the detector, by the mean over the band',
    'most selective': `Leaves the least of a channel 9 kHz off of those at most 12 dB below the strongest; ${below < 0.05 ? 'as strong as that' : `${db(below)} below it`}`,
    balanced: `The most output for what it leaves of a channel 9 kHz off, a decibel of the one worth one of the other; ${below < 0.05 ? 'as strong as the strongest' : `${db(below)} below the strongest`}`,
  }[use];
  return `${first}. A channel 9 kHz off is left at ${db(off9Db)} (mean). At ${frequencyText(kHz)} loaded Q ${tidy(q, 3)} where the coil alone has ${tidy(coilQ, 3)}, bandwidth ${tidy(bandwidthKhz, 3)} kHz.`;
}
