/**
 * The bared end of a tap, enlarged, one picture a covering: what stays on, what is tied, what is bare and what is tinned.
 * Millimetres on paper, the origin at the lower left. Common practice, from memory.
 */
import type { Wire } from '../stock/wire.ts';
import type { Drawing, Shape } from './drawing.ts';
import { line, polyline, rectangle } from './shapes.ts';

export const BARING_MM = { width: 29, height: 8 } as const;

export type CoveringKind = 'bare' | 'enamel' | 'enamel that tins' | 'textile' | 'litz';

/** What is drawn for a wire. */
export function coveringKind({
  covering,
  strands,
  solderable,
}: Pick<Wire, 'covering' | 'strands' | 'solderable'>): CoveringKind {
  if (strands > 1) return 'litz';
  if (/cotton|silk/.test(covering)) return 'textile';
  if (covering === 'bare') return 'bare';
  return solderable ? 'enamel that tins' : 'enamel';
}

const MIDDLE = 4;
/** Where the covering ends, where tin begins and where the wire ends. */
const [COVER, TIN, END] = [13, 19, 28];

/** Covered by threads: an outline with threads wound both ways. */
function threads(half: number): Shape[] {
  const shapes: Shape[] = [rectangle(0, MIDDLE - half, COVER, 2 * half, 'thin', 1)];
  for (let x = 0; x + 2 * half <= COVER + 0.01; x += 1.1) {
    shapes.push(line(x, MIDDLE - half, x + 2 * half, MIDDLE + half, 'hair'));
    shapes.push(line(x + 2 * half, MIDDLE - half, x, MIDDLE + half, 'hair'));
  }
  return shapes;
}

/** Thread tied round the end of the covering, so that it does not run back. */
const tie = (half: number): Shape[] =>
  [0.4, 1.2, 2].map((back) =>
    line(COVER - back, MIDDLE - half - 0.5, COVER - back + 0.3, MIDDLE + half + 0.5, 'outline'),
  );

const bareWire = (from: number, half: number): Shape => rectangle(from, MIDDLE - half, END - from, 2 * half, 'thin', 1);
const tin = (from: number, half: number): Shape => rectangle(from, MIDDLE - half, END - from, 2 * half, 'thin', 0.55);

/** A knife laid on flat and drawn towards the end. */
const knife: Shape[] = [
  polyline([
    [15.5, MIDDLE + 1.3],
    [18.5, MIDDLE + 4],
    [22, MIDDLE + 4],
  ]),
  polyline([
    [15.5, MIDDLE + 1.3],
    [17.5, MIDDLE + 4],
    [18.5, MIDDLE + 4],
  ]),
];

const PICTURES: Record<CoveringKind, () => Shape[]> = {
  bare: () => [rectangle(0, MIDDLE - 1, END, 2, 'thin', 1), tin(TIN, 1.2)],
  enamel: () => [
    rectangle(0, MIDDLE - 1.2, COVER, 2.4, 'outline', 0.8),
    bareWire(COVER, 0.9),
    tin(TIN + 3, 1.1),
    ...knife,
  ],
  'enamel that tins': () => [rectangle(0, MIDDLE - 1.2, TIN - 3, 2.4, 'outline', 0.8), tin(TIN - 3, 1.2)],
  textile: () => [...threads(1.9), bareWire(COVER, 1.1), tin(TIN, 1.3), ...tie(1.9)],
  litz: () => [
    ...threads(2.2),
    // The strands run together into the tin: not one may be left out.
    ...[-1.8, -1.2, -0.6, 0, 0.6, 1.2, 1.8].map((off) =>
      polyline([
        [COVER, MIDDLE + off],
        [COVER + 3, MIDDLE + off * 1.25],
        [TIN + 1, MIDDLE + off * 0.8],
      ]),
    ),
    tin(TIN + 1, 1.7),
    ...tie(2.2),
  ],
};

export function baringPicture(kind: CoveringKind): Drawing {
  return { shapes: PICTURES[kind]() };
}
