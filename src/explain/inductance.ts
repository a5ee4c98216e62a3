/** Inductance: by hand from the current sheet, by the short formula, and the ring sum that the record states. */
import { Coil } from '../coil/coil.ts';
import { MU0 } from '../physics/constants.ts';
import { nagaokaK, sheetInductance } from '../physics/nagaoka.ts';
import { rosaA, rosaB, roundWireInductance } from '../physics/rosa.ts';
import { wheeler1928, wheeler1982 } from '../physics/wheeler.ts';
import { diameterOf, type Figure, type Input, input, type Step, type Subject, step } from './explanation.ts';

/** The section up to the tap as an even coil: what the closed formulas take it for. Metres. */
function evenOf(subject: Subject) {
  const { winding, tap, coil } = subject;
  const length = (coil.coil.positionMm(tap.turn) - coil.coil.positionMm(0)) / 1e3;
  return {
    turns: tap.turn,
    diameter: coil.coil.equivalentDiameterMm / 1e3,
    length,
    pitch: length / tap.turn,
    wire: winding.wire.bareMm / 1e3,
    called: diameterOf(subject),
  };
}

type Even = ReturnType<typeof evenOf>;

const inputsOf = ({ turns, called, length }: Even): Input[] => [
  input('turns to the tap n', turns),
  called,
  input('electrical length l, from the start to the tap', length * 1e3, 'mm'),
];

const hand = ({ turns, diameter, pitch, wire }: Even) => roundWireInductance(turns, diameter, pitch, wire) * 1e6;

export function sheetFigure(subject: Subject): Figure {
  const even = evenOf(subject);
  const { turns, diameter, length, pitch, wire } = even;
  const A = rosaA(wire / pitch);
  const B = rosaB(turns);
  return {
    figure: 'inductance by hand',
    value: hand(even),
    unit: 'µH',
    recorded: null,
    formula: 'L = mu0 pi R^2 n^2 K/l - mu0 R n (A + B), A = 5/4 - ln 2 + ln(d/p), B = (2/n) sum (n-m)(ln m - ln Rm)',
    source: 'current sheet: Lorenz 1879, Nagaoka 1909; round wire: Rosa 1907, Rosa & Grover 1912, Tables VII and VIII',
    inputs: [...inputsOf(even), input('bare wire d', wire * 1e3, 'mm')],
    intermediates: [
      step('pitch p', 'l/n, gaps of taps included', pitch * 1e3, 'mm'),
      step('diameter over length', 'D/l', diameter / length),
      step("Nagaoka's K", 'table or formula, for D/l', nagaokaK(diameter, length)),
      step('current sheet', 'mu0 pi (D/2)^2 n^2 K/l', sheetInductance(turns, diameter, length) * 1e6, 'µH'),
      step("Rosa's A", '5/4 - ln 2 + ln(d/p)', A),
      step("Rosa's B", 'table, for n', B),
      step('correction', 'mu0 (D/2) n (A + B)', MU0 * (diameter / 2) * turns * (A + B) * 1e6, 'µH'),
    ],
    validity: { domain: 'an even winding of one turn and more, pitch below D/20', inside: pitch < diameter / 20 },
    error: 'against the ring sum of an even coil 0.001 % at p = D/100, 0.03 % at D/20, 0.12 % at D/10',
  };
}

export function wheelerFigure(subject: Subject): Figure {
  const even = evenOf(subject);
  const { turns, diameter, length } = even;
  const inch = 25.4e-3;
  return {
    figure: 'inductance by the short formula',
    value: wheeler1928(turns, diameter, length) * 1e6,
    unit: 'µH',
    recorded: null,
    formula: 'L = r^2 n^2/(9 r + 10 l), microhenries and inches',
    source: 'Wheeler 1928, Proc. IRE 16, 1398',
    inputs: inputsOf(even),
    intermediates: [
      step('radius r', 'D/2', diameter / 2 / inch, 'in'),
      step('length l', '', length / inch, 'in'),
      step('by Wheeler 1982', 'for every shape', wheeler1982(turns, diameter, length) * 1e6, 'µH'),
    ],
    validity: { domain: 'length above 0.4 diameters', inside: length > 0.4 * diameter },
    error:
      '-0.6 % to +0.06 % of the current sheet there, -2.5 % at a length of D/4; nothing of the round wire is in it',
  };
}

