import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import type { Job } from '../../src/job/job.ts';
import { recordOf } from '../../src/plan.ts';
import { threeDigits } from '../../src/solve/first-fit.ts';
import { hasCoil } from '../../src/solve/search.ts';
import { BAND, change, jobOf, type Parts, RANGE, TUBE } from '../helpers/jobs.ts';

interface Refusal {
  readonly key: string;
  readonly got: string;
  readonly todo: string;
}

const told = new Map<Parts, Refusal>();

/** What a job that nothing meets is told. */
function refusalOf(parts: Parts): Refusal {
  const known = told.get(parts);
  if (known !== undefined) return known;
  const refusal = refuse(parts);
  told.set(parts, refusal);
  return refusal;
}

function refuse(parts: Parts): Refusal {
  try {
    recordOf(jobOf(parts), '0');
  } catch (fault) {
    if (!(fault instanceof Fault)) throw fault;
    expect(fault.exit).toBe(4);
    expect(fault.faults.length).toBe(1);
    const [{ place, got, todo }] = fault.faults as [Fault['faults'][number]];
    return { key: place!.key!, got, todo };
  }
  throw new Error('the job has a coil');
}

/** The job with an offered change made, as a person would make it, by the words of the offer. */
function changed(parts: Parts, offer: string): Parts {
  const use = /^use (.+) \([\d.]+ mm over its covering\)$/.exec(offer);
  if (use) return { ...parts, wire: [use[1]!] };
  const end = /^(?:lower|raise) the (upper|lower) end of want\.(inductance|band) to ([\d.]+) (µH|kHz)$/.exec(offer);
  if (end) {
    const [, which, key, value, unit] = end as unknown as [string, string, string, string, string];
    const [low, high] = String(parts.want[key]).split(' to ') as [string, string];
    const span = which === 'upper' ? `${low} to ${value} ${unit}` : `${value} ${unit} to ${high}`;
    return change(parts, 'want', { [key]: span });
  }
  const set = /^(?:raise|lower|set) (\w+)\.([\w-]+)(?: and (\w+)\.([\w-]+))? to ([^(]+?)(?: \(.*\))?$/.exec(offer);
  if (!set) throw new Error(`an offer that cannot be read: ${offer}`);
  const [, section, key, section2, key2, value] = set as unknown as string[];
  const given = /^\d+$/.test(value!) && key === 'taps' ? Number(value) : value;
  const once = change(parts, section as keyof Parts, { [key!]: given });
  return section2 === undefined ? once : change(once, section2 as keyof Parts, { [key2!]: given });
}

const ONE_WIRE = ['0.5 mm enamel'];
/** A band on one diameter. */
const ONE: Parts = { ...change(BAND, 'former', { 'outside-diameter': '76 mm' }), wire: ONE_WIRE };
const SHORT: Parts = { ...RANGE, wire: ONE_WIRE };

/** Two taps on a base: cheap to work out for every diameter that is tried. */
const SMALL: Parts = {
  want: { inductance: '5 uH to 12 uH', taps: 2 },
  former: { 'outside-diameter': '40 mm', longest: '40 mm', mounting: 'base' },
  wire: ONE_WIRE,
  winding: { pitch: 'close' },
};

const IMPOSSIBLE: readonly [string, Parts, string, RegExp][] = [
  ['too short', change(RANGE, 'former', { longest: '40 mm' }), 'former.longest', /9 mm over the limit of 40 mm/],
  [
    'too short by a tenth of a millimetre or so',
    change(TUBE, 'former', { longest: '36.8 mm' }),
    'former.longest',
    /38\.0 mm, allowed 36\.8 mm/,
  ],
  [
    'a printer too low',
    { ...RANGE, former: { 'outside-diameter': '76 mm' }, printer: { height: '40 mm' } },
    'printer.height',
    /9 mm over the limit of 40 mm/,
  ],
  [
    'far too much inductance',
    change(SHORT, 'want', { inductance: '20 uH to 2 mH' }),
    'former.longest',
    /mm over the limit of 140 mm/,
  ],
  [
    'more taps than turns bear',
    change(RANGE, 'want', { inductance: '0.05 uH to 2 uH' }),
    'want.taps',
    /12 taps on 3\.6 turns/,
  ],
  [
    'taps too near in one line',
    { ...change(RANGE, 'want', { inductance: '2 uH to 20 uH' }), winding: { 'tap-layout': 'in line' } },
    'want.taps',
    /tap 2 finds no place/,
  ],
  [
    'an overlap that no number of positions gives',
    change(change(ONE, 'set', { capacitor: '100 pF to 104 pF' }), 'want', { band: '530 kHz to 545 kHz' }),
    'want.overlap',
    /no number of switch positions/,
  ],
  [
    'too few positions',
    change(ONE, 'want', { band: '530 kHz to 3 MHz', taps: 2, overlap: '5 %' }),
    'want.overlap',
    /overlap by -?[\d.]+ %, wanted 5\.0 %/,
  ],
  [
    'more positions than the band has room for',
    change(ONE, 'want', { band: '530 kHz to 900 kHz', taps: 3, overlap: '0 %' }),
    'want.taps',
    /tap 1 of 3 would lie beyond the whole coil/,
  ],
  [
    'bare wire wound close',
    { ...RANGE, wire: ['24 AWG bare'], winding: { pitch: 'close' } },
    'winding.pitch',
    /0\.511 mm\) at pitch: close would touch/,
  ],
  [
    'a pitch narrower than the wire',
    { ...RANGE, wire: ['1 mm enamel'], winding: { pitch: '0.8 mm' } },
    'winding.pitch',
    /0\.8 mm is narrower than the thinnest wire \(1 mm enamel, 1\.\d+ mm\)/,
  ],
  [
    'wire too thick for the former',
    { want: { inductance: '1 uH to 3 uH', taps: 3 }, former: { 'outside-diameter': '20 mm' }, wire: ['2 mm enamel'] },
    'wire',
    /2 mm enamel, 2\.\d+ mm\) does not lie at a pitch of the job round 20 mm/,
  ],
  ['a wall too thin', change(SHORT, 'former', { wall: '0.5 mm' }), 'former.wall', /leaves 0\.50 mm .* 0\.90 mm/],
  [
    'a bed too small',
    { ...change(SHORT, 'former', { 'outside-diameter': '110 mm' }), printer: { bed: '120 x 120 mm' } },
    'printer.bed',
    /143\.0 mm, allowed 120\.0 mm/,
  ],
  [
    'a tap method that the pitch forbids',
    { ...RANGE, winding: { 'tap-method': 'drawn in', pitch: 'close' } },
    'winding.tap-method',
    /drawn in is not possible/,
  ],
  [
    'a hole of two wires wider than its place',
    {
      ...change(SHORT, 'former', { 'outside-diameter': '60 mm' }),
      winding: { 'tap-method': 'drawn in', pitch: '1 mm' },
    },
    'winding.tap-method',
    /needs a hole of 1\.5 mm for two wires, and at 1 mm its neighbours leave 1\.47 mm; 1\.02 mm of pitch would do/,
  ],
  [
    'a pitch of fewer layers than a groove takes, too narrow for its wire',
    { ...SHORT, winding: { pitch: '0.7 mm' } },
    'winding.pitch',
    /3\.5 layers of 0\.2 mm, a groove takes 4; for 0\.5 mm enamel it is 0\.76 mm wide .* 1 mm in whole layers/,
  ],
  [
    'screws whose heads do not pass the rim',
    { ...SMALL, former: { ...SMALL.former, 'screw-circle': '50 mm' } },
    'former.screw-circle',
    /circle of 50 mm: heads of 8\.8 mm pass the former, 48\.0 mm wide, from 60 mm on/,
  ],
  [
    'a base wider than the bed',
    {
      ...SMALL,
      former: { ...SMALL.former, 'screw-circle': '110 mm' },
      printer: { bed: '120 x 130 mm' },
    },
    'printer.bed',
    /the base is across 120\.8 mm, allowed 120\.0 mm/,
  ],
  [
    'more lugs than the foot has room for posts',
    {
      want: { inductance: Array.from({ length: 10 }, (_, i) => `${i + 1} uH`) },
      former: { 'outside-diameter': '10 mm', longest: '60 mm', flanges: false, mounting: 'none' },
      wire: ['0.315 mm enamel'],
      winding: { 'tap-method': 'lug' },
    },
    'want.taps',
    /the posts of 9 lugs take [\d.]+ mm round the foot, there are [\d.]+ mm/,
  ],
];

