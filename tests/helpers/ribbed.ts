/** A hand-made record of a ribbed former, for tests: the sample's winding, with holes and sizes reckoned here and not by the planner. */
import { angleOf, axialAt } from '../../src/coil/layout.ts';
import type { CoilRecord, Hole } from '../../src/record/schema.ts';
import { type SampleOptions, sampleRecord } from './sample.ts';

export interface RibbedOptions extends Omit<SampleOptions, 'surface' | 'kind' | 'turns'> {
  readonly count?: number;
  /** Places of taps, the whole coil last, in steps of one rib. */
  readonly steps?: readonly number[];
  readonly widthMm?: number;
  readonly depthMm?: number;
  /** Inner rings between the end rings. */
  readonly rings?: number;
  readonly rimMm?: number;
  readonly segments?: number;
}

const round = (x: number, digits = 3) => Number(x.toFixed(digits));
const HOLE_MM = 1.2;
const TAP_MM = 1.6;
const CROWN_MM = 3;

export function ribbedRecord(options: RibbedOptions = {}): CoilRecord {
  const count = options.count ?? 12;
  const steps = options.steps ?? [50, 121, 245];
  const record = sampleRecord({ ...options, turns: steps.map((step) => step / count), method: 'drawn in' });
  const winding = record.windings[0]!;
  const { hand } = record.frame;
  const outside = record.former.outsideDiameterMm;
  const depth = options.depthMm ?? 0.22 * outside;
  const width = options.widthMm ?? 3.6;
  const rim = options.rimMm ?? 4;
  const half = Math.PI / count;
  const at = (turn: number) => round(axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, turn), 4);
  const hole = (
    purpose: Hole['purpose'],
    label: string,
    turn: number,
    tap: number | null,
    diameterMm: number,
  ): Hole => ({
    purpose,
    label,
    turn,
    tap,
    angleDeg: angleOf(turn, hand),
    axialMm: at(turn),
    diameterMm,
  });
  const holes: Hole[] = [
    { ...hole('anchor', 'A', 0, null, HOLE_MM), turn: null, axialMm: at(0) - 3 },
    hole('start', 'S', 0, null, HOLE_MM),
    ...steps.slice(0, -1).map((step, i) => hole('tap', `${i + 1}`, step / count, i + 1, TAP_MM)),
    ...[-2, -1, 0, 1].map((k) =>
      hole(
        'finish',
        k === 0 ? 'F' : `F${k}`,
        winding.turns + k * (1 + 1 / count),
        k === 0 ? steps.length : null,
        HOLE_MM,
      ),
    ),
  ];
  const across = (outside - winding.wire.overallMm - 1.2) * Math.cos(half);
  const inside = (outside - 2 * depth + 0.5 + width * Math.tan(half)) * Math.cos(half);
  const gable = (across / 2) * Math.tan(half) - width / 2 / Math.cos(half);
  const rings = options.rings ?? 1;
  const high = Math.max(...holes.map((one) => one.axialMm)) + 2;
  const seat = round(Math.max(high, 3 + (rings + 1) * (CROWN_MM + gable + 2)), 2);
  const length = round(seat + outside / 2 + rim - (across / 2 - 0.3) + 3);
  const bore = round(outside - 2 * depth - 0.5);
  return {
    ...record,
    holes,
    former: {
      ...record.former,
      body: 'ribbed',
      segments: options.segments ?? 144,
      boreDiameterMm: bore,
      wallMm: round((outside - bore) / 2),
      lengthMm: length,
      flange: { diameterMm: outside + 2 * rim, lowerMm: 3, upperMm: 3 },
      groove: { ...record.former.groove!, runInTurns: 0 },
      ears: record.former.ears.map((ear) => ({
        ...ear,
        angleDeg: ear.angleDeg + 45,
        centreRadiusMm: outside / 2 + rim + 6,
      })),
      numbers: Array.from({ length: count }, (_, rib) => ({
        text: rib === 0 ? 'S' : `${rib}`,
        angleDeg: angleOf(rib / count, hand),
        tap: null,
      })),
      ribs: {
        count,
        widthMm: width,
        depthMm: round(depth),
        ringMm: 3,
        innerRings: {
          topsMm: [
            ...Array.from({ length: rings }, (_, i) => round(3 + ((i + 1) * (seat - 3)) / (rings + 1))),
            round(seat + 0.4),
          ],
          crownMm: CROWN_MM,
          acrossMm: round(across),
          insideMm: round(inside),
        },
        seatMm: seat,
        seatDiameterMm: round(across - 0.6),
      },
    },
  };
}
