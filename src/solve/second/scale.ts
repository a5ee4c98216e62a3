/** Marks of a scale of coupling: both ends, and round figures between. */

export interface Mark {
  /** From the tightest place, without sign. */
  readonly mm: number;
  readonly coupling: number;
}

const LEAST_MARKS = 5;
/** Nearer than this two marks run together. */
const APART_MM = 1.2;
const STEPS = [0.1, 0.05, 0.02, 0.01, 0.005, 0.002, 0.001, 5e-4, 2e-4, 1e-4];

/** Round couplings from highest to lowest, both ends among them; `travelTo` is the way from the tightest place. */
export function scaleOf(lowest: number, highest: number, travelTo: (coupling: number) => number): Mark[] {
  let marks: Mark[] = [];
  for (const step of STEPS) {
    const round: number[] = [];
    for (let i = Math.floor(highest / step + 1e-9); i * step > lowest * (1 - 1e-9); i--)
      round.push(Math.round(i * step * 1e6) / 1e6);
    const all = [...new Set([highest, ...round, lowest])].map((coupling) => ({ coupling, mm: travelTo(coupling) }));
    const end = all.at(-1)!;
    marks = [];
    for (const mark of all) {
      const last = marks.at(-1);
      const clear = last === undefined || mark.mm - last.mm >= APART_MM;
      if (mark === end || (clear && end.mm - mark.mm >= APART_MM)) marks.push(mark);
    }
    if (marks.length >= LEAST_MARKS) break;
  }
  return marks;
}
