/**
 * Cautions for the winding sheet. Where the work can hurt they defer to local codes and to people licensed for it.
 * Common practice, from memory.
 */
export interface CautionNeeds {
  readonly printed: boolean;
  readonly material: string;
  readonly enamel: boolean;
  readonly tube: boolean;
}

/** What a tube of this material asks for besides. */
const TUBE: Readonly<Record<string, readonly string[]>> = {
  card: ['Card is baked dry only under watch and away from any flame.'],
  'phenolic paper': ['Its dust is harmful: wear a dust mask, wipe it up damp.'],
};

export function cautionsFor(needs: CautionNeeds): string[] {
  const list = [
    'Keep hair, sleeves and gloves away from a turning mandrel; with a drill, only at its slowest speed.',
    'Wire under tension and its cut ends fly: wear eye protection and hold the end when cutting.',
    needs.enamel
      ? 'Burning or tinning through enamel gives harmful fumes, and solder may hold lead: air the room, wash your hands.'
      : 'Solder gives fumes and may hold lead: air the room, wash your hands.',
  ];
  if (needs.printed)
    list.push(
      `The print nozzle and bed are hot. A former of ${needs.material} softens in heat${needs.material === 'PLA' ? ' (near 60 °C)' : ''}: no lamp, sun or iron on it.`,
    );
  if (needs.tube) list.push(['Clamp the tube to drill it.', ...(TUBE[needs.material] ?? [])].join(' '));
  list.push(
    'An outdoor aerial near a power line kills. Aerial, earth and lightning protection follow the local electrical code and are for a licensed installer.',
    'A set run from the mains may have a live chassis: service by licensed people only. This coil is for receiving, not for a transmitter.',
  );
  return list;
}
