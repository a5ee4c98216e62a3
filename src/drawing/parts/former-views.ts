/**
 * Views of the former: from outside with the start hole in front, from above with it at the bottom, and its surface
 * developed with the start hole in the middle. Angles grow to the right where they are seen from outside. All sizes are
 * those that should come out: what the model is widened by for the printer is left out.
 */
import { formerDimensions } from '../../parts/dimensions.ts';
import type { PartsRecord } from '../../record/schema.ts';
import type { View } from '../views.ts';
import { developed } from './former-developed.ts';
import { elevation } from './former-elevation.ts';
import { endView } from './former-end-view.ts';
import { ribbedViews } from './ribbed-views.ts';
import { sectionViews } from './section-views.ts';

/** The views by part, of every section where there are several; none of a tube that is bought. */
export function formerViews(record: PartsRecord): Record<string, View[]> {
  const { former } = record;
  if (former.kind !== 'printed') return {};
  if (former.body === 'ribbed') return ribbedViews(record);
  return former.joints.length > 0 ? sectionViews(record) : { former: wholeFormerViews(record) };
}

/** Elevation, end view and developed surface of a full body, whether it is printed whole or in sections. */
function wholeFormerViews(record: PartsRecord): View[] {
  const d = formerDimensions({ ...record, printer: { ...record.printer, holeCompensationMm: 0 } });
  return [elevation(d, record), endView(d), developed(d, record)];
}
