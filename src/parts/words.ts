/** Words cut into flat faces of jigs: several texts as one engraving, and how much plastic that takes. */
import { textStrokes } from './lettering.ts';
import { BED, type Engraving, type Frame, type Point2 } from './solid.ts';

/** Width of a cut line: a little more than the line of a common nozzle, so that it stays open. */
export const STROKE_MM = 0.6;
/** Two or three layers: deep enough for a shadow. */
export const CUT_MM = 0.5;

/** One text: its foot line starts at (x, y), or is centred there. */
export interface Words {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly heightMm: number;
  readonly align?: 'left' | 'centre';
}

/** Texts in one face, which lies at `zMm` of the frame. */
export function wordsCut(name: string, words: readonly Words[], zMm: number, frame: Frame = BED): Engraving {
  const strokes = words.flatMap(({ text, x, y, heightMm, align }) =>
    textStrokes(text, heightMm, x, y, align).map((line) => plainer(line)),
  );
  return { kind: 'engraving', name, zMm, depthMm: CUT_MM, widthMm: STROKE_MM, strokes, frame };
}

/** A printed line does not show a bend flatter than this, and each bend costs a dozen triangles. */
const BEND_MM = 0.1;

/** The line without the points that lie within {@link BEND_MM} of what is left (Douglas and Peucker's way). */
export function plainer(line: readonly Point2[]): Point2[] {
  const first = line[0]!;
  const last = line[line.length - 1]!;
  const [dx, dy] = [last[0] - first[0], last[1] - first[1]];
  const long = Math.hypot(dx, dy);
  let far = -1;
  let most = BEND_MM;
  for (let i = 1; i < line.length - 1; i++) {
    const [x, y] = [line[i]![0] - first[0], line[i]![1] - first[1]];
    const off = long < BEND_MM ? Math.hypot(x, y) : Math.abs(x * dy - y * dx) / long;
    if (off > most) {
      most = off;
      far = i;
    }
  }
  if (far < 0) return [first, last];
  return [...plainer(line.slice(0, far + 1)), ...plainer(line.slice(far)).slice(1)];
}

/** Plastic taken by an engraving, mm3: its strokes by length. Crossings count twice and round ends not at all. */
export function cutMm3({ strokes, widthMm, depthMm }: Engraving): number {
  return strokes.reduce((sum, line) => sum + lengthOf(line), 0) * widthMm * depthMm;
}

function lengthOf(line: readonly Point2[]): number {
  let length = 0;
  for (let i = 1; i < line.length; i++)
    length += Math.hypot(line[i]![0] - line[i - 1]![0], line[i]![1] - line[i - 1]![1]);
  return length;
}
