/** The words of the bench page. `{{count.turn}}` in `templates/bench/page.html` is `BENCH.count.turn` here. */

const turns = (n: string) => (n === '1' ? '1 turn' : `${n} turns`);

export const BENCH = {
  head: { job: 'job', document: 'Bench page', part: 'to count, correct and judge by' },
  noScript: 'This page counts and reckons with a script. Allow scripts for it, or wind from the winding sheet.',
  kept: {
    memory:
      'This browser keeps nothing for this page: count and readings are gone when it is closed or loaded anew. Save the readings before.',
    spoilt: 'What was kept from an earlier visit does not fit this coil and was put aside.',
    elsewhere: 'This page is open a second time and was changed there. Load it anew to go on from there.',
  },
  look: { dark: 'Dark page', light: 'Light page' },
  sound: { on: 'Sound off', off: 'Sound on' },

  picture: {
    heading: 'The coil',
    title: (job: string) => `Elevation of the coil ${job}, turns and taps to scale`,
    words: 'Full pointer: where the wire is. Hollow pointer, broken line: the next stop. Shaded: wound.',
  },

  before: { heading: 'Before the first turn' },
  after: { heading: 'When the coil is wound' },
  cautions: { heading: 'Take care' },

  count: {
    heading: 'Counter',
    turn: 'turn',
    of: (turns: string) => `of ${turns}`,
    next: (name: string) => `to ${name}`,
    /** What is left to wind, big beside the number. */
    left: turns,
    finished: 'wound',
    hint: (keys: string) => `${keys}, or touch here: one whole turn at each.`,
    space: 'Space bar',
    spaceAnd: (key: string) => `Space bar, ${key}`,
    held: 'Held: do what stands here, then press Enter.',
    spoken: (turn: string, left: string, name: string) => `Turn ${turn}. ${turns(left)} to ${name}.`,
    undo: 'Take back',
    undoTurn: 'one turn',
    undoStop: 'the last stop',
    done: 'The whole coil is wound.',
    undone: (turn: string) => `Taken back to turn ${turn}.`,
    again: 'Start this coil anew …',
    againSure: 'Press once more to clear the count',
  },

  stop: {
    label: 'stop',
    tap: (n: number) => `Tap ${n}`,
    unit: (n: number) => `Tap u${n}`,
    check: 'Check',
    finish: 'Finish',
    /** How far past the last whole turn. */
    place: (turn: string, angle: string, height: string) => `Turn ${turn}, at ${angle}°, ${height} above the datum.`,
    onFrom: (whole: string, on: string) => `From turn ${whole} go on by ${on}°.`,
    moved: 'This place was moved by the correction; it is not the one on the winding sheet.',
    goOn: {
      tap: (name: string) => `${name} is made: go on (Enter)`,
      check: 'Checked: go on (Enter)',
      finish: 'The end is made fast (Enter)',
    },
    called: (name: string, place: string) => `Stop. ${name}. ${place}`,
  },

  laid: {
    title: (turn: string, of: string) => `The wire laid straight: ${turn} of ${of} turns wound`,
  },

  figures: {
    used: 'wire used',
    left: 'left on the spool',
    needed: 'needed to the end',
    long: 'should be long here',
    unknown: 'not known',
    short: (lack: string) => `${lack} short`,
    out: 'none',
  },

  setup: {
    heading: 'Spool and foot switch',
    words:
      'A foot switch that types a key counts like the space bar. The spool may carry more than the coil needs; count from what it held at the start, both ends included.',
    spool: 'wire on the spool at the start, m',
    learn: 'Learn a key',
    learning: 'Press the key or the switch …',
    forget: 'Forget it',
    key: (name: string) => `counting key: ${name}`,
    spaceName: 'The space bar',
    spoolFault: (text: string) => `“${text}” is no length: enter metres, such as 25.5.`,
    noKey: 'counting key: space bar only',
    notThis: (name: string) => `${name} has work of its own on this page; choose another.`,
  },

  correction: {
    heading: 'Correct while winding',
    words:
      'Lay a rule along the winding, edge to edge over the wires: up from the start hole to the wire’s end, or away from the hole over wires that lie side by side. The taps still to come are placed anew for a winding that goes on at that pitch.',
    over: 'measured',
    extent: 'start hole to wire’s end',
    wires: 'over wires side by side',
    wound: {
      extent: (turn: string, unit: string) => `length of ${turn} turns, ${unit}`,
      wires: (turn: string, unit: string) => `length over ${turn} wires, ${unit}`,
    },
    notYetWound: {
      extent: 'Wind a turn at least before measuring.',
      wires: 'Wind two turns at least before measuring.',
    },
    fault: (text: string) =>
      text === '' ? 'Enter a length.' : `“${text}” is no length: enter a number, such as 38.5.`,
    length: (turn: string, mm: string, planned: string) => `${turn} turns measure ${mm}; planned were ${planned}.`,
    doubt: {
      'a turn': (turns: string) =>
        `That is ${turns} turns off: more like a turn missed in counting, or measured the other way. Count the wires before you go by it.`,
      'too short': () => 'Wires side by side cannot be that short. Measure again, and count the wires.',
      'too long': (turns: string) => `That is ${turns} turns off, more than any winding strays. Measure again.`,
      groove: (turns: string) =>
        `A groove keeps its pitch: ${turns} turns off means that turns were jumped or miscounted. Count the wires.`,
    },
    pitch: (mm: string, planned: string) =>
      `Turns still to come are reckoned with a pitch of ${mm} (planned ${planned}).`,
    lacks: (mm: string) => `The winding lacks ${mm} of room on the former.`,
    whole: (turns: string, long: string, wire: string, uh: string, off: string, limits: string) =>
      `The finished coil: ${turns} turns, ${long} long, ${wire} of wire, ${uh} µH${off === '' ? '' : ` (${off} % off target)`}, in 95 of 100 cases ${limits} µH.`,
    place: (turn: string, angle: string) => `${turn}, at ${angle}°`,
    placing: { made: 'made', steps: '', hole: '', kept: 'keeps its place' },
    hole: (label: string, mm: string, above: boolean) =>
      `hole ${label} lies ${mm} ${above ? 'above' : 'below'} the wire`,
    back: (turns: string) => `better: unwind ${turns} turns`,
    note: 'note',
    work: 'Work it out',
    caption: 'Stops, with what is wound counted in',
    tap: 'stop',
    planned: 'planned at turn',
    now: 'now at turn',
    inductance: 'µH',
    off: 'off target %',
    use: 'Stop at these places',
    leave: 'Leave the plan as it is',
    drop: 'Go back to the planned places',
    inUse: 'The counter stops at these places.',
    notYet: 'The counter still stops at the planned places.',
  },

  readings: {
    heading: 'Measure and write down',
    words: 'Each reading is judged against its limits as it is entered. They hold for 95 of 100 coils.',
    what: 'what',
    low: 'low',
    nominal: 'nominal',
    high: 'high',
    unit: 'unit',
    reading: 'reading',
    verdict: 'judged',
    blank: (what: string, unit: string) => `Reading: ${what}, ${unit}`,
    none: '–',
    whole: 'Former, winding and whole coil',
    byTap: {
      length: 'Wound length at every tap',
      resistance: 'DC resistance at every tap',
      inductance: 'Inductance at every tap',
      resonance: 'Resonance at every tap',
      'probed resonance': 'Resonance with generator and probe, at every tap',
      width: 'Width of the resonance with generator and probe, at every tap',
      diameter: 'Diameters',
      other: 'Others',
    },
    noNumber: (text: string) => `“${text}” is no number`,
    verdicts: {
      pass: 'within limits',
      low: 'too low',
      high: 'too high',
      implausible: 'hardly possible: measure again',
      'not judged': 'written down, not judged',
    },
    doubts: {
      leads: 'the meter’s leads count for too much here',
      resistance: 'resistance misleads the meter here',
      capacitance: 'capacitance misleads the meter here',
    },
    celsius: 'coil at °C',
    remark: (name: string) => `wound by ${name}`,
    nothing: 'There is no reading to save yet.',
    woundBy: 'wound by',
    coilNo: 'coil no.',
    save: 'Save readings (CSV)',
    saved: (name: string) => `Saved as ${name}.`,
  },
} as const;
