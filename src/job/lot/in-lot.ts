/** What a lot changes in the jobs that it names. */
import type { FaultParts } from '../../fault.ts';
import type { LotPrinter, Spool } from '../../lot/types.ts';
import { lengthText } from '../../quantity/format.ts';
import type { Job } from '../job.ts';
import type { LotFile, LotFileEntry } from './file.ts';

/** The machine that takes the largest parts: the tallest, and among these the widest bed; null without printers. */
export function largestPrinter(printers: readonly LotPrinter[]): LotPrinter | null {
  const area = (one: LotPrinter) => one.bedXMm * one.bedYMm;
  return printers.reduce<LotPrinter | null>(
    (best, one) =>
      best === null || one.heightMm > best.heightMm || (one.heightMm === best.heightMm && area(one) > area(best))
        ? one
        : best,
    null,
  );
}

/**
 * The job as it is made in the lot: paper and date are the lot's where it states them, bed and height of the printer are those of
 * the largest machine, and a job that names no wire chooses among the wires on the shelf. What the lot states counts as given.
 */
export function inLot(job: Job, lot: LotFile): Job {
  const stated: Record<string, unknown> = {};
  if (lot.paper !== null) stated.paper = lot.paper;
  if (lot.date !== null) stated.date = lot.date;
  const machine = largestPrinter(lot.printers);
  if (machine !== null) {
    stated['printer.bed'] = `${lengthText(machine.bedXMm)} x ${lengthText(machine.bedYMm)}`;
    stated['printer.height'] = lengthText(machine.heightMm);
  }
  const taken: Record<string, unknown> = {};
  const longestFollows =
    machine !== null && job.former.kind === 'printed' && Object.hasOwn(job.assumed, 'former.longest');
  if (longestFollows) taken['former.longest'] = lengthText(machine.heightMm);
  const shelf = job.wires === 'stock' ? wiresOf(lot.spools) : [];
  if (shelf.length > 0) taken.wire = `${shelf.map(({ name }) => name).join(', ')}: on the shelf`;
  const without = <T>(keys: Readonly<Record<string, T>>): Record<string, T> =>
    Object.fromEntries(Object.entries(keys).filter(([key]) => !Object.hasOwn(stated, key)));
  return {
    ...job,
    paper: lot.paper ?? job.paper,
    date: lot.date ?? job.date,
    former: longestFollows ? { ...job.former, longestMm: machine.heightMm } : job.former,
    wires: shelf.length > 0 ? shelf : job.wires,
    printer:
      machine === null
        ? job.printer
        : { ...job.printer, bedXMm: machine.bedXMm, bedYMm: machine.bedYMm, heightMm: machine.heightMm },
    source: { ...job.source, lines: without(job.source.lines) },
    given: { ...without(job.given), ...stated },
    assumed: { ...without(job.assumed), ...taken },
  };
}

const wiresOf = (spools: readonly Spool[]) => [...new Map(spools.map(({ wire }) => [wire.name, wire])).values()];

/** What the printers of the lot cannot make of a job that its own printer could. */
export function bedFault(job: Job, lot: LotFile, { path, place }: LotFileEntry): FaultParts | null {
  const machine = largestPrinter(lot.printers);
  if (machine === null || job.former.kind !== 'printed') return null;
  const { diametersMm } = job.former;
  const widest = 'listMm' in diametersMm ? Math.max(...diametersMm.listMm) : diametersMm.highMm;
  const least = Math.min(machine.bedXMm, machine.bedYMm);
  if (widest < least) return null;
  return {
    code: 'wider-than-bed',
    place,
    got: `a printed former ${lengthText(widest)} wide for the bed of ${machine.name}, ${lengthText(machine.bedXMm)} x ${lengthText(machine.bedYMm)}`,
    expected: `less than ${lengthText(least)}, the shorter side of the bed of the largest printer of the lot`,
    todo: `choose a smaller former.outside-diameter in ${path}, or state a larger printer`,
  };
}
