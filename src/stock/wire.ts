/** Wire as the shop knows it. All lengths in millimetres. The shape is that of the record's `wire`. */
export const COVERINGS = [
  'bare',
  'enamel',
  'enamel heavy',
  'single cotton',
  'double cotton',
  'single silk',
  'double silk',
  'litz single silk',
  'litz double silk',
] as const;
export type Covering = (typeof COVERINGS)[number];

export interface Wire {
  /** Size and covering, as a person would ask for it: `24 AWG enamel`, `20 x 0.1 mm litz single silk`. */
  readonly name: string;
  readonly covering: Covering;
  /** Bare conductor; for litz the bundle without its serving. */
  readonly bareMm: number;
  readonly bareLowMm: number;
  readonly bareHighMm: number;
  /** Over the covering. */
  readonly overallMm: number;
  readonly overallLowMm: number;
  readonly overallHighMm: number;
  /** 1 for solid wire. */
  readonly strands: number;
  /** Bare diameter of one strand; `bareMm` when solid. */
  readonly strandMm: number;
  /** The covering tins through without scraping. */
  readonly solderable: boolean;
  /** Where the diameters come from. */
  readonly standard: string;
  /** How sure the table is: read in print, computed, or from memory. */
  readonly status: string;
}
