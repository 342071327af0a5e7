import { pushTo } from '../../domain/group.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import { nodeInWords } from './words.ts';

/** What names a member to its reader. */
export type Named = Pick<Member, 'tag' | 'name' | 'globalId' | 'assembly' | 'predefinedType' | 'class'>;

/** Members that make an assembly more than one piece of steel with its plates. */
const ASSEMBLED = 3;

/** A name that more than this share of the members bears names no truss among others. */
const NAMES_ALL = 0.6;

/** Nodes on one member from which it runs through like a chord. */
const RUNS_THROUGH = 3;

/** Places and marks that a sentence lists. */
const FEW = 3;

/** The words for nodes: whose they are, along which member, which chord, and where. */
export class Names {
  private readonly truss: Truss;
  private readonly members: readonly Named[];
  private readonly sizes = new Map<string, number>();
  private readonly nodesOfMember = new Map<number, number[]>();

  /** @param members those the truss was made of, or none: then only places are said. */
  constructor(truss: Truss, members: readonly Named[]) {
    this.truss = truss;
    this.members = members;
    for (const { assembly } of members)
      if (assembly !== null) this.sizes.set(assembly, (this.sizes.get(assembly) ?? 0) + 1);
    if (members.length > 0)
      truss.nodes.forEach((node, i) => {
        for (const member of node.members) pushTo(this.nodesOfMember, member, i);
      });
  }

  get knowsMembers(): boolean {
    return this.members.length > 0;
  }

  mark(member: number): string {
    const { tag, name, globalId } = this.members[member];
    return tag || name || globalId;
  }

  /** The truss (assembly) to which all of the nodes belong; null where there is none or more than one fits. */
  owner(nodes: readonly number[]): string | null {
    const common = this.common(nodes, (member) => {
      const { assembly } = this.members[member];
      const size = assembly === null ? 0 : (this.sizes.get(assembly) ?? 0);
      return size >= ASSEMBLED && size <= NAMES_ALL * this.members.length ? assembly : null;
    });
    return common.length === 1 ? common[0] : null;
  }

  /** "the node at B/2, +6.69 (D3L, BCL)", "the 4 bottom-chord nodes of Truss 3", "3 nodes along C17 (at A/1, +3.00, …)". */
  subject(nodes: readonly number[]): string {
    const owner = this.owner(nodes);
    const of = owner === null ? '' : ` of ${owner}`;
    if (nodes.length === 1) {
      const marks = owner === null ? this.marksAt(nodes[0]) : '';
      return `the node at ${nodeInWords(this.truss, nodes[0])}${of}${marks === '' ? '' : ` (${marks})`}`;
    }
    const chord = owner === null ? '' : this.chord(nodes, owner);
    if (owner !== null) return `the ${nodes.length} ${chord}nodes${of}`;
    const along = this.common(nodes, (member) => member);
    const where = along.length === 1 && nodes.length > 1 ? ` along ${this.mark(along[0])}` : '';
    return nodes.length <= FEW ? `the nodes${where} at ${this.places(nodes)}` : `${nodes.length} nodes${where}`;
  }

  places(nodes: readonly number[]): string {
    const shown = nodes.slice(0, FEW).map((i) => nodeInWords(this.truss, i));
    if (nodes.length > FEW) return `${shown.join('; ')} and ${nodes.length - FEW} more`;
    return shown.length === 1 ? shown[0] : `${shown.slice(0, -1).join('; ')} and ${shown[shown.length - 1]}`;
  }

  /** "M1, M2 and 4 more", each once. */
  marks(members: readonly number[]): string {
    const marks = [...new Set(members.map((member) => this.mark(member)))];
    const shown = marks.slice(0, FEW).join(', ');
    return marks.length > FEW ? `${shown} and ${marks.length - FEW} more` : shown;
  }

  private marksAt(node: number): string {
    return this.members.length === 0 ? '' : this.marks(this.truss.nodes[node].members);
  }

  private common<T>(nodes: readonly number[], pick: (member: number) => T | null): T[] {
    if (this.members.length === 0) return [];
    let shared: T[] | null = null;
    for (const node of nodes) {
      const here = new Set(this.truss.nodes[node].members.map(pick).filter((value): value is T => value !== null));
      shared = shared === null ? [...here] : shared.filter((value) => here.has(value));
      if (shared.length === 0) break;
    }
    return shared ?? [];
  }

  /** "bottom-chord " where all of the nodes lie on members that run along the truss below its middle. */
  private chord(nodes: readonly number[], owner: string): string {
    const own = [...this.nodesOfMember].filter(([member]) => this.members[member].assembly === owner);
    const heights = own.flatMap(([, at]) => at.map((i) => this.truss.nodes[i].at[2]));
    const middle = (Math.max(...heights) + Math.min(...heights)) / 2;
    const sides = new Map<number, Set<string>>();
    for (const [member, at] of own) {
      if (this.members[member].predefinedType !== 'CHORD' && at.length < RUNS_THROUGH) continue;
      const mean = at.reduce((sum, i) => sum + this.truss.nodes[i].at[2], 0) / at.length;
      for (const i of at) sides.set(i, (sides.get(i) ?? new Set()).add(mean > middle ? 'top' : 'bottom'));
    }
    for (const side of ['bottom', 'top'])
      if (nodes.every((node) => sides.get(node)?.has(side) && sides.get(node)?.size === 1)) return `${side}-chord `;
    return '';
  }
}

/** "Truss 1, Truss 2 and Truss 3", "Truss 1, Truss 2, Truss 3 and 4 more". */
export function listed(names: readonly string[]): string {
  if (names.length > FEW + 1) return `${names.slice(0, FEW).join(', ')} and ${names.length - FEW} more`;
  return names.length === 1 ? names[0] : `${names.slice(0, -1).join(', ')} and ${names[names.length - 1]}`;
}
