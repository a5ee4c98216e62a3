/** The verbs: how each is written, what it does, its options. Help, the parser and the hints all read this. */

export const VERBS = {
  start: {
    written: 'start [name]',
    does: 'write a commented job, coil file or lot to begin with',
    options: ['out', 'list', 'schema'],
  },
  plan: {
    written: 'plan <job>',
    does: 'choose the coil for a job; write sheet, template, former and record',
    options: ['out', 'json', 'explain'],
  },
  survey: {
    written: 'survey <coil>',
    does: 'work out the figures of a coil from its measured dimensions: inductance, loss, range of every tap',
    options: ['out', 'json', 'explain'],
  },
  match: {
    written: 'match <coil>',
    does: 'infer an old coil from what can be measured of it, and make its replacement: every tap as it was',
    options: ['out', 'json', 'explain'],
  },
  lot: {
    written: 'lot <file>',
    does: 'make a lot: every kind of coil planned once, travellers, wire from reels, print beds, lists',
    options: ['out', 'json'],
  },
  prove: {
    written: 'prove <readings>',
    does: 'judge finished coils by what was measured: pass, fail, what saves them, what they have in common, charts, dial',
    options: ['from', 'out', 'dial', 'json'],
  },
  stock: {
    written: 'stock [what] [words..]',
    does: 'list the wires, tubes, materials and spacers that are known',
    options: ['from', 'to', 'json'],
  },
} as const;
export type Verb = keyof typeof VERBS;

export const VERB_NAMES = Object.keys(VERBS) as readonly Verb[];
/** Every verb has these. */
export const COMMON_OPTIONS = ['help', 'version'] as const;

export const isVerb = (word: string): word is Verb => VERB_NAMES.some((verb) => verb === word);
