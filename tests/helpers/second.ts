/** A hand-made second winding on a sample record: plain arithmetic, not the planner, so that both can be wrong apart. */
import type { SecondEntry } from '../../src/record/around-schema.ts';
import type { CoilRecord } from '../../src/record/schema.ts';

export interface SecondOptions {
  readonly kind?: 'same former' | 'sleeve' | 'inner' | 'beside';
  readonly turns?: number;
  readonly overallMm?: number;
  readonly pitchMm?: number;
  /** Couplings of the scale from the tightest place, evenly over the travel. */
  readonly couplings?: readonly number[];
  /** Upwards or downwards; 0: it does not slide. */
  readonly travelMm?: number;
  readonly angleDeg?: number;
  /** Diameters of a body, where those that follow from the record are not wanted. */
  readonly insideMm?: number;
  readonly outsideMm?: number;
}

/** Three lines in the wall of a tube. */
const WALL_LINES = 3;

/** The record with a second winding on it. */
export function withSecondWinding(record: CoilRecord, options: SecondOptions = {}): CoilRecord {
  const kind = options.kind ?? 'sleeve';
  const w = options.overallMm ?? 0.4;
  const turns = options.turns ?? 8;
  const pitch = options.pitchMm ?? w * 1.02;
  const travel = options.travelMm ?? 0;
  const angle = options.angleDeg ?? 200;
  const couplings = options.couplings ?? [0.3, 0.25, 0.2, 0.15, 0.1];
  const { former, printer, windings } = record;
  const main = windings[0]!;
  const wall = WALL_LINES * printer.lineMm;
  const bodies = {
    sleeve: () => {
      const over = main.meanDiameterMm + main.wire.overallMm + 2 * Math.max(main.wire.overallMm, w);
      const inside = Math.max(over, former.flange?.diameterMm ?? 0) + printer.clearanceMm;
      return { inside, outside: inside + 2 * wall };
    },
    inner: () => {
      const outside = former.boreDiameterMm - 2 * main.wire.overallMm - 2 * w - printer.clearanceMm;
      return { inside: outside - 2 * wall, outside };
    },
    beside: () => ({ inside: former.outsideDiameterMm - 2 * former.wallMm, outside: former.outsideDiameterMm }),
    'same former': () => ({ inside: former.boreDiameterMm, outside: former.outsideDiameterMm }),
  };
  const own = bodies[kind]();
  const [inside, outside] = [options.insideMm ?? own.inside, options.outsideMm ?? own.outside];
  const hole = Math.max(0.8, Math.ceil((1.25 * w + 0.2) * 10) / 10);
  const tie = hole + 1.2;
  const span = Math.max(turns * pitch, 1.3 * hole + 1);
  const margin = tie + 0.71 * hole + 1;
  const own2 = span + 2 * margin;
  const low =
    kind === 'beside' ? former.lengthMm + 2 : kind === 'sleeve' ? former.lengthMm - own2 / 2 : former.lengthMm - own2;
  const reach = { sleeve: 13, inner: 4, beside: 0, 'same former': 0 }[kind];
  const high = travel === 0 ? low + own2 : Math.max(low + own2, former.lengthMm + reach + Math.max(0, -travel));
  const start = low + margin;
  const back = (record.frame.hand === 'right' ? -360 : 360) * (6 / (Math.PI * (outside + w)));
  const turned = (deg: number) => (((angle + deg) % 360) + 360) % 360;
  const at = (label: string, purpose: 'start' | 'finish', angleDeg: number, axialMm: number) => ({
    label,
    purpose,
    angleDeg,
    axialMm,
    diameterMm: hole,
  });
  const second: SecondEntry = {
    kind,
    turns,
    wire: { name: `${w} mm sample`, bareMm: 0.9 * w, overallMm: w },
    pitchMm: pitch,
    spacerMm: pitch > 1.1 * w ? pitch - w : 0,
    meanDiameterMm: outside + w,
    startMm: start,
    finishMm: start + span,
    turnPositionsMm: Array.from({ length: turns }, (_, k) => start + (k + 0.5) * pitch),
    distanceMm: -1,
    wireLengthM: (turns * Math.PI * (outside + w)) / 1000,
    leadsM: 0.4,
    wireMassG: 1,
    resistanceDcOhm: 0.5,
    inductanceUh: 4,
    selfCapacitancePf: 2,
    betweenPf: 8,
    mutualUh: 6,
    coupling: couplings[0]!,
    wanted: null,
    working: [],
    slide:
      travel === 0
        ? null
        : {
            travelMm: travel,
            scale: couplings.map((coupling, i) => ({
              mm: (Math.abs(travel) * i) / (couplings.length - 1),
              coupling,
            })),
          },
    body:
      kind === 'same former'
        ? null
        : { insideDiameterMm: inside, outsideDiameterMm: outside, lengthMm: high - low, lowMm: low },
    holes: [
      at('P1a', 'start', turned(back), start - tie),
      at('P1', 'start', turned(0), start),
      at('P2', 'finish', turned(0), start + span),
      at('P2a', 'finish', turned(-back), start + span + tie),
    ],
    why: 'sample',
  };
  const none = { aerial: null, detector: null, ranges: [], channelsKhz: [], pairs: [], best: [], notes: [] };
  return { ...record, around: { ...none, second } };
}
