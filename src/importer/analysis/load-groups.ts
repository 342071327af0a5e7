import { pushTo } from '../../domain/group.ts';
import type { Vec3 } from '../../domain/vector.ts';
import { asEnum, asNumber, asNumbers, asRef, asRefs, asString } from '../../step/values.ts';
import type { Given, GivenCase, GivenCombination, GivenLoad } from '../given.ts';
import { NotRead } from '../not-read.ts';
import type { Sources } from '../read-element.ts';
import { limitOf, natureOf } from './action-words.ts';
import { type Frames, turned } from './frames.ts';
import { LOADS_WITHOUT_CASE, loadNotTaken } from './remarks.ts';

/** Part of a group, with the factor it takes part with. */
interface Part {
  readonly id: number;
  readonly factor: number;
}

/**
 * Load cases and combinations of the model. A case holds the actions of its groups times the groups' coefficients; its own
 * coefficient is a load factor, so it counts where the case takes part in a combination
 * (IfcStructuralLoadGroup.Coefficient, IfcRelAssignsToGroupByFactor). A load group that stands in no case is a case of its own.
 */
export function readLoadGroups(
  sources: Sources,
  frames: Frames,
  actions: ReadonlyMap<number, readonly GivenLoad[]>,
): Pick<Given, 'cases' | 'combinations'> {
  return new LoadGroups(sources, frames, actions).read();
}

type Kind = 'case' | 'combination' | 'group';

class LoadGroups {
  private readonly sources: Sources;
  private readonly frames: Frames;
  private readonly actions: ReadonlyMap<number, readonly GivenLoad[]>;
  private readonly kinds = new Map<number, Kind>();
  private readonly parts: Map<number, Part[]>;

  constructor(sources: Sources, frames: Frames, actions: ReadonlyMap<number, readonly GivenLoad[]>) {
    this.sources = sources;
    this.frames = frames;
    this.actions = actions;
    const { file } = sources.reading;
    for (const type of ['IFCSTRUCTURALLOADCASE', 'IFCSTRUCTURALLOADGROUP']) {
      for (const id of file.idsOf(type)) this.kinds.set(id, kindOf(type, asEnum(file.args(id)[5])));
    }
    this.parts = partsByGroup(sources);
  }

  read(): Pick<Given, 'cases' | 'combinations'> {
    const names = new Names();
    const stated = this.of('case');
    const used = new Set(stated.flatMap((id) => [...this.below(id)]));
    const loose = this.looseGroups(used);
    const cases = [...stated, ...loose].map((id) => ({ id, name: names.take(this.nameOf(id, 'Load case')) }));
    for (const id of loose) for (const part of this.below(id)) used.add(part);
    const built = cases.map(({ id, name }) => this.caseOf(id, name));
    const rest = [...this.actions].filter(([id, loads]) => !used.has(id) && loads.length > 0);
    if (rest.length > 0) {
      this.sources.reading.note(LOADS_WITHOUT_CASE(rest.length));
      const loads = rest.flatMap(([, own]) => own).filter(isSane);
      built.push({ name: names.take('Loads without a case'), nature: 'imposed', loads });
    }
    const nameOfCase = new Map(cases.map(({ id, name }) => [id, name]));
    const combinations = this.of('combination').map((id) => this.combinationOf(id, names, nameOfCase));
    return { cases: built, combinations: combinations.filter(({ factors }) => Object.keys(factors).length > 0) };
  }

  private of(kind: Kind): number[] {
    return [...this.kinds].flatMap(([id, own]) => (own === kind ? [id] : []));
  }

  /** Groups outside all cases that hold loads, the outermost of each nest. */
  private looseGroups(used: ReadonlySet<number>): number[] {
    const open = this.of('group').filter((id) => !used.has(id) && this.holdsActions(id));
    const inner = new Set(open.flatMap((id) => [...this.below(id)].filter((part) => part !== id)));
    return open.filter((id) => !inner.has(id));
  }

  private holdsActions(id: number): boolean {
    const below = this.below(id);
    const holdsCase = [...below].some((part) => part !== id && this.kinds.get(part) === 'case');
    return !holdsCase && [...below].some((part) => this.actions.has(part));
  }

  /** A group and all that is in it, however deep. */
  private below(id: number, found = new Set<number>()): Set<number> {
    if (found.has(id)) return found;
    found.add(id);
    for (const part of this.parts.get(id) ?? []) this.below(part.id, found);
    return found;
  }

