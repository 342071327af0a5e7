import type { Axis } from './axes.ts';
import type { Contact } from './contacts.ts';

/** How far axes were allowed to be carried in one model. */
export interface JoinLimits {
  readonly reach: LimitUse;
  readonly offset: LimitUse;
}

export interface LimitUse {
  /** What the brief sets, m, and for how many members; the smallest first. */
  readonly set: readonly { readonly value: number; readonly members: number }[];
  /** Least and greatest that the sections of members that met gave, before evidence widened it, m; null where none did. */
  readonly bySections: readonly [least: number, greatest: number] | null;
}

export function limitsUsed(axes: readonly (Axis | null)[], contacts: readonly Contact[]): JoinLimits {
  return { reach: useOf('reach', axes, contacts), offset: useOf('offset', axes, contacts) };
}

function useOf(limit: 'reach' | 'offset', axes: readonly (Axis | null)[], contacts: readonly Contact[]): LimitUse {
  const members = new Map<number, number>();
  for (const axis of axes) {
    const value = axis?.[limit] ?? null;
    if (axis !== null && value !== null) members.set(value, (members.get(value) ?? 0) + 1 + axis.also.length);
  }
  let bySections: readonly [number, number] | null = null;
  for (const contact of contacts) {
    const value = contact[limit];
    const isSet = [contact.a, contact.b].some((member) => (axes[member]?.[limit] ?? null) !== null);
    if (value === null || isSet || contact.kind !== 'meets' || contact.by.length > 0) continue;
    const [least, greatest]: readonly [number, number] = bySections ?? [value, value];
    bySections = [Math.min(least, value), Math.max(greatest, value)];
  }
  const set = [...members].sort(([p], [q]) => p - q).map(([value, count]) => ({ value, members: count }));
  return { set, bySections };
}
