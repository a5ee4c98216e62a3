/** What is taken where aerial or detector leave a key out, as it would be written. Common practice, from memory. */
import { detectorOf } from '../../stock/detectors.ts';

/** `aerial` and `detector` as written; keys with undefined have no default with these. */
export function aroundDefaults(
  aerial: Readonly<Record<string, unknown>>,
  detector: Readonly<Record<string, unknown>>,
): Record<string, string | undefined> {
  const { kind = 'dummy', capacitance } = aerial;
  const wire = kind === 'horizontal wire' || kind === 'vertical wire';
  const typical = detectorOf(String(detector.kind ?? 'galena crystal'));
  return {
    'aerial.height': kind === 'vertical wire' && capacitance === undefined ? '1 m' : undefined,
    'aerial.thickness': wire && capacitance === undefined ? '2 mm' : undefined,
    'aerial.resistance': wire || kind === 'capacitor' ? '25 ohm' : undefined,
    'detector.resistance': typical === null ? undefined : `${typical.resistanceKohm} kohm`,
    'detector.capacitance': typical === null ? '0 pF' : `${typical.capacitancePf} pF`,
  };
}
