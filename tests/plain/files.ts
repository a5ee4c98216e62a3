/** What the files of an output folder say, read back from their bytes and held against the record. */
import { createHash } from 'node:crypto';
import type { OutputFile } from '../../src/record/listing.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { readDxf } from '../helpers/dxf.ts';
import { readPdf } from '../helpers/pdf.ts';
import { boxOf, type Facet, facetsOf, radialHole, surfaceOf, volumeOf } from '../helpers/stl.ts';
import type { Claims } from './claims.ts';
import type { PlainCoil } from './coil.ts';
import { ofUh } from './winding.ts';

/** Below what a printer, a drill or a pair of scissors can place; float32 keeps 1e-5 mm. */
const PLACE_MM = 0.02;
/** Of the sheet of a template, half of which adds to its radius. */
const PAPER_MM = 0.1;

interface Circle {
  readonly x: number;
  readonly y: number;
  readonly r: number;
}

export async function fileClaims(
  claims: Claims,
  record: CoilRecord,
  files: readonly OutputFile[],
  coil: PlainCoil,
): Promise<void> {
  const of = (path: string) => files.find((file) => file.path === path);
  const text = (path: string) => {
    const file = of(path);
    return file === undefined ? null : new TextDecoder().decode(file.bytes);
  };
  const fault = (ok: boolean, what: string) => {
    claims.count++;
    if (!ok) claims.faults.push(what);
  };
  for (const { path, sha256 } of record.files) {
    const file = of(path);
    fault(
      file !== undefined && createHash('sha256').update(file.bytes).digest('hex') === sha256,
      `${path}: another file than the record lists`,
    );
  }
  fault(files.length === record.files.length + 1, `${files.length} files, ${record.files.length} listed`);
  fault(JSON.stringify(JSON.parse(text('plan.json')!)) === JSON.stringify(record), 'plan.json is not the record');
  const page = /<script type="application\/json" id="record">(.*?)<\/script>/s.exec(text('bench-page.html')!);
  fault(
    page !== null && JSON.stringify(JSON.parse(page[1]!)) === JSON.stringify({ ...record, files: [] }),
    'bench-page.html carries another record',
  );

  const wall = record.former.ribs === null;
  fault((of('wrap-template.pdf') !== undefined) === wall, 'a template for what can be wrapped alone');
  if (wall) {
    const at = Math.PI * record.former.outsideDiameterMm;
    surfaceClaims(claims, record, svgCircles(text('hole-pattern.svg')!), at, 'hole-pattern.svg');
    surfaceClaims(claims, record, dxfCircles(text('hole-pattern.dxf')!), at, 'hole-pattern.dxf');
    const { pages } = await readPdf(of('wrap-template.pdf')!.bytes);
    // On more than one page a hole may stand twice, in the overlap: only single sheets are held circle by circle.
    if (pages.length === 1 && !record.around?.second)
      surfaceClaims(claims, record, pages[0]!.circles, at + Math.PI * PAPER_MM, 'wrap-template.pdf');
  }
  stlClaims(claims, record, files);
  netlistClaims(claims, record, text('coil.cir')!, coil);
}

function svgCircles(svg: string): Circle[] {
  const attribute = (tag: string, name: string) => Number(new RegExp(` ${name}="([-\\d.]+)"`).exec(tag)![1]);
  return [...svg.matchAll(/<circle [^>]*>/g)].map(([tag]) => ({
    x: attribute(tag, 'cx'),
    y: -attribute(tag, 'cy'),
    r: attribute(tag, 'r'),
  }));
}

function dxfCircles(dxf: string): Circle[] {
  const number = (pairs: readonly (readonly [number, string])[], code: number) =>
    Number(pairs.find(([each]) => each === code)![1]);
  return readDxf(dxf)
    .entities.filter(({ type }) => type === 'CIRCLE')
    .map(({ pairs }) => ({ x: number(pairs, 10), y: number(pairs, 20), r: number(pairs, 40) }));
}

