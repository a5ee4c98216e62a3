/** Resistance and Q where a position works: direct current, an isolated wire, the field of every turn, the former. */
import { LITZ_TAKE_UP } from '../coil/coil.ts';
import { atFrequency, FORMER_SHARE, formerLossOhm } from '../coil/positions.ts';
import { dcResistance, RESISTIVITY_20C } from '../physics/copper.ts';
import { resistivityAt } from '../physics/field/field.ts';
import { resistanceRatio } from '../physics/medhurst.ts';
import { skinDepth, skinRatio } from '../physics/skin.ts';
import { diameterOf, type Figure, type Input, input, type Step, type Subject, step } from './explanation.ts';

const kindOf = ({ winding }: Subject) =>
  winding.wire.strands > 1
    ? {
        formula:
          'R = Rdc + loss of every strand pi omega^2 mu0^2 sigma ds^4 H^2/128 a metre in the field of all turns; + former',
        source: 'Sullivan 1999, strand in a known field; rings Maxwell 1873',
        domain: 'strands thinner than 1.5 skin depths',
        error: '4 % of the part above direct current at that limit; former: an estimate',
      }
    : {
        formula: 'R: every turn a ring with the multipoles that the fields of all others raise in it; + former',
        source: 'Kelvin 1889, isolated wire; Butterworth 1922 and 1925, wire among others, carried to all orders',
        domain: 'round wire, touching at the most, much shorter than a wavelength',
        error: '0.7 % of the copper against three finite-element solutions; former: an estimate',
      };

/** From direct current up: what each cause makes of the resistance. */
function copperSteps(subject: Subject, kHz: number): Step[] {
  const { winding, tap, coil, record } = subject;
  const { wire } = winding;
  const rho = resistivityAt(record.surroundings.celsius);
  const warmth = rho / RESISTIVITY_20C;
  const length = coil.coil.turnShape.length * tap.turn;
  const copper = coil.terminal(tap.turn, kHz, 'open').resistanceOhm;
  const skin = step('skin depth', 'sqrt(2 rho/(omega mu0))', skinDepth(kHz * 1e3) * Math.sqrt(warmth) * 1e3, 'mm');
  if (wire.strands > 1) {
    const direct = dcResistance(length * LITZ_TAKE_UP, wire.strandMm / 1e3, wire.strands) * warmth;
    return [
      skin,
      step('direct current Rdc', '4 rho len/(pi ds^2 strands)', direct, 'Ω'),
      step('copper, rest open', 'strands in the field', copper, 'Ω'),
      step('loss of the strands', 'copper - Rdc', copper - direct, 'Ω'),
    ];
  }
  const direct = dcResistance(length, wire.bareMm / 1e3) * warmth;
  // The ratio asks for d over skin depth only: a warmer wire is a lower frequency to it.
  const ratio = skinRatio(wire.bareMm / 1e3, (kHz * 1e3) / warmth);
  const electrical = coil.coil.positionMm(tap.turn) - coil.coil.positionMm(0);
  const phi = resistanceRatio(electrical / coil.coil.equivalentDiameterMm, electrical / tap.turn / wire.bareMm);
  return [
    skin,
    step('direct current Rdc', '4 rho len/(pi d^2), loops left out', direct, 'Ω'),
    step('isolated straight wire over Rdc', 'Bessel functions of d over skin depth', ratio),
    step('isolated straight wire', 'the product', direct * ratio, 'Ω'),
    step('copper, rest open', 'field of every turn', copper, 'Ω'),
    step('what the other turns make of it', 'copper over isolated wire', copper / (direct * ratio)),
    step(
      'to compare: measured ratios',
      `Rdc (1 + (ratio - 1) ${phi.toPrecision(3)}), Medhurst 1947`,
      direct * (1 + (ratio - 1) * phi),
      'Ω',
    ),
  ];
}

const inputsOf = (subject: Subject, kHz: number): Input[] => inputsAt(subject, kHz, diameterOf(subject));

const inputsAt = ({ winding, tap, record }: Subject, kHz: number, diameter: Input): Input[] => [
  input('frequency f', kHz, 'kHz'),
  input('turns to the tap n', tap.turn),
  diameter,
  input('bare wire d', winding.wire.bareMm, 'mm'),
  ...(winding.wire.strands > 1
    ? [input('strands', winding.wire.strands), input('strand ds', winding.wire.strandMm, 'mm')]
    : []),
  input('copper at', record.surroundings.celsius, '°C'),
  input('loss tangent of the former', record.surroundings.formerLossTangent),
];

