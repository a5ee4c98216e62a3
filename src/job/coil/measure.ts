/** What a coil file measured, turned into the winding it means; and what cannot be, each fault naming both numbers. */
import { lengthText, tidy } from '../../quantity/format.ts';
import type { Wire } from '../../stock/wire.ts';
import type { Finding } from '../finding.ts';
import type { Path } from '../tree.ts';
import type { MeasuredSection } from './file.ts';
import { at, finding } from './finding.ts';
import { MOST_TURNS, type ReadCoil, type ReadSection } from './schema.ts';

/** Which of two or more keys for one quantity are there. */
const there = (coil: ReadCoil, keys: readonly (keyof ReadCoil)[]) => keys.filter((key) => coil[key] !== undefined);

export interface Diameters {
  readonly meanMm: number;
  readonly formerMm: number;
}

const DIAMETERS = ['former-diameter', 'over-wire-diameter', 'mean-diameter'] as const;

/** One of the three diameters to the two that are used. A wire thicker than half the former is refused. */
export function diametersOf(coil: ReadCoil, overallMm: number): Diameters | Finding {
  const [key, second] = there(coil, DIAMETERS) as (typeof DIAMETERS)[number][];
  if (key === undefined)
    return finding(
      'missing-key',
      at(),
      'a coil without a diameter',
      'one of: former-diameter, over-wire-diameter, mean-diameter',
      'add former-diameter: 76.2 mm, or the one that was measured',
    );
  const written = coil[key]!;
  if (second !== undefined)
    return finding(
      'two-diameters',
      at(second),
      `${second} ${lengthText(coil[second]!, 3)} besides ${key} ${lengthText(written, 3)}`,
      'one diameter',
      'keep the one that was measured best',
    );
  const formerMm =
    written - { 'former-diameter': 0, 'over-wire-diameter': 2 * overallMm, 'mean-diameter': overallMm }[key];
  if (formerMm < 2 * overallMm)
    return finding(
      'wire-too-thick',
      at(key),
      `wire of ${lengthText(overallMm, 3)} on a former of ${lengthText(Math.max(0, formerMm), 3)}`,
      `a wire no thicker than half the former, ${lengthText(Math.max(0, formerMm) / 2, 3)}`,
      'check both diameters and their units',
    );
  return { meanMm: formerMm + overallMm, formerMm };
}

/** Closer than this, relative to the covering, is no longer a slip of the measurement but cannot be. */
const slack = (wire: Wire) => (/cotton|silk/.test(wire.covering) ? 0.1 : 0.03);

/** Least pitch at which this wire can lie; bare copper never touches. */
const leastPitch = (wire: Wire) => Math.max(wire.overallMm * (1 - slack(wire)), wire.bareMm * 1.0001);

function pitchFault(wire: Wire, pitchMm: number, path: Path, written: string): Finding | null {
  if (pitchMm >= leastPitch(wire)) return null;
  const bare = pitchMm <= wire.bareMm * 1.0001 && wire.overallMm - wire.bareMm < 1e-6;
  return finding(
    'pitch-below-wire',
    path,
    `${written} for wire of ${lengthText(wire.overallMm, 3)}`,
    bare
      ? 'a pitch above the bare wire, whose turns must not touch'
      : 'a pitch no less than the wire over its covering',
    'measure over many turns and divide; check the diameter of the wire',
  );
}

export interface Winding {
  readonly sections: readonly MeasuredSection[];
  readonly inferred: Readonly<Record<string, string>>;
}

const EVEN = ['pitch', 'turns-per-inch', 'turns-per-cm'] as const;

/** Turns and pitch of the winding, from sections or from what was measured of the whole. */
export function windingOf(coil: ReadCoil, wire: Wire): Winding | Finding[] {
  return coil.sections === undefined ? evenWinding(coil, wire) : sectioned(coil, coil.sections, wire);
}

function pitchOf(coil: ReadCoil): { key: (typeof EVEN)[number]; mm: number; text: string } | Finding | null {
  const [key, second] = there(coil, EVEN) as (typeof EVEN)[number][];
  if (key === undefined) return null;
  const value = (one: (typeof EVEN)[number]) =>
    one === 'pitch' ? `a pitch of ${lengthText(coil[one]!, 4)}` : `${tidy(coil[one]!)} ${one.replaceAll('-', ' ')}`;
  if (second !== undefined)
    return finding('two-pitches', at(second), `${value(second)} besides ${value(key)}`, 'one of the two', 'remove one');
  const written = coil[key]!;
  const mm = { pitch: written, 'turns-per-inch': 25.4 / written, 'turns-per-cm': 10 / written }[key];
  return { key, mm, text: key === 'pitch' ? value(key) : `${value(key)}, a pitch of ${lengthText(mm, 4)},` };
}

