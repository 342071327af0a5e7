import { cross, subtract, unit } from '../domain/vector.ts';
import type { Remark } from './findings-log.ts';
import type { MemberAxis } from './member-axis.ts';
import { makingRemark } from './sections/making-remark.ts';
import { namedSection } from './sections/named-section.ts';

const NO_REMARKS: readonly Remark[] = [];

/**
 * The axis with the section that `texts` (read only then) name, the first that names one, where its profile is not known; what is said of
 * that. A section that is named and measured alike is no guess.
 */
export function namedAxis(
  axis: MemberAxis,
  texts: () => readonly (string | null)[],
): { readonly axis: MemberAxis; readonly remarks: readonly Remark[] } {
  const named = namedSection(axis.section, texts);
  if (named === null) return { axis, remarks: NO_REMARKS };
  const { section, remark, isTurned } = named;
  const remarks = [remark, makingRemark(section)].filter((it) => it !== null);
  const along = unit(subtract(axis.ends[1], axis.ends[0]));
  const zAxis = isTurned && along !== null ? cross(along, axis.zAxis) : axis.zAxis;
  return { axis: { ...axis, section, zAxis, noSection: null, confidence: null }, remarks };
}
