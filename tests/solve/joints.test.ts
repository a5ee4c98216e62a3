import * as fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Fault } from '../../src/fault.ts';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord, Former } from '../../src/record/schema.ts';
import { jobOf, type Parts, RANGE } from '../helpers/jobs.ts';
import { axialOf, type Long, longCoils, longRecord, splitFor } from '../helpers/joints.ts';
import { sampleRecord } from '../helpers/sample.ts';

type Joint = Former['joints'][number];

/** Z of a seam at a radius and an angle, from the record alone: midway between the wires there, falling inwards as steeply as it is deep. */
function seamAt(record: CoilRecord, joint: Joint, angleDeg: number, rMm: number): number {
  const inwards = record.former.outsideDiameterMm / 2 - rMm;
  if (joint.turn === null) return joint.seamMm - inwards;
  const axial = axialOf(record);
  const way = record.frame.hand === 'right' ? 1 : -1;
  const on = ((((way * (angleDeg - joint.keyDeg)) / 360) % 1) + 1) % 1;
  const turn = joint.turn + on;
  return (axial(turn) + axial(turn + 1)) / 2 - inwards;
}

/** Heights of the sections as they stand on the bed. */
function heights({ former }: CoilRecord, joints: readonly Joint[]): number[] {
  const wall = (former.outsideDiameterMm - former.boreDiameterMm) / 2;
  const feet = [0, ...joints.map((joint) => joint.seamMm - wall - joint.spigotMm)];
  const tops = [...joints.map((joint) => joint.seamMm + joint.climbMm), former.lengthMm];
  return feet.map((foot, i) => tops[i]! - foot);
}

/** Least distance from a seam to the axis of a hole, less its radius; brute force over the seam. */
function nearestHole(record: CoilRecord, joint: Joint): number {
  const { outsideDiameterMm: outside, boreDiameterMm: bore } = record.former;
  let least = Number.POSITIVE_INFINITY;
  for (const hole of record.holes)
    for (let deg = hole.angleDeg - 12; deg <= hole.angleDeg + 12; deg += 0.5)
      for (let k = 0; k <= 6; k++) {
        const r = bore / 2 + ((outside - bore) / 2) * (k / 6);
        const across = r * Math.sin(((deg - hole.angleDeg) * Math.PI) / 180);
        const along = seamAt(record, joint, deg, r) - hole.axialMm;
        least = Math.min(least, Math.hypot(across, along) - hole.diameterMm / 2);
      }
  return least;
}

const long = (parts: Parts, height: string, longest: string): Parts => ({
  ...parts,
  former: { ...parts.former, longest },
  printer: { height },
});

