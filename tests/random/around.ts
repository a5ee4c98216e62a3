/** One set around a coil to its netlists in a general circuit simulator: positions, contacts and frequencies of its table. */
import { readFileSync } from 'node:fs';
import { basename } from 'node:path';
import type { Contact } from '../../src/around/response.ts';
import { Fault } from '../../src/fault.ts';
import { readJob } from '../../src/job/read.ts';
import { makeRecord } from '../../src/record/make.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { search } from '../../src/solve/search.ts';
import { withSecond } from '../../src/solve/second.ts';
import { faultsOf, type Look, type LookOutcome, lookAt } from '../outside/set-sweep.ts';
import { aroundJob } from './around-jobs.ts';
import { chance } from './jobs.ts';

export interface AroundOutcome {
  readonly seed: number;
  readonly result: 'made' | 'refused' | 'failed';
  readonly said: readonly string[];
  /** Kinds of switch, second winding and aerial. */
  readonly kinds: readonly string[];
  readonly looks: readonly LookOutcome[];
}

const SET = '\nset: { capacitor: 15 pF to 380 pF, stray: 12 pF, switch: open }\n';
const AERIAL = '\naerial: { kind: horizontal wire, length: 20 m, height: 8 m, series: 100 pF }\n';
const DETECTOR = '\ndetector: { kind: galena crystal }\n';

/** A starter with everything around it that it has not; one whose set has the capacitance of an aerial keeps that. */
function starterText(path: string): string {
  const text = readFileSync(path, 'utf8');
  const lacks = (key: RegExp, what: string) => (key.test(text) ? '' : what);
  return text + lacks(/^set:/m, SET) + lacks(/^( {2})?aerial:/m, AERIAL) + lacks(/^detector:/m, DETECTOR);
}

const lookOf = (
  aerial: Contact | null,
  detector: Contact,
  { kHz, tap, bandwidthKhz }: { kHz: number; tap: number; bandwidthKhz: number },
): Look => ({ position: tap, kHz, aerial: aerial ?? 'hot', detector, bandwidthKhz });

/** Every row of the pairs that the sheet names; for a random set (`pick`) three rows of any pair, and one look that has no row. */
function looksOf({ around, windings }: CoilRecord, pick: (<T>(list: readonly T[]) => T) | null): Look[] {
  const { pairs, best, channelsKhz } = around!;
  const all = pairs.flatMap(({ aerial, detector, rows }) => rows.map((row) => lookOf(aerial, detector, row)));
  if (pick === null) {
    const named = new Set(best.map(({ aerial, detector }) => `${aerial ?? 'hot'} ${detector}`));
    return all.filter(({ aerial, detector }) => named.has(`${aerial} ${detector}`));
  }
  if (all.length === 0) return [];
  const { aerial, detector } = pick(pairs);
  const position = pick(windings[0]!.taps).tap;
  const other = { position, kHz: pick(channelsKhz), aerial: aerial ?? 'hot', detector, bandwidthKhz: null } as const;
  return [pick(all), pick(all), pick(all), other];
}

/** Of a starter where `path` names one, else of a random job. Never throws. */
export function aroundOutcome(seed: number, path: string | null = null): AroundOutcome {
  const none = { seed, kinds: [], looks: [] };
  try {
    const job = readJob(path === null ? aroundJob(seed) : starterText(path), path ?? `set ${seed}`);
    const found = search(job);
    if (!('chosen' in found)) return { ...none, result: 'refused', said: ['nothing-fits'] };
    const record = makeRecord(job, withSecond(job, found), '0.0.0');
    const random = chance(seed + 99);
    const pick = <T>(list: readonly T[]): T => list[Math.floor(random() * list.length)]!;
    const looks = looksOf(record, path === null ? pick : null);
    const looked = looks.map((look) => ({ look, found: lookAt(record, look) }));
    const seen = looked.flatMap((one) => (one.found === null ? [] : [one.found]));
    if (seen.length === 0) return { ...none, result: 'refused', said: ['nothing-tuned'] };
    const said = looked.flatMap(({ look, found }) => {
      if (found !== null) return faultsOf(look, found);
      return look.bandwidthKhz === null ? [] : [`a row that cannot be tuned: ${JSON.stringify(look)}`];
    });
    const { second, aerial } = record.around!;
    const { rest } = record.surroundings;
    const kinds = [
      `switch ${rest}`,
      `second ${second?.kind ?? 'none'}`,
      `aerial ${aerial?.kind ?? 'none'}`,
      `${record.frame.earthedEnd} earthed`,
    ];
    if (path !== null) kinds.push(basename(path));
    return { seed, result: said.length === 0 ? 'made' : 'failed', said, kinds, looks: seen };
  } catch (error) {
    if (error instanceof Fault && (error.exit === 2 || error.exit === 3 || error.exit === 4))
      return { ...none, result: 'refused', said: error.faults.map(({ code }) => code) };
    const said = error instanceof Error ? (error.stack ?? error.message) : String(error);
    return { ...none, result: 'failed', said: [said] };
  }
}
