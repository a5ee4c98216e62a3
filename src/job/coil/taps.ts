/** Taps of a measured coil by turns or by places, and the frequencies at which its figures hold. */
import { frequencyText, lengthText, percentText, tidy } from '../../quantity/format.ts';
import type { Finding } from '../finding.ts';
import type { MeasuredSection } from './file.ts';
import { at, finding } from './finding.ts';
import { laySections, placeOf, turnAt } from './lay.ts';
import type { ReadCoil } from './schema.ts';

/** Most switch positions of one coil. */
const MOST_TAPS = 60;

/** Turns of the taps, the whole coil last. */
export function tapsOf(coil: ReadCoil, sections: readonly MeasuredSection[], overallMm: number): number[] | Finding[] {
  const laid = laySections(sections, overallMm);
  const positions = coil['tap-positions'];
  if (coil.taps !== undefined && positions !== undefined)
    return [
      finding('two-lists', at('tap-positions'), 'tap-positions besides taps', 'one of the two lists', 'remove one'),
    ];
  const byPlace = positions !== undefined;
  const key = byPlace ? 'tap-positions' : 'taps';
  const written = positions ?? coil.taps ?? [];
  const text = (value: number) => (byPlace ? lengthText(value, 3) : `turn ${tidy(value)}`);
  const end = byPlace ? placeOf(laid, laid.turns) : laid.turns;
  const found: Finding[] = [];
  written.forEach((value, i) => {
    const before = written[i - 1];
    if (before !== undefined && value <= before)
      found.push(
        finding(
          'not-ascending',
          at(key, i),
          `a tap at ${text(value)} behind one at ${text(before)}`,
          'taps from the start on, each farther than the one before',
          'sort the list and remove repeats',
        ),
      );
    // A place is measured to a few tenths; the finish itself may be in the list.
    if (value > end + (byPlace ? laid.pitchMm / 2 : 1e-6))
      found.push(
        finding(
          'tap-beyond-coil',
          at(key, i),
          `a tap at ${text(value)} of a coil of ${byPlace ? lengthText(end, 3) : `${tidy(end)} turns`}`,
          'taps within the coil',
          'check the tap, or the turns of the coil',
        ),
      );
  });
  if (found.length > 0) return found;
  const taps = written
    .map((value) => (byPlace ? turnAt(laid, value) : value))
    .filter((turn) => turn < laid.turns - 0.02);
  if (taps.length >= MOST_TAPS)
    return [
      finding(
        'too-many-taps',
        at(key),
        `${taps.length} taps`,
        `at most ${MOST_TAPS - 1} and the whole coil`,
        'take fewer',
      ),
    ];
  const near = taps[0] !== undefined && taps[0] < 0.25 ? taps[0] : null;
  if (near !== null)
    return [
      finding(
        'tap-at-start',
        at(key, 0),
        `a tap at ${text(written[0]!)}`,
        'a quarter of a turn or more',
        'leave it out',
      ),
    ];
  return [...taps, laid.turns];
}

/** Wire longer than this part of a wavelength no longer carries one current: figures mean nothing there. */
const HALF_WAVE = 0.5;
const LIGHT_M_KHZ = 299_792.458;

/** Whether figures at this frequency mean anything: no current is even along so much wire. */
export function frequencyFault(kHz: number, wireM: number, lowest: number, highest: number): Finding | null {
  if (kHz < lowest || kHz > highest)
    return finding(
      'frequency',
      ['at'],
      frequencyText(kHz),
      `a frequency from ${frequencyText(lowest)} to ${frequencyText(highest)}, for which the figures hold`,
      'check the unit, or choose a frequency in between',
    );
  const share = (wireM * kHz) / LIGHT_M_KHZ;
  if (share <= HALF_WAVE) return null;
  return finding(
    'frequency',
    ['at'],
    `${frequencyText(kHz)} for ${tidy(wireM, 4)} m of wire, ${percentText(share)} of a wavelength of ${tidy(LIGHT_M_KHZ / kHz, 4)} m`,
    `a frequency below ${frequencyText((HALF_WAVE * LIGHT_M_KHZ) / wireM)}: no more than half a wavelength of wire`,
    'choose a lower frequency',
  );
}
