/**
 * Which pieces a drill saddle takes, and which holes each of them guides.
 *
 *     holes -> two opposite halves, turned so that no hole lies near their lips
 *           -> sections along the tube, as tall as the printer builds
 *           -> passes, where guides would run into one another or their words find no room
 *
 * The first section rests with its rim against the tube's lower end. A section above is set by a drill shank through the
 * highest hole that was bored below it. The other half of a section is turned to the lines drawn along the lips of the
 * first; so are further passes.
 */
import { Fault } from '../fault.ts';
import type { Former, Hole } from '../record/schema.ts';
import { angleBetween, roofMm } from './dimensions.ts';
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
/** A tube this thin is smaller than the words on the saddle. */
const LEAST_TUBE_MM = 12;

/** @throws Fault (exit 4) as `saddleDimensions` */
export function saddlePieces(holes: readonly Hole[], space: Space): SaddlePiece[] {
  requireTube(holes, space);
  const middles = middlesFor(holes.map(({ angleDeg }) => angleDeg));
  const pieces: SaddlePiece[] = [];
  for (const section of sectionsOf(holes, space)) {
    let leader: string | null = null;
    // The half with the pin comes first: it needs no lines.
    const halves = middles.toSorted(
      (a, b) => Number(covers(b, section.pin, middles)) - Number(covers(a, section.pin, middles)),
    );
    for (const middleDeg of halves) {
      const pin = section.pin && covers(middleDeg, section.pin, middles) ? section.pin : null;
      let rest = section.holes.filter((hole) => covers(middleDeg, hole, middles));
      const first = leader;
      for (let pass = 0; rest.length > 0 || (pin !== null && pass === 0); pass++) {
        const letter = letterOf(pieces.length);
        const part = `saddle-${letter.toLowerCase()}`;
        const { guides, words, left } = fill(
          rest,
          pass === 0 ? pin : null,
          { ...section, middleDeg, letter, notches: first !== null },
          space,
        );
        pieces.push({
          part,
          letter,
          middleDeg,
          fromMm: section.fromMm,
          toMm: section.toMm,
          rim: section.rim,
          guides,
          words,
          lined: leader,
          notches: first !== null,
        });
        leader ??= part;
        rest = left;
      }
    }
  }
  return pieces;
}

/** A, B ... Z, A1, B1 ... */
const letterOf = (i: number) => String.fromCharCode(65 + (i % 26)) + (i < 26 ? '' : `${Math.floor(i / 26)}`);

function requireTube(holes: readonly Hole[], { former }: Space): void {
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
  if (holes.length === 0)
    throw fault('saddle-no-holes', 'no holes to bore', 'one hole or more', 'leave the saddle out of parts');
}

/** The half that a hole belongs to: the one whose middle is nearer, the first when both are as near. */
function covers(middleDeg: number, hole: Hole | null, middles: readonly number[]): boolean {
  if (!hole) return false;
  const nearest = middles.toSorted((a, b) => angleBetween(a, hole.angleDeg) - angleBetween(b, hole.angleDeg))[0];
  return nearest === middleDeg;
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
  /** Bored with the section below. */
  readonly pin: Hole | null;
}

/** As many holes from below as the printer's height takes, then on from the highest of them. */
function sectionsOf(holes: readonly Hole[], { rimMm, heightMm }: Space): Section[] {
  const sorted = holes.toSorted((a, b) => a.axialMm - b.axialMm);
  const sections: Section[] = [];
  let pin: Hole | null = null;
  for (let next = 0; next < sorted.length; ) {
    const fromMm: number = pin ? pin.axialMm - MARGIN_MM : -rimMm;
    const room = fromMm + heightMm - MARGIN_MM;
    const taken = sorted.slice(next).filter(({ axialMm }) => axialMm <= room + 1e-9);
    const hole = sorted[next]!;
    if (taken.length === 0)
      throw new Fault(4, {
        code: 'saddle-too-tall',
        place: { key: 'printer.height' },
        got: `hole ${hole.label} at ${hole.axialMm} mm, ${Number((hole.axialMm - fromMm).toFixed(2))} mm above where its piece begins, for a printer of ${heightMm} mm`,
        expected: "a piece that reaches from the tube's end, or from a hole bored before, to the next hole",
        todo: `use a printer that builds ${Math.ceil((hole.axialMm - fromMm + MARGIN_MM) * 10) / 10} mm or more, or leave the saddle out of parts`,
      });
    const last: Hole = taken[taken.length - 1]!;
    sections.push({ holes: taken, fromMm, toMm: last.axialMm + MARGIN_MM, rim: pin === null, pin });
    next += taken.length;
    pin = last;
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
  const [low, high] = a.hole.axialMm <= b.hole.axialMm ? [a, b] : [b, a];
  const across = (insideR * Math.PI * Math.abs(a.turnDeg - b.turnDeg)) / 180;
  const rise = high.hole.axialMm - low.hole.axialMm;
  const round = Math.hypot(across, rise) - (low.diameterMm + high.diameterMm) / 2;
  const point = Math.hypot(across, rise - roofMm(low.diameterMm)) - high.diameterMm / 2;
  return Math.min(round, point);
}
