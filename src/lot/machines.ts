/**
 * Beds onto single machines. The mass of solid plastic stands in for the time of printing, which no one knows before slicing:
 * the longest bed first, each to the machine that has least to do, is never more than 4/3 of the best there is (R. L. Graham,
 * "Bounds on multiprocessing timing anomalies", 1969, from memory).
 */
import type { LotPrinter } from './types.ts';

export interface BedLoad {
  /** Of the printers, by index. */
  readonly printer: number;
  /** Of one printing. */
  readonly massG: number;
  /** How often it is printed. */
  readonly count: number;
}

export interface Machine {
  readonly printer: number;
  /** From 1 among those of the printer. */
  readonly number: number;
  /** Beds by index, in the order in which they are printed: the longest first, the same ones one after the other. */
  readonly beds: readonly number[];
  readonly massG: number;
}

export function onMachines(
  beds: readonly BedLoad[],
  printers: readonly Pick<LotPrinter, 'count'>[],
): readonly Machine[] {
  return printers.flatMap(({ count }, printer) => {
    const queue = beds
      .map((bed, index) => ({ ...bed, index }))
      .filter((bed) => bed.printer === printer)
      .sort((a, b) => b.massG - a.massG || a.index - b.index);
    const machines = Array.from({ length: count }, (_, i) => ({
      printer,
      number: i + 1,
      beds: [] as number[],
      massG: 0,
    }));
    for (let from = 0; from < queue.length; ) {
      const { massG } = queue[from]!;
      // Beds that take equally long go to the same places whichever they are: each kind of bed to as few machines as can be.
      const alike = queue.slice(from).filter((bed) => bed.massG === massG);
      const slots = machines.map(() => 0);
      for (let n = alike.reduce((sum, bed) => sum + bed.count, 0); n > 0; n--) {
        const least = machines.reduce((best, machine, i) => (machine.massG < machines[best]!.massG ? i : best), 0);
        machines[least]!.massG += massG;
        slots[least]! += 1;
      }
      const runs = alike.flatMap(({ index, count: times }) => Array.from({ length: times }, () => index));
      for (const [i, machine] of machines.entries()) machine.beds.push(...runs.splice(0, slots[i]!));
      from += alike.length;
    }
    return machines;
  });
}

/** What the machine that has most to do prints, in grams. */
export function busiest(beds: readonly BedLoad[], printers: readonly Pick<LotPrinter, 'count'>[]): number {
  return Math.max(0, ...onMachines(beds, printers).map(({ massG }) => massG));
}
