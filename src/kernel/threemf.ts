/**
 * One print bed as a 3MF file, by the 3MF Core Specification 1.x: an OPC package (ECMA-376 part 2) of a content-type list,
 * one relationship and one model. Written here because a mesh must share its vertices by index. From memory.
 *
 * Same bed, same bytes: fixed order, no dates, and a compressor that does not change with the platform.
 */
import { zipSync } from 'fflate';
import { signedVolume, type TriangleMesh } from './mesh.ts';
import { MeshError } from './mesh-error.ts';

export interface BedObject {
  readonly id: string;
  /** For people; any text. */
  readonly name: string;
  /** Welded, closed, facing outwards; lengths in millimetres. */
  readonly mesh: TriangleMesh;
}

export interface BedItem {
  /** `id` of its object. */
  readonly object: string;
  readonly name: string;
  /** Lower left corner of its box as it lies on the bed; 0 or more. */
  readonly xMm: number;
  readonly yMm: number;
  /** By a quarter turn, counterclockwise from above. */
  readonly turned: boolean;
}

export interface PrintBed {
  readonly title: string;
  readonly objects: readonly BedObject[];
  readonly items: readonly BedItem[];
}

/** Coordinates are written on a grid of 0.1 um, finer than any printer, and than float32 beyond a metre. */
const GRID = 1e4;
/** Greatest coordinate: its grid number must fit 31 bits. */
const FARTHEST_MM = 1e5;
/**
 * Of fflate's 1 to 9. A grooved former of 90,000 triangles takes 0.25 s and 780 kB at level 3, 0.34 s and 730 kB at level 6,
 * 0.25 s and 990 kB at level 1.
 */
const LEVEL = 3;

const HEAD = '<?xml version="1.0" encoding="UTF-8"?>\n';
const OPC = 'http://schemas.openxmlformats.org/package/2006';
const MODEL = '3D/3dmodel.model';
const TYPES = `${HEAD}<Types xmlns="${OPC}/content-types">
<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>
<Default Extension="model" ContentType="application/vnd.ms-package.3dmanufacturing-3dmodel+xml"/>
</Types>
`;
const START = `${HEAD}<Relationships xmlns="${OPC}/relationships">
<Relationship Id="start" Type="http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel" Target="/${MODEL}"/>
</Relationships>
`;
const CORE = 'http://schemas.microsoft.com/3dmanufacturing/core/2015/02';

/**
 * Each object that an item uses once, in the order given, and an item a copy. Every item stands on z = 0 with its box where
 * the item says. Vertices lie within 0.05 um of the mesh's, and no two become one.
 *
 * @throws MeshError for a mesh that 3MF cannot hold; Error for a bed without items, with an unknown or a doubled object, or
 *   with an item outside the positive octant
 */
export function threemfBytes(bed: PrintBed): Uint8Array<ArrayBuffer> {
  const used = new Set(bed.items.map((item) => item.object));
  const objects = bed.objects.filter((object) => used.has(object.id));
  const numbers = new Map(objects.map((object, i) => [object.id, i + 1]));
  if (bed.items.length === 0) throw new Error('a bed without items');
  if (numbers.size < objects.length) throw new Error('two objects of a bed with one id');
  for (const id of used) if (!numbers.has(id)) throw new Error(`no object ${id} on the bed`);

  const out = new Bytes();
  out.text(`${HEAD}<model unit="millimeter" xml:lang="en" xmlns="${CORE}">\n`);
  out.text(`<metadata name="Title">${written(bed.title)}</metadata>\n`);
  out.text('<metadata name="Application">coilwright</metadata>\n<resources>\n');
  const boxes = new Map<string, Box>();
  for (const object of objects) {
    const names = `${attribute('name', object.name)}${attribute('partnumber', object.id)}`;
    out.text(`<object id="${numbers.get(object.id)}" type="model"${names}>\n<mesh>\n<vertices>\n`);
    boxes.set(object.id, writeVertices(out, object));
    out.text('</vertices>\n<triangles>\n');
    writeTriangles(out, object);
    out.text('</triangles>\n</mesh>\n</object>\n');
  }
  out.text('</resources>\n<build>\n');
  for (const item of bed.items) {
    out.text(`<item objectid="${numbers.get(item.object)}" transform="`);
    writeTransform(out, item, boxes.get(item.object)!);
    out.text(`"${attribute('partnumber', item.name)}/>\n`);
  }
  out.text('</build>\n</model>\n');

  const ascii = (text: string) => new TextEncoder().encode(text);
  return zipSync(
    { '[Content_Types].xml': ascii(TYPES), '_rels/.rels': ascii(START), [MODEL]: out.bytes() },
    // A zip holds local time: this is its first minute in every time zone.
    { level: LEVEL, mtime: new Date(1980, 0, 1) },
  );
}

