import type { Result } from '../domain/result.ts';

/** For each GlobalId the others that it shares a node with. */
export function partners(result: Result): ReadonlyMap<string, ReadonlySet<string>> {
  const found = new Map<string, Set<string>>();
  for (const { members } of result.nodes) {
    for (const one of members) {
      const own = found.get(one) ?? new Set();
      found.set(one, own);
      for (const other of members) if (other !== one) own.add(other);
    }
  }
  return found;
}
