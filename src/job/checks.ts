/** What must hold between keys of a job. Each check names both values. */
import { lengthText, percentText } from '../quantity/format.ts';
import { findMaterial } from '../stock/materials.ts';
import { checkAerial } from './around/aerial.ts';
import { checkSecond } from './around/second.ts';
import type { Values } from './field.ts';
import { type Finding, finding } from './finding.ts';
import type { ReadJob } from './schema.ts';
import { checkUnits, checkWant } from './want-checks.ts';

/** Sections that could be read. One that is there and could not be read is undefined; one that is not there is absent. */
export type Readable = Partial<ReadJob>;

export function crossCheck(job: Readable): readonly Finding[] {
  return [
    ...checkWant(job),
    ...checkFormer(job),
    ...checkWinding(job),
    ...checkNotches(job),
    ...checkUnits(job),
    ...checkPrinter(job),
    ...checkParts(job),
    ...checkAsMade(job),
    ...checkSecond(job),
    ...checkAerial(job),
  ];
}

const ends = (values: Values): readonly number[] => ('list' in values ? values.list : [values.low, values.high]);

function checkFormer({ former, printer }: Readable): Finding[] {
  if (former === undefined) return [];
  const found: Finding[] = [];
  const diameters = ends(former['outside-diameter']);
  const [least, most] = [Math.min(...diameters), Math.max(...diameters)];
  if (former.wall !== undefined && former.wall >= least / 2) {
    found.push(
      finding(
        'wall',
        ['former', 'wall'],
        `a wall of ${lengthText(former.wall)} at a diameter of ${lengthText(least)}`,
        `less than half the diameter, ${lengthText(least / 2)}`,
        'make the wall thinner or the former wider',
      ),
    );
  }
  const material = findMaterial(former.material);
  const use = former.kind === 'printed' ? 'print' : 'tube';
  if (material.ok && material.material.use !== use) {
    found.push(
      finding(
        'material',
        ['former', 'material'],
        `${former.material} for a former of kind ${former.kind}`,
        `a material for ${use === 'print' ? 'printing' : 'tubes'}`,
        'see: coilwright stock',
      ),
    );
  }
  if (former.kind === 'tube') {
    if (former.mounting !== 'none') found.push(onTube('mounting', former.mounting === 'base' ? 'a base' : 'ears'));
    if (former.body === 'ribbed') found.push(onTube('body', 'ribs'));
    if (former.flanges) found.push(onTube('flanges', 'flanges'));
    for (const key of ['ribs', 'screw', 'screw-circle'] as const)
      if (former[key] !== undefined) found.push(onTube(key, key === 'ribs' ? 'ribs' : 'mounting screws'));
    return found;
  }
  if (former.ribs !== undefined && former.body !== 'ribbed')
    found.push(notUsed('ribs', 'ribs', 'a former with body: full', 'take body: ribbed'));
  if (former.mounting === 'none')
    for (const key of ['screw', 'screw-circle'] as const)
      if (former[key] !== undefined)
        found.push(notUsed(key, 'mounting screws', 'a former with mounting: none', 'take mounting: ears or base'));
  if (printer === undefined) return found;
  const bed = Math.min(printer.bed.x, printer.bed.y);
  if (most >= bed) {
    found.push(
      finding(
        'wider-than-bed',
        ['former', 'outside-diameter'],
        `a printed former ${lengthText(most)} wide on a bed of ${lengthText(printer.bed.x)} x ${lengthText(printer.bed.y)}`,
        'less than the shorter side of printer.bed',
        'choose a smaller diameter, or state printer.bed',
      ),
    );
  }
  return found;
}

function notUsed(key: string, what: string, where: string, instead: string): Finding {
  return finding(
    'not-used',
    ['former', key],
    `${what} for ${where}`,
    'keys that belong to it',
    `remove former.${key}, or ${instead}`,
  );
}

function onTube(key: string, what: string): Finding {
  return finding(
    'on-a-tube',
    ['former', key],
    `${what} on a tube that is bought`,
    'a plain tube',
    `remove former.${key}, or take kind: printed`,
  );
}

function checkWinding({ winding }: Readable): Finding[] {
  if (winding?.spacers === undefined || winding.pitch !== 'close') return [];
  return [
    finding(
      'spacers',
      ['winding', 'spacers'],
      'spacers for a winding with pitch: close',
      'spacers for a spaced winding only',
      'remove spacers, or take pitch: spaced',
    ),
  ];
}

