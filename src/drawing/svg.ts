/**
 * A drawing as SVG 1.1, true to scale: width and height in millimetres, one user unit a millimetre, Y turned over. The
 * shapes lie in one group a layer. Nothing in it runs or points elsewhere; same drawing, same bytes.
 */
import type { Box } from './boxes.ts';
import type { Drawing, Shape, Stroke, Text } from './drawing.ts';
import { decimal, LAYERS, type Layer, layerOf } from './layers.ts';
import { CAP_SHARE } from './shapes.ts';
import { DASH_MM, WEIGHT_MM } from './stroke.ts';

const COLOUR: Record<Layer, string> = { HOLES: '#000000', CUT: '#000000', MARKS: '#707070', TEXT: '#404040' };
const ANCHOR = { left: 'start', centre: 'middle', right: 'end' } as const;
const ENTITY: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&apos;' };

/** Text for XML: signs of markup as entities, and a blank for what XML 1.0 does not allow at all. */
export function escaped(text: string): string {
  return text
    .replace(/[^\t\n\r\u{20}-\u{d7ff}\u{e000}-\u{fffd}\u{10000}-\u{10ffff}]/gu, ' ')
    .replace(/[&<>"']/g, (sign) => ENTITY[sign]!);
}

function pen(stroke: Stroke): string {
  const dash = stroke.dash ?? 'solid';
  const dashes = dash === 'solid' ? '' : ` stroke-dasharray="${DASH_MM[dash].map(decimal).join(' ')}"`;
  return ` stroke-width="${decimal(WEIGHT_MM[stroke.weight])}"${dashes}`;
}

function filled(fill?: number): string {
  if (fill === undefined) return '';
  const grey = Math.round(fill * 255);
  return ` fill="rgb(${grey},${grey},${grey})"`;
}

/** The drawing as the text of a file. `view` is the part of it that is shown, in its own millimetres. */
export function svgOf(drawing: Drawing, view: Box, words: { title: string; description: string }): string {
  const x = (mm: number) => decimal(mm - view.left);
  const y = (mm: number) => decimal(view.top - mm);

  const written = (text: Text): string => {
    const turned = text.turnDeg ? ` transform="rotate(${decimal(-text.turnDeg)} ${x(text.x)} ${y(text.y)})"` : '';
    const drop = text.anchor === 'middle' ? (CAP_SHARE * text.sizeMm) / 2 : 0;
    const weight = text.bold ? ' font-weight="bold"' : '';
    return `<text x="${x(text.x)}" y="${y(text.y - drop)}" font-size="${decimal(text.sizeMm)}"${weight} text-anchor="${ANCHOR[text.align ?? 'left']}"${turned}>${escaped(text.text)}</text>`;
  };

  const element = (shape: Shape): string => {
    switch (shape.shape) {
      case 'text':
        return written(shape);
      case 'line':
        return `<line x1="${x(shape.x1)}" y1="${y(shape.y1)}" x2="${x(shape.x2)}" y2="${y(shape.y2)}"${pen(shape)}/>`;
      case 'circle': {
        const name = shape.name === undefined ? '' : `<title>${escaped(shape.name)}</title>`;
        const start = `<circle cx="${x(shape.x)}" cy="${y(shape.y)}" r="${decimal(shape.r)}"${pen(shape)}${filled(shape.fill)}`;
        return name === '' ? `${start}/>` : `${start}>${name}</circle>`;
      }
      default: {
        const points = shape.points.map(([px, py]) => `${x(px)},${y(py)}`).join(' ');
        const name = shape.closed ? 'polygon' : 'polyline';
        return `<${name} points="${points}"${pen(shape)}${filled(shape.fill)}/>`;
      }
    }
  };

  const group = (layer: Layer): string[] => {
    const inside = drawing.shapes.filter((shape) => layerOf(shape) === layer);
    if (inside.length === 0) return [];
    const ink =
      layer === 'TEXT'
        ? `fill="${COLOUR[layer]}" font-family="DejaVu Sans, Verdana, sans-serif"`
        : `fill="none" stroke="${COLOUR[layer]}"`;
    return [`<g id="${layer}" ${ink}>`, ...inside.map(element), '</g>'];
  };

  const width = decimal(view.right - view.left);
  const height = decimal(view.top - view.bottom);
  return [
    '<?xml version="1.0" encoding="UTF-8"?>',
    `<svg xmlns="http://www.w3.org/2000/svg" version="1.1" width="${width}mm" height="${height}mm" viewBox="0 0 ${width} ${height}">`,
    `<title>${escaped(words.title)}</title>`,
    `<desc>${escaped(words.description)}</desc>`,
    ...LAYERS.flatMap(group),
    '</svg>',
    '',
  ].join('\n');
}
