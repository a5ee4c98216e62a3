/** Characters as people type them, turned into the few that the parser reads. */

const VULGAR: Readonly<Record<string, string>> = {
  '¼': '1/4',
  '½': '1/2',
  '¾': '3/4',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

const REPLACED: readonly (readonly [RegExp, string])[] = [
  // Before the spaces are narrowed: 3½ is 3 1/2.
  [/[¼½¾⅛⅜⅝⅞]/gu, ''],
  [/[\u00a0\u2000-\u200a\u202f\u205f\u3000\t\r\n]/gu, ' '],
  [/[\u2212\ufe63\uff0d\u2010\u2011]/gu, '-'],
  [/[\u00b5\u03bc]/gu, 'u'],
  [/[\u03a9\u2126]/gu, 'ohm'],
  [/\u2044/gu, '/'],
  [/[\u2033\u201d\u201c]|''|\u2032\u2032|\u2019\u2019/gu, '"'],
  [/\u00b0\s*C\b/gu, 'degC'],
  [/\u00b0\s*F\b/gu, 'degF'],
  [/\u00b0/gu, 'deg'],
  [/[\u00d7\u2715]/gu, 'x'],
];

/** One space between words; micro, ohm, minus, inch marks and vulgar fractions in their plain spelling. */
export function normalise(text: string): string {
  let out = text;
  for (const [from, to] of REPLACED) {
    out = to === '' ? out.replace(from, (glyph) => ` ${VULGAR[glyph] ?? glyph} `) : out.replace(from, to);
  }
  return out.replace(/ +/g, ' ').trim();
}
