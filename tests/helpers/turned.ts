/** Whether texts that are turned lie over one another: their boxes as they lie, parted by an axis of one of them or not at all. */
import type { Measure } from '../../src/drawing/boxes.ts';
import { textBox } from '../../src/drawing/boxes.ts';
import type { Shape, Text } from '../../src/drawing/drawing.ts';

type Corners = readonly (readonly [number, number])[];

function cornersOf(text: Text, measure: Measure): Corners {
  const { left, right, bottom, top } = textBox({ ...text, x: 0, y: 0, turnDeg: 0 }, measure);
  const a = ((text.turnDeg ?? 0) * Math.PI) / 180;
  return [
    [left, bottom],
    [right, bottom],
    [right, top],
    [left, top],
  ].map(([x, y]) => [text.x + x! * Math.cos(a) - y! * Math.sin(a), text.y + x! * Math.sin(a) + y! * Math.cos(a)]);
}

/** Two rectangles are apart where one of their sides' directions shows a gap of more than `-allowMm` between their shadows. */
function apart(a: Corners, b: Corners, allowMm: number): boolean {
  return [a, b].some((one) =>
    [0, 1].some((side) => {
      const [x, y] = [one[side + 1]![0] - one[side]![0], one[side + 1]![1] - one[side]![1]];
      const size = Math.hypot(x, y);
      const shadow = (corners: Corners) => corners.map(([cx, cy]) => (cx * x + cy * y) / size);
      const [first, second] = [shadow(a), shadow(b)];
      return Math.max(...first) < Math.min(...second) + allowMm || Math.max(...second) < Math.min(...first) + allowMm;
    }),
  );
}

/** Pairs of texts that share more than 0.05 mm: the box of a text counts descenders that its letters may not have. */
export function turnedFaults(shapes: readonly Shape[], measure: Measure): string[] {
  const texts = shapes.flatMap((shape) =>
    shape.shape === 'text' ? [{ shape, corners: cornersOf(shape, measure) }] : [],
  );
  return texts.flatMap((one, i) =>
    texts
      .slice(i + 1)
      .filter((other) => !apart(one.corners, other.corners, 0.05))
      .map(
        (other) =>
          `"${one.shape.text}" and "${other.shape.text}" at ${one.shape.x.toFixed(1)}, ${one.shape.y.toFixed(1)}`,
      ),
  );
}