/** The notches of ribs space the turns, whole layers apart. */
function checkNotches({ former, winding }: Readable): Finding[] {
  if (former?.kind !== 'printed' || former.body !== 'ribbed' || winding === undefined) return [];
  const found: Finding[] = [];
  const add = (key: 'pitch' | 'spacers', got: string, todo: string) =>
    found.push(finding('notches', ['winding', key], got, 'turns that lie in the notches of the ribs', todo));
  if (winding.pitch === 'close')
    add('pitch', 'pitch: close on a former with body: ribbed', 'take pitch: any, or body: full');
  if (winding.spacers !== undefined)
    add('spacers', 'spacers for a former with body: ribbed', 'remove winding.spacers, or take body: full');
  return found;
}

function checkPrinter({ printer }: Readable): Finding[] {
  if (printer === undefined) return [];
  const found: Finding[] = [];
  const material = findMaterial(printer.material);
  if (material.ok && material.material.use !== 'print')
    found.push(
      finding(
        'material',
        ['printer', 'material'],
        `${printer.material} for a printer`,
        'a material for printing',
        'see: coilwright stock',
      ),
    );
  const { layer, line, nozzle } = printer;
  if (layer > nozzle) {
    found.push(
      finding(
        'layer',
        ['printer', 'layer'],
        `a layer of ${lengthText(layer)} from a nozzle of ${lengthText(nozzle)}`,
        'a layer no higher than the nozzle is wide',
        'lower printer.layer, or state printer.nozzle',
      ),
    );
  }
  if (line < nozzle / 2 || line > nozzle * 2) {
    found.push(
      finding(
        'line',
        ['printer', 'line'],
        `a line of ${lengthText(line)} from a nozzle of ${lengthText(nozzle)}`,
        'between half and twice the nozzle',
        'mend printer.line, or state printer.nozzle',
      ),
    );
  }
  return found;
}

/** Farther off than these no bench makes coils that a plan should follow: shares of the diameter and of the pitch. */
const MOST_OF_DIAMETER = 0.05;
const MOST_OF_PITCH = 0.1;

/** How coils come out: within what a bench may be off, and of a pitch that a hand lays. */
function checkAsMade({ 'as-made': made, former, winding }: Readable): Finding[] {
  if (made === undefined) return [];
  const found: Finding[] = [];
  const least = former === undefined ? null : Math.min(...ends(former['outside-diameter']));
  const most = MOST_OF_DIAMETER * (least ?? Number.POSITIVE_INFINITY);
  if (least !== null && Math.abs(made.diameter) > most)
    found.push(
      finding(
        'as-made',
        ['as-made', 'diameter'],
        `a diameter that comes out ${lengthText(made.diameter, 3)} off on a former of ${lengthText(least)}`,
        `at most ${percentText(MOST_OF_DIAMETER)} of the former, ${lengthText(most)} either way`,
        'check the sign and the number; measure the former, and state former.outside-diameter as it is',
      ),
    );
  if (Math.abs(made.pitch) > MOST_OF_PITCH)
    found.push(
      finding(
        'as-made',
        ['as-made', 'pitch'],
        `a pitch that comes out ${percentText(made.pitch)} off`,
        `at most ${percentText(MOST_OF_PITCH)} either way`,
        'check the sign and the number; a pitch that is another one is stated as winding.pitch',
      ),
    );
  if (made.pitch !== 0 && former?.kind === 'printed' && former.body === 'ribbed' && winding !== undefined)
    found.push(
      finding(
        'as-made',
        ['as-made', 'pitch'],
        'a pitch as it comes out for notches that are printed',
        'as-made.pitch for turns that are laid by hand',
        `remove as-made.pitch, and mend the z of printer.scale: ${percentText(1 / (1 + made.pitch))} of what it is`,
      ),
    );
  return found;
}

/** Parts that the former has no use for. */
function checkParts({ parts, former }: Readable): Finding[] {
  if (parts === undefined || former === undefined) return [];
  const out = former.kind === 'printed' ? 'saddle' : 'former';
  const at = parts.indexOf(out);
  if (at < 0) return [];
  const why =
    out === 'saddle' ? 'a printed former, whose holes come with it' : 'a former of kind tube, which is bought';
  return [
    finding(
      'part-not-used',
      ['parts', at],
      `${out} for ${why}`,
      'parts that suit the former',
      `take ${out} out, or former.kind: ${former.kind === 'printed' ? 'tube' : 'printed'}`,
    ),
  ];
}
