/**
 * Words on the outside of a saddle, on its developed surface: u along the circumference from the middle of the piece
 * (counterclockwise seen from above, so to the right seen from outside), z up the tube. Every guide gets its label and the
 * drill's size beside it; where there is no room beside it, a little farther off with a line between.
 */
import type { Hole } from '../record/schema.ts';
import { textWidthMm } from './lettering.ts';

/** The least that reads well. */
const TEXT_MM = 2.5;
/** Free plastic round words and lines; a cut is 0.6 mm wide. */
const CLEAR_MM = 0.8;
const HALF_CUT_MM = 0.3;
/** Farthest from a hole that its words may stand. */
const FAR_MM = 20;
/** Words this near need no line. */
const NEAR_MM = 1.6;
/** The lowest part of a piece bears the letter of the piece and the mark of angle zero. */
export const TITLE_BAND_MM = 5.6;
const TITLE_MM = 4;

export interface PlacedWords {
  readonly text: string;
  /** Left end and foot line. */
  readonly u: number;
  readonly z: number;
  readonly heightMm: number;
  readonly widthMm: number;
  /** From the edge of the hole to the words; null where they stand beside it. */
  readonly line: readonly [Spot, Spot] | null;
}

export type Spot = readonly [u: number, z: number];

interface Bored {
  readonly hole: Hole;
  readonly diameterMm: number;
  readonly turnDeg: number;
}

export interface WordSpace {
  readonly letter: string;
  readonly outsideR: number;
  readonly middleDeg: number;
  readonly fromMm: number;
  /** Words of holes stay below this, clear of the notches. */
  readonly wordsToMm: number;
}

interface Box {
  readonly u0: number;
  readonly z0: number;
  readonly u1: number;
  readonly z1: number;
}

interface Taken {
  readonly discs: readonly { readonly u: number; readonly z: number; readonly r: number }[];
  readonly boxes: Box[];
  readonly lines: (readonly [Spot, Spot])[];
}

/** The guides whose words have room, with these; the letter of the piece comes first. */
export function placeWords<G extends Bored>(
  guides: readonly G[],
  space: WordSpace,
): { guides: G[]; words: PlacedWords[] } {
  const placed = new Map<G, PlacedWords>();
  let open = [...guides];
  // Whoever is left out makes room for the others, so that they are placed anew.
  for (;;) {
    placed.clear();
    const out = tryAll(open, space, placed);
    if (!out) break;
    open = open.filter((guide) => guide !== out);
  }
  return { guides: open, words: [...titles(space), ...open.map((guide) => placed.get(guide)!)] };
}

/** The letter of the piece in its middle, and a tick with a nought at angle zero, where the piece covers that. */
function titles({ letter, middleDeg, outsideR, fromMm }: WordSpace): PlacedWords[] {
  const z = fromMm + 0.8;
  const widthMm = textWidthMm(letter, TITLE_MM);
  const zero = (outsideR * turnFrom(middleDeg, 0) * Math.PI) / 180;
  const nought = { text: '0', u: zero + 1.2, z, heightMm: TEXT_MM, widthMm: textWidthMm('0', TEXT_MM) };
  const covered = Math.abs(zero) + 1.2 + nought.widthMm < (outsideR * Math.PI) / 2;
  // The letter makes way for the mark, to the side where there is more of the piece.
  const aside = covered && Math.abs(zero) < widthMm + 3 ? (zero > 0 ? zero - widthMm - 3 : zero + widthMm + 4) : 0;
  const title = { text: letter, u: aside - widthMm / 2, z, heightMm: TITLE_MM, widthMm, line: null };
  const tick: readonly [Spot, Spot] = [
    [zero, fromMm - 0.5],
    [zero, fromMm + TITLE_BAND_MM - 1],
  ];
  return covered ? [title, { ...nought, line: tick }] : [title];
}

/** Signed, -180 to 180. */
export function turnFrom(middleDeg: number, angleDeg: number): number {
  return ((((angleDeg - middleDeg + 180) % 360) + 360) % 360) - 180;
}

/** The first guide whose words find no room, or null when all do. */
function tryAll<G extends Bored>(guides: readonly G[], space: WordSpace, placed: Map<G, PlacedWords>): G | null {
  const taken: Taken = { discs: guides.map((guide) => discOf(guide, space)), boxes: [], lines: [] };
  // Crowded holes choose first.
  const crowd = (guide: G) => {
    const { u, z } = discOf(guide, space);
    return taken.discs.filter((disc) => Math.hypot(disc.u - u, disc.z - z) < 6).length;
  };
  for (const guide of guides.toSorted((a, b) => crowd(b) - crowd(a))) {
    const words = wordsOf(guide, space, taken);
    if (!words) return guide;
    placed.set(guide, words);
    taken.boxes.push(boxOf(words));
    if (words.line) taken.lines.push(words.line);
  }
  return null;
}

