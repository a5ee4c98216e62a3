/**
 * A coil from what the record says of its turns, and every figure of it that follows: by sums over pairs of turns, and along the wire by
 * short chords. Nothing of the program's own is asked. Millimetres and microhenry outside.
 */
import type { Winding } from '../../src/record/schema.ts';
import { arcShare, corneredTurn, outline, roundTurn, type Turn, twoCircles } from './rings.ts';

export type Places = Pick<
  Winding,
  'turns' | 'pitchMm' | 'turnPositionsMm' | 'meanDiameterMm' | 'corners' | 'bendMm'
> & { readonly wire: { readonly bareMm: number } };

const SLACK = 1e-9;

/** A stretch of wire within one turn. */
interface Piece {
  readonly turn: number;
  readonly share: number;
  readonly z: number;
}

export class PlainCoil {
  readonly winding: Places;
  readonly turn: Turn;
  readonly #whole: number;
  readonly #mutual = new Map<number, number>();
  readonly #own: number;
  readonly #sums: number[];
  readonly #arcs = new Map<number, number>();

  constructor(winding: Places) {
    this.winding = winding;
    const { meanDiameterMm, corners, bendMm = 0, turns, wire } = winding;
    this.turn =
      corners === undefined
        ? roundTurn(meanDiameterMm / 2e3)
        : corneredTurn(meanDiameterMm / 2e3, corners, bendMm / 1e3);
    this.#whole = Math.floor(turns + SLACK);
    this.#own = this.turn.own(wire.bareMm / 2e3);
    this.#sums = [0];
    const z = winding.turnPositionsMm;
    for (let i = 0; i < this.#whole; i++) {
      let sum = this.#sums[i]! + this.#own;
      for (let j = 0; j < i; j++) sum += 2 * this.#between(z[i]! - z[j]!);
      this.#sums.push(sum);
    }
  }

  /** M of two turns so far apart, mm and H. Distances are whole tenths of a micrometre in a record. */
  #between(mm: number): number {
    const key = Math.round(Math.abs(mm) * 1e6);
    let found = this.#mutual.get(key);
    if (found === undefined) {
      found = this.turn.mutual(key / 1e9);
      this.#mutual.set(key, found);
    }
    return found;
  }

  #arc(share: number): number {
    if (share > 1 - 1e-7) return 1;
    const key = Math.round(share * 1e7);
    let found = this.#arcs.get(key);
    if (found === undefined) {
      found = arcShare(share, this.turn.radius, this.winding.wire.bareMm / 2e3);
      this.#arcs.set(key, found);
    }
    return found;
  }

  /** Z of the wire at so many turns from the start: straight on the developed surface between the middles of the turns. */
  at(turn: number): number {
    const { turnPositionsMm: z, turns, pitchMm } = this.winding;
    const middles = z.map((_, i) => (i < this.#whole ? i + 0.5 : (this.#whole + turns) / 2));
    const after = middles.findIndex((u) => u > turn);
    if (after === 0) return z[0]! - (middles[0]! - turn) * pitchMm;
    const last = z.length - 1;
    if (after < 0) return z[last]! + (turn - middles[last]!) * pitchMm;
    const share = (turn - middles[after - 1]!) / (middles[after]! - middles[after - 1]!);
    return z[after - 1]! + share * (z[after]! - z[after - 1]!);
  }

  /** Low frequency, turns 0..turn. */
  uh(turn: number): number {
    const whole = Math.min(Math.floor(turn + 1e-6), this.#whole);
    const part = turn - whole;
    let sum = this.#sums[whole]!;
    if (part > 1e-6) {
      const z = this.at(whole + part / 2);
      for (let i = 0; i < whole; i++) sum += 2 * part * this.#between(z - this.winding.turnPositionsMm[i]!);
      sum += this.#arc(part) * this.#own;
    }
    return sum * 1e6;
  }

  #pieces(from: number, to: number): Piece[] {
    const pieces: Piece[] = [];
    for (let turn = Math.floor(from + 1e-6); turn < to - 1e-6; turn++) {
      const [a, b] = [Math.max(turn, from), Math.min(turn + 1, to)];
      pieces.push({ turn, share: b - a, z: this.at((a + b) / 2) });
    }
    return pieces;
  }

  /** Inductance matrix of the stretches between these turns, H. */
  matrix(nodes: readonly number[]): number[][] {
    const stretches = nodes.slice(1).map((to, i) => this.#pieces(nodes[i]!, to));
    const own = (share: number) => this.#arc(share) * this.#own;
    const two = (a: Piece, b: Piece) =>
      a.turn === b.turn
        ? (own(Math.min(1, a.share + b.share)) - own(a.share) - own(b.share)) / 2
        : a.share * b.share * this.#between(a.z - b.z);
    return stretches.map((first, i) =>
      stretches.map((second, j) => {
        let sum = 0;
        for (const a of first) for (const b of second) sum += i === j && a === b ? own(a.share) : two(a, b);
        return sum;
      }),
    );
  }

  /** M of the turns 0..turn with all turns of a coil of other turns on the same axis; both are taken as circles. */
  mutualUh(turn: number, other: PlainCoil, shiftMm = 0): number {
    let sum = 0;
    const [mine, theirs] = [this.#pieces(0, turn), other.#pieces(0, other.winding.turns)];
    for (const a of mine)
      for (const b of theirs)
        sum += a.share * b.share * twoCircles(this.turn.radius, other.turn.radius, (a.z - b.z - shiftMm) / 1e3);
    return sum * 1e6;
  }

  /** Wire from the start to a turn, m, added up over short chords as it climbs. */
  wireM(turn: number): number {
    const { meanDiameterMm, corners, bendMm = 0 } = this.winding;
    let sum = 0;
    if (corners === undefined) {
      const pieces = Math.ceil(turn * 240);
      let before = this.at(0);
      // A chord is shorter than its arc by t^2/24, here 3e-5: the angle is taken out of it.
      const chord = (Math.PI * meanDiameterMm * turn) / pieces;
      for (let i = 1; i <= pieces; i++) {
        const here = this.at((i * turn) / pieces);
        sum += Math.hypot(chord, here - before);
        before = here;
      }
      return sum / 1e3;
    }
    const points = outline(meanDiameterMm / 2, corners, bendMm, 12);
    const n = points.length;
    // The outline begins half way between two ribs, the wire at a rib.
    const first = n / corners / 2;
    const steps = Math.round(turn * n);
    let before = this.at(0);
    for (let i = 0; i < steps; i++) {
      const [a, b] = [points[(first + i) % n]!, points[(first + i + 1) % n]!];
      const here = this.at((i + 1) / n);
      sum += Math.hypot(b[0] - a[0], b[1] - a[1], here - before);
      before = here;
    }
    return sum / 1e3;
  }

  /** The same turns with measures changed; `moved` is what each turn's middle is moved by. */
  changed(change: Partial<Places>, moved: (turn: number) => number = () => 0): PlainCoil {
    const { turns } = this.winding;
    const middle = (i: number) => (i < this.#whole ? i + 0.5 : (this.#whole + turns) / 2);
    return new PlainCoil({
      ...this.winding,
      turnPositionsMm: this.winding.turnPositionsMm.map((z, i) => z + moved(middle(i))),
      ...change,
    });
  }
}
