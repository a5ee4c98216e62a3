/** Rounding, once: places and angles to 0.1 um and 0.1 millidegree, figures to six significant digits. */

/** To so many decimals. */
export function decimals(value: number, digits: number): number {
  const scale = 10 ** digits;
  const rounded = Math.round(value * scale) / scale;
  return Object.is(rounded, -0) ? 0 : rounded;
}

/** To so many significant digits. */
export function significant(value: number, digits = 6): number {
  return value === 0 ? 0 : Number(value.toPrecision(digits));
}

export const mm = (value: number) => decimals(value, 4);
export const deg = (value: number) => decimals(value, 4) % 360;
