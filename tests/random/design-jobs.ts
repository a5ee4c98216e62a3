/** Random jobs of every kind: those of the printed parts, with a set, two switches, a bench's own habits, and what is round the coil. */
import { chance, randomJob } from './jobs.ts';

/** A job as text, the same for the same seed. */
export function designJob(seed: number): string {
  const random = chance(seed + 4242);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const maybe = (share: number) => random() < share;
  const between = (low: number, high: number, digits = 3) =>
    Number((low * (high / low) ** random()).toPrecision(digits));
  const job = JSON.parse(randomJob(seed));
  const printed = job.former.kind === 'printed';
  // The pitch of printed notches and grooves is as printed.
  const laidByHand = !printed || (job.former.body !== 'ribbed' && job.winding.pitch === 'close');
  const two = maybe(0.06);
  const withSet = (!two && maybe(0.6)) || (two && maybe(0.4));
  const aerial = withSet && maybe(0.3);
  const detector = withSet && maybe(0.3);
  const [low, high] = [between(8, 30), between(120, 500)];
  const set = {
    capacitor: `${low} pF to ${high} pF`,
    stray: `${pick([0, 6, 12, 25])} pF`,
    ...(aerial ? {} : { aerial: `${pick([0, 15, 60])} pF` }),
    ...(maybe(0.5) ? { lead: `${pick([0, 1, 3])} pF` } : {}),
    switch: pick(two ? ['open'] : ['open', 'open', 'shorted', 'shorted in sections', 'disconnected']),
  };
  const band = withSet && !two && maybe(0.3);
  const bandLow = between(300, 3000);
  const want = band
    ? {
        band: `${bandLow} kHz to ${Number((bandLow * between(1.8, 9)).toPrecision(4))} kHz`,
        ...(maybe(0.6) ? {} : { taps: pick([2, 3, 4, 5]) }),
        ...(maybe(0.5) ? {} : { overlap: `${pick([0, 3, 10])} %` }),
      }
    : two
      ? {
          ...job.want,
          inductance: Array.isArray(job.want.inductance) ? `5 uH to ${job.want.inductance[0]}` : job.want.inductance,
          taps: pick([3, 4, 6]),
          spacing: undefined,
        }
      : job.want;
  const contact = (extra: readonly string[]) => pick(['best', 'best', 'tap 1', ...extra]);
  const hasSecond = !two && maybe(0.35);
  const kind = pick(['same former', 'sleeve', 'inner', 'beside']);
  const least = between(0.03, 0.3, 2);
  const second = {
    kind,
    ...pick([
      { coupling: `${least}` },
      { coupling: `${least}` },
      { turns: pick([1, 3, 6, 12, 25]) },
      kind === 'same former'
        ? { coupling: `${least}` }
        : { coupling: `${least} to ${Number((least * 2.5).toPrecision(2))}` },
      { inductance: `${between(1, 20)} uH` },
    ]),
    ...(maybe(0.3) ? { wire: pick(['32 AWG enamel', '28 AWG enamel', '0.3 mm enamel', '26 AWG single silk']) } : {}),
    ...(maybe(0.15) ? { pitch: `${between(0.8, 2.5, 2)} mm` } : {}),
    ...(maybe(0.4) ? { end: pick(['start', 'finish']) } : {}),
    ...(maybe(0.15) && (kind === 'same former' || kind === 'beside') ? { distance: `${between(2, 15, 2)} mm` } : {}),
  };
  const aerialKeys = pick([
    { kind: 'dummy' },
    { kind: 'capacitor', capacitance: `${between(40, 400)} pF` },
    { kind: 'horizontal wire', length: `${between(8, 45)} m`, height: `${between(4, 12)} m` },
    { kind: 'vertical wire', length: `${between(4, 15)} m`, ...(maybe(0.5) ? { height: '2 m' } : {}) },
  ]);
  const detectorKeys = pick([
    { kind: 'other', resistance: `${between(2, 400)} kohm`, capacitance: `${between(1, 30)} pF` },
    { kind: 'germanium diode' },
  ]);
  return JSON.stringify({
    ...job,
    paper: pick(['A4', 'Letter']),
    units: pick(['metric', 'metric', 'inch', 'both']),
    want,
    ...(withSet ? { set } : maybe(0.3) ? { at: `${between(200, 8000)} kHz` } : {}),
    winding: {
      ...job.winding,
      ...(two
        ? { units: pick([4, 5, 6, 10]), 'tap-layout': 'auto', 'finish-trim': undefined, earthed: undefined }
        : {}),
    },
    ...(maybe(0.3) ? { temperature: `${pick([5, 35, 60])} degC` } : {}),
    ...(maybe(0.25)
      ? {
          'as-made': {
            diameter: `${pick([-0.12, 0.08, 0.25])} mm`,
            ...(maybe(0.6) && laidByHand ? { pitch: `${pick([-0.4, 0.8, 1.6])} %` } : {}),
          },
        }
      : {}),
    ...(hasSecond ? { second } : {}),
    ...(aerial
      ? {
          aerial: {
            ...aerialKeys,
            ...(maybe(0.3) ? { series: `${between(20, 300)} pF` } : {}),
            ...(maybe(0.3) ? { resistance: '40 ohm' } : {}),
            to: contact(hasSecond ? ['second', 'second'] : []),
          },
        }
      : {}),
    ...(detector ? { detector: { ...detectorKeys, to: contact([]) } } : {}),
    shop: {
      ...job.shop,
      meter: pick(['100 Hz', '1 kHz', '10 kHz', '100 kHz', '1 MHz']),
      ...(maybe(0.3) ? { 'meter-accuracy': `${pick([0.3, 1, 5])} %` } : {}),
      ...(maybe(0.5)
        ? {
            capacitors: pick([['100 pF'], ['47 pF', '470 pF'], ['100 pF', '220 pF', '1 nF']]),
            'capacitor-tolerance': `${pick([0.5, 1, 5])} %`,
          }
        : {}),
      ...(maybe(0.4)
        ? {
            generator: `${pick([50, 600])} ohm`,
            'generator-coupling': pick(['loop', '1 pF', '4.7 pF']),
            'probe-capacitance': `${pick([0, 8, 15, 100])} pF`,
            'probe-resistance': pick(['100 kohm', '1 Mohm', '10 Mohm']),
          }
        : {}),
    },
  });
}
