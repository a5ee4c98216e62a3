/** The wire of an old coil before anything is worked out: its covering, and how thick that is. */
import type { Covering, Wire } from '../stock/wire.ts';
import { allWires } from '../stock/wires.ts';
import type { OldWire } from './types.ts';

/** Where nothing at all tells how thick the wire is, mm: in the middle of what receiving coils have. */
const UNKNOWN_MM = 0.4;
/** Density of copper with a little covering, g per m and mm2 of bare section. */
const G_PER_M_MM2 = 9.1;

function nearest(mm: number, of: 'bareMm' | 'overallMm', covering: Covering): Wire | null {
  let best: Wire | null = null;
  for (const wire of allWires())
    if (wire.covering === covering && (best === null || Math.abs(wire[of] - mm) < Math.abs(best[of] - mm))) best = wire;
  return best;
}

/** A wire with the diameters that are known, or the likeliest guess to begin with; `assumed` says what was not measured. */
export function coveringOf(of: OldWire, pitchMm: number | null): { wire: Wire; assumed: Record<string, string> } {
  const assumed: Record<string, string> = {};
  const { named } = of;
  const covering = of.covering ?? named?.covering ?? 'enamel';
  if (of.covering === null && named === null) assumed['old.wire.covering'] = covering;
  const weighed =
    of.massG !== null && of.lengthM !== null
      ? Math.sqrt((4 * of.massG.value) / (Math.PI * G_PER_M_MM2 * of.lengthM.value))
      : null;
  const bare = of.bareMm?.value ?? named?.bareMm ?? weighed;
  const overall = of.overallMm?.value ?? (bare === null ? pitchMm : null);
  const like =
    bare !== null ? nearest(bare, 'bareMm', covering) : nearest(overall ?? UNKNOWN_MM, 'overallMm', covering);
  const adds =
    named !== null && of.bareMm === null
      ? named.overallMm - named.bareMm
      : like === null
        ? 0
        : like.overallMm - like.bareMm;
  const bareMm = bare ?? Math.max(0.03, (overall ?? UNKNOWN_MM) - adds);
  const overallMm = Math.max(overall ?? bareMm + adds, bareMm);
  const base = named ?? like;
  return {
    assumed,
    wire: {
      name: named?.name ?? `${bareMm.toFixed(3)} mm ${covering}, as inferred`,
      covering,
      bareMm,
      bareLowMm: bareMm,
      bareHighMm: bareMm,
      overallMm,
      overallLowMm: overallMm,
      overallHighMm: overallMm,
      strands: named?.strands ?? 1,
      strandMm: named !== null && named.strands > 1 ? (named.strandMm * bareMm) / named.bareMm : bareMm,
      solderable: base?.solderable ?? false,
      standard: named?.standard ?? 'inferred',
      status: named?.status ?? 'as inferred',
    },
  };
}

/** How much the covering adds to the diameter, and its half width; less is known of a covering that was not named. */
export function thicknessOf(wire: Wire, named: boolean): { mm: number; spread: number } {
  const like = nearest(wire.bareMm, 'bareMm', wire.covering);
  const mm = wire.overallMm - wire.bareMm;
  const stock = like === null ? 0 : (like.overallHighMm - like.overallLowMm) / 2;
  return { mm, spread: Math.max(stock, (named ? 0.15 : 0.5) * mm, 0.005) };
}
