/** What must hold between the keys of a wish. Each check names both values. */
import { frequencyText, inductanceText } from '../quantity/format.ts';
import type { Readable } from './checks.ts';
import { type Finding, finding } from './finding.ts';
import { MOST_TAPS, type ReadJob } from './schema.ts';
import type { Path } from './tree.ts';

type Want = ReadJob['want'];

export function checkWant(job: Readable): Finding[] {
  const { want } = job;
  if (want === undefined) return [];
  if (want.band !== undefined) return checkBand(want, 'set' in job);
  const found: Finding[] = [];
  if (want.overlap !== undefined) {
    found.push(
      finding(
        'key-without-band',
        ['want', 'overlap'],
        'an overlap without a band',
        'overlap with want.band only',
        'remove overlap, or ask for a band',
      ),
    );
  }
  if (Array.isArray(want.spacing)) return [...found, ...checkSpacingList(want, want.spacing)];
  if (want.inductance === undefined) {
    found.push(
      finding(
        'no-wish',
        ['want'],
        'neither an inductance nor a band',
        'want.inductance or want.band',
        'add inductance: 20 uH to 240 uH, or band: 530 kHz to 1700 kHz',
      ),
    );
    return found;
  }
  if ('list' in want.inductance)
    return [...found, ...checkList(want.inductance.list, ['want', 'inductance'], want.taps)];
  const { low, high } = want.inductance;
  const span = `${inductanceText(low)} to ${inductanceText(high)}`;
  if (want.taps === undefined) {
    found.push(
      finding(
        'missing-key',
        ['want', 'taps'],
        `the range ${span} without a number of taps`,
        `a whole number from 2 to ${MOST_TAPS}`,
        'add taps: 12',
      ),
    );
  } else if (want.taps < 2) {
    found.push(
      finding(
        'too-few-taps',
        ['want', 'taps'],
        `${want.taps} tap for the range ${span}`,
        'two taps or more: one for each end',
        'raise taps, or write one inductance instead of a range',
      ),
    );
  }
  return found;
}

function checkBand(want: Want, hasSet: boolean): Finding[] {
  const found: Finding[] = [];
  const { low, high } = want.band ?? { low: 0, high: 0 };
  const band = `the band ${frequencyText(low)} to ${frequencyText(high)}`;
  if (want.inductance !== undefined) {
    found.push(
      finding(
        'two-wishes',
        ['want', 'inductance'],
        `an inductance besides ${band}`,
        'one of the two',
        'remove want.inductance or want.band',
      ),
    );
  }
  if (want.spacing !== undefined) {
    found.push(
      finding(
        'key-with-band',
        ['want', 'spacing'],
        `a spacing besides ${band}`,
        'a band, whose positions are spread by their overlap',
        'remove spacing',
      ),
    );
  }
  if (!hasSet) {
    found.push(
      finding(
        'missing-key',
        ['set'],
        `${band} without the set that tunes it`,
        'the key set with a capacitor',
        'add set: { capacitor: 15 pF to 380 pF }',
      ),
    );
  }
  if (want.overlap !== undefined && want.overlap > 0.5) {
    found.push(
      finding(
        'overlap',
        ['want', 'overlap'],
        `an overlap of ${Number((want.overlap * 100).toPrecision(6))} %`,
        'at most 50 %',
        'write 5 % or thereabouts',
      ),
    );
  }
  return found;
}

function checkSpacingList(want: Want, list: readonly number[]): Finding[] {
  const path: Path = ['want', 'spacing'];
  const found = checkList(list, path, want.taps);
  if (want.inductance === undefined) return found;
  if ('list' in want.inductance) {
    found.push(
      finding(
        'two-wishes',
        path,
        'a list of inductances in want.inductance and another here',
        'one of the two',
        'remove one',
      ),
    );
    return found;
  }
  const { low, high } = want.inductance;
  const [first, last] = [list[0], list.at(-1)];
  if (first !== undefined && first !== low) found.push(endDiffers(path, 'first', first, 'lower', low));
  if (last !== undefined && last !== high) found.push(endDiffers(path, 'last', last, 'upper', high));
  return found;
}

function endDiffers(path: Path, which: string, listed: number, end: string, wanted: number): Finding {
  return finding(
    'list-and-range',
    path,
    `${inductanceText(listed)} as the ${which} of the list`,
    `the ${end} end of want.inductance, ${inductanceText(wanted)}`,
    'make the two equal, or leave want.inductance out',
  );
}

function checkList(list: readonly number[], path: Path, taps: number | undefined): Finding[] {
  const found: Finding[] = [];
  list.forEach((value, index) => {
    const before = list[index - 1];
    if (before === undefined || before < value) return;
    const relation = before === value ? 'equal to' : 'below';
    found.push(
      finding(
        'not-ascending',
        [...path, index],
        `${inductanceText(value)}, ${relation} ${inductanceText(before)} before it`,
        'the lowest inductance first, each above the one before',
        'sort the list and remove repeats',
      ),
    );
  });
  if (list.length > MOST_TAPS) {
    found.push(
      finding('too-many-taps', path, `${list.length} inductances`, `at most ${MOST_TAPS}`, 'shorten the list'),
    );
  }
  if (taps !== undefined && taps !== list.length) {
    found.push(
      finding(
        'tap-count',
        ['want', 'taps'],
        `${taps} taps for ${list.length} inductances`,
        'one tap for each inductance',
        `write taps: ${list.length}, or leave it out`,
      ),
    );
  }
  return found;
}

/** Two switches set every whole number of turns, so the wish is a range, whose upper end is the whole coil. */
export function checkUnits({ want, winding }: Readable): Finding[] {
  if (winding?.units === undefined || want === undefined) return [];
  const switches = `two switches (winding.units: ${winding.units})`;
  if (want.spacing !== undefined) {
    return [
      finding(
        'spacing-with-units',
        ['want', 'spacing'],
        `a spacing for ${switches}`,
        `a tens contact every ${winding.units} turns, which two switches have by themselves`,
        'remove spacing, or remove winding.units',
      ),
    ];
  }
  const kind = want.band === undefined ? 'a list of inductances' : 'a band';
  if (want.band === undefined && (want.inductance === undefined || !('list' in want.inductance))) return [];
  return [
    finding(
      'units-without-range',
      ['winding', 'units'],
      `${switches} for ${kind}`,
      'an inductance range, whose upper end is the whole coil',
      'write want.inductance: 5 uH to 240 uH and want.taps, or remove units',
    ),
  ];
}
