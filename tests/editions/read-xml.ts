/** A strict reader for the XML that we write: elements, attributes, text, the five named entities. Anything else throws. */
export interface XmlElement {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: readonly XmlElement[];
  readonly content: string;
  all(name: string): readonly XmlElement[];
  /** Text of the one child of that name. */
  text(name: string): string;
}

const ENTITIES: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', '#39': "'" };

export function readXml(xml: string): XmlElement {
  const declaration = /^<\?xml version="1\.0" encoding="utf-8"\?>\s*/.exec(xml);
  if (!declaration) throw new Error('There is no XML declaration.');
  let at = declaration[0].length;
  const root = element();
  if (xml.slice(at).trim() !== '') throw new Error(`Something follows the root: ${xml.slice(at, at + 40)}`);
  return root;

  function element(): XmlElement {
    const open = /^<([a-z]+)((?:\s+[\w:-]+="[^"<]*")*)\s*(\/?)>/i.exec(xml.slice(at));
    if (!open) throw new Error(`No element begins at: ${xml.slice(at, at + 60)}`);
    at += open[0].length;
    const name = open[1] as string;
    const attributes = Object.fromEntries(
      [...(open[2] ?? '').matchAll(/([\w:-]+)="([^"]*)"/g)].map((pair) => [pair[1], decode(pair[2] ?? '')]),
    );
    const children: XmlElement[] = [];
    let content = '';
    while (open[3] !== '/') {
      if (xml.startsWith(`</${name}>`, at)) {
        at += name.length + 3;
        break;
      }
      if (xml[at] === '<') children.push(element());
      else {
        const end = xml.indexOf('<', at);
        if (end < 0) throw new Error(`<${name}> is never closed.`);
        content += decode(xml.slice(at, end));
        at = end;
      }
    }
    const all = (wanted: string) => children.filter((child) => child.name === wanted);
    const text = (wanted: string) => {
      const [only, second] = all(wanted);
      if (!only || second) throw new Error(`<${name}> has ${all(wanted).length} <${wanted}>, not one.`);
      return only.content;
    };
    return { name, attributes, children, content, all, text };
  }
}

function decode(text: string): string {
  if (/[\u0000-\u0008\u000b\u000c\u000e-\u001f]/.test(text))
    throw new Error('A control character that XML cannot carry.');
  return text.replace(/&([^;]*);?/g, (whole, entity: string) => {
    const mark = ENTITIES[entity];
    if (mark === undefined || !whole.endsWith(';')) throw new Error(`An unknown entity: ${whole}`);
    return mark;
  });
}
