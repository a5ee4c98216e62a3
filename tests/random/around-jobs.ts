/** Jobs at random for the set around the coil: coils, switches, second windings, aerials, detectors, and where they are connected. */
import { DETECTORS } from '../../src/stock/detectors.ts';
import { chance } from './jobs.ts';

const WIRES = [
  '24 AWG enamel',
  '28 AWG enamel',
  '0.5 mm enamel',
  '0.4 mm enamel',
  '22 AWG double cotton',
  '20 x 0.1 mm litz single silk',
];

/** A job as text, the same for the same seed. */
export function aroundJob(seed: number): string {
  const random = chance(seed + 4711);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const maybe = (share: number) => random() < share;
  const between = (low: number, high: number, digits = 3) =>
    Number((low * (high / low) ** random()).toPrecision(digits));

  const diameter = between(30, 90, 2);
  const high = between(40, 300) * Math.min(1, diameter / 60);
  const units = maybe(0.1);
  const taps = units ? pick([2, 3, 4]) : pick([2, 3, 4, 5, 6, 8]);
  const earthed = pick(['start', 'start', 'finish'] as const);
  const tube = maybe(0.2);
  const hasSecond = maybe(0.6);
  const kind = pick(['same former', 'sleeve', 'inner', 'beside']);
  const second = {
    kind,
    ...(maybe(0.5) ? { turns: Math.round(between(2, 30)) } : { coupling: between(0.02, 0.5, 2) }),
    ...(maybe(0.5) ? { wire: pick(WIRES) } : {}),
    ...(maybe(0.3) ? { end: pick(['start', 'finish']) } : {}),
  };
  const tap = () => `tap ${1 + Math.floor(random() * taps)}`;
  const open = earthed === 'finish' ? ['start'] : [];
  const aerialTo = pick(['best', 'best', tap(), ...open, ...(hasSecond ? ['second', 'second'] : [])]);
  const series = maybe(0.4) ? { series: `${between(20, 300)} pF` } : {};
  const loss = maybe(0.3) ? { resistance: `${between(5, 100, 2)} ohm` } : {};
  const aerial = {
    ...pick([
      { kind: 'dummy' },
      { kind: 'capacitor', capacitance: `${between(30, 400)} pF`, ...loss },
      { kind: 'horizontal wire', length: `${between(5, 40, 2)} m`, height: `${between(2, 15, 2)} m`, ...loss },
      { kind: 'vertical wire', length: `${between(2, 12, 2)} m`, ...loss },
    ]),
    ...series,
    to: aerialTo,
  };
  const detector = {
    ...(maybe(0.3)
      ? { kind: 'other', resistance: `${between(5, 1000, 2)} kohm`, capacitance: `${between(1, 40, 2)} pF` }
      : { kind: pick(DETECTORS.map((one) => one.kind)) }),
    to: pick(['best', 'best', tap(), ...open]),
  };
  const which = random();
  return JSON.stringify({
    job: `Set ${seed}`,
    want: units
      ? { inductance: `${(high / 20).toPrecision(3)} uH to ${high.toPrecision(3)} uH`, taps }
      : { inductance: `${(high / between(3, 10)).toPrecision(3)} uH to ${high.toPrecision(3)} uH`, taps },
    set: {
      capacitor: pick(['15 pF to 380 pF', '12 pF to 500 pF', '25 pF to 250 pF']),
      stray: `${between(5, 25, 2)} pF`,
      lead: `${between(1, 5, 2)} pF`,
      switch: units ? 'open' : pick(['open', 'open', 'shorted', 'shorted in sections', 'disconnected']),
    },
    ...(hasSecond ? { second } : {}),
    ...(which < 0.9 ? { aerial } : {}),
    ...(which > 0.1 ? { detector } : {}),
    former: {
      kind: tube ? 'tube' : 'printed',
      'outside-diameter': units ? `${diameter} mm to ${Math.round(diameter * 1.3)} mm` : `${diameter} mm`,
      longest: '300 mm',
      ...(!tube && maybe(0.2) ? { body: 'ribbed' } : {}),
    },
    wire: [pick(WIRES)],
    winding: {
      earthed,
      pitch: pick(['any', 'close', 'spaced']),
      ...(hasSecond || maybe(0.3) ? { 'tap-method': pick(['drawn in', 'twisted loop', 'auto']) } : {}),
      ...(units ? { units: 4 } : {}),
    },
    printer: { bed: '300 x 300 mm', height: '320 mm' },
  });
}
