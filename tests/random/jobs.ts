/** Jobs at random for the printed parts: small and large, every option of former, printer, shop and parts. */

/** Numbers from 0 to 1 that a seed repeats (mulberry32: a published generator in the public domain). */
export function chance(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

const WIRES = [
  '24 AWG enamel',
  '28 AWG enamel',
  '32 AWG enamel heavy',
  '0.5 mm enamel',
  '18 AWG enamel',
  '22 AWG double cotton',
  '26 AWG single silk',
  '20 x 0.1 mm litz single silk',
  '1.25 mm bare',
];

/** A job as text, the same for the same seed. */
export function randomJob(seed: number): string {
  const random = chance(seed);
  const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
  const between = (low: number, high: number, step = 0.01) => {
    const value = low * (high / low) ** random();
    return Number((Math.round(value / step) * step).toFixed(4));
  };
  const maybe = (share: number) => random() < share;
  const mm = (value: number) => `${value} mm`;

  const printed = maybe(0.75);
  const ribbed = printed && maybe(0.25);
  const diameter = between(14, 130, 0.5);
  // Turns that a coil of this size can hold: inductance grows with the diameter.
  const high = between(4, 40, 0.1) * (diameter / 20) ** 1.5;
  const taps = pick([1, 2, 2, 3, 4, 5, 6, 8, 11, 15]);
  const low = high / between(taps < 5 ? 1.6 : 6, 16, 0.1);
  const nozzle = pick([0.25, 0.4, 0.4, 0.4, 0.6]);
  const height = maybe(0.25) ? between(50, 120, 1) : between(150, 300, 1);
  const longest = maybe(0.3) ? 1.8 * height : Math.max(60, height - 5);
  const mounting = printed ? pick(['ears', 'base', 'none']) : 'none';
  const former = {
    kind: printed ? 'printed' : 'tube',
    'outside-diameter': maybe(0.3) && printed ? `${diameter} mm to ${(diameter * 1.2).toFixed(1)} mm` : mm(diameter),
    longest: mm(Math.round(printed ? longest : 400)),
    mounting,
    ...(printed ? { flanges: maybe(0.7) } : {}),
    ...(ribbed
      ? { body: 'ribbed', ribs: pick([6, 8, 9, 12, 16, 24].filter((one) => one === 6 || one <= diameter / 4)) }
      : {}),
    ...(maybe(0.15) ? { wall: mm(between(1, 4, 0.05)) } : {}),
    ...(mounting !== 'none' && maybe(0.4) ? { screw: mm(pick([3.4, 4.4, 5.5])) } : {}),
    ...(mounting !== 'none' && maybe(0.15) ? { 'screw-circle': mm(between(diameter + 10, diameter + 50, 1)) } : {}),
    material: printed ? pick(['PLA', 'PETG', 'ABS', 'ASA']) : pick(['card', 'phenolic paper', 'acrylic']),
  };
  const winding = {
    hand: pick(['right', 'left']),
    earthed: pick(['start', 'finish']),
    pitch: pick(['any', 'any', 'any', 'close', 'spaced', 'spaced', 'spaced', mm(between(0.8, 3, 0.2))]),
    'tap-method': pick(['auto', 'auto', 'auto', 'auto', 'twisted loop', 'lifted turn', 'cut pair', 'lug', 'drawn in']),
    'tap-layout': pick(['auto', 'auto', 'in line', 'staggered']),
    'finish-trim': maybe(0.7),
  };
  const printer = {
    bed: maybe(0.15) ? `${between(80, 130, 1)} x ${between(80, 130, 1)} mm` : '250 x 210 mm',
    height: mm(height),
    nozzle: mm(nozzle),
    layer: mm(pick([0.1, 0.15, 0.2, 0.25].filter((one) => one <= nozzle))),
    clearance: mm(between(0.1, 0.6, 0.05)),
    'hole-compensation': mm(pick([0, 0, 0.1, 0.2, 0.4, -0.1])),
    scale: maybe(0.2)
      ? pick([['100.4 %'], ['100.3 %', '100.3 %', '100 %'], ['99.8 %', '100.2 %', '100.5 %']])
      : '100 %',
    material: pick(['PLA', 'PETG']),
  };
  const shop = {
    // Now and then thicker than the bore takes.
    shaft: mm(pick([3, 4, 5, 6, 6.35, 8, 10, 12].filter((one) => one < diameter / 3 || one < 4))),
    'shaft-form': pick(['round', 'hexagon']),
    spool: `${between(40, 160, 1)} x ${between(20, 100, 1)} mm`,
    'spool-bore': mm(between(9, 30, 0.5)),
  };
  // Drawn last, so that what a seed gave before it still gives.
  const secondWinding = () => {
    if (!maybe(0.3)) return {};
    const kind = pick(['same former', 'sleeve', 'sleeve', 'inner', 'inner', 'beside', 'beside']);
    const tight = between(0.03, kind === 'beside' ? 0.1 : 0.3);
    const slides = kind !== 'same former' && maybe(0.6);
    const loose = Number((tight * between(0.2, 0.8)).toFixed(3));
    const asked = maybe(0.3)
      ? { turns: pick([1, 2, 4, 8, 15, 30]) }
      : { coupling: slides && loose < tight ? `${loose} to ${tight}` : tight };
    return {
      set: { capacitor: '15 pF to 380 pF' },
      second: {
        kind,
        ...asked,
        wire: pick(['0.2 mm enamel', '0.4 mm enamel', '26 AWG double cotton']),
        end: pick(['start', 'finish', 'finish']),
      },
    };
  };
  const some = printed ? ['former', 'coupon'] : ['saddle', 'coupon'];
  const parts = maybe(0.35) ? 'all' : pick([undefined, undefined, some, ['arbor', 'stand'], ['comb', 'loop gauge']]);
  const job = {
    job: `Random ${seed}`,
    want:
      taps === 1
        ? { inductance: [`${high.toFixed(2)} uH`] }
        : {
            inductance: `${low.toFixed(2)} uH to ${high.toFixed(2)} uH`,
            taps,
            spacing: pick(['even ratio', 'even turns', 'even frequency']),
          },
    former,
    wire: maybe(0.7) ? [pick(WIRES)] : [pick(WIRES), pick(WIRES)],
    winding,
    prefer: pick(['least loss', 'compact', 'least wire', 'closest taps']),
    printer,
    shop,
    ...(parts === undefined ? {} : { parts }),
  };
  return JSON.stringify({ ...job, ...secondWinding() });
}
