/**
 * What the page keeps over a reload, under the hash of its record: a page of another coil never reads it. Some browsers
 * keep nothing for a page opened from disk; it then lives in memory, and the page says so.
 */

export interface Store {
  /** False when what is written is gone with the page. */
  readonly lasting: boolean;
  /** What was written under this name, or null: nothing, or not JSON. */
  read(name: string): unknown;
  write(name: string, value: unknown): void;
}

const PREFIX = 'coilwright bench';

function usable(): Storage | null {
  try {
    const storage = window.localStorage;
    const trial = `${PREFIX} trial`;
    storage.setItem(trial, trial);
    storage.removeItem(trial);
    return storage;
  } catch {
    return null;
  }
}

/** `lost` is called once, when the browser takes no more: from then on only memory holds what is new. */
export function openStore(lost: () => void): Store {
  const storage = usable();
  const memory = new Map<string, string>();
  let full = false;
  return {
    get lasting() {
      return storage !== null && !full;
    },
    read(name) {
      const text = memory.get(name) ?? storage?.getItem(`${PREFIX} ${name}`) ?? null;
      if (text === null) return null;
      try {
        return JSON.parse(text) as unknown;
      } catch {
        return null;
      }
    },
    write(name, value) {
      const text = JSON.stringify(value);
      memory.set(name, text);
      if (storage === null || full) return;
      try {
        storage.setItem(`${PREFIX} ${name}`, text);
      } catch {
        full = true;
        lost();
      }
    },
  };
}
