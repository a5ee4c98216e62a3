/**
 * Reads a 3MF file back and holds it against the 3MF Core Specification and the package rules under it (ECMA-376 part 2),
 * as far as a file of plain objects comes under them; from memory. Own code, so that it and the writer can be wrong apart.
 */
import { unzipSync } from 'fflate';
import { readXml, type XmlElement } from './xml.ts';

export interface ReadObject {
  readonly id: number;
  readonly name: string | undefined;
  readonly partnumber: string | undefined;
  /** As a reader in double precision takes them. */
  readonly vertices: readonly (readonly [number, number, number])[];
  readonly triangles: readonly (readonly [number, number, number])[];
  readonly texts: readonly string[];
}

export interface ReadItem {
  readonly objectid: number;
  readonly partnumber: string | undefined;
  readonly transform: readonly number[];
  /** Of all vertices of its object, as it lies. */
  readonly min: readonly number[];
  readonly max: readonly number[];
}

export interface ReadBed {
  readonly metadata: Readonly<Record<string, string>>;
  readonly objects: readonly ReadObject[];
  readonly items: readonly ReadItem[];
}

const RELS = 'application/vnd.openxmlformats-package.relationships+xml';
const MODEL = 'application/vnd.ms-package.3dmanufacturing-3dmodel+xml';
const START_PART = 'http://schemas.microsoft.com/3dmanufacturing/2013/01/3dmodel';
const CORE = 'http://schemas.microsoft.com/3dmanufacturing/core/2015/02';
const WELL_KNOWN = ['Title', 'Designer', 'Description', 'Copyright', 'LicenseTerms', 'Rating', 'CreationDate'].concat(
  'ModificationDate',
  'Application',
);
const NUMBER = /^[-+]?(\d+(\.\d+)?|\.\d+)([eE][-+]?\d+)?$/;

function must(holds: boolean, rule: string): asserts holds {
  if (!holds) throw new Error(`3MF: ${rule}`);
}

