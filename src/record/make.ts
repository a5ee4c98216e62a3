/**
 * Makes the record of a plan: rounds every figure once, puts given and assumed apart, and signs it with its hash. What
 * sheets, parts and pages show is read from here and nowhere else.
 */
import { cautionsFor } from '../../templates/wording/cautions.ts';
import { HOW } from '../../templates/wording/steps.ts';
import { FORMER_SHARE } from '../coil/positions.ts';
import type { Job } from '../job/job.ts';
import { type Possible, possibleParts } from '../parts/parts.ts';
import { lengthText } from '../quantity/written.ts';
import { alternativesTo, WORTH } from '../solve/alternatives.ts';
import { setCapacitance } from '../solve/demand.ts';
import type { Design } from '../solve/design.ts';
import { ASPECTS, aspectOf } from '../solve/prefer.ts';
import { fieldLoss, lossTangentOf, workingCoilOf } from '../solve/refine.ts';
import { plasticShare } from '../solve/ribs.ts';
import type { Found } from '../solve/search.ts';
import { spreadInWords, spreadOf } from '../solve/spread.ts';
import { DEFAULT_AT_KHZ } from '../solve/working.ts';
import { adviceOf, correctionsOf } from './advice.ts';
import { aroundOf } from './around.ts';
import { secondEntryOf, secondPlacesOf } from './around-second.ts';
import { checksOf } from './checks.ts';
import { figuresOf } from './figures.ts';
import { hashOf } from './hash.ts';
import { instrumentsOf } from './instruments.ts';
import { measuringOf } from './meter.ts';
import { askedFor, bedsOf, entriesOf, printerOf, wantedOf } from './printed.ts';
import { decimals, deg, mm, significant } from './rounding.ts';
import { type Alternative, type CoilRecord, type Former, type Hole, type PartsRecord, recordSchema } from './schema.ts';
import { secondStepsOf } from './second-steps.ts';
import { stepsOf } from './steps.ts';
import { leftOutWarnings, warningsOf } from './warnings.ts';
import { placesOf, windingOf } from './winding.ts';

function frameOf(job: Job): CoilRecord['frame'] {
  return {
    axis: 'Z runs along the axis, up, as the former is printed',
    datum: job.former.kind === 'printed' ? 'lower face of the foot, Z = 0' : 'lower end of the tube, Z = 0',
    angleZero: 'the start hole S',
    anglePositive: 'counterclockwise seen from above',
    hand: job.winding.hand,
    earthedEnd: job.winding.earthed,
    templateSeenFrom: 'outside, printed side out',
    switchSeenFrom: 'behind, the side it is wired from',
  };
}

/** The set as it was asked for; leads are among what figures were taken with. */
function setOf(set: NonNullable<Job['set']>): CoilRecord['demand']['set'] {
  const { capacitorLowPf, capacitorHighPf, strayPf, aerialPf, switch: rest } = set;
  return { capacitorLowPf, capacitorHighPf, strayPf, aerialPf, switch: rest };
}

function demandOf(job: Job, found: Found): CoilRecord['demand'] {
  const { demand } = found;
  return {
    kind: demand.kind,
    text: demand.text,
    spacing: demand.spacing,
    taps: demand.taps,
    bandLowKhz: demand.band?.lowKhz ?? null,
    bandHighKhz: demand.band?.highKhz ?? null,
    overlapPercent: demand.overlap === null ? null : decimals(demand.overlap * 100, 3),
    set: job.set === null ? null : setOf(job.set),
  };
}

function formerOf(former: Former): Former {
  return {
    ...former,
    outsideDiameterMm: mm(former.outsideDiameterMm),
    groove:
      former.groove === null
        ? null
        : {
            depthMm: mm(former.groove.depthMm),
            floorMm: mm(former.groove.floorMm),
            runInTurns: former.groove.runInTurns,
          },
    numbers: former.numbers.map((number) => ({ ...number, angleDeg: deg(number.angleDeg) })),
  };
}

function holeOf(hole: Hole): Hole {
  const turn = hole.turn === null ? null : decimals(hole.turn, 6);
  return { ...hole, turn, angleDeg: deg(hole.angleDeg), axialMm: mm(hole.axialMm) };
}

/** Alternatives in the record, at most. */
const SHOWN = 6;

function alternativeOf(design: Design, betterIn: readonly string[], lossFactor: number): Alternative {
  const { candidate, metrics, former, coil } = design;
  return {
    wire: candidate.wire.name,
    formerMm: mm(former.outsideDiameterMm),
    pitchMm: mm(coil.shape.pitchMm),
    pitchKind: candidate.pitch.kind,
    turns: decimals(coil.turns, 3),
    lengthMm: mm(metrics.lengthMm),
    wireM: decimals(metrics.wireM, 2),
    massG: significant(metrics.massG, 3),
    worstTapPercent: decimals(metrics.worstTap * 100, 2),
    lossFactor: significant(lossFactor, 4),
    tapMethod: `${design.method.name}, ${design.layout}`,
    betterIn: [...betterIn],
  };
}

