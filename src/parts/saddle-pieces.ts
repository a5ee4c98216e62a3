/**
 * Which pieces a drill saddle takes, and which holes each of them guides.
 *
 *     holes -> two opposite halves, turned so that no hole lies near their lips
 *           -> sections along the tube, as tall as the printer builds
 *           -> passes, where guides would run into one another or their words find no room
 *
 * The first section rests with its rim against the tube's lower end. A section above is set by a drill shank through the
 * highest hole that was bored below it; where that is out of reach, by the upper end of the piece below, which stays on.
 * The other half of a section is turned to the lines drawn along the lips of the first; so are further passes.
 */
import { Fault } from '../fault.ts';
import type { Former, Hole } from '../record/schema.ts';
import { angleBetween, webMm } from './dimensions.ts';
import { type PlacedWords, placeWords, turnFrom } from './saddle-words.ts';

/** A hole with the diameter of its guide and the words beside it. */
export interface Guide {
  readonly hole: Hole;
  readonly diameterMm: number;
  /** Angle from the middle of the piece, -90 to 90. */
  readonly turnDeg: number;
  /** Bored with an earlier piece: a shank through it places this one. */
  readonly index: boolean;
}

export interface SaddlePiece {
  readonly part: string;
  readonly letter: string;
  readonly middleDeg: number;
  /** The piece covers the tube between these heights; below 0 for the rim. */
  readonly fromMm: number;
  readonly toMm: number;
  readonly rim: boolean;
  /** The piece that stays on and whose upper end this one stands on, lips in line; null when set otherwise. */
  readonly standsOn: string | null;
  readonly guides: readonly Guide[];
  readonly words: readonly PlacedWords[];
  /** The piece whose lips the lines are drawn along to which this one is set; null when set by rim or pin alone. */
  readonly lined: string | null;
  /** Whether the lines lie 90 degrees and less from the middle, where a notch shows them: on the opposite half. */
  readonly notches: boolean;
}

export interface Space {
  readonly former: Pick<Former, 'outsideDiameterMm' | 'kind'>;
  readonly outsideR: number;
  readonly insideR: number;
  readonly rimMm: number;
  /** Of the printer. */
  readonly heightMm: number;
  readonly widerMm: number;
  readonly webMm: number;
}

/** Beyond the outermost hole: the words of a hole, and a lip that guides the tube. */
export const MARGIN_MM = 8;
/** Height of a notch over a line, and half of its width. */
export const NOTCH_MM = 2.5;
export const HALF_NOTCH_MM = 1.25;
/** Lower pieces would be all margin. */
const LEAST_HEIGHT_MM = 40;
/** A tube this thin is smaller than the words on the saddle. */
const LEAST_TUBE_MM = 12;

/** @throws Fault (exit 4) as `saddleDimensions` */
export function saddlePieces(holes: readonly Hole[], space: Space): SaddlePiece[] {
  requireTube(holes, space);
  const middles = middlesFor(holes.map(({ angleDeg }) => angleDeg));
  const pieces: SaddlePiece[] = [];
  let below: SaddlePiece | null = null;
  for (const section of sectionsOf(holes, space)) {
    // The half that is placed without lines comes first: that with the pin, or over the piece it stands on.
    const first: number = section.stands && below ? below.middleDeg : halfOf(section.pin ?? section.holes[0], middles);
    let leader: SaddlePiece | null = null;
    for (const middleDeg of [first, ...middles.filter((middle) => middle !== first)]) {
      const leads = middleDeg === first;
      let rest = section.holes.filter((hole) => halfOf(hole, middles) === middleDeg);
      for (let pass = 0; rest.length > 0 || (leads && pass === 0); pass++) {
        const letter = letterOf(pieces.length);
        const pin = leads && pass === 0 ? section.pin : null;
        const { guides, words, left } = fill(rest, pin, { ...section, middleDeg, letter, notches: !leads }, space);
        const piece: SaddlePiece = {
          part: `saddle-${letter.toLowerCase()}`,
          letter,
          middleDeg,
          fromMm: section.fromMm,
          toMm: section.toMm,
          rim: section.rim,
          standsOn: leads && pass === 0 && section.stands && below ? below.part : null,
          guides,
          words,
          lined: leader?.part ?? null,
          notches: !leads,
        };
        pieces.push(piece);
        leader ??= piece;
        rest = left;
      }
    }
    below = leader;
  }
  return pieces;
}

/** A, B ... Z, A1, B1 ... */
const letterOf = (i: number) => String.fromCharCode(65 + (i % 26)) + (i < 26 ? '' : `${Math.floor(i / 26)}`);

function requireTube(holes: readonly Hole[], { former, heightMm }: Space): void {
  const fault = (code: string, got: string, expected: string, todo: string) =>
    new Fault(4, { code, place: { key: 'parts' }, got, expected, todo });
  if (former.kind !== 'tube')
    throw fault(
      'saddle-no-tube',
      'a drill saddle for a printed former, which comes with its holes',
      'a bought tube, former.kind: tube',
      'leave the saddle out of parts',
    );
  if (former.outsideDiameterMm < LEAST_TUBE_MM)
    throw fault(
      'saddle-small-tube',
      `a tube of ${former.outsideDiameterMm} mm`,
      `a tube of ${LEAST_TUBE_MM} mm or more, that a saddle clips on`,
      'leave the saddle out of parts and bore through the hole pattern',
    );
  if (heightMm < LEAST_HEIGHT_MM)
    throw new Fault(4, {
      code: 'saddle-low-printer',
      place: { key: 'printer.height' },
      got: `a printer that builds ${heightMm} mm`,
      expected: `pieces of up to ${LEAST_HEIGHT_MM} mm, with ${MARGIN_MM} mm on both sides of their holes`,
      todo: `use a printer that builds ${LEAST_HEIGHT_MM} mm or more, or leave the saddle out of parts`,
    });
  if (holes.length === 0)
    throw fault('saddle-no-holes', 'no holes to bore', 'one hole or more', 'leave the saddle out of parts');
}