/** On the grid. */
interface Box {
  readonly min: readonly [number, number, number];
  readonly max: readonly [number, number, number];
}

function writeVertices(out: Bytes, { id, mesh }: BedObject): Box {
  const { vertices: v } = mesh;
  const grid = new Int32Array(v.length);
  for (let i = 0; i < v.length; i++) {
    if (!(Math.abs(v[i]!) <= FARTHEST_MM)) throw new MeshError(id, 'writing 3MF', `a coordinate of ${v[i]} mm`);
    grid[i] = Math.round(v[i]! * GRID);
  }
  const crowded = crowdedPlaces(grid);
  const min: [number, number, number] = [FARTHEST_MM * GRID, FARTHEST_MM * GRID, FARTHEST_MM * GRID];
  const max: [number, number, number] = [-min[0], -min[0], -min[0]];
  for (let i = 0; i < v.length; i += 3) {
    const exact = crowded[i / 3] === 1;
    for (let k = 0; k < 3; k++) {
      const low = exact ? Math.floor(v[i + k]! * GRID) : grid[i + k]!;
      const high = exact ? Math.ceil(v[i + k]! * GRID) : low;
      if (low < min[k]!) min[k] = low;
      if (high > max[k]!) max[k] = high;
      out.text(AXIS[k]!);
      if (exact) out.text(String(v[i + k]!));
      else out.grid(grid[i + k]!);
    }
    out.text('"/>\n');
  }
  return { min, max };
}

const AXIS = ['<vertex x="', '" y="', '" z="'] as const;

/**
 * 1 for each vertex that shares its place on the grid with another. Those are written exactly: then they differ, and none
 * can fall on a third, because what lies on a grid place is rounded to that place.
 */
function crowdedPlaces(grid: Int32Array): Uint8Array {
  const count = grid.length / 3;
  const size = 1 << Math.ceil(Math.log2(2 * count + 2));
  const table = new Int32Array(size).fill(-1);
  const crowded = new Uint8Array(count);
  for (let i = 0; i < count; i++) {
    const x = grid[3 * i]!;
    const y = grid[3 * i + 1]!;
    const z = grid[3 * i + 2]!;
    let slot = (Math.imul(x, 73856093) ^ Math.imul(y, 19349663) ^ Math.imul(z, 83492791)) >>> 0;
    slot = (slot ^ (slot >>> 15)) & (size - 1);
    for (; table[slot]! >= 0; slot = (slot + 1) & (size - 1)) {
      const k = table[slot]!;
      if (grid[3 * k] === x && grid[3 * k + 1] === y && grid[3 * k + 2] === z) {
        crowded[k] = 1;
        crowded[i] = 1;
        break;
      }
    }
    table[slot] = i;
  }
  return crowded;
}

