/** One node as the parser gives it: its name with what it holds, or text; attributes under `:@`. */
export type RawNode = { readonly [name: string]: readonly RawNode[] | string | Readonly<Record<string, string>> };

export const TEXT = '#text';
export const CDATA = '#cdata';
const ATTRIBUTES = ':@';

/** An XML element without the prefixes of its names. */
export class XmlElement {
  readonly name: string;
  /** `id`: what others refer to it by. */
  readonly id: string | null;
  /** `ref` or `href`: what it refers to. */
  readonly target: string | null;
  /** `xsi:type`: what it is, where its name does not say so. */
  readonly type: string | null;
  /** `pos`: where in a list it belongs. */
  readonly pos: string | null;
  /** The attributes that belong to the model, name and value. */
  readonly data: readonly (readonly [string, string])[];
  /** The values of all attributes. */
  readonly attributeValues: readonly string[];
  private readonly inside: readonly RawNode[];

  constructor(name: string, node: RawNode) {
    this.name = localName(name);
    const inside = node[name];
    this.inside = Array.isArray(inside) ? (inside as readonly RawNode[]) : [];
    const control = new Map<string, string>();
    const data: (readonly [string, string])[] = [];
    const attributes = Object.entries((node[ATTRIBUTES] ?? {}) as Readonly<Record<string, string>>);
    this.attributeValues = attributes.map(([, value]) => value);
    for (const [key, value] of attributes) {
      const local = localName(key);
      if (local !== key || CONTROL.has(local)) control.set(local, decodeEntities(value));
      else data.push([local, decodeEntities(value)]);
    }
    this.data = data;
    this.id = control.get('id') ?? null;
    this.target = (control.get('href') ?? control.get('ref'))?.replace(/^#/, '') ?? null;
    this.pos = control.get('pos') ?? null;
    const type = control.get('type');
    this.type = type === undefined ? null : localName(type);
  }

  /** Elements in it, in order; made anew at each call. */
  children(): XmlElement[] {
    return elementsIn(this.inside);
  }

  /** The text in it, CDATA too. */
  text(): string {
    let text = '';
    for (const node of this.inside) {
      const plain = node[TEXT];
      const literal = node[CDATA];
      if (typeof plain === 'string') text += decodeEntities(plain);
      else if (Array.isArray(literal)) text += String((literal as readonly RawNode[])[0]?.[TEXT] ?? '');
    }
    return text;
  }
}

/** Attributes of the exchange format and not of the model, in their usual spelling without a prefix (ISO 10303-28). */
const CONTROL = new Set([
  'id',
  'ref',
  'href',
  'pos',
  'path',
  'proxy',
  'edo',
  'xmlns',
  'cType',
  'itemType',
  'arraySize',
]);

export function elementsIn(nodes: readonly RawNode[]): XmlElement[] {
  const elements: XmlElement[] = [];
  for (const node of nodes) {
    for (const name in node) {
      if (name !== ATTRIBUTES && name !== TEXT && name !== CDATA && !name.startsWith('?')) {
        elements.push(new XmlElement(name, node));
      }
    }
  }
  return elements;
}

function localName(name: string): string {
  return name.slice(name.lastIndexOf(':') + 1);
}

const NAMED: Readonly<Record<string, string>> = { amp: '&', lt: '<', gt: '>', quot: '"', apos: "'" };

/** The five entities that XML itself has, and characters by number; any others would need a DTD. */
function decodeEntities(text: string): string {
  if (!text.includes('&')) return text;
  return text.replace(/&(?:#x([0-9a-f]{1,6})|#(\d{1,7})|(amp|lt|gt|quot|apos));/gi, (whole, hex, decimal, name) => {
    if (name !== undefined) return NAMED[name] ?? whole;
    const code = hex === undefined ? Number(decimal) : Number.parseInt(hex, 16);
    return code > 0 && code <= 0x10ffff ? String.fromCodePoint(code) : '\ufffd';
  });
}
