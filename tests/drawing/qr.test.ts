/** Codes: what is drawn says what it was given, at the size asked for, with the border that readers need. */
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { coilText, QUIET_MODULES, qrCode } from '../../src/drawing/qr.ts';
import { blackBox, readCode } from '../helpers/qr.ts';

const HASH = '3f9a1c0de5b2476890ab1c2d3e4f5061728394a5b6c7d8e9f00112233445566a';

test('any serial with its hash is read back from what is drawn', () => {
  let codes = 0;
  const serial = fc.stringMatching(/^[A-Za-z0-9][A-Za-z0-9._-]{0,38}[A-Za-z0-9]$/);
  fc.assert(
    fc.property(
      serial,
      fc.constantFrom('medium' as const, 'quartile' as const),
      fc.constantFrom(24.5, 31),
      (name, spare, sizeMm) => {
        const code = qrCode(coilText(name, HASH), sizeMm, spare);
        expect(readCode(code.shapes, { left: 0, bottom: 0, right: sizeMm, top: sizeMm })).toBe(`${name} ${HASH}`);
        // The longest serials: five dots of a printer of 300 to the inch.
        expect(code.moduleMm).toBeGreaterThan(0.44);
        codes++;
      },
    ),
    { seed: 11, numRuns: 40 },
  );
  console.log(`codes: ${codes} read back`);
  expect(codes).toBe(40);
});

test('the border is kept free, and the rectangles cover the modules exactly', () => {
  const sizeMm = 31;
  const { shapes, modules, moduleMm } = qrCode(coilText('HS-001', HASH), sizeMm, 'quartile');
  const boxes = shapes.map((shape) => blackBox(shape)!);
  const quiet = QUIET_MODULES * moduleMm;
  expect(Math.min(...boxes.map(({ left }) => left))).toBeCloseTo(quiet, 9);
  expect(Math.max(...boxes.map(({ right }) => right))).toBeCloseTo(sizeMm - quiet, 9);
  expect(Math.min(...boxes.map(({ bottom }) => bottom))).toBeCloseTo(quiet, 9);
  expect(Math.max(...boxes.map(({ top }) => top))).toBeCloseTo(sizeMm - quiet, 9);
  expect(modules * moduleMm).toBeGreaterThan(22);
  for (const box of boxes)
    for (const edge of [box.left, box.right, box.bottom, box.top]) {
      const at = (edge - quiet) / moduleMm;
      expect(Math.abs(at - Math.round(at))).toBeLessThan(1e-9);
    }
});

test('a code with a corner of its marks gone is not read', () => {
  const { shapes } = qrCode(coilText('HS-001', HASH), 31, 'quartile');
  const window = { left: 0, bottom: 0, right: 31, top: 31 };
  const torn = shapes.filter((shape) => blackBox(shape)!.left > 14 || blackBox(shape)!.bottom > 14);
  expect(() =>
    readCode(
      torn.filter((shape) => blackBox(shape)!.bottom < 20),
      window,
    ),
  ).toThrow();
});