/** The bytes of each part, by name. Every entry stored or deflated, none encrypted, none twice, all from the first minute. */
export function openPackage(bytes: Uint8Array): Map<string, string> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const parts = new Map<string, string>();
  let at = 0;
  for (; view.getUint32(at, true) === 0x04034b50; ) {
    const name = new TextDecoder('utf-8', { fatal: true }).decode(
      bytes.subarray(at + 30, at + 30 + view.getUint16(at + 26, true)),
    );
    must((view.getUint16(at + 6, true) & ~0x0800) === 0, `${name}: no flags but that for UTF-8`);
    must([0, 8].includes(view.getUint16(at + 8, true)), `${name}: stored or deflated`);
    must(view.getUint32(at + 10, true) === 0x00210000, `${name}: no date but the first of 1980`);
    must(![...parts.keys()].some((key) => key.toLowerCase() === name.toLowerCase()), `${name} twice`);
    parts.set(name, '');
    at += 30 + view.getUint16(at + 26, true) + view.getUint16(at + 28, true) + view.getUint32(at + 18, true);
  }
  must(view.getUint32(at, true) === 0x02014b50, 'the directory follows the entries');
  const files = unzipSync(bytes);
  must(Object.keys(files).join() === [...parts.keys()].join(), 'entries and directory agree');
  for (const [name, data] of Object.entries(files)) {
    if (name !== '[Content_Types].xml')
      for (const segment of name.split('/'))
        must(/^[A-Za-z0-9._~!$&'()*+,;=:@-]+$/.test(segment) && !segment.endsWith('.'), `part name ${name}`);
    parts.set(name, new TextDecoder('utf-8', { fatal: true }).decode(data));
  }
  return parts;
}

export function readThreemf(bytes: Uint8Array): ReadBed {
  const parts = openPackage(bytes);
  checkTypes(parts);
  const model = parts.get(startPart(parts));
  must(model !== undefined, 'the start part is there');
  return readModel(readXml(model));
}

function checkTypes(parts: Map<string, string>): void {
  const [root, ...types] = readXml(parts.get('[Content_Types].xml') ?? '');
  must(root?.name === 'Types', 'content types');
  must(root.attributes.xmlns === 'http://schemas.openxmlformats.org/package/2006/content-types', 'their namespace');
  const byExtension = new Map<string, string>();
  for (const { name, depth, attributes } of types) {
    must(name === 'Default' && depth === 1, 'only defaults are used');
    const extension = attributes.Extension!.toLowerCase();
    must(!byExtension.has(extension), `a type for ${extension} once`);
    byExtension.set(extension, attributes.ContentType!);
  }
  for (const name of parts.keys())
    if (name !== '[Content_Types].xml') {
      const type = byExtension.get(name.slice(name.lastIndexOf('.') + 1).toLowerCase());
      must(type === (name.endsWith('.rels') ? RELS : MODEL), `content type of ${name}`);
    }
}

function startPart(parts: Map<string, string>): string {
  const [root, ...links] = readXml(parts.get('_rels/.rels') ?? '');
  must(root?.name === 'Relationships', 'relationships of the package');
  must(root.attributes.xmlns === 'http://schemas.openxmlformats.org/package/2006/relationships', 'their namespace');
  const ids = new Set(links.map(({ attributes }) => attributes.Id));
  must(ids.size === links.length, 'ids of relationships differ');
  for (const { name, depth, attributes } of links) {
    must(name === 'Relationship' && depth === 1, 'nothing but relationships');
    must(/^[A-Za-z_][\w.-]*$/.test(attributes.Id ?? ''), 'the id is an XML name');
    must((attributes.TargetMode ?? 'Internal') === 'Internal', 'parts of this package');
  }
  const starts = links.filter(({ attributes }) => attributes.Type === START_PART);
  must(starts.length === 1, 'one start part');
  const target = starts[0]!.attributes.Target!;
  must(target.startsWith('/'), 'an absolute target');
  return target.slice(1);
}

function readModel(all: readonly XmlElement[]): ReadBed {
  let at = 0;
  const here = () => all[at];
  const take = (name: string, depth: number, required: readonly string[], optional: readonly string[] = []) => {
    const element = all[at++];
    must(element?.name === name && element.depth === depth, `${name} at depth ${depth}, not ${element?.name}`);
    for (const key of required) must(key in element.attributes, `${name} has ${key}`);
    for (const key of Object.keys(element.attributes))
      must(required.includes(key) || optional.includes(key), `${name} has no ${key}`);
    return element;
  };
  const model = take('model', 0, ['unit', 'xml:lang', 'xmlns']).attributes;
  must(model.unit === 'millimeter' && model.xmlns === CORE && /^[a-z]{2}(-|$)/.test(model['xml:lang']!), 'model');
  const metadata: Record<string, string> = {};
  while (here()?.name === 'metadata') {
    const element = take('metadata', 1, ['name']);
    const name = element.attributes.name!;
    must(WELL_KNOWN.includes(name), `metadata ${name} would need a namespace`);
    must(!(name in metadata), `metadata ${name} once`);
    metadata[name] = element.text;
  }
  take('resources', 1, []);
  const objects: ReadObject[] = [];
  while (here()?.name === 'object') {
    const { id, type, name, partnumber } = take('object', 2, ['id'], ['type', 'name', 'partnumber']).attributes;
    must(/^[1-9]\d*$/.test(id!) && Number(id) < 2 ** 31, `object id ${id}`);
    must(!objects.some((other) => other.id === Number(id)), `object ${id} once`);
    must(type === 'model', 'objects are models');
    take('mesh', 3, []);
    take('vertices', 4, []);
    const vertices: [number, number, number][] = [];
    const texts: string[] = [];
    while (here()?.name === 'vertex') {
      const { x, y, z } = take('vertex', 5, ['x', 'y', 'z']).attributes;
      for (const number of [x!, y!, z!]) must(NUMBER.test(number), `coordinate ${number}`);
      vertices.push([Number(x), Number(y), Number(z)]);
      texts.push(`${x} ${y} ${z}`);
    }
    must(vertices.length >= 3, 'three vertices or more');
    must(new Set(vertices.map(String)).size === vertices.length, 'vertices are shared: none twice');
    take('triangles', 4, []);
    const triangles: [number, number, number][] = [];
    while (here()?.name === 'triangle') {
      const { v1, v2, v3 } = take('triangle', 5, ['v1', 'v2', 'v3']).attributes;
      for (const index of [v1!, v2!, v3!])
        must(/^(0|[1-9]\d*)$/.test(index) && Number(index) < vertices.length, `vertex ${index} is there`);
      must(v1 !== v2 && v2 !== v3 && v3 !== v1, 'three different corners');
      triangles.push([Number(v1), Number(v2), Number(v3)]);
    }
    must(triangles.length >= 4, 'a model object has four triangles or more');
    checkSides(triangles, vertices);
    objects.push({ id: Number(id), name, partnumber, vertices, triangles, texts });
  }
  take('build', 1, []);
  const items: ReadItem[] = [];
  while (here()?.name === 'item') {
    const { objectid, transform, partnumber } = take('item', 2, ['objectid'], ['transform', 'partnumber']).attributes;
    const object = objects.find(({ id }) => String(id) === objectid);
    must(object !== undefined, `object ${objectid} is there`);
    const m = transform!.split(' ').map((number) => {
      must(NUMBER.test(number), `transform ${transform}`);
      return Number(number);
    });
    must(m.length === 12, 'twelve numbers');
    must(determinant(m) > 0, 'a positive determinant');
    items.push({ objectid: object.id, partnumber, transform: m, ...boxOf(object.vertices, m) });
    must(Math.min(...items.at(-1)!.min) >= -1e-9, `item ${items.length} inside the positive octant`);
  }
  must(at === all.length, 'nothing after the build');
  must(objects.length > 0 && items.length > 0, 'something to print');
  for (const { id } of objects)
    must(
      items.some((item) => item.objectid === id),
      `object ${id} is printed`,
    );
  return { metadata, objects, items };
}

/** Each side of a triangle is met by one in the opposite direction, and the whole faces outwards. */
function checkSides(triangles: ReadObject['triangles'], vertices: ReadObject['vertices']): void {
  const sides = new Set<number>();
  const n = vertices.length;
  let volume = 0;
  for (const [a, b, c] of triangles) {
    for (const side of [a * n + b, b * n + c, c * n + a]) {
      must(!sides.has(side), 'no side twice in one direction');
      sides.add(side);
    }
    const [p, q, r] = [vertices[a]!, vertices[b]!, vertices[c]!];
    volume +=
      p[0] * (q[1] * r[2] - q[2] * r[1]) + p[1] * (q[2] * r[0] - q[0] * r[2]) + p[2] * (q[0] * r[1] - q[1] * r[0]);
  }
  for (const side of sides) must(sides.has((side % n) * n + Math.floor(side / n)), 'every side has its opposite');
  must(volume > 0, 'triangles face outwards');
}

const determinant = (m: readonly number[]): number =>
  m[0]! * (m[4]! * m[8]! - m[5]! * m[7]!) -
  m[1]! * (m[3]! * m[8]! - m[5]! * m[6]!) +
  m[2]! * (m[3]! * m[7]! - m[4]! * m[6]!);

function boxOf(vertices: ReadObject['vertices'], m: readonly number[]): { min: number[]; max: number[] } {
  const min = [Infinity, Infinity, Infinity];
  const max = [-Infinity, -Infinity, -Infinity];
  for (const [x, y, z] of vertices)
    for (let k = 0; k < 3; k++) {
      const placed = x * m[k]! + y * m[3 + k]! + z * m[6 + k]! + m[9 + k]!;
      min[k] = Math.min(min[k]!, placed);
      max[k] = Math.max(max[k]!, placed);
    }
  return { min, max };
}
