import { DEFAULT_BRIEF } from './default-brief.ts';
import { toLoads } from './normalise-loads.ts';
import { toMemberSelectors, toNodeSelectors, withoutUndefined } from './normalise-selectors.ts';
import type { WrittenBrief } from './schema.ts';
import type { Brief, CaseRule, CombinationRule, HoldRule, Imperfections, LengthRule, SupportRule } from './types.ts';
import { toCodeRule, type WrittenCombinations } from './written-combinations.ts';
import type { Path } from './written-source.ts';

type LineAt = (path: Path) => number;
type WrittenSupport = NonNullable<WrittenBrief['supports']>[number];
type WrittenHold = NonNullable<WrittenBrief['holds']>[number];
type WrittenCase = NonNullable<WrittenBrief['cases']>[number];

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
    imperfections: toImperfections(written.imperfections),
    combinations: toCombinations(written.combinations ?? 'none', lineAt),
    codeRule: toCodeRule(written.combinations),
    site: { ...DEFAULT_BRIEF.site, ...withoutUndefined(written.site ?? {}) },
  };
}

function toImperfections(written: WrittenBrief['imperfections'] = 'none'): Imperfections | null {
  const { rule, along = [1, 0] } = typeof written === 'string' ? { rule: written } : written;
  if (rule === 'none') return null;
  const length = Math.hypot(along[0], along[1]);
  return { rule, along: [along[0] / length, along[1] / length] };
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
    ...(written.settle === undefined ? {} : { settle: written.settle }),
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
    loads: written.loads.flatMap((load, i) => toLoads(load, [...path, 'loads', i], lineAt)),
  };
}

function toCombinations(written: WrittenCombinations, lineAt: LineAt): CombinationRule[] {
  if (!Array.isArray(written)) return [];
  return written.map((rule, i) => ({ line: lineAt(['combinations', i]), ...rule }));
}
