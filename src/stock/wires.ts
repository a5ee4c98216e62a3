/**
 * The solid wires in stock: every bare size with every covering that it is made with.
 */
import { type Enamel, enamelLimits, SOLDERABLE_TO_MM } from './enamel.ts';
import { MM_PER_MIL } from './nemaMw1000.ts';
import { allSizes, type Size } from './size.ts';
import {
  TEXTILE_ADDS_MIL,
  TEXTILE_SPREAD,
  TEXTILE_STANDARD,
  TEXTILE_STOCK_MM,
  TEXTILE_TABLE_MM,
  type Textile,
} from './textile.ts';
import type { Covering, Wire } from './wire.ts';

const ENAMELS: readonly Enamel[] = ['enamel', 'enamel heavy'];
const TEXTILES: readonly Textile[] = ['single cotton', 'double cotton', 'single silk', 'double silk'];

type OverCovering = Pick<Wire, 'overallMm' | 'overallLowMm' | 'overallHighMm' | 'solderable' | 'standard' | 'status'>;

function wire(size: Size, covering: Covering, over: OverCovering): Wire {
  return {
    name: `${size.name} ${covering}`,
    covering,
    bareMm: size.bareMm,
    bareLowMm: size.bareLowMm,
    bareHighMm: size.bareHighMm,
    strands: 1,
    strandMm: size.bareMm,
    ...over,
  };
}

function bare(size: Size): Wire {
  return wire(size, 'bare', {
    overallMm: size.bareMm,
    overallLowMm: size.bareLowMm,
    overallHighMm: size.bareHighMm,
    solderable: true,
    standard: size.standard,
    status: size.status,
  });
}

function enamelled(size: Size, enamel: Enamel): readonly Wire[] {
  const limits = enamelLimits(size, enamel);
  if (limits === undefined) return [];
  return [
    wire(size, enamel, {
      overallMm: (limits.lowMm + limits.highMm) / 2,
      overallLowMm: limits.lowMm,
      overallHighMm: limits.highMm,
      solderable: size.bareMm <= SOLDERABLE_TO_MM,
      standard: limits.standard,
      status: limits.status,
    }),
  ];
}

/** The fibre has to come off before soldering, so that it never counts as tinning through. */
function textile(size: Size, covering: Textile): readonly Wire[] {
  const stocked = covering.endsWith('silk') ? TEXTILE_STOCK_MM.silk : TEXTILE_STOCK_MM.cotton;
  if (size.bareMm < stocked.from || size.bareMm > stocked.to) return [];
  const adds = TEXTILE_ADDS_MIL[covering] * MM_PER_MIL;
  const inTable = size.bareMm >= TEXTILE_TABLE_MM.from && size.bareMm <= TEXTILE_TABLE_MM.to;
  return [
    wire(size, covering, {
      overallMm: size.bareMm + adds,
      overallLowMm: size.bareLowMm + adds * (1 - TEXTILE_SPREAD),
      overallHighMm: size.bareHighMm + adds * (1 + TEXTILE_SPREAD),
      solderable: false,
      standard: `${size.standard}, ${TEXTILE_STANDARD}`,
      status: `${size.status}; covering ${inTable ? 'read' : 'estimated from thinner wire'}, its limits common practice`,
    }),
  ];
}

function build(): readonly Wire[] {
  return allSizes().flatMap((size) => [
    bare(size),
    ...ENAMELS.flatMap((enamel) => enamelled(size, enamel)),
    ...TEXTILES.flatMap((covering) => textile(size, covering)),
  ]);
}

let stock: readonly Wire[] | undefined;

/** Every solid wire in stock, size after size; built on first use. Litz is made to order: {@link litzWire}. */
export function allWires(): readonly Wire[] {
  stock ??= build();
  return stock;
}

let byName: ReadonlyMap<string, Wire> | undefined;

/** The solid wire of exactly this name, such as `0.5 mm enamel heavy`. */
export function wireNamed(name: string): Wire | undefined {
  byName ??= new Map(allWires().map((one) => [one.name, one]));
  return byName.get(name);
}