function discOf({ hole, diameterMm, turnDeg }: Bored, { outsideR }: WordSpace) {
  return { u: (outsideR * turnDeg * Math.PI) / 180, z: hole.axialMm, r: diameterMm / 2 };
}

/** With the cut's half width. */
const boxOf = ({ u, z, widthMm, heightMm }: Pick<PlacedWords, 'u' | 'z' | 'widthMm' | 'heightMm'>): Box => ({
  u0: u - HALF_CUT_MM,
  z0: z - HALF_CUT_MM,
  u1: u + widthMm + HALF_CUT_MM,
  z1: z + heightMm + HALF_CUT_MM,
});

function wordsOf(guide: Bored, space: WordSpace, taken: Taken): PlacedWords | null {
  const { u, z, r } = discOf(guide, space);
  const text = `${guide.hole.label} ${Number(guide.hole.diameterMm.toFixed(2))}`;
  const widthMm = textWidthMm(text, TEXT_MM);
  const quarter = (space.outsideR * Math.PI) / 2;
  const off = r + CLEAR_MM + HALF_CUT_MM;
  const inside = (box: Box) =>
    box.u0 >= -quarter && box.u1 <= quarter && box.z0 >= space.fromMm + TITLE_BAND_MM && box.z1 <= space.wordsToMm;
  const tried = (du: number, dz: number): PlacedWords | null => {
    const at = { u: u + du - widthMm / 2, z: z + dz - TEXT_MM / 2, widthMm, heightMm: TEXT_MM };
    const box = boxOf(at);
    if (!inside(box) || !isFree(box, taken)) return null;
    const line = lineTo(box, u, z, r);
    if (line && !lineIsFree(line, taken, [u, z])) return null;
    return { ...at, text, line };
  };
  const [dx, dy] = [off + widthMm / 2, off + r * 0.42 + TEXT_MM / 2];
  for (const [du, dz] of [
    [dx, 0],
    [-dx, 0],
    [0, dy],
    [0, -dy],
  ] as const) {
    const found = tried(du, dz);
    if (found) return found;
  }
  for (let far = 1; far <= FAR_MM; far += 1)
    for (let k = 0; k < 24; k++) {
      const a = (k * Math.PI) / 12;
      const found = tried((dx + far) * Math.cos(a), (dy + far) * Math.sin(a));
      if (found) return found;
    }
  return null;
}

function isFree(box: Box, { discs, boxes, lines }: Taken): boolean {
  return (
    lines.every((line) => alongLine(line).every(([u, z]) => Math.hypot(...apart(box, u, z)) >= CLEAR_MM)) &&
    discs.every(({ u, z, r }) => Math.hypot(...apart(box, u, z)) >= r * Math.SQRT2 - 0.2 * r + CLEAR_MM / 2) &&
    boxes.every(
      (other) =>
        box.u0 - CLEAR_MM >= other.u1 ||
        box.u1 + CLEAR_MM <= other.u0 ||
        box.z0 - CLEAR_MM / 2 >= other.z1 ||
        box.z1 + CLEAR_MM / 2 <= other.z0,
    )
  );
}

/** From a spot to the nearest point of a box. */
function apart(box: Box, u: number, z: number): [number, number] {
  return [Math.min(Math.max(u, box.u0), box.u1) - u, Math.min(Math.max(z, box.z0), box.z1) - z];
}

/** Straight from the edge of the hole to the words; null where they stand beside it. */
function lineTo(box: Box, u: number, z: number, r: number): readonly [Spot, Spot] | null {
  const [du, dz] = apart(box, u, z);
  const length = Math.hypot(du, dz);
  const [from, to] = [r + CLEAR_MM, length - CLEAR_MM];
  if (length - r < NEAR_MM + HALF_CUT_MM || to - from < 0.3) return null;
  const at = (along: number): Spot => [u + (du * along) / length, z + (dz * along) / length];
  return [at(from), at(to)];
}

function lineIsFree(line: readonly [Spot, Spot], { discs, boxes, lines }: Taken, own: Spot): boolean {
  const others = lines.flatMap((other) => alongLine(other));
  return alongLine(line).every(
    ([u, z]) =>
      discs.every((d) => (d.u === own[0] && d.z === own[1]) || Math.hypot(d.u - u, d.z - z) >= d.r + CLEAR_MM) &&
      boxes.every((box) => Math.hypot(...apart(box, u, z)) >= CLEAR_MM) &&
      others.every(([v, w]) => Math.hypot(u - v, z - w) >= 2 * HALF_CUT_MM + CLEAR_MM / 2),
  );
}

/** Spots every 0.3 mm or closer, both ends among them. */
export function alongLine([[u0, z0], [u1, z1]]: readonly [Spot, Spot], stepMm = 0.3): Spot[] {
  const n = Math.max(1, Math.ceil(Math.hypot(u1 - u0, z1 - z0) / stepMm));
  return Array.from({ length: n + 1 }, (_, i): Spot => [u0 + ((u1 - u0) * i) / n, z0 + ((z1 - z0) * i) / n]);
}
