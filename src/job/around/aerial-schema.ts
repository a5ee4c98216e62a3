/** Keys of the aerial, and of the detector with what follows it. */
import * as z from 'zod';
import { DETECTORS, OTHER } from '../../stock/detectors.ts';
import { choice, quantity } from '../field.ts';
import { contact } from './contact.ts';

export const AERIAL_KINDS = ['horizontal wire', 'vertical wire', 'capacitor', 'dummy'] as const;
export const DETECTOR_KINDS = [...DETECTORS.map(({ kind }) => kind), OTHER] as const;

export const aerialSchema = z
  .strictObject({
    kind: choice(
      AERIAL_KINDS,
      'A wire, whose capacitance is worked out; a capacitance alone; or the standard dummy aerial, 200 pF and 20 uH.',
    ),
    length: quantity('wire', 'Of the wire.').optional(),
    height: quantity(
      'height',
      'Of a horizontal wire above ground; of the lower end of a vertical one, 1 m when left out.',
    ).optional(),
    thickness: quantity('length', 'Diameter of the wire, 2 mm when left out.').optional(),
    capacitance: quantity(
      'capacitance',
      'Of an aerial of kind capacitor; or of a wire as measured, in place of the formula.',
    ).optional(),
    resistance: quantity(
      'resistance',
      'Earth, wire and radiation together, in series. 25 ohm when left out: common practice.',
    ).optional(),
    series: quantity('capacitance', 'A capacitor between aerial and coil; none when left out.').optional(),
    to: contact(
      ['best', 'second', 'start'],
      'Where it is connected: "tap 3"; second, the second winding; start, the hot end of a coil whose finish is earthed; best, wherever serves best.',
    ),
  })
  .describe('The aerial. What it does to every position is worked out; set.aerial is then left out. Needs set.');

export const detectorSchema = z
  .strictObject({
    kind: choice(
      DETECTOR_KINDS,
      'What detects; its typical resistance and capacitance are taken. other: both are stated.',
    ),
    resistance: quantity(
      'resistance',
      'In parallel, what follows counted in. What is typical of the kind when left out.',
    ).optional(),
    capacitance: quantity('capacitance', 'In parallel. What is typical of the kind when left out.', {
      zero: true,
    }).optional(),
    to: contact(
      ['best', 'start'],
      'Where it is connected: "tap 3"; start, the hot end of a coil whose finish is earthed; best, wherever serves best.',
    ),
  })
  .describe('Detector and what it feeds, which draw power from the coil. Needs set.');
