/** Reads codes back as a camera would: what is drawn in a window, painted to pixels, then decoded. */
import decodeQR from 'qr/decode.js';
import type { Box } from '../../src/drawing/boxes.ts';
import type { Shape } from '../../src/drawing/drawing.ts';
import { WEIGHT_MM } from '../../src/drawing/stroke.ts';

/** Edges of a filled black rectangle as it is printed, its stroke included; null for any other shape. */
export function blackBox(shape: Shape): Box | null {
  if (shape.shape !== 'polyline' || shape.fill !== 0 || shape.points.length !== 4) return null;
  const [xs, ys] = [shape.points.map(([x]) => x), shape.points.map(([, y]) => y)];
  const half = WEIGHT_MM[shape.weight] / 2;
  return {
    left: Math.min(...xs) - half,
    right: Math.max(...xs) + half,
    bottom: Math.min(...ys) - half,
    top: Math.max(...ys) + half,
  };
}

/** Black rectangles in a window. */
export const blackIn = (shapes: readonly Shape[], window: Box): Box[] =>
  shapes.flatMap((shape) => {
    const box = blackBox(shape);
    const within =
      box !== null &&
      box.left >= window.left &&
      box.right <= window.right &&
      box.bottom >= window.bottom &&
      box.top <= window.top;
    return within ? [box] : [];
  });

/** The text of the code that is drawn in a window; throws where there is none to read. */
export function readCode(shapes: readonly Shape[], window: Box, pixelsMm = 8): string {
  const width = Math.round((window.right - window.left) * pixelsMm);
  const height = Math.round((window.top - window.bottom) * pixelsMm);
  const data = new Uint8Array(width * height * 4).fill(255);
  for (const { left, right, bottom, top } of blackIn(shapes, window)) {
    // A pixel is black whose middle lies in the rectangle.
    const from = Math.ceil((left - window.left) * pixelsMm - 0.5);
    const to = Math.ceil((right - window.left) * pixelsMm - 0.5);
    const first = Math.ceil((window.top - top) * pixelsMm - 0.5);
    const last = Math.ceil((window.top - bottom) * pixelsMm - 0.5);
    for (let y = first; y < last; y++)
      for (let x = from; x < to; x++) data.fill(0, 4 * (y * width + x), 4 * (y * width + x) + 3);
  }
  return decodeQR({ width, height, data });
}
