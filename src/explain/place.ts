/** Where a tap lies, and the wire up to it. */

import { LITZ_TAKE_UP } from '../coil/coil.ts';
import { angleOf, turnMiddles } from '../coil/layout.ts';
import { WIRE_SPREAD } from '../coil/tolerance.ts';
import { dcResistance, RESISTIVITY_20C } from '../physics/copper.ts';
import { type Figure, input, type Step, type Subject, step } from './explanation.ts';

export function positionFigure({ winding, tap, coil }: Subject): Figure {
  const { places, turns } = coil.coil;
  const middles = turnMiddles(turns);
  const { turn } = tap;
  const value = coil.coil.positionMm(turn);
  const after = middles.findIndex((middle) => middle >= turn);
  const between = after > 0;
  const i = between ? after : after === 0 ? 0 : middles.length - 1;
  const line: Step[] = between
    ? [
        step(`z of the turn whose middle is at ${middles[i - 1]}`, 'turnPositionsMm', places[i - 1]!, 'mm'),
        step(`z of the turn whose middle is at ${middles[i]}`, 'turnPositionsMm', places[i]!, 'mm'),
      ]
    : [step(`z of the turn whose middle is at ${middles[i]}`, 'turnPositionsMm', places[i]!, 'mm')];
  const even = winding.startMm + turn * winding.pitchMm;
  return {
    figure: 'place along the axis',
    value,
    unit: 'mm',
    recorded: tap.positionMm,
    formula: between
      ? 'z = z1 + (n - u1) (z2 - z1)/(u2 - u1), on the straight line between two turn middles u1, u2'
      : 'z = z1 + (n - u1) p, beyond the last turn middle u1 with the plain pitch',
    source: 'layout of the turns: ring k stands for the turn from k to k + 1',
    inputs: [
      input('turns to the tap n', turn),
      input('start z0', winding.startMm, 'mm'),
      input('pitch p', winding.pitchMm, 'mm'),
    ],
    intermediates: [
      ...line,
      step('without any gap', 'z0 + n p', even, 'mm'),
      step('pushed aside by gaps up to here', 'z - z0 - n p', value - even, 'mm'),
      step('length over the wires', 'z - z0 + overall wire', coil.coil.woundMm(turn), 'mm', tap.woundLengthMm),
    ],
    validity: { domain: 'any place from the start to the finish', inside: true },
    error: 'exact as drawn; what winding by hand adds is in the limits',
  };
}

export function angleFigure({ record, tap }: Subject): Figure {
  const { hand } = record.frame;
  return {
    figure: 'angle of the tap',
    value: angleOf(tap.turn, hand),
    unit: '°',
    recorded: tap.angleDeg,
    formula: hand === 'right' ? '360 (n - whole turns)' : '360 - 360 (n - whole turns)',
    source: `frame of the record: 0 is ${record.frame.angleZero}, positive ${record.frame.anglePositive}`,
    inputs: [input('turns to the tap n', tap.turn)],
    intermediates: [step('part of a turn', 'n - whole turns', tap.turn - Math.floor(tap.turn))],
    validity: { domain: 'any turn', inside: true },
    error: 'exact as drawn',
  };
}

/** Loops of earlier taps: how many, how long each, and how many stay in circuit up to this tap. */
function loopsOf({ record, winding, tap }: Subject): { count: number; eachM: number; inCircuit: number } {
  const count = tap.tap - 1 + (winding.unitTaps?.length ?? 0);
  const method = record.tapMethod;
  if (method === null) return { count, eachM: 0, inCircuit: 0 };
  // A tap is measured at the end of its own loop, half of which leads there. A twisted loop is soldered at its root.
  const own = tap.tap < winding.taps.length ? 0.5 : 0;
  return { count, eachM: method.loopM, inCircuit: method.name === 'twisted loop' ? 0 : count + own };
}

