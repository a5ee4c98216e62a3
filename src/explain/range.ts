/** What a position tunes: the tuned circuit of its turns alone, then what the dead turns, leads and crowding change. */
import { coupledResonances } from '../physics/coupled/coupled.ts';
import { resonance } from '../physics/tuning.ts';
import { type Figure, input, type Step, type Subject, step } from './explanation.ts';

interface End {
  readonly name: 'low' | 'high';
  readonly capacitor: string;
  readonly acrossPf: number;
  readonly recordedKhz: number;
  readonly recordedUncertainty: number;
  readonly recordedSecond: number | null;
}

function endFigure({ record, tap, coil }: Subject, end: End): Figure {
  const { rest, leadPf } = record.surroundings;
  const sectionUh = coil.coil.inductanceUh(tap.turn);
  const sectionPf = coil.coil.selfPf(tap.turn);
  const alone = resonance(sectionUh * 1e-6, (end.acrossPf + sectionPf) * 1e-12) / 1e3;
  const { winding, on } = coil.circuit(tap.turn, end.acrossPf, rest);
  const spread = coupledResonances(winding, { ...on, distribution: 'spread' });
  const single = coupledResonances(winding, { ...on, distribution: 'open end' });
  const mean = (spread.first + single.first) / 2e3;
  const crowding = coil.crowding(tap.turn, mean);
  const rise = Math.sqrt(crowding);
  const value = mean * rise;
  const far = spread.voltages[record.frame.earthedEnd === 'start' ? spread.voltages.length - 1 : 0]!;
  const both = spread.second !== undefined && single.second !== undefined;
  const second: Step[] = both
    ? [
        step(
          'second resonance',
          'mean of both, x the same root',
          ((spread.second + single.second) / 2e3) * rise,
          'kHz',
          end.recordedSecond,
        ),
      ]
    : [];
  return {
    figure: `${end.name === 'low' ? 'lower' : 'upper'} edge of the range, capacitor ${end.capacitor}`,
    value,
    unit: 'kHz',
    recorded: end.recordedKhz,
    formula:
      'f = 1/(2 pi sqrt(L C)) alone; with all turns: smallest omega of K v = omega^2 C v at the nodes of the winding',
    source: 'Thomson 1853; nodes and couplings by the ring sum, Maxwell 1873; self-capacitance Medhurst 1947',
    inputs: [
      input('inductance of the turns in use L', sectionUh, 'µH'),
      input('across them: capacitor, stray, aerial', end.acrossPf, 'pF'),
      input('self-capacitance of the turns in use', sectionPf, 'pF'),
      input('self-capacitance of the whole coil', coil.coil.selfPf(coil.coil.turns), 'pF'),
      input('lead of each tap', leadPf, 'pF'),
      input('contacts with a lead', on.taps.length),
    ],
    intermediates: [
      step('the turns in use alone', '1/(2 pi sqrt(L C))', alone, 'kHz'),
      step('far end over tap, voltage', 'from the circuit', far),
      step('capacitance along all turns', 'from the circuit', spread.first / 1e3, 'kHz'),
      step('capacitance at the open end', 'from the circuit', single.first / 1e3, 'kHz'),
      step('mean of both', '', mean, 'kHz'),
      step('crowding: L over working L', 'field of every turn', crowding),
      step('range with it', 'mean x its root', value, 'kHz'),
      step(
        'uncertainty',
        'half the difference of both',
        (Math.abs(spread.first - single.first) / 2e3) * rise,
        'kHz',
        end.recordedUncertainty,
      ),
      step('dead turns and leads change', 'against the turns alone', 100 * (mean / alone - 1), '%'),
      ...second,
    ],
    validity: {
      domain: 'wire much shorter than a wavelength: below a tenth of it',
      inside: coil.coil.wireM(coil.coil.turns) < 29979 / value,
    },
    error:
      'the two distributions bracket the truth; the limits of the inductance come on top, half of them in frequency',
  };
}

/** Both edges; none without a set. */
export function rangeFigures(subject: Subject): Figure[] {
  const { range } = subject.tap;
  const { set } = subject.record.demand;
  if (range === null || set === null) return [];
  const fixed = set.strayPf + set.aerialPf;
  const low: End = {
    name: 'low',
    capacitor: 'all in',
    acrossPf: set.capacitorHighPf + fixed,
    recordedKhz: range.lowKhz,
    recordedUncertainty: range.lowUncertaintyKhz,
    recordedSecond: range.secondLowKhz,
  };
  const high: End = {
    name: 'high',
    capacitor: 'all out',
    acrossPf: set.capacitorLowPf + fixed,
    recordedKhz: range.highKhz,
    recordedUncertainty: range.highUncertaintyKhz,
    recordedSecond: range.secondHighKhz,
  };
  return [endFigure(subject, low), endFigure(subject, high)];
}
