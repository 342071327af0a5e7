import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import { distance } from '../domain/vector.ts';
import { isPlainlyNotSteel } from './material-words.ts';
import { findEmptyMemberSelectors } from './selector-empty.ts';
import { describeSelector } from './selectors/describe-selector.ts';
import { memberTest, withoutStandardCase } from './selectors/select-members.ts';
import type { Brief } from './types.ts';

const STRUCTURAL_CLASSES: ReadonlySet<string> = new Set(['ifcbeam', 'ifccolumn', 'ifcmember']);

/** Members of an analysis view are structure because the model says so. */
const ANALYSIS_CLASSES: ReadonlySet<string> = new Set(['ifcstructuralcurvemember', 'ifcstructuralcurvemembervarying']);

const ASSEMBLY = 'ifcelementassembly';

const SECONDARY_OWNERS: ReadonlySet<string> = new Set([
  ...['ifccurtainwall', 'ifcrailing', 'ifcstair', 'ifcstairflight', 'ifcramp', 'ifcrampflight', 'ifcdoor', 'ifcwindow'],
]);

// IfcMemberTypeEnum and IfcBeamTypeEnum: cladding, partition and stair parts, and beams that are concrete or stone by definition.
const SECONDARY_TYPES: ReadonlySet<string> = new Set([
  ...['MULLION', 'STUD', 'PLATE', 'STRINGER', 'HOLLOWCORE', 'HATSTONE', 'CORNICE', 'PIERCAP'],
]);

/** m. Detailers mark recesses, edges and pasted-on texts by bars of 1 x 1 mm; no bar of a roof is thinner than this. */
const DUMMY_BELOW = 0.003;

/** m. Of flats: surfaces are drawn as flats of 1 mm; sheet that carries is not modelled as a member. */
const DUMMY_FLAT_BELOW = 0.0015;

/**
 * The members that the brief is about. With `include` these are exactly the members it catches; without, beams, columns and
 * members (and parts of assemblies) that are plausibly steel structure. `exclude` then takes out what it catches. What is left
 * out is counted in one `out-of-scope` a reason. `whyNone` is said where there are no members at all.
 */
export function applyScope(
  members: readonly Member[],
  scope: Brief['scope'],
  whyNone: Finding | null = null,
): { members: Member[]; findings: Finding[]; cleats: Member[] } {
  const included = scope.include.map(memberTest);
  const excluded = scope.exclude.map((selector) => ({ selector, holds: memberTest(selector) }));
  const leftOut = new Map<string, LeftOut>();
  const cleats: Member[] = [];
  const kept = members.filter((member) => {
    const byInclude = included.some((holds) => holds(member));
    const exclusion = excluded.find(({ holds }) => holds(member));
    const reason: Reason | null =
      included.length > 0 && !byInclude
        ? { kind: 'not caught by the include of the brief' }
        : exclusion !== undefined
          ? {
              kind: `caught by the exclude of line ${exclusion.selector.line} of the brief, ${describeSelector(exclusion.selector)}`,
            }
          : included.length > 0
            ? null
            : whySecondary(member);
    if (reason === null) return true;
    if (reason === CLEAT) cleats.push(member);
    const group = leftOut.get(reason.kind) ?? { members: [], examples: new Map<string, number>() };
    leftOut.set(reason.kind, group);
    group.members.push(member);
    if (reason.example !== undefined) {
      group.examples.set(reason.example, (group.examples.get(reason.example) ?? 0) + 1);
    }
    return false;
  });
  const findings = findEmptyMemberSelectors(members, [...scope.include, ...scope.exclude]);
  for (const [kind, group] of leftOut) findings.push(sayLeftOut(kind, group));
  if (kept.length === 0) findings.push((members.length === 0 ? whyNone : null) ?? sayNothingLeft(members.length));
  return { members: kept, findings, cleats };
}

/** Why a member is left out: one note a kind, which lists its examples with their numbers. */
interface Reason {
  readonly kind: string;
  readonly example?: string;
}

