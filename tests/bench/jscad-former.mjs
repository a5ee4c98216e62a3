// A yardstick of the benchmark: the former of a plan at 48 chords by the booleans of @jscad/modeling alone, as somebody would
// write it who has only that. Tube, rims, groove, ears and holes; no numbers, which it does not finish in reasonable time.
//
//     node tests/bench/jscad-former.mjs plan.json
import { readFileSync } from 'node:fs';
import jscad from '@jscad/modeling';
import serializer from '@jscad/stl-serializer';

const { primitives, booleans, transforms, extrusions, geometries } = jscad;
const plan = JSON.parse(readFileSync(process.argv[2], 'utf8'));
const { former, holes } = plan;
const [winding] = plan.windings;
const segments = 48;
const hand = plan.frame.hand === 'left' ? -1 : 1;
const outside = former.outsideDiameterMm / 2;

const upright = (radius, from, to) =>
  primitives.cylinder({ radius, height: to - from, center: [0, 0, (from + to) / 2], segments });

/** The groove's cross-section swept up the pitch; gaps at taps are left out. */
function groove() {
  const { depthMm, floorMm } = former.groove;
  const half = floorMm / 2;
  const section = geometries.geom2.fromPoints([
    [outside - depthMm, -half],
    [outside + 1, -half - depthMm - 1],
    [outside + 1, half + depthMm + 1],
    [outside - depthMm, half],
  ]);
  const swept = extrusions.extrudeHelical(
    { angle: hand * 2 * Math.PI * winding.turns, pitch: winding.pitchMm, segmentsPerRotation: segments },
    section,
  );
  return transforms.translate([0, 0, winding.startMm], swept);
}

const hole = ({ angleDeg, axialMm, diameterMm }) =>
  transforms.rotateZ(
    (angleDeg * Math.PI) / 180,
    transforms.translate(
      [outside, 0, axialMm],
      transforms.rotateY(Math.PI / 2, primitives.cylinder({ radius: diameterMm / 2, height: outside, segments: 12 })),
    ),
  );

const body = [upright(outside, 0, former.lengthMm)];
if (former.flange) {
  const rim = former.flange.diameterMm / 2;
  body.push(
    upright(rim, 0, former.flange.lowerMm),
    upright(rim, former.lengthMm - former.flange.upperMm, former.lengthMm),
  );
}
for (const ear of former.ears) {
  const plate = primitives.cuboid({
    size: [2 * ear.widthMm, ear.widthMm, ear.thicknessMm],
    center: [ear.centreRadiusMm - ear.widthMm / 2, 0, ear.thicknessMm / 2],
  });
  body.push(transforms.rotateZ((ear.angleDeg * Math.PI) / 180, plate));
}
const cutters = [upright(former.boreDiameterMm / 2, -1, former.lengthMm + 1), ...holes.map(hole)];
if (former.groove) cutters.push(groove());
const solid = booleans.subtract(booleans.union(body), cutters);
const bytes = serializer.serialize({ binary: true }, solid).reduce((sum, piece) => sum + piece.byteLength, 0);
console.log(geometries.geom3.toPolygons(solid).length, bytes);
