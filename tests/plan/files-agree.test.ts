/**
 * The whole job for both hands on a staggered, asymmetric coil: what the bytes of every output say against the record,
 * and the record of the other hand against the same bytes, so that a mirrored template or helix cannot pass.
 */
import { describe, expect, test } from 'vitest';
import { axialAt } from '../../src/coil/layout.ts';
import { PAPER_THICKNESS_MM } from '../../src/drawing/template.ts';
import { readJob } from '../../src/job/read.ts';
import { makeParts } from '../../src/kernel/make.ts';
import { recordOf } from '../../src/plan.ts';
import type { CoilRecord } from '../../src/record/schema.ts';
import { windingSheet } from '../../src/sheets/winding-sheet.ts';
import { wrapTemplate } from '../../src/sheets/wrap-template.ts';
import { type Pdf, readPdf } from '../helpers/pdf.ts';
import { boxOf, type Facet, facetsOf, floorVertices, radialHole } from '../helpers/stl.ts';

/** A fiftieth of a millimetre: below what a printer, a drill or a pair of scissors can place, far above float32. */
const PLACE_MM = 0.02;

const jobOf = (hand: string) =>
  readJob(
    `
job: Both hands
want: { inductance: [9 uH, 21 uH, 47 uH, 60 uH, 118 uH] }
former: { outside-diameter: 58 mm, longest: 120 mm, kind: printed }
wire: [ 0.5 mm enamel ]
winding: { hand: ${hand}, pitch: 1.2 mm, tap-layout: staggered }
`,
    'hands.yaml',
  );

/** Circles of the template that lie where no hole of the record is, and holes of the record without a circle. */
function strayCircles(template: Pdf, record: CoilRecord): number {
  const round = Math.PI * (record.former.outsideDiameterMm + PAPER_THICKNESS_MM);
  const page = template.pages[0]!;
  const wanted = record.holes.map((hole) => ({
    x: (hole.angleDeg / 360) * round,
    y: hole.axialMm,
    r: hole.diameterMm / 2,
  }));
  const start = wanted.findIndex((_, i) => record.holes[i]!.purpose === 'start');
  const strays = page.circles.map((origin) => {
    const misses = wanted.filter(
      (hole) =>
        !page.circles.some((circle) => {
          const off = circle.x - origin.x - (hole.x - wanted[start]!.x);
          const across = Math.abs(off - Math.round(off / round) * round);
          const along = Math.abs(circle.y - origin.y - (hole.y - wanted[start]!.y));
          return across < PLACE_MM && along < PLACE_MM && Math.abs(circle.r - hole.r) < PLACE_MM;
        }),
    );
    return misses.length;
  });
  return Math.min(...strays) + Math.abs(page.circles.length - wanted.length);
}

function worstHoleMm(facets: Facet[], record: CoilRecord): number {
  const off = record.holes.map((hole) => {
    const fit = radialHole(facets, hole.angleDeg, hole.axialMm, hole.diameterMm);
    const distance = Math.hypot(fit.acrossMm, fit.alongMm, fit.diameterMm - hole.diameterMm);
    return Number.isNaN(distance) || fit.walls < 10 ? Number.POSITIVE_INFINITY : distance;
  });
  return Math.max(...off);
}

/** How far a vertex on the groove's floor lies outside the floor that the record's turns ask for; holes leave some inside it. */
function worstGrooveMm(facets: Facet[], record: CoilRecord): number {
  const { former, windings, frame } = record;
  const winding = windings[0]!;
  const groove = former.groove!;
  const outside = former.outsideDiameterMm / 2;
  const floor = floorVertices(
    facets,
    former.boreDiameterMm / 2 + 0.2,
    outside - 0.98 * groove.depthMm,
    former.lengthMm - 8,
  );
  expect(floor.length).toBeGreaterThan(1000);
  let worst = 0;
  for (const { angleDeg, zMm } of floor) {
    const part = ((((frame.hand === 'right' ? angleDeg : -angleDeg) / 360) % 1) + 1) % 1;
    let near = Number.POSITIVE_INFINITY;
    for (let k = -2; k <= winding.turns + 4; k++) {
      const z = axialAt(winding.turnPositionsMm, winding.turns, winding.pitchMm, part + k);
      near = Math.min(near, Math.max(0, Math.abs(zMm - z) - groove.floorMm / 2));
    }
    worst = Math.max(worst, near);
  }
  return worst;
}

async function made(hand: string) {
  const record = recordOf(jobOf(hand), 'test');
  const [part] = await makeParts(record);
  return {
    record,
    sheet: await readPdf(await windingSheet(record)),
    template: await readPdf(await wrapTemplate(record)),
    facets: facetsOf(part!.bytes),
  };
}

describe('every output against the record, both hands', async () => {
  const right = await made('right');
  const left = await made('left');

  test.each([
    ['right', right, left],
    ['left', left, right],
  ] as const)('%s hand', (hand, own, other) => {
    const { record } = own;
    expect(record.frame.hand).toBe(hand);
    expect(record.tapMethod.layout).toBe('staggered');
    expect(record.former.surface).toBe('grooved');

    expect(strayCircles(own.template, record)).toBe(0);
    expect(strayCircles(own.template, other.record)).toBeGreaterThan(0);

    expect(worstHoleMm(own.facets, record)).toBeLessThan(PLACE_MM);
    expect(worstHoleMm(own.facets, other.record)).toBeGreaterThan(1);

    expect(worstGrooveMm(own.facets, record)).toBeLessThan(PLACE_MM);
    expect(worstGrooveMm(own.facets, other.record)).toBeGreaterThan(0.1);

    const box = boxOf(own.facets);
    expect(box.max[2] - box.min[2]).toBeCloseTo(record.former.lengthMm, 2);
    // The outline is a polygon inside its circle, 0.01 mm a side at most, and float32 keeps 1e-5.
    expect(box.max[0] - box.min[0]).toBeGreaterThan(record.former.flange!.diameterMm - 0.0201);
    expect(box.max[0] - box.min[0]).toBeLessThan(record.former.flange!.diameterMm + 1e-4);

    const words = own.sheet.pages.flatMap((page) => page.texts.map((text) => text.text)).join(' ');
    let figures = 0;
    for (const tap of record.windings[0]!.taps)
      for (const figure of [tap.positionMm.toFixed(2), tap.angleDeg.toFixed(1), tap.wireFromStartM.toFixed(2)]) {
        expect(words).toContain(figure);
        figures++;
      }
    expect(words).toContain(`${hand}-hand`);
    console.log(
      `${hand} hand: ${record.holes.length} holes in template and former, groove, box, ${figures} figures agree`,
    );
    expect(figures).toBe(15);
  });
});
