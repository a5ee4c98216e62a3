/**
 * Cotton and silk on bare round wire: what the covering adds to the diameter, mil, the same at every gauge.
 *
 * Source: Cyclopedia of Telephony and Telegraphy, vol. 1 (American School of Correspondence, 1919), Table IV, AWG 20 to 40.
 * Status: READ; three of its entries (single silk 24, 34 and 40) are misprints against its own rule. Outside the table's
 * sizes the same addition is an estimate; no modern standard covers these wires.
 */
import type { Covering } from './wire.ts';

export const TEXTILE_STANDARD = '1919 covered-wire table';

export type Textile = Extract<Covering, 'single cotton' | 'double cotton' | 'single silk' | 'double silk'>;

/** Added to the diameter, mil. */
export const TEXTILE_ADDS_MIL: Readonly<Record<Textile, number>> = {
  'single cotton': 5.9,
  'double cotton': 10.2,
  'single silk': 2.3,
  'double silk': 4.2,
};

/** The addition may be off by this part of itself, either way: common practice, since the table states no limits. */
export const TEXTILE_SPREAD = 0.15;

/** Bare diameters that the table covers, mm: AWG 40 to AWG 20, with room for its rounding. */
export const TEXTILE_TABLE_MM = { from: 0.0795, to: 0.813 } as const;

/** Bare diameters that are kept in stock with each fibre, mm. Silk was not spun on thick wire; common practice. */
export const TEXTILE_STOCK_MM = {
  cotton: { from: 0.0795, to: 1.65 },
  silk: { from: 0.0795, to: 0.813 },
} as const;
