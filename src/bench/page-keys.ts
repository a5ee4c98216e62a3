/** Which keys count. The space bar always does; a foot switch may send any other key that has no work of its own here. */

/** A key as the page knows it: what it is called, and its place on the keyboard, which no layout changes. */
export interface CountingKey {
  readonly code: string;
  readonly name: string;
}

/** What a contact needs to come to rest; nobody winds a turn in less. */
export const BOUNCE_MS = 80;

/** Keys that confirm, leave or move about. */
const TAKEN = /^(Enter|NumpadEnter|Tab|Escape|Shift.*|Control.*|Alt.*|Meta.*|Space)$/;

export const isTaken = (event: KeyboardEvent): boolean => TAKEN.test(event.code) || TAKEN.test(event.key);

/** The key of an event, named as people read it on the key. */
export function keyOf(event: KeyboardEvent): CountingKey {
  const code = event.code || event.key;
  return { code, name: event.key.length === 1 ? event.key.toUpperCase() : event.key };
}

/** True for a key that counts: the space bar or the one that was learned, alone. */
export function counts(event: KeyboardEvent, learned: CountingKey | null): boolean {
  if (event.ctrlKey || event.metaKey || event.altKey) return false;
  return (
    event.code === 'Space' || event.key === ' ' || (learned !== null && learned.code === (event.code || event.key))
  );
}

/** True where keys are for writing. */
export function isWriting(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && target.matches('input, textarea, select');
}

/** True where the space bar works whatever has the focus: a button, a summary, a box to tick. */
export function isControl(target: EventTarget | null): boolean {
  return target instanceof HTMLElement && target.closest('button, summary, a, input') !== null;
}

/** Lets one event through, then none for a while: contacts bounce, and fingers and mice strike twice. */
export function debounced(waitMs = BOUNCE_MS): (nowMs: number) => boolean {
  let last = Number.NEGATIVE_INFINITY;
  return (nowMs) => {
    if (nowMs - last < waitMs) return false;
    last = nowMs;
    return true;
  };
}
