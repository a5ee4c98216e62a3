/**
 * The dial of one coil in its set: from readings of angle and frequency, position by position, to the frequency at any angle between
 * them.
 *
 * In between runs a monotone cubic (monotone.ts) in 1/f², 1/f, log f or f against the angle, whichever foretells the inner
 * readings of all positions best when each is left out: they are straight for capacitors whose plates are cut for even steps of capacitance,
 * wavelength, ratio and frequency. Nothing is drawn beyond the first and last reading of a position.
 *
 * Accuracy against simulated capacitors of these four laws and one between them, with strays, 6 readings evenly over the span and
 * no noise: tests/prove/dial.test.ts.
 */
import { Fault, type FaultParts } from '../fault.ts';
import { decimals, significant } from '../record/rounding.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Dial, DialPosition } from './charts-schema.ts';
import { monotoneCurve } from './monotone.ts';
import type { CoilReadings, DialReading } from './types.ts';

/** Readings that a position needs. */
export const LEAST_READINGS = 4;
/** Two readings at the same angle are one where their frequencies differ by no more than this share. */
const SAME_FREQUENCY = 0.003;
/** Readings of an angle that is closer than this are taken at the same. */
const SAME_DEG = 0.01;

type SmoothIn = DialPosition['smoothIn'];
type Knot = DialPosition['readings'][number];

const POWERS: Readonly<Record<SmoothIn, number>> = { '1/f²': -2, '1/f': -1, 'log f': 0, f: 1 };
const into = (how: SmoothIn, kHz: number) => (POWERS[how] === 0 ? Math.log(kHz) : kHz ** POWERS[how]);
const outOf = (how: SmoothIn, y: number) => (POWERS[how] === 0 ? Math.exp(y) : y ** (1 / POWERS[how]));

function through(readings: readonly Knot[], how: SmoothIn): (degrees: number) => number {
  const curve = monotoneCurve(readings.map(({ degrees, frequencyKhz }) => [degrees, into(how, frequencyKhz)] as const));
  return (degrees) => outOf(how, curve.at(degrees));
}

/** Greatest miss, in percent, when each inner reading is worked out from the others. */
function missOf(readings: readonly Knot[], how: SmoothIn): number {
  const misses = readings.slice(1, -1).map(({ degrees, frequencyKhz }, i) => {
    const others = readings.filter((_, k) => k !== i + 1);
    return Math.abs(100 * (through(others, how)(degrees) / frequencyKhz - 1));
  });
  return Math.max(...misses);
}

/** Frequency at an angle of a position. @throws RangeError outside its readings */
export const kHzAt = ({ readings, smoothIn }: DialPosition): ((degrees: number) => number) =>
  through(readings, smoothIn);

