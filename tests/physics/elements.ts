/**
 * Wire cut into straight elements, and Neumann's double sum (1845) over them: shares nothing with any law of turns.
 * An element is six numbers: its middle, and its direction times its length.
 */
export type Elements = Float64Array;

/**
 * The wire's centre on a former of ribs, `sides` sides from the middle of a rib, each rib bending it at `bend` (0: sharp) where it is
 * `radius` from the axis; climbing `pitch` a turn in proportion to its length; elements no longer than `longest`.
 */
export function ribbed(
  radius: number,
  corners: number,
  bend: number,
  sides: number,
  pitch: number,
  longest: number,
): Elements {
  const step = (2 * Math.PI) / corners;
  const inner = radius - bend;
  const flat: number[] = [];
  const cut = (length: number, at: (share: number) => readonly [x: number, y: number]) => {
    const count = Math.max(1, Math.ceil(length / longest));
    for (let i = 0; i < count; i++) {
      const [x0, y0] = at(i / count);
      const [x1, y1] = at((i + 1) / count);
      flat.push((x0 + x1) / 2, (y0 + y1) / 2, x1 - x0, y1 - y0);
    }
  };
  for (let k = 0; k < sides; k++) {
    const [from, to] = [k * step, (k + 1) * step];
    const at = (rib: number, angle: number) =>
      [inner * Math.cos(rib) + bend * Math.cos(angle), inner * Math.sin(rib) + bend * Math.sin(angle)] as const;
    const [a, b] = [at(from, from + step / 2), at(to, from + step / 2)];
    if (bend > 0) cut((bend * step) / 2, (share) => at(from, from + (share * step) / 2));
    cut(Math.hypot(b[0] - a[0], b[1] - a[1]), (s) => [a[0] + s * (b[0] - a[0]), a[1] + s * (b[1] - a[1])]);
    if (bend > 0) cut((bend * step) / 2, (share) => at(to, to - ((1 - share) * step) / 2));
  }
  const lengths = Array.from({ length: flat.length / 4 }, (_, i) => Math.hypot(flat[4 * i + 2]!, flat[4 * i + 3]!));
  const climb = ((sides / corners) * pitch) / lengths.reduce((sum, length) => sum + length, 0);
  let z = 0;
  const elements = new Float64Array(6 * lengths.length);
  lengths.forEach((length, i) => {
    const rise = climb * length;
    elements.set([flat[4 * i]!, flat[4 * i + 1]!, z + rise / 2, flat[4 * i + 2]!, flat[4 * i + 3]!, rise], 6 * i);
    z += rise;
  });
  return elements;
}

export function lengthOf(elements: Elements): number {
  let sum = 0;
  for (let i = 0; i < elements.length; i += 6) sum += Math.hypot(elements[i + 3]!, elements[i + 4]!, elements[i + 5]!);
  return sum;
}

/** M of `some` with `others` moved up by `distance`, H. */
export function mutualOf(some: Elements, others: Elements, distance: number): number {
  return neumann(some, others, distance, () => 0);
}

/** Own inductance of a helix: elements nearer along the axis than half a pitch see one another at the mean distance g of the section. */
export function ownOf(helix: Elements, pitch: number, g: number): number {
  return neumann(helix, helix, 0, (rise) => (rise < pitch / 2 ? g * g : 0));
}

function neumann(some: Elements, others: Elements, distance: number, more: (rise: number) => number): number {
  let sum = 0;
  for (let i = 0; i < some.length; i += 6)
    for (let j = 0; j < others.length; j += 6) {
      const [x, y] = [some[i]! - others[j]!, some[i + 1]! - others[j + 1]!];
      const z = some[i + 2]! - others[j + 2]! - distance;
      const dot = some[i + 3]! * others[j + 3]! + some[i + 4]! * others[j + 4]! + some[i + 5]! * others[j + 5]!;
      sum += dot / Math.sqrt(x * x + y * y + z * z + more(Math.abs(z)));
    }
  return sum * 1e-7;
}
