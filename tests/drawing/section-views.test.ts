/** The views of a former's sections against the solids that are printed, and against the arithmetic of seams. */
import * as fc from 'fast-check';
import { expect, test } from 'vitest';
import { formerViews } from '../../src/drawing/parts/former-views.ts';
import type { View } from '../../src/drawing/views.ts';
import { jointDimensions } from '../../src/parts/joint-dimensions.ts';
import { partsOf } from '../../src/parts/parts.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { longCoils, longRecord, splitFor } from '../helpers/joints.ts';

/** Coils that are too long for the printer and can be put together; others are left to the tests of splitting. */
function splitOrNull(record: CoilRecord, heightMm: number): CoilRecord | null {
  const split = splitFor(record, heightMm);
  if ('none' in split || split.joints.length === 0) return null;
  return { ...record, former: { ...record.former, joints: split.joints }, wanted: ['former'] };
}

/** A solid's columns stand half a chord beside those drawn: so much a climbing seam differs, and the sag of a chord of it. */
const SEAM_MM = 0.06;
const heights = (points: readonly (readonly [number, number])[]) => points.map(([, z]) => z);

test('every section is drawn as it is printed, each hole on one of them, no size off', () => {
  let drawn = 0;
  let holes = 0;
  let spans = 0;
  fc.assert(
    fc.property(longCoils, (coil) => {
      const long = longRecord(coil);
      const record = splitOrNull(long, coil.share * long.former.lengthMm);
      if (record === null) return;
      const views = formerViews(record);
      const joints = jointDimensions(record);
      const solids = partsOf(record).filter(({ kind }) => kind === 'former');
      expect(Object.keys(views)).toEqual(solids.map(({ part }) => part));
      const seen: string[] = [];
      solids.forEach(({ part, expected }, i) => {
        const [outside, end, flat, cut] = views[part] as [View, View, View, View];
        expect([outside, end, flat, cut].map(({ title }) => title)).toEqual([
          'elevation',
          'end view',
          'developed surface',
          'section',
        ]);
        const outline = outside.shapes[0]!;
        if (outline.shape !== 'polyline') throw new Error('no outline');
        const low = joints[i - 1]?.endMm ?? 0;
        expect(Math.min(...heights(outline.points))).toBeCloseTo(low, 6);
        // Half the seam is seen in front: its top may lie behind, by a step at most.
        const top = Math.max(...heights(outline.points)) - low;
        expect(top).toBeLessThanOrEqual(expected.maxMm[2] + SEAM_MM);
        expect(top).toBeGreaterThan(expected.maxMm[2] - (joints[i]?.climbMm ?? 0) - SEAM_MM);
        expect(outside.dimensions.some(({ kind, text }) => kind === 'span' && near(text, expected.maxMm[2]))).toBe(
          true,
        );
        // Between its seams the surface rolled out is as wide as the former round and follows them.
        const sheet = flat.shapes[0]!;
        if (sheet.shape !== 'polyline') throw new Error('no sheet');
        for (const [k, joint] of [joints[i - 1], joints[i]].entries())
          if (joint) {
            const half = sheet.points.filter(([, z]) => Math.abs(z - joint.seamMm) < joint.climbMm + 0.01);
            expect(half.length, `${part} seam ${k}`).toBeGreaterThan(100);
            // Turns and steps are rounded to 0.1 um in the record.
            expect(Math.max(...heights(half)) - Math.min(...heights(half))).toBeCloseTo(joint.climbMm, 3);
          }
        for (const shape of flat.shapes)
          if (shape.shape === 'circle' && shape.name?.startsWith('hole ')) seen.push(shape.name.slice(5));
        for (const view of [outside, end, flat, cut])
          for (const each of view.dimensions) {
            if (each.kind !== 'span') continue;
            spans++;
            const axis = each.along === 'x' ? 0 : 1;
            const size = Number(/[\d.]+/.exec(each.text)![0]);
            // To the hundredth that is written.
            expect(Math.abs(Math.abs(each.to[axis] - each.from[axis]) - size)).toBeLessThan(0.0051);
          }
        drawn++;
      });
      const wanted = record.holes.filter(({ purpose }) => purpose !== 'mount').map(({ label }) => label);
      expect(seen.sort()).toEqual(wanted.sort());
      holes += seen.length;
    }),
    { seed: 71, numRuns: 25 },
  );
  console.log(`sections: ${drawn} drawn, ${holes} holes, ${spans} sizes`);
  expect(drawn).toBeGreaterThan(20);
});

/** Written to the hundredth; a chord's sag less for what is a polygon in the file. */
function near(text: string, wanted: number): boolean {
  return Math.abs(Number(text) - wanted) < SEAM_MM;
}
