/**
 * A coil file to a {@link CoilFile}: text -> tree with lines -> defaults -> schema -> what was measured -> plain data.
 * Every fault of the file is reported in one go, in the order of its lines.
 */
import { Fault, type FaultParts } from '../fault.ts';
import { helixLength } from '../physics/helix.ts';
import { completeCoil } from './coil/defaults.ts';
import type { CoilFile, MeasuredCoil } from './coil/file.ts';
import { laySections, placeOf } from './coil/lay.ts';
import { diametersOf, windingOf } from './coil/measure.ts';
import {
  groupFileSchema,
  HIGHEST_KHZ,
  LOWEST_KHZ,
  type ReadCoil,
  type ReadCoilFile,
  textFileSchema,
} from './coil/schema.ts';
import { frequencyFault, tapsOf } from './coil/taps.ts';
import { groupWire, namedWire } from './coil/wire.ts';
import { type Assumed, isData } from './defaults.ts';
import { faultsOf, keyText } from './faults.ts';
import { COIL_FILE } from './file-kind.ts';
import type { Finding } from './finding.ts';
import { nameOfFile } from './name.ts';
import { readTree } from './tree.ts';

/** Reads a measured coil, YAML or JSON. Throws a {@link Fault} with exit code 3. `file` is for messages and for a name. */
export function readCoilFile(text: string, file: string): CoilFile {
  const tree = readTree(text, file, COIL_FILE);
  const { data, assumed } = completeCoil(tree.data, nameOfFile(file, 'Measured coil'));
  const inWords = isData(data) && isData(data.coil) && typeof data.coil.wire === 'string';
  const schema = inWords ? textFileSchema : groupFileSchema;
  const parsed = schema.safeParse(data);
  // A name taken from the key job is judged there.
  const named = isData(tree.data) && Object.hasOwn(tree.data, 'name');
  const issues = (parsed.error?.issues ?? []).filter(({ path }) => named || path[0] !== 'name');
  const faults = issues.flatMap((issue) => faultsOf(issue, tree, file, schema.shape));
  const coil = parsed.success ? parsed.data.coil : alone(data, inWords);
  const spread = parsed.success ? parsed.data.spread : null;
  const measured = coil === null ? null : measure(coil, spread?.bare ?? 0, Object.hasOwn(assumed, 'spread.bare'));
  const findings = measured !== null && 'faults' in measured ? [...measured.faults] : [];
  if (measured !== null && 'coil' in measured) findings.push(...checkFrequency(measured.coil, data, schema));
  const all: FaultParts[] = [...faults, ...findings.map((finding) => placed(finding, tree, file))];
  if (all.length > 0 || !parsed.success || measured === null || !('coil' in measured)) {
    throw new Fault(
      3,
      all.sort((a, b) => (a.place?.line ?? 0) - (b.place?.line ?? 0)),
    );
  }
  return toFile(parsed.data, measured, tree.data, assumed);
}

const placed = (
  { code, path, got, expected, todo }: Finding,
  tree: ReturnType<typeof readTree>,
  file: string,
): FaultParts => ({
  code,
  place: { file, line: tree.lineOf(path), key: keyText(path) },
  got,
  expected,
  todo,
});

/** The coil, when it can be read but something else in the file cannot. */
function alone(data: unknown, inWords: boolean): ReadCoil | null {
  if (!isData(data) || data.coil === undefined) return null;
  const parsed = (inWords ? textFileSchema : groupFileSchema).shape.coil.safeParse(data.coil);
  return parsed.success ? parsed.data : null;
}

interface Measured {
  readonly coil: MeasuredCoil;
  readonly inferred: Readonly<Record<string, string>>;
}