/** Angle at which a position is tuned to a frequency; to a millionth of a degree. @throws RangeError outside its readings */
export function degreesAt(position: DialPosition): (kHz: number) => number {
  const curve = kHzAt(position);
  const [first, last] = [position.readings[0]!, position.readings.at(-1)!];
  return (kHz) => {
    if (!(kHz >= position.lowKhz && kHz <= position.highKhz))
      throw new RangeError(`${kHz} kHz lies outside ${position.lowKhz} to ${position.highKhz}`);
    let [low, high] = [first.degrees, last.degrees];
    while (high - low > 1e-6) {
      const middle = (low + high) / 2;
      if (curve(middle) < kHz) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  };
}

const faultAt = (line: number | undefined, got: string, expected: string, todo: string): FaultParts => ({
  code: 'dial-not-drawn',
  place: line === undefined ? {} : { line },
  got,
  expected,
  todo,
});

const told = ({ degrees, frequencyKhz, line }: DialReading) => `${frequencyKhz} kHz at ${degrees}° (line ${line})`;

/** Readings of one position by rising angle, equal angles joined, and what is wrong with them. */
function sorted(
  tap: number,
  readings: readonly DialReading[],
  spanDeg: number,
): { knots: Knot[]; faults: FaultParts[] } {
  const faults: FaultParts[] = [];
  const inside = readings.filter((reading) => {
    const { degrees, frequencyKhz, line } = reading;
    const fits = degrees >= 0 && degrees <= spanDeg && Number.isFinite(frequencyKhz) && frequencyKhz > 0;
    if (!fits)
      faults.push(
        faultAt(
          line,
          `position ${tap}: ${told(reading)}`,
          `an angle from 0 to ${spanDeg}° and a frequency above 0`,
          `count degrees clockwise from the stop with the capacitor fully in; if the dial turns farther, state its span (now ${spanDeg}°)`,
        ),
      );
    return fits;
  });
  const ordered = [...inside].sort((a, b) => a.degrees - b.degrees || a.line - b.line);
  const kept: DialReading[] = [];
  for (const reading of ordered) {
    const last = kept.at(-1);
    if (last === undefined || reading.degrees - last.degrees > SAME_DEG) {
      if (last !== undefined && reading.frequencyKhz <= last.frequencyKhz)
        faults.push(
          faultAt(
            reading.line,
            `position ${tap}: ${told(last)}, then ${told(reading)}`,
            'a frequency that rises with the angle from the stop with the capacitor fully in',
            `read both again; if all readings of the position fall, count the angles from the other stop (${spanDeg} less the angle)`,
          ),
        );
      kept.push(reading);
    } else if (Math.abs(reading.frequencyKhz / last.frequencyKhz - 1) <= SAME_FREQUENCY)
      kept[kept.length - 1] = { ...last, frequencyKhz: (last.frequencyKhz + reading.frequencyKhz) / 2 };
    else
      faults.push(
        faultAt(
          reading.line,
          `position ${tap}: ${told(last)} and ${told(reading)}`,
          `one frequency at an angle, to ${100 * SAME_FREQUENCY} %`,
          'strike out the wrong one',
        ),
      );
  }
  if (faults.length === 0 && kept.length < LEAST_READINGS)
    faults.push(
      faultAt(
        kept.at(-1)?.line,
        `position ${tap}: readings at ${kept.length} ${kept.length === 1 ? 'angle' : 'angles'}`,
        `at least ${LEAST_READINGS}`,
        `read ${LEAST_READINGS - kept.length} more, spread evenly over the dial, the ends included`,
      ),
    );
  const knots = kept.map(({ degrees, frequencyKhz }) => ({
    degrees: decimals(degrees, 4),
    frequencyKhz: significant(frequencyKhz, 7),
  }));
  return { knots, faults };
}

/** What is taken where nothing is asked for: a dial that suits most sets, between the stops of most capacitors. */
export const USUAL_DIAL = { diameterMm: 150, spanDeg: 180 } as const;

export interface DialSpan {
  /** Degrees from stop to stop, {@link SPAN_DEG}. */
  readonly spanDeg: number;
}

/** Spans that a scale can be drawn for: numbers stand beside its arcs. */
export const SPAN_DEG = { least: 60, most: 300 } as const;

/**
 * The dial of a coil. @throws Fault 3 (`dial-not-drawn`) with the lines of readings that do not rise, lie outside the span or contradict
 * one another, and with every position of the record that has fewer than four; Fault 4 (`dial-span`) for a span that no scale can be drawn for
 */
export function dialOf(record: Pick<CoilRecord, 'windings'>, coil: CoilReadings, { spanDeg }: DialSpan): Dial {
  const { least, most } = SPAN_DEG;
  if (!(spanDeg >= least && spanDeg <= most))
    throw new Fault(4, {
      code: 'dial-span',
      got: `a dial of ${spanDeg}°`,
      expected: `${least} to ${most}° from stop to stop`,
      todo: `state what the shaft turns through; ${spanDeg > most ? most : least}° is the nearest`,
    });
  const taps = record.windings[0]!.taps.map(({ tap }) => tap);
  const foreign = coil.dial.filter(({ tap }) => !taps.includes(tap));
  const faults = foreign.map(({ tap, line }) =>
    faultAt(
      line,
      `position ${tap}`,
      `a position from 1 to ${taps.length}`,
      'put the number of the switch position there',
    ),
  );
  const read = taps.map((tap) => {
    const own = coil.dial.filter((reading) => reading.tap === tap);
    const { knots, faults: found } = sorted(tap, own, spanDeg);
    faults.push(...found);
    return { tap, knots };
  });
  if (faults.length > 0) throw new Fault(3, faults);
  // One capacitor turns all positions: what is smooth for it is asked of all of them, or a lucky hit at one would decide there.
  const ways = (Object.keys(POWERS) as SmoothIn[]).map((how) => {
    const misses = read.map(({ knots }) => missOf(knots, how));
    return { how, misses, worst: Math.max(...misses) };
  });
  const best = ways.reduce((a, b) => (b.worst < a.worst ? b : a));
  const positions = read.map(
    ({ tap, knots }, i): DialPosition => ({
      tap,
      readings: knots,
      smoothIn: best.how,
      missPercent: significant(best.misses[i]!, 3),
      lowKhz: knots[0]!.frequencyKhz,
      highKhz: knots.at(-1)!.frequencyKhz,
    }),
  );
  return { serial: coil.serial, spanDeg, positions };
}