/** Every circle is a hole and every hole a circle, after one shift of all, whole turns round the former aside. */
function surfaceClaims(
  claims: Claims,
  record: CoilRecord,
  circles: readonly Circle[],
  round: number,
  file: string,
): void {
  const wanted = record.holes.map((hole) => ({
    x: (hole.angleDeg / 360) * round,
    y: hole.axialMm,
    r: hole.diameterMm / 2,
  }));
  const start = wanted[record.holes.findIndex(({ purpose }) => purpose === 'start')]!;
  const missed = circles.map((origin) => {
    const fits = (circle: Circle, hole: Circle) => {
      const off = circle.x - origin.x - (hole.x - start.x);
      const across = Math.abs(off - Math.round(off / round) * round);
      return (
        across < PLACE_MM &&
        Math.abs(circle.y - origin.y - (hole.y - start.y)) < PLACE_MM &&
        Math.abs(circle.r - hole.r) < PLACE_MM / 2
      );
    };
    return (
      wanted.filter((hole) => !circles.some((circle) => fits(circle, hole))).length +
      circles.filter((circle) => !wanted.some((hole) => fits(circle, hole))).length
    );
  });
  const strays = Math.min(Number.POSITIVE_INFINITY, ...missed);
  claims.holds(
    'holes[].angleDeg',
    strays === 0,
    `${file}: ${strays} of ${wanted.length} holes and ${circles.length} circles without the other`,
  );
}

function stlClaims(claims: Claims, record: CoilRecord, files: readonly OutputFile[]): void {
  const { scale } = record.printer;
  for (const part of record.parts) {
    const file = files.find(({ path }) => path === part.path);
    if (file === undefined) {
      claims.faults.push(`${part.path} is missing`);
      continue;
    }
    // Back to the size as it should come out.
    const facets = facetsOf(file.bytes).map(
      ({ corners, normal, area }): Facet => ({
        corners: corners.map((corner) => corner.map((x, i) => x / scale[i]!)) as unknown as Facet['corners'],
        normal,
        area,
      }),
    );
    const about = ` of ${part.path}`;
    const box = boxOf(facets);
    part.sizeMm.forEach((mm, i) => {
      claims.near('parts[].sizeMm[]', mm, box.max[i]! - box.min[i]!, 0.021, about);
    });
    // Formulas leave out where strokes and holes cross; of small parts the last cubic millimetre is rounded.
    const volume = volumeOf(facets);
    claims.near('parts[].volumeMm3', part.volumeMm3, volume, 0.0051 * volume + 0.5, about);
    const { faultySides } = surfaceOf(facets);
    claims.holds('parts[].volumeMm3', faultySides === 0, `${faultySides} sides without one opposite${about}`);
    const former = record.former;
    if (part.kind !== 'former' || former.joints.length > 0) continue;
    claims.near('former.lengthMm', former.lengthMm, box.max[2] - box.min[2], 0.021, about);
    const even = scale.every((s) => s === scale[0]);
    for (const hole of record.holes) {
      if (hole.purpose === 'mount' || !even) continue;
      const wide = hole.diameterMm + record.printer.holeCompensationMm;
      const fit = radialHole(facets, hole.angleDeg, hole.axialMm, wide);
      const off = Math.hypot(fit.acrossMm, fit.alongMm, fit.diameterMm - wide);
      claims.holds(
        'holes[].axialMm',
        off < PLACE_MM && fit.walls >= 8,
        `hole ${hole.label}: ${off} mm off, ${fit.walls} walls${about}`,
      );
    }
  }
}

