import { type Finding, finding } from '../domain/finding.ts';
import type { Member } from '../domain/member.ts';
import type { PlaceNamer } from '../domain/place.ts';
import type { Truss } from '../domain/truss.ts';
import { between } from '../domain/vector.ts';
import { millimetres } from '../domain/words.ts';
import { labelOf } from './labels.ts';

/** m. A bar that strays less is as straight as rolled steel is. */
const NOTICED = 2e-3;

/** Of bent members, how far their bars stray from the curve at most: told once for the whole model. */
export function bentFindings(truss: Truss, members: readonly Member[], placeOf: PlaceNamer): Finding[] {
  const astray = truss.bars.filter(({ strays }) => (strays ?? 0) > NOTICED);
  if (astray.length === 0) return [];
  const worst = astray.reduce((a, b) => ((b.strays ?? 0) > (a.strays ?? 0) ? b : a));
  const rise = worst.strays ?? 0;
  const bent = [...new Set(astray.flatMap((bar) => bar.members))]
    .filter((member) => members[member].bow)
    .sort((a, b) => a - b);
  const ends = [truss.nodes[worst.from], truss.nodes[worst.to]] as const;
  const at = between(ends[0].at, ends[1].at, 0.5);
  const where = ends.every(({ place }) => place !== null) ? ` between ${ends[0].place} and ${ends[1].place}` : '';
  const who = bent.length === 1 ? `${labelOf(members[bent[0]])} is` : `${bent.length} members are`;
  return [
    finding(
      'bent-axis',
      `${who} bent; each bar runs straight from joint to joint. The bar ${worst.name}${where} strays ${millimetres(rise)} from the curve; bending from it is not in the forces.`,
      `Check it for its force times ${millimetres(rise)} as well, or divide it by more joints.`,
      {
        members: bent.map((member) => members[member].globalId),
        nodes: [worst.from, worst.to],
        at,
        place: placeOf(at),
        gap: rise,
      },
    ),
  ];
}
