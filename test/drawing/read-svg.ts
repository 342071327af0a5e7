import { XMLParser, XMLValidator } from 'fast-xml-parser';

/** Drawings read back by an XML parser that is not ours. */

type Node = { readonly [name: string]: unknown };
export type SvgElement = Readonly<Record<string, string>>;

function parsed(svg: string): readonly Node[] {
  const verdict = XMLValidator.validate(svg);
  if (verdict !== true) throw new Error(verdict.err.msg);
  const options = { preserveOrder: true, ignoreAttributes: false, attributeNamePrefix: '', parseTagValue: false };
  return new XMLParser({ ...options, maxNestedTags: 100 }).parse(svg) as readonly Node[];
}

type See = (name: string, own: SvgElement, inside: readonly Node[], around: SvgElement) => void;

/** Calls `see` for every element, with its own attributes and with those of the groups round it. */
function walk(nodes: readonly Node[], around: SvgElement, see: See): void {
  for (const node of nodes) {
    for (const [name, inside] of Object.entries(node)) {
      if (!Array.isArray(inside)) continue;
      const own = (node[':@'] ?? {}) as SvgElement;
      see(name, own, inside as readonly Node[], around);
      walk(inside as readonly Node[], { ...around, ...own }, see);
    }
  }
}

/** The elements that have an attribute of their own, with what they inherit from their groups. */
export function elementsOf(svg: string, attribute: string): SvgElement[] {
  const found: SvgElement[] = [];
  walk(parsed(svg), {}, (_, own, __, around) => {
    if (own[attribute] !== undefined) found.push({ ...around, ...own });
  });
  return found;
}

export function textsOf(svg: string): string[] {
  const texts: string[] = [];
  walk(parsed(svg), {}, (name, _, inside) => {
    if (name === 'text') texts.push(inside.map((node) => String(node['#text'] ?? '')).join(''));
  });
  return texts;
}

/** The views of a sheet, each as SVG text of its own. */
export function viewsOf(svg: string): { readonly kind: string; readonly svg: string }[] {
  const parts = svg.split('<g class="view ').slice(1);
  return parts.map((part) => {
    const kind = part.slice(0, part.indexOf('"'));
    let depth = 1;
    const tag = /<g[ >]|<\/g>/g;
    for (let match = tag.exec(part); match !== null; match = tag.exec(part)) {
      depth += match[0] === '</g>' ? -1 : 1;
      if (depth === 0) return { kind, svg: `<g class="view ${part.slice(0, match.index)}</g>` };
    }
    throw new Error('a view is not closed');
  });
}
