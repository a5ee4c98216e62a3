/** The kernel in the thread that asks, for one that is itself among several. */
import type { Kernel } from './client.ts';
import { makeBed, makePart, pictured } from './make.ts';

export function inlineKernel(): Kernel {
  return {
    part: async (solid, scale) => pictured(await makePart(solid, scale)),
    bed: async (bed) => makeBed(bed),
    close: async () => undefined,
  };
}
