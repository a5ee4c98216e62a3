/**
 * How a tap is made, drawn at its place on the developed surface at true size: a loop that stands outwards or, dashed, goes in
 * behind the paper; the strip under a lifted turn; a lug above its turn. Sizes are those of the instructions for each.
 */
import type { CoilRecord } from '../record/schema.ts';
import { type Box, inside, overlap } from './boxes.ts';
import type { Shape } from './drawing.ts';
import { polygon, polyline, rectangle } from './shapes.ts';

export type TapMethod = CoilRecord['tapMethod']['name'];

/** Width of the strip along the wire; of a lug, its thickness, and how far its foot reaches under the turn. */
const STRIP_MM = 5;
const LUG_MM = { wide: 4, thick: 0.5, foot: 2.4 } as const;
/** A loop: its twist begins and ends so far from the place, then comes the eye; half its breadth. */
const LOOP_MM = { from: 1.6, twist: 3.8, end: 6.2, half: 1 } as const;
const EYE_CORNERS = 16;
/** Directions of a loop, the handiest first: it stands outwards, so that any of them is true. */
const TURNS = [90, 60, 120, 30, 150, 0, 180, -30, -150, -60, -120, -90];

type Place = readonly [number, number];

/** What stands at the place itself, over the cross, and how far it reaches; labels keep clear of it. */
export function markAtTap(method: TapMethod, x: number, y: number, overallMm: number, pitchMm: number) {
  if (method === 'lifted turn') {
    const high = Math.min(2.4, Math.max(0.8, pitchMm));
    return { shapes: [rectangle(x - STRIP_MM / 2, y - high / 2, STRIP_MM, high, 'thin')], reachMm: STRIP_MM / 2 + 0.2 };
  }
  if (method === 'lug') {
    const foot = y + overallMm / 2;
    return {
      shapes: [
        rectangle(x - LUG_MM.wide / 2, foot - LUG_MM.foot, LUG_MM.wide, LUG_MM.foot, 'hair', undefined, 'dashed'),
        rectangle(x - LUG_MM.wide / 2, foot, LUG_MM.wide, LUG_MM.thick, 'thin', 0),
      ],
      reachMm: LUG_MM.wide / 2 + 0.3,
    };
  }
  return { shapes: [], reachMm: 1.5 };
}

/**
 * Two strands twisted about one another, and the eye at their end, along a direction. Behind the paper both are in dashes of
 * their own: those of a dashed line are longer than the eye is round.
 */
function loopAt(x: number, y: number, turnDeg: number, behind: boolean): Shape[] {
  const [c, s] = [Math.cos((turnDeg * Math.PI) / 180), Math.sin((turnDeg * Math.PI) / 180)];
  const at = (along: number, aside: number): Place => [x + along * c - aside * s, y + along * s + aside * c];
  const { from, twist, end, half } = LOOP_MM;
  const middle = (twist + end) / 2;
  const eye = Array.from({ length: EYE_CORNERS }, (_, i) => {
    const a = (i * 2 * Math.PI) / EYE_CORNERS;
    return at(middle + ((end - twist) / 2) * Math.cos(a), half * Math.sin(a));
  });
  if (behind) {
    const third = (twist - from) / 3;
    const dashes = [
      [at(from, 0), at(from + third, 0)],
      [at(twist - third, 0), at(twist, 0)],
      ...eye.flatMap((corner, i) => (i % 2 === 0 ? [[corner, eye[i + 1]!]] : [])),
    ];
    return dashes.map((points) => polyline(points, 'thin'));
  }
  const strand = (side: number) =>
    Array.from({ length: 13 }, (_, i) =>
      at(from + ((twist - from) * i) / 12, side * 0.4 * Math.sin((i * Math.PI) / 4)),
    );
  return [polyline(strand(1), 'thin'), polyline(strand(-1), 'thin'), polygon(eye, 'thin')];
}

function loopBox(x: number, y: number, turnDeg: number): Box {
  const [c, s] = [Math.cos((turnDeg * Math.PI) / 180), Math.sin((turnDeg * Math.PI) / 180)];
  const { from, end, half } = LOOP_MM;
  const corners = [from, end].flatMap((along) =>
    [-half, half].map((aside): Place => [x + along * c - aside * s, y + along * s + aside * c]),
  );
  const [xs, ys] = [corners.map(([u]) => u), corners.map(([, v]) => v)];
  return { left: Math.min(...xs), right: Math.max(...xs), bottom: Math.min(...ys), top: Math.max(...ys) };
}

/** Loops at places where there is room for one; `taken` is what they keep off. */
export function loopMarks(
  method: TapMethod,
  places: readonly { readonly x: number; readonly y: number }[],
  region: Box,
  taken: readonly Box[],
): { shapes: Shape[]; taken: Box[] } {
  if (method !== 'twisted loop' && method !== 'drawn in') return { shapes: [], taken: [] };
  const shapes: Shape[] = [];
  const used: Box[] = [];
  for (const { x, y } of places) {
    const here: Box = { left: x, right: x, bottom: y, top: y };
    const others = [...taken.filter((box) => !inside(here, box)), ...used];
    const turn = TURNS.find((each) => {
      const box = loopBox(x, y, each);
      return inside(box, region) && !others.some((other) => overlap(other, box));
    });
    if (turn === undefined) continue;
    shapes.push(...loopAt(x, y, turn, method === 'drawn in'));
    used.push(loopBox(x, y, turn));
  }
  return { shapes, taken: used };
}