/** The alternatives, whose loss is judged by the field as the chosen coil's is; what is then better in nothing is left out. */
function shownOf(job: Job, found: Found, lossFactor: number): Alternative[] {
  const { better } = ASPECTS.loss;
  return alternativesTo(found.chosen, found.others)
    .map(({ design, betterIn }) => {
      const loss = fieldLoss(job, design);
      const others = betterIn.filter((claim) => claim !== better);
      const claims = loss < lossFactor * (1 - WORTH) ? [better, ...others] : others;
      return alternativeOf(design, claims, loss);
    })
    .filter((one) => one.betterIn.length > 0)
    .slice(0, SHOWN);
}

function whyChosen(job: Job, found: Found, lossFactor: number): string {
  const aspect = aspectOf(job.prefer);
  const { chosen, others, ranked } = found;
  const value = aspect.of(chosen.metrics);
  const figure = {
    'least loss': `mean 1/Q ${lossFactor.toPrecision(3)} by the field of every turn (mean Q about ${(1 / lossFactor).toFixed(0)})`,
    compact: `${(value / 1000).toFixed(0)} cm³ of former`,
    'least wire': `${value.toFixed(1)} m of wire`,
    'closest taps': `worst tap ${(chosen.metrics.worstTap * 100).toFixed(2)} % off; of coils within 0.1 % the one with the least loss`,
  }[job.prefer];
  const second = others.map((one) => aspect.of(one.metrics)).sort((a, b) => a - b)[0];
  if (second === undefined) return `${figure}: the only coil that fits what the job permits`;
  const [first, runnerUp] = ranked;
  const byField = first !== undefined && runnerUp !== undefined ? runnerUp.lossFactor / first.lossFactor : null;
  const ahead = 100 * ((byField ?? second / value) - 1);
  const next = ahead < 0.05 ? 'level with the next best' : `${ahead.toFixed(1)} % ahead of the next best`;
  return `${figure}: the best of ${others.length + 1} designs worked out by the ring sum, ${next}`;
}

/** What the program chose or took where the job is silent, beyond the defaults of the job itself. */
function derivedOf(job: Job, design: Design): Record<string, string> {
  const { former } = design;
  const derived: Record<string, string> = { temperature: '20 °C' };
  if (job.former.wallMm === null)
    derived['former.wall'] =
      former.ribs === null
        ? `${former.wallMm} mm, from lines of ${job.printer.lineMm} mm`
        : `${former.wallMm} mm, ribs and rings`;
  if (job.wires === 'stock') derived.wire = 'all in stock from 0.15 mm bare up';
  if (job.former.kind === 'tube' && job.winding.spacers === null) derived['winding.spacers'] = 'all in stock';
  if (job.set === null && job.atKhz === null) derived.at = `${DEFAULT_AT_KHZ} kHz, for the loss`;
  return derived;
}

/** How the loss of a ribbed former is estimated. */
function ribbedLoss(former: Former): { formerLoss?: string } {
  if (former.ribs === null) return {};
  const percent = (100 * plasticShare(former)).toFixed(0);
  return {
    formerLoss: `estimate: ${FORMER_SHARE * 100} % of the self-capacitance would lie in a full wall; ribs and rings stand behind ${percent} % of the winding, and so much of the material's loss tangent is taken`,
  };
}

export interface Printed extends Possible {
  readonly record: PartsRecord;
}

/**
 * The parts of a found design and what they read: the same figures as in its record, before the rest of that is worked out.
 * @throws Fault (exit 4) for a part that was asked for and cannot be
 */
export function printedOf(job: Job, found: Found): Printed {
  const { chosen } = found;
  const record: PartsRecord = {
    job: job.name,
    frame: frameOf(job),
    former: formerOf(chosen.former),
    holes: chosen.holes.map(holeOf),
    printer: printerOf(job),
    shop: { ...job.shop, capacitorsPf: [...job.shop.capacitorsPf] },
    wanted: wantedOf(job, chosen),
    tapMethod: tapMethodOf(chosen, job.units),
    windings: [placesOf(chosen)],
    ...(found.second === undefined ? {} : { around: { second: secondPlacesOf(found.second) } }),
  };
  const { solids, leftOut } = possibleParts(record, askedFor(job));
  const not = leftOut.map(({ kind }) => kind);
  return { record: { ...record, wanted: record.wanted.filter((kind) => !not.includes(kind)) }, solids, leftOut };
}

