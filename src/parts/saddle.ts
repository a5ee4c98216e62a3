/**
 * The drill saddle, for a tube that was bought: half shells that clip on and guide the drill to every hole of the record.
 *
 *     dimensions -> pieces -> shell (a C drawn upwards, its inside cut out above the rim)
 *                                 - guides, notches, words
 *
 * Printed standing, as it stands on the tube, so that guides are lying holes with a roof.
 */
import type { PartsRecord } from '../record/schema.ts';
import { teardrop } from './holes.ts';
import { glyph, textStrokes, textWidthMm } from './lettering.ts';
import { type SaddleDimensions, saddleDimensions } from './saddle-dimensions.ts';
import { HALF_NOTCH_MM, NOTCH_MM, type SaddlePiece } from './saddle-pieces.ts';
import { alongLine, type PlacedWords } from './saddle-words.ts';
import { areaOf, boundsOf, chordsFor, prism } from './shapes.ts';
import { ringAt } from './slab.ts';
import type { Cutter, Engraving, Frame, Loft, Point2, Point3, Solid } from './solid.ts';
import { CUT_MM, cutMm3, plainer, STROKE_MM } from './words.ts';

const RAD = Math.PI / 180;
/** Taken off the lower inner edge of a piece that stands on its bare end, where the first layers spread. */
const CHAMFER_MM = 0.5;
/** Lips that give way by less do not hold by themselves. */
const HOLDS_MM = 0.15;
/** Cutters stand proud by this, and past the lips by as many degrees as leave them on no corner. */
const PROUD_MM = 1;
const PAST_DEG = 5;

/** @throws Fault (exit 4) as {@link saddleDimensions} */
export function saddleParts(record: PartsRecord): Solid[] {
  const d = saddleDimensions(record);
  return d.pieces.map((piece) => pieceSolid(record, d, piece));
}

/** The shell seen from above, its middle along +x and the tube's axis at 0, counterclockwise; `innerR` its inside. */
export function saddleOutline(d: SaddleDimensions, innerR: number): Point2[] {
  return [...arc(d.outsideR, d.halfSweepDeg, 'outside'), ...arc(innerR, d.halfSweepDeg, 'inside').reverse()];
}

/** From -half to +half; chords of the outside are inscribed, those of the inside circumscribed but for their ends. */
function arc(r: number, halfDeg: number, side: 'outside' | 'inside'): Point2[] {
  const n = chordsFor(r, 2 * halfDeg * RAD);
  const step = (2 * halfDeg * RAD) / n;
  const corner = side === 'outside' ? r : r / Math.cos(step / 2);
  return Array.from({ length: n + 1 }, (_, i): Point2 => {
    const a = -halfDeg * RAD + i * step;
    return [corner * Math.cos(a), corner * Math.sin(a)];
  });
}

function pieceSolid({ printer }: PartsRecord, d: SaddleDimensions, piece: SaddlePiece): Solid {
  const heightMm = piece.toMm - piece.fromMm;
  const innerR = piece.rim ? d.rimR : d.insideR - PROUD_MM;
  const outline = saddleOutline(d, innerR);
  const { min, max } = boundsOf(outline);
  // The box is centred on the bed; the axis then lies at x = ox.
  const ox = -(min[0] + max[0]) / 2;
  const moved = (points: readonly Point2[]) => points.map(([x, y]): Point2 => [x + ox, y]);
  const inside = prism(
    'inside',
    [moved(arc(d.insideR, d.halfSweepDeg + PAST_DEG, 'inside'))],
    piece.rim ? d.rimMm : -PROUD_MM,
    heightMm + PROUD_MM,
  );
  const sides = chordsFor(d.insideR);
  const foot: Loft = {
    kind: 'loft',
    name: 'chamfer',
    rings: [
      ringAt(d.insideR + CHAMFER_MM + PROUD_MM, -PROUD_MM, sides, ox),
      ringAt(d.insideR - CHAMFER_MM, 2 * CHAMFER_MM, sides, ox),
    ],
    hubs: null,
  };
  const frameAt = (deg: number, z: number): Frame => ({
    origin: [ox, 0, z],
    x: [-Math.sin(deg * RAD), Math.cos(deg * RAD), 0],
    y: [0, 0, 1],
  });
  const through = [d.insideR - 2, d.outsideR + PROUD_MM] as const;
  const guides = piece.guides.map(({ hole, diameterMm, turnDeg }) =>
    prism(`guide ${hole.label}`, [teardrop(diameterMm)], ...through, frameAt(turnDeg, hole.axialMm - piece.fromMm)),
  );
  const slope = HALF_NOTCH_MM / NOTCH_MM;
  const open = (NOTCH_MM + PROUD_MM) * slope;
  const notch: Point2[] = [
    [0, -NOTCH_MM],
    [open, PROUD_MM],
    [-open, PROUD_MM],
  ];
  const notches = notchesDeg(d, piece).map((deg) => prism(`notch ${deg}`, [notch], ...through, frameAt(deg, heightMm)));
  const cuts = piece.words.flatMap((words) => onRound(words, d, piece.fromMm, frameAt));
  const lines = piece.words.flatMap((words) => lineCut(words, d, piece.fromMm, ox));
  const cutters: Cutter[] = [inside, ...(piece.rim ? [] : [foot]), ...guides, ...notches, ...cuts, ...lines];

  const shell = areaOf(saddleOutline(d, d.insideR));
  const rim = piece.rim ? (areaOf(saddleOutline(d, d.rimR)) - shell) * d.rimMm : 0;
  const chamfer = piece.rim ? 0 : CHAMFER_MM ** 2 * d.halfSweepDeg * RAD * d.insideR;
  const bored = piece.guides.reduce((sum, { diameterMm }) => sum + areaOf(teardrop(diameterMm)) * d.wallMm, 0);
  const lined = piece.words.reduce(
    (sum, { line }) => sum + (line ? Math.hypot(line[1][0] - line[0][0], line[1][1] - line[0][1]) : 0),
    0,
  );
  return {
    part: piece.part,
    name: `Drill saddle, piece ${piece.letter}`,
    kind: 'saddle',
    quantity: 1,
    material: printer.material,
    densityGCm3: printer.densityGCm3,
    shapes: [prism('shell', [moved(outline)], 0, heightMm)],
    cutters,
    expected: {
      bodies: 1,
      genus: guides.length,
      genusIs: `${guides.length} guides`,
      minMm: [min[0] + ox, min[1], 0],
      maxMm: [max[0] + ox, max[1], heightMm],
      volumeMm3:
        shell * heightMm +
        rim -
        chamfer -
        bored -
        notches.length * HALF_NOTCH_MM * NOTCH_MM * d.wallMm -
        cuts.reduce((sum, cut) => sum + cutMm3(cut), 0) -
        lined * STROKE_MM * CUT_MM,
    },
    use: useOf(d, piece),
    printNote:
      'standing on its lower end, no supports, a brim when it is tall; seam on a lip; 4 walls, so that the guides are solid',
  };
}

