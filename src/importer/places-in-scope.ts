import type { Finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { Vec3 } from '../domain/vector.ts';
import type { ImportedModel } from './types.ts';

/** Least x and y of the members' ends; null where there are none. */
export function cornerOf(members: readonly Pick<Member, 'axis'>[]): Vec3 | null {
  if (members.length === 0) return null;
  let x = Number.POSITIVE_INFINITY;
  let y = Number.POSITIVE_INFINITY;
  for (const member of members) {
    const [from, to] = member.axis;
    x = Math.min(x, from[0], to[0]);
    y = Math.min(y, from[1], to[1]);
  }
  return [x, y, 0];
}

/**
 * The model with its places told from the lowest x and y of the members in `scope`, where no grid names them: a helper line
 * a kilometre off, that nobody asked for, is no corner that anybody knows.
 */
export function placedInScope<Scope extends { readonly members: readonly Member[] }>(
  imported: ImportedModel,
  scope: Scope,
): { readonly imported: ImportedModel; readonly scope: Scope } {
  const { placesFrom } = imported;
  if (placesFrom === null) return { imported, scope };
  const [corner, whole] = [cornerOf(scope.members), cornerOf(imported.members)];
  if (corner === null || whole === null || isSame(corner, whole)) return { imported, scope };
  const placeOf = placesFrom(corner);
  const placed = (found: Finding): Finding => (found.at === null ? found : { ...found, place: placeOf(found.at) });
  return { imported: { ...imported, placeOf, findings: imported.findings.map(placed) }, scope };
}

const isSame = (a: Vec3, b: Vec3): boolean => a[0] === b[0] && a[1] === b[1];
