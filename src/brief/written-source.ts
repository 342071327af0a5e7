import { isAlias, isMap, isPair, isScalar, isSeq, LineCounter, type Node, parseDocument, visit } from 'yaml';
import { oneLine, quoted } from './one-line.ts';

export type Path = readonly PropertyKey[];

/** Something wrong with a brief, where it stands in the file. Lines and columns count from 1. */
export interface Problem {
  readonly line: number;
  readonly column: number;
  readonly message: string;
}

/** The values of a brief as written, with the place of each. `value` means nothing where there are problems. */
export interface WrittenSource {
  readonly value: unknown;
  readonly problems: readonly Problem[];
  /** The text at the path, on one line and cut to a readable length. */
  excerpt(path: Path): string;
  /** Where the value at the path stands; the nearest one around it where it is missing. */
  place(path: Path): { line: number; column: number };
  /** Where the key stands in the mapping at the path. */
  placeOfKey(path: Path, key: string): { line: number; column: number };
}

/** Reads YAML 1.2 or JSON. Never throws for what the text says: syntax errors come back as problems. */
export function readSource(text: string): WrittenSource {
  const lines = new LineCounter();
  const at = (offset: number) => {
    const { line, col } = lines.linePos(offset);
    return { line: Math.max(line, 1), column: Math.max(col, 1) };
  };
  // Doubled keys are looked for here, because the parser's own look is quadratic in the number of keys.
  const document = parseDocument(text, { version: '1.2', prettyErrors: false, lineCounter: lines, uniqueKeys: false });
  const problems: Problem[] = [...document.errors, ...document.warnings].map((error) => ({
    ...at(error.pos[0]),
    message: `${quoted(text.slice(...error.pos))}${oneLine(error.message)}`,
  }));
  if (document.directives?.yaml.explicit === true && document.directives.yaml.version !== '1.2') {
    problems.push({ line: 1, column: 1, message: 'a brief is YAML 1.2: leave the %YAML line out' });
  }
  const root = document.contents as Node | null;
  if (problems.length === 0) findForbidden(document, (offset, message) => problems.push({ ...at(offset), message }));
  const offsetOf = (path: Path) => nodeAt(root, path).range?.[0] ?? 0;
  return {
    value: problems.length === 0 ? document.toJS({ maxAliasCount: 0 }) : undefined,
    problems,
    excerpt: (path) => {
      const [from, to] = nodeAt(root, path).range ?? [0, 0];
      return quoted(text.slice(from, to));
    },
    place: (path) => at(offsetOf(path)),
    placeOfKey: (path, key) => {
      const node = nodeAt(root, path);
      const pair = isMap(node) ? node.items.find((item) => keyText(item.key) === key) : undefined;
      return at((pair?.key as Node | undefined)?.range?.[0] ?? offsetOf(path));
    },
  };
}

/** What YAML allows and a brief does not: anchors, aliases, tags of one's own, keys that are not words, doubled keys. */
function findForbidden(
  document: ReturnType<typeof parseDocument>,
  report: (offset: number, message: string) => void,
): void {
  visit(document, (_, node) => {
    if (isPair(node) || !(isAlias(node) || isScalar(node) || isMap(node) || isSeq(node))) return;
    const offset = node.range?.[0] ?? 0;
    if (isAlias(node))
      report(offset, `"*${oneLine(node.source)}": aliases are not allowed in a brief; write the value out`);
    else if (node.anchor !== undefined) {
      report(
        offset,
        `"&${oneLine(node.anchor)}": anchors are not allowed in a brief; write the value out where it is needed`,
      );
    }
    if (!isAlias(node) && node.tag !== undefined && !CORE_TAGS.has(node.tag)) {
      report(offset, `"${oneLine(node.tag)}": tags are not allowed in a brief`);
    }
    if (!isMap(node)) return;
    const seen = new Set<string>();
    for (const { key } of node.items) {
      const start = (key as Node | null)?.range?.[0] ?? offset;
      const name = keyText(key);
      if (name === null) report(start, 'a key is one word or a text, not a list or a mapping');
      else if (seen.has(name)) report(start, `"${oneLine(name)}": this key stands twice in one mapping`);
      else seen.add(name);
    }
  });
}

const CORE_TAGS: ReadonlySet<string> = new Set(
  ['str', 'int', 'float', 'bool', 'null', 'map', 'seq'].map((name) => `tag:yaml.org,2002:${name}`),
);

function keyText(key: unknown): string | null {
  if (!isScalar(key)) return null;
  return key.value === null ? '' : String(key.value);
}

function nodeAt(root: Node | null, path: Path): { range?: readonly [number, number, number] | null | undefined } {
  let node = root;
  for (const step of path) {
    let next: unknown;
    const named = isMap(node) ? node.items.find((item) => keyText(item.key) === String(step)) : undefined;
    // Where one rule may stand for a list of one, item 0 is the rule itself.
    if (step === 0 && isMap(node) && named === undefined) continue;
    if (isMap(node)) next = named?.value;
    else if (isSeq(node)) next = node.items[Number(step)];
    if (!isScalar(next) && !isMap(next) && !isSeq(next)) break;
    node = next;
  }
  return node ?? {};
}
