/** A strict little reader of XML, as far as drawings use it: elements, attributes, text, the five named entities. */

export interface XmlElement {
  readonly name: string;
  /** 0 for the root. */
  readonly depth: number;
  readonly attributes: Readonly<Record<string, string>>;
  /** Its own text, entities read. */
  text: string;
}

const ENTITIES: Record<string, string> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };
const NAME = '[A-Za-z_][A-Za-z0-9_.:-]*';
const TAG = new RegExp(`^<(${NAME})((?:\\s+${NAME}="[^"<]*")*)\\s*(/?)>`);

function read(text: string): string {
  return text.replace(/&([^;]*;?)/g, (whole, name: string) => {
    const sign = name.endsWith(';') ? ENTITIES[name.slice(0, -1)] : undefined;
    if (sign === undefined) throw new Error(`no such entity: ${whole}`);
    return sign;
  });
}

/** The elements in the order in which they open; throws at whatever is not well formed. */
export function readXml(source: string): XmlElement[] {
  if (/[^\t\n\r\u{20}-\u{d7ff}\u{e000}-\u{fffd}\u{10000}-\u{10ffff}]/u.test(source))
    throw new Error('a sign XML has not');
  let rest = source.replace(/^<\?xml version="1\.0" encoding="UTF-8"\?>\n/, '');
  const all: XmlElement[] = [];
  const open: XmlElement[] = [];
  while (rest.trim() !== '') {
    const next = rest.indexOf('<');
    const text = next < 0 ? rest : rest.slice(0, next);
    if (open.length > 0) open[open.length - 1]!.text += read(text);
    else if (text.trim() !== '') throw new Error(`text outside: ${text}`);
    rest = rest.slice(text.length);
    if (rest === '') break;
    const end = /^<\/([^>]*)>/.exec(rest);
    if (end) {
      if (open.pop()?.name !== end[1]) throw new Error(`${end[0]} closes nothing`);
      rest = rest.slice(end[0].length);
      continue;
    }
    const tag = TAG.exec(rest);
    if (!tag) throw new Error(`no tag: ${rest.slice(0, 60)}`);
    if (open.length === 0 && all.length > 0) throw new Error('a second root');
    const attributes: Record<string, string> = {};
    for (const [, key, value] of tag[2]!.matchAll(/\s+([^\s=]+)="([^"]*)"/g)) {
      if (key! in attributes) throw new Error(`${key} twice`);
      attributes[key!] = read(value!);
    }
    const element = { name: tag[1]!, depth: open.length, attributes, text: '' };
    all.push(element);
    if (tag[3] === '') open.push(element);
    rest = rest.slice(tag[0].length);
  }
  if (open.length > 0 || all.length === 0) throw new Error('something stays open');
  return all;
}
