import { EARTH } from '../physics/circuit/network.ts';

/** Nodes that switch and earth join: each group has one number in the network, earth has `EARTH`. */
export class NodeGroups {
  readonly #leader: number[];
  #earthed: number | null = null;
  /** Number of every group by its leader; null until asked for. */
  #numbers: ReadonlyMap<number, number> | null = null;

  constructor(nodes: number) {
    this.#leader = Array.from({ length: nodes }, (_, i) => i);
  }

  /** One more node, joined to nothing. */
  add(): number {
    this.#numbers = null;
    return this.#leader.push(this.#leader.length) - 1;
  }

  join(a: number, b: number): void {
    this.#numbers = null;
    const [one, other] = [this.#leader[a]!, this.#leader[b]!];
    for (let i = 0; i < this.#leader.length; i++) if (this.#leader[i] === other) this.#leader[i] = one;
  }

  earth(node: number): void {
    this.#numbers = null;
    if (this.#earthed === null) this.#earthed = node;
    else this.join(this.#earthed, node);
  }

  /** Of the network, earth left out. */
  get count(): number {
    return this.#groups().size;
  }

  numberOf(node: number): number {
    const leader = this.#leader[node];
    if (leader === undefined) throw new RangeError(`no node ${node}`);
    return this.#earthed !== null && leader === this.#leader[this.#earthed] ? EARTH : this.#groups().get(leader)!;
  }

  #groups(): ReadonlyMap<number, number> {
    if (this.#numbers === null) {
      const earth = this.#earthed === null ? null : this.#leader[this.#earthed]!;
      const leaders = [...new Set(this.#leader)].filter((leader) => leader !== earth);
      this.#numbers = new Map(leaders.map((leader, i) => [leader, i]));
    }
    return this.#numbers;
  }
}