function writeTriangles(out: Bytes, { id, mesh }: BedObject): void {
  const { triangles: t } = mesh;
  const count = mesh.vertices.length / 3;
  const volume = signedVolume(mesh);
  if (!(volume > 0))
    throw new MeshError(id, 'writing 3MF', `a volume of ${volume} mm3; expected one that faces outwards`);
  for (let i = 0; i < t.length; i += 3) {
    const a = t[i]!;
    const b = t[i + 1]!;
    const c = t[i + 2]!;
    if (a === b || b === c || c === a || Math.max(a, b, c) >= count)
      throw new MeshError(id, 'writing 3MF', `triangle ${i / 3} with corners ${a}, ${b}, ${c} of ${count} vertices`);
    out.text('<triangle v1="');
    out.whole(a);
    out.text('" v2="');
    out.whole(b);
    out.text('" v3="');
    out.whole(c);
    out.text('"/>\n');
  }
}

/** Rows of a matrix that multiplies a row vector from the right; the last row is the shift. */
function writeTransform(out: Bytes, item: BedItem, { min, max }: Box): void {
  const x = Math.round(item.xMm * GRID);
  const y = Math.round(item.yMm * GRID);
  if (!(x >= 0) || !(y >= 0)) throw new Error(`${item.name} at ${item.xMm}, ${item.yMm} mm is outside the bed`);
  out.text(item.turned ? '0 1 0 -1 0 0 0 0 1 ' : '1 0 0 0 1 0 0 0 1 ');
  out.grid(item.turned ? x + max[1] : x - min[0]);
  out.text(' ');
  out.grid(item.turned ? y - min[0] : y - min[1]);
  out.text(' ');
  out.grid(-min[2]);
}

function attribute(key: string, text: string): string {
  const value = written(text);
  return value === '' ? '' : ` ${key}="${value}"`;
}

const ENTITY: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' };

/** What XML 1.0 has no place for is left out; white space becomes single blanks, as a reader of attributes would do. */
function written(text: string): string {
  return text
    .replace(/[^\t\n\r\u{20}-\u{d7ff}\u{e000}-\u{fffd}\u{10000}-\u{10ffff}]/gu, '')
    .replace(/\s+/g, ' ')
    .trim()
    .replace(/[&<>"]/g, (sign) => ENTITY[sign]!);
}

/** UTF-8 that grows. Numbers go in digit by digit: strings of them would take most of the time. */
class Bytes {
  #bytes = new Uint8Array(1 << 20);
  #end = 0;

  text(text: string): void {
    this.#room(3 * text.length);
    for (let i = 0; i < text.length; i++) {
      const code = text.charCodeAt(i);
      if (code < 128) this.#bytes[this.#end++] = code;
      else {
        this.#end += new TextEncoder().encodeInto(text.slice(i), this.#bytes.subarray(this.#end)).written;
        return;
      }
    }
  }

  /** 0 to 2^32 - 1. */
  whole(n: number): void {
    this.#room(10);
    let digits = 1;
    for (let ten = 10; ten <= n; ten *= 10) digits++;
    let rest = n;
    for (let at = this.#end + digits - 1; at >= this.#end; at--) {
      const next = Math.floor(rest / 10);
      this.#bytes[at] = 48 + rest - 10 * next;
      rest = next;
    }
    this.#end += digits;
  }

  /** Grid steps as millimetres, without trailing zeros. */
  grid(steps: number): void {
    this.#room(16);
    if (steps < 0) this.#bytes[this.#end++] = 45;
    const size = Math.abs(steps);
    const mm = Math.floor(size / GRID);
    this.whole(mm);
    let rest = size - mm * GRID;
    if (rest === 0) return;
    this.#bytes[this.#end++] = 46;
    for (let unit = GRID / 10; rest > 0; unit /= 10) {
      const digit = Math.floor(rest / unit);
      this.#bytes[this.#end++] = 48 + digit;
      rest -= digit * unit;
    }
  }

  bytes(): Uint8Array<ArrayBuffer> {
    return this.#bytes.subarray(0, this.#end);
  }

  #room(more: number): void {
    if (this.#end + more <= this.#bytes.length) return;
    const next = new Uint8Array(2 * (this.#end + more));
    next.set(this.#bytes);
    this.#bytes = next;
  }
}
