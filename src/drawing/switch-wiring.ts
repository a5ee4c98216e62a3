/**
 * One wafer of a rotary switch as it lies on paper: contacts in turning order, the rotor in one position, what is joined. Seen
 * from the front the numbers run clockwise, from behind counterclockwise. Origin in the middle of the wafer, Y up, millimetres.
 */
import { type Box, type Measure, overlap, textBox } from './boxes.ts';
import type { Shape, Text } from './drawing.ts';
import { arrowHead, circle, earthSymbol, label, line, polygon, polyline, SMALL_MM } from './shapes.ts';
import { positionDeg } from './switch-angles.ts';

export interface Contact {
  /** As it is counted. */
  readonly number: string;
  /** What is soldered to it; empty where the place stays free. */
  readonly name: string;
}

export interface Wafer {
  /** In turning order; two at least. */
  readonly contacts: readonly Contact[];
  readonly stepDeg: number;
  /** Index of the contact that the rotor is drawn at. */
  readonly shown: number;
  /** Where the common goes: earth, or as the words say; null for a wafer of pairs, which has none. */
  readonly common: 'earth' | { readonly words: string } | null;
  /** A wire from the common to one contact, which stays. */
  readonly link: 'first' | 'last' | null;
  /** The rotor joins the contact in use with all before or behind it. */
  readonly bridge: 'before' | 'behind' | null;
}

export type Side = 'front' | 'behind';

interface Layout {
  readonly ringMm: number;
  /** Radius of a contact; with a number inside from `NUMBERED_MM` on. */
  readonly contactMm: number;
  readonly labels: readonly Text[];
}

const NUMBERED_MM = 2.5;
const DOT_MM = 0.8;
const RING_MM = { least: 19, most: 36, dots: 40 } as const;
const HUB_MM = 2.6;
/** Drop of the common's lead below what stands round the ring. */
const LEAD_MM = 3;

/** Place at a radius and an angle clockwise from the top, as seen from that side. */
function place(radius: number, deg: number, side: Side): [number, number] {
  const a = (deg * Math.PI) / 180;
  return [(side === 'front' ? 1 : -1) * radius * Math.sin(a), radius * Math.cos(a)];
}

const degOf = (wafer: Wafer, index: number) => positionDeg(index, wafer.contacts.length, wafer.stepDeg);

/** Round the ring, in line with the contacts; beside the middle they grow away from it. */
function labelsAt(wafer: Wafer, radius: number, texts: readonly string[], bold: boolean): Text[] {
  return texts.flatMap((text, i) => {
    if (text === '') return [];
    const [x, y] = place(radius, degOf(wafer, i), 'front');
    const align = Math.abs(x) < 0.15 * radius ? 'centre' : x > 0 ? 'left' : 'right';
    return [label(x, y, text, { align, anchor: 'middle', bold })];
  });
}

/** Clear of one another, and of the common's lead at the bottom. */
function clear(labels: readonly Text[], measure: Measure): boolean {
  const boxes = labels.map((text) => textBox(text, measure));
  const lead: Box = { left: -0.8, right: 0.8, bottom: -Infinity, top: -HUB_MM };
  return boxes.every(
    (box, i) => !overlap(box, lead) && boxes.slice(i + 1).every((other) => !overlap(padded(box), other)),
  );
}

const padded = (box: Box): Box => ({ ...box, left: box.left - 0.8, right: box.right + 0.8, bottom: box.bottom - 0.2 });

/** The smallest ring on which contacts with a number in them and names beside them are clear; else dots and numbers, as many as go. */
function layOut(wafer: Wafer, halfMm: number, measure: Measure): Layout {
  const half = Math.sin((wafer.stepDeg * Math.PI) / 360);
  const least = Math.max(RING_MM.least, (NUMBERED_MM + 0.6) / half);
  const names = wafer.contacts.map(({ name }) => name);
  for (let ringMm = least; ringMm <= RING_MM.most; ringMm++) {
    const labels = labelsAt(wafer, ringMm + NUMBERED_MM + 1.6, names, false);
    const boxes = labels.map((text) => textBox(text, measure));
    if (boxes.some(({ left, right }) => Math.max(-left, right) > halfMm)) break;
    if (clear(labels, measure)) return { ringMm, contactMm: NUMBERED_MM, labels };
  }
  const last = wafer.contacts.length - 1;
  const widest = Math.max(...wafer.contacts.map(({ number }) => measure.width(number, SMALL_MM, true)));
  const beside = DOT_MM + 2.2;
  const ringMm = Math.min(RING_MM.dots, halfMm - beside - widest);
  for (let every = 1; ; every++) {
    const some = wafer.contacts.map(({ number }, i) =>
      wafer.contacts[i]!.name !== '' && (i === last || (i % every === 0 && last - i >= every)) ? number : '',
    );
    const labels = labelsAt(wafer, ringMm + beside, some, true);
    if (every > last || clear(labels, measure)) return { ringMm, contactMm: DOT_MM, labels };
  }
}

const mirrored = (text: Text): Text => ({
  ...text,
  x: -text.x,
  align: text.align === 'left' ? 'right' : text.align === 'right' ? 'left' : 'centre',
});

/** A band of the rotor between two angles, its outer edge on the contacts. */
function band(from: number, to: number, outer: number, side: Side): Shape {
  const steps = Math.max(2, Math.ceil(Math.abs(to - from) / 4));
  const at = (radius: number) =>
    Array.from({ length: steps + 1 }, (_, i) => place(radius, from + ((to - from) * i) / steps, side));
  return polygon([...at(outer), ...at(outer - 2).reverse()], 'thin', 0.75);
}

