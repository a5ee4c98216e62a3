/**
 * A drawing as DXF, ASCII of release 12 (AC1009), which every reader of the format takes: circles, lines, polylines and
 * single lines of text, each on the layer of its use, in the drawing's own coordinates, millimetres, Y up. That release
 * has no header variable for the unit ($INSUNITS came with a later one), so a comment states it. Fills are left out.
 */
import type { Box } from './boxes.ts';
import type { Drawing, Shape, Text } from './drawing.ts';
import { decimal, LAYERS, type Layer, layerOf } from './layers.ts';
import { CAP_SHARE } from './shapes.ts';
import { DASH_MM } from './stroke.ts';

type Pair = readonly [code: number, value: string | number];

/** Colour numbers of the format: 7 black or white, 8 grey. */
const COLOUR: Record<Layer, number> = { HOLES: 7, CUT: 7, MARKS: 8, TEXT: 8 };
const LINE_TYPE = { solid: 'CONTINUOUS', dashed: 'DASHED', centre: 'CENTER' } as const;
const LONGEST = 200;
const SPELT: readonly (readonly [RegExp, string])[] = [
  [/[\u00b5\u03bc]/g, 'u'],
  [/[\u03a9\u2126]/g, ' ohm'],
  [/°/g, ' deg'],
  [/×/g, 'x'],
  [/[−–—]/g, '-'],
];

/**
 * Text of plain ASCII on one line. Letters, digits, blanks and a few signs are kept; micro, ohm and degree are spelt;
 * anything else becomes a blank, also the per cent sign, caret and backslash, which begin codes in this format.
 */
export function dxfText(text: string): string {
  const spelt = SPELT.reduce((sum, [sign, word]) => sum.replace(sign, word), text);
  return spelt
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^A-Za-z0-9 .,:;()+=/_-]+/g, ' ')
    .replace(/ +/g, ' ')
    .trim()
    .slice(0, LONGEST);
}

const point = (x: number, y: number, shift = 0): Pair[] => [
  [10 + shift, decimal(x)],
  [20 + shift, decimal(y)],
  [30 + shift, '0'],
];

function written(text: Text): Pair[] {
  const across = { left: 0, centre: 1, right: 2 }[text.align ?? 'left'];
  const up = text.anchor === 'middle' ? 2 : 0;
  const pairs: Pair[] = [
    ...point(text.x, text.y),
    [40, decimal(CAP_SHARE * text.sizeMm)],
    [1, dxfText(text.text)],
    [50, decimal(text.turnDeg ?? 0)],
  ];
  // The second point holds where text is not simply set from its left end.
  return across === 0 && up === 0 ? pairs : [...pairs, [72, across], ...point(text.x, text.y, 1), [73, up]];
}

function entity(shape: Shape): Pair[] {
  const layer: Pair = [8, layerOf(shape)];
  if (shape.shape === 'text') return dxfText(shape.text) === '' ? [] : [[0, 'TEXT'], layer, ...written(shape)];
  const type: Pair = [6, LINE_TYPE[shape.dash ?? 'solid']];
  switch (shape.shape) {
    case 'circle':
      return [[0, 'CIRCLE'], layer, type, ...point(shape.x, shape.y), [40, decimal(shape.r)]];
    case 'line':
      return [[0, 'LINE'], layer, type, ...point(shape.x1, shape.y1), ...point(shape.x2, shape.y2, 1)];
    default:
      return [
        [0, 'POLYLINE'],
        layer,
        type,
        [66, 1],
        ...point(0, 0),
        [70, shape.closed ? 1 : 0],
        ...shape.points.flatMap(([x, y]): Pair[] => [[0, 'VERTEX'], layer, ...point(x, y)]),
        [0, 'SEQEND'],
        layer,
      ];
  }
}

function table(name: string, entries: readonly Pair[][]): Pair[] {
  return [[0, 'TABLE'], [2, name], [70, entries.length], ...entries.flat(), [0, 'ENDTAB']];
}

function lineType(name: string, words: string, pattern: readonly number[]): Pair[] {
  return [
    [0, 'LTYPE'],
    [2, name],
    [70, 0],
    [3, words],
    [72, 65],
    [73, pattern.length],
    [40, decimal(pattern.reduce((sum, mm) => sum + mm, 0))],
    // A gap counts below 0.
    ...pattern.map((mm, i): Pair => [49, decimal(i % 2 === 0 ? mm : -mm)]),
  ];
}

/** The drawing as the text of a file. `view` is how far it reaches; the comments stand first. */
export function dxfOf(drawing: Drawing, view: Box, comments: readonly string[]): string {
  const section = (name: string, inside: readonly Pair[]): Pair[] => [
    [0, 'SECTION'],
    [2, name],
    ...inside,
    [0, 'ENDSEC'],
  ];
  const layers = LAYERS.map((layer): Pair[] => [
    [0, 'LAYER'],
    [2, layer],
    [70, 0],
    [62, COLOUR[layer]],
    [6, 'CONTINUOUS'],
  ]);
  const pairs: Pair[] = [
    ...['lengths in millimetres', ...comments].map((text): Pair => [999, dxfText(text)]),
    ...section('HEADER', [
      [9, '$ACADVER'],
      [1, 'AC1009'],
      [9, '$EXTMIN'],
      ...point(view.left, view.bottom),
      [9, '$EXTMAX'],
      ...point(view.right, view.top),
      [9, '$LUNITS'],
      [70, 2],
      [9, '$LUPREC'],
      [70, 4],
    ]),
    ...section('TABLES', [
      ...table('LTYPE', [
        lineType('CONTINUOUS', 'Solid line', []),
        lineType('DASHED', '_ _ _ _', DASH_MM.dashed),
        lineType('CENTER', '____ _ ____', DASH_MM.centre),
      ]),
      ...table('LAYER', layers),
    ]),
    ...section(
      'ENTITIES',
      LAYERS.flatMap((layer) => drawing.shapes.filter((shape) => layerOf(shape) === layer)).flatMap(entity),
    ),
    [0, 'EOF'],
  ];
  return pairs.map(([code, value]) => `${String(code).padStart(3)}\n${value}\n`).join('');
}
