/**
 * Solids as data: what a part is made of, before any mesh exists. Millimetres, Z up from the print bed, the former's axis
 * at x = y = 0. Parts write these descriptions and the kernel turns them into meshes; neither knows how the other works.
 */

import type { PartKind } from '../job/job.ts';

export type Point2 = readonly [number, number];
export type Point3 = readonly [number, number, number];

/** One circle of a turned profile. The radius is the true one: outside chords are inscribed, a bore is circumscribed. */
export interface ProfileRow {
  readonly rMm: number;
  readonly zMm: number;
}

/** One cross-section of the groove: the wire's place along the axis and the depth below the outside (0 at both ends). */
export interface GrooveSample {
  readonly zMm: number;
  readonly depthMm: number;
}

/**
 * A helical groove with a flat floor and flanks at 45 degrees. Sample i stands at column `firstColumn + i`, counted on
 * over the turns; column c lies at turn (c + 1/2) / segments from the start hole.
 */
export interface Groove {
  readonly afterRow: number;
  readonly floorMm: number;
  readonly firstColumn: number;
  readonly samples: readonly GrooveSample[];
}

/** A tube turned from a closed profile: `outer` from foot to top, then `inner` from top to foot. */
export interface Skin {
  readonly kind: 'skin';
  readonly segments: number;
  readonly hand: 'right' | 'left';
  readonly outer: readonly ProfileRow[];
  readonly inner: readonly ProfileRow[];
  readonly groove: Groove | null;
}

/**
 * A solid through rings of equally many points; both ends are closed by fans, from `hubs` or from a ring's first point, or
 * the last ring is `joined` to the first.
 */
export interface Loft {
  readonly kind: 'loft';
  readonly name: string;
  readonly rings: readonly (readonly Point3[])[];
  readonly joined?: true;
  readonly hubs: readonly [Point3, Point3] | null;
}

/** Where a flat shape lies: its own x and y as unit vectors at right angles, its z along x cross y. */
export interface Frame {
  readonly origin: Point3;
  readonly x: Point3;
  readonly y: Point3;
}

/** The frame of the print bed. */
export const BED: Frame = { origin: [0, 0, 0], x: [1, 0, 0], y: [0, 1, 0] };

/** A flat outline drawn out along the z of its frame. Outlines are counterclockwise, openings in them clockwise. */
export interface Prism {
  readonly kind: 'prism';
  readonly name: string;
  readonly outlines: readonly (readonly Point2[])[];
  readonly fromMm: number;
  readonly toMm: number;
  readonly frame: Frame;
}

/** Strokes with round ends, cut down into the face at `zMm` of the frame, which looks along its z. */
export interface Engraving {
  readonly kind: 'engraving';
  readonly name: string;
  readonly zMm: number;
  readonly depthMm: number;
  readonly widthMm: number;
  readonly strokes: readonly (readonly Point2[])[];
  readonly frame: Frame;
}

export type Shape = Skin | Loft | Prism;
export type Cutter = Loft | Prism | Engraving;

/** What the mesh must turn out to be; computed from the dimensions, not from a mesh. */
export interface Expected {
  readonly bodies: number;
  /** Handles of the surface: one for the bore, one for every hole through. */
  readonly genus: number;
  readonly genusIs: string;
  readonly minMm: Point3;
  readonly maxMm: Point3;
  readonly volumeMm3: number;
}

/** The file of a part. */
export const stlPath = (part: string): string => `${part}.stl`;

/** A part to print: all shapes joined, all cutters taken away, then lowered. In print orientation, on Z = 0. */
export interface Solid {
  /** Stands in the file name, in messages and on beds: lower-case, words joined by `-`. */
  readonly part: string;
  /** For people. */
  readonly name: string;
  readonly kind: PartKind;
  readonly quantity: number;
  readonly material: string;
  readonly densityGCm3: number;
  readonly shapes: readonly Shape[];
  readonly cutters: readonly Cutter[];
  /** How far the whole is moved down in the end, for a part that is described at its place in another; 0 when left out. */
  readonly lowerMm?: number;
  /** As lowered. */
  readonly expected: Expected;
  /** What it is for, in a sentence without a full stop. */
  readonly use: string;
  readonly printNote: string;
}
