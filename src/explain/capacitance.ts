/** Self-capacitance of the whole winding, which the ranges are reckoned with, and of the section for the former's loss. */
import { selfCapacitanceValid } from '../physics/medhurst.ts';
import { diameterOf, type Figure, input, type Subject, step } from './explanation.ts';

export function capacitanceFigure(subject: Subject): Figure {
  const { winding, tap, coil } = subject;
  const diameter = diameterOf(subject);
  const whole = coil.coil.selfPf(coil.coil.turns);
  const ratio = coil.coil.woundMm(coil.coil.turns) / diameter.value;
  return {
    figure: 'self-capacitance of the whole coil',
    value: whole,
    unit: 'pF',
    recorded: winding.selfCapacitancePf,
    formula: 'C = H(l/D) D, H in pF per cm of diameter',
    source:
      'Medhurst 1947, Wireless Engineer 24, 35 and 80: table of 33 points (as quoted in a public archive), one end earthed',
    inputs: [input('length over the wires l', coil.coil.woundMm(coil.coil.turns), 'mm'), diameter],
    intermediates: [
      step('length over diameter', 'l/D', ratio),
      step('H', 'between the points of the table', whole / (diameter.value / 10), 'pF/cm'),
      step('up to this tap alone', 'the same with their length', coil.coil.selfPf(tap.turn), 'pF'),
    ],
    validity: { domain: 'length over diameter from 0.1 to 50', inside: selfCapacitanceValid(ratio) },
    error: '5 %, measured on solid polystyrene rod; a thick or denser former adds to it',
  };
}
