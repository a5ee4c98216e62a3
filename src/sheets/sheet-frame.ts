/** The frame that every sheet but the wrap template keeps to. */
import type { Box } from '../drawing/boxes.ts';
import type { Page } from './page.ts';

/** Left free round every sheet: across, and along. */
export const MARGIN_MM = { across: 12, along: 11 } as const;

/** What a page keeps free of ink. */
export function frameOf(page: Page): Box {
  return {
    left: MARGIN_MM.across,
    right: page.widthMm - MARGIN_MM.across,
    bottom: MARGIN_MM.along,
    top: page.heightMm - MARGIN_MM.along,
  };
}