function tapMethodOf({ method, unitTaps, layout }: Design, units: Job['units']): CoilRecord['tapMethod'] {
  return {
    name: method.name,
    // Unit taps are a turn apart and never in one line.
    layout: unitTaps.length > 0 ? 'staggered' : layout,
    gapMm: mm(method.gapMm),
    loopM: method.loopM,
    why: method.why,
    how: HOW[method.name](Math.round(method.loopM * 1000), (length, digits) => lengthText(length, units, { digits })),
  };
}

/** What the record of another verb holds besides. */
export type RecordExtra = Pick<CoilRecord, 'verb' | 'matched'> & {
  readonly warnings?: CoilRecord['warnings'];
  /** Of a lot: its parts lie on beds of the lot, and the record has none of its own. */
  readonly bedsOfLot?: true;
};

/** The record of a found design, files still to come; `parts` are its parts where they are already described. The schema is checked, so that nothing leaves in another shape. */
export function makeRecord(
  job: Job,
  found: Found,
  version: string,
  parts = printedOf(job, found),
  { warnings = [], bedsOfLot, ...extra }: RecordExtra = { verb: 'plan' },
): CoilRecord {
  const { chosen } = found;
  const conditions = {
    tuning: job.set === null ? null : setCapacitance(job.set),
    atKhz: job.atKhz ?? (job.set === null ? DEFAULT_AT_KHZ : null),
    rest: job.set?.switch ?? ('open' as const),
    lossTangent: lossTangentOf(job, chosen.former),
  };
  const working = chosen.working ?? workingCoilOf(job, chosen);
  const figures = figuresOf(working, conditions);
  const lossFactor = fieldLoss(job, chosen);
  const winding = windingOf(job, chosen, figures.taps);
  const spread = spreadOf(job, chosen);
  const measuring = {
    ...measuringOf(working, winding.taps, job.shop, spread, conditions.lossTangent),
    instruments: instrumentsOf(working, winding.taps, job.shop, conditions.lossTangent),
  };
  const { candidate } = chosen;
  const {
    record: { around: _, ...printed },
    solids,
    leftOut,
  } = parts;
  const around = aroundOf({
    job,
    coil: working,
    taps: winding.taps,
    rest: conditions.rest,
    lossTangent: conditions.lossTangent,
    second:
      found.second === undefined ? null : { entry: secondEntryOf(found.second, winding.taps), pair: found.second.pair },
  });
  const entries = entriesOf(solids);
  const steps = stepsOf(job, chosen, winding);
  const alternatives = shownOf(job, found, lossFactor);
  const body: Omit<CoilRecord, 'hash' | 'files' | 'program'> = {
    record: 1,
    ...extra,
    ...printed,
    date: job.date,
    paper: job.paper,
    units: job.units,
    demand: demandOf(job, found),
    windings: [winding],
    ...(around === null ? {} : { around }),
    surroundings: { ...figures.surroundings, ...ribbedLoss(chosen.former) },
    spread,
    ...(job.asMade.diameterMm === 0 && job.asMade.pitch === 0 ? {} : { asMade: { ...job.asMade } }),
    coverage: figures.coverage,
    switchKinds: figures.switchKinds,
    settings: figures.settings,
    parts: entries,
    beds: bedsOfLot ? [] : bedsOf(entries, printed.printer),
    steps: around?.second
      ? [...steps, ...secondStepsOf(job, around.second, steps.length, winding.inductanceUh)]
      : steps,
    checks: checksOf(chosen, spread, measuring, job),
    corrections: correctionsOf(chosen, measuring, job.units),
    advice: adviceOf(chosen, measuring),
    measuring,
    cautions: cautionsFor({
      printed: chosen.former.kind === 'printed',
      tube: chosen.former.kind === 'tube',
      material: chosen.former.material,
      enamel: candidate.wire.covering.startsWith('enamel') || candidate.wire.strands > 1,
      aerial: job.aerial?.kind ?? null,
    }),
    chosen: {
      prefer: job.prefer,
      why: whyChosen(job, found, lossFactor),
      lossFactor: significant(lossFactor, 4),
      massG: significant(chosen.metrics.massG, 4),
      worstTapPercent: decimals(chosen.metrics.worstTap * 100, 3),
      tried: found.tried,
      feasible: found.feasible,
    },
    warnings: [
      ...warnings,
      ...warningsOf(job, found, alternatives.length, figures.coverage),
      ...leftOutWarnings(leftOut),
      ...(found.second?.warnings ?? []),
    ],
    given: { ...job.given },
    assumed: { ...job.assumed, ...derivedOf(job, chosen), ...spreadInWords(spread) },
    alternatives,
  };
  return recordSchema.parse({ ...body, program: `coilwright ${version}`, hash: hashOf(body), files: [] });
}