export function lossFigures(subject: Subject): Figure[] {
  const { record, tap, coil } = subject;
  const { rest, formerLossTangent } = record.surroundings;
  const kHz = tap.working.frequencyKhz;
  const at = atFrequency(coil, tap.turn, kHz, rest, formerLossTangent);
  const copper = coil.terminal(tap.turn, kHz, rest);
  const selfPf = coil.coil.selfPf(tap.turn);
  const former = formerLossOhm(copper.inductanceUh, selfPf, formerLossTangent, kHz);
  const reactance = 2e-3 * Math.PI * kHz * at.inductanceUh;
  const { formula, source, domain, error } = kindOf(subject);
  const validity = { domain, inside: coil.lossValid(kHz) };
  const low = coil.coil.inductanceUh(tap.turn);
  const loops = rest === 'shorted' || rest === 'shorted in sections';
  const inductance: Figure = {
    figure: `inductance at ${kHz} kHz`,
    value: at.inductanceUh,
    unit: 'µH',
    recorded: tap.working.inductanceUh,
    formula: 'as the resistance: the current crowds, and its field with it',
    source,
    inputs: inputsOf(subject, kHz),
    intermediates: [
      step('at low frequency', 'ring sum', low, 'µH'),
      step('change by crowding', 'rest open', 100 * (coil.terminal(tap.turn, kHz, 'open').inductanceUh / low - 1), '%'),
      ...(loops ? [step(`with the rest ${rest}`, 'Z = Zuu - Zud Zdu/Zdd', at.inductanceUh, 'µH')] : []),
    ],
    validity,
    error: '0.02 % against three finite-element solutions; the limits of the low-frequency value come on top',
  };
  const resistance: Figure = {
    figure: `resistance at ${kHz} kHz`,
    value: at.resistanceOhm,
    unit: 'Ω',
    recorded: tap.working.resistanceOhm,
    formula,
    source,
    inputs: inputsOf(subject, kHz),
    intermediates: [
      ...copperSteps(subject, kHz),
      ...(loops ? [step(`copper, rest ${rest}`, 'Z = Zuu - Zud Zdu/Zdd', copper.resistanceOhm, 'Ω')] : []),
      step(
        'loss of the former',
        `(omega L)^2 omega C tan(delta) x ${FORMER_SHARE}, C = ${selfPf.toPrecision(3)} pF`,
        former,
        'Ω',
      ),
    ],
    validity,
    error,
  };
  const quality: Figure = {
    figure: `Q at ${kHz} kHz`,
    value: at.q,
    unit: '',
    recorded: tap.working.q,
    formula: 'Q = omega L/R',
    source: 'definition',
    inputs: [
      input('frequency f', kHz, 'kHz'),
      input('inductance there L', at.inductanceUh, 'µH'),
      input('resistance there R', at.resistanceOhm, 'Ω'),
    ],
    intermediates: [step('omega L', '2 pi f L', reactance, 'Ω'), ...endSteps(subject)],
    validity,
    error: 'that of the resistance; loss of the set, its capacitor and aerial is not in it',
  };
  return [inductance, resistance, quality];
}

/** Q, bandwidth and parallel resistance at both ends and the middle of the range. */
function endSteps({ record, tap, coil }: Subject): Step[] {
  const { rest, formerLossTangent } = record.surroundings;
  return tap.ends.flatMap((end) => {
    const at = atFrequency(coil, tap.turn, end.frequencyKhz, rest, formerLossTangent);
    const where = end.at === 'middle' ? 'in the middle' : `at the ${end.at} end`;
    return [
      step(`f ${where}`, end.at === 'middle' ? 'root of the product' : 'from the range', end.frequencyKhz, 'kHz'),
      step('L there', '', at.inductanceUh, 'µH', end.inductanceUh),
      step('R there', '', at.resistanceOhm, 'Ω', end.resistanceOhm),
      step('Q there', 'omega L/R', at.q, '', end.q),
      step('bandwidth', 'f/Q', at.bandwidthKhz, 'kHz', end.bandwidthKhz),
      step('parallel resistance', 'Q omega L', at.parallelKohm, 'kΩ', end.parallelKohm),
    ];
  });
}
