import { type ElementFacts, type Member, recordOf } from '../domain/member.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { StepFile } from '../step/step-file.ts';
import type { FactsBook } from './facts.ts';

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
const FIRST_LINES = 64;
/** Of so many kinds with one section the next member is likely to be one. */
const KINDS_TRIED = 16;

/**
 * The members read from one file. The engine's garbage collection takes longer over some ten small objects a member than
 * reading them does, so that a member is one: its line stands in one array with all the others', what it has in common with
 * others is theirs too, and its names are read from the file when they are asked for.
 */
export class MemberStore {
  readonly file: StepFile;
  readonly facts: FactsBook;
  private lines = new Float64Array(SIZE * FIRST_LINES);
  private count = 0;
  /** Of the few that are bent, by where their lines stand. */
  private readonly bows = new Map<number, readonly Vec3[]>();
  private readonly kinds = new Map<Kind['section'], Kind[]>();

  constructor(file: StepFile, facts: FactsBook) {
    this.file = file;
    this.facts = facts;
  }

  /** @param centroidLine `line` itself where the two are the same */
  add(
    id: number,
    globalId: string,
    part: number,
    line: Line,
    centroidLine: Line | null,
    kind: Kind,
    bow: readonly Vec3[] | null = null,
  ): Member {
    const at = this.keepLine(line);
    if (bow !== null) this.bows.set(at, bow);
    return new StoredMember(
      this,
      id,
      at,
      globalId,
      part,
      centroidLine === line ? 'own' : centroidLine,
      this.kept(kind),
    );
  }

  lineAt(at: number): Line {
    const { lines } = this;
    return [
      [lines[at]!, lines[at + 1]!, lines[at + 2]!],
      [lines[at + 3]!, lines[at + 4]!, lines[at + 5]!],
    ];
  }

  bowAt(at: number): readonly Vec3[] | null {
    return this.bows.get(at) ?? null;
  }

  private keepLine([from, to]: Line): number {
    const at = SIZE * this.count++;
    if (at === this.lines.length) {
      const larger = new Float64Array(2 * at);
      larger.set(this.lines);
      this.lines = larger;
    }
    this.lines[at] = from[0];
    this.lines[at + 1] = from[1];
    this.lines[at + 2] = from[2];
    this.lines[at + 3] = to[0];
    this.lines[at + 4] = to[1];
    this.lines[at + 5] = to[2];
    return at;
  }

  /** The kind that was met before, if it was met lately. */
  private kept(kind: Kind): Kind {
    let known = this.kinds.get(kind.section);
    if (known === undefined) {
      known = [];
      this.kinds.set(kind.section, known);
    }
    for (let i = known.length - 1; i >= 0; i--) if (isSame(known[i]!, kind)) return known[i]!;
    if (known.length === KINDS_TRIED) known.shift();
    known.push(kind);
    return kind;
  }
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
  readonly globalId: string;
  readonly part: number;
  private readonly store: MemberStore;
  private readonly id: number;
  private readonly at: number;
  private readonly centroidLine: Line | 'own' | null;
  private readonly kind: Kind;

  constructor(
    store: MemberStore,
    id: number,
    at: number,
    globalId: string,
    part: number,
    centroidLine: Line | 'own' | null,
    kind: Kind,
  ) {
    this.store = store;
    this.id = id;
    this.at = at;
    this.globalId = globalId;
    this.part = part;
    this.centroidLine = centroidLine;
    this.kind = kind;
  }

  get name(): string | null {
    return this.store.file.stringAt(this.id, 2);
  }

  get tag(): string | null {
    return this.store.file.stringAt(this.id, 7);
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
    return this.store.lineAt(this.at);
  }

  get bow(): readonly Vec3[] | null {
    return this.store.bowAt(this.at);
  }

  get centroidAxis(): Line | null {
    return this.centroidLine === 'own' ? this.axis : this.centroidLine;
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
    return this.store.facts.of(this.id);
  }

  toJSON(): Member {
    return recordOf(this);
  }
}
