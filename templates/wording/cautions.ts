/**
 * Cautions for the winding sheet. Where the work can hurt they defer to local codes and to people licensed for it.
 * Common practice, from memory.
 */
export interface CautionNeeds {
  readonly printed: boolean;
  readonly material: string;
  readonly enamel: boolean;
  readonly tube: boolean;
  /** Kind of the aerial that hangs on the coil; null or left out: none is known. */
  readonly aerial?: string | null;
}

/** Of a wire that is put up outdoors; none for other aerials. */
export function wireAerialCautions(kind: string | null): string[] {
  return kind?.endsWith(' wire')
    ? [
        'An aerial wire that touches or falls on a power line kills: keep more than its whole length away from any. Earth, lightning protection and leading-in follow the local electrical code and are for a licensed installer; unplug it and earth it before a storm comes near, never during one.',
      ]
    : [];
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
  const wire = wireAerialCautions(needs.aerial ?? null);
  list.push(
    ...(wire.length > 0
      ? wire
      : [
          'An outdoor aerial near a power line kills. Aerial, earth and lightning protection follow the local electrical code and are for a licensed installer.',
        ]),
    'A set run from the mains may have a live chassis: service by licensed people only. This coil is for receiving, not for a transmitter.',
  );
  return list;
}
