/**
 * Pages in millimetres to PDF bytes: the one place that knows points. A page is a drawing whose origin is the lower
 * left corner of the paper, Y up. Written with fixed dates, so that the same pages give the same bytes.
 */
import PDFDocument from 'pdfkit';
import type { Measure } from '../drawing/boxes.ts';
import type { Drawing, Polyline, Shape, Stroke, Text } from '../drawing/drawing.ts';
import { CAP_SHARE } from '../drawing/shapes.ts';
import { DASH_MM, WEIGHT_MM } from '../drawing/stroke.ts';
import { fontFiles } from './fonts.ts';

export const PAPER_MM = { A4: [210, 297], Letter: [215.9, 279.4] } as const;
export interface Page extends Drawing {
  readonly widthMm: number;
  readonly heightMm: number;
  /** Under the shapes. */
  readonly pictures?: readonly PlacedPicture[];
  /** What links lead to. */
  readonly anchor?: string;
  readonly links?: readonly PageLink[];
}

/** A place to press that leads to the page of an anchor; x and y are its lower left corner. */
export interface PageLink {
  readonly x: number;
  readonly y: number;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly to: string;
}

/** A picture in pixels; x and y are its lower left corner. */
export interface PlacedPicture {
  /** Grey, without transparency: its data then go into the document as they are. */
  readonly png: Uint8Array;
  readonly x: number;
  readonly y: number;
  readonly widthMm: number;
  readonly heightMm: number;
}

export interface DocumentInfo {
  readonly title: string;
  readonly subject: string;
}

const POINTS = 72 / 25.4;
type Point = readonly [number, number];
/** Pages written before the library's memory is let go. */
const PAGES_AT_ONCE = 50;

/** What is used of a glyph and of a face of pdfkit; its type declarations leave them out. */
interface Glyph {
  readonly id: number;
  readonly advanceWidth: number;
  readonly codePoints: readonly number[];
}
interface Face {
  readonly scale: number;
  readonly font: { glyphForCodePoint(code: number): Glyph };
  layoutRun(text: string): unknown;
  layoutCache: object;
}

/**
 * Sets a face without kerning or ligatures. A width is then the sum of its advances, so that what was measured is what
 * is printed, figures stand in columns, and no time goes into shaping.
 */
function setPlainly(face: Face): void {
  const { scale } = face;
  face.layoutRun = (text) => {
    const glyphs = Array.from(text, (sign) => face.font.glyphForCodePoint(sign.codePointAt(0)!));
    const positions = glyphs.map((glyph) => ({
      xAdvance: glyph.advanceWidth * scale,
      yAdvance: 0,
      xOffset: 0,
      yOffset: 0,
      advanceWidth: glyph.advanceWidth * scale,
    }));
    const advanceWidth = positions.reduce((sum, position) => sum + position.advanceWidth, 0);
    return { glyphs, positions, advanceWidth };
  };
}

/** A rectangle along the axes: written as one, which the hundreds of modules of a code are worth. */
function isUpright({ closed, points }: Polyline): boolean {
  if (!closed || points.length !== 4) return false;
  const [[ax, ay], [bx, by], [cx, cy], [dx, dy]] = points as [Point, Point, Point, Point];
  return ay === by && bx === cx && cy === dy && dx === ax;
}

/** A document to lay out for and then to write, once. */
export class Paper implements Measure {
  readonly #document: PDFKit.PDFDocument;
  readonly #ended: Promise<void>;
  readonly #faces: Face[] = [];
  readonly #widths: [Map<string, number>, Map<string, number>] = [new Map(), new Map()];

  /** The weight and dash that the page is set to. */
  #pen = '';
  /** The grey that it fills with, 0 to 255; null: not known. */
  #grey: number | null = null;

  constructor(info: DocumentInfo) {
    const options = {
      font: null,
      autoFirstPage: false,
      lang: 'en',
      pdfVersion: '1.7',
      info: {
        Title: info.title,
        Subject: info.subject,
        Creator: 'coilwright',
        Producer: 'coilwright',
        CreationDate: new Date(Date.UTC(2000, 0, 1)),
      },
    };
    this.#document = new PDFDocument(options as unknown as PDFKit.PDFDocumentOptions);
    const catalogue = this.#document as unknown as {
      _root: { data: { ViewerPreferences?: unknown } };
      ref(data: object): unknown;
    };
    catalogue._root.data.ViewerPreferences = catalogue.ref({ PrintScaling: 'None', DisplayDocTitle: true });
    const files = fontFiles();
    for (const [name, file] of [
      ['plain', files.plain],
      ['bold', files.bold],
    ] as const) {
      this.#document.registerFont(name, file).font(name);
      const face = (this.#document as unknown as { _font: Face })._font;
      setPlainly(face);
      this.#faces.push(face);
    }
    this.#ended = new Promise((resolve) => this.#document.on('end', resolve));
  }

  width(text: string, sizeMm: number, bold = false): number {
    const known = this.#widths[bold ? 1 : 0];
    let width = known.get(text);
    if (width === undefined) {
      this.#document.font(bold ? 'bold' : 'plain').fontSize(1000);
      width = this.#document.widthOfString(text) / 1000;
      known.set(text, width);
    }
    return width * sizeMm;
  }

