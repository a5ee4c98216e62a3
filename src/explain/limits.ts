/** Limits of the inductance: each input moved by its half width, and what that does. */
import { limitsOf, type Spread, type SpreadInput } from '../coil/tolerance.ts';
import { type Figure, input, type Subject, step } from './explanation.ts';

type Spreads = readonly (readonly [
  key: SpreadInput,
  name: string,
  of: (spread: Spread) => readonly [number, string],
])[];

const INPUTS: Spreads = [
  ['diameterMm', 'mean diameter', ({ diameterMm }) => [diameterMm, 'mm']],
  ['pitch', 'pitch', ({ pitch }) => [100 * pitch, '%']],
  ['bareMm', 'bare wire', ({ bareMm }) => [bareMm, 'mm']],
  ['gap', 'gaps at taps', ({ gap }) => [100 * gap, '% of each']],
  ['turn', 'place of the tap', ({ turn }) => [turn, 'turns']],
  ['leadUh', 'lead of the tap', ({ leadUh }) => [leadUh, 'µH']],
];

/** Both limits; none when the record does not say what its limits come from. */
export function limitFigures({ record, tap, coil }: Subject): Figure[] {
  const { spread } = record;
  const { lowUh, highUh, changes } = limitsOf(coil.coil, [tap.turn], spread)[0]!;
  const half = (highUh - lowUh) / 2;
  const nominal = coil.coil.inductanceUh(tap.turn);
  return [
    {
      figure: 'lower limit of the inductance, 95 %',
      value: lowUh,
      unit: 'µH',
      recorded: tap.inductanceLowUh,
      formula: 'L - half width; half width: the root of the sum of squares of what each input does',
      source: 'JCGM 100:2008, 5.1.2; spreads by standard or common practice, listed under assumed',
      inputs: INPUTS.map(([, name, of]) => input(`${name} ±`, ...of(spread))),
      intermediates: [
        ...INPUTS.map(([key, name]) => step(name, 'ring sum with it, less L', changes[key], 'µH')),
        step('half width', 'root of the sum of squares', half, 'µH'),
        step('half width over L', '', (100 * half) / nominal, '%'),
        step('upper limit', 'L + half width', highUh, 'µH', tap.inductanceHighUh),
      ],
      validity: { domain: 'independent inputs, response straight over these widths', inside: half < 0.2 * nominal },
      error: `the widest input is: ${tap.dominant}`,
    },
  ];
}
