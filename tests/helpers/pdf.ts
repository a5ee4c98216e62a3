/** Reads a PDF back as a person's ruler would: text with its place, lines, rectangles and circles, in mm from the lower left. */
import { getDocument, OPS } from 'pdfjs-dist/legacy/build/pdf.mjs';

const MM = 25.4 / 72;

export interface PdfText {
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly sizeMm: number;
  /** Degrees counterclockwise. */
  readonly turnDeg: number;
}

export interface PdfPath {
  readonly points: readonly (readonly [number, number])[];
  readonly closed: boolean;
  readonly curved: boolean;
}

export interface PdfCircle {
  readonly x: number;
  readonly y: number;
  readonly r: number;
}

export interface PdfPage {
  readonly widthMm: number;
  readonly heightMm: number;
  readonly texts: readonly PdfText[];
  readonly paths: readonly PdfPath[];
  readonly circles: readonly PdfCircle[];
}

export interface Pdf {
  readonly pages: readonly PdfPage[];
  readonly title: string;
  readonly language: string;
  readonly printScaling: string;
}

type Matrix = readonly [number, number, number, number, number, number];

const times = (m: Matrix, n: Matrix): Matrix => [
  m[0] * n[0] + m[2] * n[1],
  m[1] * n[0] + m[3] * n[1],
  m[0] * n[2] + m[2] * n[3],
  m[1] * n[2] + m[3] * n[3],
  m[0] * n[4] + m[2] * n[5] + m[4],
  m[1] * n[4] + m[3] * n[5] + m[5],
];

/** Numbers that follow each drawing step of pdfjs: move, line, curve, curve in short form, close. */
const TAKES = [2, 2, 6, 4, 0];

function pathOf(data: ArrayLike<number>, at: Matrix): PdfPath {
  const points: [number, number][] = [];
  let closed = false;
  let curved = false;
  for (let i = 0; i < data.length; ) {
    const step = data[i]!;
    const takes = TAKES[step];
    if (takes === undefined) throw new Error(`unknown drawing step ${step}`);
    if (step === 4) closed = true;
    else {
      const x = data[i + takes - 1]!;
      const y = data[i + takes]!;
      points.push([(at[0] * x + at[2] * y + at[4]) * MM, (at[1] * x + at[3] * y + at[5]) * MM]);
      if (step === 2 || step === 3) curved = true;
    }
    i += 1 + takes;
  }
  return { points, closed, curved };
}

/** A path of four curves between points at the ends of two equal diameters is a circle. */
function circleOf(path: PdfPath): PdfCircle | null {
  if (!path.curved || path.points.length !== 5) return null;
  const xs = path.points.map(([x]) => x);
  const ys = path.points.map(([, y]) => y);
  const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  if (Math.abs(right - left - (high - low)) > 1e-3) return null;
  return { x: (left + right) / 2, y: (low + high) / 2, r: (right - left) / 2 };
}

export async function readPdf(bytes: Uint8Array): Promise<Pdf> {
  const document = await getDocument({ data: Uint8Array.from(bytes), verbosity: 0 }).promise;
  try {
    const pages: PdfPage[] = [];
    for (let n = 1; n <= document.numPages; n++) {
      const page = await document.getPage(n);
      const [left, bottom, right, top] = page.view as [number, number, number, number];
      const content = await page.getTextContent({ disableNormalization: true });
      const texts: PdfText[] = [];
      for (const item of content.items) {
        if (!('str' in item) || item.str.trim() === '') continue;
        const [a, b, c, d, x, y] = item.transform as [number, number, number, number, number, number];
        texts.push({
          text: item.str,
          x: x * MM,
          y: y * MM,
          width: item.width * MM,
          sizeMm: Math.hypot(c, d) * MM,
          turnDeg: (Math.atan2(b, a) * 180) / Math.PI,
        });
      }
      const operators = await page.getOperatorList();
      const paths: PdfPath[] = [];
      const saved: Matrix[] = [];
      let at: Matrix = [1, 0, 0, 1, 0, 0];
      operators.fnArray.forEach((operator, i) => {
        const args: unknown = operators.argsArray[i];
        if (operator === OPS.save) saved.push(at);
        else if (operator === OPS.restore) at = saved.pop() ?? [1, 0, 0, 1, 0, 0];
        else if (operator === OPS.transform) at = times(at, args as Matrix);
        else if (operator === OPS.constructPath) {
          const [, [data]] = args as [number, [ArrayLike<number> | null]];
          if (data) paths.push(pathOf(data, at));
        }
      });
      pages.push({
        widthMm: (right - left) * MM,
        heightMm: (top - bottom) * MM,
        texts,
        paths,
        circles: paths.map(circleOf).filter((each) => each !== null),
      });
    }
    const { info } = await document.getMetadata();
    const told = info as { Title?: string; Language?: string };
    const preferences = (await document.getViewerPreferences()) as { PrintScaling?: string } | null;
    return {
      pages,
      title: told.Title ?? '',
      language: told.Language ?? '',
      printScaling: preferences?.PrintScaling ?? '',
    };
  } finally {
    await document.destroy();
  }
}