/** The middle of the half that a hole belongs to: the nearer one, the first when both are as near. */
function halfOf(hole: Hole | undefined, middles: readonly number[]): number {
  if (!hole) return middles[0]!;
  return middles.toSorted((a, b) => angleBetween(a, hole.angleDeg) - angleBetween(b, hole.angleDeg))[0]!;
}

/** One half that covers all holes where there is one; else two, turned so that the holes keep away from the lips. */
function middlesFor(angles: readonly number[]): number[] {
  const sorted = angles.map((a) => ((a % 360) + 360) % 360).sort((a, b) => a - b);
  let widest = 0;
  let after = 0;
  for (const [i, angle] of sorted.entries()) {
    const next = i + 1 < sorted.length ? sorted[i + 1]! : sorted[0]! + 360;
    if (next - angle <= widest) continue;
    widest = next - angle;
    after = next;
  }
  const covered = 360 - widest;
  if (covered <= 180) return [(after + covered / 2) % 360];
  let best = 0;
  let most = -1;
  for (let middle = 0; middle < 180; middle++) {
    const least = Math.min(...sorted.map((a) => Math.abs(Math.abs(turnFrom(middle, a)) - 90)));
    if (least <= most + 1e-9) continue;
    most = least;
    best = middle;
  }
  return [best, best + 180];
}

interface Section {
  readonly holes: readonly Hole[];
  readonly fromMm: number;
  readonly toMm: number;
  readonly rim: boolean;
  /** Bored with a section below. */
  readonly pin: Hole | null;
  /** On the section below, which stays on the tube. */
  readonly stands: boolean;
}

/** As many holes from below as the printer's height takes, then on from the highest of them. */
function sectionsOf(holes: readonly Hole[], { rimMm, heightMm }: Space): Section[] {
  const sorted = holes.toSorted((a, b) => a.axialMm - b.axialMm);
  const sections: Section[] = [];
  for (let next = 0; next < sorted.length; ) {
    const below = sections[sections.length - 1];
    const pin = below?.holes[below.holes.length - 1] ?? null;
    const within = (fromMm: number) =>
      sorted.slice(next).filter(({ axialMm }) => axialMm <= fromMm + heightMm - MARGIN_MM + 1e-9);
    const pinnedFrom = pin ? pin.axialMm - MARGIN_MM : -rimMm;
    const nearby = !below || pin ? within(pinnedFrom) : [];
    if (nearby.length > 0) {
      const toMm = nearby[nearby.length - 1]!.axialMm + MARGIN_MM;
      sections.push({ holes: nearby, fromMm: pinnedFrom, toMm, rim: !below, pin, stands: false });
      next += nearby.length;
      continue;
    }
    // Out of reach: the section below grows as far as it can and carries the next one.
    const wishedMm = sorted[next]!.axialMm + MARGIN_MM - heightMm;
    const grown = (fromMm: number, leastMm: number) => Math.max(leastMm, Math.min(fromMm + heightMm, wishedMm));
    if (below) sections[sections.length - 1] = { ...below, toMm: grown(below.fromMm, below.toMm) };
    else
      sections.push({ holes: [], fromMm: -rimMm, toMm: grown(-rimMm, MARGIN_MM), rim: true, pin: null, stands: false });
    const fromMm = sections[sections.length - 1]!.toMm;
    const carried = within(fromMm);
    const last = carried[carried.length - 1];
    // One more that only carries: it ends where the next hole keeps its margin.
    const toMm = last ? last.axialMm + MARGIN_MM : Math.min(fromMm + heightMm, sorted[next]!.axialMm - MARGIN_MM);
    sections.push({ holes: carried, fromMm, toMm, rim: false, pin: null, stands: true });
    next += carried.length;
  }
  return sections;
}

interface Face {
  readonly middleDeg: number;
  readonly letter: string;
  readonly fromMm: number;
  readonly toMm: number;
  readonly notches: boolean;
}

/** Guides that leave their webs, with words that find room; what does not is left for the next pass. */
function fill(
  holes: readonly Hole[],
  pin: Hole | null,
  face: Face,
  space: Space,
): { guides: Guide[]; words: PlacedWords[]; left: Hole[] } {
  const guide = (hole: Hole): Guide => ({
    hole,
    diameterMm: hole.diameterMm + space.widerMm,
    turnDeg: turnFrom(face.middleDeg, hole.angleDeg),
    index: hole === pin,
  });
  const taken: Guide[] = [];
  for (const one of [...(pin ? [pin] : []), ...holes].map(guide))
    if (taken.every((other) => webBetween(one, other, space.insideR) >= space.webMm - 1e-9)) taken.push(one);
  const placed = placeWords(taken, {
    ...face,
    outsideR: space.outsideR,
    wordsToMm: face.toMm - (face.notches ? NOTCH_MM : 0) - 1,
  });
  // One hole a piece goes without words rather than nowhere.
  const guides = placed.guides.length > 0 ? placed.guides : taken.slice(0, 1);
  return {
    guides,
    words: placed.words,
    left: holes.filter((hole) => !guides.some((one) => one.hole === hole)),
  };
}

/** Plastic left between two lying guides where they come nearest, on the inside; negative where they meet. */
export function webBetween(a: Guide, b: Guide, insideR: number): number {
  const lying = ({ hole, turnDeg, diameterMm }: Guide) => ({ angleDeg: turnDeg, axialMm: hole.axialMm, diameterMm });
  return webMm(lying(a), lying(b), insideR);
}
