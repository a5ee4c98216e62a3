/** A strict little reader of ASCII DXF: pairs of lines, sections, tables that close, one end. */

export type DxfPair = readonly [code: number, value: string];

export interface DxfEntity {
  readonly type: string;
  readonly pairs: DxfPair[];
}

/** The entities; throws where the pairs, sections, tables, polylines or layers are not as the format has them. */
export function readDxf(source: string): { sections: string[]; entities: DxfEntity[] } {
  const lines = source.split('\n');
  if (lines.pop() !== '' || lines.length % 2 !== 0) throw new Error('not pairs of lines');
  const pairs: DxfPair[] = [];
  for (let i = 0; i < lines.length; i += 2) {
    if (!/^ *\d{1,3}$/.test(lines[i]!)) throw new Error(`line ${i + 1} is no group code: ${lines[i]}`);
    const code = Number(lines[i]);
    const value = lines[i + 1]!;
    if (code >= 10 && code < 60 && !/^-?\d+(\.\d{1,4})?$/.test(value)) throw new Error(`line ${i + 2}: ${value}`);
    if (code >= 60 && code < 80 && !/^-?\d+$/.test(value)) throw new Error(`line ${i + 2}: ${value}`);
    if (code !== 999) pairs.push([code, value]);
  }
  const sections: string[] = [];
  const layers = new Set<string>();
  const types = new Set<string>();
  const entities: DxfEntity[] = [];
  let section = '';
  let table = false;
  let polyline = false;
  pairs.forEach(([code, value], i) => {
    const end = i === pairs.length - 1;
    if ((code === 0 && value === 'EOF') !== end) throw new Error('EOF is not the end');
    if (code !== 0) {
      if (section === 'ENTITIES') entities.at(-1)?.pairs.push([code, value]);
      const before = pairs[i - 1];
      if (code === 2 && before?.[0] === 0 && before[1] === 'LAYER') layers.add(value);
      if (code === 2 && before?.[0] === 0 && before[1] === 'LTYPE') types.add(value);
      return;
    }
    if (value === 'SECTION') {
      if (section !== '' || pairs[i + 1]?.[0] !== 2) throw new Error('a section in a section');
      section = pairs[i + 1]![1];
      sections.push(section);
    } else if (value === 'ENDSEC') {
      if (section === '' || table || polyline) throw new Error('ENDSEC out of place');
      section = '';
    } else if (value === 'TABLE' || value === 'ENDTAB') {
      if (section !== 'TABLES' || table === (value === 'TABLE')) throw new Error(`${value} out of place`);
      table = value === 'TABLE';
    } else if (section === 'ENTITIES') {
      if (polyline !== (value === 'VERTEX' || value === 'SEQEND')) throw new Error(`${value} out of place`);
      if (value === 'POLYLINE') polyline = true;
      if (value === 'SEQEND') polyline = false;
      entities.push({ type: value, pairs: [] });
    } else if (!end && !table) throw new Error(`${value} out of place`);
  });
  if (section !== '') throw new Error(`${section} stays open`);
  for (const { type, pairs: own } of entities)
    for (const [code, value] of own) {
      if (code === 8 && !layers.has(value)) throw new Error(`${type} on layer ${value}, which is not there`);
      if (code === 6 && !types.has(value)) throw new Error(`${type} of line type ${value}, which is not there`);
    }
  return { sections, entities };
}