export function wireFigure(subject: Subject): Figure {
  const { winding, tap, coil } = subject;
  const loops = loopsOf(subject);
  const helix = coil.coil.wireM(tap.turn);
  const { corners, bendMm = 0 } = winding;
  const around = corners === undefined ? 'pi D' : '(2 k (D/2 - b) sin(pi/k) + 2 pi b)';
  return {
    figure: 'wire from the start to the tap',
    value: helix + loops.count * loops.eachM,
    unit: 'm',
    recorded: tap.wireFromStartM,
    formula: `sqrt((${around} n)^2 + (z - z0)^2) and the loops of earlier taps`,
    source: 'Pythagoras on the unrolled cylinder',
    inputs: [
      input(corners === undefined ? 'mean diameter D' : 'diameter D over the ribs', winding.meanDiameterMm, 'mm'),
      ...(corners === undefined ? [] : [input('ribs k', corners), input('bend over a rib b', bendMm, 'mm')]),
      input('turns to the tap n', tap.turn),
      input('advance z - z0', coil.coil.positionMm(tap.turn) - coil.coil.positionMm(0), 'mm'),
      input('loops before this tap', loops.count),
      input('wire in each', loops.eachM * 1000, 'mm'),
    ],
    intermediates: [
      step('around', `${around} n`, coil.coil.turnShape.length * tap.turn, 'm'),
      step('along the helix', '', helix, 'm'),
      step('in loops', 'number x length', loops.count * loops.eachM, 'm'),
    ],
    validity: { domain: 'an even helix; gaps at taps change it by less than 1e-5', inside: true },
    error: '1 % as wound by hand (common practice)',
  };
}

export function dcFigure(subject: Subject): Figure {
  const { winding, tap, coil } = subject;
  const { wire } = winding;
  const litz = wire.strands > 1;
  const loops = loopsOf(subject);
  const loopsM = loops.eachM * loops.inCircuit;
  const metres = (coil.coil.wireM(tap.turn) + loopsM) * (litz ? LITZ_TAKE_UP : 1);
  const ohm = (bareMm: number) => coil.coil.resistanceOhm(tap.turn, bareMm, loopsM);
  return {
    figure: 'resistance at direct current, 20 °C',
    value: dcResistance(metres, (litz ? wire.strandMm : wire.bareMm) / 1e3, wire.strands),
    unit: 'Ω',
    recorded: tap.resistanceDcOhm,
    formula: litz ? '4 rho len/(pi ds^2 strands), len with the take-up of stranding' : '4 rho len/(pi d^2)',
    source: litz
      ? 'NBS Circular 31, 100 % IACS copper; take-up of one bunching 1.5 %'
      : 'NBS Circular 31, 100 % IACS copper',
    inputs: [
      input('resistivity rho', RESISTIVITY_20C * 1e6, 'Ω mm²/m'),
      input('helix', coil.coil.wireM(tap.turn), 'm'),
      input('loops in circuit', loops.inCircuit),
      ...(litz
        ? [input('strands', wire.strands), input('strand ds', wire.strandMm, 'mm'), input('take-up', LITZ_TAKE_UP)]
        : [input('bare wire d', wire.bareMm, 'mm')]),
    ],
    intermediates: [
      step('wire in circuit len', '', metres, 'm'),
      step('a metre of it', '', ohm(wire.bareMm) / metres, 'Ω/m'),
      step(
        'lower limit',
        'thickest wire, 1 % less of it',
        ohm(wire.bareHighMm) * (1 - WIRE_SPREAD),
        'Ω',
        tap.resistanceLowOhm,
      ),
      step(
        'upper limit',
        'thinnest wire, 1 % more of it',
        ohm(wire.bareLowMm) * (1 + WIRE_SPREAD),
        'Ω',
        tap.resistanceHighOhm,
      ),
    ],
    validity: { domain: 'annealed copper at 20 °C; 0.393 % more a kelvin', inside: true },
    error: 'that of the bare diameter, twice; 1 % of stretch in winding adds 2 %',
  };
}
