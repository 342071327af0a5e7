import { DEFAULT_BRIEF } from './default-brief.ts';
import type { WrittenBrief } from './schema.ts';
import type {
  Brief,
  CaseRule,
  CombinationRule,
  HoldRule,
  LengthRule,
  LoadRule,
  MemberSelector,
  NodeSelector,
  SupportRule,
} from './types.ts';
import { toCodeRule, type WrittenCombinations } from './written-combinations.ts';
import type { WrittenMemberSelector, WrittenNodeSelector } from './written-selectors.ts';
import type { Path } from './written-source.ts';

type LineAt = (path: Path) => number;
type WrittenSupport = NonNullable<WrittenBrief['supports']>[number];
type WrittenHold = NonNullable<WrittenBrief['holds']>[number];
type WrittenCase = NonNullable<WrittenBrief['cases']>[number];
type WrittenLoad = WrittenCase['loads'][number];

/** Fills in the defaults of a checked brief and gives every rule and selector its line in the file. */
export function normaliseBrief(written: WrittenBrief, lineAt: LineAt): Brief {
  const { scope, joints, materials } = written;
  return {
    title: written.title ?? DEFAULT_BRIEF.title,
    source: written.source ?? DEFAULT_BRIEF.source,
    axes: written.axes ?? DEFAULT_BRIEF.axes,
    scope: {
      include: toMemberSelectors(scope?.include ?? [], ['scope', 'include'], lineAt),
      exclude: toMemberSelectors(scope?.exclude ?? [], ['scope', 'exclude'], lineAt),
    },
    joints: {
      ...DEFAULT_BRIEF.joints,
      ...withoutUndefined({
        ...joints,
        reach: toLengths(joints?.reach, ['joints', 'reach'], lineAt),
        offset: toLengths(joints?.offset, ['joints', 'offset'], lineAt),
      }),
    },
    chords: written.chords ?? DEFAULT_BRIEF.chords,
    analysis: written.analysis ?? DEFAULT_BRIEF.analysis,
    supports: (written.supports ?? []).map((rule, i) => toSupport(rule, ['supports', i], lineAt)),
    holds: (written.holds ?? []).map((rule, i) => toHold(rule, ['holds', i], lineAt)),
    materials: { default: materials?.default ?? DEFAULT_BRIEF.materials.default },
    sections: (written.sections ?? []).map(({ on, use }, i) => ({
      line: lineAt(['sections', i]),
      on: toMemberSelectors(on, ['sections', i, 'on'], lineAt),
      use: { ...use, from: 'brief' },
    })),
    tensionOnly: toMemberSelectors(written.tensionOnly ?? [], ['tensionOnly'], lineAt),
    compressionOnly: toMemberSelectors(written.compressionOnly ?? [], ['compressionOnly'], lineAt),
    cases: (written.cases ?? []).map((rule, i) => toCase(rule, ['cases', i], lineAt)),
    combinations: toCombinations(written.combinations ?? 'none', lineAt),
    codeRule: toCodeRule(written.combinations),
    site: { ...DEFAULT_BRIEF.site, ...withoutUndefined(written.site ?? {}) },
  };
}

type WrittenLengths = NonNullable<WrittenBrief['joints']>['reach'];

function toLengths(written: WrittenLengths, path: Path, lineAt: LineAt): number | LengthRule[] | undefined {
  if (written === undefined || typeof written === 'number') return written;
  return written.map(({ on, use }, i) => ({
    line: lineAt([...path, i]),
    on: toMemberSelectors(on, [...path, i, 'on'], lineAt),
    use,
  }));
}

function toSupport(written: WrittenSupport, path: Path, lineAt: LineAt): SupportRule {
  return {
    line: lineAt(path),
    at: toNodeSelectors(written.at, [...path, 'at'], lineAt),
    fix: written.fix ?? [],
    springs: written.spring ?? [],
  };
}

function toHold({ on, nodes, along, because }: WrittenHold, path: Path, lineAt: LineAt): HoldRule {
  return {
    line: lineAt(path),
    on: on === undefined ? null : toMemberSelectors(on, [...path, 'on'], lineAt),
    nodes: nodes === undefined ? null : toNodeSelectors(nodes, [...path, 'nodes'], lineAt),
    along: along ?? null,
    because,
  };
}

function toCase(written: WrittenCase, path: Path, lineAt: LineAt): CaseRule {
  return {
    line: lineAt(path),
    name: written.name,
    nature: written.nature,
    ...(written.category === undefined ? {} : { category: written.category }),
    ...(written.alternative === undefined ? {} : { alternative: written.alternative }),
    loads: written.loads.map((load, i) => toLoad(load, [...path, 'loads', i], lineAt)),
  };
}

function toLoad(written: WrittenLoad, path: Path, lineAt: LineAt): LoadRule {
  const line = lineAt(path);
  if ('selfWeight' in written) {
    const { selfWeight } = written;
    return { kind: 'selfWeight', line, factor: typeof selfWeight === 'number' ? selfWeight : selfWeight.factor };
  }
  if ('area' in written) {
    const { area: pressure, acts, per } = written;
    return { kind: 'area', line, pressure, over: toNodeSelectors(written.over, [...path, 'over'], lineAt), acts, per };
  }
  if ('line' in written) {
    const on = toMemberSelectors(written.on, [...path, 'on'], lineAt);
    return { kind: 'line', line, force: written.line, on, per: written.per };
  }
  return { kind: 'point', line, force: written.point, at: toNodeSelectors(written.at, [...path, 'at'], lineAt) };
}

function toCombinations(written: WrittenCombinations, lineAt: LineAt): CombinationRule[] {
  if (!Array.isArray(written)) return [];
  return written.map((rule, i) => ({ line: lineAt(['combinations', i]), ...rule }));
}

function toMemberSelectors(written: readonly WrittenMemberSelector[], path: Path, lineAt: LineAt): MemberSelector[] {
  return written.map((selector, i) => toMemberSelector(selector, [...path, i], lineAt));
}

function toMemberSelector(written: WrittenMemberSelector, path: Path, lineAt: LineAt): MemberSelector {
  const { not, ...keys } = withoutUndefined(written);
  const selector: MemberSelector = { line: lineAt(path), ...(keys as Omit<MemberSelector, 'line' | 'not'>) };
  return not === undefined ? selector : { ...selector, not: toMemberSelector(not, [...path, 'not'], lineAt) };
}

function toNodeSelectors(written: readonly WrittenNodeSelector[], path: Path, lineAt: LineAt): NodeSelector[] {
  return written.map((selector, i) => toNodeSelector(selector, [...path, i], lineAt));
}

function toNodeSelector(written: WrittenNodeSelector, path: Path, lineAt: LineAt): NodeSelector {
  const { not, endOf, joins, ...keys } = withoutUndefined(written);
  return {
    line: lineAt(path),
    ...(keys as Omit<NodeSelector, 'line' | 'not' | 'endOf' | 'joins'>),
    ...(endOf === undefined ? {} : { endOf: toMemberSelectors(endOf, [...path, 'endOf'], lineAt) }),
    ...(joins === undefined ? {} : { joins: toMemberSelectors(joins, [...path, 'joins'], lineAt) }),
    ...(not === undefined ? {} : { not: toNodeSelector(not, [...path, 'not'], lineAt) }),
  };
}

type Defined<T> = { [K in keyof T]: Exclude<T[K], undefined> };

function withoutUndefined<T extends object>(written: T): Defined<T> {
  return Object.fromEntries(Object.entries(written).filter(([, value]) => value !== undefined)) as Defined<T>;
}