describe('where a former is split', () => {
  it('every section fits the printer, every seam keeps two lines from every hole and half a pitch from every turn', () => {
    let split = 0;
    let none = 0;
    let bored = 0;
    fc.assert(
      fc.property(longCoils, (coil: Long) => {
        const record = longRecord(coil);
        const height = Math.max(45, coil.share * record.former.lengthMm);
        const found = splitFor(record, height);
        if ('none' in found) {
          none++;
          return;
        }
        split++;
        const { joints } = found;
        const tall = heights(record, joints);
        expect(tall).toHaveLength(joints.length + 1);
        expect(Math.max(...tall)).toBeLessThanOrEqual(height + 1e-6);
        // No fewer sections could be as tall as the former.
        expect(joints.length).toBeGreaterThanOrEqual(Math.ceil(record.former.lengthMm / height - 1e-9) - 1);
        for (const joint of joints) {
          // 0.02 mm for the seam's slope over the width of a hole.
          expect(nearestHole(record, joint)).toBeGreaterThan(2 * record.printer.lineMm - 0.02);
          expect(joint.glueGapMm).toBeCloseTo(record.printer.clearanceMm / 2, 6);
          expect(joint.spigotMm).toBeGreaterThanOrEqual(8);
          // The key stands between two columns of the mesh.
          const chord = (joint.keyDeg * record.former.segments) / 360;
          expect(Math.abs(chord - Math.round(chord))).toBeLessThan(1e-3);
          const wall = (record.former.outsideDiameterMm - record.former.boreDiameterMm) / 2;
          const foot = joint.seamMm - wall - joint.spigotMm;
          if (record.holes.some(({ axialMm }) => axialMm > foot && axialMm < joint.seamMm - wall)) bored++;
          if (joint.turn === null) continue;
          const axial = axialOf(record);
          expect(joint.climbMm).toBeCloseTo((axial(joint.turn + 2) - axial(joint.turn)) / 2, 3);
          for (let share = 0; share < 1; share += 0.01) {
            const way = record.frame.hand === 'right' ? 360 : -360;
            const z = seamAt(record, joint, joint.keyDeg + way * share, record.former.outsideDiameterMm / 2);
            const turn = joint.turn + share;
            const half = (axial(turn + 1) - axial(turn)) / 2;
            expect(Math.min(z - axial(turn), axial(turn + 1) - z)).toBeGreaterThan(half - 1e-3);
          }
        }
      }),
      { seed: 11, numRuns: 120 },
    );
    console.log(`joints: ${split} coils split, ${none} found no seam, ${bored} spigots with holes through them`);
    expect(Math.min(split - none, bored)).toBeGreaterThan(0);
  });

  it('nothing is split that the printer takes whole', () => {
    const record = sampleRecord();
    expect(splitFor(record, record.former.lengthMm)).toEqual({ joints: [] });
    expect(splitFor({ ...record, former: { ...record.former, kind: 'tube' } }, 30)).toEqual({ joints: [] });
  });

  it('outside the winding the seam is flat', () => {
    const record = sampleRecord({ turns: [20.5], ears: false });
    const tall = { ...record, former: { ...record.former, lengthMm: 100 } };
    const found = splitFor(tall, 80);
    expect(found).toMatchObject({ joints: [{ turn: null, climbMm: 0 }] });
  });

  it('says why there is none', () => {
    const record = sampleRecord();
    const { former } = record;
    const reason = (changed: CoilRecord, heightMm = 60) => {
      const found = splitFor(changed, heightMm);
      return 'none' in found ? found.none : 'split';
    };
    expect(reason({ ...record, former: { ...former, body: 'ribbed' } })).toContain('ribbed');
    expect(reason({ ...record, former: { ...former, outsideDiameterMm: 9, boreDiameterMm: 4.6 } })).toContain('4.6 mm');
    expect(reason(record, 12)).toContain('more than 6 sections');
    expect(reason(record, 20)).toContain('low enough');
    const everywhere = Array.from({ length: 60 }, (_, i) => ({
      ...record.holes[2]!,
      angleDeg: 0,
      axialMm: 12 + 1.2 * i,
    }));
    expect(reason({ ...record, holes: [...record.holes, ...everywhere] })).toContain('clear of the holes');
  });
});

describe('a job longer than its printer', () => {
  const asked = { ...RANGE, former: { 'outside-diameter': '76 mm' }, winding: { pitch: '1.2 mm' } };

  it('is planned in sections; nothing but the former differs', () => {
    const whole = recordOf(jobOf(long(asked, '250 mm', '150 mm')), '0');
    const split = recordOf(jobOf(long(asked, '70 mm', '150 mm')), '0');
    expect(whole.former.joints).toEqual([]);
    expect(split.former.joints.length).toBeGreaterThan(0);
    expect(split.windings).toEqual(whole.windings);
    expect({ ...split.former, joints: [] }).toEqual(whole.former);
    const formers = split.parts.filter(({ kind }) => kind === 'former');
    expect(formers.map(({ part }) => part)).toEqual(
      split.former.joints.map((_, i) => `former-${i + 1}`).concat(`former-${formers.length}`),
    );
    for (const { sizeMm } of formers) expect(sizeMm[2]!).toBeLessThanOrEqual(70);
    const [glue] = split.steps;
    expect(glue!.text).toContain(`${split.former.joints[0]!.glueGapMm} mm`);
    expect(glue!.text).toContain(`${split.former.lengthMm.toFixed(1)} mm`);
    expect(whole.steps.some(({ text }) => text === glue!.text)).toBe(false);
    expect(split.warnings.map(({ code }) => code)).toContain('former-in-sections');
  });

  it('is not split unasked', () => {
    const fault = (() => {
      try {
        return recordOf(jobOf({ ...asked, printer: { height: '70 mm' } }), '0').former.lengthMm;
      } catch (error) {
        if (!(error instanceof Fault)) throw error;
        return error.faults[0]!;
      }
    })();
    expect(fault).toMatchObject({ code: 'nothing-fits', place: { key: 'printer.height' } });
    const todo = (fault as Fault['faults'][number]).todo;
    expect(todo).toMatch(/raise former\.longest to [\d.]+ mm \([^)]*printed in \d sections\)/);
    expect(todo).toMatch(/raise printer\.height to/);
  });
});
