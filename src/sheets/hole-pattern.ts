/**
 * The hole pattern for those who drill or cut by machine: the surface of the former developed flat at its own outside
 * radius, without rulers, overlap or paper. X grows to the right with the angle from the seam at X = 0; Y is Z, from the
 * datum. It reads the record and nothing else.
 */
import { PATTERN } from '../../templates/wording/hole-pattern.ts';
import type { Box, Measure } from '../drawing/boxes.ts';
import type { Drawing, Shape } from '../drawing/drawing.ts';
import { dxfOf } from '../drawing/dxf.ts';
import { placeLabels } from '../drawing/labels.ts';
import { label, line, rectangle, SMALL_MM } from '../drawing/shapes.ts';
import { svgOf } from '../drawing/svg.ts';
import { markOf, places, seamOf } from '../drawing/template.ts';
import type { OutputFile } from '../record/listing.ts';
import type { CoilRecord } from '../record/schema.ts';
import { short, wrap } from './text.ts';
import { lengthText, unitsOf } from './units.ts';

/** Clear round the outline, for the datum and angle marks, mm. */
const MARGIN_MM = 6;
/** How far the marks of datum and angle stand out of the outline, mm. */
const MARK_MM = 4;
const LEADING_MM = 4;
/** Narrower than this the notes would be a column of single words, mm. */
const NOTES_MM = 90;

/** Whoever opens the file sets the text in a face of their own: widths that a wide face keeps to. */
const measure: Measure = { width: (text, sizeMm, bold) => [...text].length * sizeMm * (bold ? 0.7 : 0.6) };

interface Pattern {
  readonly drawing: Drawing;
  readonly view: Box;
  readonly notes: readonly string[];
}

/** The pattern as a drawing: holes, outline, marks and words. */
export function layOutHolePattern(record: CoilRecord): Pattern {
  const { former } = record;
  const round = Math.PI * former.outsideDiameterMm;
  const bottom = former.flange?.lowerMm ?? 0;
  const top = former.lengthMm - (former.flange?.upperMm ?? 0);
  const all = places(record);
  // Rounded, so that the angle that is written is the one that is drawn.
  const seam = (Math.round(10 * seamOf(all.map((place) => place.angleDeg))) / 10) % 360;
  const x = (angleDeg: number) => ((((angleDeg - seam) % 360) + 360) % 360) * (round / 360);
  const zero = x(0);

  const shapes: Shape[] = [
    rectangle(0, bottom, round, top - bottom, 'outline'),
    ...all.flatMap((place) => markOf(place, x(place.angleDeg))),
    // The datum and the angle of the start hole stand out of the outline, so that nothing is cut or bored twice.
    line(-MARK_MM, 0, bottom > 0 ? round + MARK_MM : 0, 0, 'hair', 'centre'),
    ...(bottom > 0 ? [] : [line(round, 0, round + MARK_MM, 0, 'hair', 'centre')]),
    line(zero, top, zero, top + MARK_MM, 'hair', 'centre'),
    label(zero + 1, top + 1.2, PATTERN.zero),
    label(0, -3.4, PATTERN.datum),
  ];
  const marks = all.map((place) => ({
    text: place.label,
    x: x(place.angleDeg),
    y: place.axialMm,
    reachMm: place.diameterMm > 0 ? place.diameterMm / 2 + 0.7 : 1.5,
  }));
  const region = { left: 1, right: round - 1, bottom: bottom + 0.6, top: top - 0.6 };
  const labels = placeLabels(marks, region, [], [], measure);
  shapes.push(...labels.shapes);

  // What machines read is in millimetres whatever the sheets are in: inches are only added.
  const noted = unitsOf(record) === 'metric' ? 'metric' : 'both';
  const notes = [
    PATTERN.title(record.job),
    PATTERN.record(record.hash.slice(0, 12)),
    PATTERN.view,
    PATTERN.across(
      lengthText(former.outsideDiameterMm / 2, noted, { digits: 4, trim: true }),
      lengthText(round, noted, { digits: 3 }),
    ),
    PATTERN.left(short(seam, 3)),
    ...(all.some((place) => place.diameterMm === 0) ? [PATTERN.unbored] : []),
    ...(labels.missing.length > 0 ? [PATTERN.unlabelled(labels.missing.join(', '))] : []),
  ];
  const width = Math.max(round, NOTES_MM);
  const lines = notes.flatMap((text) => wrap(text, width, SMALL_MM, false, measure));
  const first = -3.4 - 1.5 * LEADING_MM;
  lines.forEach((text, i) => {
    shapes.push(label(0, first - i * LEADING_MM, text));
  });
  const view = {
    left: -MARGIN_MM,
    right: width + MARGIN_MM,
    bottom: first - lines.length * LEADING_MM,
    top: top + MARGIN_MM,
  };
  return { drawing: { shapes }, view, notes };
}

/** The two files of the output folder. */
export function holePatternFiles(record: CoilRecord): OutputFile[] {
  const { drawing, view, notes } = layOutHolePattern(record);
  const [title, ...rest] = notes as [string, ...string[]];
  const bytes = (text: string) => new TextEncoder().encode(text);
  return [
    {
      path: 'hole-pattern.svg',
      kind: 'svg',
      bytes: bytes(svgOf(drawing, view, { title, description: rest.join(' ') })),
      note: PATTERN.svg,
    },
    { path: 'hole-pattern.dxf', kind: 'dxf', bytes: bytes(dxfOf(drawing, view, notes)), note: PATTERN.dxf },
  ];
}
