/** `stock`: lists the wires, tubes, materials and spacers that are known, with where their figures come from. */
import { Fault, type FaultExit, type FaultParts } from '../src/fault.ts';
import { nearest } from '../src/job/nearest.ts';
import { findWire } from '../src/stock/find.ts';
import { type Material, materials } from '../src/stock/materials.ts';
import { byDiameter, byWords } from '../src/stock/search.ts';
import { type Spacer, spacers } from '../src/stock/spacers.ts';
import { type Tube, tubes } from '../src/stock/tubes.ts';
import type { Wire } from '../src/stock/wire.ts';
import { allWires } from '../src/stock/wires.ts';
import { outPage, type Page, paragraph, table } from './page.ts';
import { type Column, layTable } from './source-table.ts';
import { say, type Terminal } from './terminal.ts';
import { STOCK_KINDS } from './verbs.ts';

export { STOCK_KINDS } from './verbs.ts';
export type StockKind = (typeof STOCK_KINDS)[number];

export interface StockOptions extends Page {
  /** Left out: wires. */
  readonly what?: StockKind | undefined;
  /** Words that the name must have. */
  readonly filter?: string | undefined;
  /** Bare diameter of a wire, outside diameter of a tube, thickness of a spacer. */
  readonly fromMm?: number | undefined;
  readonly toMm?: number | undefined;
  readonly json: boolean;
  readonly out: (text: string) => void;
}

const fixed = (value: number, places: number): string => value.toFixed(places);

const WIRE_COLUMNS: readonly Column<Wire>[] = [
  { title: 'wire', cell: (wire) => wire.name },
  { title: 'bare mm', cell: (wire) => fixed(wire.bareMm, 3), right: true },
  {
    title: 'overall mm (low..high)',
    cell: (wire) => `${fixed(wire.overallMm, 3)} (${fixed(wire.overallLowMm, 3)}..${fixed(wire.overallHighMm, 3)})`,
  },
  { title: 'solders', cell: (wire) => (wire.solderable ? 'yes' : 'no') },
];

const TUBE_COLUMNS: readonly Column<Tube>[] = [
  { title: 'tube', cell: (tube) => tube.name },
  { title: 'outside mm', cell: (tube) => fixed(tube.outsideDiameterMm, 2), right: true },
];

const MATERIAL_COLUMNS: readonly Column<Material>[] = [
  { title: 'material', cell: (material) => material.name },
  { title: 'use', cell: (material) => material.use },
  { title: 'g/cm3', cell: (material) => fixed(material.densityGPerCm3, 2), right: true },
  { title: 'GPa', cell: (material) => fixed(material.modulusGPa, 1), right: true },
  { title: 'softens °C', cell: (material) => material.softensC?.toFixed(0) ?? 'does not', right: true },
];

const SPACER_COLUMNS: readonly Column<Spacer>[] = [
  { title: 'spacer', cell: (spacer) => spacer.name },
  { title: 'thickness mm', cell: (spacer) => fixed(spacer.thicknessMm, 2), right: true },
];

const WIRE_REMARK =
  'Solders: taken to tin through; a fibre comes off first, thicker enamel is scraped. ' +
  'Litz is made to order, as in `coilwright stock 20 x 0.1 mm litz`.';

const refuse = (exit: FaultExit, parts: FaultParts): never => {
  throw new Fault(exit, parts);
};

/** Litz is made to order, so that no list can hold it; a filter that names one in full still finds it. */
function wires(filter: string): readonly Wire[] {
  const listed = byWords(allWires(), filter);
  if (listed.length > 0) return listed;
  const found = findWire(filter);
  return found.ok ? [found.wire] : [];
}

function nothing(what: StockKind, options: StockOptions): never {
  const { filter, fromMm, toMm } = options;
  const asked = [
    filter === undefined || filter === '' ? [] : [`"${filter}"`],
    fromMm === undefined ? [] : [`from ${fromMm} mm`],
    toMm === undefined ? [] : [`to ${toMm} mm`],
  ].flat();
  const found = what === 'wires' && filter !== undefined ? findWire(filter) : undefined;
  const [first = ''] = (filter ?? '').split(' ');
  const kind = what === 'wires' ? nearest(first, STOCK_KINDS) : null;
  return refuse(3, {
    code: 'nothing-in-stock',
    place: { key: 'stock' },
    got: asked.join(' '),
    expected: `words and diameters that some of the ${what} in stock have`,
    todo:
      kind !== null
        ? `did you mean ${kind}?`
        : found?.ok === false
          ? found.todo
          : `\`coilwright stock ${what}\` lists them all`,
  });
}

/** Millimetres to the tenth of a micrometre: no table is finer, and floating point leaves no tail. */
const tidyNumbers = (_key: string, value: unknown): unknown =>
  typeof value === 'number' ? Math.round(value * 1e4) / 1e4 : value;

