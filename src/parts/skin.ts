/** The former's turned surface: profile from the foot over rims and groove to the top, and the bore back down. */
import type { FormerDimensions } from './dimensions.ts';
import type { Groove, GrooveSample, ProfileRow, Skin } from './solid.ts';

export function formerSkin(d: FormerDimensions): Skin {
  const { flange } = d.former;
  const c = d.chamferMm;
  const foot: ProfileRow[] = [{ rMm: d.footR - c, zMm: 0 }];
  if (c > 0) foot.push({ rMm: d.footR, zMm: c });
  // A base takes the place of the lower rim.
  if (d.footR > d.outsideR)
    foot.push({ rMm: d.footR, zMm: d.surfaceFromMm }, { rMm: d.outsideR, zMm: d.surfaceFromMm });
  const top: ProfileRow[] =
    flange && d.topR > d.outsideR
      ? [
          { rMm: d.outsideR, zMm: d.surfaceToMm },
          { rMm: d.topR, zMm: d.lengthMm - flange.upperMm },
          { rMm: d.topR, zMm: d.lengthMm },
        ]
      : [{ rMm: d.outsideR, zMm: d.lengthMm }];
  const bore: ProfileRow[] = [
    { rMm: d.boreR, zMm: d.lengthMm },
    { rMm: d.boreR, zMm: c },
  ];
  if (c > 0) bore.push({ rMm: d.boreR + c, zMm: 0 });
  return {
    kind: 'skin',
    segments: d.segments,
    hand: d.hand,
    outer: [...foot, ...top],
    inner: bore,
    groove: grooveSamples(d, foot.length - 1),
  };
}

/** A ramp starts with at least this depth, which no printer shows, so that its first triangles are not slivers. */
const SHALLOWEST_MM = 0.01;

/** One sample a column; the first and the last lie just outside the ramps, at depth 0. */
function grooveSamples(d: FormerDimensions, afterRow: number): Groove | null {
  const { groove, segments } = d;
  if (!groove) return null;
  const firstColumn = Math.floor(groove.fromTurn * segments - 0.5);
  const lastColumn = Math.ceil(groove.toTurn * segments - 0.5);
  const samples: GrooveSample[] = [];
  for (let column = firstColumn; column <= lastColumn; column++) {
    const turn = (column + 0.5) / segments;
    const ramp = groove.rampTurns > 0 ? Math.min(turn - groove.fromTurn, groove.toTurn - turn) / groove.rampTurns : 1;
    const outside = column === firstColumn || column === lastColumn;
    const depthMm = groove.depthMm * Math.min(1, ramp);
    samples.push({ zMm: d.axialMm(turn), depthMm: outside || depthMm < SHALLOWEST_MM ? 0 : depthMm });
  }
  return { afterRow, floorMm: groove.floorMm, firstColumn, samples };
}
