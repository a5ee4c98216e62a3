/**
 * Numbers of a record that nobody recomputes here, each with the reason and where it is held instead. Every other number that the schema
 * has must be looked at by the checks of this folder: a new claim is red until it has a check or stands here.
 */
const AS_ASKED = 'what the job asks for or the bench is: copied, and read by tests/job';
const DRAWN =
  'a size that the design chose for printing: the mesh is held against it by box, volume and genus, its rules by tests/parts and tests/solve';
const STATED = 'stated practice, listed among what was assumed';

export const NOT_RECOMPUTED: Readonly<Record<string, string>> = {
  'matched.': 'of match: its own simulated coils in tests/random/match.ts tell how often the truth lies within',
  'printer.': AS_ASKED,
  'shop.': AS_ASKED,
  'demand.set.': AS_ASKED,
  'demand.overlapPercent': AS_ASKED,
  'asMade.': AS_ASKED,
  'surroundings.celsius': AS_ASKED,
  'surroundings.leadPf': AS_ASKED,
  'surroundings.formerLossTangent': 'of the table of materials: tests/stock',
  'spread.bareMm': STATED,
  'spread.diameterMm': STATED,
  'spread.leadUh': STATED,
  'spread.pitch': STATED,
  'spread.turn': STATED,
  'tapMethod.': 'by the method: tests/solve; what it does to turns, wire and resistance is recomputed',
  'former.base.': DRAWN,
  'former.chamferMm': DRAWN,
  'former.datumMark.': DRAWN,
  'former.densityGCm3': 'of the table of materials: tests/stock',
  'former.ears[].': DRAWN,
  'former.flange.': DRAWN,
  'former.footMm': DRAWN,
  'former.topMm': DRAWN,
  'former.groove.': DRAWN,
  'former.joints[].': DRAWN,
  'former.numberHeightMm': DRAWN,
  'former.posts[].': DRAWN,
  'former.ribs.': DRAWN,
  'former.ridges.': DRAWN,
  'former.segments': DRAWN,
  'alternatives[].formerMm': 'of another coil, whose turns are not in the record',
  'alternatives[].lengthMm': 'of another coil, whose turns are not in the record',
};

/** The reason, or null of a number that must be looked at. */
export function reasonFor(path: string): string | null {
  const key = Object.keys(NOT_RECOMPUTED).find((one) => one === path || (one.endsWith('.') && path.startsWith(one)));
  return key === undefined ? null : NOT_RECOMPUTED[key]!;
}

/**
 * Bounded or held against its neighbours alone, not recomputed: what takes the field of every turn (held in tests/physics/field and
 * tests/published), networks with losses (tests/around), or searches whose other candidates are not in the record.
 */
export const BOUNDED: readonly string[] = [
  'windings[].taps[].working.resistanceOhm',
  'windings[].taps[].working.inductanceUh',
  'windings[].taps[].ends[].resistanceOhm',
  'windings[].taps[].ends[].inductanceUh',
  'windings[].taps[].targetUh',
  'windings[].tensionLowN',
  'windings[].tensionHighN',
  'switchKinds[].positions[].inductanceUh',
  'switchKinds[].positions[].q',
  'measuring.meter[].inductanceUh',
  'measuring.meter[].q',
  'measuring.instruments.rows[].aloneWidthKhz',
  'measuring.instruments.rows[].widthKhz',
  'measuring.instruments.rows[].widthLowKhz',
  'measuring.instruments.rows[].widthHighKhz',
  'around.pairs[].rows[].tuningPf',
  'around.pairs[].rows[].q',
  'around.pairs[].rows[].off10Db',
  'around.pairs[].rows[].off18Db',
  'around.pairs[].rows[].off20Db',
  'around.ranges[].lowKhz',
  'around.ranges[].highKhz',
  'around.second.betweenPf',
  'around.second.working[].mutualUh',
  'around.second.working[].coupling',
  'around.second.working[].addedOhm',
  'chosen.lossFactor',
  'chosen.tried',
  'chosen.feasible',
  // Only by their neighbours from the record alone; holes, sizes and lengths are measured in the files where there are any.
  'former.lengthMm',
  'parts[].sizeMm[]',
  'beds[].items[].yMm',
  'beds[].items[].copy',
  'windings[].wire.overallHighMm',
  'holes[].axialMm',
  'holes[].diameterMm',
  'former.numbers[].angleDeg',
  'steps[].turn',
  'steps[].wireM',
  'checks[].digits',
  'corrections[].fromUh',
  'around.second.wanted.lowest',
  'around.second.body.lowMm',
  'around.second.body.lengthMm',
  'around.second.holes[].axialMm',
  'around.second.holes[].angleDeg',
  'around.second.holes[].diameterMm',
  'around.aerial.resistanceOhm',
  'around.aerial.seriesPf',
  'around.detector.resistanceKohm',
  'around.detector.capacitancePf',
  'around.pairs[].aerial',
  'around.pairs[].detector',
  'around.pairs[].rows[].outputDb',
  'around.pairs[].rows[].off9Db',
  'alternatives[].pitchMm',
  'alternatives[].lossFactor',
  'alternatives[].worstTapPercent',
];
