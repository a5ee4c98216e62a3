/**
 * A job file to a {@link Job}: text -> tree with lines -> defaults -> schema -> checks across keys -> plain data.
 * Every fault of the file is reported in one go, in the order of its lines.
 */
import { Fault, type FaultParts } from '../fault.ts';
import type { FoundWire } from '../stock/find.ts';
import type { Wire } from '../stock/wire.ts';
import { toAerial, toDetector } from './around/aerial.ts';
import { toSecond } from './around/second.ts';
import { crossCheck, type Readable } from './checks.ts';
import { type Assumed, complete, INSTRUMENT_KEYS, isData } from './defaults.ts';
import { faultsOf, keyText } from './faults.ts';
import type { Values } from './field.ts';
import type { Diameters, Job, Want } from './job.ts';
import { jobSchema, type ReadJob } from './schema.ts';
import { readTree, type Tree } from './tree.ts';

/** Reads a job, YAML or JSON. Throws a {@link Fault} with exit code 3. `file` is only for messages. */
export function readJob(text: string, file: string): Job {
  const tree = readTree(text, file);
  const { data, assumed } = complete(tree.data);
  const parsed = jobSchema.safeParse(data);
  const findings = crossCheck(parsed.success ? parsed.data : readable(data));
  const faults: FaultParts[] = findings.map(({ code, path, got, expected, todo }) => ({
    code,
    place: { file, line: tree.lineOf(path), key: keyText(path) },
    got,
    expected,
    todo,
  }));
  for (const issue of parsed.error?.issues ?? []) {
    // A default made from a key that is wrong is wrong too; the key itself is reported.
    if (!Object.hasOwn(assumed, issue.path.join('.'))) faults.push(...faultsOf(issue, tree, file));
  }
  if (faults.length > 0 || !parsed.success) {
    throw new Fault(
      3,
      faults.sort((a, b) => (a.place?.line ?? 0) - (b.place?.line ?? 0)),
    );
  }
  return toJob(parsed.data, tree, assumed, file);
}

/** The sections that can be read on their own, when the whole cannot. */
function readable(data: unknown): Readable {
  if (!isData(data)) return {};
  const found: Record<string, unknown> = {};
  for (const [key, schema] of Object.entries(jobSchema.shape)) {
    if (!Object.hasOwn(data, key)) continue;
    const parsed = schema.safeParse(data[key]);
    found[key] = parsed.success ? parsed.data : undefined;
  }
  return found as Readable;
}

