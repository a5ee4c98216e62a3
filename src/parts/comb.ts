/**
 * The pitch comb for a winding that is spaced without a groove: teeth at the pitch hold the turns apart while they are
 * laid and doped, and two notches on the other edge gauge the length of the first turns.
 *
 *     ___|  go  |___| no go |___      the winding goes into GO and not into NO GO
 *    |   20 TURNS 15.93         |
 *    |_  _  _  _  _  _  _  _  __|
 *      || || || || || || || ||        teeth, every turn or every second, fifth or tenth
 */
import { Fault } from '../fault.ts';
import type { PartsRecord } from '../record/schema.ts';
import { textWidthMm } from './lettering.ts';
import { areaOf, boundsOf, prism } from './shapes.ts';
import type { Point2, Solid } from './solid.ts';
import { cutMm3, type Words, wordsCut } from './words.ts';

/** Turns gauged, and spanned by the teeth, at most: as the check in the record. */
const MOST_TURNS = 20;
/** Of the space of a tooth: a wire at its greatest still enters. */
const PLAY_MM = 0.1;
/** A tooth too wide for the gap must still sink this far between two round wires, or a hand feels no place for it. */
const SINK_MM = 0.06;
/** Chords of the round nose of such a tooth: the end of a printed line is round in any case. */
const NOSE_CHORDS = 8;
/** Turns from one tooth to the next. */
const EVERY = [1, 2, 5, 10] as const;
/** Go and no-go stand this far from the nominal length: what 1 % of length is worth in inductance is about half of that. */
const LIMIT = 0.01;
/** A printed notch is not truer than this. */
const LEAST_LIMIT_MM = 0.15;
const PLATE_MM = 2;
const TEXT_MM = 3.5;
const SIDE_MM = 5;
/** Least that stands between and beside the notches. */
const JAW_MM = 6;
const LINE_MM = TEXT_MM + 2;

/** All in mm; x from the middle of the plate, y from the tips of the teeth. */
export interface CombDimensions {
  readonly pitchMm: number;
  readonly toothMm: number;
  readonly toothLengthMm: number;
  /** Turns from tooth to tooth. */
  readonly everyTurns: number;
  readonly teeth: number;
  /** Whether the teeth go between the wires or only stand in the valley over them. */
  readonly seat: 'between' | 'valley';
  /** Turns gauged, and their nominal length edge to edge. */
  readonly gaugedTurns: number;
  readonly gaugedMm: number;
  readonly goMm: number;
  readonly noGoMm: number;
  readonly notchDepthMm: number;
  /** Left edges of the notches. */
  readonly goFromMm: number;
  readonly noGoFromMm: number;
  readonly lengthMm: number;
  readonly heightMm: number;
  readonly plateMm: number;
  readonly words: readonly Words[];
}

/** @throws Fault (exit 4): `comb-few-turns`, `comb-pitch-fine` */
export function combDimensions({ windings, printer }: PartsRecord): CombDimensions {
  const { pitchMm, turns, turnPositionsMm, wire } = windings[0]!;
  const gaugedTurns = Math.min(MOST_TURNS, Math.floor(turns));
  if (gaugedTurns < 2)
    throw new Fault(4, {
      code: 'comb-few-turns',
      place: { key: 'parts' },
      got: `a winding of ${turns} turns`,
      expected: 'two whole turns or more, that a comb can space',
      todo: 'leave the comb out of parts',
    });
  const line = printer.lineMm;
  const between = pitchMm - wire.overallHighMm - PLAY_MM >= line;
  const toothMm = between ? pitchMm - wire.overallHighMm - PLAY_MM : line;
  if (!between) requireValley(pitchMm, toothMm, wire.overallMm);
  // The space from tooth to tooth is printed as well.
  const fits = EVERY.filter((every) => every * pitchMm - toothMm >= line && every < gaugedTurns);
  const everyTurns = fits[0] ?? gaugedTurns - 1;
  const teeth = Math.floor((gaugedTurns - 1) / everyTurns) + 1;
  const spanMm = (teeth - 1) * everyTurns * pitchMm + toothMm;

  const gaugedMm = turnPositionsMm[gaugedTurns - 1]! - turnPositionsMm[0]! + wire.overallMm;
  const limit = Math.max(LIMIT * gaugedMm, LEAST_LIMIT_MM);
  const goMm = gaugedMm + limit;
  const noGoMm = gaugedMm - limit;
  const notchDepthMm = wire.overallHighMm + 2.5;
  const toothLengthMm = wire.overallHighMm + 1.5;

  const texts = [
    `PITCH ${figure(pitchMm, 3)} MM`,
    `${gaugedTurns} TURNS ${figure(gaugedMm, 2)}`,
    ...(everyTurns > 1 ? [`A TOOTH A ${everyTurns} TURNS`] : []),
  ];
  const notch = (mm: number) => Math.max(mm, textWidthMm('NO GO', TEXT_MM) + 1);
  const lengthMm = Math.max(
    spanMm + 2 * SIDE_MM,
    notch(goMm) + notch(noGoMm) + 3 * JAW_MM,
    ...texts.map((text) => textWidthMm(text, TEXT_MM) + 2 * SIDE_MM),
  );
  const spare = (lengthMm - goMm - noGoMm) / 3;
  const goFromMm = -lengthMm / 2 + spare;
  const noGoFromMm = goFromMm + goMm + spare;
  const bodyMm = SIDE_MM + (texts.length + 1) * LINE_MM;
  const heightMm = toothLengthMm + bodyMm + notchDepthMm;
  const centred = (text: string, x: number, y: number): Words => ({ text, x, y, heightMm: TEXT_MM, align: 'centre' });
  const under = heightMm - notchDepthMm - LINE_MM;
  return {
    pitchMm,
    toothMm,
    toothLengthMm,
    everyTurns,
    teeth,
    seat: between ? 'between' : 'valley',
    gaugedTurns,
    gaugedMm,
    goMm,
    noGoMm,
    notchDepthMm,
    goFromMm,
    noGoFromMm,
    lengthMm,
    heightMm,
    plateMm: PLATE_MM,
    words: [
      centred('GO', goFromMm + goMm / 2, under),
      centred('NO GO', noGoFromMm + noGoMm / 2, under),
      ...texts.map((text, i) => centred(text, 0, under - (i + 1) * LINE_MM)),
    ],
  };
}