function show<T extends { readonly name: string; readonly status: string }>(
  options: StockOptions,
  what: StockKind,
  stock: readonly T[],
  columns: readonly Column<T>[],
  source: (one: T) => readonly string[],
  remark?: string,
): void {
  if (stock.length === 0) nothing(what, options);
  if (options.json) {
    options.out(`${JSON.stringify({ stock: what, count: stock.length, items: stock }, tidyNumbers, 2)}\n`);
    return;
  }
  options.out(
    options.plain === true ? spoken(options, what, stock, columns, source) : layTable(stock, columns, source, options),
  );
  options.out(`\n${stock.length} ${stock.length === 1 ? what.slice(0, -1) : what}\n`);
  if (remark !== undefined) options.out(`${paragraph(options, remark).join('\n')}\n`);
}

/** Each figure of each on a line of its own, and where it comes from. */
function spoken<T>(
  page: Page,
  what: StockKind,
  stock: readonly T[],
  columns: readonly Column<T>[],
  source: (one: T) => readonly string[],
): string {
  const figures = columns.map(({ title, cell }) => [title, cell] as const);
  return `${table(page, what, [...figures, ['from', (one: T) => source(one).join(', ')] as const], stock).join('\n')}\n`;
}

/**
 * Writes the list to `out`.
 * @throws {Fault} with exit 3 when the filter leaves nothing, 2 when materials are asked for by diameter.
 */
export function runStock(options: StockOptions): void {
  const { what = 'wires', filter = '', fromMm, toMm } = options;
  const range = { fromMm, toMm };
  const status = (one: { readonly status: string }) => [one.status];
  switch (what) {
    case 'wires': {
      const found = byDiameter(wires(filter), (wire) => wire.bareMm, range);
      show(options, what, found, WIRE_COLUMNS, (wire) => [wire.standard, wire.status], WIRE_REMARK);
      break;
    }
    case 'tubes': {
      const found = byDiameter(byWords(tubes(), filter), (tube) => tube.outsideDiameterMm, range);
      show(options, what, found, TUBE_COLUMNS, status, 'Measure the tube in hand before planning for it.');
      break;
    }
    case 'spacers': {
      const found = byDiameter(byWords(spacers(), filter), (spacer) => spacer.thicknessMm, range);
      show(options, what, found, SPACER_COLUMNS, status);
      break;
    }
    case 'materials':
      if (fromMm !== undefined || toMm !== undefined) {
        refuse(2, {
          code: 'materials-by-diameter',
          got: '--from or --to with materials, which have no diameter',
          expected: 'wires, tubes or spacers with a range of diameters',
          todo: 'leave out --from and --to',
        });
      }
      show(options, what, byWords(materials(), filter), MATERIAL_COLUMNS, status);
  }
}

interface StockArguments {
  readonly what?: string | undefined;
  readonly words?: readonly string[] | undefined;
  readonly from?: string | undefined;
  readonly to?: string | undefined;
  readonly json: boolean;
}

const isKind = (text: string | undefined): text is StockKind => STOCK_KINDS.some((kind) => kind === text);

/** Units are loaded only when a diameter was written. */
async function readDiameter(option: 'from' | 'to', written: string | undefined): Promise<number | undefined> {
  if (written === undefined) return undefined;
  const { parseQuantity } = await import('../src/quantity/parse.ts');
  const parsed = parseQuantity(written, 'length');
  if (parsed.ok) return parsed.value;
  const { got, expected, todo } = parsed;
  return refuse(2, { code: 'bad-option', place: { key: `--${option}` }, got, expected, todo });
}

/** Reads the arguments, lists to standard output. A first word that is no kind of stock begins the filter on wires. */
export async function stock(given: StockArguments, terminal: Terminal): Promise<void> {
  const { what, words = [] } = given;
  const fromMm = await readDiameter('from', given.from);
  const toMm = await readDiameter('to', given.to);
  if (fromMm !== undefined && toMm !== undefined && fromMm > toMm) {
    refuse(2, {
      code: 'empty-range',
      place: { key: '--from' },
      got: `from ${fromMm} mm, above to ${toMm} mm`,
      expected: 'the least diameter in --from and the greatest in --to',
      todo: 'swap them',
    });
  }
  const filter = isKind(what) || what === undefined ? words : [what, ...words];
  runStock({
    what: isKind(what) ? what : 'wires',
    filter: filter.join(' '),
    fromMm,
    toMm,
    json: given.json,
    // What JSON was asked for is printed even where nothing is to be said.
    out: (text) => (given.json ? terminal.out(text) : say(terminal, text)),
    ...outPage(terminal),
  });
}
