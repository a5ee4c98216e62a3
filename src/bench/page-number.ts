/** Numbers as people write them, with a point or a comma. */

/** The number that a text stands for; null when it is none. */
export function numberIn(text: string): number | null {
  const plain = text.trim().replace(',', '.');
  if (!/^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i.test(plain)) return null;
  const value = Number(plain);
  return Number.isFinite(value) ? value : null;
}

/** The same above 0. */
export function positive(text: string): number | null {
  const value = numberIn(text);
  return value !== null && value > 0 ? value : null;
}
