/** How thick and how broken a stroke is, in millimetres: one look in every file format. */
import type { Dash, Weight } from './drawing.ts';

export const WEIGHT_MM: Record<Weight, number> = { outline: 0.5, thin: 0.25, hair: 0.12 };
/** Stroke, gap, stroke, gap ... */
export const DASH_MM: Record<Exclude<Dash, 'solid'>, readonly number[]> = { dashed: [1.6, 1], centre: [5, 1, 1, 1] };
