/** The second winding that a job asks for: as planned with, and what must hold between its keys. */
import { lengthText } from '../../quantity/format.ts';
import type { Wire } from '../../stock/wire.ts';
import type { Readable } from '../checks.ts';
import { type Finding, finding } from '../finding.ts';
import type { ReadJob } from '../schema.ts';

export interface JobSecond {
  readonly kind: 'same former' | 'sleeve' | 'inner' | 'beside';
  /** With the whole coil; equal for a winding that stays where it is. Null: turns are given and it lies as tight as it can. */
  readonly coupling: { readonly lowest: number; readonly highest: number } | null;
  readonly turns: number | null;
  readonly inductanceUh: number | null;
  /** Null: that of the main winding. */
  readonly wire: Wire | null;
  /** A number is a pitch in mm. */
  readonly pitch: 'close' | number;
  readonly end: 'start' | 'finish';
  /** Edge to edge; null: whatever the coupling takes, else the least. */
  readonly distanceMm: number | null;
}

type ReadSecond = NonNullable<ReadJob['second']>;

export function toSecond(read: ReadSecond | undefined): JobSecond | null {
  if (read === undefined) return null;
  const { kind, coupling, turns, inductance, wire, pitch, end, distance } = read;
  return {
    kind,
    coupling: coupling === undefined ? null : { lowest: coupling.low, highest: coupling.high },
    turns: turns ?? null,
    inductanceUh: inductance ?? null,
    wire: wire?.wire ?? null,
    pitch,
    end,
    distanceMm: distance ?? null,
  };
}

/** Whether it slides. */
export const slides = ({ coupling }: JobSecond): boolean => coupling !== null && coupling.lowest < coupling.highest;

export function checkSecond({ second, former }: Readable): Finding[] {
  if (second === undefined) return [];
  const found: Finding[] = [];
  const add = (key: keyof ReadSecond | null, code: string, got: string, expected: string, todo: string) =>
    found.push(finding(code, key === null ? ['second'] : ['second', key], got, expected, todo));
  const { kind, coupling, turns, inductance, wire, pitch, distance } = second;
  if (coupling === undefined && turns === undefined && inductance === undefined)
    add(
      null,
      'no-second',
      'neither a coupling nor turns nor an inductance',
      'what the second winding is to be',
      'add coupling: 0.2, or turns, or inductance',
    );
  if (turns !== undefined && inductance !== undefined)
    add(
      'inductance',
      'second-twice',
      `both ${turns} turns and an inductance`,
      'one of the two: the other follows',
      'remove second.turns or second.inductance',
    );
  const sliding = coupling !== undefined && coupling.low < coupling.high;
  if (sliding && kind === 'same former')
    add(
      'coupling',
      'second-fixed',
      `a range of coupling, ${coupling.low} to ${coupling.high}, on the former of the main winding`,
      'one coupling for a winding that cannot slide',
      'write one coupling, or take kind: sleeve, inner or beside',
    );
  if (distance !== undefined && (kind === 'sleeve' || kind === 'inner'))
    add(
      'distance',
      'not-used',
      `a distance for kind: ${kind}`,
      'distance with kind: same former or beside',
      'remove second.distance: the coupling says how far it lies in',
    );
  else if (distance !== undefined && sliding)
    add(
      'distance',
      'second-twice',
      `a distance of ${lengthText(distance)} and a range of coupling`,
      'one of the two: couplings follow from distances',
      'remove second.distance',
    );
  else if (distance !== undefined && coupling !== undefined && (turns ?? inductance) !== undefined)
    add(
      'distance',
      'second-twice',
      `a distance of ${lengthText(distance)}, a coupling and ${turns === undefined ? 'an inductance' : 'turns'}`,
      'two of the three: the third follows',
      `remove second.distance, second.coupling or second.${turns === undefined ? 'inductance' : 'turns'}`,
    );
  if (kind === 'same former' && former?.body === 'ribbed')
    add(
      'kind',
      'second-on-ribs',
      'a second winding on a former with body: ribbed',
      'a wall to wind on: ribs have notches for the main winding only',
      'take kind: sleeve, inner or beside, or former.body: full',
    );
  if (wire?.wire.covering === 'bare' && pitch === 'close')
    add(
      'wire',
      'second-bare',
      `${wire.wire.name} wound close`,
      'a covered wire, or turns that do not touch',
      'take a covered wire, or state second.pitch',
    );
  if (wire !== undefined && typeof pitch === 'number' && pitch < wire.wire.overallMm)
    add(
      'pitch',
      'second-pitch',
      `a pitch of ${lengthText(pitch, 3)} for wire ${lengthText(wire.wire.overallMm, 3)} thick`,
      `${lengthText(wire.wire.overallMm, 3)} or more`,
      'widen second.pitch, or take a thinner wire',
    );
  return found;
}