const figure = (mm: number, digits: number) => `${Number(mm.toFixed(digits))}`;

/**
 * A nose of radius q that lies on two wires of radius r side by side sinks r + q - sqrt((r + q)^2 - (pitch / 2)^2) below
 * their tops.
 */
function requireValley(pitchMm: number, toothMm: number, overallMm: number): void {
  const r = overallMm / 2;
  const both = r + toothMm / 2;
  const half = pitchMm / 2;
  if (half >= both || both - Math.sqrt(both * both - half * half) >= SINK_MM) return;
  const least = Math.ceil(2000 * Math.sqrt(2 * SINK_MM * both - SINK_MM ** 2)) / 1000;
  const lineMost = Math.floor(2000 * ((half * half + SINK_MM ** 2) / (2 * SINK_MM) - r)) / 1000;
  throw new Fault(4, {
    code: 'comb-pitch-fine',
    place: { key: 'parts' },
    got: `a pitch of ${figure(pitchMm, 3)} mm with wire of ${figure(overallMm, 3)} mm, for teeth one printed line of ${toothMm} mm wide`,
    expected: `a pitch of ${least} mm or more, so that a tooth sinks ${SINK_MM} mm between two wires`,
    todo: `${lineMost >= 0.2 ? `set printer.line to ${lineMost} mm or less, or ` : ''}leave the comb out of parts`,
  });
}

/** The end of a tooth, from left to right. */
const square = (l: number, r: number): Point2[] => [
  [l, 0],
  [r, 0],
];

function nose(l: number, r: number): Point2[] {
  const q = (r - l) / 2;
  return Array.from({ length: NOSE_CHORDS + 1 }, (_, i): Point2 => {
    const a = (Math.PI * i) / NOSE_CHORDS;
    return [l + q - q * Math.cos(a), q - q * Math.sin(a)];
  });
}

/** The outline seen from above, counterclockwise from the lower left corner of the body; x and y as the dimensions. */
export function combOutline(d: CombDimensions): Point2[] {
  const half = d.lengthMm / 2;
  const root = d.toothLengthMm;
  const step = d.everyTurns * d.pitchMm;
  const outline: Point2[] = [[-half, root]];
  for (let k = 0; k < d.teeth; k++) {
    const x = (k - (d.teeth - 1) / 2) * step;
    const [l, r] = [x - d.toothMm / 2, x + d.toothMm / 2];
    outline.push([l, root], ...(d.seat === 'between' ? square(l, r) : nose(l, r)), [r, root]);
  }
  const floor = d.heightMm - d.notchDepthMm;
  const notch = (from: number, width: number): Point2[] => [
    [from + width, d.heightMm],
    [from + width, floor],
    [from, floor],
    [from, d.heightMm],
  ];
  outline.push([half, root], [half, d.heightMm]);
  outline.push(...notch(d.noGoFromMm, d.noGoMm), ...notch(d.goFromMm, d.goMm), [-half, d.heightMm]);
  return outline;
}

/** @throws Fault (exit 4) as {@link combDimensions} */
export function combParts(record: PartsRecord): Solid[] {
  const d = combDimensions(record);
  const { printer } = record;
  const down = -d.heightMm / 2;
  const outline = combOutline(d).map(([x, y]): Point2 => [x, y + down]);
  const words = wordsCut(
    'words',
    d.words.map((each) => ({ ...each, y: each.y + down })),
    d.plateMm,
  );
  const { min, max } = boundsOf(outline);
  const where = d.seat === 'between' ? 'between the turns' : 'in the valleys over the turns';
  return [
    {
      part: 'comb',
      name: 'Pitch comb',
      kind: 'comb',
      quantity: 1,
      material: printer.material,
      densityGCm3: printer.densityGCm3,
      shapes: [prism('comb', [outline], 0, d.plateMm)],
      cutters: [words],
      expected: {
        bodies: 1,
        genus: 0,
        genusIs: 'no hole',
        minMm: [min[0], min[1], 0],
        maxMm: [max[0], max[1], d.plateMm],
        volumeMm3: areaOf(outline) * d.plateMm - cutMm3(words),
      },
      use: `spaces the turns: its teeth go ${where}, one ${d.everyTurns === 1 ? 'a turn' : `every ${d.everyTurns} turns`}; the first ${d.gaugedTurns} turns go into GO (${figure(d.goMm, 2)} mm) and not into NO GO (${figure(d.noGoMm, 2)} mm)`,
      printNote:
        "flat as it lies, no supports; outline printed before the inside; take the first layer's ridge off the teeth with a knife",
    },
  ];
}
