/**
 * Old coils at random, and what somebody measured of them. Turns are laid and figures taken here, with the laws of `physics/` and
 * `coil/`, and not by the inference that is tried on them. Errors are normal, their half widths at 95 % as stated; what the inference takes for
 * granted (meters, coverings, how close turns lie) is off by errors of that size too.
 */
import { Coil } from '../../src/coil/coil.ts';
import { turnMiddles } from '../../src/coil/layout.ts';
import { WorkingCoil } from '../../src/coil/working-coil.ts';
import type { DiameterReading, OldCoil, OldSection, OldTap, OldWire, Reading } from '../../src/match/types.ts';
import { DENSITY, dcResistance } from '../../src/physics/copper.ts';
import { helixLength } from '../../src/physics/helix.ts';
import type { Covering, Wire } from '../../src/stock/wire.ts';
import { allWires } from '../../src/stock/wires.ts';
import { chance } from './jobs.ts';

/** What the coil really is. Millimetres, microhenry, metres; places from the wire centre at the start. */
export interface TrueCoil {
  readonly meanMm: number;
  readonly bareMm: number;
  readonly overallMm: number;
  readonly pitchMm: readonly number[];
  readonly sectionGapMm: readonly number[];
  readonly tapGapMm: number;
  readonly windingLengthMm: number;
  readonly wireLengthM: number;
  readonly taps: readonly {
    readonly turn: number;
    readonly positionMm: number;
    readonly inductanceUh: number;
    readonly lost: boolean;
    /** Nobody counted it, or not surely. */
    readonly uncounted: boolean;
  }[];
}

export interface Measured {
  readonly truth: TrueCoil;
  readonly old: OldCoil;
}

const HALF_WIDTH = 1.959964;
const COVERINGS: readonly Covering[] = ['enamel', 'enamel', 'single silk', 'double silk', 'double cotton'];
/** g/cm3: enamel about 1.3, a textile with its air about 0.7. */
const AROUND_G_CM3 = { enamel: 1.3, textile: 0.7 };

/** Chance by a seed. */
class Dice {
  readonly #random: () => number;

  constructor(seed: number) {
    this.#random = chance(seed);
  }

  maybe(share: number): boolean {
    return this.#random() < share;
  }

  between(low: number, high: number): number {
    return low + (high - low) * this.#random();
  }

  whole(low: number, high: number): number {
    return Math.floor(this.between(low, high + 1));
  }