interface LeftOut {
  readonly members: Member[];
  readonly examples: Map<string, number>;
}

function whySecondary(member: Member): Reason | null {
  if (ANALYSIS_CLASSES.has(member.class.toLowerCase())) return null;
  const owner = member.partOf;
  if (owner !== null && SECONDARY_OWNERS.has(owner.toLowerCase())) return { kind: `part of ${owner}` };
  if (!STRUCTURAL_CLASSES.has(withoutStandardCase(member.class).toLowerCase()) && owner?.toLowerCase() !== ASSEMBLY) {
    return { kind: `of class ${member.class}` };
  }
  const type = member.predefinedType?.toUpperCase();
  if (type !== undefined && SECONDARY_TYPES.has(type)) return { kind: `of predefined type ${type}` };
  if (isPlainlyNotSteel(member.material.name)) return { kind: 'not of steel', example: member.material.name };
  if (isDummy(member)) return { kind: 'too thin to be bars', example: member.section?.name ?? '' };
  if (isSheet(member)) return { kind: 'sheets of decking or cladding', example: member.section?.name ?? '' };
  return isCleat(member) ? CLEAT : null;
}

const CLEAT: Reason = {
  kind: 'cleats and plates drawn as members, too short to be bars; what they touch counts as fastened by them',
};

/** m; wider than any flat that is used as a bar, and thinner than a tenth of that: trapezoidal decking, cladding, a floor plate. */
const SHEET_ABOVE = 0.4;
const SHEET_THINNESS = 0.1;

function isSheet({ section }: Member): boolean {
  if (section === null || section.shape === 'I') return false;
  const [greater, lesser] = [Math.max(section.depth, section.width), Math.min(section.depth, section.width)];
  return greater > SHEET_ABOVE && lesser < SHEET_THINNESS * greater;
}

/** A stub post between a beam and a rafter is about half as long again as it is deep; a cleat is shorter. */
const CLEAT_SLENDERNESS = 1.25;
/** A gusset or an end plate drawn as a length of flat. */
const PLATE_SLENDERNESS = 2.5;
/** Thickness of a flat in its width, at most. */
const FLAT = 0.2;

function isCleat({ section, axis }: Member): boolean {
  if (section === null) return false;
  const [greater, lesser] = [Math.max(section.depth, section.width), Math.min(section.depth, section.width)];
  const isFlat = section.shape === 'rectangle' && lesser < FLAT * greater;
  return distance(axis[0], axis[1]) < (isFlat ? PLATE_SLENDERNESS : CLEAT_SLENDERNESS) * greater;
}

function isDummy({ section }: Member): boolean {
  if (section === null) return false;
  const [greater, lesser] = [Math.max(section.depth, section.width), Math.min(section.depth, section.width)];
  return greater < DUMMY_BELOW || (section.shape === 'rectangle' && lesser < DUMMY_FLAT_BELOW);
}

const EXAMPLES_LISTED = 4;

function sayLeftOut(kind: string, { members, examples }: LeftOut): Finding {
  const count = members.length;
  return finding(
    'out-of-scope',
    `${count} ${count === 1 ? 'member' : 'members'} left out: ${kind}${listed(examples)}.`,
    'Name them under scope: include in the brief if they belong to the truss.',
    { members: [...new Set(members.map((member) => member.globalId))] },
  );
}

/** " (Concrete: 12, Timber: 3 and 2 more)", the most frequent first. */
function listed(examples: ReadonlyMap<string, number>): string {
  if (examples.size === 0) return '';
  const ordered = [...examples].sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
  const words = ordered.slice(0, EXAMPLES_LISTED).map(([name, count]) => `${name}: ${count}`);
  const more = ordered.length - words.length;
  return ` (${words.join(', ')}${more > 0 ? ` and ${more} more` : ''})`;
}

function sayNothingLeft(count: number): Finding {
  const message = count === 0 ? 'The model has no members.' : `None of the ${count} members of the model is in scope.`;
  return finding('no-members', message, 'Name the members of the truss under scope: include in the brief.');
}
