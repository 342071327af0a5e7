import { type ElementFacts, type Member, recordOf } from '../domain/member.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { Cursor } from '../step/cursor.ts';
import type { StepFile } from '../step/step-file.ts';
import type { FactsBook } from './facts.ts';
import { geometricOrder } from './geometric-order.ts';

/** What members have in common with others: most of a model's members are of a few kinds. */
export type Kind = Pick<
  Member,
  | 'class'
  | 'predefinedType'
  | 'type'
  | 'assembly'
  | 'partOf'
  | 'storey'
  | 'layer'
  | 'axisFrom'
  | 'zAxis'
  | 'section'
  | 'material'
>;

type Line = readonly [Vec3, Vec3];

/** Six coordinates: both ends. */
const SIZE = 6;
const FIRST_MEMBERS = 64;
/** Of so many kinds with one section the next member is likely to be one. */
const KINDS_TRIED = 16;
const NO_LINE = 0xffff_ffff;

/**
 * The members read from one file, in columns. The engine's garbage collection takes longer over some ten small objects a
 * member than reading them does, so that a member is a view of one row, made when all are read: what it has in common with others is
 * theirs too, and its names are read from the file when they are asked for.
 */
export class MemberStore {
  count = 0;
  private readonly file: StepFile;
  private readonly cursor: Cursor;
  readonly facts: FactsBook;
  /** A row a member: its instance, the order among several of one element, its kind, and where its lines stand. */
  private ids = new Uint32Array(FIRST_MEMBERS);
  private parts = new Uint32Array(FIRST_MEMBERS);
  private kinds = new Uint32Array(FIRST_MEMBERS);
  private axes = new Uint32Array(FIRST_MEMBERS);
  private centroids = new Uint32Array(FIRST_MEMBERS);
  private readonly globalIds: string[] = [];
  private lines = new Float64Array(SIZE * FIRST_MEMBERS);
  private lineCount = 0;
  /** Of the few that are bent. */
  private readonly bows = new Map<number, readonly Vec3[]>();
  private readonly kindList: Kind[] = [];
  private readonly kindsOf = new Map<Kind['section'], number[]>();

  constructor(file: StepFile, facts: FactsBook) {
    this.file = file;
    this.cursor = file.cursor();
    this.facts = facts;
  }

  /** Makes room for so many members, one a line, which saves copying the columns as they grow. */
  reserve(count: number): void {
    if (count > this.ids.length) this.resize(count);
    if (count * SIZE > this.lines.length) this.lines = enlarged(this.lines, new Float64Array(count * SIZE));
  }

  /**
   * @param line both ends, six coordinates
   * @param centroidLine `line` itself where the two are the same
   */
  add(
    id: number,
    globalId: string,
    part: number,
    line: Float64Array,
    centroidLine: Float64Array | null,
    kind: Kind,
    bow: readonly Vec3[] | null = null,
  ): void {
    const row = this.count++;
    if (row === this.ids.length) this.resize(2 * row);
    this.ids[row] = id;
    this.parts[row] = part;
    this.kinds[row] = this.kept(kind);
    const axis = this.keepLine(line);
    this.axes[row] = axis;
    this.centroids[row] = centroidLine === null ? NO_LINE : centroidLine === line ? axis : this.keepLine(centroidLine);
    this.globalIds.push(globalId);
    if (bow !== null) this.bows.set(row, bow);
  }

  /** The members in the order of geometry. */
  members(): Member[] {
    const found = new Array<Member>(this.count);
    const { lines, axes, globalIds, parts } = this;
    const isNamedAfter = (a: number, b: number): boolean =>
      globalIds[a] === globalIds[b] ? parts[a]! > parts[b]! : globalIds[a]! > globalIds[b]!;
    const order = geometricOrder(this.count, (row, k) => lines[axes[row]! + k]!, isNamedAfter);
    for (let i = 0; i < found.length; i++) found[i] = new StoredMember(this, order[i]!);
    return found;
  }

  /** Least x and y of the members' ends; null where there are none. */
  corner(): Vec3 | null {
    if (this.count === 0) return null;
    let x = Number.POSITIVE_INFINITY;
    let y = Number.POSITIVE_INFINITY;
    for (let row = 0; row < this.count; row++) {
      const at = this.axes[row]!;
      x = Math.min(x, this.lines[at]!, this.lines[at + 3]!);
      y = Math.min(y, this.lines[at + 1]!, this.lines[at + 4]!);
    }
    return [x, y, 0];
  }

  globalIdOf(row: number): string {
    return this.globalIds[row]!;
  }

