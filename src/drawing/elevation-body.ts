/** The former and the turns on it as the elevation shows them. Millimetres on paper at a scale `s`. */
import { axialAt } from '../coil/layout.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { Winding } from '../record/winding-schema.ts';
import type { Shape } from './drawing.ts';
import { polyline, rectangle } from './shapes.ts';

/** Former, rims, foot and ears, or the ribs between the end rings. */
export function formerOutline(record: CoilRecord, s: number): Shape[] {
  const { former } = record;
  const r = (former.outsideDiameterMm / 2) * s;
  const top = former.lengthMm * s;
  const shapes: Shape[] = [];
  for (const ear of former.ears) {
    const a = (ear.angleDeg * Math.PI) / 180;
    const x = Math.sin(a) * ear.centreRadiusMm * s;
    const half = (ear.widthMm / 2) * s;
    const behind = Math.cos(a) < 0;
    shapes.push(rectangle(x - half, 0, 2 * half, ear.thicknessMm * s, 'thin', undefined, behind ? 'dashed' : 'solid'));
  }
  const { flange, base } = former;
  const low = (base?.thicknessMm ?? flange?.lowerMm ?? 0) * s;
  const high = top - (flange ? flange.upperMm * s : 0);
  if (former.ribs) shapes.push(...ribs(record, low, high, s));
  else shapes.push(rectangle(-r, low, 2 * r, high - low, 'outline', 1));
  if (flange) {
    const rim = (flange.diameterMm / 2) * s;
    if (!base) shapes.push(rectangle(-rim, 0, 2 * rim, flange.lowerMm * s, 'outline'));
    shapes.push(rectangle(-rim, high, 2 * rim, flange.upperMm * s, 'outline'));
  }
  if (base) shapes.push(rectangle((-base.diameterMm / 2) * s, 0, base.diameterMm * s, base.thicknessMm * s, 'outline'));
  return shapes;
}

/** Ribs in front and at the sides, each as broad as it is seen from outside. */
function ribs({ former }: CoilRecord, low: number, high: number, s: number): Shape[] {
  const { count, widthMm, depthMm } = former.ribs!;
  const r = former.outsideDiameterMm / 2;
  return Array.from({ length: count }, (_, i) => (2 * Math.PI * i) / count).flatMap((a) => {
    if (Math.cos(a) < -1e-9) return [];
    const corners = [r, r - depthMm].flatMap((out) =>
      [-1, 1].map((side) => out * Math.sin(a) + ((side * widthMm) / 2) * Math.cos(a)),
    );
    const [left, right] = [Math.min(...corners) * s, Math.max(...corners) * s];
    return [rectangle(left, low, right - left, high - low, 'thin', 1)];
  });
}

/** What is known of turns that are drawn: of a record, or of a coil of which there is no more. */
export interface Wound {
  readonly windings: readonly Pick<Winding, 'turns' | 'pitchMm' | 'meanDiameterMm' | 'turnPositionsMm'>[];
  readonly frame: Pick<CoilRecord['frame'], 'hand'>;
  readonly former: Pick<CoilRecord['former'], 'ribs'>;
}

/**
 * The front half of the turn that comes round to the start hole's side at `k` turns, as points of the picture at a scale.
 * Over ribs the wire runs straight from one to the next.
 */
export function frontOfTurn(record: Wound, k: number, s: number): [number, number][] {
  const winding = record.windings[0]!;
  const sense = record.frame.hand === 'right' ? 1 : -1;
  const r = (winding.meanDiameterMm / 2) * s;
  const from = Math.max(0, k - 0.25);
  const to = Math.min(winding.turns, k + 0.25);
  const place = (u: number): [number, number] => {
    const z = axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, u);
    return [sense * r * Math.sin(2 * Math.PI * u), z * s];
  };
  const { ribs } = record.former;
  if (ribs === null) return Array.from({ length: 11 }, (_, i) => place(from + ((to - from) * i) / 10));
  const step = 1 / ribs.count;
  const first = Math.floor(from / step + 1e-9);
  const last = Math.ceil(to / step - 1e-9);
  const corners = Array.from({ length: last - first + 1 }, (_, i) => place((first + i) * step));
  const onChord = (u: number): [number, number] => {
    const i = Math.min(Math.floor(u / step + 1e-9) - first, corners.length - 2);
    const [[x1, z1], [x2, z2]] = [corners[i]!, corners[i + 1]!];
    const share = u / step - first - i;
    return [x1 + (x2 - x1) * share, z1 + (z2 - z1) * share];
  };
  return [onChord(from), ...corners.slice(1, -1), onChord(to)];
}

/** The front half of every turn. */
export function turns(record: CoilRecord, s: number): Shape[] {
  const winding = record.windings[0]!;
  const shapes: Shape[] = [];
  for (let k = 0; k - 0.25 < winding.turns; k++)
    shapes.push(polyline(frontOfTurn(record, k, s), winding.wire.overallMm * s > 0.6 ? 'thin' : 'hair'));
  return shapes;
}