/** What the ring sum has that the formula by hand has not; the three add up to the whole difference. */
function differences(subject: Subject, even: Even, value: number): Step[] {
  const { turns, pitch } = even;
  const { shape } = subject.coil.coil;
  const evenCoil = (n: number) =>
    new Coil({ ...shape, turns: n, pitchMm: pitch * 1e3, gaps: [], startMm: 0 }).inductanceUh(n);
  const whole = Math.floor(turns + 1e-9);
  const formula = evenCoil(whole) - hand({ ...even, turns: whole });
  const together = evenCoil(turns) - hand(even);
  return [
    step('difference to that by hand', 'L - by hand', value - hand(even), 'µH'),
    step('- rings instead of a sheet', `even coil of ${whole} turns, ring sum - by hand`, formula, 'µH'),
    step('- the part turn as an arc', 'the same for n turns, less that', together - formula, 'µH'),
    step('- turns that are not even', 'L - ring sum of the even coil', value - evenCoil(turns), 'µH'),
  ];
}

export function ringFigure(subject: Subject): Figure {
  const { tap, winding, coil } = subject;
  const even = evenOf(subject);
  const [radius, wireRadius] = [even.diameter / 2, even.wire / 2];
  const { turnShape } = coil.coil;
  const own = turnShape.own(wireRadius) * 1e6;
  const polygon = winding.corners === undefined ? '' : '; both more by what polygons have over circles of their area';
  const value = coil.coil.inductanceUh(tap.turn);
  const whole = Math.floor(tap.turn + 1e-9);
  const neighbour = winding.turnPositionsMm.length > 1;
  const apart = neighbour ? Math.abs(winding.turnPositionsMm[1]! - winding.turnPositionsMm[0]!) / 1e3 : 0;
  return {
    figure: 'inductance, low frequency',
    value,
    unit: 'µH',
    recorded: tap.inductanceUh,
    formula: `L = n Lring + 2 sum of M(zi - zk) over all pairs of turns; Lring = mu0 R (ln(8R/a) - 7/4 + (a/R)^2/8 (ln(8R/a) + 1/3)); M by elliptic integrals${polygon}`,
    source: 'Maxwell 1873, art. 701; Rayleigh & Niven 1881; Grover 1946, ch. 16',
    inputs: [
      input('turns to the tap n', tap.turn),
      input(
        polygon === '' ? 'radius R of the wire centre' : 'radius R of the circle of a turn’s area',
        radius * 1e3,
        'mm',
      ),
      input('bare radius a', wireRadius * 1e3, 'mm'),
      input('places of the turns', winding.turnPositionsMm.length, 'values'),
    ],
    intermediates: [
      step('one ring by itself Lring', '', own, 'µH'),
      ...(neighbour ? [step('M of the first two turns', '', turnShape.mutual(apart) * 1e6, 'µH')] : []),
      step('all rings by themselves', 'whole turns x Lring', whole * own, 'µH'),
      step('between them, and part turn', 'L - whole turns x Lring', value - whole * own, 'µH'),
      ...(tap.turn >= 1 ? differences(subject, even, value) : []),
      step(
        'off the target',
        '100 (L/target - 1)',
        100 * (tap.inductanceUh / tap.targetUh - 1),
        '%',
        tap.deviationPercent,
      ),
    ],
    validity: { domain: 'turns as rings; pitch below D/10', inside: even.pitch < even.diameter / 10 },
    error: 'against the true helix 0.005 % for pitches below D/80, 0.2 % at D/10',
  };
}
