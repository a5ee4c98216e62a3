/** Triangles by index. Coordinates are float32 from the start: that is what the kernel takes and what an STL holds. */
export interface TriangleMesh {
  /** x, y, z of each vertex. */
  readonly vertices: Float32Array;
  /** Three vertices a triangle, counterclockwise seen from outside. */
  readonly triangles: Uint32Array;
}

export class MeshBuilder {
  #vertices = new Float32Array(3 << 10);
  #triangles = new Uint32Array(3 << 11);
  #vertexEnd = 0;
  #triangleEnd = 0;

  vertex(x: number, y: number, z: number): number {
    const at = this.#vertexEnd;
    if (at + 3 > this.#vertices.length) this.#vertices = grown(this.#vertices, Float32Array);
    this.#vertices[at] = x;
    this.#vertices[at + 1] = y;
    this.#vertices[at + 2] = z;
    this.#vertexEnd = at + 3;
    return at / 3;
  }

  /** Triangles with a repeated corner are left out. */
  triangle(a: number, b: number, c: number): void {
    if (a === b || b === c || c === a) return;
    const at = this.#triangleEnd;
    if (at + 3 > this.#triangles.length) this.#triangles = grown(this.#triangles, Uint32Array);
    this.#triangles[at] = a;
    this.#triangles[at + 1] = b;
    this.#triangles[at + 2] = c;
    this.#triangleEnd = at + 3;
  }

  /** Corners counterclockwise; the diagonal runs from `a` to `c`. */
  quad(a: number, b: number, c: number, d: number): void {
    this.triangle(a, b, c);
    this.triangle(a, c, d);
  }

  /** `inverted` turns every triangle over. */
  build(inverted = false): TriangleMesh {
    const triangles = this.#triangles.slice(0, this.#triangleEnd);
    if (inverted)
      for (let i = 0; i < triangles.length; i += 3) {
        const b = triangles[i + 1]!;
        triangles[i + 1] = triangles[i + 2]!;
        triangles[i + 2] = b;
      }
    return { vertices: this.#vertices.slice(0, this.#vertexEnd), triangles };
  }
}

function grown<T extends Float32Array | Uint32Array>(old: T, Kind: new (length: number) => T): T {
  const next = new Kind(2 * old.length);
  next.set(old);
  return next;
}

/** Enclosed volume; negative when the triangles face inwards. */
export function signedVolume(mesh: TriangleMesh): number {
  const { vertices: v, triangles: t } = mesh;
  let sum = 0;
  for (let i = 0; i < t.length; i += 3) {
    const a = 3 * t[i]!;
    const b = 3 * t[i + 1]!;
    const c = 3 * t[i + 2]!;
    sum +=
      v[a]! * (v[b + 1]! * v[c + 2]! - v[b + 2]! * v[c + 1]!) +
      v[a + 1]! * (v[b + 2]! * v[c]! - v[b]! * v[c + 2]!) +
      v[a + 2]! * (v[b]! * v[c + 1]! - v[b + 1]! * v[c]!);
  }
  return sum / 6;
}