/** From the contact inwards, round the hub on the side that the rotor leaves free, to the common's lead. */
function linkTo(deg: number, outer: number, side: Side): Shape[] {
  const radius = HUB_MM + 0.4 * (outer - HUB_MM);
  const end = deg >= 0 ? 180 : -180;
  const steps = Math.max(2, Math.ceil(Math.abs(end - deg) / 5));
  const arc = Array.from({ length: steps + 1 }, (_, i) => place(radius, deg + ((end - deg) * i) / steps, side));
  return [polyline([place(outer, deg, side), ...arc], 'outline'), circle(0, -radius, 0.7, 'thin', 0)];
}

export interface DrawnWafer {
  readonly shapes: readonly Shape[];
  readonly box: Box;
  /** Places of the contacts, in order, for those who check. */
  readonly contacts: readonly (readonly [number, number])[];
}

/** The wafer seen from one side, within `halfMm` of its middle across. Both sides of a wafer take the same room, mirrored. */
export function drawWafer(wafer: Wafer, side: Side, halfMm: number, measure: Measure): DrawnWafer {
  const { ringMm, contactMm, labels } = layOut(wafer, halfMm, measure);
  const inner = ringMm - contactMm;
  const texts = side === 'front' ? labels : labels.map(mirrored);
  const boxes = texts.map((text) => textBox(text, measure));
  const shapes: Shape[] = [...texts];
  const contacts = wafer.contacts.map((_, i) => place(ringMm, degOf(wafer, i), side));
  const shownDeg = degOf(wafer, wafer.shown);

  const lowest = Math.min(-HUB_MM - 4, ...contacts.map(([, y]) => y - contactMm), ...boxes.map(({ bottom }) => bottom));
  const low = lowest - LEAD_MM;
  if (wafer.common !== null) shapes.push(...commonLead(wafer, low, inner, side));
  if (wafer.bridge !== null) {
    const other = degOf(wafer, wafer.bridge === 'behind' ? contacts.length - 1 : 0);
    const reach = wafer.stepDeg * 0.22 * (wafer.bridge === 'behind' ? 1 : -1);
    shapes.push(band(shownDeg - reach, other + reach, inner, side));
  }
  if (wafer.common === null) shapes.push(...pairs(wafer, ringMm, contactMm, side));
  else {
    const foot = inner - (wafer.bridge === null ? 0 : 2);
    const [x, y] = place(foot, shownDeg, side);
    shapes.push(line(...place(HUB_MM, shownDeg, side), ...place(foot - 1.5, shownDeg, side), 'outline'));
    shapes.push(arrowHead(x, y, (Math.atan2(y, x) * 180) / Math.PI, 2.6));
  }
  shapes.push(circle(0, 0, HUB_MM, 'outline', 1), circle(0, 0, 0.5, 'thin', 0));
  contacts.forEach(([x, y], i) => {
    if (wafer.contacts[i]!.name === '') return;
    const numbered = contactMm >= NUMBERED_MM;
    shapes.push(circle(x, y, contactMm, 'thin', numbered ? 1 : 0, `contact ${wafer.contacts[i]!.number}`));
    if (numbered)
      shapes.push(label(x, y, wafer.contacts[i]!.number, { align: 'centre', anchor: 'middle', bold: true }));
  });

  const words = wafer.common !== null && wafer.common !== 'earth' ? wafer.common.words : null;
  if (words !== null) shapes.push(label(0, low - 3.4, words, { align: 'centre', bold: true }));
  const half = Math.max(
    ringMm + contactMm,
    ...boxes.map(({ left, right }) => Math.max(-left, right)),
    words === null ? 0 : measure.width(words, SMALL_MM, true) / 2,
  );
  const top = Math.max(ringMm + contactMm, ...boxes.map((box) => box.top));
  const bottom = wafer.common === null ? lowest : low - 4.4;
  return { shapes, box: { left: -half, right: half, bottom, top }, contacts };
}

/** The lead of the common down to what it goes to, and the link that stays on it. */
function commonLead(wafer: Wafer, low: number, inner: number, side: Side): Shape[] {
  const shapes: Shape[] = [line(0, -HUB_MM, 0, low, 'outline')];
  if (wafer.common === 'earth') shapes.push(...earthSymbol(0, low + 0.6));
  if (wafer.link !== null)
    shapes.push(...linkTo(degOf(wafer, wafer.link === 'last' ? wafer.contacts.length - 1 : 0), inner, side));
  return shapes;
}

/**
 * A second contact inside each, joined with it by a bridge of the rotor at every place but the one in use. The rotor's open place
 * points there.
 */
function pairs(wafer: Wafer, ringMm: number, contactMm: number, side: Side): Shape[] {
  const second = ringMm - contactMm - 3.2;
  const shapes: Shape[] = [];
  wafer.contacts.forEach(({ name }, i) => {
    if (name === '') return;
    const deg = degOf(wafer, i);
    if (i !== wafer.shown)
      shapes.push(line(...place(second, deg, side), ...place(ringMm - contactMm, deg, side), 'outline'));
    shapes.push(circle(...place(second, deg, side), DOT_MM, 'thin', 0));
  });
  const shown = degOf(wafer, wafer.shown);
  const [x, y] = place(second - 1.4, shown, side);
  shapes.push(line(...place(HUB_MM, shown, side), ...place(second - 2.8, shown, side), 'thin', 'dashed'));
  shapes.push(arrowHead(x, y, (Math.atan2(y, x) * 180) / Math.PI, 2));
  return shapes;
}
