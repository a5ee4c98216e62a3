/** The second winding in a job: what is read, what is taken when left out, and what each mistake is told. */
import { describe, expect, it } from 'vitest';
import { slides } from '../../src/job/around/second.ts';
import { readJob } from '../../src/job/read.ts';
import { refusals } from './faults.ts';

const told = (text: string) =>
  refusals(text).map(
    ({ place, got, expected, todo }) => `${place?.line} ${place?.key}: ${got} | ${expected} | ${todo}`,
  );

const WISH = 'job: x\nwant: { inductance: 20 uH to 240 uH, taps: 6 }\n';
const EXPECTED = 'a coupling coefficient such as 0.2, or a range such as 0.05 to 0.3 for a winding that slides';

/** What is written as the second winding, and for each fault: line key: got | expected | to do. */
const CASES: readonly (readonly [string, readonly string[]])[] = [
  [
    '{ kind: sleeve }',
    [
      '3 second: neither a coupling nor turns nor an inductance | what the second winding is to be | add coupling: 0.2, or turns, or inductance',
    ],
  ],
  [
    '{ kind: sleeve, turns: 8, inductance: 9 uH }',
    [
      '3 second.inductance: both 8 turns and an inductance | one of the two: the other follows | remove second.turns or second.inductance',
    ],
  ],
  [
    '{ kind: same former, coupling: 0.05 to 0.2 }',
    [
      '3 second.coupling: a range of coupling, 0.05 to 0.2, on the former of the main winding | one coupling for a winding that cannot slide | write one coupling, or take kind: sleeve, inner or beside',
    ],
  ],
  [
    '{ kind: inner, coupling: 0.2, distance: 5 mm }',
    [
      '3 second.distance: a distance for kind: inner | distance with kind: same former or beside | remove second.distance: the coupling says how far it lies in',
    ],
  ],
  [
    '{ kind: beside, coupling: 0.05 to 0.2, distance: 5 mm }',
    [
      '3 second.distance: a distance of 5 mm and a range of coupling | one of the two: couplings follow from distances | remove second.distance',
    ],
  ],
  [
    '{ kind: beside, coupling: 0.05, turns: 9, distance: 5 mm }',
    [
      '3 second.distance: a distance of 5 mm, a coupling and turns | two of the three: the third follows | remove second.distance, second.coupling or second.turns',
    ],
  ],
  [
    '{ kind: sleeve, coupling: 1.2 }',
    [
      `3 second.coupling: "1.2", which is above the 1 that make sense here | ${EXPECTED} | write a number from 0.001 to 0.95, or two with "to" between`,
    ],
  ],
  ['{ kind: sleeve, coupling: 0.96 }', [`3 second.coupling: a coupling of 0.96 | ${EXPECTED} | write 0.95 or less`]],
  [
    '{ kind: sleeve, coupling: 0.0001 }',
    [`3 second.coupling: a coupling of 0.0001 | ${EXPECTED} | write 0.001 or more`],
  ],
  [
    '{ kind: sleeve, coupling: 0.3 to 0.1 }',
    [
      `3 second.coupling: "0.3 to 0.1", whose first end lies above its second | ${EXPECTED} | write the lower end first`,
    ],
  ],
  [
    '{ kind: sleeve, turns: 0 }',
    ['3 second.turns: 0 | a whole number from 1 to 500 | write a whole number within these limits'],
  ],
  [
    '{ kind: sleeve, turns: 5, wire: 24 SWG bare }',
    [
      '3 second.wire: 24 SWG bare wound close | a covered wire, or turns that do not touch | take a covered wire, or state second.pitch',
    ],
  ],
  [
    '{ kind: sleeve, turns: 5, wire: 0.5 mm enamel, pitch: 0.2 mm }',
    [
      '3 second.pitch: a pitch of 0.2 mm for wire 0.534 mm thick | 0.534 mm or more | widen second.pitch, or take a thinner wire',
    ],
  ],
  [
    '{ kind: sleve, turns: 5, colour: red }',
    [
      '3 second.kind: "sleve" | one of: same former, sleeve, inner, beside | did you mean sleeve?',
      '3 second.colour: a key that is not known | one of: kind, coupling, turns, inductance, wire, pitch, end, distance | remove the key, or put it where it belongs',
    ],
  ],
];

describe('a second winding in a job', () => {
  it.each(CASES)('refuses %s', (written, faults) => {
    expect(told(`${WISH}second: ${written}`)).toEqual(faults);
  });

  it('is refused on ribs', () => {
    const found = told(`${WISH}former: { body: ribbed }\nsecond: { kind: same former, turns: 5 }`);
    expect(found).toHaveLength(1);
    expect(found[0]).toContain('4 second.kind: a second winding on a former with body: ribbed');
  });

  it('is read, with what is taken stated', () => {
    const read = (written: string, more = '') => readJob(`${WISH}${more}second: ${written}`, 'x');
    const job = read('{ kind: sleeve, coupling: 0.25 }');
    expect(job.second).toEqual({
      kind: 'sleeve',
      coupling: { lowest: 0.25, highest: 0.25 },
      turns: null,
      inductanceUh: null,
      wire: null,
      pitch: 'close',
      end: 'start',
      distanceMm: null,
    });
    expect(job.assumed).toMatchObject({ 'second.pitch': 'close', 'second.end': 'start' });
    expect(slides(job.second!)).toBe(false);
    const range = read('{ kind: inner, coupling: 5 % to 30 %, wire: 30 AWG enamel }').second!;
    expect([range.coupling, range.end, slides(range)]).toEqual([{ lowest: 0.05, highest: 0.3 }, 'finish', true]);
    expect(range.wire?.name).toBe('30 AWG enamel');
    expect(read('{ kind: beside, turns: 5, distance: 0 mm }').second).toMatchObject({ end: 'finish', distanceMm: 0 });
    expect(read('{ kind: sleeve, turns: 5 }', 'winding: { earthed: finish }\n').second!.end).toBe('finish');
    expect(readJob(WISH, 'x').second).toBeNull();
    expect(readJob(WISH, 'x').assumed).not.toHaveProperty('second.pitch');
  });
});