/** The offer a little smaller, in the direction of the job as it was: none of these may do; null where there is no less. */
function lessThan(parts: Parts, offer: string): Parts | null {
  const job: Job = jobOf(parts);
  const less = (pattern: RegExp, by: (value: number) => number) =>
    pattern.test(offer)
      ? changed(
          parts,
          offer.replace(pattern, (_, head, value) => `${head}${by(Number(value))}`),
        )
      : null;
  // A percent of the way and more than the offer's own rounding; half a millimetre is the step of a former's length.
  return (
    less(/(longest to |height to )([\d.]+)/, (mm) => mm - 0.6) ??
    less(/(outside-diameter to )([\d.]+)/, (mm) => mm + (offer.startsWith('raise') ? -1 : 1)) ??
    less(/(upper end of want.inductance to )([\d.]+)/, (uh) => uh * 1.02) ??
    less(/(upper end of want.band to )([\d.]+)/, (kHz) => kHz * 1.02) ??
    less(/(lower end of want.inductance to )([\d.]+)/, (uh) => uh * 0.98) ??
    less(/(want.overlap to )([\d.]+)/, (percent) => percent + 0.3) ??
    less(/(former.wall to )([\d.]+)/, (mm) => mm - 0.03) ??
    less(/(bed to )([\d.]+)/, (mm) => mm - 1) ??
    less(/(raise former.screw-circle to )([\d.]+)/, (mm) => mm - 0.2) ??
    less(/(lower former.screw-circle to )([\d.]+)/, (mm) => mm + 0.2) ??
    less(/(winding.pitch to )([\d.]+)/, (mm) => mm - 0.2) ??
    (job.want.kind === 'list' ? null : less(/(want.taps to )(\d+)/, (n) => n + (offer.startsWith('raise') ? -1 : 1)))
  );
}

