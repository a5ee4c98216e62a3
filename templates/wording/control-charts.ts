/** The fixed words of the control charts. */
import type { Chart } from '../../src/prove/charts-schema.ts';

const many = (count: number, one: string, more: string) => `${count} ${count === 1 ? one : more}`;

export const CONTROL = {
  document: 'Control chart',
  title: 'Control charts',
  sheet: (n: number, of: number) => `sheet ${n} of ${of}`,
  coils: (count: number, from: string, to: string) => `${count} coils, ${from} to ${to}`,
  what: {
    diameter: 'Diameter of the former, mm',
    length: 'Length over 20 turns, mm',
    where: (tap: number, whole: boolean) => (whole ? 'Whole coil' : `Tap ${tap}`),
    inductance: (where: string, nominal: string, kHz: string) =>
      `${where}: inductance at ${kHz} kHz, deviation from ${nominal} µH in %`,
    resonance: (where: string, nominal: string, pf: string) =>
      `${where}: resonance with ${pf} pF, deviation from ${nominal} kHz in %`,
  },
  line: {
    upper: (figure: string) => `limit ${figure}`,
    lower: (figure: string) => `limit ${figure}`,
    centre: (figure: string) => `mean ${figure}`,
    recordHigh: (figure: string) => `record ${figure}`,
    recordLow: (figure: string) => `record ${figure}`,
    above: (text: string) => `${text} ↑`,
    below: (text: string) => `${text} ↓`,
  },
  ranges: 'Moving range: from each coil to the one before',
  value: (serial: string, figure: string) => `${serial}: ${figure}`,
  legend: {
    inside: 'inside the limits',
    run: 'in a run on one side',
    beyond: 'beyond a limit',
    outlier: 'does not belong to the rest',
    off: 'off the picture',
    control: 'control limit',
    record: 'limit of the record',
  },
  inControl: 'In control.',
  notInControl: (signs: string) => `Not in control: ${signs}.`,
  beyondCount: (count: number) => `${count} beyond the limits`,
  runCount: (count: number, length: number) =>
    `${many(count, 'run', 'runs')} of ${length} or more on one side of the mean`,
  and: (texts: readonly string[]) => texts.join(' and '),
  beyond: (serials: string) => `Beyond the limits: ${serials}.`,
  runs: (stretches: string) => `In a row on one side: ${stretches}.`,
  stretch: (from: string, to: string) => `${from} to ${to}`,
  more: (count: number) => `${count} more`,
  chance: (percent: string, count: number) =>
    `By chance alone ${percent} of 100 charts of ${count} coils that are made alike show a value beyond the limits or a run.`,
  few: (count: number, from: number) =>
    `${count} coils: the limits are preliminary, they settle from about ${from} coils on.`,
  outliers: (serials: string, suspected: number, alpha: string) =>
    `Does not belong to the rest: ${serials} (extreme studentized deviates, ISO 16269-4, up to ${many(suspected, 'outlier', 'outliers')} looked for, ${alpha} % false alarms).`,
  noOutliers: (suspected: number, alpha: string) =>
    `All belong together (extreme studentized deviates, ISO 16269-4, up to ${many(suspected, 'outlier', 'outliers')} looked for, ${alpha} % false alarms).`,
  leftOut: (serials: string) => `Left out, measured at another frequency: ${serials}.`,
  rule: 'Limits: mean ± 3 × mean moving range / 1.128; of the ranges 3.267 × their mean (ISO 7870-2), without those that do not belong. Runs as in ASTM E2587.',
  capability: (cp: string, cpLimits: string, cpk: string, cpkLimits: string) =>
    `Cp ${cp} (${cpLimits}), Cpk ${cpk} (${cpkLimits})`,
  between: (low: string, high: string) => `${low} to ${high}`,
  capabilityHow: (coils: number, s: string) =>
    `Against the limits of the record (ISO 22514-2), ${coils} coils, standard deviation ${s}; in brackets the 95 % limits.`,
  none: {
    'few coils': (count: number, from: number) => `No capability from ${count} coils: it is told from ${from} on.`,
    'not in control': () => 'No capability: it is told of a process in control only.',
    'no limits': () => 'No capability: the record has no limits for this.',
    'no spread': () => 'No capability: all readings are the same; read with more digits.',
  } satisfies Record<NonNullable<Chart['noCapability']>, (count: number, from: number) => string>,
} as const;
