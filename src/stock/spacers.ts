/**
 * What can be wound along with the wire to space its turns, and taken off or left: line and thread by thickness, mm.
 * Status: common practice; line keeps within about 5 % of what is printed on its spool, thread yields under tension.
 */
export interface Spacer {
  readonly name: string;
  readonly thicknessMm: number;
  readonly status: string;
}

const LINE_MM: readonly number[] = [0.2, 0.25, 0.3, 0.35, 0.4, 0.5, 0.6, 0.8, 1, 1.2, 1.6, 2, 2.4];

const THREADS: readonly (readonly [name: string, thicknessMm: number])[] = [
  ['fine sewing cotton', 0.2],
  ['sewing cotton', 0.25],
  ['button thread', 0.4],
  ['linen thread', 0.6],
  ['waxed lacing cord', 0.8],
  ['cotton string', 1.5],
];

const STATUS = 'common practice';

const SPACERS: readonly Spacer[] = [
  ...LINE_MM.map((mm) => ({ name: `fishing line ${mm} mm`, thicknessMm: mm, status: STATUS })),
  ...THREADS.map(([name, thicknessMm]) => ({ name, thicknessMm, status: STATUS })),
].sort((a, b) => a.thicknessMm - b.thicknessMm);

/** Thinnest first. */
export function spacers(): readonly Spacer[] {
  return SPACERS;
}
