/** Cuts a large drawing into windows that overlap, named by row (A lowest) and column. */
import type { Box } from '../drawing/boxes.ts';

export interface Tile {
  readonly name: string;
  readonly row: number;
  readonly column: number;
  readonly window: Box;
}

export interface Tiling {
  readonly rows: number;
  readonly columns: number;
  readonly tiles: readonly Tile[];
}

/** How much neighbouring tiles share, mm. */
export const SHARED_MM = 12;

const count = (lengthMm: number, roomMm: number) =>
  lengthMm <= roomMm ? 1 : Math.ceil((lengthMm - SHARED_MM) / (roomMm - SHARED_MM));

/** Tiles no larger than a room over a whole; as few as possible, all of one size. */
export function tile(whole: Box, roomWidthMm: number, roomHeightMm: number): Tiling {
  const width = whole.right - whole.left;
  const height = whole.top - whole.bottom;
  const columns = count(width, roomWidthMm);
  const rows = count(height, roomHeightMm);
  const wide = (width + (columns - 1) * SHARED_MM) / columns;
  const high = (height + (rows - 1) * SHARED_MM) / rows;
  const tiles: Tile[] = [];
  for (let row = 0; row < rows; row++)
    for (let column = 0; column < columns; column++) {
      const left = whole.left + column * (wide - SHARED_MM);
      const bottom = whole.bottom + row * (high - SHARED_MM);
      tiles.push({
        name: `${String.fromCharCode(65 + row)}${column + 1}`,
        row,
        column,
        window: { left, right: left + wide, bottom, top: bottom + high },
      });
    }
  return { rows, columns, tiles };
}

/** Where the crosses stand: on the middle of every shared strip, two to a side of a tile. */
export function crossPlaces(tiling: Tiling): { name: string; x: number; y: number }[] {
  const found: { name: string; x: number; y: number }[] = [];
  for (const { name, row, column, window } of tiling.tiles) {
    const right = tiling.tiles.find((other) => other.row === row && other.column === column + 1);
    const above = tiling.tiles.find((other) => other.column === column && other.row === row + 1);
    const share = [0.3, 0.7];
    if (right)
      for (const part of share)
        found.push({
          name: `${name}${right.name}`,
          x: window.right - SHARED_MM / 2,
          y: window.bottom + part * (window.top - window.bottom),
        });
    if (above)
      for (const part of share)
        found.push({
          name: `${name}${above.name}`,
          x: window.left + part * (window.right - window.left),
          y: window.top - SHARED_MM / 2,
        });
  }
  return found;
}
