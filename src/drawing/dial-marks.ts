/**
 * Which frequencies a scale marks and which of them it writes. Round values are divided by ten, five or two as far as the marks (or the
 * texts) of each stretch keep apart, so that a scale that crowds at one end has more marks at the other.
 */

export interface ScaleMark {
  readonly kHz: number;
  /** Along the scale. */
  readonly atMm: number;
  readonly text: string | null;
  /** `long` of a text, `middle` of a half, `short` of all others. */
  readonly length: 'long' | 'middle' | 'short';
}

export interface Scale {
  readonly lowKhz: number;
  readonly highKhz: number;
  /** Along the scale in millimetres, rising with the frequency, between the ends. */
  readonly atMm: (kHz: number) => number;
}

/** A stretch from `from` to `from + step`, in whole units of a power of ten. */
interface Stretch {
  readonly from: number;
  readonly step: number;
  /** Of ten: `step` is 1, 2 or 5 of these. */
  readonly power: number;
}

const round = (value: number) => Number(value.toPrecision(10));
const unitsOf = (count: number, power: number) => round(count * 10 ** power);

/** How a stretch may be divided, the finest first: each 1, 2 or 5 of a power of ten wide. */
function divisions({ step, power }: Stretch): readonly { readonly step: number; readonly power: number }[] {
  if (step === 2) return [{ step: 1, power }];
  if (step === 5) return [{ step: 1, power }];
  return [
    { step: 1, power: power - 1 },
    { step: 2, power: power - 1 },
    { step: 5, power: power - 1 },
  ];
}

/** All values of a stretch and its divisions, so that neighbours within the scale are let by `clear`. */
function divided(stretch: Stretch, scale: Scale, clear: (a: number, b: number) => boolean, depth = 0): number[] {
  const { lowKhz, highKhz } = scale;
  const from = unitsOf(stretch.from, stretch.power);
  const to = unitsOf(stretch.from + stretch.step, stretch.power);
  // Six digits tell every frequency that a dial can be set to.
  if (to < lowKhz || from > highKhz || depth > 8) return [];
  for (const { step, power } of divisions(stretch)) {
    const count = Math.round((stretch.step * 10 ** (stretch.power - power)) / step);
    const first = Math.round(stretch.from * 10 ** (stretch.power - power));
    const values = Array.from({ length: count + 1 }, (_, i) => unitsOf(first + i * step, power));
    const inside = values.filter((value) => value >= lowKhz && value <= highKhz);
    if (!inside.slice(1).every((value, i) => clear(inside[i]!, value))) continue;
    const parts = values
      .slice(0, -1)
      .flatMap((_, i) => divided({ from: first + i * step, step, power }, scale, clear, depth + 1));
    return [...inside, ...parts];
  }
  return [];
}

const sortedOnce = (values: readonly number[]) => [...new Set(values)].sort((a, b) => a - b);

/** Values of the scale that keep apart. */
function roundOnes(scale: Scale, clear: (a: number, b: number) => boolean): number[] {
  const power = Math.ceil(Math.log10(scale.highKhz) + 1e-12);
  const found = sortedOnce(divided({ from: 0, step: 1, power }, scale, clear));
  return found.filter((value) => value >= scale.lowKhz && value <= scale.highKhz);
}

/** A half or a whole among the marks beside it: of a step of one every fifth, of two or five every tenth of its power. */
function stands(marks: readonly number[], i: number): boolean {
  const steps = [marks[i]! - (marks[i - 1] ?? -Infinity), (marks[i + 1] ?? Infinity) - marks[i]!];
  const step = Math.min(...steps);
  if (!Number.isFinite(step)) return true;
  const power = 10 ** Math.floor(Math.log10(step) + 1e-9);
  const whole = (step < 1.5 * power ? 5 : 10) * power;
  return Math.abs(marks[i]! / whole - Math.round(marks[i]! / whole)) < 1e-6;
}

/**
 * More texts where a stretch that crowds at one end has room at the other: between two texts the mark, a multiple of the power of ten
 * below their distance, that is farthest from both, again and again.
 */
function filled(
  texts: readonly number[],
  marks: readonly number[],
  { atMm }: Scale,
  room: (a: number, b: number) => boolean,
): number[] {
  const between = (low: number, high: number): number | undefined => {
    const power = 10 ** Math.floor(Math.log10(high - low) - 1e-9);
    const apart = (kHz: number) => Math.min(atMm(kHz) - atMm(low), atMm(high) - atMm(kHz));
    return marks
      .filter((kHz) => kHz > low && kHz < high && Math.abs(kHz / power - Math.round(kHz / power)) < 1e-6)
      .filter((kHz) => room(low, kHz) && room(kHz, high))
      .reduce<number | undefined>((a, b) => (a === undefined || apart(b) > apart(a) + 1e-9 ? b : a), undefined);
  };
  const all = [...texts];
  for (let i = 0; i + 1 < all.length; ) {
    const more = between(all[i]!, all[i + 1]!);
    if (more === undefined) i++;
    else all.splice(i + 1, 0, more);
  }
  return all;
}

/**
 * The marks of a scale by rising frequency. `apartMm` is the least from mark to mark; `widthOf` and `textsMm` the width of a text and
 * the least between two.
 */
export function marksOf(
  scale: Scale,
  text: (kHz: number) => string,
  widthOf: (text: string) => number,
  { apartMm, textsMm }: { readonly apartMm: number; readonly textsMm: number },
): ScaleMark[] {
  const between = (a: number, b: number) => Math.abs(scale.atMm(b) - scale.atMm(a));
  const marks = roundOnes(scale, (a, b) => between(a, b) >= apartMm);
  const marked = new Set(marks);
  const room = (a: number, b: number) => between(a, b) >= (widthOf(text(a)) + widthOf(text(b))) / 2 + textsMm;
  const written: number[] = [];
  // Of all that may be written in turn: none nearer to its neighbours than its text allows.
  for (const kHz of roundOnes(scale, (a, b) => marked.has(a) && marked.has(b) && room(a, b)))
    if (written.length === 0 || room(written.at(-1)!, kHz)) written.push(kHz);
  const texts = new Set(filled(written, marks, scale, room));
  return marks.map((kHz, i) => ({
    kHz,
    atMm: scale.atMm(kHz),
    text: texts.has(kHz) ? text(kHz) : null,
    length: texts.has(kHz) ? 'long' : stands(marks, i) ? 'middle' : 'short',
  }));
}
