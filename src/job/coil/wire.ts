/** The wire of a measured coil: from the stock by name, or from one or two diameters, the missing one by the stock's coverings. */
import { lengthText } from '../../quantity/format.ts';
import type { FoundWire } from '../../stock/find.ts';
import type { Covering, Wire } from '../../stock/wire.ts';
import { allWires } from '../../stock/wires.ts';
import type { Finding } from '../finding.ts';

export interface WireGroup {
  readonly bare?: number | undefined;
  readonly overall?: number | undefined;
  readonly covering?: Covering | undefined;
}

export type MeasuredWire =
  | { readonly ok: true; readonly wire: Wire; readonly inferred: Readonly<Record<string, string>> }
  | { readonly ok: false; readonly finding: Finding };

/** A diameter farther than this from every size in stock says nothing about its covering. */
const NEAR = 0.12;
/** Diameters measured with a micrometer are taken to this. */
const FINE_MM = 1e-4;

const refuse = (code: string, key: string, got: string, expected: string, todo: string): MeasuredWire => ({
  ok: false,
  finding: { code, path: ['coil', 'wire', ...(key === '' ? [] : [key])], got, expected, todo },
});

/** The wire of these covering words whose diameter is nearest; null when none is near. */
function nearestWire(mm: number, of: 'bareMm' | 'overallMm', covering: Covering): Wire | null {
  let best: Wire | null = null;
  for (const wire of allWires()) {
    if (wire.covering !== covering) continue;
    if (best === null || Math.abs(wire[of] - mm) < Math.abs(best[of] - mm)) best = wire;
  }
  return best !== null && Math.abs(best[of] / mm - 1) < NEAR ? best : null;
}

/** The likeliest covering in stock within whose limits this one is, else the nearest in thickness. */
function coveringOf(bareMm: number, overallMm: number): { covering: Covering; wire: Wire } | null {
  if (overallMm - bareMm < FINE_MM) {
    const wire = nearestWire(bareMm, 'bareMm', 'bare');
    return wire === null ? null : { covering: 'bare', wire };
  }
  const found = COVERED.flatMap((covering) => {
    const wire = nearestWire(bareMm, 'bareMm', covering);
    if (wire === null) return [];
    // The stock's limits, moved to this bare diameter.
    const more = bareMm - wire.bareMm;
    const within = overallMm >= wire.overallLowMm + more - 1e-3 && overallMm <= wire.overallHighMm + more + 1e-3;
    return [{ covering, wire, within, off: Math.abs(wire.overallMm + more - overallMm) }];
  });
  return found.find(({ within }) => within) ?? found.sort((a, b) => a.off - b.off)[0] ?? null;
}

/** Likeliest first. */
const COVERED: readonly Covering[] = [
  'enamel',
  'enamel heavy',
  'single silk',
  'double silk',
  'single cotton',
  'double cotton',
];

/** `bareSpread` is a fraction. */
export function namedWire({ wire, coveringAssumed }: FoundWire, bareSpread: number | null): MeasuredWire {
  const inferred = coveringAssumed ? { 'coil.wire': wire.name } : {};
  if (bareSpread === null) return { ok: true, wire, inferred };
  const limits = { bareLowMm: wire.bareMm * (1 - bareSpread), bareHighMm: wire.bareMm * (1 + bareSpread) };
  return { ok: true, wire: { ...wire, ...limits }, inferred };
}

export function groupWire(group: WireGroup, bareSpread: number): MeasuredWire {
  const { bare, overall, covering } = group;
  const inferred: Record<string, string> = {};
  if (bare === undefined && overall === undefined)
    return refuse(
      'missing-key',
      '',
      'a wire without a diameter',
      'bare, overall or both',
      'add bare: 0.5 mm, the copper, or overall: 0.56 mm, over the covering',
    );
  if (bare !== undefined && overall !== undefined && overall < bare - FINE_MM)
    return refuse(
      'wire-diameters',
      'overall',
      `${lengthText(overall, 3)} over the covering of a wire of ${lengthText(bare, 3)} bare`,
      'overall no less than bare',
      'measure both again, or swap the two',
    );
  const given = bare ?? overall!;
  if (given < 0.04 || given > 4)
    return refuse(
      'wire-diameters',
      bare === undefined ? 'overall' : 'bare',
      `a wire of ${lengthText(given, 3)}`,
      'a wire between 0.04 mm and 4 mm, for which the figures hold',
      'check the unit and the number',
    );
  const supposed = covering ?? 'enamel';
  const like =
    bare !== undefined && overall !== undefined
      ? covering === undefined
        ? coveringOf(bare, overall)?.wire
        : nearestWire(bare, 'bareMm', covering)
      : nearestWire(given, bare === undefined ? 'overallMm' : 'bareMm', supposed);
  if ((bare === undefined || overall === undefined) && !like)
    return refuse(
      'wire-unlike-stock',
      bare === undefined ? 'overall' : 'bare',
      `a wire of ${lengthText(given, 3)} ${bare === undefined ? 'over' : 'under'} ${supposed}, which is not like any in stock`,
      'both diameters, or one near a size in stock',
      `add ${bare === undefined ? 'bare' : 'overall'} as well`,
    );
  const adds = like ? like.overallMm - like.bareMm : 0;
  const round = (mm: number) => Number(mm.toFixed(4));
  const bareMm = bare ?? round(overall! - adds);
  const overallMm = overall ?? round(bare! + adds);
  const from = `as ${like?.name ?? ''} has ${lengthText(adds, 3)} of covering`;
  if (bare === undefined) inferred['coil.wire.bare'] = `${lengthText(bareMm, 3)}, ${from}`;
  if (overall === undefined) inferred['coil.wire.overall'] = `${lengthText(overallMm, 3)}, ${from}`;
  const name = like?.covering ?? supposed;
  if (covering === undefined)
    inferred['coil.wire.covering'] =
      bare === undefined || overall === undefined || !like ? name : `${name}, by its thickness`;
  const half = (overallMm - bareMm) * 0.1 + 0.005;
  return {
    ok: true,
    inferred,
    wire: {
      name: `${lengthText(bareMm, 3)} ${name}, as measured`,
      covering: name,
      bareMm,
      bareLowMm: bareMm * (1 - bareSpread),
      bareHighMm: bareMm * (1 + bareSpread),
      overallMm,
      overallLowMm: overallMm - half,
      overallHighMm: overallMm + half,
      strands: 1,
      strandMm: bareMm,
      solderable: like?.solderable ?? false,
      standard: 'measured',
      status: 'as measured',
    },
  };
}
