/**
 * Makes the record of a plan: rounds every figure once, puts given and assumed apart, and signs it with its hash. What
 * sheets, parts and pages show is read from here and nowhere else.
 */
import { cautionsFor } from '../../templates/wording/cautions.ts';
import { HOW } from '../../templates/wording/steps.ts';
import type { Job } from '../job/job.ts';
import { alternativesTo } from '../solve/alternatives.ts';
import type { Design } from '../solve/design.ts';
import { aspectOf } from '../solve/prefer.ts';
import type { Found } from '../solve/search.ts';
import { spreadInWords, spreadOf } from '../solve/spread.ts';
import { DEFAULT_AT_KHZ } from '../solve/working.ts';
import { checksOf } from './checks.ts';
import { hashOf } from './hash.ts';
import { decimals, deg, mm, significant } from './rounding.ts';
import { type Alternative, type CoilRecord, type Former, type Hole, recordSchema } from './schema.ts';
import { correctionsOf, stepsOf } from './steps.ts';
import { warningsOf } from './warnings.ts';
import { windingOf } from './winding.ts';

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
    set: job.set === null ? null : { ...job.set },
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

function alternativeOf(design: Design, betterIn: readonly string[]): Alternative {
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
    lossFactor: significant(metrics.lossFactor, 4),
    tapMethod: `${design.method.name}, ${design.layout}`,
    betterIn: [...betterIn],
  };
}

function whyChosen(job: Job, found: Found): string {
  const aspect = aspectOf(job.prefer);
  const { chosen, others } = found;
  const value = aspect.of(chosen.metrics);
  const figure = {
    'least loss': `mean 1/Q ${value.toPrecision(3)} (estimated; mean Q about ${(1 / value).toFixed(0)})`,
    compact: `${(value / 1000).toFixed(0)} cm³ of former`,
    'least wire': `${value.toFixed(1)} m of wire`,
    'closest taps': `worst tap ${(chosen.metrics.worstTap * 100).toFixed(2)} % off; of coils within 0.1 % the one with the least loss`,
  }[job.prefer];
  const second = others.map((one) => aspect.of(one.metrics)).sort((a, b) => a - b)[0];
  if (second === undefined) return `${figure}: the only coil that fits what the job permits`;
  const ahead = value > 0 ? 100 * (second / value - 1) : 0;
  const next = ahead < 0.05 ? 'level with the next best' : `${ahead.toFixed(1)} % ahead of the next best`;
  return `${figure}: the best of ${others.length + 1} designs worked out by the ring sum, ${next}`;
}

/** What the program chose or took where the job is silent, beyond the defaults of the job itself. */
function derivedOf(job: Job, design: Design): Record<string, string> {
  const { former } = design;
  const derived: Record<string, string> = { temperature: '20 °C' };
  if (job.former.wallMm === null)
    derived['former.wall'] = `${former.wallMm} mm, from lines of ${job.printer.lineMm} mm`;
  if (job.wires === 'stock') derived.wire = 'all in stock from 0.15 mm bare up';
  if (job.former.kind === 'tube' && job.winding.spacers === null) derived['winding.spacers'] = 'all in stock';
  if (job.set === null && job.atKhz === null) derived.at = `${DEFAULT_AT_KHZ} kHz, for the loss`;
  return derived;
}

/** The record of a found design, files still to come. The schema is checked, so that nothing leaves in another shape. */
export function makeRecord(job: Job, found: Found, version: string): CoilRecord {
  const { chosen } = found;
  const winding = windingOf(job, chosen);
  const spread = spreadOf(job, chosen);
  const { method, candidate } = chosen;
  const alternatives = alternativesTo(chosen, found.others);
  const body: Omit<CoilRecord, 'hash' | 'files' | 'program'> = {
    record: 1,
    verb: 'plan',
    job: job.name,
    date: job.date,
    paper: job.paper,
    frame: frameOf(job),
    demand: demandOf(job, found),
    windings: [winding],
    former: formerOf(chosen.former),
    tapMethod: {
      name: method.name,
      layout: chosen.layout,
      gapMm: mm(method.gapMm),
      loopM: method.loopM,
      why: method.why,
      how: HOW[method.name](Math.round(method.loopM * 1000)),
    },
    holes: chosen.holes.map(holeOf),
    steps: stepsOf(job, chosen, winding),
    checks: checksOf(chosen, winding, spread),
    corrections: correctionsOf(chosen),
    cautions: cautionsFor({
      printed: chosen.former.kind === 'printed',
      tube: chosen.former.kind === 'tube',
      material: chosen.former.material,
      enamel: candidate.wire.covering.startsWith('enamel') || candidate.wire.strands > 1,
    }),
    chosen: {
      prefer: job.prefer,
      why: whyChosen(job, found),
      lossFactor: significant(chosen.metrics.lossFactor, 4),
      massG: significant(chosen.metrics.massG, 4),
      worstTapPercent: decimals(chosen.metrics.worstTap * 100, 3),
      tried: found.tried,
      feasible: found.feasible,
    },
    warnings: warningsOf(job, found, alternatives.length),
    given: { ...job.given },
    assumed: { ...job.assumed, ...derivedOf(job, chosen), ...spreadInWords(spread) },
    alternatives: alternatives.map(({ design, betterIn }) => alternativeOf(design, betterIn)),
  };
  return recordSchema.parse({ ...body, program: `coilwright ${version}`, hash: hashOf(body), files: [] });
}