  /** The bytes of a document of these pages. */
  async write(pages: readonly Page[]): Promise<Uint8Array> {
    const chunks: Uint8Array[] = [];
    await this.stream(pages, (chunk) => chunks.push(chunk));
    return Buffer.concat(chunks);
  }

  /** The same piece by piece, for documents of any length: what is written is not kept. */
  async stream(pages: Iterable<Page> | AsyncIterable<Page>, take: (chunk: Uint8Array) => void): Promise<void> {
    this.#document.on('data', take);
    let count = 0;
    for await (const page of pages) {
      this.#document.addPage({ size: [page.widthMm * POINTS, page.heightMm * POINTS], margin: 0 }).strokeColor('black');
      this.#pen = '';
      this.#grey = null;
      for (const picture of page.pictures ?? []) this.#place(picture, page.heightMm);
      for (const shape of page.shapes) this.#draw(shape, page.heightMm);
      if (page.anchor !== undefined) this.#document.addNamedDestination(page.anchor);
      for (const link of page.links ?? []) this.#lead(link, page.heightMm);
      if (++count % PAGES_AT_ONCE === 0) await this.#letGo();
    }
    this.#document.end();
    await this.#ended;
  }

  /** The library packs pages behind its back and remembers every line that it has set: both are given time and let go. */
  async #letGo(): Promise<void> {
    await new Promise((resolve) => setImmediate(resolve));
    for (const width of this.#widths) width.clear();
    for (const face of this.#faces) face.layoutCache = Object.create(null);
  }

  #lead({ x, y, widthMm, heightMm, to }: PageLink, height: number): void {
    const top = (height - y - heightMm) * POINTS;
    this.#document.goTo(x * POINTS, top, widthMm * POINTS, heightMm * POINTS, to);
  }

  #place({ png, x, y, widthMm, heightMm }: PlacedPicture, height: number): void {
    const size = { width: widthMm * POINTS, height: heightMm * POINTS };
    const data = Buffer.from(png.buffer, png.byteOffset, png.byteLength);
    this.#document.image(data, x * POINTS, (height - y - heightMm) * POINTS, size);
  }

  #draw(shape: Shape, height: number): void {
    const x = (mm: number) => mm * POINTS;
    const y = (mm: number) => (height - mm) * POINTS;
    const to = this.#document;
    switch (shape.shape) {
      case 'text':
        this.#write(shape, x(shape.x), y(shape.y));
        return;
      case 'line':
        to.moveTo(x(shape.x1), y(shape.y1)).lineTo(x(shape.x2), y(shape.y2));
        this.#ink(shape);
        return;
      case 'circle':
        to.circle(x(shape.x), y(shape.y), shape.r * POINTS);
        this.#ink(shape, shape.fill);
        return;
      default: {
        const [a, , c] = shape.points;
        if (shape.fill !== undefined && isUpright(shape)) {
          to.rect(x(a![0]), y(a![1]), x(c![0]) - x(a![0]), y(c![1]) - y(a![1]));
          this.#ink(shape, shape.fill);
          return;
        }
        shape.points.forEach(([px, py], i) => {
          if (i === 0) to.moveTo(x(px), y(py));
          else to.lineTo(x(px), y(py));
        });
        if (shape.closed) to.closePath();
        this.#ink(shape, shape.fill);
      }
    }
  }

  #ink(stroke: Stroke, fill?: number): void {
    const to = this.#document;
    const dash = stroke.dash ?? 'solid';
    const pen = `${stroke.weight} ${dash}`;
    if (pen !== this.#pen) {
      this.#pen = pen;
      to.lineWidth(WEIGHT_MM[stroke.weight] * POINTS);
      if (dash === 'solid') to.undash();
      else to.dash(DASH_MM[dash].map((mm) => mm * POINTS) as unknown as number, {});
    }
    if (fill === undefined) to.stroke();
    else {
      this.#fillWith(Math.round(fill * 255));
      // The stroke is black on every page; left out, it is not set anew for each shape.
      (to as unknown as { fillAndStroke(): void }).fillAndStroke();
    }
  }

  #fillWith(grey: number): void {
    if (grey === this.#grey) return;
    this.#grey = grey;
    this.#document.fillColor([grey, grey, grey]);
  }

  #write(text: Text, x: number, y: number): void {
    const to = this.#document;
    const width = this.width(text.text, text.sizeMm, text.bold) * POINTS;
    const left = text.align === 'right' ? width : text.align === 'centre' ? width / 2 : 0;
    const drop = text.anchor === 'middle' ? (CAP_SHARE * text.sizeMm * POINTS) / 2 : 0;
    to.font(text.bold ? 'bold' : 'plain').fontSize(text.sizeMm * POINTS);
    this.#fillWith(0);
    const turned = text.turnDeg !== undefined && text.turnDeg !== 0;
    if (turned) to.save().rotate(-text.turnDeg!, { origin: [x, y] });
    to.text(text.text, x - left, y + drop, { lineBreak: false, baseline: 'alphabetic' });
    if (turned) to.restore();
  }
}
