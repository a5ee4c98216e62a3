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

/** A place on the middle line of a shared strip, and how far along it one may move. */
export interface Joint {
  readonly x: number;
  readonly y: number;
  readonly along: 'x' | 'y';
  readonly low: number;
  readonly high: number;
}

/** Where crosses are wanted: two to every shared side of a tile. */
export function joints(tiling: Tiling): Joint[] {
  const found: Joint[] = [];
  for (const { row, column, window } of tiling.tiles) {
    const at = (low: number, high: number, part: number) => low + part * (high - low);
    for (const part of [0.3, 0.7]) {
      if (column < tiling.columns - 1) {
        const x = window.right - SHARED_MM / 2;
        const [low, high] = [window.bottom, window.top];
        found.push({ x, y: at(low, high, part), along: 'y', low, high });
      }
      if (row < tiling.rows - 1) {
        const y = window.top - SHARED_MM / 2;
        const [low, high] = [window.left, window.right];
        found.push({ x: at(low, high, part), y, along: 'x', low, high });
      }
    }
  }
  return found;
}
