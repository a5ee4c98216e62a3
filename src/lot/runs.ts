/**
 * Which machine prints which bed when, and whose formers come off it. Pieces are given to serials in the order in which they
 * are printed, counted by mass: the first copy of every section belongs to the first serial of its kind, so that a coil has all
 * its pieces early and no one has to choose between pieces that look alike.
 */
import { decimals } from '../record/rounding.ts';
import type { LotPiece } from './beds.ts';
import { onMachines } from './machines.ts';
import type { LotBed, LotCoil, LotRun } from './schema.ts';
import type { LotPrinter } from './types.ts';

/**
 * @param pieces as laid out: what of each part one coil takes
 * @param coils in the order in which they want their formers
 * @returns every machine that has something to print, in the order of the printers
 * @throws RangeError when more pieces of a former are printed than its coils take: beds of another lot
 */
export function listRuns(
  beds: readonly LotBed[],
  printers: readonly LotPrinter[],
  pieces: readonly Pick<LotPiece, 'kind' | 'part' | 'perCoil'>[],
  coils: readonly Pick<LotCoil, 'serial' | 'kind'>[],
): readonly LotRun[] {
  const loads = beds.map(({ printer, massG, count }) => ({
    printer: printers.findIndex(({ name }) => name === printer),
    massG,
    count,
  }));
  const machines = onMachines(loads, printers).filter((machine) => machine.beds.length > 0);
  const started = machines.flatMap(({ beds: queue }, machine) => {
    let beginsG = 0;
    return queue.map((bed, at) => {
      const run = { machine, at, bed, beginsG: decimals(beginsG, 1), serials: [] as string[] };
      beginsG += beds[bed]!.massG;
      return run;
    });
  });

  const perCoil = new Map(pieces.map((piece) => [keyOf(piece), piece.perCoil]));
  const serials = new Map(
    [...new Set(coils.map(({ kind }) => kind))].map((kind) => [
      kind,
      coils.filter((coil) => coil.kind === kind).map(({ serial }) => serial),
    ]),
  );
  const rank = new Map(coils.map(({ serial }, i) => [serial, i]));
  const given = new Map<string, number>();
  for (const run of started.toSorted((a, b) => a.beginsG - b.beginsG || a.machine - b.machine)) {
    const off = new Set<string>();
    for (const item of beds[run.bed]!.items) {
      const takes = perCoil.get(keyOf(item)) ?? 0;
      if (takes === 0) continue;
      const copy = given.get(keyOf(item)) ?? 0;
      given.set(keyOf(item), copy + 1);
      const serial = serials.get(item.kind)?.[Math.floor(copy / takes)];
      if (serial === undefined) throw new RangeError(`more of ${item.part} of kind ${item.kind} than coils`);
      off.add(serial);
    }
    run.serials.push(...[...off].sort((a, b) => rank.get(a)! - rank.get(b)!));
  }
  return machines.map(({ printer, number }, machine) => ({
    printer: `${printers[printer]!.name} ${number}`,
    runs: started
      .filter((run) => run.machine === machine)
      .map(({ bed, serials: off }, i) => ({ run: i + 1, bed: beds[bed]!.bed, serials: off, massG: beds[bed]!.massG })),
  }));
}

const keyOf = ({ kind, part }: { readonly kind: string; readonly part: string }) => JSON.stringify([kind, part]);
