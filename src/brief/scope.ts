import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import { isPlainlyNotSteel } from './material-words.ts';
import { findEmptyMemberSelectors } from './selector-empty.ts';
import { describeSelector } from './selectors/describe-selector.ts';
import { memberTest, withoutStandardCase } from './selectors/select-members.ts';
import type { Brief } from './types.ts';

const STRUCTURAL_CLASSES: ReadonlySet<string> = new Set(['ifcbeam', 'ifccolumn', 'ifcmember']);

const ASSEMBLY = 'ifcelementassembly';

const SECONDARY_OWNERS: ReadonlySet<string> = new Set([
  ...['ifccurtainwall', 'ifcrailing', 'ifcstair', 'ifcstairflight', 'ifcramp', 'ifcrampflight', 'ifcdoor', 'ifcwindow'],
]);

// IfcMemberTypeEnum and IfcBeamTypeEnum: cladding, partition and stair parts, and beams that are concrete or stone by definition.
const SECONDARY_TYPES: ReadonlySet<string> = new Set([
  ...['MULLION', 'STUD', 'PLATE', 'STRINGER', 'HOLLOWCORE', 'HATSTONE', 'CORNICE', 'PIERCAP'],
]);

/**
 * The members that the brief is about. With `include` these are exactly the members it catches; without, beams, columns and
 * members (and parts of assemblies) that are plausibly steel structure. `exclude` then takes out what it catches. What is left
 * out is counted in one `out-of-scope` a reason.
 */
export function applyScope(
  members: readonly Member[],
  scope: Brief['scope'],
): { members: Member[]; findings: Finding[] } {
  const included = scope.include.map(memberTest);
  const excluded = scope.exclude.map((selector) => ({ selector, holds: memberTest(selector) }));
  const leftOut = new Map<string, Member[]>();
  const kept = members.filter((member) => {
    const byInclude = included.some((holds) => holds(member));
    const exclusion = excluded.find(({ holds }) => holds(member));
    const reason =
      included.length > 0 && !byInclude
        ? 'not caught by the include of the brief'
        : exclusion !== undefined
          ? `caught by the exclude of line ${exclusion.selector.line} of the brief, ${describeSelector(exclusion.selector)}`
          : included.length > 0
            ? null
            : whySecondary(member);
    if (reason === null) return true;
    const others = leftOut.get(reason);
    if (others === undefined) leftOut.set(reason, [member]);
    else others.push(member);
    return false;
  });
  const findings = findEmptyMemberSelectors(members, [...scope.include, ...scope.exclude]);
  for (const [reason, group] of leftOut) findings.push(sayLeftOut(reason, group));
  if (kept.length === 0) findings.push(sayNothingLeft(members.length));
  return { members: kept, findings };
}

function whySecondary(member: Member): string | null {
  const owner = member.partOf;
  if (owner !== null && SECONDARY_OWNERS.has(owner.toLowerCase())) return `part of ${owner}`;
  if (!STRUCTURAL_CLASSES.has(withoutStandardCase(member.class).toLowerCase()) && owner?.toLowerCase() !== ASSEMBLY) {
    return `of class ${member.class}`;
  }
  const type = member.predefinedType?.toUpperCase();
  if (type !== undefined && SECONDARY_TYPES.has(type)) return `of predefined type ${type}`;
  if (isPlainlyNotSteel(member.material.name)) return `of material ${member.material.name}, not steel`;
  return null;
}

function sayLeftOut(reason: string, group: readonly Member[]): Finding {
  return finding(
    'out-of-scope',
    `${group.length} ${group.length === 1 ? 'member' : 'members'} left out: ${reason}.`,
    'Name them under scope: include in the brief if they belong to the truss.',
    { members: [...new Set(group.map((member) => member.globalId))] },
  );
}

function sayNothingLeft(count: number): Finding {
  const message = count === 0 ? 'The model has no members.' : `None of the ${count} members of the model is in scope.`;
  return finding('no-members', message, 'Name the members of the truss under scope: include in the brief.');
}
