/**
 * A picture as data, in millimetres: what PDF, SVG, DXF and HTML writers share. X runs right, Y runs UP from the
 * drawing's own origin; a writer turns Y over where its page runs down. Nothing here knows a page or a file format.
 */

/** Line weights by use: outlines 0.5 mm, thin lines 0.25 mm, hair lines 0.12 mm. */
export type Weight = 'outline' | 'thin' | 'hair';
export type Dash = 'solid' | 'dashed' | 'centre';

export interface Stroke {
  readonly weight: Weight;
  readonly dash?: Dash;
}

export interface Line extends Stroke {
  readonly shape: 'line';
  readonly x1: number;
  readonly y1: number;
  readonly x2: number;
  readonly y2: number;
}

export interface Polyline extends Stroke {
  readonly shape: 'polyline';
  readonly points: readonly (readonly [number, number])[];
  readonly closed?: boolean;
  /** 0 = black .. 1 = white; left out: not filled. */
  readonly fill?: number;
}

export interface Circle extends Stroke {
  readonly shape: 'circle';
  readonly x: number;
  readonly y: number;
  readonly r: number;
  readonly fill?: number;
  /** What it stands for, so that tests find it again: `hole tap 3`. */
  readonly name?: string;
}

export interface Text {
  readonly shape: 'text';
  readonly x: number;
  readonly y: number;
  readonly text: string;
  /** Cap height is about 0.72 of this. */
  readonly sizeMm: number;
  readonly align?: 'left' | 'centre' | 'right';
  /** `y` is the baseline (default) or the middle of the capitals. */
  readonly anchor?: 'baseline' | 'middle';
  readonly bold?: boolean;
  /** Degrees counterclockwise. */
  readonly turnDeg?: number;
}

export type Shape = Line | Polyline | Circle | Text;

export interface Drawing {
  readonly shapes: readonly Shape[];
}
