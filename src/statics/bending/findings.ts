import { type Finding, finding } from '../../domain/finding.ts';
import { pushTo } from '../../domain/group.ts';
import type { Member } from '../../domain/member.ts';
import type { Truss } from '../../domain/truss.ts';
import { millimetres } from '../../domain/words.ts';
import type { BarBending } from './between-nodes.ts';
import type { EccentricityMoment } from './eccentricity-moments.ts';

/** Pa; bending below this stress (1 N/mm2) is not worth a word: common practice. */
const WORTH_SAYING = 1e6;

/** Bars that bend between their nodes, those of one section in one finding that names the worst. */
export function bendingFindings(bendings: readonly BarBending[], truss: Truss, members: readonly Member[]): Finding[] {
  const bySection = new Map<string, BarBending[]>();
  for (const bending of bendings) {
    const { section } = members[truss.bars[bending.bar].members[0]];
    const modulus = elasticModulus(section);
    if (modulus !== null && bending.moment < WORTH_SAYING * modulus) continue;
    pushTo(bySection, section?.name ?? 'no known section', bending);
  }
  return [...bySection].map(([section, group]) => {
    const worst = group.reduce((most, one) => (one.moment > most.moment ? one : most));
    const { name, length } = truss.bars[worst.bar];
    const { at, place, carriedBy } = truss.nodes[worst.node];
    const where = `${((carriedBy?.t ?? 0) * length).toFixed(2)} m along its ${length.toFixed(2)} m`;
    const most = `M = ${kilonewtonMetres(worst.moment)} at ${where}, in ${worst.from}`;
    const message =
      group.length === 1
        ? `${name} (${section}) bends between its nodes, where it carries another member or a load: ${most}. This bending is not checked.`
        : `${group.length} bars of ${section} bend between their nodes, where they carry other members or loads; ${name} the most: ${most}. This bending is not checked.`;
    const bent = new Set(group.flatMap(({ bar }) => truss.bars[bar].members));
    return finding(
      'bends-between-nodes',
      message,
      'Check the bars for it together with their axial force; or move what they carry to a panel point, or add a web member there.',
      { members: [...bent].map((member) => members[member].globalId), nodes: [worst.node], at, place },
    );
  });
}

/** The smaller of the two elastic moduli, m3; null without a section. */
function elasticModulus(section: Member['section']): number | null {
  if (section === null || !(section.depth > 0) || !(section.width > 0)) return null;
  return Math.min(section.inertiaY / (section.depth / 2), section.inertiaZ / (section.width / 2));
}

/** The findings of joining, with the moment said at the joints whose braces meet off the chord's axis. */
export function withMoments(findings: readonly Finding[], moments: readonly EccentricityMoment[]): Finding[] {
  const ofBraces = new Map(
    moments.filter(({ eccentricity }) => eccentricity.of === 'braces').map((one) => [one.node, one]),
  );
  return findings.map((found) => {
    const known = found.code === 'offset-joint' ? ofBraces.get(found.nodes[0]) : undefined;
    if (known === undefined || known.moment === null) return found;
    const { moment, from, eccentricity } = known;
    const force = moment / Math.abs(eccentricity.e) / 1000;
    const words = `M = dN e = ${force.toFixed(1)} kN x ${millimetres(Math.abs(eccentricity.e))} = ${kilonewtonMetres(moment)}, in ${from}`;
    return { ...found, message: `${found.message} At most ${words}.` };
  });
}

const kilonewtonMetres = (moment: number): string => {
  const value = moment / 1000;
  return `${value.toFixed(value >= 10 ? 1 : 2)} kNm`;
};
