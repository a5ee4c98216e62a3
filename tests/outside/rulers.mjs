// The rulers of a page at true scale as a printer's ruler would find them: on the page as pixels, 600 to the inch.
import { spawnSync } from 'node:child_process';
import { readdirSync, readFileSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';

const DOTS_PER_INCH = 600;
const DOT_MM = 25.4 / DOTS_PER_INCH;
const RULER_MM = 100;
/** Only the strokes of whole centimetres reach this far beside the ruler's line. */
const BESIDE_MM = 3.6;
/** Strokes of whole centimetres on 100 mm, both ends counted. */
const STROKES = 11;
/** No rulers lie farther from the edges of the page. */
const BAND_MM = 40;

/** A page as grey pixels, row by row from above. */
function grey(pdf, page, folder) {
  const root = join(folder, 'ruler-page');
  const done = spawnSync('pdftoppm', ['-r', `${DOTS_PER_INCH}`, '-gray', '-f', `${page}`, '-l', `${page}`, pdf, root]);
  if (done.status !== 0) return null;
  const name = readdirSync(folder).find((each) => each.startsWith('ruler-page'));
  if (!name) return null;
  const path = join(folder, name);
  const bytes = readFileSync(path);
  rmSync(path);
  const [, width, height] = /^P5\s+(\d+)\s+(\d+)\s+255\s/.exec(bytes.subarray(0, 64).toString('latin1')).map(Number);
  return { width, height, at: bytes.subarray(bytes.length - width * height) };
}

/** Middles of the dark runs of a line of pixels, and the longest of them. */
function runs(count, dark) {
  const found = [];
  let from = -1;
  for (let i = 0; i <= count; i++) {
    if (i < count && dark(i)) {
      if (from < 0) from = i;
    } else if (from >= 0) {
      found.push({ from, length: i - from, middle: (from + i) / 2 });
      from = -1;
    }
  }
  return found;
}

/**
 * The length of the ruler along an axis, from the middle of its first stroke to that of its last, in mm; null when there is none.
 * `line(k)` tells whether pixel i of the k-th line of pixels, counted from the edge of the page, is dark.
 */
function ruler(count, line) {
  for (let k = 0; k * DOT_MM < BAND_MM; k++) {
    const long = runs(count, line(k)).find(({ length }) => Math.abs(length * DOT_MM - RULER_MM) < 1);
    if (!long) continue;
    const beside = line(k - Math.round(BESIDE_MM / DOT_MM));
    const strokes = runs(count, beside).filter(
      ({ middle }) => middle > long.from - 10 && middle < long.from + long.length + 10,
    );
    if (strokes.length !== STROKES) continue;
    return (strokes.at(-1).middle - strokes[0].middle) * DOT_MM;
  }
  return null;
}

/** How many pages a document has, by what pdfinfo says; 1 where it says nothing. */
export function pagesOf(pdf) {
  const { stdout } = spawnSync('pdfinfo', [pdf], { encoding: 'utf8' });
  return Number(/^Pages:\s+(\d+)/m.exec(stdout ?? '')?.[1] ?? 1);
}

/** Lengths of the rulers to the right and upwards on a page, in mm; null where none was found. */
export function measureRulers(pdf, page = 1) {
  const image = grey(pdf, page, dirname(pdf));
  if (!image) return { across: null, up: null };
  const { width, height, at } = image;
  const dark = (x, y) => at[y * width + x] < 128;
  return {
    across: ruler(width, (k) => (x) => dark(x, height - 1 - k)),
    up: ruler(height, (k) => (y) => dark(k, y)),
  };
}
