/** Two sounds: a short tick for a turn and a rising pair for a stop. Made here, so that no file has to come along. */

export interface Sounds {
  turn(): void;
  stop(): void;
  end(): void;
}

interface Note {
  readonly hertz: number;
  readonly fromS: number;
  readonly lastsS: number;
  readonly loud: number;
}

const TURN: readonly Note[] = [{ hertz: 1200, fromS: 0, lastsS: 0.025, loud: 0.05 }];
const STOP: readonly Note[] = [
  { hertz: 620, fromS: 0, lastsS: 0.18, loud: 0.3 },
  { hertz: 930, fromS: 0.2, lastsS: 0.35, loud: 0.3 },
];
const END: readonly Note[] = [...STOP, { hertz: 1240, fromS: 0.57, lastsS: 0.6, loud: 0.3 }];

/** Silent while `muted` says so, and where a browser has no sound or does not allow it yet. */
export function sounds(muted: () => boolean): Sounds {
  let context: AudioContext | null = null;
  const play = (notes: readonly Note[]) => {
    if (muted() || typeof AudioContext === 'undefined') return;
    context ??= new AudioContext();
    // Browsers start sound asleep until the first key or touch; this is called from one.
    void context.resume().catch(() => undefined);
    const now = context.currentTime;
    for (const { hertz, fromS, lastsS, loud } of notes) {
      const tone = context.createOscillator();
      const level = context.createGain();
      tone.type = 'triangle';
      tone.frequency.value = hertz;
      level.gain.setValueAtTime(0, now + fromS);
      level.gain.linearRampToValueAtTime(loud, now + fromS + 0.008);
      level.gain.setValueAtTime(loud, now + fromS + lastsS - 0.01);
      level.gain.linearRampToValueAtTime(0, now + fromS + lastsS);
      tone.connect(level).connect(context.destination);
      tone.start(now + fromS);
      tone.stop(now + fromS + lastsS);
    }
  };
  return { turn: () => play(TURN), stop: () => play(STOP), end: () => play(END) };
}
