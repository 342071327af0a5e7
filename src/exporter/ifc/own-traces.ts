import { afterLineEnding, asBuffer } from '../../step/bytes.ts';
import { walkReferences } from '../../step/reference-walk.ts';
import { openStep, type StepFile } from '../../step/step-file.ts';
import { drawGlobalId } from './global-id.ts';
import { OWN_TYPES } from './own-block.ts';
import { SET_DEFINITIONS } from './set-definitions.ts';

/** A model without what earlier runs left in it outside a block. */
export interface TracesSetAside {
  /** The model itself where there was nothing to take out, else an edited copy of it. */
  readonly file: StepFile;
  /** How many instances of ours were taken out. */
  readonly removed: number;
  /** How many had to stay because instances of others refer to them. */
  readonly kept: number;
}

const SET_NAMES = Object.keys(SET_DEFINITIONS);
/** After so many draws of one id nobody has ever had to draw again. */
const DRAWS = 4;

/**
 * Takes out what an earlier run wrote where another program has rewritten the file and our comments are gone. Our
 * instances are known by set name and GlobalId, both of which have to fit; what hangs on them (properties, a unit) goes
 * too. Only what no other instance refers to is taken out.
 */
export function setTracesAside(file: StepFile): TracesSetAside {
  if (!hasTraces(file)) return { file, removed: 0, kept: 0 };
  const roots = ownRoots(file);
  if (roots.size === 0) return { file, removed: 0, kept: 0 };

  const statements: Statements = { spans: new Map(), targets: new Map(), sources: new Map() };
  for (const [from, to] of outsideBlock(file)) walkStatements(file, from, to, statements);
  const own = removable(roots, statements);
  const spans = [...own].flatMap((id) => statements.spans.get(id) ?? []).sort((a, b) => a.begin - b.begin);
  return {
    file: own.size === 0 ? file : openStep(without(file.bytes, spans)),
    removed: own.size,
    kept: [...roots].filter((id) => !own.has(id)).length,
  };
}

/** A look at the bare bytes, which is all it costs where there is nothing of ours. */
function hasTraces(file: StepFile): boolean {
  const buffer = asBuffer(file.bytes);
  return outsideBlock(file).some(([from, to]) => {
    const at = buffer.indexOf("'Pinwright_", from, 'latin1');
    return at >= 0 && at < to;
  });
}

function outsideBlock({ bytes, block }: StepFile): (readonly [from: number, to: number])[] {
  return block === null
    ? [[0, bytes.length]]
    : [
        [0, block.begin],
        [block.end, bytes.length],
      ];
}

/** Sets and templates of ours, and the relationships that tie them. */
function ownRoots(file: StepFile): Set<number> {
  const roots = new Set<number>();
  const text = (id: number | null, index: number) => (id === null ? '' : (file.stringAt(id, index) ?? ''));
  const projects = file.idsOf('IFCPROJECT').map((id) => text(id, 0));

  for (const relation of file.idsOf('IFCRELDEFINESBYPROPERTIES')) {
    const set = file.refAt(relation, 5);
    if (set === null || !SET_NAMES.includes(text(set, 2))) continue;
    const objects = file.refsAt(relation, 4).map((id) => text(id, 0));
    if (!objects.some((object) => isDrawn(text(set, 0), text(set, 2), object))) continue;
    roots.add(set);
    if (isDrawn(text(relation, 0), 'defines', text(set, 0))) roots.add(relation);
  }
  for (const template of file.idsOf('IFCPROPERTYSETTEMPLATE')) {
    const name = text(template, 2);
    const isOwn = projects.some((project) => isDrawn(text(template, 0), 'template', `${project} ${name}`));
    if (SET_NAMES.includes(name) && isOwn) roots.add(template);
  }
  for (const relation of file.idsOf('IFCRELDEFINESBYTEMPLATE')) {
    if (roots.has(file.refAt(relation, 5) ?? 0)) roots.add(relation);
  }
  for (const relation of file.idsOf('IFCRELDECLARES')) {
    const isOwn = projects.some((project) => isDrawn(text(relation, 0), 'declares', project));
    if (isOwn && file.refsAt(relation, 5).every((id) => roots.has(id))) roots.add(relation);
  }
  return roots;
}

function isDrawn(globalId: string, role: string, of: string): boolean {
  for (let draw = 0; draw < DRAWS; draw++) if (drawGlobalId(role, of, 0, draw) === globalId) return true;
  return false;
}

interface Statements {
  readonly spans: Map<number, { readonly begin: number; readonly end: number }>;
  readonly targets: Map<number, number[]>;
  readonly sources: Map<number, number[]>;
}

/** Only instances of types that we write are kept: whatever else refers to one of them is found by its id. */
function walkStatements(file: StepFile, from: number, to: number, { spans, targets, sources }: Statements): void {
  const isOfOwnType = (id: number) => OWN_TYPES.has(file.typeOf(id));
  walkReferences(file.bytes, from, to, {
    instance: (id, begin, end) => {
      if (isOfOwnType(id)) spans.set(id, { begin, end: afterLineEnding(file.bytes, end) });
    },
    reference: (id, target) => {
      if (!isOfOwnType(target)) return;
      add(sources, target, id);
      if (isOfOwnType(id)) add(targets, id, target);
    },
  });
}

/** The roots and what hangs on them, less what others hold on to, and what that holds on to. */
function removable(roots: ReadonlySet<number>, { targets, sources }: Statements): Set<number> {
  const own = new Set(roots);
  for (const id of own) for (const target of targets.get(id) ?? []) own.add(target);
  for (let settled = false; !settled; ) {
    settled = true;
    for (const id of own) {
      if ((sources.get(id) ?? []).every((source) => own.has(source))) continue;
      own.delete(id);
      settled = false;
    }
  }
  return own;
}

function add(lists: Map<number, number[]>, key: number, value: number): void {
  const list = lists.get(key);
  if (list === undefined) lists.set(key, [value]);
  else list.push(value);
}

function without(bytes: Uint8Array, spans: readonly { readonly begin: number; readonly end: number }[]): Uint8Array {
  const pieces: Uint8Array[] = [];
  let from = 0;
  for (const { begin, end } of spans) {
    pieces.push(bytes.subarray(from, begin));
    from = end;
  }
  pieces.push(bytes.subarray(from));
  return Buffer.concat(pieces);
}