  pick<T>(list: readonly T[]): T {
    return list[Math.floor(this.#random() * list.length)]!;
  }

  /** A normal error of this half width at 95 %. */
  error(half: number): number {
    const r = Math.sqrt(-2 * Math.log(1 - this.#random()));
    return ((r * Math.cos(2 * Math.PI * this.#random())) / HALF_WIDTH) * half;
  }

  /** A reading of a true value. */
  read(value: number, half: number): Reading {
    return { value: value + this.error(half), uncertainty: half };
  }

  /** A half width about the usual one: people state theirs. */
  about(half: number): number {
    return half * this.pick([0.5, 1, 1, 1, 2]);
  }

  /** A count that may be off by whole turns, as likely as a normal error of this half width makes them. */
  count(turns: number, half: number): Reading {
    const options = [-3, -2, -1, 0, 1, 2, 3];
    const weights = options.map((k) => Math.exp(-((k * HALF_WIDTH) ** 2) / (2 * half ** 2)));
    let draw = this.#random() * weights.reduce((sum, one) => sum + one, 0);
    const k = options.find((_, i) => {
      draw -= weights[i]!;
      return draw < 0;
    });
    return { value: turns + (k ?? 0), uncertainty: half };
  }
}

/** Turns of the taps, the whole coil last: by one of the patterns that builders use, rounded, or by nothing at all. */
function tapTurns(dice: Dice, most: number): number[] {
  const count = dice.whole(3, Math.min(15, Math.floor(most / 3)));
  const whole = dice.whole(Math.max(12, 3 * count), most);
  const pattern = dice.pick(['steps', 'growing', 'ratio', 'none'] as const);
  const first = dice.between(2, whole / count);
  const at = (i: number): number => {
    const share = i / (count - 1);
    if (pattern === 'ratio') return first * (whole / first) ** share;
    if (pattern === 'growing') return first + (whole - first) * (0.5 * share + 0.5 * share * share);
    return first + (whole - first) * share;
  };
  const spread = pattern === 'none' ? (0.6 * whole) / count : 0;
  const turns = Array.from({ length: count }, (_, i) => Math.round(at(i) + (dice.between(-1, 1) * spread) / 2));
  const rising = [...new Set(turns.filter((turn) => turn > 1 && turn < whole))].sort((a, b) => a - b);
  return [...rising, whole];
}

interface Winding {
  readonly ends: readonly number[];
  readonly pitchMm: readonly number[];
  readonly sectionGapMm: readonly number[];
  readonly tapGapMm: number;
  readonly overallMm: number;
}

/** Places of turn middles, and of any turn by straight lines between them. */
function laid({ ends, pitchMm, sectionGapMm, tapGapMm, overallMm }: Winding, taps: readonly number[]) {
  const turns = ends[ends.length - 1]!;
  const middles = turnMiddles(turns);
  const pushed = taps.filter((tap) => tap < turns && !ends.some((end) => Math.abs(end - tap) < 1e-9));
  let z = 0;
  let before = 0;
  let section = 0;
  const places = middles.map((u) => {
    if (section < ends.length - 1 && u > ends[section]!) {
      // To the end of its section is half a turn of the old pitch; the next begins a wire and the gap farther on than its last turn.
      z += sectionGapMm[section]! + overallMm;
      section++;
    } else z += (u - before) * pitchMm[section]!;
    before = u;
    return z;
  });
  const push = (u: number) => pushed.reduce((sum, tap) => sum + tapGapMm * Math.min(1, Math.max(0, u - tap + 0.5)), 0);
  const all = places.map((place, i) => place + push(middles[i]!));
  const last = middles.length - 1;
  const placeAt = (u: number) => {
    if (u <= middles[0]!) return u * pitchMm[0]! + push(u);
    if (u >= middles[last]!) return places[last]! + (u - middles[last]!) * pitchMm[pitchMm.length - 1]! + push(u);
    const i = Math.min(Math.floor(u - 0.5), last - 1);
    const share = (u - middles[i]!) / (middles[i + 1]! - middles[i]!);
    return all[i]! + share * (all[i + 1]! - all[i]!);
  };
  return { places: all, placeAt };
}

const textile = (covering: Covering) => /silk|cotton/.test(covering);

/** The real wire, and what is known of it. */
function wireOf(dice: Dice): { wire: Wire; known: OldWire } {
  const covering = dice.pick(COVERINGS);
  const stock = dice.pick(
    allWires().filter((wire) => wire.covering === covering && wire.bareMm > 0.2 && wire.bareMm < 0.9),
  );
  const way = dice.pick(['named', 'both', 'both', 'bare', 'overall'] as const);
  // A textile is seen; bare-looking wire is taken as enamel, of a thickness that is known less well.
  const told = way === 'named' || covering !== 'enamel' || dice.maybe(0.6);
  const spread = (stock.bareHighMm - stock.bareLowMm) / 2;
  const bareMm = stock.bareMm + dice.error(way === 'named' ? Math.max(spread, 1e-4) : 0.05);
  const thickness = stock.overallMm - stock.bareMm;
  const limits = (stock.overallHighMm - stock.overallLowMm) / 2;
  const adds = Math.max(0.002, thickness + dice.error(Math.max(limits, (told ? 0.15 : 0.5) * thickness, 0.005)));
  const overallMm = bareMm + adds;
  const fine = dice.about(0.01);
  const measured = way === 'both' || way === 'bare';
  const over = way === 'both' || way === 'overall';
  const wire: Wire = { ...stock, name: 'true', bareMm, strandMm: bareMm, overallMm };
  const known: OldWire = {
    named: way === 'named' ? stock : null,
    covering: way !== 'named' && told ? covering : null,
    bareMm: measured ? dice.read(bareMm, fine) : null,
    overallMm: over ? dice.read(overallMm, fine) : null,
    massG: null,
    lengthM: null,
  };
  return { wire, known };
}

function diametersOf(dice: Dice, meanMm: number, overallMm: number): DiameterReading[] {
  const list: DiameterReading[] = [];
  const way = dice.pick(['caliper', 'two', 'circumference', 'over wire', 'over wire and form'] as const);
  const caliper = (of: DiameterReading['of'], mm: number) =>
    list.push({ of, how: 'caliper', mm: dice.read(mm, dice.about(0.2)) });
  if (way === 'caliper' || way === 'two' || way === 'over wire and form') caliper('former', meanMm - overallMm);
  if (way === 'two') caliper('former', meanMm - overallMm);
  if (way === 'circumference')
    list.push({ of: 'former', how: 'circumference', mm: dice.read(meanMm - overallMm, dice.about(0.5) / Math.PI) });
  if (way === 'over wire' || way === 'over wire and form') caliper('over wire', meanMm + overallMm);
  return list;
}

/** Sections of the winding: where each ends, on one of the taps but the last. */
function endsOf(dice: Dice, turns: readonly number[]): number[] {
  const whole = turns[turns.length - 1]!;
  if (turns.length < 3 || !dice.maybe(0.2)) return [whole];
  const inner = [...turns.slice(0, -1)].filter((turn) => turn > 3 && whole - turn > 3);
  const first = inner.length === 0 ? null : dice.pick(inner);
  return first === null ? [whole] : [first, whole];
}

/** A coil by its seed, and what was measured of it. */
export function randomOldCoil(seed: number, mostTurns = 140): Measured {
  const dice = new Dice(seed);
  const hand = dice.pick(['right', 'left'] as const);
  const { wire, known } = wireOf(dice);
  const { bareMm, overallMm } = wire;
  const meanMm = dice.between(25, 120);
  const wholeTurns = tapTurns(dice, mostTurns);
  const ends = endsOf(dice, wholeTurns);
  const sections = ends.length;
  const staggered = sections === 1 && dice.maybe(0.25);
  const angleHalf = dice.about(5);
  // A part turn that nobody would mistake for the next whole one.
  const turns = wholeTurns.map((turn, i) =>
    staggered && i < wholeTurns.length - 1 ? turn + dice.between(0.06, 0.9) : turn,
  );
  const whole = turns[turns.length - 1]!;
  const close = dice.maybe(0.4);
  const loose = textile(wire.covering) ? { value: 1, half: 0.03 } : { value: 1.02, half: 0.01 };
  const base = close ? 0 : overallMm * dice.between(1.1, 2.4);
  const pitchMm = ends.map(() =>
    close ? overallMm * (loose.value + dice.error(loose.half)) : base * dice.between(0.9, 1.15),
  );
  const sectionGapMm = ends.slice(1).map(() => dice.between(1, 9));
  const pushes = dice.maybe(0.3);
  const tapGap = pushes ? dice.between(0.1, 0.8) * overallMm : 0;
  // Measured where there is one; where not, taken as none within a tenth of the wire.
  const tapHalf = pushes ? 0.05 : 0.1 * overallMm;
  // However tight, copper does not lie in copper.
  const tapGapMm = pushes ? tapGap : Math.max(dice.error(tapHalf), 1.015 * bareMm - Math.min(...pitchMm));
  const tapGapRead = pushes ? dice.read(tapGap, tapHalf) : { value: 0, uncertainty: tapHalf };
  const { places, placeAt } = laid({ ends, pitchMm, sectionGapMm, tapGapMm, overallMm }, turns);
  const windingLengthMm = placeAt(whole) + overallMm;

  const coil = new Coil(
    { wire, meanDiameterMm: meanMm, turns: whole, pitchMm: pitchMm[0]!, gaps: [], startMm: 0 },
    places,
  );
  const working = new WorkingCoil(coil, turns, { leadPf: 0, earthed: 'start', celsius: 20 });
  const wireM = (turn: number) => helixLength(meanMm / 1e3, turn, placeAt(turn) / 1e3);
  const stretch = 1 + dice.error(0.01);
  const meter = 1 + dice.error(0.01);
  const selfOff = dice.error(0.15);
  const capacitor = { value: dice.pick([100, 220, 470]), half: 0.01 };
  const capacitorPf = capacitor.value * (1 + dice.error(capacitor.half));
  const meterKhz = dice.pick([1, 10, 100]);
  const omega = (kHz: number) => 2e3 * Math.PI * kHz;
  /** What the coil itself puts across a tap. */
  const ownPf = (turn: number, kHz: number) => {
    const pf = Math.min(2000, Math.max(20, 1e18 / (omega(kHz) ** 2 * coil.inductanceUh(turn))));
    const resonant = working.tuned(turn, pf, 'open').kHz;
    return 1e18 / (omega(resonant) ** 2 * coil.inductanceUh(turn)) - pf;
  };
  const shownUh = (turn: number) => {
    const uh = coil.inductanceUh(turn) / (meterKhz < 15 ? 1 : working.crowding(turn, meterKhz));
    const pf = ownPf(turn, meterKhz) * (1 + selfOff);
    return (meter * uh) / (1 - omega(meterKhz) ** 2 * uh * pf * 1e-18);
  };
  const resonantKhz = (turn: number) => {
    const first = working.tuned(turn, capacitorPf, 'open').kHz;
    const more = ownPf(turn, first) * selfOff;
    return working.tuned(turn, capacitorPf + more, 'open', working.crowding(turn, first)).kHz;
  };
  const ohm = (turn: number) => dcResistance(wireM(turn), bareMm / 1e3) * stretch;

  // How thorough whoever measured was.
  const [counts, rules, meters, resonates] = [0.1, 0.2, 0.1, 0].map((low) => dice.between(low, 0.9)) as [
    number,
    number,
    number,
    number,
  ];
  const lengthRead = dice.maybe(0.7);
  const sectioned = sections > 1;
  const taps = turns.map((turn, i): OldTap => {
    const last = i === turns.length - 1;
    const inSections = ends.includes(turn) && !last;
    const none = { turns: null, positionMm: null, angleDeg: null, inductance: null, resonance: null };
    const name = `${i + 1}`;
    if (!last && !inSections && dice.maybe(0.08)) return { ...none, name, resistanceOhm: null };
    const counted = dice.maybe(last ? 0.6 : counts);
    const fraction = turn - Math.floor(turn);
    const climbing = hand === 'right' ? fraction : (1 - fraction) % 1;
    const metered = dice.maybe(meters);
    const resonant = !metered && dice.maybe(resonates);
    const placed = !last && (dice.maybe(rules) || !(counted || metered || resonant));
    const positionHalf = dice.about(0.3);
    const shown = metered ? shownUh(turn) : 0;
    const tuned = resonant ? resonantKhz(turn) : 0;
    const resistance = ohm(turn);
    const untold = last && !counted && !metered && !resonant && !lengthRead;
    const share = dice.about(0.005);
    return {
      name,
      turns:
        counted || untold
          ? dice.maybe(0.75)
            ? { value: Math.floor(turn), uncertainty: 0 }
            : dice.count(Math.floor(turn), 1)
          : null,
      positionMm: placed ? dice.read(placeAt(turn), positionHalf) : null,
      angleDeg: fraction > 0 ? dice.read(360 * climbing, angleHalf) : null,
      inductance: metered ? { uh: dice.read(shown, share * shown + 0.05), kHz: meterKhz } : null,
      resonance: resonant
        ? {
            kHz: dice.read(tuned, share * tuned),
            capacitorPf: { value: capacitor.value, uncertainty: capacitor.half * capacitor.value },
          }
        : null,
      resistanceOhm: dice.maybe(last ? 0.5 : 0.1) ? dice.read(resistance, 0.01 * resistance + 0.02) : null,
    };
  });
  const around =
    (Math.PI / 4) *
    (overallMm ** 2 - bareMm ** 2) *
    (textile(wire.covering) ? AROUND_G_CM3.textile : AROUND_G_CM3.enamel);
  const grams = wireM(whole) * stretch * ((Math.PI / 4) * bareMm ** 2 * (DENSITY / 1e3) + around);
  const oldSections: OldSection[] = !sectioned
    ? []
    : ends.map((end, s) => {
        const inSection = end - (s === 0 ? 0 : ends[s - 1]!);
        const pushed = turns.filter((turn) => turn < end && turn > (s === 0 ? 0 : ends[s - 1]!)).length;
        const lengthMm = (inSection - 1) * pitchMm[s]! + overallMm + pushed * tapGapMm;
        const byLength = dice.maybe(0.3);
        return {
          turns: null,
          endsAtTap: turns.indexOf(end) + 1,
          pitchMm: close || byLength ? null : dice.read(pitchMm[s]!, 0.01 * pitchMm[s]!),
          lengthMm: byLength ? dice.read(lengthMm, dice.about(0.3)) : null,
          gapAfterMm: s === sections - 1 ? null : dice.read(sectionGapMm[s]!, dice.about(0.2)),
        };
      });
  const pitch = !close && (dice.maybe(0.5) || !lengthRead) ? dice.read(pitchMm[0]!, 0.01 * pitchMm[0]!) : null;
  const old: OldCoil = {
    diameters: diametersOf(dice, meanMm, overallMm),
    wire: {
      ...known,
      massG: dice.maybe(0.2) ? dice.read(grams, 0.02 * grams) : null,
      lengthM: dice.maybe(0.1) ? dice.read(wireM(whole) * stretch, 0.01 * wireM(whole)) : null,
    },
    pitchMm: close ? 'close' : sectioned ? null : pitch,
    windingLengthMm: lengthRead ? dice.read(windingLengthMm, dice.about(0.3)) : null,
    sections: oldSections,
    tapGapMm: tapGapRead,
    taps,
    hand,
    earthed: 'start',
    formerMaterial: null,
    meterSystematic: 0.01,
    selfCapacitance: 0.15,
    band: null,
    set: null,
    celsius: 20,
  };
  return {
    old,
    truth: {
      meanMm,
      bareMm,
      overallMm,
      pitchMm,
      sectionGapMm,
      tapGapMm,
      windingLengthMm,
      wireLengthM: wireM(whole),
      taps: turns.map((turn, i) => {
        const { turns: counted, positionMm, inductance, resonance, resistanceOhm } = taps[i]!;
        return {
          turn,
          positionMm: placeAt(turn),
          inductanceUh: coil.inductanceUh(turn),
          lost: [counted, positionMm, inductance, resonance, resistanceOhm].every((one) => one === null),
          uncounted: counted === null || counted.uncertainty > 0,
        };
      }),
    },
  };
}