/** Angles from the middle of a piece at which lines along the lips of the opposite half appear. */
export function notchesDeg(d: SaddleDimensions, { notches }: SaddlePiece): number[] {
  return notches ? [d.halfSweepDeg - 180, 180 - d.halfSweepDeg] : [];
}

/** Every letter in a plane of its own, so that all are equally deep on the round. */
function onRound(
  { text, u, z, heightMm }: PlacedWords,
  d: SaddleDimensions,
  fromMm: number,
  frameAt: (deg: number, z: number) => Frame,
): Engraving[] {
  return [...text].flatMap((sign, i) => {
    if (sign === ' ') return [];
    const wide = glyph(sign).width * heightMm;
    const middle = u + textWidthMm([...text].slice(0, i + 1).join(''), heightMm) - wide / 2;
    return {
      kind: 'engraving',
      name: `words ${text}`,
      zMm: d.outsideR,
      depthMm: CUT_MM,
      widthMm: STROKE_MM,
      strokes: textStrokes(sign, heightMm, 0, 0, 'centre').map((line) => plainer(line)),
      frame: frameAt(middle / d.outsideR / RAD, z - fromMm),
    };
  });
}

/** A line round the shell, bent with it. */
function lineCut({ text, line }: PlacedWords, d: SaddleDimensions, fromMm: number, ox: number): Loft[] {
  if (!line) return [];
  const [[u0, z0], [u1, z1]] = line;
  const long = Math.hypot(u1 - u0, z1 - z0);
  const half = STROKE_MM / 2;
  const [nu, nz] = [(-(z1 - z0) / long) * half, ((u1 - u0) / long) * half];
  const at = (u: number, z: number, r: number): Point3 => [
    ox + r * Math.cos(u / d.outsideR),
    r * Math.sin(u / d.outsideR),
    z - fromMm,
  ];
  const rings = alongLine(line, 2).map(([u, z]) => [
    at(u - nu, z - nz, d.outsideR - CUT_MM),
    at(u + nu, z + nz, d.outsideR - CUT_MM),
    at(u + nu, z + nz, d.outsideR + PROUD_MM),
    at(u - nu, z - nz, d.outsideR + PROUD_MM),
  ]);
  return [{ kind: 'loft', name: `line ${text}`, rings, hubs: null }];
}

function useOf(d: SaddleDimensions, piece: SaddlePiece): string {
  const pin = piece.guides.find(({ index }) => index);
  const own = piece.guides.filter(({ index }) => !index).map(({ hole }) => hole.label);
  const place = [
    piece.rim ? 'its rim against the lower end of the tube' : '',
    pin ? `a drill shank through hole ${pin.hole.label}, bored before` : '',
    piece.standsOn ? `its lower end on the upper end of ${piece.standsOn}, which stays on, lips in line` : '',
    piece.lined
      ? `${piece.notches ? 'its notches' : 'its lips'} on the lines along the lips of ${piece.lined}${piece.rim ? '' : ', its ends level with those of that piece'}`
      : '',
    d.snapMm < HOLDS_MM ? 'held on with a rubber band' : '',
  ].filter((one) => one !== '');
  const leads = piece.lined === null && d.pieces.some(({ lined }) => lined === piece.part);
  const bores = own.length > 0 ? `guides the drill at ${own.join(', ')}` : 'places the next piece';
  return `${bores}; ${place.join(', ')}${leads ? '; draw a line along both lips before it is taken off' : ''}`;
}
