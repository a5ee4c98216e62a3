/** What a second winding is wound on, as a former of its own for the wrap template: its lower edge at Z = 0. */
import { SECOND_TEMPLATE } from '../../templates/wording/second-winding.ts';
import type { CoilRecord } from '../record/schema.ts';
import type { SurfaceWords } from './template-head.ts';

/** Null without a second winding, and for one on the main former. */
export function secondSurface(record: CoilRecord): { record: CoilRecord; words: SurfaceWords } | null {
  const second = record.around?.second ?? null;
  if (second === null || second.body === null || second.kind === 'same former') return null;
  const { body, kind } = second;
  const main = record.windings[0]!;
  const down = (z: number) => Math.round(1e4 * (z - body.lowMm)) / 1e4;
  return {
    words: {
      part: SECOND_TEMPLATE.part[kind],
      set: SECOND_TEMPLATE.set,
      edge: SECOND_TEMPLATE.edge,
      from: SECOND_TEMPLATE.from,
    },
    record: {
      ...record,
      former: {
        ...record.former,
        kind: 'printed',
        surface: 'smooth',
        outsideDiameterMm: body.outsideDiameterMm,
        boreDiameterMm: body.insideDiameterMm,
        lengthMm: body.lengthMm,
        flange: null,
        groove: null,
        ribs: null,
        joints: [],
      },
      holes: second.holes.map((hole) => ({ ...hole, axialMm: down(hole.axialMm), tap: null, turn: null })),
      windings: [
        {
          ...main,
          wire: { ...main.wire, ...second.wire },
          turns: second.turns,
          pitchMm: second.pitchMm,
          startMm: down(second.startMm),
          finishMm: down(second.finishMm),
          taps: main.taps.slice(-1),
          unitTaps: [],
        },
      ],
    },
  };
}