function netlistClaims(claims: Claims, record: CoilRecord, text: string, coil: PlainCoil): void {
  const w = record.windings[0]!;
  const cards = text.split('\n').filter((line) => line !== '' && !line.startsWith('*'));
  const param = (name: string) => Number(new RegExp(`^\\.param ${name}=(\\S+)`, 'm').exec(text)?.[1]);
  const fault = (ok: boolean, what: string) => {
    claims.count++;
    if (!ok) claims.faults.push(`coil.cir: ${what}`);
  };
  const set = record.demand.set;
  const near = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.abs(b);
  if (set !== null) {
    fault(near(param('ccap'), set.capacitorHighPf * 1e-12), `ccap ${param('ccap')}`);
    fault(near(param('cstray'), set.strayPf * 1e-12), `cstray ${param('cstray')}`);
    fault(near(param('caerial'), set.aerialPf * 1e-12), `caerial ${param('caerial')}`);
  }
  fault(near(param('clead'), record.surroundings.leadPf * 1e-12), `clead ${param('clead')}`);
  fault(param('shrink') > 0.7 && param('shrink') <= 1.004, `shrink ${param('shrink')}`);
  const turnOf = (name: string): number => {
    if (name === '0' || name === 's') return 0;
    if (name === 'f') return w.turns;
    const number = Number(name.slice(1).replace(/d$/, ''));
    if (name.startsWith('t')) return w.taps[number - 1]!.turn;
    return name.startsWith('n') ? w.unitTaps![number - 1]!.turn : number;
  };
  const own: number[] = [];
  const nodes = [0];
  const ohms: number[] = [];
  const couplings = new Map<string, number>();
  for (const card of cards) {
    const [name = '', a = '', b = '', value = ''] = card.split(' ');
    if (/^L\d+$/.test(name)) own.push(Number(/\{shrink\*(\S+)\}/.exec(value)![1]));
    if (/^R\d+$/.test(name)) {
      nodes.push(turnOf(b));
      ohms.push(Number(value));
    }
    if (name.startsWith('K')) couplings.set(`${a.slice(1)} ${b.slice(1)}`, Number(value));
  }
  fault(own.length === nodes.length - 1 && nodes.every((node, i) => i === 0 || node > nodes[i - 1]!), `nodes ${nodes}`);
  if (own.length !== nodes.length - 1) return;
  const matrix = coil.matrix(nodes);
  let worst = 0;
  for (let s = 0; s < own.length; s++)
    for (let t = s; t < own.length; t++) {
      const mutual =
        s === t ? own[s]! : (couplings.get(`${s + 1} ${t + 1}`) ?? Number.NaN) * Math.sqrt(own[s]! * own[t]!);
      worst = Math.max(
        worst,
        Math.abs(mutual - matrix[s]![t]!) / Math.sqrt(matrix[s]![s]! * matrix[t]![t]!) ||
          (Number.isNaN(mutual) ? 1 : 0),
      );
    }
  // Pieces of turns are taken in two ways.
  fault(worst < 0.012 + ofUh(w.corners), `an inductance or coupling is ${worst} off`);
  const sum = own.reduce(
    (all, one, s) =>
      all +
      one +
      own
        .slice(s + 1)
        .reduce(
          (more, other, k) => more + 2 * (couplings.get(`${s + 1} ${s + k + 2}`) ?? 0) * Math.sqrt(one * other),
          0,
        ),
    0,
  );
  const uh = w.inductanceUh;
  fault(Math.abs(sum * 1e6 - uh) < 0.006 * uh, `${sum * 1e6} uH in all, ${uh} in the record`);
  const position = Math.ceil(w.taps.length / 2);
  const tap = w.taps[position - 1]!;
  const used = ohms.reduce((all, ohm, s) => (nodes[s + 1]! <= tap.turn + 1e-6 ? all + ohm : all), 0);
  // With turns shorted what their loops lose is shared out to those in use; the former stands apart.
  fault(
    used <= tap.working.resistanceOhm * 1.01 && used > 0,
    `${used} ohm in use, ${tap.working.resistanceOhm} at work`,
  );
}