/** A job of what was read; for files that hold one among other things. */
export function toJob(read: ReadJob, tree: Tree, assumed: Assumed, file: string): Job {
  const { former, winding, printer, shop } = read;
  const written = given(tree.data);
  const lines = Object.keys(written).map((key) => [key, tree.lineOf(key.split('.'))]);
  return {
    name: read.job,
    date: read.date ?? null,
    paper: read.paper,
    units: read.units,
    want: toWant(read.want, read.winding.units !== undefined),
    set:
      read.set === undefined
        ? null
        : {
            capacitorLowPf: read.set.capacitor.low,
            capacitorHighPf: read.set.capacitor.high,
            strayPf: read.set.stray,
            aerialPf: read.set.aerial,
            switch: read.set.switch,
            leadPf: read.set.lead,
          },
    former: {
      kind: former.kind,
      diametersMm: toDiameters(former['outside-diameter']),
      longestMm: former.longest,
      wallMm: former.wall ?? null,
      material: former.material,
      body: former.body ?? 'full',
      ribs: former.ribs ?? null,
      mounting: former.mounting,
      screwMm: former.screw ?? null,
      screwCircleMm: former['screw-circle'] ?? null,
      flanges: former.flanges,
    },
    wires: read.wire === undefined ? 'stock' : toWires(read.wire),
    winding: {
      hand: winding.hand,
      earthed: winding.earthed,
      pitch: winding.pitch,
      spacers: winding.spacers === undefined ? null : ascending(winding.spacers),
      tapMethod: winding['tap-method'],
      tapLayout: winding['tap-layout'],
      units: winding.units ?? null,
      finishTrim: winding['finish-trim'],
    },
    second: toSecond(read.second),
    aerial: toAerial(read.aerial),
    detector: toDetector(read.detector),
    prefer: read.prefer,
    atKhz: read.at ?? null,
    celsius: read.temperature,
    printer: {
      bedXMm: printer.bed.x,
      bedYMm: printer.bed.y,
      heightMm: printer.height,
      nozzleMm: printer.nozzle,
      lineMm: printer.line,
      layerMm: printer.layer,
      holeCompensationMm: printer['hole-compensation'],
      clearanceMm: printer.clearance,
      scale: printer.scale,
      material: printer.material,
    },
    shop: {
      shaftMm: shop.shaft,
      shaftForm: shop['shaft-form'],
      spoolDiameterMm: shop.spool.x,
      spoolWidthMm: shop.spool.y,
      spoolBoreMm: shop['spool-bore'],
      meterKhz: shop.meter,
      meterName: shop['meter-name'] ?? null,
      meterAccuracy: shop['meter-accuracy'],
      capacitorsPf: ascending(shop.capacitors),
      capacitorTolerance: shop['capacitor-tolerance'],
      instruments: {
        generatorOhm: shop.generator,
        couplingPf: shop['generator-coupling'] === 'loop' ? null : shop['generator-coupling'],
        probePf: shop['probe-capacitance'],
        probeOhm: shop['probe-resistance'],
        stated: INSTRUMENT_KEYS.some((key) => !Object.hasOwn(assumed, key)),
      },
    },
    asMade: { diameterMm: read['as-made']?.diameter ?? 0, pitch: read['as-made']?.pitch ?? 0 },
    parts: read.parts ?? null,
    source: { file, lines: Object.fromEntries(lines) },
    given: written,
    assumed: { ...assumed, ...assumedCoverings(read.wire ?? []) },
  };
}

function toWant(want: ReadJob['want'], twoSwitches: boolean): Want {
  if (want.band !== undefined) {
    return {
      kind: 'band',
      lowKhz: want.band.low,
      highKhz: want.band.high,
      overlap: want.overlap ?? 0,
      taps: want.taps ?? null,
    };
  }
  if (typeof want.spacing === 'object') return { kind: 'list', inductancesUh: want.spacing };
  if (want.inductance === undefined || 'list' in want.inductance) {
    return { kind: 'list', inductancesUh: want.inductance?.list ?? [] };
  }
  const { low, high } = want.inductance;
  const spacing = want.spacing ?? (twoSwitches ? 'even turns' : 'even ratio');
  return { kind: 'range', lowUh: low, highUh: high, taps: want.taps ?? 2, spacing };
}

function toDiameters(values: Values): Diameters {
  return 'list' in values ? { listMm: ascending(values.list) } : { lowMm: values.low, highMm: values.high };
}

const ascending = (list: readonly number[]): readonly number[] => [...new Set(list)].sort((a, b) => a - b);

function toWires(found: readonly FoundWire[]): readonly Wire[] {
  return [...new Map(found.map(({ wire }) => [wire.name, wire])).values()];
}

function assumedCoverings(found: readonly FoundWire[]): Record<string, string> {
  const assumed: Record<string, string> = {};
  found.forEach(({ wire, coveringAssumed }, index) => {
    if (coveringAssumed) assumed[found.length === 1 ? 'wire' : `wire[${index + 1}]`] = wire.name;
  });
  return assumed;
}

/** What was written, leaf by leaf; sections that hold nothing and the key for editors are left out. */
function given(data: unknown): Record<string, unknown> {
  const found: Record<string, unknown> = {};
  for (const [key, value] of Object.entries(isData(data) ? data : {})) {
    if (key === '$schema' || value === null) continue;
    if (!isData(value)) found[key] = value;
    else for (const [inner, leaf] of Object.entries(value)) found[`${key}.${inner}`] = leaf;
  }
  return found;
}
