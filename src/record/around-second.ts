/** The second winding as the record holds it, from its design. */
import { BETWEEN_PERMITTIVITY } from '../around/second-side.ts';
import type { SecondDesign } from '../solve/second.ts';
import { copperG } from '../solve/working.ts';
import type { SecondEntry } from './around-schema.ts';
import { decimals, deg, mm, significant } from './rounding.ts';
import type { Tap } from './schema.ts';
import { LEAD_MM } from './steps.ts';

/** All but what needs the main coil at work: what parts read. */
export type SecondPlaces = Omit<SecondEntry, 'working'>;

export function secondPlacesOf(second: SecondDesign): SecondPlaces {
  const { wish, wire, coil, pair, coupling, body, slide, holes } = second;
  const { turns } = coil;
  const between = pair.betweenPf(BETWEEN_PERMITTIVITY).reduce((sum, { pf }) => sum + pf, 0);
  const wireM = coil.wireM(turns);
  return {
    kind: wish.kind,
    turns,
    wire: { name: wire.name, bareMm: wire.bareMm, overallMm: wire.overallMm },
    pitchMm: mm(coil.shape.pitchMm),
    spacerMm: mm(second.spacerMm),
    meanDiameterMm: mm(coil.shape.meanDiameterMm),
    startMm: mm(coil.positionMm(0)),
    finishMm: mm(coil.positionMm(turns)),
    turnPositionsMm: Array.from(coil.places, mm),
    wireLengthM: decimals(wireM, 4),
    leadsM: (2 * LEAD_MM) / 1000,
    wireMassG: significant(copperG(wire, wireM), 4),
    resistanceDcOhm: significant(coil.resistanceOhm(turns)),
    inductanceUh: significant(coil.inductanceUh(turns)),
    selfCapacitancePf: significant(coil.selfPf(turns), 4),
    betweenPf: significant(between, 3),
    mutualUh: significant(pair.mutualUh(0, pair.main.coil.turns)),
    coupling: significant(coupling, 5),
    wanted: wish.coupling === null ? null : { ...wish.coupling },
    slide:
      slide === null
        ? null
        : {
            travelMm: mm(slide.travelMm),
            scale: slide.scale.map(({ mm: at, coupling: k }) => ({ mm: mm(at), coupling: k })),
          },
    distanceMm: mm(second.distanceMm),
    body,
    holes: holes.map((hole) => ({ ...hole, angleDeg: deg(hole.angleDeg), axialMm: mm(hole.axialMm) })),
    why: second.why,
  };
}

/** With what each position makes of it where it works; `taps` are those of the main winding. */
export function secondEntryOf(second: SecondDesign, taps: readonly Tap[]): SecondEntry {
  return {
    ...secondPlacesOf(second),
    working: taps.map(({ tap, working: { frequencyKhz } }) => {
      // Not the turn as the record rounds it, which may lie beyond the end of the coil.
      const at = second.pair.at(second.pair.main.taps[tap - 1]!, frequencyKhz);
      return {
        tap,
        frequencyKhz,
        mutualUh: significant(at.mutualUh),
        coupling: significant(at.coupling, 5),
        addedOhm: significant(at.addedOhm, 4),
      };
    }),
  };
}
