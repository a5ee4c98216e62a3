/**
 * The pipeline of `survey`, without I/O:
 *
 *     coil file ──> measured coil ──> turns where they lie ──> figures at work ──> record ──┬──> reference sheet, netlist
 *     (job/          (job/coil)        (coil/coil)              (record/figures)  (record/  └──> plan.json
 *      coil-file)                                                                  survey)
 *
 * The record is that of `plan`, without what concerns the making of a coil.
 */
import { Coil } from './coil/coil.ts';
import type { Conditions } from './coil/positions.ts';
import { WorkingCoil } from './coil/working-coil.ts';
import type { CoilFile, MeasuredCoil } from './job/coil/file.ts';
import { laySections } from './job/coil/lay.ts';
import { netlistFile } from './netlist/file.ts';
import { listed, type Output } from './record/listing.ts';
import { makeSurveyRecord } from './record/survey.ts';
import type { SurveyRecord } from './record/survey-schema.ts';
import { findMaterial } from './stock/materials.ts';

/** Turns of a measured coil where they lie, Z = 0 at the start. */
export function coilOf({ wire, meanDiameterMm, turns, sections }: MeasuredCoil): Coil {
  const { places, pitchMm } = laySections(sections, wire.overallMm);
  return new Coil({ wire, meanDiameterMm, turns, pitchMm, gaps: [], startMm: 0 }, places);
}

/** A measured coil in its surroundings, and what its figures are taken with. */
export function workingOf(file: CoilFile): { working: WorkingCoil; conditions: Conditions } {
  const { coil, set, atKhz, celsius } = file;
  const working = new WorkingCoil(coilOf(coil), coil.taps, {
    leadPf: set?.leadPf ?? 0,
    earthed: coil.earthed,
    celsius,
  });
  const material = coil.formerMaterial === null ? null : findMaterial(coil.formerMaterial);
  const fixed = set === null ? 0 : set.strayPf + set.aerialPf;
  return {
    working,
    conditions: {
      tuning: set === null ? null : { outPf: set.capacitorLowPf + fixed, inPf: set.capacitorHighPf + fixed },
      atKhz,
      rest: set?.switch ?? 'open',
      lossTangent: material?.ok ? material.material.lossTangent : 0,
    },
  };
}

/** The record alone. */
export function surveyRecordOf(file: CoilFile, version: string): SurveyRecord {
  const { working, conditions } = workingOf(file);
  return makeSurveyRecord(file, working.coil, working, conditions, version);
}

/** The record and every file of the output folder. */
export async function surveyFiles(file: CoilFile, options: { version: string }): Promise<Output<SurveyRecord>> {
  const record = surveyRecordOf(file, options.version);
  const { referenceSheet } = await import('./sheets/reference-sheet.ts');
  const ranges = await referenceSheet(record);
  return listed(record, [
    {
      path: 'reference-sheet.pdf',
      kind: 'pdf',
      bytes: ranges,
      note: 'ranges, curves, switch wiring, and how the figures come about',
    },
    netlistFile(record),
  ]);
}