function evenWinding(coil: ReadCoil, wire: Wire): Winding | Finding[] {
  const length = coil['winding-length'];
  const pitch = pitchOf(coil);
  if (pitch !== null && 'code' in pitch) return [pitch];
  const { turns } = coil;
  const even = (count: number, pitchMm: number, inferred: Record<string, string> = {}): Winding => ({
    sections: [{ turns: count, pitchMm, gapAfterMm: 0 }],
    inferred,
  });
  if (pitch !== null) {
    const fault = pitchFault(wire, pitch.mm, at(pitch.key), pitch.text);
    if (fault !== null) return [fault];
  }
  if (turns === undefined) {
    if (pitch === null || length === undefined)
      return [
        finding(
          'missing-key',
          at(),
          'a coil without turns',
          'turns; or a pitch and a winding-length, from which they follow; or sections',
          'count the turns and add turns: 100',
        ),
      ];
    const exact = (length - wire.overallMm) / pitch.mm;
    const count = Math.round(exact);
    if (count < 1 || count > MOST_TURNS)
      return [
        finding(
          'turns',
          at('winding-length'),
          `${tidy(exact, 4)} turns, by a winding of ${lengthText(length)} at ${lengthText(pitch.mm, 4)}`,
          `1 to ${MOST_TURNS} turns`,
          'check both measures and their units',
        ),
      ];
    return even(count, pitch.mm, { 'coil.turns': `${count}, by length over pitch ${exact.toFixed(2)}` });
  }
  if (length === undefined) {
    if (pitch !== null) return even(turns, pitch.mm);
    return [
      finding(
        'missing-key',
        at(),
        `${tidy(turns)} turns without a pitch`,
        'one of: pitch, winding-length, turns-per-inch, turns-per-cm, sections',
        'measure over the winding and add winding-length: 60.6 mm',
      ),
    ];
  }
  const mean = (length - wire.overallMm) / turns;
  if (turns * leastPitch(wire) > length + 1e-9)
    return [
      finding(
        'turns-do-not-fit',
        at('winding-length'),
        `${tidy(turns)} turns of ${lengthText(wire.overallMm, 3)} wire in a winding of ${lengthText(length)}`,
        `no more than ${Math.max(0, Math.floor(length / wire.overallMm))} turns, or a winding of ${lengthText((turns + 1) * wire.overallMm)} or more`,
        'count the turns again, or measure length and wire again',
      ),
    ];
  if (pitch !== null && Math.abs(pitch.mm / mean - 1) > 0.03 + 1.5 / turns)
    return [
      finding(
        'pitch-and-length',
        at('winding-length'),
        `a winding of ${lengthText(length)}, so a pitch of ${lengthText(mean, 4)}, besides ${pitch.text}`,
        'a length and a pitch that agree within 3 %, or one of the two',
        'remove the one that was measured worse',
      ),
    ];
  // Close-wound turns measured along a line that they do not cross once more come out a part of a wire short.
  const pitchMm = Math.max(mean, leastPitch(wire));
  return even(turns, pitch?.mm ?? pitchMm);
}

function sectioned(coil: ReadCoil, sections: readonly ReadSection[], wire: Wire): Winding | Finding[] {
  const found: Finding[] = [];
  const other = there(coil, [...EVEN, 'winding-length'])[0];
  if (other !== undefined)
    found.push(
      finding('key-with-sections', at(other), `${other} besides sections`, 'one of the two', `remove ${other}`),
    );
  const sum = sections.reduce((all, section) => all + section.turns, 0);
  if (coil.turns !== undefined && Math.abs(coil.turns - sum) > 1e-6)
    found.push(
      finding(
        'turns-of-sections',
        at('turns'),
        `${tidy(coil.turns)} turns, and sections of ${tidy(sum)} together`,
        'the same number, or turns left out',
        'mend one of the two, or leave turns out',
      ),
    );
  if (sum > MOST_TURNS)
    found.push(
      finding('turns', at('sections'), `${tidy(sum)} turns together`, `at most ${MOST_TURNS}`, 'check the sections'),
    );
  const measured = sections.map((section, i): MeasuredSection => {
    const path = at('sections', i);
    const last = i === sections.length - 1;
    const gap = section['gap-after'];
    if (!last && !Number.isInteger(section.turns))
      found.push(
        finding(
          'part-turn',
          [...path, 'turns'],
          `${tidy(section.turns)} turns in section ${i + 1} of ${sections.length}`,
          'whole turns in all sections but the last',
          'count the crossing wire to the section before',
        ),
      );
    if (!last && gap === undefined)
      found.push(
        finding(
          'missing-key',
          [...path, 'gap-after'],
          `section ${i + 1} of ${sections.length} without a gap behind it`,
          'the clear distance to the next section',
          'add gap-after: 3 mm, or 0 mm where there is none',
        ),
      );
    if (last && gap !== undefined && gap > 0)
      found.push(
        finding(
          'gap-after-last',
          [...path, 'gap-after'],
          `a gap of ${lengthText(gap)} behind the last section`,
          'none there',
          'remove gap-after',
        ),
      );
    return { turns: section.turns, pitchMm: sectionPitch(section, i, wire, found), gapAfterMm: last ? 0 : (gap ?? 0) };
  });
  return found.length > 0 ? found : { sections: measured, inferred: {} };
}

function sectionPitch(section: ReadSection, i: number, wire: Wire, found: Finding[]): number {
  const { pitch, length, turns } = section;
  const path = at('sections', i);
  if ((pitch === undefined) === (length === undefined)) {
    found.push(
      finding(
        pitch === undefined ? 'missing-key' : 'pitch-and-length',
        path,
        `section ${i + 1} with ${pitch === undefined ? 'neither pitch nor length' : 'both pitch and length'}`,
        'one of the two',
        pitch === undefined ? 'add pitch or length' : 'remove one',
      ),
    );
    return wire.overallMm;
  }
  if (pitch !== undefined) {
    const fault = pitchFault(wire, pitch, [...path, 'pitch'], `a pitch of ${lengthText(pitch, 4)}`);
    if (fault !== null) found.push(fault);
    return pitch;
  }
  if (turns <= 1) return wire.overallMm;
  const mm = (length! - wire.overallMm) / (turns - 1);
  if (mm < leastPitch(wire))
    found.push(
      finding(
        'turns-do-not-fit',
        [...path, 'length'],
        `${tidy(turns)} turns of ${lengthText(wire.overallMm, 3)} wire in a section of ${lengthText(length!)}`,
        `no more than ${Math.max(0, Math.floor(length! / wire.overallMm))} turns, or a section of ${lengthText(turns * wire.overallMm)} or more`,
        'count the turns again, or measure length and wire again',
      ),
    );
  return mm;
}
