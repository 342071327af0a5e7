import type { Eccentricity, Truss } from '../../domain/truss.ts';
import { dot, type Vec3 } from '../../domain/vector.ts';
import { decisive } from '../solution/decisive.ts';
import type { SolvedCase, SolvedCombination } from '../types.ts';
import { awayFrom, handedOver, type Incidence, incidenceOf } from './handed-over.ts';

/** The moment at one joint whose axes miss it as drawn. */
export interface EccentricityMoment {
  readonly node: number;
  readonly eccentricity: Eccentricity;
  /** Nm, the greatest M = dN e; null where no force was found. */
  readonly moment: number | null;
  /** Name of the combination or case; null where there is none. */
  readonly from: string | null;
}

/**
 * M = dN e at every eccentric joint, where dN is the force that the joint hands over to the member along its axis: the difference of
 * its axial forces on either side, the whole of it where the member ends (METHODS 2.3).
 */
export function eccentricityMoments(
  truss: Truss,
  cases: readonly SolvedCase[],
  combinations: readonly SolvedCombination[],
): EccentricityMoment[] {
  const drawn = truss.nodes.flatMap(({ joining }, node) =>
    (joining?.eccentricities ?? []).map((eccentricity) => ({ node, eccentricity })),
  );
  if (drawn.length === 0) return [];
  const incidence = incidenceOf(truss);
  const answers = decisive(cases, combinations).map((answer) => ({
    answer,
    forceAt: handedOver(incidence, answer, cases),
  }));
  return drawn.map(({ node, eccentricity }) => {
    let worst: { moment: number; from: string } | null = null;
    for (const { answer, forceAt } of answers) {
      const difference = forceAlong(incidence, node, eccentricity.member, answer.axialForce, forceAt);
      if (difference === null) continue;
      const moment = Math.abs(difference * eccentricity.e);
      if (worst === null || moment > worst.moment) worst = { moment, from: answer.name };
    }
    return { node, eccentricity, moment: worst?.moment ?? null, from: worst?.from ?? null };
  });
}

/** N; null where a force is not known, or where no bar of the member is left at the node. */
function forceAlong(
  { truss, barsAt }: Incidence,
  node: number,
  member: number,
  axialForce: readonly (number | null)[],
  forceAt: (node: number) => Vec3,
): number | null {
  const carrier = truss.nodes[node].carriedBy?.bar;
  if (carrier !== undefined && truss.bars[carrier].members.includes(member)) {
    return dot(forceAt(node), awayFrom(truss, carrier, truss.bars[carrier].from));
  }
  const own = (barsAt.get(node) ?? []).filter((bar) => truss.bars[bar].members.includes(member));
  if (own.length === 0) return null;
  const along = awayFrom(truss, own[0], node);
  let sum = 0;
  for (const bar of own) {
    const force = axialForce[bar];
    if (force === null) return null;
    sum += force * dot(awayFrom(truss, bar, node), along);
  }
  return sum;
}
