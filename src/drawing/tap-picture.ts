/**
 * How a tap is made, in three small pictures side by side; one set a method. Millimetres on paper, the origin at the
 * lower left of the row. The words under each picture come from outside.
 */
import type { CoilRecord } from '../record/schema.ts';
import type { Drawing, Shape } from './drawing.ts';
import { arrow, circle, line, polyline, rectangle } from './shapes.ts';

export type TapMethodName = CoilRecord['tapMethod']['name'];

/** Room of one picture; those of a wall cut through are lower. */
export const PANEL_MM = { width: 29.5, height: { wall: 17.5, turns: 22.5 } } as const;

export const panelHeight = (method: TapMethodName): number =>
  method === 'drawn in' || method === 'cut pair' ? PANEL_MM.height.wall : PANEL_MM.height.turns;

const WIRE = 'outline';

/** Turns seen from outside, as lines; the one at `skip` is left to the caller. */
function turnsSeen(skip: number): Shape[] {
  return [0, 1, 2, 3].filter((k) => k !== skip).map((k) => line(1, 2 + k * 2, 29, 2 + k * 2, WIRE));
}

/** Two strands twisted round one another, upwards from (x, y). */
function twist(x: number, y: number, length: number, down = false): Shape[] {
  return [1, -1].map((side) => {
    const points: [number, number][] = [];
    for (let i = 0; i <= 40; i++) {
      const t = i / 40;
      points.push([x + side * 0.75 * Math.cos(t * Math.PI * 6), y + (down ? -1 : 1) * t * length]);
    }
    return polyline(points, WIRE);
  });
}

const end = (x: number, y: number, width: number, height: number) => rectangle(x, y, width, height, 'thin', 0.55);

function twistedLoop(stage: number): Shape[] {
  const shapes = turnsSeen(3);
  if (stage === 0) {
    shapes.push(
      polyline(
        [
          [1, 8],
          [13, 8],
          [13, 18],
          [13.6, 20],
          [15, 20.8],
          [16.4, 20],
          [17, 18],
          [17, 8],
          [29, 8],
        ],
        WIRE,
      ),
    );
    shapes.push(...arrow(22, 11, 22, 20));
    return shapes;
  }
  shapes.push(line(1, 8, 14.25, 8, WIRE), line(15.75, 8, 29, 8, WIRE), ...twist(15, 8, 10));
  shapes.push(circle(15, 19.2, 1.3, WIRE));
  if (stage === 2) {
    shapes.push(end(13.6, 14.4, 2.8, 7), circle(15, 8.4, 1.2, 'thin', 0));
  }
  return shapes;
}

function section(): Shape[] {
  const shapes: Shape[] = [line(1, 6, 29, 6, WIRE)];
  for (let x = 2; x < 28; x += 3) shapes.push(line(x, 3.8, x + 2.2, 6, 'hair'));
  return shapes;
}

function liftedTurn(stage: number): Shape[] {
  const shapes = section();
  for (const x of [5, 8.4, 11.8, 18.2, 21.6, 25]) shapes.push(circle(x, 7.6, 1.6, 'thin', 1));
  shapes.push(rectangle(13.6, 6, 2.8, 4.2, 'thin', 0.8), circle(15, 11.8, 1.6, 'thin', 1));
  if (stage === 0) shapes.push(...arrow(15, 19, 15, 14.2));
  if (stage >= 1) shapes.push(end(13.7, 12.6, 2.6, 0.9));
  if (stage === 2) shapes.push(circle(15, 14, 1.1, 'thin', 0), line(15, 14, 15, 22, WIRE));
  return shapes;
}

/** A wall cut through, with holes at the given places. */
function wall(holes: readonly number[]): Shape[] {
  const shapes: Shape[] = [];
  let left = 1;
  for (const hole of [...holes, 31]) {
    const right = Math.min(29, hole - 1.1);
    shapes.push(rectangle(left, 12, right - left, 3.4, 'thin', 0.85));
    left = hole + 1.1;
  }
  return shapes;
}

function cutPair(stage: number): Shape[] {
  const shapes = wall([11, 19]);
  shapes.push(
    polyline(
      [
        [1, 16.2],
        [10.4, 16.2],
        [11, 15.6],
        [11, stage === 0 ? 3 : 8],
      ],
      WIRE,
    ),
  );
  if (stage === 0) {
    shapes.push(line(9.6, 4.2, 12.4, 2.8, WIRE), ...arrow(15, 9, 15, 4));
    return shapes;
  }
  shapes.push(
    polyline(
      [
        [29, 16.2],
        [19.6, 16.2],
        [19, 15.6],
        [19, 8],
      ],
      WIRE,
    ),
  );
  shapes.push(
    polyline(
      [
        [11, 8],
        [14.25, 6.5],
      ],
      WIRE,
    ),
    polyline(
      [
        [19, 8],
        [15.75, 6.5],
      ],
      WIRE,
    ),
  );
  if (stage === 1)
    shapes.push(line(14.25, 6.5, 14.25, 1, WIRE), line(15.75, 6.5, 15.75, 1, WIRE), end(13.6, 1, 2.8, 3));
  else shapes.push(...twist(15, 6.5, 5.5, true), circle(15, 3, 1.5, 'thin', 0));
  return shapes;
}

function lug(stage: number): Shape[] {
  const shapes = turnsSeen(3);
  shapes.push(rectangle(13.2, 6.6, 3.6, 13.4, 'thin', 0.85), circle(15, 17.6, 1, 'thin', 1));
  shapes.push(line(1, 8, 29, 8, WIRE));
  if (stage === 0) shapes.push(...arrow(22, 19, 22, 10.5));
  if (stage === 1) shapes.push(end(13.2, 7.4, 3.6, 1.2));
  if (stage === 2)
    shapes.push(
      circle(15, 8, 1.5, 'thin', 0),
      polyline(
        [
          [15, 17.6],
          [19, 20.5],
          [28, 20.5],
        ],
        WIRE,
      ),
    );
  return shapes;
}

function drawnIn(stage: number): Shape[] {
  const shapes = wall([15]);
  shapes.push(
    polyline(
      [
        [1, 16.2],
        [13.6, 16.2],
        [14.4, 15.4],
        [14.4, 11],
      ],
      WIRE,
    ),
  );
  shapes.push(
    polyline(
      [
        [29, 16.2],
        [16.4, 16.2],
        [15.6, 15.4],
        [15.6, 11],
      ],
      WIRE,
    ),
  );
  if (stage === 0) {
    shapes.push(
      polyline(
        [
          [14.4, 11],
          [13.4, 8],
          [13.2, 4],
          [14, 2.4],
          [15, 2],
          [16, 2.4],
          [16.8, 4],
          [16.6, 8],
          [15.6, 11],
        ],
        WIRE,
      ),
    );
    shapes.push(...arrow(21, 10, 21, 3));
    return shapes;
  }
  shapes.push(...twist(15, 11, 7.5, true), circle(15, 2.4, 1.2, WIRE));
  if (stage === 2) shapes.push(end(13.6, 0.8, 2.8, 5.4));
  return shapes;
}

const METHODS: Record<TapMethodName, (stage: number) => Shape[]> = {
  'twisted loop': twistedLoop,
  'lifted turn': liftedTurn,
  'cut pair': cutPair,
  lug,
  'drawn in': drawnIn,
};

/** The picture of one stage: 0, 1 or 2. */
export function tapPicture(method: TapMethodName, stage: 0 | 1 | 2): Drawing {
  return { shapes: METHODS[method](stage) };
}
