/** What client and worker say to one another. */
import type { Solid } from '../parts/solid.ts';
import type { Numbered } from './hands.ts';
import type { BedFile, BedOrder, PicturedPart } from './make.ts';

export type Order =
  | { readonly kind: 'part'; readonly solid: Solid; readonly scale: readonly number[] }
  | { readonly kind: 'bed'; readonly bed: BedOrder };

export type Request = Numbered<Order>;

export type Reply =
  | { readonly id: number; readonly kind: 'part'; readonly part: PicturedPart }
  | { readonly id: number; readonly kind: 'bed'; readonly bed: BedFile }
  | { readonly id: number; readonly kind: 'error'; readonly text: string };
