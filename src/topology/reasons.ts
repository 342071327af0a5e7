import type { Contact } from './contacts.ts';
import type { Vertex } from './vertices.ts';

/**
 * Why the members of a vertex are one joint. "nearness" stands first where all of them would have come together by it alone;
 * where it is missing, the joint exists because of the evidence that follows: plates, relationships, a common assembly.
 */
export function reasonsFor(vertex: Vertex, contacts: readonly Contact[]): string[] {
  const here = new Set(vertex.stations.map(({ member }) => member));
  const inside = [...new Set(vertex.stations.flatMap((station) => station.contacts))]
    .map((index) => contacts[index])
    .filter(({ a, b }) => here.has(a) && here.has(b));
  const evidence = new Set(inside.flatMap(({ by }) => by));
  return [
    ...(holdsTogether(here, inside) ? ['nearness'] : []),
    ...(vertex.seated.size > 0 ? ['seat'] : []),
    ...[...evidence].sort(),
  ];
}

/** Whether the contacts that need no evidence lead from each member to every other. */
function holdsTogether(members: ReadonlySet<number>, contacts: readonly Contact[]): boolean {
  const near = contacts.filter(({ isNear }) => isNear);
  const [first] = members;
  const reached = new Set([first]);
  for (const member of reached) {
    for (const { a, b } of near) {
      if (a === member) reached.add(b);
      if (b === member) reached.add(a);
    }
  }
  return reached.size === members.size;
}