/** The coil that was measured, or all that is wrong with it. */
function measure(coil: ReadCoil, bareSpread: number, bareSpreadAssumed: boolean): Measured | { faults: Finding[] } {
  const found =
    'wire' in coil.wire
      ? namedWire(coil.wire, bareSpreadAssumed ? null : bareSpread)
      : groupWire(coil.wire, bareSpread);
  if (!found.ok) return { faults: [found.finding] };
  const { wire } = found;
  const diameters = diametersOf(coil, wire.overallMm);
  const winding = windingOf(coil, wire);
  const faults: Finding[] = 'code' in diameters ? [diameters] : [];
  if (!('sections' in winding)) {
    // Taps counted in turns can be judged all the same.
    const { turns, taps = [] } = coil;
    const even = turns === undefined ? [] : [{ turns, pitchMm: wire.overallMm, gapAfterMm: 0 }];
    const judged = even.length === 0 || taps.length === 0 ? [] : tapsOf(coil, even, wire.overallMm);
    return { faults: [...faults, ...winding, ...judged.filter((tap) => typeof tap !== 'number')] };
  }
  const taps = tapsOf(coil, winding.sections, wire.overallMm);
  const tapFaults = taps.filter((tap) => typeof tap !== 'number');
  if ('code' in diameters || tapFaults.length > 0) return { faults: [...faults, ...tapFaults] };
  return {
    inferred: { ...found.inferred, ...winding.inferred },
    coil: {
      wire,
      meanDiameterMm: diameters.meanMm,
      formerDiameterMm: diameters.formerMm,
      turns: winding.sections.reduce((sum, section) => sum + section.turns, 0),
      sections: winding.sections,
      taps: taps.filter((tap) => typeof tap === 'number'),
      hand: coil.hand,
      earthed: coil.earthed,
      formerMaterial: coil['former-material'],
    },
  };
}

/** A frequency that was written, or taken, and at which the figures mean nothing. */
function checkFrequency(coil: MeasuredCoil, data: unknown, schema: typeof groupFileSchema | typeof textFileSchema) {
  const at = schema.shape.at.safeParse(isData(data) ? data.at : undefined);
  if (!at.success || at.data === undefined) return [];
  const laid = laySections(coil.sections, coil.wire.overallMm);
  const wireM = helixLength(coil.meanDiameterMm / 1e3, coil.turns, placeOf(laid, coil.turns) / 1e3);
  const fault = frequencyFault(at.data, wireM, LOWEST_KHZ, HIGHEST_KHZ);
  return fault === null ? [] : [fault];
}

/** A tap counted in turns is where its wire is soldered, within so many degrees. */
const TAP_DEGREES = 3;
/** A tap measured with a rule is there within so many millimetres. */
const TAP_MM = 0.2;

function toFile(read: ReadCoilFile, measured: Measured, written: unknown, assumed: Assumed): CoilFile {
  const { coil, inferred } = measured;
  const byPlace = read.coil['tap-positions'] !== undefined;
  const pitchMm = laySections(coil.sections, coil.wire.overallMm).pitchMm;
  const turn = read.spread.tap !== undefined ? read.spread.tap / 360 : byPlace ? TAP_MM / pitchMm : TAP_DEGREES / 360;
  const tapSpread = byPlace ? `${TAP_MM} mm` : `${TAP_DEGREES} degrees`;
  const { set } = read;
  return {
    name: read.name,
    date: read.date ?? null,
    paper: read.paper,
    coil,
    set:
      set === undefined
        ? null
        : {
            capacitorLowPf: set.capacitor.low,
            capacitorHighPf: set.capacitor.high,
            strayPf: set.stray,
            aerialPf: set.aerial,
            switch: set.switch,
            leadPf: set.lead,
          },
    band: read.band === undefined ? null : { lowKhz: read.band.low, highKhz: read.band.high },
    atKhz: read.at ?? null,
    celsius: read.temperature,
    spread: { diameterMm: read.spread.diameter, pitch: read.spread.pitch, bare: read.spread.bare, turn },
    given: leaves(written),
    assumed: { ...assumed, ...(read.spread.tap === undefined ? { 'spread.tap': tapSpread } : {}), ...inferred },
  };
}

/** What was written, leaf by leaf, by dotted key; the key for editors is left out. */
function leaves(data: unknown, prefix = ''): Record<string, unknown> {
  const found: Record<string, unknown> = {};
  for (const [key, value] of Object.entries(isData(data) ? data : {})) {
    const dotted = `${prefix}${key}`;
    if (dotted === '$schema' || value === null) continue;
    if (isData(value)) Object.assign(found, leaves(value, `${dotted}.`));
    else found[dotted] = value;
  }
  return found;
}
