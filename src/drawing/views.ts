/**
 * Views of a part as data: its true outline in millimetres, and what is dimensioned on it. Whoever draws a view chooses the
 * scale; lettering, arrows and the distance of dimension lines are then of one size on every sheet.
 */
import type { Circle, Line, Polyline } from './drawing.ts';
import type { Piece } from './words.ts';

/** Words in millimetres; `pieces` where there are lengths in them, for sheets in other units. */
interface Worded {
  readonly text: string;
  readonly pieces?: readonly Piece[];
}

/** A length between two points. `along`: as it is seen along x, along y, or straight between the points. */
export interface Span extends Worded {
  readonly kind: 'span';
  readonly along: 'x' | 'y' | 'straight';
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
  /** On which side of the view its line stands; several on a side are stacked outwards in their order. */
  readonly side: 'left' | 'right' | 'above' | 'below';
}

/** A word or size with a leader line to a point. */
export interface Callout extends Worded {
  readonly kind: 'callout';
  readonly at: readonly [number, number];
  readonly side: 'left' | 'right' | 'above' | 'below';
}

/** Words on the view itself, beside a point: the name of a hole. */
export interface Mark extends Worded {
  readonly kind: 'mark';
  readonly at: readonly [number, number];
}

export interface View {
  readonly title: 'elevation' | 'end view' | 'developed surface' | 'section' | 'plan';
  /** X right, Y up, in millimetres of the part. */
  readonly shapes: readonly (Line | Polyline | Circle)[];
  readonly dimensions: readonly (Span | Callout | Mark)[];
}