  private caseOf(id: number, name: string): GivenCase {
    const args = this.sources.reading.args(id);
    const loads = this.loadsIn(id, 1, new Set());
    const weight = asNumbers(args[10]);
    if (weight.length === 3 && weight.some((ratio) => ratio !== 0)) {
      loads.push({ kind: 'selfWeight', factors: this.inWorld(id, weight as unknown as Vec3) });
    }
    const sound = loads.filter(isSane);
    if (sound.length < loads.length) this.sources.reading.note(loadNotTaken('absurd', 'their size is absurd'));
    return { name, nature: natureOf(asEnum(args[6]), asEnum(args[7])), loads: sound };
  }

  private inWorld(id: number, v: Vec3): Vec3 {
    try {
      return turned(this.frames.ofGroup(id), v);
    } catch (problem) {
      if (problem instanceof NotRead) return v;
      throw problem;
    }
  }

  private loadsIn(id: number, factor: number, above: ReadonlySet<number>): GivenLoad[] {
    if (above.has(id)) return [];
    const around = new Set(above).add(id);
    return (this.parts.get(id) ?? []).flatMap((part) => {
      const own = this.actions.get(part.id);
      if (own !== undefined) return own.map((load) => times(load, factor * part.factor));
      if (!this.kinds.has(part.id)) return [];
      return this.loadsIn(part.id, factor * part.factor * this.coefficientOf(part.id), around);
    });
  }

  private combinationOf(id: number, names: Names, nameOfCase: ReadonlyMap<number, string>): GivenCombination {
    const args = this.sources.reading.args(id);
    const factors: Record<string, number> = {};
    const gather = (group: number, factor: number, above: ReadonlySet<number>): void => {
      if (above.has(group)) return;
      const around = new Set(above).add(group);
      for (const part of this.parts.get(group) ?? []) {
        if (!this.kinds.has(part.id)) continue;
        const own = factor * part.factor * this.coefficientOf(part.id);
        const name = nameOfCase.get(part.id);
        if (name === undefined) gather(part.id, own, around);
        else factors[name] = (factors[name] ?? 0) + own;
      }
    };
    gather(id, this.coefficientOf(id), new Set());
    const stated = this.nameOf(id, 'Combination');
    const text = (i: number): string => asString(args[i]) ?? '';
    const limit = limitOf(text(9), `${text(2)} ${text(3)}`, asEnum(args[6]), Object.values(factors));
    return { name: names.take(stated), limit, factors };
  }

  private coefficientOf(id: number): number {
    return asNumber(this.sources.reading.args(id)[8]) ?? 1;
  }

  private nameOf(id: number, otherwise: string): string {
    const args = this.sources.reading.args(id);
    const texts = [asString(args[2]), asString(args[3])].map((text) => text?.trim() ?? '');
    return texts.find((text) => text !== '') ?? otherwise;
  }
}

function kindOf(type: string, predefined: string | null): Kind {
  if (type === 'IFCSTRUCTURALLOADCASE' || predefined === 'LOAD_CASE') return 'case';
  return predefined === 'LOAD_COMBINATION' ? 'combination' : 'group';
}

function partsByGroup({ reading }: Sources): Map<number, Part[]> {
  const parts = new Map<number, Part[]>();
  for (const type of ['IFCRELASSIGNSTOGROUP', 'IFCRELASSIGNSTOGROUPBYFACTOR']) {
    for (const relation of reading.file.idsOf(type)) {
      const args = reading.args(relation);
      const group = asRef(args[6]);
      const factor = type === 'IFCRELASSIGNSTOGROUP' ? 1 : (asNumber(args[7]) ?? 1);
      if (group !== null) for (const id of asRefs(args[4])) pushTo(parts, group, { id, factor });
    }
  }
  return parts;
}

function times(load: GivenLoad, k: number): GivenLoad {
  const by = (v: Vec3): Vec3 => [v[0] * k, v[1] * k, v[2] * k];
  if (load.kind === 'point') return { ...load, force: by(load.force) };
  if (load.kind === 'line') return { ...load, forceFrom: by(load.forceFrom), forceTo: by(load.forceTo) };
  if (load.kind === 'temperature') return { ...load, change: load.change * k };
  if (load.kind === 'settlement') return { ...load, movement: by(load.movement) };
  return { ...load, factors: by(load.factors) };
}

/** N, N/m, K or m; beyond it the sums of a solver are no numbers any more. */
const MOST = 1e15;

function isSane(load: GivenLoad): boolean {
  const numbers = Object.values(load)
    .flat()
    .filter((value) => typeof value === 'number');
  return numbers.every((value) => Math.abs(value) <= MOST);
}

/** Names of cases and combinations, each once: factors are told by name. */
class Names {
  private readonly taken = new Set<string>();

  take(stated: string): string {
    let name = stated;
    for (let i = 2; this.taken.has(name); i++) name = `${stated} (${i})`;
    this.taken.add(name);
    return name;
  }
}