  /** The text in an attribute of the element. The cursor may be asked first: what is wrong there was told when it was read. */
  textOf(row: number, index: number): string | null {
    const id = this.ids[row]!;
    return this.cursor.stringAt(id, index) ?? this.file.stringAt(id, index);
  }

  idOf(row: number): number {
    return this.ids[row]!;
  }

  partOf(row: number): number {
    return this.parts[row]!;
  }

  kindOf(row: number): Kind {
    return this.kindList[this.kinds[row]!]!;
  }

  axisOf(row: number): Line {
    return this.lineAt(this.axes[row]!);
  }

  centroidAxisOf(row: number): Line | null {
    const at = this.centroids[row]!;
    return at === NO_LINE ? null : this.lineAt(at);
  }

  bowOf(row: number): readonly Vec3[] | null {
    return this.bows.get(row) ?? null;
  }

  private lineAt(at: number): Line {
    const { lines } = this;
    return [
      [lines[at]!, lines[at + 1]!, lines[at + 2]!],
      [lines[at + 3]!, lines[at + 4]!, lines[at + 5]!],
    ];
  }

  private keepLine(line: Float64Array): number {
    const at = SIZE * this.lineCount++;
    if (at === this.lines.length) this.lines = enlarged(this.lines, new Float64Array(2 * at));
    for (let i = 0; i < SIZE; i++) this.lines[at + i] = line[i]!;
    return at;
  }

  private resize(rows: number): void {
    this.ids = enlarged(this.ids, new Uint32Array(rows));
    this.parts = enlarged(this.parts, new Uint32Array(rows));
    this.kinds = enlarged(this.kinds, new Uint32Array(rows));
    this.axes = enlarged(this.axes, new Uint32Array(rows));
    this.centroids = enlarged(this.centroids, new Uint32Array(rows));
  }

  /** The number of the kind that was met before, if it was met lately. */
  private kept(kind: Kind): number {
    let known = this.kindsOf.get(kind.section);
    if (known === undefined) {
      known = [];
      this.kindsOf.set(kind.section, known);
    }
    for (let i = known.length - 1; i >= 0; i--) if (isSame(this.kindList[known[i]!]!, kind)) return known[i]!;
    if (known.length === KINDS_TRIED) known.shift();
    known.push(this.kindList.length);
    this.kindList.push(kind);
    return this.kindList.length - 1;
  }
}

function enlarged<T extends Float64Array | Uint32Array>(array: T, larger: T): T {
  larger.set(array);
  return larger;
}

const isSame = (a: Kind, b: Kind): boolean =>
  a.zAxis === b.zAxis &&
  a.material === b.material &&
  a.storey === b.storey &&
  a.assembly === b.assembly &&
  a.type === b.type &&
  a.class === b.class &&
  a.predefinedType === b.predefinedType &&
  a.partOf === b.partOf &&
  a.layer === b.layer &&
  a.axisFrom === b.axisFrom &&
  a.section === b.section;

class StoredMember implements Member {
  private readonly store: MemberStore;
  private readonly row: number;

  constructor(store: MemberStore, row: number) {
    this.store = store;
    this.row = row;
  }

  private get kind(): Kind {
    return this.store.kindOf(this.row);
  }

  get globalId(): string {
    return this.store.globalIdOf(this.row);
  }

  get part(): number {
    return this.store.partOf(this.row);
  }

  get name(): string | null {
    return this.store.textOf(this.row, 2);
  }

  get tag(): string | null {
    return this.store.textOf(this.row, 7);
  }

  get class(): string {
    return this.kind.class;
  }

  get predefinedType(): string | null {
    return this.kind.predefinedType;
  }

  get type(): string | null {
    return this.kind.type;
  }

  get assembly(): string | null {
    return this.kind.assembly;
  }

  get partOf(): string | null {
    return this.kind.partOf;
  }

  get storey(): string | null {
    return this.kind.storey;
  }

  get layer(): string | null {
    return this.kind.layer;
  }

  get axisFrom(): Member['axisFrom'] {
    return this.kind.axisFrom;
  }

  get axis(): Line {
    return this.store.axisOf(this.row);
  }

  get bow(): readonly Vec3[] | null {
    return this.store.bowOf(this.row);
  }

  get centroidAxis(): Line | null {
    return this.store.centroidAxisOf(this.row);
  }

  get zAxis(): Vec3 {
    return this.kind.zAxis;
  }

  get section(): Member['section'] {
    return this.kind.section;
  }

  get material(): Member['material'] {
    return this.kind.material;
  }

  get facts(): ElementFacts {
    return this.store.facts.of(this.store.idOf(this.row));
  }

  toJSON(): Member {
    return recordOf(this);
  }
}