describe('a job that nothing meets', () => {
  let offers = 0;
  let least = 0;

  it.each(IMPOSSIBLE)('is told the limit and what alone would do: %s', (_, parts, key, got) => {
    const refusal = refusalOf(parts);
    expect(refusal.key).toBe(key);
    expect(refusal.got).toMatch(got);
    expect(refusal.todo).toMatch(/^any one of these alone would do: /);
    for (const offer of refusal.todo.replace(/^.*?: /, '').split('; ')) {
      expect({ offer, fits: hasCoil(jobOf(changed(parts, offer))) }).toEqual({ offer, fits: true });
      offers++;
      const smaller = lessThan(parts, offer);
      if (smaller === null) continue;
      expect({ lessThan: offer, fits: hasCoil(jobOf(smaller)) }).toEqual({ lessThan: offer, fits: false });
      least++;
    }
  });

  it('was offered changes that were all tried', () => {
    console.log(`refusals: ${IMPOSSIBLE.length} jobs, ${offers} offers hold, ${least} of them were the least that do`);
    expect(Math.min(offers, least)).toBeGreaterThan(0);
  });

  it('is offered a change of every kind that could help', () => {
    const { todo } = refusalOf(IMPOSSIBLE[0]![1]);
    for (const kind of [
      'raise former.longest',
      'raise former.outside-diameter',
      'use ',
      'lower the upper end of want.inductance',
    ])
      expect(todo).toContain(kind);
    expect(refusalOf(IMPOSSIBLE[6]![1]).todo).toContain('lower want.overlap');
  });

  it('is told values of three digits, rounded towards what fits', () => {
    const values = [1234.4, 0.061251, 140, 9.999];
    expect(values.map((value) => threeDigits(value, 'down'))).toEqual([1230, 0.0612, 140, 9.99]);
    expect(values.map((value) => threeDigits(value, 'up'))).toEqual([1240, 0.0613, 140, 10]);
  });

  it('is told so when no single change would do', () => {
    const parts: Parts = {
      want: { inductance: '1 mH to 9 mH', taps: 3 },
      former: { 'outside-diameter': '20 mm', longest: '20 mm', kind: 'tube' },
      wire: ['1 mm enamel'],
      winding: { pitch: '1.2 mm' },
    };
    const { todo } = refusalOf(parts);
    expect(todo).toMatch(/^(no change of a single limit would do|any one of these)/);
    for (const offer of todo.startsWith('no') ? [] : todo.replace(/^.*?: /, '').split('; '))
      expect(hasCoil(jobOf(changed(parts, offer)))).toBe(true);
  });
});
